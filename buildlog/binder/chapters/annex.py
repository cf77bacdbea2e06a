"""The audit annex: heads, amendments and withdrawals, what was erased, and the index by part."""

from collections.abc import Mapping
from typing import Any

from buildlog.aircraft.models import User
from buildlog.binder.book import Book
from buildlog.binder.chapter import Chapter
from buildlog.binder.models import BinderIssue
from buildlog.ledger.actions import said
from buildlog.ledger.models import Event
from buildlog.methods.catalogue import methods
from buildlog.parts.models import Part
from buildlog.profiles import load

CHANGES = ("entry.closed", "photo.withdrawn", "evidence.withdrawn", "sign-off.withdrawn", "body.erase")


def context(book: Book) -> Mapping[str, Any]:
    """Return what was changed after it was on the record, the heads of earlier issues, versions and the index."""
    events = Event.objects.filter(chain=book.head.chain, kind__in=CHANGES).select_related("said").order_by("seq")
    names = dict(User.objects.filter(memberships__aircraft=book.aircraft).values_list("id", "name"))
    changes = [
        {"seq": event.seq, "at": event.at, "by": names.get(event.actor or event.chain, ""), "text": said(event)["text"]}
        for event in events
        if hasattr(event, "said") and not said(event)["text"].startswith("logged ")
    ]
    parts = Part.objects.filter(aircraft=book.aircraft).order_by("number")
    return {
        "events": Event.objects.filter(chain=book.head.chain).count(),
        "changes": changes,
        "issues": BinderIssue.objects.filter(aircraft=book.aircraft).exclude(document=None).order_by("number"),
        "methods": sorted((method.key, method.version) for method in methods().values()),
        "checklist": load.checklist_digest(),
        "index": [(part, book.where.get(f"part-{part.id.hex}", "")) for part in parts],
    }


CHAPTER = Chapter("annex", "Audit annex", 25, context, late=True)
