"""How much fuel must reach the carburettor at take-off power."""

from buildlog.methods.declare import Choice, Example, Input, Method, Output, Plot, Series, Values

FACTORS = {"gravity": 1.50, "pump": 1.25}  # share of take-off consumption: 14 CFR 23.955(b), (c), edition of 2014, read
FEEDS = {"gravity": "Gravity", "pump": "Pump, each one alone"}
BENCHMARK = "14 CFR 23.955(b), (c), edition of 2014"


def compute(power: float, specific_consumption: float, feed: str, return_flow: float) -> dict[str, float]:
    """Return consumption and flow required [kg/h].

    power [kW] at take-off, specific_consumption [kg/(kW·h)], return_flow [kg/h] of return line and jet pump, which
    comes on top after the factor (23.955(a), its last sentence).
    """
    consumption = power * specific_consumption
    return {"consumption": consumption, "required": consumption * FACTORS[feed] + return_flow}


def steps(given: Values, found: Values) -> list[str]:
    """Tell the sum line by line."""
    factor = FACTORS[given["feed"]]
    return [
        f"consumption = {given['power']:.4g} kW · {given['specific_consumption']:.4g} kg/(kW·h) = "
        f"{found['consumption']:.2f} kg/h",
        f"required = {factor:g} · {found['consumption']:.2f} + {given['return_flow']:g} = {found['required']:.2f} kg/h",
        f"at 0.74 kg/L, which is from memory: {found['required'] / 0.74:.1f} L/h; measure the density of your fuel",
    ]


def plot(given: Values, found: Values) -> Plot:
    """Draw consumption and requirement as bars."""
    return Plot(
        kind="bars",
        x_label="",
        y_label="flow [kg/h]",
        words=f"Take-off burns {found['consumption']:.1f} kg/h; {found['required']:.1f} kg/h must be able to flow.",
        names=["consumption", "required"],
        series=[Series("flow", [(0, found["consumption"]), (1, found["required"])])],
    )


METHOD = Method(
    key="fuel-required",
    version=1,
    title="Fuel flow required",
    theme="Fuel",
    purpose="What the fuel system must deliver at take-off power.",
    source=f"{BENCHMARK} (read); 0.55 lb/hp/h where use is not measured: AC 90-89 (from memory)",
    compute=compute,
    inputs=(
        Input("power", "kW", "Take-off power", low=0.5, high=500, measured=True, help="The highest you measured."),
        Input(
            "specific_consumption",
            "kg/(kW*hour)",
            "Specific consumption at full rich power",
            low=0.1,
            high=1.0,
            help="Where it is not measured, 0.335 kg/(kW·h) = 0.55 lb/(hp·h): AC 90-89, from memory.",
        ),
        Choice("feed", "Feed", FEEDS),
        Input("return_flow", "kg/hour", "Return and jet-pump flow", low=0, high=500, default=0),
    ),
    outputs=(
        Output("consumption", "kg/hour", "Consumption at take-off power", places=2),
        Output("required", "kg/hour", "Flow required", places=2),
    ),
    steps=steps,
    plot=plot,
    not_covered="It is a requirement, not a measurement: the fuel flow trial shows what flows. A benchmark of a code "
    "that does not bind an amateur-built aircraft unless its jurisdiction says so.",
    checked_against=f"{BENCHMARK}: factors read; numbers recomputed with pint 0.25.3",
    examples=(
        Example(
            {"power": 60, "specific_consumption": 0.335, "feed": "pump", "return_flow": 30},
            {"consumption": 20.1, "required": 55.125},
            "by hand from 23.955(c)",
        ),
    ),
)
