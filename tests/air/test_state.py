"""States of moist air; the published values stand in test_published.py."""

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from schedtui.air.state import Air
from schedtui.errors import AirError

SEA_LEVEL = Air("IP", 14.696)
METRIC = Air("SI", 101.325)


@pytest.mark.parametrize("pressure", [0, -1, float("nan"), float("inf")])
def test_a_pressure_that_is_none(pressure) -> None:
    with pytest.raises(AirError, match=r"station pressure .* psia is not above 0"):
        Air("IP", pressure)


def test_density_ratio_is_pressure_over_standard_pressure() -> None:
    # Published altitude-correction table at constant temperature: 0.801 at 6 000 ft.
    assert Air.at_altitude("IP", 6_000).density_ratio == pytest.approx(0.801, abs=5e-4)
    assert METRIC.density_ratio == 1


def test_one_state_by_every_way_of_stating_it() -> None:
    state = SEA_LEVEL.by_wet_bulb(80, 67)
    for same in (
        SEA_LEVEL.by_humidity_ratio(80, state.w),
        SEA_LEVEL.by_relative_humidity(80, state.rh),
        SEA_LEVEL.by_dew_point(80, state.dp),
        SEA_LEVEL.by_enthalpy(state.h, state.w),
        SEA_LEVEL.by_dry_bulb_and_enthalpy(80, state.h),
    ):
        assert (same.db, same.w, same.h) == pytest.approx((80, state.w, state.h), rel=1e-9)
        assert (same.wb, same.dp, same.rh) == pytest.approx((67, state.dp, state.rh), rel=1e-8)


def test_the_stated_wet_bulb_is_kept_where_one_humidity_has_two() -> None:
    state = SEA_LEVEL.by_wet_bulb(35, 31.9)
    assert state.wb == 31.9
    assert state == SEA_LEVEL.by_humidity_ratio(35, state.w)


@pytest.mark.parametrize("air", [SEA_LEVEL, METRIC, Air.at_altitude("IP", 7_000)])
@settings(deadline=None)
@given(position=st.floats(0, 1))
def test_saturated_air_is_not_taken_for_fog(air, position) -> None:
    low, high = (-30.0, 120.0) if air.system == "IP" else (-34.0, 49.0)
    t = low + position * (high - low)
    assert not air.by_wet_bulb(t, t).supersaturated
    assert not air.by_relative_humidity(t, 100).supersaturated
    assert not air.by_dew_point(t, t).supersaturated


def test_fog_is_a_state() -> None:
    fog = SEA_LEVEL.by_humidity_ratio(50, 0.009)  # saturation: 0.007661 (handbook Table 2, IP)
    assert fog.supersaturated
    assert fog.rh > 100
    assert (fog.wb, fog.dp) == (50, 50)


def test_heating_keeps_the_moisture() -> None:
    state = SEA_LEVEL.by_wet_bulb(55, 54)
    warm = state.heated_to(95)
    assert (warm.db, warm.w) == (95, state.w)
    assert state.at(w=0.002).db == 55
    assert state.at(db=60, w=0.002).h == SEA_LEVEL.enthalpy(60, 0.002)


@pytest.mark.parametrize(
    ("call", "sentence"),
    [
        (lambda: SEA_LEVEL.by_humidity_ratio(70, -0.001), "is no amount of moisture"),
        (lambda: SEA_LEVEL.by_humidity_ratio(70, float("nan")), "is no amount of moisture"),
        (lambda: SEA_LEVEL.by_enthalpy(20, -0.001), "is no amount of moisture"),
        (lambda: SEA_LEVEL.by_enthalpy(2_000, 0.001), "outside the formulas' range"),
        (lambda: SEA_LEVEL.by_dry_bulb_and_enthalpy(70, 10), "is no amount of moisture"),
        (lambda: METRIC.by_wet_bulb(20, 15).heated_to(900), "outside the formulas' range"),
    ],
)
def test_no_such_state(call, sentence) -> None:
    with pytest.raises(AirError, match=sentence):
        call()
