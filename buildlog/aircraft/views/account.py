"""A person's own account: name, password, second step, where they are signed in."""

from typing import cast

from django.contrib.auth import update_session_auth_hash
from django.http import HttpRequest, HttpResponse

from buildlog.aircraft import actions
from buildlog.aircraft.forms import NameForm, PasswordForm, ProofForm, SecondStepForm
from buildlog.aircraft.models import User
from buildlog.aircraft.proof import proven
from buildlog.aircraft.queries import sessions_of
from buildlog.aircraft.second_step import new_secret, picture
from buildlog.web.access import refuse_method, signed_in
from buildlog.web.forms import run_posted
from buildlog.web.network import network_of
from buildlog.web.pages import see_other, show


def _person(request: HttpRequest) -> User:
    return cast(User, request.user)


@signed_in
def account(request: HttpRequest) -> HttpResponse:
    """Show the account; change the name."""
    user = _person(request)
    form = NameForm(request.POST or None, initial={"name": user.name})
    if run_posted(request, form, actions.rename_user, user=user):
        return see_other("account")
    here = request.session.session_key
    context = {"form": form, "sessions": sessions_of(user), "here": here, "second_step": bool(user.totp_secret)}
    return show(request, "aircraft/account.html", context, status=422 if form.errors else 200)


@signed_in
def password_change(request: HttpRequest) -> HttpResponse:
    """Change the password, which ends every other sign-in."""
    user = _person(request)
    form = PasswordForm(request.POST or None, user=user)
    act = proven(actions.change_password, user=user, network=network_of(request))
    if run_posted(request, form, act, user=user):
        update_session_auth_hash(request, user)
        return see_other("account")
    status = 422 if form.errors else 200
    return show(request, "aircraft/password_change.html", {"form": form}, status=status)


@signed_in
def second_step_add(request: HttpRequest) -> HttpResponse:
    """Set up codes from a phone app; the secret stays in the session until the first code is right."""
    user = _person(request)
    if user.totp_secret:
        return see_other("account")
    secret = request.session.setdefault("new_secret", new_secret())
    form = SecondStepForm(request.POST or None, user=user)
    act = proven(actions.add_second_step, user=user, network=network_of(request))
    if run_posted(request, form, act, user=user, secret=secret):
        del request.session["new_secret"]
        return see_other("account")
    context = {"form": form, "secret": secret, "picture": picture(user, secret, request.get_host())}
    return show(request, "aircraft/second_step_add.html", context, status=422 if form.errors else 200)


@signed_in
def second_step_remove(request: HttpRequest) -> HttpResponse:
    """Sign in by password alone again."""
    user = _person(request)
    form = ProofForm(request.POST or None, user=user)
    act = proven(actions.remove_second_step, user=user, network=network_of(request))
    if run_posted(request, form, act, user=user):
        return see_other("account")
    status = 422 if form.errors else 200
    return show(request, "aircraft/second_step_remove.html", {"form": form}, status=status)


@signed_in
def session_end(request: HttpRequest, mark: str) -> HttpResponse:
    """End a sign-in on another device."""
    if request.method != "POST":
        return refuse_method(request, ["POST"])
    actions.end_session(user=_person(request), mark=mark)
    return see_other("account")
