"""The facts of the engine installation, and what they decide."""

from django.http import HttpResponse

from buildlog.aircraft import actions, queries
from buildlog.aircraft.conversion import outcome
from buildlog.aircraft.facts_form import FactsForm
from buildlog.aircraft.models import Aircraft
from buildlog.web.access import Act, AircraftRequest, aircraft_view
from buildlog.web.forms import run_posted
from buildlog.web.pages import see_other, show


@aircraft_view(write=Act.PLAN, chapter="checks")
def conversion(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Show the facts with what they decide, and say them anew."""
    rows = queries.fact_rows(aircraft)
    stated = queries.values_of(rows)
    form = FactsForm(request.POST if request.method == "POST" else None, stated=stated)
    act = lambda **_: actions.state_facts(aircraft=aircraft, by=request.user, stated=form.changed())  # noqa: E731
    if run_posted(request, form, act) is not None:
        return see_other("conversion", aircraft.id)
    context = {
        "form": form,
        "outcome": outcome(stated),
        "last": max(rows.values(), key=lambda row: row.at, default=None),
    }
    return show(request, "aircraft/conversion.html", context, status=422 if form.errors else 200)
