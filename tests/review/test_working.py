"""The working of a unit: its stages, their order, and that each number comes from somewhere."""

from __future__ import annotations

import math

import pytest
import tomli_w

from schedtui.review.figure import known
from schedtui.review.part_load import PartLoad
from schedtui.review.quantities import COOLING_FIGURES
from schedtui.review.working import site_stage, without_repeats, working
from tests.review import invented

# What a schedule states, by its symbols; everything else must be some step's result.
STATED = {"Q", "P", "RH", "wb", "dp", "B", "L", "ε", "η", "n", "Δt", "Z"}
STATED_TOO = {"p_0", "p_f", "P_each", "t_d1", "q_tk", "q_sk", "q_tn", "q_sn",
              "q_rv", "q_lv", "q_rs0", "q_rl0"}  # fmt: skip
# A fan warms each stream by its own specific heat, and a coil that runs dry changes the fan's air.
AGAIN = {"T", "p_sat", "p_w", "W_sat", "q_f", "Δt_f", "Q_f", "P", "x_b", "t_out", "h_out"}


@pytest.fixture(scope="module")
def evaluations(reviewed):
    """Every evaluation of the invented units, with its case."""
    return [
        (unit.case, at)
        for document in invented.documents(18)
        for unit in reviewed(tomli_w.dumps(document)).units.values()
        for at in unit.case.cooling
    ]


def alike(one: float, other: float) -> bool:
    return math.isclose(one, other, rel_tol=1e-8, abs_tol=1e-12)


def test_every_number_put_in_was_a_result_or_is_stated(evaluations) -> None:
    """A symbol has one value in a working, and has it before it is used."""
    for case, at in evaluations:
        values: dict[str, float] = {}
        for stage in (site_stage(case), *working(at).stages):
            values |= {symbol: value for symbol, value, _ in stage.given}
            for step in stage.steps:
                for symbol, value, _ in step.numbers:
                    where = (case.unit.tag, at.name, stage.title, step.formula, symbol)
                    # The settled turn of a fan's volume goes in before it comes out.
                    ahead = symbol.partition("_")[0] in {"v", "t"} and any(
                        "settled" in words for words in stage.words
                    )
                    if symbol in values:
                        assert alike(values[symbol], value), where
                    elif not ahead and symbol not in STATED_TOO:
                        assert symbol.partition("_")[0] in STATED, where
                if step.symbol in values and step.symbol not in AGAIN:
                    assert alike(values[step.symbol], step.result), (case.unit.tag, step)
                values[step.symbol] = step.result


def test_part_load_shows_what_it_settles_at_and_comes_to(one_unit) -> None:
    text = PLAIN.replace("outdoor_rh = 40", "outdoor_rh = 60\nsensible_load = 60")
    text = text.replace("outdoor_airflow = 10000", "outdoor_airflow = 2000")
    text += 'room_sensible = 190\nroom_latent = 30\ncapacity_control = "bypass"\n'
    at = next(at for at in one_unit(text).case.cooling if at.name == "mild")
    told = working(at)
    settled = told.stages[0]
    assert "bypass" in settled.words[0]
    given = {symbol: value for symbol, value, _ in settled.given}
    assert given["x_b"] == at.bypass_share > 0
    met = {one.label: one for one in told.outcomes}["Room sensible, met"]
    assert met.required == pytest.approx(0.6 * 190)
    assert met.provided == pytest.approx(0.6 * 190)


def test_what_goes_in_ahead_comes_out_alike(evaluations) -> None:
    seen = 0
    for _, at in evaluations:
        if at.basis != "actual" or isinstance(at, PartLoad):
            continue
        steps = [step for stage in working(at).stages for step in stage.steps]
        mass = next(step for step in steps if step.symbol == "m_s")
        symbol, value, _ = mass.numbers[1]
        assert any(step.symbol == symbol and alike(step.result, value) for step in steps)
        seen += 1
    assert seen > 50


def test_the_steps_end_in_the_figures_of_the_evaluation(evaluations) -> None:
    """What the working comes to is what the checks judge by."""
    of_figure = {
        "supply_mass": "m_s", "coil_mass": "m_c", "coil_total": "q_t", "coil_sensible": "q_s",
        "coil_latent": "q_l", "shr": "SHR", "tons": "tons", "adp": "t_adp",
        "bypass_factor": "BF", "condensate": "m_w", "room_sensible_met": "q_rs",
        "room_latent_met": "q_rl",
    }  # fmt: skip
    figures = {figure.key: figure for figure in COOLING_FIGURES}
    compared = 0
    for _, at in evaluations:
        stages = working(at).stages
        results = {symbol: value for stage in stages for symbol, value, _ in stage.given}
        results |= {s.symbol: s.result for stage in stages for s in stage.steps}
        for key, symbol in of_figure.items():
            value = known(figures[key].get, at)
            if value is not None:
                assert alike(results[symbol], value), (at.unit.tag, at.name, key)
                compared += 1
    assert compared > 4_000


def test_no_step_stands_twice(evaluations) -> None:
    """But for a saturation that two states of one wet bulb have in common."""
    for _, at in evaluations[:80]:
        steps = [step for stage in working(at).stages for step in stage.steps]
        steps = [step for step in steps if step.symbol not in {"T", "p_sat", "p_w", "W_sat"}]
        for place, step in enumerate(steps):
            assert not any(step.says_the_same(other) for other in steps[:place]), step


