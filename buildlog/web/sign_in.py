"""Signing in and out."""

import logging
import time

from django.contrib.auth import logout
from django.http import HttpRequest, HttpResponse, HttpResponseRedirect
from django.shortcuts import render
from django.urls import reverse

from buildlog.aircraft import proof
from buildlog.aircraft.models import User
from buildlog.aircraft.queries import is_empty_site, user_of
from buildlog.web import signed_in_since
from buildlog.web.access import public, refuse_method
from buildlog.web.forms import run
from buildlog.web.kept import unpack
from buildlog.web.network import network_of
from buildlog.web.sign_in_page import CodeForm, SignInForm, safe_next

log = logging.getLogger("buildlog.access")
HALF_IN = 5 * 60  # seconds between the password and the code


@public
def sign_in(request: HttpRequest) -> HttpResponse:
    """Ask for sign-in and password; then for the code where a second step is set up."""
    if is_empty_site():
        return HttpResponseRedirect(reverse("first-run"))
    if request.method != "POST":
        form = SignInForm(initial={"next": request.GET.get("next", "")})
        return render(request, "web/sign_in.html", {"form": form})
    form = SignInForm(request.POST)
    given = ("next", "kept", "keep_signed_in")
    user = run(form, lambda **typed: proof.check_password(typed["sign_in"], typed["password"], network_of(request)))
    if user is None:
        return render(request, "web/sign_in.html", {"form": form}, status=422)
    on = {name: form.cleaned_data[name] for name in given}
    if user.totp_secret:
        request.session["half_in"] = {"user": str(user.id), "at": int(time.time()), "keep": on["keep_signed_in"]}
        return render(request, "web/sign_in_code.html", {"form": CodeForm(initial=on)})
    return _go_on(request, user, **on)


@public
def sign_in_code(request: HttpRequest) -> HttpResponse:
    """Ask for the code; only after the right password, and only for five minutes."""
    half = request.session.get("half_in") or {"user": None, "at": 0, "keep": False}
    user = user_of(half["user"]) if time.time() - half["at"] < HALF_IN else None
    if user is None or request.method != "POST":
        return HttpResponseRedirect(reverse("sign-in"))
    form = CodeForm(request.POST)
    right = run(form, lambda **typed: proof.check_code(user, typed["one_time_code"], network_of(request)))
    if right is None:
        return render(request, "web/sign_in_code.html", {"form": form}, status=422)
    del request.session["half_in"]
    typed = form.cleaned_data
    return _go_on(request, user, next=typed["next"], kept=typed["kept"], keep_signed_in=half["keep"])


def _go_on(request: HttpRequest, user: User, *, next: str, kept: str, keep_signed_in: bool) -> HttpResponse:  # noqa: A002
    signed_in_since.begin(request, user, keep=keep_signed_in)
    log.info("signed in user=%s", user.id)
    if held := unpack(kept):
        return render(request, "web/go_on.html", {"kept": held})
    answer = HttpResponseRedirect(safe_next(request, next))
    answer.status_code = 303
    return answer


@public
def sign_out(request: HttpRequest) -> HttpResponse:
    """End the sign-in on this device."""
    if request.method != "POST":
        return refuse_method(request, ["POST"])
    logout(request)
    return HttpResponseRedirect(reverse("sign-in"))
