"""Photos as they come from real cameras, and everything that is not one."""

import datetime as dt
import hashlib
import io
import struct
import zlib

import pi_heif
import pytest
from django.urls import reverse
from PIL import Image

from buildlog.errors import Refused
from buildlog.files import derived, queries, store
from buildlog.files.actions import store_photo
from buildlog.files.models import Blob, Photo
from buildlog.ledger import verify
from tests import make
from tests.makers.files import jpeg, photo, upload

pytestmark = pytest.mark.django_db


@pytest.fixture
def aircraft():
    return make.aircraft()


def refused(aircraft, content: bytes, name: str = "IMG_1.jpg") -> str:
    with pytest.raises(Refused) as caught:
        store_photo(aircraft=aircraft, by=make.builder_of(aircraft), upload=upload(content, name))
    assert not Blob.objects.exists()
    return caught.value.text


def png_of(width: int, height: int) -> bytes:
    def chunk(kind: bytes, body: bytes) -> bytes:
        return struct.pack(">I", len(body)) + kind + body + struct.pack(">I", zlib.crc32(kind + body))

    head = chunk(b"IHDR", struct.pack(">IIBBBBB", width, height, 1, 0, 0, 0, 0))
    return b"\x89PNG\r\n\x1a\n" + head + chunk(b"IDAT", zlib.compress(b"\0" * 1000)) + chunk(b"IEND", b"")


def test_an_original_is_kept_byte_for_byte_under_its_digest(aircraft):
    content = jpeg(size=(4000, 3000))
    row = photo(aircraft=aircraft, content=content)
    path = store.path_of(hashlib.sha256(content).hexdigest())
    assert path.read_bytes() == content
    assert path.stat().st_mode & 0o777 == 0o440
    assert (row.width, row.height, row.camera) == (4000, 3000, "Shop camera")
    assert (str(row.taken_on), str(row.taken_time), row.time_source) == ("2026-03-14", "10:05:00", "exif")
    assert verify.check()[1] == []
    assert queries.file_faults(read=True) == []


def test_the_same_bytes_twice_are_one_photo(aircraft):
    content = jpeg()
    assert photo(aircraft=aircraft, content=content) == photo(aircraft=aircraft, content=content)
    assert Photo.objects.count() == Blob.objects.count() == 1


@pytest.mark.parametrize("orientation", range(1, 9))
def test_a_sideways_photo_stands_upright_without_its_metadata(aircraft, orientation):
    picture = Image.new("RGB", (400, 200), "white")
    picture.paste("red", (0, 0, 200, 100))
    exif = Image.Exif()
    exif[0x0112] = orientation
    out = io.BytesIO()
    picture.save(out, "JPEG", exif=exif, quality=95)
    row = photo(aircraft=aircraft, content=out.getvalue())
    with Image.open(derived.picture(row, 320)) as made:
        assert (made.width > made.height) == (orientation <= 4)
        assert not dict(made.getexif())
        # Where the red corner goes: TIFF 6.0, Orientation tag 274, rows and columns of its table.
        corner = {1: (0, 0), 2: (1, 0), 3: (1, 1), 4: (0, 1), 5: (0, 0), 6: (1, 0), 7: (1, 1), 8: (0, 1)}[orientation]
        spot = tuple(round(side * (0.75 if far else 0.25)) for side, far in zip(made.size, corner, strict=True))
        red, green, _ = made.getpixel(spot)
        assert red > 200 and green < 80


@pytest.mark.parametrize("form", ["PNG", "WEBP"])
def test_other_picture_forms_are_kept(aircraft, form):
    out = io.BytesIO()
    Image.new("RGBA", (300, 200), (10, 200, 30, 128)).save(out, form)
    row = photo(aircraft=aircraft, content=out.getvalue())
    assert row.blob.media_type == f"image/{form.lower()}"
    assert derived.picture(row, 1600).is_file()


@pytest.mark.parametrize(
    ("content", "words"),
    [
        (b"", "empty"),
        (b"<html><script>alert(1)</script></html>", "not a photo"),
        (b"<svg xmlns='http://www.w3.org/2000/svg'/>", "not a photo"),
        (b"MZ" + b"\0" * 500, "not a photo"),
        (jpeg()[:-2000], "cut short"),
        (b"\xff\xd8\xff" + b"\0" * 4000, "cut short"),
        (png_of(10_000, 10_000), "megapixels"),
        (png_of(30_000, 100), "megapixels"),
    ],
    ids=["0 bytes", "html", "svg", "program", "truncated", "no picture", "100 megapixels", "too long a side"],
)
def test_what_is_no_photo_is_refused_with_a_sentence_and_leaves_nothing(aircraft, store_dir, content, words):
    assert words in refused(aircraft, content)
    assert not list(store_dir.glob("incoming/*")) and not list(store_dir.glob("blobs/*/*/*"))


