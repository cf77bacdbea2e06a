"""The page of the aircraft: for members; a reviewer by link begins at the list of their chapters."""

from itertools import pairwise

from django.http import HttpResponse
from django.utils import timezone

from buildlog.aircraft.models import Aircraft
from buildlog.aircraft.roles import Act
from buildlog.desk import queries
from buildlog.drawing.charts import SNUG, bar_chart
from buildlog.profiles import load
from buildlog.web.access import AircraftRequest, aircraft_view
from buildlog.web.pages import show

HOUR = 60


@aircraft_view(read=Act.COMMENT)
def aircraft_page(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Show what is still open, how far each section is, hours, weights and the latest entries."""
    told = queries.overview(aircraft, timezone.localdate())
    context = {
        "overview": told,
        "jurisdiction": load.jurisdictions()[aircraft.jurisdiction],
        "chart": _chart(told.hours.weeks) if told.hours.minutes else "",
        "states": [state for state in SHOWN if any(state in one.states for one in told.sections)],
    }
    return show(request, "desk/aircraft_page.html", context)


SHOWN = ("to-do", "in-work", "waiting", "done", "not-needed")


def _chart(weeks: list[queries.Week]) -> str:
    """Return the hours of each week as bars; a month is named at its first week."""
    names = [f"{weeks[0].monday:%b}"]
    names += [f"{b.monday:%b}" if b.monday.month != a.monday.month else "" for a, b in pairwise(weeks)]
    bars = [(name, week.minutes / HOUR) for name, week in zip(names, weeks, strict=True)]
    most = max(value for _, value in bars)
    title = f"Bars: hours of each week, {len(bars)} weeks, at most {most:.1f} h; the figures stand below"
    return bar_chart(bars, y_label="hours a week", title=title, sheet=SNUG)