def test_every_stage_is_reached(evaluations) -> None:
    titles = {stage.title for _, at in evaluations for stage in working(at).stages}
    assert titles >= {
        "Outdoor air", "Room air", "Return air", "Supply and outdoor air flow",
        "Outdoor air behind the recovery", "Mixed air", "Air flow through and around the coil",
        "Supply fan, blowing through", "The coil's own mixture", "Air to the coil",
        "Air around the coil", "Air leaving the first coil", "First coil's load",
        "Air entering the coil", "Entering air as scheduled in the row",
        "Air that is to leave the unit", "Air that the coil is to leave", "Air leaving the coil",
        "Coil load", "Apparatus dew point and bypass factor",
        "Air past the wrap-around's second side", "Air joined by what went around the coil",
        "Supply fan, drawing through", "Air past the fan", "Reheated air", "Reheat load",
        "Supply air", "What the supply air does in the room", "Net capacity",
    }  # fmt: skip


PLAIN = """\
[project]
title = "Works"
units = "IP"
airflow_basis = "standard"

[[condition]]
name = "peak"
season = "cooling"
outdoor_db = 95.0
outdoor_wb = 75.0

[[condition]]
name = "mild"
season = "cooling"
outdoor_db = 60.0
outdoor_rh = 40

[[unit]]
tag = "AHU-1"
supply_airflow = 10000
outdoor_airflow = 10000
room_db = 75
room_rh = 50
cool_lat_db = 55
cool_lat_wb = 54
"""


def stages(unit, name):
    at = next(at for at in unit.case.cooling if at.name == name)
    return {stage.title: stage for stage in working(at).stages}


def test_only_what_the_unit_has_is_worked_through(one_unit) -> None:
    titles = list(stages(one_unit(PLAIN), "peak"))
    assert titles == [
        "Outdoor air", "Room air", "Return air", "Supply and outdoor air flow", "Mixed air",
        "Air flow through and around the coil", "Air entering the coil",
        "Air that the coil is to leave", "Coil load", "Apparatus dew point and bypass factor",
        "Supply fan, drawing through", "Supply air", "What the supply air does in the room",
    ]  # fmt: skip


def test_air_that_stays_as_it_is_says_whose_it_is(one_unit) -> None:
    entering = stages(one_unit(PLAIN), "peak")["Air entering the coil"]
    assert entering.same_as == "Outdoor air"  # all of the supply is outdoor air
    assert [symbol for symbol, _, _ in entering.given] == ["t_e", "W_e", "h_e"]
    assert entering.steps == ()


def test_a_coil_that_runs_dry_or_not_at_all_says_so(one_unit) -> None:
    dry = stages(one_unit(PLAIN), "mild")["Air leaving the coil"]
    assert "runs dry" in dry.words[0]
    assert [step.formula for step in dry.steps[:2]] == ["t_l = t_d", "W_l = W_e"]
    cold = PLAIN.replace("outdoor_db = 60.0", "outdoor_db = 50.0")
    off = stages(one_unit(cold), "mild")["Air leaving the coil"]
    assert "is off" in off.words[0]
    assert off.steps == ()


def test_a_recovery_that_does_not_pay_says_so(one_unit) -> None:
    unit = one_unit(PLAIN + "recovery_sensible = 70\n")
    assert "does not act" in stages(unit, "mild")["Outdoor air behind the recovery"].words[0]
    assert stages(unit, "peak")["Outdoor air behind the recovery"].words == ()


def test_an_assumed_motor_efficiency_is_said(one_unit) -> None:
    words = stages(one_unit(PLAIN + "fan_power = 9\n"), "peak")["Supply fan, drawing through"].words
    assert "assumed" in words[0]
    own = one_unit(PLAIN + "fan_power = 9\nmotor_efficiency = 92\n")
    assert stages(own, "peak")["Supply fan, drawing through"].words == ()


def test_repeats_point_to_the_condition_that_said_it(one_unit) -> None:
    first, second = without_repeats([working(at) for at in one_unit(PLAIN).case.cooling])
    again = {stage.title: stage for stage in second.stages}
    assert again["Room air"].words == ("As at peak.",)
    assert again["Room air"].steps == ()
    assert again["Outdoor air"].steps
    assert all(stage.words != ("As at peak.",) for stage in first.stages)


def test_a_pressure_that_is_given_is_taken_as_it_is(one_unit) -> None:
    stated = PLAIN.replace('units = "IP"', 'units = "IP"\npressure = 13.4')
    stage = site_stage(one_unit(stated).case)
    assert stage.steps == ()
    assert [(symbol, value) for symbol, value, _ in stage.given] == [("p", 13.4)]


def test_outcomes_have_what_is_required_and_what_there_is(one_unit) -> None:
    unit = one_unit(
        PLAIN + "cool_total = 600\nroom_sensible = 200\nroom_latent = 30\ncool_tons = 50\n"
    )
    at = unit.case.cooling[0]
    by_label = {one.label: one for one in working(at).outcomes}
    assert by_label["Cooling total"].required == at.required_total
    assert by_label["Cooling total"].provided == 600
    assert by_label["Cooling sensible"].provided is None
    assert by_label["Room sensible, met"].provided == at.room_met.sensible
    assert by_label["Cooling tons"].margin == pytest.approx((50 / at.coil.tons - 1) * 100)
