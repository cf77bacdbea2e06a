"""What is typed into Find, taken apart."""

import datetime as dt

import pytest
from hypothesis import given
from hypothesis import strategies as st

from buildlog.find.asking import LONGEST, Span, excerpt, read


def test_words_prefixes_and_dates_are_told_apart():
    asked = read('rib "rear spar" batch:EP-2207 zone:"LW 1" sheet: 22 before:2026-03-14 2026-02')
    assert asked.words == ("rib", "rear spar")
    assert asked.narrow == {"batch": "EP-2207", "zone": "LW 1", "sheet": "22"}
    assert asked.before == dt.date(2026, 3, 14)
    assert asked.spans == (Span(dt.date(2026, 2, 1), dt.date(2026, 2, 28)),)
    assert asked.puzzles == ()


@pytest.mark.parametrize("typed", ["14 Mar 2026", "14 march 2026", "2026-03-14", "2026-3-14"])
def test_a_day_is_understood_as_people_write_it(typed):
    day = dt.date(2026, 3, 14)
    assert read(typed).spans == (Span(day, day),)


def test_a_year_alone_is_a_word_since_part_numbers_look_like_it():
    assert read("2026").words == ("2026",)
    assert read("before:2026").before == dt.date(2026, 1, 1)


@pytest.mark.parametrize("typed", ["before:soon", "before:2026-13", "before:2026-02-31", "before:", "rib before: "])
def test_a_date_that_is_none_is_said_and_not_guessed(typed):
    asked = read(typed)
    assert asked.before is None
    assert asked.puzzles == ("before: wants a date, like before:2026-03-14 or before:2026-03.",)


def test_a_prefix_without_a_code_is_said():
    assert read("batch:").puzzles == ("batch: wants the code of a batch, like batch:EP-2207.",)


@given(st.text(max_size=400))
def test_nothing_typed_is_an_error(typed):
    asked = read(typed)
    assert len(asked.text) <= LONGEST
    assert "\x00" not in "".join(asked.words)
    assert all(asked.words) and all(asked.narrow.values())


@given(st.text(max_size=300), st.lists(st.text(min_size=1, max_size=5), max_size=3))
def test_an_excerpt_is_a_stretch_of_the_text(text, words):
    shown = "".join(bit.text for bit in excerpt(text, words)).removeprefix("… ").removesuffix(" …")
    assert shown in " ".join(text.split())


def test_the_words_found_are_marked():
    bits = excerpt("Glued rib 5 to the rear spar", ["rib", "spar"])
    assert [bit.text for bit in bits if bit.is_match] == ["rib", "spar"]
    assert "".join(bit.text for bit in bits) == "Glued rib 5 to the rear spar"


def test_a_long_text_is_cut_around_the_first_word_found():
    shown = "".join(bit.text for bit in excerpt("a " * 200 + "rivet" + " b" * 200, ["rivet"]))
    assert shown.startswith("… ") and shown.endswith(" …") and "rivet" in shown and len(shown) < 200
