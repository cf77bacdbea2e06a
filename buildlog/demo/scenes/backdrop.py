"""The shop behind the subject, far out of focus: drawn small, blurred, enlarged."""

from random import Random

from PIL import Image, ImageDraw, ImageFilter

from buildlog.demo.scenes import textures
from buildlog.demo.spec import Colour

SMALL = (200, 150)
BOXES: list[Colour] = [(152, 92, 60), (70, 96, 120), (118, 122, 96), (168, 150, 112), (90, 70, 66), (60, 74, 70)]


def shop(rng: Random, size: tuple[int, int], light: str) -> Image.Image:
    """Return the far wall: window, shelves with boxes, strip lamp, a long pale shape as of a wing on trestles."""
    warm = light == "evening"
    top, low = ((118, 108, 98), (74, 66, 58)) if warm else ((134, 140, 142), (84, 86, 84))
    ramp = Image.linear_gradient("L").resize(SMALL)
    wall = textures.tinted(ramp, top, low)
    pen = ImageDraw.Draw(wall)
    _window(pen, rng, warm=warm)
    _shelves(pen, rng)
    pen.rectangle((60, 4, 140, 8), fill=(250, 248, 236) if not warm else (255, 226, 170))
    if rng.random() < 0.6:
        y = rng.randint(70, 96)
        pen.polygon([(0, y + 16), (200, y), (200, y + 12), (0, y + 30)], fill=(196, 182, 152))
    for _ in range(5):
        x = rng.randint(0, 190)
        pen.rectangle((x, 118, x + rng.randint(6, 26), 150), fill=textures.tone(rng.choice(BOXES), 0.6))
    return wall.filter(ImageFilter.GaussianBlur(4.5)).resize(size, textures.BICUBIC)


def _window(pen: ImageDraw.ImageDraw, rng: Random, *, warm: bool) -> None:
    x, y = rng.choice([8, 24, 128, 142]), rng.randint(18, 30)
    glass: Colour = (255, 214, 150) if warm else (236, 244, 250)
    for i in range(2):
        for k in range(2):
            pen.rectangle((x + i * 25, y + k * 21, x + i * 25 + 22, y + k * 21 + 18), fill=glass)


def _shelves(pen: ImageDraw.ImageDraw, rng: Random) -> None:
    x0 = rng.choice([78, 4, 120])
    for y in (40, 64, 88):
        pen.rectangle((x0, y, x0 + 74, y + 2), fill=(92, 74, 54))
        x = x0 + 2
        while x < x0 + 68:
            w, h = rng.randint(5, 13), rng.randint(8, 17)
            pen.rectangle((x, y - h, x + w, y - 1), fill=textures.tone(rng.choice(BOXES), rng.uniform(0.7, 1.15)))
            x += w + rng.randint(1, 4)
