"""Calculations: the list, the form of a method, and a snapshot."""

from typing import Any
from uuid import UUID, uuid4

from django.http import Http404, HttpRequest, HttpResponse

from buildlog.aircraft.models import Aircraft
from buildlog.aircraft.roles import Act, may
from buildlog.calcs import forms, queries
from buildlog.calcs.actions import take_snapshot
from buildlog.drawing.charts import plot
from buildlog.errors import Refused
from buildlog.methods.catalogue import methods
from buildlog.methods.declare import Method
from buildlog.methods.result import Result
from buildlog.methods.run import run
from buildlog.parts.models import Installation
from buildlog.web.access import AircraftRequest, aircraft_view, forbidden
from buildlog.web.pages import see_other, show


@aircraft_view(chapter="calculations")
def calculations(request: HttpRequest, aircraft: Aircraft) -> HttpResponse:
    """List the methods by theme, and the runs that were kept."""
    themes: dict[str, list[Method]] = {}
    for method in methods().values():
        themes.setdefault(method.theme, []).append(method)
    context = {"themes": themes, "views": queries.snapshot_views(aircraft)}
    return show(request, "calcs/calculations.html", context)


@aircraft_view(read=Act.COMMENT, write=Act.COMMENT)
def calculation_run(request: AircraftRequest, aircraft: Aircraft, key: str) -> HttpResponse:
    """Work a method out, and keep the run as a snapshot on demand."""
    method = methods().get(key)
    if method is None:
        raise Http404("No such method.")
    views = queries.snapshot_views(aircraft)
    if request.method == "POST":
        return _posted(request, aircraft, method, views)
    before = next((view for view in views if view.snapshot.id == forms.uuid_or_none(request.GET.get("again"))), None)
    said = forms.again(before, method) if before and before.snapshot.method == key else {}
    return _form(request, aircraft, method, forms.build(method, said, views), {"before": before})


def _posted(
    request: AircraftRequest, aircraft: Aircraft, method: Method, views: list[queries.SnapshotView]
) -> HttpResponse:
    post = request.POST
    form = forms.build(method, post.dict(), views, more_rows=6 if "more" in post else 0)
    before = next((view for view in views if view.snapshot.id == forms.uuid_or_none(post.get("supersedes"))), None)
    context: dict[str, Any] = {"before": before, "label": post.get("label", "")[:160]}
    if "more" in post:
        return _form(request, aircraft, method, form, context)
    try:
        given, sources = forms.given(method, post, views)
        if "keep" in post:
            if not may(request.member.role, Act.PLAN):
                return forbidden(request, "Builders keep calculations; you can work them out here.")
            snapshot = take_snapshot(
                aircraft=aircraft,
                by=request.user,
                client_id=forms.uuid_or_none(post.get("client_id")) or uuid4(),
                method=method.key,
                given=given,
                label=context["label"],
                sources=sources,
                holds_for=list(_places(aircraft).filter(position__in=post.getlist("holds_for"))),
                supersedes=before.snapshot if before else None,
            )
            return see_other("snapshot-page", aircraft.id, snapshot.id)
        return _form(request, aircraft, method, form, context | {"result": run(method, given)})
    except Refused as refusal:
        form.refuse(refusal)
        return _form(request, aircraft, method, form, context, status=422)


def _places(aircraft: Aircraft) -> Any:
    return Installation.objects.in_place().filter(aircraft=aircraft).select_related("part").order_by("position")


def _form(
    request: HttpRequest,
    aircraft: Aircraft,
    method: Method,
    form: forms.MethodForm,
    more: dict[str, Any],
    status: int = 200,
) -> HttpResponse:
    result: Result | None = more.get("result")
    context = {
        "method": method,
        "method_form": form,
        "errors": form.error,
        "places": _places(aircraft),
        "held": request.POST.getlist("holds_for"),
        "client_id": request.POST.get("client_id") or uuid4(),
        "drawing": plot(result.plot) if result and result.plot else "",
    }
    return show(request, "calcs/calculation_run.html", context | more, status=status)


@aircraft_view(chapter="calculations")
def snapshot_page(request: HttpRequest, aircraft: Aircraft, snapshot_id: UUID) -> HttpResponse:
    """Show a kept run: inputs and where they came from, result, steps, plot, source, and whether it holds."""
    view = queries.snapshot_view(aircraft, snapshot_id)
    if view is None:
        raise Http404("No such snapshot.")
    sources = view.snapshot.sources.select_related("source", "part")
    drawing = plot(view.result.plot) if view.result.plot else ""
    context = {
        "view": view,
        "snapshot": view.snapshot,
        "result": view.result,
        "sources": sources,
        "drawing": drawing,
        "is_built": view.snapshot.method in methods(),
    }
    return show(request, "calcs/snapshot_page.html", context)
