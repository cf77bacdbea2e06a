"""Tip speed of a propeller and its Mach number, with the limits solved back."""

import math

from buildlog.errors import Refused
from buildlog.methods.declare import Example, Input, Limit, Method, Output, Plot, Series, Text, Values

GAS, GAMMA, ZERO = 287.05, 1.4, 273.15  # J/(kg·K), -, K
COLD, MILD, HOT = -20.0, 15.0, 40.0  # °C


def compute(
    diameter: float,
    speed: float,
    airspeed: float,
    temperature: float,
    mach_limit: float | None = None,
    limit_source: str = "",
) -> dict[str, float | None]:
    """Return tip speeds [m/s], tip Mach numbers, and speed [rpm] and diameter [m] at the limit.

    diameter [m], speed of the propeller [rpm], true airspeed [m/s], temperature [°C].
    Source: helical tip Mach number in the sense of 14 CFR part 36 appendix G.
    """
    sound = math.sqrt(GAMMA * GAS * (temperature + ZERO))
    tip = math.pi * diameter * speed / 60
    helical = math.hypot(tip, airspeed)
    found: dict[str, float | None] = {
        "tip_speed": tip,
        "helical_tip_speed": helical,
        "tip_mach_static": tip / sound,
        "tip_mach": helical / sound,
        "speed_limit": None,
        "diameter_limit": None,
    }
    return found | (_limits(diameter, speed, airspeed, sound, mach_limit) if mach_limit is not None else {})


def _limits(diameter: float, speed: float, airspeed: float, sound: float, limit: float) -> dict[str, float | None]:
    left = (limit * sound) ** 2 - airspeed**2
    if left <= 0:
        raise Refused(
            "The limit lies below the Mach number of flight itself; no speed would meet it.", field="mach_limit"
        )
    around = math.sqrt(left)
    return {"speed_limit": around * 60 / (math.pi * diameter), "diameter_limit": around * 60 / (math.pi * speed)}


def steps(given: Values, found: Values) -> list[str]:
    """Tell the sum line by line."""
    kelvin = given["temperature"] + ZERO
    sound = math.sqrt(GAMMA * GAS * kelvin)
    told = [
        f"u = π · D · n / 60 = π · {given['diameter']:g} · {given['speed']:g} / 60 = {found['tip_speed']:.2f} m/s",
        f"w = √(u² + V²) = √({found['tip_speed']:.2f}² + {given['airspeed']:g}²) = "
        f"{found['helical_tip_speed']:.2f} m/s",
        f"a = √(1.4 · 287.05 · {kelvin:.2f}) = {sound:.2f} m/s",
        f"static: M = u / a = {found['tip_mach_static']:.3f}; in flight: M = w / a = {found['tip_mach']:.3f}",
    ]
    if found["speed_limit"] is not None:
        told.append(f"speed at M {given['mach_limit']:g}: √((M·a)² − V²) · 60 / (π·D) = {found['speed_limit']:.0f} rpm")
        told.append(f"diameter at M {given['mach_limit']:g} and this speed = {found['diameter_limit']:.3f} m")
    return told


def plot(given: Values, found: Values) -> Plot:
    """Draw tip Mach over propeller speed at three temperatures."""
    top = given["speed"] * 1.2

    def line(celsius: float) -> list[tuple[float, float]]:
        speeds = [top * share / 12 for share in range(4, 13)]
        one = [(speed, compute(given["diameter"], speed, given["airspeed"], celsius)["tip_mach"]) for speed in speeds]
        return [(x, y) for x, y in one if y is not None]

    limit = given["mach_limit"]
    return Plot(
        kind="lines",
        x_label="propeller speed [rpm]",
        y_label="tip Mach number",
        words=(
            f"At {given['speed']:g} rpm and {given['airspeed']:g} m/s true the tip runs at Mach "
            f"{found['tip_mach']:.3f}; "
            "the cold day is the worst one."
        ),
        series=[Series(f"{celsius:g} °C", line(celsius)) for celsius in (COLD, MILD, HOT)],
        marks=[("this case", given["speed"], found["tip_mach"])],
        limits=[(f"limit {limit:g}", limit)] if limit is not None else [],
    )


METHOD = Method(
    key="tip-mach",
    version=1,
    title="Propeller tip Mach number",
    theme="Air and propeller",
    purpose="How near the tips come to the speed of sound, and the speed or diameter that keeps the limit.",
    source="Helical tip Mach number in the sense of 14 CFR part 36 appendix G; perfect gas, γ = 1.4",
    compute=compute,
    inputs=(
        Input("diameter", "m", "Propeller diameter", low=0.5, high=3, measured=True),
        Input("speed", "rpm", "Propeller speed", low=1, high=9000, measured=True),
        Input("airspeed", "m/s", "True airspeed", low=0, high=150, default=0, help="0 at rest; the dive is the case."),
        Input("temperature", "degC", "Air temperature", low=-60, high=55, default=15, help="The cold day is worse."),
        Input("mach_limit", "", "Limit of tip Mach number", low=0.4, high=1, optional=True, help="The maker's figure."),
        Text("limit_source", "Whose limit it is", optional=True, help="Document and paragraph, or the maker's letter."),
    ),
    outputs=(
        Output("tip_speed", "m/s", "Tip speed from turning alone", places=1),
        Output("helical_tip_speed", "m/s", "Tip speed along its path", places=1),
        Output("tip_mach_static", "", "Tip Mach number at rest", places=3),
        Output("tip_mach", "", "Tip Mach number", places=3),
        Output("speed_limit", "rpm", "Speed at the limit", places=0),
        Output("diameter_limit", "m", "Diameter at the limit", places=3),
    ),
    limits=(
        Limit(
            "tip_mach",
            "Tip Mach number stays below the limit you gave",
            at_most="mach_limit",
            source=(
                "the propeller maker's figure, as entered; usual values of 0.75 to 0.85 are common practice, no source"
            ),
        ),
    ),
    steps=steps,
    plot=plot,
    not_covered="Blade strength, flutter, noise and torsional vibration; speeds above the red line. Airspeed must be "
    "true, and the dive is the case, not the static run. The propeller maker's limit rules.",
    checked_against="Recomputed with the unit library pint 0.25.3 for two cases; no printed worked example was found",
    examples=(
        Example(
            {"diameter": 1.93, "speed": 2700, "airspeed": 0, "temperature": 15, "mach_limit": 0.8},
            {"tip_speed": 272.847, "tip_mach_static": 0.8018, "speed_limit": 2693.94},
            "by hand, checked with pint",
        ),
    ),
)
