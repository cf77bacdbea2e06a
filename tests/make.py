"""Rows for tests, through the house's own actions where a room has them; every argument has a default."""

import datetime as dt
import itertools
from uuid import uuid4

from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.models import Aircraft, Member, Section, User
from buildlog.ledger import actions as ledger

PASSWORD = "spruce and varnish"
_count = itertools.count(1)


def moment(text: str = "2026-03-14T10:00:00+00:00") -> dt.datetime:
    """Return an aware moment from its ISO spelling."""
    return dt.datetime.fromisoformat(text)


@transaction.atomic
def user(*, name: str = "Ada Berg", sign_in: str = "") -> User:
    """Return a person with an account and the test password."""
    row = User(sign_in=sign_in or f"person{next(_count)}", name=name, joined_at=timezone.now())
    row.set_password(PASSWORD)
    row.save(force_insert=True)
    ledger.write(aircraft=None, by=row, kind="user.joined", about=row, text=f"{name} joined")
    return row


@transaction.atomic
def aircraft(*, builder: User | None = None, serial: str = "", jurisdiction: str = "own", **more: object) -> Aircraft:
    """Return an aircraft with one builder."""
    builder = builder or user()
    fields = {"designation": "Test Two", "basis": "plans", "units": "si", "started_on": dt.date(2024, 1, 10)}
    row = Aircraft.objects.create(serial=serial or f"T{next(_count):04}", jurisdiction=jurisdiction, **(fields | more))
    ledger.write(aircraft=row, by=builder, kind="aircraft.create", about=row, text=f"began {row}")
    member(aircraft=row, user=builder, role="builder")
    return row


@transaction.atomic
def member(*, aircraft: Aircraft, user: User, role: str = "helper") -> Member:
    """Return a membership from the first day of the aircraft."""
    row = Member.objects.create(aircraft=aircraft, user=user, role=role, started_on=aircraft.started_on)
    ledger.write(aircraft=aircraft, by=user, kind="member.joined", about=row, text=f"{user.name} joined as {role}")
    return row


def builder_of(aircraft: Aircraft) -> User:
    """Return the first builder of an aircraft."""
    return aircraft.members.filter(role="builder").order_by("started_on", "id").first().user


@transaction.atomic
def section(*, aircraft: Aircraft, number: str = "", title: str = "Engine conversion") -> Section:
    """Return a section of the work breakdown."""
    row = Section.objects.create(aircraft=aircraft, number=number or str(next(_count)), title=title)
    ledger.write(aircraft=aircraft, by=builder_of(aircraft), kind="section.added", about=row, text=f"added {title}")
    return row


def client_id() -> str:
    """Return an identifier as a phone makes it."""
    return str(uuid4())
