"""Fluids against outside sources: CoolProp's solutions, IAPWS-97's water, and printed tables.

`pytest -s tests/air/test_fluid.py` prints the largest differences. The sources speak SI; what the
program computes in IP is converted here, by the factors below.
"""

import re
import warnings

import pytest

from schedtui.air.fluid import (
    Fluid,
    by_volume,
    density,
    flow_for,
    fluid_heat,
    freezing_point,
    heat_factor,
    specific_heat,
)
from schedtui.air.fluid_tables import GLYCOL_HOTTEST
from schedtui.air.step import Steps
from schedtui.errors import FluidError

with warnings.catch_warnings():
    warnings.simplefilter("ignore", DeprecationWarning)  # of the libraries' own making
    from CoolProp.CoolProp import PropsSI
    from iapws import IAPWS97

BOTH = pytest.mark.parametrize("system", ["IP", "SI"])
GLYCOLS = pytest.mark.parametrize("glycol", ["propylene glycol", "ethylene glycol"])
WATER = Fluid("water")

# CoolProp's names: Melinder's solutions by mass, those of ASHRAE's tables by volume.
MELINDER = {"propylene glycol": "MPG", "ethylene glycol": "MEG"}
ASHRAE = {"propylene glycol": "APG", "ethylene glycol": "AEG"}

KG_L = {"IP": 0.45359237 / 3.785411784, "SI": 1.0}
KJ_KG_K = {"IP": 4.1868, "SI": 1.0}
KW_PER_L_S_K = {"IP": 1055.05585262 / 3.6e6 * 1.8 * 60 / 3.785411784, "SI": 1.0}


def degrees(system: str, celsius: float) -> float:
    return celsius * 1.8 + 32 if system == "IP" else celsius


def celsius(system: str, degrees: float) -> float:
    return (degrees - 32) / 1.8 if system == "IP" else degrees


def solution(output: str, name: str, share: float, celsius: float) -> float:
    return PropsSI(output, "T", celsius + 273.15, "P", 1e6, f"INCOMP::{name}[{share / 100}]")


def freezes(name: str, share: float) -> float:
    return solution("T_FREEZE", name, share, 20) - 273.15


def tell(what: str, worst: dict[str, float]) -> None:
    figures = ", ".join(f"{name} {float(one):.2g}" for name, one in worst.items())
    print(f"\n{what} [%, K]: {figures}")  # noqa: T201  the figures the README quotes


def off(value: float, reference: float) -> float:
    """Return how far a value is off [%]."""
    return abs(value / reference - 1) * 100


@BOTH
@GLYCOLS
def test_glycols_are_those_of_coolprop(system, glycol) -> None:
    # Both after Melinder 2010: over all shares and temperatures they differ by rounding alone.
    worst = {"density": 0.0, "specific heat": 0.0, "freezing": 0.0}
    states = 0
    for share in range(0, 61, 3):
        fluid = Fluid(glycol, share)
        frozen = freezes(MELINDER[glycol], share)
        freezing = abs(celsius(system, freezing_point(fluid, system)) - frozen)
        worst["freezing"] = max(worst["freezing"], freezing)
        for step in range(21):
            t = frozen + 1e-6 + (100 - 2e-6 - frozen) * step / 20
            rho = density(fluid, degrees(system, t), system) * KG_L[system] * 1000
            heat = specific_heat(fluid, degrees(system, t), system) * KJ_KG_K[system] * 1000
            of_coolprop = [solution(one, MELINDER[glycol], share, t) for one in "DC"]
            worst["density"] = max(worst["density"], off(rho, of_coolprop[0]))
            worst["specific heat"] = max(worst["specific heat"], off(heat, of_coolprop[1]))
            states += 1
    tell(f"{glycol}, {system}, against CoolProp", worst)
    assert states == 21 * 21
    assert max(worst.values()) < 1e-6


@GLYCOLS
def test_glycols_by_volume_are_near_those_of_the_handbook(glycol) -> None:
    # The handbook's tables are of inhibited glycols by volume; largest differences found: 1.1 %
    # and 0.4 K for propylene glycol, 2.3 % and 2.8 K for ethylene glycol.
    most, most_freezing = {"propylene glycol": (1.3, 0.5), "ethylene glycol": (2.5, 3.0)}[glycol]
    worst = worst_freezing = 0.0
    for volume in (10, 20, 30, 40, 50):
        fluid = by_volume(glycol, volume)
        freezing = freezing_point(fluid, "SI")
        worst_freezing = max(worst_freezing, abs(freezing - freezes(ASHRAE[glycol], volume)))
        for t in (0, 5, 10, 20, 40, 60, 80, 98):
            rho, heat = (solution(one, ASHRAE[glycol], volume, t) for one in "DC")
            worst = max(worst, off(heat_factor(fluid, t, "SI"), rho * heat / 1e6))
    figures = {"heat factor": worst, "freezing": worst_freezing}
    tell(f"{glycol} by volume against ASHRAE's tables", figures)
    assert worst < most
    assert worst_freezing < most_freezing


