"""The scheduled face velocity is not the airflow over the face area.

Area, velocity or airflow is from another selection.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.face import velocity
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import VELOCITY

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase

_ALLOWED = 3.0  # [%], common practice


def find(case: UnitCase) -> Faults:
    """Hold the stated velocity against the airflow as typed, and against the actual one."""
    unit = case.unit
    if not unit.stated("cool_face_velocity", "cool_face_area", "supply_airflow"):
        return
    stated, area = unit.need(Unit.cool_face_velocity), unit.need(Unit.cool_face_area)
    if area == 0:
        return
    airflow = unit.need(Unit.supply_airflow) * (1 - case.row.bypass_share)
    as_typed = velocity(airflow, area, case.site.system)
    actual = known(lambda: case.face_velocity)
    # Sheets state the velocity of the typed airflow or of the actual one; either will do.
    if all(
        abs(stated - own) > own * _ALLOWED / 100 for own in (as_typed, actual) if own is not None
    ):
        yield Fault(
            "face velocity {scheduled}, the airflow over the face area is {required}",
            ("cool_face_velocity", "cool_face_area"),
            stated,
            as_typed,
            VELOCITY,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="The scheduled face velocity is the coil's airflow over its face area.",
    source="by definition; 3 % is common practice",
    judges=("cool_face_velocity",),
    unit=find,
)
