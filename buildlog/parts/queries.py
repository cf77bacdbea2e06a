"""Parts, batches and positions as pages ask for them."""

import datetime as dt
from dataclasses import dataclass
from typing import Any

from django.core.paginator import Page, Paginator
from django.db.models import Prefetch, Q, QuerySet

from buildlog.aircraft.models import Aircraft
from buildlog.parts.models import Batch, Installation, Part, PartBatch, PartDocument, PartPhoto

PER_PAGE = 40


def part_page(aircraft: Aircraft, *, words: str = "", origin: str = "", number: int | str = 1) -> Page[Any]:
    """Return one page of parts with where each sits, in two queries and a count."""
    places = Prefetch("installations", Installation.objects.in_place(), to_attr="places")
    rows = aircraft.parts.prefetch_related(places)
    if words:
        asked = Q(number__icontains=words) | Q(name__icontains=words)
        rows = rows.filter(asked | Q(serial__icontains=words) | Q(supplier__icontains=words))
    if origin:
        rows = rows.filter(origin=origin)
    return Paginator(rows.order_by("number", "serial", "id"), PER_PAGE).get_page(number)


def whole_part(aircraft: Aircraft) -> QuerySet[Part]:
    """Return the query of parts with everything that belongs to them."""
    return aircraft.parts.select_related("added_by").prefetch_related(
        Prefetch("batch_links", PartBatch.objects.select_related("batch")),
        Prefetch("document_links", PartDocument.objects.select_related("document__blob")),
        Prefetch("photo_links", PartPhoto.objects.select_related("photo__blob")),
        Prefetch("installations", Installation.objects.select_related("installed_by").order_by("-installed_on")),
    )


@dataclass(frozen=True)
class BatchView:
    """A batch, and whether its expiry has passed on the day asked."""

    batch: Batch
    expired: bool


def batch_views(aircraft: Aircraft, on: dt.date) -> list[BatchView]:
    """Return all batches in one query."""
    rows = aircraft.batches.select_related("certificate")
    return [BatchView(row, bool(row.expires_on and row.expires_on < on)) for row in rows]


def sitting(aircraft: Aircraft) -> dict[str, Installation]:
    """Return what sits in each position today."""
    return {row.position: row for row in aircraft.installations.in_place().select_related("part")}
