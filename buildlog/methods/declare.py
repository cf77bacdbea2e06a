"""What a method declares; form, page, snapshot, plot, binder sheet, commands and tests are made from it."""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass, field
from typing import Any

Values = Mapping[str, Any]  # names to floats in declared units, texts, None, or lists of such mappings (tables)


@dataclass(frozen=True)
class Input:
    """A number with a unit. `low` and `high` refuse typing errors in the form; they are not good practice."""

    name: str
    unit: str
    label: str
    low: float | None = None
    high: float | None = None
    default: float | None = None
    optional: bool = False
    measured: bool = False  # may carry an uncertainty: "20.05 ± 0.02 mm"
    help: str = ""


@dataclass(frozen=True)
class Whole:
    """A whole number."""

    name: str
    label: str
    low: int = 0
    high: int = 200
    default: int | None = None
    help: str = ""


@dataclass(frozen=True)
class Choice:
    """One of a few words: value kept -> word shown."""

    name: str
    label: str
    options: Mapping[str, str]
    default: str | None = None
    help: str = ""


@dataclass(frozen=True)
class Text:
    """A name or a source in words; no part of the sum."""

    name: str
    label: str
    optional: bool = False
    help: str = ""


Field = Input | Whole | Choice | Text


@dataclass(frozen=True)
class Table:
    """Rows of fields: runs of a trial, points of a weighing, items of a loading."""

    name: str
    label: str
    columns: tuple[Field, ...]
    least: int = 1
    spare: int = 4  # empty rows a form starts with
    help: str = ""


@dataclass(frozen=True)
class Output:
    """A result: a number with a unit, or a word when the unit is None."""

    name: str
    unit: str | None
    label: str
    places: int = 3  # digits after the point where it is shown; the record keeps twelve significant ones


@dataclass(frozen=True)
class Limit:
    """An output held against a bound: the name of an output or input, or a number. The edge counts as within.

    grade: "read", "memory", "practice" or "own"; only a limit whose source was read gives a verdict by itself.
    """

    of: str
    text: str
    at_least: str | float | None = None
    at_most: str | float | None = None
    source: str = ""
    grade: str = "own"


@dataclass(frozen=True)
class Series:
    """One line or one row of bars: points x, y in the units of the axes."""

    label: str
    points: Sequence[tuple[float, float]]


@dataclass(frozen=True)
class Plot:
    """A picture in numbers. `kind`: lines, bars or envelope; `words` says in a sentence what it shows."""

    kind: str
    x_label: str
    y_label: str
    words: str
    series: Sequence[Series] = ()
    marks: Sequence[tuple[str, float, float]] = ()
    limits: Sequence[tuple[str, float]] = ()
    names: Sequence[str] = ()  # of bars
    corners: Sequence[tuple[float, float]] = ()  # of an envelope


@dataclass(frozen=True)
class Example:
    """A worked example: given values in declared units and what comes out, with who says so."""

    given: Values
    gives: Values
    source: str


@dataclass(frozen=True)
class Method:
    """One engineering calculation, whole. `compute` takes the inputs by name and gives the outputs by name."""

    key: str
    version: int
    title: str
    theme: str
    purpose: str
    source: str
    compute: Callable[..., dict[str, Any]]
    inputs: tuple[Field | Table, ...]
    outputs: tuple[Output, ...]
    steps: Callable[[Values, Values], list[str]]
    not_covered: str
    checked_against: str  # the published check; "" makes the page say that there is none
    limits: tuple[Limit, ...] = ()
    plot: Callable[[Values, Values], Plot] | None = None
    plot_words: str = ""
    caution: str = ""
    examples: tuple[Example, ...] = field(default=())

    def input(self, name: str) -> Field | Table:
        """Return a declared input by name; KeyError when there is none."""
        return {one.name: one for one in self.inputs}[name]

    def output(self, name: str) -> Output:
        """Return a declared output by name; KeyError when there is none."""
        return {one.name: one for one in self.outputs}[name]
