"""Round numbers along an axis."""

import math


def ticks(low: float, high: float, most: int = 6) -> list[float]:
    """Return round values covering low to high, at most about `most` of them; a single value gets room around it."""
    if not high > low:
        spread = abs(low) * 0.1 or 1.0
        low, high = low - spread, high + spread
    raw = (high - low) / most
    power = 10.0 ** math.floor(math.log10(raw))
    step = next(factor * power for factor in (1, 2, 2.5, 5, 10) if factor * power >= raw * (1 - 1e-9))
    first, last = math.floor(low / step + 1e-9), math.ceil(high / step - 1e-9)
    return [round(number * step, 10) for number in range(first, last + 1)]


def label(value: float) -> str:
    """Return a tick's words: 1,200 or 0.75."""
    return f"{value:,.0f}" if abs(value) >= 1000 or float(value).is_integer() else f"{value:g}"
