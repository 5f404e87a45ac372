"""A number that looks as if typed in another unit.

A load in kW in a column of MBH, an airflow in L/s in one of cfm, a temperature in °C, a percentage
as a fraction: the number is held against the row's own, and where it is off by a factor that such
a slip makes, all that fit are named with the number it would be.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Measure, Severity
from schedtui.review.slips import slips
from schedtui.schedule.catalogue.field import Field
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import AIRFLOW, LOAD, PERCENT, TEMPERATURE, Quantity, System

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase

Number = Field[float | None]

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
    """Look at percentages, temperatures, loads and the supply airflow."""
    yield from _fractions(case)
    yield from _temperatures(case)
    yield from _loads_and_airflow(case)


def _fractions(case: UnitCase) -> Faults:
    for key, field in Unit.catalogue.items():
        cell = case.unit.typed(key)
        if field.quantity is not PERCENT or cell is None or not isinstance(cell.value, float):
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
    if total and sensible and abs(total / sensible - 1) <= _SAME:
        # Both loads off by one factor: the airflow that makes both is the likelier slip.
        airflow = unit.need(Unit.supply_airflow)
        fault = _suspect(Unit.supply_airflow, airflow, 1 / total, AIRFLOW, case.site.system)
        if fault is not None:
            yield fault
            return
    for field, ratio in ratios.items():
        fault = _suspect(field, unit.need(field), ratio, LOAD, case.site.system)
        if fault is not None:
            yield fault


def _suspect(
    field: Number, typed: float, ratio: float, quantity: Quantity, system: System
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
        "{label} {scheduled}, the row's own numbers make it {required}: looks {guesses}",
        (field.key,),
        typed,
        typed / ratio,
        quantity,
        {"label": field.label.lower(), "guesses": guesses},
    )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="No number looks as if typed in another unit.",
    source="common practice",
    explains=True,
    reads_digits=False,
    unit=find,
)
