"""The airflow is far from what the scheduled tons usually go with.

Offices stand at 350 to 425 cfm a ton, all-outdoor-air units at 80 to 200, computer rooms at 450 to
600. Far outside, airflow or capacity is from another unit or in another unit of measure.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.coil import LOAD_PER_TON
from schedtui.air.flow import volume_flow
from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.part_load import PartLoad
from schedtui.units import AIRFLOW_PER_LOAD

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling

_OUTDOOR = 0.6  # of the lower bound, taken off it for all outdoor air
_DRY_SHR, _DRY = 0.9, 1.4  # above this sensible heat ratio, the upper bound is so much wider


def find(at: Cooling) -> Faults:
    """Hold the standard airflow of the coil per scheduled ton against the range."""
    unit, limits = at.unit, at.site.limits
    if unit.cool_total is None or at.coil_mode != "wet":
        return
    if at.has_precool and unit.precool_total is None:
        return  # the first coil's part of the capacity is not known
    # At part load the unit supplies less air than the sheet's, which is what the tons go with.
    design = at.design if isinstance(at, PartLoad) else at
    standard = volume_flow(design.coil_mass, "standard", at.site.air)
    per = LOAD_PER_TON["IP"] if at.site.system == "IP" else 1.0
    if unit.cool_total == 0:
        return
    ratio = standard / (unit.cool_total + (unit.precool_total or 0.0)) * per
    low = limits.airflow_per_ton_low * (1 - _OUTDOOR * at.outdoor_fraction)
    high = limits.airflow_per_ton_high * (_DRY if at.shr > _DRY_SHR else 1.0)
    for bound, beyond in ((low, ratio < low), (high, ratio > high)):
        if beyond:
            yield Fault(
                "{scheduled} of standard air, customary is {required} here",
                ("supply_airflow", "cool_total"),
                ratio,
                bound,
                AIRFLOW_PER_LOAD,
            )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The airflow goes with the scheduled tons.",
    source="common practice",
    governing=find,
)
