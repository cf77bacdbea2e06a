"""Numbers with units as people type them; the one place that touches the unit library.

Traps this file keeps away: a revolution is not 2 pi (rpm never goes through the library), a temperature difference is
not a temperature, a pound is a mass and lbf a force, and a comma is a decimal point.
"""

import math
import re
from dataclasses import dataclass
from fractions import Fraction
from functools import cache
from typing import Any

from buildlog.errors import Refused

NUMBER = r"[+-]?(?:\d+(?:[.,]\d*)?|[.,]\d+)(?:[eE][+-]?\d{1,3})?"
TYPED = re.compile(
    rf"\s*(?P<value>[+-]?\d+\s+\d+/\d+|[+-]?\d+/\d+|{NUMBER})\s*"
    rf"(?:(?:±|\+/-|\+-)\s*(?P<spread>{NUMBER})\s*)?(?P<unit>\D.*?)?\s*\Z",
    re.S,
)
SPEEDS = {"rpm", "1/min", "/min", "min-1", "min^-1", "rev/min", "r/min"}
ALIASES = {
    "fpm": "foot/minute",
    "gph": "gallon/hour",
    "lph": "liter/hour",
    "kt": "knot",
    "kts": "knot",
    "hp": "horsepower",
    "bhp": "horsepower",
    "ps": "metric_horsepower",
    "nm": "newton*meter",
    "in-lb": "inch*pound_force",
    "in·lb": "inch*pound_force",
    "lbf·in": "pound_force*inch",
    "lbf-in": "pound_force*inch",
    "lbf·ft": "pound_force*foot",
    "lbf-ft": "pound_force*foot",
    "lbf-in.": "pound_force*inch",
    "ah": "ampere*hour",
    "°c": "degC",
    "°f": "degF",
    "c": "degC",
    "f": "degF",
    "°": "degree",
    "cc": "cm**3",
    "ccm": "cm**3",
    "lbs": "pound",
    "ltr": "liter",
    "gal": "gallon",
    '"': "inch",
    "mph": "mile/hour",
    "%": "percent",
}
LONGEST = 60  # signs of a number with its unit


@dataclass(frozen=True)
class Typed:
    """A number as it was typed: `value` and `spread` (expanded uncertainty, k = 2) in the declared unit."""

    entered: str
    value: float
    spread: float | None


@cache
def _registry() -> Any:
    import pint

    return pint.UnitRegistry(autoconvert_offset_to_baseunit=False)


def read(text: str, unit: str, *, name: str | None = None) -> Typed:
    """Return what was typed in `unit`; a bare number is taken to be in it. Raises Refused with a plain sentence."""
    if len(text) > LONGEST:
        raise Refused(f"Give one number and its unit, in at most {LONGEST} signs.", field=name)
    match = TYPED.match(text)
    if match is None:
        raise Refused(f"{_short(text)} is not a number. Write it like 12.5{_with(unit)}.", field=name)
    value = _number(match["value"], name)
    spread = _number(match["spread"], name) if match["spread"] else None
    if spread is not None and spread < 0:
        raise Refused("The uncertainty after ± is a positive number.", field=name)
    given = (match["unit"] or "").strip()
    if not given or given == unit:
        return Typed(text.strip(), value, spread)
    turned = convert(value, given, unit, name=name)
    wide = None if spread is None else abs(convert(value + spread, given, unit, name=name) - turned)
    return Typed(text.strip(), turned, wide)


def _number(text: str, name: str | None) -> float:
    whole, _, part = text.strip().rpartition(" ")
    try:
        if "/" in text:
            value = float(Fraction(part)) + (float(whole) if whole.strip() else 0.0)
        else:
            value = float(text.replace(",", "."))
    except (ValueError, ZeroDivisionError, OverflowError):
        value = math.nan
    if not math.isfinite(value):
        raise Refused(f"{_short(text)} is not a number that can be worked with.", field=name)
    return value


def convert(value: float, given: str, wanted: str, *, name: str | None = None) -> float:
    """Return `value` of unit `given` in unit `wanted`; Refused when the one cannot become the other."""
    if given == wanted:
        return value
    if given.lower() in SPEEDS or wanted in SPEEDS:
        if given.lower() in SPEEDS and wanted in SPEEDS:
            return value
        raise Refused(f"{_short(given)} is not a speed in rpm.", field=name)
    library, spelled = _registry(), _spell(given)
    import pint

    try:
        turned = library.Quantity(value, spelled).to(_spell(wanted)).magnitude
    except pint.errors.UndefinedUnitError:
        raise Refused(
            f"{_short(given)} is not a unit we know. Here {_unit_words(wanted)} is meant.", field=name
        ) from None
    except (pint.errors.DimensionalityError, pint.errors.OffsetUnitCalculusError):
        hint = " A pound is a mass; torque is lbf*ft or lbf*in." if "lb" in given else ""
        raise Refused(f"{_short(given)} cannot be turned into {_unit_words(wanted)}.{hint}", field=name) from None
    except (
        AttributeError,
        TypeError,
        ValueError,
        SyntaxError,
        KeyError,
        ZeroDivisionError,
        OverflowError,
        RecursionError,
    ):
        raise Refused(f"{_short(given)} is not a unit. Here {_unit_words(wanted)} is meant.", field=name) from None
    if not math.isfinite(turned):
        raise Refused("That is not a number that can be worked with.", field=name)
    return float(turned)


def _spell(unit: str) -> str:
    plain = unit.strip()
    if plain.lower() in ALIASES and plain not in {"F", "C"} | {"Nm"}:
        return ALIASES[plain.lower()]
    if plain in {"F", "C", "Nm"}:
        return {"F": "degF", "C": "degC", "Nm": "newton*meter"}[plain]
    return (
        plain.replace("·", "*").replace("²", "**2").replace("³", "**3").replace("^", "**").replace("µ", "u")
        or "dimensionless"
    )


def can_become(given: str, wanted: str) -> bool:
    """Return whether a value of one unit can be turned into the other."""
    try:
        convert(1.0, given, wanted)
    except Refused:
        return False
    return True


def shown(unit: str) -> str:
    """Return a unit as it is printed: N·m, kg/m³, °C."""
    signs = {
        "**2": "²",
        "**3": "³",
        "delta_degC": "K",
        "degC": "°C",
        "degF": "°F",
        "degree": "°",
        "*": "·",
        "minute": "min",
        "hour": "h",
    }
    for spelled, sign in signs.items():
        unit = unit.replace(spelled, sign)
    return unit


def decimal(value: float) -> str:
    """Return a number as the record keeps it: twelve significant digits, no exponent."""
    from decimal import Decimal

    text = format(Decimal(f"{value:.12g}"), "f")
    return "0" if text in {"-0", "0"} else text


def _short(text: str) -> str:
    plain = " ".join(text.split())
    return f"“{plain[:30]}…”" if len(plain) > 30 else f"“{plain}”"


def _with(unit: str) -> str:
    return f" {shown(unit)}" if unit else ""


def _unit_words(unit: str) -> str:
    return shown(unit) if unit else "a plain number"
