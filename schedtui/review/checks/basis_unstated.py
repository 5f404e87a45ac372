"""The site lies high and the file does not say what its airflows mean.

Between standard and actual air the answer moves by the density ratio: 17 % at 5 000 ft.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.psychro import station_pressure
from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Measure, Severity
from schedtui.units import PERCENT, System

if TYPE_CHECKING:
    from schedtui.review.case import ScheduleCase

# From here upwards a site is high [ft | m].
_HIGH: dict[System, float] = {"IP": 1000.0, "SI": 300.0}


def find(case: ScheduleCase) -> Faults:
    """Look for a low pressure and no stated basis."""
    project, system, air = case.schedule.project, case.site.system, case.site.air
    if project.stated("airflow_basis"):
        return
    if air.pressure >= station_pressure(_HIGH[system], system):
        return
    if all(unit.stated("airflow_basis") for unit in case.schedule.units):
        return
    yield Fault(
        "the air here is {thin} thinner than at sea level and airflow_basis is not stated: "
        "standard air is taken",
        ("airflow_basis",),
        values={"thin": Measure((1 - air.density_ratio) * 100, PERCENT)},
        about=("project", project.row_id),
    )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="A schedule for a high site says what its airflows mean.",
    source="common practice",
    schedule=find,
)
