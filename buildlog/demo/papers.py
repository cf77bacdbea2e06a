"""The demo's papers: one grey page each, as a scanner in the shop would give it."""

import datetime as dt
from io import BytesIO
from random import Random

from PIL import ImageDraw, ImageFont

from buildlog.demo.clock import moment
from buildlog.demo.scenes import textures

WIDTH, HEIGHT, MARGIN = 1000, 1414, 96
NOTE = "Invented for the demo aircraft. It proves nothing."


def paper(title: str, lines: list[str], day: dt.date) -> bytes:
    """Return a one-page PDF with the title and lines as a scan, the same bytes every time."""
    rng = Random(title)
    page = textures.tinted(textures.noise(rng, (WIDTH // 2, HEIGHT // 2)), (232, 231, 226), (250, 249, 246))
    page = page.resize((WIDTH, HEIGHT), textures.BILINEAR)
    pen = ImageDraw.Draw(page)
    pen.line((MARGIN, 230, WIDTH - MARGIN, 230), fill=(60, 64, 72), width=3)
    pen.text((MARGIN, 150), title[:52], fill=(34, 38, 46), font=ImageFont.load_default(34))
    for number, line in enumerate(lines):
        pen.text((MARGIN, 290 + number * 62), line, fill=(44, 48, 56), font=ImageFont.load_default(30))
    pen.text((WIDTH - MARGIN - 190, 90), f"{day:%Y-%m-%d}", fill=(60, 64, 72), font=ImageFont.load_default(28))
    _scrawl(pen, rng)
    pen.text((MARGIN, HEIGHT - 96), NOTE, fill=(120, 122, 126), font=ImageFont.load_default(22))
    turned = page.rotate(rng.uniform(-0.7, 0.7), textures.BICUBIC, fillcolor=(238, 238, 236))
    out, made = BytesIO(), moment(day, "12:00").utctimetuple()
    turned.convert("L").save(out, "PDF", resolution=120, quality=70, title=title, creationDate=made, modDate=made)
    return out.getvalue()


def _scrawl(pen: ImageDraw.ImageDraw, rng: Random) -> None:
    x, y = float(MARGIN + 30), float(HEIGHT - 250)
    points = [(x, y)]
    for _ in range(26):
        x, y = x + rng.uniform(2, 16), HEIGHT - 250 + rng.uniform(-46, 30)
        points.append((x, y))
    pen.line(points, fill=(66, 74, 120), width=3, joint="curve")
    pen.line((MARGIN, HEIGHT - 200, MARGIN + 420, HEIGHT - 200), fill=(150, 152, 156), width=2)
