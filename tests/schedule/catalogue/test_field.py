from __future__ import annotations

from schedtui.schedule.catalogue.column import Column, own_field
from schedtui.schedule.catalogue.field import Field, Group, In
from schedtui.schedule.catalogue.table import Table
from schedtui.schedule.typed import Typed
from schedtui.units import AIRFLOW

_air = In(Group.AIR)


class Damper(Table):
    """A table for these tests."""

    __slots__ = ()
    airflow = _air.number(AIRFLOW, "Airflow", "FLOW", "Air through it.")
    count = _air.count_or(1, "Count", "NO.", "How many there are.", least=1)


def test_a_field_is_itself_on_the_class_and_a_value_on_a_row():
    row = Damper(1, "IP", {"airflow": Typed("500", 500.0, "500")})
    assert isinstance(Damper.airflow, Field)
    assert (row.airflow, row.count) == (500.0, 1.0)


def test_a_field_takes_its_key_from_its_name():
    assert list(Damper.catalogue) == ["airflow", "count"]
    assert [field.key for field in Damper.catalogue.values()] == ["airflow", "count"]


def test_a_column_of_the_project_is_a_field_like_any_other():
    cells = {key: Typed(text, text, "") for key, text in (("key", "filter"), ("heading", "Filter"))}
    field = own_field(Column(1, "IP", cells))
    assert (field.key, field.label, field.short, field.group) == (
        "filter",
        "Filter",
        "FILTER",
        Group.OWN,
    )
    assert field.kind.enter("MERV 13", "IP").value == "MERV 13"
    assert field.quantity is None
