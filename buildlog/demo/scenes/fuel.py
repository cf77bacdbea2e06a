"""Scenes of fuel: carburettor, tank and hoses, the flow trial; and the firewall they meet at."""

from math import pi, sin

from buildlog.demo.scenes.engine import BLACK, CAST
from buildlog.demo.scenes.geometry import Vec
from buildlog.demo.scenes.metal import ALLOY, BRASS, STEEL
from buildlog.demo.scenes.sets import card, strew
from buildlog.demo.scenes.solids import bolt, box, cable, curve, cylinder, lathe, ring_of, tube
from buildlog.demo.scenes.stage import Skin, Stage
from buildlog.demo.spec import PhotoSpec

BRAID = Skin((120, 122, 126), 0.3, 0.5)
RED = Skin((168, 44, 38), 0.5, 0.3)
BLUE = Skin((44, 78, 150), 0.5, 0.3)


def fitting(stage: Stage, at: Vec, axis: Vec, size: float) -> None:
    """Add a hose end: blue nut, red socket."""
    lathe(stage, at, axis, [(0, 0.0), (0, size), (size, size), (size, size * 0.8)], BLUE, n=6)
    lathe(stage, at, axis, [(size, size * 0.85), (size * 2.2, size * 0.95), (size * 2.3, 0)], RED, n=20)


def hose(stage: Stage, points: list[Vec], radius: float, skin: Skin = BRAID) -> None:
    """Add a hose smoothed through the points."""
    tube(stage, curve(points, 9), radius, skin, n=16)


def carburettor(stage: Stage, spec: PhotoSpec) -> None:
    """The float carburettor under its intake elbow, fuel line and heat box attached."""
    lathe(
        stage,
        (0, 0.05, 0.42),
        (0, 0, -1),
        [(0, 0.075), (0.02, 0.075), (0.02, 0.05), (0.15, 0.05), (0.15, 0.062), (0.18, 0.062)],
        ALLOY,
        n=36,
    )
    lathe(
        stage,
        (0.1, 0.0, 0.3),
        (0, 0, -1),
        [(0, 0.0), (0, 0.062), (0.07, 0.06), (0.1, 0.05), (0.112, 0.016), (0.125, 0.014), (0.125, 0)],
        Skin((186, 180, 160), 0.35, 0.55),
        n=34,
    )
    box(stage, (0.06, 0.01, 0.31), (0.16, 0.11, 0.03), ALLOY)
    for p in ring_of((0.1, 0.0, 0.3), (0, 0, 1), 0.053, 4, 0.7):
        bolt(stage, p, (0, 0, 1), 0.006, BRASS)
    box(stage, (0, 0.06, 0.13), (0.2, 0.2, 0.18), Skin((176, 180, 182), 0.35, 0.6))
    hose(stage, [(-0.1, 0.04, 0.13), (-0.25, 0.02, 0.13), (-0.45, 0.2, 0.25)], 0.034, Skin(spec.colour, 0.2))
    fitting(stage, (0.165, -0.01, 0.28), (1, 0, 0), 0.017)
    hose(stage, [(0.2, -0.01, 0.28), (0.3, -0.01, 0.3), (0.38, 0.08, 0.42), (0.48, 0.2, 0.62)], 0.013)
    cylinder(stage, (-0.075, -0.02, 0.36), (-0.04, -0.02, 0.36), 0.018, STEEL, n=20)
    cylinder(stage, (-0.07, -0.03, 0.36), (-0.06, -0.05, 0.29), 0.006, BRASS, n=10)
    cable(stage, [(-0.06, -0.05, 0.29), (-0.16, -0.07, 0.27), (-0.45, 0.1, 0.42)], 0.0035, STEEL)
    _plate(stage, spec)
    strew(stage, spec, 0.8, 0.4)


def _plate(stage: Stage, spec: PhotoSpec) -> None:
    if spec.lines:
        corners: list[Vec] = [(0.16, -0.17, 0.12), (0.36, -0.17, 0.12), (0.36, -0.2, 0.0), (0.16, -0.2, 0.0)]
        stage.decal(corners, card(spec.lines, (560, 340)), nudge=0.02)


def tank(stage: Stage, spec: PhotoSpec) -> None:
    """The fuel tank with filler, sump, outlet and hose."""
    skin = Skin(spec.colour, 0.3, 0.55)
    box(stage, (0, 0.08, 0.25), (0.84, 0.4, 0.3), skin)
    for x in (-0.24, 0.0, 0.24):
        for y in (-0.122,):
            box(stage, (x, y, 0.25), (0.012, 0.006, 0.29), Skin(spec.colour, 0.4, 0.7))
    for x in (-0.3, 0.3):
        box(stage, (x, 0.08, 0.25), (0.05, 0.412, 0.312), Skin((68, 70, 74), 0.2))
        box(stage, (x, 0.0, 0.05), (0.06, 0.5, 0.1), Skin((140, 108, 74)))
    lathe(
        stage,
        (-0.12, 0.1, 0.4),
        (0, 0, 1),
        [(0, 0.045), (0.03, 0.045), (0.03, 0.055), (0.055, 0.055), (0.06, 0)],
        BLACK,
        n=30,
    )
    tube(stage, curve([(0.16, 0.14, 0.4), (0.16, 0.14, 0.48), (0.22, 0.1, 0.52), (0.3, 0.1, 0.46)]), 0.009, ALLOY)
    lathe(stage, (0.42, 0.0, 0.14), (1, 0, 0), [(0, 0.032), (0.02, 0.03), (0.02, 0)], ALLOY, n=24)
    fitting(stage, (0.44, 0.0, 0.14), (1, 0, 0), 0.018)
    hose(stage, [(0.48, 0.0, 0.14), (0.58, -0.04, 0.1), (0.5, -0.24, 0.02), (0.2, -0.3, 0.016)], 0.014)
    fitting(stage, (0.17, -0.3, 0.016), (-1, -0.1, 0), 0.018)
    for i in range(7):
        bolt(stage, (-0.2 + i * 0.06, -0.122, 0.34 + 0.02 * sin(i * pi)), (0, -1, 0), 0.005, STEEL)
    if spec.lines:
        corners: list[Vec] = [(-0.17, -0.124, 0.3), (0.08, -0.124, 0.3), (0.08, -0.124, 0.16), (-0.17, -0.124, 0.16)]
        stage.decal(corners, card(spec.lines, (560, 310)), nudge=0.05)
    strew(stage, spec, 1.2, 0.5)


