"""One check of a checklist file, with the rules that hold for every check."""

import hashlib
import json
import re
from datetime import date

from buildlog.profiles.conditions import parse
from buildlog.profiles.read import Table, once
from buildlog.profiles.shapes import (
    READ_GRADES,
    Benchmark,
    Check,
    Grade,
    ProfileError,
    SafetyClass,
    Sense,
    Slot,
    SlotKind,
)

KEY = re.compile(r"[a-z]+(-[a-z0-9]+)*")
TEST = re.compile(r"T\d\d")


def read_check(row: Table, group: str, checked_on: date | None) -> Check:
    """A check from its table; `checked_on` is the file's date for sources that were read."""
    digest = hashlib.sha256(json.dumps(row.content, sort_keys=True, default=str).encode()).hexdigest()
    key, applies = row.text("key"), row.text("applies")
    try:
        condition = parse(applies)
    except ProfileError as error:
        raise row.wrong(str(error)) from error
    benchmarks = tuple(_read_benchmark(line) for line in row.rows("benchmark", "paragraph"))
    was_read = any(benchmark.grade in (*READ_GRADES, "secondhand") for benchmark in benchmarks)
    check = Check(
        key=key,
        title=row.text("title"),
        group=group,
        safety_class=_safety_class(row),
        hazard=row.text("hazard"),
        requirement=row.text("requirement"),
        acceptance=row.text("acceptance"),
        applies=applies,
        condition=condition,
        not_applicable_text=row.text("not_applicable_text", ""),
        slots=_read_slots(row),
        watches=row.texts("watches"),
        if_it_fails=row.text("if_it_fails"),
        caution=row.text("caution", ""),
        benchmarks=benchmarks,
        tests=row.texts("tests"),
        zone=row.text("zone", ""),
        source_checked_on=row.day("source_checked_on") or (checked_on if was_read else None),
        retired=row.yes("retired"),
        digest=digest,
    )
    row.done()
    _hold(check, row)
    return check


def _safety_class(row: Table) -> SafetyClass:
    found: SafetyClass = row.word("class", SafetyClass)
    return found


def _hold(check: Check, row: Table) -> None:
    """The rules every check keeps, each with its reason in the words of the error."""
    if not KEY.fullmatch(check.key):
        raise row.wrong("a key is lower case words joined by hyphens")
    if (check.applies == "always") == bool(check.not_applicable_text):
        raise row.wrong("'not_applicable_text' belongs to a condition, and every condition needs one")
    if check.safety_class == "A" and not check.caution:
        raise row.wrong("class A needs a caution")
    if not any(slot.required for slot in check.slots):
        raise row.wrong("a check without required evidence can never be shown")
    if strange := [test for test in check.tests if not TEST.fullmatch(test)]:
        raise row.wrong(f"'{strange[0]}' is not the number of a test")


def _read_slots(row: Table) -> tuple[Slot, ...]:
    slots = []
    for line in row.rows("slots"):
        kind: SlotKind = line.word("kind", SlotKind)
        method = line.text("method", "") or None
        slots.append(Slot(line.text("key"), kind, line.text("title"), line.yes("required", True), method))
        line.done()
        if kind == "snapshot" and not method:
            raise line.wrong("a snapshot names its 'method'")
        if method and kind not in ("snapshot", "trial"):
            raise line.wrong("'method' belongs to a snapshot or a trial")
    once("slot", [slot.key for slot in slots])
    return tuple(slots)


def _read_benchmark(line: Table) -> Benchmark:
    grade: Grade = line.word("grade", Grade)
    sense: Sense = line.word("sense", Sense, "about")
    benchmark = Benchmark(
        text=line.text("text"),
        grade=grade,
        source=line.text("source", ""),
        paragraph=line.text("paragraph", ""),
        edition=line.text("edition", ""),
        value=line.number("value"),
        unit=line.text("unit", ""),
        sense=sense,
        adopted=line.yes("adopted"),
        binding=line.yes("binding"),
    )
    line.done()
    if grade != "practice" and not (benchmark.source and benchmark.edition):
        raise line.wrong("a benchmark names its source and edition, unless it is common practice")
    if benchmark.value is not None and not (grade in READ_GRADES and benchmark.paragraph and benchmark.unit):
        raise line.wrong("a figure needs a read source, its paragraph and a unit")
    if benchmark.adopted and benchmark.value is None:
        raise line.wrong("only a figure that was read can stand as the suggested limit")
    if benchmark.binding:
        raise line.wrong("no benchmark binds by itself")
    return benchmark
