"""The fuel flow trial: what flows against what must flow, judged on the lowest run that counts."""

from collections.abc import Sequence
from typing import Any

from buildlog.errors import Refused
from buildlog.methods.declare import Choice, Example, Input, Limit, Method, Output, Plot, Series, Table, Text, Values
from buildlog.methods.formulas.fuel_required import BENCHMARK, FACTORS, FEEDS

COUNTS = {"yes": "Counts", "no": "Does not count"}


def compute(
    consumption: float,
    feed: str,
    volume: float | None = None,
    time: float | None = None,
    runs: Sequence[dict[str, Any]] = (),
) -> dict[str, Any]:
    """Return the lowest flow, the flow required [L/h], their ratio, and how many runs count.

    consumption [L/h] at take-off power; either one run as volume [L] and time [min], or rows of runs with the same
    names, each of which counts or does not, with a reason.
    """
    every = [(row["volume"], row["time"], row["counts"]) for row in runs]
    if volume is not None and time is not None:
        every.append((volume, time, "yes"))
    if not every:
        raise Refused("Give the volume caught and the time taken, as one run or in rows.", field="volume")
    flows = [caught / taken * 60 for caught, taken, counts in every if counts == "yes"]
    if not flows:
        raise Refused("No run counts, so there is no flow to judge. Measure again.", field="runs")
    required = consumption * FACTORS[feed]
    return {"flow": min(flows), "required": required, "ratio": min(flows) / consumption, "counting": float(len(flows))}


def steps(given: Values, found: Values) -> list[str]:
    """Tell the sum line by line."""
    told = []
    for number, row in enumerate(given["runs"], start=1):
        flow = (
            f"run {number}: {row['volume']:g} L / {row['time']:g} min · 60 = {row['volume'] / row['time'] * 60:.2f} L/h"
        )
        told.append(flow if row["counts"] == "yes" else f"{flow}, does not count: {row['why'] or 'no reason given'}")
    if given["volume"] is not None:
        told.append(
            f"{given['volume']:g} L / {given['time']:g} min · 60 = {given['volume'] / given['time'] * 60:.2f} L/h"
        )
    factor = FACTORS[given["feed"]]
    told.append(f"required = {factor:g} · {given['consumption']:g} = {found['required']:.2f} L/h")
    told.append(f"lowest run that counts {found['flow']:.2f} L/h, {found['ratio']:.1%} of take-off consumption")
    return told


def plot(given: Values, found: Values) -> Plot:
    """Draw the runs as bars against the flow required."""
    flows = [row["volume"] / row["time"] * 60 for row in given["runs"]]
    if given["volume"] is not None:
        flows.append(given["volume"] / given["time"] * 60)
    names = [f"run {number}" for number in range(1, len(flows) + 1)]
    return Plot(
        kind="bars",
        x_label="",
        y_label="flow [L/h]",
        words=f"The lowest run that counts gives {found['flow']:.1f} L/h; {found['required']:.1f} L/h are required.",
        names=names,
        series=[Series("flow", [(float(place), flow) for place, flow in enumerate(flows)])],
        limits=[("required", found["required"]), ("take-off consumption", given["consumption"])],
    )


VOLUME = Input("volume", "L", "Fuel caught", low=0.1, high=200, measured=True, optional=True)
TIME = Input("time", "minute", "Time taken", low=0.1, high=240, measured=True, optional=True)

METHOD = Method(
    key="fuel-flow",
    version=1,
    title="Fuel flow at attitude",
    theme="Fuel",
    purpose="Whether enough fuel flows at the steepest climb attitude on the last of the fuel.",
    source=f"{BENCHMARK} (read); nose 5 degrees above the steepest climb: AC 90-89A (read second-hand)",
    compute=compute,
    inputs=(
        VOLUME,
        TIME,
        Input("consumption", "L/hour", "Consumption at take-off power", low=2, high=400),
        Choice("feed", "Feed", FEEDS),
        Table(
            "runs",
            "Runs",
            (
                Text("name", "Tank, pump, attitude"),
                Input("volume", "L", "Fuel caught", low=0.1, high=200, measured=True),
                Input("time", "minute", "Time taken", low=0.1, high=240, measured=True),
                Choice("counts", "Counts", COUNTS, default="yes"),
                Text("why", "Why it does not count", optional=True),
            ),
            least=0,
            help="One row for each run. Use these rows, or the two fields above for a single run.",
        ),
    ),
    outputs=(
        Output("flow", "L/hour", "Lowest flow that counts", places=2),
        Output("required", "L/hour", "Flow required", places=2),
        Output("ratio", "", "Share of take-off consumption", places=3),
        Output("counting", "", "Runs that count", places=0),
    ),
    limits=(
        Limit("flow", "The lowest run reaches the flow required", at_least="required", source=BENCHMARK, grade="read"),
    ),
    steps=steps,
    plot=plot,
    not_covered=(
        "It counts only with the tank at unusable fuel plus the test amount, at the critical "
        "attitude, the line's "
        "end at the height of the carburettor inlet, a flow meter blocked or by-passed, and the vent as flown "
        "(23.955(a), from memory; 25.955, read)."
    ),
    checked_against=f"{BENCHMARK}: factors read; numbers recomputed with pint 0.25.3",
    caution="Open fuel, nose up: no flame or switch near, earth the aircraft and the can, a fire extinguisher and a "
    "second person at hand, the tail tied down, nobody under the nose. Stop at the abort values you set.",
    examples=(
        Example(
            {"volume": 5, "time": 6, "consumption": 27, "feed": "gravity"},
            {"flow": 50, "required": 40.5, "ratio": 1.85185},
            "by hand from 23.955(b)",
        ),
    ),
)
