"""Return and outdoor air do not make up the supply air.

Below the supply, air is missing from the sheet; return above the supply goes nowhere. Between the
two, what returns and is not supplied again is relieved, and that is how economizers are scheduled.
Volumes are held against volumes as typed.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import CONTRADICTION, Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import AIRFLOW

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold return plus outdoor air, and the coil's own airflow, against the supply air."""
    unit = case.unit
    share = case.site.limits.airflow_balance / 100
    if unit.stated("cool_airflow", "supply_airflow"):
        coil, supply = unit.need(Unit.cool_airflow), unit.need(Unit.supply_airflow)
        if coil > supply * (1 + share):
            yield Fault(
                "coil airflow {scheduled} is above the supply air {required}",
                ("cool_airflow", "supply_airflow"),
                coil,
                supply,
                AIRFLOW,
            )
    if not unit.stated("return_airflow", "supply_airflow"):
        return
    returned, supply = unit.need(Unit.return_airflow), unit.need(Unit.supply_airflow)
    unit.refuse_bad(Unit.outdoor_airflow)
    together = returned + (unit.outdoor_airflow or 0.0)
    if together < supply * (1 - share):
        yield Fault(
            "return and outdoor air are {scheduled} together, the supply air is {required}",
            ("return_airflow", "outdoor_airflow", "supply_airflow"),
            together,
            supply,
            AIRFLOW,
        )
    elif returned > supply * (1 + share):
        yield Fault(
            "return air {scheduled} is above the supply air {required}",
            ("return_airflow", "supply_airflow"),
            returned,
            supply,
            AIRFLOW,
            severity=Severity.CAUTION,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Return and outdoor air make up the supply air.",
    source="conservation of mass; the limit is common practice",
    rank=CONTRADICTION,
    judges=("return_airflow",),
    unit=find,
)
