"""Parts: where they came from, and where they sit from when until when."""

import datetime as dt

import pytest
from django.urls import reverse

from buildlog.errors import Refused
from buildlog.ledger import verify
from buildlog.parts import actions
from buildlog.parts.models import Installation, Part
from tests import make
from tests.makers.parts import batch, part

pytestmark = pytest.mark.django_db
DAY = dt.date(2026, 5, 9)


@pytest.fixture
def aircraft():
    return make.aircraft()


def install(aircraft, row, **more):
    said = {"position": "carburettor", "installed_on": DAY} | more
    return actions.install_part(aircraft=aircraft, by=make.builder_of(aircraft), part=row, **said)


def test_a_part_that_goes_in_closes_the_history_of_the_one_that_comes_out(aircraft):
    first, second = part(aircraft=aircraft), part(aircraft=aircraft)
    install(aircraft, first, installed_on=DAY - dt.timedelta(days=30))
    with pytest.raises(Refused, match="Say why it comes out"):
        install(aircraft, second)
    install(aircraft, second, removal_reason="float needle leaks")
    old = Installation.objects.get(part=first)
    assert (old.removed_on, old.removal_reason) == (DAY, "float needle leaks")
    assert list(Installation.objects.in_place().values_list("part__id", flat=True)) == [second.id]
    assert verify.check()[1] == []


def test_a_rejected_part_cannot_be_installed_and_an_installed_one_not_rejected(aircraft):
    bad, good = part(aircraft=aircraft, inspection="rejected"), part(aircraft=aircraft)
    with pytest.raises(Refused, match="A rejected part cannot be installed"):
        install(aircraft, bad)
    install(aircraft, good)
    with pytest.raises(Refused, match="Take it out"):
        actions.change_part(aircraft=aircraft, by=make.builder_of(aircraft), part=good, inspection="rejected")


def test_a_part_sits_in_one_place_and_not_in_the_future(aircraft):
    row = part(aircraft=aircraft)
    with pytest.raises(Refused, match="day to come"):
        install(aircraft, row, installed_on=dt.date(2126, 1, 1))
    install(aircraft, row)
    with pytest.raises(Refused, match="installed as carburettor"):
        install(aircraft, row, position="fuel-pump")


def test_a_part_is_entered_from_the_page_once_however_often_it_is_sent(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    lot = batch(aircraft=aircraft)
    post = {"client_id": make.client_id(), "number": "12-04", "name": "Rib", "origin": "made-here"}
    post |= {"inspection": "accepted", "batches": [str(lot.id)]}
    for _ in range(2):
        assert client.post(reverse("part-add", args=[aircraft.id]), post).status_code == 303
    row = Part.objects.get()
    assert [link.batch for link in row.batch_links.all()] == [lot]
    assert b"Rib" in client.get(reverse("batch-page", args=[aircraft.id, lot.id])).content
    edit = client.post(reverse("part-edit", args=[aircraft.id, row.id]), post | {"inspection": "rejected"})
    assert edit.status_code == 303 and Part.objects.get().inspection == "rejected"


def test_installing_from_the_page_asks_for_the_position_in_words(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    row = part(aircraft=aircraft)
    url = reverse("part-install", args=[aircraft.id, row.id])
    answer = client.post(url, {"place": "own", "installed_on": "2026-05-09"})
    assert answer.status_code == 422 and b"Name the position" in answer.content
    assert (
        client.post(url, {"place": "own", "own_words": "Tail light", "installed_on": "2026-05-09"}).status_code == 303
    )
    assert b"Tail light" in client.get(reverse("parts", args=[aircraft.id])).content


def test_a_form_of_another_aircraft_is_refused_in_a_sentence(aircraft, client):
    sent = make.client_id()
    post = {"client_id": sent, "number": "1", "name": "Rib", "origin": "made-here", "inspection": "accepted"}
    batch_post = {"client_id": make.client_id(), "code": "B", "material": "Spruce"}
    other = make.aircraft()
    for row, wanted in ((other, 303), (aircraft, 422)):
        client.force_login(make.builder_of(row))
        assert client.post(reverse("part-add", args=[row.id]), post).status_code == wanted
        answer = client.post(reverse("batch-add", args=[row.id]), batch_post)
        assert answer.status_code == wanted
    assert b"This form was used before" in answer.content


def test_a_helper_looks_but_does_not_enter_parts(aircraft, client):
    helper = make.user()
    make.member(aircraft=aircraft, user=helper, role="helper")
    client.force_login(helper)
    assert client.get(reverse("parts", args=[aircraft.id])).status_code == 200
    assert client.post(reverse("part-add", args=[aircraft.id]), {}).status_code == 403


def test_an_expired_batch_says_so(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    batch(aircraft=aircraft, expires_on=dt.date(2020, 1, 1))
    assert b"Expired" in client.get(reverse("batches", args=[aircraft.id])).content


@pytest.mark.parametrize("rows", [10, 200])
def test_the_list_asks_a_fixed_number_of_questions(aircraft, client, django_assert_max_num_queries, rows):
    for _ in range(rows):
        part(aircraft=aircraft)
    client.force_login(make.builder_of(aircraft))
    with django_assert_max_num_queries(6):
        client.get(reverse("parts", args=[aircraft.id]))
