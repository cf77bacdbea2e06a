"""Gyroscopic couples of a turning propeller on its shaft and mount."""

import math

from buildlog.methods.declare import Example, Input, Limit, Method, Output, Plot, Series, Text, Values, Whole

BENCHMARK_YAW, BENCHMARK_PITCH = 2.5, 1.0  # rad/s
TWO_BLADE_PEAK = 2.0
MOST = "moment_limit"


def compute(
    inertia: float,
    speed: float,
    yaw_rate: float,
    pitch_rate: float,
    blades: int,
    moment_limit: float | None = None,
    limit_source: str = "",
) -> dict[str, float]:
    """Return the couples [N·m] and the peak factor.

    inertia [kg·m²] of everything that turns on the front bearing, speed [rpm], yaw and pitch rate [rad/s]. M = I·ω·Ω;
    two blades give IωΩ(1 − cos 2θ) in one plane and IωΩ·sin 2θ in the other, so the peak is twice the mean
    (T. Bevan, The Theory of Machines, ch. 2, read second-hand); three and more are steady.
    """
    around = inertia * 2 * math.pi * speed / 60
    from_yaw, from_pitch = around * yaw_rate, around * pitch_rate
    mean = math.hypot(from_yaw, from_pitch)
    factor = TWO_BLADE_PEAK if blades == 2 else 1.0
    return {
        "moment_from_yaw": from_yaw,
        "moment_from_pitch": from_pitch,
        "moment_mean": mean,
        "moment_peak": mean * factor,
        "peak_factor": factor,
    }


def steps(given: Values, found: Values) -> list[str]:
    """Tell the sum line by line."""
    rate = 2 * math.pi * given["speed"] / 60
    return [
        f"ω = 2π · {given['speed']:g} / 60 = {rate:.2f} rad/s",
        f"from yaw: I · ω · Ω = {given['inertia']:g} · {rate:.2f} · {given['yaw_rate']:g} = "
        f"{found['moment_from_yaw']:.1f} N·m, a pitching couple",
        f"from pitch: {given['inertia']:g} · {rate:.2f} · {given['pitch_rate']:g} = "
        f"{found['moment_from_pitch']:.1f} N·m, a yawing couple",
        f"together √(yaw² + pitch²) = {found['moment_mean']:.1f} N·m",
        f"{given['blades']} blade{'s' if given['blades'] > 1 else ''}: peak = {found['peak_factor']:g} · "
        f"{found['moment_mean']:.1f} = {found['moment_peak']:.1f} N·m",
    ]


def plot(given: Values, found: Values) -> Plot:
    """Draw the peak couple over yaw rate for three pitch rates."""
    rates = [share / 4 for share in range(13)]

    def line(pitch: float) -> list[tuple[float, float]]:
        case = (given["inertia"], given["speed"])
        return [(yaw, compute(*case, yaw, pitch, given["blades"])["moment_peak"]) for yaw in rates]

    benchmark = compute(given["inertia"], given["speed"], BENCHMARK_YAW, BENCHMARK_PITCH, given["blades"])
    return Plot(
        kind="lines",
        x_label="yaw rate [rad/s]",
        y_label="peak couple [N·m]",
        words=(
            f"This case gives a peak of {found['moment_peak']:.0f} N·m; the benchmark of {BENCHMARK_YAW:g} "
            f"rad/s yaw with "
            f"{BENCHMARK_PITCH:g} rad/s pitch gives {benchmark['moment_peak']:.0f} N·m."
        ),
        series=[Series(f"pitch {pitch:g} rad/s", line(pitch)) for pitch in (0.0, 1.0, 2.0)],
        marks=[
            ("this case", given["yaw_rate"], found["moment_peak"]),
            ("benchmark", BENCHMARK_YAW, benchmark["moment_peak"]),
        ],
    )


METHOD = Method(
    key="gyroscopic-load",
    version=1,
    title="Gyroscopic load",
    theme="Loads, bearings, shaft, hub",
    purpose="The couple that a yawing and pitching aircraft puts on the propeller end of the shaft.",
    source="T. Bevan, The Theory of Machines, ch. 2 (read second-hand); benchmark rates: NLG 23.371(a)(2) (read), "
    "14 CFR 23.371 same figures (from memory)",
    compute=compute,
    inputs=(
        Input(
            "inertia",
            "kg*m**2",
            "Moment of inertia",
            low=0.005,
            high=10,
            measured=True,
            help="Propeller, hub, spinner.",
        ),
        Input("speed", "rpm", "Propeller speed", low=1, high=9000, measured=True),
        Input("yaw_rate", "rad/s", "Yaw rate", low=0, high=5, default=BENCHMARK_YAW, help="Benchmark 2.5 rad/s."),
        Input("pitch_rate", "rad/s", "Pitch rate", low=0, high=5, default=BENCHMARK_PITCH, help="Benchmark 1 rad/s."),
        Whole("blades", "Blades", low=1, high=8, default=2),
        Input(
            MOST, "N*m", "Couple that bearing, shaft and mount were shown to carry", low=1, high=100_000, optional=True
        ),
        Text("limit_source", "Who showed it", optional=True),
    ),
    outputs=(
        Output("moment_from_yaw", "N*m", "Couple from yaw", places=1),
        Output("moment_from_pitch", "N*m", "Couple from pitch", places=1),
        Output("moment_mean", "N*m", "Both together, mean", places=1),
        Output("moment_peak", "N*m", "Peak", places=1),
        Output("peak_factor", "", "Peak over mean", places=0),
    ),
    limits=(
        Limit("moment_peak", "The peak stays below what was shown to be carried", at_most=MOST, source="as entered"),
    ),
    steps=steps,
    plot=plot,
    not_covered="Thrust, and weight times load factor times overhang, act at the same moment; run shaft reactions with "
    "all of them, both signs, load factor 2.5. These are limit loads; ultimate is 1.5 times.",
    checked_against="R. S. Khurmi and J. K. Gupta, Theory of Machines, examples 14.3 and 14.5 (read second-hand)",
    caution="A couple that is carried on paper is not a propeller that stays on: the crankshaft, hub and mount need a "
    "competent person's own analysis, and the maker's limits rule.",
    examples=(
        Example(
            {"inertia": 46.875, "speed": 1500, "yaw_rate": 0, "pitch_rate": 1, "blades": 3},
            {"moment_from_pitch": 7363.1078},
            "Khurmi and Gupta, example 14.5",
        ),
    ),
)
