"""Scenes of the shop itself: labels, the bench, fabric, a person at work."""

from math import sin

from buildlog.demo.scenes import textures
from buildlog.demo.scenes.engine import BLACK
from buildlog.demo.scenes.geometry import Vec
from buildlog.demo.scenes.metal import ALLOY, STEEL
from buildlog.demo.scenes.sets import card, strew
from buildlog.demo.scenes.solids import ball, bar, box, cylinder, lathe, sheet, tube
from buildlog.demo.scenes.stage import Skin, Stage
from buildlog.demo.scenes.wood import PLY, SPRUCE, strips, thickness, timber
from buildlog.demo.spec import PhotoSpec

CLOTH = (224, 218, 200)
FLESH = (176, 128, 98)


def label(stage: Stage, spec: PhotoSpec) -> None:
    """A tin or carton with the label of its batch, close enough to read."""
    tin = Skin((196, 198, 200), 0.4, 0.6)
    lathe(
        stage,
        (-0.24, 0.1, 0),
        (0, 0, 1),
        [(0, 0.09), (0.2, 0.09), (0.205, 0.094), (0.212, 0.09), (0.212, 0.08), (0.204, 0.078), (0.204, 0)],
        tin,
        n=44,
    )
    box(stage, (0.08, 0.08, 0.13), (0.36, 0.2, 0.26), Skin((188, 152, 108), 0.05))
    corners: list[Vec] = [
        (-0.08, -0.0205, 0.245),
        (0.245, -0.0205, 0.245),
        (0.245, -0.0205, 0.035),
        (-0.08, -0.0205, 0.035),
    ]
    stage.decal(corners, card(spec.lines, (800, 520), band=spec.colour), nudge=0.08)
    _wrap(stage, spec)
    strew(stage, spec, 0.8, 0.36)


def _wrap(stage: Stage, spec: PhotoSpec) -> None:
    """Put a plain colour band round the tin: the label's other half."""
    lathe(stage, (-0.24, 0.1, 0.03), (0, 0, 1), [(0, 0.0908), (0.14, 0.0908)], Skin((236, 232, 220), 0.2), n=44)
    lathe(stage, (-0.24, 0.1, 0.12), (0, 0, 1), [(0, 0.0914), (0.05, 0.0914)], Skin(spec.colour, 0.3), n=44)


def bench_tools(stage: Stage, spec: PhotoSpec) -> None:
    """The bench at the end of an evening: plane, chisels, mallet, glue pot, the task card."""
    box(stage, (-0.2, 0.05, 0.04), (0.3, 0.07, 0.05), Skin(textures.tone(SPRUCE, 0.82), 0.3), turn=0.3)
    ball(stage, (-0.28, 0.03, 0.09), 0.026, Skin((112, 68, 44), 0.5))
    box(stage, (-0.16, 0.06, 0.1), (0.03, 0.04, 0.09), Skin((112, 68, 44), 0.5), turn=0.3)
    for i in range(4):
        x, y = 0.12 + i * 0.07, -0.05 + 0.01 * i
        tube(stage, [(x, y + 0.14, 0.014), (x + 0.01, y, 0.014)], 0.013, Skin(spec.colour, 0.5), n=14)
        box(stage, (x + 0.014, y - 0.06, 0.012), (0.018, 0.12, 0.004), STEEL, turn=0.06)
    cylinder(stage, (-0.5, 0.1, 0.03), (-0.46, -0.2, 0.03), 0.014, Skin((190, 150, 100), 0.3), n=14)
    box(stage, (-0.5, 0.14, 0.045), (0.16, 0.08, 0.09), Skin((168, 128, 82), 0.2), turn=0.12)
    if spec.lines:
        corners: list[Vec] = [(-0.2, -0.12, 0.002), (0.06, -0.14, 0.002), (0.05, -0.3, 0.002), (-0.22, -0.28, 0.002)]
        stage.decal(corners, card(spec.lines, (620, 380), band=(60, 72, 84)), nudge=0.0)
    for _ in range(26):
        x, y = stage.rng.uniform(-0.5, 0.5), stage.rng.uniform(-0.25, 0.3)
        curl = [(x + 0.012 * k, y + 0.01 * sin(k), 0.006 + 0.006 * abs(sin(k * 0.9))) for k in range(4)]
        tube(stage, curl, 0.0022, Skin(SPRUCE, 0.1), n=6)
    strew(stage, spec, 0.9, 0.4)


