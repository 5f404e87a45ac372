"""Findings: severities in their order, margins, and where a field stands."""

import pytest

from schedtui.review.finding import (
    WORST_FIRST,
    Fault,
    Finding,
    Measure,
    Severity,
    Subject,
    in_order,
    margin,
)
from schedtui.units import AIRFLOW, LOAD, RATIO, TEMPERATURE

UNIT = Subject("unit", 1, "AHU-1")


def test_severities_worst_first_in_the_contract_s_words():
    assert [one.word for one in WORST_FIRST] == ["short", "conflict", "caution", "missing"]
    assert Severity.SHORT > Severity.CONFLICT > Severity.CAUTION > Severity.MISSING


@pytest.mark.parametrize(
    ("scheduled", "required", "percent"),
    [(380, 400, -5.0), (420, 400, 5.0), (400, 400, 0.0), (0, 400, -100.0)],
)
def test_a_margin_is_percent_of_what_is_required(scheduled, required, percent):
    assert margin(scheduled, required) == pytest.approx(percent)


def test_of_nothing_required_there_is_no_margin():
    assert margin(380, 0) is None


@pytest.mark.parametrize(
    ("table", "label", "path"),
    [
        ("unit", "AHU-1 (2nd)", "cool_total"),
        ("file", "file", "cool_total"),
        ("project", "project", "project.cool_total"),
        ("limits", "limits", "limits.cool_total"),
        ("condition", "condition summer peak", "condition[summer peak].cool_total"),
        ("plant", "plant chilled water", "plant[chilled water].cool_total"),
        ("condition", "condition condition", "condition[condition].cool_total"),
    ],
)
def test_where_a_key_stands(table, label, path):
    assert Subject(table, 1, label).path("cool_total") == path


def test_a_finding_tells_where_all_its_fields_stand():
    subject = Subject("condition", 3, "condition summer")
    found = Finding("a-check", Severity.CONFLICT, subject, ("outdoor_wb", "outdoor_db"), "…")
    assert found.paths == ("condition[summer].outdoor_wb", "condition[summer].outdoor_db")


def test_findings_are_read_causes_first_then_worst_first():
    short = Finding("b-short", Severity.SHORT, UNIT, (), "", rank=6)
    caution = Finding("c-caution", Severity.CAUTION, UNIT, (), "", rank=6)
    cause = Finding("d-cause", Severity.CONFLICT, UNIT, (), "", rank=1)
    unmade = Finding("e-cause", Severity.MISSING, UNIT, (), "", rank=1)
    within = Finding("f-cause", Severity.CAUTION, UNIT, (), "", rank=1, rounding=True)
    found = in_order([caution, unmade, within, short, cause])
    assert [one.check[0] for one in found] == ["d", "b", "c", "f", "e"]


@pytest.mark.parametrize(
    ("value", "quantity", "ip", "si"),
    [
        (380.04, LOAD, "380.0 MBH", "380.0 kW"),
        (10000.4, AIRFLOW, "10000 cfm", "10000 L/s"),
        (55.0, TEMPERATURE, "55.0 °F", "55.0 °C"),
        (0.7, RATIO, "0.700", "0.700"),
    ],
)
def test_a_measure_reads_with_its_unit(value, quantity, ip, si):
    assert Measure(value, quantity).text("IP") == ip
    assert Measure(value, quantity).text("SI") == si


def test_a_fault_states_no_numbers_unless_it_has_some():
    fault = Fault("a fault", ("tag",))
    assert (fault.scheduled, fault.required, fault.severity, fault.about) == (None,) * 4
