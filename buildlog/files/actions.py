"""Keeping photos and documents: bytes first, then one transaction with their rows and event."""

import datetime as dt
from dataclasses import dataclass
from pathlib import Path
from typing import Protocol
from uuid import UUID

from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.models import Aircraft, User
from buildlog.errors import Refused
from buildlog.files import derived, store
from buildlog.files.faults import point
from buildlog.files.inspect import Seen
from buildlog.files.models import Blob, Document, Photo
from buildlog.ledger import actions as ledger
from buildlog.ledger.ids import uuid7
from buildlog.ledger.queries import sent_before

PHOTO_MOST, DOCUMENT_MOST = 40 << 20, 25 << 20


class Upload(Protocol):
    """A file as it comes from a form."""

    name: str | None

    def chunks(self, chunk_size: int | None = None) -> object: ...


def store_photo(
    *,
    aircraft: Aircraft,
    by: User,
    upload: Upload,
    caption: str = "",
    shows_builder: bool = False,
    taken_on: dt.date | None = None,
    at: dt.datetime | None = None,
) -> Photo:
    """Keep one photo, byte for byte, and return it; the same bytes on the same aircraft are the same photo.

    Raises Refused at `photos` with a sentence when it is empty, too large, or no picture that can be read whole.
    """
    if taken_on and taken_on > timezone.localdate(at) + dt.timedelta(days=1):
        raise Refused("A photo cannot have been taken on a day to come.", field="taken_on")
    part = store.receive(upload.chunks(), most=PHOTO_MOST, field="photos")  # type: ignore[arg-type]
    try:
        seen = derived.make(part.path, part.sha256, field="photos")
    except Refused:
        store.drop(part)
        raise
    store.keep(part)
    with transaction.atomic():
        photo = _photo(aircraft, by, part, seen, (upload.name or "")[:255], caption, shows_builder, taken_on, at)
        point("before-commit")
    point("committed")
    return photo


def _blob(part: store.Part, media_type: str, now: dt.datetime) -> tuple[Blob, bool]:
    return Blob.objects.get_or_create(
        sha256=part.sha256, defaults={"size": part.size, "media_type": media_type, "kept_at": now}
    )


def _photo(
    aircraft: Aircraft,
    by: User,
    part: store.Part,
    seen: Seen,
    name: str,
    caption: str,
    shows_builder: bool,
    taken_on: dt.date | None,
    at: dt.datetime | None,
) -> Photo:
    if earlier := Photo.objects.filter(aircraft=aircraft, blob__sha256=part.sha256).first():
        return earlier
    now = at or timezone.now()
    blob, is_new = _blob(part, seen.media_type, now)
    moment = _moment(seen.taken)
    source = Photo.TimeSource.EXIF if moment else Photo.TimeSource.ASKED if taken_on else Photo.TimeSource.NONE
    photo = Photo.objects.create(
        aircraft=aircraft,
        blob=blob,
        name=name,
        taken_on=moment.date() if moment else taken_on,
        taken_time=moment.time() if moment else None,
        time_source=source,
        camera=seen.camera,
        width=seen.width,
        height=seen.height,
        caption=caption,
        shows_builder=shows_builder,
        added_by=by,
        added_at=now,
    )
    rows = [blob] if is_new else []
    text = f"added photo {part.sha256[:12]}{f': {caption[:80]}' if caption else ''}"
    ledger.write(aircraft=aircraft, by=by, kind="photo.added", about=photo, rows=rows, text=text, at=at)
    return photo


def _moment(text: str) -> dt.datetime | None:
    try:
        found = dt.datetime.strptime(text, "%Y:%m:%d %H:%M:%S")
    except ValueError:
        return None
    return found if 1990 <= found.year <= timezone.now().year + 1 else None


@transaction.atomic
def describe_photo(
    *, aircraft: Aircraft, by: User, photo: Photo, caption: str, shows_builder: bool, at: dt.datetime | None = None
) -> Photo:
    """Say what a photo shows; its bytes and its time stay."""
    photo.caption, photo.shows_builder = caption, shows_builder
    photo.save()
    text = f"described photo {photo.blob.sha256[:12]}: {caption[:80]}"
    ledger.write(aircraft=aircraft, by=by, kind="photo.described", about=photo, text=text, at=at)
    return photo


@dataclass(frozen=True)
class Paper:
    """What is said of a document: the columns of its row."""

    id: UUID
    kind: str
    title: str
    number: str
    dated_on: dt.date | None
    name: str


def store_document(
    *,
    aircraft: Aircraft,
    by: User,
    upload: Upload,
    client_id: UUID,
    kind: str,
    title: str,
    number: str = "",
    dated_on: dt.date | None = None,
    at: dt.datetime | None = None,
) -> Document:
    """Keep one PDF as it is, once however often it is sent; Refused at `upload` when it is none, or too large."""
    if first := sent_before(Document, client_id, aircraft):
        return first
    part = store.receive(upload.chunks(), most=DOCUMENT_MOST, field="upload")  # type: ignore[arg-type]
    with part.path.open("rb") as file:
        if not file.read(8).startswith(b"%PDF-"):
            store.drop(part)
            raise Refused("A document is a PDF file. A photographed page goes in as a photo.", field="upload")
    said = Paper(client_id, kind, title, number, dated_on, (upload.name or "")[:255])
    return _document(aircraft, by, part, said, at)


def keep_document(
    *, aircraft: Aircraft, by: User, file: Path, kind: str, title: str, number: str, dated_on: dt.date
) -> Document:
    """Keep a file that this program made, such as a binder."""
    with file.open("rb") as opened:
        part = store.receive(iter(lambda: opened.read(store.CHUNK), b""), most=2 << 30, field="file")
    return _document(aircraft, by, part, Paper(uuid7(), kind, title, number, dated_on, file.name), None)


def _document(
    aircraft: Aircraft,
    by: User,
    part: store.Part,
    said: Paper,
    at: dt.datetime | None,
) -> Document:
    store.keep(part)
    now = at or timezone.now()
    with transaction.atomic():
        blob, is_new = _blob(part, "application/pdf", now)
        document = Document.objects.create(aircraft=aircraft, blob=blob, added_by=by, added_at=now, **vars(said))
        rows, text = ([blob] if is_new else []), f"added document {said.title[:80]}"
        ledger.write(aircraft=aircraft, by=by, kind="document.added", about=document, rows=rows, text=text, at=at)
    return document
