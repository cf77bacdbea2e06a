"""Power at a shaft from its torque and speed, and the torque that a power needs."""

import math
from typing import Any

from buildlog.methods.declare import Example, Input, Method, Output, Plot, Series, Values

KILO = 1000.0
SOURCE = "Definition of mechanical power, P = T·ω; in US units from 33,000 ft·lbf/min to the horsepower"
CHECKED = "R. K. Rajput, A Textbook of Internal Combustion Engines, examples 17.8 and 17.38 (read second-hand)"
NOT_COVERED = (
    "Engine rpm is not propeller rpm behind a reduction; power at the wheels is not power at the crank; metric "
    "horsepower is 1.4 % less than mechanical."
)
SPEED = Input("speed", "rpm", "Speed", low=100, high=9000, measured=True)
TORQUE = Input("torque", "N*m", "Torque", low=1, high=2000, measured=True)
POWER = Input("power", "kW", "Power", low=1, high=500, measured=True)


def power(torque: float, speed: float) -> dict[str, float]:
    """Return the power [kW] of a torque [N·m] at a speed [rpm]."""
    return {"power": torque * 2 * math.pi * speed / 60 / KILO}


def torque(power: float, speed: float) -> dict[str, float]:
    """Return the torque [N·m] that a power [kW] needs at a speed [rpm]."""
    return {"torque": power * KILO / (2 * math.pi * speed / 60)}


def _power_steps(given: Values, found: Values) -> list[str]:
    rate = 2 * math.pi * given["speed"] / 60
    return [
        f"angular speed = 2π · {given['speed']:g} / 60 = {rate:.2f} rad/s",
        f"P = T · ω = {given['torque']:g} · {rate:.2f} = {found['power'] * KILO:.0f} W = {found['power']:.2f} kW",
    ]


def _torque_steps(given: Values, found: Values) -> list[str]:
    rate = 2 * math.pi * given["speed"] / 60
    return [
        f"angular speed = 2π · {given['speed']:g} / 60 = {rate:.2f} rad/s",
        f"T = P / ω = {given['power'] * KILO:.0f} / {rate:.2f} = {found['torque']:.1f} N·m",
    ]


def _plot(at: float, kilowatts: float) -> Plot:
    """Draw the cube law of a fixed-pitch propeller through the point, beside constant torque."""
    speeds = [at * share / 20 for share in range(8, 25)]
    return Plot(
        kind="lines",
        x_label="speed [rpm]",
        y_label="power [kW]",
        words=f"The point lies at {at:g} rpm and {kilowatts:.1f} kW; a fixed-pitch propeller asks for power with the "
        "cube of speed, so it meets an engine of constant torque at this one point.",
        series=[
            Series("at constant torque", [(speed, kilowatts * speed / at) for speed in speeds]),
            Series("propeller demand", [(speed, kilowatts * (speed / at) ** 3) for speed in speeds]),
        ],
        marks=[("this point", at, kilowatts)],
    )


def _power_plot(given: Values, found: Values) -> Plot:
    return _plot(given["speed"], found["power"])


def _torque_plot(given: Values, found: Values) -> Plot:
    return _plot(given["speed"], given["power"])


def _method(**more: Any) -> Method:
    return Method(
        version=1, theme="Engine figures", source=SOURCE, not_covered=NOT_COVERED, checked_against=CHECKED, **more
    )


METHOD = (
    _method(
        key="shaft-power",
        title="Shaft power",
        purpose="Power from a measured torque and speed.",
        compute=power,
        inputs=(TORQUE, SPEED),
        outputs=(Output("power", "kW", "Power", places=2),),
        steps=_power_steps,
        plot=_power_plot,
        examples=(Example({"torque": 175, "speed": 500}, {"power": 9.16298}, "Rajput, example 17.8"),),
    ),
    _method(
        key="torque-for-power",
        title="Torque for a power",
        purpose="What torque a claimed power means at a speed.",
        compute=torque,
        inputs=(POWER, SPEED),
        outputs=(Output("torque", "N*m", "Torque", places=1),),
        steps=_torque_steps,
        plot=_torque_plot,
        examples=(Example({"power": 9.162978573, "speed": 500}, {"torque": 175.0}, "Rajput, example 17.8, backwards"),),
    ),
)
