"""Pages of the site itself."""

from django.urls import path

from buildlog.web import site

urlpatterns = [
    path("healthz", site.healthz, name="healthz"),
    path("light", site.light_set, name="light-set"),
]
