"""What it is made of: parts by origin, where each sits, their papers, and the batches of material."""

from collections.abc import Mapping
from typing import Any

from django.db.models import Prefetch

from buildlog.binder.book import Book
from buildlog.binder.chapter import Chapter
from buildlog.files.models import Document
from buildlog.parts.models import Batch, Installation, Part, PartBatch, PartDocument
from buildlog.profiles import load


def context(book: Book) -> Mapping[str, Any]:
    """Return parts (critical first), installations with history, documents and batches."""
    parts = (
        Part.objects.filter(aircraft=book.aircraft)
        .prefetch_related(
            Prefetch("batch_links", PartBatch.objects.select_related("batch")),
            Prefetch("document_links", PartDocument.objects.select_related("document__blob")),
            "installations",
        )
        .order_by("-critical", "number", "serial")
    )
    installed = (
        Installation.objects.filter(aircraft=book.aircraft)
        .select_related("part", "installed_by")
        .order_by("position", "installed_on")
    )
    titles = {key: position.title for key, position in load.positions().items()}
    return {
        "parts": parts,
        "unknown": [part for part in parts if part.origin == Part.Origin.UNKNOWN],
        "installed": [(titles.get(row.position, row.position), row) for row in installed],
        "batches": Batch.objects.filter(aircraft=book.aircraft).select_related("certificate"),
        "documents": Document.objects.filter(aircraft=book.aircraft)
        .exclude(kind=Document.Kind.BINDER)
        .select_related("blob")
        .order_by("kind", "title"),
    }


CHAPTER = Chapter("parts", "Parts and documents", 6, context)
