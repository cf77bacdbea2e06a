"""The form of a conversion's facts, made from what the profiles declare."""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass
from itertools import groupby
from typing import Any

from django import forms

from buildlog.profiles import load
from buildlog.profiles.conditions import FactValue
from buildlog.profiles.shapes import Fact
from buildlog.web.forms import PlainText

NOT_STATED = ("", "Not stated")
FEW = 4  # options that stand side by side; more go into a list


@dataclass(frozen=True)
class FactGroup:
    """The fields of one group of facts."""

    title: str
    fields: list[forms.BoundField]


class FactsForm(forms.Form):
    """One field for each fact. Only what was changed on this page is said anew, whoever else said something since."""

    def __init__(self, *args: Any, stated: Mapping[str, FactValue], **more: Any) -> None:
        super().__init__(*args, **more)
        for fact in load.facts().values():
            self.fields[fact.key] = _field(fact, stated.get(fact.key))

    def groups(self) -> Iterator[FactGroup]:
        """Give the fields by their groups, in the order of the profiles."""
        order = list(dict.fromkeys(fact.group for fact in load.facts().values()))
        facts = sorted(load.facts().values(), key=lambda fact: order.index(fact.group))
        for title, members in groupby(facts, key=lambda fact: fact.group):
            yield FactGroup(title, [self[fact.key] for fact in members])

    def changed(self) -> dict[str, FactValue]:
        """Return the facts whose answer differs from the one this page was opened with."""
        facts = load.facts()
        return {name: _value(facts[name], self.cleaned_data[name]) for name in self.changed_data}


def _field(fact: Fact, value: FactValue) -> forms.Field:
    more: dict[str, Any] = {
        "label": fact.label,
        "help_text": fact.help,
        "required": False,
        "initial": ("yes" if value else "no") if isinstance(value, bool) else value,
        "show_hidden_initial": True,
    }
    if fact.kind == "text":
        return PlainText(max_length=200, **more)
    if fact.kind == "count":
        return _count(fact, more)
    options = [("yes", "Yes"), ("no", "No")] if fact.kind == "yes_no" else list(fact.option_words.items())
    widget = forms.RadioSelect if len(options) <= FEW else forms.Select
    return forms.ChoiceField(choices=[NOT_STATED, *options], widget=widget, **more)


def _count(fact: Fact, more: dict[str, Any]) -> forms.Field:
    sentence = f"A whole number from {fact.low} to {fact.high}."
    return forms.IntegerField(
        min_value=fact.low,
        max_value=fact.high,
        error_messages={"invalid": sentence, "min_value": sentence, "max_value": sentence},
        widget=forms.TextInput(attrs={"inputmode": "numeric"}),
        **more,
    )


def _value(fact: Fact, typed: Any) -> FactValue:
    if typed in ("", None):
        return None
    if fact.kind == "yes_no":
        return bool(typed == "yes")
    return int(typed) if fact.kind == "count" else str(typed)
