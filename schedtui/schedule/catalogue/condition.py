"""The keys of `[[condition]]`: a design condition outdoors."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Group, In
from schedtui.schedule.catalogue.table import Table
from schedtui.units import HUMIDITY_RATIO, PERCENT, TEMPERATURE

_condition = In(Group.UNIT)

# A condition states exactly one of these beside its dry bulb.
HUMIDITIES = ("outdoor_wb", "outdoor_dp", "outdoor_rh", "outdoor_w")


class Condition(Table):
    """A design condition: outdoor air, and how much of the room loads stands with it."""

    __slots__ = ()
    name = _condition.text("Name", "NAME", "Name that units refer to it by.", required=True)
    season = _condition.choice(
        ("cooling", "heating"), "Season", "SEASON", "Whether it cools or heats.", required=True
    )
    outdoor_db = _condition.number(
        TEMPERATURE, "Outdoor dry bulb", "DB", "Outdoor dry bulb.", required=True
    )
    outdoor_wb = _condition.number(TEMPERATURE, "Outdoor wet bulb", "WB", "Outdoor wet bulb.")
    outdoor_dp = _condition.number(TEMPERATURE, "Outdoor dew point", "DP", "Outdoor dew point.")
    outdoor_rh = _condition.number(
        PERCENT, "Outdoor relative humidity", "RH", "Outdoor relative humidity."
    )
    outdoor_w = _condition.number(
        HUMIDITY_RATIO, "Outdoor humidity ratio", "W", "Outdoor humidity ratio."
    )
    sensible_load = _condition.number_or(
        100.0, PERCENT, "Sensible load", "SENS LOAD",
        "Share of the design room sensible load at this condition.",
    )  # fmt: skip
    latent_load = _condition.number_or(
        100.0, PERCENT, "Latent load", "LAT LOAD",
        "Share of the design room latent load at this condition.",
    )  # fmt: skip
    source = _condition.text("Source", "SOURCE", "Where the condition is from.", blank=True)
