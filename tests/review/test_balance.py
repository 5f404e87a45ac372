"""Energy and moisture over the whole path: what goes in comes out, to 1e-9 of the largest stream.

Held over every drawn unit, by the public states, masses and loads alone; the warming of air by so
many degrees is taken by the handbook's own coefficients, and nothing else of the program is used.
"""

import pytest

CP = {"IP": (0.240, 0.444), "SI": (1.006, 1.86)}  # Fundamentals, ch. 1: h = (a + b·W)·t + …
PER_LOAD = {"IP": 1000.0, "SI": 1.0}
PER_MOISTURE = {"IP": 1.0, "SI": 3600.0}


def warming(one, air, difference):
    """Return the enthalpy of a warming at constant moisture, by the handbook's coefficients."""
    dry, vapour = CP[one.system]
    return (dry + vapour * air.w) * difference


def heat(one, load):
    return load * PER_LOAD[one.system]


def taken_in(at):
    """Return the outdoor air as it is mixed; where none is taken in, any air does."""
    return at.intake if at.outdoor_mass else at.outdoor


def streams(supply, *rest):
    """Return energy and moisture that are left of streams (mass, air), those that leave below 0."""
    parts = [supply, *rest]
    yield sum(mass * air.h for mass, air in parts), "energy"
    yield sum(mass * air.w for mass, air in parts), "moisture"


# Cooling


def over_mixing(one):
    at = one.at
    supply, out = at.supply_mass, at.outdoor_mass
    yield from streams((-supply, at.mixed), (out, taken_in(at)), (supply - out, at.return_air))


def over_splitting(one):
    """Mixed air, and a blow-through fan's heat, against what goes to the coil and around it."""
    at = one.at
    blown = heat(one, at.fan_heat) if one.blows_through else 0.0
    (energy, _), moisture = streams(
        (at.supply_mass, at.mixed), (-at.coil_mass, at.to_coil), (-at.bypass_mass, at.bypassed)
    )
    yield energy + blown, "energy"
    yield moisture


def over_precool(one):
    at = one.at
    if "precool_lat_db" not in one.unit:
        return
    taken = heat(one, at.precool.total)
    yield at.coil_mass * (at.to_coil.h - at.precooled.h) - taken, "energy"
    water = at.precool.condensate / PER_MOISTURE[one.system]
    yield at.coil_mass * (at.to_coil.w - at.precooled.w) - water, "moisture"


def over_coil(one):
    at = one.at
    entering, leaving = at.coil_entering, at.coil_leaving
    yield at.coil_mass * (entering.h - leaving.h) - heat(one, at.coil.total), "energy"
    yield heat(one, at.coil.total - at.coil.sensible - at.coil.latent), "energy"
    water = at.coil.condensate / PER_MOISTURE[one.system]
    yield at.coil_mass * (entering.w - leaving.w) - water, "moisture"


def over_rejoining(one):
    at = one.at
    wrap = one.unit.get("wrap_drop", 0.0)
    (energy, _), moisture = streams(
        (-at.supply_mass, at.rejoined),
        (at.coil_mass, at.coil_leaving),
        (at.bypass_mass, at.bypassed),
    )
    yield energy + at.coil_mass * warming(one, at.coil_leaving, wrap), "energy"
    yield moisture


def over_fan(one):
    at = one.at
    gain = warming(one, at.fan_inlet, at.fan_rise)
    yield at.supply_mass * gain - heat(one, at.fan_heat), "energy"


def over_reheat_and_duct(one):
    at = one.at
    rise = 0.0 if one.blows_through else at.fan_rise
    gain = at.supply_mass * warming(one, at.rejoined, rise + one.unit.get("duct_rise", 0.0))
    if "reheat_lat_db" in one.unit:
        gain += heat(one, at.reheat_load)
    yield at.supply_mass * (at.supply.h - at.rejoined.h) - gain, "energy"
    yield at.supply_mass * (at.supply.w - at.rejoined.w), "moisture"


def over_room(one):
    at = one.at
    met = heat(one, at.room_met.sensible + at.room_met.latent)
    yield at.supply_mass * (at.room.h - at.supply.h) - met, "energy"
    water = at.room_met.moisture / PER_MOISTURE[one.system]
    yield at.supply_mass * (at.room.w - at.supply.w) - water, "moisture"


