"""Swept volume of all cylinders."""

import math

from buildlog.methods.declare import Example, Input, Method, Output, Values, Whole


def compute(bore: float, stroke: float, cylinders: int) -> dict[str, float]:
    """Return the swept volume [cm³] of cylinders of a bore and stroke [mm]."""
    return {"swept_volume": math.pi / 4 * bore**2 * stroke * cylinders / 1000}


def steps(given: Values, found: Values) -> list[str]:
    """Tell the sum line by line."""
    one = found["swept_volume"] / given["cylinders"]
    return [
        f"one cylinder = π/4 · {given['bore']:g}² · {given['stroke']:g} mm³ = {one:.2f} cm³",
        f"all = {one:.2f} · {given['cylinders']} = {found['swept_volume']:.1f} cm³",
    ]


METHOD = Method(
    key="swept-volume",
    version=1,
    title="Swept volume",
    theme="Engine figures",
    purpose="The engine's identity, and the ground of every figure per litre.",
    source="Geometry of the cylinder: π/4 · bore² · stroke, times the number of cylinders",
    compute=compute,
    inputs=(
        Input("bore", "mm", "Bore", low=30, high=200, measured=True),
        Input("stroke", "mm", "Stroke", low=30, high=200, measured=True),
        Whole("cylinders", "Cylinders", low=1, high=16),
    ),
    outputs=(Output("swept_volume", "cm**3", "Swept volume", places=1),),
    steps=steps,
    not_covered=(
        "It says nothing of the combustion chamber; a rebored engine has the bore as measured, not as in the book."
    ),
    checked_against="R. K. Rajput, A Textbook of Internal Combustion Engines, data of example 17.11 (read second-hand)",
    examples=(Example({"bore": 100, "stroke": 100, "cylinders": 4}, {"swept_volume": 3141.5927}, "Rajput, 17.11"),),
)
