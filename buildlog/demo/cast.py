"""What the story has brought onto the record so far, by the names the fixtures use."""

from collections.abc import Callable
from dataclasses import dataclass, field
from datetime import datetime
from typing import Any

from buildlog.aircraft.models import Aircraft, Section, User, Zone
from buildlog.calcs.models import Snapshot
from buildlog.conformity.models import Deviation, Squawk
from buildlog.files.models import Document, Photo
from buildlog.parts.models import Batch, Part
from buildlog.readings.models import Characteristic, Instrument, Reading
from buildlog.shop.models import Entry, Task
from buildlog.trials.models import Trial


@dataclass(frozen=True, order=True)
class Step:
    """One act of the story: when it was done, its place among acts of the same moment, and how it is done again."""

    at: datetime
    place: int
    act: Callable[[], object] = field(compare=False)


@dataclass
class Cast:
    """The rows that exist by now. A name that is asked for before its row exists is a fault of the fixtures."""

    aircraft: Aircraft
    users: dict[str, User] = field(default_factory=dict)
    roles: dict[str, str] = field(default_factory=dict)
    sections: dict[str, Section] = field(default_factory=dict)
    zones: dict[str, Zone] = field(default_factory=dict)
    tasks: dict[str, Task] = field(default_factory=dict)
    batches: dict[str, Batch] = field(default_factory=dict)
    documents: dict[str, Document] = field(default_factory=dict)
    photos: dict[str, Photo] = field(default_factory=dict)
    parts: dict[str, Part] = field(default_factory=dict)
    instruments: dict[str, Instrument] = field(default_factory=dict)
    characteristics: dict[str, Characteristic] = field(default_factory=dict)
    readings: dict[str, Reading] = field(default_factory=dict)
    entries: dict[str, Entry] = field(default_factory=dict)
    snapshots: dict[str, Snapshot] = field(default_factory=dict)
    trials: dict[str, Trial] = field(default_factory=dict)
    squawks: dict[str, Squawk] = field(default_factory=dict)
    deviations: dict[str, Deviation] = field(default_factory=dict)

    @property
    def builder(self) -> User:
        """The builder who began the record."""
        return self.users["maren"]

    def named(self, kind: str, name: str) -> Any:
        """Return the row that evidence calls `kind:name`, such as photo:f-plate or calc:k-tip."""
        rows: dict[str, dict[str, Any]] = {
            "photo": self.photos,
            "entry": self.entries,
            "document": self.documents,
            "part": self.parts,
            "reading": self.readings,
            "trial": self.trials,
            "calc": self.snapshots,
        }
        return rows[kind][name]
