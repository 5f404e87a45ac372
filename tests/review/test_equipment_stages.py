"""Water, steam, power, fuel, fans, faces: what they give, and where each number comes from."""

from __future__ import annotations

from collections import Counter

import pytest

from schedtui.air.fan import shaft_power
from schedtui.review.equipment_stages import equipment
from schedtui.review.fluid_side import COOLING, HEATING, PREHEAT
from schedtui.review.working import working

STATED = {"Q", "P", "η", "n"}
STATED_OF_EQUIPMENT = {
    "Q_cw", "Q_hw", "Q_pw", "t_cw1", "t_cw2", "t_hw1", "t_hw2", "t_pw1", "t_pw2", "G_v", "m_st",
    "p_gauge", "P_el", "q_in", "p_f", "p_rf", "A", "q_tn", "q_f",
}  # fmt: skip


def test_every_number_of_equipment_stands_at_a_condition_or_in_the_row(winters) -> None:
    seen = 0
    for case in winters:
        values: set[str] = {"p", "p_0"}
        for at in case.evaluations:
            for stage in working(at).stages:
                values |= {symbol for symbol, _, _ in stage.given}
                values |= {step.symbol for step in stage.steps}
        for stage in equipment(case)[0]:
            values |= {symbol for symbol, _, _ in stage.given}
            for step in stage.steps:
                for symbol, _, _ in step.numbers:
                    known_too = symbol in values | STATED_OF_EQUIPMENT
                    assert known_too or symbol.partition("_")[0] in STATED, (stage.title, step)
                    seen += 1
                values.add(step.symbol)
    assert seen > 1_000


FROZEN = """\
[project]
title = "Works"
units = "IP"

[[unit]]
tag = "AHU-1"
heat_ewt = 160
heat_lwt = 20
heat_flow = 40
"""


def test_a_fluid_outside_its_data_is_said(one_unit) -> None:
    stages, outcomes = equipment(one_unit(FROZEN).case)
    assert [stage.title for stage in stages] == ["Water of the heating coil"]
    assert "freezing point" in stages[0].words[0]
    assert outcomes == ()


def test_what_is_lacking_is_named(one_unit) -> None:
    lacking = FROZEN.replace(
        "heat_ewt = 160\nheat_lwt = 20\nheat_flow = 40", 'heat_kind = "steam"\nheat_steam = 300'
    )
    ((stage,), outcomes) = equipment(one_unit(lacking).case)
    assert stage.words == ("Not computed, for want of heat_steam_pressure.",)
    assert outcomes == ()


def judged_by(case):
    """The figures that the checks take."""
    unit, system = case.unit, case.site.system
    return {
        "Cooling, by its water": lambda: COOLING.carried(unit, system),
        "Heating, by its water": lambda: HEATING.carried(unit, system),
        "Preheat, by its water": lambda: PREHEAT.carried(unit, system),
        "Face velocity, cooling": lambda: case.face_velocity,
        "Face velocity, heating": lambda: case.heat_face_velocity,
        "Supply fan shaft power": lambda: shaft_power(
            case.fan_airflow, unit.fan_total_pressure, unit.fan_efficiency, system
        ),
    }


def test_it_gives_what_the_checks_judge_by(winters) -> None:
    compared: Counter[str] = Counter()
    for case in winters:
        own = {one.label: one.required for one in equipment(case)[1]}
        figures = judged_by(case)
        for label in own.keys() & figures.keys():
            assert own[label] == pytest.approx(figures[label](), rel=1e-12), (case.unit.tag, label)
            compared[label] += 1
    assert len(compared) == 6
    assert min(compared.values()) > 10


def test_shaft_power_velocity_and_fuel_by_hand(one_unit) -> None:
    text = """\
[project]
title = "Works"
units = "IP"
airflow_basis = "standard"

[[unit]]
tag = "AHU-1"
supply_airflow = 10000
room_db = 75
room_rh = 50
cool_lat_db = 55
cool_lat_wb = 54
cool_face_area = 20
fan_power = 5
fan_count = 2
fan_total_pressure = 4
fan_efficiency = 65
heat_kind = "gas"
heat_input = 400
heat_efficiency = 80
heat_total = 320
"""
    stages, outcomes = equipment(one_unit(text).case)
    found = {one.label: one for one in outcomes}
    # At 55/54 °F a pound of dry air fills 13.15 ft³ (chart no. 1): 45 000 lb/h are 9 860 cfm.
    power = found["Supply fan shaft power"]
    assert power.required == pytest.approx(9_860 * 4 / 6356 / 0.65, rel=2e-3)
    assert power.provided == 10  # both fans
    assert any("2 fans" in words for stage in stages for words in stage.words)
    assert found["Face velocity, cooling"].required == pytest.approx(493, rel=2e-3)
    assert found["Heating, by its fuel"].required == pytest.approx(320)
    assert found["Heating, by its fuel"].margin == pytest.approx(0)


def test_every_part_is_reached(winters) -> None:
    assert {stage.title for case in winters for stage in equipment(case)[0]} == {
        "Water of the cooling coil", "Water of the condenser", "Water of the heating coil",
        "Water of the preheat", "Steam of the heating coil", "Electric heating",
        "Fuel of the heating", "Shaft power of the supply fan", "Shaft power of the return fan",
        "Face of the cooling coil", "Face of the heating coil",
    }  # fmt: skip
