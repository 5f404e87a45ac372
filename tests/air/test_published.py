"""Published values, held against what the program computes from the same givens.

The values stand in published.csv, each with its source; none is ever adapted. A value may differ
by half of its last printed digit and by what the handbook's ideal-gas formulas differ from the
real-gas model its tables are made with. What was read off a chart holds to 1.5 %, a temperature to
a quarter of a kelvin. Where a row differs by more, the row allows it and says why.

Left out: density ratios along the standard atmosphere's lapse, a convention not used here.
"""

import csv
from collections.abc import Callable
from pathlib import Path
from typing import TYPE_CHECKING

import pytest

from schedtui.air.coil import coil_load, heating_load
from schedtui.air.flow import dry_air_mass, moisture_flow
from schedtui.air.mixing import mix
from schedtui.air.psychro import station_pressure
from schedtui.air.room import moisture_to_add, room_met
from schedtui.air.state import Air, State

if TYPE_CHECKING:
    from schedtui.units import System

IP = Air("IP", 14.696)
SI = Air("SI", 101.325)
BAR = Air("SI", 100.0)

# Share that the handbook's formulas may differ from a printed value, by quantity [%]; a
# temperature, a ratio and a condition line have no such share.
MODEL_SHARE = {
    "W": 0.7,
    "W1": 0.7,
    "W2": 0.7,
    "W3": 0.7,
    "dW": 0.7,
    "h": 0.5,
    "h1": 0.5,
    "h2": 0.5,
    "v": 0.15,
    "v1": 0.15,
    "V3": 0.15,
    "mdot": 0.15,
    "pws": 0.05,
    "hf": 0.5,  # 4.186 kJ/kg K throughout, as in the handbook's wet-bulb equation
    "hg": 0.1,
    "rh2": 0.5,
    "q": 0.5,
    "q gross": 0.5,
    "q net": 0.5,
    "q net of condensate": 0.5,
    "q cool": 0.5,
    "q reheat": 0.5,
    "condensate": 0.7,
    "steam": 0.7,
    "water": 0.7,
}
CHART_SHARE = 1.5
CHART_DEGREES = {"C": 0.25, "F": 0.5}

with (Path(__file__).parent / "published.csv").open(encoding="utf-8", newline="") as file:
    ROWS = list(csv.DictReader(file))


def number(what: str, mark: str) -> float:
    """Return the number before a mark, such as 1000 of `std atm 1000 ft`."""
    return float(what.partition(mark)[0].rpartition(" ")[2])


def atmosphere(what: str) -> dict[str, float]:
    system: System = "IP" if what.endswith(" ft") else "SI"
    return {"p": station_pressure(number(what, " ft" if system == "IP" else " m"), system)}


def density_ratio(what: str) -> dict[str, float]:
    return {"ADR": Air.at_altitude("IP", number(what, " ft")).density_ratio}


def saturated(what: str) -> dict[str, float]:
    metric = what.endswith("C")
    state = (SI if metric else IP).by_relative_humidity(number(what, "C" if metric else "F"), 100)
    return {"W": state.w, "v": state.v, "h": state.h}


def water(what: str) -> dict[str, float]:
    t = number(what, "C")
    w = SI.saturation_humidity_ratio(t)
    # A kilogram an hour of condensate at that temperature, in kJ/h.
    dry = SI.by_humidity_ratio(t, 0.001)
    load = coil_load(1, SI.by_humidity_ratio(t, 0.002), dry)
    return {
        "pws": SI.pressure * w / (0.621945 + w),
        "hf": load.condensate_heat / load.condensate * 3600,
        "hg": SI.enthalpy(t, 1) - SI.enthalpy(t, 0),
    }


def properties(state: State) -> dict[str, float]:
    return {
        "W": state.w,
        "dp": state.dp,
        "wb": state.wb,
        "rh": state.rh / 100,
        "h": state.h,
        "v": state.v,
    }


def stream(cubic_metres_a_second: float, state: State) -> float:
    return dry_air_mass(cubic_metres_a_second * 1000, "actual", state.air, state.v)


def heated_metric() -> dict[str, float]:
    cold = SI.by_relative_humidity(2, 100)
    q = heating_load(stream(10, cold), cold, 40)
    return {"h1": cold.h, "h2": cold.heated_to(40).h, "v1": cold.v, "q": q}


def heated() -> dict[str, float]:
    cold = IP.by_relative_humidity(35, 100)
    mass = dry_air_mass(20_000, "actual", IP, cold.v)
    return {"q": heating_load(mass, cold, 100) * 1000}


def cooled_metric() -> dict[str, float]:
    warm, cold = SI.by_relative_humidity(30, 50), SI.by_relative_humidity(10, 100)
    load = coil_load(stream(5, warm), warm, cold)
    net = load.total - load.condensate_heat
    return {"h1": warm.h, "h2": cold.h, "W1": warm.w, "W2": cold.w, "q net of condensate": net}


