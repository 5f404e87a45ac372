"""A number that looks as if typed in another unit.

A load in kW in a column of MBH, an airflow in L/s in one of cfm, a temperature in °C, a percentage
as a fraction: the number is held against the row's own, and where it is off by a factor that such
a slip makes, all that fit are named with the number it would be.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.coil import LOAD_PER_TON
from schedtui.air.fan import shaft_power
from schedtui.review.check import SLIP, Check, Faults
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Measure, Severity
from schedtui.review.fluid_side import COOLING, SIDES
from schedtui.review.slips import slips
from schedtui.schedule.catalogue.field import Field
from schedtui.schedule.catalogue.plant import Plant
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import (
    AIR_PRESSURE,
    AIRFLOW,
    LOAD,
    PERCENT,
    SHAFT_POWER,
    TEMPERATURE,
    WATER_FLOW,
    Quantity,
    System,
)

if TYPE_CHECKING:
    from collections.abc import Container

    from schedtui.review.case import ConditionCase, UnitCase
    from schedtui.review.plants import PlantCase
    from schedtui.schedule.catalogue.table import Table

Number = Field[float | None]

_BOTH = 2  # loads, total and sensible, that together tell an airflow's slip
_SAME = 0.12  # share that the ratios of two loads may part by and still be one

# Temperatures that such a field has in cooling [°F | °C]; outside, the other scale is tried.
_USUAL: dict[System, tuple[tuple[Number, float, float], ...]] = {
    "IP": (
        (Unit.room_db, 55.0, 95.0),
        (Unit.cool_eat_db, 40.0, 130.0),
        (Unit.cool_eat_wb, 35.0, 95.0),
        (Unit.cool_lat_db, 35.0, 75.0),
        (Unit.cool_lat_wb, 33.0, 75.0),
    ),
    "SI": (
        (Unit.room_db, 13.0, 35.0),
        (Unit.cool_eat_db, 4.5, 54.0),
        (Unit.cool_eat_wb, 2.0, 35.0),
        (Unit.cool_lat_db, 2.0, 24.0),
        (Unit.cool_lat_wb, 1.0, 24.0),
    ),
}


def find(case: UnitCase) -> Faults:
    """Look at percentages, temperatures, loads, the supply airflow, water and fan."""
    fractions = list(_fractions(case.unit))
    suspects = [*_temperatures(case), *_loads_and_airflow(case), *_heating(case)]
    yield from (*fractions, *suspects)
    # Whatever follows from a number that is suspect already is not to be accused for it.
    blamed = {fault.fields[0] for fault in (*fractions, *suspects)}
    yield from _water(case, blamed)
    yield from _fan(case, blamed)


def find_in_condition(case: ConditionCase) -> Faults:
    """Look at the percentages of a condition."""
    return _fractions(case.condition)


def find_in_plant(case: PlantCase) -> Faults:
    """Look at the percentages of a plant; hold capacity and flow against what its units need."""
    yield from _fractions(case.plant)
    for field, quantity, own in (
        (Plant.capacity, LOAD, known(lambda: case.load)),
        (Plant.flow, WATER_FLOW, known(lambda: case.flow)),
    ):
        typed = case.plant.value_of(field)
        # Only too little looks like a slip: a plant may serve more than this schedule.
        if typed and own and typed < own:
            yield from _if_any(
                _suspect(field, typed, typed / own, quantity, case.site.system, "its units'")
            )


def _fractions(row: Table) -> Faults:
    for key, field in row.catalogue.items():
        cell = row.typed(key) if field.quantity is PERCENT else None
        if cell is None or not isinstance(cell.value, float):
            continue
        if 0 < cell.value < 1:
            yield Fault(
                "{label} {scheduled} is a fraction; {percent} was meant, if so",
                (key,),
                cell.value,
                quantity=PERCENT,
                values={
                    "label": field.label.lower(),
                    "percent": Measure(cell.value * 100, PERCENT),
                },
                severity=Severity.CAUTION,
            )


def _temperatures(case: UnitCase) -> Faults:
    system = case.site.system
    for field, low, high in _USUAL[system]:
        typed = case.unit.value_of(field)
        if typed is None or low <= typed <= high:
            continue
        converted = typed * 1.8 + 32 if system == "IP" else (typed - 32) / 1.8
        if low <= converted <= high:
            yield Fault(
                "{label} {scheduled} looks typed in {other}: that is {required}",
                (field.key,),
                typed,
                converted,
                TEMPERATURE,
                {"label": field.label.lower(), "other": "°C" if system == "IP" else "°F"},
            )


def _loads_and_airflow(case: UnitCase) -> Faults:
    """Hold the loads against the row's own, and the airflow against what both loads need."""
    unit, row = case.unit, case.row
    ratios = {
        field: scheduled / own
        for field, own in (
            (Unit.cool_total, known(lambda: row.required_total)),
            (Unit.cool_sensible, known(lambda: row.required_sensible)),
        )
        if (scheduled := unit.value_of(field)) and own and own > 0
    }
    total, sensible = ratios.get(Unit.cool_total), ratios.get(Unit.cool_sensible)
    if total and sensible and abs(total / sensible - 1) <= _SAME and not _loads_stand_alone(case):
        # Both loads off by one factor: the airflow that makes both is the likelier slip.
        airflow = unit.need(Unit.supply_airflow)
        fault = _suspect(Unit.supply_airflow, airflow, 1 / total, AIRFLOW, case.site.system)
        if fault is not None:
            yield fault
            return
    if len(ratios) < _BOTH:
        need = _room_need(case)
        agrees = need is not None and all(
            abs(ratio * need - 1) <= _SAME for ratio in ratios.values()
        )
        if need is not None and agrees:
            airflow = unit.need(Unit.supply_airflow)
            fault = _suspect(Unit.supply_airflow, airflow, need, AIRFLOW, case.site.system)
            if fault is not None:
                yield fault
                return
    for field, ratio in ratios.items():
        fault = _suspect(field, unit.need(field), ratio, LOAD, case.site.system)
        if fault is not None:
            yield fault


