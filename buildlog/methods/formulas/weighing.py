"""Empty mass and centre of gravity from scale readings."""

from collections.abc import Sequence
from typing import Any

from buildlog.errors import Refused
from buildlog.methods.declare import Example, Input, Method, Output, Plot, Series, Table, Text, Values


def compute(points: Sequence[dict[str, Any]], adjustments: Sequence[dict[str, Any]] = ()) -> dict[str, float]:
    """Return weight [kg], CG [mm aft of datum] and moment [kg·mm].

    points: gross and tare [kg] at an arm [mm], aft of datum positive, aircraft level; adjustments: weight [kg] at an
    arm [mm], removed ones negative. net = gross − tare, CG = Σ(net·arm)/Σnet.
    Source: AC 43.13-1B 10-15; FAA-H-8083-1B, chapter 10, figure 10-2.
    """
    rows = [(row["gross"] - (row["tare"] or 0.0), row["arm"]) for row in points]
    rows += [(row["weight"], row["arm"]) for row in adjustments]
    weight = sum(net for net, _ in rows)
    moment = sum(net * arm for net, arm in rows)
    if weight <= 0:
        raise Refused("The net weights add to nothing. Is a tare larger than its gross reading?", field="points")
    return {"weight": weight, "cg": moment / weight, "moment": moment}


def steps(given: Values, found: Values) -> list[str]:
    """Tell the sum line by line."""
    told = []
    for row in given["points"]:
        net = row["gross"] - (row["tare"] or 0.0)
        told.append(
            f"{row['name'] or 'point'}: {row['gross']:g} − {row['tare'] or 0:g} = {net:g} kg at {row['arm']:g} mm, "
            f"moment {net * row['arm']:,.0f} kg·mm"
        )
    for row in given["adjustments"]:
        told.append(
            f"{row['name'] or 'adjustment'}: {row['weight']:+g} kg at {row['arm']:g} mm, "
            f"moment {row['weight'] * row['arm']:,.0f} kg·mm"
        )
    told.append(f"CG = {found['moment']:,.0f} / {found['weight']:g} = {found['cg']:.1f} mm aft of datum")
    return told


def plot(given: Values, found: Values) -> Plot:
    """Draw the net weights as bars."""
    nets = [
        (row["name"] or f"point {place + 1}", row["gross"] - (row["tare"] or 0.0))
        for place, row in enumerate(given["points"])
    ]
    return Plot(
        kind="bars",
        x_label="",
        y_label="net weight [kg]",
        words=f"{found['weight']:.1f} kg in all, with the centre of gravity {found['cg']:.0f} mm aft of datum.",
        names=[name for name, _ in nets],
        series=[Series("net", [(float(place), net) for place, (_, net) in enumerate(nets)])],
    )


METHOD = Method(
    key="weighing",
    version=1,
    title="Weighing",
    theme="Mass and balance",
    purpose="Empty mass and centre of gravity from scale readings.",
    source="AC 43.13-1B 10-15 (read); FAA-H-8083-1B, chapter 10, figure 10-2 (read)",
    compute=compute,
    inputs=(
        Table(
            "points",
            "Points",
            (
                Text("name", "Point", optional=True),
                Input("gross", "kg", "Gross", low=-2000, high=2000, measured=True),
                Input("tare", "kg", "Tare", low=-500, high=500, default=0, measured=True),
                Input("arm", "mm", "Arm aft of datum", low=-10_000, high=10_000, measured=True),
            ),
            least=1,
            spare=3,
            help="Ahead of the datum is negative. Chocks and a tail stand are tare.",
        ),
        Table(
            "adjustments",
            "Not aboard, or to be taken off",
            (
                Text("name", "Item", optional=True),
                Input("weight", "kg", "Weight", low=-2000, high=2000),
                Input("arm", "mm", "Arm aft of datum", low=-10_000, high=10_000),
            ),
            least=0,
            spare=3,
            help="Taken off is negative: drained fuel. Added is positive: unusable fuel.",
        ),
    ),
    outputs=(
        Output("weight", "kg", "Empty mass", places=1),
        Output("cg", "mm", "Centre of gravity, aft of datum", places=1),
        Output("moment", "kg*mm", "Moment", places=0),
    ),
    steps=steps,
    plot=plot,
    not_covered=(
        "Whether the aircraft was level, indoors, clean and complete; unusable fuel counts once. "
        "Moving coolant, "
        "battery or propeller extension afterwards makes it stale."
    ),
    checked_against="FAA-H-8083-1B, chapter 10, figure 10-2: 2,006 lb, CG 13.2 in ahead of the main wheels (read)",
    caution=(
        "Chocks, level and a helper at the tail: an aircraft on jacks or scales can fall. Its limits are "
        "the designer's."
    ),
    examples=(
        Example(
            {
                "points": [{"gross": 340, "tare": 0, "arm": -78}, {"gross": 1666, "tare": 0, "arm": 0}],
            },
            {"weight": 2006, "cg": -13.22033898},
            "FAA-H-8083-1B, figure 10-2, its numbers taken as kg and mm",
        ),
    ),
)
