"""The aircraft, its sections and its zones."""

import datetime as dt
from typing import TypeVar
from uuid import UUID

from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.models import Aircraft, Member, Section, User, Zone
from buildlog.aircraft.roles import Role
from buildlog.errors import Refused
from buildlog.ledger import actions as ledger
from buildlog.ledger.ids import uuid7
from buildlog.profiles import load

OTHER_ROW = "This form was used for something else already. Open it again."
MOST_SEATS = 20
Row = TypeVar("Row", Section, Zone)


@transaction.atomic
def create_aircraft(
    *,
    by: User,
    designation: str,
    basis: str,
    serial: str,
    jurisdiction: str,
    units: str,
    started_on: dt.date,
    seats: int = 2,
    registration: str = "",
    plan_set: str = "",
    built_at: str = "",
    client_id: UUID | None = None,
    at: dt.datetime | None = None,
) -> Aircraft:
    """Begin the record of an aircraft; `by` is its first builder. The same `client_id` again returns the first."""
    if client_id and (sent_before := Aircraft.objects.filter(id=client_id).first()):
        if not sent_before.members.filter(user=by).exists():
            raise Refused(OTHER_ROW)
        return sent_before
    row = Aircraft(
        id=client_id or uuid7(),
        designation=designation.strip(),
        basis=basis,
        serial=serial.strip(),
        jurisdiction=jurisdiction,
        units=units,
        started_on=started_on,
        seats=seats,
        registration=registration.strip(),
        plan_set=plan_set.strip(),
        built_at=built_at.strip(),
    )
    _check(row, at)
    row.save(force_insert=True)
    builder = Member.objects.create(aircraft=row, user=by, role=Role.BUILDER, started_on=started_on)
    ledger.write(
        aircraft=row, by=by, kind="aircraft.create", about=row, rows=[builder], text=f"began the record of {row}", at=at
    )
    return row


@transaction.atomic
def edit_aircraft(*, aircraft: Aircraft, by: User, at: dt.datetime | None = None, **fields: object) -> Aircraft:
    """Correct what the title block says; the words before stay in the trail."""
    changed = {}
    for name, value in fields.items():
        value = value.strip() if isinstance(value, str) else value
        if value != getattr(aircraft, name):
            changed[name] = str(getattr(aircraft, name))
            setattr(aircraft, name, value)
    if not changed:
        return aircraft
    _check(aircraft, at)
    aircraft.save(update_fields=list(changed))
    words = ", ".join(name.replace("_", " ") for name in changed)
    text = f"changed the aircraft's {words}"
    ledger.write(
        aircraft=aircraft, by=by, kind="aircraft.edited", about=aircraft, text=text, facts={"before": changed}, at=at
    )
    return aircraft


def _check(row: Aircraft, at: dt.datetime | None) -> None:
    if not row.designation:
        raise Refused("Say what the aircraft is called.", field="designation")
    if not row.serial:
        raise Refused("Give it a serial; the binder carries it on every page.", field="serial")
    if Aircraft.objects.filter(serial=row.serial).exclude(id=row.id).exists():
        raise Refused("This serial belongs to another aircraft here. Choose another.", field="serial")
    if row.basis not in Aircraft.Basis.values:
        raise Refused("Choose what it is built from.", field="basis")
    if row.units not in Aircraft.Units.values:
        raise Refused("Choose the units of the record.", field="units")
    if row.jurisdiction not in load.jurisdictions():
        raise Refused("Choose one of the authorities listed.", field="jurisdiction")
    if not 1 <= row.seats <= MOST_SEATS:
        raise Refused(f"Seats: a whole number from 1 to {MOST_SEATS}.", field="seats")
    if row.started_on > timezone.localdate(at):
        raise Refused("The start lies in the future. Give the day the work began, or today.", field="started_on")


@transaction.atomic
def add_section(
    *,
    aircraft: Aircraft,
    by: User,
    number: str,
    title: str,
    parent: Section | None = None,
    client_id: UUID | None = None,
    at: dt.datetime | None = None,
) -> Section:
    """Add a chapter of the work breakdown; its number orders it and stands on binder pages."""
    if client_id and (sent_before := Section.objects.filter(id=client_id).first()):
        return _same(sent_before, aircraft)
    row = Section(id=client_id or uuid7(), aircraft=aircraft)
    _fill_section(row, number, title, parent)
    row.save(force_insert=True)
    ledger.write(aircraft=aircraft, by=by, kind="section.added", about=row, text=f"added section {row}", at=at)
    return row


@transaction.atomic
def edit_section(
    *,
    aircraft: Aircraft,
    by: User,
    section: Section,
    number: str,
    title: str,
    parent: Section | None = None,
    at: dt.datetime | None = None,
) -> Section:
    """Renumber, rename or move a section; what is filed in it stays in it."""
    before = str(section)
    _fill_section(section, number, title, parent)
    section.save(update_fields=["number", "title", "parent", "place"])
    text = f"changed section {before} to {section}"
    ledger.write(aircraft=aircraft, by=by, kind="section.edited", about=section, text=text, at=at)
    return section


def _fill_section(row: Section, number: str, title: str, parent: Section | None) -> None:
    row.number, row.title, row.parent = number.strip(), title.strip(), parent
    first = row.number.split(".")[0].split("-")[0]
    row.place = int(first) if first.isascii() and first.isdigit() and len(first) < 9 else 0
    if not row.number:
        raise Refused("Give the section a number.", field="number")
    if not row.title:
        raise Refused("Say what the section holds.", field="title")
    if Section.objects.filter(aircraft=row.aircraft, number=row.number).exclude(id=row.id).exists():
        raise Refused(f"Section {row.number} is there already. Take another number.", field="number")
    above = parent
    while above is not None:
        if above.aircraft_id != row.aircraft_id or above.id == row.id:
            raise Refused("A section cannot stand under itself.", field="parent")
        above = above.parent


@transaction.atomic
def add_zone(
    *,
    aircraft: Aircraft,
    by: User,
    code: str,
    title: str,
    client_id: UUID | None = None,
    at: dt.datetime | None = None,
) -> Zone:
    """Add a space that will be covered one day."""
    if client_id and (sent_before := Zone.objects.filter(id=client_id).first()):
        return _same(sent_before, aircraft)
    row = Zone(id=client_id or uuid7(), aircraft=aircraft)
    _fill_zone(row, code, title)
    row.save(force_insert=True)
    ledger.write(aircraft=aircraft, by=by, kind="zone.added", about=row, text=f"added zone {row}", at=at)
    return row


@transaction.atomic
def edit_zone(
    *, aircraft: Aircraft, by: User, zone: Zone, code: str, title: str, at: dt.datetime | None = None
) -> Zone:
    """Correct the code or the words of a zone."""
    before = str(zone)
    _fill_zone(zone, code, title)
    zone.save(update_fields=["code", "title"])
    ledger.write(
        aircraft=aircraft, by=by, kind="zone.edited", about=zone, text=f"changed zone {before} to {zone}", at=at
    )
    return zone


def _fill_zone(row: Zone, code: str, title: str) -> None:
    row.code, row.title = code.strip(), title.strip()
    if not row.code:
        raise Refused("Give the zone a short code.", field="code")
    if not row.title:
        raise Refused("Say what space it is.", field="title")
    if Zone.objects.filter(aircraft=row.aircraft, code=row.code).exclude(id=row.id).exists():
        raise Refused(f"Zone {row.code} is there already. Take another code.", field="code")


def _same(row: Row, aircraft: Aircraft) -> Row:
    if row.aircraft_id != aircraft.id:
        raise Refused(OTHER_ROW)
    return row
