"""Vectors and the camera: metres, x to the right, y away from the viewer, z up."""

from dataclasses import dataclass
from math import cos, radians, sin, sqrt

Vec = tuple[float, float, float]
Point = tuple[float, float]

WIDTH, HEIGHT = 1600, 1200
NEAR = 0.05  # nothing closer to the lens than this is drawn


def add(a: Vec, b: Vec) -> Vec:
    """Return a + b."""
    return a[0] + b[0], a[1] + b[1], a[2] + b[2]


def sub(a: Vec, b: Vec) -> Vec:
    """Return a - b."""
    return a[0] - b[0], a[1] - b[1], a[2] - b[2]


def scale(a: Vec, k: float) -> Vec:
    """Return a times k."""
    return a[0] * k, a[1] * k, a[2] * k


def dot(a: Vec, b: Vec) -> float:
    """Return the scalar product."""
    return a[0] * b[0] + a[1] * b[1] + a[2] * b[2]


def cross(a: Vec, b: Vec) -> Vec:
    """Return the vector product."""
    return a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]


def unit(a: Vec) -> Vec:
    """Return the vector of length one; a vector of no length stays as it is."""
    length = sqrt(dot(a, a)) or 1.0
    return a[0] / length, a[1] / length, a[2] / length


def along(a: Vec, b: Vec, t: float) -> Vec:
    """Return the point a share `t` of the way from `a` to `b`."""
    return a[0] + (b[0] - a[0]) * t, a[1] + (b[1] - a[1]) * t, a[2] + (b[2] - a[2]) * t


def frame(axis: Vec) -> tuple[Vec, Vec, Vec]:
    """Return the unit axis and two unit vectors square to it and to each other."""
    w = unit(axis)
    helper: Vec = (0.0, 0.0, 1.0) if abs(w[2]) < 0.9 else (1.0, 0.0, 0.0)
    u = unit(cross(helper, w))
    return w, u, cross(w, u)


@dataclass(frozen=True)
class Camera:
    """A camera that looks at `target` from `distance` [m]; focal length in pixels."""

    target: Vec = (0.0, 0.0, 0.0)
    azimuth: float = 0.0
    elevation: float = 30.0
    distance: float = 2.0
    focal: float = 1900.0

    def axes(self) -> tuple[Vec, Vec, Vec, Vec]:
        """Return place, forward, right and up of the camera."""
        az, el = radians(self.azimuth), radians(self.elevation)
        back: Vec = (sin(az) * cos(el), -cos(az) * cos(el), sin(el))
        place = add(self.target, scale(back, self.distance))
        forward = scale(back, -1.0)
        right = unit((forward[1], -forward[0], 0.0))
        return place, forward, right, cross(right, forward)


def homography(source: list[Point], target: list[Point]) -> tuple[float, ...]:
    """Return the eight numbers that carry four points of `source` to `target` (projective map).

    Solved by elimination with row exchange; the points must not lie three on a line.
    """
    rows: list[list[float]] = []
    for (x, y), (u, v) in zip(source, target, strict=True):
        rows.append([x, y, 1, 0, 0, 0, -u * x, -u * y, u])
        rows.append([0, 0, 0, x, y, 1, -v * x, -v * y, v])
    for i in range(8):
        pivot = max(range(i, 8), key=lambda r: abs(rows[r][i]))
        rows[i], rows[pivot] = rows[pivot], rows[i]
        lead = rows[i][i] or 1e-12
        rows[i] = [value / lead for value in rows[i]]
        for r in range(8):
            if r != i and rows[r][i]:
                factor = rows[r][i]
                rows[r] = [a - factor * b for a, b in zip(rows[r], rows[i], strict=True)]
    return tuple(row[8] for row in rows)
