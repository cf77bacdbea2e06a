"""Solid bodies made of faces: boxes, turned bodies, tubes, balls and bent sheets."""

import itertools
from collections.abc import Callable, Sequence
from math import cos, pi, sin

from buildlog.demo.scenes.geometry import Vec, add, along, cross, frame, scale, sub, unit
from buildlog.demo.scenes.stage import Skin, Stage

Profile = Sequence[tuple[float, float]]  # (place along the axis [m], radius [m])


def box(stage: Stage, centre: Vec, size: Vec, skin: Skin, *, turn: float = 0.0, nudge: float = 0.0) -> None:
    """Add a box; turn [rad] swings it about the upright axis through its centre."""
    c, s = cos(turn), sin(turn)
    ax: Vec = (c, s, 0.0)
    ay: Vec = (-s, c, 0.0)
    slab(stage, centre, (ax, ay, (0.0, 0.0, 1.0)), size, skin, nudge=nudge)


def slab(stage: Stage, centre: Vec, axes: tuple[Vec, Vec, Vec], size: Vec, skin: Skin, *, nudge: float = 0.0) -> None:
    """Add a box whose edges run along three given unit axes."""
    half = [scale(axis, length / 2) for axis, length in zip(axes, size, strict=True)]
    for i in range(3):
        j, k = (i + 1) % 3, (i + 2) % 3
        for sign in (1.0, -1.0):
            middle = add(centre, scale(half[i], sign))
            p = [
                add(middle, add(scale(half[j], a), scale(half[k], b))) for a, b in ((1, 1), (-1, 1), (-1, -1), (1, -1))
            ]
            stage.face(p, skin, scale(axes[i], sign), nudge=nudge)


def bar(
    stage: Stage, a: Vec, b: Vec, width: float, height: float, skin: Skin, *, parts: int = 1, nudge: float = 0.0
) -> None:
    """Add a square-edged strip from a to b, cut in `parts` lengths so that depth sorting stays true."""
    w, _, _ = frame(sub(b, a))
    side = unit(cross((0.0, 0.0, 1.0), w)) if abs(w[2]) < 0.98 else (1.0, 0.0, 0.0)
    axes = (w, side, cross(w, side))
    for i in range(parts):
        p, q = along(a, b, i / parts), along(a, b, (i + 1) / parts)
        d = sub(q, p)
        reach = (d[0] ** 2 + d[1] ** 2 + d[2] ** 2) ** 0.5
        slab(stage, along(p, q, 0.5), axes, (reach, width, height), skin, nudge=nudge)


def lathe(stage: Stage, origin: Vec, axis: Vec, profile: Profile, skin: Skin, *, n: int = 28) -> None:
    """Add a body turned about `axis`: the profile runs from its foot to its head."""
    w, u, v = frame(axis)
    ring = [(cos(2 * pi * i / n), sin(2 * pi * i / n)) for i in range(n)]
    loops = [
        [add(add(origin, scale(w, s)), add(scale(u, r * c), scale(v, r * t))) for c, t in ring] for s, r in profile
    ]
    for k in range(len(profile) - 1):
        (s0, r0), (s1, r1) = profile[k], profile[k + 1]
        rise, run = s1 - s0, r1 - r0
        for i in range(n):
            j = (i + 1) % n
            c, t = ring[i][0] + ring[j][0], ring[i][1] + ring[j][1]
            out = unit((c, t, 0.0))
            normal = unit(add(scale(add(scale(u, out[0]), scale(v, out[1])), rise), scale(w, -run)))
            stage.face([loops[k][i], loops[k][j], loops[k + 1][j], loops[k + 1][i]], skin, normal)


def cylinder(stage: Stage, a: Vec, b: Vec, radius: float, skin: Skin, *, n: int = 24, caps: bool = True) -> None:
    """Add a round bar from `a` to `b`, closed at its ends unless `caps` is off."""
    d = sub(b, a)
    reach = (d[0] ** 2 + d[1] ** 2 + d[2] ** 2) ** 0.5
    profile = [(0.0, radius), (reach, radius)]
    if caps:
        profile = [(0.0, 0.0), *profile, (reach, 0.0)]
    lathe(stage, a, d, profile, skin, n=n)