def doping(stage: Stage, spec: PhotoSpec) -> None:
    """A covered wing panel, rib stitching under tapes, part of it already coated; brush and pot on it."""
    cloth = textures.woven(stage.rng, (900, 520), CLOTH)
    coated = textures.woven(stage.rng, (900, 520), spec.colour)
    cloth.paste(coated.crop((0, 0, 470, 520)), (0, 0))

    def skin(u: float, v: float) -> Vec:
        return (v - 0.5) * 2.0, 0.62 - u * 1.1, 0.5 + 0.9 * thickness(min(0.95, 0.06 + 0.9 * (1 - u)), 0.15)

    strips(stage, skin, cloth, 14, nudge=-0.35)
    for i in range(7):
        v = 0.08 + i * 0.14
        tone = Skin(textures.tone(spec.colour if v < 0.52 else CLOTH, 0.9))
        for k in range(12):
            u0, u1 = k / 12, (k + 1) / 12
            a, b, c, d = skin(u0, v - 0.012), skin(u0, v + 0.012), skin(u1, v + 0.012), skin(u1, v - 0.012)
            lift = [(p[0], p[1], p[2] + 0.004) for p in (a, b, c, d)]
            stage.face(lift, tone, (0, -0.2, 0.98), both=True, nudge=0.08)
            ball(stage, (a[0] + 0.024, 0.5 * (a[1] + d[1]), 0.5 * (a[2] + d[2]) + 0.004), 0.004, tone, n=6)
    p = skin(0.55, 0.5)
    lathe(stage, (p[0], p[1], p[2]), (0, 0, 1), [(0, 0.06), (0.1, 0.06), (0.1, 0.055), (0.09, 0)], ALLOY, n=30)
    tube(
        stage,
        [(p[0] + 0.1, p[1] - 0.1, p[2] + 0.02), (p[0] + 0.32, p[1] - 0.16, p[2] + 0.05)],
        0.011,
        Skin((150, 70, 48), 0.4),
        n=12,
    )
    box(stage, (p[0] + 0.07, p[1] - 0.095, p[2] + 0.016), (0.08, 0.05, 0.02), Skin((60, 48, 40)), turn=-0.25)
    for x in (-0.7, 0.7):
        box(stage, (x, 0.1, 0.36), (0.09, 0.9, 0.07), Skin((126, 96, 68)), nudge=-2.0)
        for y in (-0.2, 0.4):
            bar(stage, (x, y, 0), (x, y, 0.34), 0.05, 0.05, Skin((112, 86, 60)), nudge=-2.0)


def stock(stage: Stage, spec: PhotoSpec) -> None:
    """Raw material as it came: sheets of ply, sticks of spruce or bundles of tube, a label on the end."""
    for k in range(5):
        timber(stage, (0.03 * (k % 2), 0.3, 0.012 + k * 0.022), (1.5, 0.5, 0.018), textures.tone(PLY, 0.94 + 0.03 * k))
    for i in range(9):
        x, z = -0.06 + 0.055 * (i % 5), 0.03 + 0.05 * (i // 5)
        cylinder(stage, (-0.75, -0.1 - x, z), (0.72, -0.1 - x, z), 0.022, Skin(spec.colour, 0.35, 0.5), n=16)
    for x in (-0.4, 0.35):
        lathe(stage, (x, -0.15, 0.05), (1, 0, 0), [(0, 0.155), (0.03, 0.155)], BLACK, n=8)
    corners: list[Vec] = [(-0.2, -0.36, 0.13), (0.14, -0.36, 0.13), (0.14, -0.4, 0.0), (-0.2, -0.4, 0.0)]
    stage.decal(corners, card(spec.lines, (700, 320), band=spec.colour), nudge=0.3)
    sheet(stage, lambda u, v: (-0.2 + 0.34 * u, -0.35 - 0.04 * v, 0.13 - 0.13 * v), Skin((206, 190, 150)), nu=2, nv=2)
