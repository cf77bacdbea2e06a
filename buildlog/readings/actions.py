"""Instruments, characteristics and readings: said once, corrected by another line, never overwritten."""

import datetime as dt
from typing import Any
from uuid import UUID

from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.models import Aircraft, User
from buildlog.aircraft.queries import membership
from buildlog.aircraft.roles import Role
from buildlog.errors import Refused
from buildlog.files.models import Photo
from buildlog.ledger import actions as ledger
from buildlog.ledger.queries import sent_before
from buildlog.methods import units
from buildlog.readings.limits import check_uncertainty, day, expanded, verdict_of
from buildlog.readings.models import Characteristic, Instrument, Reading

TAKEN = "This was sent before, for something else. Open the page again and say it anew."
VERDICTS = {"within": "within limits", "outside": "out of limits", "undecided": "undecided", "no-limits": "no limits"}


@transaction.atomic
def add_instrument(
    *, aircraft: Aircraft, by: User, client_id: UUID, at: dt.datetime | None = None, **said: Any
) -> Instrument:
    """Enter a measuring tool with its calibration; the same `client_id` again returns the first one.

    said: code, title, uncertainty ("0.5 kg", expanded, k = 2), calibrated_on, due_on, certificate.
    """
    if first := sent_before(Instrument, client_id, aircraft):
        return first
    _check_instrument(aircraft, said, at or timezone.now())
    row = Instrument.objects.create(id=client_id, aircraft=aircraft, **said)
    until = f", calibrated until {row.due_on}" if row.due_on else ""
    text = f"entered instrument {row}{until}"
    ledger.write(aircraft=aircraft, by=by, kind="instrument.added", about=row, text=text, at=at)
    return row


@transaction.atomic
def change_instrument(
    *, aircraft: Aircraft, by: User, instrument: Instrument, at: dt.datetime | None = None, **said: Any
) -> Instrument:
    """Change what is said of an instrument. Its calibration stays once readings lean on it: enter the next one anew."""
    _check_instrument(aircraft, said, at or timezone.now(), instrument)
    moved = [name for name in ("calibrated_on", "due_on") if said[name] != getattr(instrument, name)]
    if moved and instrument.readings.exists():
        words = "Readings lean on this calibration. Enter the next calibration as a line of its own."
        raise Refused(words, field=moved[0])
    for name, value in said.items():
        setattr(instrument, name, value)
    instrument.save()
    text = f"changed instrument {instrument}"
    ledger.write(aircraft=aircraft, by=by, kind="instrument.changed", about=instrument, text=text, at=at)
    return instrument


def _check_instrument(
    aircraft: Aircraft, said: dict[str, Any], now: dt.datetime, itself: Instrument | None = None
) -> None:
    others = aircraft.instruments.exclude(id=itself.id) if itself else aircraft.instruments
    if others.filter(code=said["code"]).exists():
        raise Refused("There is an instrument with this code.", field="code")
    if said.get("uncertainty"):
        check_uncertainty(said["uncertainty"])
    calibrated, due = said.get("calibrated_on"), said.get("due_on")
    if calibrated and calibrated > timezone.localdate(now) + dt.timedelta(days=1):
        raise Refused("It cannot have been calibrated on a day to come.", field="calibrated_on")
    if calibrated and due and due < calibrated:
        raise Refused("This calibration would have ended before it was made.", field="due_on")


@transaction.atomic
def add_characteristic(
    *, aircraft: Aircraft, by: User, client_id: UUID, at: dt.datetime | None = None, **said: Any
) -> Characteristic:
    """Declare something measurable; the same `client_id` again returns the first one.

    said: code, title, unit, plan_sheet, and nominal, lower, upper as typed (kept as decimals in `unit`).
    """
    if first := sent_before(Characteristic, client_id, aircraft):
        return first
    said = _checked(aircraft, said)
    row = Characteristic.objects.create(id=client_id, aircraft=aircraft, **said)
    text = f"declared characteristic {row}: {limit_words(row)}"
    ledger.write(aircraft=aircraft, by=by, kind="characteristic.added", about=row, text=text, at=at)
    return row


@transaction.atomic
def change_characteristic(
    *, aircraft: Aircraft, by: User, characteristic: Characteristic, at: dt.datetime | None = None, **said: Any
) -> Characteristic:
    """Change its words or limits, as a plan revision does; its unit stays once it was measured."""
    if said["unit"] != characteristic.unit and characteristic.readings.exists():
        raise Refused("It was measured in this unit already. Declare another characteristic.", field="unit")
    before = limit_words(characteristic)
    for name, value in _checked(aircraft, said, characteristic).items():
        setattr(characteristic, name, value)
    characteristic.save()
    text = f"changed characteristic {characteristic}: {limit_words(characteristic)}, before: {before}"
    ledger.write(aircraft=aircraft, by=by, kind="characteristic.changed", about=characteristic, text=text, at=at)
    return characteristic


