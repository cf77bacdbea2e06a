"""Scenes of small things fixed to a wall: the fuel valve, an engraved plate, the hand extinguisher."""

from math import cos, sin

from buildlog.demo.scenes.fuel import RED, fitting, hose
from buildlog.demo.scenes.geometry import Vec
from buildlog.demo.scenes.metal import ALLOY, STEEL
from buildlog.demo.scenes.sets import card
from buildlog.demo.scenes.solids import bar, bolt, box, cylinder, lathe
from buildlog.demo.scenes.stage import Skin, Stage
from buildlog.demo.spec import PhotoSpec


def fuel_valve(stage: Stage, spec: PhotoSpec) -> None:
    """The fuel valve on its panel: red handle, engraved ring, placards for its two ends."""
    box(stage, (0, -0.01, 0.3), (0.62, 0.02, 0.4), Skin((118, 122, 126), 0.25), nudge=-0.3)
    hub: Vec = (0.0, -0.02, 0.32)
    lathe(stage, hub, (0, -1, 0), [(0, 0.085), (0.006, 0.085), (0.008, 0.08), (0.008, 0.03)], ALLOY, n=56)
    lathe(stage, hub, (0, -1, 0), [(0.008, 0.032), (0.04, 0.028), (0.045, 0.02), (0.046, 0)], STEEL, n=40)
    t = 0.25 + stage.rng.uniform(-0.05, 0.05)
    tip: Vec = (hub[0] + 0.15 * cos(t), hub[1] - 0.055, hub[2] + 0.15 * sin(t))
    tail: Vec = (hub[0] - 0.04 * cos(t), hub[1] - 0.055, hub[2] - 0.04 * sin(t))
    bar(stage, tail, tip, 0.03, 0.022, Skin(spec.colour, 0.55), parts=5)
    lathe(stage, (tip[0], tip[1] + 0.012, tip[2]), (0, -1, 0), [(0, 0.018), (0.024, 0.018), (0.026, 0)], RED, n=26)
    for x, word in ((-0.19, "OFF"), (0.19, "ON")):
        plate: list[Vec] = [
            (x - 0.07, -0.0205, 0.235),
            (x + 0.07, -0.0205, 0.235),
            (x + 0.07, -0.0205, 0.175),
            (x - 0.07, -0.0205, 0.175),
        ]
        stage.decal(plate, card((word,), (280, 120), paper=(30, 32, 36), ink=(240, 238, 228)), nudge=0.1)
    for x in (-0.27, 0.27):
        for z in (0.14, 0.46):
            bolt(stage, (x, -0.02, z), (0, -1, 0), 0.007, STEEL)
    fitting(stage, (0.0, -0.03, 0.1), (0, -0.3, -1), 0.02)
    hose(stage, [(0.0, -0.05, 0.06), (0.03, -0.08, -0.08), (0.2, -0.1, -0.2), (0.5, -0.06, -0.24)], 0.015)


def plate(stage: Stage, spec: PhotoSpec) -> None:
    """An engraved plate held by four rivets, an older tag beside it."""
    box(stage, (0, -0.004, 0.3), (0.46, 0.008, 0.26), ALLOY, nudge=-0.2)
    face: list[Vec] = [(-0.215, -0.0085, 0.42), (0.215, -0.0085, 0.42), (0.215, -0.0085, 0.18), (-0.215, -0.0085, 0.18)]
    stage.decal(face, card(spec.lines, (860, 480), paper=(196, 198, 198), ink=(34, 36, 40)), nudge=0.05)
    for x in (-0.205, 0.205):
        for z in (0.19, 0.41):
            lathe(stage, (x, -0.009, z), (0, -1, 0), [(0, 0.011), (0.004, 0.009), (0.006, 0)], STEEL, n=20)
    box(stage, (-0.32, -0.003, 0.02), (0.2, 0.006, 0.09), Skin((128, 112, 72), 0.3, 0.5), turn=0.0)
    for x in (-0.4, -0.24):
        lathe(stage, (x, -0.006, 0.02), (0, -1, 0), [(0, 0.008), (0.004, 0.006), (0.005, 0)], STEEL, n=16)
    cylinder(stage, (0.36, -0.02, -0.2), (0.36, -0.02, 0.7), 0.012, Skin(spec.colour, 0.4), n=20)
    for z in (0.0, 0.5):
        box(stage, (0.36, -0.015, z), (0.05, 0.03, 0.02), STEEL)


def extinguisher(stage: Stage, spec: PhotoSpec) -> None:
    """The hand extinguisher upright on the bench: bottle, valve head, handle, gauge, its label."""
    red = Skin(spec.colour, 0.55)
    bottle = [(0, 0.05), (0.01, 0.062), (0.03, 0.066), (0.26, 0.066), (0.3, 0.055), (0.325, 0.03), (0.335, 0.022)]
    lathe(stage, (0, 0.06, 0), (0, 0, 1), bottle, red, n=72)
    lathe(stage, (0, 0.06, 0.335), (0, 0, 1), [(0, 0.024), (0.03, 0.024), (0.03, 0.0)], STEEL, n=30)
    bar(stage, (-0.03, 0.06, 0.385), (0.12, 0.06, 0.42), 0.02, 0.008, STEEL, parts=4)
    bar(stage, (-0.03, 0.06, 0.365), (0.12, 0.06, 0.365), 0.02, 0.008, STEEL, parts=4)
    lathe(stage, (-0.024, 0.035, 0.352), (-0.3, -1, 0), [(0, 0.016), (0.012, 0.016), (0.013, 0)], ALLOY, n=28)
    cylinder(stage, (-0.02, 0.06, 0.355), (-0.07, 0.05, 0.35), 0.009, Skin((34, 36, 40), 0.3), n=18)
    face: list[Vec] = [(-0.052, -0.009, 0.235), (0.052, -0.009, 0.235), (0.052, -0.009, 0.1), (-0.052, -0.009, 0.1)]
    stage.decal(face, card(spec.lines, (400, 520), band=(44, 70, 130)), nudge=0.06)
    box(stage, (0.26, 0.1, 0.012), (0.18, 0.09, 0.024), Skin((70, 74, 80), 0.3, 0.4), turn=0.3)
    for x in (0.22, 0.3):
        bolt(stage, (x, 0.1, 0.024), (0, 0, 1), 0.008, STEEL)
