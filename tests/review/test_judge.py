"""The judge: what becomes of faults and absences, in which order, about what, in which words."""

import pytest

from schedtui.errors import Absent
from schedtui.review import judge
from schedtui.review.check import Check
from schedtui.review.finding import Fault, Measure, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import AIRFLOW, LOAD

TEXT = """\
[project]
title = "Judged"
units = "IP"
[[condition]]
name = "dry"
season = "cooling"
outdoor_db = 95
outdoor_wb = 70
[[condition]]
name = "humid"
season = "cooling"
outdoor_db = 85
outdoor_wb = 78
[[condition]]
name = "winter"
season = "heating"
outdoor_db = 5
outdoor_wb = 4
[[unit]]
tag = "AHU-1"
supply_airflow = 10000
outdoor_airflow = 10000
cool_lat_db = 55
cool_lat_wb = 54
cool_total = 900.0
"""


def a_check(**stated):
    return Check(
        **{"severity": Severity.CONFLICT, "sentence": "It holds.", "source": "a test", **stated}
    )


def a_fault(**stated):
    return Fault(**{"says": "a fault", "fields": ("cool_total",), **stated})


@pytest.fixture
def judged(one_unit, monkeypatch):
    """Judge a unit by some checks in the place of the real ones."""

    def judge_by(text=TEXT, **checks):
        named = {name.replace("_", "-"): check for name, check in checks.items()}
        monkeypatch.setattr(judge, "registered", lambda: named)
        return one_unit(text).own

    return judge_by


def needs(*fields):
    def find(case):
        for field in fields:
            case.unit.need(field)
        return ()

    return find


def raises(*keys):
    def find(_):
        raise Absent(*keys)

    return find


# Missing


def test_one_missing_finding_names_the_keys_that_are_absent(judged):
    check = a_check(judges=("cool_total",), cooling=raises("room_rh", "room_wb"))
    (found,) = judged(some_check=check)
    assert found.check == "some-check"
    assert found.severity is Severity.MISSING
    assert found.fields == ("room_rh", "room_wb")
    assert found.condition is None
    assert found.margin is None
    assert "room_rh" in found.message
    assert "room_wb" in found.message


def test_keys_missed_in_several_places_are_named_once_in_their_order(judged):
    check = a_check(
        judges=("cool_total",), unit=raises("room_db"), cooling=raises("room_rh", "room_db")
    )
    (found,) = judged(some_check=check)
    assert found.fields == ("room_db", "room_rh")


def test_nothing_is_missing_where_nobody_expects_the_check(judged):
    check = a_check(judges=("heat_total",), unit=needs(Unit.heat_airflow))
    assert judged(heat_check=check) == ()


def test_one_judged_key_typed_is_enough_to_expect_it(judged):
    check = a_check(judges=("heat_total", "cool_total"), unit=needs(Unit.heat_airflow))
    (found,) = judged(heat_check=check)
    assert found.fields == ("heat_airflow",)


def test_a_check_that_judges_no_key_is_never_missed(judged):
    assert judged(some_check=a_check(unit=raises("cool_total"))) == ()


def test_a_key_from_the_defaults_counts_as_typed(judged):
    text = TEXT.replace("[[condition]]", "[defaults]\nheat_total = 100\n[[condition]]", 1)
    check = a_check(judges=("heat_total",), unit=needs(Unit.heat_airflow))
    (found,) = judged(text, heat_check=check)
    assert found.severity is Severity.MISSING


def test_a_fault_found_before_a_gap_is_kept_beside_it(judged):
    def find(at):
        if at.name == "dry":
            raise Absent("room_db")
        yield a_fault()

    found = judged(some_check=a_check(judges=("cool_total",), cooling=find))
    assert [(one.severity, one.condition) for one in found] == [
        (Severity.CONFLICT, "humid"),
        (Severity.MISSING, None),
    ]


def test_a_reason_stands_in_the_message(judged):
    def find(_):
        raise Absent(why="the fan is on fire")

    (found,) = judged(some_check=a_check(judges=("cool_total",), unit=find))
    assert "the fan is on fire" in found.message
    assert found.fields == ()


# Order


def test_the_governing_condition_comes_first_then_the_file_s_order(judged):
    found = judged(some_check=a_check(cooling=lambda _: [a_fault()]))
    assert [one.condition for one in found] == ["humid", "dry"]


def test_worst_first_and_else_as_the_checks_are_named(judged):
    order = (Severity.CAUTION, Severity.SHORT, Severity.MISSING, Severity.CONFLICT)
    checks = {
        f"check_{place}": a_check(severity=severity, unit=lambda _: [a_fault()])
        for place, severity in enumerate((*order, Severity.SHORT))
    }
    found = judged(**checks)
    assert [one.severity.word for one in found] == [
        "short", "short", "conflict", "caution", "missing",
    ]  # fmt: skip
    assert [one.check for one in found[:2]] == ["check-1", "check-4"]


def test_what_explains_others_is_named_before_them(judged):
    found = judged(
        a_short=a_check(severity=Severity.SHORT, unit=lambda _: [a_fault()]),
        the_cause=a_check(severity=Severity.CAUTION, rank=1, unit=lambda _: [a_fault()]),
    )
    assert [one.check for one in found] == ["the-cause", "a-short"]


