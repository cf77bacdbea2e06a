"""The aircraft, its sections and zones, and the facts of its conversion."""

import datetime as dt

import pytest
from django.test import Client
from django.urls import reverse

from buildlog.aircraft import actions, queries
from buildlog.aircraft.conversion import outcome
from buildlog.aircraft.models import Aircraft, Fact
from buildlog.errors import Refused
from buildlog.ledger import verify
from buildlog.ledger.models import Event
from buildlog.profiles import load
from tests import make
from tests.makers.aircraft import zone

pytestmark = pytest.mark.django_db
TITLE_BLOCK = {
    "designation": "Test Three",
    "basis": "own-design",
    "serial": "0043",
    "seats": "1",
    "jurisdiction": "uk",
    "units": "inch-pound",
    "started_on": "2025-02-01",
}


@pytest.fixture
def aircraft(client) -> Aircraft:
    row = make.aircraft()
    client.force_login(make.builder_of(row))
    return row


def test_one_aircraft_leads_to_its_bench_and_several_are_listed(client, aircraft):
    assert client.get("/")["Location"] == reverse("bench", args=[aircraft.id])
    assert aircraft.serial in client.get("/?all").content.decode()
    second = make.aircraft(builder=make.builder_of(aircraft))
    page = client.get("/").content.decode()
    assert aircraft.serial in page
    assert second.serial in page
    other = make.aircraft()
    assert other.serial not in page


def test_list_asks_the_same_number_of_questions_for_ten_and_two_hundred(client, aircraft, django_assert_num_queries):
    builder = make.builder_of(aircraft)
    for count in (10, 190):
        for _ in range(count):
            make.aircraft(builder=builder)
        with django_assert_num_queries(3):
            client.get("/")


def test_aircraft_is_added_once_for_one_form(client, aircraft):
    typed = TITLE_BLOCK | {"client_id": make.client_id()}
    first, second = (client.post(reverse("aircraft-add"), typed) for _ in range(2))
    assert first.status_code == second.status_code == 303
    row = Aircraft.objects.get(serial="0043")
    assert (row.basis, row.seats, row.jurisdiction, row.units) == ("own-design", 1, "uk", "inch-pound")
    assert first["Location"] == second["Location"] == reverse("conversion", args=[row.id])
    stranger = Client()
    stranger.force_login(make.user())
    assert stranger.post(reverse("aircraft-add"), typed).status_code == 422
    assert verify.check()[1] == []


def test_serial_taken_is_said_at_the_field(client, aircraft):
    typed = TITLE_BLOCK | {"client_id": make.client_id(), "serial": aircraft.serial}
    answer = client.post(reverse("aircraft-add"), typed)
    assert answer.status_code == 422
    assert "belongs to another aircraft" in answer.content.decode()


def test_title_block_is_corrected_by_the_builder_alone(client, aircraft):
    url = reverse("aircraft-edit", args=[aircraft.id])
    assert client.post(url, TITLE_BLOCK | {"registration": "X-TEST"}).status_code == 303
    aircraft.refresh_from_db()
    assert (aircraft.registration, aircraft.designation) == ("X-TEST", "Test Three")
    event = Event.objects.filter(chain=aircraft.id).latest("seq")
    assert event.kind == "aircraft.edited"
    assert "Test Two" in event.said.body
    helper = make.user()
    make.member(aircraft=aircraft, user=helper)
    theirs = Client()
    theirs.force_login(helper)
    assert theirs.post(url, TITLE_BLOCK).status_code == 403
    assert verify.check()[1] == []


def test_refused_name_does_not_stand_in_the_frame(client, aircraft):
    answer = client.post(reverse("aircraft-edit", args=[aircraft.id]), TITLE_BLOCK | {"seats": "99"})
    assert answer.status_code == 422
    assert "<title>Error: The title block · Test Two" in answer.content.decode()