def flow_trial(stage: Stage, spec: PhotoSpec) -> None:
    """Fuel run through the line into a measuring jug, a stop watch beside it, a card with the run."""
    glass = Skin((206, 214, 216), 0.9, 0.25)
    lathe(stage, (0.12, 0.04, 0), (0, 0, 1), [(0, 0.0), (0, 0.1), (0.004, 0.1), (0.3, 0.11), (0.3, 0.104)], glass, n=40)
    lathe(
        stage,
        (0.12, 0.04, 0.005),
        (0, 0, 1),
        [(0, 0.101), (0.17, 0.1075), (0.17, 0.0)],
        Skin((226, 196, 120), 0.8),
        n=40,
    )
    for i in range(9):
        z = 0.03 + i * 0.03
        wide = 0.05 if i % 2 else 0.08
        corner: list[Vec] = [
            (0.12 - wide / 2, -0.0745, z + 0.0022),
            (0.12 + wide / 2, -0.0745, z + 0.0022),
            (0.12 + wide / 2, -0.0745, z),
            (0.12 - wide / 2, -0.0745, z),
        ]
        stage.decal(corner, card((), (30, 4), paper=(60, 66, 70)), nudge=0.1)
    hose(
        stage, [(-0.6, 0.3, 0.6), (-0.3, 0.2, 0.5), (0.02, 0.1, 0.46), (0.11, 0.05, 0.36), (0.115, 0.045, 0.31)], 0.014
    )
    cylinder(stage, (0.115, 0.045, 0.31), (0.118, 0.042, 0.17), 0.0045, Skin((232, 206, 140), 0.9), n=10)
    watch: Vec = (-0.15, -0.12, 0.0)
    lathe(stage, watch, (0, 0, 1), [(0, 0.052), (0.02, 0.052), (0.022, 0.046)], STEEL, n=32)
    x, y, _ = watch
    face: list[Vec] = [
        (x - 0.042, y + 0.03, 0.0225),
        (x + 0.042, y + 0.03, 0.0225),
        (x + 0.042, y - 0.022, 0.0225),
        (x - 0.042, y - 0.022, 0.0225),
    ]
    shown = card(spec.lines[:1] or ("4:52.3",), (320, 190), paper=(182, 198, 168), ink=(22, 30, 20))
    stage.decal(face, shown, nudge=0.04, shade=False)
    if len(spec.lines) > 1:
        corners: list[Vec] = [(-0.44, 0.0, 0.001), (-0.22, 0.02, 0.001), (-0.22, -0.13, 0.001), (-0.46, -0.15, 0.001)]
        stage.decal(corners, card(spec.lines[1:], (620, 430)), nudge=0.0)
    strew(stage, spec, 1.0, 0.45)


def firewall(stage: Stage, spec: PhotoSpec) -> None:
    """The steel firewall with mount lugs, gascolator, grommets and lines through it."""
    for x, z in ((-0.42, 0.75), (0.42, 0.75), (-0.42, 0.2), (0.42, 0.2)):
        lathe(
            stage, (x, 0, z), (0, -1, 0), [(0, 0.07), (0.01, 0.07), (0.01, 0.035), (0.05, 0.03), (0.05, 0)], CAST, n=28
        )
        cup = Skin(spec.colour, 0.45)
        lathe(stage, (x, -0.05, z), (0, -1, 0), [(0, 0.036), (0.05, 0.03), (0.05, 0.02), (0.055, 0)], cup, n=26)
        bolt(stage, (x, -0.1, z), (0, -1, 0), 0.011, STEEL)
    lathe(
        stage,
        (-0.16, -0.06, 0.36),
        (0, 0, -1),
        [(0, 0), (0, 0.045), (0.03, 0.045), (0.03, 0.038), (0.11, 0.036), (0.12, 0.012), (0.14, 0.01), (0.14, 0)],
        ALLOY,
        n=30,
    )
    fitting(stage, (-0.11, -0.06, 0.345), (1, 0, 0), 0.016)
    hose(stage, [(-0.07, -0.06, 0.345), (0.05, -0.1, 0.34), (0.12, -0.3, 0.3)], 0.013)
    for x, z in ((0.1, 0.6), (0.18, 0.6), (0.14, 0.52), (-0.1, 0.62)):
        lathe(stage, (x, 0, z), (0, -1, 0), [(0, 0.026), (0.008, 0.026), (0.008, 0.012), (0.014, 0.0)], BRASS, n=20)
        cable(stage, [(x, -0.01, z), (x + 0.02, -0.12, z - 0.03), (x + 0.1, -0.32, z - 0.16)], 0.006, BLACK)
    for i in range(13):
        for z in (0.02, 0.94):
            lathe(stage, (-0.6 + i * 0.1, 0, z), (0, -1, 0), [(0, 0.007), (0.003, 0.005), (0.0035, 0)], STEEL, n=12)
