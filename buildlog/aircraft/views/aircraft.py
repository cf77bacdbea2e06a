"""The aircraft, its sections and zones."""

from typing import cast
from uuid import UUID

from django.http import HttpRequest, HttpResponse
from django.shortcuts import get_object_or_404

from buildlog.aircraft import actions
from buildlog.aircraft.forms import AircraftForm, NewAircraftForm, NewSectionForm, NewZoneForm, SectionForm, ZoneForm
from buildlog.aircraft.models import Aircraft, Section, User, Zone
from buildlog.aircraft.queries import aircraft_of, section_tree
from buildlog.web.access import Act, AircraftRequest, aircraft_view, signed_in
from buildlog.web.forms import run_posted
from buildlog.web.pages import see_other, show


@signed_in
def aircraft_list(request: HttpRequest) -> HttpResponse:
    """Lead to the one aircraft's Bench; show the list where there are several, none, or it was asked for."""
    rows = aircraft_of(cast(User, request.user))
    if len(rows) == 1 and "all" not in request.GET:
        return see_other("bench", rows[0].aircraft.id)
    return show(request, "aircraft/aircraft_list.html", {"rows": rows})


@signed_in
def aircraft_add(request: HttpRequest) -> HttpResponse:
    """Begin the record of another aircraft."""
    form = NewAircraftForm(request.POST or None)
    if row := run_posted(request, form, actions.create_aircraft, by=request.user):
        return see_other("conversion", row.id)
    status = 422 if form.errors else 200
    return show(request, "aircraft/aircraft_add.html", {"form": form}, status=status)


@aircraft_view(read=Act.MANAGE, write=Act.MANAGE)
def aircraft_edit(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Correct the title block."""
    initial = {name: getattr(aircraft, name) for name in AircraftForm.base_fields}
    form = AircraftForm(request.POST or None, initial=initial)
    if run_posted(request, form, actions.edit_aircraft, aircraft=aircraft, by=request.user):
        return see_other("sections", aircraft.id)
    if form.errors:
        aircraft.refresh_from_db()  # the frame shows the name on record, not the refused one
    status = 422 if form.errors else 200
    return show(request, "aircraft/aircraft_edit.html", {"form": form}, status=status)


@aircraft_view(write=Act.PLAN)
def sections(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Show the work breakdown, and add a section to it."""
    form = NewSectionForm(request.POST or None, aircraft=aircraft)
    if run_posted(request, form, actions.add_section, aircraft=aircraft, by=request.user):
        return see_other("sections", aircraft.id)
    context = {"form": form, "sections": section_tree(aircraft)}
    return show(request, "aircraft/sections.html", context, status=422 if form.errors else 200)


@aircraft_view(read=Act.PLAN, write=Act.PLAN)
def section_edit(request: AircraftRequest, aircraft: Aircraft, section_id: UUID) -> HttpResponse:
    """Renumber, rename or move a section."""
    row = get_object_or_404(Section.objects.select_related("aircraft"), aircraft=aircraft, id=section_id)
    initial = {"number": row.number, "title": row.title, "parent": row.parent_id}
    form = SectionForm(request.POST or None, aircraft=aircraft, initial=initial)
    if run_posted(request, form, actions.edit_section, aircraft=aircraft, by=request.user, section=row):
        return see_other("sections", aircraft.id)
    status = 422 if form.errors else 200
    return show(request, "aircraft/section_edit.html", {"form": form, "was": initial}, status=status)


@aircraft_view(write=Act.PLAN)
def zones(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Show the zones, and add one."""
    form = NewZoneForm(request.POST or None)
    if run_posted(request, form, actions.add_zone, aircraft=aircraft, by=request.user):
        return see_other("zones", aircraft.id)
    context = {"form": form, "zones": aircraft.zones.all()}
    return show(request, "aircraft/zones.html", context, status=422 if form.errors else 200)


@aircraft_view(read=Act.PLAN, write=Act.PLAN)
def zone_edit(request: AircraftRequest, aircraft: Aircraft, zone_id: UUID) -> HttpResponse:
    """Correct a zone."""
    row = get_object_or_404(Zone.objects.select_related("aircraft"), aircraft=aircraft, id=zone_id)
    initial = {"code": row.code, "title": row.title}
    form = ZoneForm(request.POST or None, initial=initial)
    if run_posted(request, form, actions.edit_zone, aircraft=aircraft, by=request.user, zone=row):
        return see_other("zones", aircraft.id)
    status = 422 if form.errors else 200
    return show(request, "aircraft/zone_edit.html", {"form": form, "was": initial}, status=status)
