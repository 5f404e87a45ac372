"""What cooling and heating share: outdoor air, what airflows weigh, and the supply fan."""

import pytest

from schedtui.errors import Absent

HEAD = """
[project]
title = "Air"
units = "{units}"
altitude = {altitude}
airflow_basis = "{basis}"
[[condition]]
name = "summer"
season = "cooling"
outdoor_db = {outdoor}
{humidity}
[[unit]]
tag = "AHU-1"
"""
RETURN = "return_db = 80\nreturn_wb = 67\ncool_lat_db = 55\ncool_lat_wb = 54\n"


@pytest.fixture
def at(one_unit):
    def found(more, *, units="IP", altitude=0, basis="standard", outdoor=95, humidity=None):
        head = HEAD.format(
            units=units, altitude=altitude, basis=basis, outdoor=outdoor,
            humidity=humidity or "outdoor_wb = 75",
        )  # fmt: skip
        (only,) = one_unit(head + more).case.cooling
        return only

    return found


# Flows


def test_standard_air_weighs_the_same_anywhere(at):
    # 60 · 10 000 · 0.075 lb/ft³
    for altitude in (0, 5280):
        assert at("supply_airflow = 10000", altitude=altitude).supply_mass == pytest.approx(45_000)
    assert at("supply_airflow = 5000", units="SI", outdoor=35, humidity="outdoor_wb = 24"
              ).supply_mass == pytest.approx(6.0)  # fmt: skip


def test_site_air_is_thinner_by_the_pressure_ratio(at):
    # 0.8234 at 5 280 ft: 12.101 psia of 14.696 (ICAO standard atmosphere)
    found = at("supply_airflow = 10000", altitude=5280, basis="site")
    assert found.supply_mass == pytest.approx(45_000 * 0.82337, rel=1e-4)


def test_actual_air_is_weighed_where_the_fan_takes_it(at):
    # 80/67 °F has 13.846 ft³/lb, 55/54 °F 13.149 (CoolProp): blow-through, draw-through.
    blow = at(f'supply_airflow = 10000\nfan_position = "blow-through"\n{RETURN}', basis="actual")
    assert blow.supply_mass == pytest.approx(600_000 / 13.8458, rel=1.5e-3)
    draw = at(f"supply_airflow = 10000\n{RETURN}", basis="actual")
    assert draw.supply_mass == pytest.approx(600_000 / 13.1494, rel=1.5e-3)


def test_a_unit_s_own_basis_goes_before_the_project_s(at):
    found = at('supply_airflow = 10000\nairflow_basis = "standard"', altitude=5280, basis="site")
    assert found.supply_mass == pytest.approx(45_000)


@pytest.mark.parametrize("basis", ["standard", "site", "actual"])
def test_outdoor_air_as_typed_equal_to_supply_is_all_of_it(at, basis):
    more = "supply_airflow = 10000\noutdoor_airflow = 10000\ncool_lat_db = 55\ncool_lat_wb = 54"
    assert at(more, basis=basis, altitude=5280).outdoor_fraction == 1.0


def test_outdoor_air_above_the_supply_is_held_at_all_of_it(at):
    assert at("supply_airflow = 10000\noutdoor_airflow = 12000").outdoor_fraction == 1.0


@pytest.mark.parametrize("more", ["", "outdoor_airflow = 0"])
def test_no_outdoor_air(at, more):
    assert at(f"supply_airflow = 10000\n{more}").outdoor_mass == 0


def test_actual_outdoor_air_is_weighed_outdoors(at):
    # 105 °F with 0.0078 lb/lb has 14.41 ft³/lb (real-gas model), the air leaving the coil 13.15.
    more = f"supply_airflow = 10000\noutdoor_airflow = 5000\n{RETURN}"
    found = at(more, basis="actual", outdoor=105, humidity="outdoor_w = 0.0078")
    assert found.outdoor_mass == pytest.approx(300_000 / 14.4108, rel=1.5e-3)
    assert found.outdoor_fraction < 0.5


# Outdoor humidity


@pytest.mark.parametrize(
    "humidity",
    # One air, 95/75 °F: 66.77 °F dew point, 39.82 %, 0.014135 lb/lb (real-gas model).
    ["outdoor_wb = 75", "outdoor_dp = 66.77", "outdoor_rh = 39.82", "outdoor_w = 0.014135"],
)
def test_four_ways_to_state_the_outdoor_humidity(at, humidity):
    found = at("supply_airflow = 1", humidity=humidity)
    assert found.outdoor.w == pytest.approx(0.014135, rel=7e-3)


# The fan: 2 545 Btu/h a horsepower; a degree of 45 000 lb/h at 55/54 °F (0.0087 lb/lb) is
# 45 000 · (0.240 + 0.444 · 0.0087) = 10.97 MBH.


def test_without_a_word_of_the_fan_it_warms_nothing(at):
    found = at(f"supply_airflow = 10000\n{RETURN}")
    assert found.fan_heat == found.fan_rise == 0


def test_a_stated_rise_wins(at):
    found = at(f"supply_airflow = 10000\nfan_rise = 2\nfan_power = 50\n{RETURN}")
    assert found.fan_rise == pytest.approx(2.0)
    assert found.fan_heat == pytest.approx(2 * 10.97, rel=2e-3)


def test_the_motor_s_losses_count_in_the_airstream(at):
    fan = f"supply_airflow = 10000\nfan_power = 10\nmotor_efficiency = 92\n{RETURN}"
    assert at(fan).fan_heat == pytest.approx(25.45 / 0.92, rel=1e-6)
    assert at(f"{fan}motor_in_airstream = false").fan_heat == pytest.approx(25.45, rel=1e-6)


def test_an_efficiency_that_is_not_stated_is_the_limit_s(at):
    assert at(f"supply_airflow = 10000\nfan_power = 10\n{RETURN}").fan_heat == pytest.approx(
        25.45 / 0.90, rel=1e-6
    )


def test_powers_are_each_fan_s(at):
    found = at(f"supply_airflow = 10000\nfan_power = 5\nfan_count = 2\n{RETURN}")
    assert found.fan_heat == pytest.approx(25.45 / 0.90, rel=1e-6)


def test_power_from_pressure_and_efficiency_at_the_inlet_s_volume(at):
    # 45 000 lb/h · 13.149 ft³/lb / 60 = 9 862 cfm; · 4 / (6 356 · 0.65) = 9.548 bhp
    fan = f"supply_airflow = 10000\nfan_total_pressure = 4\nfan_efficiency = 65\n{RETURN}"
    found = at(f"{fan}motor_in_airstream = false")
    assert found.fan_heat == pytest.approx(9.548 * 2.545, rel=1.5e-3)


def test_pressure_without_efficiency_gives_nothing(at):
    assert at(f"supply_airflow = 10000\nfan_total_pressure = 4\n{RETURN}").fan_heat == 0


@pytest.mark.parametrize("position", ["draw-through", "blow-through"])
def test_going_back_over_the_fan_undoes_it(at, position):
    fan = f'fan_position = "{position}"\nfan_total_pressure = 6\nfan_efficiency = 60'
    found = at(f"supply_airflow = 10000\n{fan}\n{RETURN}")
    behind = found.scheduled_leaving
    front = found.before_fan(behind)
    heat = found.fan_heat_at(front)
    assert found.supply_mass * (behind.h - front.h) / 1000 == pytest.approx(heat, rel=1e-9)
    assert behind.w == front.w


def test_a_supply_airflow_of_zero_is_told(at):
    with pytest.raises(Absent, match="airflow is 0"):
        at("supply_airflow = 0").supply_mass  # noqa: B018  asked for its absence
