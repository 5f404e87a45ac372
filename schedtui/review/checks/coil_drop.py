"""The air pressure drop of the cooling coil is high.

Above 0.75 in. wg at 500 fpm the coil is very deep or very close-finned, or the drop is another
part's. Faster air may drop more.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import AIR_PRESSURE, System

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase

# The customary most [in. wg | Pa], and the velocity it holds at [fpm | m/s].
_MOST: dict[System, tuple[float, float]] = {"IP": (0.75, 500.0), "SI": (187.0, 2.54)}


def find(case: UnitCase) -> Faults:
    """Hold the drop against the customary most, more for faster air by the velocity squared."""
    unit = case.unit
    drop = unit.cool_air_drop
    if drop is None:
        return
    most, at_velocity = _MOST[case.site.system]
    velocity = unit.value_of(Unit.cool_face_velocity) or known(lambda: case.face_velocity)
    if velocity:
        most *= max(velocity / at_velocity, 1.0) ** 2  # a drop costs no less in slow air
    if drop > most:
        yield Fault(
            "air drop {scheduled} of the cooling coil, customary is at most {required}",
            ("cool_air_drop",),
            drop,
            most,
            AIR_PRESSURE,
        )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The cooling coil's air pressure drop is a usual one.",
    source="common practice",
    unit=find,
)
