from __future__ import annotations

import tomllib
from contextlib import suppress
from datetime import UTC, date, datetime

import pytest
from hypothesis import given
from hypothesis import strategies as st

from schedtui.errors import AmountError
from schedtui.schedule.catalogue.kinds import (
    ChoiceKind,
    DateKind,
    FlagKind,
    FreeKind,
    NumberKind,
    TextKind,
    TextsKind,
)
from schedtui.schedule.catalogue.ranges import Range
from schedtui.units import AIRFLOW, COUNT, TEMPERATURE

AIR = NumberKind(AIRFLOW, Range(0), Range(0))
DRY_BULB = NumberKind(TEMPERATURE, Range(-100, 300), Range(-75, 150))
WHOLE = NumberKind(COUNT, Range(1), Range(1), whole=True)
KIND = ChoiceKind(("hot water", "steam", "heat pump"))
EVERY = [AIR, WHOLE, TextKind(), TextKind(blank=True), KIND, FlagKind(), TextsKind(), DateKind()]


def from_file(kind, raw, system="IP"):
    return kind.read(tomllib.loads(f"a = {raw}")["a"], raw, system)


@pytest.mark.parametrize(
    ("kind", "raw", "text", "value"),
    [
        (AIR, "9440", "9440", 9440.0),
        (AIR, "9440.0", "9440.0", 9440.0),
        (AIR, "9_440", "9_440", 9440.0),
        (AIR, "0x24E0", "0x24E0", 9440.0),
        (AIR, "9.44e3", "9.44e3", 9440.0),
        (DRY_BULB, "-40", "-40", -40.0),
        (WHOLE, "2", "2", 2.0),
        (WHOLE, "2.0", "2.0", 2.0),
        (TextKind(), '"AHU-1"', "AHU-1", "AHU-1"),
        (TextKind(), "'AHU-1'", "AHU-1", "AHU-1"),
        (TextKind(blank=True), '""', "", ""),
        (KIND, '"steam"', "steam", "steam"),
        (FlagKind(), "false", "false", False),
        (TextsKind(), '["a", "b c"]', "a, b c", ("a", "b c")),
        (TextsKind(), "[]", "", ()),
        (DateKind(), "2026-11-30", "2026-11-30", date(2026, 11, 30)),
        (FreeKind(), '"MERV 13"', "MERV 13", "MERV 13"),
        (FreeKind(), "66.0", "66.0", "66.0"),
    ],
)
def test_a_good_value_is_read_with_its_digits_and_its_characters(kind, raw, text, value):
    cell = from_file(kind, raw)
    assert (cell.text, cell.value, cell.toml, cell.problem) == (text, value, raw, None)


@pytest.mark.parametrize(
    ("kind", "raw", "text", "wrong"),
    [
        (AIR, '"9,440"', "9,440", "is not a number"),
        (AIR, "true", "true", "is not a number"),
        (AIR, "[9440]", "[9440]", "is not a number"),
        (AIR, "nan", "nan", "is not a finite number"),
        (AIR, "-inf", "-inf", "is not a finite number"),
        (AIR, "9" * 400, "9" * 400, "is not a finite number"),
        (AIR, "-1", "-1", "is out of range"),
        (WHOLE, "1.5", "1.5", "is not a whole number"),
        (WHOLE, "0", "0", "is out of range"),
        (TextKind(), "5", "5", "is not text"),
        (TextKind(), '" "', " ", "is blank"),
        (KIND, '"ice"', "ice", "is none of the choices"),
        (KIND, "[1]", "[1]", "is none of the choices"),
        (FlagKind(), '"true"', "true", "is neither"),
        (FlagKind(), "1", "1", "is neither"),
        (TextsKind(), '"a"', "a", "is no list of texts"),
        (TextsKind(), '["a", 1]', '["a", 1]', "is no list of texts"),
        (DateKind(), '"2026-11-30"', "2026-11-30", "is no date"),
        (DateKind(), "2026-11-30T10:00:00", "2026-11-30T10:00:00", "is no date"),
        (FreeKind(), "true", "true", "is neither"),
    ],
)
def test_a_bad_value_is_kept_as_typed_and_says_what_is_accepted(kind, raw, text, wrong):
    cell = from_file(kind, raw)
    assert (cell.text, cell.value, cell.toml) == (text, None, raw)
    assert cell.bad
    assert cell.problem == f"{wrong}; accepted: {kind.accepted('IP')}"


