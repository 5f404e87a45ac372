"""More return air is scheduled around the coil than returns.

With return air around the coil, all of the outdoor air goes through it; around can go only what
is left. The bypass is then held at that.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.units import PERCENT

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling

_LAST_BIT = 1e-9


def find(at: Cooling) -> Faults:
    """Hold the stated bypass of return air against the share that returns."""
    if not at.stated_bypass or at.unit.bypass_source != "return":
        return
    stated, returns = at.stated_bypass, 1 - at.outdoor_fraction
    if stated > returns + _LAST_BIT:
        yield Fault(
            "{scheduled} of return air around the coil, only {required} of the supply returns",
            ("bypass", "cool_airflow", "bypass_source"),
            stated * 100,
            returns * 100,
            PERCENT,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="No more return air goes around the coil than returns.",
    source="conservation of mass",
    cooling=find,
)
