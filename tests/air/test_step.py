"""A working multiplies out: the numbers put into each printed formula give the printed result."""

import math
from itertools import count

import pytest

from schedtui.air.bypass import share_beside, share_of_percent, within_return
from schedtui.air.coil import (
    apparatus_dew_point,
    bypass_factor,
    coil_leaving,
    coil_load,
    heating_load,
    leaving_of,
)
from schedtui.air.fan import (
    after_fan,
    heat_of_rise,
    heat_to_air,
    inlet_airflow,
    power_of_all,
    shaft_power,
)
from schedtui.air.flow import (
    at_part_load,
    dry_air_mass,
    gross_load,
    net_load,
    part_of,
    rest_of,
)
from schedtui.air.mixing import mix, unmix
from schedtui.air.recovery import Effectiveness, recovered
from schedtui.air.room import heat_met, moisture_to_add, room_met, supply_for, supply_moisture
from schedtui.air.state import Air
from schedtui.air.step import Steps

IP = Air.at_altitude("IP", 2_460)
SI = Air.at_altitude("SI", 750)


SIGNS = str.maketrans({"²": "**2", "³": "**3", "⁴": "**4", "^": "**", "·": "*", "−": "-"})
FUNCTIONS = {"max": max, "min": min, "exp": math.exp, "ln": math.log}


def working(air: Air) -> Steps:
    steps = Steps()

    def degrees(fahrenheit: float) -> float:
        return fahrenheit if air.system == "IP" else (fahrenheit - 32) / 1.8

    Air.at_altitude(air.system, 750, steps)
    outdoor = air.by_wet_bulb(degrees(95), degrees(75), steps)
    air.by_wet_bulb(degrees(24), degrees(21), steps)  # ice on the wick
    air.by_wet_bulb(degrees(60), degrees(60), steps)  # saturated
    air.by_dew_point(degrees(80), degrees(14), steps)  # saturation over ice
    air.by_humidity_ratio(degrees(80), 0.01, steps)
    room = air.by_relative_humidity(degrees(75), 50, steps)
    room.warmed_by(2, "above the ceiling", steps)
    room.warmed_by(-2, "below it", steps)
    room.heated_to(degrees(80), steps)
    room.specific_volume(steps)
    leaving = air.by_wet_bulb(degrees(55), degrees(54))
    flow, pressure = (10_000.0, 4.0) if air.system == "IP" else (4_700.0, 1_000.0)
    for basis in ("standard", "site", "actual"):
        mass = dry_air_mass(flow, basis, air, leaving.v, steps)
    mixed = mix(outdoor, 0.3 * mass, room, 0.7 * mass, steps)
    unmix(mixed, mass, room, 0.7 * mass, steps)
    load = coil_load(mass, mixed, leaving, steps)
    leaving_of(mixed, mass, leaving.db, load.total, load.sensible, steps)
    adp = apparatus_dew_point(mixed, leaving, steps)
    assert adp is not None
    bypass_factor(mixed, leaving, adp, steps)
    power = shaft_power(flow, pressure, 65, air.system, steps)
    heat_to_air(power, air.system, None, steps)
    heat = heat_to_air(power, air.system, 92, steps)
    supply = after_fan(leaving, mass, heat, steps)
    heat_of_rise(leaving, mass, 2, steps)
    room_met(mass, supply, room, steps)
    heating_load(mass, mixed, degrees(100), steps)
    heat_met(mass, supply.heated_to(degrees(100)), room.db, steps)
    moisture_to_add(mass, supply, room, steps)
    moisture_to_add(mass, room, supply, steps)
    for latent in (0, 60):
        ways = Effectiveness(70, latent), Effectiveness(70, latent, by_least_flow=False)
        for effectiveness in ways:
            recovered(outdoor, mass, room, 0.8 * mass, effectiveness, steps)
    foggy = air.by_wet_bulb(degrees(95), degrees(94))
    recovered(foggy, mass, room, mass, Effectiveness(90, 0), steps)  # as far as saturation
    supply_for(mass, room, 30, supply_moisture(mass, room, 10, steps), steps)
    for percent in (50, 100):
        at_part_load(80, percent, steps)
    net_load(gross_load(80, 5, steps), 5, steps)
    part_of(mass, within_return(share_of_percent(30, steps), 0.9, steps), "part", steps)
    rest_of(mass, mass / 3, "rest", steps)
    rest_of(mass, 0, "rest", steps)
    share_beside(8_000, 10_000, steps)
    power_of_all(inlet_airflow(leaving, mass, steps) / 1e4, 2, steps)
    coil_leaving(leaving.heated_to(degrees(70)), room.heated_to(degrees(60)), steps)
    return steps


