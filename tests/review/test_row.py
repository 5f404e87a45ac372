"""What a row says by itself, without any condition."""

import pytest

from schedtui.errors import Absent

TEXT = """\
[project]
title = "Row"
units = "IP"
altitude = {altitude}
airflow_basis = "{basis}"
[[unit]]
tag = "AHU-1"
fan_position = "{fan}"
fan_rise = {rise}
supply_airflow = 10000
cool_eat_db = 80
cool_eat_wb = 67
cool_lat_db = 55
cool_lat_wb = 54
"""


@pytest.fixture
def row(one_unit):
    def of(basis="standard", altitude=0, fan="draw-through", rise=0, drop=""):
        text = TEXT.format(basis=basis, altitude=altitude, fan=fan, rise=rise)
        kept = [line for line in text.splitlines() if line.split(" ")[0] != drop]
        return one_unit("\n".join(kept)).case.row

    return of


def test_standard_air_at_any_height(row):
    # 45 000 lb/h from 80/67 to 55/54 °F: 399.5 and 274.3 MBH (Fundamentals 2017, ch. 1).
    assert row().coil.total == pytest.approx(399.5, rel=1e-3)
    assert row().coil.sensible == pytest.approx(274.3, rel=1e-3)
    assert row(altitude=5280).supply_mass == 45_000


def test_site_air_is_lighter_by_the_pressure(row):
    expected = 45_000 * 12.101 / 14.696  # ICAO standard atmosphere at 5 280 ft
    assert row("site", 5280).supply_mass == pytest.approx(expected, rel=1e-3)


# Specific volumes by the real-gas model at sea level: 13.846 ft³/lb at 80/67 °F, 13.154 at
# 55/54 °F, and 13.794 at 78 °F with the moisture of 80/67 °F.
@pytest.mark.parametrize(
    ("fan", "rise", "volume"),
    [
        ("draw-through", 2, 13.154),
        ("blow-through", 0, 13.846),
        ("blow-through", 2, 13.794),  # the coil's entering air is the fan's leaving air
    ],
)
def test_actual_air_is_taken_at_the_fan_s_inlet(row, fan, rise, volume):
    found = row("actual", fan=fan, rise=rise).supply_mass
    assert found == pytest.approx(600_000 / volume, rel=1.5e-3)


@pytest.mark.parametrize("key", ["supply_airflow", "cool_eat_wb", "cool_lat_db"])
def test_a_gap_names_its_key(row, key):
    with pytest.raises(Absent) as absent:
        row(drop=key).coil  # noqa: B018  asked for its absence
    assert key in absent.value.keys
