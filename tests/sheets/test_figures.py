"""What a cell states; conversions against NIST SP 811 factors, worked by hand."""

from __future__ import annotations

import pytest

from schedtui.errors import AmountError
from schedtui.schedule.catalogue.unit import Unit
from schedtui.sheets.figures import halves, is_nothing, stated
from schedtui.sheets.grid import Cell

NUMBERS = [
    ("supply_airflow", "9,440", "IP", None, False, "9440"),
    ("supply_airflow", "9 440", "SI", None, False, "9440"),
    ("supply_airflow", "9'440", "SI", None, False, "9440"),
    ("supply_airflow", "9.440", "SI", None, True, "9440"),
    ("cool_eat_db", "26,7", "SI", None, True, "26.7"),
    ("cool_total", "1.115,80", "SI", None, True, "1115.80"),
    ("cool_eat_db", "66.0", "IP", None, False, "66.0"),
    ("motor_power", "7-1/2", "IP", None, False, "7.5"),
    ("motor_power", "7 1/2 HP", "IP", None, False, "7.5"),
    ("motor_power", "7½", "IP", None, False, "7.5"),
    ("motor_power", "3/4", "IP", None, False, "0.75"),
    ("motor_efficiency", "93.0%", "IP", None, False, "93.0"),
    ("supply_airflow", "9440*", "IP", None, False, "9440"),
    ("supply_airflow", "9440 (2)", "IP", None, False, "9440"),
    ("cool_eat_db", "80.1 °F", "IP", None, False, "80.1"),
    ("cool_eat_db", "−5", "IP", None, False, "-5"),
    ("cool_rows", "6", "IP", None, False, "6"),
    # 3.2 kW by 3.412142 MBH a kW; 80.1 °F less 32, by 1.8; 9440 cfm by 0.4719474 L/s.
    ("cool_total", "3.2", "IP", "kW", False, "10.9"),
    ("cool_eat_db", "80.1", "SI", "°F", False, "26.7"),
    ("supply_airflow", "9440", "SI", "cfm", False, "4455"),
    # 125 Pa by 1/249.0889 in. wg: three figures were stated, so three are kept.
    ("cool_air_drop", "125", "IP", "Pa", False, "0.502"),
    ("supply_airflow", "16038", "SI", "m³/h", False, "4455.0"),
]


@pytest.mark.parametrize(("key", "text", "system", "unit", "comma", "stored"), NUMBERS)
def test_a_number_is_stored_with_its_digits(key, text, system, unit, comma, stored):
    found = stated(Cell(text, "B2"), Unit.catalogue[key], system, unit, comma=comma)
    assert found.typed.toml == stored


def test_what_was_converted_or_mended_is_handed_back():
    field = Unit.catalogue["cool_total"]
    assert stated(Cell("3.2", "B2"), field, "IP", "kW", comma=False).was == "3.2 kW"
    assert stated(Cell("3.2 kW", "B2"), field, "IP", None, comma=False).was == "3.2 kW"
    assert stated(Cell("395", "B2"), field, "IP", "MBH", comma=False).was == ""
    assert stated(Cell("7-1/2", "B2"), Unit.catalogue["motor_power"], "IP", None, comma=False).was


@pytest.mark.parametrize(
    ("key", "text"),
    [
        ("supply_airflow", "TBD"),
        ("supply_airflow", "94,40"),
        ("supply_airflow", "-5"),
        ("supply_airflow", "9440 °F"),
        ("supply_airflow", "9440/4200"),
        ("supply_airflow", "1e999999999"),
        ("supply_airflow", "9" * 5000),
        ("supply_airflow", "=1+2"),
        ("supply_airflow", "1/0"),
        ("cool_eat_db", "999"),
        ("cool_rows", "6.5"),
        ("cool_kind", "5WC"),
        ("motor_in_airstream", "perhaps"),
    ],
)
def test_what_cannot_be_a_value_is_refused(key, text):
    with pytest.raises(AmountError):
        stated(Cell(text, "B2"), Unit.catalogue[key], "IP", None, comma=False)


@pytest.mark.parametrize(
    ("key", "text", "value"),
    [
        ("cool_kind", "CHW", "chilled water"),
        ("heat_kind", "ELEC.", "electric"),
        ("fan_position", "DRAW-THRU", "draw-through"),
        ("motor_in_airstream", "Yes", True),
        ("remarks", "1, 3", ("1", "3")),
        ("remarks", "1 & 3", ("1", "3")),
        ("remarks", "VFD BY OTHERS, SEE SPEC", ("VFD BY OTHERS, SEE SPEC",)),
        ("remarks", 'a\n"b"', ("a", '"b"')),
        ("serves", "EAST\nWING", "EAST WING"),
    ],
)
def test_words_are_taken_for_what_they_mean(key, text, value):
    found = stated(Cell(text, "B2"), Unit.catalogue[key], "IP", None, comma=False)
    assert found.typed.value == value


@pytest.mark.parametrize("text", ["", "-", "--", "—", "N/A", "n.a.", "NA"])
def test_dashes_and_the_like_are_nothing(text):
    assert is_nothing(text)


@pytest.mark.parametrize("text", ["0", "TBD", "N", "-1"])
def test_what_says_something_is_not_nothing(text):
    assert not is_nothing(text)


@pytest.mark.parametrize(
    ("text", "parts"),
    [
        ("80.1/66.9", ["80.1", "66.9"]),
        ("80.1 / 66.9", ["80.1", "66.9"]),
        ("80.1\n66.9", ["80.1", "66.9"]),
        ("5.2/7-1/2", ["5.2", "7-1/2"]),
        ("7-1/2/5.2", ["7-1/2", "5.2"]),
        ("80.1", None),
        ("7-1/2", None),
        ("460/3/60", None),
    ],
)
def test_two_values_in_a_cell_are_parted(text, parts):
    assert halves(text, 2) == parts
