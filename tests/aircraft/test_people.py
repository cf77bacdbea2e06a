"""Members, invitations and reviewers' links: given with fresh proof, taken up once, ended without a trace lost."""

import datetime as dt

import pyotp
import pytest
from django.test import Client
from django.urls import reverse
from django.utils import timezone

from buildlog.aircraft import actions
from buildlog.aircraft.models import FailedSignIn, Invitation, Member, ReviewLink, User
from buildlog.aircraft.proof import fresh_proof
from buildlog.aircraft.queries import review_membership
from buildlog.errors import Refused
from buildlog.ledger import verify
from buildlog.ledger.models import Event
from tests import make
from tests.makers.aircraft import invitation, review_link

pytestmark = pytest.mark.django_db
PROOF = {"password": make.PASSWORD}


@pytest.fixture
def aircraft():
    return make.aircraft()


@pytest.fixture
def builder(client, aircraft) -> User:
    person = make.builder_of(aircraft)
    client.force_login(person)
    return person


def kinds(aircraft) -> list[str]:
    return list(Event.objects.filter(chain=aircraft.id).order_by("seq").values_list("kind", flat=True))


def test_inviting_asks_for_the_password_and_keeps_the_typed_name(client, aircraft, builder):
    url = reverse("invitation-add", args=[aircraft.id])
    typed = {"name": "Nils Dahl", "role": "helper", "client_id": make.client_id()}
    for wrong in ({}, {"password": "not this one"}):
        answer = client.post(url, typed | wrong)
        assert answer.status_code == 422
        assert 'value="Nils Dahl"' in answer.content.decode()
        assert "not this one" not in answer.content.decode()
    assert Invitation.objects.count() == 0
    assert FailedSignIn.objects.count() == 2  # the wrong password, once for account and once for network


def test_code_is_shown_once_and_kept_as_digest(client, aircraft, builder):
    url = reverse("invitation-add", args=[aircraft.id])
    typed = {"name": "Nils Dahl", "role": "helper", "client_id": make.client_id()} | PROOF
    first = client.post(url, typed)
    row = Invitation.objects.get()
    assert first.status_code == 201
    code = first.context["offer"].secret
    assert code in first.content.decode()
    assert f"/join#{code}" in first.content.decode()
    assert code.replace("-", "") not in str(row.__dict__)
    again = client.post(url, typed)
    assert again.context["offer"].secret == ""
    assert Invitation.objects.count() == 1
    assert code not in client.get(reverse("people", args=[aircraft.id])).content.decode()


def test_invitation_is_taken_once_by_a_newcomer(client, aircraft):
    code = invitation(aircraft=aircraft).secret
    typed = {
        "invitation_code": code.lower(),
        "name": "Nils Dahl",
        "sign_in": "nils",
        "password": "cedar and linen rope",
    }
    answer = client.post(reverse("invitation-take"), typed)
    assert answer.status_code == 303
    member = Member.objects.get(user__sign_in="nils")
    assert (member.aircraft, member.role, member.user.name) == (aircraft, "helper", "Nils Dahl")
    assert client.get(reverse("conversion", args=[aircraft.id])).status_code == 200
    second = Client().post(reverse("invitation-take"), typed | {"sign_in": "other"})
    assert second.status_code == 422
    assert "was used" in second.content.decode()
    assert not User.objects.filter(sign_in="other").exists()
    assert kinds(aircraft)[-1] == "member.joined"


def test_invitation_is_taken_by_somebody_with_an_account(client, aircraft):
    person = make.user(name="Ida Lund")
    client.force_login(person)
    code = invitation(aircraft=aircraft, role="inspector").secret
    typed = {"invitation_code": code, "authority": "The authority", "number": "I-77"}
    assert client.post(reverse("invitation-take"), typed).status_code == 303
    member = Member.objects.get(user=person)
    assert (member.role, member.authority, member.number) == ("inspector", "The authority", "I-77")


@pytest.mark.parametrize("how", ["expired", "revoked"])
def test_invitation_that_ended_is_not_taken(client, aircraft, how):
    person = make.user()
    client.force_login(person)
    long_ago = timezone.now() - dt.timedelta(days=15)
    offer = invitation(aircraft=aircraft, at=long_ago if how == "expired" else None)
    if how == "revoked":
        by = make.builder_of(aircraft)
        actions.revoke_invitation(aircraft=aircraft, by=by, invitation=offer.row, proof="password")
    answer = client.post(reverse("invitation-take"), {"invitation_code": offer.secret})
    assert answer.status_code == 422
    assert not Member.objects.filter(user=person).exists()


