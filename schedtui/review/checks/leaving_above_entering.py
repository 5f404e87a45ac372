"""Air is scheduled to leave a cooling coil warmer than it enters.

Mostly entering and leaving columns are swapped, or one of the rows is a heating coil's.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import CONTRADICTION, Check, Faults
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import TEMPERATURE

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold leaving bulbs against entering ones, scheduled or else computed where it was rated."""
    unit = case.unit
    found = False
    for leaving, entering in (
        (Unit.cool_lat_db, Unit.cool_eat_db),
        (Unit.cool_lat_wb, Unit.cool_eat_wb),
    ):
        lat, eat = unit.value_of(leaving), unit.value_of(entering)
        if lat is not None and eat is not None and lat > eat:
            found = True
            yield Fault(
                "{what} {scheduled} is above {other} {required}",
                (leaving.key, entering.key),
                lat,
                eat,
                TEMPERATURE,
                {"what": leaving.label.lower(), "other": entering.label.lower()},
            )
    rated = known(lambda: case.rated)
    if found or rated is None or unit.cool_lat_db is None or unit.cool_lat_at == "unit":
        return
    entering_db = known(lambda: rated.coil_entering.db)
    if entering_db is not None and unit.cool_lat_db > entering_db:
        yield Fault(
            "leaving air {scheduled} is above the {required} that enters the coil",
            ("cool_lat_db",),
            unit.cool_lat_db,
            entering_db,
            TEMPERATURE,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Air leaves a cooling coil no warmer than it enters.",
    source="by definition: a cooling coil cools",
    rank=CONTRADICTION,
    unit=find,
)
