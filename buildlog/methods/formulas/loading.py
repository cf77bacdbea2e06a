"""A loading case: mass and centre of gravity of everything aboard, against the design's envelope."""

from collections.abc import Sequence
from typing import Any

from buildlog.errors import Refused
from buildlog.methods.declare import Choice, Example, Input, Limit, Method, Output, Plot, Series, Table, Text, Values

INSIDE, NOT_INSIDE = 1.0, 0.0
BURNS = {"no": "Stays aboard", "yes": "Burns off"}


def compute(
    items: Sequence[dict[str, Any]], envelope: Sequence[dict[str, Any]] = (), limit_source: str = ""
) -> dict[str, Any]:
    """Return weight [kg], moment [kg·mm], CG [mm aft of datum], and with an envelope whether it is inside.

    items: weight [kg] at an arm [mm]; those that burn off give a second point. envelope: corners of the design, arm
    [mm] and weight [kg], in order round the edge; the edge counts as inside. `inside` is 1 when both points and the
    line between lie within. Source: AC 43.13-1B figures 10-10 to 10-14.
    """
    weight, moment = _sum(items)
    if weight <= 0:
        raise Refused("The items add to nothing.", field="items")
    empty, empty_moment = _sum([row for row in items if (row.get("burns") or "no") == "no"])
    found: dict[str, Any] = {"weight": weight, "moment": moment, "cg": moment / weight}
    burnt = empty < weight and empty > 0
    found["weight_burnt_off"] = empty if burnt else None
    found["cg_burnt_off"] = empty_moment / empty if burnt else None
    found["inside"] = None
    if envelope:
        path = [(found["cg"], weight)] + ([(empty_moment / empty, empty)] if burnt else [])
        found["inside"] = INSIDE if _covers([(row["arm"], row["weight"]) for row in envelope], path) else NOT_INSIDE
    return found


def _sum(items: Sequence[dict[str, Any]]) -> tuple[float, float]:
    return sum(row["weight"] for row in items), sum(row["weight"] * row["arm"] for row in items)


def _covers(corners: list[tuple[float, float]], path: list[tuple[float, float]]) -> bool:
    from shapely import LineString, Point, Polygon

    if len(corners) < 3:
        raise Refused("An envelope has three corners or more.", field="envelope")
    shape = Polygon(corners)
    if not shape.is_valid or shape.area == 0:
        raise Refused("The corners of the envelope cross. Give them in order round the edge.", field="envelope")
    line = LineString(path) if len(path) > 1 and path[0] != path[1] else Point(path[0])
    return bool(shape.buffer(1e-6).covers(line))


def steps(given: Values, found: Values) -> list[str]:
    """Tell the sum line by line."""
    told = [
        f"{row['name']}: {row['weight']:g} kg · {row['arm']:g} mm = {row['weight'] * row['arm']:,.0f} kg·mm"
        for row in given["items"]
    ]
    told.append(f"CG = {found['moment']:,.0f} / {found['weight']:g} = {found['cg']:.1f} mm aft of datum")
    if found["cg_burnt_off"] is not None:
        told.append(f"fuel burnt off: {found['weight_burnt_off']:g} kg, CG {found['cg_burnt_off']:.1f} mm")
    if found["inside"] is not None:
        where = "lie" if found["cg_burnt_off"] is not None else "lies"
        told.append(
            f"the case and its way down {where} {'inside' if found['inside'] else 'outside'} the envelope, "
            f"edge included"
        )
    return told


def plot(given: Values, found: Values) -> Plot:
    """Draw the envelope with the case and its burn-off line."""
    marks = [("loaded", found["cg"], found["weight"])]
    path = [(found["cg"], found["weight"])]
    if found["cg_burnt_off"] is not None:
        marks.append(("fuel burnt off", found["cg_burnt_off"], found["weight_burnt_off"]))
        path.append((found["cg_burnt_off"], found["weight_burnt_off"]))
    return Plot(
        kind="envelope",
        x_label="centre of gravity [mm aft of datum]",
        y_label="mass [kg]",
        words=f"Loaded: {found['weight']:.1f} kg with the centre of gravity at {found['cg']:.0f} mm.",
        series=[Series("burn-off", path)] if len(path) > 1 else [],
        marks=marks,
        corners=[(row["arm"], row["weight"]) for row in given["envelope"]],
    )


METHOD = Method(
    key="loading",
    version=1,
    title="Loading case",
    theme="Mass and balance",
    purpose="Mass and centre of gravity of one way of loading, against the design's envelope.",
    source="AC 43.13-1B CHG 1, figures 10-10 to 10-14 (read)",
    compute=compute,
    inputs=(
        Table(
            "items",
            "Items",
            (
                Text("name", "Item"),
                Input("weight", "kg", "Weight", low=-2000, high=2000),
                Input("arm", "mm", "Arm aft of datum", low=-10_000, high=10_000, measured=True),
                Choice("burns", "Burns off", BURNS, default="no"),
            ),
            spare=6,
        ),
        Table(
            "envelope",
            "Envelope of the design",
            (
                Input("arm", "mm", "Arm aft of datum", low=-10_000, high=10_000),
                Input("weight", "kg", "Mass", low=0, high=5000),
            ),
            least=0,
            spare=5,
            help="Corners in order round the edge. Without them there is a number and no verdict.",
        ),
        Text("limit_source", "Whose envelope it is", optional=True, help="Plan sheet and revision."),
    ),
    outputs=(
        Output("weight", "kg", "Mass", places=1),
        Output("moment", "kg*mm", "Moment", places=0),
        Output("cg", "mm", "Centre of gravity, aft of datum", places=1),
        Output("weight_burnt_off", "kg", "Mass with the fuel burnt off", places=1),
        Output("cg_burnt_off", "mm", "Centre of gravity with the fuel burnt off", places=1),
        Output("inside", "", "Inside the envelope (1 yes, 0 no)", places=0),
    ),
    limits=(
        Limit(
            "inside",
            "The case, and the way to it with the fuel burnt off, lie inside the envelope",
            at_least=1.0,
            source="the designer's envelope, as entered",
            grade="read",
        ),
    ),
    steps=steps,
    plot=plot,
    not_covered=(
        "A heavy nose and a battery far aft keep the centre of gravity and raise the inertia, which "
        "no such sum "
        "shows. Every extreme case counts, not the usual one."
    ),
    checked_against="AC 43.13-1B CHG 1, figures 10-10 and 10-11 (read); its printed quotient in figure 10-13 is wrong",
    caution="No loading is cleared for flight by this sum. The designer's limits and the authority's rule.",
    examples=(
        Example(
            {
                "items": [
                    {"name": "empty", "weight": 1169, "arm": 10.6},
                    {"name": "oil", "weight": 17, "arm": -49},
                    {"name": "pilot", "weight": 170, "arm": 16},
                    {"name": "fuel", "weight": 83, "arm": 22},
                ]
            },
            {"weight": 1439, "cg": 11.1913829},
            "AC 43.13-1B figure 10-10, its numbers taken as kg and mm",
        ),
    ),
)
