"""The log in one table: what was done in each section, by whom, for how long, and when last."""

from collections.abc import Mapping
from typing import Any

from django.db.models import Max, Min, Sum

from buildlog.binder.book import Book
from buildlog.binder.chapter import Chapter
from buildlog.shop.models import Entry, LabourLine
from buildlog.shop.queries import section_views, task_views


def context(book: Book) -> Mapping[str, Any]:
    """Return the sections with their tasks, and hours and days of each from the entries on the record."""
    current = Entry.objects.filter(aircraft=book.aircraft).current()
    days = current.values_list("task__section").annotate(first=Min("worked_on"), last=Max("worked_on"))
    spans = {section: (first, last) for section, first, last in days}
    lines = LabourLine.objects.filter(entry__in=current, capacity=LabourLine.Capacity.PAID)
    paid = dict(lines.values_list("entry__task__section").annotate(total=Sum("minutes")))
    sections = section_views(book.aircraft, task_views(book.aircraft))
    rows = [(one, spans.get(one.section.id), paid.get(one.section.id, 0)) for one in sections]
    return {"rows": rows, "total": sum(one.minutes for one in sections)}


CHAPTER = Chapter("digest", "Log digest", 3, context)
