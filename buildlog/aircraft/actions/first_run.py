"""The first start of an empty site: a code from the console, then the first account and its aircraft."""

import datetime as dt
from typing import Any

from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.actions.aircraft import create_aircraft
from buildlog.aircraft.actions.invitations import open_invitation
from buildlog.aircraft.actions.people import create_user
from buildlog.aircraft.codes import CODE_GONE, code_digest, new_code
from buildlog.aircraft.models import Aircraft, Invitation, User
from buildlog.aircraft.roles import Role
from buildlog.errors import Refused
from buildlog.ledger import actions as ledger

LASTS = dt.timedelta(hours=1)
NOT_EMPTY = "This site has an account already. Sign in with it."


@transaction.atomic
def make_setup_code(*, at: dt.datetime | None = None) -> str:
    """Return the one-time code that sets up an empty site within the hour; an earlier one stops working."""
    if User.objects.exists():
        raise Refused(NOT_EMPTY)
    now, code = at or timezone.now(), new_code()
    older = list(Invitation.objects.filter(aircraft=None, taken_by=None, revoked_at=None))
    for row in older:
        row.revoked_at = now
        row.save(update_fields=["revoked_at"])
    row = Invitation.objects.create(
        role=Role.BUILDER,
        name="first builder",
        code_sha256=code_digest(code),
        made_at=now,
        expires_at=now + LASTS,
    )
    text = "printed a set-up code on the console"
    ledger.write(aircraft=None, by=None, kind="site.setup-code", about=row, rows=older, text=text, at=at)
    return code


@transaction.atomic
def set_up(
    *,
    set_up_code: str,
    name: str,
    sign_in: str,
    password: str,
    at: dt.datetime | None = None,
    **aircraft: Any,
) -> tuple[User, Aircraft]:
    """Make the first account, which also looks after the site, and the first aircraft; the code is used up."""
    if User.objects.exists():
        raise Refused(NOT_EMPTY)
    code = open_invitation(set_up_code, now=at or timezone.now())
    if code is None or code.aircraft_id is not None:
        raise Refused(CODE_GONE, field="set_up_code")
    user = create_user(sign_in=sign_in, name=name, password=password, is_site_admin=True, at=at)
    code.taken_by = user
    code.save(update_fields=["taken_by"])
    ledger.write(aircraft=None, by=user, kind="site.set-up", about=code, text="set up this site", at=at)
    return user, create_aircraft(by=user, at=at, **aircraft)
