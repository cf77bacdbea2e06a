"""One aircraft at a glance."""

import datetime as dt

import pytest
from django.urls import reverse
from django.utils import timezone

from buildlog.desk.queries import WEEKS, hours, overview
from buildlog.shop.draft import Labour
from tests import make
from tests.makers.find import deviation, squawk
from tests.makers.parts import batch, part
from tests.makers.shop import entry, task

pytestmark = pytest.mark.django_db
DAY = dt.date(2026, 3, 18)


@pytest.fixture
def aircraft():
    return make.aircraft()


def open_things(aircraft):
    return {gap.what: gap.which for gap in overview(aircraft, DAY).open}


def test_what_is_open_is_named_with_its_cure(aircraft, client):
    part(aircraft=aircraft, name="Ölpumpe", number="OP-3", origin="unknown")
    batch(aircraft=aircraft, code="EP-1", material="Primer", expires_on=DAY - dt.timedelta(days=1))
    entry(aircraft=aircraft, closed=False, minutes=7)
    found = open_things(aircraft)
    assert found["Parts of unknown origin"] == ("OP-3 Ölpumpe",)
    assert found["Batches past their expiry"] == ("EP-1 Primer",)
    assert found["Drafts not on the record"] == ("2026-03-14 by Ada Berg",)
    assert "No weighing is on the record" in found
    client.force_login(make.builder_of(aircraft))
    page = client.get(reverse("aircraft-page", args=[aircraft.id])).content.decode()
    for cure in ("parts", "batches", "entries", "conversion"):
        assert f'<a class="tap" href="{reverse(cure, args=[aircraft.id])}"><span class="vh">' in page


def test_open_squawks_stand_in_the_order_of_what_they_stop(aircraft):
    squawk(aircraft=aircraft, number=1, title="Placard", due="later")
    squawk(aircraft=aircraft, number=2, title="Fuel line chafes", due="before-first-run")
    deviation(aircraft=aircraft)
    found = open_things(aircraft)
    assert found["Squawks that are open"] == ("2 Fuel line chafes, before first run", "1 Placard, later")
    assert found["Deviations without a decision"] == ("1 Rib 5 edge distance",)


def test_hours_count_only_what_is_on_the_record_by_week_and_person(aircraft):
    labour = [Labour("Ada Berg", "builder", 60), Labour("Jo Lind", "helper", 30)]
    entry(aircraft=aircraft, worked_on=dt.date(2026, 3, 16), labour=labour)
    entry(aircraft=aircraft, worked_on=dt.date(2026, 3, 15), labour=labour[:1])
    entry(aircraft=aircraft, worked_on=dt.date(2020, 1, 6), labour=labour[:1])
    entry(aircraft=aircraft, worked_on=DAY, labour=labour, closed=False)
    told = hours(aircraft, DAY)
    assert told.minutes == 210
    assert len(told.weeks) == WEEKS
    assert [(week.monday, week.minutes) for week in told.weeks[-2:]] == [
        (dt.date(2026, 3, 9), 60),
        (dt.date(2026, 3, 16), 90),
    ]
    assert told.lately == 37
    assert [(one.name, one.capacity, one.minutes) for one in told.people] == [
        ("Ada Berg", "Builder", 180),
        ("Jo Lind", "Helper, unpaid", 30),
    ]


def test_sections_show_a_shape_for_each_task_with_the_sentence_beside(aircraft, client):
    section = make.section(aircraft=aircraft, title="Left wing")
    work = task(aircraft=aircraft, section=section)
    task(aircraft=aircraft, section=section)
    entry(aircraft=aircraft, task=work, finishes_task=True)
    client.force_login(make.builder_of(aircraft))
    page = client.get(reverse("aircraft-page", args=[aircraft.id])).content.decode()
    assert "1 of 2 done" in page
    assert '<svg class="c-done"><use href="#done"/></svg><svg class="c-todo"><use href="#todo"/></svg></span>' in page


def test_an_empty_aircraft_says_where_to_begin(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    page = client.get(reverse("aircraft-page", args=[aircraft.id])).content.decode()
    assert "Add sections" in page and "Log work" in page and "Not weighed yet" in page and "<title>Bars" not in page


def test_the_number_of_queries_does_not_grow_with_the_rows(aircraft, client, django_assert_max_num_queries):
    client.force_login(make.builder_of(aircraft))
    url, today, counts = reverse("aircraft-page", args=[aircraft.id]), timezone.localdate(), []
    section = make.section(aircraft=aircraft)
    for more in (10, 190):
        for number in range(more):
            work = task(aircraft=aircraft, section=section)
            entry(aircraft=aircraft, task=work, worked_on=today, minutes=5, closed=number % 2 == 0)
            part(aircraft=aircraft, origin="unknown")
        with django_assert_max_num_queries(30) as asked:
            assert client.get(url).status_code == 200
        counts.append(len(asked))
    assert counts[0] == counts[1]
