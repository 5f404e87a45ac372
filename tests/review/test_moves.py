"""The numbers that a designer would move: each is a key, moved where its check looks."""

import pytest

from schedtui.review.finding import Severity
from schedtui.review.moves import DOWN, GUARDED, MOVES, PAIRS, UP
from schedtui.review.registry import registered
from schedtui.schedule.catalogue.kinds import NumberKind
from schedtui.schedule.catalogue.unit import Unit


def test_every_short_check_of_a_unit_has_its_moves():
    short = {
        name
        for name, check in registered().items()
        if check.severity is Severity.SHORT and check.plant is None
    }
    assert set(MOVES) == short


@pytest.mark.parametrize("check", MOVES)
def test_moves_are_of_numbers(check):
    keys = [key for key, _ in MOVES[check]]
    assert len(set(keys)) == len(keys)
    assert {way for _, way in MOVES[check]} <= {UP, DOWN}
    for key in keys:
        assert isinstance(Unit.catalogue[key].kind, NumberKind)


# Rounded to the safe side: a capacity, a flow, a motor goes up.
@pytest.mark.parametrize(
    "key",
    ["cool_total", "cool_sensible", "reheat_total", "cool_flow", "heat_total", "preheat_total",
     "humidifier", "heat_flow", "motor_power", "supply_airflow_min", "recovery_sensible"],
)  # fmt: skip
def test_what_is_bought_goes_up(key):
    ways = {way for moves in MOVES.values() for moved, way in moves if moved == key}
    assert ways == {UP}


def test_outdoor_air_goes_down_but_where_it_lacks():
    ways = {check: dict(moves)["outdoor_airflow"] for check, moves in MOVES.items()
            if "outdoor_airflow" in dict(moves)}  # fmt: skip
    assert ways.pop("outdoor-air-short") == UP
    assert set(ways.values()) == {DOWN}


def test_pairs_and_guards_are_of_what_there_is():
    assert set(PAIRS) <= set(MOVES)
    for check, pairs in PAIRS.items():
        for first, second in pairs:
            assert second in {key for key, _ in (*MOVES[check], ("cool_lat_wb", UP))}
            assert first in Unit.catalogue
    moved = {key for moves in MOVES.values() for key, _ in moves}
    assert set(GUARDED) <= moved
    assert {name for names in GUARDED.values() for name in names} <= set(registered())
