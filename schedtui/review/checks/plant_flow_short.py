"""The plant's flow falls short of what its units draw together.

The farthest units then starve.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.shortfall import is_short
from schedtui.schedule.catalogue.plant import Plant
from schedtui.units import WATER_FLOW

if TYPE_CHECKING:
    from schedtui.review.plants import PlantCase


def find(case: PlantCase) -> Faults:
    """Hold the plant's flow against its units' flows."""
    flow, required = case.plant.need(Plant.flow), case.flow
    if is_short(flow, required, 0, case.site.limits.agreement):
        yield Fault(
            "flow {scheduled}, its units draw {required} together",
            ("flow",),
            flow,
            required,
            WATER_FLOW,
        )


CHECK = Check(
    severity=Severity.SHORT,
    sentence="A plant's flow carries its units' flows together.",
    source="conservation of mass",
    judges=("flow",),
    reads_digits=False,
    plant=find,
)
