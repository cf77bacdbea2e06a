"""Readings: kept as typed, judged by limits and uncertainty, corrected beside the original."""

import datetime as dt
from uuid import uuid4

import pytest
from django.urls import reverse

from buildlog.errors import Refused
from buildlog.ledger import actions as ledger
from buildlog.ledger import verify
from buildlog.methods import units
from buildlog.readings import actions, queries
from buildlog.readings.limits import EVERY_UNIT, calibration_words
from buildlog.readings.models import Characteristic, Reading
from tests import make
from tests.makers.files import jpeg, upload
from tests.makers.readings import DAY, characteristic, instrument, reading

pytestmark = pytest.mark.django_db


@pytest.fixture
def aircraft():
    return make.aircraft()


def post(**more):
    return {"client_id": make.client_id(), "entered": "25,1", "read_on": "2026-05-09"} | more


def add_url(row):
    return reverse("reading-add", args=[row.aircraft_id, row.id])


def page_of(client, row):
    return client.get(reverse("characteristic-page", args=[row.aircraft_id, row.id])).content.decode()


@pytest.mark.parametrize("unit", [unit for unit in EVERY_UNIT if unit not in {"", "rpm"}])
def test_every_unit_offered_is_known_to_the_library(unit):
    assert units.can_become(f" {unit}", unit)  # spelled otherwise, so that it goes through the library


@pytest.mark.parametrize(
    ("given", "unit", "wanted"),
    [  # NIST SP 811 (2008), appendix B.8; from memory
        ("1 in", "mm", 25.4),
        ("1 lb", "kg", 0.45359237),
        ("1 lbf", "N", 4.4482216),
        ("1 lbf*in", "N*m", 0.1129848),
        ("1 psi", "kPa", 6.894757),
        ("1 gal/h", "L/h", 3.7854118),
        ("1 kt", "m/s", 0.5144444),
        ("212 degF", "degC", 100),
        ("50 %", "", 0.5),
    ],
)
def test_units_of_the_form_turn_into_each_other(given, unit, wanted):
    assert units.read(given, unit).value == pytest.approx(wanted, rel=1e-6)


@pytest.mark.parametrize(
    ("entered", "value", "uncertainty"),
    [
        ("25,1", "25.1", ""),
        ("25.1 mm", "25.1", ""),
        ("1 in", "25.4", ""),
        ("63/64 in", "25.003125", ""),
        ("25.05 ± 0.02", "25.05", "0.02"),
        ("-3", "-3", ""),
    ],
)
def test_a_value_is_kept_as_typed_and_in_the_declared_unit(aircraft, entered, value, uncertainty):
    row = reading(characteristic=characteristic(aircraft=aircraft), entered=entered)
    assert (row.entered, row.value, row.uncertainty) == (entered, value, uncertainty)


@pytest.mark.parametrize("entered", ["12 bananas", "inf", "nan", "", "1e999", "12 kg", "🙂", "25 ± -1", "9" * 10_000])
def test_nonsense_is_refused_at_the_field_and_everything_typed_is_still_there(aircraft, client, entered):
    row = characteristic(aircraft=aircraft)
    client.force_login(make.builder_of(aircraft))
    answer = client.post(add_url(row), post(entered=entered, note="left hinge"))
    page = answer.content.decode()
    assert answer.status_code == 422 and 'id="id_entered_error"' in page
    assert "left hinge" in page and (not entered or f'value="{entered}"' in page)
    assert not Reading.objects.exists()


@pytest.mark.parametrize(
    ("entered", "verdict"),
    [
        ("25.2", "within"),  # on the edge, nothing said of the uncertainty
        ("25.15 ± 0.05", "within"),
        ("25.16 ± 0.05", "undecided"),
        ("25.24 ± 0.05", "undecided"),
        ("25.26 ± 0.05", "outside"),
        ("24.7", "outside"),
    ],
)
def test_the_verdict_knows_limits_and_uncertainty(aircraft, entered, verdict):
    row = characteristic(aircraft=aircraft)
    reading(characteristic=row, entered=entered)
    assert queries.present(row).state == verdict


def test_the_uncertainty_of_the_instrument_counts_where_none_is_typed(aircraft):
    row = characteristic(aircraft=aircraft)
    caliper = instrument(aircraft=aircraft, uncertainty="0,05 mm")
    assert reading(characteristic=row, instrument=caliper).uncertainty == "0.05"
    assert reading(characteristic=row, instrument=caliper, entered="25 ± 0.01").uncertainty == "0.01"
    share = instrument(aircraft=aircraft, uncertainty="2 %")
    assert reading(characteristic=row, instrument=share).uncertainty == "0.5"
    thermometer = instrument(aircraft=aircraft, uncertainty="1.8 degF")
    heat = characteristic(aircraft=aircraft, unit="degC", nominal="80", lower="", upper="110")
    assert reading(characteristic=heat, instrument=thermometer, entered="90").uncertainty == "1"
    with pytest.raises(Refused, match="measures in degF, here mm is asked"):
        reading(characteristic=row, instrument=thermometer)