def test_weak_password_costs_neither_the_code_nor_a_wait(client, aircraft):
    code = invitation(aircraft=aircraft).secret
    typed = {"invitation_code": code, "name": "Nils Dahl", "sign_in": "nils"}
    for password in ("short", "password1234", "Nils Dahl nils"):
        answer = client.post(reverse("invitation-take"), typed | {"password": password})
        assert answer.status_code == 422
        assert 'class="error"' in answer.content.decode()
        assert User.objects.filter(sign_in="nils").count() == 0
    assert FailedSignIn.objects.count() == 0
    assert client.post(reverse("invitation-take"), typed | {"password": "cedar and linen rope"}).status_code == 303


def test_guessing_codes_is_slowed(client):
    make.user()
    for _ in range(4):
        client.post(
            reverse("invitation-take"), {"invitation_code": "0000", "name": "A", "sign_in": "a", "password": "b"}
        )
    last = {"invitation_code": "0000", "name": "A", "sign_in": "a", "password": "b"}
    assert "Too many wrong tries" in client.post(reverse("invitation-take"), last).content.decode()


def test_change_of_role_ends_one_membership_and_begins_another(client, aircraft, builder):
    member = make.member(aircraft=aircraft, user=make.user(name="Nils Dahl"), role="helper")
    typed = {"role": "inspector", "authority": "The authority", "number": "7"} | PROOF
    assert client.post(reverse("member-edit", args=[aircraft.id, member.id]), typed).status_code == 303
    rows = aircraft.members.filter(user=member.user).order_by("id").values_list("role", "ended_on")
    assert list(rows) == [("helper", timezone.localdate()), ("inspector", None)]
    assert verify.check()[1] == []


def test_ended_member_sees_nothing_and_what_was_done_stays(client, aircraft, builder):
    person = make.user(name="Nils Dahl")
    member = make.member(aircraft=aircraft, user=person)
    theirs = Client()
    theirs.force_login(person)
    assert theirs.get(reverse("sections", args=[aircraft.id])).status_code == 200
    assert client.post(reverse("member-end", args=[aircraft.id, member.id]), PROOF).status_code == 303
    assert theirs.get(reverse("sections", args=[aircraft.id])).status_code == 404
    assert Member.objects.filter(id=member.id).exists()
    assert "Nils Dahl, helper" in client.get(reverse("people", args=[aircraft.id])).content.decode()


def test_last_builder_stays(client, aircraft, builder):
    member = aircraft.members.get(user=builder)
    end = client.post(reverse("member-end", args=[aircraft.id, member.id]), PROOF)
    change = client.post(reverse("member-edit", args=[aircraft.id, member.id]), {"role": "viewer"} | PROOF)
    assert end.status_code == change.status_code == 422
    assert "keeps at least one builder" in end.content.decode()


@pytest.mark.parametrize("role", ["helper", "assist", "inspector", "viewer"])
def test_others_may_not_touch_rights(client, aircraft, role):
    person = make.user()
    member = make.member(aircraft=aircraft, user=person, role=role)
    client.force_login(person)
    answer = client.post(reverse("member-edit", args=[aircraft.id, member.id]), {"role": "builder"} | PROOF)
    assert answer.status_code == 403
    member.refresh_from_db()
    assert (member.role, member.ended_on) == (role, None)


def test_stranger_finds_no_people_page(client, aircraft):
    client.force_login(make.user())
    assert client.post(reverse("invitation-add", args=[aircraft.id]), PROOF).status_code == 404


def test_link_opens_its_chapters_and_no_other(client, aircraft):
    offer = review_link(aircraft=aircraft, chapters=("log",))
    answer = client.post(reverse("review-enter"), {"token": offer.secret})
    assert answer["Location"] == reverse("review", args=[aircraft.id])
    page = client.get(answer["Location"]).content.decode()
    assert "Log: tasks and entries" in page
    assert "Weight and balance" not in page
    assert client.get(reverse("conversion", args=[aircraft.id])).status_code == 404
    assert client.get(reverse("people", args=[aircraft.id])).status_code == 403
    assert kinds(aircraft)[-1] == "review-link.used"


