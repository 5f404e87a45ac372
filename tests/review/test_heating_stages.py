"""The stages of heating: what they say, and that each number comes from somewhere."""

from __future__ import annotations

import math

import pytest

from schedtui.air.step import Step
from schedtui.review.figure import known
from schedtui.review.quantities import HEATING_FIGURES
from schedtui.review.working import site_stage, working

# What a schedule states, by its symbols; everything else must be some step's result.
STATED = {"Q", "P", "RH", "wb", "dp", "L", "ε", "η", "n", "Δt"}
STATED_IN_WINTER = {"p_0", "p_f", "t_min", "P_each", "q_rh0", "q_hv", "t_lp", "t_s"}
# A state's own numbers, and those of the fan for each stream.
AGAIN = {"T", "p_sat", "p_w", "W_sat", "q_f", "Δt_f", "Q_f", "P", "t_out", "h_out"}

WINTER = """\
[project]
title = "Works"
units = "IP"
airflow_basis = "standard"

[[condition]]
name = "night"
season = "heating"
outdoor_db = -10.0
outdoor_w = 0.0003

[[unit]]
tag = "AHU-1"
supply_airflow = 10000
outdoor_airflow = 4000
room_heat_db = 70
heat_lat_db = 95
"""


def alike(one: float, other: float) -> bool:
    return math.isclose(one, other, rel_tol=1e-8, abs_tol=1e-12)


def test_every_number_of_heating_was_a_result_or_is_stated(winters) -> None:
    seen = 0
    for case in winters:
        for at in case.heating:
            values: dict[str, float] = {}
            for stage in (site_stage(case), *working(at).stages):
                values |= {symbol: value for symbol, value, _ in stage.given}
                for step in stage.steps:
                    for symbol, value, _ in step.numbers:
                        where = (case.unit.tag, at.name, stage.title, step.formula, symbol)
                        ahead = symbol == f"v_{at.letters.fan_inlet}" and symbol not in values
                        if symbol in values and symbol not in AGAIN:
                            assert alike(values[symbol], value), where
                        elif not ahead and symbol not in STATED_IN_WINTER:
                            assert symbol.partition("_")[0] in STATED or symbol in values, where
                        seen += 1
                    if step.symbol in values and step.symbol not in AGAIN:
                        assert alike(values[step.symbol], step.result), (case.unit.tag, step)
                    values[step.symbol] = step.result
    assert seen > 10_000


def test_heating_ends_in_the_figures_of_the_evaluation(winters) -> None:
    of_figure = {
        "supply_mass": "m_s", "outdoor_mass": "m_o", "preheat_load": "q_ph", "heat_load": "q_h",
        "humidifier_load": "m_w", "room_heat_met": "q_rh",
    }  # fmt: skip
    figures = {figure.key: figure for figure in HEATING_FIGURES}
    compared = 0
    for at in (at for case in winters for at in case.heating):
        results = {s.symbol: s.result for stage in working(at).stages for s in stage.steps}
        for key, symbol in of_figure.items():
            value = known(figures[key].get, at)
            if value:  # no outdoor air takes no step
                assert alike(results[symbol], value), (at.unit.tag, at.name, key)
                compared += 1
    assert compared > 1_000


def test_a_working_of_heating_changes_no_figure(winters) -> None:
    for at in (at for case in winters[:40] for at in case.heating):
        before = [known(figure.get, at) for figure in HEATING_FIGURES]
        working(at)
        again = type(at)(at.unit, at.condition, at.site)
        assert before == [known(figure.get, again) for figure in HEATING_FIGURES]


def test_no_step_is_made_where_nobody_collects_any(winters, monkeypatch) -> None:
    def refuse(*_: object) -> None:
        raise AssertionError("a step")

    monkeypatch.setattr(Step, "__init__", refuse)
    asked = 0
    for at in (at for case in winters for at in case.heating):
        plain = type(at)(at.unit, at.condition, at.site)
        asked += sum(known(figure.get, plain) is not None for figure in HEATING_FIGURES)
    assert asked > 1_000
    with pytest.raises(AssertionError, match="a step"):
        working(winters[0].heating[0])


def test_frost_is_said_with_what_the_recovery_is_held_back_to(one_unit) -> None:
    text = WINTER + "room_heat_rh = 40\nrecovery_sensible = 80\n"
    told = winter_stages(one_unit(text))
    frost = told["Frost limit of the recovery"]
    assert "held back" in frost.words[0]
    share = frost.steps[-1]
    # From 70 °F to −10 °F at 80 % the exhaust would leave at 6 °F; at 32 °F, 38 of 64 degrees.
    assert (share.symbol, share.result) == ("x_fr", pytest.approx(38 / 64))
    behind = told["Outdoor air behind the recovery in heating"]
    held = next(step for step in behind.steps if step.symbol == "ε_s")
    assert held.result == pytest.approx(80 * 38 / 64)
    recovered = next(step for step in behind.steps if step.symbol == "t_rec")
    assert recovered.result == pytest.approx(28)  # as many degrees as the exhaust loses

    dry = winter_stages(one_unit(text.replace("rh = 40", "rh = 2")))
    assert "does not freeze" in dry["Frost limit of the recovery"].words[0]
    warm = winter_stages(one_unit(text.replace("outdoor_db = -10.0", "outdoor_db = 75.0")))
    assert "does not act" in warm["Frost limit of the recovery"].words[0]
    assert warm["Outdoor air behind the recovery in heating"].same_as == "Outdoor air in heating"


def test_a_coil_that_has_nothing_to_add_says_so(one_unit) -> None:
    warm = WINTER.replace("heat_lat_db = 95", "heat_lat_db = 20\npreheat_lat_db = 25")
    told = winter_stages(one_unit(warm))
    assert "adds nothing" in told["Air leaving the preheat"].words[0]
    assert "adds nothing" in told["Air leaving the heating coil, the supply air"].words[0]


def test_what_heating_lacks_is_said_once(one_unit) -> None:
    told = winter_stages(one_unit(WINTER.replace("room_heat_db = 70\n", "")))
    lacks = [words for stage in told.values() for words in stage.words if "Not computed" in words]
    assert lacks == ["Not computed, for want of room_heat_db."]


def winter_stages(unit):
    (at,) = unit.case.heating
    return {stage.title: stage for stage in working(at).stages}


def test_every_stage_of_heating_is_reached(winters) -> None:
    titles = {s.title for case in winters for at in case.heating for s in working(at).stages}
    assert titles >= {
        "Outdoor air in heating", "Room and return air in heating",
        "Supply and outdoor air flow in heating", "Outdoor air past the preheat", "Preheat load",
        "Frost limit of the recovery", "Outdoor air behind the recovery in heating",
        "Mixed air in heating", "Volume at the supply fan's inlet in heating",
        "Supply fan in heating, blowing through", "Air to the heating coils",
        "Air leaving the preheat", "Air entering the heating coil",
        "Air leaving the heating coil, the supply air", "Heating coil load",
        "What the supply air brings the room", "Moisture to add",
    }  # fmt: skip
