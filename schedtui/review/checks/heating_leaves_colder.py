"""Air is scheduled to leave a heating coil colder than it enters.

Entering and leaving columns are swapped, or one of them is a cooling coil's.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import CONTRADICTION, Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import TEMPERATURE

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold leaving dry bulbs of heating and preheat against the entering ones."""
    for leaving, entering in (
        (Unit.heat_lat_db, Unit.heat_eat_db),
        (Unit.preheat_lat_db, Unit.preheat_eat_db),
    ):
        lat, eat = case.unit.value_of(leaving), case.unit.value_of(entering)
        if lat is not None and eat is not None and lat < eat:
            yield Fault(
                "air leaves at {scheduled} and enters at {required}",
                (leaving.key, entering.key),
                lat,
                eat,
                TEMPERATURE,
            )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Air leaves a heating coil no colder than it enters.",
    source="by definition: a heating coil heats",
    rank=CONTRADICTION,
    unit=find,
)
