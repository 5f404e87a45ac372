"""The words of findings: digits as typed, units, bands, and what is lacking."""

import pytest

from schedtui.errors import Absent
from schedtui.review.finding import Fault, Measure
from schedtui.review.rounding import Explained
from schedtui.review.wording import band, label, lack, sentence
from schedtui.schedule.load import load
from schedtui.schedule.view import view
from schedtui.units import LOAD, TEMPERATURE


@pytest.fixture
def unit():
    def made(line, units="IP"):
        text = f'[project]\ntitle = "Words"\nunits = "{units}"\n[[unit]]\ntag = "AHU-1"\n{line}\n'
        (only,) = view(load(text)).units
        return only

    return made


def fault(scheduled=None, required=None, quantity=LOAD, **values):
    says = values.pop("says", "scheduled {scheduled}, needs {required}")
    return Fault(says, ("cool_total",), scheduled, required, quantity, values)


@pytest.mark.parametrize("typed", ["380", "380.0", "380.00", "3.8e2"])
def test_a_scheduled_number_keeps_the_digits_that_were_typed(unit, typed):
    told = sentence(fault(380.0, 400.0), unit(f"cool_total = {typed}"))
    assert told == f"scheduled {typed} MBH, needs 400.0 MBH"


def test_a_number_that_stands_nowhere_has_its_quantity_s_digits(unit):
    told = sentence(fault(380.04, 400.0), unit("cool_total = 380"))
    assert told == "scheduled 380.0 MBH, needs 400.0 MBH"


def test_numbers_have_the_system_s_unit(unit):
    assert sentence(fault(38.0, 40.0), unit("cool_total = 38.0", "SI")).count("kW") == 2


def test_further_numbers_and_words_are_put_in(unit):
    of = fault(says="{what} at {air}", what="coil", air=Measure(54.96, TEMPERATURE))
    assert sentence(of, unit("")) == "coil at 55.0 °F"


def test_braces_in_what_is_put_in_are_left_alone(unit):
    assert sentence(fault(says="{what}", what="{scheduled} {0}"), unit("")) == "{scheduled} {0}"


def test_a_load_s_band_is_told_in_percent_of_what_is_required(unit):
    told = band(Explained("cool_lat_wb", 12.0), fault(380.0, 400.0), unit(""))
    assert "±3.0 %" in told or "±3 %" in told
    assert "(cool_lat_wb)" in told


def test_a_temperature_s_band_is_told_in_degrees(unit):
    told = band(Explained("cool_eat_db", 0.5), fault(81.4, 80.0, TEMPERATURE), unit(""))
    assert "±0.5 °F" in told


def test_what_is_lacking_is_named_once_with_its_key(unit):
    absences = [Absent("room_db"), Absent("room_rh", "room_db")]
    told, keys = lack(absences, unit(""))
    assert keys == ("room_db", "room_rh")
    assert told.startswith("not judged: ")
    assert told.count("(room_db)") == told.count("(room_rh)") == 1


def test_a_reason_takes_the_place_of_keys(unit):
    told, keys = lack([Absent("supply_airflow", why="the supply airflow is 0")], unit(""))
    assert told == "not judged: the supply airflow is 0"
    assert keys == ("supply_airflow",)


def test_one_reason_is_told_once(unit):
    told, _ = lack([Absent(why="no such air"), Absent(why="no such air")], unit(""))
    assert told == "not judged: no such air"


@pytest.mark.parametrize("key", ["cool_total", "outdoor_wb", "altitude"])
def test_a_key_has_its_label_whatever_table_it_stands_in(unit, key):
    assert label(unit(""), key).endswith(f" ({key})")


def test_a_key_of_no_table_stands_for_itself(unit):
    assert label(unit(""), "filter") == "filter"
