"""The log: every closed entry with its photos, process records and amendments, section by section."""

from collections.abc import Iterator, Mapping
from dataclasses import dataclass, field
from datetime import timedelta
from typing import Any
from uuid import UUID

from django.db.models import Prefetch

from buildlog.binder.book import Book
from buildlog.binder.chapter import Chapter
from buildlog.ledger.models import Event
from buildlog.shop.models import Entry, EntryPhoto, ProcessRecord

LATE = timedelta(days=7)


@dataclass
class Told:
    """One entry as it is printed: the original, and the amendments that follow it."""

    entry: Entry
    event: int | None
    amendments: list["Told"] = field(default_factory=list)

    @property
    def recorded_later(self) -> bool:
        """Return whether it was closed more than seven days after the work."""
        closed = self.entry.closed_at
        return closed is not None and closed.date() - self.entry.worked_on > LATE

    @property
    def minutes(self) -> int:
        """Return the minutes of all its labour lines."""
        return sum(line.minutes for line in self.entry.labour.all())

    @property
    def rows_of_photos(self) -> list[list[EntryPhoto]]:
        """Return its photos in rows of three."""
        links = list(self.entry.photo_links.all())
        return [links[at : at + 3] for at in range(0, len(links), 3)]

    @property
    def processes(self) -> Iterator[tuple[ProcessRecord, str]]:
        """Yield each process record with its fields in words."""
        for row in self.entry.processes.all():
            told = [f"{name.replace('_', ' ')} {value}" for name, value in row.details.items() if value]
            yield row, ", ".join(told)


def told(book: Book) -> list[Told]:
    """Return every original entry with its amendments in order, in a fixed number of queries."""
    photos = Prefetch("photo_links", EntryPhoto.objects.select_related("photo__blob"))
    processes = Prefetch("processes", ProcessRecord.objects.select_related("batch", "instrument"))
    rows = (
        Entry.objects.filter(aircraft=book.aircraft)
        .on_record()
        .select_related("task__section", "author")
        .prefetch_related("labour", photos, processes)
        .order_by("task__section__place", "task__section__number", "worked_on", "closed_at")
    )
    chain = Event.objects.filter(chain=book.aircraft.id, kind="entry.closed")
    events: dict[UUID | None, int] = dict(chain.values_list("subject", "seq"))
    every = {row.id: Told(row, events.get(row.id)) for row in rows}
    for one in every.values():
        if one.entry.amends_id:
            _first(every, one).amendments.append(one)
    return [one for one in every.values() if one.entry.amends_id is None]


def _first(every: Mapping[UUID, Told], one: Told) -> Told:
    while one.entry.amends_id:
        one = every[one.entry.amends_id]
    return one


def context(book: Book) -> Mapping[str, Any]:
    """Return the entries in groups by section; loose ones come first."""
    groups: dict[str, list[Told]] = {}
    for one in told(book):
        task = one.entry.task
        groups.setdefault(str(task.section) if task else "Loose, not filed under a task", []).append(one)
    drafts = Entry.objects.filter(aircraft=book.aircraft).drafts().count()
    return {"groups": groups, "drafts": drafts}


CHAPTER = Chapter("entries", "Build log", 4, context)
