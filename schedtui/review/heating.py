"""A unit's air at one heating condition. Judges nothing."""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.cooling import outdoor_air
from schedtui.review.figure import figure

if TYPE_CHECKING:
    from schedtui.air.state import State
    from schedtui.review.site import Site
    from schedtui.schedule.catalogue.condition import Condition
    from schedtui.schedule.catalogue.unit import Unit


class Heating:
    """One unit at one heating condition.

    Args:
        unit: the unit as scheduled.
        condition: the design condition.
        site: where the unit stands.
    """

    def __init__(self, unit: Unit, condition: Condition, site: Site) -> None:
        self.unit = unit
        self.condition = condition
        self.site = site

    @property
    def name(self) -> str:
        """The condition's name."""
        return self.condition.name or ""

    @figure
    def outdoor(self) -> State:
        """Outdoor air of the condition."""
        return outdoor_air(self.condition, self.site)
