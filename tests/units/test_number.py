"""Numbers as text: digits kept, forms mended, everything else refused."""

from __future__ import annotations

import tomllib

import pytest
from hypothesis import given
from hypothesis import strategies as st

from schedtui.errors import AmountError
from schedtui.units.number import (
    decimals,
    format_number,
    number_text,
    number_value,
    resolution,
    step,
)


@pytest.mark.parametrize(
    ("text", "places"),
    [
        ("66", 0),
        ("66.0", 1),
        ("-0.25", 2),
        ("+9440", 0),
        ("007", 0),
        ("6.6e1", None),
        ("6E1", None),
        ("9_440", None),
        ("0x42", None),
        ("0b1", None),
        ("nan", None),
        ("inf", None),
        ("9,440", None),
        ("66.", None),
        (".5", None),
        ("", None),
        ("66\n", None),
        ("٣", None),  # a digit, but none of TOML's
    ],
)
def test_decimals_are_those_typed(text, places):
    assert decimals(text) == places
    assert step(text) == (None if places is None else float(f"1e-{places}"))


@given(st.decimals(-10_000, 10_000, places=3))
def test_three_typed_decimals_are_three(number):
    assert decimals(f"{number:f}") == 3
    assert step(f"{number:f}") == 0.001


@pytest.mark.parametrize(
    ("value", "digits", "text"),
    [
        (9534.99, 0, "9535"),
        (1234567.0, 1, "1234567.0"),
        (-0.04, 1, "0.0"),
        (-0.0, 0, "0"),
        (-0.06, 1, "-0.1"),
        (26.6666, 2, "26.67"),
    ],
)
def test_format_number(value, digits, text):
    assert format_number(value, digits) == text


@pytest.mark.parametrize(
    ("typed", "text"),
    [
        ("9440", "9440"),
        ("66.0", "66.0"),
        ("9,440", "9440"),
        ("1,234,567.80", "1234567.80"),
        ("-9,440", "-9440"),
        ("+5", "+5"),
        ("-0", "0"),
        ("-0.00", "0.00"),
        ("-0e5", "0e5"),
        (".5", "0.5"),
        ("-.5", "-0.5"),
        ("5.", "5"),
        ("007", "7"),
        ("0.10", "0.10"),
        ("9_440", "9_440"),
        ("1e3", "1e3"),
        ("0x1F", "0x1F"),
        ("0o17", "0o17"),
    ],
)
def test_number_text_is_toml_with_the_digits_typed(typed, text):
    assert number_text(typed) == text
    assert tomllib.loads(f"x = {text}")["x"] == number_value(text)


@pytest.mark.parametrize(
    ("typed", "hint"),
    [
        ("9,44", "type 9.44 or 944"),
        ("0,440", "type 0.440"),
        ("-9,4", "type -9.4 or -94"),
        ("94,40", "type 94.40 or 9440"),
        ("9,4400", "type 9.4400 or 94400"),
        ("9,440,12", "type 944012"),
        ("5,", "type 5"),
        ("9440,000", "type 9440.000 or 9440000"),
    ],
)
def test_any_other_comma_is_refused_with_what_to_type(typed, hint):
    with pytest.raises(AmountError, match=f"comma.*{hint}$"):
        number_text(typed)


@pytest.mark.parametrize(
    "typed", ["", ".", "+", "1.5,000", "1.234,5", "1__0", "1_", "_1", "1.2.3", "e5", "0x", "0xG"]
)
def test_what_is_no_number_is_refused(typed):
    with pytest.raises(AmountError, match="is not a number"):
        number_text(typed)


@pytest.mark.parametrize("number", ["1e999", "-1e999", "9" * 400, "0x" + "F" * 400])
def test_a_number_beyond_a_float_is_refused(number):
    with pytest.raises(AmountError, match="too large"):
        number_value(number)


@pytest.mark.parametrize(
    ("number", "worth"), [("3.20", 0.01), ("4500", 1), ("1.5e3", 100), ("2E-3", 1e-3), ("0x1E", 1)]
)
def test_resolution_knows_exponents(number, worth):
    assert resolution(number) == worth
