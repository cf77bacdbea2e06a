"""The store of originals: bytes found by their SHA-256, never overwritten, on disk before any row names them."""

import hashlib
import os
from collections.abc import Iterable
from dataclasses import dataclass
from pathlib import Path

from django.conf import settings

from buildlog.errors import Refused
from buildlog.files.faults import point
from buildlog.ledger.ids import uuid7

CHUNK = 1 << 20


class StoreAlarm(Exception):
    """A file of this digest stands there with another size: somebody changed the store."""


@dataclass(frozen=True)
class Part:
    """Bytes received whole and on disk, not yet in the store."""

    path: Path
    sha256: str
    size: int


def path_of(sha256: str) -> Path:
    """Return where the original of a digest lies."""
    return Path(settings.DATA_DIR, "blobs", sha256[:2], sha256[2:4], sha256)


def receive(chunks: Iterable[bytes], *, most: int, field: str) -> Part:
    """Write what comes in to a part file, hashed on the way; Refused when it is empty or over `most` bytes."""
    folder = Path(settings.DATA_DIR, "incoming")
    folder.mkdir(mode=0o700, parents=True, exist_ok=True)
    path, digest, size = folder / f"{uuid7()}.part", hashlib.sha256(), 0
    with os.fdopen(os.open(path, os.O_WRONLY | os.O_CREAT | os.O_EXCL, 0o600), "wb") as out:
        for chunk in chunks:
            size += len(chunk)
            if size > most:
                break
            digest.update(chunk)
            out.write(chunk)
        point("part-written")
        os.fchmod(out.fileno(), 0o440)
        out.flush()
        os.fsync(out.fileno())
    point("part-synced")
    if size == 0 or size > most:
        path.unlink()
        raise Refused(
            "This file is empty; choose it again." if size == 0 else f"This file is larger than {most >> 20} MB.",
            field=field,
        )
    return Part(path, digest.hexdigest(), size)


def keep(part: Part) -> Path:
    """Link a part under its digest and return the place; the same bytes again are one file."""
    place = path_of(part.sha256)
    _make_folders(place.parent)
    try:
        os.link(part.path, place)
    except FileExistsError:
        if place.stat().st_size != part.size:
            raise StoreAlarm(f"{place} does not have the size of its digest.") from None
    point("linked")
    _sync(place.parent)
    part.path.unlink()
    point("stored")
    return place


def drop(part: Part) -> None:
    """Remove a part that was refused."""
    part.path.unlink(missing_ok=True)


def _make_folders(folder: Path) -> None:
    missing = []
    while not folder.exists():
        missing.append(folder)
        folder = folder.parent
    for one in reversed(missing):
        one.mkdir(mode=0o700, exist_ok=True)
        _sync(one.parent)


def _sync(folder: Path) -> None:
    handle = os.open(folder, os.O_RDONLY | os.O_DIRECTORY)
    try:
        os.fsync(handle)
    finally:
        os.close(handle)
