from __future__ import annotations

import pytest

from schedtui.errors import Absent
from schedtui.schedule.catalogue.unit import Unit
from schedtui.schedule.typed import Typed

GOOD = Typed("9440", 9440.0, "9440")
OTHER = Typed("5000", 5000.0, "5000")
BAD = Typed("9,440", None, "9,440", "is not a number")


def test_a_row_answers_with_its_own_cell_then_the_inherited_one_then_the_default():
    assert Unit(1, "IP", {"supply_airflow": GOOD}, {"supply_airflow": OTHER}).supply_airflow == 9440
    assert Unit(1, "IP", {}, {"supply_airflow": OTHER}).supply_airflow == 5000
    assert Unit(1, "IP", {}).supply_airflow is None
    assert Unit(1, "IP", {}).quantity == 1


def test_a_bad_cell_answers_with_nothing_and_hides_what_is_inherited():
    unit = Unit(1, "IP", {"supply_airflow": BAD}, {"supply_airflow": OTHER})
    assert unit.supply_airflow is None
    assert unit.stated("supply_airflow")
    assert list(unit.bad_keys()) == ["supply_airflow"]


def test_what_is_needed_and_not_there_is_named():
    with pytest.raises(Absent) as absent:
        Unit(1, "IP", {}).need(Unit.supply_airflow)
    assert absent.value.keys == ("supply_airflow",)
    assert Unit(1, "IP", {"supply_airflow": GOOD}).need(Unit.supply_airflow) == 9440


def test_a_default_does_not_stand_in_for_a_bad_cell_where_it_must_not():
    bad = Typed("no", None, "no", "is not a number")
    unit = Unit(1, "IP", {"quantity": bad})
    assert unit.quantity == 1
    with pytest.raises(Absent) as absent:
        unit.refuse_bad(Unit.quantity)
    assert absent.value.keys == ("quantity",)
    Unit(1, "IP", {}).refuse_bad(Unit.quantity)


def test_a_row_with_other_values_keeps_the_rest():
    unit = Unit(7, "SI", {"supply_airflow": GOOD, "cool_total": OTHER}, {"room_db": OTHER})
    tried = unit.replaced({"cool_total": 300.0})
    assert (tried.row_id, tried.system) == (7, "SI")
    assert (tried.cool_total, tried.supply_airflow, tried.room_db) == (300.0, 9440.0, 5000.0)
    assert unit.cool_total == 5000