def test_before_a_reading_the_nominal_stands_and_says_not_measured(aircraft, client):
    row = characteristic(aircraft=aircraft)
    assert queries.present(row).words == "25 mm, not measured"
    client.force_login(make.builder_of(aircraft))
    page = client.get(reverse("readings", args=[aircraft.id])).content.decode()
    assert "25 mm, not measured" in page and "Not measured" in page


def test_out_of_limits_saves_the_truth_and_says_so(aircraft, client):
    row = characteristic(aircraft=aircraft)
    client.force_login(make.builder_of(aircraft))
    assert client.post(add_url(row), post(entered="25.6")).status_code == 303
    page = page_of(client, row)
    assert "Measured out of limits" in page and "Out of limits" in page and "25.6" in page
    assert "airworthy" not in page


def test_a_correction_stands_beside_the_original(aircraft, client):
    row = characteristic(aircraft=aircraft)
    first = reading(characteristic=row, entered="52.0")
    client.force_login(make.builder_of(aircraft))
    url = f"{add_url(row)}?amends={first.id}"
    answer = client.post(url, post(entered="25.0"))
    assert answer.status_code == 422 and b"This cannot stay empty" in answer.content
    assert client.post(url, post(entered="25.0", amend_reason="digits swapped")).status_code == 303
    first.refresh_from_db()
    assert first.entered == "52.0"
    present = queries.present(row)
    assert (present.value, present.state) == ("25", "within")
    page = page_of(client, row)
    assert "52.0" in page and "Corrected" in page and "digits swapped" in page
    with pytest.raises(Refused, match="corrected already"):
        reading(characteristic=row, amends=first, amend_reason="again")
    assert verify.check()[1] == []


def test_a_withdrawn_reading_no_longer_counts(aircraft, client):
    row = characteristic(aircraft=aircraft)
    good, wrong = reading(characteristic=row), reading(characteristic=row, entered="30")
    assert queries.present(row).state == "outside"
    by = make.builder_of(aircraft)
    ledger.withdraw(aircraft=aircraft, by=by, kind="reading", subject=wrong, reason="other part measured")
    assert queries.present(row).latest.reading == good
    client.force_login(by)
    assert "Withdrawn: other part measured" in page_of(client, row)


def test_helpers_correct_their_own_readings_only(aircraft):
    helper = make.user(name="Nils")
    make.member(aircraft=aircraft, user=helper, role="helper")
    row = characteristic(aircraft=aircraft)
    others, own = reading(characteristic=row), reading(characteristic=row, by=helper)
    with pytest.raises(Refused, match="their own readings only"):
        reading(characteristic=row, by=helper, amends=others, amend_reason="misread")
    assert reading(characteristic=row, by=helper, amends=own, amend_reason="misread").amends == own


def test_the_same_reading_sent_twice_is_one_and_a_borrowed_id_is_refused(aircraft):
    row, sent = characteristic(aircraft=aircraft), uuid4()
    assert reading(characteristic=row, client_id=sent) == reading(characteristic=row, client_id=sent)
    assert Reading.objects.count() == 1
    with pytest.raises(Refused, match="sent before"):
        reading(characteristic=characteristic(aircraft=make.aircraft()), client_id=sent)


@pytest.mark.parametrize(("read_on", "words"), [("2126-01-01", "day to come"), ("1026-01-01", "year right")])
def test_a_day_that_cannot_be_is_refused(aircraft, read_on, words):
    with pytest.raises(Refused, match=words):
        reading(characteristic=characteristic(aircraft=aircraft), read_on=dt.date.fromisoformat(read_on))


def test_an_instrument_out_of_calibration_says_so_wherever_its_readings_stand(aircraft, client):
    old = instrument(aircraft=aircraft, calibrated_on=dt.date(2024, 1, 1), due_on=dt.date(2025, 1, 1))
    row = characteristic(aircraft=aircraft)
    reading(characteristic=row, instrument=old)
    client.force_login(make.builder_of(aircraft))
    words = "out of calibration since 1 Jan 2025"
    assert words in page_of(client, row)
    assert words in client.get(reverse("instruments", args=[aircraft.id])).content.decode()
    assert calibration_words(old, dt.date(2024, 6, 1)) == ""
    assert calibration_words(old, dt.date(2023, 6, 1)) == "calibrated only afterwards, on 1 Jan 2024"
    assert calibration_words(None, DAY) == "no instrument named"


def test_a_calibration_that_readings_lean_on_is_not_rewritten(aircraft):
    tool, by = instrument(aircraft=aircraft), make.builder_of(aircraft)
    said = {name: getattr(tool, name) for name in ("code", "title", "uncertainty", "calibrated_on", "certificate")}
    actions.change_instrument(aircraft=aircraft, by=by, instrument=tool, **said, due_on=dt.date(2026, 11, 1))
    reading(characteristic=characteristic(aircraft=aircraft), instrument=tool)
    with pytest.raises(Refused, match="lean on this calibration"):
        actions.change_instrument(aircraft=aircraft, by=by, instrument=tool, **said, due_on=dt.date(2030, 1, 1))
    assert verify.check()[1] == []


