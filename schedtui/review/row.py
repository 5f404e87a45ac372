"""What a unit's row says by itself: its own entering and leaving air and its airflow.

The air path of `cooling` with the scheduled entering air in the place of the computed one. Needs
no condition, and no rule for a coil that runs dry: the row says what it says. Judges nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.cooling import Cooling
from schedtui.review.figure import figure
from schedtui.schedule.catalogue.unit import Unit

if TYPE_CHECKING:
    from schedtui.air.state import State


class RowCoil(Cooling):
    """The cooling coil as the row's own numbers have it."""

    @figure
    def coil_entering(self) -> State:
        """Entering air as scheduled."""
        eat_db, eat_wb = self.unit.need_both(Unit.cool_eat_db, Unit.cool_eat_wb)
        return self.site.air.by_wet_bulb(eat_db, eat_wb)

    @figure
    def bypassed(self) -> State:
        """The air that goes around the coil: return air, else what enters the coil."""
        if self.unit.bypass_source == "return":
            return self.return_air
        air = self.coil_entering
        return air.heated_to(air.db + self.wrap) if self.wrap else air

    @figure
    def bypass_share(self) -> float:
        """Share of the supply air around the coil, as stated: no condition bounds it."""
        return self.stated_bypass

    @figure
    def coil_leaving(self) -> State:
        """Leaving air as scheduled, taken back to the coil."""
        self.refuse_left_by_loads()
        return self.leaving_aimed_at

    @property
    def fan_inlet(self) -> State:
        """Air at the supply fan's inlet: in front of a blow-through fan, or behind the coil."""
        return self.before_fan(self.coil_entering) if self.blows_through else self.rejoined
