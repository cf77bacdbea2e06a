"""Whether a measured value is inside its limits, as far as the measurement can tell."""

from decimal import Decimal

from buildlog.errors import Refused
from buildlog.methods.declare import Example, Input, Method, Output, Values

WITHIN, UNDECIDED, OUTSIDE = "within", "undecided", "outside"


def verdict(value: Decimal, uncertainty: Decimal, lower: Decimal | None, upper: Decimal | None) -> str:
    """Return within, undecided or outside for a value with expanded uncertainty U (k = 2); decimals, same unit.

    Within if lower + U <= x <= upper − U; outside if x < lower − U or x > upper + U; else undecided. On the edge is
    within. Source: ISO 14253-1 (read second-hand).
    """
    spread = abs(uncertainty)
    if (lower is not None and value < lower - spread) or (upper is not None and value > upper + spread):
        return OUTSIDE
    inside = (lower is None or value >= lower + spread) and (upper is None or value <= upper - spread)
    return WITHIN if inside else UNDECIDED


def compute(value: float, uncertainty: float, lower: float | None = None, upper: float | None = None) -> dict[str, str]:
    """Return the verdict. Works in decimals: in binary 9.9 + 0.05 is a hair above 9.95."""
    if lower is None and upper is None:
        raise Refused("Give a lower or an upper limit, or both.", field="lower")
    if lower is not None and upper is not None and lower > upper:
        raise Refused("The lower limit lies above the upper one.", field="lower")
    return {
        "verdict": verdict(
            _exact(value), _exact(uncertainty), *[None if x is None else _exact(x) for x in (lower, upper)]
        )
    }


def _exact(number: float) -> Decimal:
    return Decimal(f"{number:.12g}")


def steps(given: Values, found: Values) -> list[str]:
    """Tell the comparison line by line."""
    told = []
    for name, sign in (("lower", "+"), ("upper", "−")):
        if given[name] is not None:
            told.append(f"{name} limit {given[name]:g} {sign} U {given['uncertainty']:g} bounds what is surely inside")
    told.append(f"{given['value']:g} is {found['verdict']}")
    if not given["uncertainty"]:
        told.append("U was taken as zero: the verdict trusts the reading as if it were exact")
    return told


METHOD = Method(
    key="tolerance-verdict",
    version=1,
    title="Measured value against its limits",
    theme="Measuring",
    purpose="Whether a measurement shows that a limit is kept.",
    source="ISO 14253-1 (as restated in public pages, read second-hand)",
    compute=compute,
    inputs=(
        Input("value", "mm", "Value", low=-100_000, high=100_000, help="Any unit, as long as all four are the same."),
        Input("uncertainty", "mm", "Expanded uncertainty, k = 2", low=0, high=10_000, default=0),
        Input("lower", "mm", "Lower limit", low=-100_000, high=100_000, optional=True),
        Input("upper", "mm", "Upper limit", low=-100_000, high=100_000, optional=True),
    ),
    outputs=(Output("verdict", None, "Verdict"),),
    steps=steps,
    not_covered=(
        "U is of the tool as used: temperature, zero and reading count. A factor k confused is a factor of two."
    ),
    checked_against="ISO 14253-1, its decision rule, four cases (read second-hand)",
    examples=(
        Example(
            {"value": 9.95, "uncertainty": 0.05, "lower": 9.9, "upper": 10.1}, {"verdict": "within"}, "on the edge"
        ),
    ),
)
