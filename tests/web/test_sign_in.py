"""Signing in: waits that grow and never lock, codes that work once, and a form that outlives its sign-in."""

import datetime as dt
import re
import time

import pyotp
import pytest
from django.test import Client
from django.urls import reverse
from django.utils import timezone

from buildlog.aircraft import actions
from buildlog.aircraft.actions.tries import LONGEST, wait_after
from buildlog.aircraft.models import FailedSignIn, Section, User
from buildlog.errors import Refused
from buildlog.web import kept
from buildlog.web.signed_in_since import LONGEST as LONGEST_SIGN_IN
from tests import make

pytestmark = pytest.mark.django_db
WRONG = "a wrong pass phrase"


def sign_in(client: Client, user: User, password: str = make.PASSWORD, **more: str):
    typed = {"sign_in": user.sign_in, "password": password} | more
    return client.post(reverse("sign-in"), typed)


def with_second_step(user: User) -> str:
    secret = pyotp.random_base32(32)
    User.objects.filter(id=user.id).update(totp_secret=secret)
    return secret


def test_right_password_leads_to_the_aircraft(client):
    aircraft = make.aircraft()
    answer = sign_in(client, make.builder_of(aircraft))
    assert (answer.status_code, answer["Location"]) == (303, reverse("aircraft-list"))


def test_sign_in_makes_no_difference_of_capitals(client):
    user = make.user(sign_in="ada.berg")
    answer = client.post(reverse("sign-in"), {"sign_in": " Ada.Berg ", "password": make.PASSWORD})
    assert answer.status_code == 303
    assert client.session["_auth_user_id"] == str(user.pk)


def test_wrong_password_and_unknown_person_read_the_same(client):
    user = make.user()
    known = sign_in(client, user, WRONG)
    unknown = client.post(reverse("sign-in"), {"sign_in": "nobody", "password": WRONG})
    assert known.status_code == unknown.status_code == 422
    assert "do not belong together" in known.content.decode()
    assert "do not belong together" in unknown.content.decode()
    assert WRONG not in known.content.decode()


def test_waits_grow_to_fifteen_minutes_and_no_further():
    waits = [wait_after(failures, 4) for failures in range(40)]
    assert waits[:6] == [0, 0, 0, 0, 2, 4]
    assert max(waits) == LONGEST == 900
    assert waits == sorted(waits)


def test_after_wrong_tries_even_the_right_password_waits_but_only_that_long(client):
    user = make.user()
    for hours in range(8, -1, -1):
        actions.begin_try(account=user.sign_in, network="127.0.0.1", at=timezone.now() - dt.timedelta(hours=hours))
    answer = sign_in(client, user)
    assert answer.status_code == 422
    assert "Nothing is locked: try again in" in answer.content.decode()
    FailedSignIn.objects.filter(at__gt=timezone.now() - dt.timedelta(minutes=1)).update(
        at=timezone.now() - dt.timedelta(seconds=LONGEST + 1)
    )
    assert sign_in(client, user).status_code == 303


def test_waits_are_of_one_account_from_one_network(client):
    user, other = make.user(), make.user()
    for _ in range(5):
        sign_in(client, user, WRONG)
    assert "Too many wrong tries" in sign_in(client, user).content.decode()
    assert sign_in(Client(REMOTE_ADDR="10.0.0.9"), user).status_code == 303
    assert sign_in(client, other).status_code == 303


def test_many_accounts_tried_from_one_network_slow_the_network():
    for count in range(20):
        actions.begin_try(account=f"guess{count}", network="10.0.0.1")
    with pytest.raises(Refused, match="Too many wrong tries"):
        actions.begin_try(account="another", network="10.0.0.1")
    actions.begin_try(account="another", network="10.0.0.2")


def test_right_password_forgets_the_wrong_ones(client):
    user = make.user()
    for _ in range(3):
        sign_in(client, user, WRONG)
    sign_in(client, user)
    assert FailedSignIn.objects.count() == 3  # those of the network alone
    for _ in range(3):
        assert "do not belong together" in sign_in(Client(), user, WRONG).content.decode()


