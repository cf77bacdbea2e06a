"""Who may see which aircraft, and as what."""

import datetime as dt
import hashlib
from dataclasses import dataclass, field
from uuid import UUID

from django.contrib.auth import SESSION_KEY
from django.contrib.sessions.models import Session
from django.utils import timezone

from buildlog.aircraft.models import Aircraft, Fact, Invitation, Member, ReviewLink, Section, User
from buildlog.aircraft.roles import Role
from buildlog.profiles import load
from buildlog.profiles.conditions import FactValue


def membership(*, user: User, aircraft_id: UUID) -> Member | None:
    """Return the person's membership of this aircraft today, with the aircraft."""
    return (
        Member.objects.select_related("aircraft", "user")
        .filter(user=user, aircraft_id=aircraft_id, ended_on=None)
        .first()
    )


def is_empty_site() -> bool:
    """Return whether nobody has an account yet."""
    return not User.objects.exists()


def user_of(user_id: str) -> User | None:
    """Return the person with this id, if the account is in use."""
    return User.objects.filter(id=user_id, is_active=True).first()


def user_named(sign_in: str) -> User | None:
    """Return the person who signs in with this name."""
    return User.objects.filter(sign_in=sign_in.strip().casefold()).first()


def review_membership(link_id: str | None, aircraft_id: UUID, chapter: str) -> Member | None:
    """Return a reviewer by link as an unsaved member, or None when the link does not open this part of the record."""
    if not link_id:
        return None
    link = (
        ReviewLink.objects.select_related("aircraft")
        .filter(id=link_id, aircraft_id=aircraft_id, revoked_at=None, expires_at__gt=timezone.now())
        .first()
    )
    if link is None or (chapter and chapter not in link.chapters):
        return None
    visitor = Member(aircraft=link.aircraft, role=Role.LINK, authority=link.name)
    visitor.chapters = frozenset(link.chapters)
    return visitor


def aircraft_of(user: User) -> list[Member]:
    """Return this person's memberships of today, each with its aircraft, in the order of designation."""
    rows = user.memberships.filter(ended_on=None).select_related("aircraft")
    return list(rows.order_by("aircraft__designation", "aircraft__serial"))


@dataclass(frozen=True)
class Line:
    """A section in its place of the work breakdown; `depth` 0 stands at the left."""

    section: Section
    depth: int


def section_tree(aircraft: Aircraft) -> list[Line]:
    """Return the sections, each under its parent, in their order; one query."""
    below: dict[UUID | None, list[Section]] = {}
    for row in aircraft.sections.all():
        below.setdefault(row.parent_id, []).append(row)
    return _lines(below, None, 0)


def _lines(below: dict[UUID | None, list[Section]], parent: UUID | None, depth: int) -> list[Line]:
    found = []
    for row in below.get(parent, []):
        found += [Line(row, depth), *_lines(below, row.id, depth + 1)]
    return found


def people_of(aircraft: Aircraft) -> list[Member]:
    """Return everyone who is a member today, builders first."""
    order = {role.value: place for place, role in enumerate(Role)}
    rows = aircraft.members.select_related("user").filter(ended_on=None)
    return sorted(rows, key=lambda member: (order[member.role], member.user.name))


def past_people_of(aircraft: Aircraft) -> list[Member]:
    """Return the memberships that have ended, the latest first."""
    return list(aircraft.members.select_related("user").exclude(ended_on=None).order_by("-ended_on", "-id"))


def invitations_of(aircraft: Aircraft) -> list[Invitation]:
    """Return the invitations that can still be taken up."""
    open_ones = aircraft.invitations.filter(taken_by=None, revoked_at=None, expires_at__gt=timezone.now())
    return list(open_ones.order_by("-made_at"))


def review_links_of(aircraft: Aircraft) -> list[ReviewLink]:
    """Return the reviewers' links that still open."""
    open_ones = aircraft.review_links.filter(revoked_at=None, expires_at__gt=timezone.now())
    return list(open_ones.select_related("made_by").order_by("-made_at"))


def fact_rows(aircraft: Aircraft) -> dict[str, Fact]:
    """Return the last row of each fact ever stated, by key."""
    return {row.key: row for row in Fact.objects.present().filter(aircraft=aircraft).select_related("by")}


def stated(aircraft: Aircraft) -> dict[str, FactValue]:
    """Return the facts of this conversion as `load.applies` reads them: bool, whole number or text; unset left out."""
    return values_of(fact_rows(aircraft))


def values_of(rows: dict[str, Fact]) -> dict[str, FactValue]:
    """Return kept facts as values; a fact the profiles no longer ask for is left out."""
    known = load.facts()
    return {key: _value(known[key].kind, row.value) for key, row in rows.items() if row.value and key in known}


def _value(kind: str, spelled: str) -> FactValue:
    if kind == "yes_no":
        return spelled == "yes"
    return int(spelled) if kind == "count" else spelled


def stated_at(aircraft: Aircraft) -> dict[str, dt.datetime]:
    """Return when each fact was last said."""
    return {key: row.at for key, row in fact_rows(aircraft).items()}


@dataclass(frozen=True)
class SignedIn:
    """One device on which a person is signed in. `mark` names it on a page; its key never leaves the server."""

    mark: str
    device: str
    since: dt.datetime | None
    seen: dt.datetime | None
    key: str = field(repr=False)


def sessions_of(user: User) -> list[SignedIn]:
    """Return where this person is signed in, the latest first.

    The sessions' table knows no persons, so every open session of the site is read: tens, for a workshop.
    """
    found = []
    for row in Session.objects.filter(expire_date__gt=timezone.now()):
        told = row.get_decoded()
        if told.get(SESSION_KEY) == str(user.pk):
            mark = hashlib.sha256(f"session-mark/1\n{row.session_key}".encode()).hexdigest()[:16]
            device = told.get("device", "a device")
            times = [_moment(told.get(name)) for name in ("signed_in_at", "seen_at")]
            found.append(SignedIn(mark, device, times[0], times[1], row.session_key))
    return sorted(found, key=lambda one: (one.seen is not None, one.seen), reverse=True)


def _moment(seconds: int | None) -> dt.datetime | None:
    return dt.datetime.fromtimestamp(seconds, tz=dt.UTC) if seconds else None
