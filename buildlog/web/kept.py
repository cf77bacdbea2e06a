"""What was typed before a sign-in ran out, carried through the sign-in pages and offered for saving after it.

It travels in the page, signed by this site: nobody else can hand a person fields to save or an address to go to.
"""

from dataclasses import dataclass

from django.core import signing
from django.http import HttpRequest

SALT = "buildlog.kept"
DAY = 24 * 3600
# Passwords, codes and tokens are never carried or shown again.
SECRET_FIELDS = frozenset(
    {
        "csrfmiddlewaretoken",
        "password",
        "new_password",
        "one_time_code",
        "first_code",
        "set_up_code",
        "invitation_code",
        "token",
        "kept",
    }
)


@dataclass(frozen=True)
class Kept:
    """The fields of a form that was not saved, and the address it belongs to."""

    url: str
    fields: tuple[tuple[str, str], ...]
    files: bool = False


def kept_fields(request: HttpRequest) -> list[tuple[str, str]]:
    """Return what was typed, without tokens and passwords, to be shown again."""
    return [(name, value) for name in request.POST for value in request.POST.getlist(name) if name not in SECRET_FIELDS]


def pack(request: HttpRequest) -> str:
    """Return the form of this request as one signed text."""
    held = {"url": request.get_full_path(), "fields": kept_fields(request), "files": bool(request.FILES)}
    return signing.dumps(held, salt=SALT, compress=True)


def unpack(text: str) -> Kept | None:
    """Return what `pack` was given, or None when it is not ours or older than a day."""
    try:
        held = signing.loads(text, salt=SALT, max_age=DAY)
    except signing.BadSignature:
        return None
    return Kept(held["url"], tuple((name, value) for name, value in held["fields"]), held["files"])
