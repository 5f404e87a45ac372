"""What a person types into a cell."""

from __future__ import annotations

import contextlib
import math
import tomllib

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from schedtui import units
from schedtui.errors import AmountError
from schedtui.units import Amount, decimals, format_number, read_amount


@pytest.mark.parametrize(
    ("typed", "quantity", "system", "text"),
    [
        # Expected from NIST SP 811, appendix B.8 (from memory), rounded to the field's digits.
        ("3.2 kW", units.LOAD, "IP", "10.9"),  # 3.2 / 0.2930711 = 10.919
        ("4500 L/s", units.AIRFLOW, "IP", "9535"),  # 4500 / 0.4719474 = 9534.96
        ("80 F", units.TEMPERATURE, "SI", "26.7"),
        ("12.5kPa", units.WATER_DROP, "IP", "4.18"),  # 12.5 / 2.989067 = 4.182
        ("20 m3/h", units.WATER_FLOW, "IP", "88.1"),  # 5.5556 / 0.0630902 = 88.06
        ("7 l/s", units.AIRFLOW, "IP", "15"),  # 14.83
        ("0.3 inwg", units.AIR_PRESSURE, "SI", "75"),  # 74.73
        ("10 F", units.TEMPERATURE_DIFFERENCE, "SI", "5.6"),
        ("10 C", units.TEMPERATURE_DIFFERENCE, "IP", "18.0"),
        ("10 C", units.TEMPERATURE, "IP", "50.0"),
        ("15 psi", units.STEAM_PRESSURE, "SI", "103.4"),  # gauge stays gauge
        ("20 tons", units.LOAD, "SI", "70.3"),  # 70.337
        ("7.5 hp", units.MOTOR_POWER, "SI", "5.59"),  # 5.5927
        ("29.92 in. Hg", units.STATION_PRESSURE, "IP", "14.695"),  # 14.6954
        ("5280 ft", units.ALTITUDE, "SI", "1609.3"),  # a mile is 1 609.344 m
        ("−40 °C", units.TEMPERATURE, "IP", "-40.0"),
        ("32 F", units.TEMPERATURE, "SI", "0.0"),
        ("60 gr/lb", units.HUMIDITY_RATIO, "IP", "0.00857"),
        ("9,440 L/s", units.AIRFLOW, "IP", "20002"),  # 9440 / 0.4719474 = 20002.2
        ("1.5e1 kW", units.LOAD, "IP", "51.2"),  # 51.18
    ],
)
def test_a_number_with_a_unit_becomes_the_projects(typed, quantity, system, text):
    amount = read_amount(typed, quantity, system)
    assert amount.text == text
    assert amount.value == float(text)
    assert amount.note.endswith(f" = {text} {quantity.unit(system)}")


def test_the_note_names_both_units():
    assert read_amount("3.2 kw", units.LOAD, "IP").note == "3.2 kW = 10.9 MBH"
    assert read_amount("70 deg f", units.TEMPERATURE, "SI").note == "70 °F = 21.1 °C"


@pytest.mark.parametrize(
    ("typed", "quantity", "system", "amount"),
    [
        ("66.0", units.TEMPERATURE, "IP", Amount("66.0", 66.0)),
        ("66.0 °F", units.TEMPERATURE, "IP", Amount("66.0", 66.0)),
        ("  66.00F ", units.TEMPERATURE, "IP", Amount("66.00", 66.0)),
        ("9,440", units.AIRFLOW, "IP", Amount("9440", 9440.0, "9,440 = 9440")),
        ("9,440 cfm", units.AIRFLOW, "IP", Amount("9440", 9440.0, "9,440 = 9440")),
        ("+5", units.TEMPERATURE, "IP", Amount("+5", 5.0)),
        ("−5", units.TEMPERATURE, "SI", Amount("-5", -5.0)),
        ("0x10", units.COUNT, "IP", Amount("0x10", 16.0)),
        ("7.5 bhp", units.MOTOR_POWER, "IP", Amount("7.5", 7.5)),
        ("3.2 kW", units.LOAD, "SI", Amount("3.2", 3.2)),
        ("250 kBtu/h", units.LOAD, "IP", Amount("250", 250.0)),
        ("12 fpi", units.FIN_DENSITY, "SI", Amount("12", 12.0)),
        ("35%", units.PERCENT, "IP", Amount("35", 35.0)),
        ("6.4\N{NO-BREAK SPACE}m²", units.AREA, "SI", Amount("6.4", 6.4)),
    ],
)
def test_a_number_in_the_projects_unit_stands_as_typed(typed, quantity, system, amount):
    assert read_amount(typed, quantity, system) == amount


