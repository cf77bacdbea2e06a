"""What the facts of a conversion decide: which checks apply, which do not, and which wait for a fact."""

from collections import Counter
from collections.abc import Mapping
from dataclasses import dataclass

from buildlog.profiles import load
from buildlog.profiles.conditions import FactValue
from buildlog.profiles.shapes import Check, Fact


@dataclass(frozen=True)
class Decided:
    """One check and why it applies, does not, or is not decided."""

    check: Check
    reason: str


@dataclass(frozen=True)
class Missing:
    """A fact that is not stated, and how many checks wait for it."""

    fact: Fact
    checks: int


@dataclass(frozen=True)
class Outcome:
    """All checks by what the facts say about them."""

    applying: tuple[Decided, ...]
    left_out: tuple[Decided, ...]
    unknown: tuple[Decided, ...]
    missing: tuple[Missing, ...]
    facts_stated: int
    facts_asked: int


def outcome(stated: Mapping[str, FactValue]) -> Outcome:
    """Return what the stated facts decide; a missing fact leaves its checks applying until it is stated."""
    found: dict[str, list[Decided]] = {"yes": [], "no": [], "unknown": []}
    waiting: Counter[str] = Counter()
    for check in load.checklist().values():
        answer = load.applies(check, stated)
        found[answer.answer].append(Decided(check, answer.reason))
        if answer.answer == "unknown":
            waiting.update(answer.missing)
    missing = tuple(Missing(load.facts()[key], count) for key, count in waiting.most_common())
    asked = load.facts()
    return Outcome(
        applying=tuple(found["yes"]),
        left_out=tuple(found["no"]),
        unknown=tuple(found["unknown"]),
        missing=missing,
        facts_stated=sum(1 for key in asked if stated.get(key) not in (None, "")),
        facts_asked=len(asked),
    )
