"""The authorities' profiles: their demands, their marks, and what they never say."""

import re
from pathlib import Path

import pytest

from buildlog.profiles import load
from buildlog.profiles.read import read_file
from buildlog.profiles.read_jurisdictions import read_demands, read_jurisdiction
from buildlog.profiles.shapes import STAGE_WORDS, Jurisdiction, ProfileError

ALL = load.jurisdictions()
RESULT = re.compile(r"\b(safe|airworthy|approved|compliant)\b", re.IGNORECASE)


def test_the_six_profiles_are_there() -> None:
    assert set(ALL) == {"us", "canada", "uk", "eu-state", "australia", "own"}


@pytest.mark.parametrize("one", ALL.values(), ids=lambda one: one.key)
def test_each_line_has_a_source_or_says_that_it_has_none_and_unread_ones_are_off(one: Jurisdiction) -> None:
    for demand in one.demands:
        assert demand.stage in STAGE_WORDS and demand.mark
        assert demand.grade == "practice" or (demand.source and demand.edition)
        assert demand.on == (demand.grade not in ("memory", "doubtful"))
        assert demand.text.endswith(".") and not RESULT.search(demand.text + demand.title + demand.form)
    keys = [demand.key for demand in one.demands]
    assert len(keys) == len(set(keys))


@pytest.mark.parametrize("one", ALL.values(), ids=lambda one: one.key)
def test_each_profile_has_its_words_and_defers_to_the_authority(one: Jurisdiction) -> None:
    assert set(one.words) == set(ALL["us"].words)
    assert "only the authority and its inspectors decide" in one.caution
    assert one.paper in one.papers and one.occupant_notes and one.closing_reason.endswith(".")
    assert not RESULT.search(" ".join([one.class_a_signer, one.closing_reason, one.caution, *one.occupant_notes]))


def test_closing_blocks_where_the_authority_looks_first_and_warns_elsewhere() -> None:
    # CAR 549.01(b): inspection before enclosing is compulsory in Canada; not a routine in the United States.
    assert (ALL["canada"].closing, ALL["us"].closing) == ("block", "warn")


def test_the_share_is_counted_by_tasks_in_the_united_states() -> None:
    # 14 CFR 21.191(g): "the major portion of which has been fabricated and assembled".
    assert (ALL["us"].share.basis, ALL["us"].share.majority, ALL["us"].share.grade) == (
        "tasks",
        "more than half",
        "read",
    )


def test_units_and_words_follow_the_country() -> None:
    assert (ALL["us"].units, ALL["us"].paper, ALL["us"].word("periodic_inspection")) == (
        "inch-pound",
        "letter",
        "condition inspection",
    )
    assert ALL["canada"].word("periodic_inspection") == "annual inspection"
    assert ALL["uk"].word("some_other_thing") == "some other thing"


def test_an_authoritys_own_line_takes_the_place_of_the_general_one() -> None:
    line = next(demand for demand in ALL["canada"].demands if demand.key == "second-look")
    assert line.source == "CAR 549.01(b)"
    assert "log-entry" in [demand.key for demand in ALL["canada"].demands_at("building")]


DEMAND = """
[[demand]]
key = "one"
title = "One"
stage = "building"
text = "It is kept."
form = "paper"
grade = "memory"
source = "A rule"
edition = "not read"
on = true
"""


@pytest.mark.parametrize(
    ("old", "new", "says"),
    [
        ("", "", "stays off until someone has read its source"),
        ('grade = "memory"', 'grade = "heard"', "'grade' is 'heard'"),
        ('stage = "building"', 'stage = "later"', "'stage' is 'later'"),
        ('grade = "memory"\nsource = "A rule"', 'grade = "read"', "names its source and edition"),
        ('title = "One"', 'title = "One"\nnote = "x"', "nothing reads 'note'"),
    ],
)
def test_a_wrong_demand_stops(tmp_path: Path, old: str, new: str, says: str) -> None:
    path = tmp_path / "somewhere.toml"
    path.write_text(DEMAND.replace(old, new, 1) if old else DEMAND, encoding="utf-8")
    with pytest.raises(ProfileError) as stopped:
        read_demands(read_file(path))
    assert says in str(stopped.value) and "somewhere.toml: demand one" in str(stopped.value)


@pytest.mark.parametrize(
    ("old", "new", "says"),
    [
        ('paper = "a4"', 'paper = "letter"', "'paper' must be one of 'papers'"),
        ('papers = ["a4", "letter"]', 'papers = ["a3"]', "no paper size"),
        ('closing = "warn"', 'closing = "ask"', "'closing' is 'ask'"),
        ('basis = "tasks"', 'basis = "cost"', "'basis' is 'cost'"),
        ('units = "SI"', 'units = "cubits"', "'units' is 'cubits'"),
    ],
)
def test_a_wrong_profile_stops(tmp_path: Path, old: str, new: str, says: str) -> None:
    text = (load.HERE / "jurisdictions" / "own.toml").read_text(encoding="utf-8")
    if old == 'paper = "a4"':
        text = text.replace('papers = ["a4", "letter"]', 'papers = ["a4"]')
    assert old in text
    path = tmp_path / "own.toml"
    path.write_text(text.replace(old, new, 1), encoding="utf-8")
    with pytest.raises(ProfileError) as stopped:
        read_jurisdiction(read_file(path), ())
    assert says in str(stopped.value)