def test_wrong_tries_are_kept_a_day():
    old = timezone.now() - dt.timedelta(hours=25)
    FailedSignIn.objects.create(key="x", at=old)
    actions.begin_try(account="somebody", network="10.0.0.3")
    assert not FailedSignIn.objects.filter(key="x").exists()


def test_second_step_is_asked_for_and_a_code_works_once(client):
    user = make.user()
    secret = with_second_step(user)
    first = sign_in(client, user, next="/account")
    assert "second step" in first.content.decode()
    assert "_auth_user_id" not in client.session
    code = pyotp.TOTP(secret).now()
    answer = client.post(reverse("sign-in-code"), {"one_time_code": code, "next": "/account"})
    assert (answer.status_code, answer["Location"]) == (303, "/account")
    again = Client()
    sign_in(again, user)
    used = again.post(reverse("sign-in-code"), {"one_time_code": code})
    assert used.status_code == 422
    assert "_auth_user_id" not in again.session


def test_an_older_code_does_not_work_after_a_newer_one():
    user = make.user()
    secret = with_second_step(user)
    user.refresh_from_db()
    now = time.time()
    assert actions.spend_code(user=user, code=pyotp.TOTP(secret).at(int(now)), now=now)
    assert not actions.spend_code(user=user, code=pyotp.TOTP(secret).at(int(now) - 30), now=now)
    assert actions.spend_code(user=user, code=pyotp.TOTP(secret).at(int(now) + 30), now=now + 30)


def test_code_without_the_password_before_it_is_sent_back(client):
    with_second_step(make.user())
    assert client.post(reverse("sign-in-code"), {"one_time_code": "123456"})["Location"] == reverse("sign-in")


@pytest.mark.parametrize("wanted", ["https://example.org/", "//example.org/x", "/\\example.org", "javascript:alert(1)"])
def test_another_site_as_next_is_refused(client, wanted):
    assert sign_in(client, make.user(), next=wanted)["Location"] == reverse("aircraft-list")


def test_a_page_asked_for_comes_after_signing_in(client):
    aircraft = make.aircraft()
    wanted = reverse("sections", args=[aircraft.id]) + "?a=1"
    asked = client.get(wanted)
    assert asked.status_code == 302
    page = client.get(asked["Location"])
    assert f'name="next" value="{wanted}"' in page.content.decode()
    assert sign_in(client, make.builder_of(aircraft), next=wanted)["Location"] == wanted


def hidden(answer, name: str) -> str:
    return re.search(rf'name="{name}" value="([^"]*)"', answer.content.decode())[1]


def test_a_form_sent_signed_out_is_kept_and_saved_after_signing_in(client):
    aircraft = make.aircraft()
    url, sent = reverse("sections", args=[aircraft.id]), make.client_id()
    typed = {"number": "40", "title": "Engine <conversion>", "parent": "", "client_id": sent, "password": "hunter two"}
    refused = client.post(url, typed)
    assert refused.status_code == 401
    assert "You are signed out, so this was not saved yet." in refused.content.decode()
    assert Section.objects.count() == 0
    page = sign_in(client, make.builder_of(aircraft), kept=hidden(refused, "kept"))
    words = page.content.decode()
    assert page.status_code == 200
    assert f'action="{url}"' in words
    assert "Engine &lt;conversion&gt;" in words
    assert "hunter two" not in words
    assert 'name="password"' not in words
    fields = dict(re.findall(r'type="hidden" name="([^"]*)" value="([^"]*)"', words))
    saved = client.post(url, fields | {"title": "Engine conversion"})
    assert saved.status_code == 303
    assert [str(row.id) for row in Section.objects.all()] == [sent]


def test_kept_fields_pass_the_second_step_too(client):
    aircraft = make.aircraft()
    builder = make.builder_of(aircraft)
    secret = with_second_step(builder)
    refused = client.post(reverse("zones", args=[aircraft.id]), {"code": "LW-1", "title": "Root bay"})
    step = sign_in(client, builder, kept=hidden(refused, "kept"))
    typed = {"one_time_code": pyotp.TOTP(secret).now(), "kept": hidden(step, "kept")}
    words = client.post(reverse("sign-in-code"), typed).content.decode()
    assert 'name="code" value="LW-1"' in words
    assert "Go on and save" in words


