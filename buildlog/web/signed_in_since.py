"""How long a sign-in lasts: fourteen days without a visit, ninety in all."""

import time

from django.contrib.auth import login, logout
from django.http import HttpRequest

from buildlog.aircraft.models import User

LONGEST = 90 * 24 * 3600
# The end moves on once a day, not with each page: a session saved is a write to the database.
RENEW = 24 * 3600


def begin(request: HttpRequest, user: User, *, keep: bool) -> None:
    """Sign a person in on this device; without `keep` until the browser is closed."""
    login(request, user, backend="django.contrib.auth.backends.ModelBackend")
    now = int(time.time())
    request.session["signed_in_at"] = request.session["seen_at"] = now
    request.session["device"] = _device(request.headers.get("User-Agent", ""))
    request.session.set_expiry(None if keep else 0)


def keep_age(request: HttpRequest) -> None:
    """End a sign-in that is ninety days old; move the fourteen days of a younger one on, once a day."""
    if not request.user.is_authenticated:
        return
    now = int(time.time())
    if now - request.session.get("signed_in_at", now) >= LONGEST:
        logout(request)
    elif now - request.session.get("seen_at", now) >= RENEW:
        request.session["seen_at"] = now


def _device(agent: str) -> str:
    """Return a device in words a person knows it by."""
    systems = ("iPhone", "iPad", "Android", "Windows", "Macintosh", "CrOS", "Linux")
    system = next((name for name in systems if name in agent), "unknown system")
    browsers = (("Firefox/", "Firefox"), ("Edg/", "Edge"), ("Chrome/", "Chrome"), ("Safari/", "Safari"))
    browser = next((word for sign, word in browsers if sign in agent), "a browser")
    return f"{browser} on {system}"
