"""The formulas, what they refuse, and the library that stands behind them."""

import math
import subprocess
import sys
from concurrent.futures import ThreadPoolExecutor

import psychrolib
import pytest

from schedtui.air.psychro import (
    FREEZING_POINT,
    STANDARD_PRESSURE,
    formulas,
    station_pressure,
)
from schedtui.errors import AirError

IP, SI = formulas("IP"), formulas("SI")


def test_standard_pressure_is_the_standard_atmosphere() -> None:
    # ICAO standard atmosphere: 101 325 Pa; 14.696 psia in the handbook's eq. 3.
    assert station_pressure(0, "SI") == pytest.approx(101.325, rel=1e-12)
    assert station_pressure(0, "IP") == 14.696
    assert STANDARD_PRESSURE == {"IP": 14.696, "SI": 101.325}


def test_a_wet_bulb_below_that_of_dry_air_is_refused_not_clamped() -> None:
    with pytest.raises(AirError, match=r"95 °F dry bulb has a wet bulb of 40 °F"):
        IP.humidity_ratio_by_wet_bulb(95, 40, 14.696)
    with pytest.raises(AirError, match=r"35 °C dry bulb has a wet bulb of 4 °C"):
        SI.humidity_ratio_by_wet_bulb(35, 4, 101.325)


@pytest.mark.parametrize(
    ("call", "sentence"),
    [
        (lambda: IP.humidity_ratio_by_wet_bulb(70, 71, 14.696), "wet bulb 71 °F is above dry bulb"),
        (lambda: SI.humidity_ratio_by_wet_bulb(20, 21, 101.3), "wet bulb 21 °C is above dry bulb"),
        (lambda: IP.humidity_ratio_by_dew_point(70, 71, 14.696), "dew point 71 °F is above dry"),
        (lambda: IP.humidity_ratio_by_relative_humidity(70, 101, 14.7), "101 % is outside 0 to"),
        (lambda: IP.humidity_ratio_by_relative_humidity(70, -1, 14.7), "-1 % is outside 0 to"),
        (lambda: IP.humidity_ratio_by_relative_humidity(70, math.nan, 14.7), "nan % is outside"),
        (lambda: IP.humidity_ratio_by_relative_humidity(300, 90, 14.7), "would boil at 14.7 psia"),
        (lambda: IP.humidity_ratio_by_wet_bulb(500, 60, 14.7), "dry bulb 500 °F is outside"),
        (lambda: SI.saturation_humidity_ratio(-101, 101.3), "-101 °C is outside the formulas'"),
        (lambda: SI.dew_point(20, 0, 101.3), "too low for the air to have a dew point"),
        (lambda: station_pressure(50_000, "IP"), "50000 ft is outside the standard atmosphere"),
        (lambda: station_pressure(-6_000, "SI"), "-6000 m is outside the standard atmosphere"),
    ],
)
def test_no_such_air(call, sentence) -> None:
    with pytest.raises(AirError, match=sentence):
        call()


def test_dry_air_is_air() -> None:
    # Nothing is put in the place of no moisture: 0.240 · 70 and 1.006 · 20 (handbook eq. 30).
    assert IP.humidity_ratio_by_relative_humidity(70, 0, 14.696) == 0
    assert IP.enthalpy(70, 0) == pytest.approx(16.8, rel=1e-12)
    assert SI.enthalpy(20, 0) == pytest.approx(20.12, rel=1e-12)
    assert 40 < IP.wet_bulb(70, 0, 14.696) < 50


def test_water_boils_before_it_saturates_air() -> None:
    assert IP.saturation_humidity_ratio(300, 14.696) == math.inf


@pytest.mark.parametrize(("ours", "triple"), [(IP, 32.018), (SI, 0.01)])
def test_dew_point_across_the_gap_at_the_triple_point(ours, triple) -> None:
    pressure = STANDARD_PRESSURE[ours.system]
    low = ours.saturation_humidity_ratio(triple, pressure)
    high = ours.saturation_humidity_ratio(math.nextafter(triple, 99), pressure)
    assert high > low  # the formulas leave a gap there, and a search in it has no answer
    inside = (low + high) / 2
    assert ours.dew_point(triple + 30, inside, pressure) == pytest.approx(triple, abs=1e-4)
    assert ours.wet_bulb(triple + 1, inside, pressure) > triple - 1e-3


@pytest.mark.parametrize("ours", [IP, SI])
def test_wet_bulb_finds_back_to_what_it_came_from(ours) -> None:
    pressure = STANDARD_PRESSURE[ours.system]
    for db, wb in [(80.0, 67.0), (95.0, 75.0), (60.0, 40.0)]:
        dry, wet = (db, wb) if ours is IP else ((db - 32) / 1.8, (wb - 32) / 1.8)
        w = ours.humidity_ratio_by_wet_bulb(dry, wet, pressure)
        assert ours.wet_bulb(dry, w, pressure) == pytest.approx(wet, abs=2e-9)


@pytest.mark.parametrize("unit_system", [psychrolib.IP, psychrolib.SI])
def test_the_shared_library_is_neither_used_nor_set(unit_system) -> None:
    before = psychrolib.PSYCHROLIB_UNITS
    try:
        psychrolib.SetUnitSystem(unit_system)
        # Handbook ch. 1, Table 3 (2017): 1.2282 kPa at 10 °C, which is 0.178135 psia at 50 °F.
        w = SI.saturation_humidity_ratio(10, 101.325)
        assert 101.325 * w / (0.621945 + w) == pytest.approx(1.2282, rel=4e-4)
        w = IP.saturation_humidity_ratio(50, 14.696)
        assert 14.696 * w / (0.621945 + w) == pytest.approx(0.178135, rel=4e-4)
        assert psychrolib.GetUnitSystem() is unit_system
    finally:
        psychrolib.PSYCHROLIB_UNITS = before


