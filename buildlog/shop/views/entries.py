"""Logging work, the day book, and one entry."""

from datetime import timedelta
from typing import Any
from uuid import UUID, uuid4

from django.core.exceptions import ValidationError
from django.http import HttpRequest, HttpResponse, QueryDict
from django.shortcuts import get_object_or_404, render
from django.utils import timezone

from buildlog.aircraft.models import Aircraft
from buildlog.aircraft.roles import Act
from buildlog.errors import Refused
from buildlog.files.forms import take_photos
from buildlog.shop import actions, queries
from buildlog.shop.actions.entries import Overtaken
from buildlog.shop.forms import AmendForm, LogForm, said_by
from buildlog.shop.models import Entry, Task
from buildlog.web.access import AircraftRequest, aircraft_view, forbidden
from buildlog.web.pages import see_other, show

LATE = timedelta(days=7)


@aircraft_view(read=Act.LOG, write=Act.LOG)
def entry_add(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Log work: keeps a draft."""
    form = LogForm(_posted(request), aircraft=aircraft, by=request.user, initial=_initial(request, aircraft))

    def keep(draft: Any) -> Entry:
        client_id = form.cleaned_data["client_id"]
        return actions.log_entry(aircraft=aircraft, by=request.user, client_id=client_id, draft=draft)

    return _answer(request, aircraft, form, keep, {"heading": "Log work"})


def _posted(request: HttpRequest) -> QueryDict | None:
    # An empty post is a post all the same, and has to be told what is missing.
    return request.POST if request.method == "POST" else None


def _initial(request: AircraftRequest, aircraft: Aircraft) -> dict[str, Any]:
    role = request.member.role
    minutes = request.GET.get("minutes", "")
    return {
        "client_id": uuid4(),
        "task": _task(request, aircraft),
        "worked_on": timezone.localdate(),
        "capacity": {"helper": "helper", "assist": "paid"}.get(role, "builder"),
        "time": "other" if minutes else None,
        "time_other": f"{minutes} min" if minutes.isdigit() else "",
        "second_capacity": "helper",
    }


def _task(request: HttpRequest, aircraft: Aircraft) -> Task | None:
    try:
        return aircraft.tasks.filter(id=request.GET["task"]).first() if "task" in request.GET else None
    except ValidationError:
        return None


def _answer(request: AircraftRequest, aircraft: Aircraft, form: LogForm, keep: Any, context: dict[str, Any]) -> Any:
    """Show the log form, or keep what it says; photos that are good stay kept whatever else is wrong."""
    photos: list[Any] = []
    if request.method == "POST":
        photos = list(take_photos(request, form, aircraft=aircraft, by=request.user))
        if not form.errors:
            try:
                return see_other("entry-page", aircraft.id, keep(form.draft(photos)).id)
            except Refused as refusal:
                form.add_error(refusal.field if refusal.field in form.fields else None, refusal.text)
    elif entry := context.get("entry"):
        photos = [link.photo for link in entry.photo_links.all()]
    status = 422 if form.errors else 200
    return show(request, "shop/entry_add.html", {"form": form, "kept_photos": photos, **context}, status=status)


def _entry(aircraft: Aircraft, entry_id: UUID) -> Entry:
    return get_object_or_404(queries.whole(Entry.objects.filter(aircraft=aircraft)), id=entry_id)


@aircraft_view(read=Act.LOG, write=Act.LOG)
def entry_edit(request: AircraftRequest, aircraft: Aircraft, entry_id: UUID) -> HttpResponse:
    """Change a draft of one's own; a draft saved elsewhere meanwhile answers 409 with both texts."""
    entry = _entry(aircraft, entry_id)
    if entry.author_id != request.user.id or entry.closed_at:
        return forbidden(request, "Only its author changes a draft; an entry on the record is amended.")
    first = {**said_by(entry, request.user), "base_version": entry.version}
    form = LogForm(_posted(request), aircraft=aircraft, by=request.user, initial=first)

    def keep(draft: Any) -> Entry:
        base = form.cleaned_data["base_version"] or 0
        return actions.edit_draft(aircraft=aircraft, by=request.user, entry=entry, base_version=base, draft=draft)

    try:
        answer: HttpResponse = _answer(request, aircraft, form, keep, {"heading": "Change draft", "entry": entry})
    except Overtaken as both:
        context = {"entry": both.entry, "sent": both.sibling.fields}
        return render(request, "shop/entry_overtaken.html", context, status=409)
    return answer


@aircraft_view(read=Act.AMEND, write=Act.AMEND)
def entry_amend(request: AircraftRequest, aircraft: Aircraft, entry_id: UUID) -> HttpResponse:
    """Correct an entry on the record by another one."""
    entry = _entry(aircraft, entry_id)
    first = {**said_by(entry, request.user), "client_id": uuid4()}
    form = AmendForm(_posted(request), aircraft=aircraft, by=request.user, initial=first)

    def keep(draft: Any) -> Entry:
        said = {name: form.cleaned_data[name] for name in ("client_id", "amend_reason")}
        return actions.amend_entry(aircraft=aircraft, by=request.user, entry=entry, draft=draft, **said)

    answer: HttpResponse = _answer(request, aircraft, form, keep, {"heading": "Amend entry", "entry": entry})
    return answer


@aircraft_view(read=None, write=Act.LOG)
def entry_close(request: AircraftRequest, aircraft: Aircraft, entry_id: UUID) -> HttpResponse:
    """Put a draft of one's own on the record."""
    try:
        entry = actions.close_entry(aircraft=aircraft, by=request.user, entry=_entry(aircraft, entry_id))
    except Refused as refusal:
        return forbidden(request, refusal.text)
    return see_other("entry-page", aircraft.id, entry.id)


@aircraft_view(chapter="log")
def entry_page(request: HttpRequest, aircraft: Aircraft, entry_id: UUID) -> HttpResponse:
    """Show one entry with its photos, process records and amendments."""
    entry = _entry(aircraft, entry_id)
    late = bool(entry.closed_at and entry.closed_at.date() - entry.worked_on > LATE)
    return show(request, "shop/entry_page.html", {"entry": entry, "recorded_later": late})


@aircraft_view(chapter="log")
def entries(request: HttpRequest, aircraft: Aircraft) -> HttpResponse:
    """Show the day book."""
    words, section = request.GET.get("q", "").strip()[:100], request.GET.get("section", "")
    page = queries.entry_page(aircraft, words=words, section=section, number=request.GET.get("page", "1"))
    context = {
        "page": page,
        "q": words,
        "section": section,
        "sections": aircraft.sections.all(),
        "people": queries.hours_by_person(aircraft),
    }
    return show(request, "shop/entries.html", context)
