from __future__ import annotations

import pytest

from schedtui.schedule.edit import SetCell
from schedtui.schedule.load import load
from schedtui.schedule.typed import Typed
from schedtui.schedule.view import view

HEAD = '[project]\ntitle = "Mill"\nunits = "IP"\n\n'


def unit_of(*unit, defaults=()):
    """Return the unit of a schedule with these lines of defaults and of the unit."""
    lines = "[defaults]\n" + "\n".join(defaults) + '\n\n[[unit]]\ntag = "A"\n' + "\n".join(unit)
    return view(load(HEAD + lines + "\n")).units[0]


def test_an_empty_schedule_has_the_defaults_of_every_table():
    schedule = view(load(HEAD))
    assert (schedule.system, schedule.project.airflow_basis) == ("IP", "standard")
    assert (schedule.project.altitude, schedule.project.pressure) == (None, None)
    assert schedule.limits.agreement == 1.0
    assert schedule.columns == schedule.conditions == schedule.plants == schedule.units == ()


def test_a_default_holds_for_a_unit_that_does_not_state_its_own():
    defaults = ("room_db = 75", 'cool_kind = "dx"')
    assert unit_of(defaults=defaults).room_db == 75
    assert unit_of(defaults=defaults).cool_kind == "dx"
    assert unit_of("room_db = 72", defaults=defaults).room_db == 72


@pytest.mark.parametrize(("one", "other"), [("room_rh", "room_wb"), ("return_rh", "return_wb")])
def test_a_unit_s_own_key_displaces_the_default_of_its_alternative(one, other):
    for stated, displaced in ((one, other), (other, one)):
        unit = unit_of(f"{stated} = 60", defaults=(f"{displaced} = 50", "room_db = 75"))
        assert unit.value_of(type(unit).catalogue[stated]) == 60
        assert unit.typed(displaced) is None
        assert unit.room_db == 75


def test_an_alternative_that_cannot_be_read_displaces_the_default_all_the_same():
    unit = unit_of("room_wb = sixty", defaults=("room_rh = 50",))
    assert unit.room_rh is unit.room_wb is None


def test_a_room_s_humidity_does_not_displace_that_of_the_return_air():
    assert unit_of("room_wb = 62.5", defaults=("return_rh = 50",)).return_rh == 50


def test_two_alternatives_among_the_defaults_both_hold():
    assert unit_of(defaults=("room_rh = 50", "room_wb = 62")).stated("room_rh", "room_wb")


def test_a_unit_may_do_without_a_default():
    defaults = ("room_db = 75", "room_rh = 50")
    unit = unit_of('without = ["room_rh"]', defaults=defaults)
    assert (unit.room_db, unit.room_rh) == (75, None)
    unit = unit_of('without = ["room_rh"]', "room_rh = 55", defaults=defaults)
    assert unit.room_rh == 55


def test_doing_without_may_be_a_default_itself():
    defaults = ("room_db = 75", "room_rh = 50", 'without = ["room_rh"]')
    assert unit_of(defaults=defaults).room_rh is None
    assert unit_of("without = []", defaults=defaults).room_rh == 50


def test_a_tag_and_remarks_are_never_a_default():
    unit = unit_of(defaults=('remarks = ["1"]', 'tag = "B"'))
    assert (unit.tag, unit.remarks) == ("A", None)


def test_a_key_that_is_none_is_no_default():
    unit = unit_of(defaults=("weight = 5",))
    assert unit.typed("weight") is None


def test_a_default_that_cannot_be_read_answers_with_nothing():
    unit = unit_of(defaults=("room_db = warm",))
    assert unit.room_db is None
    assert unit.stated("room_db")
    assert list(unit.bad_keys()) == []


def test_an_earlier_view_lends_the_units_that_have_not_changed():
    document = load(HEAD + '[defaults]\nroom_db = 75\n[[unit]]\ntag = "A"\n[[unit]]\ntag = "B"\n')
    before = view(document)
    cell = Typed("9440", 9440.0, "9440")
    edited, _ = SetCell("unit", before.units[0].row_id, "supply_airflow", cell).apply(document)
    after = view(edited, before)
    assert after.units[0].supply_airflow == 9440
    assert after.units[1] is before.units[1]
    warmer = Typed("76", 76.0, "76")
    defaults = document.single["defaults"].row_id
    changed, _ = SetCell("defaults", defaults, "room_db", warmer).apply(edited)
    assert [unit.room_db for unit in view(changed, after).units] == [76, 76]


def test_a_view_in_another_unit_system_lends_nothing():
    text = HEAD + '[[unit]]\ntag = "A"\n'
    before = view(load(text))
    after = view(load(text.replace("IP", "SI")), before)
    assert [unit.system for unit in after.units] == ["SI"]
