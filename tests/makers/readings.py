"""Instruments, characteristics and readings for tests, and the words that the page addresses of readings take."""

import datetime as dt
import itertools
from typing import Any
from uuid import uuid4

from buildlog.aircraft.models import Aircraft
from buildlog.readings import actions
from buildlog.readings.models import Characteristic, Instrument, Reading
from tests import make

_count = itertools.count(1)
DAY = dt.date(2026, 5, 9)


def instrument(*, aircraft: Aircraft, **more: Any) -> Instrument:
    """Return a caliper whose calibration holds through 2026."""
    said: dict[str, Any] = {"code": f"CAL-{next(_count)}", "title": "Caliper", "uncertainty": "0.05 mm"}
    said |= {"calibrated_on": dt.date(2025, 12, 1), "due_on": dt.date(2026, 12, 1), "certificate": None} | more
    return actions.add_instrument(aircraft=aircraft, by=make.builder_of(aircraft), client_id=uuid4(), **said)


def characteristic(*, aircraft: Aircraft, **more: Any) -> Characteristic:
    """Return a length of 25 mm with 0.2 mm to both sides."""
    said = {"code": f"C-{next(_count)}", "title": "Spacer width", "unit": "mm", "plan_sheet": "12"}
    said |= {"nominal": "25", "lower": "24.8", "upper": "25.2"} | more
    return actions.add_characteristic(aircraft=aircraft, by=make.builder_of(aircraft), client_id=uuid4(), **said)


def reading(*, characteristic: Characteristic, entered: str = "25.0", **more: Any) -> Reading:
    """Return a reading of a characteristic by the builder."""
    aircraft = characteristic.aircraft
    said = {"by": make.builder_of(aircraft), "client_id": uuid4(), "read_on": DAY} | more
    return actions.record_reading(aircraft=aircraft, characteristic=characteristic, entered=entered, **said)


ARGUMENTS = {
    "characteristic_id": lambda aircraft: characteristic(aircraft=aircraft).id,
    "instrument_id": lambda aircraft: instrument(aircraft=aircraft).id,
}
