"""What an entry says, as it comes from a form or a phone: plain values, checked by the actions."""

import datetime as dt
from collections.abc import Mapping, Sequence
from dataclasses import dataclass, field
from typing import Any

from buildlog.aircraft.models import User
from buildlog.files.models import Photo
from buildlog.parts.models import Batch
from buildlog.readings.models import Instrument
from buildlog.shop.models import Task


@dataclass(frozen=True)
class Labour:
    """Somebody's time: a member, or a person by name; minutes in one capacity."""

    name: str
    capacity: str
    minutes: int
    person: User | None = None


@dataclass(frozen=True)
class Process:
    """The conditions of a joint or coat: its kind, what was used, and the fields of its kind as text."""

    kind: str
    details: Mapping[str, str]
    batch: Batch | None = None
    instrument: Instrument | None = None


@dataclass(frozen=True)
class Draft:
    """One entry as it is said; nothing of it is on the record before it is closed."""

    worked_on: dt.date
    note: str
    task: Task | None = None
    labour: Sequence[Labour] = field(default_factory=tuple)
    photos: Sequence[Photo] = field(default_factory=tuple)
    processes: Sequence[Process] = field(default_factory=tuple)
    plan_sheet: str = ""
    plan_revision: str = ""
    place: str = ""
    finishes_task: bool = False
    device_at: dt.datetime | None = None

    def columns(self) -> dict[str, Any]:
        """Return the columns of the entry row that the author says."""
        names = ("worked_on", "note", "task", "plan_sheet", "plan_revision", "place", "finishes_task", "device_at")
        return {name: getattr(self, name) for name in names}

    def as_kept(self) -> dict[str, Any]:
        """Return the draft as plain JSON values, for its revision."""
        return {
            "worked_on": self.worked_on.isoformat(),
            "note": self.note,
            "task": str(self.task.id) if self.task else None,
            "labour": [[line.name, line.capacity, line.minutes] for line in self.labour],
            "photos": [str(photo.id) for photo in self.photos],
            "processes": [[row.kind, dict(row.details)] for row in self.processes],
        }
