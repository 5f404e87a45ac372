"""By what factors a number in another unit is off: of the units' definitions."""

import pytest

from schedtui.review.slips import slips
from schedtui.units import AIR_PRESSURE, AIRFLOW, LOAD, SHAFT_POWER, WATER_FLOW

BTU, FOOT, GALLON = 1055.05585262, 0.3048, 3.785411784  # J, m, L
KW_IN_MBH = 3600 / BTU  # of 1 000 W in 1 000 Btu/h
TON_IN_KW = 12_000 * BTU / 3_600_000
CFM = FOOT**3 / 60 * 1000  # L/s in one
GPM = GALLON / 60  # L/s in one
HP = 0.745699872  # kW in one
INCH = 249.089  # Pa in an inch of water at 4 °C

SLIPS = [
    (LOAD, "IP", 1 / KW_IN_MBH, "kW"),
    (LOAD, "IP", 1 / 12, "tons"),
    (LOAD, "SI", KW_IN_MBH, "MBH"),
    (LOAD, "SI", 1 / TON_IN_KW, "tons"),
    (AIRFLOW, "IP", CFM, "L/s"),
    (AIRFLOW, "IP", CFM * 3.6, "m³/h"),
    (AIRFLOW, "SI", 1 / CFM, "cfm"),
    (AIRFLOW, "SI", 3.6, "m³/h"),
    (WATER_FLOW, "IP", GPM, "L/s"),
    (WATER_FLOW, "IP", GPM * 3.6, "m³/h"),
    (WATER_FLOW, "SI", 1 / GPM, "gpm"),
    (WATER_FLOW, "SI", 3.6, "m³/h"),
    (SHAFT_POWER, "IP", HP, "kW"),
    (SHAFT_POWER, "SI", 1 / HP, "hp"),
    (AIR_PRESSURE, "IP", INCH, "Pa"),
    (AIR_PRESSURE, "IP", 25.4, "mm"),
    (AIR_PRESSURE, "SI", 1 / INCH, "in. wg"),
]


def called(quantity, system, ratio):
    return " or ".join(slip.what for slip in slips(quantity, system, ratio))


@pytest.mark.parametrize(("quantity", "system", "ratio", "unit"), SLIPS)
def test_a_number_in_another_unit_is_recognized(quantity, system, ratio, unit):
    assert unit in called(quantity, system, ratio)


@pytest.mark.parametrize(("quantity", "system", "ratio", "unit"), SLIPS)
def test_what_it_would_be_is_near_what_was_meant(quantity, system, ratio, unit):
    factors = [slip.factor for slip in slips(quantity, system, ratio) if unit in slip.what]
    assert factors == pytest.approx([ratio] * len(factors), rel=2e-3)


@pytest.mark.parametrize("off", [0.89, 1.11])
def test_a_tenth_off_still_looks_like_it(off):
    assert "kW" in called(LOAD, "IP", off / KW_IN_MBH)


@pytest.mark.parametrize("off", [0.95, 1.05])
def test_horsepower_and_kilowatts_are_too_near_for_that(off):
    assert called(SHAFT_POWER, "IP", off * HP) == ""
    assert "kW" in called(SHAFT_POWER, "IP", (1 + (off - 1) * 0.7) * HP)


@pytest.mark.parametrize("quantity", [LOAD, AIRFLOW, WATER_FLOW])
@pytest.mark.parametrize("ratio", [1000.0, 100.0, 0.01, 0.001])
def test_places_lost_or_won(quantity, ratio):
    for system in ("IP", "SI"):
        assert called(quantity, system, ratio)


@pytest.mark.parametrize("quantity", [LOAD, AIRFLOW, WATER_FLOW, SHAFT_POWER, AIR_PRESSURE])
@pytest.mark.parametrize("ratio", [1.0, 0.85, 1.2, 0.6, 1.42, 0.0, -0.29])
def test_no_slip_where_none_is(quantity, ratio):
    for system in ("IP", "SI"):
        assert called(quantity, system, ratio) == ""
