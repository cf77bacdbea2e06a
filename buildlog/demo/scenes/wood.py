"""Scenes of woodwork: ribs, spars, skins and the open wing."""

import itertools
from collections.abc import Callable
from math import cos, pi, sin, sqrt

from PIL import Image

from buildlog.demo.scenes import textures
from buildlog.demo.scenes.geometry import Vec, along, cross, sub, unit
from buildlog.demo.scenes.sets import card, strew
from buildlog.demo.scenes.solids import ball, bar, box, cylinder, lathe, slab
from buildlog.demo.scenes.stage import Skin, Stage
from buildlog.demo.spec import Colour, PhotoSpec

SPRUCE: Colour = (222, 190, 140)
PLY: Colour = (206, 168, 116)
STEEL = Skin((196, 200, 204), 0.4, 0.75)


def thickness(u: float, share: float = 0.13) -> float:
    """Return half the thickness at `u` of the chord, both in chords: the NACA four-digit form (NACA report 460)."""
    return 5 * share * (0.2969 * sqrt(u) - 0.126 * u - 0.3516 * u**2 + 0.2843 * u**3 - 0.1015 * u**4)


def camber(u: float) -> float:
    """Return the mean line of a 4 % camber at 0.4 of the chord, in chords (NACA report 460)."""
    return 0.04 / 0.16 * (0.8 * u - u * u) if u < 0.4 else 0.04 / 0.36 * (0.2 + 0.8 * u - u * u)


def strips(
    stage: Stage, at: Callable[[float, float], Vec], texture: Image.Image, count: int, *, nudge: float = 0.004
) -> None:
    """Lay a texture over a bent sheet as `count` strips, each shaded for its own slope; v runs from 1 down to 0."""
    w, h = texture.size
    for i in range(count):
        u0, u1 = i / count, (i + 1) / count
        piece = texture.crop((0, int(u0 * h), w, max(int(u0 * h) + 2, int(u1 * h))))
        corners = [at(u0, 0), at(u0, 1), at(u1, 1), at(u1, 0)]
        if stage.casting:
            stage.cast(corners)
        stage.decal(corners, piece, nudge=nudge)


def timber(stage: Stage, centre: Vec, size: Vec, colour: Colour) -> None:
    """Add a straight piece of timber with grain on the faces that show: front and top."""
    box(stage, centre, size, Skin(colour, 0.1))
    x, y, z = size[0] / 2, size[1] / 2, size[2] / 2
    cx, cy, cz = centre
    long = (900, max(24, int(900 * size[2] / size[0])))
    front: list[Vec] = [
        (cx - x, cy - y, cz + z),
        (cx + x, cy - y, cz + z),
        (cx + x, cy - y, cz - z),
        (cx - x, cy - y, cz - z),
    ]
    stage.decal(front, textures.wood(stage.rng, long, colour, 3), nudge=0.012)
    flat = (900, max(24, int(900 * size[1] / size[0])))
    top: list[Vec] = [
        (cx - x, cy + y, cz + z),
        (cx + x, cy + y, cz + z),
        (cx + x, cy - y, cz + z),
        (cx - x, cy - y, cz + z),
    ]
    stage.decal(top, textures.wood(stage.rng, flat, colour, 2), nudge=0.012)


def rib_jig(stage: Stage, spec: PhotoSpec) -> None:
    """A wing rib of spruce sticks in its jig, held by blocks and pins."""
    chord, z = 1.1, 0.03
    board: list[Vec] = [(-0.68, 0.24, 0.018), (0.68, 0.24, 0.018), (0.68, -0.22, 0.018), (-0.68, -0.22, 0.018)]
    box(stage, (0, 0.01, 0.009), (1.36, 0.46, 0.018), Skin((196, 160, 112)), nudge=-0.5)
    stage.decal(board, textures.wood(stage.rng, (1000, 340), (204, 172, 124), 2), nudge=-0.45)

    def at(u: float, side: float) -> Vec:
        return -chord / 2 + u * chord, chord * (camber(u) + side * thickness(u)) - 0.03, z

    knots = [(i / 18) ** 1.5 for i in range(19)]
    stick = Skin(SPRUCE, 0.12)
    for side in (1.0, -1.0):
        for a, b in itertools.pairwise(knots):
            bar(stage, at(a, side), at(b, side), 0.009, 0.012, stick)
    posts = [0.06, 0.16, 0.28, 0.4, 0.52, 0.64, 0.76, 0.87]
    for i, u in enumerate(posts):
        bar(stage, at(u, 0.94), at(u, -0.94), 0.008, 0.011, stick)
        if i + 1 < len(posts):
            bar(stage, at(u, 0.9 if i % 2 else -0.9), at(posts[i + 1], -0.9 if i % 2 else 0.9), 0.007, 0.01, stick)
        for side in (0.9, -0.9):
            p = at(u, side)
            slab(
                stage,
                (p[0], p[1] - 0.008 * side, z + 0.008),
                ((1, 0, 0), (0, 1, 0), (0, 0, 1)),
                (0.042, 0.024, 0.0016),
                Skin((188, 140, 88)),
            )
    for u in knots[2::2]:
        for side in (1.0, -1.0):
            p = at(u, side)
            box(stage, (p[0], p[1] + side * 0.016, z), (0.028, 0.018, 0.022), Skin((150, 116, 80)))
            cylinder(stage, (p[0], p[1] + side * 0.016, z), (p[0], p[1] + side * 0.016, z + 0.03), 0.0018, STEEL, n=8)
    _note(stage, spec, (0.46, -0.15, 0.021))
    strew(stage, spec, 1.0, 0.42)


