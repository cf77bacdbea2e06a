"""From what was typed to a frozen result: read, refuse, compute, compare, tell the steps, draw the numbers."""

import math
from collections.abc import Iterator, Mapping, Sequence
from typing import Any

from buildlog.errors import Refused
from buildlog.methods import units
from buildlog.methods.declare import Choice, Field, Input, Limit, Method, Output, Plot, Table, Text, Whole
from buildlog.methods.result import NO_VERDICT, OUTSIDE, UNDECIDED, WITHIN, Came, Checked, Result, Said

SLACK = 1e-9  # relative: 0.8000000000000002 is 80 per cent
Spot = tuple[str, int | None, str | None]  # input; or table, row, column


class Reading:
    """The inputs of one run: values by name for the formula, and what was said for the record."""

    def __init__(self) -> None:
        self.values: dict[str, Any] = {}
        self.said: list[Said] = []
        self.spreads: dict[Spot, float] = {}


def run(method: Method, given: Mapping[str, Any], *, bounded: bool = True) -> Result:
    """Run a method on what was given: texts as typed, plain numbers in declared units, tables as lists of mappings.

    bounded: refuse values outside the form's bounds (typing errors); published cases from other trades go past them.
    Raises Refused naming the field; never returns nan.
    """
    reading = read_inputs(method, given, bounded=bounded)
    found = _compute(method, reading.values)
    spreads = _spreads(method, reading, found)
    outputs = tuple(_came(one, found.get(one.name), spreads.get(one.name)) for one in method.outputs)
    checks = tuple(_check(method, limit, reading.values, found, spreads) for limit in method.limits)
    plot = method.plot(reading.values, found) if method.plot else None
    return Result(
        method=method.key,
        version=method.version,
        title=method.title,
        source=method.source,
        not_covered=method.not_covered,
        checked_against=method.checked_against,
        caution=method.caution,
        inputs=tuple(reading.said),
        outputs=tuple(one for one in outputs if one.value != ""),
        checks=checks,
        steps=tuple(method.steps(reading.values, found)),
        plot=_plain_plot(plot) if plot else None,
    )


def read_inputs(method: Method, given: Mapping[str, Any], *, bounded: bool = True) -> Reading:
    """Return the inputs read; Refused at the first that is missing, unknown or out of bounds."""
    known = {one.name for one in method.inputs}
    if strange := sorted(set(given) - known):
        raise Refused(f"{method.title} has no input called {strange[0]!r}; it has {', '.join(sorted(known))}.")
    reading = Reading()
    for one in method.inputs:
        if isinstance(one, Table):
            _read_table(one, given.get(one.name) or [], reading, bounded)
        else:
            value, said, spread = _read_field(one, given.get(one.name), one.name, bounded)
            reading.values[one.name] = value
            reading.said.append(said)
            if spread:
                reading.spreads[one.name, None, None] = spread
    return reading


def _read_table(table: Table, rows: Sequence[Mapping[str, Any]], reading: Reading, bounded: bool) -> None:
    told, values = [], []
    filled = [row for row in rows if any(str(cell or "").strip() for cell in row.values())]
    for index, row in enumerate(filled):
        cells, line = {}, []
        for column in table.columns:
            field = f"{table.name}-{index}-{column.name}"
            value, said, spread = _read_field(column, row.get(column.name), field, bounded)
            cells[column.name] = value
            line.append(said.value + (f" ± {said.spread}" if said.spread else ""))
            if spread:
                reading.spreads[table.name, index, column.name] = spread
        values.append(cells)
        told.append(tuple(line))
    if len(values) < table.least:
        raise Refused(
            f"{table.label}: fill in at least {table.least} row{'s' if table.least > 1 else ''}.", field=table.name
        )
    heads = tuple(f"{column.label}{_in(column)}" for column in table.columns)
    reading.values[table.name] = values
    reading.said.append(Said(table.name, table.label, "", columns=heads, rows=tuple(told)))


def _in(column: Field) -> str:
    return f" [{units.shown(column.unit)}]" if isinstance(column, Input) and column.unit else ""


def _read_field(one: Field, given: Any, field: str, bounded: bool) -> tuple[Any, Said, float | None]:
    text = "" if given is None else str(given).strip()
    if isinstance(one, Text):
        if not text and not one.optional:
            raise Refused(f"{one.label} is missing.", field=field)
        return text, Said(one.name, one.label, "", text, text), None
    if isinstance(one, Choice):
        return _choice(one, text, field)
    if isinstance(one, Whole):
        return _whole(one, text, field, bounded)
    return _input(one, text, field, bounded)


def _choice(one: Choice, text: str, field: str) -> tuple[str, Said, None]:
    value = text or one.default or ""
    if value not in one.options:
        raise Refused(f"{one.label}: choose one of {', '.join(one.options)}.", field=field)
    return value, Said(one.name, one.label, "", one.options[value], value), None


def _whole(one: Whole, text: str, field: str, bounded: bool) -> tuple[int, Said, None]:
    if not text and one.default is not None:
        text = str(one.default)
    value = units.read(text, "", name=field).value if text else math.nan
    if not float(value).is_integer():
        raise Refused(f"{one.label} is a whole number.", field=field)
    if bounded and not one.low <= value <= one.high:
        raise Refused(f"{one.label} lies between {one.low} and {one.high}.", field=field)
    return int(value), Said(one.name, one.label, "", text, str(int(value))), None