def test_a_date_with_a_time_is_no_date():
    moment = datetime(2026, 11, 30, tzinfo=UTC)
    assert DateKind().read(moment, "2026-11-30T00:00:00Z", "IP").bad


def test_a_minus_on_zero_is_no_sign():
    cell = from_file(AIR, "-0.0")
    assert str(cell.value) == "0.0"


@pytest.mark.parametrize(
    ("kind", "typed", "toml", "value"),
    [
        (AIR, "9440", "9440", 9440.0),
        (AIR, "9,440.0", "9440.0", 9440.0),
        (AIR, "0x24E0", "0x24E0", 9440.0),
        (AIR, "9_440 cfm", "9_440", 9440.0),
        (WHOLE, "3", "3", 3.0),
        (WHOLE, "3.0", "3.0", 3.0),
        (TextKind(), 'a "b"', '"a \\"b\\""', 'a "b"'),
        (KIND, "Steam", '"steam"', "steam"),
        (KIND, "st", '"steam"', "steam"),
        (KIND, "hot", '"hot water"', "hot water"),
        (FlagKind(), "Yes", "true", True),
        (FlagKind(), "n", "false", False),
        (TextsKind(), "a, b c,", '["a", "b c"]', ("a", "b c")),
        (TextsKind(), 'a, "VFD, by others"', '["a", "VFD, by others"]', ("a", "VFD, by others")),
        (TextsKind(), '12" duct, b', '["12\\" duct", "b"]', ('12" duct', "b")),
        (DateKind(), " 2026-11-30 ", "2026-11-30", date(2026, 11, 30)),
        (DateKind(), "20261130", "2026-11-30", date(2026, 11, 30)),
        (FreeKind(), "66.0", '"66.0"', "66.0"),
    ],
)
def test_what_a_person_types_becomes_a_cell_that_reads_back_the_same(kind, typed, toml, value):
    cell = kind.enter(typed, "IP")
    assert (cell.toml, cell.value) == (toml, value)
    assert from_file(kind, cell.toml) == cell


@pytest.mark.parametrize(
    ("kind", "typed"),
    [
        (AIR, ""),
        (AIR, "much"),
        (AIR, "-1"),
        (AIR, "1/2"),
        (AIR, "nan"),
        (AIR, "1e999"),
        (DRY_BULB, "301"),
        (WHOLE, "1.5"),
        (WHOLE, "0"),
        (TextKind(), "  "),
        (KIND, ""),
        (KIND, "h"),  # hot water or heat pump
        (KIND, "ice"),
        (FlagKind(), "perhaps"),
        (DateKind(), "30.11.2026"),
        (DateKind(), "2026-02-30"),
    ],
)
def test_what_cannot_be_accepted_is_refused_with_what_can(kind, typed):
    with pytest.raises(AmountError, match=r"accepted|type|too large"):
        kind.enter(typed, "IP")


@given(st.lists(st.text(max_size=12), max_size=4))
def test_a_list_of_any_texts_survives_being_shown_and_typed_again(texts):
    kind = TextsKind()
    cell = kind.read(texts, "", "IP")
    assert kind.enter(cell.text, "IP").value == tuple(texts)


@given(st.text())
def test_any_typed_text_reads_back_the_same_or_is_refused(typed):
    for kind in [*EVERY, FreeKind()]:
        with suppress(AmountError):
            cell = kind.enter(typed, "SI")
            assert from_file(kind, cell.toml, "SI") == cell
