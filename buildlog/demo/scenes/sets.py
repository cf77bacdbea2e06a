"""Where a scene stands: camera, ground and the odd things that lie about in a shop."""

from collections.abc import Callable
from dataclasses import dataclass
from random import Random

from PIL import Image, ImageDraw, ImageFont

from buildlog.demo.scenes import textures
from buildlog.demo.scenes.geometry import Camera, Vec
from buildlog.demo.scenes.solids import box, cylinder, lathe
from buildlog.demo.scenes.stage import LIGHTS, Skin, Stage
from buildlog.demo.spec import Colour, PhotoSpec


@dataclass(frozen=True)
class View:
    """How a scene is looked at. ground is bench, floor, steel, cloth, wall or none; depth [m] how far it reaches."""

    target: Vec = (0.0, 0.0, 0.1)
    elevation: float = 32.0
    distance: float = 1.6
    azimuth: float = 0.0
    focal: float = 1900.0
    ground: str = "bench"
    colour: Colour = (176, 138, 94)
    half_width: float = 1.5
    depth: tuple[float, float] = (-1.0, 0.75)
    focus: tuple[float, float] = (0.3, 0.8)


Build = Callable[[Stage, PhotoSpec], None]


def open_stage(spec: PhotoSpec, view: View, rng: Random) -> Stage:
    """Return the empty stage of a photo: its camera and its light."""
    camera = Camera(view.target, view.azimuth + spec.angle, view.elevation, view.distance / spec.zoom, view.focal)
    stage = Stage(camera, LIGHTS[spec.light], rng)
    if view.ground == "wall":
        stage.receiver = 1
    return stage


def put_ground(canvas: Image.Image, stage: Stage, view: View) -> Image.Image:
    """Lay the bench, floor or wall that the scene stands on."""
    if view.ground == "none":
        return canvas
    size = (1200, 800)
    makers: dict[str, Callable[[Random, tuple[int, int], Colour], Image.Image]] = {
        "bench": textures.wood,
        "floor": textures.concrete,
        "steel": textures.brushed,
        "cloth": textures.woven,
        "wall": textures.concrete,
    }
    texture = makers[view.ground](stage.rng, size, view.colour)
    if view.ground == "bench":
        _planks(texture, stage.rng)
    w, (near, far) = view.half_width, view.depth
    if view.ground == "wall":
        corners: list[Vec] = [(-w, 0.0, far), (w, 0.0, far), (w, 0.0, near), (-w, 0.0, near)]
    else:
        corners = [(-w, far, 0.0), (w, far, 0.0), (w, near, 0.0), (-w, near, 0.0)]
    stage.ground(canvas, texture, corners)
    return canvas


def _planks(texture: Image.Image, rng: Random) -> None:
    pen = ImageDraw.Draw(texture)
    for y in range(160, 800, 160):
        pen.line((0, y, 1200, y), fill=(70, 50, 32), width=3)
    for _ in range(26):
        x, y = rng.randint(0, 1180), rng.randint(0, 780)
        shade = rng.choice([(94, 68, 44), (120, 92, 62), (206, 180, 140), (60, 52, 46)])
        pen.line((x, y, x + rng.randint(-60, 60), y + rng.randint(-18, 18)), fill=shade, width=rng.randint(1, 3))


def strew(stage: Stage, spec: PhotoSpec, reach: float = 1.0, away: float = 0.35) -> None:
    """Put odd things behind the subject: a can, a pencil, a rag, a steel rule, more of them with more clutter."""
    rng = stage.rng
    things = [_can, _pencil, _block, _rule, _jar, _tape]
    for i in range(spec.clutter * 2):
        side = -1 if i % 2 else 1
        x, y = side * rng.uniform(0.28, 0.62) * reach, away * reach + rng.uniform(-0.12, 0.22) * reach
        things[rng.randrange(len(things))](stage, x, y, reach)


def _can(stage: Stage, x: float, y: float, k: float) -> None:
    colour = stage.rng.choice([(58, 92, 122), (160, 152, 138), (150, 74, 52), (72, 98, 72)])
    r, h = 0.045 * k, stage.rng.uniform(0.09, 0.16) * k
    lathe(stage, (x, y, 0), (0, 0, 1), [(0, r), (h, r), (h, r * 0.9), (h - 0.01 * k, 0)], Skin(colour, 0.5))


def _jar(stage: Stage, x: float, y: float, k: float) -> None:
    r = 0.035 * k
    lathe(stage, (x, y, 0), (0, 0, 1), [(0, r), (0.07 * k, r), (0.075 * k, r * 0.85)], Skin((196, 200, 190), 0.8))
    lathe(stage, (x, y, 0.075 * k), (0, 0, 1), [(0, r), (0.018 * k, r), (0.018 * k, 0)], Skin((64, 66, 70), 0.4))


def _pencil(stage: Stage, x: float, y: float, k: float) -> None:
    dx, dy = stage.rng.uniform(-0.09, 0.09) * k, stage.rng.uniform(-0.03, 0.03) * k
    cylinder(
        stage,
        (x - dx, y - dy - 0.1 * k, 0.005 * k),
        (x + dx, y + dy - 0.1 * k, 0.005 * k),
        0.004 * k,
        Skin((206, 150, 52), 0.3),
        n=8,
    )


def _block(stage: Stage, x: float, y: float, k: float) -> None:
    size = (stage.rng.uniform(0.06, 0.14) * k, 0.05 * k, stage.rng.uniform(0.03, 0.06) * k)
    box(stage, (x, y, size[2] / 2), size, Skin((190, 158, 112)), turn=stage.rng.uniform(-0.6, 0.6))


def _rule(stage: Stage, x: float, y: float, k: float) -> None:
    box(
        stage,
        (x, y - 0.06 * k, 0.002 * k),
        (0.3 * k, 0.025 * k, 0.002 * k),
        Skin((190, 194, 196), 0.3, 0.7),
        turn=stage.rng.uniform(-0.9, 0.9),
    )


def _tape(stage: Stage, x: float, y: float, k: float) -> None:
    r = 0.05 * k
    skin = Skin(stage.rng.choice([(214, 196, 140), (60, 86, 120), (200, 200, 196)]), 0.2)
    lathe(stage, (x, y, 0), (0, 0, 1), [(0, r), (0.025 * k, r), (0.025 * k, r * 0.72), (0, r * 0.7)], skin)


def card(
    lines: tuple[str, ...] | list[str],
    size: tuple[int, int],
    *,
    paper: Colour = (244, 241, 230),
    ink: Colour = (28, 32, 38),
    band: Colour | None = None,
) -> Image.Image:
    """Return a label, task card or display with its lines written large enough to be read in the photo."""
    picture = Image.new("RGB", size, paper)
    pen = ImageDraw.Draw(picture)
    top = 0
    if band:
        top = size[1] // 7
        pen.rectangle((0, 0, size[0], top), fill=band)
    count = max(1, len(lines))
    step = (size[1] - top) / (count + 0.5)
    for i, line in enumerate(lines):
        height = step * (0.72 if i == 0 else 0.6)
        height = min(height, size[0] * 1.75 / max(6, len(line)))
        pen.text((size[0] * 0.05, top + step * (0.3 + i)), line, fill=ink, font=ImageFont.load_default(height))
    return picture
