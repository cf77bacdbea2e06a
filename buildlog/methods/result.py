"""One run of a method, frozen: what went in, what came out, the verdicts, the steps and the plot, all as text."""

import hashlib
import json
from collections.abc import Mapping
from dataclasses import asdict, dataclass
from typing import Any

WITHIN, OUTSIDE, UNDECIDED, NO_VERDICT = "within", "outside", "undecided", "no-verdict"
VERDICT_WORDS = {
    WITHIN: "Within limits",
    OUTSIDE: "Out of limits",
    UNDECIDED: "Undecided: measured too coarsely to tell",
    NO_VERDICT: "No verdict: limit unverified",
}


@dataclass(frozen=True)
class Said:
    """One input: as entered, and as a decimal in the declared unit; a table has rows instead."""

    name: str
    label: str
    unit: str
    entered: str = ""
    value: str = ""
    spread: str = ""
    columns: tuple[str, ...] = ()
    rows: tuple[tuple[str, ...], ...] = ()


@dataclass(frozen=True)
class Came:
    """One output: a decimal in its unit, or a word; `spread` is its expanded uncertainty (k = 2)."""

    name: str
    label: str
    unit: str
    value: str
    shown: str
    spread: str = ""


@dataclass(frozen=True)
class Checked:
    """One limit: the verdict, the value and bound it compares, the margin, and who sets the limit."""

    text: str
    verdict: str
    value: str
    bound: str
    unit: str
    sense: str  # at-least or at-most
    margin: str
    source: str
    grade: str

    @property
    def words(self) -> str:
        """Return the verdict in words."""
        return VERDICT_WORDS[self.verdict]


@dataclass(frozen=True)
class Result:
    """A whole run. `plot` is a plain mapping of text, ready to be drawn."""

    method: str
    version: int
    title: str
    source: str
    not_covered: str
    checked_against: str
    caution: str
    inputs: tuple[Said, ...]
    outputs: tuple[Came, ...]
    checks: tuple[Checked, ...]
    steps: tuple[str, ...]
    plot: Mapping[str, Any] | None

    @property
    def verdict(self) -> str:
        """Return the worst verdict of all limits; "" where the method has none."""
        for verdict in (OUTSIDE, UNDECIDED, NO_VERDICT, WITHIN):
            if any(check.verdict == verdict for check in self.checks):
                return verdict
        return ""

    def output(self, name: str) -> Came:
        """Return an output by name; KeyError when there is none."""
        return {one.name: one for one in self.outputs}[name]

    def as_recorded(self) -> dict[str, Any]:
        """Return everything as canonical JSON values: texts, whole numbers, lists and mappings, no floats."""
        plain: dict[str, Any] = json.loads(json.dumps(asdict(self)))
        return plain

    @property
    def digest(self) -> str:
        """Return the SHA-256 of the canonical record of this run."""
        spelled = json.dumps(self.as_recorded(), sort_keys=True, separators=(",", ":"), ensure_ascii=False)
        return hashlib.sha256(spelled.encode()).hexdigest()


def from_record(recorded: Mapping[str, Any]) -> Result:
    """Return a run from its record, whether or not its method still exists."""
    inputs = [
        Said(**{**row, "columns": tuple(row["columns"]), "rows": tuple(tuple(cells) for cells in row["rows"])})
        for row in recorded["inputs"]
    ]
    return Result(
        **{
            **recorded,
            "inputs": tuple(inputs),
            "outputs": tuple(Came(**row) for row in recorded["outputs"]),
            "checks": tuple(Checked(**row) for row in recorded["checks"]),
            "steps": tuple(recorded["steps"]),
        }
    )