def pressed_water(t: float) -> IAPWS97:
    """Return water at 1 MPa (145 psi), or boiling where that is not enough to keep it liquid."""
    return IAPWS97(T=t + 273.15, P=1.0) if t < 179 else IAPWS97(T=t + 273.15, x=0)


@BOTH
def test_water_is_that_of_iapws_97(system) -> None:
    # Largest differences found: density 0.05 %, specific heat 0.32 %, heat factor 0.33 %
    # (0.08 % below 300 °F).
    worst = {"density": 0.0, "specific heat": 0.0, "heat factor": 0.0}
    below_300 = 0.0
    for t in (0.02, *range(2, 232, 5), 232):
        water, here = pressed_water(t), degrees(system, t)
        rho, heat = density(WATER, here, system), specific_heat(WATER, here, system)
        factor = off(
            heat_factor(WATER, here, system) * KW_PER_L_S_K[system], water.rho * water.cp / 1000
        )
        worst["density"] = max(worst["density"], off(rho * KG_L[system] * 1000, water.rho))
        worst["specific heat"] = max(worst["specific heat"], off(heat * KJ_KG_K[system], water.cp))
        worst["heat factor"] = max(worst["heat factor"], factor)
        below_300 = max(below_300, factor if t < 150 else 0)
    tell(f"water, {system}, against IAPWS-97", {**worst, "below 300 °F": below_300})
    assert worst["density"] < 0.06
    assert worst["specific heat"] < 0.35
    assert worst["heat factor"] < 0.35
    assert below_300 < 0.1


@pytest.mark.parametrize(("temperature", "factor"), [(44, 502), (60, 500), (180, 487)])
def test_the_factors_of_common_practice(temperature, factor) -> None:
    # Printed to the whole unit: common practice for water.
    assert heat_factor(WATER, temperature, "IP") == pytest.approx(factor, abs=0.5)


@pytest.mark.parametrize(
    ("volume", "temperature", "printed"),
    [
        (10, 60, 63.42),
        (30, 40, 65.66),
        (30, 60, 65.43),
        (50, 60, 67.20),
        (50, 140, 65.75),
        (50, 200, 64.27),
    ],
)
def test_printed_densities_of_ethylene_glycol(volume, temperature, printed) -> None:
    # ASHRAE Handbook—Fundamentals, density of aqueous ethylene glycol by volume [lb/ft³], as
    # quoted in a design manual; inhibited, so up to 1 % denser than Melinder's.
    per_cubic_foot = density(by_volume("ethylene glycol", volume), temperature, "IP") * 1728 / 231
    assert per_cubic_foot == pytest.approx(printed, rel=0.011)
    assert per_cubic_foot < printed


@pytest.mark.parametrize(("volume", "printed"), [(10, 28), (20, 20), (30, 9), (40, -5), (50, -28)])
def test_printed_freezing_points_of_propylene_glycol(volume, printed) -> None:
    # Lange's Handbook of Chemistry, 15th ed., table 5.13 [°F], by volume at 60 °F.
    frozen = freezing_point(by_volume("propylene glycol", volume), "IP")
    assert frozen == pytest.approx(printed, abs=2)


def test_a_share_by_volume() -> None:
    # ASHRAE 1993's relative density, 1.1155 at 68 °F: 277.6 gal of ethylene glycol in a system of
    # 1000 gal are 30 % by mass (as worked out in a published glossary).
    assert by_volume("ethylene glycol", 27.76).share == pytest.approx(30, abs=0.1)
    assert by_volume("propylene glycol", 0) == Fluid("propylene glycol", 0)
    assert by_volume("propylene glycol", 100) == Fluid("propylene glycol", 100)
    assert by_volume("water", 0) == WATER


@BOTH
@pytest.mark.parametrize("fluid", [WATER, Fluid("ethylene glycol", 40)], ids=str)
def test_the_flow_for_a_heat_carries_it_either_way(system, fluid) -> None:
    cold, warm = degrees(system, 7), degrees(system, 12)
    heat = fluid_heat(60, cold, warm, fluid, system)
    assert heat > 0
    assert fluid_heat(60, warm, cold, fluid, system) == heat
    assert flow_for(heat, warm, cold, fluid, system) == pytest.approx(60, rel=1e-12)
    assert fluid_heat(60, cold, cold, fluid, system) == 0


