"""One page: what is open, stale or missing, worked out from the record."""

from collections.abc import Mapping
from typing import Any

from buildlog.binder.book import Book
from buildlog.binder.chapter import Chapter
from buildlog.shop.queries import hours_by_person, section_views, task_views


def context(book: Book) -> Mapping[str, Any]:
    """Return the sections and the totals of the log; the gaps are the book's own."""
    people = hours_by_person(book.aircraft)
    return {
        "sections": section_views(book.aircraft, task_views(book.aircraft)),
        "minutes": sum(minutes for _, _, minutes in people),
        "paid": sum(minutes for _, capacity, minutes in people if capacity == "Paid"),
        "photos": book.aircraft.photos.current().count(),
    }


CHAPTER = Chapter("summary", "Summary", 1, context)
