"""Readings, the characteristics they measure, and instruments."""

from typing import Any
from uuid import UUID

from django.core.exceptions import ValidationError
from django.http import Http404, HttpRequest, HttpResponse
from django.shortcuts import get_object_or_404
from django.utils import timezone

from buildlog.aircraft.models import Aircraft
from buildlog.aircraft.roles import Act
from buildlog.drawing.dots import Dot, dots_in_band
from buildlog.files.forms import take_photos
from buildlog.methods import units
from buildlog.readings import actions, queries
from buildlog.readings.forms import CharacteristicForm, InstrumentForm, ReadingForm
from buildlog.readings.models import Characteristic, Reading
from buildlog.web.access import AircraftRequest, aircraft_view
from buildlog.web.forms import run, run_posted
from buildlog.web.pages import see_other, show


@aircraft_view(chapter="readings")
def readings(request: HttpRequest, aircraft: Aircraft) -> HttpResponse:
    """List what is measured, with its present value and verdict."""
    words, state = request.GET.get("q", "").strip()[:100], request.GET.get("state", "")
    number = request.GET.get("page", "1")
    page, counts = queries.present_page(aircraft, words=words, state=state, number=number)
    return show(request, "readings/readings.html", {"page": page, "counts": counts, "q": words, "chosen": state})


@aircraft_view(chapter="readings")
def characteristic_page(request: HttpRequest, aircraft: Aircraft, characteristic_id: UUID) -> HttpResponse:
    """Show one characteristic: its limits, its present value, its readings over time."""
    characteristic = get_object_or_404(queries.characteristic_of(aircraft, characteristic_id))
    views = queries.readings_of(characteristic)
    counted = [view for view in views if view.counts]
    context = {
        "present": queries.Present(characteristic, counted[0] if counted else None),
        "views": views,
        "limits": actions.limit_words(characteristic),
        "chart": _chart(characteristic, counted),
    }
    return show(request, "readings/characteristic_page.html", context)


def _chart(characteristic: Characteristic, views: list[queries.ReadingView]) -> str:
    if not views:
        return ""
    dots = [
        Dot(one.reading.read_on, float(one.reading.value), float(one.reading.uncertainty or 0), one.verdict)
        for one in reversed(views)
    ]
    lower, upper, nominal = [
        float(text) if text else None for text in (characteristic.lower, characteristic.upper, characteristic.nominal)
    ]
    unit = units.shown(characteristic.unit)
    title = f"{characteristic}: {len(dots)} reading{'s' if len(dots) > 1 else ''} against its limits"
    return dots_in_band(dots, lower=lower, upper=upper, nominal=nominal, unit=unit, title=title)


@aircraft_view(read=Act.PLAN, write=Act.PLAN)
def characteristic_add(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Declare something measurable."""
    form = CharacteristicForm(request.POST if request.method == "POST" else None)
    if row := run_posted(request, form, actions.add_characteristic, aircraft=aircraft, by=request.user):
        return see_other("characteristic-page", aircraft.id, row.id)
    context = {"form": form, "heading": "Declare what is measured"}
    return show(request, "readings/characteristic_edit.html", context, status=422 if form.errors else 200)


@aircraft_view(read=Act.PLAN, write=Act.PLAN)
def characteristic_edit(request: AircraftRequest, aircraft: Aircraft, characteristic_id: UUID) -> HttpResponse:
    """Change words or limits."""
    row = get_object_or_404(aircraft.characteristics, id=characteristic_id)
    form = CharacteristicForm(request.POST if request.method == "POST" else None, initial=_first(row))
    del form.fields["client_id"]
    about = {"aircraft": aircraft, "by": request.user, "characteristic": row}
    if run_posted(request, form, actions.change_characteristic, **about):
        return see_other("characteristic-page", aircraft.id, row.id)
    context = {"form": form, "heading": f"Change {row}", "row": row}
    return show(request, "readings/characteristic_edit.html", context, status=422 if form.errors else 200)


def _first(row: Any) -> dict[str, Any]:
    return {field.name: getattr(row, field.name) for field in row._meta.concrete_fields}


@aircraft_view(read=Act.LOG, write=Act.LOG)
def reading_add(request: AircraftRequest, aircraft: Aircraft, characteristic_id: UUID) -> HttpResponse:
    """Take a reading, or correct one (?amends=)."""
    characteristic = get_object_or_404(aircraft.characteristics, id=characteristic_id)
    amends = _amended(request, characteristic)
    posted = request.POST if request.method == "POST" else None
    form = ReadingForm(posted, aircraft=aircraft, amends=amends, initial=_begin(amends))
    photos: list[Any] = []
    if request.method == "POST":
        photos = list(take_photos(request, form, aircraft=aircraft, by=request.user))
        about = {"characteristic": characteristic, "amends": amends, "photo": photos[0] if photos else None}
        made = None if form.errors else run(form, actions.record_reading, aircraft=aircraft, by=request.user, **about)
        if made is not None:
            return see_other("characteristic-page", aircraft.id, characteristic.id)
    context = {"form": form, "row": characteristic, "amends": amends, "kept_photos": photos}
    context["limits"] = actions.limit_words(characteristic)
    return show(request, "readings/reading_add.html", context, status=422 if form.errors else 200)


def _amended(request: HttpRequest, characteristic: Characteristic) -> Reading | None:
    asked = request.GET.get("amends")
    if not asked:
        return None
    try:
        return get_object_or_404(characteristic.readings, id=asked)
    except ValidationError:
        raise Http404("No such reading.") from None


def _begin(amends: Reading | None) -> dict[str, Any]:
    if amends is None:
        return {"read_on": timezone.localdate()}
    return {"read_on": amends.read_on, "instrument": amends.instrument_id, "note": amends.note}


@aircraft_view(chapter="readings")
def instruments(request: HttpRequest, aircraft: Aircraft) -> HttpResponse:
    """List the instruments and until when their calibration holds."""
    views = queries.instrument_views(aircraft, timezone.localdate())
    return show(request, "readings/instruments.html", {"views": views})


@aircraft_view(read=Act.LOG, write=Act.LOG)
def instrument_add(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Enter an instrument."""
    form = InstrumentForm(request.POST if request.method == "POST" else None, aircraft=aircraft)
    if run_posted(request, form, actions.add_instrument, aircraft=aircraft, by=request.user):
        return see_other("instruments", aircraft.id)
    context = {"form": form, "heading": "Enter an instrument"}
    return show(request, "readings/instrument_edit.html", context, status=422 if form.errors else 200)


@aircraft_view(read=Act.LOG, write=Act.LOG)
def instrument_edit(request: AircraftRequest, aircraft: Aircraft, instrument_id: UUID) -> HttpResponse:
    """Change what is said of an instrument."""
    row = get_object_or_404(aircraft.instruments, id=instrument_id)
    form = InstrumentForm(request.POST if request.method == "POST" else None, aircraft=aircraft, initial=_first(row))
    del form.fields["client_id"]
    if run_posted(request, form, actions.change_instrument, aircraft=aircraft, by=request.user, instrument=row):
        return see_other("instruments", aircraft.id)
    context = {"form": form, "heading": f"Change {row}"}
    return show(request, "readings/instrument_edit.html", context, status=422 if form.errors else 200)
