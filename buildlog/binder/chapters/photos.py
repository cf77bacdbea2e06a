"""The photo proof set: per section the photos that show a builder at work, then the first others."""

from collections.abc import Mapping
from typing import Any

from buildlog.binder.book import Book
from buildlog.binder.chapter import Chapter
from buildlog.shop.models import EntryPhoto

BEST = 3  # photos printed for each section; the log holds them all


def context(book: Book) -> Mapping[str, Any]:
    """Return up to three photos of each section, those with a builder in frame first, and the sections without any."""
    links = (
        EntryPhoto.objects.filter(entry__aircraft=book.aircraft, entry__closed_at__isnull=False)
        .exclude(entry__task=None)
        .select_related("photo__blob", "photo__added_by", "entry__task__section", "entry__author")
        .order_by("-photo__shows_builder", "entry__worked_on", "place")
    )
    chosen: dict[Any, list[EntryPhoto]] = {}
    seen = set()
    for link in links:
        assert link.entry.task is not None
        row = chosen.setdefault(link.entry.task.section_id, [])
        if len(row) < BEST and link.photo_id not in seen:
            seen.add(link.photo_id)
            row.append(link)
    sections = [(section, chosen.get(section.id, [])) for section in book.aircraft.sections.all()]
    return {"sections": sections, "none": [str(section) for section, row in sections if not row]}


CHAPTER = Chapter("photos", "Photo proof set", 5, context)