def test_kept_fields_of_another_hand_are_not_shown(client):
    answer = sign_in(client, make.user(), kept="eyJ1cmwiOiJodHRwczovL2V4YW1wbGUub3JnIn0:forged")
    assert answer.status_code == 303


def test_no_secret_field_is_ever_kept(rf):
    request = rf.post("/x", dict.fromkeys(kept.SECRET_FIELDS, "secret") | {"note": "rib 5"})
    assert kept.kept_fields(request) == [("note", "rib 5")]


def test_old_page_gets_its_words_back_and_saves_nothing():
    aircraft = make.aircraft()
    client = Client(enforce_csrf_checks=True, headers={"origin": "http://testserver"})
    client.force_login(make.builder_of(aircraft))
    url = reverse("zones", args=[aircraft.id])
    answer = client.post(url, {"code": "LW-1", "title": "Root bay", "password": "hunter two"})
    words = answer.content.decode()
    assert answer.status_code == 403
    assert 'name="title" value="Root bay"' in words
    assert "hunter two" not in words
    assert aircraft.zones.count() == 0


def test_form_of_another_site_is_not_given_back():
    aircraft = make.aircraft()
    client = Client(enforce_csrf_checks=True, headers={"origin": "https://example.org"})
    client.force_login(make.builder_of(aircraft))
    answer = client.post(reverse("zones", args=[aircraft.id]), {"code": "LW-1", "title": "Planted"})
    assert answer.status_code == 403
    assert "Planted" not in answer.content.decode()


def test_sign_in_ends_after_ninety_days_and_moves_on_once_a_day(client):
    sign_in(client, make.user(), keep_signed_in="on")
    session = client.session
    session["seen_at"] = int(time.time()) - 90_000
    session.save()
    assert client.get(reverse("account")).status_code == 200
    assert time.time() - client.session["seen_at"] < 60
    session = client.session
    session["signed_in_at"] = int(time.time()) - LONGEST_SIGN_IN
    session.save()
    assert client.get(reverse("account")).status_code == 302


def test_device_not_kept_forgets_with_the_browser(client):
    assert sign_in(client, make.user()).cookies["session"]["max-age"] == ""
    kept_one = sign_in(Client(), make.user(), keep_signed_in="on").cookies["session"]
    assert kept_one["max-age"] == 14 * 24 * 3600


def test_sign_out_is_a_button_and_ends_it(client):
    client.force_login(make.user())
    assert client.get(reverse("sign-out")).status_code == 405
    assert client.post(reverse("sign-out")).status_code == 302
    assert client.get(reverse("account")).status_code == 302


def test_sign_in_of_an_empty_site_leads_to_the_first_run(client):
    assert client.get(reverse("sign-in"))["Location"] == reverse("first-run")


def test_nul_in_a_field_is_a_sentence(client):
    make.user()
    answer = client.post(reverse("sign-in"), {"sign_in": "a\x00b", "password": "x\x00y"})
    assert answer.status_code == 422


def test_part_of_a_page_sends_the_whole_page_to_the_sign_in(client):
    aircraft = make.aircraft()
    page = reverse("zones", args=[aircraft.id])
    asked = {"HX-Request": "true", "HX-Current-URL": f"http://testserver{page}?a=1"}
    answer = client.get(reverse("sections", args=[aircraft.id]), headers=asked)
    assert answer.status_code == 401
    assert answer["HX-Redirect"] == f"{reverse('sign-in')}?next={page.replace('/', '%2F')}%3Fa%3D1"
    sent = client.post(page, {"code": "LW-1", "title": "Root bay"}, headers=asked)
    assert (sent.status_code, sent["HX-Retarget"]) == (401, "body")
    assert "You are signed out" in sent.content.decode()
