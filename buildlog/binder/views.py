"""Asking for a binder, waiting for it, and fetching it."""

from uuid import UUID

from django.conf import settings
from django.http import HttpRequest, HttpResponse
from django.http.response import HttpResponseBase
from django.shortcuts import get_object_or_404
from django.utils import timezone

from buildlog.aircraft.models import Aircraft
from buildlog.aircraft.proof import proven
from buildlog.aircraft.roles import Act
from buildlog.binder import actions, queries
from buildlog.binder.assemble import every_chapter
from buildlog.binder.forms import PrintForm
from buildlog.binder.gaps import gaps
from buildlog.files.views import send_document
from buildlog.profiles import load
from buildlog.web.access import AircraftRequest, aircraft_view
from buildlog.web.forms import run_posted
from buildlog.web.network import network_of
from buildlog.web.pages import see_other, show


@aircraft_view(chapter="binder")
def binders(request: HttpRequest, aircraft: Aircraft) -> HttpResponse:
    """List the issues printed so far, and what an issue printed now would lack."""
    context = {
        "issues": queries.issues(aircraft),
        "gaps": gaps(aircraft, timezone.localdate()),
        "printing": settings.PRINTING,
    }
    return show(request, "binder/binders.html", context)


@aircraft_view(read=Act.MANAGE, write=Act.MANAGE)
def binder_print(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Say what will be printed, ask for paper and proof, and begin."""
    chapters = [(chapter.key, f"{chapter.order} {chapter.title}") for chapter in every_chapter()]
    paper = load.jurisdictions()[aircraft.jurisdiction].paper
    said = request.POST if request.method == "POST" else None
    form = PrintForm(said, chapters=chapters, user=request.user, initial={"paper": paper})
    ask = proven(actions.ask_for_binder, user=request.user, network=network_of(request))
    if issue := run_posted(request, form, ask, aircraft=aircraft, by=request.user):
        return see_other("binder-page", aircraft.id, issue.id)
    context = {
        "form": form,
        "gaps": gaps(aircraft, timezone.localdate()),
        "chapters": chapters,
        "printing": settings.PRINTING,
    }
    return show(request, "binder/binder_print.html", context, status=422 if form.errors else 200)


@aircraft_view(chapter="binder")
def binder_page(request: HttpRequest, aircraft: Aircraft, issue_id: UUID) -> HttpResponse:
    """Show one issue: how far its print is, or its digest and the head it stands for."""
    rows = aircraft.binders.select_related("asked_by", "document__blob")
    found = queries.view(get_object_or_404(rows, id=issue_id))
    return show(request, "binder/binder_page.html", {"view": found, "issue": found.issue}, partial="state")


@aircraft_view(read=Act.FETCH, chapter="binder")
def binder_download(request: HttpRequest, aircraft: Aircraft, issue_id: UUID) -> HttpResponseBase:
    """Give the printed file, byte for byte as it was issued."""
    issue = get_object_or_404(aircraft.binders.exclude(document=None).select_related("document__blob"), id=issue_id)
    assert issue.document is not None
    return send_document(issue.document, name=f"binder-{aircraft.serial}-issue-{issue.number}.pdf")
