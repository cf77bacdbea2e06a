"""The history of one record, and of the aircraft."""

import datetime as dt

import pytest
from django.test import Client
from django.urls import reverse

from buildlog.aircraft.roles import CHAPTERS
from buildlog.find.trails import PER_PAGE, recent, trail
from buildlog.ledger import actions as ledger
from buildlog.ledger.models import Event, EventBody
from buildlog.ledger.queries import head
from buildlog.parts.actions import change_part, install_part
from tests import make
from tests.makers.aircraft import review_link
from tests.makers.parts import part
from tests.makers.shop import entry, task

pytestmark = pytest.mark.django_db


@pytest.fixture
def aircraft():
    return make.aircraft(builder=make.user(name="Ada Berg"))


def test_a_trail_tells_who_changed_what_from_what(aircraft):
    row = part(aircraft=aircraft, supplier="")
    change_part(aircraft=aircraft, by=make.builder_of(aircraft), part=row, supplier="Kraus")
    told = trail(aircraft, row.id)
    assert told.model == "Part"
    last, first = told.steps
    assert [(one.column, one.before, one.after) for one in last.changes] == [("Supplier", "empty", "Kraus")]
    assert last.actor == "Ada Berg" and last.text.startswith("changed part")
    assert first.is_first and ("Name", "Carburettor") in [(one.column, one.after) for one in first.changes]
    assert (last.seq, last.hash) == (head(aircraft).seq, head(aircraft).hash)


def test_an_event_about_another_record_that_changed_this_one_belongs_to_its_trail(aircraft):
    first, second = part(aircraft=aircraft), part(aircraft=aircraft)
    day, by = dt.date(2026, 5, 9), make.builder_of(aircraft)
    place = install_part(aircraft=aircraft, by=by, part=first, position="carburettor", installed_on=day)
    install_part(
        aircraft=aircraft, by=by, part=second, position="carburettor", installed_on=day, removal_reason="leaks"
    )
    changed = {one.column: one.after for one in trail(aircraft, place.id).steps[0].changes}
    assert changed["Removal reason"] == "leaks"


def test_a_record_that_only_names_another_is_not_in_its_trail(aircraft):
    work = task(aircraft=aircraft)
    entry(aircraft=aircraft, task=work)
    assert len(trail(aircraft, work.id).steps) == 1


def test_an_erased_event_says_that_it_was_erased(aircraft):
    row = part(aircraft=aircraft)
    event = Event.objects.get(subject=row.id)
    said = {"text": "erased what an event said", "rows": [], "facts": {}}
    by = make.builder_of(aircraft).id
    ledger._append(chain=aircraft.id, kind="body.erase", body=said, subject=None, actor=by, ref_seq=event.seq)
    EventBody.objects.filter(event=event).delete()
    assert "erased" in trail(aircraft, row.id).steps[0].text


def test_what_opens_a_link_is_not_shown(aircraft, client):
    offer = review_link(aircraft=aircraft)
    client.force_login(make.builder_of(aircraft))
    page = client.get(reverse("trail", args=[aircraft.id, offer.row.id])).content.decode()
    assert offer.row.token_sha256 not in page and "kept, and not shown" in page


def test_the_trail_of_another_aircraft_or_of_nothing_is_not_found(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    theirs = part(aircraft=make.aircraft())
    assert client.get(reverse("trail", args=[aircraft.id, theirs.id])).status_code == 404
    assert client.get(reverse("trail", args=[aircraft.id, make.client_id()])).status_code == 404


def test_recent_changes_are_paged_and_none_is_missing(aircraft):
    for number in range(PER_PAGE):
        part(aircraft=aircraft, name=f"Part {number}")
    seen, before = [], None
    while True:
        lines, before = recent(aircraft, before=before)
        seen += [line.seq for line in lines]
        if before is None:
            break
    assert seen == list(range(head(aircraft).seq, -1, -1))


@pytest.mark.parametrize("page", ["recent-changes", "trail"])
def test_the_number_of_queries_does_not_grow_with_the_rows(aircraft, client, page, django_assert_max_num_queries):
    client.force_login(make.builder_of(aircraft))
    row = part(aircraft=aircraft)
    url = reverse(page, args=[aircraft.id] + ([row.id] if page == "trail" else []))
    counts = []
    for more in (10, 190):
        for number in range(more):
            change_part(aircraft=aircraft, by=make.builder_of(aircraft), part=row, supplier=f"{more} {number}")
        with django_assert_max_num_queries(12) as asked:
            assert client.get(url).status_code == 200
        counts.append(len(asked))
    assert counts[0] == counts[1]


def test_recent_changes_show_the_head_and_survive_strange_numbers(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    url = reverse("recent-changes", args=[aircraft.id])
    assert head(aircraft).anchor in client.get(url).content.decode()
    for before in ("0", "-4", "nonsense", "9" * 40, "½"):
        assert client.get(url, {"before": before}).status_code == 200


@pytest.mark.parametrize("page", ["find", "recent-changes", "trail", "aircraft-page"])
def test_members_read_it_a_reviewer_by_link_and_strangers_do_not(aircraft, page):
    row = part(aircraft=aircraft)
    url = reverse(page, args=[aircraft.id] + ([row.id] if page == "trail" else []))
    viewer, stranger, reviewer = Client(), Client(), Client()
    person = make.user()
    make.member(aircraft=aircraft, user=person, role="viewer")
    viewer.force_login(person)
    stranger.force_login(make.builder_of(make.aircraft()))
    reviewer.post(reverse("review-enter"), {"token": review_link(aircraft=aircraft, chapters=tuple(CHAPTERS)).secret})
    assert [one.get(url).status_code for one in (viewer, stranger, reviewer)] == [200, 404, 403]