def test_sections_stand_under_their_parents_in_order(client, aircraft):
    url = reverse("sections", args=[aircraft.id])
    by = make.builder_of(aircraft)
    engine = actions.add_section(aircraft=aircraft, by=by, number="40", title="Engine")
    actions.add_section(aircraft=aircraft, by=by, number="5", title="Tail")
    for number in ("40.2", "40.1"):
        typed = {"number": number, "title": "Mount", "parent": str(engine.id), "client_id": make.client_id()}
        assert client.post(url, typed).status_code == 303
    lines = [(line.section.number, line.depth) for line in queries.section_tree(aircraft)]
    assert lines == [("5", 0), ("40", 0), ("40.1", 1), ("40.2", 1)]


def test_section_number_taken_or_circle_is_refused(client, aircraft):
    top = make.section(aircraft=aircraft, number="40")
    by = make.builder_of(aircraft)
    child = actions.add_section(aircraft=aircraft, by=by, number="40.1", title="Mount", parent=top)
    with pytest.raises(Refused, match="under itself"):
        actions.edit_section(aircraft=aircraft, by=by, section=top, number="40", title="Engine", parent=child)
    url = reverse("section-edit", args=[aircraft.id, child.id])
    answer = client.post(url, {"number": "40", "title": "Mount", "parent": ""})
    assert answer.status_code == 422
    assert "is there already" in answer.content.decode()


def test_parent_of_another_aircraft_is_no_choice(client, aircraft):
    theirs = make.section(aircraft=make.aircraft())
    typed = {"number": "40", "title": "Mount", "parent": str(theirs.id), "client_id": make.client_id()}
    assert client.post(reverse("sections", args=[aircraft.id]), typed).status_code == 422


def test_zone_is_added_changed_and_not_doubled(client, aircraft):
    url = reverse("zones", args=[aircraft.id])
    typed = {"code": "LW-1", "title": "Root bay", "client_id": make.client_id()}
    assert [client.post(url, typed).status_code for _ in range(2)] == [303, 303]
    row = aircraft.zones.get()
    assert client.post(url, typed | {"client_id": make.client_id()}).status_code == 422
    edit = reverse("zone-edit", args=[aircraft.id, row.id])
    assert client.post(edit, {"code": "LW-2", "title": "Root bay"}).status_code == 303
    assert str(aircraft.zones.get()) == "LW-2 Root bay"
    assert verify.check()[1] == []


def test_zones_and_sections_ask_the_same_number_of_questions(client, aircraft, django_assert_max_num_queries):
    counts = []
    for count in (10, 190):
        for number in range(count):
            zone(aircraft=aircraft, code=f"{count}-{number}")
            make.section(aircraft=aircraft)
        for name in ("zones", "sections"):
            with django_assert_max_num_queries(8) as asked:
                client.get(reverse(name, args=[aircraft.id]))
            counts.append(len(asked))
    assert counts[:2] == counts[2:]


def post_facts(client, aircraft, changes: dict[str, str], opened: dict[str, str] | None = None):
    keys = load.facts()
    before = dict.fromkeys(keys, "") | (opened or {})
    typed = before | changes
    return client.post(
        reverse("conversion", args=[aircraft.id]), typed | {f"initial-{key}": value for key, value in before.items()}
    )


def test_facts_are_stated_and_follow_the_ones_before(client, aircraft):
    stated = {"ignition_systems": "2", "spark_ignition": "yes", "feed": "gravity", "engine_designation": "Conversion 7"}
    assert post_facts(client, aircraft, stated).status_code == 303
    assert queries.stated(aircraft) == {
        "ignition_systems": 2,
        "spark_ignition": True,
        "feed": "gravity",
        "engine_designation": "Conversion 7",
    }
    assert Event.objects.filter(chain=aircraft.id, kind="facts.stated").count() == 1
    assert post_facts(client, aircraft, {"feed": ""}, stated).status_code == 303
    assert "feed" not in queries.stated(aircraft)
    rows = Fact.objects.filter(key="feed").order_by("at")
    assert [row.value for row in rows] == ["gravity", ""]
    assert rows[1].follows == rows[0]
    assert verify.check()[1] == []


def test_an_older_page_does_not_take_back_what_somebody_else_said(client, aircraft):
    by = make.builder_of(aircraft)
    actions.state_fact(aircraft=aircraft, by=by, key="ignition_systems", value=2)
    assert post_facts(client, aircraft, {"feed": "gravity"}).status_code == 303  # opened before the other was said
    assert queries.stated(aircraft) == {"ignition_systems": 2, "feed": "gravity"}


