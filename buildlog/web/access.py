"""The gate: a view without a rule is refused, and an aircraft is found only through its members.

Three nets: the gate asks for a signed-in person unless the rule says "public"; it refuses any view that carries no
rule; and the guard of an aircraft's pages finds the aircraft through its members, so that a stranger gets the same
404 as for an aircraft that does not exist.
"""

import logging
from collections.abc import Callable
from dataclasses import dataclass
from functools import wraps
from typing import Any, Concatenate, Protocol, cast
from uuid import UUID

from django.http import Http404, HttpRequest, HttpResponse, HttpResponseForbidden, HttpResponseNotAllowed
from django.http.response import HttpResponseBase
from django.template.loader import render_to_string

from buildlog.aircraft.models import Aircraft, Member, User
from buildlog.aircraft.queries import membership, review_membership
from buildlog.aircraft.roles import Act, Role, may
from buildlog.web.sign_in_page import ask_who
from buildlog.web.signed_in_since import keep_age

log = logging.getLogger("buildlog.access")


@dataclass(frozen=True)
class Rule:
    """Who may call a view: `audience` public, signed-in, admin or aircraft; the acts for reading and for writing."""

    audience: str
    read: Act | None = None
    write: Act | None = None
    chapter: str = ""  # the part of the record a reviewer's link must include


class Visitor(Protocol):
    """Who is looking at an aircraft: a member, or a reviewer by link."""

    role: str


class AircraftRequest(HttpRequest):
    """A request that passed the guard of an aircraft page."""

    user: User
    member: Member
    aircraft: Aircraft


View = Callable[..., HttpResponseBase]


def public(view: View) -> View:
    """Mark a view that anyone may call."""
    view.rule = Rule("public")  # type: ignore[attr-defined]
    return view


def signed_in(view: View) -> View:
    """Mark a view for anyone with an account."""
    view.rule = Rule("signed-in")  # type: ignore[attr-defined]
    return view


def site_admin(view: View) -> View:
    """Mark a view for the site's administrators."""
    view.rule = Rule("admin")  # type: ignore[attr-defined]
    return view


def aircraft_view(
    *, read: Act | None = Act.READ, write: Act | None = None, chapter: str = ""
) -> Callable[[Callable[Concatenate[AircraftRequest, Aircraft, ...], HttpResponseBase]], View]:
    """Guard a page of one aircraft.

    read: the act asked for on GET and HEAD (None: no GET). write: the act asked for on POST (None: no POST).
    chapter: the part of the record this page belongs to, for reviewers' links ("" means: every link may see it).
    Not a member: 404. A member without the right: 403. Any other method: 405.
    """

    def guard(view: Callable[Concatenate[AircraftRequest, Aircraft, ...], HttpResponseBase]) -> View:
        @wraps(view)
        def guarded(request: HttpRequest, aircraft_id: UUID, *args: Any, **kwargs: Any) -> HttpResponseBase:
            member = _member(request, aircraft_id, chapter)
            act = read if request.method in {"GET", "HEAD"} else write if request.method == "POST" else None
            if act is None:
                return refuse_method(request, [name for name, on in (("GET", read), ("POST", write)) if on])
            if not may(member.role, act):
                return forbidden(request)
            asked = cast(AircraftRequest, request)
            asked.member, asked.aircraft = member, member.aircraft
            return view(asked, member.aircraft, *args, **kwargs)

        guarded.rule = Rule("aircraft", read, write, chapter)  # type: ignore[attr-defined]
        return guarded

    return guard


def _member(request: HttpRequest, aircraft_id: UUID, chapter: str) -> Member:
    member = None
    if request.user.is_authenticated:
        member = membership(user=request.user, aircraft_id=aircraft_id)
    if member is None:
        member = review_membership(request.session.get("review_link"), aircraft_id, chapter)
    if member is None:
        raise Http404("Not one of your aircraft, or not there.")
    return member


def forbidden(request: HttpRequest, text: str = "") -> HttpResponse:
    """Answer 403 with a calm page that says what the role may not do."""
    return HttpResponseForbidden(render_to_string("403.html", {"text": text}, request=request))


def refuse_method(request: HttpRequest, allowed: list[str]) -> HttpResponse:
    """Answer 405 with a calm page."""
    answer = HttpResponseNotAllowed(allowed)
    answer.write(render_to_string("405.html", {}, request=request))
    return answer


class AccessGate:
    """Middleware: no rule, no entry."""

    def __init__(self, get_response: Callable[[HttpRequest], HttpResponse]) -> None:
        self.get_response = get_response

    def __call__(self, request: HttpRequest) -> HttpResponse:
        return self.get_response(request)

    def process_view(self, request: HttpRequest, view: View, args: Any, kwargs: Any) -> HttpResponse | None:
        """Refuse a view that carries no rule, and a visitor that its rule does not know."""
        rule: Rule | None = getattr(view, "rule", None)
        if rule is None:
            log.error("no access rule for view %s.%s", view.__module__, getattr(view, "__name__", view))
            return forbidden(request)
        if rule.audience == "public":
            return None
        keep_age(request)
        person = request.user
        by_link = rule.audience == "aircraft" and "review_link" in request.session
        if not person.is_authenticated and not by_link:
            return ask_who(request)
        if rule.audience == "admin" and not getattr(person, "is_site_admin", False):
            return forbidden(request)
        return None


__all__ = ["Act", "AircraftRequest", "Role", "Rule", "aircraft_view", "forbidden", "public", "signed_in", "site_admin"]
