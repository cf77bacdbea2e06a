"""The checklist as shipped, against the list of hazards and the figures of the rules it cites."""

import dataclasses
import re
from collections.abc import Iterator
from decimal import Decimal

import pytest

from buildlog.profiles import load
from buildlog.profiles.shapes import READ_GRADES, Check
from tests.profiles.expected import EXPECTED

CHECKS = load.checklist()
# Results the program never gives; "airworthiness" names a certificate or an authority and may stand.
FORBIDDEN = re.compile(r"\b(safe|safely|airworthy|approved|compliant|certified)\b", re.IGNORECASE)
NEVER_SHOWN = re.compile(r"!|\b(sync|submit|finalise|oops|TODO|FIXME|TBD)\b")


def texts(row: object) -> Iterator[str]:
    """Every text of a row that a person reads, however deep; a condition is shown in words of its own."""
    if isinstance(row, str):
        yield row
    elif dataclasses.is_dataclass(row) and not isinstance(row, type):
        for field in dataclasses.fields(row):
            if field.name not in ("applies", "condition"):
                yield from texts(getattr(row, field.name))
    elif isinstance(row, tuple):
        for item in row:
            yield from texts(item)


def test_every_hazard_of_the_list_is_a_check_of_its_class() -> None:
    assert {key: check.safety_class for key, check in CHECKS.items()} == EXPECTED["classes"]


def test_groups_come_in_their_order_and_none_is_empty() -> None:
    orders = [group.order for group in load.groups()]
    assert orders == sorted(set(orders))
    assert {group.key for group in load.groups()} == {check.group for check in CHECKS.values()}


@pytest.mark.parametrize("figure", EXPECTED["figure"], ids=lambda figure: f"{figure['check']}-{figure['unit']}")
def test_suggested_figures_are_those_of_the_rule(figure: dict[str, str]) -> None:
    found = {line.unit: line for line in CHECKS[figure["check"]].benchmarks}[figure["unit"]]
    rule = Decimal(figure["rule"]) * Decimal(figure["times"])
    assert found.value is not None
    assert abs(found.value - rule) <= Decimal(figure["within"])


@pytest.mark.parametrize(
    ("cylinders", "factor"), [("five cylinders or more", "1.33"), ("four", "2"), ("three", "3"), ("two", "4")]
)
def test_torque_factors_are_those_of_cs_22_361(cylinders: str, factor: str) -> None:
    lines = [line for line in CHECKS["mnt-torque"].benchmarks if line.paragraph == "22.361(b)"]
    assert [str(line.value) for line in lines if f", {cylinders}" in line.unit] == [factor]


@pytest.mark.parametrize("check", CHECKS.values(), ids=lambda check: check.key)
def test_figures_name_source_paragraph_edition_and_grade(check: Check) -> None:
    for line in check.benchmarks:
        assert line.grade and not line.binding
        if line.value is not None:
            assert line.source and line.paragraph and line.edition and line.unit
            assert line.grade in READ_GRADES
        if line.adopted:
            assert line.value is not None
        if line.grade not in READ_GRADES:
            assert not line.adopted, "an unread figure is the builder's own to enter"


def test_some_figures_are_on_and_some_are_the_builders_own() -> None:
    lines = [line for check in CHECKS.values() for line in check.benchmarks]
    assert {line.adopted for line in lines if line.grade in READ_GRADES} == {True, False}
    assert {"memory", "practice", "doubtful", "secondhand", "sister", "read"} == {line.grade for line in lines}


@pytest.mark.parametrize("check", CHECKS.values(), ids=lambda check: check.key)
def test_sources_that_were_read_carry_the_day_of_checking(check: Check) -> None:
    was_read = any(line.grade in (*READ_GRADES, "secondhand") for line in check.benchmarks)
    assert (check.source_checked_on is not None) == was_read


@pytest.mark.parametrize("check", CHECKS.values(), ids=lambda check: check.key)
def test_texts_are_whole_sentences_without_results_the_program_never_gives(check: Check) -> None:
    for text in texts(check):
        assert not FORBIDDEN.search(text), text
        assert not NEVER_SHOWN.search(text), text
    sentences = [check.hazard, check.requirement, check.acceptance, check.if_it_fails]
    sentences += [line.text for line in check.benchmarks]
    sentences += [text for text in (check.caution, check.not_applicable_text) if text]
    for sentence in sentences:
        assert sentence[0].isupper() and sentence.endswith(".") and len(sentence.split()) >= 4, sentence
    assert len(check.title) <= 60 and not check.title.endswith(".")


def test_no_two_checks_share_a_text() -> None:
    for name in ("title", "hazard", "requirement", "acceptance"):
        seen = [getattr(check, name) for check in CHECKS.values()]
        assert len(seen) == len(set(seen)), name


@pytest.mark.parametrize(
    "check", [check for check in CHECKS.values() if check.safety_class == "A"], ids=lambda check: check.key
)
def test_class_a_has_a_caution_and_wants_a_second_person(check: Check) -> None:
    assert check.second_person
    assert check.caution


def test_whatever_is_tried_on_the_aircraft_carries_a_caution() -> None:
    tried = [check for check in CHECKS.values() if check.tests or any(slot.kind == "trial" for slot in check.slots)]
    assert len(tried) > 50
    assert [check.key for check in tried if not check.caution] == []


def test_watched_positions_exist_and_every_check_on_parts_watches_some() -> None:
    for check in CHECKS.values():
        assert set(check.watches) <= set(load.positions())
        assert len(check.watches) == len(set(check.watches))
        assert check.watches, check.key


def test_every_position_is_watched_by_some_check() -> None:
    watched = {key for check in CHECKS.values() for key in check.watches}
    assert set(load.positions()) - watched == set()


def test_slots_name_only_methods_that_are_built() -> None:
    named = {slot.method for check in CHECKS.values() for slot in check.slots if slot.method}
    assert named <= set(EXPECTED["methods"]["keys"])
    assert {"fuel-flow", "fuel-required", "tip-mach", "gyroscopic-load", "battery-endurance", "loading"} <= named


def test_conditions_name_only_declared_facts_and_every_other_fact_is_used() -> None:
    named = {fact for check in CHECKS.values() for fact in check.condition.facts}
    assert named <= set(load.facts())
    # These describe the installation in the binder and turn no check on or off.
    told = {
        "cylinders",
        "strokes",
        "ignition_a_kind",
        "ignition_b_kind",
        "single_computer",
        "hub_seat",
        "tail_gear",
        "engine_designation",
    }
    assert set(load.facts()) - named == told


def test_needs_come_from_the_required_slots_alone() -> None:
    assert CHECKS["fue-flow-gravity"].needs == ("snapshot:fuel-required", "trial:fuel-flow")
    assert CHECKS["ign-ship-power"].needs == ("snapshot:battery-endurance", "trial", "document")


def test_a_trial_without_a_method_may_be_shown_by_a_test_sheet() -> None:
    own_sheet, judged = CHECKS["ign-cutoff"].slot("dead-cut"), CHECKS["fue-flow-pump"].slot("flow")
    assert own_sheet is not None and own_sheet.accepts == ("trial", "entry", "document")
    assert judged is not None and judged.accepts == ("trial",)
