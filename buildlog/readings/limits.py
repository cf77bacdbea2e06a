"""What a measured value says against its limits, and how far its instrument can be trusted on that day."""

import datetime as dt
from decimal import Decimal

from buildlog.errors import Refused
from buildlog.methods import units
from buildlog.methods.formulas.tolerance_verdict import verdict
from buildlog.readings.models import Characteristic, Instrument

NO_LIMITS, NOT_MEASURED = "no-limits", "not-measured"
UNITS = {  # what a shop measures in, by kind; the first of each is the SI one
    "Length": ("mm", "cm", "m", "in", "ft"),
    "Mass": ("kg", "g", "lb"),
    "Force": ("N", "lbf"),
    "Torque": ("N*m", "lbf*in", "lbf*ft"),
    "Angle": ("degree",),
    "Temperature": ("degC", "degF"),
    "Pressure": ("kPa", "bar", "psi"),
    "Volume": ("L", "gal"),
    "Flow": ("L/h", "L/min", "gal/h"),
    "Speed": ("rpm", "m/s", "km/h", "kt"),
    "Electricity": ("V", "A", "ohm", "Ah"),
    "Time": ("s", "min", "h"),
    "Without a unit": ("", "%"),
}
EVERY_UNIT = tuple(unit for group in UNITS.values() for unit in group)


def day(on: dt.date) -> str:
    """Return a day as pages say it: 14 Mar 2026."""
    return f"{on.day} {on:%b %Y}"


def decimal_of(text: str) -> Decimal | None:
    """Return a kept number; None for one that was left out."""
    return Decimal(text) if text else None


def verdict_of(value: str, uncertainty: str, characteristic: Characteristic) -> str:
    """Return within, undecided, outside, or no-limits; all in the characteristic's unit."""
    lower, upper = decimal_of(characteristic.lower), decimal_of(characteristic.upper)
    if lower is None and upper is None:
        return NO_LIMITS
    return verdict(Decimal(value), decimal_of(uncertainty) or Decimal(0), lower, upper)


def check_uncertainty(said: str) -> None:
    """Refuse an instrument's uncertainty that has no number, no unit, or one that nothing is measured in."""
    match = units.TYPED.match(said)
    unit = (match["unit"] or "").strip() if match else ""
    if match is None or not unit:
        raise Refused("Give the uncertainty with its unit, like 0.5 kg or 1 %.", field="uncertainty")
    if not any(units.can_become(unit, known) for known in EVERY_UNIT if known):
        raise Refused(f"“{unit[:30]}” is not a unit that we know.", field="uncertainty")
    if units.read(said, unit, name="uncertainty").value < 0:
        raise Refused("An uncertainty is a positive number.", field="uncertainty")


def expanded(instrument: Instrument, value: float, unit: str) -> float | None:
    """Return an instrument's expanded uncertainty (k = 2) at a value, in `unit`; None when it states none.

    A share ("1 %") is of the reading. Refused at `instrument` when it measures something else.
    """
    match = units.TYPED.match(instrument.uncertainty)
    if match is None or not match["unit"]:
        return None
    given = match["unit"].strip()
    spread = units.read(instrument.uncertainty, given).value
    if given == "%" and unit != "%":
        return abs(value) * spread / 100
    if not units.can_become(given, unit):
        words = units.shown(unit) or "a plain number"
        raise Refused(f"{instrument} measures in {given}, here {words} is asked. Choose another.", field="instrument")
    # As a difference of two readings: a step of one degree Celsius is not one degree.
    start = units.convert(value, unit, given)
    return abs(units.convert(start + spread, given, unit) - value)


def calibration_words(instrument: Instrument | None, on: dt.date) -> str:
    """Return what is wrong with an instrument's calibration on a day; "" when it held."""
    if instrument is None:
        return "no instrument named"
    if instrument.calibrated_on is None and instrument.due_on is None:
        return "no calibration on the record"
    if instrument.due_on and on > instrument.due_on:
        return f"out of calibration since {day(instrument.due_on)}"
    if instrument.calibrated_on and on < instrument.calibrated_on:
        return f"calibrated only afterwards, on {day(instrument.calibrated_on)}"
    return ""
