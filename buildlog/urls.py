"""All pages: those of the site, and those of an aircraft below its identifier. Each room lists its own."""

from django.urls import include, path

from buildlog.web import site

AIRCRAFT_ROOMS = (
    "aircraft",
    "shop",
    "files",
    "parts",
    "readings",
    "calcs",
    "trials",
    "weighing",
    "conformity",
    "binder",
    "find",
    "desk",
)

urlpatterns = [
    path("", include("buildlog.web.urls")),
    path("", include("buildlog.aircraft.site_urls")),
    path(
        "a/<uuid:aircraft_id>/",
        include([path("", include(f"buildlog.{room}.urls")) for room in AIRCRAFT_ROOMS]),
    ),
]
handler400 = site.bad_request
handler403 = site.forbidden
handler404 = site.not_found
handler500 = site.broken
