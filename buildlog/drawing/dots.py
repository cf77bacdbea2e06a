"""Readings over time as dots against a band of limits; each verdict has a shape of its own."""

import datetime as dt
from collections.abc import Sequence
from dataclasses import dataclass

from buildlog.drawing.svg import drawing, path, tag, text
from buildlog.drawing.ticks import label, ticks

WIDTH, HEIGHT = 640.0, 300.0
LEFT, RIGHT, TOP, BOTTOM = 64.0, 96.0, 30.0, 40.0
INNER = 24.0  # room between the axes and the first and last dot


@dataclass(frozen=True)
class Dot:
    """One reading: its day, its value, its expanded uncertainty, and its verdict (within, undecided, outside …)."""

    on: dt.date
    value: float
    spread: float = 0.0
    verdict: str = "within"


class _Axes:
    def __init__(self, dots: Sequence[Dot], marks: Sequence[float]) -> None:
        reach = [one.value - one.spread for one in dots] + [one.value + one.spread for one in dots] + [*marks]
        self.ticks = ticks(min(reach), max(reach))
        self.first, self.last = dots[0].on.toordinal(), dots[-1].on.toordinal()

    def x(self, on: dt.date) -> float:
        room = WIDTH - LEFT - RIGHT - 2 * INNER
        span = self.last - self.first
        return LEFT + INNER + room * ((on.toordinal() - self.first) / span if span else 0.5)

    def y(self, value: float) -> float:
        low, high = self.ticks[0], self.ticks[-1]
        return HEIGHT - BOTTOM - (value - low) / (high - low) * (HEIGHT - TOP - BOTTOM)


def dots_in_band(
    dots: Sequence[Dot], *, lower: float | None, upper: float | None, nominal: float | None, unit: str, title: str
) -> str:
    """Return the drawing; `dots` in the order of their days, at least one, all values in `unit`."""
    marks = [one for one in (lower, upper, nominal) if one is not None]
    axes = _Axes(dots, marks)
    body = _ground(axes, unit, lower, upper)
    for words, at, cls, width, dash in (
        ("upper limit", upper, "f0 k-red", 3, ""),
        ("nominal", nominal, "f0 k-edge", 1.5, "8 4"),
        ("lower limit", lower, "f0 k-red", 3, ""),
    ):
        if at is not None:
            body.append(path([(LEFT, axes.y(at)), (WIDTH - RIGHT, axes.y(at))], cls=cls, width=width, dash=dash))
            body.append(text(WIDTH - RIGHT + 6, axes.y(at) + 4, words, cls="t2"))
    spots = [(axes.x(one.on), axes.y(one.value)) for one in dots]
    if len(spots) > 1:
        body.append(path(spots, cls="f0 k-rule", width=1.5))
    for one, (x, y) in zip(dots, spots, strict=True):
        body += [*_whisker(axes, one, x), _dot(one.verdict, x, y)]
    return drawing(WIDTH, HEIGHT, title, body)


def _ground(axes: _Axes, unit: str, lower: float | None, upper: float | None) -> list[str]:
    out = []
    if lower is not None or upper is not None:
        top = axes.y(upper) if upper is not None else TOP
        foot = axes.y(lower) if lower is not None else HEIGHT - BOTTOM
        out.append(tag("rect", cls="fgt", x=LEFT, y=top, width=WIDTH - LEFT - RIGHT, height=foot - top))
    for value in axes.ticks:
        out.append(path([(LEFT - 5, axes.y(value)), (LEFT, axes.y(value))], cls="f0 k-edge"))
        out.append(text(LEFT - 9, axes.y(value) + 4, label(value), anchor="end", cls="t2"))
    out.append(path([(LEFT, TOP), (LEFT, HEIGHT - BOTTOM), (WIDTH - RIGHT, HEIGHT - BOTTOM)], cls="f0 k-ink"))
    out.append(text(LEFT, TOP - 12, unit or "value", cls="t2"))
    for on in sorted({axes.first, axes.last}):
        day = dt.date.fromordinal(on)
        out.append(
            text(axes.x(day), HEIGHT - BOTTOM + 20, f"{day.day} {day:%b %Y}", anchor="middle", cls="t2"),
        )
    return out


def _whisker(axes: _Axes, one: Dot, x: float) -> list[str]:
    if not one.spread:
        return []
    top, foot = axes.y(one.value + one.spread), axes.y(one.value - one.spread)
    lines = ([(x, top), (x, foot)], [(x - 4, top), (x + 4, top)], [(x - 4, foot), (x + 4, foot)])
    return [path(line, cls="f0 k-ink", width=1.5) for line in lines]


def _dot(verdict: str, x: float, y: float) -> str:
    if verdict == "outside":
        return path([(x, y - 8), (x + 8, y), (x, y + 8), (x - 8, y)], cls="fr k-red", close=True)
    if verdict == "undecided":
        return tag("circle", cls="fs k-ink", cx=x, cy=y, r=6.0, stroke_width=2)
    return tag("circle", cls="fi k-ink", cx=x, cy=y, r=5.0)
