"""Entries: kept as a draft, closed onto the record, amended by another entry."""

import datetime as dt
from collections.abc import Sequence
from uuid import UUID

from django.conf import settings
from django.db import transaction
from django.db.models import Sum
from django.utils import timezone

from buildlog.aircraft.models import Aircraft, User
from buildlog.aircraft.queries import membership
from buildlog.aircraft.roles import Act, Role, may
from buildlog.errors import Refused
from buildlog.files.faults import point
from buildlog.ledger import actions as ledger
from buildlog.ledger.models import Record
from buildlog.shop.draft import Draft
from buildlog.shop.models import Entry, EntryPhoto, EntryRevision, LabourLine, ProcessRecord

DAY = 24 * 60
EARLIEST = dt.date(1950, 1, 1)


class Overtaken(Exception):
    """The draft was saved elsewhere meanwhile; the text sent is kept beside it as `sibling`."""

    def __init__(self, entry: Entry, sibling: EntryRevision) -> None:
        super().__init__("this draft was saved elsewhere meanwhile")
        self.entry, self.sibling = entry, sibling


@transaction.atomic
def log_entry(
    *,
    aircraft: Aircraft,
    by: User,
    client_id: UUID,
    draft: Draft,
    amends: Entry | None = None,
    amend_reason: str = "",
    at: dt.datetime | None = None,
) -> Entry:
    """Keep one spell of shop work as a draft; the same `client_id` again returns the first entry."""
    if sent_before := Entry.objects.filter(id=client_id).first():
        if sent_before.aircraft_id != aircraft.id or sent_before.author_id != by.id:
            raise Refused("This form was sent before by somebody else. Open it anew.")
        return sent_before
    now = at or timezone.now()
    _check(aircraft, draft, now)
    entry = Entry.objects.create(
        id=client_id,
        aircraft=aircraft,
        author=by,
        author_role=_role(aircraft, by),
        amends=amends,
        amend_reason=amend_reason,
        saved_at=now,
        **draft.columns(),
    )
    point("entry-row")
    rows = _write_parts(entry, draft)
    _keep_revision(entry, by, draft, now)
    text = f"kept a draft of {draft.worked_on}: {draft.note[:60]}"
    ledger.write(aircraft=aircraft, by=by, kind="entry.kept", about=entry, rows=rows, text=text, at=at)
    point("before-commit")
    return entry


def _role(aircraft: Aircraft, by: User) -> str:
    member = membership(user=by, aircraft_id=aircraft.id)
    if member is None or not may(member.role, Act.LOG):
        raise Refused("Only members who work on this aircraft write entries.")
    return str(member.role)


def _check(aircraft: Aircraft, draft: Draft, now: dt.datetime, entry: Entry | None = None) -> None:
    if draft.worked_on > timezone.localdate(now) + dt.timedelta(days=1):
        raise Refused("Work cannot be logged before it is done.", field="worked_on")
    if draft.worked_on < EARLIEST:
        raise Refused("Is the year right? This day lies before 1950.", field="worked_on")
    if not draft.note.strip() and not draft.photos:
        raise Refused("Say what was done, or add a photo.", field="note")
    for line in draft.labour:
        done = LabourLine.objects.filter(
            entry__aircraft=aircraft, entry__worked_on=draft.worked_on, person_name=line.name
        ).exclude(entry__amendments__isnull=False)
        if entry is not None:
            done = done.exclude(entry_id__in=[entry.id, entry.amends_id])
        before = done.aggregate(total=Sum("minutes"))["total"] or 0
        here = sum(other.minutes for other in draft.labour if other.name == line.name)
        if here + before > DAY:
            raise Refused(f"{line.name} would have worked more than 24 hours on that day.", field="time")


def _write_parts(entry: Entry, draft: Draft) -> list[Record]:
    rows: list[Record] = []
    for line in draft.labour:
        rows.append(
            LabourLine.objects.create(
                entry=entry, person=line.person, person_name=line.name, capacity=line.capacity, minutes=line.minutes
            )
        )
    for process in draft.processes:
        rows.append(
            ProcessRecord.objects.create(
                entry=entry,
                kind=process.kind,
                batch=process.batch,
                instrument=process.instrument,
                details=dict(process.details),
            )
        )
    for place, photo in enumerate(draft.photos):
        rows.append(EntryPhoto.objects.create(entry=entry, photo=photo, place=place))
    return rows


def _keep_revision(entry: Entry, by: User, draft: Draft, now: dt.datetime, *, sibling: bool = False) -> EntryRevision:
    return EntryRevision.objects.create(
        entry=entry, version=entry.version, sibling=sibling, fields=draft.as_kept(), saved_by=by, saved_at=now
    )


