"""Fresh proof of who is acting, in the same request as the act: a session alone signs nothing and gives no rights."""

from collections.abc import Callable
from typing import TypeVar

from django.contrib.auth import authenticate

from buildlog.aircraft import actions
from buildlog.aircraft.actions.people import plain_sign_in
from buildlog.aircraft.actions.second_step import WRONG_CODE
from buildlog.aircraft.models import User
from buildlog.errors import Refused

T = TypeVar("T")
WRONG_PAIR = "This sign-in and password do not belong together. Nothing is locked; try again."
WRONG_PASSWORD = "This is not your password. Type it again."


def fresh_proof(user: User, password: str, code: str, network: str) -> str:
    """Return how the person proved who they are: "password", or "password and code" where a second step is set up.

    network: where the request comes from (`web.network.network_of`). Raises Refused at "password" or
    "one_time_code"; each wrong try makes the next wait longer. To be called outside a transaction, so that a wrong
    try stays counted when the act is refused.
    """
    actions.begin_try(account=user.sign_in, network=network, field="password")
    if not user.check_password(password):
        raise Refused(WRONG_PASSWORD, field="password")
    if user.totp_secret and not actions.spend_code(user=user, code=code):
        raise Refused(WRONG_CODE, field="one_time_code")
    actions.forget_tries(account=user.sign_in, network=network)
    return "password and code" if user.totp_secret else "password"


def check_password(sign_in: str, password: str, network: str) -> User:
    """Return the person whose password this is: the first step of a sign-in, or all of it without a second step."""
    account = plain_sign_in(sign_in)
    actions.begin_try(account=account, network=network)
    user = authenticate(None, username=account, password=password)
    if not isinstance(user, User):
        raise Refused(WRONG_PAIR)
    if not user.totp_secret:
        actions.forget_tries(account=account, network=network)
    return user


def check_code(user: User, code: str, network: str) -> bool:
    """Return True for the right code: the second step of a sign-in."""
    actions.begin_try(account=user.sign_in, network=network, field="one_time_code")
    if not actions.spend_code(user=user, code=code):
        raise Refused(WRONG_CODE, field="one_time_code")
    actions.forget_tries(account=user.sign_in, network=network, steps=2)
    return True


def proven(action: Callable[..., T], *, user: User, network: str) -> Callable[..., T]:
    """Return `action` asking first for password and code, and given the way of proof as `proof`."""

    def prove_and_act(*, password: str, one_time_code: str = "", **given: object) -> T:
        proof = fresh_proof(user, password, one_time_code, network)
        return action(proof=proof, **given)

    return prove_and_act


def slowed(action: Callable[..., T], *, account: str, network: str, field: str) -> Callable[..., T]:
    """Return `action`, which looks at a code in `field`, with a growing wait after each wrong code."""

    def try_and_act(**given: object) -> T:
        actions.begin_try(account=account, network=network, field=field)
        try:
            done = action(**given)
        except Refused as refusal:
            if refusal.field != field:  # the code was right, something else was not
                actions.forget_tries(account=account, network=network)
            raise
        actions.forget_tries(account=account, network=network)
        return done

    return try_and_act
