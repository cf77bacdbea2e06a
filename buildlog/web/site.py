"""Pages of the site itself: light, liveness, and the calm pages for what went wrong."""

from django.http import HttpRequest, HttpResponse, HttpResponseRedirect, JsonResponse
from django.shortcuts import render
from django.utils.http import url_has_allowed_host_and_scheme

from buildlog.web.access import public
from buildlog.web.pages import LIGHTS

YEAR = 365 * 24 * 3600


@public
def healthz(request: HttpRequest) -> HttpResponse:
    """Say that the server answers; nothing about the record."""
    return JsonResponse({"answers": True})


@public
def light_set(request: HttpRequest) -> HttpResponse:
    """Pin day, night or full sun on this device; an empty choice follows the system."""
    back = request.POST.get("next", "/")
    if not url_has_allowed_host_and_scheme(back, allowed_hosts={request.get_host()}):
        back = "/"
    answer = HttpResponseRedirect(back)
    chosen = request.POST.get("light", "")
    if chosen in LIGHTS:
        answer.set_cookie("light", chosen, max_age=YEAR, samesite="Lax")
    else:
        answer.delete_cookie("light")
    return answer


def bad_request(request: HttpRequest, exception: Exception) -> HttpResponse:
    """400: the request could not be read."""
    return render(request, "400.html", status=400)


def forbidden(request: HttpRequest, exception: Exception) -> HttpResponse:
    """403: a member without the right."""
    return render(request, "403.html", status=403)


def not_found(request: HttpRequest, exception: Exception) -> HttpResponse:
    """404: not there, or not yours."""
    return render(request, "404.html", status=404)


def broken(request: HttpRequest) -> HttpResponse:
    """500: a bug; the page says what to do and promises nothing."""
    return render(request, "500.html", status=500)
