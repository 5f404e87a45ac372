"""The motor has little to spare over the fan's shaft power.

Filters load, belts slip, airflows are set up: a tenth is customary.
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
    (Unit.motor_power, Unit.fan_power),
    (Unit.return_fan_motor_power, Unit.return_fan_power),
)


def find(case: UnitCase) -> Faults:
    """Hold each motor against the shaft power of its fan with the headroom."""
    share = 1 + case.site.limits.motor_headroom / 100
    for motor, fan in _PAIRS:
        power, shaft = case.unit.value_of(motor), shaft_of(case, fan)
        if power is not None and shaft is not None and shaft <= power < shaft * share:
            yield Fault(
                "motor {scheduled}, with customary headroom the fan asks for {required}",
                (motor.key, fan.key),
                power,
                shaft * share,
                MOTOR_POWER,
            )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="Every motor has headroom over the shaft power of its fan.",
    source="common practice",
    unit=find,
)
