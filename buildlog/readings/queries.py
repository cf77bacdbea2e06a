"""Characteristics with their present value, readings with their verdict, instruments with their standing."""

import datetime as dt
from collections.abc import Sequence
from dataclasses import dataclass
from uuid import UUID

from django.core.paginator import Page, Paginator
from django.db.models import OuterRef, Q, QuerySet, Subquery

from buildlog.aircraft.models import Aircraft
from buildlog.ledger.models import Withdrawal
from buildlog.methods import units
from buildlog.readings.limits import NOT_MEASURED, calibration_words, verdict_of
from buildlog.readings.models import Characteristic, Instrument, Reading

PER_PAGE = 40
STATES = ("outside", "undecided", "within", "no-limits", NOT_MEASURED)
SOON = dt.timedelta(days=60)


@dataclass(frozen=True)
class ReadingView:
    """A reading, its verdict against the present limits, and what is wrong with its instrument ("" when nothing)."""

    reading: Reading
    verdict: str
    calibration: str
    correction: Reading | None = None  # the later reading that corrects this one
    withdrawn: str = ""  # the reason it was withdrawn with

    @property
    def counts(self) -> bool:
        """Return whether it is neither corrected nor withdrawn."""
        return self.correction is None and not self.withdrawn


@dataclass(frozen=True)
class Present:
    """A characteristic and what it is today: the last accepted reading, before that the nominal, not measured."""

    characteristic: Characteristic
    latest: ReadingView | None

    @property
    def value(self) -> str:
        """Return the present value as a decimal in the characteristic's unit; "" when there is none."""
        return self.latest.reading.value if self.latest else self.characteristic.nominal

    @property
    def state(self) -> str:
        """Return the verdict's key, or not-measured."""
        return self.latest.verdict if self.latest else NOT_MEASURED

    @property
    def words(self) -> str:
        """Return value and unit; a nominal is marked as not measured."""
        if not self.value:
            return "not measured"
        told = f"{self.value} {units.shown(self.characteristic.unit)}".strip()
        return told if self.latest else f"{told}, not measured"


def view_of(reading: Reading, characteristic: Characteristic, correction: Reading | None = None) -> ReadingView:
    """Return a reading with what can be said of it; its instrument should be loaded."""
    verdict = verdict_of(reading.value, reading.uncertainty, characteristic)
    return ReadingView(reading, verdict, calibration_words(reading.instrument, reading.read_on), correction)


def presents(aircraft: Aircraft, *, words: str = "") -> list[Present]:
    """Return every characteristic with its present value, in two queries."""
    newest = Reading.objects.current().filter(characteristic=OuterRef("pk")).order_by("-read_on", "-recorded_at")
    rows = aircraft.characteristics.annotate(newest=Subquery(newest.values("id")[:1])).order_by("code")
    if words:
        rows = rows.filter(Q(code__icontains=words) | Q(title__icontains=words) | Q(plan_sheet__icontains=words))
    found = list(rows)
    ids = [row.newest for row in found if row.newest]
    readings = {row.id: row for row in Reading.objects.select_related("instrument", "read_by").filter(id__in=ids)}
    return [Present(row, view_of(readings[row.newest], row) if row.newest else None) for row in found]


def present(characteristic: Characteristic) -> Present:
    """Return one characteristic with its present value."""
    rows = characteristic.readings.current().select_related("instrument", "read_by")
    newest = rows.order_by("-read_on", "-recorded_at").first()
    return Present(characteristic, view_of(newest, characteristic) if newest else None)


def present_page(
    aircraft: Aircraft, *, words: str = "", state: str = "", number: int | str = 1
) -> tuple[Page[Present], dict[str, int]]:
    """Return one page of characteristics, and how many there are in each state."""
    found = presents(aircraft, words=words)
    counts = {key: sum(one.state == key for one in found) for key in STATES}
    shown = [one for one in found if not state or one.state == state]
    return Paginator(shown, PER_PAGE).get_page(number), counts


def readings_of(characteristic: Characteristic) -> list[ReadingView]:
    """Return all readings of a characteristic, newest first, the corrected and withdrawn ones among them."""
    return _told(list(characteristic.readings.select_related("instrument", "read_by", "photo")), characteristic)


def every_reading(aircraft: Aircraft) -> list[tuple[Characteristic, list[ReadingView]]]:
    """Return every characteristic with all its readings, oldest first, in a fixed number of queries."""
    rows = Reading.objects.filter(characteristic__aircraft=aircraft).select_related("instrument", "read_by", "photo")
    found: dict[UUID, list[Reading]] = {}
    for row in rows.order_by("read_on", "recorded_at"):
        found.setdefault(row.characteristic_id, []).append(row)
    taken_back = _taken_back(aircraft.id)
    return [(one, _told(found.get(one.id, []), one, taken_back)) for one in aircraft.characteristics.all()]


def _taken_back(chain: UUID) -> dict[UUID, str]:
    return dict(Withdrawal.objects.filter(chain=chain).values_list("subject", "reason"))


def _told(
    rows: list[Reading], characteristic: Characteristic, taken_back: dict[UUID, str] | None = None
) -> list[ReadingView]:
    corrections = {row.amends_id: row for row in rows if row.amends_id}
    taken_back = _taken_back(characteristic.aircraft_id) if taken_back is None else taken_back
    return [
        ReadingView(
            row,
            verdict_of(row.value, row.uncertainty, characteristic),
            calibration_words(row.instrument, row.read_on),
            corrections.get(row.id),
            taken_back.get(row.id, ""),
        )
        for row in rows
    ]


def characteristic_of(aircraft: Aircraft, characteristic_id: UUID) -> QuerySet[Characteristic]:
    """Return the query of one characteristic."""
    return aircraft.characteristics.filter(id=characteristic_id)


@dataclass(frozen=True)
class InstrumentView:
    """An instrument, what is wrong with its calibration today, and whether it ends soon."""

    instrument: Instrument
    calibration: str
    soon: bool


def instrument_views(aircraft: Aircraft, on: dt.date) -> Sequence[InstrumentView]:
    """Return all instruments, in one query."""
    rows = aircraft.instruments.select_related("certificate")
    return [_standing(row, on) for row in rows]


def _standing(row: Instrument, on: dt.date) -> InstrumentView:
    words = calibration_words(row, on)
    return InstrumentView(row, words, bool(not words and row.due_on and row.due_on - on <= SOON))