def test_same_fact_again_adds_nothing(aircraft):
    by = make.builder_of(aircraft)
    assert actions.state_fact(aircraft=aircraft, by=by, key="feed", value="gravity")
    assert actions.state_fact(aircraft=aircraft, by=by, key="feed", value="gravity") is None
    assert Fact.objects.count() == 1


@pytest.mark.parametrize(
    ("key", "value", "said"),
    [
        ("ignition_systems", "many", "whole number"),
        ("ignition_systems", "-1", "whole number"),
        ("ignition_systems", "9" * 5000, "whole number"),
        ("spark_ignition", "perhaps", "not one of the available choices"),
        ("feed", "magic", "not one of the available choices"),
        ("engine_designation", "x" * 201, "at most 200"),
    ],
)
def test_wrong_fact_is_said_at_its_field_and_nothing_is_kept(client, aircraft, key, value, said):
    answer = post_facts(client, aircraft, {key: value, "cylinders": "4"})
    words = answer.content.decode()
    assert answer.status_code == 422
    assert said in words
    assert Fact.objects.count() == 0
    assert 'name="cylinders" value="4"' in words


def test_values_of_the_wrong_kind_are_refused_by_the_action(aircraft):
    by = make.builder_of(aircraft)
    for key, value in (("spark_ignition", "yes"), ("ignition_systems", True), ("feed", "magic"), ("no_such", 1)):
        with pytest.raises(Refused):
            actions.state_fact(aircraft=aircraft, by=by, key=key, value=value)


def test_page_counts_checks_by_what_the_facts_say(client, aircraft):
    empty = outcome({})
    total = len(load.checklist())
    assert len(empty.applying) + len(empty.unknown) == total
    assert empty.left_out == ()
    actions.state_fact(aircraft=aircraft, by=make.builder_of(aircraft), key="spark_ignition", value=False)
    after = outcome(queries.stated(aircraft))
    expected = [
        check.key
        for check in load.checklist().values()
        if load.applies(check, {"spark_ignition": False}).answer == "no"
    ]
    assert [row.check.key for row in after.left_out] == expected
    page = client.get(reverse("conversion", args=[aircraft.id])).content.decode()
    assert f"Checks that do not apply ({len(expected)})" in page
    assert after.left_out[0].check.title in page
    assert "Does not apply: spark ignition: no." in page


def test_every_declared_fact_has_a_field_that_saves(client, aircraft):
    answers = {"yes_no": lambda fact: "no", "count": lambda fact: str(fact.high), "text": lambda fact: "words"}
    answers["choice"] = lambda fact: fact.options[-1].value
    typed = {key: answers[fact.kind](fact) for key, fact in load.facts().items()}
    assert post_facts(client, aircraft, typed).status_code == 303
    assert set(queries.stated(aircraft)) == set(load.facts())
    assert outcome(queries.stated(aircraft)).unknown == ()


def test_helper_reads_the_facts_and_may_not_say_them(aircraft):
    helper, theirs = make.user(), Client()
    make.member(aircraft=aircraft, user=helper)
    theirs.force_login(helper)
    actions.state_fact(aircraft=aircraft, by=make.builder_of(aircraft), key="engine_designation", value="Conversion 7")
    page = theirs.get(reverse("conversion", args=[aircraft.id])).content.decode()
    assert "Conversion 7" in page
    assert "Save facts" not in page
    assert post_facts(theirs, aircraft, {"feed": "gravity"}).status_code == 403
    stranger = Client()
    stranger.force_login(make.user())
    assert post_facts(stranger, aircraft, {"feed": "gravity"}).status_code == 404


def test_facts_stated_in_the_past_carry_their_day(aircraft):
    at = dt.datetime(2024, 5, 1, 12, tzinfo=dt.UTC)
    actions.state_fact(aircraft=aircraft, by=make.builder_of(aircraft), key="feed", value="gravity", at=at)
    assert queries.stated_at(aircraft) == {"feed": at}
