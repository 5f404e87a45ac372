"""A review as JSON, against the contract that scripts rely on."""

import json

import pytest

from schedtui.report.json import review_object

STATE = {"db", "wb", "dp", "rh", "w", "h", "v"}
STATES = {"outdoor", "return", "mixed", "coil_entering", "coil_leaving", "supply", "room"}
FIGURES = {
    "supply_mass", "outdoor_mass", "coil_mass", "outdoor_fraction", "coil_total", "coil_sensible",
    "coil_latent", "shr", "tons", "adp", "bypass_factor", "condensate", "fan_heat", "fan_rise",
    "room_sensible_met", "room_latent_met", "bypass",
}  # fmt: skip
FINDING = {
    "check": str, "severity": str, "condition": str, "fields": list, "scheduled": float,
    "required": float, "margin": float, "unit": str, "message": str, "accepted": bool,
}  # fmt: skip


@pytest.fixture(scope="module")
def made(works):
    text = json.dumps(review_object(works, "works.toml"), allow_nan=False)
    return json.loads(text)


def finding(findings, check):
    return next(one for one in findings if one["check"] == check)


def test_the_head(made):
    assert made["file"] == "works.toml"
    assert made["format"] == 1
    assert made["project"] == {"title": "Example [b]Works[/b]", "units": "IP", "pressure": 13.4}
    assert set(made) >= {
        "file", "format", "project", "counts", "units", "plants", "findings", "totals",
    }  # fmt: skip


def test_counts_are_of_the_findings_that_stand_there(made):
    found = [one for unit in made["units"] for one in unit["findings"]] + made["findings"]
    assert set(made["counts"]) == {
        "short", "conflict", "caution", "missing", "clear", "accepted", "rounding",
    }  # fmt: skip
    for severity in ("short", "conflict", "caution", "missing"):
        there = sum(one["severity"] == severity for one in found)
        assert made["counts"][severity] == there
    assert made["counts"]["clear"] == sum(unit["status"] == "clear" for unit in made["units"])


def test_units_come_in_file_order_those_of_a_tag_used_twice_too(made):
    assert [unit["tag"] for unit in made["units"]] == ["AHU-1", "AHU-1", "=1+1 | *2* 冷水"]


def test_a_cooling_condition_has_every_state_and_figure(made):
    condition = made["units"][0]["conditions"]["summer peak"]
    assert condition["season"] == "cooling"
    assert set(condition) >= STATES | FIGURES
    for name in STATES:
        assert set(condition[name]) == STATE
    for name in FIGURES:
        assert isinstance(condition[name], float)


def test_what_a_unit_does_not_have_is_not_there(made):
    condition = made["units"][0]["conditions"]["summer peak"]
    assert not {"recovered", "reheat_load"} & set(condition)


def test_recovered_air_and_reheat_are_there_where_a_unit_has_them(reviewed):
    text = """
[project]
title = "Recovery"
units = "IP"
airflow_basis = "standard"
[[condition]]
name = "summer"
season = "cooling"
outdoor_db = 95
outdoor_wb = 75
[[unit]]
tag = "AHU-1"
supply_airflow = 10000
outdoor_airflow = 5000
room_db = 75
room_rh = 50
recovery_sensible = 70
fan_rise = 0
cool_lat_db = 55
cool_lat_wb = 54
reheat_lat_db = 65
"""
    at = review_object(reviewed(text), "x")["units"][0]["conditions"]["summer"]
    assert at["recovered"]["db"] == pytest.approx(95 - 0.7 * 20)
    # 45 000 lb/h from 55 to 65 °F at 0.00866 lb/lb: 10 · (0.24 + 0.444 · 0.00866) Btu/lb.
    assert at["reheat_load"] == pytest.approx(45 * 10 * (0.24 + 0.444 * 0.00866), rel=1e-3)


def test_a_unit_tells_what_governs_and_what_it_was_rated_at(made):
    # Outdoors at 84/77 °F there is more enthalpy than at 96/75 °F.
    assert made["units"][0]["governing"] == "humid"
    assert made["units"][0]["rated"] == "humid"


def test_what_could_not_be_computed_is_not_there(made):
    unit = made["units"][1]
    assert "governing" not in unit
    assert "rated" not in unit
    assert unit["conditions"]["winter"]["season"] == "heating"
    assert None not in unit["conditions"]["winter"].values()


def test_air_that_cannot_be_has_no_state(made):
    assert "outdoor" not in made["units"][1]["conditions"]["winter"]