def _checked(aircraft: Aircraft, said: dict[str, Any], itself: Characteristic | None = None) -> dict[str, Any]:
    others = aircraft.characteristics.exclude(id=itself.id) if itself else aircraft.characteristics
    if others.filter(code=said["code"]).exists():
        raise Refused("There is a characteristic with this code.", field="code")
    numbers: dict[str, float] = {}
    for name in ("nominal", "lower", "upper"):
        if typed := said.get(name, "").strip():
            numbers[name] = units.read(typed, said["unit"], name=name).value
    for low, high, field, words in (
        ("lower", "upper", "lower", "The lower limit lies above the upper one."),
        ("lower", "nominal", "nominal", "The nominal value lies below the lower limit."),
        ("nominal", "upper", "nominal", "The nominal value lies above the upper limit."),
    ):
        if low in numbers and high in numbers and numbers[low] > numbers[high]:
            raise Refused(words, field=field)
    kept = {name: units.decimal(numbers[name]) if name in numbers else "" for name in ("nominal", "lower", "upper")}
    return {**said, **kept}


def limit_words(row: Characteristic) -> str:
    """Return nominal and limits in words: nominal 25 mm, 24.8 to 25.2 mm."""
    unit = f" {units.shown(row.unit)}" if row.unit else ""
    said = [f"nominal {row.nominal}{unit}"] if row.nominal else []
    if row.lower and row.upper:
        said.append(f"{row.lower} to {row.upper}{unit}")
    elif row.lower or row.upper:
        said.append(f"at least {row.lower}{unit}" if row.lower else f"at most {row.upper}{unit}")
    return ", ".join(said) or "no limits given"


@transaction.atomic
def record_reading(
    *,
    aircraft: Aircraft,
    by: User,
    characteristic: Characteristic,
    client_id: UUID,
    entered: str,
    read_on: dt.date,
    instrument: Instrument | None = None,
    photo: Photo | None = None,
    note: str = "",
    amends: Reading | None = None,
    amend_reason: str = "",
    at: dt.datetime | None = None,
) -> Reading:
    """Keep a measured value as typed and in the characteristic's unit, out of limits or not.

    entered: number, unit if another than the characteristic's, "± u" (expanded, k = 2) if known; else the
    instrument's uncertainty counts. amends: the reading this one corrects, which stays legible.
    """
    if sent_before := Reading.objects.filter(id=client_id).first():
        if sent_before.characteristic_id != characteristic.id or sent_before.read_by_id != by.id:
            raise Refused(TAKEN)
        return sent_before
    now = at or timezone.now()
    if read_on > timezone.localdate(now) + dt.timedelta(days=1):
        raise Refused("Nothing can be measured on a day to come.", field="read_on")
    if read_on.year < 1950:
        raise Refused("Is the year right? This day lies before 1950.", field="read_on")
    if amends is not None:
        _check_amendment(aircraft, by, amends, amend_reason)
    typed = units.read(entered, characteristic.unit, name="entered")
    spread = typed.spread
    if spread is None and instrument is not None:
        spread = expanded(instrument, typed.value, characteristic.unit)
    row = Reading.objects.create(
        id=client_id,
        characteristic=characteristic,
        entered=typed.entered,
        value=units.decimal(typed.value),
        uncertainty="" if spread is None else units.decimal(spread),
        instrument=instrument,
        read_on=read_on,
        read_by=by,
        recorded_at=now,
        photo=photo,
        note=note,
        amends=amends,
        amend_reason=amend_reason.strip() if amends else "",
    )
    ledger.write(aircraft=aircraft, by=by, kind="reading.recorded", about=row, text=_told(row), at=at)
    return row


def _told(row: Reading) -> str:
    said = "corrected a reading of" if row.amends_id else "measured"
    verdict = VERDICTS[verdict_of(row.value, row.uncertainty, row.characteristic)]
    reason = f" (reason: {row.amend_reason[:80]})" if row.amends_id else ""
    return f"{said} {row.characteristic}: {row.entered} on {day(row.read_on)}, {verdict}{reason}"


def _check_amendment(aircraft: Aircraft, by: User, amends: Reading, reason: str) -> None:
    if not reason.strip():
        raise Refused("Say why it is corrected; the reason stays on the record.", field="amend_reason")
    member = membership(user=by, aircraft_id=aircraft.id)
    if (member is None or member.role in {Role.HELPER, Role.ASSIST}) and amends.read_by_id != by.id:
        raise Refused("Helpers and paid assistance correct their own readings only.")
    if Reading.objects.filter(amends=amends).exists():
        raise Refused("This reading was corrected already. Correct the last one.")
