"""What the profiles hold, as frozen rows: checks with their slots and benchmarks, facts, positions, jurisdictions."""

from collections.abc import Mapping
from dataclasses import dataclass
from datetime import date
from decimal import Decimal
from typing import TYPE_CHECKING, Literal

if TYPE_CHECKING:
    from buildlog.profiles.conditions import Condition

SafetyClass = Literal["A", "B", "C", "D"]
SlotKind = Literal["photo", "entry", "document", "part", "reading", "trial", "snapshot"]
Grade = Literal["read", "sister", "secondhand", "memory", "practice", "doubtful"]
Sense = Literal["at_least", "at_most", "about"]
FactKind = Literal["choice", "count", "yes_no", "text"]
Stage = Literal["before_start", "building", "before_closing", "before_run", "inspection", "test_phase", "in_service"]
Units = Literal["inch-pound", "SI"]
Paper = Literal["a4", "letter"]
Closing = Literal["block", "warn"]

CLASS_WORDS: dict[str, str] = {
    "A": "loss of the aircraft or of people",
    "B": "power loss or a forced landing",
    "C": "reduced margin",
    "D": "for the record",
}
GRADE_WORDS: dict[str, str] = {
    "read": "read in a copy of the document",
    "sister": "read in a sister rule with the same figure; the paragraph named is recalled",
    "secondhand": "read only where someone restates it",
    "memory": "from memory, not read again",
    "practice": "common practice, no source",
    "doubtful": "doubtful: verify before use",
}
# Only a figure seen in a copy of the rule may stand as a suggested limit; the rest is "enter your own".
READ_GRADES = ("read", "sister")
STAGE_WORDS: dict[str, str] = {
    "before_start": "before the build starts",
    "building": "while building",
    "before_closing": "before closing",
    "before_run": "before the first engine run",
    "inspection": "application and inspection",
    "test_phase": "test phase",
    "in_service": "in service",
}
SENSE_WORDS: dict[str, str] = {"at_least": "at least", "at_most": "at most", "about": "about"}


class ProfileError(Exception):
    """A profile file that cannot be used; the text names the file, the key and what is wrong."""


@dataclass(frozen=True)
class Slot:
    """One piece of evidence a check asks for; `method` for a snapshot, and for a trial judged by one method."""

    key: str
    kind: SlotKind
    title: str
    required: bool = True
    method: str | None = None

    @property
    def need(self) -> str:
        """The need in one word, `snapshot:fuel-flow` or `photo`."""
        return f"{self.kind}:{self.method}" if self.method else self.kind

    @property
    def accepts(self) -> tuple[SlotKind, ...]:
        """The kinds of evidence that can fill it.

        A trial that no method judges is a test sheet of the builder's own: an entry or a scanned sheet serves too.
        """
        if self.kind == "trial" and not self.method:
            return ("trial", "entry", "document")
        return (self.kind,)


@dataclass(frozen=True)
class Benchmark:
    """A figure or statement of a published rule that the builder may adopt, alter or decline with a reason.

    value, unit, sense: only where the figure itself was read. adopted: it stands as the suggested limit until
    altered; otherwise the page says "enter your own". binding: never, unless a jurisdiction makes it so.
    """

    text: str
    grade: Grade
    source: str = ""
    paragraph: str = ""
    edition: str = ""
    value: Decimal | None = None
    unit: str = ""
    sense: Sense = "about"
    adopted: bool = False
    binding: bool = False

    @property
    def sentence(self) -> str:
        """Where it comes from and what it is worth, in one line."""
        parts = [part for part in (self.source, self.paragraph, self.edition) if part]
        return ", ".join([*parts, GRADE_WORDS[self.grade]])


@dataclass(frozen=True)
class Check:
    """One hazard of a conversion: what must be so, how that is told, what evidence shows it."""

    key: str
    title: str
    group: str
    safety_class: SafetyClass
    hazard: str
    requirement: str
    acceptance: str
    applies: str
    condition: "Condition"
    not_applicable_text: str
    slots: tuple[Slot, ...]
    watches: tuple[str, ...]
    if_it_fails: str
    caution: str = ""
    benchmarks: tuple[Benchmark, ...] = ()
    tests: tuple[str, ...] = ()
    zone: str = ""
    source_checked_on: date | None = None
    retired: bool = False
    digest: str = ""

    @property
    def needs(self) -> tuple[str, ...]:
        """What the required slots ask for, each kind or method once, in order."""
        return tuple(dict.fromkeys(slot.need for slot in self.slots if slot.required))

    @property
    def benchmark(self) -> Benchmark | None:
        """The first benchmark, or None where there is none."""
        return self.benchmarks[0] if self.benchmarks else None

    @property
    def second_person(self) -> bool:
        """True where the signature must be someone's other than the doer's."""
        return self.safety_class == "A"

    def slot(self, key: str) -> Slot | None:
        """The slot of that key, or None."""
        return next((slot for slot in self.slots if slot.key == key), None)


@dataclass(frozen=True)
class Group:
    """One file of the checklist: its key, title and place in the order."""

    key: str
    title: str
    order: int


@dataclass(frozen=True)
class Option:
    """One answer of a choice: the value kept and the word shown."""

    value: str
    word: str


@dataclass(frozen=True)
class Fact:
    """One fact of a conversion, from which its page makes a field; unset facts leave checks applying."""

    key: str
    label: str
    help: str
    kind: FactKind
    group: str
    options: tuple[Option, ...] = ()
    low: int | None = None
    high: int | None = None

    @property
    def option_words(self) -> dict[str, str]:
        """Value to word, empty for facts that are no choice."""
        return {option.value: option.word for option in self.options}


@dataclass(frozen=True)
class Position:
    """A place on the aircraft that holds one part at a time."""

    key: str
    title: str
    group: str


@dataclass(frozen=True)
class Demand:
    """Something an authority asks for at a stage; `on` is off where nobody has read the source."""

    key: str
    title: str
    stage: Stage
    text: str
    form: str
    grade: Grade
    source: str = ""
    edition: str = ""
    on: bool = False

    @property
    def mark(self) -> str:
        """What the line is worth, in words."""
        return GRADE_WORDS[self.grade]


@dataclass(frozen=True)
class ShareRule:
    """How the amateur share is measured: tasks, hours or parts, the share asked for, and who says so."""

    basis: Literal["tasks", "hours", "parts"]
    majority: str
    text: str
    grade: Grade
    source: str = ""
    edition: str = ""


@dataclass(frozen=True)
class Jurisdiction:
    """One authority's demands and words; a start to be checked against its current papers, never law."""

    key: str
    title: str
    authority: str
    units: Units
    paper: Paper
    papers: tuple[Paper, ...]
    language: str
    words: Mapping[str, str]
    share: ShareRule
    closing: Closing
    closing_reason: str
    class_a_signer: str
    builder_may_countersign: bool
    leave_out: tuple[str, ...]
    occupant_notes: tuple[str, ...]
    demands: tuple[Demand, ...]
    caution: str
    source_checked_on: date | None = None
    template: bool = False

    def word(self, key: str) -> str:
        """This authority's word for a thing, or the key in plain letters."""
        return self.words.get(key, key.replace("_", " "))

    def demands_at(self, stage: Stage) -> tuple[Demand, ...]:
        """The demands of one stage, those that are off among them."""
        return tuple(demand for demand in self.demands if demand.stage == stage)
