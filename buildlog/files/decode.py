"""The decoding process: one picture in, its description on standard output, its derivatives in a folder.

Run alone with bounded memory; it imports nothing of the house and never the layout engine of the binder, which makes
Pillow accept truncated photos.
"""

import json
import resource
import sys
import warnings
from pathlib import Path
from typing import Any

from PIL import Image, ImageOps

MEMORY = 2**30
DERIVATIVE = 16 << 20  # bytes of one written file: far more than a derivative of 1600 pixels needs
PIXELS, SIDE = 80_000_000, 20_000
SIZES = (1600, 1000, 320)
ORIENTATION, MAKE, MODEL, EXIF, TAKEN, DIGITIZED = 0x0112, 0x010F, 0x0110, 0x8769, 0x9003, 0x9004
MAGIC = {  # first bytes: the one decoder that may touch the file
    b"\xff\xd8\xff": "JPEG",
    b"\x89PNG\r\n\x1a\n": "PNG",
}
TYPES = {"JPEG": "image/jpeg", "PNG": "image/png", "WEBP": "image/webp", "HEIF": "image/heic"}
HEIC_BRANDS = {b"heic", b"heix", b"hevc", b"mif1", b"msf1", b"heim", b"heis"}


class NotTaken(Exception):
    """A picture that is refused; the text is for the person who chose it."""


def kind(head: bytes) -> str:
    """Return the decoder for a file by its first bytes, whatever its name says."""
    for magic, name in MAGIC.items():
        if head.startswith(magic):
            return name
    if head[:4] == b"RIFF" and head[8:12] == b"WEBP":
        return "WEBP"
    if head[4:8] == b"ftyp" and head[8:12] in HEIC_BRANDS:
        return "HEIF"
    raise NotTaken("This is not a photo we can keep. JPEG, HEIC, PNG and WebP are.")


def look(path: Path, folder: Path) -> dict[str, Any]:
    """Decode the picture, write its derivatives, and return what was seen."""
    with path.open("rb") as file:
        form = kind(file.read(16))
    if form == "HEIF":
        import pi_heif

        pi_heif.register_heif_opener()
    with Image.open(path, formats=[form]) as picture:
        width, height = picture.size
        if width * height > PIXELS or max(width, height) > SIDE:
            raise NotTaken(f"This picture has {width * height / 1e6:.0f} megapixels; at most 80 are taken.")
        exif = picture.getexif()
        turned = form != "HEIF" and exif.get(ORIENTATION, 1) in {5, 6, 7, 8}
        if form == "JPEG" and min(width, height) > 2 * SIZES[0]:
            # Both axes count: a square box would give no reduction for a picture that is not square.
            scale = 2 * SIZES[0] / max(width, height)
            picture.draft("RGB", (max(1, int(width * scale)), max(1, int(height * scale))))
        picture.load()
        _write(picture, exif.get(ORIENTATION, 1) if form != "HEIF" else 1, folder)
    return {
        "media_type": TYPES[form],
        "width": height if turned else width,
        "height": width if turned else height,
        "taken": _text(exif.get_ifd(EXIF).get(TAKEN) or exif.get_ifd(EXIF).get(DIGITIZED)),
        "camera": " ".join(filter(None, (_text(exif.get(MAKE)), _text(exif.get(MODEL)))))[:120],
    }


def _text(value: Any) -> str:
    return "".join(sign for sign in str(value or "") if sign.isprintable() and ord(sign) < 0xD800)[:60].strip()


def _write(picture: Image.Image, orientation: int, folder: Path) -> None:
    if picture.mode in {"P", "LA", "PA", "RGBA"}:
        flat = Image.new("RGB", picture.size, "white")
        flat.paste(picture.convert("RGBA"), mask=picture.convert("RGBA").getchannel("A"))
        picture = flat
    elif picture.mode != "RGB":
        picture = picture.convert("RGB")
    for size in SIZES:
        # Scaled first, turned then: turning the whole picture costs four times as much.
        picture.thumbnail((size, size), Image.Resampling.LANCZOS, reducing_gap=2.0)
        upright = picture.copy()
        upright.getexif().clear()
        upright.getexif()[ORIENTATION] = orientation
        ImageOps.exif_transpose(upright, in_place=True)
        clean = Image.frombytes("RGB", upright.size, upright.tobytes())
        clean.save(folder / f"{size}.jpg", quality=80)


def main(path: str, folder: str) -> None:
    """Say what was seen, or why it is refused, as JSON."""
    resource.setrlimit(resource.RLIMIT_AS, (MEMORY, MEMORY))
    resource.setrlimit(resource.RLIMIT_CORE, (0, 0))
    resource.setrlimit(resource.RLIMIT_FSIZE, (DERIVATIVE, DERIVATIVE))
    Image.MAX_IMAGE_PIXELS = PIXELS
    warnings.simplefilter("error", Image.DecompressionBombWarning)
    try:
        said = look(Path(path), Path(folder))
    except NotTaken as refusal:
        said = {"refused": str(refusal)}
    except (Image.DecompressionBombError, Image.DecompressionBombWarning):
        said = {"refused": "This picture has more than 80 megapixels; at most 80 are taken."}
    except (OSError, SyntaxError, ValueError, MemoryError, EOFError, TypeError, KeyError, IndexError, RuntimeError):
        said = {"refused": "This picture is damaged or cut short. Take it again, or choose the original."}
    print(json.dumps(said))


if __name__ == "__main__":
    main(*sys.argv[1:])