@pytest.mark.parametrize("fluid", [WATER, Fluid("propylene glycol", 30)], ids=str)
def test_both_unit_systems_carry_the_same_heat(fluid) -> None:
    mbh = fluid_heat(100, 45, 57, fluid, "IP")
    kw = fluid_heat(100 * 3.785411784 / 60, 65 / 9, 125 / 9, fluid, "SI")
    assert mbh * 0.29307107 == pytest.approx(kw, rel=1e-6)


@pytest.mark.parametrize(
    ("fluid", "temperature", "system", "sentence"),
    [
        (WATER, 31.9, "IP", "water at 31.9 °F is below its freezing point, 32.0 °F"),
        (WATER, -0.1, "SI", "water at -0.1 °C is below its freezing point, 0.0 °C"),
        (WATER, 451, "IP", "water at 451.0 °F is outside its data, 32.0 to 450.0 °F"),
        (WATER, float("nan"), "SI", "water at nan °C is outside its data"),
        (
            Fluid("propylene glycol", 30),
            5,
            "IP",
            "propylene glycol 30 % at 5.0 °F is below its freezing point, 9.0 °F",
        ),
        (
            Fluid("ethylene glycol", 30),
            101,
            "SI",
            "ethylene glycol 30 % at 101.0 °C is outside its data, -14.6 to 100.0 °C",
        ),
        (
            Fluid("ethylene glycol", 61),
            20,
            "SI",
            "ethylene glycol 61 % by mass is outside its data, 0 to 60 %",
        ),
        (Fluid("propylene glycol", -1), 20, "SI", "propylene glycol -1 % by mass is outside"),
        (Fluid("water", 20), 20, "SI", "water holds no glycol, and 20 % is stated"),
    ],
)
def test_a_fluid_outside_its_data_is_refused(fluid, temperature, system, sentence) -> None:
    for of_a_state in (density, specific_heat, heat_factor):
        with pytest.raises(FluidError, match=re.escape(sentence)):
            of_a_state(fluid, temperature, system)
    # Each end counts, though the mean may lie within.
    fine = degrees(system, 20)
    for first, second in ((temperature, fine), (fine, temperature)):
        with pytest.raises(FluidError, match=re.escape(sentence)):
            fluid_heat(1, first, second, fluid, system)
        with pytest.raises(FluidError, match=re.escape(sentence)):
            flow_for(1, first, second, fluid, system)


def test_what_is_no_share_and_no_difference() -> None:
    for share in (-1, 101, float("nan")):
        with pytest.raises(FluidError, match="by volume is not 0 to 100 %"):
            by_volume("propylene glycol", share)
    with pytest.raises(FluidError, match="water that leaves as it enters carries no heat"):
        flow_for(10, 44, 44, WATER, "IP")


@BOTH
@GLYCOLS
def test_the_ends_of_the_range_are_within_it(system, glycol) -> None:
    for share in (0, 60):
        fluid = Fluid(glycol, share)
        for end in (freezing_point(fluid, system), GLYCOL_HOTTEST[system]):
            assert heat_factor(fluid, end, system) > 0
    assert heat_factor(WATER, degrees(system, 0), system) > 0


def evaluated(formula: str, numbers) -> float:
    text = formula.partition(" = ")[2].replace("·", "*").replace("−", "-")
    values = {symbol: value for symbol, value, _ in numbers}
    return eval(text, {"__builtins__": {}}, values)  # noqa: S307  our own formulas


@BOTH
@pytest.mark.parametrize("fluid", [WATER, Fluid("propylene glycol", 30)], ids=str)
@pytest.mark.parametrize("ends", [(7, 12), (12, 7)])
def test_every_step_multiplies_out(system, fluid, ends) -> None:
    one, other = degrees(system, ends[0]), degrees(system, ends[1])
    carried, needed = Steps(), Steps()
    heat = fluid_heat(60, one, other, fluid, system, carried)
    assert heat == fluid_heat(60, one, other, fluid, system)
    flow = flow_for(heat, one, other, fluid, system, needed)
    assert flow == flow_for(heat, one, other, fluid, system)
    assert [step.symbol for step in carried] == ["t_w", "K", "q_w"]
    assert [step.symbol for step in needed] == ["t_w", "K", "Q_w"]
    for step in carried + needed:
        assert step.formula.startswith(f"{step.symbol} = "), step
        assert evaluated(step.formula, step.numbers) == pytest.approx(step.result, rel=1e-9), step
        assert all(symbol in step.formula for symbol, _, _ in step.numbers), step
        assert step.source, step
