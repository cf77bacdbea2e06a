"""Every method: its examples, its published cases, its bounds, its record; and laws that hold for any input."""

import json
import math
from decimal import Decimal
from pathlib import Path

import fluids.atmosphere
import pytest
import rfc8785
from hypothesis import given, settings
from hypothesis import strategies as st

from buildlog.errors import Refused
from buildlog.ledger import canonical
from buildlog.methods import cases, units
from buildlog.methods.catalogue import methods
from buildlog.methods.declare import Input, Table
from buildlog.methods.formulas.tolerance_verdict import verdict
from buildlog.methods.result import NO_VERDICT, OUTSIDE, UNDECIDED, WITHIN, from_record
from buildlog.methods.run import run

CASES = cases.read_cases(Path(__file__).parent / "cases.toml")
EXAMPLES = [(method, example) for method in methods().values() for example in method.examples]


@pytest.mark.parametrize("case", CASES, ids=lambda case: case["id"])
def test_a_published_case_comes_out(case):
    assert cases.faults(case) == []


def test_every_method_has_a_published_case_or_says_that_it_has_none():
    for method in methods().values():
        assert not method.checked_against or any(case["method"] == method.key for case in CASES), method.key


@pytest.mark.parametrize(("method", "example"), EXAMPLES, ids=lambda one: getattr(one, "key", None))
def test_an_example_comes_out_and_its_record_prints_when_the_method_is_gone(method, example):
    result = run(method, example.given, bounded=False)
    for name, wanted in example.gives.items():
        found = result.output(name).value
        assert found == wanted if isinstance(wanted, str) else math.isclose(float(found), wanted, rel_tol=1e-5)
    recorded = result.as_recorded()
    assert canonical.encode(recorded) == rfc8785.dumps(recorded)
    assert from_record(json.loads(json.dumps(recorded))) == result
    assert from_record(recorded).digest == result.digest


@pytest.mark.parametrize("method", methods().values(), ids=lambda method: method.key)
def test_what_is_missing_is_named(method):
    with pytest.raises(Refused):
        run(method, {})


NONSENSE = ["12 bananas", "inf", "nan", "1e999", "\N{BANANA}", "5 kg ft", "1/0", "x" * 5000, "5 5 5"]


@pytest.mark.parametrize("nonsense", NONSENSE)
def test_nonsense_is_refused_at_its_field(nonsense):
    for method in methods().values():
        for one in method.inputs:
            if isinstance(one, Input) and not one.optional:
                rest = {other.name: "1" for other in method.inputs if isinstance(other, Input)}
                with pytest.raises(Refused):
                    run(method, rest | {one.name: nonsense})


@pytest.mark.parametrize(
    ("typed", "unit", "value"),
    [
        ("12,5", "kg", 12.5),
        ("1/2 inch", "mm", 12.7),
        ("1 1/2 in", "mm", 38.1),
        ("62 in·lb", "N*m", 7.005058),
        ("90 degF", "degC", 32.2222),
        ("1 imperial_gallon", "L", 4.54609),
        ("1 gallon", "L", 3.785412),
        ("100 hp", "kW", 74.57),
        ("100 PS", "kW", 73.54988),
        ("-78 inch", "mm", -1981.2),
        ("2700 1/min", "rpm", 2700),
    ],
)
def test_units_are_read_as_typed(typed, unit, value):
    # NIST SP 811 (2008), appendix B.8: inch, pound-force inch, gallons, horsepower; degree Fahrenheit.
    assert math.isclose(units.read(typed, unit).value, value, rel_tol=1e-5)


def test_a_pound_foot_is_no_torque_and_a_revolution_is_not_two_pi():
    with pytest.raises(Refused, match="A pound is a mass"):
        units.read("10 ft*lb", "N*m")
    with pytest.raises(Refused):
        units.read("50 Hz", "rpm")


