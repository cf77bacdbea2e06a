"""Ways in for somebody who has no account yet: first run, invitation, reviewer's link."""

from django.http import HttpRequest, HttpResponse, HttpResponseRedirect
from django.urls import reverse

from buildlog.aircraft import actions, proof
from buildlog.aircraft.forms import InvitationCodeForm, NewcomerForm, SetUpForm, TokenForm
from buildlog.aircraft.queries import is_empty_site
from buildlog.web import signed_in_since
from buildlog.web.access import public
from buildlog.web.forms import run
from buildlog.web.network import network_of
from buildlog.web.pages import see_other, show


@public
def first_run(request: HttpRequest) -> HttpResponse:
    """Set up an empty site; once there is an account, the page leads to sign-in."""
    if not is_empty_site():
        return HttpResponseRedirect(reverse("sign-in"))
    form = SetUpForm(request.POST or None)
    if request.method == "POST" and form.is_valid():
        keep = form.cleaned_data.pop("keep_signed_in")
        act = proof.slowed(actions.set_up, account="set-up", network=network_of(request), field="set_up_code")
        if made := run(form, act):
            user, aircraft = made
            signed_in_since.begin(request, user, keep=keep)
            return see_other("conversion", aircraft.id)
    status = 422 if form.errors else 200
    return show(request, "aircraft/first_run.html", {"form": form}, status=status)


@public
def invitation_take(request: HttpRequest) -> HttpResponse:
    """Take up an invitation, with the account one has or with a new one."""
    user = request.user
    known = user.is_authenticated
    form = InvitationCodeForm(request.POST or None) if known else NewcomerForm(request.POST or None)
    if request.method == "POST":
        action = actions.take_invitation if known else actions.take_invitation_anew
        act = proof.slowed(action, account="invitation", network=network_of(request), field="invitation_code")
        if member := run(form, act, **({"user": user} if known else {})):
            if not known:
                signed_in_since.begin(request, member.user, keep=True)
            return see_other("conversion", member.aircraft_id)
    status = 422 if form.errors else 200
    return show(request, "aircraft/invitation_take.html", {"form": form}, status=status)


@public
def review_enter(request: HttpRequest) -> HttpResponse:
    """Open the chapters that a reviewer's link names; the token comes by post, so that no address holds it."""
    form = TokenForm(request.POST or None)
    if request.method == "POST":
        act = proof.slowed(actions.open_review_link, account="review", network=network_of(request), field="token")
        if link := run(form, act):
            request.session.cycle_key()  # a session key that somebody planted before opens nothing
            request.session["review_link"] = str(link.id)
            return see_other("review", link.aircraft_id)
    status = 422 if form.errors else 200
    return show(request, "aircraft/review_enter.html", {"form": form}, status=status)
