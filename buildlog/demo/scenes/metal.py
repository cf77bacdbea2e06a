"""Scenes of metalwork: the tube frame, welds, wheels, controls."""

from math import cos, pi, sin

from buildlog.demo.scenes import textures
from buildlog.demo.scenes.geometry import Vec, add, along, frame, scale
from buildlog.demo.scenes.sets import card, strew
from buildlog.demo.scenes.solids import ball, bar, bolt, box, cable, curve, cylinder, lathe, ring_of, tube
from buildlog.demo.scenes.stage import Skin, Stage
from buildlog.demo.spec import PhotoSpec

STEEL = Skin((176, 180, 184), 0.4, 0.75)
RAW = Skin((112, 112, 114), 0.3, 0.45)
ALLOY = Skin((206, 208, 210), 0.4, 0.7)
RUBBER = Skin((40, 40, 42), 0.1)
BRASS = Skin((204, 168, 92), 0.5, 0.7)


def fuselage_frame(stage: Stage, spec: PhotoSpec) -> None:
    """The welded fuselage of tubes on two stands."""
    stations = [
        (-1.9, 0.26, 0.34),
        (-1.3, 0.5, 0.56),
        (-0.5, 0.52, 0.62),
        (0.4, 0.42, 0.5),
        (1.2, 0.28, 0.34),
        (2.0, 0.14, 0.2),
        (2.7, 0.05, 0.12),
    ]
    skin = Skin(spec.colour, 0.45)

    def corner(i: int, side: float, high: float) -> Vec:
        x, half, tall = stations[i]
        return x, side * half, 0.86 + (high - 0.45) * tall * 1.6

    for i in range(len(stations)):
        for side in (1.0, -1.0):
            cylinder(stage, corner(i, side, 0), corner(i, side, 1), 0.011, skin, n=10)
        for high in (0.0, 1.0):
            cylinder(stage, corner(i, -1, high), corner(i, 1, high), 0.011, skin, n=10)
        if i + 1 == len(stations):
            break
        for side in (1.0, -1.0):
            for high in (0.0, 1.0):
                a, b = corner(i, side, high), corner(i + 1, side, high)
                for k in range(3):
                    cylinder(stage, along(a, b, k / 3), along(a, b, (k + 1) / 3), 0.014, skin, n=10)
            a, b = corner(i, side, i % 2), corner(i + 1, side, 1 - i % 2)
            cylinder(stage, a, along(a, b, 0.5), 0.01, skin, n=8)
            cylinder(stage, along(a, b, 0.5), b, 0.01, skin, n=8)
    _stands(stage)
    strew(stage, spec, 2.4, 0.5)


def _stands(stage: Stage) -> None:
    for x in (-1.1, 1.3):
        box(stage, (x, 0, 0.48), (0.08, 0.9, 0.07), Skin((126, 96, 68)))
        for y in (-0.4, 0.4):
            bar(stage, (x - 0.2, y, 0), (x, y, 0.46), 0.05, 0.04, Skin((112, 86, 60)))
            bar(stage, (x + 0.2, y, 0), (x, y, 0.46), 0.05, 0.04, Skin((112, 86, 60)))


def weld(stage: Stage, spec: PhotoSpec) -> None:
    """A cluster of tubes close up: the bead of ripples, the blue and straw of heat beside it."""
    main_a, main_b = (-0.3, 0.02, 0.075), (0.3, 0.02, 0.075)
    for k in range(12):
        a, b = along(main_a, main_b, k / 12), along(main_a, main_b, (k + 1) / 12)
        cylinder(stage, a, b, 0.024, _tempered(abs(k - 5.5) / 6), n=30, caps=False)
    for direction, reach in (((0.75, -0.1, 0.62), 0.32), ((-0.7, -0.12, 0.7), 0.3), ((0.05, -0.95, 0.12), 0.3)):
        start: Vec = (0.0, 0.0, 0.08)
        w, u, v = frame(direction)
        for k in range(8):
            a, b = add(start, scale(w, reach * k / 8)), add(start, scale(w, reach * (k + 1) / 8))
            cylinder(stage, a, b, 0.017, _tempered(max(0.0, k - 1) / 5), n=24, caps=False)
        for i in range(26):
            t = 2 * pi * i / 26
            wave = 0.025 + 0.013 * abs(cos(t)) + stage.rng.uniform(-0.0008, 0.0008)
            at = add(add(start, scale(w, wave)), add(scale(u, 0.0185 * cos(t)), scale(v, 0.0185 * sin(t))))
            ball(stage, at, 0.0052, Skin((128, 124, 120), 0.7, 0.5), n=10)
    strew(stage, spec, 0.5, 0.42)
    if spec.lines:
        corners: list[Vec] = [(0.1, -0.12, 0.001), (0.24, -0.1, 0.001), (0.25, -0.19, 0.001), (0.11, -0.21, 0.001)]
        stage.decal(corners, card(spec.lines, (520, 330)), nudge=0.0)


