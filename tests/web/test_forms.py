"""Fields that every room uses, and how dates are written."""

import datetime as dt

import pytest
from django import forms
from django.template import Context, Template

from buildlog.web.forms import Day, PlainText


class OneForm(forms.Form):
    text = PlainText(max_length=20)
    on = Day()


@pytest.mark.parametrize("typed", ["3/4/2026", "04.03.2026", "4 Mar 2026", "2026-02-30", "tomorrow"])
def test_day_is_read_in_one_spelling_only(typed):
    form = OneForm({"text": "x", "on": typed})
    assert form.errors["on"] == ["Write the date as year-month-day, like 2026-03-14."]


def test_empty_fields_are_told_in_plain_words():
    form = OneForm({"text": "", "on": ""})
    assert form.errors == {"text": ["This cannot stay empty."], "on": ["This cannot stay empty."]}


@pytest.mark.parametrize("sign", ["\x00", "\ud800", "\udfff"])
def test_signs_the_ledger_cannot_spell_are_refused(sign):
    form = OneForm({"text": f"rib{sign}5", "on": "2026-03-14"})
    assert list(form.errors) == ["text"]


def test_dates_read_as_on_a_drawing():
    at = dt.datetime(2026, 3, 14, 9, 5)
    shown = Template('{{ on|date }} · {{ at|date:"DATETIME_FORMAT" }} · {{ on }}').render(
        Context({"at": at, "on": at.date()})
    )
    assert shown == "14 Mar 2026 · 14 Mar 2026 09:05 · 14 Mar 2026"
