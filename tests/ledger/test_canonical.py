"""Canonical JSON against an independent RFC 8785 library."""

import datetime as dt
from decimal import Decimal

import pytest
import rfc8785
from hypothesis import given, settings
from hypothesis import strategies as st

from buildlog.ledger import canonical

text = st.text(st.characters(exclude_categories=["Cs"], exclude_characters="\x00"))
leaf = st.none() | st.booleans() | st.integers(-(2**53) + 1, 2**53 - 1) | text
ascii_key = st.text(st.characters(codec="ascii", exclude_characters="\x00"))
tree = st.recursive(leaf, lambda inner: st.lists(inner) | st.dictionaries(ascii_key, inner), max_leaves=20)


@settings(max_examples=10_000, deadline=None)
@given(tree)
def test_spelling_is_that_of_rfc_8785(document):
    assert canonical.encode(document) == rfc8785.dumps(document)


@pytest.mark.parametrize(
    "stray", [1.5, Decimal("1.5"), dt.date(2026, 3, 14), 2**53, {"ä": 1}, {1: 1}, "\x00", "\ud800", {1}]
)
def test_a_value_with_two_spellings_is_refused(stray):
    with pytest.raises(canonical.NotCanonical):
        canonical.encode({"deep": [stray]})


def test_a_moment_is_spelled_in_utc():
    east = dt.timezone(dt.timedelta(hours=2))
    assert canonical.moment(dt.datetime(2026, 3, 14, 12, 0, 0, 5, east)) == "2026-03-14T10:00:00.000005Z"
