"""Surfaces made from seeded noise: wood, metal, concrete, fabric. Pillow only."""

from math import pi, sin
from random import Random

from PIL import Image, ImageChops, ImageOps

from buildlog.demo.spec import Colour

Size = tuple[int, int]
BICUBIC = Image.Resampling.BICUBIC
BILINEAR = Image.Resampling.BILINEAR


def noise(rng: Random, size: Size) -> Image.Image:
    """Return grey noise, a byte a pixel."""
    return Image.frombytes("L", size, rng.randbytes(size[0] * size[1]))


def clouds(rng: Random, size: Size, cells: Size) -> Image.Image:
    """Return soft noise with about `cells` blobs across and down."""
    return noise(rng, (cells[0] + 1, cells[1] + 1)).resize(size, BICUBIC)


def tinted(grey: Image.Image, dark: Colour, light: Colour) -> Image.Image:
    """Return a grey picture run from one colour to another."""
    return ImageOps.colorize(grey, dark, light)


def tone(colour: Colour, factor: float) -> Colour:
    """Return the colour made lighter or darker, kept within 0 to 255."""
    r, g, b = (max(0, min(255, round(part * factor))) for part in colour)
    return r, g, b


def mixed(a: Colour, b: Colour, t: float) -> Colour:
    """Return the colour a share `t` of the way from `a` to `b`."""
    r, g, c = (max(0, min(255, round(x + (y - x) * t))) for x, y in zip(a, b, strict=True))
    return r, g, c


def wood(rng: Random, size: Size, colour: Colour, rings: int = 5) -> Image.Image:
    """Return sawn wood with its grain along x: year rings bent by soft noise, over fine pores."""
    ramp = Image.linear_gradient("L").resize(size, BILINEAR)
    bend = clouds(rng, size, (3, 5)).point([round(v * 0.55) for v in range(256)])
    field = ImageChops.add_modulo(ramp, bend)
    # A whole number of waves over 0..255, so that the wrap of the field leaves no seam.
    waves = field.point([round(128 + 90 * sin(2 * pi * rings * v / 256) ** 3) for v in range(256)])
    pores = noise(rng, (max(2, size[0] // 90), max(2, size[1] // 2))).resize(size, BICUBIC)
    broad = clouds(rng, size, (2, 9))
    grain = Image.blend(Image.blend(waves, pores, 0.42), broad, 0.3)
    return tinted(grain, tone(colour, 0.72), tone(colour, 1.16))


def brushed(rng: Random, size: Size, colour: Colour) -> Image.Image:
    """Return brushed metal with its lines along x."""
    lines = noise(rng, (max(2, size[0] // 120), size[1])).resize(size, BICUBIC)
    return tinted(Image.blend(lines, clouds(rng, size, (3, 3)), 0.55), tone(colour, 0.7), tone(colour, 1.25))


def concrete(rng: Random, size: Size, colour: Colour) -> Image.Image:
    """Return a mottled floor or wall."""
    fine = noise(rng, (size[0] // 2, size[1] // 2)).resize(size, BILINEAR)
    mottled = Image.blend(clouds(rng, size, (9, 9)), clouds(rng, size, (40, 40)), 0.4)
    return tinted(Image.blend(mottled, fine, 0.16), tone(colour, 0.74), tone(colour, 1.2))


def woven(rng: Random, size: Size, colour: Colour) -> Image.Image:
    """Return a plain weave: crossed threads with uneven light."""
    warp = noise(rng, (size[0] // 3, 6)).resize(size, BICUBIC)
    weft = noise(rng, (6, size[1] // 3)).resize(size, BICUBIC)
    cloth = Image.blend(Image.blend(warp, weft, 0.5), clouds(rng, size, (4, 4)), 0.5)
    return tinted(cloth, tone(colour, 0.84), tone(colour, 1.1))