@pytest.mark.parametrize(
    ("said", "field"),
    [
        ({"uncertainty": "0.5"}, "uncertainty"),
        ({"uncertainty": "12 bananas"}, "uncertainty"),
        ({"due_on": "2020-01-01", "calibrated_on": "2021-01-01"}, "due_on"),
        ({"calibrated_on": "2126-01-01"}, "calibrated_on"),
        ({"title": ""}, "title"),
    ],
)
def test_an_instrument_that_cannot_be_is_refused_at_its_field(aircraft, client, said, field):
    client.force_login(make.builder_of(aircraft))
    sent = {"client_id": make.client_id(), "code": "S-1", "title": "Scale"} | said
    answer = client.post(reverse("instrument-add", args=[aircraft.id]), sent)
    assert answer.status_code == 422 and f'id="id_{field}_error"' in answer.content.decode()


@pytest.mark.parametrize(
    ("said", "field"),
    [
        ({"lower": "26", "upper": "24"}, "lower"),
        ({"lower": "24", "upper": "26", "nominal": "30"}, "nominal"),
        ({"upper": "12 bananas"}, "upper"),
        ({"unit": "bananas"}, "unit"),
        ({"code": ""}, "code"),
    ],
)
def test_limits_that_cannot_be_are_refused_at_their_field(aircraft, client, said, field):
    client.force_login(make.builder_of(aircraft))
    sent = {"client_id": make.client_id(), "code": "K", "title": "Gap", "unit": "mm"} | said
    answer = client.post(reverse("characteristic-add", args=[aircraft.id]), sent)
    assert answer.status_code == 422 and f'id="id_{field}_error"' in answer.content.decode()
    assert not Characteristic.objects.exists()


def test_a_plan_revision_changes_limits_and_the_trail_tells_both(aircraft, client):
    row = characteristic(aircraft=aircraft)
    reading(characteristic=row, entered="25.3")
    client.force_login(make.builder_of(aircraft))
    sent = {"code": row.code, "title": row.title, "unit": "mm", "nominal": "25", "lower": "24,8", "upper": "1 in"}
    url = reverse("characteristic-edit", args=[aircraft.id, row.id])
    assert client.post(url, sent).status_code == 303
    row.refresh_from_db()
    assert (row.upper, queries.present(row).state) == ("25.4", "within")
    answer = client.post(url, sent | {"unit": "kg", "upper": ""})
    assert answer.status_code == 422 and b"measured in this unit already" in answer.content
    assert verify.check()[1] == []


def test_a_photo_stays_kept_when_the_value_is_refused(aircraft, client):
    row = characteristic(aircraft=aircraft)
    client.force_login(make.builder_of(aircraft))
    answer = client.post(add_url(row), post(entered="much", camera=upload(jpeg())))
    assert answer.status_code == 422 and b'name="kept_photos"' in answer.content
    kept = str(aircraft.photos.get().id)
    assert client.post(add_url(row), post(kept_photos=[kept])).status_code == 303
    assert str(Reading.objects.get().photo_id) == kept


def test_who_may_measure_and_who_may_declare(aircraft, client):
    row = characteristic(aircraft=aircraft)
    declare = reverse("characteristic-add", args=[aircraft.id])
    for role, measures in (("helper", 303), ("inspector", 303), ("viewer", 403)):
        person = make.user()
        make.member(aircraft=aircraft, user=person, role=role)
        client.force_login(person)
        assert client.post(add_url(row), post()).status_code == measures, role
        assert client.post(declare, {}).status_code == 403, role
    client.force_login(make.user())
    assert client.post(add_url(row), post()).status_code == 404
    assert client.get(reverse("readings", args=[aircraft.id])).status_code == 404


def test_a_characteristic_of_another_aircraft_is_not_found(aircraft, client):
    other = characteristic(aircraft=make.aircraft())
    client.force_login(make.builder_of(aircraft))
    assert client.get(reverse("characteristic-page", args=[aircraft.id, other.id])).status_code == 404
    row = characteristic(aircraft=aircraft)
    assert client.get(f"{add_url(row)}?amends={reading(characteristic=other).id}").status_code == 404
    assert client.get(f"{add_url(row)}?amends=nonsense").status_code == 404


@pytest.mark.parametrize("rows", [10, 200])
def test_the_pages_ask_a_fixed_number_of_questions(aircraft, client, django_assert_num_queries, rows):
    tool = instrument(aircraft=aircraft)
    measured = characteristic(aircraft=aircraft)
    for _ in range(rows):
        reading(characteristic=characteristic(aircraft=aircraft), instrument=tool)
        reading(characteristic=measured, instrument=tool)
        instrument(aircraft=aircraft)
    client.force_login(make.builder_of(aircraft))
    for name, more, wanted in (
        ("readings", [], 5),
        ("characteristic-page", [measured.id], 6),
        ("instruments", [], 4),
    ):
        with django_assert_num_queries(wanted):
            assert client.get(reverse(name, args=[aircraft.id, *more])).status_code == 200
