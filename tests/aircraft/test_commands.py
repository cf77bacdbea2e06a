"""What the console prints and does."""

import io

import pytest
from django.core.management import CommandError, call_command
from django.urls import reverse

from buildlog.aircraft.models import User
from buildlog.ledger import verify
from tests import make

pytestmark = pytest.mark.django_db


def printed(*words: str) -> str:
    out = io.StringIO()
    call_command(*words, stdout=out)
    return out.getvalue()


def test_rights_prints_each_role_and_each_page():
    lines = printed("rights").splitlines()
    assert "| act | builder | helper | assist | inspector | viewer | link |" in lines
    assert "| inspect |  |  |  | yes |  |  |" in lines
    assert "| people | /a/<uuid:aircraft_id>/people/ | builder |  |  |" in lines
    assert "| sign-in | /sign-in | public | public |  |" in lines
    assert not any("no rule" in line or "NO NAME" in line for line in lines)


def test_let_in_prints_a_password_that_works_and_takes_the_second_step_away(client):
    user = make.user(sign_in="ada")
    User.objects.filter(id=user.id).update(totp_secret="JBSWY3DPEHPK3PXPJBSWY3DPEHPK3PXP")
    password = printed("let_in", "Ada").splitlines()[-1]
    assert client.post(reverse("sign-in"), {"sign_in": "ada", "password": password}).status_code == 303
    assert verify.check()[1] == []


def test_let_in_knows_nobody_of_that_name():
    with pytest.raises(CommandError, match="Nobody signs in as"):
        call_command("let_in", "nobody")
