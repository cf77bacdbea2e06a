"""Ending a sign-in on another device."""

import datetime as dt

from django.contrib.sessions.models import Session
from django.db import transaction

from buildlog.aircraft.models import User
from buildlog.aircraft.queries import sessions_of
from buildlog.errors import Refused
from buildlog.ledger import actions as ledger


@transaction.atomic
def end_session(*, user: User, mark: str, at: dt.datetime | None = None) -> None:
    """End one of this person's sign-ins, named by the mark that the account page shows for it."""
    ended = [one.key for one in sessions_of(user) if one.mark == mark]
    if not ended:
        raise Refused("This sign-in has ended already.")
    Session.objects.filter(session_key__in=ended).delete()
    ledger.write(aircraft=None, by=user, kind="user.session-ended", about=user, text="ended a sign-in", at=at)
