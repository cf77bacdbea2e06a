"""Scenes of what hangs on the engine: propeller, ignition, exhaust, cowl, and the crankshaft out of it."""

import itertools
from functools import partial
from math import cos, pi, sin

from buildlog.demo.scenes import textures
from buildlog.demo.scenes.engine import BLACK, CAST
from buildlog.demo.scenes.geometry import Vec, add, scale
from buildlog.demo.scenes.metal import ALLOY, BRASS, RAW, STEEL
from buildlog.demo.scenes.sets import card, strew
from buildlog.demo.scenes.solids import bar, bolt, box, cable, curve, cylinder, lathe, ring_of, sheet, tube
from buildlog.demo.scenes.stage import Skin, Stage
from buildlog.demo.spec import PhotoSpec


def propeller(stage: Stage, spec: PhotoSpec) -> None:
    """A two-blade wooden propeller on its flange, or on padded stands for balancing."""
    for side in (-1.0, 1.0):
        sheet(stage, partial(_blade, side=side), Skin(spec.colour, 0.75), nu=26, nv=12)
        sheet(stage, partial(_tip, side=side), Skin((206, 200, 186), 0.5, 0.4), nu=5, nv=12)
    lathe(
        stage,
        (0, 0.03, 0.55),
        (0, -1, 0),
        [(-0.05, 0), (-0.05, 0.085), (0.05, 0.085), (0.05, 0.03)],
        Skin(textures.tone(spec.colour, 0.9), 0.6),
        n=36,
    )
    lathe(stage, (0, -0.02, 0.55), (0, -1, 0), [(0, 0.075), (0.012, 0.075), (0.012, 0)], ALLOY, n=36)
    for p in ring_of((0, -0.032, 0.55), (0, -1, 0), 0.052, 6):
        bolt(stage, p, (0, -1, 0), 0.0075, STEEL)
    cylinder(stage, (0, 0.45, 0.55), (0, -0.06, 0.55), 0.014, STEEL, n=16)
    for y in (0.2, 0.4):
        for x in (-0.28, 0.28):
            bar(stage, (x, y, 0.0), (x * 0.1, y, 0.54), 0.04, 0.03, Skin((124, 94, 66)))
    strew(stage, spec, 1.3, 0.55)


def _tip(u: float, v: float, side: float) -> Vec:
    return _blade(0.9 + u * 0.1, v, side)


def _blade(u: float, v: float, side: float) -> Vec:
    reach = 0.06 + 0.7 * u
    wide = 0.055 + 0.085 * sin(pi * min(1.0, 0.12 + u * 0.86)) ** 1.2
    if u > 0.9:
        wide *= (max(0.0, 1 - ((u - 0.9) / 0.1) ** 2)) ** 0.5 * 0.9 + 0.1
    twist = 1.0 - 0.72 * u
    off, hump = (v - 0.5) * wide * 2 * 0.55, 0.02 * (1 - u * 0.75) * sin(pi * v)
    return side * reach, 0.03 - hump + off * sin(twist) * side, 0.55 + off * cos(twist)


def ignition(stage: Stage, spec: PhotoSpec) -> None:
    """Two ignition units side by side on the rear case, leads gathered in combs."""
    box(stage, (0, 0.25, 0.2), (0.7, 0.2, 0.4), CAST)
    for k, x in enumerate((-0.15, 0.15)):
        tone = BLACK if k == 0 else Skin((60, 66, 74), 0.3, 0.3)
        lathe(
            stage,
            (x, 0.15, 0.2),
            (0, -1, 0),
            [(0, 0.085), (0.03, 0.085), (0.03, 0.068), (0.13, 0.066), (0.145, 0.05), (0.15, 0)],
            tone,
            n=32,
        )
        for i, p in enumerate(ring_of((x, 0.01, 0.2), (0, -1, 0), 0.042, 4, 0.8)):
            lathe(stage, p, (0, -1, 0), [(0, 0.013), (0.03, 0.011), (0.032, 0.007)], BLACK, n=14)
            end: Vec = (x * 2.4 + (i - 1.5) * 0.05, 0.1, 0.52)
            tube(
                stage,
                curve([add(p, (0, -0.03, 0)), add(p, (0.02 * (i - 1.5), -0.1, 0.05)), end], 6),
                0.0065,
                Skin(spec.colour, 0.45),
                n=10,
            )
        for p in ring_of((x, 0.12, 0.2), (0, -1, 0), 0.078, 2, 1.2):
            bolt(stage, p, (0, -1, 0), 0.007, STEEL)
    _tag(stage, spec, (0.0, 0.1, 0.05))
    strew(stage, spec, 0.9, -0.2)


def _tag(stage: Stage, spec: PhotoSpec, at: Vec) -> None:
    if spec.lines:
        x, _, z = at
        corners: list[Vec] = [
            (x - 0.11, 0.14, z + 0.045),
            (x + 0.11, 0.14, z + 0.045),
            (x + 0.11, 0.14, z - 0.04),
            (x - 0.11, 0.14, z - 0.04),
        ]
        stage.decal(corners, card(spec.lines, (520, 200)), nudge=0.08)


