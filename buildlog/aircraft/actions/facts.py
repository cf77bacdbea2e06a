"""The facts of an engine installation: said, and said anew; the words before stay."""

import datetime as dt
from collections.abc import Mapping

from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.models import Aircraft, Fact, User
from buildlog.aircraft.queries import fact_rows
from buildlog.errors import Refused
from buildlog.ledger import actions as ledger
from buildlog.profiles import load
from buildlog.profiles.conditions import FactValue
from buildlog.profiles.shapes import Fact as Declared


@transaction.atomic
def state_facts(
    *, aircraft: Aircraft, by: User, stated: Mapping[str, FactValue], at: dt.datetime | None = None
) -> list[Fact]:
    """Say facts of the conversion; one that is unchanged adds nothing, None takes a fact back to "not stated".

    stated: key of a declared fact to bool, number or text. Returns the new rows, in one event.
    """
    moment, present = at or timezone.now(), fact_rows(aircraft)
    rows = []
    for key, value in stated.items():
        spelled, before = spell(key, value), present.get(key)
        if spelled == (before.value if before else ""):
            continue
        rows.append(Fact(aircraft=aircraft, key=key, value=spelled, follows=before, by=by, at=moment))
    if not rows:
        return []
    for row in rows:
        row.save(force_insert=True)
    words = "; ".join(f"{load.facts()[row.key].label.lower()}: {in_words(row.key, row.value)}" for row in rows[:3])
    text = f"stated {words}" + (f" and {len(rows) - 3} more" if len(rows) > 3 else "")
    ledger.write(aircraft=aircraft, by=by, kind="facts.stated", about=rows[0], rows=rows[1:], text=text, at=at)
    return rows


def state_fact(
    *, aircraft: Aircraft, by: User, key: str, value: FactValue, at: dt.datetime | None = None
) -> Fact | None:
    """Say one fact; None when it was said so before."""
    rows = state_facts(aircraft=aircraft, by=by, stated={key: value}, at=at)
    return rows[0] if rows else None


def spell(key: str, value: FactValue) -> str:
    """Return a fact as it is kept, "" for "not stated"; Refused where the fact is not declared so."""
    fact = load.facts().get(key)
    if fact is None:
        raise Refused(f"There is no fact called {key}.")
    if value is None or value == "":
        return ""
    return _spell_stated(fact, value)


def _spell_stated(fact: Declared, value: FactValue) -> str:
    if fact.kind == "yes_no":
        if not isinstance(value, bool):
            raise Refused(f"{fact.label}: say yes or no.", field=fact.key)
        return "yes" if value else "no"
    if fact.kind == "count":
        low, high = fact.low or 0, fact.high or 0
        if not isinstance(value, int) or isinstance(value, bool) or not low <= value <= high:
            raise Refused(f"{fact.label}: a whole number from {low} to {high}.", field=fact.key)
        return str(value)
    text = str(value).strip()
    if fact.kind == "choice" and text not in fact.option_words:
        raise Refused(f"{fact.label}: choose one of the answers listed.", field=fact.key)
    if len(text) > 200:
        raise Refused(f"{fact.label}: 200 signs at most.", field=fact.key)
    return text


def in_words(key: str, value: str) -> str:
    """Return a kept value as a person reads it."""
    return load.facts()[key].option_words.get(value, value) or "not stated"
