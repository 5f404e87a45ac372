"""Unit keys: the fluid through the cooling coil."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Group, In
from schedtui.schedule.catalogue.ranges import FLUID_TEMPERATURE
from schedtui.schedule.catalogue.table import Table
from schedtui.units import PERCENT, TEMPERATURE, WATER_DROP, WATER_FLOW

_fluid = In(Group.COOLING_FLUID)

FLUIDS = ("water", "propylene glycol", "ethylene glycol")


class CoolingFluid(Table):
    """Water or glycol through the cooling coil, condenser water for dx."""

    __slots__ = ()
    cool_ewt = _fluid.number(
        TEMPERATURE, "Cooling entering water", "EWT", "Fluid entering the cooling coil.",
        within=FLUID_TEMPERATURE,
    )  # fmt: skip
    cool_lwt = _fluid.number(
        TEMPERATURE, "Cooling leaving water", "LWT", "Fluid leaving the cooling coil.",
        within=FLUID_TEMPERATURE,
    )  # fmt: skip
    cool_flow = _fluid.number(
        WATER_FLOW, "Cooling water flow", "FLOW", "Flow of the cooling fluid.", printed=True
    )
    cool_fluid_drop = _fluid.number(
        WATER_DROP, "Cooling fluid drop", "DROP", "Pressure drop of the cooling fluid.",
        printed=True,
    )  # fmt: skip
    cool_fluid = _fluid.choice(FLUIDS, "Cooling fluid", "FLUID", "What flows through the coil.")
    cool_glycol = _fluid.number(
        PERCENT, "Cooling glycol", "GLYCOL", "Share of glycol in the cooling fluid."
    )
    glycol_by = _fluid.choice(
        ("mass", "volume"), "Glycol by", "GLYCOL BY", "Whether shares of glycol are by mass."
    )
