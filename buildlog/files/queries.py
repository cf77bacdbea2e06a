"""Photos and documents as pages ask for them, and whether the store still holds what the rows say."""

import hashlib
import time
from itertools import groupby
from pathlib import Path

from django.conf import settings
from django.core.paginator import Page, Paginator
from django.db.models import Q

from buildlog.aircraft.models import Aircraft
from buildlog.files.models import Blob, Document, Photo
from buildlog.files.store import path_of

PER_PAGE = 48
DAY = 24 * 3600
RESTORE = "Restore this file from a backup; its digest tells whether it is the right one."


def photo_page(aircraft: Aircraft, *, words: str = "", number: int | str = 1) -> Page[Photo]:
    """Return one page of photos, newest day first."""
    rows = aircraft.photos.current().select_related("blob").order_by("-taken_on", "-taken_time", "-added_at")
    if words:
        rows = rows.filter(Q(caption__icontains=words) | Q(camera__icontains=words) | Q(blob__sha256__startswith=words))
    return Paginator(rows, PER_PAGE).get_page(number)


def by_day(page: Page[Photo]) -> list[tuple[object, list[Photo]]]:
    """Return the photos of a page in groups of their day; None is a day not known."""
    return [(day, list(rows)) for day, rows in groupby(page.object_list, key=lambda photo: photo.taken_on)]


def documents_of(aircraft: Aircraft) -> list[Document]:
    """Return all documents, newest first."""
    return list(aircraft.documents.select_related("blob", "added_by").order_by("-added_at"))


def file_faults(*, read: bool) -> list[tuple[str, str]]:
    """Return what is wrong with the store as (sentence, remedy): missing or changed originals, files without a row.

    read: read every original and compare its digest; otherwise only presence and size are looked at.
    """
    faults, known = [], set()
    for blob in Blob.objects.order_by("sha256").iterator():
        known.add(blob.sha256)
        path = path_of(blob.sha256)
        if not path.is_file():
            faults.append((f"The original {blob.sha256} is missing.", RESTORE))
        elif path.stat().st_size != blob.size or (read and _digest(path) != blob.sha256):
            faults.append((f"The original {blob.sha256} was changed.", RESTORE))
    return faults + list(_strays(known))


def is_whole(sha256: str) -> bool:
    """Return whether an original is there and has its digest."""
    path = path_of(sha256)
    return path.is_file() and _digest(path) == sha256


def _strays(known: set[str]) -> list[tuple[str, str]]:
    old = time.time() - DAY
    found = []
    for path in sorted(Path(settings.DATA_DIR, "blobs").glob("*/*/*")):
        if path.name not in known and path.stat().st_mtime < old:
            found.append((f"The file {path.name} has no row.", "Keep it aside: a save was cut off before its record."))
    return found


def _digest(path: Path) -> str:
    with path.open("rb") as file:
        return hashlib.file_digest(file, "sha256").hexdigest()
