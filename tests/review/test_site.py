"""The site: station pressure as given, else of the altitude in the standard atmosphere."""

import pytest

from schedtui.review.site import site_of


@pytest.fixture
def site(reviewed):
    return lambda lines: site_of(reviewed(f'[project]\ntitle = "Site"\n{lines}\n').schedule)


# ICAO standard atmosphere: 84.307 kPa at 1 524 m (5 000 ft: 12.228 psia).
@pytest.mark.parametrize(
    ("lines", "pressure"),
    [
        ('units = "IP"', 14.696),
        ('units = "SI"', 101.325),
        ('units = "IP"\naltitude = 5000', 12.228),
        ('units = "SI"\naltitude = 1524', 84.307),
        ('units = "IP"\npressure = 13.4', 13.4),
        ('units = "SI"\npressure = 92.4\naltitude = 1524', 92.4),
    ],
)
def test_station_pressure(site, lines, pressure):
    assert site(lines).air.pressure == pytest.approx(pressure, rel=1e-4)


def test_airflows_are_standard_unless_said(site):
    assert site('units = "IP"').airflow_basis == "standard"
    assert site('units = "IP"\nairflow_basis = "actual"').airflow_basis == "actual"


def test_limits_in_force_are_the_project_s_else_those_of_the_unit_system(site):
    assert site('units = "IP"').limits.entering_db == 1.0
    assert site('units = "SI"').limits.entering_db == 0.6
    assert site('units = "IP"\n[limits]\nentering_db = 2').limits.entering_db == 2.0
