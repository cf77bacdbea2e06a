"""Scenes with a person in them: one seen from behind at the bench, and a pair of gloved hands at work."""

from math import copysign, cos, pi, sin

from buildlog.demo.scenes import textures
from buildlog.demo.scenes.geometry import Vec, along
from buildlog.demo.scenes.sets import strew
from buildlog.demo.scenes.solids import ball, box, curve, cylinder, lathe, sheet, tube
from buildlog.demo.scenes.stage import Skin, Stage
from buildlog.demo.scenes.wood import SPRUCE, timber
from buildlog.demo.spec import PhotoSpec

FLESH = Skin((178, 132, 104), 0.12)
LEATHER = Skin((186, 158, 112), 0.08)
HAIR = Skin((58, 48, 42), 0.1)
# Height above the bench, half width and half depth of a jacket from hem to collar [m].
JACKET = (
    (-0.45, 0.2, 0.125),
    (-0.3, 0.185, 0.115),
    (-0.12, 0.19, 0.12),
    (0.05, 0.205, 0.13),
    (0.17, 0.215, 0.125),
    (0.235, 0.205, 0.11),
    (0.275, 0.165, 0.09),
    (0.3, 0.11, 0.075),
    (0.325, 0.075, 0.07),
    (0.355, 0.07, 0.068),
)


def builder(stage: Stage, spec: PhotoSpec) -> None:
    """A person seen from behind, planing a length of spruce; the head runs out of the picture."""
    cloth = Skin(spec.colour, 0.03)
    timber(stage, (0.1, 0.24, 0.06), (1.9, 0.08, 0.1), SPRUCE)
    _plane(stage, (0.3, 0.24, 0.11))
    for i in range(14):
        x, y = stage.rng.uniform(0.2, 0.9), stage.rng.uniform(-0.05, 0.4)
        curl = [(x + 0.014 * k, y + 0.01 * sin(k * 2 + i), 0.006 + 0.01 * abs(sin(k * 0.9))) for k in range(5)]
        tube(stage, curl, 0.003, Skin(SPRUCE, 0.1), n=6)
    _torso(stage, (0.0, -0.3, 0.3), cloth)
    dark = Skin(textures.tone(spec.colour, 0.72), 0.02)
    lathe(stage, (0.0, -0.275, 0.63), (0, 0.12, 1), [(0, 0.082), (0.035, 0.075), (0.035, 0.06)], dark, n=40)
    _arm(stage, ((0.165, -0.27, 0.495), (0.36, -0.1, 0.3), (0.4, 0.17, 0.16)), cloth, dark)
    _arm(stage, ((-0.16, -0.27, 0.495), (-0.24, -0.02, 0.28), (0.16, 0.18, 0.16)), cloth, dark)
    cylinder(stage, (0, -0.27, 0.64), (0.01, -0.24, 0.74), 0.054, FLESH, n=40)
    ball(stage, (0.015, -0.21, 0.81), 0.1, HAIR, n=34, stretch=1.16)
    for side in (-1.0, 1.0):
        ball(stage, (0.015 + side * 0.101, -0.2, 0.795), 0.022, FLESH, n=16, stretch=1.4)
    strew(stage, spec, 1.2, 0.5)


def _torso(stage: Stage, at: Vec, skin: Skin) -> None:
    lean = 0.22

    def point(u: float, v: float) -> Vec:
        k = min(len(JACKET) - 2, int(v * (len(JACKET) - 1)))
        t = v * (len(JACKET) - 1) - k
        z, wide, deep = (a + (b - a) * t for a, b in zip(JACKET[k], JACKET[k + 1], strict=True))
        c, s = cos(2 * pi * u), sin(2 * pi * u)
        fold = 1 + 0.018 * sin(9 * u * pi + 13 * v) * (1 - v)
        x = copysign(abs(c) ** 0.8, c) * wide * fold
        return at[0] + x, at[1] + copysign(abs(s) ** 0.85, s) * deep * fold + lean * z, at[2] + z

    sheet(stage, point, skin, nu=52, nv=26)


def _plane(stage: Stage, at: Vec) -> None:
    x, y, z = at
    box(stage, (x, y, z + 0.02), (0.26, 0.06, 0.04), Skin((96, 62, 40), 0.4), turn=0.03)
    box(stage, (x, y, z - 0.001), (0.27, 0.062, 0.004), Skin((190, 194, 196), 0.3, 0.7), turn=0.03)
    ball(stage, (x + 0.09, y, z + 0.06), 0.024, Skin((112, 68, 44), 0.6), n=26)
    box(stage, (x - 0.02, y, z + 0.065), (0.006, 0.045, 0.07), Skin((176, 180, 182), 0.3, 0.7))


