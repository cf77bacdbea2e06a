"""Scenes of the converted engine: on its stand, and its propeller end under the dial gauge."""

from math import cos, pi, sin

from PIL import Image, ImageDraw, ImageFont

from buildlog.demo.scenes import textures
from buildlog.demo.scenes.geometry import Vec
from buildlog.demo.scenes.metal import ALLOY, BRASS, RAW, STEEL
from buildlog.demo.scenes.sets import strew
from buildlog.demo.scenes.solids import bolt, box, curve, cylinder, lathe, ring_of, tube
from buildlog.demo.scenes.stage import Skin, Stage
from buildlog.demo.spec import PhotoSpec

CAST = Skin((158, 160, 162), 0.25, 0.4)
BLACK = Skin((38, 40, 44), 0.4)
RUST = Skin((142, 104, 82), 0.25, 0.35)


def flat_four(stage: Stage, at: Vec, spec: PhotoSpec) -> None:
    """Add the whole engine, its propeller end towards the viewer: case, four finned cylinders, hub, sump, pipes."""
    x, y, z = at
    box(stage, at, (0.2, 0.52, 0.26), CAST)
    lathe(stage, (x, y - 0.26, z), (0, -1, 0), [(0, 0.12), (0.05, 0.105), (0.09, 0.07), (0.1, 0.0)], CAST, n=30)
    for side in (-1.0, 1.0):
        for back in (-0.14, 0.13):
            foot: Vec = (x + side * 0.1, y + back + side * 0.02, z)
            _barrel(stage, foot, side)
            pipe = [
                (foot[0] + side * 0.2, foot[1], z - 0.06),
                (foot[0] + side * 0.19, foot[1], z - 0.2),
                (x + side * 0.12, foot[1] + 0.05, z - 0.27),
                (x + side * 0.12, y + 0.42, z - 0.28),
            ]
            tube(stage, curve(pipe, 4), 0.019, RUST, n=12)
            lead = [
                (foot[0] + side * 0.24, foot[1], z + 0.07),
                (foot[0] + side * 0.12, foot[1] + 0.02, z + 0.2),
                (x + side * 0.04, y + 0.16, z + 0.23),
            ]
            tube(stage, curve(lead, 4), 0.006, Skin(spec.colour, 0.4), n=8)
        box(stage, (x + side * 0.36, y - 0.005, z), (0.05, 0.42, 0.13), Skin(textures.tone(spec.colour, 0.8), 0.5))
    box(stage, (x, y + 0.2, z + 0.2), (0.13, 0.13, 0.14), BLACK)
    box(stage, (x, y, z - 0.17), (0.17, 0.36, 0.08), CAST)
    hub_face(stage, (x, y - 0.36, z), 0.075)


def _barrel(stage: Stage, foot: Vec, side: float) -> None:
    profile: list[tuple[float, float]] = []
    for k in range(8):
        s = 0.01 + k * 0.017
        profile += [(s, 0.062), (s + 0.004, 0.082), (s + 0.0075, 0.082), (s + 0.011, 0.062)]
    lathe(stage, foot, (side, 0, 0), profile, RAW, n=22)
    box(stage, (foot[0] + side * 0.19, foot[1], foot[2]), (0.09, 0.17, 0.15), CAST)


def hub_face(stage: Stage, at: Vec, radius: float) -> None:
    """Add a propeller flange looking at the viewer, six bolts round its boss."""
    lathe(
        stage,
        at,
        (0, -1, 0),
        [
            (-0.06, radius * 0.6),
            (0.0, radius * 0.62),
            (0.0, radius),
            (0.012, radius),
            (0.012, radius * 0.42),
            (0.035, radius * 0.4),
            (0.035, 0.0),
        ],
        STEEL,
        n=44,
    )
    for p in ring_of((at[0], at[1] - 0.012, at[2]), (0, -1, 0), radius * 0.7, 6, 0.3):
        bolt(stage, p, (0, -1, 0), 0.0075, STEEL)


def engine_stand(stage: Stage, spec: PhotoSpec) -> None:
    """The engine on a welded stand on the shop floor."""
    flat_four(stage, (0, 0, 0.86), spec)
    post = Skin((60, 84, 108), 0.4)
    for x in (-0.3, 0.3):
        cylinder(stage, (x, 0.3, 0), (x * 0.4, 0.3, 0.86), 0.024, post, n=14)
        cylinder(stage, (x, 0.3, 0.05), (x, -0.5, 0.05), 0.024, post, n=14)
        cylinder(stage, (x, -0.45, 0.03), (x * 0.4, 0.22, 0.62), 0.018, post, n=12)
    cylinder(stage, (-0.3, 0.3, 0.3), (0.3, 0.3, 0.3), 0.02, post, n=12)
    strew(stage, spec, 1.8, 0.5)


