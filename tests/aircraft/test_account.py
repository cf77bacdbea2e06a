"""One's own account, and the first start of an empty site."""

import datetime as dt
import re

import pyotp
import pytest
from django.test import Client
from django.urls import reverse
from django.utils import timezone

from buildlog.aircraft import actions
from buildlog.aircraft.models import Aircraft, User
from buildlog.errors import Refused
from buildlog.ledger import verify
from buildlog.ledger.ids import SITE_CHAIN
from buildlog.ledger.models import Event
from tests import make

pytestmark = pytest.mark.django_db
FIRST = {
    "name": "Ada Berg",
    "sign_in": "Ada",
    "password": "spruce and linen rope",
    "designation": "Test Two",
    "basis": "plans",
    "serial": "0042",
    "seats": "2",
    "jurisdiction": "own",
    "units": "si",
    "started_on": "2024-01-10",
    "keep_signed_in": "on",
}


def site_kinds() -> list[str]:
    return list(Event.objects.filter(chain=SITE_CHAIN).order_by("seq").values_list("kind", flat=True))


def test_first_run_makes_person_and_aircraft_and_signs_in(client):
    code = actions.make_setup_code()
    answer = client.post(reverse("first-run"), FIRST | {"set_up_code": code})
    assert answer.status_code == 303
    user, aircraft = User.objects.get(), Aircraft.objects.get()
    assert (user.sign_in, user.name, user.is_site_admin) == ("ada", "Ada Berg", True)
    assert (str(aircraft), aircraft.started_on) == ("Test Two, serial 0042", dt.date(2024, 1, 10))
    assert [(row.user, row.role) for row in aircraft.members.all()] == [(user, "builder")]
    assert client.get(answer["Location"]).status_code == 200
    assert site_kinds() == ["site.setup-code", "user.joined", "site.set-up"]
    assert verify.check()[1] == []


def test_setup_code_works_once(client):
    code = actions.make_setup_code()
    client.post(reverse("first-run"), FIRST | {"set_up_code": code})
    second = Client().post(reverse("first-run"), FIRST | {"set_up_code": code, "sign_in": "bo", "serial": "43"})
    assert second["Location"] == reverse("sign-in")
    assert User.objects.count() == 1
    with pytest.raises(Refused):
        actions.make_setup_code()


def test_setup_code_lasts_an_hour_and_a_newer_one_replaces_it(client):
    old = actions.make_setup_code(at=timezone.now() - dt.timedelta(minutes=61))
    replaced, present = actions.make_setup_code(), actions.make_setup_code()
    for code in (old, replaced, "", "guess"):
        answer = client.post(reverse("first-run"), FIRST | {"set_up_code": code})
        assert answer.status_code == 422
        assert 'value="Test Two"' in answer.content.decode()
        assert "spruce and linen" not in answer.content.decode()
    assert User.objects.count() == 0
    assert client.post(reverse("first-run"), FIRST | {"set_up_code": present.lower()}).status_code == 303


def test_guessed_setup_codes_are_slowed(client):
    code = actions.make_setup_code()
    for _ in range(4):
        client.post(reverse("first-run"), FIRST | {"set_up_code": "guess"})
    assert "Too many wrong tries" in client.post(reverse("first-run"), FIRST | {"set_up_code": code}).content.decode()


@pytest.mark.parametrize(
    ("field", "value", "said"),
    [
        ("password", "too short", "12 characters"),
        ("password", "password1234", "tried first"),
        ("serial", "", "cannot stay empty"),
        ("seats", "many", "whole number"),
        ("seats", "0", "1 to 20"),
        ("started_on", "14.3.2026", "year-month-day"),
        ("started_on", "2999-01-01", "future"),
        ("jurisdiction", "", "Choose one."),
        ("basis", "", "Choose one."),
        ("jurisdiction", "atlantis", "not one of the available choices"),
        ("designation", "a\x00b", "cannot be kept"),
    ],
)
def test_first_run_says_what_is_wrong_at_the_field(client, field, value, said):
    code = actions.make_setup_code()
    answer = client.post(reverse("first-run"), FIRST | {"set_up_code": code, field: value})
    words = answer.content.decode()
    assert answer.status_code == 422
    assert said in words
    assert f'id="id_{field}_error"' in words
    assert User.objects.count() == 0
    assert client.post(reverse("first-run"), FIRST | {"set_up_code": code}).status_code == 303


