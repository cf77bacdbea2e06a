"""Who built it, in what capacity, and for how long."""

from collections.abc import Mapping
from typing import Any

from django.db.models import Max, Min, Sum

from buildlog.binder.book import Book
from buildlog.binder.chapter import Chapter
from buildlog.shop.models import Entry, LabourLine


def context(book: Book) -> Mapping[str, Any]:
    """Return the members, and the hours of every person named in a closed entry, by capacity."""
    lines = LabourLine.objects.filter(entry__in=Entry.objects.filter(aircraft=book.aircraft).current())
    hours = (
        lines.values("person_name", "capacity")
        .annotate(minutes=Sum("minutes"), first=Min("entry__worked_on"), last=Max("entry__worked_on"))
        .order_by("person_name", "capacity")
    )
    words = dict(LabourLine.Capacity.choices)
    rows = [{**row, "capacity": words[row["capacity"]]} for row in hours]
    return {
        "members": book.aircraft.members.select_related("user").order_by("started_on", "user__name"),
        "hours": rows,
        "total": sum(row["minutes"] for row in rows),
    }


CHAPTER = Chapter("people", "People and capacities", 2, context)