def test_minus_zero_is_zero():
    amount = read_amount("-0.0", units.TEMPERATURE, "IP")
    assert amount.text == "0.0"
    assert math.copysign(1, amount.value) == 1


@pytest.mark.parametrize(
    ("typed", "why"),
    [
        ("", "nothing is typed; accepted: a number in cfm, or one with L/s, m³/s, m³/h"),
        ("   ", "nothing is typed"),
        ("nan", "is not a number; accepted: a number in cfm"),
        ("inf", "is not a number"),
        ("-inf", "is not a number"),
        ("abc", "is not a number"),
        ("- 5", "is not a number"),
        ("1e999", "too large"),
        ("1e300 m³/s", "too large"),
        ("1e-30 L/s", "too small"),
        ("9" * 101, "too long"),
        ("9,44", "type 9.44 or 944"),
        ("1/2", "is a fraction; type 0.5$"),
        ("7-1/2", "is a fraction; type 7.5$"),
        ("7 1/2 L/s", "is a fraction; type 7.5 L/s$"),
        ("7½", "is a fraction; type 7.5$"),
        ("½", "is a fraction; type 0.5$"),
        ("-1/3", "type -0.3333$"),
        ("1/0", "is not a number"),
        ("12 kW", '"kW" is no unit of airflow; accepted: a number in cfm, or one with L/s'),
        ("12 bananas", '"bananas" is no unit of airflow'),
        ("10²", "is no unit"),
        ("9 440", "more than one number"),
        ("2+3", "more than one number"),
        ("2*3", "more than one number"),
        ("2**9", "more than one number"),
        ("1.234,5", "at most one decimal point"),
        ("1.2.3", "more than one number"),
        ("5 5 cfm", "more than one number"),
        ("5 cfm*2", "is no unit"),
        ("5 cfm + 2 cfm", "is no unit"),
        ("1 __import__('os')", "more than one number"),
        ("1 \x1b[2J", '"·\\[2J" is no unit'),
    ],
)
def test_what_is_refused_says_what_is_accepted(typed, why):
    with pytest.raises(AmountError, match=why.replace("(", r"\(")):
        read_amount(typed, units.AIRFLOW, "IP")


def test_gauge_and_absolute_pressure_are_not_mixed():
    with pytest.raises(AmountError, match='"psia" is no unit of steam pressure'):
        read_amount("30 psia", units.STEAM_PRESSURE, "SI")


def test_the_digits_of_the_field_win_over_those_of_the_quantity():
    assert read_amount("3.2 kW", units.LOAD, "IP", digits=3).text == "10.919"
    assert read_amount("3.2 kW", units.LOAD, "IP", digits=0).text == "10.9"


@settings(deadline=None)  # the first conversion loads pint
@given(
    st.floats(0.001, 99_999).map(lambda value: f"{value:.6g}"),
    st.sampled_from(
        [
            (units.LOAD, "IP", "SI"),
            (units.LOAD, "SI", "IP"),
            (units.AIRFLOW, "IP", "SI"),
            (units.WATER_DROP, "SI", "IP"),
            (units.TEMPERATURE, "IP", "SI"),
            (units.AIR_PRESSURE, "IP", "SI"),
        ]
    ),
)
def test_a_converted_number_gives_back_the_digits_typed(number, case):
    quantity, typed_in, stored_in = case
    there = read_amount(f"{number} {quantity.unit(typed_in)}", quantity, stored_in, digits=0)
    back = read_amount(f"{there.text} {quantity.unit(stored_in)}", quantity, typed_in, digits=9)
    places = decimals(number)
    assert format_number(back.value, places) == format_number(float(number), places)
    assert decimals(there.text) <= places + 1  # and no digits of the arithmetic


@settings(deadline=None)
@given(st.text(alphabet="0123456789.,+-_eExob kWFCm³/s½−%", max_size=12))
def test_whatever_is_typed_is_refused_or_becomes_a_toml_number(typed):
    with contextlib.suppress(AmountError):
        amount = read_amount(typed, units.LOAD, "IP")
        stored = tomllib.loads(f"x = {amount.text}")["x"]
        assert isinstance(stored, int | float)
        assert stored == amount.value
        assert math.isfinite(amount.value)


@settings(deadline=None)
@given(st.text(max_size=20))
def test_no_text_raises_anything_else(typed):
    with contextlib.suppress(AmountError):
        assert math.isfinite(read_amount(typed, units.TEMPERATURE, "SI").value)
