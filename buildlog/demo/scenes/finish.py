"""What a lens and a sensor add: fall-off of light, soft far and near, grain, a cast of colour; and the file's EXIF."""

from io import BytesIO
from random import Random

from PIL import ExifTags, Image, ImageChops, ImageFilter

from buildlog.demo.scenes import textures
from buildlog.demo.spec import PhotoSpec

CASTS = {
    "left": (1.0, 1.0, 0.985),
    "right": (0.985, 1.0, 1.015),
    "top": (1.01, 1.005, 0.97),
    "evening": (1.06, 0.99, 0.88),
    "window": (0.975, 0.995, 1.035),
}
TURN = {3: Image.Transpose.ROTATE_180, 6: Image.Transpose.ROTATE_90, 8: Image.Transpose.ROTATE_270}
QUALITY = 84


def developed(picture: Image.Image, spec: PhotoSpec, rng: Random, focus: tuple[float, float]) -> Image.Image:
    """Return the picture as the camera would give it; focus is the band of rows in focus, as shares of the height."""
    picture = _soft_depth(picture, focus)
    picture = ImageChops.multiply(picture, _light_fall(spec, picture.size))
    if spec.orientation in (6, 8):
        w, h = picture.size
        cut = h * h // w
        left = (w - cut) // 2
        picture = picture.resize((h, w), textures.BICUBIC, (left, 0, left + cut, h))
    return _grain(picture, spec, rng)


def _soft_depth(picture: Image.Image, focus: tuple[float, float]) -> Image.Image:
    half = picture.resize((picture.width // 4, picture.height // 4), textures.BILINEAR)
    far = half.filter(ImageFilter.GaussianBlur(1.7)).resize(picture.size, textures.BICUBIC)
    column = Image.new("L", (1, 64))
    for y in range(64):
        share = y / 63
        off = max(focus[0] - share, share - focus[1], 0.0)
        column.putpixel((0, y), min(255, int(off * 900)))
    sharp = picture.filter(ImageFilter.BoxBlur(0.7))  # a lens never resolves the edge of a drawn polygon
    return Image.composite(far, sharp, column.resize(picture.size, textures.BILINEAR))


def _light_fall(spec: PhotoSpec, size: tuple[int, int]) -> Image.Image:
    """Return a tint to multiply with: bright towards the light, darker in the corners."""
    w, h = 160, 120
    shift = {"left": -0.22, "evening": -0.3, "right": 0.22, "window": 0.25}.get(spec.light, 0.0)
    radial = Image.radial_gradient("L").resize((int(w * 2.1), int(h * 2.1)), textures.BILINEAR)
    left, top = int(w * (0.55 - shift)), int(h * 0.62)
    near = radial.crop((left, top, left + w, top + h))
    corner = Image.radial_gradient("L").resize((w, h), textures.BILINEAR)
    cast = CASTS.get(spec.light, CASTS["top"])
    fall = Image.blend(near, corner, 0.4)
    bands = [fall.point([min(255, int((255 - max(0, v - 80) * 0.5) * k)) for v in range(256)]) for k in cast]
    return Image.merge("RGB", bands).resize(size, textures.BICUBIC)


def _grain(picture: Image.Image, spec: PhotoSpec, rng: Random) -> Image.Image:
    size = picture.size
    strength = 8 if spec.light == "evening" else 5
    fine = textures.noise(rng, (size[0] // 2, size[1] // 2)).resize(size, textures.BICUBIC)
    table = [round(128 + (v - 128) * strength / 128) for v in range(256)]
    grey = fine.point(table)
    return ImageChops.add(picture, Image.merge("RGB", (grey, grey, grey)), 1, -128)


def written(picture: Image.Image, spec: PhotoSpec) -> bytes:
    """Return JPEG bytes with the pixels turned as the camera held them and EXIF that says so."""
    if spec.orientation in TURN:
        picture = picture.transpose(TURN[spec.orientation])
    exif = Image.Exif()
    moment = spec.taken.strftime("%Y:%m:%d %H:%M:%S")
    if spec.camera:
        exif[ExifTags.Base.Make] = spec.camera.split()[0]
        exif[ExifTags.Base.Model] = spec.camera
    exif[ExifTags.Base.Orientation] = spec.orientation
    if spec.camera:
        inner = exif.get_ifd(ExifTags.IFD.Exif)
        inner[ExifTags.Base.DateTimeOriginal] = moment
        offset = spec.taken.strftime("%z")
        inner[ExifTags.Base.OffsetTimeOriginal] = f"{offset[:3]}:{offset[3:]}"
        inner[ExifTags.Base.ExifImageWidth], inner[ExifTags.Base.ExifImageHeight] = picture.size
    out = BytesIO()
    picture.save(out, "JPEG", quality=QUALITY, subsampling=1, exif=exif)
    return out.getvalue()
