"""Ending a sign-in on another device."""

import datetime as dt

from django.contrib.sessions.models import Session
from django.db import transaction

from buildlog.aircraft.models import User
from buildlog.aircraft.queries import sessions_of
from buildlog.ledger import actions as ledger


@transaction.atomic
def end_session(*, user: User, mark: str, at: dt.datetime | None = None) -> None:
    """End one of this person's sign-ins, named by its mark on the account page, if it is still open."""
    ended = [one.key for one in sessions_of(user) if one.mark == mark]
    if not ended:
        return
    Session.objects.filter(session_key__in=ended).delete()
    ledger.write(aircraft=None, by=user, kind="user.session-ended", about=user, text="ended a sign-in", at=at)
