"""Unit keys: preheat, heating coil, humidifier."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Group, In
from schedtui.schedule.catalogue.ranges import FLUID_TEMPERATURE, PERCENT_ABOVE_ZERO
from schedtui.schedule.catalogue.table import Table
from schedtui.schedule.catalogue.unit.cooling import HEAT_KINDS
from schedtui.schedule.catalogue.unit.fluids import FLUIDS
from schedtui.units import (
    AIR_PRESSURE,
    AREA,
    ELECTRIC_POWER,
    LOAD,
    MOISTURE_FLOW,
    PERCENT,
    STEAM_PRESSURE,
    TEMPERATURE,
    WATER_FLOW,
)

_pre = In(Group.PREHEAT)
_heat = In(Group.HEATING)


class HeatingSide(Table):
    """The preheat coil, the heating coil and the humidifier as scheduled."""

    __slots__ = ()
    preheat_kind = _pre.choice(
        HEAT_KINDS, "Preheat kind", "KIND", "What the preheat is fed by.",
        headings=("KIND", "TYPE", "COIL TYPE", "MEDIUM", "SOURCE"),
    )  # fmt: skip
    preheat_at = _pre.choice(
        ("mixed", "outdoor"), "Preheat of", "OF", "Which air the preheat stands in.",
        headings=("OF", "AIR STREAM", "PREHEAT OF"),
    )  # fmt: skip
    preheat_eat_db = _pre.number(
        TEMPERATURE, "Preheat entering air", "EAT DB",
        "Dry bulb entering the preheat, as scheduled.", printed=True,
        headings=("EAT DB", "ENTERING DB", "EDB", "EAT", "ENTERING AIR"),
    )  # fmt: skip
    preheat_lat_db = _pre.number(
        TEMPERATURE, "Preheat leaving air", "LAT DB", "Dry bulb leaving the preheat, as scheduled.",
        headings=("LAT DB", "LEAVING DB", "LDB", "LAT", "LEAVING AIR"),
    )  # fmt: skip
    preheat_total = _pre.number(
        LOAD, "Preheat total", "TOTAL", "Capacity of the preheat, as scheduled.", printed=True,
        headings=("TOTAL", "CAPACITY", "TOTAL CAPACITY", "MBH", "kW", "LOAD"),
    )  # fmt: skip
    preheat_ewt = _pre.number(
        TEMPERATURE, "Preheat entering water", "EWT", "Fluid entering the preheat.",
        within=FLUID_TEMPERATURE,
        headings=("EWT", "ENTERING WATER", "WATER IN", "SUPPLY WATER", "ENTERING FLUID"),
    )  # fmt: skip
    preheat_lwt = _pre.number(
        TEMPERATURE, "Preheat leaving water", "LWT", "Fluid leaving the preheat.",
        within=FLUID_TEMPERATURE,
        headings=("LWT", "LEAVING WATER", "WATER OUT", "RETURN WATER", "LEAVING FLUID"),
    )  # fmt: skip
    preheat_flow = _pre.number(
        WATER_FLOW, "Preheat water flow", "FLOW", "Flow of the preheat's fluid.", printed=True,
        headings=(
            "GPM", "FLOW", "WATER FLOW", "FLOW RATE", "L/s", "L/min", "FLUID FLOW", "WATER GPM",
        ),
    )  # fmt: skip
    preheat_fluid = _pre.choice(
        FLUIDS, "Preheat fluid", "FLUID", "What flows through the preheat.",
        headings=("FLUID", "FLUID TYPE"),
    )  # fmt: skip
    preheat_glycol = _pre.number(
        PERCENT, "Preheat glycol", "GLYCOL", "Share of glycol in the preheat's fluid.",
        headings=("GLYCOL", "PERCENT GLYCOL"),
    )  # fmt: skip

    heat_kind = _heat.choice(
        HEAT_KINDS, "Heating kind", "KIND", "What the heating is fed by.",
        headings=(
            "HEATING KIND", "HEATING TYPE", "HEATING COIL TYPE", "HEATING MEDIUM",
            "HEATING SOURCE",
        ),
    )  # fmt: skip
    heat_position = _heat.choice(
        ("before cooling", "after cooling"), "Heating position", "POSITION",
        "Whether the heating coil stands before the cooling coil or after it.",
        headings=("HEATING POSITION", "HEATING COIL POSITION"),
    )  # fmt: skip
    heat_eat_db = _heat.number(
        TEMPERATURE, "Heating entering air", "EAT DB",
        "Dry bulb entering the heating coil, as scheduled.", printed=True,
        headings=("EAT DB", "ENTERING DB", "EDB", "EAT", "ENTERING AIR"),
    )  # fmt: skip
    heat_lat_db = _heat.number(
        TEMPERATURE, "Heating leaving air", "LAT DB",
        "Dry bulb leaving the heating coil, as scheduled.",
        headings=("LAT DB", "LEAVING DB", "LDB", "LAT", "LEAVING AIR"),
    )  # fmt: skip
    heat_total = _heat.number(
        LOAD, "Heating total", "TOTAL", "Capacity of the heating coil, as scheduled.", printed=True,
        headings=(
            "TOTAL", "CAPACITY", "TOTAL CAPACITY", "TOTAL LOAD", "LOAD", "MBH", "kW", "Btu/h",
            "OUTPUT", "OUTPUT CAPACITY",
        ),
    )  # fmt: skip
    heat_face_area = _heat.number(
        AREA, "Heating face area", "FACE AREA", "Face area of the heating coil.",
        headings=("FACE AREA", "COIL FACE AREA", "ft²", "m²"),
    )  # fmt: skip
    heat_air_drop = _heat.number(
        AIR_PRESSURE, "Heating air drop", "AIR DROP", "Air pressure drop of the heating coil.",
        printed=True,
        headings=(
            "APD", "PD", "AIR DROP", "AIR PRESSURE DROP", "AIR SIDE DROP", "MAX AIR DROP",
            "in. wg", "Pa",
        ),
    )  # fmt: skip
    heat_ewt = _heat.number(
        TEMPERATURE, "Heating entering water", "EWT", "Fluid entering the heating coil.",
        within=FLUID_TEMPERATURE,
        headings=(
            "EWT", "ENTERING HW", "FLOW TEMP", "FLOW °C", "ENTERING WATER", "WATER IN",
            "SUPPLY WATER", "HW SUPPLY", "ENTERING FLUID",
        ),
    )  # fmt: skip
    heat_lwt = _heat.number(
        TEMPERATURE, "Heating leaving water", "LWT", "Fluid leaving the heating coil.",
        within=FLUID_TEMPERATURE,
        headings=(
            "LWT", "LEAVING HW", "RETURN TEMP", "RETURN °C", "LEAVING WATER", "WATER OUT",
            "RETURN WATER", "HW RETURN", "LEAVING FLUID",
        ),
    )  # fmt: skip
    heat_flow = _heat.number(
        WATER_FLOW, "Heating water flow", "FLOW", "Flow of the heating fluid.", printed=True,
        headings=(
            "GPM", "FLOW", "WATER FLOW", "FLOW RATE", "HW FLOW", "L/s", "L/min", "FLUID FLOW",
            "WATER GPM",
        ),
    )  # fmt: skip
    heat_fluid = _heat.choice(
        FLUIDS, "Heating fluid", "FLUID", "What flows through the heating coil.",
        headings=("FLUID", "FLUID TYPE", "HEATING FLUID"),
    )  # fmt: skip
    heat_glycol = _heat.number(
        PERCENT, "Heating glycol", "GLYCOL", "Share of glycol in the heating fluid.",
        headings=("GLYCOL", "PERCENT GLYCOL", "GLYCOL CONCENTRATION"),
    )  # fmt: skip
    heat_steam = _heat.number(
        MOISTURE_FLOW, "Heating steam", "STEAM", "Steam to the heating coil.", printed=True,
        headings=("STEAM", "STEAM FLOW", "STEAM CONSUMPTION", "lb/h", "kg/h"),
    )  # fmt: skip
    heat_steam_pressure = _heat.number(
        STEAM_PRESSURE, "Steam pressure", "STEAM PRES", "Gauge pressure of the steam.",
        headings=("STEAM PRESSURE", "psig"),
    )  # fmt: skip
    heat_electric = _heat.number(
        ELECTRIC_POWER, "Electric heat", "ELECTRIC",
        "Electric heating power; supplementary for a heat pump.", printed=True,
        headings=(
            "ELECTRIC", "ELECTRIC HEAT", "ELECTRIC HEATING", "ELECTRIC POWER",
            "ELECTRIC CAPACITY", "ELECTRIC TOTAL", "ELECTRIC kW", "kW",
        ),
    )  # fmt: skip
    heat_input = _heat.number(
        LOAD, "Fuel input", "INPUT", "Heat of the fuel burnt.", printed=True,
        headings=(
            "INPUT", "FUEL INPUT", "GAS INPUT", "HEATING INPUT", "INPUT CAPACITY", "MBH INPUT",
        ),
    )  # fmt: skip
    heat_efficiency = _heat.number(
        PERCENT, "Fuel efficiency", "EFF", "Share of the fuel's heat that reaches the air.",
        within=PERCENT_ABOVE_ZERO,
        headings=(
            "FUEL EFFICIENCY", "GAS EFFICIENCY", "THERMAL EFFICIENCY", "HEATING EFFICIENCY",
            "BURNER EFFICIENCY",
        ),
    )  # fmt: skip
    humidifier = _heat.number(
        MOISTURE_FLOW, "Humidifier", "HUMIDIFIER", "Moisture that the humidifier adds.",
        printed=True,
        headings=(
            "HUMIDIFIER", "HUMIDIFIER CAPACITY", "HUMIDIFIER STEAM", "HUMIDIFIER OUTPUT",
            "HUMIDIFICATION", "HUMIDIFIER LOAD", "HUMIDIFIER FLOW", "MOISTURE",
        ),
    )  # fmt: skip
