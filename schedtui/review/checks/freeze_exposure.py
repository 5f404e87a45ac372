"""Air below the freeze limit enters a water coil in heating.

A coil that stands in freezing air with still water bursts. Air is seldom mixed well, so the limit
lies above freezing; for glycol it is the mixture's freezing point. The cooling coil is looked at
too, behind the heating coil or in front of it.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.fluid import freezing_point
from schedtui.errors import Absent
from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.review.fluid_side import COOLING, HEATING, PREHEAT, FluidSide
from schedtui.units import TEMPERATURE

if TYPE_CHECKING:
    from collections.abc import Iterator

    from schedtui.review.heating import Heating


def find(at: Heating) -> Faults:
    """Look at the air entering each coil that is fed by water and scheduled at all."""
    for side, entering in _entering(at):
        limit = _limit(at, side)
        if entering < limit:
            yield Fault(
                "air of {scheduled} enters the {what}; below {required} it may freeze and burst",
                (side.total.key, "preheat_lat_db"),
                entering,
                limit,
                TEMPERATURE,
                {"what": side.what},
            )


def _entering(at: Heating) -> Iterator[tuple[FluidSide, float]]:
    """Return the coils that water may freeze in, with the dry bulb of the air that enters each."""
    if _holds_water(at, PREHEAT):
        yield PREHEAT, at.preheat_entering.db
    if _holds_water(at, HEATING):
        yield HEATING, at.heat_entering.db
    if _holds_water(at, COOLING):
        yield COOLING, at.cooling_coil_entering.db


def _holds_water(at: Heating, side: FluidSide) -> bool:
    """Tell whether a coil is scheduled at all, and fed by water or glycol."""
    return side.runs(at.unit) and side.exists(at.unit)


def _limit(at: Heating, side: FluidSide) -> float:
    """Return the temperature below which a coil is exposed [°F | °C]."""
    try:
        fluid = side.fluid_of(at.unit)
    except Absent:
        return at.site.limits.freeze
    if fluid.kind == "water":
        return at.site.limits.freeze
    return freezing_point(fluid, at.site.system)


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="No air below the freeze limit enters a water coil in heating.",
    source="common practice",
    reads_digits=False,
    heating=find,
)