@pytest.fixture
def user(client) -> User:
    person = make.user(name="Ada Berg")
    client.post(reverse("sign-in"), {"sign_in": person.sign_in, "password": make.PASSWORD})
    return person


def test_name_is_changed_with_its_event(client, user):
    assert client.post(reverse("account"), {"name": "Ada Berg-Lund"}).status_code == 303
    user.refresh_from_db()
    assert user.name == "Ada Berg-Lund"
    assert site_kinds()[-1] == "user.renamed"
    assert verify.check()[1] == []


def test_new_password_ends_the_other_devices_and_keeps_this_one(client, user):
    other = Client()
    other.post(reverse("sign-in"), {"sign_in": user.sign_in, "password": make.PASSWORD})
    url = reverse("password-change")
    assert client.post(url, {"password": "wrong", "new_password": "cedar and linen rope"}).status_code == 422
    assert client.post(url, {"password": make.PASSWORD, "new_password": "cedar"}).status_code == 422
    assert client.post(url, {"password": make.PASSWORD, "new_password": "cedar and linen rope"}).status_code == 303
    assert client.get(reverse("account")).status_code == 200
    assert other.get(reverse("account")).status_code == 302
    user.refresh_from_db()
    assert user.check_password("cedar and linen rope")


def test_second_step_is_added_with_a_picture_and_taken_away_with_proof(client, user):
    url = reverse("second-step-add")
    page = client.get(url).content.decode()
    secret = client.session["new_secret"]
    assert secret in page
    assert "<svg" in page
    assert "style=" not in page
    wrong = client.post(url, {"password": make.PASSWORD, "first_code": "000000"})
    assert wrong.status_code == 422
    assert client.session["new_secret"] == secret
    code = pyotp.TOTP(secret).now()
    assert client.post(url, {"password": make.PASSWORD, "first_code": code}).status_code == 303
    user.refresh_from_db()
    assert user.totp_secret == secret
    assert secret not in client.get(reverse("account")).content.decode()
    away = reverse("second-step-remove")
    assert client.post(away, {"password": make.PASSWORD}).status_code == 422
    assert client.post(away, {"password": make.PASSWORD, "one_time_code": code}).status_code == 422  # used already
    later = pyotp.TOTP(secret).at(dt.datetime.now(), counter_offset=1)
    assert client.post(away, {"password": make.PASSWORD, "one_time_code": later}).status_code == 303
    user.refresh_from_db()
    assert user.totp_secret == ""
    assert site_kinds()[-2:] == ["user.second-step-added", "user.second-step-removed"]


def test_sign_in_on_another_device_is_listed_and_ended(client, user):
    agent = "Mozilla/5.0 (iPhone; CPU iPhone OS 18_0 like Mac OS X) AppleWebKit/605 Version/18.0 Safari/604"
    other = Client(headers={"user-agent": agent})
    other.post(reverse("sign-in"), {"sign_in": user.sign_in, "password": make.PASSWORD})
    page = client.get(reverse("account")).content.decode()
    assert "Safari on iPhone" in page
    assert other.session.session_key not in page
    end = re.search(r'action="(/account/sign-ins/[0-9a-f]+/end)"', page)[1]
    stranger = Client()
    stranger.force_login(make.user())
    assert stranger.post(end).status_code == 303
    assert other.get(reverse("account")).status_code == 200
    assert client.post(end).status_code == 303
    assert other.get(reverse("account")).status_code == 302
    assert client.get(reverse("account")).status_code == 200
