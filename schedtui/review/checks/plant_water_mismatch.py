"""Units on one plant are scheduled with different water.

One plant has one supply temperature and one fluid: a coil selected on other water gives another
capacity.
"""

from __future__ import annotations

from collections import Counter
from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Severity

if TYPE_CHECKING:
    from schedtui.review.plants import Feed, PlantCase


def find(case: PlantCase) -> Faults:
    """Hold fluid, glycol and entering temperature of each coil against those of most."""
    waters = [(feed, _fluid(feed), _entering(feed)) for feed in case.feeds]
    yield from _others(case, [(feed, fluid) for feed, fluid, _ in waters if fluid])
    yield from _others(case, [(feed, water) for feed, _, water in waters if water])


def _others(case: PlantCase, waters: list[tuple[Feed, str]]) -> Faults:
    if not waters:
        return
    common = Counter(water for _, water in waters).most_common(1)[0][0]
    others = [(feed.label, water) for feed, water in waters if water != common]
    if others:
        told = ", ".join(f"{label} ({water})" for label, water in others)
        yield Fault(
            "most units on {plant} are scheduled with {common}; others: {others}",
            ("name",),
            values={"plant": case.name, "common": common, "others": told},
        )


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
