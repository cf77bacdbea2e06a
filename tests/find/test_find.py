"""Looking through one aircraft."""

import datetime as dt

import pytest
from django.urls import reverse

from buildlog.find.asking import read
from buildlog.find.queries import FEW, find
from buildlog.shop.draft import Process
from tests import make
from tests.makers.aircraft import zone
from tests.makers.calcs import snapshot
from tests.makers.files import document, photo
from tests.makers.find import deviation, squawk
from tests.makers.parts import batch, part
from tests.makers.shop import entry, task

pytestmark = pytest.mark.django_db


@pytest.fixture
def aircraft():
    return make.aircraft()


def found(aircraft, typed):
    """Return the titles found, by kind."""
    return {
        one.key: ["".join(bit.text for bit in hit.title) for hit in one.hits] for one in find(aircraft, read(typed))
    }


def test_every_kind_of_record_is_found_by_a_word_it_says(aircraft):
    work = task(aircraft=aircraft, title="Zebra task", number="9.1")
    entry(aircraft=aircraft, task=None, note="zebra entry")
    photo(aircraft=aircraft, caption="Zebra photo")
    part(aircraft=aircraft, name="Zebra part")
    batch(aircraft=aircraft, material="Zebra batch")
    document(aircraft=aircraft, title="Zebra document")
    snapshot(aircraft=aircraft, label="zebra run")
    squawk(aircraft=aircraft, title="Zebra squawk")
    deviation(aircraft=aircraft, title="Zebra deviation")
    everything = found(aircraft, "ZEBRA")
    kinds = {"entries", "tasks", "photos", "parts", "batches", "documents", "calculations", "squawks", "deviations"}
    assert set(everything) == kinds
    assert everything["tasks"] == [str(work)]
    assert found(aircraft, "zebra photo").keys() == {"photos"}


def test_every_word_has_to_fit(aircraft):
    entry(aircraft=aircraft, note="Glued rib 5")
    entry(aircraft=aircraft, note="Glued rib 6", minutes=5)
    assert len(found(aircraft, "glued rib")["entries"]) == 2
    assert len(found(aircraft, "glued 6")["entries"]) == 1
    assert found(aircraft, "glued spar") == {}


def test_letters_outside_ascii_are_found_in_any_case(aircraft):
    part(aircraft=aircraft, name="Ölpumpe")
    assert found(aircraft, "ölpumpe").keys() == {"parts"}


def test_a_percent_sign_is_a_letter_and_no_wildcard(aircraft):
    entry(aircraft=aircraft, note="Mixed at 48 parts")
    assert found(aircraft, "4%s") == {} and found(aircraft, "4_ parts") == {}


def test_a_batch_leads_to_its_entries_photos_parts_and_tasks(aircraft):
    glue, work = batch(aircraft=aircraft, code="AD-3"), task(aircraft=aircraft)
    picture = photo(aircraft=aircraft)
    entry(aircraft=aircraft, task=work, photos=[picture], processes=[Process("adhesive", {}, glue)])
    part(aircraft=aircraft, batches=[glue])
    entry(aircraft=aircraft, note="Another day", minutes=3)
    everything = found(aircraft, "batch:ad-3")
    assert {key: len(rows) for key, rows in everything.items()} == {
        "entries": 1,
        "tasks": 1,
        "photos": 1,
        "parts": 1,
        "batches": 1,
    }


def test_a_zone_and_a_sheet_lead_to_what_was_done_there(aircraft):
    bay = zone(aircraft=aircraft, code="LW-1")
    work = task(aircraft=aircraft, zone=bay, plan_sheet="22")
    entry(aircraft=aircraft, task=work, photos=[photo(aircraft=aircraft)])
    task(aircraft=aircraft, title="Elsewhere", plan_sheet="7")
    assert found(aircraft, "zone:LW-1").keys() == {"entries", "tasks", "photos"}
    assert found(aircraft, "sheet:22 zone:lw-1").keys() == {"entries", "tasks", "photos"}
    assert found(aircraft, "sheet:7").keys() == {"tasks"}


def test_dates_bound_what_is_found(aircraft):
    for day in (3, 14):
        entry(aircraft=aircraft, worked_on=dt.date(2026, 3, day), minutes=day)
    assert len(found(aircraft, "2026-03")["entries"]) == 2
    assert len(found(aircraft, "14 Mar 2026")["entries"]) == 1
    assert len(found(aircraft, "before:2026-03-14")["entries"]) == 1
    assert found(aircraft, "before:2026-03") == {}


def test_a_row_that_fits_in_several_ways_stands_once(aircraft):
    picture = photo(aircraft=aircraft, caption="Rib")
    for minutes in (1, 2):
        entry(aircraft=aircraft, note="Rib", minutes=minutes, photos=[picture])
    assert len(found(aircraft, "rib")["photos"]) == 1


def test_another_aircraft_is_never_looked_through(aircraft):
    part(aircraft=make.aircraft(), name="Zebra part")
    assert found(aircraft, "zebra") == {}


def test_checks_are_found_by_their_title(aircraft):
    assert found(aircraft, "carburettor heat")["checks"]


def test_the_page_asks_the_same_number_of_queries_for_10_and_200_rows(
    aircraft, client, django_assert_max_num_queries, django_assert_num_queries
):
    client.force_login(make.builder_of(aircraft))
    url = reverse("find", args=[aircraft.id]) + "?q=rib"
    counts = []
    for more in (10, 190):
        for number in range(more):
            entry(aircraft=aircraft, note=f"rib {number}", minutes=5)
            part(aircraft=aircraft, name=f"Rib {number}")
        with django_assert_max_num_queries(25) as asked:
            page = client.get(url)
        counts.append(len(asked))
        assert page.content.decode().count('class="tap"') < 60
    assert counts[0] == counts[1]
    assert b"More entries" in page.content
    assert client.get(url + "&kind=entries").content.decode().count("rib</mark>") > FEW


def test_the_empty_page_offers_what_this_aircraft_has(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    batch(aircraft=aircraft, code="EP 22")
    page = client.get(reverse("find", args=[aircraft.id])).content.decode()
    assert "?q=batch%3A%22EP%2022%22" in page and "What can be asked" in page


@pytest.mark.parametrize(
    "typed", ["%00", "before:x", "batch:", '"', "%F0%9F%94%A7" * 90, "a&kind=nonsense", "(%5B*+%3F"]
)
def test_strange_questions_get_a_page(aircraft, client, typed):
    client.force_login(make.builder_of(aircraft))
    assert client.get(reverse("find", args=[aircraft.id]) + "?q=" + typed).status_code == 200


def test_nothing_found_says_so_and_what_was_asked_is_escaped(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    page = client.get(reverse("find", args=[aircraft.id]), {"q": "<b>unlikely"}).content.decode()
    assert "Nothing on this aircraft fits" in page and "&lt;b&gt;unlikely" in page and "<b>unlikely" not in page
