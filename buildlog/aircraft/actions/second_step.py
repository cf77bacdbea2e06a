"""The optional second step of a sign-in: a code from a phone app (RFC 6238), each good for one use."""

import datetime as dt
import time

from django.db import transaction

from buildlog.aircraft.models import User
from buildlog.errors import Refused
from buildlog.ledger import actions as ledger

STEP = 30  # seconds, RFC 6238 section 5.2
DRIFT = 1  # steps that a phone's clock may be off either way, RFC 6238 section 6
WRONG_CODE = "This code does not fit. Wait for the next one on your phone, and check that the phone's clock is right."


def _step_of(secret: str, code: str, now: float) -> int | None:
    import pyotp

    generator = pyotp.TOTP(secret)
    present = int(now) // STEP
    digits = "".join(code.split())
    for step in range(present - DRIFT, present + DRIFT + 1):
        if pyotp.utils.strings_equal(digits, generator.at(step * STEP)):
            return step
    return None


@transaction.atomic
def spend_code(*, user: User, code: str, now: float | None = None) -> bool:
    """Return whether the code is right and unused; it counts as used from then on, and so do all before it."""
    step = _step_of(user.totp_secret, code, now if now is not None else time.time())
    if step is None:
        return False
    return bool(User.objects.filter(id=user.id, totp_step__lt=step).update(totp_step=step))


@transaction.atomic
def add_second_step(
    *, user: User, secret: str, first_code: str, proof: str, at: dt.datetime | None = None, now: float | None = None
) -> User:
    """Ask this person for a code from now on; the first code shows that the phone holds the secret."""
    step = _step_of(secret, first_code, now if now is not None else time.time())
    if step is None:
        raise Refused(WRONG_CODE, field="first_code")
    if user.totp_secret:
        raise Refused("A second step is set up already. Take it away first.")
    user.totp_secret, user.totp_step = secret, step
    user.save(update_fields=["totp_secret", "totp_step"])
    text, facts = "added a second step to the sign-in", {"proof": proof}
    ledger.write(aircraft=None, by=user, kind="user.second-step-added", about=user, text=text, facts=facts, at=at)
    return user


@transaction.atomic
def remove_second_step(*, user: User, proof: str, at: dt.datetime | None = None) -> User:
    """Sign in by password alone again."""
    if not user.totp_secret:
        return user
    user.totp_secret = ""
    user.save(update_fields=["totp_secret"])
    text, facts = "took away the second step of the sign-in", {"proof": proof}
    ledger.write(aircraft=None, by=user, kind="user.second-step-removed", about=user, text=text, facts=facts, at=at)
    return user
