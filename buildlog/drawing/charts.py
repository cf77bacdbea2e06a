"""Charts: lines, bars and envelopes. Lines are told apart by dash and weight; limits are heavy."""

from collections.abc import Mapping, Sequence
from typing import Any

from buildlog.drawing.svg import drawing, path, tag, text
from buildlog.drawing.ticks import label, ticks

WIDTH, HEIGHT = 640.0, 340.0
LEFT, RIGHT, TOP, BOTTOM = 70.0, 24.0, 26.0, 52.0
DASHES = ("", "8 4", "2 4", "12 4 2 4")


class Frame:
    """The axes of a chart, and where a value stands on the sheet."""

    def __init__(self, xs: Sequence[float], ys: Sequence[float]) -> None:
        self.x_ticks, self.y_ticks = ticks(min(xs), max(xs)), ticks(min(ys), max(ys))

    def x(self, value: float) -> float:
        low, high = self.x_ticks[0], self.x_ticks[-1]
        return LEFT + (value - low) / (high - low) * (WIDTH - LEFT - RIGHT)

    def y(self, value: float) -> float:
        low, high = self.y_ticks[0], self.y_ticks[-1]
        return HEIGHT - BOTTOM - (value - low) / (high - low) * (HEIGHT - TOP - BOTTOM)

    def axes(self, x_label: str, y_label: str, *, bars: bool = False) -> list[str]:
        """Return rules, ticks and the words of both axes."""
        out = []
        for value in self.y_ticks:
            out.append(path([(LEFT, self.y(value)), (WIDTH - RIGHT, self.y(value))], cls="f0 k-rule", width=1))
            out.append(text(LEFT - 8, self.y(value) + 4, label(value), anchor="end", cls="t2"))
        if not bars:
            for value in self.x_ticks:
                out.append(
                    path([(self.x(value), HEIGHT - BOTTOM), (self.x(value), HEIGHT - BOTTOM + 5)], cls="f0 k-edge")
                )
                out.append(text(self.x(value), HEIGHT - BOTTOM + 20, label(value), anchor="middle", cls="t2"))
        out.append(path([(LEFT, TOP), (LEFT, HEIGHT - BOTTOM), (WIDTH - RIGHT, HEIGHT - BOTTOM)], cls="f0 k-ink"))
        out.append(text(LEFT, TOP - 10, y_label, cls="t2"))
        out.append(text(WIDTH - RIGHT, HEIGHT - 10, x_label, anchor="end", cls="t2"))
        return out


def plot(told: Mapping[str, Any]) -> str:
    """Return the drawing of a recorded plot: kind lines, bars or envelope."""
    if told["kind"] == "bars":
        series = told["series"][0]["points"]
        bars = [(name, float(point[1])) for name, point in zip(told["names"], series, strict=False)]
        limits = [(words, float(at)) for words, at in told["limits"]]
        return bar_chart(bars, y_label=told["y_label"], title=told["words"], limits=limits)
    return _lines(told)


def _lines(told: Mapping[str, Any]) -> str:
    lines = [(row["label"], [(float(x), float(y)) for x, y in row["points"]]) for row in told["series"]]
    marks = [(words, float(x), float(y)) for words, x, y in told["marks"]]
    limits = [(words, float(at)) for words, at in told["limits"]]
    corners = [(float(x), float(y)) for x, y in told["corners"]]
    points = [point for _, line in lines for point in line] + [(x, y) for _, x, y in marks] + corners
    frame = Frame([x for x, _ in points], [y for _, y in points] + [at for _, at in limits])
    body = frame.axes(told["x_label"], told["y_label"])
    if corners:
        body.append(path([(frame.x(x), frame.y(y)) for x, y in corners], cls="fgt k-ink", width=3, close=True))
    for place, (words, line) in enumerate(lines):
        spots = [(frame.x(x), frame.y(y)) for x, y in line]
        body.append(path(spots, cls="f0 k-blue", width=2, dash=DASHES[place % len(DASHES)]))
        if not corners:
            body.append(text(spots[-1][0] - 4, spots[-1][1] - 6, words, anchor="end", cls="halo"))
    for words, at in limits:
        body.append(path([(LEFT, frame.y(at)), (WIDTH - RIGHT, frame.y(at))], cls="f0 k-red", width=3))
        body.append(text(LEFT + 6, frame.y(at) - 6, words, cls="halo tb"))
    for words, x, y in marks:
        body += _mark(words, frame.x(x), frame.y(y))
    return drawing(WIDTH, HEIGHT, told["words"], body)


def _mark(words: str, x: float, y: float) -> list[str]:
    left = x > WIDTH * 0.6
    return [
        tag("circle", cls="fi k-ink", cx=x, cy=y, r=5.0),
        text(x - 10 if left else x + 10, y + 16, words, anchor="end" if left else "start", cls="halo tb"),
    ]


def bar_chart(
    bars: Sequence[tuple[str, float]], *, y_label: str, title: str, limits: Sequence[tuple[str, float]] = ()
) -> str:
    """Return bars from zero with their values; the axis is never cut short."""
    values = [value for _, value in bars] + [at for _, at in limits] or [0.0]
    frame = Frame([0, 1], [0.0, *values])
    body = frame.axes("", y_label, bars=True)
    step = (WIDTH - LEFT - RIGHT) / max(len(bars), 1)
    every = max(1, len(bars) // 12)
    for place, (name, value) in enumerate(bars):
        x, top, foot = LEFT + step * (place + 0.18), frame.y(max(value, 0)), frame.y(min(value, 0))
        body.append(tag("rect", cls="fb", x=x, y=top, width=step * 0.64, height=max(foot - top, 0.0)))
        if len(bars) <= 14:
            body.append(text(x + step * 0.32, top - 5, label(round(value, 1)), anchor="middle"))
        if place % every == 0:
            body.append(text(x + step * 0.32, HEIGHT - BOTTOM + 20, name[:14], anchor="middle", cls="t2"))
    for words, at in limits:
        body.append(path([(LEFT, frame.y(at)), (WIDTH - RIGHT, frame.y(at))], cls="f0 k-red", width=3))
        body.append(text(WIDTH - RIGHT - 4, frame.y(at) - 6, words, anchor="end", cls="halo tb"))
    return drawing(WIDTH, HEIGHT, title, body)
