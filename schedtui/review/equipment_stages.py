"""The working of what a row states beside its air: water, steam, power, fuel, fans, face velocity.

Each is a unit's, not a condition's: fans and face at the condition that governs. What stands in the
row is set beside what its own numbers give. Formats nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air import fan
from schedtui.air.flow import gross_load
from schedtui.air.fluid import by_volume, fluid_heat
from schedtui.air.steam import electric_heat, fuel_heat, steam_heat
from schedtui.air.step import DEFINITION, Step, Steps
from schedtui.errors import Absent, StateError
from schedtui.review.face import velocity
from schedtui.review.fluid_side import COOLING, HEATING, PREHEAT, FluidSide
from schedtui.review.letters import Letters
from schedtui.review.stages import Outcome, Stage, lack, outcome
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import AIRFLOW, AREA, LOAD, SHAFT_POWER, VELOCITY

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator

    from schedtui.air.state import State
    from schedtui.review.case import UnitCase
    from schedtui.schedule.catalogue.field import Field

_WATERS = {COOLING.what: "c", HEATING.what: "h", PREHEAT.what: "p"}
_FROM_CORRELATIONS = {
    "K": "Density and specific heat at the mean temperature are those of the source.",
    "h_fg": "The enthalpies of steam and water at that pressure are those of the source.",
}

_Found = tuple[float, float | None]
"""What the row's own numbers give, and what it states of that."""


def equipment(case: UnitCase) -> tuple[tuple[Stage, ...], tuple[Outcome, ...]]:
    """Return the stages of a unit's equipment, and what it states beside what they give.

    Args:
        case: the unit with its evaluations.
    """
    stages: list[Stage] = []
    outcomes: list[Outcome] = []
    for title, label, quantity, where, find in _PARTS:
        if not where(case.unit):
            continue
        steps, words = Steps(), []
        found: _Found | None = None
        try:
            found = find(case, steps)
        except Absent as absent:
            words.append(lack(absent))
        except StateError as error:
            words.append(f"Not computed: {error}.")
        words += _words(case, steps)
        given = (one for s in steps if s.symbol in _FROM_CORRELATIONS for one in s.numbers)
        stages.append(Stage(title, tuple(words), given=tuple(given), steps=tuple(steps)))
        if found is not None:
            outcomes += outcome(label, quantity, *found)
    return tuple(stages), tuple(outcomes)


def _words(case: UnitCase, steps: Steps) -> Iterator[str]:
    """Yield what is said of some steps."""
    symbols = {step.symbol for step in steps}
    yield from (text for symbol, text in _FROM_CORRELATIONS.items() if symbol in symbols)
    if "K" in symbols and case.site.system == "IP":
        yield "K stands where customarily 500 does, water's near 60 °F."
    if "Q_f" in symbols and case.unit.fan_count > 1:
        yield f"Airflow and power are those of all {case.unit.fan_count:.0f} fans together."


# Water


def _has_water(side: FluidSide) -> Callable[[Unit], bool]:
    return lambda unit: side.runs(unit) and side.stated(unit)


def _is_condenser(unit: Unit) -> bool:
    return unit.value_of(Unit.cool_kind) == "dx" and COOLING.stated(unit)


def _water(side: FluidSide) -> Callable[[UnitCase, Steps], _Found]:
    def find(case: UnitCase, steps: Steps) -> _Found:
        carried = _carried(side, case, steps)
        stated = case.unit.value_of(side.total)
        if side is COOLING and stated is not None and case.unit.cool_basis == "net":
            names = steps.named("", {"q": "tn", "gross": "tg"})
            stated = gross_load(stated, case.governing.fan_heat, names)
        return carried, stated

    return find


def _condenser(case: UnitCase, steps: Steps) -> _Found:
    return _carried(COOLING, case, steps), None


def _carried(side: FluidSide, case: UnitCase, steps: Steps) -> float:
    """Return the heat that the water carries, each coil's with its own letter [MBH | kW]."""
    unit, fluid, letter = case.unit, side.fluid_of(case.unit), _WATERS[side.what]
    if unit.glycol_by == "volume":
        by_volume(fluid.kind, unit.value_of(side.glycol) or 0.0, steps)
    names = {one: one.replace("w", f"{letter}w") for one in ("w", "w1", "w2")}
    flow, entering = unit.need(side.flow), unit.need(side.entering)
    leaving, system = unit.need(side.leaving), case.site.system
    return fluid_heat(flow, entering, leaving, fluid, system, steps.named("", names))


# Steam, power and fuel


def _steam(case: UnitCase, steps: Steps) -> _Found:
    unit, site = case.unit, case.site
    flow, gauge = unit.need(Unit.heat_steam), unit.need(Unit.heat_steam_pressure)
    heat = steam_heat(flow, gauge, site.air.pressure, site.system, steps)
    return heat, unit.value_of(Unit.heat_total)


def _electric(case: UnitCase, steps: Steps) -> _Found:
    heat = electric_heat(case.unit.need(Unit.heat_electric), case.site.system, steps)
    return heat, case.unit.value_of(Unit.heat_total)


