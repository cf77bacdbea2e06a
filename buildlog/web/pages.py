"""How a page is shown: whole for a plain request, one partial for htmx, with the frame around it."""

from collections.abc import Mapping
from dataclasses import dataclass
from functools import cache
from typing import Any
from urllib.parse import urlsplit
from uuid import UUID

from django.http import HttpRequest, HttpResponse, HttpResponseRedirect
from django.shortcuts import render
from django.urls import NoReverseMatch, resolve, reverse

from buildlog.aircraft.models import Aircraft, Member
from buildlog.aircraft.roles import Act, may
from buildlog.web.kept import kept_fields

LIGHTS = ("day", "night", "sun")


@dataclass(frozen=True)
class Way:
    """One line of the rail or the bottom bar."""

    title: str
    url: str
    current: bool = False
    icon: str = ""
    count: str = ""


# Rail: groups of (title, name of the page, path below the aircraft that marks it as current).
RAIL = (
    (("Bench", "bench"), ("Aircraft", "aircraft-page")),
    (("Checks", "checks"), ("Conversion", "conversion"), ("Trials", "trials"), ("Calculations", "calculations")),
    (
        ("Tasks", "tasks"),
        ("Entries", "entries"),
        ("Photos", "photos"),
        ("Parts", "parts"),
        ("Readings", "readings"),
        ("Deviations", "deviations"),
        ("Squawks", "squawks"),
        ("Sign-offs", "sign-offs"),
        ("Weight and balance", "weight-and-balance"),
    ),
    (("Binder", "binders"), ("Find", "find"), ("Recent changes", "recent-changes"), ("People and links", "people")),
)
TABS = (
    ("Bench", "bench", "bench"),
    ("Tasks", "tasks", "tasks"),
    ("Log", "entry-add", "log"),
    ("Find", "find", "find"),
    ("Aircraft", "aircraft-page", "aircraft"),
)


def frame(request: HttpRequest) -> dict[str, Any]:
    """Return what the frame around every page needs: rail, bottom bar, light."""
    aircraft: Aircraft | None = getattr(request, "aircraft", None)
    light = request.COOKIES.get("light", "")
    base = {"light": light if light in LIGHTS else "", "aircraft": aircraft, "member": getattr(request, "member", None)}
    if aircraft is None:
        return base
    rail = [[way for title, name in group if (way := _way(request, aircraft, title, name))] for group in RAIL]
    tabs = [way for title, name, icon in TABS if (way := _way(request, aircraft, title, name, icon))]
    role = request.member.role  # type: ignore[attr-defined]
    rights = {act.value: may(role, act) for act in Act}
    return {**base, "rail_groups": rail, "tabs": tabs, "may": rights}


def _way(request: HttpRequest, aircraft: Aircraft, title: str, name: str, icon: str = "") -> Way | None:
    try:
        url = reverse(name, args=[aircraft.id])
    except NoReverseMatch:
        return None
    if not _open_to(request.member, _rule(name)):  # type: ignore[attr-defined]
        return None
    here = request.path == url or (name not in {"bench", "aircraft-page"} and request.path.startswith(url))
    return Way(title, url, here, icon)


@cache
def _rule(name: str) -> Any:
    nobody = UUID(int=0)
    return getattr(resolve(reverse(name, args=[nobody])).func, "rule", None)


def _open_to(member: Member, rule: Any) -> bool:
    """Return whether a page would open for this visitor: a way that ends in "not yours" is not offered."""
    if rule is None or rule.read is None or not may(member.role, rule.read):
        return False
    return member.chapters is None or not rule.chapter or rule.chapter in member.chapters


def show(
    request: HttpRequest, page: str, context: Mapping[str, Any], *, partial: str = "", status: int = 200
) -> HttpResponse:
    """Render a page, or only its partial when htmx asked for it."""
    wanted = f"{page}#{partial}" if partial and getattr(request, "htmx", False) else page
    return render(request, wanted, dict(context), status=status)


def see_other(name: str, *args: object) -> HttpResponse:
    """Answer a saved form: look at this page now."""
    answer = HttpResponseRedirect(reverse(name, args=args))
    answer.status_code = 303
    return answer


def stale_form(request: HttpRequest, reason: str = "") -> HttpResponse:
    """Answer a form whose token is gone (an old page, a cleared cookie): what was typed is shown, ready to send again.

    Only for a form of our own pages; another site's form gets no second chance.
    """
    origin = request.headers.get("Origin") or request.headers.get("Referer") or ""
    own = urlsplit(origin).netloc == request.get_host()
    return render(request, "stale_form.html", {"kept": kept_fields(request) if own else []}, status=403)
