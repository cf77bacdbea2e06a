"""Parts and batches for tests, and the words that the page addresses of parts take."""

import itertools
from typing import Any
from uuid import uuid4

from buildlog.aircraft.models import Aircraft
from buildlog.parts import actions
from buildlog.parts.models import Batch, Part
from tests import make

_count = itertools.count(1)


def part(*, aircraft: Aircraft, name: str = "Carburettor", **more: Any) -> Part:
    """Return an accepted part."""
    said = {"number": f"P-{next(_count)}", "origin": "industrial-new", "inspection": "accepted"} | more
    return actions.add_part(aircraft=aircraft, by=make.builder_of(aircraft), client_id=uuid4(), name=name, **said)


def batch(*, aircraft: Aircraft, material: str = "Birch plywood 1.5 mm", **more: Any) -> Batch:
    """Return a batch of material."""
    said = {"code": f"B-{next(_count)}"} | more
    by = make.builder_of(aircraft)
    return actions.add_batch(aircraft=aircraft, by=by, client_id=uuid4(), material=material, **said)


ARGUMENTS = {
    "part_id": lambda aircraft: part(aircraft=aircraft).id,
    "batch_id": lambda aircraft: batch(aircraft=aircraft).id,
}
