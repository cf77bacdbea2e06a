"""Spans of work as people type them."""

import re

from buildlog.errors import Refused

CLOCK = re.compile(r"(\d{1,2}):([0-5]\d)\Z")
MINUTES = re.compile(r"(\d{1,4})\s*(?:m|min|minutes?)\Z", re.I)
HOURS = re.compile(r"(\d{1,2}(?:[.,]\d{1,2})?)\s*(?:h|hours?)?\Z", re.I)
BOTH = re.compile(r"(\d{1,2})\s*h(?:ours?)?\s*(\d{1,2})(?:\s*m(?:in)?)?\Z", re.I)
HALF = re.compile(r"(\d{0,2})\s*½\s*h?\Z")


def read_minutes(text: str, *, field: str) -> int:
    """Return the minutes of a span: 1.5, 1,5, 1:30, 1 h 30, 90 min, ½; bare numbers are hours. Refused otherwise."""
    plain = text.strip()
    if match := CLOCK.match(plain) or BOTH.match(plain):
        minutes = int(match[1]) * 60 + int(match[2])
    elif match := MINUTES.match(plain):
        minutes = int(match[1])
    elif match := HALF.match(plain):
        minutes = int(match[1] or 0) * 60 + 30
    elif match := HOURS.match(plain):
        minutes = round(float(match[1].replace(",", ".")) * 60)
    else:
        raise Refused("Write the time like 1.5 or 1:30 for hours, or 90 min.", field=field)
    if not 0 < minutes <= 24 * 60:
        raise Refused("One spell of work lasts more than nothing and at most 24 hours.", field=field)
    return minutes
