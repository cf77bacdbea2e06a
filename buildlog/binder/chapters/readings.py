"""Measured conformity: every characteristic with its limits and all its readings, and the instruments."""

from collections.abc import Mapping
from typing import Any

from buildlog.binder.book import Book
from buildlog.binder.chapter import Chapter
from buildlog.readings.queries import every_reading, instrument_views


def context(book: Book) -> Mapping[str, Any]:
    """Return characteristics with their readings, corrected ones among them, those not measured, and instruments."""
    rows = every_reading(book.aircraft)
    return {
        "rows": [(one, views) for one, views in rows if views],
        "missing": [str(one) for one, views in rows if not views],
        "instruments": instrument_views(book.aircraft, book.issue.as_of),
    }


CHAPTER = Chapter("readings", "Measured conformity", 7, context)
