"""Scenes of a paper on the bench, and of the battery in its tray."""

from random import Random

from PIL import Image, ImageDraw, ImageFont

from buildlog.demo.scenes import textures
from buildlog.demo.scenes.engine import BLACK
from buildlog.demo.scenes.geometry import Vec
from buildlog.demo.scenes.metal import ALLOY, BRASS, STEEL
from buildlog.demo.scenes.sets import strew
from buildlog.demo.scenes.solids import bar, bolt, box, cable, cylinder, lathe
from buildlog.demo.scenes.stage import Skin, Stage
from buildlog.demo.spec import PhotoSpec


def sheet_of(lines: tuple[str, ...], rng: Random, size: tuple[int, int] = (760, 1060)) -> Image.Image:
    """Return a typed page: the lines in large letters, a table of small grey rows, a stamp across its foot."""
    page = Image.blend(Image.new("RGB", size, (240, 238, 230)), textures.concrete(rng, size, (238, 236, 228)), 0.18)
    pen = ImageDraw.Draw(page)
    top = 56
    for i, line in enumerate(lines):
        height = min(54 if i == 0 else 38, size[0] * 1.7 / max(8, len(line)))
        pen.text((56, top), line, fill=(30, 34, 42), font=ImageFont.load_default(height))
        top += 84 if i == 0 else 60
    pen.line((56, top + 6, size[0] - 56, top + 6), fill=(90, 94, 102), width=3)
    for y in range(top + 40, size[1] - 220, 44):
        x = 56
        while x < size[0] - 190:
            wide = rng.randint(24, 96)
            pen.rectangle((x, y, x + wide, y + 11), fill=(128, 130, 136))
            x += wide + rng.randint(10, 26)
        pen.rectangle((size[0] - 150, y, size[0] - 60, y + 11), fill=(104, 106, 112))
    ring = (size[0] - 330, size[1] - 230, size[0] - 90, size[1] - 90)
    pen.ellipse(ring, outline=(70, 84, 140), width=7)
    pen.line((ring[0] + 40, ring[3] - 60, ring[2] - 40, ring[1] + 60), fill=(60, 74, 132), width=6)
    return page


def invoice(stage: Stage, spec: PhotoSpec) -> None:
    """A supplier's paper on the bench, a second one under it, held by a rule and a part out of its bag."""
    under: list[Vec] = [(-0.02, 0.3, 0.001), (0.25, 0.26, 0.001), (0.2, -0.1, 0.001), (-0.07, -0.06, 0.001)]
    stage.decal(under, sheet_of((), stage.rng), nudge=0.0)
    top: list[Vec] = [(-0.2, 0.24, 0.002), (0.06, 0.26, 0.002), (0.09, -0.12, 0.002), (-0.18, -0.14, 0.002)]
    stage.decal(top, sheet_of(spec.lines, stage.rng), nudge=0.01)
    box(stage, (0.0, -0.165, 0.004), (0.4, 0.03, 0.003), Skin((190, 194, 196), 0.3, 0.7), turn=0.05)
    lathe(stage, (0.24, 0.02, 0), (0, 0, 1), [(0, 0.045), (0.02, 0.045), (0.03, 0.03), (0.07, 0.028)], ALLOY, n=44)
    lathe(stage, (0.24, 0.02, 0.07), (0, 0, 1), [(0, 0.028), (0.0, 0.016), (-0.02, 0.016)], BLACK, n=40)
    for k in range(3):
        bolt(stage, (-0.28, 0.16 - k * 0.07, 0.0), (0, 0, 1), 0.012, BRASS if k else STEEL)
    cylinder(stage, (0.14, 0.22, 0.006), (0.3, 0.29, 0.006), 0.005, Skin((206, 150, 52), 0.3), n=10)
    strew(stage, spec, 0.7, 0.5)


def battery_tray(stage: Stage, spec: PhotoSpec) -> None:
    """A sealed battery in its alloy tray, clamped by a bar, cables with boots on its posts."""
    box(stage, (0, 0, 0.075), (0.36, 0.24, 0.006), ALLOY)
    for y in (-0.12, 0.12):
        box(stage, (0, y, 0.1), (0.36, 0.005, 0.056), ALLOY)
    for x in (-0.18, 0.18):
        box(stage, (x, 0, 0.1), (0.005, 0.24, 0.056), ALLOY)
    for x in (-0.26, 0.26):
        cylinder(stage, (x, -0.5, 0.055), (x, 0.6, 0.055), 0.015, Skin(spec.colour, 0.45), n=18)
    cylinder(stage, (-0.5, 0.14, 0.055), (0.5, 0.14, 0.055), 0.012, Skin(spec.colour, 0.45), n=16)
    case = Skin((46, 50, 58), 0.2)
    box(stage, (0, 0, 0.17), (0.31, 0.19, 0.18), case)
    box(stage, (0, 0, 0.268), (0.314, 0.194, 0.02), Skin((58, 62, 70), 0.25))
    if spec.lines:
        face: list[Vec] = [(-0.1, -0.0965, 0.23), (0.1, -0.0965, 0.23), (0.1, -0.0965, 0.11), (-0.1, -0.0965, 0.11)]
        stage.decal(face, _plate(spec.lines), nudge=0.03)
    for x, tone in ((-0.12, (170, 40, 36)), (0.12, (34, 36, 40))):
        lathe(stage, (x, 0.03, 0.278), (0, 0, 1), [(0, 0.012), (0.022, 0.011), (0.022, 0)], BRASS, n=22)
        boot = Skin(tone, 0.35)
        lathe(stage, (x, 0.03, 0.288), (0, 0, 1), [(0, 0.024), (0.02, 0.022), (0.032, 0.012), (0.034, 0)], boot, n=28)
        line: list[Vec] = [(x, 0.03, 0.3), (x * 1.3, 0.13, 0.33), (x * 2.0, 0.3, 0.2), (x * 2.2, 0.6, 0.08)]
        cable(stage, line, 0.009, boot)
    bar(stage, (-0.17, -0.02, 0.287), (0.17, -0.02, 0.287), 0.03, 0.012, ALLOY, parts=4)
    for x in (-0.165, 0.165):
        cylinder(stage, (x, -0.02, 0.09), (x, -0.02, 0.31), 0.004, STEEL, n=12)
        bolt(stage, (x, -0.02, 0.293), (0, 0, 1), 0.008, STEEL)
    strew(stage, spec, 1.4, 0.6)


def _plate(lines: tuple[str, ...]) -> Image.Image:
    plate = Image.new("RGB", (500, 300), (226, 226, 220))
    pen = ImageDraw.Draw(plate)
    pen.rectangle((0, 0, 500, 54), fill=(52, 74, 110))
    for i, line in enumerate(lines[:3]):
        pen.text((26, 74 + i * 72), line, fill=(30, 34, 40), font=ImageFont.load_default(52 if i == 0 else 42))
    return plate