def cooled() -> dict[str, float]:
    warm, cold = IP.by_relative_humidity(85, 50), IP.by_relative_humidity(50, 100)
    load = coil_load(dry_air_mass(10_000, "actual", IP, warm.v), warm, cold)
    net = (load.total - load.condensate_heat) / 12
    return {"q": net, "h1": warm.h, "v1": warm.v, "h2": cold.h}


def mixed_metric() -> dict[str, float]:
    a, b = SI.by_wet_bulb(4, 2), SI.by_relative_humidity(25, 50)
    mixed = mix(a, stream(2, a), b, stream(6.25, b))
    return {"t3": mixed.db, "wb3": mixed.wb}


def mixed() -> dict[str, float]:
    a, b = IP.by_wet_bulb(40, 35), IP.by_relative_humidity(75, 50)
    masses = [dry_air_mass(q, "actual", IP, s.v) for q, s in ((5_000, a), (15_000, b))]
    state = mix(a, masses[0], b, masses[1])
    return {"t3": state.db, "wb3": state.wb}


def humidified_by_steam() -> dict[str, float]:
    dry = SI.by_wet_bulb(20, 8)
    w = SI.by_dew_point(20, 13).w
    # Saturated steam of 110 °C brings 2691 kJ/kg (steam tables).
    moist = SI.by_enthalpy(dry.h + (w - dry.w) * 2691, w)
    return {"t2": moist.db, "steam": moisture_to_add(2, dry, moist) / 3.6}


def room_supplied_at_15() -> dict[str, float]:
    room = SI.by_wet_bulb(25, 19)
    steam = SI.enthalpy(25, 1) - SI.enthalpy(25, 0)
    line = (9 + 0.0015 * steam) / 0.0015
    mass, supply = 1.0, room.heated_to(15)
    for _ in range(50):  # to the mass that meets 9 kW and takes up 1.5 g/s
        supply = SI.by_humidity_ratio(15, room.w - 0.0015 / mass)
        mass *= 9 / room_met(mass, supply, room).sensible
    met = room_met(mass, supply, room)
    assert met.moisture == pytest.approx(1.5 * 3.6, rel=1e-6)
    assert (met.sensible + met.latent) / 0.0015 == pytest.approx(line, rel=1e-6)
    return {
        "condition line": (room.h - supply.h) / (room.w - supply.w),
        "wb supply": supply.wb,
        "airflow": mass * supply.v,
    }


def heated_then_humidified() -> dict[str, float]:
    cold = BAR.by_relative_humidity(10, 30)
    mass = stream(45 / 60, cold)
    steam = moisture_to_add(mass, cold, BAR.by_relative_humidity(25, 60)) / 60
    return {"q": heating_load(mass, cold, 22) * 60, "steam": steam}


def cooled_by_minutes() -> dict[str, float]:
    warm, cold = SI.by_relative_humidity(30, 80), SI.by_relative_humidity(14, 100)
    load = coil_load(stream(10 / 60, warm), warm, cold)
    return {"condensate": load.condensate / 60, "q net": (load.total - load.condensate_heat) * 60}


def mixed_by_minutes() -> dict[str, float]:
    a, b = SI.by_relative_humidity(14, 100), SI.by_relative_humidity(32, 60)
    m_a, m_b = stream(50 / 60, a), stream(20 / 60, b)
    c = mix(a, m_a, b, m_b)
    return {"W3": c.w, "t3": c.db, "rh3": c.rh / 100, "V3": (m_a + m_b) * c.v * 60}


def heated_by_minutes() -> dict[str, float]:
    cold = BAR.by_relative_humidity(10, 80)
    q = heating_load(stream(150 / 60, cold), cold, 30) * 60
    return {"q": q, "rh2": cold.heated_to(30).rh / 100}


def dehumidified() -> dict[str, float]:
    air = Air("SI", 101.3)
    warm, cold = air.by_relative_humidity(30, 50), air.by_relative_humidity(10, 100)
    mass = stream(280 / 60, warm)
    load = coil_load(mass, warm, cold)
    return {
        "mdot": mass * 60,
        "dW": warm.w - cold.w,
        "q": (load.total - load.condensate_heat) * 60 / 211,
    }


def mixed_at_a_bar() -> dict[str, float]:
    a, b = BAR.by_humidity_ratio(5, 0.002), BAR.by_relative_humidity(24, 50)
    c = mix(a, stream(142 / 60, a), b, stream(425 / 60, b))
    return {"W3": c.w, "t3": c.db}


