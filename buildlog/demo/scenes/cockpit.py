"""Scenes of the cabin: instrument panel, wiring, placards."""

from math import cos, pi, sin

from buildlog.demo.scenes.engine import BLACK, dial_face
from buildlog.demo.scenes.geometry import Vec
from buildlog.demo.scenes.metal import ALLOY, STEEL
from buildlog.demo.scenes.sets import card
from buildlog.demo.scenes.solids import ball, bolt, box, cable, cylinder, lathe, ring_of, sheet
from buildlog.demo.scenes.stage import Skin, Stage
from buildlog.demo.spec import Colour, PhotoSpec

WIRES: list[Colour] = [(190, 50, 44), (40, 42, 46), (222, 220, 210), (214, 176, 60), (56, 96, 150), (70, 120, 76)]


def panel(stage: Stage, spec: PhotoSpec) -> None:
    """The instrument panel with gauges, switches and placards."""
    box(stage, (0, 0.0, 0.4), (1.3, 0.02, 0.5), Skin(spec.colour, 0.3), nudge=-0.3)
    names = ["rpm x100", "oil bar", "oil C", "EGT C", "volt", "fuel L", "alt m", "km/h"]
    spots = [
        (-0.4, 0.5, 0.085),
        (-0.19, 0.52, 0.06),
        (-0.04, 0.52, 0.06),
        (-0.19, 0.37, 0.06),
        (-0.04, 0.37, 0.06),
        (0.11, 0.37, 0.06),
        (0.22, 0.53, 0.085),
        (0.43, 0.5, 0.085),
    ]
    for name, spot in zip(names, spots, strict=True):
        _gauge(stage, name, spot)
    _switches(stage)
    if spec.lines:
        plate: list[Vec] = [
            (-0.62, -0.0105, 0.34),
            (-0.3, -0.0105, 0.34),
            (-0.3, -0.0105, 0.27),
            (-0.62, -0.0105, 0.27),
        ]
        stage.decal(plate, card(spec.lines[:2], (560, 125), paper=(28, 30, 32), ink=(238, 236, 226)), nudge=0.05)
    sheet(
        stage,
        lambda u, v: (-0.75 + 1.5 * u, -0.16 * v, 0.665 + 0.02 * sin(pi * u) - 0.03 * v * v),
        Skin((42, 44, 48)),
        nu=20,
        nv=5,
    )


def _gauge(stage: Stage, name: str, spot: Vec) -> None:
    x, z, r = spot
    lathe(
        stage,
        (x, -0.01, z),
        (0, -1, 0),
        [(0, r * 1.1), (0.008, r * 1.1), (0.012, r), (0.004, r * 0.94)],
        BLACK,
        n=36,
    )
    q = r * 0.94
    corners: list[Vec] = [
        (x - q, -0.016, z + q),
        (x + q, -0.016, z + q),
        (x + q, -0.016, z - q),
        (x - q, -0.016, z - q),
    ]
    stage.decal(corners, dial_face(name, stage.rng.uniform(-140, 60), dark=True), nudge=0.05)
    for p in ring_of((x, -0.01, z), (0, -1, 0), r * 1.2, 3, 0.5):
        lathe(stage, p, (0, -1, 0), [(0, 0.006), (0.003, 0.005), (0.0032, 0)], STEEL, n=12)


def _switches(stage: Stage) -> None:
    for i in range(6):
        x = -0.5 + i * 0.075
        lathe(stage, (x, -0.01, 0.22), (0, -1, 0), [(0, 0.013), (0.006, 0.013), (0.006, 0)], STEEL, n=18)
        tip = 0.03 if stage.rng.random() < 0.6 else -0.03
        cylinder(stage, (x, -0.015, 0.22), (x, -0.045, 0.22 + tip), 0.005, ALLOY, n=12)
    for i, tone in enumerate(((30, 32, 34), (176, 44, 38), (206, 170, 60))):
        x = 0.2 + i * 0.13
        cylinder(stage, (x, -0.01, 0.22), (x, -0.06, 0.22), 0.006, STEEL, n=12)
        ball(stage, (x, -0.075, 0.22), 0.026, Skin(tone, 0.6))


def wiring(stage: Stage, spec: PhotoSpec) -> None:
    """Bundles of wire with ties, ends in a terminal strip and a fuse block."""
    for k in range(11):
        tone = Skin(WIRES[k % 6], 0.35)
        dx, dz = 0.013 * cos(k * 2.4), 0.013 * sin(k * 2.4)
        z = 0.36 + dz
        end = (-0.22 + k * 0.045, -0.03, 0.185)
        cable(
            stage,
            [
                (-0.75, -0.03 + dx, z + 0.16),
                (-0.45, -0.035 + dx, z + 0.02),
                (-0.1 + 0.03 * k, -0.04 + dx, z),
                (end[0] + 0.01, -0.04, 0.26),
                end,
            ],
            0.0055,
            tone,
        )
    for x in (-0.6, -0.48, -0.36, -0.22):
        z = 0.36 + (max(0.0, -0.38 - x) ** 1.4) * 0.9
        lathe(
            stage, (x - 0.004, -0.035, z), (1, 0, -0.3), [(0, 0.026), (0.009, 0.026)], Skin((236, 234, 226), 0.4), n=18
        )
    box(stage, (0.0, -0.02, 0.16), (0.56, 0.04, 0.06), BLACK)
    for k in range(11):
        bolt(stage, (-0.22 + k * 0.045, -0.04, 0.16), (0, -1, 0), 0.006, STEEL)
    box(stage, (0.32, -0.03, 0.42), (0.24, 0.06, 0.18), Skin((52, 54, 58), 0.3))
    for k in range(8):
        x, z = 0.24 + (k % 4) * 0.053, 0.46 - (k // 4) * 0.075
        box(stage, (x, -0.066, z), (0.034, 0.016, 0.044), Skin(WIRES[(k + 3) % 6], 0.5))
    if spec.lines:
        plate: list[Vec] = [(-0.3, -0.001, 0.1), (0.12, -0.001, 0.1), (0.12, -0.001, 0.0), (-0.3, -0.001, 0.0)]
        stage.decal(plate, card(spec.lines, (640, 150)), nudge=0.0)