def edit_draft(
    *, aircraft: Aircraft, by: User, entry: Entry, base_version: int, draft: Draft, at: dt.datetime | None = None
) -> Entry:
    """Save a draft again. Raises Overtaken, with the text kept beside it, when it was saved elsewhere meanwhile."""
    now = at or timezone.now()
    with transaction.atomic():
        entry = Entry.objects.get(id=entry.id)
        if entry.author_id != by.id or entry.closed_at is not None:
            raise Refused("Only its author changes a draft; a closed entry is amended.")
        _check(aircraft, draft, now, entry)
        sibling = None
        if entry.version != base_version:
            sibling = _keep_revision(entry, by, draft, now, sibling=True)
        else:
            _replace(aircraft, by, entry, draft, now, at)
    if sibling is not None:
        raise Overtaken(entry, sibling)
    return entry


def _replace(
    aircraft: Aircraft, by: User, entry: Entry, draft: Draft, now: dt.datetime, at: dt.datetime | None
) -> None:
    removed: list[Record] = [*entry.labour.all(), *entry.processes.all(), *entry.photo_links.all()]
    entry.labour.all().delete()
    entry.processes.all().delete()
    entry.photo_links.all().delete()
    for name, value in draft.columns().items():
        setattr(entry, name, value)
    entry.version, entry.saved_at = entry.version + 1, now
    entry.save()
    rows = _write_parts(entry, draft)
    _keep_revision(entry, by, draft, now)
    text = f"changed a draft of {draft.worked_on}: {draft.note[:60]}"
    ledger.write(
        aircraft=aircraft, by=by, kind="entry.changed", about=entry, rows=rows, removed=removed, text=text, at=at
    )


@transaction.atomic
def close_entry(
    *,
    aircraft: Aircraft,
    by: User | None,
    entry: Entry,
    how: str = Entry.ClosedHow.AUTHOR,
    at: dt.datetime | None = None,
) -> Entry:
    """Put a draft on the record: from now on it is only amended. Closing twice is closing once."""
    entry = Entry.objects.select_related("task").get(id=entry.id)
    if entry.closed_at is not None:
        return entry
    if how == Entry.ClosedHow.AUTHOR and (by is None or entry.author_id != by.id):
        raise Refused("Only its author puts a draft on the record.")
    if entry.amends_id and Entry.objects.filter(amends_id=entry.amends_id, closed_at__isnull=False).exists():
        raise Refused("The entry this one corrects was amended meanwhile. Amend that amendment instead.")
    entry.closed_at, entry.closed_how = at or timezone.now(), how
    parts: Sequence[Record] = [*entry.labour.all(), *entry.processes.all(), *entry.photo_links.all()]
    minutes = sum(row.minutes for row in parts if isinstance(row, LabourLine))
    said = "amended an entry" if entry.amends_id else "logged"
    text = f"{said} {minutes} min on {entry.worked_on}: {entry.note[:60]}"
    if entry.amends_id:
        text += f" (reason: {entry.amend_reason[:80]})"
    ledger.write(aircraft=aircraft, by=by, kind="entry.closed", about=entry, rows=parts, text=text, at=at)
    point("entry-event")
    entry.save()
    point("before-commit")
    return entry


@transaction.atomic
def amend_entry(
    *,
    aircraft: Aircraft,
    by: User,
    entry: Entry,
    client_id: UUID,
    draft: Draft,
    amend_reason: str,
    at: dt.datetime | None = None,
) -> Entry:
    """Correct a closed entry by another one, closed at once; the original stays legible above it."""
    if not amend_reason.strip():
        raise Refused("Say why it is amended; the reason stays on the record.", field="amend_reason")
    if entry.closed_at is None:
        raise Refused("A draft is changed by its author, not amended.")
    if _role(aircraft, by) in {Role.HELPER, Role.ASSIST} and entry.author_id != by.id:
        raise Refused("Helpers and paid assistance amend their own entries only.")
    sent_before = Entry.objects.filter(id=client_id).exists()
    if not sent_before and entry.amendments.exclude(closed_at=None).exists():
        raise Refused("This entry was amended already. Amend the last amendment.")
    made = log_entry(
        aircraft=aircraft, by=by, client_id=client_id, draft=draft, amends=entry, amend_reason=amend_reason, at=at
    )
    return close_entry(aircraft=aircraft, by=by, entry=made, at=at)


def close_old_drafts(*, at: dt.datetime | None = None) -> int:
    """Put drafts on the record that nobody saved for AUTO_CLOSE_DAYS; return how many. 0 days means never."""
    if not settings.AUTO_CLOSE_DAYS:
        return 0
    now = at or timezone.now()
    old = Entry.objects.drafts().filter(saved_at__lt=now - dt.timedelta(days=settings.AUTO_CLOSE_DAYS))
    rows = list(old.select_related("aircraft", "author"))
    for entry in rows:
        close_entry(aircraft=entry.aircraft, by=entry.author, entry=entry, how=Entry.ClosedHow.AUTOMATIC, at=at)
    return len(rows)
