"""The air passes the cooling coil so fast that it carries droplets along.

Water then stands in the unit and in the duct behind it. The volume is the actual one where the
droplets leave, which is larger at altitude than the sheet's standard airflow.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import VELOCITY

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Look at the cooling coil and at the heating coil."""
    yield from _cooling(case)
    yield from _heating(case)


def _heating(case: UnitCase) -> Faults:
    """Hold the velocity from the heating coil's face area against its limit."""
    velocity, most = known(lambda: case.heat_face_velocity), case.site.limits.face_velocity_heating
    if velocity is not None and velocity > most:
        yield Fault(
            "face velocity of the heating coil {scheduled}, customary is at most {required}",
            ("heat_face_area", "heat_airflow"),
            velocity,
            most,
            VELOCITY,
        )


def _cooling(case: UnitCase) -> Faults:
    """Hold the velocity, as stated or from the face area, against the limit."""
    unit, most = case.unit, case.site.limits.face_velocity_cooling
    if known(lambda: case.governing.coil_mode) == "dry":
        return  # no moisture, nothing to carry over
    if unit.stated("cool_face_velocity"):
        velocity, key = unit.need(Unit.cool_face_velocity), "cool_face_velocity"
    elif unit.stated("cool_face_area"):
        velocity, key = case.face_velocity, "cool_face_area"
    else:
        return
    if velocity > most:
        yield Fault(
            "face velocity {scheduled}, moisture carries over above {required}",
            (key, "supply_airflow"),
            velocity,
            most,
            VELOCITY,
        )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The cooling coil's face velocity carries no moisture over, and the heating coil's is "
    "not too high.",
    source="common practice",
    unit=find,
)