def test_a_rated_check_is_asked_at_the_rated_condition_alone(judged):
    asked = set()

    def find(at):
        asked.add(at.name)
        yield a_fault()

    text = TEXT.replace("cool_lat_db", "cool_eat_db = 95\ncool_eat_wb = 70\ncool_lat_db")
    (found,) = judged(text, some_check=a_check(rated=find))
    assert asked == {"dry"}
    assert found.condition == "dry"


def test_a_governing_check_is_asked_at_the_governing_condition_alone(judged):
    (found,) = judged(some_check=a_check(governing=lambda _: [a_fault()]))
    assert found.condition == "humid"


def test_a_unit_check_belongs_to_no_condition(judged):
    (found,) = judged(some_check=a_check(unit=lambda _: [a_fault()]))
    assert found.condition is None


def test_a_milder_fault_of_a_check_keeps_its_own_severity(judged):
    (found,) = judged(some_check=a_check(unit=lambda _: [a_fault(severity=Severity.CAUTION)]))
    assert found.severity is Severity.CAUTION


# Numbers and words


def test_the_margin_is_of_what_is_required(judged):
    fault = a_fault(scheduled=380.0, required=400.0, quantity=LOAD)
    (found,) = judged(some_check=a_check(unit=lambda _: [fault]))
    assert (found.scheduled, found.required, found.unit) == (380.0, 400.0, "MBH")
    assert found.margin == pytest.approx(-5.0)


def test_no_margin_where_nothing_is_required(judged):
    fault = a_fault(scheduled=380.0, required=0.0, quantity=LOAD)
    (found,) = judged(some_check=a_check(unit=lambda _: [fault]))
    assert found.margin is None


def test_a_scheduled_number_is_said_with_the_digits_it_was_typed_with(judged):
    fault = a_fault(
        says="{scheduled} against {required}", scheduled=900.0, required=1000.04, quantity=LOAD
    )
    text = TEXT.replace("900.0", "900")
    (found,) = judged(text, some_check=a_check(unit=lambda _: [fault]))
    assert found.message == "900 MBH against 1000.0 MBH"


def test_words_and_measures_go_into_the_sentence(judged):
    fault = a_fault(says="{what} {flow}", values={"what": "some", "flow": Measure(99.6, AIRFLOW)})
    (found,) = judged(some_check=a_check(unit=lambda _: [fault]))
    assert found.message == "some 100 cfm"


def test_braces_in_a_value_from_the_file_are_data(judged):
    fault = a_fault(says="{what}", values={"what": "{scheduled} {0} {{"})
    (found,) = judged(some_check=a_check(unit=lambda _: [fault]))
    assert found.message == "{scheduled} {0} {{"


# Within the printed digits


def total_below(least):
    def find(case):
        scheduled = case.unit.need(Unit.cool_total)
        if scheduled < least:
            yield a_fault(scheduled=scheduled, required=least, quantity=LOAD)

    return find


@pytest.mark.parametrize(
    ("typed", "least", "severity", "rounding"),
    [
        ("900", 900.4, Severity.CAUTION, True),  # 900 stands for 899.5 to 900.5
        ("900", 900.6, Severity.CONFLICT, False),
        ("900.0", 900.04, Severity.CAUTION, True),  # 900.0 for 899.95 to 900.05
        ("900.0", 900.4, Severity.CONFLICT, False),
    ],
)
def test_a_fault_within_the_digits_is_a_caution(judged, typed, least, severity, rounding):
    text = TEXT.replace("900.0", typed)
    (found,) = judged(text, some_check=a_check(unit=total_below(least)))
    assert (found.severity, found.rounding) == (severity, rounding)


def test_strict_rounding_reports_at_full_severity(judged):
    text = '[limits]\nrounding = "strict"\n' + TEXT.replace("900.0", "900")
    (found,) = judged(text, some_check=a_check(unit=total_below(900.4)))
    assert found.severity is Severity.CONFLICT


def test_a_check_of_what_has_no_digits_is_not_softened(judged):
    text = TEXT.replace("900.0", "900")
    (found,) = judged(text, some_check=a_check(reads_digits=False, unit=total_below(900.4)))
    assert found.severity is Severity.CONFLICT


# Of no unit


def test_a_condition_s_finding_is_about_the_condition(reviewed, monkeypatch):
    check = a_check(condition=lambda _: [a_fault(fields=("outdoor_wb",))])
    monkeypatch.setattr(judge, "registered", lambda: {"some-check": check})
    found = reviewed(TEXT).findings
    assert [one.condition for one in found] == ["dry", "humid", "winter"]
    assert found[1].paths == ("condition[humid].outdoor_wb",)


def test_a_schedule_s_finding_about_a_unit_stands_with_that_unit(reviewed, monkeypatch):
    def find(case):
        row = case.schedule.units[0].row_id
        yield a_fault(fields=("tag",), about=("unit", row))
        yield a_fault(fields=("altitude",), about=("project", case.schedule.project.row_id))
        yield a_fault(fields=("unit",))

    monkeypatch.setattr(judge, "registered", lambda: {"some-check": a_check(schedule=find)})
    found = reviewed(TEXT)
    (unit,) = found.units.values()
    assert [one.paths for one in unit.findings] == [("tag",)]
    assert [one.paths for one in found.findings] == [("project.altitude",), ("unit",)]
    assert len(found.all_findings) == 3
