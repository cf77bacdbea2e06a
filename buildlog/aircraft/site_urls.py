"""Pages of people and aircraft that stand above any one aircraft."""

from django.urls import path

from buildlog.aircraft.views import account, aircraft, doors

urlpatterns = [
    path("", aircraft.aircraft_list, name="aircraft-list"),
    path("aircraft/add", aircraft.aircraft_add, name="aircraft-add"),
    path("first-run", doors.first_run, name="first-run"),
    path("join", doors.invitation_take, name="invitation-take"),
    path("review", doors.review_enter, name="review-enter"),
    path("account", account.account, name="account"),
    path("account/password", account.password_change, name="password-change"),
    path("account/second-step", account.second_step_add, name="second-step-add"),
    path("account/second-step/remove", account.second_step_remove, name="second-step-remove"),
    path("account/sign-ins/<slug:mark>/end", account.session_end, name="session-end"),
]
