"""Parts and batches."""

from uuid import UUID

from django.http import HttpRequest, HttpResponse
from django.shortcuts import get_object_or_404
from django.utils import timezone

from buildlog.aircraft.models import Aircraft
from buildlog.aircraft.roles import Act
from buildlog.files.forms import take_photos
from buildlog.parts import actions, queries
from buildlog.parts.forms import BatchForm, InstallForm, PartForm
from buildlog.parts.models import Part
from buildlog.web.access import AircraftRequest, aircraft_view
from buildlog.web.forms import run, run_posted
from buildlog.web.pages import see_other, show


@aircraft_view(chapter="parts")
def parts(request: HttpRequest, aircraft: Aircraft) -> HttpResponse:
    """List the parts."""
    words, origin = request.GET.get("q", "").strip()[:100], request.GET.get("origin", "")
    page = queries.part_page(aircraft, words=words, origin=origin, number=request.GET.get("page", "1"))
    context = {"page": page, "q": words, "origin": origin, "origins": Part.Origin.choices}
    return show(request, "parts/parts.html", context)


@aircraft_view(chapter="parts")
def part_page(request: HttpRequest, aircraft: Aircraft, part_id: UUID) -> HttpResponse:
    """Show one part with its papers, photos, batches and every position it sat in."""
    part = get_object_or_404(queries.whole_part(aircraft), id=part_id)
    return show(request, "parts/part_page.html", {"part": part})


@aircraft_view(read=Act.PLAN, write=Act.PLAN)
def part_add(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Enter a part, with photos."""
    form = PartForm(
        request.POST if request.method == "POST" else None, aircraft=aircraft, initial={"inspection": "waiting"}
    )
    photos = _photos(request, aircraft, form)
    if not form.errors and request.method == "POST":
        part = run(form, actions.add_part, aircraft=aircraft, by=request.user, photos=photos)
        if part:
            return see_other("part-page", aircraft.id, part.id)
    context = {"form": form, "heading": "Enter a part", "kept_photos": photos}
    return show(request, "parts/part_edit.html", context, status=422 if form.errors else 200)


def _photos(request: AircraftRequest, aircraft: Aircraft, form: PartForm) -> list[object]:
    return list(take_photos(request, form, aircraft=aircraft, by=request.user)) if request.method == "POST" else []


@aircraft_view(read=Act.PLAN, write=Act.PLAN)
def part_edit(request: AircraftRequest, aircraft: Aircraft, part_id: UUID) -> HttpResponse:
    """Change what is said of a part; note its receiving inspection."""
    part = get_object_or_404(aircraft.parts, id=part_id)
    first = {name: getattr(part, name) for name in PartForm.base_fields if hasattr(part, name)}
    first["batches"] = [link.batch_id for link in part.batch_links.all()]
    first["documents"] = [link.document_id for link in part.document_links.all()]
    form = PartForm(request.POST if request.method == "POST" else None, aircraft=aircraft, initial=first)
    photos = _photos(request, aircraft, form)
    if not form.errors and request.method == "POST":
        form.cleaned_data.pop("client_id", None)
        if run(form, actions.change_part, aircraft=aircraft, by=request.user, part=part, photos=photos):
            return see_other("part-page", aircraft.id, part.id)
    context = {"form": form, "heading": f"Change {part}", "kept_photos": photos}
    return show(request, "parts/part_edit.html", context, status=422 if form.errors else 200)


@aircraft_view(read=Act.PLAN, write=Act.PLAN)
def part_install(request: AircraftRequest, aircraft: Aircraft, part_id: UUID) -> HttpResponse:
    """Put a part in a position."""
    part = get_object_or_404(aircraft.parts, id=part_id)
    form = InstallForm(request.POST or None, initial={"installed_on": timezone.localdate()})
    if run_posted(request, form, actions.install_part, aircraft=aircraft, by=request.user, part=part):
        return see_other("part-page", aircraft.id, part.id)
    context = {"form": form, "part": part, "sitting": queries.sitting(aircraft)}
    return show(request, "parts/part_install.html", context, status=422 if form.errors else 200)


@aircraft_view(chapter="parts")
def batches(request: HttpRequest, aircraft: Aircraft) -> HttpResponse:
    """List the batches of material."""
    return show(request, "parts/batches.html", {"views": queries.batch_views(aircraft, timezone.localdate())})


@aircraft_view(read=Act.PLAN, write=Act.PLAN)
def batch_add(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Book in a lot of material."""
    form = BatchForm(request.POST or None, aircraft=aircraft, initial={"received_on": timezone.localdate()})
    if run_posted(request, form, actions.add_batch, aircraft=aircraft, by=request.user):
        return see_other("batches", aircraft.id)
    return show(request, "parts/batch_add.html", {"form": form}, status=422 if form.errors else 200)


@aircraft_view(chapter="parts")
def batch_page(request: HttpRequest, aircraft: Aircraft, batch_id: UUID) -> HttpResponse:
    """Show where a batch went: parts made from it, and entries that used it."""
    rows = aircraft.batches.select_related("certificate").prefetch_related("part_links__part", "processes__entry__task")
    return show(request, "parts/batch_page.html", {"batch": get_object_or_404(rows, id=batch_id)})