def _tempered(far: float) -> Skin:
    """Return the colour of steel at a share of the way from the bead to cold tube: grey, blue, straw, mill grey."""
    steps = [(116, 112, 112), (86, 96, 124), (156, 128, 84), (124, 122, 120), (120, 120, 120), (118, 118, 120)]
    i = min(4, int(far * 5))
    return Skin(textures.mixed(steps[i], steps[i + 1], far * 5 - i if far < 1 else 0), 0.35, 0.45)


def wheel(stage: Stage, spec: PhotoSpec) -> None:
    """A main wheel with its leg, tyre and brake, on the floor or on a scale."""
    on_scale = bool(spec.lines)
    lift = 0.09 if on_scale else 0.0
    if on_scale:
        box(stage, (0, 0, 0.045), (0.52, 0.46, 0.09), Skin((66, 72, 78), 0.3), nudge=-0.4)
        box(stage, (0, 0, 0.0915), (0.47, 0.41, 0.003), Skin((150, 154, 156), 0.3, 0.5), nudge=-0.35)
        _read_out(stage, spec, (0.08, -0.52, 0.0))
    hub: Vec = (0.0, 0.0, lift + 0.2)
    tyre = [
        (-0.062, 0.105),
        (-0.066, 0.135),
        (-0.06, 0.17),
        (-0.045, 0.19),
        (-0.022, 0.2),
        (0.022, 0.2),
        (0.045, 0.19),
        (0.06, 0.17),
        (0.066, 0.135),
        (0.062, 0.105),
        (0.05, 0.1),
    ]
    lathe(stage, hub, (0, -1, 0), tyre, RUBBER, n=40)
    lathe(
        stage,
        hub,
        (0, -1, 0),
        [(0.03, 0.102), (0.055, 0.098), (0.052, 0.085), (0.03, 0.07), (0.032, 0.04), (0.06, 0.036), (0.064, 0.0)],
        ALLOY,
        n=36,
    )
    for p in ring_of((0, -0.034, hub[2]), (0, -1, 0), 0.056, 6):
        bolt(stage, p, (0, -1, 0), 0.007, STEEL)
    _leg(stage, spec, hub)
    strew(stage, spec, 1.6, 0.6)


def _leg(stage: Stage, spec: PhotoSpec, hub: Vec) -> None:
    leg = Skin(spec.colour, 0.5)
    tube(stage, curve([(0.0, 0.08, hub[2]), (0.02, 0.25, hub[2] + 0.09), (0.05, 0.7, hub[2] + 0.5)]), 0.03, leg)
    lathe(
        stage, (0, 0.06, hub[2]), (0, -1, 0), [(-0.012, 0.0), (-0.012, 0.09), (-0.006, 0.09), (-0.006, 0)], STEEL, n=32
    )
    cable(
        stage,
        [(0.04, 0.09, hub[2] + 0.06), (0.1, 0.2, hub[2] + 0.2), (0.09, 0.5, hub[2] + 0.42)],
        0.006,
        Skin((30, 30, 32), 0.4),
    )


