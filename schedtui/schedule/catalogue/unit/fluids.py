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
        headings=(
            "EWT", "ENTERING CHW", "FLOW TEMP", "FLOW °C", "ENTERING WATER", "WATER IN",
            "SUPPLY WATER", "CHW SUPPLY", "ENTERING FLUID",
        ),
    )  # fmt: skip
    cool_lwt = _fluid.number(
        TEMPERATURE, "Cooling leaving water", "LWT", "Fluid leaving the cooling coil.",
        within=FLUID_TEMPERATURE,
        headings=(
            "LWT", "LEAVING CHW", "RETURN TEMP", "RETURN °C", "LEAVING WATER", "WATER OUT",
            "RETURN WATER", "CHW RETURN", "LEAVING FLUID",
        ),
    )  # fmt: skip
    cool_flow = _fluid.number(
        WATER_FLOW, "Cooling water flow", "FLOW", "Flow of the cooling fluid.", printed=True,
        headings=(
            "GPM", "FLOW", "WATER FLOW", "FLOW RATE", "CHW FLOW", "L/s", "L/min", "WATER GPM",
            "FLUID FLOW",
        ),
    )  # fmt: skip
    cool_fluid_drop = _fluid.number(
        WATER_DROP, "Cooling fluid drop", "DROP", "Pressure drop of the cooling fluid.",
        printed=True,
        headings=(
            "WPD", "PD", "WATER DROP", "FLUID DROP", "WATER PRESSURE DROP", "MAX WATER DROP",
            "ft wg", "kPa", "WATER SIDE DROP",
        ),
    )  # fmt: skip
    cool_fluid = _fluid.choice(
        FLUIDS, "Cooling fluid", "FLUID", "What flows through the coil.",
        headings=("FLUID", "FLUID TYPE", "COOLING FLUID"),
    )  # fmt: skip
    cool_glycol = _fluid.number(
        PERCENT, "Cooling glycol", "GLYCOL", "Share of glycol in the cooling fluid.",
        headings=("GLYCOL", "PERCENT GLYCOL", "GLYCOL CONCENTRATION"),
    )  # fmt: skip
    glycol_by = _fluid.choice(
        ("mass", "volume"), "Glycol by", "GLYCOL BY", "Whether shares of glycol are by mass.",
        headings=("GLYCOL BY",),
    )  # fmt: skip