def hub_gauge(stage: Stage, spec: PhotoSpec) -> None:
    """A dial gauge on its magnet foot, its tip on the face of the propeller flange."""
    hub_face(stage, (0.0, 0.1, 0.2), 0.11)
    lathe(stage, (0, 0.13, 0.2), (0, 1, 0), [(0, 0.068), (0.03, 0.068), (0.03, 0.095), (0.09, 0.1)], ALLOY, n=64)
    nose = [(0, 0.1), (0.02, 0.118), (0.05, 0.13), (0.11, 0.14), (0.17, 0.165), (0.19, 0.17), (0.2, 0.17)]
    lathe(stage, (0, 0.22, 0.2), (0, 1, 0), nose, CAST, n=72)
    for p in ring_of((0, 0.215, 0.2), (0, -1, 0), 0.088, 8, 0.2):
        bolt(stage, p, (0, -1, 0), 0.006, BRASS)
    box(stage, (0, 0.56, 0.22), (0.34, 0.3, 0.3), CAST, nudge=-0.1)
    for x in (-0.13, 0.13):
        box(stage, (x, 0.5, 0.035), (0.07, 0.5, 0.07), Skin((136, 106, 74)))
    box(stage, (-0.24, -0.02, 0.03), (0.07, 0.06, 0.06), Skin((44, 74, 112), 0.3))
    cylinder(stage, (-0.24, -0.02, 0.06), (-0.24, -0.02, 0.3), 0.006, STEEL, n=14)
    cylinder(stage, (-0.24, -0.02, 0.27), (-0.12, -0.06, 0.27), 0.005, STEEL, n=12)
    dial(stage, (-0.1, -0.08, 0.255), 0.05, spec.lines[0] if spec.lines else "0.01 mm", spec.angle * 4 + 30)
    cylinder(stage, (-0.085, 0.06, 0.215), (-0.098, -0.045, 0.245), 0.003, STEEL, n=10)
    strew(stage, spec, 0.8, 0.4)


def dial(stage: Stage, at: Vec, radius: float, unit_text: str, needle: float) -> None:
    """Add a dial facing the viewer with ticks and a needle at `needle` [degrees from the top]."""
    lathe(
        stage,
        at,
        (0, -1, 0),
        [(-0.4 * radius, 0.94 * radius), (0, radius), (0.08 * radius, radius), (0.08 * radius, 0.88 * radius)],
        STEEL,
        n=36,
    )
    picture = dial_face(unit_text, needle)
    r, y = 0.9 * radius, at[1] - 0.06 * radius
    corners: list[Vec] = [
        (at[0] - r, y, at[2] + r),
        (at[0] + r, y, at[2] + r),
        (at[0] + r, y, at[2] - r),
        (at[0] - r, y, at[2] - r),
    ]
    stage.decal(corners, picture, nudge=0.02)


def dial_face(text: str, needle: float, *, dark: bool = False) -> Image.Image:
    """Return a round dial, see-through outside the circle."""
    size = 260
    paper, ink = ((26, 28, 30), (236, 236, 228)) if dark else ((242, 240, 230), (24, 26, 30))
    picture = Image.new("RGBA", (size, size), (0, 0, 0, 0))
    pen = ImageDraw.Draw(picture)
    pen.ellipse((2, 2, size - 2, size - 2), fill=(*paper, 255))
    m = size / 2
    for i in range(41):
        t = (-135 + 270 * i / 40) * pi / 180
        inner = 0.74 if i % 5 == 0 else 0.82
        pen.line(
            (m + m * inner * sin(t), m - m * inner * cos(t), m + m * 0.9 * sin(t), m - m * 0.9 * cos(t)),
            fill=(*ink, 255),
            width=5 if i % 5 == 0 else 2,
        )
    arc = (14, 14, size - 14, size - 14)
    if dark:
        pen.arc(arc, 330, 22, fill=(88, 150, 70, 255), width=9)
        pen.arc(arc, 22, 34, fill=(190, 48, 40, 255), width=9)
    font = ImageFont.load_default(min(34, 300 / max(6, len(text))))
    pen.text((m, m * 1.48), text, fill=(*ink, 255), font=font, anchor="mm")
    t = needle * pi / 180
    pen.line(
        (m - 24 * sin(t), m + 24 * cos(t), m + m * 0.74 * sin(t), m - m * 0.74 * cos(t)),
        fill=(226, 96, 48, 255) if dark else (20, 20, 24, 255),
        width=6,
    )
    pen.ellipse((m - 11, m - 11, m + 11, m + 11), fill=(*ink, 255))
    return picture
