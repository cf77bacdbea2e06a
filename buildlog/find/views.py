"""Find, the trail of one record, and recent changes: for members; a reviewer's link opens chapters, not these."""

from uuid import UUID

from django.http import Http404, HttpResponse

from buildlog.aircraft.models import Aircraft
from buildlog.aircraft.roles import Act
from buildlog.find import asking, queries, trails
from buildlog.ledger.queries import head
from buildlog.web.access import AircraftRequest, aircraft_view
from buildlog.web.pages import show

PAGE_OF = {
    "Batch": "batch-page",
    "BinderIssue": "binder-page",
    "Entry": "entry-page",
    "Part": "part-page",
    "Photo": "photo-page",
    "Snapshot": "snapshot-page",
    "Task": "task-page",
}
LARGEST_NUMBER = 2**31


@aircraft_view(read=Act.COMMENT)
def find(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Look for words, numbers and dates in everything this aircraft's record holds."""
    asked, only = asking.read(request.GET.get("q", "")), request.GET.get("kind", "")
    context = {"asked": asked, "only": only, "prefixes": asking.PREFIXES}
    if asked.is_empty:
        context["hints"] = queries.hints(aircraft)
    else:
        context["found"] = queries.find(aircraft, asked, only=only)
    return show(request, "find/find.html", context)


@aircraft_view(read=Act.COMMENT)
def trail(request: AircraftRequest, aircraft: Aircraft, subject_id: UUID) -> HttpResponse:
    """Show the history of one record."""
    told = trails.trail(aircraft, subject_id)
    if told is None:
        raise Http404("This aircraft's ledger does not name it.")
    context = {"trail": told, "subject": subject_id, "page_name": PAGE_OF.get(told.model, "")}
    return show(request, "find/trail.html", context)


@aircraft_view(read=Act.COMMENT)
def recent_changes(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Show all events of this aircraft, newest first, with the head of its chain."""
    spelled = request.GET.get("before", "")
    before = min(int(spelled), LARGEST_NUMBER) if spelled.isdecimal() else None
    lines, older = trails.recent(aircraft, before=before)
    context = {"lines": lines, "older": older, "before": before, "head": head(aircraft)}
    return show(request, "find/recent_changes.html", context)
