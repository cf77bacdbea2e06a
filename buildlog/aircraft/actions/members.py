"""Who is a member of an aircraft, and as what: from one day until another."""

import datetime as dt

from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.models import Aircraft, Member, User
from buildlog.aircraft.roles import ROLE_WORDS, Role
from buildlog.errors import Refused
from buildlog.ledger import actions as ledger


@transaction.atomic
def add_member(
    *,
    aircraft: Aircraft,
    by: User,
    user: User,
    role: str,
    authority: str = "",
    number: str = "",
    started_on: dt.date | None = None,
    at: dt.datetime | None = None,
) -> Member:
    """Make a person a member of an aircraft."""
    row = begin_membership(
        aircraft=aircraft,
        user=user,
        role=role,
        authority=authority,
        number=number,
        started_on=started_on or timezone.localdate(at),
    )
    text = f"made {user.name} {role_words(role)}"
    ledger.write(aircraft=aircraft, by=by, kind="member.joined", about=row, text=text, at=at)
    return row


def role_words(role: str) -> str:
    """Return a role inside a sentence."""
    return ROLE_WORDS[Role(role)].lower()


def begin_membership(
    *, aircraft: Aircraft, user: User, role: str, authority: str, number: str, started_on: dt.date
) -> Member:
    """Write the row of a membership, for actions that write their event themselves."""
    if role not in Member.MemberRole.values:
        raise Refused("Choose one of the roles.", field="role")
    if aircraft.members.filter(user=user, ended_on=None).exists():
        raise Refused(f"{user.name} is a member already. Change the role instead.", field="role")
    return Member.objects.create(
        aircraft=aircraft,
        user=user,
        role=role,
        authority=authority.strip(),
        number=number.strip(),
        started_on=started_on,
    )


@transaction.atomic
def change_role(
    *,
    aircraft: Aircraft,
    by: User,
    member: Member,
    role: str,
    authority: str,
    number: str,
    proof: str,
    at: dt.datetime | None = None,
) -> Member:
    """End a membership and begin one in another role or capacity; what was done before keeps the role of its day."""
    _refuse_ended(member)
    if (member.role, member.authority, member.number) == (role, authority.strip(), number.strip()):
        return member
    if role != Role.BUILDER:
        _refuse_last_builder(member)
    today = timezone.localdate(at)
    _end(member, today)
    begun = begin_membership(
        aircraft=aircraft, user=member.user, role=role, authority=authority, number=number, started_on=today
    )
    text = f"changed {member.user.name} from {role_words(member.role)} to {role_words(role)}"
    ledger.write(
        aircraft=aircraft,
        by=by,
        kind="member.changed",
        about=begun,
        rows=[member],
        text=text,
        facts={"proof": proof},
        at=at,
    )
    return begun


@transaction.atomic
def end_membership(
    *, aircraft: Aircraft, by: User, member: Member, proof: str, at: dt.datetime | None = None
) -> Member:
    """End a membership: the person sees nothing of this aircraft any more, and what they did stays."""
    _refuse_ended(member)
    _refuse_last_builder(member)
    _end(member, timezone.localdate(at))
    text = f"ended the membership of {member.user.name}, {role_words(member.role)}"
    ledger.write(aircraft=aircraft, by=by, kind="member.ended", about=member, text=text, facts={"proof": proof}, at=at)
    return member


def _end(member: Member, today: dt.date) -> None:
    member.ended_on = max(today, member.started_on)
    member.save(update_fields=["ended_on"])


def _refuse_ended(member: Member) -> None:
    if member.ended_on is not None:
        raise Refused("This membership has ended already.")


def _refuse_last_builder(member: Member) -> None:
    others = member.aircraft.members.filter(role=Role.BUILDER, ended_on=None).exclude(id=member.id)
    if member.role == Role.BUILDER and not others.exists():
        raise Refused("An aircraft keeps at least one builder. Make somebody else a builder first.")
