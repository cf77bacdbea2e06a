"""Tasks with their states, entries with everything they say, and hours; each in a fixed number of queries."""

import datetime as dt
from collections.abc import Iterable
from dataclasses import dataclass, field
from uuid import UUID

from django.core.paginator import Page, Paginator
from django.db.models import Count, Max, Prefetch, Q, QuerySet, Sum

from buildlog.aircraft.models import Aircraft, Section, User
from buildlog.shop.models import Clock, Entry, EntryPhoto, LabourLine, ProcessRecord, Task

PER_PAGE = 30


@dataclass(frozen=True)
class TaskView:
    """A task with its state, worked out from its entries, and its minutes on the record."""

    task: Task
    state: str
    minutes: int
    entries: int
    last_on: dt.date | None


@dataclass(frozen=True)
class SectionView:
    """A section with its tasks."""

    section: Section
    tasks: list[TaskView] = field(default_factory=list)

    @property
    def states(self) -> list[str]:
        """Return the states in the order of the tasks, for the rivet line."""
        return [view.state for view in self.tasks]

    @property
    def done(self) -> int:
        """Return how many tasks are done."""
        return sum(state in {"done", "not-needed"} for state in self.states)

    @property
    def minutes(self) -> int:
        """Return the minutes of all its tasks."""
        return sum(view.minutes for view in self.tasks)


def task_views(aircraft: Aircraft) -> list[TaskView]:
    """Return every task with its state in two queries."""
    current = Q(entries__closed_at__isnull=False) & ~Q(entries__amendments__closed_at__isnull=False)
    tasks = (
        aircraft.tasks.select_related("section", "zone")
        .annotate(
            count=Count("entries", filter=current, distinct=True),
            drafts=Count("entries", filter=Q(entries__closed_at=None), distinct=True),
            finished=Count("entries", filter=current & Q(entries__finishes_task=True), distinct=True),
            last_on=Max("entries__worked_on"),
        )
        .order_by("section__place", "section__number", "place", "number")
    )
    lines = LabourLine.objects.filter(entry__in=Entry.objects.filter(aircraft=aircraft).current())
    minutes = dict(lines.values_list("entry__task").annotate(total=Sum("minutes")))
    return [TaskView(task, _state(task), minutes.get(task.id, 0), task.count, task.last_on) for task in tasks]


def _state(task: Task) -> str:
    if task.not_needed_reason:
        return "not-needed"
    if task.finished:  # type: ignore[attr-defined]
        return "done"
    if task.waiting_for:
        return "waiting"
    return "in-work" if task.count or task.drafts else "to-do"  # type: ignore[attr-defined]


def section_views(aircraft: Aircraft, views: Iterable[TaskView]) -> list[SectionView]:
    """Return the sections with the tasks given, in their order."""
    found = {section.id: SectionView(section) for section in aircraft.sections.all()}
    for view in views:
        found[view.task.section_id].tasks.append(view)
    return list(found.values())


def whole(rows: QuerySet[Entry]) -> QuerySet[Entry]:
    """Return entries with everything they say, read in five queries whatever their number."""
    photos = Prefetch("photo_links", EntryPhoto.objects.select_related("photo__blob"))
    processes = Prefetch("processes", ProcessRecord.objects.select_related("batch", "instrument"))
    return rows.select_related("task__section", "author", "amends").prefetch_related(
        "labour", photos, processes, Prefetch("amendments", Entry.objects.select_related("author"))
    )


def entry_page(aircraft: Aircraft, *, words: str = "", section: str = "", number: int | str = 1) -> Page[Entry]:
    """Return one page of the day book: closed entries and drafts, newest day first, amendments with their original."""
    rows = whole(Entry.objects.filter(aircraft=aircraft, amends=None)).order_by("-worked_on", "-saved_at")
    if words:
        rows = rows.filter(Q(note__icontains=words) | Q(task__title__icontains=words) | Q(task__number=words))
    if section:
        rows = rows.filter(task__section__number=section)
    return Paginator(rows, PER_PAGE).get_page(number)


def drafts_of(aircraft: Aircraft, by: User) -> list[Entry]:
    """Return the person's drafts, oldest first."""
    return list(aircraft.entries.drafts().filter(author=by).select_related("task").order_by("saved_at"))


def last_task(aircraft: Aircraft, by: User) -> Task | None:
    """Return the task this person last logged work on."""
    entry = aircraft.entries.filter(author=by).exclude(task=None).select_related("task").order_by("-saved_at").first()
    return entry.task if entry else None


def clock_of(by: User) -> Clock | None:
    """Return the person's running clock."""
    return Clock.objects.select_related("task").filter(user=by).first()


def hours_by_person(aircraft: Aircraft) -> list[tuple[str, str, int]]:
    """Return name, capacity in words and minutes of everyone on the record."""
    lines = LabourLine.objects.filter(entry__in=Entry.objects.filter(aircraft=aircraft).current())
    rows = lines.values_list("person_name", "capacity").annotate(total=Sum("minutes")).order_by("-total")
    words = dict(LabourLine.Capacity.choices)
    return [(name, words[capacity], total) for name, capacity, total in rows]


def of_task(task_id: UUID, aircraft: Aircraft) -> list[Entry]:
    """Return the entries of a task, newest first."""
    return list(whole(Entry.objects.filter(aircraft=aircraft, task_id=task_id)).order_by("-worked_on", "-saved_at"))
