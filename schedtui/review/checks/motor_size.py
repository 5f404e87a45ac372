"""The motor is no standard size.

Motors come in the horsepowers of NEMA or the kilowatts of IEC; another number is often the shaft
power in the motor's column. Electronically commutated motors come in any size.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import MOTOR_POWER, System

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase

# Standard sizes from which on sizes are standard (10 CFR 431.446 and NEMA MG 1; IEC 60072).
_SIZES: dict[System, tuple[float, ...]] = {
    "IP": (0.5, 0.75, 1, 1.5, 2, 3, 5, 7.5, 10, 15, 20, 25, 30, 40, 50, 60, 75, 100, 125, 150, 200,
           250, 300, 350, 400, 450, 500),
    "SI": (0.37, 0.55, 0.75, 1.1, 1.5, 2.2, 3, 4, 5.5, 7.5, 11, 15, 18.5, 22, 30, 37, 45, 55, 75,
           90, 110, 132, 160, 200, 250, 315, 355, 400),
}  # fmt: skip
_SAME = 0.01  # share that a printed size may be off


def find(case: UnitCase) -> Faults:
    """Look for each motor among the sizes."""
    unit, sizes = case.unit, _SIZES[case.site.system]
    for field in (Unit.motor_power, Unit.return_fan_motor_power):
        power = unit.value_of(field)
        if power is None or power < sizes[0] * (1 - _SAME):
            continue
        if field is Unit.motor_power and unit.motor_kind == "ec":
            continue
        nearest = min((abs(size - power), size) for size in sizes)[1]
        if abs(power - nearest) > nearest * _SAME:
            yield Fault(
                "motor {scheduled} is no standard size; the nearest is {required}",
                (field.key,),
                power,
                nearest,
                MOTOR_POWER,
            )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="Every motor is of a standard size.",
    source="10 CFR 431.446, NEMA MG 1; IEC 60072",
    unit=find,
)