def tube(stage: Stage, points: Sequence[Vec], radius: float, skin: Skin, *, n: int = 14) -> None:
    """Add a hose, wire or bent pipe along points; smooth it first with `curve` where it bends."""
    for a, b in itertools.pairwise(points):
        cylinder(stage, a, b, radius, skin, n=n, caps=False)


def curve(points: Sequence[Vec], steps: int = 8) -> list[Vec]:
    """Return a smooth line through the points (Catmull-Rom spline)."""
    p = [points[0], *points, points[-1]]
    line: list[Vec] = []
    for i in range(1, len(p) - 2):
        for k in range(steps):
            t = k / steps
            line.append(
                (
                    _spline(p[i - 1][0], p[i][0], p[i + 1][0], p[i + 2][0], t),
                    _spline(p[i - 1][1], p[i][1], p[i + 1][1], p[i + 2][1], t),
                    _spline(p[i - 1][2], p[i][2], p[i + 1][2], p[i + 2][2], t),
                )
            )
    return [*line, points[-1]]


def _spline(a: float, b: float, c: float, d: float, t: float) -> float:
    return 0.5 * (2 * b + (c - a) * t + (2 * a - 5 * b + 4 * c - d) * t * t + (3 * b - a - 3 * c + d) * t**3)


def ball(stage: Stage, centre: Vec, radius: float, skin: Skin, *, n: int = 20, stretch: float = 1.0) -> None:
    """Add a ball, drawn out upwards by `stretch`."""
    m = max(6, n // 2)
    profile = [(-radius * stretch * cos(pi * i / m), radius * sin(pi * i / m)) for i in range(m + 1)]
    lathe(stage, centre, (0.0, 0.0, 1.0), profile, skin, n=n)


def sheet(stage: Stage, at: Callable[[float, float], Vec], skin: Skin, *, nu: int = 24, nv: int = 10) -> None:
    """Add a bent sheet seen from both sides; `at` gives the point for u and v in 0 to 1."""
    grid = [[at(i / nu, k / nv) for k in range(nv + 1)] for i in range(nu + 1)]
    for i in range(nu):
        for k in range(nv):
            p = [grid[i][k], grid[i + 1][k], grid[i + 1][k + 1], grid[i][k + 1]]
            normal = unit(cross(sub(p[1], p[0]), sub(p[3], p[0])))
            stage.face(p, skin, normal, both=True)


def bolt(stage: Stage, at: Vec, axis: Vec, size: float, skin: Skin) -> None:
    """Add a washer, a hexagon head and the thread's end; size [m] is the thread's diameter."""
    lathe(stage, at, axis, [(0, size), (0.12 * size, size), (0.12 * size, 0)], skin, n=22)
    w, _, _ = frame(axis)
    foot = add(at, scale(w, 0.13 * size))
    lathe(stage, foot, axis, [(0, 0.86 * size), (0.55 * size, 0.86 * size), (0.66 * size, 0.74 * size)], skin, n=6)
    lathe(stage, add(foot, scale(w, 0.63 * size)), axis, [(0, 0.76 * size), (0.01 * size, 0.0)], skin, n=6)
    lathe(
        stage,
        add(foot, scale(w, 0.5 * size)),
        axis,
        [(0, 0.5 * size), (0.5 * size, 0.48 * size), (0.56 * size, 0)],
        skin,
        n=14,
    )


def ring_of(centre: Vec, axis: Vec, radius: float, count: int, start: float = 0.0) -> list[Vec]:
    """Return `count` points evenly on a circle about the axis."""
    _, u, v = frame(axis)
    angles = [start + 2 * pi * i / count for i in range(count)]
    return [add(centre, add(scale(u, radius * cos(t)), scale(v, radius * sin(t)))) for t in angles]


def cable(stage: Stage, points: Sequence[Vec], radius: float, skin: Skin) -> None:
    """Add a wire or cable that bends smoothly through the points."""
    tube(stage, curve(points), radius, skin, n=8)
