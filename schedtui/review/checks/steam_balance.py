"""The steam's latent heat is not the scheduled heating load.

A pound of steam gives some 960 Btu at 5 psig and 912 at 50.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.steam import steam_heat
from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import LOAD

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase


def find(case: UnitCase) -> Faults:
    """Hold the heating capacity against the steam's latent heat."""
    unit = case.unit
    if unit.heat_kind != "steam" or not unit.stated("heat_steam", "heat_total"):
        return
    total = unit.need(Unit.heat_total)
    own = steam_heat(
        unit.need(Unit.heat_steam),
        unit.need(Unit.heat_steam_pressure),
        case.site.air.pressure,
        case.site.system,
    )
    if abs(total - own) > own * case.site.limits.steam_balance / 100:
        yield Fault(
            "scheduled heating {scheduled}, the steam gives {required}",
            ("heat_total", "heat_steam", "heat_steam_pressure"),
            total,
            own,
            LOAD,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="The steam's latent heat is the scheduled heating load.",
    source="IAPWS-97: latent heat at gauge plus station pressure",
    judges=("heat_steam",),
    unit=find,
)