def over_all(one):
    """From the intake to the room, everything that adds or takes heat or water in between."""
    at, unit = one.at, one.unit
    supply, out = at.supply_mass, at.outdoor_mass
    (energy, _), (moisture, _) = streams(
        (-supply, at.room), (out, taken_in(at)), (supply - out, at.return_air)
    )
    energy += heat(one, at.fan_heat - at.coil.total)
    energy += heat(one, at.room_met.sensible + at.room_met.latent)
    energy += supply * warming(one, at.supply, unit.get("duct_rise", 0.0))
    moisture += (at.room_met.moisture - at.coil.condensate) / PER_MOISTURE[one.system]
    if "reheat_lat_db" in unit:
        energy += heat(one, at.reheat_load)
    if "precool_lat_db" in unit:
        energy -= heat(one, at.precool.total)
        moisture -= at.precool.condensate / PER_MOISTURE[one.system]
    if wrap := unit.get("wrap_drop"):
        # Equal degrees on either side, and the air is moister on the first.
        before, after = warming(one, at.coil_entering, wrap), warming(one, at.coil_leaving, wrap)
        energy += at.coil_mass * (after - before)
    yield energy, "energy"
    yield moisture, "moisture"


COOLING = {
    "mixing": (over_mixing, 1600),
    "splitting": (over_splitting, 1600),
    "precool": (over_precool, 200),
    "coil": (over_coil, 2400),
    "rejoining": (over_rejoining, 1600),
    "fan": (over_fan, 800),
    "reheat and duct": (over_reheat_and_duct, 1600),
    "room": (over_room, 1600),
    "whole path": (over_all, 1600),
}


@pytest.mark.parametrize("over", COOLING)
def test_of_cooling(cooled, over):
    balance, least = COOLING[over]
    closed = 0
    for one in cooled:
        at = one.at
        whole = {"energy": abs(at.mixed.h), "moisture": at.mixed.w}
        for rest, what in balance(one):
            assert abs(rest) <= 1e-9 * at.supply_mass * whole[what], (one.unit, what)
            closed += 1
    assert closed >= least


# Heating


def over_winter_mixing(one):
    at = one.at
    supply, out = at.supply_mass, at.outdoor_mass
    yield from streams((-supply, at.mixed), (out, taken_in(at)), (supply - out, at.room))


def over_preheat(one):
    at = one.at
    if "preheat_lat_db" not in one.unit:
        return
    outdoor = one.unit.get("preheat_at") == "outdoor"
    mass = at.outdoor_mass if outdoor else at.supply_mass
    given = heat(one, at.preheat_load)
    yield mass * (at.preheat_leaving.h - at.preheat_entering.h) - given, "energy"
    yield mass * (at.preheat_leaving.w - at.preheat_entering.w), "moisture"


def over_heating_coil(one):
    at = one.at
    gain = at.heat_leaving.h - at.heat_entering.h
    yield at.supply_mass * gain - heat(one, at.heat_load), "energy"
    yield at.supply_mass * (at.heat_leaving.w - at.heat_entering.w), "moisture"


def over_winter_room(one):
    at = one.at
    if "heat_lat_db" not in one.unit:
        return
    gain = warming(one, at.heat_leaving, at.heat_leaving.db - at.room.db)
    yield at.supply_mass * gain - heat(one, at.room_heat_met), "energy"


def over_humidifier(one):
    at = one.at
    if "room_heat_rh" not in one.unit or at.room.w < at.intake.w:
        return
    water = at.humidifier_load / PER_MOISTURE[one.system]
    yield at.outdoor_mass * (at.room.w - at.intake.w) - water, "moisture"


def over_winter(one):
    """From the intake to the air that leaves the heating coil."""
    at = one.at
    supply, out = at.supply_mass, at.outdoor_mass
    (energy, _), (moisture, _) = streams(
        (-supply, at.heat_leaving), (out, taken_in(at)), (supply - out, at.room)
    )
    energy += heat(one, at.heat_load)
    if one.blows_through:
        energy += heat(one, at.fan_heat)
    if "preheat_lat_db" in one.unit and one.unit.get("preheat_at") != "outdoor":
        energy += heat(one, at.preheat_load)
    yield energy, "energy"
    yield moisture, "moisture"


HEATING = {
    "mixing": (over_winter_mixing, 900),
    "preheat": (over_preheat, 300),
    "heating coil": (over_heating_coil, 900),
    "room": (over_winter_room, 300),
    "humidifier": (over_humidifier, 200),
    "whole path": (over_winter, 900),
}


@pytest.mark.parametrize("over", HEATING)
def test_of_heating(heated, over):
    balance, least = HEATING[over]
    closed = 0
    for one in heated:
        at = one.at
        whole = {"energy": max(abs(at.heat_leaving.h), abs(at.mixed.h)), "moisture": at.room.w}
        for rest, what in balance(one):
            assert abs(rest) <= 1e-9 * at.supply_mass * whole[what], (one.unit, what)
            closed += 1
    assert closed >= least