def _note(stage: Stage, spec: PhotoSpec, at: Vec) -> None:
    if spec.lines:
        x, y, z = at
        corners: list[Vec] = [
            (x - 0.1, y + 0.05, z),
            (x + 0.08, y + 0.06, z),
            (x + 0.09, y - 0.04, z),
            (x - 0.09, y - 0.05, z),
        ]
        stage.decal(corners, card(spec.lines, (520, 290)), nudge=0.02)


def clamp(stage: Stage, x: float, y: float, top: float, skin: Skin) -> None:
    """Add a bow clamp gripping from the bench edge of a beam: spine behind, two jaws, screw with a bar handle."""
    bar(stage, (x, y + 0.1, 0.02), (x, y + 0.1, top + 0.05), 0.014, 0.022, skin, parts=3)
    bar(stage, (x, y + 0.1, top + 0.05), (x, y - 0.03, top + 0.05), 0.014, 0.022, skin, parts=3)
    cylinder(stage, (x, y - 0.02, top + 0.006), (x, y - 0.02, top + 0.13), 0.007, STEEL, n=12)
    lathe(stage, (x, y - 0.02, top), (0, 0, 1), [(0, 0.015), (0.01, 0.015), (0.014, 0.008)], STEEL, n=16)
    cylinder(stage, (x - 0.035, y - 0.02, top + 0.125), (x + 0.035, y - 0.02, top + 0.125), 0.004, STEEL, n=8)


def spar_clamps(stage: Stage, spec: PhotoSpec) -> None:
    """A laminated spar under a row of clamps, glue squeezed out along the joints."""
    for k in range(3):
        tone = textures.tone(SPRUCE, 0.95 + 0.06 * k)
        timber(stage, (0, 0, 0.045 + 0.028 * k), (2.3, 0.07, 0.027), tone)
    for x in (-0.9, -0.3, 0.3, 0.9):
        box(stage, (x, 0, 0.0155), (0.05, 0.2, 0.031), Skin((134, 104, 74)))
    for i in range(9):
        x = -0.78 + i * 0.195 + stage.rng.uniform(-0.012, 0.012)
        clamp(stage, x, 0.0, 0.128, Skin(spec.colour, 0.45))
        box(stage, (x, -0.01, 0.121), (0.06, 0.06, 0.012), Skin((176, 142, 100)))
    for _ in range(70):
        x, k = stage.rng.uniform(-0.85, 0.85), stage.rng.randint(0, 1)
        ball(
            stage,
            (x, -0.036, 0.0585 + 0.028 * k),
            stage.rng.uniform(0.0015, 0.0042),
            Skin((236, 214, 160), 0.8),
            n=8,
            stretch=1.4,
        )
    _note(stage, spec, (0.2, -0.22, 0.002))
    strew(stage, spec, 0.9, 0.4)


def ply_skin(stage: Stage, spec: PhotoSpec) -> None:
    """Thin plywood bent over a leading edge, pulled down with straps, ribs showing behind it."""
    chord, span = 1.5, 1.5
    sheet = textures.wood(stage.rng, (900, 560), PLY, 3)

    def skin(u: float, v: float) -> Vec:
        turn = (0.5 - u) * 1.9
        x = 0.3 * turn * turn
        return (v - 0.5) * span, -0.2 + x * 0.55, 0.2 + chord * thickness(min(0.3, x), 0.14) * (1 if turn > 0 else -0.6)

    strips(stage, lambda u, v: skin(u, v), sheet, 15)
    for i in range(7):
        x = -0.68 + i * 0.225
        for a, b in ((0.15, 0.5), (0.5, 0.9)):
            bar(stage, (x, a, 0.33 - a * 0.06), (x, b, 0.33 - b * 0.09), 0.012, 0.012, Skin(SPRUCE), parts=2)
        bar(stage, (x, 0.15, 0.14), (x, 0.9, 0.2), 0.012, 0.012, Skin(SPRUCE), parts=3)
        bar(stage, (x, 0.5, 0.3), (x, 0.5, 0.16), 0.012, 0.012, Skin(SPRUCE))
        strap = [skin(u / 10, (x + span / 2) / span) for u in range(1, 10)]
        for a3, b3 in itertools.pairwise(strap):
            face_strap(stage, a3, b3, Skin(spec.colour, 0.1))
    box(stage, (0, 0.52, 0.22), (1.6, 0.03, 0.16), Skin(SPRUCE))
    for x in (-0.55, 0.55):
        box(stage, (x, 0.2, 0.05), (0.08, 0.7, 0.1), Skin((120, 92, 66)))
    strew(stage, spec, 1.1, -0.3)