def test_opening_a_link_changes_the_session_key(client, aircraft):
    client.get(reverse("review-enter"))
    session = client.session
    session["planted"] = True
    session.save()
    before = session.session_key
    client.post(reverse("review-enter"), {"token": review_link(aircraft=aircraft).secret})
    assert client.session.session_key != before


def test_whole_link_may_be_pasted_and_only_its_digest_is_kept(client, aircraft):
    offer = review_link(aircraft=aircraft)
    assert len(offer.secret) >= 43  # 256 bits in base 64
    assert offer.secret not in str(offer.row.__dict__)
    pasted = f"http://testserver/review#{offer.secret}"
    assert client.post(reverse("review-enter"), {"token": pasted}).status_code == 303


def test_link_ends_by_itself_and_by_hand_even_for_who_is_in(client, aircraft, builder):
    guest = Client()
    offer = review_link(aircraft=aircraft, days=2)
    guest.post(reverse("review-enter"), {"token": offer.secret})
    page = reverse("review", args=[aircraft.id])
    assert guest.get(page).status_code == 200
    url = reverse("review-link-revoke", args=[aircraft.id, offer.row.id])
    assert client.post(url, {"password": "wrong"}).status_code == 422
    assert guest.get(page).status_code == 200
    assert client.post(url, PROOF).status_code == 303
    assert guest.get(page).status_code == 404
    assert guest.post(reverse("review-enter"), {"token": offer.secret}).status_code == 422
    old = review_link(aircraft=aircraft, days=2, at=timezone.now() - dt.timedelta(days=2, seconds=1))
    assert Client().post(reverse("review-enter"), {"token": old.secret}).status_code == 422
    assert review_membership(str(old.row.id), aircraft.id, "") is None


@pytest.mark.parametrize(("days", "chapters"), [("61", ["log"]), ("0", ["log"]), ("x", ["log"]), ("14", [])])
def test_link_of_wrong_shape_is_refused_at_the_field(client, aircraft, builder, days, chapters):
    typed = {"name": "Reviewer Moll", "days": days, "chapters": chapters, "client_id": make.client_id()} | PROOF
    answer = client.post(reverse("review-link-add", args=[aircraft.id]), typed)
    assert answer.status_code == 422
    assert 'value="Reviewer Moll"' in answer.content.decode()
    assert ReviewLink.objects.count() == 0


def test_proof_names_its_way_and_spends_the_code(aircraft):
    user = make.builder_of(aircraft)
    assert fresh_proof(user, make.PASSWORD, "", "10.0.0.1") == "password"
    user.totp_secret = pyotp.random_base32(32)
    user.save(update_fields=["totp_secret"])
    with pytest.raises(Refused) as missing:
        fresh_proof(user, make.PASSWORD, "", "10.0.0.1")
    assert missing.value.field == "one_time_code"
    code = pyotp.TOTP(user.totp_secret).now()
    assert fresh_proof(user, make.PASSWORD, code, "10.0.0.1") == "password and code"
    with pytest.raises(Refused):
        fresh_proof(user, make.PASSWORD, code, "10.0.0.1")


def test_wrong_proofs_are_slowed_like_sign_ins(aircraft):
    user = make.builder_of(aircraft)
    for _ in range(4):
        with pytest.raises(Refused, match="not your password"):
            fresh_proof(user, "wrong", "", "10.0.0.1")
    with pytest.raises(Refused, match="Too many wrong tries"):
        fresh_proof(user, make.PASSWORD, "", "10.0.0.1")


@pytest.mark.django_db(transaction=True)
def test_proof_inside_a_transaction_is_a_bug():
    from django.db import transaction

    user = make.user()
    with pytest.raises(RuntimeError), transaction.atomic():
        fresh_proof(user, make.PASSWORD, "", "10.0.0.1")


def test_people_page_asks_the_same_number_of_questions_for_ten_and_two_hundred(
    client, aircraft, builder, django_assert_num_queries
):
    def fill(count: int) -> None:
        for _ in range(count):
            make.member(aircraft=aircraft, user=make.user(), role="viewer")
            invitation(aircraft=aircraft)
            review_link(aircraft=aircraft)

    fill(10)
    url = reverse("people", args=[aircraft.id])
    for count in (0, 190):
        fill(count)
        with django_assert_num_queries(7):
            client.get(url)
