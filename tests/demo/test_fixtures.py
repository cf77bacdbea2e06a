"""The demo's story: every name leads to something, nothing is used before it is there, and no two notes are alike."""

import re
from collections import Counter
from functools import cache

import pytest

from buildlog.demo.clock import moment
from buildlog.demo.scenes import SCENES
from buildlog.demo.story import Story, read_story
from buildlog.methods.catalogue import methods
from buildlog.profiles import load

KINDS = {"calc": "snapshot"}


@cache
def story() -> Story:
    return read_story()


def rows(name):
    return story().rows(name)


def keys(name, column="key"):
    return [row[column] for row in rows(name)]


def test_the_story_is_as_large_as_two_years_of_work():
    assert len(rows("entry")) >= 150
    assert 80 <= len(story().snaps) <= 100
    assert len(rows("part")) >= 90
    assert len(rows("batch")) == 20
    assert {person["role"] for person in rows("person")} == {"builder", "helper", "assist", "inspector", "viewer"}
    assert sum(row.get("draft", False) for row in rows("entry")) == 3
    assert sum("task" not in row for row in rows("entry")) >= 5


@pytest.mark.parametrize(
    ("table", "column"),
    [
        ("person", "key"),
        ("task", "number"),
        ("batch", "code"),
        ("document", "key"),
        ("part", "key"),
        ("instrument", "code"),
        ("characteristic", "code"),
        ("reading", "key"),
        ("entry", "id"),
        ("calc", "key"),
        ("trial", "key"),
        ("squawk", "key"),
        ("deviation", "key"),
        ("check", "key"),
    ],
)
def test_a_name_is_given_once(table, column):
    assert [name for name, times in Counter(keys(table, column)).items() if times > 1] == []


def test_notes_and_captions_are_all_different():
    notes = Counter(row["note"] for row in rows("entry"))
    captions = Counter(snap.spec.caption for snap in story().snaps.values() if snap.spec.caption)
    assert [text for text, times in (notes + captions).items() if times > 1] == []


def test_no_text_calls_anything_safe_or_airworthy():
    words = re.compile(r"\b(safe(?!ty)|safely|airworth\w*)\b", re.I)
    assert [line for line in texts(story().tables) if words.search(line)] == []


def texts(said):
    if isinstance(said, str):
        yield said
    elif isinstance(said, dict | list):
        for one in said.values() if isinstance(said, dict) else said:
            yield from texts(one)


def test_tasks_batches_parts_and_people_lead_to_rows():
    people, sections, zones = set(keys("person")), story().tables["sections"], story().tables["zones"]
    assert {row["section"] for row in rows("task")} <= set(sections)
    assert {row["zone"] for row in rows("task") if "zone" in row} <= set(zones)
    assert {row["task"] for row in [*rows("entry"), *rows("squawk"), *rows("deviation")] if "task" in row} <= set(
        keys("task", "number")
    )
    assert {code for row in rows("part") for code in row.get("batches", [])} <= set(keys("batch", "code"))
    papers = {key for row in rows("part") for key in row.get("documents", [])}
    papers |= {row["certificate"] for row in [*rows("batch"), *rows("instrument")] if "certificate" in row}
    assert papers <= set(keys("document"))
    acting = [*rows("entry"), *rows("part"), *rows("reading"), *rows("calc"), *rows("squawk"), *rows("document")]
    assert {row["by"] for row in acting} <= people


def test_positions_facts_and_the_authority_are_those_of_the_profiles():
    put = [place["position"] for row in rows("part") for place in row.get("at", [])]
    own_words = {position for position in put if " " in position}
    assert set(put) - own_words <= set(load.positions())
    assert len(set(put)) >= 50
    facts = load.facts()
    for said in rows("said"):
        for key, value in said["facts"].items():
            assert not facts[key].options or value in facts[key].option_words, (key, value)
    assert story().tables["aircraft"]["jurisdiction"] in load.jurisdictions()


def test_evidence_goes_into_slots_that_take_it():
    checks = load.every_check()
    for row in rows("check"):
        check = checks[row["key"]]
        for slot_key, name in row.get("evidence", {}).items():
            slot, kind = check.slot(slot_key), name.split(":")[0]
            assert slot is not None, (row["key"], slot_key)
            assert KINDS.get(kind, kind) in slot.accepts, (row["key"], slot_key)
        for decision in [row["decision"]] if "decision" in row else []:
            assert len(decision["reason"]) > 40


def dates():
    """Return the day each thing of the story is on the record, by the name evidence gives it."""
    found = {f"photo:{key}": snap.spec.taken.date() for key, snap in story().snaps.items()}
    for kind, table, column in (
        ("entry", "entry", "id"),
        ("document", "document", "key"),
        ("part", "part", "key"),
        ("reading", "reading", "key"),
        ("trial", "trial", "key"),
        ("calc", "calc", "key"),
    ):
        found |= {f"{kind}:{row[column]}": row["on"] for row in rows(table)}
    return found


def test_nothing_is_used_before_its_day():
    known = dates()
    for row in rows("check"):
        for name in row.get("evidence", {}).values():
            assert known[name] <= row["on"], (row["key"], name)
        assert "sign" not in row or row["sign"]["on"] > row["on"], row["key"]
    for row in [*rows("reading"), *rows("squawk"), *rows("deviation"), *rows("trial")]:
        assert "photo" not in row or known[f"photo:{row['photo']}"] <= row["on"], row
    batches = {row["code"]: row["received_on"] for row in rows("batch")}
    for row in rows("entry"):
        code = row.get("process", {}).get("batch")
        assert code is None or batches[code] <= row["on"], row["id"]
    for row in rows("part"):
        assert all(batches[code] <= row["on"] for code in row.get("batches", [])), row["key"]
        assert all(place["on"] >= row["on"] for place in row.get("at", [])), row["key"]


def test_photos_name_a_scene_that_is_drawn_and_every_scene_is_used():
    assert {snap.spec.scene for snap in story().snaps.values()} == set(SCENES)


def test_methods_of_calculations_and_trials_exist():
    assert {row["method"] for row in [*rows("calc"), *rows("trial")]} <= set(methods())


def test_the_shop_clock_knows_summer():
    day = rows("entry")[0]["on"]
    assert moment(day, "12:00").utcoffset().total_seconds() == 3600
    assert moment(day.replace(month=7), "12:00").utcoffset().total_seconds() == 7200
