"""The plant's capacity falls short of what its units require together.

Each unit may be right and the chiller too small: quantities forgotten in a sum are the usual cause.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.errors import Absent
from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.shortfall import is_short
from schedtui.schedule.catalogue.plant import Plant
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.plants import PlantCase


def find(case: PlantCase) -> Faults:
    """Hold the plant's capacity against its units' coincident load."""
    capacity, required = case.plant.need(Plant.capacity), case.load
    limits = case.site.limits
    cooling = case.plant.serves == "cooling"
    agreement = limits.agreement if cooling else limits.sensible_agreement
    if is_short(capacity, required, 0, agreement):
        yield Fault(
            "capacity {scheduled}, its units need {required} together at {condition}",
            ("capacity",),
            capacity,
            required,
            LOAD,
            {"condition": case.governing},
        )
    elif unknown := case.unknown(case.governing):
        raise Absent(why=f"the load of {', '.join(unknown)} is not known")


CHECK = Check(
    severity=Severity.SHORT,
    sentence="A plant's capacity carries its units' coincident load.",
    source="conservation of energy",
    judges=("capacity",),
    reads_digits=False,
    plant=find,
)