def test_a_file_over_forty_megabytes_is_refused_while_it_comes_in(aircraft, store_dir):
    class Endless:
        name = "huge.jpg"

        def chunks(self, size=None):
            for _ in range(200):
                yield b"\xff\xd8\xff" + b"\0" * (1 << 20)
            raise AssertionError("read on past the cap")

    with pytest.raises(Refused, match="larger than 40 MB"):
        store_photo(aircraft=aircraft, by=make.builder_of(aircraft), upload=Endless())
    assert not list(store_dir.glob("incoming/*"))


def test_metadata_with_a_script_is_text_like_any_other(aircraft, client):
    exif = Image.Exif()
    exif[0x0110] = "<script>alert(1)</script>\x07"
    out = io.BytesIO()
    Image.new("RGB", (50, 50)).save(out, "JPEG", exif=exif)
    row = photo(aircraft=aircraft, content=out.getvalue())
    client.force_login(make.builder_of(aircraft))
    page = client.get(reverse("photo-page", args=[aircraft.id, row.id])).content.decode()
    assert "<script>alert" not in page and "&lt;script&gt;alert(1)" in page


def test_the_decoder_of_heic_is_at_hand():
    # A HEIC file cannot be written with a decoder alone; the kind is known by its brand (ISO/IEC 23008-12, 10.2).
    assert pi_heif.libheif_info()["decoders"]


def test_a_changed_and_a_missing_original_are_found(aircraft):
    first, second = photo(aircraft=aircraft), photo(aircraft=aircraft)
    path = store.path_of(first.blob.sha256)
    path.chmod(0o600)
    path.write_bytes(b"x" * first.blob.size)
    store.path_of(second.blob.sha256).unlink()
    assert queries.file_faults(read=False)[0][0].endswith("missing.")
    assert len(queries.file_faults(read=True)) == 2


def test_a_good_photo_is_kept_when_another_is_refused(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    files = {"gallery": [upload(jpeg()), upload(b"no picture", "bad.jpg")], "caption": "Spar"}
    answer = client.post(reverse("photos", args=[aircraft.id]), files)
    page = answer.content.decode()
    assert answer.status_code == 422
    assert "bad.jpg: This is not a photo we can keep" in page and "Spar" in page
    assert Photo.objects.count() == 1


def test_originals_go_to_builders_and_inspectors_and_to_helpers_only_their_own(aircraft, client):
    row = photo(aircraft=aircraft)
    for role, wanted in (("builder", 200), ("inspector", 200), ("helper", 403), ("viewer", 403)):
        person = make.builder_of(aircraft) if role == "builder" else make.user()
        if role != "builder":
            make.member(aircraft=aircraft, user=person, role=role)
        client.force_login(person)
        answer = client.get(reverse("photo-original", args=[aircraft.id, row.id]))
        assert answer.status_code == wanted, role
    assert "sandbox" in client.get(reverse("photo-image", args=[aircraft.id, row.id, 320]))["Content-Security-Policy"]


@pytest.mark.parametrize("rows", [3, 30])
def test_the_photo_pages_ask_the_same_number_of_questions(aircraft, client, django_assert_num_queries, rows):
    for _ in range(rows):
        photo(aircraft=aircraft, content=jpeg(size=(40, 30)))
    client.force_login(make.builder_of(aircraft))
    with django_assert_num_queries(5):
        client.get(reverse("photos", args=[aircraft.id]))


def test_a_document_is_a_pdf(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    said = {"client_id": make.client_id(), "kind": "invoice", "title": "Tube", "upload": upload(b"hello", "x.pdf")}
    answer = client.post(reverse("documents", args=[aircraft.id]), said)
    assert answer.status_code == 422 and b"A document is a PDF file" in answer.content
    for _ in range(2):  # a double click is one document
        said["upload"] = upload(b"%PDF-1.4 and so on", "x.pdf")
        assert client.post(reverse("documents", args=[aircraft.id]), said).status_code == 303
    assert aircraft.documents.count() == 1


def test_a_photo_is_not_taken_on_a_day_to_come(aircraft):
    with pytest.raises(Refused, match="day to come"):
        photo(aircraft=aircraft, taken_on=dt.date(2126, 1, 1))