def face_strap(stage: Stage, a: Vec, b: Vec, skin: Skin) -> None:
    """Add one piece of a strap that lies on a bent skin."""
    w = 0.011
    normal = unit(cross((1.0, 0.0, 0.0), sub(b, a)))
    lift = (normal[0] * 0.003, normal[1] * 0.003, normal[2] * 0.003)
    pts: list[Vec] = [
        (p[0] + s * w + lift[0], p[1] + lift[1], p[2] + lift[2]) for p, s in ((a, -1), (a, 1), (b, 1), (b, -1))
    ]
    stage.face(pts, skin, normal, both=True, nudge=0.02)


def wing_frame(stage: Stage, spec: PhotoSpec) -> None:
    """An open wing on trestles: two spars, a row of ribs, the drag bracing."""
    chord = 1.25

    def at(x: float, u: float, side: float) -> Vec:
        return x, -0.55 + u * chord, 0.62 + chord * (camber(u) + side * thickness(u))

    knots = [(i / 11) ** 1.4 for i in range(12)]
    for i in range(13):
        x = -1.9 + i * 0.32
        for side in (1.0, -1.0):
            for a, b in itertools.pairwise(knots):
                bar(stage, at(x, a, side), at(x, b, side), 0.012, 0.012, Skin(SPRUCE, 0.1))
        for u in (0.12, 0.3, 0.45, 0.66, 0.82):
            bar(stage, at(x, u, 1), at(x, u, -1), 0.01, 0.01, Skin(SPRUCE, 0.1))
    for u, deep in ((0.2, 0.15), (0.66, 0.11)):
        p = at(0, u, 0)
        for i in range(12):
            box(stage, (-1.9 + i * 0.32 + 0.16, p[1], p[2]), (0.31, 0.024, deep), Skin((214, 178, 126), 0.1))
    for i in range(0, 12, 3):
        a, b = at(-1.9 + i * 0.32, 0.2, 0), at(-1.9 + (i + 3) * 0.32, 0.66, 0)
        cylinder(stage, a, b, 0.0035, STEEL, n=6)
    _trestles(stage)
    strew(stage, spec, 2.2, 0.4)


def _trestles(stage: Stage) -> None:
    for x in (-1.35, 1.35):
        box(stage, (x, 0.05, 0.5), (0.09, 1.0, 0.07), Skin((128, 98, 68)))
        for y in (-0.38, 0.48):
            bar(stage, (x - 0.18, y, 0), (x, y, 0.47), 0.05, 0.04, Skin((118, 90, 62)))
            bar(stage, (x + 0.18, y, 0), (x, y, 0.47), 0.05, 0.04, Skin((118, 90, 62)))


def coupon(stage: Stage, spec: PhotoSpec) -> None:
    """Broken glue coupons in a row, wood fibre torn on their faces, with the card of the batch."""
    for i in range(4):
        x = -0.27 + i * 0.15
        for k, y in enumerate((0.03, -0.07)):
            turn = stage.rng.uniform(-0.12, 0.12)
            box(stage, (x, y, 0.012), (0.045, 0.085, 0.024), Skin(SPRUCE, 0.1), turn=turn)
            top: list[Vec] = [
                (x - 0.02, y + 0.04, 0.0245),
                (x + 0.02, y + 0.04, 0.0245),
                (x + 0.02, y - 0.0, 0.0245),
                (x - 0.02, y - 0.0, 0.0245),
            ]
            stage.decal(top, textures.wood(stage.rng, (90, 90), (168 + 20 * k, 122, 72), 9), nudge=0.02)
    corners: list[Vec] = [(-0.3, -0.13, 0.002), (-0.06, -0.14, 0.002), (-0.06, -0.28, 0.002), (-0.31, -0.27, 0.002)]
    stage.decal(corners, card(spec.lines, (640, 380), band=spec.colour), nudge=0.01)
    for i in range(3):
        a = i * 2 * pi / 3
        ball(stage, (0.3 + 0.03 * cos(a), -0.12 + 0.03 * sin(a), 0.004), 0.004, Skin((236, 214, 160), 0.8), n=10)
    cylinder(stage, along((0.12, -0.2, 0.006), (0.4, -0.12, 0.006), 0), (0.4, -0.12, 0.006), 0.006, STEEL, n=10)
    strew(stage, spec, 0.6, 0.3)
