"""Charts: lines, bars and envelopes. Lines are told apart by dash and weight; limits are heavy."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass
from typing import Any

from buildlog.drawing.svg import drawing, path, tag, text
from buildlog.drawing.ticks import label, ticks

DASHES = ("", "8 4", "2 4", "12 4 2 4")


@dataclass(frozen=True)
class Sheet:
    """How large a drawing is, and the room around its axes; text is 12 units high on each."""

    width: float
    height: float
    left: float
    right: float
    top: float
    bottom: float
    cls: str = "plot"

    @property
    def end(self) -> float:
        """Return where the axes end on the right."""
        return self.width - self.right

    @property
    def foot(self) -> float:
        """Return where the axes stand at the bottom."""
        return self.height - self.bottom


WIDE = Sheet(640.0, 340.0, 70.0, 24.0, 26.0, 52.0)
SNUG = Sheet(320.0, 190.0, 40.0, 4.0, 24.0, 26.0, "plot snug")  # beside text, in a column of a page


class Frame:
    """The axes of a chart, and where a value stands on the sheet."""

    def __init__(self, xs: Sequence[float], ys: Sequence[float], sheet: Sheet = WIDE) -> None:
        self.sheet = sheet
        self.x_ticks, self.y_ticks = ticks(min(xs), max(xs)), ticks(min(ys), max(ys))

    def x(self, value: float) -> float:
        low, high = self.x_ticks[0], self.x_ticks[-1]
        return self.sheet.left + (value - low) / (high - low) * (self.sheet.end - self.sheet.left)

    def y(self, value: float) -> float:
        low, high = self.y_ticks[0], self.y_ticks[-1]
        return self.sheet.foot - (value - low) / (high - low) * (self.sheet.foot - self.sheet.top)

    def axes(self, x_label: str, y_label: str, *, bars: bool = False) -> list[str]:
        """Return rules, ticks and the words of both axes."""
        at, out = self.sheet, []
        for value in self.y_ticks:
            out.append(self.level(value, cls="f0 k-rule", width=1))
            out.append(text(at.left - 8, self.y(value) + 4, label(value), anchor="end", cls="t2"))
        for value in [] if bars else self.x_ticks:
            out.append(path([(self.x(value), at.foot), (self.x(value), at.foot + 5)], cls="f0 k-edge"))
            out.append(text(self.x(value), at.foot + 20, label(value), anchor="middle", cls="t2"))
        out.append(path([(at.left, at.top), (at.left, at.foot), (at.end, at.foot)], cls="f0 k-ink"))
        out.append(text(at.left, at.top - 10, y_label, cls="t2"))
        out.append(text(at.end, at.height - 10, x_label, anchor="end", cls="t2"))
        return out

    def level(self, value: float, *, cls: str, width: float) -> str:
        """Return a line across the axes at a value."""
        return path([(self.sheet.left, self.y(value)), (self.sheet.end, self.y(value))], cls=cls, width=width)

    def limit(self, words: str, value: float, *, at_end: bool = False) -> list[str]:
        """Return a limit: a heavy line with its words."""
        x = self.sheet.end - 4 if at_end else self.sheet.left + 6
        words_at = text(x, self.y(value) - 6, words, anchor="end" if at_end else "start", cls="halo tb")
        return [self.level(value, cls="f0 k-red", width=3), words_at]


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
        body += frame.limit(words, at)
    for words, x, y in marks:
        body += _mark(words, frame.x(x), frame.y(y), left=frame.x(x) > WIDE.width * 0.6)
    return drawing(WIDE.width, WIDE.height, told["words"], body)


def _mark(words: str, x: float, y: float, *, left: bool) -> list[str]:
    return [
        tag("circle", cls="fi k-ink", cx=x, cy=y, r=5.0),
        text(x - 10 if left else x + 10, y + 16, words, anchor="end" if left else "start", cls="halo tb"),
    ]


def bar_chart(
    bars: Sequence[tuple[str, float]],
    *,
    y_label: str,
    title: str,
    limits: Sequence[tuple[str, float]] = (),
    sheet: Sheet = WIDE,
) -> str:
    """Return bars from zero with their values; the axis is never cut short. A bar without a name stays without."""
    values = [value for _, value in bars] + [at for _, at in limits] or [0.0]
    frame = Frame([0, 1], [0.0, *values], sheet)
    body = frame.axes("", y_label, bars=True)
    step = (sheet.end - sheet.left) / max(len(bars), 1)
    names = [name for name, _ in bars if name]
    every = max(1, len(names) // 12)
    for place, (name, value) in enumerate(bars):
        x, top, foot = sheet.left + step * (place + 0.18), frame.y(max(value, 0)), frame.y(min(value, 0))
        body.append(tag("rect", cls="fb", x=x, y=top, width=step * 0.64, height=max(foot - top, 0.0)))
        if len(bars) <= 14:
            body.append(text(x + step * 0.32, top - 5, label(round(value, 1)), anchor="middle"))
        if name and place % every == 0:
            body.append(text(x + step * 0.32, sheet.foot + 18, name[:14], anchor="middle", cls="t2"))
    for words, at in limits:
        body += frame.limit(words, at, at_end=True)
    return drawing(sheet.width, sheet.height, title, body, cls=sheet.cls)