def _read_out(stage: Stage, spec: PhotoSpec, at: Vec) -> None:
    x, y, _ = at
    box(stage, (x, y, 0.035), (0.26, 0.14, 0.07), Skin((52, 56, 60), 0.3))
    corners: list[Vec] = [
        (x - 0.115, y - 0.01, 0.0715),
        (x + 0.115, y - 0.01, 0.0715),
        (x + 0.115, y - 0.065, 0.0715),
        (x - 0.115, y - 0.065, 0.0715),
    ]
    shown = card(spec.lines[:1], (460, 120), paper=(176, 196, 160), ink=(24, 34, 22))
    stage.decal(corners, shown, nudge=0.2, shade=False)
    cable(stage, [(x + 0.13, y, 0.03), (x + 0.3, y + 0.1, 0.01), (0.24, -0.2, 0.02)], 0.006, Skin((30, 30, 32), 0.3))


def controls(stage: Stage, spec: PhotoSpec) -> None:
    """A bellcrank with push rod, cable and turnbuckle, wire locked."""
    base = Skin(spec.colour, 0.4)
    box(stage, (0, 0.12, 0.03), (0.7, 0.08, 0.06), base)
    for y in (-0.03, 0.03):
        lathe(stage, (0, y, 0.13), (0, 1, 0), [(-0.003, 0), (-0.003, 0.075), (0.003, 0.075), (0.003, 0)], ALLOY, n=36)
    lathe(stage, (0, -0.05, 0.13), (0, 1, 0), [(0, 0), (0, 0.014), (0.12, 0.014)], STEEL, n=20)
    bolt(stage, (0, -0.036, 0.13), (0, -1, 0), 0.009, STEEL)
    box(stage, (0, 0.09, 0.08), (0.05, 0.05, 0.16), base)
    cylinder(stage, (0.055, -0.004, 0.18), (0.5, -0.03, 0.26), 0.012, ALLOY, n=18)
    ball(stage, (0.05, -0.04, 0.178), 0.013, STEEL)
    bolt(stage, (0.05, -0.044, 0.178), (0, -1, 0), 0.006, BRASS)
    eye = (-0.06, -0.01, 0.1)
    cylinder(stage, eye, (-0.18, -0.03, 0.1), 0.004, STEEL, n=10)
    lathe(stage, (-0.17, -0.03, 0.1), (-1, -0.1, 0), [(0, 0.004), (0.01, 0.009), (0.09, 0.009), (0.1, 0.004)], BRASS)
    tube(stage, [(-0.27, -0.04, 0.1), (-0.42, -0.055, 0.1), (-0.6, -0.07, 0.1)], 0.0032, STEEL, n=8)
    spiral = [(-0.17 - 0.1 * i / 40, -0.03 - 0.01 * i / 40 + 0.011 * cos(i), 0.1 + 0.011 * sin(i)) for i in range(41)]
    tube(stage, spiral, 0.0011, Skin((214, 216, 218), 0.5, 0.6), n=6)
    strew(stage, spec, 0.7, 0.36)


def torque_seal(stage: Stage, spec: PhotoSpec) -> None:
    """Bolts in a plate, each with a stripe of coloured lacquer across head and plate."""
    box(stage, (0, 0, 0.012), (0.34, 0.22, 0.024), Skin((150, 154, 158), 0.35, 0.6), nudge=-0.2)
    for i, (x, y) in enumerate(((-0.1, 0.05), (0.0, 0.055), (0.1, 0.05), (-0.1, -0.05), (0.0, -0.055), (0.1, -0.05))):
        bolt(stage, (x, y, 0.024), (0, 0, 1), 0.018, STEEL if i % 2 else Skin((196, 186, 150), 0.4, 0.6))
        turn = stage.rng.uniform(-0.8, 0.8)
        for k in range(7):
            reach = 0.006 + k * 0.0048
            high = 0.0395 if reach < 0.016 else 0.0285 if reach < 0.019 else 0.0255
            at = (x + reach * cos(turn), y + reach * sin(turn), high)
            ball(stage, at, 0.0027, Skin(spec.colour, 0.7), n=10, stretch=0.5)
    handle = [(0.12, -0.12, 0.05), (0.42, -0.32, 0.06)]
    tube(stage, handle, 0.011, STEEL, n=18)
    tube(stage, [along(handle[0], handle[1], 0.62), handle[1]], 0.016, Skin((34, 36, 40), 0.3), n=18)
    ball(stage, handle[0], 0.024, STEEL)
    strew(stage, spec, 0.5, 0.36)
