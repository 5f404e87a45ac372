"""The bypass factor does not go with the rows of the coil.

Each row lets between e^−0.75 and e^−0.25 of the air through untouched, by and large. A bypass
factor outside for the rows stated means that states and coil are from two selections.
"""

from __future__ import annotations

import math
from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import RATIO

if TYPE_CHECKING:
    from schedtui.review.cooling import Cooling

_LEAST, _MOST = 0.75, 0.25  # exponents a row


def find(at: Cooling) -> Faults:
    """Hold the bypass factor of a wet coil against the range of its rows."""
    if not at.unit.stated("cool_rows"):
        return
    rows = at.unit.need(Unit.cool_rows)
    at.refuse_left_by_loads()
    if at.coil_mode != "wet" or rows == 0:
        return
    low, high = math.exp(-_LEAST * rows), math.exp(-_MOST * rows)
    for bound, beyond in ((low, at.bypass_factor < low), (high, at.bypass_factor > high)):
        if beyond:
            yield Fault(
                "bypass factor {scheduled}, coils of {rows} rows have {required} at the bound",
                ("cool_rows", "cool_lat_wb", "cool_lat_db"),
                at.bypass_factor,
                bound,
                RATIO,
                {"rows": f"{rows:g}"},
            )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The bypass factor goes with the coil's rows.",
    source="ASHRAE Handbook—HVAC Systems and Equipment, air-cooling coils; the range is common "
    "practice",
    judges=("cool_rows",),
    rated=find,
)