def _arm(stage: Stage, joints: tuple[Vec, Vec, Vec], cloth: Skin, cuff: Skin) -> None:
    shoulder, elbow, hand = joints
    wrist = along(elbow, hand, 0.82)
    run = curve([shoulder, elbow, wrist], 9)
    ball(stage, shoulder, 0.073, cloth, n=36)
    for k, p in enumerate(run[1:], 1):
        before, radius = 0.074 - 0.03 * (k - 1) / len(run), 0.074 - 0.03 * k / len(run)
        limb(stage, run[k - 1], p, before, radius, cloth)
        ball(stage, p, radius, cloth, n=16)
    limb(stage, along(elbow, hand, 0.74), along(elbow, hand, 0.86), 0.047, 0.046, cuff)
    glove(stage, hand, along(wrist, hand, 1.6), LEATHER)


def glove(stage: Stage, palm: Vec, ahead: Vec, skin: Skin) -> None:
    """Add a gloved hand closed round something: palm, four fingers bent down ahead of it, a thumb."""
    dx, dy = ahead[0] - palm[0], ahead[1] - palm[1]
    reach = (dx * dx + dy * dy) ** 0.5 or 1.0
    fx, fy = dx / reach, dy / reach
    x, y, z = palm
    ball(stage, palm, 0.05, skin, n=22, stretch=0.72)
    ball(stage, (x + fx * 0.03, y + fy * 0.03, z + 0.006), 0.047, skin, n=20, stretch=0.6)
    for k in range(4):
        off = (k - 1.5) * 0.0235
        sx, sy = x + fx * 0.05 - fy * off, y + fy * 0.05 + fx * off
        knuckle = (sx + fx * 0.032, sy + fy * 0.032, z + 0.004)
        finger = [(sx, sy, z + 0.014), knuckle, (sx + fx * 0.042, sy + fy * 0.042, z - 0.03)]
        for p in curve(finger, 4):
            ball(stage, p, 0.0145, skin, n=10)
    thumb = [(x + fy * 0.04, y - fx * 0.04, z), (x + fy * 0.055 + fx * 0.04, y - fx * 0.055 + fy * 0.04, z - 0.008)]
    for p in curve([*thumb, (thumb[1][0] + fx * 0.025, thumb[1][1] + fy * 0.025, z - 0.022)], 5):
        ball(stage, p, 0.0165, skin, n=12)


def limb(stage: Stage, a: Vec, b: Vec, ra: float, rb: float, skin: Skin) -> None:
    """Add a tapering round limb from `a` to `b`."""
    d = (b[0] - a[0], b[1] - a[1], b[2] - a[2])
    reach = (d[0] ** 2 + d[1] ** 2 + d[2] ** 2) ** 0.5
    lathe(stage, a, d, [(0, ra), (reach, rb)], skin, n=24)


def hands(stage: Stage, spec: PhotoSpec) -> None:
    """Two gloved hands seen over the builder's shoulder, sanding a fitted piece on the bench."""
    cloth, cuff = Skin(spec.colour, 0.03), Skin(textures.tone(spec.colour, 0.7), 0.02)
    timber(stage, (0.0, 0.16, 0.03), (1.1, 0.09, 0.06), SPRUCE)
    timber(stage, (0.22, 0.19, 0.075), (0.5, 0.05, 0.03), textures.tone(SPRUCE, 0.92))
    box(stage, (-0.08, 0.16, 0.078), (0.13, 0.07, 0.036), Skin((176, 120, 74), 0.1), turn=0.1)
    for hand, elbow in (((-0.1, 0.1, 0.125), (-0.36, -0.5, 0.2)), ((0.2, 0.1, 0.12), (0.44, -0.48, 0.2))):
        wrist = along(hand, elbow, 0.12)
        run = [along(wrist, elbow, k / 8) for k in range(9)]
        for k, p in enumerate(run[1:], 1):
            limb(stage, run[k - 1], p, 0.046 + 0.003 * k, 0.05 + 0.003 * k, cloth)
        limb(stage, along(hand, elbow, 0.08), along(hand, elbow, 0.17), 0.048, 0.051, cuff)
        glove(stage, hand, along(elbow, hand, 1.3), LEATHER)
    for _ in range(40):
        x, y = stage.rng.uniform(-0.45, 0.45), stage.rng.uniform(-0.05, 0.35)
        ball(stage, (x, y, 0.001), stage.rng.uniform(0.001, 0.003), Skin((228, 204, 160)), n=4)
    strew(stage, spec, 0.8, 0.5)
