"""The history of one record, and of the whole aircraft, as the ledger tells it."""

import datetime as dt
import json
import re
from collections.abc import Iterable, Mapping, Sequence
from dataclasses import dataclass
from typing import Any
from uuid import UUID

from django.db.models import Q

from buildlog.aircraft.models import Aircraft, User
from buildlog.ledger.actions import said
from buildlog.ledger.models import Event
from buildlog.ledger.queries import Told, told

PER_PAGE = 40
NOT_SHOWN = frozenset({"code_sha256", "token_sha256"})  # what opens an invitation or a link is digested from these
NOT_A_CHANGE = frozenset({"id", "aircraft_id"})
_ID = re.compile(r"[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}")


@dataclass(frozen=True)
class Change:
    """One column of a record before and after an event, in words; `link` when it names another record."""

    column: str
    before: str
    after: str
    link: UUID | None = None


@dataclass(frozen=True)
class Step:
    """One event of a record: when, who, what it says, what it changed; number and digest of its line."""

    seq: int
    hash: str
    at: dt.datetime
    actor: str
    text: str
    changes: list[Change]
    is_first: bool


@dataclass(frozen=True)
class Trail:
    """A record's kind and its steps, the newest first."""

    model: str
    steps: list[Step]


@dataclass(frozen=True)
class Line:
    """One event in the list of recent changes."""

    seq: int
    hash: str
    at: dt.datetime
    actor: str
    text: str
    subject: UUID | None


def trail(aircraft: Aircraft, subject: UUID) -> Trail | None:
    """Return the history of one record of an aircraft in two queries; None when its ledger never named it."""
    about = Q(subject=subject) | Q(said__body__contains=f'"id":"{subject}"')
    events = list(Event.objects.filter(about, chain=aircraft.id).select_related("said").order_by("seq"))
    bodies = [said(event) if hasattr(event, "said") else {} for event in events]
    names = _names(events, bodies)
    model, before = "", dict[str, Any]()
    steps: list[Step] = []
    for event, body in zip(events, bodies, strict=True):
        row = _row(body, subject)
        if not row and event.subject != subject:
            continue
        fields = row.get("fields", before)
        model = row.get("model", model)
        text = body.get("text", "(what this event said was erased)")
        changes = _changes(before, fields, names)
        steps.append(Step(event.seq, event.hash, _at(event.at), names(event.actor), text, changes, not steps))
        before = fields
    return Trail(model, steps[::-1]) if steps else None


def _row(body: Mapping[str, Any], subject: UUID) -> Mapping[str, Any]:
    rows = [row for row in body.get("rows", []) if row["fields"].get("id") == str(subject)]
    return rows[-1] if rows else {}


def _changes(before: Mapping[str, Any], after: Mapping[str, Any], names: "_Names") -> list[Change]:
    found = []
    for column in after:
        old, new = before.get(column), after[column]
        if column in NOT_A_CHANGE or old == new or (not before and new in (None, "", [], {})):
            continue
        if column in NOT_SHOWN:
            found.append(Change(_words(column), "", "kept, and not shown"))
            continue
        is_link = isinstance(new, str) and bool(_ID.fullmatch(new)) and new not in names
        found.append(Change(_words(column), names.spell(old), names.spell(new), UUID(new) if is_link else None))
    return found


def _words(column: str) -> str:
    return column.removesuffix("_id").replace("_", " ").capitalize()


class _Names(dict[str, str]):
    """Names of the people that a stretch of the ledger speaks of, and how values are spelled for a person."""

    def __call__(self, actor: UUID | None) -> str:
        return self.get(str(actor), "an unknown person") if actor else "Buildlog, by itself"

    def spell(self, value: Any) -> str:
        if value in (None, "", [], {}):
            return "empty"
        if isinstance(value, bool):
            return "yes" if value else "no"
        if isinstance(value, list | dict):
            return json.dumps(value, ensure_ascii=False)[:400]
        return self.get(str(value), str(value))


def _names(events: Sequence[Event], bodies: Iterable[Any]) -> _Names:
    ids = {str(event.actor) for event in events if event.actor}
    for body in bodies:
        for row in body.get("rows", []):
            ids |= {value for value in row["fields"].values() if isinstance(value, str) and _ID.fullmatch(value)}
    return _Names({str(pk): name for pk, name in User.objects.filter(id__in=ids).values_list("id", "name")})


def recent(aircraft: Aircraft, *, before: int | None = None) -> tuple[list[Line], int | None]:
    """Return one page of an aircraft's events, newest first, and the number that the next page starts before."""
    rows = told(aircraft, before=before, most=PER_PAGE + 1)
    page = rows[:PER_PAGE]
    people = {row.actor for row in page if row.actor}
    names = _Names({str(pk): name for pk, name in User.objects.filter(id__in=people).values_list("id", "name")})
    return [_line(row, names) for row in page], page[-1].seq if len(rows) > PER_PAGE else None


def _line(row: Told, names: _Names) -> Line:
    return Line(row.seq, row.hash, _at(row.at), names(row.actor), row.text, row.subject)


def _at(spelled: str) -> dt.datetime:
    return dt.datetime.fromisoformat(spelled)