def _fuel(case: UnitCase, steps: Steps) -> _Found:
    heat_input = case.unit.need(Unit.heat_input)
    heat = fuel_heat(heat_input, case.unit.need(Unit.heat_efficiency), steps)
    return heat, case.unit.value_of(Unit.heat_total)


# Fans and faces


def _supply_fan(case: UnitCase, steps: Steps) -> _Found:
    unit, at = case.unit, case.governing
    airflow = fan.inlet_airflow(at.fan_inlet, at.supply_mass, steps.named(*Letters.fan(at.letters)))
    own = fan.shaft_power(
        airflow, unit.need(Unit.fan_total_pressure), unit.need(Unit.fan_efficiency),
        case.site.system, steps,
    )  # fmt: skip
    stated = unit.value_of(Unit.fan_power)
    return own, None if stated is None else fan.power_of_all(stated, unit.fan_count)


def _return_fan(case: UnitCase, steps: Steps) -> _Found:
    unit, at = case.unit, case.governing
    volume = None
    if at.basis == "actual":
        volume = at.return_air.specific_volume(steps.named("ret"))
    mass = at.mass_of(unit.need(Unit.return_airflow), volume, steps.named("ra", {"a": "ret"}))
    names = steps.named("", {"s": "ra", "i": "ret", "f": "rf"})
    airflow = fan.inlet_airflow(at.return_air, mass, names)
    own = fan.shaft_power(
        airflow, unit.need(Unit.return_fan_total_pressure), unit.need(Unit.return_fan_efficiency),
        case.site.system, names,
    )  # fmt: skip
    return own, unit.need(Unit.return_fan_power)


def _cooling_face(case: UnitCase, steps: Steps) -> _Found:
    at = case.governing
    names = steps.named("", {"s": "c", "i": "l", "f": "fc"})
    found = _velocity(case, at.coil_leaving, at.coil_mass, Unit.cool_face_area, names)
    return found, case.unit.value_of(Unit.cool_face_velocity)


def _heating_face(case: UnitCase, steps: Steps) -> _Found:
    at = case.heat_governing
    names = steps.named("", {"i": "s", "f": "fh"})
    return _velocity(case, at.heat_leaving, at.supply_mass, Unit.heat_face_area, names), None


def _velocity(
    case: UnitCase, leaving: State, mass: float, face: Field[float | None], steps: Steps
) -> float:
    """Return the velocity of the actual volume that leaves a coil at its face [fpm | m/s]."""
    area, system = case.unit.need(face), case.site.system
    if area == 0:
        raise Absent(face.key, why="the face area is 0")
    airflow = fan.inlet_airflow(leaving, mass, steps, "leaving the coil")
    found = velocity(airflow, area, system)
    formula = {"IP": "V = Q_f / A", "SI": "V = Q_f / 1000 / A"}[system]
    numbers = (("Q_f", airflow, AIRFLOW), ("A", area, AREA))
    name = "velocity at the face of the coil"
    steps.append(Step("V", name, formula, numbers, found, VELOCITY, DEFINITION))
    return found


_FAN = ("fan_total_pressure", "fan_efficiency", "supply_airflow")
_RETURN_FAN = (
    "return_fan_power", "return_fan_total_pressure", "return_fan_efficiency", "return_airflow",
)  # fmt: skip
_PARTS = (
    ("Water of the cooling coil", "Cooling, by its water", LOAD,
     _has_water(COOLING), _water(COOLING)),
    ("Water of the condenser", "Condenser water carries", LOAD, _is_condenser, _condenser),
    ("Water of the heating coil", "Heating, by its water", LOAD,
     _has_water(HEATING), _water(HEATING)),
    ("Water of the preheat", "Preheat, by its water", LOAD,
     _has_water(PREHEAT), _water(PREHEAT)),
    ("Steam of the heating coil", "Heating, by its steam", LOAD,
     lambda unit: unit.value_of(Unit.heat_kind) == "steam" and unit.stated("heat_steam"), _steam),
    ("Electric heating", "Heating, by its power", LOAD,
     lambda unit: unit.value_of(Unit.heat_kind) == "electric" and unit.stated("heat_electric"),
     _electric),
    ("Fuel of the heating", "Heating, by its fuel", LOAD,
     lambda unit: unit.stated("heat_input", "heat_efficiency"), _fuel),
    ("Shaft power of the supply fan", "Supply fan shaft power", SHAFT_POWER,
     lambda unit: unit.stated(*_FAN), _supply_fan),
    ("Shaft power of the return fan", "Return fan shaft power", SHAFT_POWER,
     lambda unit: unit.stated(*_RETURN_FAN), _return_fan),
    ("Face of the cooling coil", "Face velocity, cooling", VELOCITY,
     lambda unit: unit.stated("cool_face_area"), _cooling_face),
    ("Face of the heating coil", "Face velocity, heating", VELOCITY,
     lambda unit: unit.stated("heat_face_area"), _heating_face),
)  # fmt: skip
