"""The keys of `[[plant]]`: what the units together may draw."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Group, In
from schedtui.schedule.catalogue.table import Table
from schedtui.units import LOAD, PERCENT, WATER_FLOW

_plant = In(Group.UNIT)


class Plant(Table):
    """A source of cooling or heating that several units share."""

    __slots__ = ()
    name = _plant.text("Name", "NAME", "Name that units refer to it by.", required=True)
    serves = _plant.choice(
        ("cooling", "heating"), "Serves", "SERVES", "Whether it cools or heats.", required=True
    )
    capacity = _plant.number(LOAD, "Capacity", "CAPACITY", "What it can deliver.")
    flow = _plant.number(WATER_FLOW, "Flow", "FLOW", "What its pumps can circulate.")
    diversity = _plant.number_or(
        100.0, PERCENT, "Diversity", "DIVERSITY", "Share of the units' sum that stands at once."
    )
