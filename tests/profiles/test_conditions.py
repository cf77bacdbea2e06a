"""When a check applies: truth tables, unset facts, and conditions that are refused."""

import itertools

import pytest

from buildlog.profiles import load
from buildlog.profiles.conditions import FactValue, check_facts, judge, parse
from buildlog.profiles.shapes import Fact, Option, ProfileError

FACTS = {
    "a": Fact("a", "First", "", "yes_no", ""),
    "b": Fact("b", "Second", "", "yes_no", ""),
    "feed": Fact("feed", "Fuel feed", "", "choice", "", (Option("gravity", "Gravity"), Option("pump", "Pump"))),
    "pumps": Fact("pumps", "Number of pumps", "", "count", "", low=0, high=6),
    "name": Fact("name", "Name", "", "text", ""),
}


def answer(text: str, **stated: FactValue) -> str:
    return judge(parse(text), stated, FACTS).answer


# Kleene's strong three-valued logic, S. C. Kleene, Introduction to Metamathematics (1952), section 64.
KLEENE_AND = {
    ("yes", "yes"): "yes",
    ("yes", "no"): "no",
    ("yes", "unknown"): "unknown",
    ("no", "no"): "no",
    ("no", "unknown"): "no",
    ("unknown", "unknown"): "unknown",
}
KLEENE_OR = {
    ("yes", "yes"): "yes",
    ("yes", "no"): "yes",
    ("yes", "unknown"): "yes",
    ("no", "no"): "no",
    ("no", "unknown"): "unknown",
    ("unknown", "unknown"): "unknown",
}
VALUES: dict[str, FactValue] = {"yes": True, "no": False, "unknown": None}


@pytest.mark.parametrize(("left", "right"), list(itertools.product(VALUES, VALUES)))
def test_and_or_follow_three_valued_logic(left: str, right: str) -> None:
    pair = (left, right) if (left, right) in KLEENE_AND else (right, left)
    assert answer("a and b", a=VALUES[left], b=VALUES[right]) == KLEENE_AND[pair]
    assert answer("a or b", a=VALUES[left], b=VALUES[right]) == KLEENE_OR[pair]


@pytest.mark.parametrize(("value", "gives"), [(True, "no"), (False, "yes"), (None, "unknown")])
def test_not_turns_yes_and_no_and_leaves_unknown(value: bool | None, gives: str) -> None:
    assert answer("not a", a=value) == gives


@pytest.mark.parametrize(
    ("text", "below", "at", "above"),
    [
        ("pumps == 2", "no", "yes", "no"),
        ("pumps != 2", "yes", "no", "yes"),
        ("pumps < 2", "yes", "no", "no"),
        ("pumps <= 2", "yes", "yes", "no"),
        ("pumps > 2", "no", "no", "yes"),
        ("pumps >= 2", "no", "yes", "yes"),
        ("pumps in (2, 3)", "no", "yes", "yes"),
        ("pumps not in [2, 3]", "yes", "no", "no"),
    ],
)
def test_numbers_compare_at_below_and_above_the_limit(text: str, below: str, at: str, above: str) -> None:
    assert [answer(text, pumps=number) for number in (1, 2, 3)] == [below, at, above]


def test_zero_is_a_stated_number_and_no_is_a_stated_answer() -> None:
    assert answer("pumps == 0", pumps=0) == "yes"
    assert answer("a", a=False) == "no"


@pytest.mark.parametrize("stated", [{}, {"feed": None}, {"feed": ""}])
def test_an_unset_fact_leaves_the_check_applying_and_is_named(stated: dict[str, FactValue]) -> None:
    found = judge(parse('feed == "gravity"'), stated, FACTS)
    assert (found.answer, found.counts, found.missing) == ("unknown", True, ("feed",))
    assert "fuel feed" in found.reason


def test_the_reason_names_fact_and_answer_in_words() -> None:
    found = judge(parse('feed == "gravity" and a'), {"feed": "pump", "a": None}, FACTS)
    assert (found.answer, found.counts, found.missing) == ("no", False, ("a",))
    assert found.reason == "Does not apply: fuel feed: Pump."


def test_always_applies_whatever_is_stated() -> None:
    assert judge(parse("always"), {}, FACTS).answer == "yes"


@pytest.mark.parametrize(
    "text",
    [
        "",
        "a and",
        "open('x')",
        "a.b",
        "a[0]",
        "a + b",
        "lambda: a",
        "1 == pumps",
        "0 < pumps < 3",
        "pumps == -1",
        "pumps == True",
        "pumps == 1.5",
        "pumps is 2",
        "pumps == (1, 2)",
        "pumps in 2",
        "feed in (a, b)",
        "[a for a in b]",
        "(a := b)",
        "a if b else a",
        "True",
        "f'{a}'",
        "(" * 400 + "a" + ")" * 400,
    ],
)
def test_anything_but_the_allowed_words_is_refused(text: str) -> None:
    with pytest.raises(ProfileError):
        parse(text)


@pytest.mark.parametrize(
    "text",
    ["unheard_of", "feed", "pumps", 'a == "yes"', 'feed == "magic"', 'pumps == "2"', 'feed > "a"', "feed == 1"],
)
def test_facts_used_in_a_way_they_are_not_declared_are_refused(text: str) -> None:
    with pytest.raises(ProfileError):
        check_facts(parse(text), FACTS)


@pytest.mark.parametrize(
    ("key", "stated", "gives"),
    [
        ("fue-flow-gravity", {"feed": "gravity"}, "yes"),
        ("fue-flow-gravity", {"feed": "pump"}, "no"),
        ("fue-flow-pump", {"feed": "pump"}, "yes"),
        ("ele-reserve", {"ignition_needs_power": True}, "yes"),
        ("ele-reserve", {"ignition_needs_power": False, "pump_needs_power": False}, "unknown"),
        (
            "ele-reserve",
            {"ignition_needs_power": False, "pump_needs_power": False, "electronic_injection": False},
            "no",
        ),
        ("ign-drop", {"ignition_systems": 1}, "no"),
        ("ign-drop", {"ignition_systems": 2}, "yes"),
        ("ele-alt-mount", {"generator_drive": "shaft"}, "no"),
        ("pse-case", {"engine_origin": "aviation"}, "no"),
        ("pse-case", {"engine_origin": "motorcycle"}, "yes"),
        ("red-torsion", {"drive": "direct"}, "no"),
        ("tor-survey", {}, "yes"),
    ],
)
def test_checks_apply_to_the_conversions_they_are_meant_for(key: str, stated: dict[str, FactValue], gives: str) -> None:
    assert load.applies(load.checklist()[key], stated).answer == gives


def test_a_conversion_of_which_nothing_is_stated_has_every_check() -> None:
    assert all(load.applies(check, {}).counts for check in load.checklist().values())
