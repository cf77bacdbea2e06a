"""Batches and parts: what arrived, what was accepted, and where each part sits."""

import datetime as dt
from typing import Any
from uuid import UUID

from django.db import IntegrityError, transaction
from django.utils import timezone

from buildlog.aircraft.models import Aircraft, User
from buildlog.errors import Refused
from buildlog.files.models import Document, Photo
from buildlog.ledger import actions as ledger
from buildlog.ledger.models import Record
from buildlog.ledger.queries import sent_before
from buildlog.parts.models import Batch, Installation, Part, PartBatch, PartDocument, PartPhoto


def add_batch(*, aircraft: Aircraft, by: User, client_id: UUID, at: dt.datetime | None = None, **said: Any) -> Batch:
    """Book in a lot of material: code, material, specification, lot, supplier, quantity, dates, certificate."""
    if first := sent_before(Batch, client_id, aircraft):
        return first
    if (said.get("expires_on") and said.get("received_on")) and said["expires_on"] < said["received_on"]:
        raise Refused("This batch would have expired before it was received.", field="expires_on")
    try:
        with transaction.atomic():
            batch = Batch.objects.create(id=client_id, aircraft=aircraft, **said)
            ledger.write(aircraft=aircraft, by=by, kind="batch.added", about=batch, text=f"booked in {batch}", at=at)
    except IntegrityError:
        raise Refused("There is a batch with this code.", field="code") from None
    return batch


@transaction.atomic
def add_part(
    *,
    aircraft: Aircraft,
    by: User,
    client_id: UUID,
    batches: list[Batch] | None = None,
    documents: list[Document] | None = None,
    photos: list[Photo] | None = None,
    at: dt.datetime | None = None,
    **said: Any,
) -> Part:
    """Enter a part with its origin, and the batches, papers and photos that belong to it."""
    if first := sent_before(Part, client_id, aircraft):
        return first
    part = Part.objects.create(id=client_id, aircraft=aircraft, added_by=by, added_at=at or timezone.now(), **said)
    rows = _join(part, batches, documents, photos)
    text = f"entered part {part}, {part.get_origin_display().lower()}"
    ledger.write(aircraft=aircraft, by=by, kind="part.added", about=part, rows=rows, text=text, at=at)
    return part


def _join(
    part: Part, batches: list[Batch] | None, documents: list[Document] | None, photos: list[Photo] | None
) -> list[Record]:
    rows: list[Record] = []
    for batch in batches or []:
        link, new = PartBatch.objects.get_or_create(part=part, batch=batch)
        rows += [link] if new else []
    for document in documents or []:
        paper, new = PartDocument.objects.get_or_create(part=part, document=document)
        rows += [paper] if new else []
    for photo in photos or []:
        picture, new = PartPhoto.objects.get_or_create(part=part, photo=photo)
        rows += [picture] if new else []
    return rows


@transaction.atomic
def change_part(
    *,
    aircraft: Aircraft,
    by: User,
    part: Part,
    batches: list[Batch] | None = None,
    documents: list[Document] | None = None,
    photos: list[Photo] | None = None,
    at: dt.datetime | None = None,
    **said: Any,
) -> Part:
    """Change what is said of a part, its receiving inspection among it; batches and papers are only added."""
    if said.get("inspection") == Part.Inspection.REJECTED and part.installations.in_place().exists():
        raise Refused("This part is installed. Take it out of its position before it is rejected.", field="inspection")
    for name, value in said.items():
        setattr(part, name, value)
    part.save()
    rows = _join(part, batches, documents, photos)
    text = f"changed part {part}, {part.get_inspection_display().lower()}"
    ledger.write(aircraft=aircraft, by=by, kind="part.changed", about=part, rows=rows, text=text, at=at)
    return part


@transaction.atomic
def install_part(
    *,
    aircraft: Aircraft,
    by: User,
    part: Part,
    position: str,
    installed_on: dt.date,
    removal_reason: str = "",
    at: dt.datetime | None = None,
) -> Installation:
    """Put a part in a position; the part that sits there is taken out on the same day, with the reason given."""
    now = at or timezone.now()
    _check_install(part, position, installed_on, now)
    rows: list[Record] = []
    sitting = aircraft.installations.in_place().filter(position=position).select_related("part").first()
    if sitting is not None:
        if installed_on < sitting.installed_on:
            words = f"{sitting.part} was put there on {sitting.installed_on:%Y-%m-%d}, after this day."
            raise Refused(words, field="installed_on")
        if not removal_reason.strip():
            words = f"{sitting.part} sits there. Say why it comes out."
            raise Refused(words, field="removal_reason")
        sitting.removed_on, sitting.removal_reason = installed_on, removal_reason.strip()
        sitting.save()
        rows.append(sitting)
    made = Installation.objects.create(
        aircraft=aircraft,
        position=position,
        part=part,
        installed_on=installed_on,
        recorded_at=now,
        installed_by=by,
    )
    text = f"installed {part} as {position}" + (f", {sitting.part} came out: {removal_reason[:80]}" if sitting else "")
    ledger.write(aircraft=aircraft, by=by, kind="part.installed", about=made, rows=rows, text=text, at=at)
    return made


def _check_install(part: Part, position: str, installed_on: dt.date, now: dt.datetime) -> None:
    if part.inspection == Part.Inspection.REJECTED:
        raise Refused("A rejected part cannot be installed.", field="position")
    if installed_on > timezone.localdate(now) + dt.timedelta(days=1):
        raise Refused("A part cannot be installed on a day to come.", field="installed_on")
    if there := part.installations.in_place().first():
        where = "there already" if there.position == position else f"installed as {there.position}"
        raise Refused(f"This part is {where}.", field="position")


@transaction.atomic
def remove_part(
    *,
    aircraft: Aircraft,
    by: User,
    installation: Installation,
    removed_on: dt.date,
    removal_reason: str,
    at: dt.datetime | None = None,
) -> Installation:
    """Take a part out of its position without another one going in."""
    if not removal_reason.strip():
        raise Refused("Say why it comes out.", field="removal_reason")
    if removed_on < installation.installed_on:
        raise Refused("It was not there yet on this day.", field="removed_on")
    installation.removed_on, installation.removal_reason = removed_on, removal_reason.strip()
    installation.save()
    text = f"took {installation.part} out of {installation.position}: {removal_reason[:80]}"
    ledger.write(aircraft=aircraft, by=by, kind="part.removed", about=installation, text=text, at=at)
    return installation
