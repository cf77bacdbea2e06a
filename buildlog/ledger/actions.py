"""The only writer of the ledger."""

import datetime as dt
import hashlib
import json
import secrets
from collections.abc import Mapping, Sequence
from typing import Any
from uuid import UUID

from django.db import connection, transaction
from django.utils import timezone

from buildlog.errors import Refused
from buildlog.ledger import canonical
from buildlog.ledger.ids import SITE_CHAIN, HasId
from buildlog.ledger.models import Event, EventBody, Record, Withdrawal

NO_PREVIOUS = "0" * 64


def write(
    *,
    aircraft: HasId | None,
    by: HasId | None,
    kind: str,
    about: Record | None,
    text: str,
    rows: Sequence[Record] = (),
    removed: Sequence[Record] = (),
    facts: Mapping[str, Any] | None = None,
    at: dt.datetime | None = None,
) -> Event:
    """Append one event to the chain of `aircraft` (None: the site's chain) and return it.

    about: the row the event is about; it and every one of `rows` is copied whole into the body.
    removed: rows of an open draft that the act took out again (a labour line); named, so that verify expects none.
    text: the sentence a person reads in the trail, without the actor's name: "logged 1 h 30: fitted rib 5".
    at: the moment of the act where it is not now (tests, and the invented past of the demo aircraft).
    Must run inside the transaction of the act it records.
    """
    if not connection.in_atomic_block:
        raise RuntimeError("an event is written in the transaction of its act")
    touched = ([about] if about is not None else []) + list(rows)
    body = {
        "text": text,
        "rows": [{"model": row._meta.object_name, "fields": row.as_recorded()} for row in touched],
        "facts": canonical.plain(facts or {}),
    }
    if removed:
        body["removed"] = [{"model": row._meta.object_name, "id": str(row.pk)} for row in removed]
    return _append(
        chain=aircraft.id if aircraft else SITE_CHAIN,
        kind=kind,
        body=body,
        subject=about.id if about is not None else None,
        actor=by.id if by else None,
        at=at,
    )


def _append(
    *,
    chain: UUID,
    kind: str,
    body: dict[str, Any],
    subject: UUID | None,
    actor: UUID | None,
    ref_seq: int | None = None,
    at: dt.datetime | None = None,
) -> Event:
    last = Event.objects.filter(chain=chain).order_by("-seq").values_list("seq", "hash").first()
    salt, spelled = secrets.token_hex(16), canonical.encode(body)
    event = Event(
        chain=chain,
        seq=last[0] + 1 if last else 0,
        kind=kind,
        subject=subject,
        ref_seq=ref_seq,
        actor=actor,
        at=canonical.moment(at or timezone.now()),
        body=body_digest(salt, spelled),
        prev=last[1] if last else NO_PREVIOUS,
    )
    event.hash = event_digest(event)
    event.save(force_insert=True)
    EventBody.objects.create(event=event, salt=salt, body=spelled.decode())
    return event


def body_digest(salt: str, spelled: bytes) -> str:
    """Return the digest of a body: salted, so that an erased short body cannot be guessed from it."""
    return hashlib.sha256(b"ledger-body/1\n" + bytes.fromhex(salt) + spelled).hexdigest()


def event_digest(event: Event) -> str:
    """Return the digest of an event's line, which covers the line before it."""
    line = {
        "actor": str(event.actor) if event.actor else None,
        "at": event.at,
        "body": event.body,
        "chain": str(event.chain),
        "kind": event.kind,
        "prev": event.prev,
        "ref_seq": event.ref_seq,
        "seq": event.seq,
        "subject": str(event.subject) if event.subject else None,
        "v": event.v,
    }
    return hashlib.sha256(b"ledger-event/1\n" + canonical.encode(line)).hexdigest()


def said(event: Event) -> dict[str, Any]:
    """Return what an event says; an erased body reads as such."""
    body: dict[str, Any] = json.loads(event.said.body)
    return body


@transaction.atomic
def withdraw(
    *, aircraft: HasId, by: Any, kind: str, subject: Record, reason: str, at: dt.datetime | None = None
) -> Withdrawal:
    """Take a row back with a reason; `kind` names it in words ("evidence", "sign-off"). The row stays."""
    if not reason.strip():
        raise Refused("Say why it is withdrawn; the reason stays on the record.", field="reason")
    if earlier := Withdrawal.objects.filter(subject=subject.id).first():
        return earlier
    row = Withdrawal.objects.create(
        chain=aircraft.id,
        kind=kind,
        subject=subject.id,
        reason=reason.strip(),
        by_id=by.id,
        by_name=by.name,
        at=at or timezone.now(),
    )
    text = f"withdrew {kind}: {reason.strip()[:120]}"
    write(aircraft=aircraft, by=by, kind=f"{kind}.withdrawn", about=row, text=text, at=at)
    return row
