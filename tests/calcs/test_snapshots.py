"""Snapshots: frozen as run, and stale as soon as what they were bound to has changed."""

import datetime as dt

import pytest
from django.urls import reverse

from buildlog.calcs.actions import Source
from buildlog.calcs.models import Snapshot
from buildlog.calcs.queries import snapshot_view, snapshot_views
from buildlog.ledger import verify
from buildlog.methods.catalogue import methods
from buildlog.parts.actions import install_part
from tests import make
from tests.makers.calcs import snapshot
from tests.makers.parts import part

pytestmark = pytest.mark.django_db


@pytest.fixture
def aircraft():
    return make.aircraft()


def bound(aircraft, under: Snapshot) -> Snapshot:
    value = f"{snapshot_view(aircraft, under.id).result.output('power').value} kW"
    given = {"power": value, "specific_consumption": "0.335", "feed": "gravity"}
    sources = [Source("power", under, "power", value)]
    return snapshot(aircraft=aircraft, method="fuel-required", given=given, sources=sources)


def state(aircraft, row: Snapshot) -> str:
    return snapshot_view(aircraft, row.id).state


def test_a_run_again_makes_what_leaned_on_the_old_one_stale_down_the_chain(aircraft):
    power = snapshot(aircraft=aircraft)
    required = bound(aircraft, power)
    flow = snapshot(
        aircraft=aircraft,
        method="fuel-flow",
        given={"consumption": "40", "feed": "gravity", "volume": "10", "time": "6"},
        sources=[Source("consumption", required, "consumption", "40 L/h")],
    )
    assert [state(aircraft, row) for row in (power, required, flow)] == ["holds"] * 3
    snapshot(aircraft=aircraft, given={"torque": "180", "speed": "2600"}, supersedes=power)
    assert [state(aircraft, row) for row in (power, required, flow)] == ["history", "changed", "changed"]
    path = snapshot_view(aircraft, flow.id).path
    assert "was run again" in path[0] and len(path) == 3
    assert verify.check()[1] == []


def test_a_changed_part_makes_the_run_that_spoke_of_it_stale(aircraft):
    by = make.builder_of(aircraft)
    first, second = part(aircraft=aircraft), part(aircraft=aircraft)
    said = {"aircraft": aircraft, "by": by, "position": "carburettor"}
    place = install_part(part=first, installed_on=dt.date(2026, 1, 1), **said)
    row = snapshot(aircraft=aircraft, holds_for=[place])
    assert state(aircraft, row) == "holds"
    install_part(part=second, installed_on=dt.date(2026, 5, 9), removal_reason="leaks", **said)
    assert state(aircraft, row) == "changed"
    assert "went in on 2026-05-09" in snapshot_view(aircraft, row.id).path[0]


@pytest.mark.parametrize("key", list(methods()))
def test_every_method_has_a_page_that_refuses_emptiness_kindly(aircraft, client, key):
    client.force_login(make.builder_of(aircraft))
    url = reverse("calculation-run", args=[aircraft.id, key])
    assert client.get(url).status_code == 200
    answer = client.post(url, {"work": "1"})
    assert answer.status_code == 422 and b"Error:" in answer.content


def test_a_page_works_it_out_and_keeps_it_once(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    url = reverse("calculation-run", args=[aircraft.id, "tip-mach"])
    post = {"diameter": "193 cm", "speed": "2700", "mach_limit": "0,8", "client_id": make.client_id()}
    page = client.post(url, post | {"work": "1"}).content.decode()
    assert "0.802" in page and "Out of limits" in page and "<svg" in page
    assert not Snapshot.objects.exists()
    for _ in range(2):
        answer = client.post(url, post | {"keep": "1", "label": "static"})
        assert answer.status_code == 303
    row = Snapshot.objects.get()
    page = client.get(answer["Location"]).content.decode()
    assert "static" in page and "193 cm" in page and row.digest in page


def test_rows_of_runs_are_read_from_the_page_and_more_can_be_had(aircraft, client):
    client.force_login(make.builder_of(aircraft))
    url = reverse("calculation-run", args=[aircraft.id, "fuel-flow"])
    post = {"consumption": "27", "feed": "gravity"}
    for row, minutes in enumerate(("6", "8")):
        post |= {f"runs-{row}-name": f"run {row}", f"runs-{row}-volume": "5", f"runs-{row}-time": minutes}
        post |= {f"runs-{row}-counts": "yes"}
    more = client.post(url, post | {"more": "1"}).content.decode()
    assert "runs-8-name" in more and 'value="run 1"' in more
    assert b"37.50" in client.post(url, post | {"work": "1"}).content


def test_a_helper_works_it_out_but_does_not_keep_it(aircraft, client):
    helper = make.user()
    make.member(aircraft=aircraft, user=helper, role="helper")
    client.force_login(helper)
    url = reverse("calculation-run", args=[aircraft.id, "shaft-power"])
    post = {"torque": "175", "speed": "2600"}
    assert client.post(url, post | {"work": "1"}).status_code == 200
    assert client.post(url, post | {"keep": "1"}).status_code == 403


@pytest.mark.parametrize("nonsense", ["12 bananas", "inf", "1e999", "\N{BANANA}", "9" * 10_000])
def test_nonsense_stays_in_its_field_with_a_sentence(aircraft, client, nonsense):
    client.force_login(make.builder_of(aircraft))
    url = reverse("calculation-run", args=[aircraft.id, "shaft-power"])
    answer = client.post(url, {"torque": nonsense, "speed": "2600", "work": "1"})
    assert answer.status_code == 422 and b"2600" in answer.content


def test_a_snapshot_prints_when_its_method_is_gone(aircraft, client):
    row = snapshot(aircraft=aircraft)
    gone = Snapshot(aircraft=aircraft, method="never-built", version=1, title="Old", result=row.result)
    assert snapshot_views(aircraft)[0].result.title == "Shaft power"
    assert gone.result["steps"]


@pytest.mark.parametrize("rows", [10, 200])
def test_the_list_asks_a_fixed_number_of_questions(aircraft, client, django_assert_max_num_queries, rows):
    before = snapshot(aircraft=aircraft)
    for _ in range(rows):
        bound(aircraft, before) if rows < 20 else snapshot(aircraft=aircraft)
    client.force_login(make.builder_of(aircraft))
    with django_assert_max_num_queries(7):
        client.get(reverse("calculations", args=[aircraft.id]))
