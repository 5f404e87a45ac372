"""More outdoor air is scheduled than the unit supplies.

What comes in must go through the fan. Usually the columns are swapped, or one airflow is from an
older drawing. The outdoor share is then held at all of the supply.
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
    """Hold outdoor air against supply air, as typed."""
    if not case.unit.stated("outdoor_airflow", "supply_airflow"):
        return
    outdoor, supply = case.unit.need(Unit.outdoor_airflow), case.unit.need(Unit.supply_airflow)
    if outdoor > supply:
        yield Fault(
            "outdoor air {scheduled} is above the supply air {required}",
            ("outdoor_airflow", "supply_airflow"),
            outdoor,
            supply,
            AIRFLOW,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Outdoor air is not above supply air.",
    rank=CONTRADICTION,
    source="conservation of mass",
    judges=("outdoor_airflow",),
    unit=find,
)