def _room_need(case: UnitCase) -> float | None:
    """Return the supply air over what the room's sensible load needs, where it is less."""
    load = case.unit.room_sensible
    met = known(lambda: case.governing.room_met.sensible)
    return met / load if load and met and 0 < met < load else None


def _loads_stand_alone(case: UnitCase) -> bool:
    """Tell whether more of the row agrees with its airflow than with its loads."""
    unit, supply = case.unit, case.unit.supply_airflow or 0.0
    returned, outdoor = unit.return_airflow, unit.outdoor_airflow or 0.0
    total, tons = unit.cool_total or 0.0, unit.cool_tons
    carried = known(COOLING.carried, unit, case.site.system)
    stated, own = unit.cool_face_velocity, known(lambda: case.face_velocity)
    with_airflow = (
        returned is not None and _agree(returned + outdoor, supply),
        stated is not None and own is not None and _agree(stated, own),
    )
    with_loads = (
        tons is not None and _agree(tons * LOAD_PER_TON[case.site.system], total),
        carried is not None and COOLING.runs(unit) and _agree(carried, total),
    )
    return sum(with_airflow) > sum(with_loads)


def _agree(one: float, other: float) -> bool:
    return abs(one - other) <= _SAME * other


def _heating(case: UnitCase) -> Faults:
    """Hold the heating against the row's own, else against what the coil needs."""
    total = case.unit.heat_total
    own = known(lambda: case.row_heat.heat_load) or known(lambda: case.heat_governing.heat_load)
    preheat, warmed = case.unit.preheat_total, known(lambda: case.row_heat.preheat_load)
    if preheat and warmed and warmed > 0:
        ratio = preheat / warmed
        yield from _if_any(_suspect(Unit.preheat_total, preheat, ratio, LOAD, case.site.system))
    if total and own and own > 0:
        yield from _if_any(_suspect(Unit.heat_total, total, total / own, LOAD, case.site.system))


def _water(case: UnitCase, blamed: Container[str]) -> Faults:
    """Hold each flow against what the scheduled load asks for, unless the load is suspect."""
    unit = case.unit
    for side in SIDES:
        if not side.runs(unit) or not side.stated(unit) or side.total.key in blamed:
            continue
        total, flow = unit.value_of(side.total), unit.value_of(side.flow)
        carried = known(side.carried, unit, case.site.system)
        if total and flow and carried:
            yield from _if_any(
                _suspect(side.flow, flow, carried / total, WATER_FLOW, case.site.system)
            )


def _fan(case: UnitCase, blamed: Container[str]) -> Faults:
    """Hold the shaft power against airflow, pressure and efficiency; else the pressure."""
    unit, system = case.unit, case.site.system
    power, pressure, efficiency = unit.fan_power, unit.fan_total_pressure, unit.fan_efficiency
    airflow = known(lambda: case.fan_airflow)
    if "fan_efficiency" in blamed or "supply_airflow" in blamed:
        return
    if not power or not pressure or not efficiency or not airflow:
        return
    own = shaft_power(airflow / unit.fan_count, pressure, efficiency, system)
    by_pressure = _suspect(Unit.fan_total_pressure, pressure, own / power, AIR_PRESSURE, system)
    by_power = _suspect(Unit.fan_power, power, power / own, SHAFT_POWER, system)
    yield from _if_any(by_pressure or by_power)


def _if_any(fault: Fault | None) -> Faults:
    return () if fault is None else (fault,)


def _suspect(
    field: Number,
    typed: float,
    ratio: float,
    quantity: Quantity,
    system: System,
    whose: str = "the row's own",
) -> Fault | None:
    """Return the fault of a number that stands to the expected one as a slip makes it."""
    fitting = list(slips(quantity, system, ratio))
    if not fitting:
        return None
    guesses = " or ".join(
        f"{slip.what} ({Measure(typed / slip.factor, quantity).text(system)} then)"
        for slip in fitting
    )
    return Fault(
        "{label} {scheduled}, {whose} numbers make it {required}: looks {guesses}",
        (field.key,),
        typed,
        typed / ratio,
        quantity,
        {"label": field.label.lower(), "whose": whose, "guesses": guesses},
    )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="No number looks as if typed in another unit.",
    source="common practice",
    rank=SLIP,
    reads_digits=False,
    unit=find,
    condition=find_in_condition,
    plant=find_in_plant,
)
