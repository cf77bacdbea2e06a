"""Fresh proof of who is acting, in the same request as the act: a session alone signs nothing and gives no rights."""

from collections.abc import Callable
from typing import TypeVar

from buildlog.aircraft import actions
from buildlog.aircraft.actions.second_step import WRONG_CODE
from buildlog.aircraft.models import User
from buildlog.errors import Refused

T = TypeVar("T")
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


def proven(action: Callable[..., T], *, user: User, network: str) -> Callable[..., T]:
    """Return `action` asking first for password and code, and given the way of proof as `proof`."""

    def prove_and_act(*, password: str, one_time_code: str = "", **given: object) -> T:
        proof = fresh_proof(user, password, one_time_code, network)
        return action(proof=proof, **given)

    return prove_and_act
