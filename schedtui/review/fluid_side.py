"""The fluid side of a unit's coils: which keys state it, and what heat it can carry.

One description serves cooling coil, heating coil and preheat. Judges nothing.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, cast

from schedtui.air.fluid import Fluid, FluidKind, by_volume, fluid_heat
from schedtui.schedule.catalogue.unit import Unit

if TYPE_CHECKING:
    from schedtui.schedule.catalogue.field import Field
    from schedtui.units import System


@dataclass(frozen=True, slots=True)
class FluidSide:
    """The keys that state the fluid side of a coil.

    Args:
        what: the coil, in words.
        total: its scheduled load.
        kind: what it is fed by.
        wet_kind: the kind that makes the keys water through this coil.
        entering: entering fluid.
        leaving: leaving fluid.
        flow: flow of the fluid.
        fluid: which fluid.
        glycol: share of glycol.
        others: further keys that only such a coil has.
    """

    what: str
    total: Field[float | None]
    kind: Field[str]
    wet_kind: str
    entering: Field[float | None]
    leaving: Field[float | None]
    flow: Field[float | None]
    fluid: Field[str]
    glycol: Field[float | None]
    others: tuple[str, ...]

    def exists(self, unit: Unit) -> bool:
        """Tell whether the unit has such a coil at all, by any key that only it has.

        An entering temperature is often a default for all units, those without the coil included.
        """
        keys = (self.total.key, self.flow.key, *self.others)
        return any(map(unit.stated, keys)) or self.entering.key in unit.own

    def runs(self, unit: Unit) -> bool:
        """Tell whether the coil is fed by water or glycol."""
        return unit.value_of(self.kind) == self.wet_kind

    def supply(self, unit: Unit) -> str:
        """Return what the coil takes from a plant: the fluid through it, else its kind."""
        return unit.value_of(self.fluid if self.runs(unit) else self.kind)

    def stated(self, unit: Unit) -> bool:
        """Tell whether flow and both temperatures are stated."""
        return unit.stated(self.flow.key, self.entering.key, self.leaving.key)

    def fluid_of(self, unit: Unit) -> Fluid:
        """Return the fluid through the coil."""
        unit.refuse_bad(self.fluid, Unit.glycol_by)
        unit.refuse_bad(self.glycol)
        kind = cast("FluidKind", unit.value_of(self.fluid))
        # Water has no share, and a glycol without one is no water.
        share = 0.0 if kind == "water" else unit.need(self.glycol)
        return by_volume(kind, share) if unit.glycol_by == "volume" else Fluid(kind, share)

    def carried(self, unit: Unit, system: System) -> float:
        """Return the heat that flow and temperatures carry as stated [MBH | kW].

        Raises:
            Absent: one of them is not stated.
            FluidError: the fluid is outside its data.
        """
        flow, entering = unit.need(self.flow), unit.need(self.entering)
        leaving = unit.need(self.leaving)
        return fluid_heat(flow, entering, leaving, self.fluid_of(unit), system)


COOLING = FluidSide(
    "cooling coil", Unit.cool_total, Unit.cool_kind, "chilled water",
    Unit.cool_ewt, Unit.cool_lwt, Unit.cool_flow, Unit.cool_fluid, Unit.cool_glycol,
    ("cool_lat_db", "precool_lat_db", "precool_total"),
)  # fmt: skip
HEATING = FluidSide(
    "heating coil", Unit.heat_total, Unit.heat_kind, "hot water",
    Unit.heat_ewt, Unit.heat_lwt, Unit.heat_flow, Unit.heat_fluid, Unit.heat_glycol,
    ("heat_lat_db",),
)  # fmt: skip
PREHEAT = FluidSide(
    "preheat", Unit.preheat_total, Unit.preheat_kind, "hot water",
    Unit.preheat_ewt, Unit.preheat_lwt, Unit.preheat_flow, Unit.preheat_fluid,
    Unit.preheat_glycol, ("preheat_lat_db",),
)  # fmt: skip
HEATING_SIDES = (HEATING, PREHEAT)
SIDES = (COOLING, HEATING, PREHEAT)
