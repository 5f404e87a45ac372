"""Steam against IAPWS-97 and printed values; `pytest -s` prints the largest differences."""

import math
import warnings

import pytest

from schedtui.air.psychro import STANDARD_PRESSURE
from schedtui.air.state import Air
from schedtui.air.steam import electric_heat, latent_heat, steam_for, steam_heat
from schedtui.air.step import Steps
from schedtui.errors import FluidError

with warnings.catch_warnings():
    warnings.simplefilter("ignore", DeprecationWarning)  # of the libraries' own making
    from iapws import IAPWS97

BOTH = pytest.mark.parametrize("system", ["IP", "SI"])
KPA = {"IP": 6.894757293168, "SI": 1.0}
KJ_KG = {"IP": 2.326, "SI": 1.0}
SEVEN_THOUSAND_FEET = {"IP": 7_000.0, "SI": 2_133.6}


def iapws_97(kilopascal: float) -> float:
    """Return the latent heat at an absolute pressure [kJ/kg]."""
    steam, water = (IAPWS97(P=kilopascal / 1000, x=dryness) for dryness in (1, 0))
    return steam.h - water.h


@BOTH
def test_latent_heat_is_that_of_iapws_97(system) -> None:
    # Largest difference found: 0.011 %.
    worst = 0.0
    for altitude in (0.0, SEVEN_THOUSAND_FEET[system]):
        station = Air.at_altitude(system, altitude).pressure
        for psig in range(0, 151, 5):
            gauge = psig if system == "IP" else psig * KPA["IP"]
            latent = latent_heat(gauge, station, system) * KJ_KG[system]
            reference = iapws_97((gauge + station) * KPA[system])
            worst = max(worst, abs(latent / reference - 1) * 100)
    print(f"\nlatent heat, {system}, against IAPWS-97: {worst:.4f} %")  # noqa: T201  for the README
    assert worst < 0.015


@pytest.mark.parametrize(("psig", "printed"), [(5, 960), (15, 946), (50, 912)])
def test_printed_latent_heats(psig, printed) -> None:
    # Common practice, to the whole Btu/lb.
    station = STANDARD_PRESSURE["IP"]
    assert latent_heat(psig, station, "IP") == pytest.approx(printed, abs=1)


@pytest.mark.parametrize(
    ("kilopascal", "printed"), [(0.611657, 2500.9), (101.325, 2256.5), (1000, 2014.6)]
)
def test_the_handbooks_latent_heats(kilopascal, printed) -> None:
    # ASHRAE Handbook—Fundamentals, water at saturation, and common steam tables [kJ/kg], recalled.
    assert latent_heat(0, kilopascal, "SI") == pytest.approx(printed, abs=0.5)


@BOTH
def test_the_steam_for_a_heat_gives_it(system) -> None:
    station = STANDARD_PRESSURE[system]
    heat = steam_heat(500, 15, station, system)
    assert steam_for(heat, 15, station, system) == pytest.approx(500, rel=1e-12)


def test_both_unit_systems_give_the_same_heat() -> None:
    mbh = steam_heat(1_000, 15, 14.695949, "IP")
    kw = steam_heat(453.59237, 15 * KPA["IP"], 101.325, "SI")
    assert mbh * 0.29307107 == pytest.approx(kw, rel=1e-6)


@pytest.mark.parametrize(
    ("gauge", "station", "system", "sentence"),
    [
        (-14.696, 14.696, "IP", "steam at -14.696 psig and a station pressure of 14.696 psia"),
        (22_000, 101.325, "SI", r"is outside its data, 0\.612 to 2\.206e\+04 kPa absolute"),
        (math.nan, 101.325, "SI", "steam at nan kPa gauge"),
    ],
)
def test_a_pressure_without_saturated_steam_is_refused(gauge, station, system, sentence) -> None:
    with pytest.raises(FluidError, match=sentence):
        latent_heat(gauge, station, system)


def test_electric_heat() -> None:
    # ASHRAE Handbook—Fundamentals, units and conversions: 3412.14 Btu/h to the kilowatt.
    assert electric_heat(1, "IP") == pytest.approx(3.41214, abs=1e-9)
    assert electric_heat(30, "SI") == 30


def evaluated(formula: str, numbers) -> float:
    text = formula.partition(" = ")[2].replace("·", "*").replace("−", "-")
    values = {symbol: value for symbol, value, _ in numbers}
    return eval(text, {"__builtins__": {}}, values)  # noqa: S307  our own formulas


@BOTH
def test_every_step_multiplies_out(system) -> None:
    station, giving, needed = STANDARD_PRESSURE[system], Steps(), Steps()
    heat = steam_heat(500, 15, station, system, giving)
    assert heat == steam_heat(500, 15, station, system)
    flow = steam_for(heat, 15, station, system, needed)
    assert flow == steam_for(heat, 15, station, system)
    electric_heat(30, system, needed)
    assert [step.symbol for step in giving] == ["p_abs", "h_fg", "q_st"]
    assert [step.symbol for step in needed] == ["p_abs", "h_fg", "m_st", "q_el"]
    for step in giving + needed:
        assert step.formula.startswith(f"{step.symbol} = "), step
        assert evaluated(step.formula, step.numbers) == pytest.approx(step.result, rel=1e-9), step
        assert all(symbol in step.formula for symbol, _, _ in step.numbers), step
        assert step.source, step
