"""The fan's shaft power is not its airflow times pressure over efficiency.

Mostly it was taken from the external pressure, or from another unit.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.fan import shaft_power
from schedtui.air.flow import volume_flow
from schedtui.review.check import Check, Faults
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import SHAFT_POWER

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold the shaft power of supply and return fan against pressure and efficiency."""
    yield from _supply_fan(case)
    yield from _return_fan(case)


def _supply_fan(case: UnitCase) -> Faults:
    unit = case.unit
    if not unit.stated("fan_power", "fan_total_pressure", "fan_efficiency", "supply_airflow"):
        return
    stated = unit.need(Unit.fan_power)
    own = shaft_power(
        case.fan_airflow / unit.fan_count,
        unit.need(Unit.fan_total_pressure),
        unit.need(Unit.fan_efficiency),
        case.site.system,
    )
    yield from _held(case, stated, own, ("fan_power", "fan_total_pressure", "fan_efficiency"))


def _return_fan(case: UnitCase) -> Faults:
    unit = case.unit
    keys = ("return_fan_power", "return_fan_total_pressure", "return_fan_efficiency")
    if not unit.stated(*keys, "return_airflow"):
        return
    airflow = unit.need(Unit.return_airflow)
    at = known(lambda: case.governing)
    if at is not None and at.basis != "actual":
        mass = at.mass_of(airflow, None)
        airflow = volume_flow(mass, "actual", case.site.air, at.return_air.v)
    own = shaft_power(
        airflow,
        unit.need(Unit.return_fan_total_pressure),
        unit.need(Unit.return_fan_efficiency),
        case.site.system,
    )
    yield from _held(case, unit.need(Unit.return_fan_power), own, keys)


def _held(case: UnitCase, stated: float, own: float, keys: tuple[str, ...]) -> Faults:
    if abs(stated - own) > own * case.site.limits.power_balance / 100:
        yield Fault(
            "shaft power {scheduled}, airflow, pressure and efficiency give {required}",
            keys,
            stated,
            own,
            SHAFT_POWER,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="A fan's shaft power is its airflow times pressure over efficiency.",
    source="AMCA 210: quantities at the fan's inlet; Q p / (6 356 η)",
    judges=("fan_power", "return_fan_power"),
    unit=find,
)