def test_only_the_conditions_that_apply(made):
    assert list(made["units"][0]["conditions"]) == ["summer peak", "humid", "winter"]
    assert list(made["units"][1]["conditions"]) == ["winter"]


def test_a_finding_has_the_contract_s_keys_and_their_types(made):
    short = finding(made["units"][0]["findings"], "cool-total-short")
    assert set(short) >= set(FINDING)
    for key, kind in FINDING.items():
        assert isinstance(short[key], kind)
    assert short["condition"] == "humid"
    assert short["fields"] == ["cool_total"]
    assert short["scheduled"] == 300.0
    assert short["unit"] == "MBH"
    assert short["margin"] == pytest.approx(
        (short["scheduled"] - short["required"]) / short["required"] * 100
    )
    assert short["accepted"] is False


def test_what_rounding_alone_explains_says_so(reviewed):
    # 45 000 lb/h from 80/67 to 55/54 °F carry 399.5 MBH; a whole-degree leaving wet bulb leaves
    # room for some 10 MBH, so 390 may be enough.
    text = """
[project]
title = "Digits"
units = "IP"
airflow_basis = "standard"
[[unit]]
tag = "AHU-1"
supply_airflow = 10000
return_db = 80
return_wb = 67
fan_rise = 0
cool_lat_db = 55
cool_lat_wb = 54
cool_total = 390
"""
    made = review_object(reviewed(text), "digits.toml")
    within = finding(made["units"][0]["findings"], "cool-total-short")
    assert within["severity"] == "caution"
    assert within["rounding"] is True
    assert made["counts"]["rounding"] == 1
    assert made["counts"]["short"] == 0


def test_the_status_is_the_worst_severity(made):
    order = ["short", "conflict", "caution", "missing"]
    for unit in made["units"]:
        severities = {one["severity"] for one in unit["findings"] if not one["accepted"]}
        worst = next((one for one in order if one in severities), "clear")
        assert unit["status"] == worst


def test_a_finding_of_no_condition_has_none(made):
    assert "condition" not in finding(made["units"][0]["findings"], "sensible-above-total")


def test_a_finding_of_no_unit_stands_above_with_its_path(made):
    wet = finding(made["findings"], "wet-above-dry")
    assert wet["fields"] == ["condition[winter].outdoor_wb", "condition[winter].outdoor_db"]
    assert (wet["scheduled"], wet["required"]) == (90.0, 5.0)


def test_a_duplicate_tag_stands_with_its_unit(made):
    assert finding(made["units"][1]["findings"], "tag-duplicate")["fields"] == ["tag"]


def test_totals_count_quantities(made):
    totals = made["totals"]
    assert totals["supply_airflow"] == 10_000 + 2 * 4_000 + 9_000
    assert totals["outdoor_airflow"] == 2_000
    first, third = (made["units"][place] for place in (0, 2))
    governing = [one["conditions"][one["governing"]]["tons"] for one in (first, third)]
    assert totals["tons"] == pytest.approx(sum(governing))


def test_numbers_have_full_precision(made):
    total = made["units"][0]["conditions"]["humid"]["coil_total"]
    assert total != round(total, 3)


def test_a_ton_is_12_000_btu_an_hour_in_both_systems(reviewed):
    text = """
[project]
title = "Metric"
units = "SI"
[[unit]]
tag = "AHU-1"
supply_airflow = 5000
return_db = 26
return_wb = 19
cool_lat_db = 13
cool_lat_wb = 12.5
"""
    made = review_object(reviewed(text), "metric.toml")
    at = made["units"][0]["conditions"]["room"]
    assert at["coil_total"] / at["tons"] == pytest.approx(3.51685284, rel=1e-7)
    assert at["supply_mass"] == pytest.approx(6.0)  # kg/s: 5 m³/s at 1.2 kg/m³
    assert made["project"]["pressure"] == pytest.approx(101.325)


def test_an_empty_schedule_is_an_object_all_the_same(reviewed):
    made = review_object(reviewed('[project]\ntitle = "Empty"\nunits = "SI"\n'), "empty.toml")
    assert made["units"] == []
    assert made["totals"] == {"tons": 0.0, "supply_airflow": 0.0, "outdoor_airflow": 0.0}
    assert {one["severity"] for one in made["findings"]} == {"missing"}


def test_the_caution_goes_along(made):
    assert "licensed engineer" in made["caution"]