def exhaust(stage: Stage, spec: PhotoSpec) -> None:
    """Exhaust pipes with slip joints and springs, and a heat muff on one of them."""
    box(stage, (0, 0.3, 0.3), (0.9, 0.14, 0.16), CAST)
    for i, x in enumerate((-0.3, 0.28)):
        run = curve([(x, 0.22, 0.3), (x, 0.05, 0.28), (x + 0.06, -0.04, 0.16), (x + 0.12, -0.06, 0.0)], 9)
        for k, (a, b) in enumerate(itertools.pairwise(run)):
            heat = textures.mixed((168, 132, 100), (120, 112, 118), k / len(run))
            cylinder(stage, a, b, 0.032, Skin(heat, 0.35, 0.5), n=22, caps=False)
        lathe(stage, (x, 0.23, 0.3), (0, -1, 0), [(0, 0.055), (0.014, 0.055), (0.014, 0.03)], STEEL, n=26)
        for s in (-1, 1):
            bolt(stage, (x + s * 0.043, 0.215, 0.3), (0, -1, 0), 0.007, BRASS)
        if i == 1:
            cylinder(stage, (x + 0.012, 0.02, 0.268), (x + 0.09, -0.05, 0.1), 0.055, ALLOY, n=26)
            tube(
                stage,
                curve([(x + 0.08, -0.06, 0.2), (x + 0.2, -0.1, 0.24), (x + 0.34, 0.1, 0.34)]),
                0.026,
                Skin(spec.colour, 0.2),
                n=16,
            )
    strew(stage, spec, 0.9, -0.28)


def cowl(stage: Stage, spec: PhotoSpec) -> None:
    """The lower or upper cowl on trestles, fresh from its mould."""

    def shell(u: float, v: float) -> Vec:
        t = pi * u
        nose = 0.62 + 0.38 * min(1.0, v * 1.7) ** 0.7
        return -0.46 * nose * cos(t), -0.5 + v * 1.0, 0.34 + 0.36 * nose * sin(t) * (0.8 + 0.2 * v)

    sheet(stage, shell, Skin(spec.colour, 0.7), nu=40, nv=18)
    for x in (-0.16, 0.16):
        lathe(
            stage,
            (x, -0.485, 0.45),
            (0, -1, 0),
            [(0, 0.085), (0.015, 0.09), (0.02, 0.078), (-0.05, 0.07)],
            Skin(textures.tone(spec.colour, 0.9), 0.6),
            n=30,
        )
        lathe(stage, (x, -0.48, 0.45), (0, -1, 0), [(0.004, 0.0), (0.0041, 0.078)], Skin((18, 18, 20)), n=30)
        lathe(stage, (x, -0.5, 0.45), (0, -1, 0), [(0.0, 0.076), (0.001, 0.0)], Skin((20, 20, 22)), n=30)
    for y in (-0.38, 0.42):
        box(stage, (0, y, 0.3), (1.15, 0.07, 0.07), Skin((126, 96, 68)))
        for x in (-0.5, 0.5):
            bar(stage, (x, y - 0.12, 0), (x, y, 0.28), 0.05, 0.04, Skin((112, 86, 60)))
            bar(stage, (x, y + 0.12, 0), (x, y, 0.28), 0.05, 0.04, Skin((112, 86, 60)))
    strew(stage, spec, 1.5, 0.5)


def micrometer(stage: Stage, spec: PhotoSpec) -> None:
    """The crankshaft on blocks, a micrometer on its journal."""
    for i in range(5):
        x = -0.4 + i * 0.2
        lathe(stage, (x - 0.035, 0.05, 0.16), (1, 0, 0), [(0, 0.034), (0.07, 0.034)], STEEL, n=30)
        if i < 4:
            z = 0.16 + (0.045 if i in (0, 3) else -0.045)
            for dx in (0.045, 0.135):
                lathe(
                    stage,
                    (x + dx, 0.05, 0.5 * (z + 0.16)),
                    (1, 0, 0),
                    [(0, 0), (0, 0.078), (0.022, 0.078), (0.022, 0)],
                    RAW,
                    n=30,
                )
            lathe(stage, (x + 0.067, 0.05, z), (1, 0, 0), [(0, 0.03), (0.07, 0.03)], STEEL, n=26)
    for x in (-0.4, 0.4):
        box(stage, (x, 0.05, 0.062), (0.03, 0.16, 0.124), Skin((150, 118, 80)))
    bow = [
        (0.0, 0.0 + 0.05 + 0.07 * cos(t / 10 * pi - pi / 2) - 0.1, 0.16 + 0.07 * sin(t / 10 * pi - pi / 2))
        for t in range(11)
    ]
    tube(stage, [scale(p, 1.0) for p in bow], 0.009, Skin((70, 76, 84), 0.4, 0.3), n=12)
    cylinder(stage, (0.0, -0.05, 0.23), (0.0, -0.02, 0.34), 0.012, STEEL, n=20)
    cable(stage, [(0.3, -0.2, 0.006), (0.4, -0.16, 0.006), (0.5, -0.2, 0.006)], 0.004, BRASS)
    _note(stage, spec)
    strew(stage, spec, 0.8, 0.38)


def _note(stage: Stage, spec: PhotoSpec) -> None:
    if spec.lines:
        corners: list[Vec] = [(-0.42, -0.1, 0.002), (-0.16, -0.12, 0.002), (-0.17, -0.27, 0.002), (-0.44, -0.25, 0.002)]
        stage.decal(corners, card(spec.lines, (600, 350)), nudge=0.0)
