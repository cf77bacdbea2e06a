"""The standard atmosphere."""

import math

from buildlog.methods.declare import Example, Input, Method, Output, Plot, Series, Values

SEA_TEMPERATURE, SEA_PRESSURE, LAPSE = 288.15, 1013.25, 0.0065  # K, hPa, K/m
GAS, GAMMA, GRAVITY = 287.053, 1.4, 9.80665  # J/(kg·K), -, m/s²
TROPOPAUSE = 11_000.0  # m, geopotential


def compute(altitude: float) -> dict[str, float]:
    """Return temperature [K], pressure [hPa], density [kg/m³] and sound speed [m/s] at a geopotential altitude [m].

    Troposphere with a lapse of 6.5 K/km, constant temperature above 11 km up to 20 km. Source: U.S. Standard
    Atmosphere 1976 (constants from memory; its table read in M. Kutz, Mechanical Engineers' Handbook, vol. 4, table 6).
    """
    below = min(altitude, TROPOPAUSE)
    temperature = SEA_TEMPERATURE - LAPSE * below
    pressure = SEA_PRESSURE * (temperature / SEA_TEMPERATURE) ** (GRAVITY / (LAPSE * GAS))
    if altitude > TROPOPAUSE:
        pressure *= math.exp(-GRAVITY * (altitude - TROPOPAUSE) / (GAS * temperature))
    return {
        "temperature": temperature,
        "pressure": pressure,
        "density": pressure * 100 / (GAS * temperature),
        "sound_speed": math.sqrt(GAMMA * GAS * temperature),
    }


def steps(given: Values, found: Values) -> list[str]:
    """Tell the sum line by line."""
    temperature, pressure = found["temperature"], found["pressure"]
    return [
        f"T = 288.15 − 0.0065 · min({given['altitude']:g}, 11,000) = {temperature:.2f} K",
        f"p = 1013.25 · (T / 288.15)^5.25588{' · exp(…) above 11 km' if given['altitude'] > TROPOPAUSE else ''}"
        f" = {pressure:.2f} hPa",
        f"ρ = p / (287.053 · T) = {found['density']:.4f} kg/m³",
        f"a = √(1.4 · 287.053 · T) = {found['sound_speed']:.1f} m/s",
    ]


def plot(given: Values, found: Values) -> Plot:
    """Draw density over altitude with the point asked for."""
    line = [(float(height), compute(height)["density"]) for height in range(0, 6001, 500)]
    return Plot(
        kind="lines",
        x_label="altitude [m]",
        y_label="density [kg/m³]",
        words=(
            f"At {given['altitude']:g} m the air weighs {found['density'] / 1.225:.0%} of what it weighs at sea level."
        ),
        series=[Series("standard day", line)],
        marks=[("here", given["altitude"], found["density"])],
    )


METHOD = Method(
    key="standard-atmosphere",
    version=1,
    title="Standard atmosphere",
    theme="Air and propeller",
    purpose="Air of the standard day, for every corrected trial.",
    source="U.S. Standard Atmosphere 1976; M. Kutz (ed.), Mechanical Engineers' Handbook, vol. 4, table 6",
    compute=compute,
    inputs=(
        Input(
            "altitude",
            "m",
            "Altitude",
            low=-500,
            high=15_000,
            help="What the altimeter set to 1013.25 hPa shows (geopotential).",
        ),
    ),
    outputs=(
        Output("temperature", "K", "Temperature", places=2),
        Output("pressure", "hPa", "Pressure", places=1),
        Output("density", "kg/m**3", "Density", places=4),
        Output("sound_speed", "m/s", "Speed of sound", places=1),
    ),
    steps=steps,
    plot=plot,
    not_covered="The day of the trial is not the standard day: use its own pressure and temperature.",
    checked_against="M. Kutz (ed.), Mechanical Engineers' Handbook, vol. 4, table 6 (read), and the library fluids",
    examples=(Example({"altitude": 2999}, {"temperature": 268.6565, "density": 0.909215}, "Kutz, vol. 4, table 6"),),
)