def cooled_in_old_tons() -> dict[str, float]:
    warm, cold = SI.by_relative_humidity(35, 50), SI.by_relative_humidity(20, 100)
    load = coil_load(stream(120 / 60, warm), warm, cold)
    return {"q gross": load.total * 3600 / 14_000, "condensate": load.condensate}


def mixed_from_two_rooms() -> dict[str, float]:
    a, b = BAR.by_relative_humidity(15, 40), BAR.by_relative_humidity(32, 70)
    c = mix(a, stream(40 / 60, a), b, stream(20 / 60, b))
    return {"t3": c.db, "rh3": c.rh / 100}


def cooled_and_reheated() -> dict[str, float]:
    warm, cold = SI.by_relative_humidity(35, 80), SI.by_relative_humidity(5, 100)
    load = coil_load(2, warm, cold)
    return {
        "condensate": load.condensate / 3600,
        "q cool": load.total - load.condensate_heat,
        "q reheat": heating_load(2, cold, 20),
    }


def cooled_by_evaporation() -> dict[str, float]:
    warm = SI.by_relative_humidity(38, 10)
    # Energy balance with water of 21 °C: h1 + (W2 − W1) · hf = h2 at 21 °C.
    water_h = 4.186 * 21
    steam = SI.enthalpy(21, 1) - SI.enthalpy(21, 0)
    w = (warm.h - water_h * warm.w - SI.enthalpy(21, 0)) / (steam - water_h)
    cool = SI.by_humidity_ratio(21, w)
    mass = stream(140 / 60, warm)
    return {"water": moisture_flow(mass, w - warm.w, "SI"), "rh2": cool.rh / 100}


TABLES: dict[str, Callable[[str], dict[str, float]]] = {
    "B1": atmosphere,
    "B2": density_ratio,
    "B4": saturated,
    "B5": saturated,
    "B6": saturated,
    "B7": water,
}
EXAMPLES: dict[str, Callable[[], dict[str, float]]] = {
    "B8": lambda: properties(IP.by_wet_bulb(100, 65)),
    "B9": lambda: properties(SI.by_wet_bulb(40, 20)),
    "B10": heated_metric,
    "B11": heated,
    "B12": cooled_metric,
    "B13": cooled,
    "B14": mixed_metric,
    "B15": mixed,
    "B16": humidified_by_steam,
    "B17": room_supplied_at_15,
    "B18": lambda: properties(BAR.by_relative_humidity(25, 75)),
    "B19": lambda: properties(SI.by_wet_bulb(25, 15)),
    "B20": lambda: properties(SI.by_relative_humidity(35, 40)),
    "B21": heated_then_humidified,
    "B22": cooled_by_minutes,
    "B23": mixed_by_minutes,
    "B24": heated_by_minutes,
    "B25": dehumidified,
    "B26": mixed_at_a_bar,
    "B27": lambda: properties(Air("SI", 101.32).by_wet_bulb(32, 26)),
    "B28": cooled_in_old_tons,
    "B29": lambda: properties(IP.by_relative_humidity(80, 30)),
    "B30": lambda: properties(IP.by_wet_bulb(80, 60)),
    "B31": lambda: properties(IP.by_relative_humidity(75, 50)),
    "B32": mixed_from_two_rooms,
    "B35": cooled_and_reheated,
    "B37": cooled_by_evaporation,
}


def computed(row: dict[str, str]) -> float:
    case = row["case"]
    values = TABLES[case](row["what"]) if case in TABLES else EXAMPLES[case]()
    return values[row["quantity"]]


def tolerance(row: dict[str, str]) -> float:
    published = float(row["published"])
    decimals = len(row["published"].partition(".")[2])
    half_a_digit = 0.5 * 10**-decimals
    degrees = CHART_DEGREES.get(row["unit"])
    share = MODEL_SHARE.get(row["quantity"], 0.0)
    if row["reading"] == "chart" and degrees is not None:
        return half_a_digit + degrees
    if row["reading"] == "chart":
        share = CHART_SHARE
    return half_a_digit + (share + float(row["allowance_pct"] or 0)) / 100 * abs(published)


@pytest.mark.parametrize("row", ROWS, ids=lambda r: f"{r['case']}-{r['what']}-{r['quantity']}")
def test_published_value(row) -> None:
    assert computed(row) == pytest.approx(float(row["published"]), abs=tolerance(row))


def test_every_value_names_its_source_and_every_allowance_its_reason() -> None:
    assert len(ROWS) == 149
    for row in ROWS:
        assert row["source"], row
        assert row["seen_or_memory"] in {"seen", "from memory"}, row
        assert row["reading"] in {"table", "chart", "worked"}, row
        assert bool(row["allowance_pct"]) == bool(row["why"]), row


def test_no_example_is_without_a_published_value() -> None:
    assert {row["case"] for row in ROWS} == TABLES.keys() | EXAMPLES.keys()
