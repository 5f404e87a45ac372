"""The motor is smaller than the fan's shaft power.

It overloads and trips, or burns.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.shaft import shaft_of
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import MOTOR_POWER

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase

_PAIRS = (
    (Unit.motor_power, Unit.fan_power, "motor"),
    (Unit.return_fan_motor_power, Unit.return_fan_power, "return fan motor"),
)


def find(case: UnitCase) -> Faults:
    """Hold each motor against the shaft power of its fan."""
    for motor, fan, what in _PAIRS:
        shaft = shaft_of(case, fan)
        if shaft is None or not case.unit.stated(motor.key):
            continue
        power = case.unit.need(motor)
        if power < shaft:
            yield Fault(
                "{what} {scheduled}, the fan's shaft takes {required}",
                (motor.key, fan.key),
                power,
                shaft,
                MOTOR_POWER,
                {"what": what},
            )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="No motor is smaller than the shaft power of its fan.",
    source="NEMA MG 1",
    judges=("motor_power", "return_fan_motor_power"),
    unit=find,
)