def test_a_value_outside_the_bounds_of_the_form_is_asked_about():
    with pytest.raises(Refused, match="Is the unit right"):
        run(methods()["tip-mach"], {"diameter": "193 m", "speed": "2700"})


def test_a_limit_that_nobody_gave_makes_no_verdict():
    assert run(methods()["tip-mach"], {"diameter": "1.9", "speed": "2700"}).verdict == NO_VERDICT


def test_the_lowest_run_that_counts_decides():
    runs = [
        {"name": "left", "volume": "5", "time": "6 min"},
        {"name": "right", "volume": "5", "time": "8 min"},
        {"name": "meter blocked", "volume": "1", "time": "6 min", "counts": "no", "why": "meter was blocked"},
    ]
    result = run(methods()["fuel-flow"], {"consumption": "27", "feed": "gravity", "runs": runs})
    assert (result.output("flow").value, result.verdict) == ("37.5", OUTSIDE)


def test_a_measurement_too_coarse_to_tell_is_undecided():
    given = {"consumption": "27", "feed": "gravity", "volume": "4.05 ± 0.1 L", "time": "6 min"}
    assert run(methods()["fuel-flow"], given).verdict == UNDECIDED
    assert run(methods()["fuel-flow"], given | {"volume": "4.2 ± 0.1"}).verdict == WITHIN


@given(st.floats(-600, 10_900))
@settings(max_examples=60, deadline=None)
def test_the_atmosphere_agrees_with_a_reference_library(height):
    # fluids takes geometric height; z = r·h / (r − h), r = 6,356,766 m (U.S. Standard Atmosphere 1976).
    reference = fluids.atmosphere.ATMOSPHERE_1976(6_356_766 * height / (6_356_766 - height))
    ours = methods()["standard-atmosphere"].compute(altitude=height)
    assert math.isclose(ours["temperature"], reference.T, rel_tol=1e-5)
    assert math.isclose(ours["pressure"] * 100, reference.P, rel_tol=1e-4)
    assert math.isclose(ours["density"], reference.rho, rel_tol=1e-4)
    assert math.isclose(ours["sound_speed"], reference.v_sonic, rel_tol=1e-4)


@given(st.floats(1, 2000), st.floats(100, 9000))
@settings(max_examples=60, deadline=None)
def test_power_and_torque_are_one_formula_both_ways(torque, speed):
    power = methods()["shaft-power"].compute(torque=torque, speed=speed)["power"]
    back = methods()["torque-for-power"].compute(power=power, speed=speed)["torque"]
    assert math.isclose(back, torque, rel_tol=1e-12)


@given(st.decimals(-100, 100, places=3), st.decimals(0, 5, places=3), st.decimals(-50, 0, places=2))
@settings(max_examples=100, deadline=None)
def test_more_uncertainty_never_turns_a_doubt_into_a_verdict(value, spread, lower):
    first, wider = (verdict(value, each, lower, lower + 20) for each in (spread, spread + 1))
    assert wider == first or wider == "undecided"
    assert verdict(value, Decimal(0), lower, lower + 20) != "undecided"


def test_an_envelope_counts_its_edge_and_the_burn_off_line():
    square = [{"arm": arm, "weight": weight} for arm, weight in ((0, 100), (100, 100), (100, 500), (0, 500))]
    load = [{"name": "all", "weight": 400, "arm": 100}, {"name": "fuel", "weight": 100, "arm": 100, "burns": "yes"}]
    assert run(methods()["loading"], {"items": load, "envelope": square}).verdict == WITHIN
    load[0]["arm"] = 101
    assert run(methods()["loading"], {"items": load, "envelope": square}).verdict == OUTSIDE


def test_every_table_and_input_has_a_label_and_every_limit_a_source():
    for method in methods().values():
        assert method.source and method.not_covered, method.key
        assert all(limit.source for limit in method.limits), method.key
        for one in method.inputs:
            assert one.label and all(column.label for column in getattr(one, "columns", ())), method.key
            assert not isinstance(one, Table) or one.columns
