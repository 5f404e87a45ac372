"""The unit takes in less outdoor air than its rooms require.

Ventilation is a matter of health and of code; a variable-volume unit must deliver it at its least
airflow too.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import AIRFLOW

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold outdoor air, and the least supply air, against what is required."""
    unit = case.unit
    if not unit.stated("outdoor_required"):
        return
    required = unit.need(Unit.outdoor_required)
    unit.refuse_bad(Unit.outdoor_airflow, Unit.supply_airflow_min)
    for field, what in (
        (Unit.outdoor_airflow, "outdoor air"),
        (Unit.supply_airflow_min, "least supply air"),
    ):
        airflow = unit.value_of(field)
        if airflow is not None and airflow < required:
            yield Fault(
                "{what} {scheduled}, the rooms require {required} of outdoor air",
                (field.key, "outdoor_required"),
                airflow,
                required,
                AIRFLOW,
                {"what": what},
            )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="Outdoor air, and least supply air, are not below what the rooms require.",
    source="ASHRAE Standard 62.1, as the project applies it",
    judges=("outdoor_airflow", "supply_airflow_min"),
    unit=find,
)
