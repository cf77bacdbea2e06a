"""Pictures and papers for tests, made on the spot, and the words that the page addresses of files take."""

import io
import random
from typing import Any
from uuid import uuid4

from django.core.files.uploadedfile import SimpleUploadedFile
from PIL import Image

from buildlog.aircraft.models import Aircraft, User
from buildlog.files import actions
from buildlog.files.models import Document, Photo
from tests import make


def jpeg(*, size: tuple[int, int] = (640, 480), taken: str = "2026:03:14 10:05:00", orientation: int = 1) -> bytes:
    """Return a JPEG of random colours with EXIF, every one with other bytes."""
    exif = Image.Exif()
    exif[0x0112], exif[0x0110] = orientation, "Shop camera"
    exif.get_ifd(0x8769)[0x9003] = taken
    noise = Image.frombytes("RGB", (16, 16), random.randbytes(768)).resize(size)
    out = io.BytesIO()
    noise.save(out, "JPEG", exif=exif)
    return out.getvalue()


def shop_jpeg(size: tuple[int, int] = (4000, 3000), quality: int = 88) -> bytes:
    """Return a JPEG as large as a phone's: edges, shades and grain."""
    small = Image.frombytes(
        "RGB", (size[0] // 50, size[1] // 50), random.randbytes(size[0] // 50 * (size[1] // 50) * 3)
    )
    shades = small.resize(size, Image.Resampling.BICUBIC)
    grain = Image.effect_noise(size, 18).convert("RGB")
    out = io.BytesIO()
    Image.blend(shades, grain, 0.35).save(out, "JPEG", quality=quality)
    return out.getvalue()


def upload(content: bytes, name: str = "IMG_1.jpg") -> SimpleUploadedFile:
    """Return bytes as they come from a form."""
    return SimpleUploadedFile(name, content)


def photo(*, aircraft: Aircraft, by: User | None = None, content: bytes | None = None, **more: Any) -> Photo:
    """Return a kept photo."""
    by = by or make.builder_of(aircraft)
    return actions.store_photo(aircraft=aircraft, by=by, upload=upload(content or jpeg()), **more)


def document(*, aircraft: Aircraft, title: str = "Invoice", content: bytes = b"%PDF-1.7\n%%EOF") -> Document:
    """Return a kept document."""
    by = make.builder_of(aircraft)
    paper = upload(content + random.randbytes(8).hex().encode(), "paper.pdf")
    return actions.store_document(
        aircraft=aircraft, by=by, upload=paper, client_id=uuid4(), kind="invoice", title=title
    )


ARGUMENTS = {
    "photo_id": lambda aircraft: photo(aircraft=aircraft, by=make.builder_of(aircraft)).id,
    "document_id": lambda aircraft: document(aircraft=aircraft).id,
    "size": lambda aircraft: 320,
}
