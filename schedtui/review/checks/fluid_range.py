"""A fluid outside the data of its properties, freezing included.

A share of glycol that nobody mixes, or a temperature at which the mixture freezes: no number is
given for it.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.errors import Absent, FluidError
from schedtui.review.check import IMPOSSIBLE, Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.fluid_side import SIDES

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Try the properties of each coil's fluid."""
    for side in SIDES:
        if not side.stated(case.unit):
            continue
        try:
            side.carried(case.unit, case.site.system)
        except FluidError as error:
            keys = (side.entering.key, side.leaving.key, side.glycol.key, side.fluid.key)
            yield Fault("{what}: {why}", keys, values={"what": side.what, "why": str(error)})
        except Absent:
            continue


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Every fluid is within the data of its properties, and does not freeze.",
    source="Melinder 2010; IAPWS",
    rank=IMPOSSIBLE,
    unit=find,
)
