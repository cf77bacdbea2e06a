"""Drawing the demo's photos: the same description gives the same bytes, two at a time ahead of their use."""

from collections.abc import Iterator
from concurrent.futures import Future, ProcessPoolExecutor
from contextlib import contextmanager
from multiprocessing import get_context
from random import Random

from buildlog.demo.scenes import SCENES, backdrop, finish
from buildlog.demo.scenes.geometry import HEIGHT, WIDTH
from buildlog.demo.scenes.sets import open_stage, put_ground
from buildlog.demo.spec import PhotoSpec

PROCESSES = 2
Drawn = dict[str, "Future[bytes]"]


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


@contextmanager
def drawing(specs: list[PhotoSpec]) -> Iterator[Drawn]:
    """Draw in processes of their own, in the order given; the result of each stands under its key."""
    with ProcessPoolExecutor(PROCESSES, mp_context=get_context("spawn")) as pool:
        try:
            yield {spec.key: pool.submit(draw_photo, spec) for spec in specs}
        finally:
            pool.shutdown(cancel_futures=True)
