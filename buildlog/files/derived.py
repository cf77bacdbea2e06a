"""Derivatives of photos: a cache that can be made again at any time."""

import shutil
import tempfile
from pathlib import Path

from django.conf import settings

from buildlog.files.inspect import Seen, inspect
from buildlog.files.models import Photo
from buildlog.files.store import path_of

SIZES = (320, 1000, 1600)


def folder_of(sha256: str) -> Path:
    """Return where the derivatives of an original lie."""
    return Path(settings.DATA_DIR, "derived", sha256[:2], sha256)


def make(original: Path, sha256: str, *, field: str) -> Seen:
    """Decode an original whole, and put its derivatives in place at once or not at all."""
    place = folder_of(sha256)
    place.parent.mkdir(mode=0o700, parents=True, exist_ok=True)
    with tempfile.TemporaryDirectory(dir=place.parent, prefix=".making-") as made:
        seen = inspect(original, Path(made, "sizes"), field=field)
        if place.exists():
            shutil.rmtree(place)
        Path(made, "sizes").rename(place)
    return seen


def picture(photo: Photo, size: int) -> Path:
    """Return a derivative of a photo, made again when the cache has lost it."""
    path = folder_of(photo.blob.sha256) / f"{size}.jpg"
    if not path.is_file():
        make(path_of(photo.blob.sha256), photo.blob.sha256, field="photos")
    return path
