"""The page that asks who is there: on its own, or in place of an answer when a sign-in has run out."""

from urllib.parse import urlencode, urlsplit, urlunsplit

from django import forms
from django.http import HttpRequest, HttpResponse, HttpResponseRedirect
from django.shortcuts import render
from django.urls import reverse
from django.utils.http import url_has_allowed_host_and_scheme

from buildlog.web import kept
from buildlog.web.forms import PlainText


class SignInForm(forms.Form):
    """Who, and the password; where to go on; what was typed before."""

    sign_in = PlainText(
        max_length=120,
        label="Sign-in",
        error_messages={"required": "Write the name you sign in with."},
        widget=forms.TextInput(attrs={"autocomplete": "username", "autocapitalize": "none", "spellcheck": "false"}),
    )
    password = forms.CharField(
        max_length=400,
        strip=False,
        error_messages={"required": "Write your password."},
        widget=forms.PasswordInput(attrs={"autocomplete": "current-password"}),
    )
    keep_signed_in = forms.BooleanField(
        required=False, label="Keep this device signed in", help_text="For 14 days after the last visit, 90 at most."
    )
    next = forms.CharField(required=False, widget=forms.HiddenInput)
    kept = forms.CharField(required=False, widget=forms.HiddenInput)


class CodeForm(forms.Form):
    """The second step."""

    one_time_code = forms.CharField(
        max_length=20,
        label="Code from your phone",
        error_messages={"required": "Write the six digits that your phone shows."},
        widget=forms.TextInput(attrs={"autocomplete": "one-time-code", "inputmode": "numeric"}),
    )
    next = forms.CharField(required=False, widget=forms.HiddenInput)
    kept = forms.CharField(required=False, widget=forms.HiddenInput)


def ask_who(request: HttpRequest) -> HttpResponse:
    """Answer a request of somebody not signed in: a look is sent to the sign-in page, a form is kept in it.

    A part of a page that htmx asked for cannot hold the sign-in: the whole page is taken there.
    """
    by_part = "HX-Request" in request.headers
    if request.method in {"GET", "HEAD"}:
        way = f"{reverse('sign-in')}?{urlencode({'next': _page_of(request)})}"
        return HttpResponse(status=401, headers={"HX-Redirect": way}) if by_part else HttpResponseRedirect(way)
    form = SignInForm(initial={"kept": kept.pack(request)})
    answer = render(request, "web/sign_in.html", {"form": form, "ran_out": True}, status=401)
    if by_part:
        answer.headers["HX-Retarget"], answer.headers["HX-Reswap"] = "body", "innerHTML"
    return answer


def _page_of(request: HttpRequest) -> str:
    """Return the page somebody looks at; for a part, the page around it."""
    around = urlsplit(request.headers.get("HX-Current-URL", ""))
    return urlunsplit(("", "", around.path, around.query, "")) if around.path else request.get_full_path()


def safe_next(request: HttpRequest, wanted: str) -> str:
    """Return the page of this site to go on with; any other address leads to the aircraft."""
    own = url_has_allowed_host_and_scheme(wanted, {request.get_host()}, require_https=request.is_secure())
    return wanted if own and wanted.startswith("/") else reverse("aircraft-list")
