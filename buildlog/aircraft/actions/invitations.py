"""Invitations: a one-time code, shown once, of which only the digest is kept."""

import datetime as dt
from dataclasses import dataclass
from uuid import UUID

from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.actions.members import begin_membership, role_words
from buildlog.aircraft.actions.people import create_user
from buildlog.aircraft.codes import CODE_GONE, code_digest, new_code
from buildlog.aircraft.models import Aircraft, Invitation, Member, ReviewLink, User
from buildlog.errors import Refused
from buildlog.ledger import actions as ledger
from buildlog.ledger.ids import uuid7

DAYS = 14


@dataclass(frozen=True)
class Offer:
    """A row and the secret that opens it. The secret is "" when the row was made by an earlier send of the form."""

    row: Invitation | ReviewLink
    secret: str


@transaction.atomic
def invite(
    *,
    aircraft: Aircraft,
    by: User,
    name: str,
    role: str,
    proof: str,
    client_id: UUID | None = None,
    at: dt.datetime | None = None,
) -> Offer:
    """Offer a role to a person; the code works once within fourteen days."""
    if client_id and (sent_before := Invitation.objects.filter(id=client_id).first()):
        if sent_before.aircraft_id != aircraft.id:
            raise Refused("This form was used for something else already. Open it again.")
        return Offer(sent_before, "")
    if not name.strip():
        raise Refused("Say whom you invite; only you and other builders see this.", field="name")
    if role not in Member.MemberRole.values:
        raise Refused("Choose one of the roles.", field="role")
    now, code = at or timezone.now(), new_code()
    row = Invitation.objects.create(
        id=client_id or uuid7(),
        aircraft=aircraft,
        role=role,
        name=name.strip(),
        code_sha256=code_digest(code),
        made_at=now,
        expires_at=now + dt.timedelta(days=DAYS),
    )
    text = f"invited {row.name} as {role_words(role)}"
    ledger.write(aircraft=aircraft, by=by, kind="invitation.made", about=row, text=text, facts={"proof": proof}, at=at)
    return Offer(row, code)


@transaction.atomic
def revoke_invitation(
    *, aircraft: Aircraft, by: User, invitation: Invitation, proof: str, at: dt.datetime | None = None
) -> Invitation:
    """Take an offer back before it is taken up."""
    if invitation.taken_by_id:
        raise Refused("This invitation was taken up already. End the membership instead.")
    if invitation.revoked_at:
        return invitation
    invitation.revoked_at = at or timezone.now()
    invitation.save(update_fields=["revoked_at"])
    text, facts = f"took back the invitation of {invitation.name}", {"proof": proof}
    ledger.write(aircraft=aircraft, by=by, kind="invitation.revoked", about=invitation, text=text, facts=facts, at=at)
    return invitation


@transaction.atomic
def take_invitation(
    *,
    user: User,
    invitation_code: str,
    authority: str = "",
    number: str = "",
    at: dt.datetime | None = None,
) -> Member:
    """Take up an invitation with its code: the person is a member from today."""
    now = at or timezone.now()
    invitation = open_invitation(invitation_code, now=now)
    if invitation is None or invitation.aircraft is None:
        raise Refused(CODE_GONE, field="invitation_code")
    invitation.taken_by = user
    invitation.save(update_fields=["taken_by"])
    member = begin_membership(
        aircraft=invitation.aircraft,
        user=user,
        role=invitation.role,
        authority=authority,
        number=number,
        started_on=timezone.localdate(at),
    )
    text = f"joined as {role_words(member.role)}"
    ledger.write(
        aircraft=invitation.aircraft,
        by=user,
        kind="member.joined",
        about=member,
        rows=[invitation],
        text=text,
        at=at,
    )
    return member


@transaction.atomic
def take_invitation_anew(
    *,
    sign_in: str,
    name: str,
    password: str,
    invitation_code: str,
    authority: str = "",
    number: str = "",
    at: dt.datetime | None = None,
) -> Member:
    """Make an account and take up an invitation with it: both, or neither."""
    # The code is looked at first: without one, nobody learns here which sign-ins are taken.
    if open_invitation(invitation_code, now=at or timezone.now()) is None:
        raise Refused(CODE_GONE, field="invitation_code")
    user = create_user(sign_in=sign_in, name=name, password=password, at=at)
    return take_invitation(user=user, invitation_code=invitation_code, authority=authority, number=number, at=at)


def open_invitation(code: str, *, now: dt.datetime) -> Invitation | None:
    """Return the invitation that a code still opens."""
    return (
        Invitation.objects.select_related("aircraft")
        .filter(code_sha256=code_digest(code), taken_by=None, revoked_at=None, expires_at__gt=now)
        .first()
    )
