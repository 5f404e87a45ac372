"""The energy recovery is held back, since its exhaust would freeze.

On the coldest days it then recovers less than it is rated for; the heating coil must carry the
rest, and is computed so here.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.units import PERCENT

if TYPE_CHECKING:
    from schedtui.review.heating import Heating

_WHOLE = 1.0


def find(at: Heating) -> Faults:
    """Look how much of its effectiveness the recovery may work with."""
    if not any(map(at.unit.stated, ("recovery_sensible", "recovery_heat_sensible"))):
        return
    if at.outdoor_mass == 0:
        return
    share = at.recovery_share
    if 0 < share < _WHOLE:
        rated = at.effectiveness.sensible
        yield Fault(
            "the recovery works with {scheduled} of its {required}, or its exhaust would freeze",
            ("recovery_sensible", "recovery_exhaust_min"),
            rated * share,
            rated,
            PERCENT,
        )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The energy recovery works with all of its effectiveness in heating.",
    source="ASHRAE Handbook—HVAC Systems and Equipment, air-to-air energy recovery, frost control",
    reads_digits=False,
    heating=find,
)
