"""Snapshots for tests, and the words that the page addresses of calculations take."""

from typing import Any
from uuid import uuid4

from buildlog.aircraft.models import Aircraft
from buildlog.calcs.actions import take_snapshot
from buildlog.calcs.models import Snapshot
from tests import make

TORQUE = {"torque": "175 N*m", "speed": "2600"}


def snapshot(*, aircraft: Aircraft, method: str = "shaft-power", **more: Any) -> Snapshot:
    """Return a kept run."""
    said = {"given": TORQUE} | more
    by = make.builder_of(aircraft)
    return take_snapshot(aircraft=aircraft, by=by, client_id=uuid4(), method=method, **said)


ARGUMENTS = {
    "snapshot_id": lambda aircraft: snapshot(aircraft=aircraft).id,
    "calculation-run:key": lambda aircraft: "tip-mach",
}
