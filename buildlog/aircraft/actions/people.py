"""Accounts: making one, its name, its password."""

import datetime as dt
import unicodedata

from django.contrib.auth.password_validation import validate_password
from django.core.exceptions import ValidationError
from django.db import transaction
from django.utils import timezone

from buildlog.aircraft.models import User
from buildlog.errors import Refused
from buildlog.ledger import actions as ledger

PASSWORD_SENTENCES = {
    "password_too_short": "Use 12 characters or more; three or four words are easy to remember.",
    "password_too_common": "This password stands on the lists that are tried first. Take another.",
    "password_too_similar": "This password is too much like your name or sign-in. Take another.",
}


def plain_sign_in(text: str) -> str:
    """Return a sign-in name as it is kept: one spelling for capitals, widths and outer spaces."""
    return unicodedata.normalize("NFKC", text).strip().casefold()


def check_password_rules(password: str, user: User, *, field: str = "password") -> None:
    """Refuse a password that is short, listed or like the person's name, in plain words."""
    try:
        validate_password(password, user)
    except ValidationError as error:
        said = [PASSWORD_SENTENCES.get(one.code or "", " ".join(one.messages)) for one in error.error_list]
        raise Refused(" ".join(said), field=field) from error


@transaction.atomic
def create_user(
    *,
    sign_in: str,
    name: str,
    password: str,
    is_site_admin: bool = False,
    by: User | None = None,
    at: dt.datetime | None = None,
) -> User:
    """Make an account; `by` is who made it where that is not the person."""
    sign_in, name = plain_sign_in(sign_in), name.strip()
    if not sign_in:
        raise Refused("Choose a name to sign in with.", field="sign_in")
    if not name:
        raise Refused("Write your name as it shall stand in the record.", field="name")
    if User.objects.filter(sign_in=sign_in).exists():
        raise Refused("This sign-in is taken. Choose another, or sign in with it first.", field="sign_in")
    user = User(sign_in=sign_in, name=name, is_site_admin=is_site_admin, joined_at=at or timezone.now())
    check_password_rules(password, user)
    user.set_password(password)
    user.save(force_insert=True)
    ledger.write(aircraft=None, by=by or user, kind="user.joined", about=user, text=f"made an account: {name}", at=at)
    return user


@transaction.atomic
def rename_user(*, user: User, name: str, at: dt.datetime | None = None) -> User:
    """Change a person's name as shown; names already in signatures and closed records stay as they were."""
    name = name.strip()
    if not name:
        raise Refused("Write your name as it shall stand in the record.", field="name")
    if name == user.name:
        return user
    before, user.name = user.name, name
    user.save(update_fields=["name"])
    ledger.write(aircraft=None, by=user, kind="user.renamed", about=user, text=f"changed name from {before}", at=at)
    return user


@transaction.atomic
def let_in(*, user: User, new_password: str, at: dt.datetime | None = None) -> User:
    """Give a person another password from the console and take away the second step; the trail says so."""
    check_password_rules(new_password, user, field="new_password")
    user.set_password(new_password)
    user.totp_secret = ""
    user.save(update_fields=["password", "totp_secret"])
    text = f"the console gave {user.name} a new password and took away the second step"
    ledger.write(aircraft=None, by=None, kind="user.let-in", about=user, text=text, at=at)
    return user


@transaction.atomic
def change_password(*, user: User, new_password: str, proof: str, at: dt.datetime | None = None) -> User:
    """Change a password; every other sign-in of this person ends with it."""
    check_password_rules(new_password, user, field="new_password")
    user.set_password(new_password)
    user.save(update_fields=["password"])
    ledger.write(
        aircraft=None,
        by=user,
        kind="user.password-changed",
        about=user,
        text="changed the password",
        facts={"proof": proof},
        at=at,
    )
    return user
