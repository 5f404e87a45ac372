"""Numbers as a spreadsheet shows them; expected texts are what a spreadsheet program displays."""

from __future__ import annotations

import pytest

from schedtui.sheets.number_format import shown

SHOWN = [
    ("66", "General", "66", "66"),
    ("66.099999999999994", "General", "66.1", "66.1"),
    ("66", "0.0", "66.0", "66.0"),
    ("66.05", "0.0", "66.1", "66.1"),
    ("2.675", "0.00", "2.68", "2.68"),
    ("-0.5", "0", "-1", "-1"),
    ("9440", "#,##0", "9,440", "9440"),
    ("12345678.5", "#,##0.00", "12,345,678.50", "12345678.50"),
    ("0.35", "0%", "35%", "35"),
    ("0.355", "0.0%", "35.5%", "35.5"),
    ("66", '0.0" °F"', "66.0 °F", "66.0"),
    ("66", "0.0\\ \\F", "66.0 F", "66.0"),
    ("7.5", "# ?/?", "7.5", "7.5"),
    ("-5", "0.0;(0.0)", "-5.0", "-5.0"),
    ("0", '0.0;-0.0;"-"', "-", None),
    ("0", '_(* #,##0_);_(* \\(#,##0\\);_(* "-"??_);_(@_)', "-", None),
    ("9440", "[Red]#,##0", "9,440", "9440"),
    ("7.10", "0.###", "7.1", "7.1"),
    ("7", "0.###", "7", "7"),
    ("44562", "yyyy-mm-dd", "2022-01-01", None),
    ("0.00000012", "General", "0.00000012", "0.00000012"),
    ("5", "@", "5", "5"),
]


@pytest.mark.parametrize(("stored", "form", "text", "number"), SHOWN)
def test_a_number_is_shown_by_its_format(stored, form, text, number):
    assert shown(stored, form) == (text, number)


def test_days_may_count_from_1904():
    assert shown("1", "yyyy-mm-dd", since_1904=True)[0] == "1904-01-02"


@pytest.mark.parametrize("stored", ["1e999999", "-1E400"])
def test_what_no_schedule_states_is_left_as_stored(stored):
    assert shown(stored, "0.0") == (stored, None)