def _input(one: Input, text: str, field: str, bounded: bool) -> tuple[float | None, Said, float | None]:
    if not text:
        if one.default is None and not one.optional:
            raise Refused(f"{one.label} is missing.", field=field)
        value = one.default
        told = "" if value is None else units.decimal(value)
        return value, Said(one.name, one.label, one.unit, told and f"{told} (taken as usual)", told), None
    typed = units.read(text, one.unit, name=field)
    if bounded:
        _within(one, typed.value, field)
    spread = units.decimal(typed.spread) if typed.spread else ""
    said = Said(one.name, one.label, one.unit, typed.entered, units.decimal(typed.value), spread)
    return typed.value, said, typed.spread


def _within(one: Input, value: float, field: str) -> None:
    unit = f" {units.shown(one.unit)}" if one.unit else ""
    if one.low is not None and value < one.low * (1 - SLACK if one.low > 0 else 1 + SLACK):
        raise Refused(f"{one.label} is at least {units.decimal(one.low)}{unit} here. Is the unit right?", field=field)
    if one.high is not None and value > one.high * (1 + SLACK if one.high > 0 else 1 - SLACK):
        raise Refused(f"{one.label} is at most {units.decimal(one.high)}{unit} here. Is the unit right?", field=field)


def _compute(method: Method, values: Mapping[str, Any]) -> dict[str, Any]:
    try:
        found = method.compute(**values)
    except (ZeroDivisionError, OverflowError, ValueError):
        raise Refused("These values together give no result. Check them for a zero or a slipped unit.") from None
    for one in method.outputs:
        value = found.get(one.name)
        if isinstance(value, float | int) and not math.isfinite(value):
            raise Refused("These values together give no result. Check them for a zero or a slipped unit.")
    return found


def _moved(values: Mapping[str, Any], spot: Spot, by: float) -> dict[str, Any]:
    name, row, column = spot
    moved = dict(values)
    if row is None or column is None:
        moved[name] = values[name] + by
    else:
        moved[name] = [dict(cells) for cells in values[name]]
        moved[name][row][column] += by
    return moved


def _spreads(method: Method, reading: Reading, found: Mapping[str, Any]) -> dict[str, float]:
    """Return the expanded uncertainty of each number, first order: the root of the sum of squared effects (GUM 5.1)."""
    squares: dict[str, float] = {}
    for spot, spread in reading.spreads.items():
        changed = _compute(method, _moved(reading.values, spot, spread))
        for one in method.outputs:
            before, after = found.get(one.name), changed.get(one.name)
            if isinstance(before, float | int) and isinstance(after, float | int):
                squares[one.name] = squares.get(one.name, 0.0) + (after - before) ** 2
    return {name: math.sqrt(total) for name, total in squares.items() if total}


def _came(one: Output, value: Any, spread: float | None) -> Came:
    if value is None:
        return Came(one.name, one.label, one.unit or "", "", "")
    if isinstance(value, str):
        return Came(one.name, one.label, "", value, value)
    told = units.decimal(float(value))
    return Came(
        one.name, one.label, one.unit or "", told, f"{value:,.{one.places}f}", units.decimal(spread) if spread else ""
    )


def _check(
    method: Method, limit: Limit, values: Mapping[str, Any], found: Mapping[str, Any], spreads: Mapping[str, float]
) -> Checked:
    asked = limit.at_least if limit.at_least is not None else limit.at_most
    sense = "at-least" if limit.at_least is not None else "at-most"
    bound = found.get(asked, values.get(asked)) if isinstance(asked, str) else asked
    value, unit = found.get(limit.of), method.output(limit.of).unit or ""
    if value is None or bound is None:
        return Checked(limit.text, NO_VERDICT, "", "", unit, sense, "", limit.source, limit.grade)
    margin = (value - bound) if sense == "at-least" else (bound - value)
    doubt = math.hypot(spreads.get(limit.of, 0.0), spreads.get(asked, 0.0) if isinstance(asked, str) else 0.0)
    slack = SLACK * max(abs(value), abs(bound))
    verdict = WITHIN if margin >= doubt - slack else OUTSIDE if margin < -doubt - slack else UNDECIDED
    told = [units.decimal(float(number)) for number in (value, bound, margin)]
    return Checked(limit.text, verdict, told[0], told[1], unit, sense, told[2], limit.source, limit.grade)


def _plain_plot(plot: Plot) -> dict[str, Any]:
    def spelled(points: Sequence[tuple[float, float]]) -> list[list[str]]:
        return [[units.decimal(float(f"{x:.6g}")), units.decimal(float(f"{y:.6g}"))] for x, y in points]

    return {
        "kind": plot.kind,
        "x_label": plot.x_label,
        "y_label": plot.y_label,
        "words": plot.words,
        "series": [{"label": one.label, "points": spelled(one.points)} for one in plot.series],
        "marks": [[label, *spelled([(x, y)])[0]] for label, x, y in plot.marks],
        "limits": [[label, units.decimal(float(f"{at:.6g}"))] for label, at in plot.limits],
        "names": list(plot.names),
        "corners": spelled(plot.corners),
    }


def fields(method: Method) -> Iterator[tuple[Table | None, Field]]:
    """Yield every field of a method with the table it stands in."""
    for one in method.inputs:
        if isinstance(one, Table):
            for column in one.columns:
                yield one, column
        else:
            yield None, one
