"""The fluid side of each coil: what it is fed by, and what its flow carries."""

import pytest

from schedtui.errors import Absent, FluidError
from schedtui.review.fluid_side import COOLING, HEATING, PREHEAT, SIDES
from schedtui.schedule.load import load
from schedtui.schedule.view import view

PREFIX = {COOLING.what: "cool", HEATING.what: "heat", PREHEAT.what: "preheat"}
# Btu/h per gpm and °F (CoolProp; glycols Melinder): water at 49, 170 °F, 30 and 40 % by mass.
WATER_49, WATER_170 = 501.66, 488.50
PROPYLENE_30_49, PROPYLENE_40_170, ETHYLENE_30_49 = 470.80, 461.97, 459.45


@pytest.fixture
def unit():
    def made(lines, units="IP"):
        text = f'[project]\ntitle = "Water"\nunits = "{units}"\n[[unit]]\ntag = "AHU-1"\n{lines}\n'
        (only,) = view(load(text)).units
        return only

    return made


def water(side, entering, leaving, flow, more=""):
    key = PREFIX[side.what]
    return f"{key}_ewt = {entering}\n{key}_lwt = {leaving}\n{key}_flow = {flow}\n{more}"


@pytest.mark.parametrize("side", SIDES, ids=PREFIX.values())
def test_each_coil_reads_its_own_keys(unit, side):
    found = unit(water(side, 44, 54, 80))
    assert side.stated(found)
    assert [one.what for one in SIDES if one.stated(found)] == [side.what]
    assert side.carried(found, "IP") == pytest.approx(80 * 10 * WATER_49 / 1000, rel=5e-4)


@pytest.mark.parametrize("side", [HEATING, PREHEAT], ids=["heat", "preheat"])
def test_hot_water_gives_what_it_loses(unit, side):
    found = unit(water(side, 180, 160, 41))
    assert side.carried(found, "IP") == pytest.approx(41 * 20 * WATER_170 / 1000, rel=5e-4)


@pytest.mark.parametrize(
    ("side", "ends", "more", "factor"),
    [
        (COOLING, (44, 54), 'cool_fluid = "propylene glycol"\ncool_glycol = 30', PROPYLENE_30_49),
        (COOLING, (44, 54), 'cool_fluid = "ethylene glycol"\ncool_glycol = 30', ETHYLENE_30_49),
        (HEATING, (180, 160), 'heat_fluid = "propylene glycol"\nheat_glycol = 40',
         PROPYLENE_40_170),
    ],
)  # fmt: skip
def test_glycol_carries_less(unit, side, ends, more, factor):
    found = unit(water(side, *ends, 50, more))
    carried = 50 * abs(ends[0] - ends[1]) * factor / 1000
    assert side.carried(found, "IP") == pytest.approx(carried, rel=5e-3)


def test_in_si(unit):
    # 4.19 kJ/kg K · 1.000 kg/L at 9.5 °C (CoolProp: 4.1946, 0.99975)
    found = unit(water(COOLING, 7, 12, 5), "SI")
    assert COOLING.carried(found, "SI") == pytest.approx(5 * 5 * 4.1946 * 0.99975, rel=5e-4)


def test_a_share_by_volume_is_more_by_mass(unit):
    glycol = 'cool_fluid = "ethylene glycol"\ncool_glycol = 30\nglycol_by = "volume"'
    # Ethylene glycol is 1.12 times as heavy as water: 30 · 1.12 / (30 · 1.12 + 70) = 32.4 %.
    assert COOLING.fluid_of(unit(glycol)).share == pytest.approx(32.4, abs=0.1)


@pytest.mark.parametrize(
    ("side", "line", "runs"),
    [
        (COOLING, "", True),
        (COOLING, 'cool_kind = "dx"', False),
        (HEATING, "", True),
        (HEATING, 'heat_kind = "steam"', False),
        (HEATING, 'heat_kind = "electric"', False),
        (HEATING, 'heat_kind = "gas"', False),
        (HEATING, 'heat_kind = "heat pump"', False),
        (PREHEAT, "", True),
        (PREHEAT, 'preheat_kind = "electric"', False),
        (PREHEAT, 'heat_kind = "electric"', True),
    ],
)
def test_which_coils_water_runs_through(unit, side, line, runs):
    assert side.runs(unit(line)) is runs


def test_a_gap_is_an_absence_with_its_key(unit):
    found = unit("cool_ewt = 44\ncool_flow = 80")
    assert not COOLING.stated(found)
    with pytest.raises(Absent) as absent:
        COOLING.carried(found, "IP")
    assert absent.value.keys == ("cool_lwt",)


@pytest.mark.parametrize("more", ["", 'cool_fluid = "propylene glycol"\ncool_glycol = 10'])
def test_ice_carries_nothing(unit, more):
    with pytest.raises(FluidError):
        COOLING.carried(unit(water(COOLING, 15, 25, 80, more)), "IP")
