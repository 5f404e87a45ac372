"""A working multiplies out: the numbers put into each printed formula give the printed result."""

import math
from itertools import count

import pytest

from schedtui.air.coil import (
    apparatus_dew_point,
    bypass_factor,
    coil_load,
    heating_load,
    leaving_of,
)
from schedtui.air.fan import after_fan, heat_of_rise, heat_to_air, shaft_power
from schedtui.air.flow import dry_air_mass
from schedtui.air.mixing import mix, unmix
from schedtui.air.room import heat_met, moisture_to_add, room_met
from schedtui.air.state import Air
from schedtui.air.step import Steps

IP = Air.at_altitude("IP", 2_460)
SI = Air.at_altitude("SI", 750)


def working(air: Air) -> Steps:
    steps = Steps()

    def degrees(fahrenheit: float) -> float:
        return fahrenheit if air.system == "IP" else (fahrenheit - 32) / 1.8

    outdoor = air.by_wet_bulb(degrees(95), degrees(75))
    room = air.by_relative_humidity(degrees(75), 50)
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
    return steps


def evaluated(formula: str, numbers) -> float:
    text = formula.partition(" = ")[2].replace("·", "*").replace("−", "-")
    values = {symbol: value for symbol, value, _ in numbers}
    return eval(text, {"__builtins__": {}}, {"max": max, **values})  # noqa: S307  our own formulas


@pytest.mark.parametrize("air", [IP, SI], ids=["IP", "SI"])
def test_every_step_multiplies_out(air) -> None:
    steps = [step for step in working(air) if step.symbol != "t_adp"]
    assert len(steps) > 30
    for step in steps:
        assert step.formula.startswith(f"{step.symbol} = "), step
        assert evaluated(step.formula, step.numbers) == pytest.approx(step.result, rel=1e-9), step
        assert step.source, step


@pytest.mark.parametrize("air", [IP, SI], ids=["IP", "SI"])
def test_the_apparatus_dew_point_lies_on_line_and_curve(air) -> None:
    step = next(step for step in working(air) if step.symbol == "t_adp")
    _, _, right = step.formula.partition(" = ")
    numbers = (*step.numbers, ("t_adp", step.result, step.quantity))
    on_the_line = evaluated(f"W = {right}", numbers)
    assert on_the_line == pytest.approx(air.saturation_humidity_ratio(step.result), rel=1e-9)


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
    assert next(seen) > 150
