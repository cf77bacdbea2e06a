"""Entries: drafts, closing, amending, and what is refused on the way."""

import datetime as dt
from uuid import uuid4

import pytest
from django.db import connection, transaction
from django.db.utils import DatabaseError
from django.urls import reverse

from buildlog.errors import Refused
from buildlog.ledger import verify
from buildlog.ledger.models import Event
from buildlog.shop import actions, queries
from buildlog.shop.actions.entries import Overtaken
from buildlog.shop.models import Entry, LabourLine
from buildlog.shop.spans import read_minutes
from tests import make
from tests.makers.files import jpeg, upload
from tests.makers.shop import draft, entry, task

pytestmark = pytest.mark.django_db


@pytest.fixture
def aircraft():
    return make.aircraft()


def said(**more: object) -> dict[str, object]:
    first = {"client_id": make.client_id(), "worked_on": "2026-03-14", "time": "60", "capacity": "builder"}
    return first | {"note": "Glued rib 5"} | more


def test_the_same_post_twice_is_one_entry_and_one_event(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    post = said()
    for _ in range(2):
        assert client.post(reverse("entry-add", args=[aircraft.id]), post).status_code == 303
    assert Entry.objects.count() == 1
    assert Event.objects.filter(chain=aircraft.id, kind="entry.kept").count() == 1


def test_an_entry_on_the_record_is_frozen_in_the_database_itself(aircraft):
    row = entry(aircraft=aircraft)
    for attack in ("UPDATE buildlog_entry SET note = 'x'", "DELETE FROM buildlog_labourline"):
        with pytest.raises(DatabaseError), transaction.atomic(), connection.cursor() as cursor:
            cursor.execute(attack)
    assert row.closed_at is not None and verify.check()[1] == []


def test_a_draft_saved_elsewhere_meanwhile_keeps_both_texts(aircraft):
    by = make.builder_of(aircraft)
    row = entry(aircraft=aircraft, closed=False)
    actions.edit_draft(aircraft=aircraft, by=by, entry=row, base_version=1, draft=draft(note="First phone"))
    with pytest.raises(Overtaken):
        actions.edit_draft(aircraft=aircraft, by=by, entry=row, base_version=1, draft=draft(note="Second phone"))
    assert Entry.objects.get().note == "First phone"
    assert row.revisions.get(sibling=True).fields["note"] == "Second phone"
    assert verify.check()[1] == []


def test_a_draft_overtaken_answers_409_with_both(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    row = entry(aircraft=aircraft, closed=False)
    by = make.builder_of(aircraft)
    actions.edit_draft(aircraft=aircraft, by=by, entry=row, base_version=1, draft=draft(note="First phone"))
    post = said(note="Second phone", base_version=1)
    answer = client.post(reverse("entry-edit", args=[aircraft.id, row.id]), post)
    assert answer.status_code == 409
    assert b"First phone" in answer.content and b"Second phone" in answer.content


def test_an_amendment_stands_beside_the_original_and_counts_instead(aircraft):
    by = make.builder_of(aircraft)
    row = entry(aircraft=aircraft, minutes=90)
    more = {"client_id": uuid4(), "draft": draft(minutes=30), "amend_reason": "clock ran on"}
    actions.amend_entry(aircraft=aircraft, by=by, entry=row, **more)
    assert queries.hours_by_person(aircraft) == [("Ada Berg", "Builder", 30)]
    assert Entry.objects.count() == 2
    with pytest.raises(Refused, match="amended already"):
        actions.amend_entry(aircraft=aircraft, by=by, entry=row, **(more | {"client_id": uuid4()}))
    assert verify.check()[1] == []


def test_a_helper_amends_only_own_entries(aircraft):
    helper = make.user(name="Nils")
    make.member(aircraft=aircraft, user=helper, role="helper")
    row = entry(aircraft=aircraft)
    with pytest.raises(Refused, match="their own"):
        actions.amend_entry(
            aircraft=aircraft, by=helper, entry=row, client_id=uuid4(), draft=draft(), amend_reason="no"
        )


def test_a_draft_closes_by_itself_after_seven_days(aircraft, settings):
    row = entry(aircraft=aircraft, closed=False)
    assert actions.close_old_drafts(at=row.saved_at + dt.timedelta(days=6)) == 0
    assert actions.close_old_drafts(at=row.saved_at + dt.timedelta(days=8)) == 1
    assert Entry.objects.get().closed_how == "automatic"
    settings.AUTO_CLOSE_DAYS = 0
    assert actions.close_old_drafts(at=row.saved_at + dt.timedelta(days=80)) == 0


@pytest.mark.parametrize(
    ("change", "words"),
    [
        ({"worked_on": "2126-03-14"}, "before it is done"),
        ({"worked_on": "14.3.2026"}, "year-month-day"),
        ({"worked_on": "0026-03-14"}, "before 1950"),
        ({"time": "other", "time_other": "25 h"}, "at most 24 hours"),
        ({"time": "other", "time_other": "-1"}, "Write the time"),
        ({"time": "other", "time_other": "12 bananas"}, "Write the time"),
        ({"time": "other", "time_other": "nan"}, "Write the time"),
        ({"time": "other", "time_other": ""}, "Write the time"),
        ({"note": "x" * 10_000}, "8000"),
        ({"note": "a\x00b"}, "ull"),
        ({"note": ""}, "Say what was done"),
        ({"task": "77777777-7777-7777-7777-777777777777"}, "Select a valid choice"),
        ({"second_person": "Nils", "second_time": "inf"}, "Write the time"),
        ({"temperature": "20 °C"}, "Choose which process"),
    ],
)
def test_bad_input_gets_a_sentence_and_loses_nothing(aircraft, client, change, words):
    client.force_login(make.builder_of(aircraft))
    answer = client.post(reverse("entry-add", args=[aircraft.id]), said(place="Hall 2") | change)
    page = answer.content.decode()
    assert answer.status_code == 422
    assert words in page and "Hall 2" in page and "Error:" in page
    assert not Entry.objects.exists()


def test_more_than_a_day_of_work_in_a_day_is_refused(aircraft):
    entry(aircraft=aircraft, minutes=20 * 60)
    with pytest.raises(Refused, match="24 hours"):
        entry(aircraft=aircraft, minutes=5 * 60)


def test_a_photo_kept_by_a_refused_form_comes_back_with_it(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    url = reverse("entry-add", args=[aircraft.id])
    answer = client.post(url, said(worked_on="", gallery=upload(jpeg())))
    photo = aircraft.photos.get()
    assert answer.status_code == 422 and str(photo.id) in answer.content.decode()
    assert client.post(url, said(kept_photos=str(photo.id))).status_code == 303
    assert Entry.objects.get().photo_links.get().photo == photo


def test_emoji_and_umlauts_stay_as_typed(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    client.post(reverse("entry-add", args=[aircraft.id]), said(note="Größe ok \N{AIRPLANE}\N{WRENCH}"))
    assert Entry.objects.get().note == "Größe ok \N{AIRPLANE}\N{WRENCH}"
    assert verify.check()[1] == []


@pytest.mark.parametrize(
    ("typed", "minutes"),
    [("1.5", 90), ("1,5", 90), ("1:30", 90), ("90 min", 90), ("1 h 30", 90), ("½", 30), ("2½", 150), ("24", 1440)],
)
def test_spans_are_read_as_typed(typed, minutes):
    assert read_minutes(typed, field="time") == minutes


def test_a_task_is_to_do_then_in_work_then_done(aircraft):
    row = task(aircraft=aircraft)

    def state() -> str:
        return next(view.state for view in queries.task_views(aircraft))

    assert state() == "to-do"
    entry(aircraft=aircraft, closed=False, task=row, minutes=10)
    assert state() == "in-work"
    entry(aircraft=aircraft, task=row, finishes_task=True, minutes=10)
    assert state() == "done"


def test_a_clock_stops_into_the_log_with_its_minutes(aircraft, client):
    by, row = make.builder_of(aircraft), task(aircraft=aircraft)
    client.force_login(by)
    client.post(reverse("clock-start", args=[aircraft.id, row.id]))
    assert b"Stop and log" in client.get(reverse("bench", args=[aircraft.id])).content
    answer = client.post(reverse("clock-stop", args=[aircraft.id]))
    assert f"task={row.id}&minutes=1" in answer["Location"]
    assert b"1 min" in client.get(answer["Location"]).content


def test_a_task_number_stands_once(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    row = task(aircraft=aircraft, number="12")
    post = {"section": row.section_id, "number": "12", "title": "Again", "kind": "install", "planned": "1,5"}
    answer = client.post(reverse("task-add", args=[aircraft.id]), post)
    assert answer.status_code == 422 and b"There is a task with this number" in answer.content
    assert client.post(reverse("task-add", args=[aircraft.id]), post | {"number": "13"}).status_code == 303


@pytest.mark.parametrize("rows", [10, 200])
@pytest.mark.parametrize(("page", "questions"), [("bench", 14), ("entries", 12), ("tasks", 6)])
def test_pages_ask_a_fixed_number_of_questions(aircraft, client, django_assert_max_num_queries, page, questions, rows):
    by, section = make.builder_of(aircraft), make.section(aircraft=aircraft)
    for place in range(rows):
        one = task(aircraft=aircraft, section=section) if place % 10 == 0 else None
        entry(aircraft=aircraft, by=by, task=one, minutes=1)
    client.force_login(by)
    with django_assert_max_num_queries(questions):
        client.get(reverse(page, args=[aircraft.id]))


def test_labour_of_a_stranger_is_kept_by_name(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    post = said(second_person="Nils Dahl", second_capacity="helper", second_time="1:15")
    client.post(reverse("entry-add", args=[aircraft.id]), post)
    assert list(LabourLine.objects.order_by("minutes").values_list("person_name", "minutes")) == [
        ("Ada Berg", 60),
        ("Nils Dahl", 75),
    ]
