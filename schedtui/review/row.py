"""What a unit's row says by itself: its own entering and leaving air and its airflow.

Needs no condition. Judges nothing.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, cast

from schedtui.air.coil import CoilLoad, coil_load
from schedtui.air.flow import AirflowBasis, dry_air_mass
from schedtui.errors import Absent
from schedtui.review.figure import figure
from schedtui.schedule.catalogue.unit import Unit

if TYPE_CHECKING:
    from schedtui.air.state import State
    from schedtui.review.site import Site


class RowCoil:
    """The cooling coil as the row's own numbers have it.

    Args:
        unit: the unit as scheduled.
        site: where it stands.
    """

    def __init__(self, unit: Unit, site: Site) -> None:
        self.unit = unit
        self.site = site

    @figure
    def entering(self) -> State:
        """Entering air as scheduled."""
        eat_db, eat_wb = self.unit.need(Unit.cool_eat_db), self.unit.need(Unit.cool_eat_wb)
        return self.site.air.by_wet_bulb(eat_db, eat_wb)

    @figure
    def leaving(self) -> State:
        """Leaving air as scheduled."""
        lat_db, lat_wb = self.unit.need(Unit.cool_lat_db), self.unit.need(Unit.cool_lat_wb)
        return self.site.air.by_wet_bulb(lat_db, lat_wb)

    @figure
    def mass(self) -> float:
        """Dry air that the row's supply airflow holds [lb/h | kg/s]."""
        unit = self.unit
        airflow = unit.need(Unit.supply_airflow)
        if airflow == 0:
            raise Absent("supply_airflow", why="the supply airflow is 0")
        unit.refuse_bad(Unit.airflow_basis)
        basis = cast("AirflowBasis", unit.airflow_basis or self.site.airflow_basis)
        volume = None
        if basis == "actual":  # taken at the supply fan's inlet
            blows = unit.fan_position == "blow-through"
            volume = (self.entering if blows else self.leaving).v
        return dry_air_mass(airflow, basis, self.site.air, volume)

    @figure
    def coil(self) -> CoilLoad:
        """The load between the row's entering and leaving air."""
        return coil_load(self.mass, self.entering, self.leaving)
