"""What can be found: each kind with the texts that are read, its day, and what the prefixes mean for it."""

from collections.abc import Callable, Mapping
from dataclasses import dataclass, field
from typing import Any
from uuid import UUID

from django.db.models import QuerySet

from buildlog.aircraft.models import Aircraft
from buildlog.files.models import Document, Photo
from buildlog.readings.models import Reading
from buildlog.shop.models import Entry

Row = Any


@dataclass(frozen=True)
class Told:
    """A row as a result line: a title, the text below it, a state to mark, a photo to show."""

    title: str
    text: str = ""
    state: str = ""
    photo: UUID | None = None


@dataclass(frozen=True)
class Kind:
    """One kind of record. `narrow` names, for each prefix it knows, the texts that the prefix looks at."""

    key: str
    title: str
    rows: Callable[[Aircraft], QuerySet[Row]]
    texts: tuple[str, ...]
    told: Callable[[Row], Told]
    page: str
    day: str = ""
    narrow: Mapping[str, tuple[str, ...]] = field(default_factory=dict)
    page_of: Callable[[Row], object] = lambda row: row.id


def _day(day: object) -> str:
    return f"{day:%-d %b %Y}" if day else "no day known"


def _entry(row: Entry) -> Told:
    state = "" if row.closed_at else "draft"
    return Told(f"{_day(row.worked_on)}, {row.task or 'loose entry'}", f"{row.author.name}: {row.note}", state)


def _photo(row: Photo) -> Told:
    return Told(row.caption or "No caption yet", f"{_day(row.taken_on)}, {row.name}", photo=row.id)


def _document(row: Document) -> Told:
    return Told(row.title, f"{row.get_kind_display()} {row.number}, {_day(row.dated_on)}")


def _reading(row: Reading) -> Told:
    return Told(f"{row.characteristic}: {row.entered}", f"{_day(row.read_on)}. {row.note}")


_BATCH = "processes__batch__code"
_ZONE = ("zone__code", "zone__title")
_TASK_ZONE = ("task__zone__code", "task__zone__title")
_PHOTO_TASK = "entry_links__entry__task__"

KINDS: tuple[Kind, ...] = (
    Kind(
        "entries",
        "Entries",
        lambda aircraft: aircraft.entries.select_related("task", "author"),
        ("note", "task__title", "task__number", "place", "author__name", "labour__person_name"),
        _entry,
        "entry-page",
        "worked_on",
        {"batch": (_BATCH,), "zone": _TASK_ZONE, "sheet": ("plan_sheet", "task__plan_sheet")},
    ),
    Kind(
        "tasks",
        "Tasks",
        lambda aircraft: aircraft.tasks.select_related("section"),
        ("number", "title", "plan_sheet", "waiting_for", "section__title"),
        lambda row: Told(str(row), f"{row.section}" + (f", sheet {row.plan_sheet}" if row.plan_sheet else "")),
        "task-page",
        narrow={"zone": _ZONE, "sheet": ("plan_sheet",), "batch": ("entries__" + _BATCH,)},
    ),
    Kind(
        "photos",
        "Photos",
        lambda aircraft: Photo.objects.current().filter(aircraft=aircraft).order_by("-taken_on", "-added_at"),
        ("caption", "name", "camera", "entry_links__entry__note"),
        _photo,
        "photo-page",
        "taken_on",
        {
            "batch": ("entry_links__entry__" + _BATCH, "part_links__part__batch_links__batch__code"),
            "zone": (_PHOTO_TASK + "zone__code", _PHOTO_TASK + "zone__title"),
            "sheet": ("entry_links__entry__plan_sheet", _PHOTO_TASK + "plan_sheet"),
        },
    ),
    Kind(
        "parts",
        "Parts",
        lambda aircraft: aircraft.parts.all(),
        ("number", "name", "serial", "supplier", "note", "installations__position"),
        lambda row: Told(str(row), f"{row.get_origin_display()}. {row.serial} {row.supplier} {row.note}"),
        "part-page",
        "received_on",
        {"batch": ("batch_links__batch__code",)},
    ),
    Kind(
        "batches",
        "Batches",
        lambda aircraft: aircraft.batches.all(),
        ("code", "material", "lot", "supplier", "specification"),
        lambda row: Told(str(row), f"Lot {row.lot or 'not named'}. {row.supplier} {row.specification}"),
        "batch-page",
        "received_on",
        {"batch": ("code",)},
    ),
    Kind(
        "readings",
        "Readings",
        lambda aircraft: Reading.objects.filter(characteristic__aircraft=aircraft).select_related("characteristic"),
        ("characteristic__code", "characteristic__title", "entered", "note"),
        _reading,
        "characteristic-page",
        "read_on",
        {"sheet": ("characteristic__plan_sheet",)},
        page_of=lambda row: row.characteristic_id,
    ),
    Kind(
        "trials",
        "Trials",
        lambda aircraft: aircraft.trials.all(),
        ("title", "key", "place", "people", "conditions", "opinion"),
        lambda row: Told(row.title, f"{_day(row.run_on)}, {row.place}. {row.conditions}"),
        "trial-page",
        "run_on",
    ),
    Kind(
        "calculations",
        "Calculations",
        lambda aircraft: aircraft.snapshots.select_related("taken_by"),
        ("title", "label", "method"),
        lambda row: Told(str(row), f"Kept {_day(row.taken_at)} by {row.taken_by.name}"),
        "snapshot-page",
        "taken_at__date",
    ),
    Kind(
        "squawks",
        "Squawks",
        lambda aircraft: aircraft.squawks.select_related("clearing"),
        ("title", "detail", "number"),
        lambda row: Told(f"{row.number} {row.title}", row.detail, "cleared" if hasattr(row, "clearing") else "squawk"),
        "squawk-page",
        "raised_on",
        {"zone": _TASK_ZONE},
    ),
    Kind(
        "deviations",
        "Deviations",
        lambda aircraft: aircraft.deviations.select_related("decision"),
        ("title", "plan_says", "built_as", "reason", "number"),
        lambda row: Told(
            f"{row.number} {row.title}", row.built_as, "decided" if hasattr(row, "decision") else "deviation"
        ),
        "deviation-page",
        "raised_on",
        {"zone": _TASK_ZONE, "sheet": ("plan_sheet", "task__plan_sheet")},
    ),
    Kind(
        "documents",
        "Documents",
        lambda aircraft: aircraft.documents.order_by("-added_at"),
        ("title", "number", "name"),
        _document,
        "document-download",
        "dated_on",
        {"batch": ("part_links__part__batch_links__batch__code",)},
    ),
)
