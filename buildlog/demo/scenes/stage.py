"""The stage: faces in space, lit, sorted by depth and drawn with their soft shadows."""

from dataclasses import dataclass, field
from functools import partial
from random import Random

from PIL import Image, ImageChops, ImageDraw, ImageFilter

from buildlog.demo.scenes import textures
from buildlog.demo.scenes.geometry import HEIGHT, NEAR, WIDTH, Camera, Point, Vec, dot, homography, sub, unit
from buildlog.demo.spec import Colour

LIGHTS: dict[str, Vec] = {
    "left": unit((-0.75, -0.35, 0.85)),
    "right": unit((0.8, -0.3, 0.8)),
    "top": unit((-0.15, -0.35, 1.0)),
    "evening": unit((-1.0, 0.1, 0.5)),
    "window": unit((0.55, 0.55, 0.75)),
}
SHADOW_SCALE = 4  # shadows are drawn at a quarter of the size: they are blurred anyway


@dataclass(frozen=True)
class Skin:
    """How a surface takes light: `gloss` for paint and oil, `metal` for bare metal that mirrors the shop."""

    colour: Colour
    gloss: float = 0.15
    metal: float = 0.0
    glow: float = 0.0


@dataclass
class Stage:
    """Collects faces and pictures in space, then draws them back to front."""

    camera: Camera
    light: Vec
    rng: Random
    faces: list[tuple[float, list[Point], Colour]] = field(default_factory=list)
    decals: list[tuple[float, list[Point], Image.Image]] = field(default_factory=list)
    shadows: list[list[Point]] = field(default_factory=list)
    receiver: int = 2  # axis of the plane that takes the shadows: 2 a bench or floor, 1 a wall
    level: float = 0.0
    casting: bool = True

    def __post_init__(self) -> None:
        self.place, self.forward, self.right, self.up = self.camera.axes()

    def project(self, p: Vec) -> tuple[float, float, float]:
        """Return pixel x, pixel y and depth [m] of a point."""
        v = sub(p, self.place)
        depth = dot(v, self.forward)
        k = self.camera.focal / max(depth, NEAR)
        return WIDTH / 2 + k * dot(v, self.right), HEIGHT / 2 - k * dot(v, self.up), depth

    def lit(self, skin: Skin, normal: Vec, at: Vec) -> Colour:
        """Return the colour of a small face: diffuse light, sky light, and a mirror of the shop for metal."""
        view = unit(sub(self.place, at))
        facing = dot(normal, self.light)
        level = 0.44 + 0.13 * normal[2] + 0.68 * max(0.0, facing) + skin.glow
        n_v = dot(normal, view)
        mirror: Vec = (2 * n_v * normal[0] - view[0], 2 * n_v * normal[1] - view[1], 2 * n_v * normal[2] - view[2])
        if skin.metal:
            lamp = max(0.0, 1 - abs(mirror[2] - 0.62) * 4)
            room = 0.34 + 0.5 * max(-0.5, mirror[2]) + 0.75 * lamp + 0.12 * mirror[0] * (1 if self.light[0] > 0 else -1)
            level = level * (1 - skin.metal) + skin.metal * max(0.12, room + 0.28 * max(0.0, facing))
        shine = skin.gloss * max(0.0, dot(mirror, self.light)) ** 24 * 255
        r, g, b = skin.colour
        return (
            max(0, min(255, int(r * level + shine))),
            max(0, min(255, int(g * level + shine))),
            max(0, min(255, int(b * level + shine * 0.94))),
        )

    def face(self, points: list[Vec], skin: Skin, normal: Vec, *, nudge: float = 0.0, both: bool = False) -> None:
        """Add one flat face; seen from its back it is left out, unless `both`. nudge [m] lifts it over a neighbour."""
        n = len(points)
        middle: Vec = (sum(p[0] for p in points) / n, sum(p[1] for p in points) / n, sum(p[2] for p in points) / n)
        facing = dot(normal, self.light)
        if self.casting and (facing > 0 or both):
            self.cast(points)
        if dot(normal, sub(self.place, middle)) <= 0:
            if not both:
                return
            normal = (-normal[0], -normal[1], -normal[2])
        flat = [self.project(p) for p in points]
        if min(p[2] for p in flat) <= NEAR:
            return
        depth = sum(p[2] for p in flat) / n - nudge
        self.faces.append((depth, [(p[0], p[1]) for p in flat], self.lit(skin, normal, middle)))

    def cast(self, points: list[Vec]) -> None:
        axis, light = self.receiver, self.light
        if abs(light[axis]) < 0.05:
            return
        spots: list[Point] = []
        for p in points:
            t = (p[axis] - self.level) / light[axis]
            x, y, depth = self.project((p[0] - light[0] * t, p[1] - light[1] * t, p[2] - light[2] * t))
            if depth <= NEAR:
                return
            spots.append((x / SHADOW_SCALE, y / SHADOW_SCALE))
        self.shadows.append(spots)

    def decal(self, corners: list[Vec], picture: Image.Image, *, nudge: float = 0.004, shade: bool = True) -> None:
        """Add a picture on four corners: top left, top right, bottom right, bottom left as one reads it."""
        flat = [self.project(p) for p in corners]
        if min(p[2] for p in flat) <= NEAR:
            return
        if shade:
            a, b = sub(corners[1], corners[0]), sub(corners[3], corners[0])
            normal = unit((b[1] * a[2] - b[2] * a[1], b[2] * a[0] - b[0] * a[2], b[0] * a[1] - b[1] * a[0]))
            level = min(1.0, 0.52 + 0.12 * normal[2] + 0.52 * max(0.0, dot(normal, self.light)))
            picture = picture.point(partial(_dimmed, level=level))
        depth = sum(p[2] for p in flat) / 4 - nudge
        self.decals.append((depth, [(p[0], p[1]) for p in flat], picture))

    def ground(self, canvas: Image.Image, texture: Image.Image, corners: list[Vec]) -> None:
        """Lay a texture over a large flat rectangle given by three corners' worth of points near the target."""
        flat = [self.project(p) for p in corners]
        back = homography([(p[0], p[1]) for p in flat], _inside(texture.size))
        laid = texture.transform(canvas.size, Image.Transform.PERSPECTIVE, back, Image.Resampling.BILINEAR)
        mask = Image.new("L", canvas.size, 0)
        ImageDraw.Draw(mask).polygon([(p[0], p[1]) for p in flat], fill=255)
        canvas.paste(laid, (0, 0), mask)

    def shade_ground(self, canvas: Image.Image, strength: float = 0.62) -> Image.Image:
        """Return the canvas darkened where things keep the light off: a tight and a wide shadow."""
        size = (WIDTH // SHADOW_SCALE, HEIGHT // SHADOW_SCALE)
        mask = Image.new("L", size, 0)
        pen = ImageDraw.Draw(mask)
        for spot in self.shadows:
            pen.polygon(spot, fill=255)
        soft = ImageChops.add(mask.filter(ImageFilter.GaussianBlur(3)), mask.filter(ImageFilter.GaussianBlur(11)), 2)
        light = soft.point([round(255 - v * strength) for v in range(256)]).resize(canvas.size, textures.BICUBIC)
        return ImageChops.multiply(canvas, Image.merge("RGB", (light, light, light)))

    def draw(self, canvas: Image.Image) -> None:
        """Draw all faces and decals, the furthest first."""
        pen = ImageDraw.Draw(canvas)
        stock: list[tuple[float, list[Point], Colour | Image.Image]] = [*self.faces, *self.decals]
        for _, points, surface in sorted(stock, key=lambda item: -item[0]):
            if isinstance(surface, Image.Image):
                _paste_quad(canvas, points, surface)
            else:
                pen.polygon(points, fill=surface, outline=surface)


def _inside(size: tuple[int, int]) -> list[Point]:
    w, h = size  # a pixel in from the edge: what lies outside a picture would be laid as black
    return [(1, 1), (w - 1, 1), (w - 1, h - 1), (1, h - 1)]


def _dimmed(value: int, level: float) -> int:
    return int(value * level)


def _paste_quad(canvas: Image.Image, quad: list[Point], picture: Image.Image) -> None:
    left, top = max(0, int(min(p[0] for p in quad))), max(0, int(min(p[1] for p in quad)))
    right = min(canvas.width, int(max(p[0] for p in quad)) + 1)
    bottom = min(canvas.height, int(max(p[1] for p in quad)) + 1)
    if right <= left or bottom <= top:
        return
    local = [(x - left, y - top) for x, y in quad]
    back = homography(local, _inside(picture.size))
    size = (right - left, bottom - top)
    laid = picture.convert("RGB").transform(size, Image.Transform.PERSPECTIVE, back, Image.Resampling.BILINEAR)
    if picture.mode == "RGBA":
        mask = picture.getchannel("A").transform(size, Image.Transform.PERSPECTIVE, back, Image.Resampling.BILINEAR)
    else:
        mask = Image.new("L", size, 0)
        ImageDraw.Draw(mask).polygon(local, fill=255)
    canvas.paste(laid, (left, top), mask)
