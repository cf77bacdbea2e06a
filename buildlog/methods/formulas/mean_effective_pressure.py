"""Mean effective pressure: whether a claimed power can be true."""

import math

from buildlog.methods.declare import Choice, Example, Input, Method, Output, Plot, Series, Values

PLAUSIBLE = (8.0, 13.0)  # bar, unboosted four-stroke at best torque: common practice, no source


def compute(power: float, speed: float, swept_volume: float, strokes: str) -> dict[str, float]:
    """Return mean effective pressure [bar], torque [N·m] and torque per litre [N·m/L].

    power [kW], speed [rpm], swept_volume of all cylinders [cm³], strokes "2" or "4": pme = π·strokes·T/V.
    """
    torque = power * 1000 / (2 * math.pi * speed / 60)
    pressure = math.pi * int(strokes) * torque / (swept_volume * 1e-6)
    return {
        "mean_effective_pressure": pressure / 1e5,
        "torque": torque,
        "torque_per_litre": torque / (swept_volume / 1000),
    }


def steps(given: Values, found: Values) -> list[str]:
    """Tell the sum line by line."""
    return [
        f"T = P / ω = {given['power']:g} kW / (2π · {given['speed']:g} / 60) = {found['torque']:.1f} N·m",
        f"pme = π · {given['strokes']} · T / V = {found['mean_effective_pressure']:.2f} bar",
        f"torque per litre = {found['torque_per_litre']:.1f} N·m/L",
        _judge(found["mean_effective_pressure"]),
    ]


def _judge(pressure: float) -> str:
    low, high = PLAUSIBLE
    if pressure > high:
        return f"Check the claim: above {high:g} bar is rare without a blower (common practice, no source)"
    return f"An unboosted four-stroke at best torque reaches {low:g} to {high:g} bar (common practice, no source)"


def plot(given: Values, found: Values) -> Plot:
    """Draw the claim among lines of equal mean effective pressure over speed."""
    speeds = [given["speed"] * share / 10 for share in range(5, 14)]

    def line(bar: float) -> list[tuple[float, float]]:
        torque = bar * 1e5 * given["swept_volume"] * 1e-6 / (math.pi * int(given["strokes"]))
        return [(speed, torque * 2 * math.pi * speed / 60 / 1000) for speed in speeds]

    bar = found["mean_effective_pressure"]
    return Plot(
        kind="lines",
        x_label="speed [rpm]",
        y_label="power [kW]",
        words=f"The claim means {bar:.1f} bar; the lines show the power of this engine at 8 and at 13 bar.",
        series=[Series("8 bar", line(8)), Series("13 bar", line(13))],
        marks=[("the claim", given["speed"], given["power"])],
    )


METHOD = Method(
    key="mean-effective-pressure",
    version=1,
    title="Mean effective pressure",
    theme="Engine figures",
    purpose="Whether the claimed power can be true for this engine.",
    source="Indicated and brake work per cycle: R. K. Rajput, A Textbook of Internal Combustion Engines, ch. 17",
    compute=compute,
    inputs=(
        Input("power", "kW", "Power at the shaft", low=0.5, high=500, measured=True),
        Input("speed", "rpm", "Speed", low=100, high=9000, measured=True),
        Input("swept_volume", "cm**3", "Swept volume, all cylinders", low=50, high=12000, measured=True),
        Choice("strokes", "Working cycle", {"4": "Four-stroke", "2": "Two-stroke"}, default="4"),
    ),
    outputs=(
        Output("mean_effective_pressure", "bar", "Mean effective pressure", places=2),
        Output("torque", "N*m", "Torque", places=1),
        Output("torque_per_litre", "N*m/L", "Torque per litre", places=1),
    ),
    steps=steps,
    plot=plot,
    not_covered="Brake figures, not indicated ones; a plausible claim is not a measured one, and road duty is not "
    "aircraft duty. The method gives no verdict.",
    checked_against=(
        "R. K. Rajput, A Textbook of Internal Combustion Engines, examples 17.7 and 17.11 (read second-hand)"
    ),
    examples=(
        Example(
            {"power": 250, "speed": 2000, "swept_volume": 25000, "strokes": "4"},
            {"mean_effective_pressure": 6.0},
            "Rajput, example 17.7 backwards",
        ),
    ),
)
