"""The form of a method, made from its declaration."""

from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field
from typing import Any
from uuid import UUID

from django.http import QueryDict

from buildlog.calcs.actions import Source
from buildlog.calcs.queries import Offered, SnapshotView, offers
from buildlog.errors import Refused
from buildlog.methods import units
from buildlog.methods.declare import Choice, Field, Input, Method, Table

MOST_ROWS = 60


@dataclass
class Cell:
    """One field on the page: its name there, what was typed, and what is wrong with it."""

    field: Field
    name: str
    value: str = ""
    error: str = ""
    offers: Sequence[Offered] = ()
    taken: str = ""

    @property
    def kind(self) -> str:
        """Return choice or text."""
        return "choice" if isinstance(self.field, Choice) else "text"

    @property
    def unit(self) -> str:
        """Return the unit as it is printed."""
        return units.shown(self.field.unit) if isinstance(self.field, Input) else ""


@dataclass
class Grid:
    """A table on the page: its rows of cells."""

    table: Table
    rows: list[list[Cell]]
    error: str = ""


@dataclass
class MethodForm:
    """What the page of a method shows: cells and grids in the order of the declaration, and the error on top."""

    parts: list[Cell | Grid] = field(default_factory=list)
    error: str = ""

    @property
    def cells(self) -> list[Cell]:
        """Return the single fields."""
        return [part for part in self.parts if isinstance(part, Cell)]

    @property
    def grids(self) -> list[Grid]:
        """Return the tables."""
        return [part for part in self.parts if isinstance(part, Grid)]

    def refuse(self, refusal: Refused) -> None:
        """Put a refusal beside its field, or on top."""
        for cell in [*self.cells, *(cell for grid in self.grids for row in grid.rows for cell in row)]:
            if cell.name == refusal.field:
                cell.error = refusal.text
        for grid in self.grids:
            if grid.table.name == refusal.field:
                grid.error = refusal.text
        self.error = refusal.text


def build(method: Method, said: Mapping[str, Any], views: Sequence[SnapshotView], *, more_rows: int = 0) -> MethodForm:
    """Return the form of a method with what was said: names as the page sends them."""
    form = MethodForm()
    for one in method.inputs:
        if isinstance(one, Table):
            form.parts.append(_grid(one, said, more_rows))
        else:
            offered = offers(views, one) if isinstance(one, Input) else ()
            taken = str(said.get(f"from-{one.name}", ""))
            form.parts.append(Cell(one, one.name, _first(one, said.get(one.name)), "", offered, taken))
    return form


def _first(one: Field, said: Any) -> str:
    if said is not None:
        return str(said)
    default = getattr(one, "default", None)
    return "" if default is None else f"{default:g}" if isinstance(default, float | int) else str(default)


def _grid(table: Table, said: Mapping[str, Any], more_rows: int) -> Grid:
    filled = _rows_said(table, said)
    count = min(max(filled + 1, table.least, table.spare) + more_rows, MOST_ROWS)
    rows = [
        [
            Cell(one, f"{table.name}-{row}-{one.name}", _first(one, said.get(f"{table.name}-{row}-{one.name}")))
            for one in table.columns
        ]
        for row in range(count)
    ]
    return Grid(table, rows)


def _rows_said(table: Table, said: Mapping[str, Any]) -> int:
    names = [name for name in said if name.startswith(f"{table.name}-") and str(said[name]).strip()]
    numbers = [int(name.split("-")[1]) for name in names if name.split("-")[1].isdigit()]
    return min(max(numbers, default=-1) + 1, MOST_ROWS)


def given(method: Method, post: QueryDict, views: Sequence[SnapshotView]) -> tuple[dict[str, Any], list[Source]]:
    """Return what a posted page gives to the method, and which inputs come from snapshots. Refused when one is gone."""
    values: dict[str, Any] = {}
    sources = []
    for one in method.inputs:
        if isinstance(one, Table):
            values[one.name] = [_row(one, post, row) for row in range(_rows_said(one, post.dict()))]
        elif isinstance(one, Input) and (taken := post.get(f"from-{one.name}")):
            source = _source(one, taken, views)
            sources.append(source)
            values[one.name] = source.value
        else:
            values[one.name] = post.get(one.name, "")
    return values, sources


def _row(table: Table, post: QueryDict, row: int) -> dict[str, str]:
    cells = {one.name: post.get(f"{table.name}-{row}-{one.name}", "").strip() for one in table.columns}
    # A row in which only choices are set was never begun.
    begun = any(cells[one.name] for one in table.columns if not isinstance(one, Choice))
    return cells if begun else {one.name: "" for one in table.columns}


def _source(one: Input, taken: str, views: Sequence[SnapshotView]) -> Source:
    key, _, output = taken.partition(":")
    for view in views:
        if str(view.snapshot.id) == key and view.state == "holds":
            for came in view.result.outputs:
                if came.name == output:
                    return Source(one.name, view.snapshot, output, f"{came.value} {came.unit}".strip())
    raise Refused("What this was taken from does not hold any more. Choose again.", field=one.name)


def again(view: SnapshotView, method: Method) -> dict[str, str]:
    """Return what a snapshot was given, as the page sends it, to run it again."""
    said: dict[str, str] = {}
    for one in view.result.inputs:
        if not one.columns:
            said[one.name] = _typed(one.entered, one.value, one.spread)
            continue
        table = method.input(one.name)
        assert isinstance(table, Table)
        for number, cells in enumerate(one.rows):
            for column, cell in zip(table.columns, cells, strict=True):
                said[f"{one.name}-{number}-{column.name}"] = cell
    return said


def _typed(entered: str, value: str, spread: str) -> str:
    return f"{value} ± {spread}" if spread else value if entered else ""


def uuid_or_none(text: str | None) -> UUID | None:
    """Return an identifier from a page, or None for anything else."""
    try:
        return UUID(text or "")
    except ValueError:
        return None
