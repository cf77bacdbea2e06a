"""Pages of the site itself."""

from django.urls import path

from buildlog.web import sign_in, site

urlpatterns = [
    path("healthz", site.healthz, name="healthz"),
    path("sign-in", sign_in.sign_in, name="sign-in"),
    path("sign-in/code", sign_in.sign_in_code, name="sign-in-code"),
    path("sign-out", sign_in.sign_out, name="sign-out"),
    path("light", site.light_set, name="light-set"),
]
