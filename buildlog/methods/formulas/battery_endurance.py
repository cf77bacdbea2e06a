"""How long a battery carries the essential load when nothing charges it."""

from buildlog.errors import Refused
from buildlog.methods.declare import Example, Input, Limit, Method, Output, Plot, Series, Text, Values


def compute(
    capacity: float,
    hour_rate: float,
    peukert: float,
    current: float,
    age_factor: float,
    cold_factor: float,
    target: float | None = None,
    limit_source: str = "",
) -> dict[str, float]:
    """Return the endurance [min]: t = H·(C'/(I·H))^k with C' = C·age·cold.

    capacity [A·h] at the hour_rate [h] it is rated for, current of the essential load [A]. Raises Refused for an
    exponent below 1. Source: Peukert's relation with the rating hour, two published examples.
    """
    if peukert < 1:
        raise Refused("A Peukert exponent below 1 would make a battery last longer under more load.", field="peukert")
    left = capacity * age_factor * cold_factor
    return {"minutes": hour_rate * (left / (current * hour_rate)) ** peukert * 60}


def steps(given: Values, found: Values) -> list[str]:
    """Tell the sum line by line."""
    left = given["capacity"] * given["age_factor"] * given["cold_factor"]
    rated = given["hour_rate"]
    return [
        f"C' = {given['capacity']:g} · {given['age_factor']:g} · {given['cold_factor']:g} = {left:.2f} A·h",
        f"t = H · (C' / (I · H))^k = {rated:g} · ({left:.2f} / ({given['current']:g} · {rated:g}))^{given['peukert']:g}"
        f" = {found['minutes'] / 60:.2f} h",
        f"= {found['minutes']:.0f} min, before the minutes until someone notices are taken off",
    ]


def plot(given: Values, found: Values) -> Plot:
    """Draw minutes over current."""
    currents = [given["current"] * share / 10 for share in range(5, 21)]
    fixed = {name: given[name] for name in ("capacity", "hour_rate", "peukert", "age_factor", "cold_factor")}
    line = [(amps, compute(current=amps, **fixed)["minutes"]) for amps in currents]
    return Plot(
        kind="lines",
        x_label="current [A]",
        y_label="endurance [min]",
        words=f"At {given['current']:g} A the battery lasts {found['minutes']:.0f} min by this sum.",
        series=[Series("this battery", line)],
        marks=[("essential load", given["current"], found["minutes"])],
        limits=[("target", given["target"])] if given["target"] is not None else [],
    )


METHOD = Method(
    key="battery-endurance",
    version=1,
    title="Battery endurance",
    theme="Electrical",
    purpose="Minutes of spark and fuel after the charging fails.",
    source="Peukert's relation with the rating hour (two published examples, read); benchmark of 30 min: 14 CFR "
    "23.1353(h) (clause read, figure from memory)",
    compute=compute,
    inputs=(
        Input("capacity", "A*hour", "Rated capacity", low=1, high=200),
        Input("hour_rate", "hour", "Hours it is rated for", low=0.5, high=100, default=20),
        Input(
            "peukert",
            "",
            "Peukert exponent",
            low=1,
            high=1.6,
            default=1.2,
            help="Lead 1.1 to 1.3, lithium near 1.05 (common practice, no source).",
        ),
        Input("current", "A", "Essential load", low=0.1, high=500, measured=True),
        Input(
            "age_factor",
            "",
            "Share left by age",
            low=0.2,
            high=1,
            default=0.8,
            help="0.8 as a start (common practice, no source).",
        ),
        Input(
            "cold_factor",
            "",
            "Share left by cold",
            low=0.2,
            high=1,
            default=0.8,
            help="0.8 as a start (common practice, no source).",
        ),
        Input(
            "target",
            "minute",
            "Endurance you ask for",
            low=1,
            high=600,
            optional=True,
            help="30 min is a benchmark from memory: enter your own.",
        ),
        Text("limit_source", "Whose target it is", optional=True),
    ),
    outputs=(Output("minutes", "minute", "Endurance", places=0),),
    limits=(Limit("minutes", "Endurance reaches the target you gave", at_least="target", source="as entered"),),
    steps=steps,
    plot=plot,
    not_covered="An ignition or injection unit drops out before the battery is empty; take off the minutes until the "
    "pilot notices. A measured discharge with the real load beats this sum.",
    checked_against="Published Peukert example: 100 A·h at the one-ampere rate, exponent 1.2, 5 A gives 14.5 h (read)",
    caution="Where spark or fuel needs this battery, the engine stops when it is flat. The inspector and the unit's "
    "maker say what reserve is enough.",
    examples=(
        Example(
            {"capacity": 100, "hour_rate": 20, "peukert": 1.2, "current": 5, "age_factor": 1, "cold_factor": 1},
            {"minutes": 1200.0},
            "at the rated current the rated hours come back",
        ),
    ),
)
