"""Reading a checklist file: what is refused, and where the error points."""

import itertools
import tomllib
from pathlib import Path

import pytest

from buildlog.profiles import load
from buildlog.profiles.conditions import parse
from buildlog.profiles.read import once
from buildlog.profiles.shapes import CLASS_WORDS, Check, FactKind, ProfileError

GOOD = """
group = "fuel"
title = "Fuel"
order = 1
source_checked_on = 2026-03-14

[[check]]
key = "fue-one"
title = "One"
class = "B"
hazard = "It stops."
requirement = "It runs."
acceptance = "It was seen to run."
applies = 'feed == "pump"'
not_applicable_text = "There is no pump."
slots = [
  { key = "seen", kind = "photo", title = "Seen" },
  { key = "extra", kind = "entry", title = "Extra", required = false },
]
watches = ["fuel-pump-main"]
if_it_fails = "Mend it."
[[check.benchmark]]
text = "Five."
source = "A rule"
paragraph = "1"
edition = "first"
grade = "read"
value = "5"
unit = "V"
sense = "at_least"
adopted = true
"""


def read(tmp_path: Path, text: str) -> Check:
    path = tmp_path / "fuel.toml"
    path.write_text(text, encoding="utf-8")
    return load.read_checklist_file(path)[1][0]


def test_a_whole_check_is_read_with_its_parts(tmp_path: Path) -> None:
    check = read(tmp_path, GOOD)
    assert (check.key, check.group, check.safety_class, check.needs) == ("fue-one", "fuel", "B", ("photo",))
    assert check.condition == parse('feed == "pump"')
    assert check.benchmark is not None and check.benchmark.adopted
    assert check.benchmark.sentence == "A rule, 1, first, read in a copy of the document"
    assert str(check.source_checked_on) == "2026-03-14"


@pytest.mark.parametrize(
    ("old", "new", "says"),
    [
        ('key = "fue-one"', 'key = "Fue One"', "lower case words"),
        ('class = "B"', 'class = "E"', "'class' is 'E', not one of A, B, C, D"),
        ('class = "B"', 'class = "A"', "class A needs a caution"),
        ('hazard = "It stops."', "", "'hazard' must be a text"),
        ('hazard = "It stops."', 'hazard = "  "', "'hazard' must be a text"),
        ('hazard = "It stops."', 'hazard = "It stops."\nhazzard = "x"', "nothing reads 'hazzard'"),
        ("applies = 'feed == \"pump\"'", 'applies = "feed ="', "cannot be read"),
        ("applies = 'feed == \"pump\"'", 'applies = "flow"', "names flow, which is not a declared fact"),
        ("applies = 'feed == \"pump\"'", 'applies = "always"', "'not_applicable_text' belongs to a condition"),
        ('kind = "photo"', 'kind = "film"', "'kind' is 'film'"),
        ('kind = "photo"', 'kind = "snapshot"', "names its 'method'"),
        ('kind = "photo"', 'kind = "photo", method = "weighing"', "'method' belongs to"),
        ('kind = "photo"', 'kind = "photo", required = false', "can never be shown"),
        ('key = "extra"', 'key = "seen"', "slot 'seen' is there twice"),
        ("fuel-pump-main", "fuel-pomp", "watches fuel-pomp, which is no position"),
        ('grade = "read"', 'grade = "memory"', "a figure needs a read source"),
        ('paragraph = "1"', "", "a figure needs a read source"),
        ('edition = "first"', "", "names its source and edition"),
        ('value = "5"', 'value = "five"', "'value' is 'five', not a number"),
        ('value = "5"', "", "only a figure that was read"),
        ("adopted = true", "binding = true", "no benchmark binds"),
        ("adopted = true", 'adopted = "yes"', "'adopted' must be true or false"),
        ('watches = ["fuel-pump-main"]', "watches = [1]", "'watches' must be a list of texts"),
        ("2026-03-14", '"14 March"', "'source_checked_on' must be a date"),
        ("[[check]]", "[check", "fuel.toml"),
    ],
)
def test_a_wrong_line_stops_with_file_and_reason(tmp_path: Path, old: str, new: str, says: str) -> None:
    assert old in GOOD
    with pytest.raises(ProfileError) as stopped:
        read(tmp_path, GOOD.replace(old, new, 1))
    assert says in str(stopped.value)


def test_the_error_names_file_and_check(tmp_path: Path) -> None:
    with pytest.raises(ProfileError, match=r"^fuel\.toml: check fue-one: "):
        read(tmp_path, GOOD.replace('class = "B"', 'class = "E"'))


def test_a_key_used_twice_stops() -> None:
    with pytest.raises(ProfileError, match="check 'a' is there twice"):
        once("check", ["a", "b", "a"])


def test_a_changed_word_changes_the_digest_of_its_check(tmp_path: Path) -> None:
    first = read(tmp_path, GOOD)
    assert read(tmp_path, GOOD).digest == first.digest
    assert read(tmp_path, GOOD.replace("It stops.", "It may stop.")).digest != first.digest


def test_a_retired_check_is_kept_for_the_record_and_left_out_of_the_list(
    tmp_path: Path, monkeypatch: pytest.MonkeyPatch
) -> None:
    folder = tmp_path / "checklists"
    folder.mkdir()
    (folder / "fuel.toml").write_text(GOOD.replace('class = "B"', 'class = "B"\nretired = true'), encoding="utf-8")
    cached = (load._checklist_files, load.checklist, load.every_check, load.groups, load.checklist_digest)
    load.facts(), load.positions()
    monkeypatch.setattr(load, "HERE", tmp_path)
    for function in cached:
        function.cache_clear()
    try:
        assert dict(load.checklist()) == {}
        assert list(load.every_check()) == ["fue-one"]
    finally:
        for function in cached:
            function.cache_clear()


def test_the_edition_of_the_checklist_is_a_digest_over_all_checks() -> None:
    assert len(load.checklist_digest()) == 64
    assert len({check.digest for check in load.every_check().values()}) == len(load.every_check())


def test_what_is_read_cannot_be_changed() -> None:
    with pytest.raises(TypeError):
        load.checklist()["ign-drop"] = None  # type: ignore[index]


def test_facts_have_a_label_help_and_the_parts_their_kind_needs() -> None:
    for fact in load.facts().values():
        assert fact.key.isidentifier() and fact.help.endswith(".") and fact.group
        assert bool(fact.options) == (fact.kind == "choice")
        assert (fact.low is not None and fact.high is not None) == (fact.kind == "count")
    kinds: set[FactKind] = {fact.kind for fact in load.facts().values()}
    assert kinds == {"choice", "count", "yes_no", "text"}


def test_positions_of_a_group_stand_together() -> None:
    names = [position.group for position in load.positions().values()]
    assert [name for name, _ in itertools.groupby(names)] == list(dict.fromkeys(names))


def test_classes_have_words() -> None:
    assert {check.safety_class for check in load.checklist().values()} == set(CLASS_WORDS)


def test_no_file_of_the_profiles_holds_a_mark_of_unfinished_work() -> None:
    for path in load.HERE.rglob("*.toml"):
        text = path.read_text(encoding="utf-8")
        assert tomllib.loads(text), path.name
        assert "TODO" not in text and "FIXME" not in text
