"""Units on one plant are scheduled with different water.

One plant has one supply temperature and one fluid: a coil selected on other water gives another
capacity.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Severity
from schedtui.review.plants import most_common

if TYPE_CHECKING:
    from schedtui.review.plants import Feed, PlantCase


def find(case: PlantCase) -> Faults:
    """Hold fluid, glycol and entering temperature of each coil against those of most."""
    waters = [(feed, _fluid(feed), _entering(feed)) for feed in case.feeds]
    yield from _others(case, [(feed, fluid) for feed, fluid, _ in waters if fluid])
    yield from _others(case, [(feed, water) for feed, _, water in waters if water])


def _others(case: PlantCase, waters: list[tuple[Feed, str]]) -> Faults:
    counted: dict[str, float] = {}
    for feed, water in waters:
        counted[water] = counted.get(water, 0.0) + feed.case.unit.quantity
    if len(counted) <= 1:
        return
    common = most_common(counted)
    if common is None:
        # As many on the one as on the other: none of them can be called the odd one.
        told = ", ".join(f"{feed.label} ({water})" for feed, water in waters)
        sentence = "units on {plant} are scheduled with different water: {others}"
    else:
        told = ", ".join(f"{feed.label} ({water})" for feed, water in waters if water != common)
        sentence = "most units on {plant} are scheduled with {common}; others: {others}"
    values = {"plant": case.name, "common": common or "", "others": told}
    yield Fault(sentence, ("name",), values=values)


def _fluid(feed: Feed) -> str:
    fluid = known(feed.side.fluid_of, feed.case.unit)
    return str(fluid) if fluid else ""


def _entering(feed: Feed) -> str:
    """Return the entering temperature as a text with its unit, nothing where it is not stated."""
    value = feed.case.unit.value_of(feed.side.entering)
    quantity = feed.side.entering.quantity
    if value is None or quantity is None:
        return ""
    return f"{value:g} {quantity.unit(feed.case.site.system)}"


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="All units on one plant are scheduled with the same water.",
    source="by definition: a plant has one supply",
    reads_digits=False,
    plant=find,
)
