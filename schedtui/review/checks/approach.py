"""The air leaves the coil almost as cold as the water enters it.

Coils of usual depth leave the air 5 °F (3 K) or more above the entering water; nearer, the
selection is very deep or a temperature is off.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import TEMPERATURE_DIFFERENCE

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold leaving air less entering water against the least approach."""
    unit, least = case.unit, case.site.limits.approach
    if unit.cool_kind == "dx" or not unit.stated("cool_lat_db", "cool_ewt"):
        return
    if unit.cool_lat_at == "unit":
        return  # the coil's own leaving air is not stated
    between = unit.need(Unit.cool_lat_db) - unit.need(Unit.cool_ewt)
    if 0 <= between < least:
        yield Fault(
            "air leaves {scheduled} above the entering water, customary is {required} or more",
            ("cool_lat_db", "cool_ewt"),
            between,
            least,
            TEMPERATURE_DIFFERENCE,
        )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The air leaves the cooling coil well above the entering water.",
    source="common practice",
    unit=find,
)
