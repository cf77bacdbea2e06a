"""Who may see the aircraft: members, invitations, reviewers' links. Every change asks for fresh proof."""

from collections.abc import Callable
from typing import Any
from uuid import UUID

from django.http import HttpResponse
from django.shortcuts import get_object_or_404
from django.urls import reverse

from buildlog.aircraft import actions, queries
from buildlog.aircraft.forms import InvitationForm, ProofForm, ReviewLinkForm, RoleForm
from buildlog.aircraft.models import Aircraft, Invitation, Member, ReviewLink
from buildlog.aircraft.proof import proven
from buildlog.aircraft.roles import CHAPTERS
from buildlog.web.access import Act, AircraftRequest, aircraft_view
from buildlog.web.forms import run
from buildlog.web.network import network_of
from buildlog.web.pages import see_other, show

builder_only = aircraft_view(read=Act.MANAGE, write=Act.MANAGE)


def _prove(request: AircraftRequest, form: ProofForm, action: Callable[..., Any], **more: Any) -> Any:
    """Run an action of this aircraft with fresh proof; None on GET and on a refusal."""
    if request.method != "POST":
        return None
    act = proven(action, user=request.user, network=network_of(request))
    return run(form, act, aircraft=request.aircraft, by=request.user, **more)


def _page(request: AircraftRequest, name: str, form: ProofForm, **more: Any) -> HttpResponse:
    return show(request, f"aircraft/{name}.html", {"form": form, **more}, status=422 if form.errors else 200)


@aircraft_view(read=Act.MANAGE)
def people(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Show members, open invitations and open links."""
    context = {
        "members": queries.people_of(aircraft),
        "past": queries.past_people_of(aircraft),
        "invitations": queries.invitations_of(aircraft),
        "links": queries.review_links_of(aircraft),
        "chapters": CHAPTERS,
    }
    return show(request, "aircraft/people.html", context)


@builder_only
def member_edit(request: AircraftRequest, aircraft: Aircraft, member_id: UUID) -> HttpResponse:
    """End a membership in one role and begin it in another."""
    row = get_object_or_404(Member.objects.select_related("user", "aircraft"), aircraft=aircraft, id=member_id)
    initial = {"role": row.role, "authority": row.authority, "number": row.number}
    form = RoleForm(request.POST or None, user=request.user, initial=initial)
    if _prove(request, form, actions.change_role, member=row):
        return see_other("people", aircraft.id)
    return _page(request, "member_edit", form, person=row)


@builder_only
def member_end(request: AircraftRequest, aircraft: Aircraft, member_id: UUID) -> HttpResponse:
    """End a membership."""
    row = get_object_or_404(Member.objects.select_related("user", "aircraft"), aircraft=aircraft, id=member_id)
    form = ProofForm(request.POST or None, user=request.user)
    if _prove(request, form, actions.end_membership, member=row):
        return see_other("aircraft-list") if row.user_id == request.user.id else see_other("people", aircraft.id)
    return _page(request, "member_end", form, person=row)


@builder_only
def invitation_add(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Invite somebody; the code is shown on this one answer and never again."""
    form = InvitationForm(request.POST or None, user=request.user)
    if offer := _prove(request, form, actions.invite):
        return _offered(request, offer, "invitation-take")
    return _page(request, "invitation_add", form)


@builder_only
def invitation_revoke(request: AircraftRequest, aircraft: Aircraft, invitation_id: UUID) -> HttpResponse:
    """Take back an invitation."""
    row = get_object_or_404(Invitation, aircraft=aircraft, id=invitation_id)
    form = ProofForm(request.POST or None, user=request.user)
    if _prove(request, form, actions.revoke_invitation, invitation=row):
        return see_other("people", aircraft.id)
    return _page(request, "invitation_revoke", form, invitation=row)


@builder_only
def review_link_add(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Make a reviewer's link; it is shown on this one answer and never again."""
    form = ReviewLinkForm(request.POST or None, user=request.user)
    if offer := _prove(request, form, actions.make_review_link):
        return _offered(request, offer, "review-enter")
    return _page(request, "review_link_add", form)


@builder_only
def review_link_revoke(request: AircraftRequest, aircraft: Aircraft, link_id: UUID) -> HttpResponse:
    """Take back a reviewer's link."""
    row = get_object_or_404(ReviewLink, aircraft=aircraft, id=link_id)
    form = ProofForm(request.POST or None, user=request.user)
    if _prove(request, form, actions.revoke_review_link, link=row):
        return see_other("people", aircraft.id)
    return _page(request, "review_link_revoke", form, link=row)


@aircraft_view()
def review(request: AircraftRequest, aircraft: Aircraft) -> HttpResponse:
    """Show a reviewer which chapters are open to them."""
    chosen = request.member.chapters
    chapters = [(title, PAGES[key]) for key, title in CHAPTERS.items() if chosen is None or key in chosen]
    return show(request, "aircraft/review.html", {"chapters": chapters})


# Where the chapters of the record begin: (words, name of the page).
PAGES = {
    "log": (("Tasks", "tasks"), ("Entries", "entries")),
    "photos": (("Photos", "photos"), ("Documents", "documents")),
    "parts": (("Parts", "parts"), ("Batches", "batches")),
    "readings": (("Readings", "readings"), ("Instruments", "instruments")),
    "calculations": (("Calculations", "calculations"), ("Trials", "trials")),
    "checks": (("Checks", "checks"), ("Conversion", "conversion"), ("Sign-offs", "sign-offs")),
    "weights": (("Weight and balance", "weight-and-balance"),),
    "findings": (("Squawks", "squawks"), ("Deviations", "deviations")),
    "binder": (("Binders", "binders"),),
}


def _offered(request: AircraftRequest, offer: actions.Offer, name: str) -> HttpResponse:
    link = f"{request.build_absolute_uri(reverse(name))}#{offer.secret}"
    context = {"offer": offer, "link": link, "invited": name == "invitation-take"}
    return show(request, "aircraft/offer_shown.html", context, status=201)
