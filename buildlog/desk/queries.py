"""One aircraft at a glance, worked out from every room in a fixed number of queries."""

import datetime as dt
from collections import Counter
from collections.abc import Mapping
from dataclasses import dataclass

from django.db.models import Sum

from buildlog.aircraft.models import Aircraft, Member
from buildlog.aircraft.queries import people_of
from buildlog.binder.gaps import Gap, gaps
from buildlog.methods.result import Came, from_record
from buildlog.shop.models import Entry, LabourLine
from buildlog.shop.queries import SectionView, section_views, task_views, whole
from buildlog.weighing.models import Weighing

WEEKS = 26
LATEST = 5


@dataclass(frozen=True)
class Week:
    """The minutes on the record of one week, named by its Monday."""

    monday: dt.date
    minutes: int


@dataclass(frozen=True)
class PersonHours:
    """What one person put on the record in one capacity."""

    name: str
    capacity: str
    minutes: int


@dataclass(frozen=True)
class Hours:
    """Hours of all entries on the record: in all, of the last half year by week, and by person and capacity."""

    minutes: int
    weeks: list[Week]
    people: list[PersonHours]

    @property
    def lately(self) -> int:
        """Return the mean minutes a week over the last four weeks."""
        return sum(week.minutes for week in self.weeks[-4:]) // 4


@dataclass(frozen=True)
class Weighed:
    """The last weighing with what its calculation gave."""

    weighing: Weighing
    outputs: tuple[Came, ...]


@dataclass(frozen=True)
class Overview:
    """Everything the page of an aircraft shows."""

    builders: list[Member]
    open: list[Gap]
    sections: list[SectionView]
    hours: Hours
    weighed: Weighed | None
    latest: list[Entry]


def overview(aircraft: Aircraft, on: dt.date) -> Overview:
    """Return one aircraft at a glance, as of a day."""
    latest = whole(Entry.objects.filter(aircraft=aircraft).current()).order_by("-worked_on", "-saved_at")
    return Overview(
        builders=[member for member in people_of(aircraft) if member.role == Member.MemberRole.BUILDER],
        open=gaps(aircraft, on),
        sections=section_views(aircraft, task_views(aircraft)),
        hours=hours(aircraft, on),
        weighed=_weighed(aircraft),
        latest=list(latest[:LATEST]),
    )


def hours(aircraft: Aircraft, on: dt.date) -> Hours:
    """Return the hours on the record in one query."""
    lines = LabourLine.objects.filter(entry__in=Entry.objects.filter(aircraft=aircraft).current())
    rows = lines.values_list("entry__worked_on", "person_name", "capacity").annotate(total=Sum("minutes"))
    by_week, by_person = Counter[dt.date](), Counter[tuple[str, str]]()
    for day, name, capacity, total in rows:
        by_week[_monday(day)] += total
        by_person[name, capacity] += total
    words: Mapping[str, str] = dict(LabourLine.Capacity.choices)
    people = [PersonHours(name, words[capacity], total) for (name, capacity), total in by_person.most_common()]
    mondays = [_monday(on) - dt.timedelta(weeks=back) for back in reversed(range(WEEKS))]
    return Hours(sum(by_week.values()), [Week(monday, by_week[monday]) for monday in mondays], people)


def _monday(day: dt.date) -> dt.date:
    return day - dt.timedelta(days=day.weekday())


def _weighed(aircraft: Aircraft) -> Weighed | None:
    row = aircraft.weighings.select_related("snapshot").first()
    return Weighed(row, tuple(from_record(row.snapshot.result).outputs)) if row else None