def evaluated(formula: str, numbers) -> float:
    text = formula.partition(" = ")[2].translate(SIGNS)
    values = {symbol: value for symbol, value, _ in numbers}
    return eval(text, {"__builtins__": {}}, FUNCTIONS | values)  # noqa: S307  our own formulas


@pytest.mark.parametrize("air", [IP, SI], ids=["IP", "SI"])
def test_every_step_multiplies_out(air) -> None:
    steps = [step for step in working(air) if step.symbol != "t_adp"]
    assert len(steps) > 100
    for step in steps:
        assert step.formula.startswith(f"{step.symbol} = "), step
        assert evaluated(step.formula, step.numbers) == pytest.approx(step.result, rel=1e-9), step
        assert step.source, step


@pytest.mark.parametrize("air", [IP, SI], ids=["IP", "SI"])
def test_the_apparatus_dew_point_lies_on_line_and_curve(air) -> None:
    steps = working(air)
    step = next(step for step in steps if step.symbol == "t_adp")
    on_the_line = next(one for one in steps if one.symbol == "W_adp")
    assert ("t_adp", step.result, step.quantity) in on_the_line.numbers
    saturated = air.saturation_humidity_ratio(step.result)
    assert on_the_line.result == pytest.approx(saturated, rel=1e-9)
    assert any(one.symbol == "W_sat" and one.result == saturated for one in steps)


@pytest.mark.parametrize("air", [IP, SI], ids=["IP", "SI"])
def test_a_working_changes_no_result(air) -> None:
    mixed, leaving = air.by_relative_humidity(25, 50), air.by_relative_humidity(13, 95)
    assert coil_load(1, mixed, leaving, Steps()) == coil_load(1, mixed, leaving)
    assert mix(mixed, 1, leaving, 2, Steps()) == mix(mixed, 1, leaving, 2)
    assert room_met(1, leaving, mixed, Steps()) == room_met(1, leaving, mixed)


def test_every_number_of_a_step_stands_in_its_formula() -> None:
    seen = count()
    for air in (IP, SI):
        for step in working(air):
            for symbol, value, quantity in step.numbers:
                next(seen)
                assert symbol in step.formula, step
                assert math.isfinite(value), step
                assert quantity.name, step
    assert next(seen) > 300


def test_a_step_that_stands_there_already_is_not_appended_again() -> None:
    steps = Steps()
    for _ in range(2):
        heat_to_air(10, "IP", 92, steps)
        shaft_power(10_000, 4, 65, "IP", steps)
    assert [step.symbol for step in steps] == ["q_f", "P"]
    heat_to_air(11, "IP", 92, steps)
    assert [step.symbol for step in steps] == ["q_f", "P", "q_f"]


def test_each_state_says_how_it_comes_about() -> None:
    steps = Steps()
    IP.by_wet_bulb(95, 75, steps.named("o"))
    IP.by_wet_bulb(80, 75, steps.named("r"))
    assert [step.symbol for step in steps] == [
        "T", "p_sat", "W_sat", "W_o", "h_o", "T", "p_sat", "W_sat", "W_r", "h_r",
    ]  # fmt: skip


def test_streams_are_told_apart_by_their_subscripts() -> None:
    steps = Steps()
    outdoor, room = IP.by_wet_bulb(95, 75), IP.by_relative_humidity(75, 50)
    mix(outdoor, 1, room, 3, steps.named("m", {"p": "o", "a": "o", "q": "ret", "b": "ret"}))
    assert [step.formula for step in steps[:2]] == [
        "h_m = (m_o · h_o + m_ret · h_ret) / (m_o + m_ret)",
        "W_m = (m_o · W_o + m_ret · W_ret) / (m_o + m_ret)",
    ]
    assert [symbol for symbol, _, _ in steps[0].numbers] == ["m_o", "m_ret", "h_o", "h_ret"]


def test_names_within_names_reach_the_first_list() -> None:
    steps = Steps()
    inlet_airflow(IP.by_wet_bulb(55, 54), 45_000, steps.named("", {"i": "l"}))
    assert [step.symbol for step in steps] == ["v_l", "Q_f"]


def test_constants_and_functions_are_no_symbols() -> None:
    steps = Steps()
    IP.by_wet_bulb(95, 75, steps.named("o"))
    formula = next(step.formula for step in steps if step.symbol == "p_sat")
    assert formula.startswith("p_sat = exp(−1.0440397E+04 / T − 1.1294650E+01")
    assert formula.endswith("ln(T))")
