"""What a unit's row says of its heating by itself: entering and leaving air and the airflow.

The air path of `heating` with the scheduled entering air in the place of the computed one. Judges
nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.air.coil import heating_load
from schedtui.review.figure import figure
from schedtui.review.heating import Heating
from schedtui.schedule.catalogue.unit import Unit

if TYPE_CHECKING:
    from schedtui.air.state import State


class RowHeat(Heating):
    """The heating coil as the row's own numbers have it, with a condition's moisture."""

    @figure
    def heat_entering(self) -> State:
        """Entering air as scheduled, as moist as the condition's."""
        return self.to_coils.heated_to(self.unit.need(Unit.heat_eat_db))

    @figure
    def heat_leaving(self) -> State:
        """Leaving air as scheduled."""
        return self.heat_entering.heated_to(self.unit.need(Unit.heat_lat_db))

    @figure
    def heat_load(self) -> float:
        """Load between the row's own entering and leaving air [MBH | kW]; below 0 if it cools."""
        self.unit.need(Unit.heat_lat_db)
        return heating_load(self.supply_mass, self.heat_entering, self.heat_leaving.db)
