"""The demo's photos: read their descriptions and draw them, the same bytes every time."""

import tomllib
from pathlib import Path
from random import Random

from buildlog.demo.scenes import SCENES, backdrop, finish
from buildlog.demo.scenes.geometry import HEIGHT, WIDTH
from buildlog.demo.scenes.sets import open_stage, put_ground
from buildlog.demo.spec import PhotoSpec

__all__ = ["PhotoSpec", "all_specs", "draw_photo"]

FIXTURE = Path(__file__).resolve().parent.parent.parent / "fixtures" / "demo" / "photos.toml"


def all_specs(path: Path = FIXTURE) -> list[PhotoSpec]:
    """Return every photo of the demo in the order of the file."""
    rows = tomllib.loads(path.read_text(encoding="utf-8"))["photo"]
    specs = []
    for row in rows:
        colour, lines = row.pop("colour", None), row.pop("lines", [])
        if colour:
            row["colour"] = tuple(colour)
        specs.append(PhotoSpec(lines=tuple(lines), **row))
    return specs


def draw_photo(spec: PhotoSpec) -> bytes:
    """Return the JPEG of one photo, with EXIF. Raises KeyError for a scene that is not drawn here."""
    build, view = SCENES[spec.scene]
    rng = Random(spec.key)
    stage = open_stage(spec, view, rng)
    build(stage, spec)
    canvas = backdrop.shop(rng, (WIDTH, HEIGHT), spec.light)
    canvas = put_ground(canvas, stage, view)
    canvas = stage.shade_ground(canvas)
    stage.draw(canvas)
    return finish.written(finish.developed(canvas, spec, rng, view.focus), spec)