def _ip(number: int) -> tuple[float, ...]:
    db, rh = 60 + number / 4, 20 + number / 2
    w = IP.humidity_ratio_by_relative_humidity(db, rh, 14.0)
    return w, IP.enthalpy(db, w), IP.wet_bulb(db, w, 14.0), IP.volume(db, w, 14.0)


def _si(number: int) -> tuple[float, ...]:
    db, rh = 15 + number / 8, 20 + number / 2
    w = SI.humidity_ratio_by_relative_humidity(db, rh, 97.0)
    return w, SI.enthalpy(db, w), SI.wet_bulb(db, w, 97.0), SI.volume(db, w, 97.0)


def test_two_unit_systems_at_once_give_what_each_gives_alone() -> None:
    numbers = range(100)
    alone = [_ip(n) for n in numbers], [_si(n) for n in numbers]
    together = [(_ip(n), _si(n)) for n in numbers]
    assert [ip for ip, _ in together] == alone[0]
    assert [si for _, si in together] == alone[1]
    with ThreadPoolExecutor(4) as threads:
        ip, si = threads.map(_ip, numbers), threads.map(_si, numbers)
        assert (list(ip), list(si)) == alone


def test_importing_loads_neither_numpy_nor_numba(tmp_path) -> None:
    # A numba that fails the import if anything loads it, found before any other.
    (tmp_path / "numba.py").write_text("raise SystemExit('numba was loaded')\n", encoding="utf-8")
    program = (
        f"import sys; sys.path.insert(0, {str(tmp_path)!r}); "
        "import schedtui.air.psychro, schedtui.air.state, schedtui.air.coil, schedtui.air.mixing, "
        "schedtui.air.fan, schedtui.air.room; "
        "assert not {'numpy', 'numba'} & set(sys.modules), sorted(sys.modules)"
    )
    done = subprocess.run(
        [sys.executable, "-c", program], capture_output=True, text=True, check=False
    )
    assert (done.returncode, done.stderr) == (0, "")


def test_a_numba_that_is_loaded_already_stays_loaded(tmp_path) -> None:
    (tmp_path / "numba.py").write_text("", encoding="utf-8")
    program = (
        f"import sys; sys.path.insert(0, {str(tmp_path)!r}); import numba; "
        "import schedtui.air.psychro as p; assert sys.modules['numba'] is numba; "
        "assert not p.formulas('IP').library.has_numba"
    )
    done = subprocess.run(
        [sys.executable, "-c", program], capture_output=True, text=True, check=False
    )
    assert (done.returncode, done.stderr) == (0, "")


@pytest.mark.parametrize(("system", "coldest", "hottest"), [("IP", -40, 200), ("SI", -40, 93)])
def test_wet_bulbs_agree_with_the_librarys_own_search(system, coldest, hottest) -> None:
    # psychrolib's search, which halves its way from the dew point to the dry bulb.
    asked = formulas(system)
    pressure = STANDARD_PRESSURE[system]
    freezing = FREEZING_POINT[system]
    compared = 0
    for db in range(coldest, hottest, 7):
        for share in (0.02, 0.1, 0.35, 0.6, 0.9, 0.999):
            w = share * asked.saturation_humidity_ratio(db, pressure)
            theirs = asked.library.GetTWetBulbFromHumRatio(db, w, pressure * asked.thousand)
            ours = asked.wet_bulb(db, w, pressure)
            if ours < freezing <= theirs:
                continue  # one humidity ratio, two wet bulbs
            assert ours == pytest.approx(theirs, abs=1e-7)
            compared += 1
    assert compared > 100


@pytest.mark.parametrize(("system", "db"), [("IP", 41.0), ("SI", 4.0)])
def test_of_two_wet_bulbs_about_freezing_the_lower_is_told(system, db) -> None:
    asked, pressure = formulas(system), STANDARD_PRESSURE[system]
    freezing = FREEZING_POINT[system]
    # Handbook, ch. 1: eq. 35 just below freezing gives more moisture than eq. 33 just above it.
    over_ice = asked.humidity_ratio_by_wet_bulb(db, freezing - 0.1, pressure)
    over_water = asked.humidity_ratio_by_wet_bulb(db, freezing, pressure)
    assert over_water < over_ice
    assert asked.wet_bulb(db, over_ice, pressure) == pytest.approx(freezing - 0.1, abs=1e-8)
    drier = asked.humidity_ratio_by_wet_bulb(db, freezing - 1, pressure)
    assert asked.wet_bulb(db, drier, pressure) == pytest.approx(freezing - 1, abs=1e-8)


@pytest.mark.parametrize(("system", "db"), [("IP", 250.0), ("SI", 120.0)])
def test_air_hotter_than_boiling_has_a_wet_bulb_below_it(system, db) -> None:
    asked, pressure = formulas(system), STANDARD_PRESSURE[system]
    wet_bulb = asked.wet_bulb(db, 0.02, pressure)
    assert wet_bulb < {"IP": 212.0, "SI": 100.0}[system]
    assert asked.humidity_ratio_by_wet_bulb(db, wet_bulb, pressure) == pytest.approx(0.02, abs=1e-9)
