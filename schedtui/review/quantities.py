"""The figures that the program computes: one entry each, read by table, JSON, export and README.

An entry says what a figure is called, measures and is computed from, and how to get it.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, Generic, TypeVar

from schedtui.errors import Absent
from schedtui.review.finding import margin
from schedtui.review.fluid_side import COOLING, HEATING
from schedtui.schedule.catalogue.field import Group
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import (
    AIR_MASS_FLOW,
    LOAD,
    MOISTURE_FLOW,
    PERCENT,
    RATIO,
    REFRIGERATION,
    TEMPERATURE,
    TEMPERATURE_DIFFERENCE,
    VELOCITY,
    Quantity,
)

if TYPE_CHECKING:
    from collections.abc import Callable

    from schedtui.review.case import UnitCase
    from schedtui.review.cooling import Cooling
    from schedtui.review.heating import Heating


T_contra = TypeVar("T_contra", contravariant=True)


@dataclass(frozen=True, slots=True)
class Figure(Generic[T_contra]):
    """A computed number: of a unit, or of a unit at one condition.

    Args:
        key: its name in the JSON.
        label: full name.
        quantity: what it measures.
        of: what it is computed from, in a phrase.
        get: returns it; raises Absent where it cannot be had.
    """

    key: str
    label: str
    quantity: Quantity
    of: str
    get: Callable[[T_contra], float]


@dataclass(frozen=True, slots=True)
class ComputedColumn:
    """A computed column of the table.

    Args:
        key: lasting name of the column.
        label: full name.
        short: heading below the group's.
        group: the group it stands in.
        after: the scheduled field that it stands behind.
        quantity: what it measures.
        of: what it is computed from, in a phrase.
        get: returns it for a unit; raises Absent where it cannot be had.
    """

    key: str
    label: str
    short: str
    group: Group
    after: str
    quantity: Quantity
    of: str
    get: Callable[[UnitCase], float]


COOLING_FIGURES: tuple[Figure[Cooling], ...] = (
    Figure("supply_mass", "Supply mass flow", AIR_MASS_FLOW, "supply airflow and its basis",
           lambda at: at.supply_mass),
    Figure("outdoor_mass", "Outdoor mass flow", AIR_MASS_FLOW, "outdoor airflow and its basis",
           lambda at: at.outdoor_mass),
    Figure("coil_mass", "Coil mass flow", AIR_MASS_FLOW, "what of the supply goes through the coil",
           lambda at: at.coil_mass),
    Figure("outdoor_fraction", "Outdoor share", RATIO, "outdoor and supply mass flow",
           lambda at: at.outdoor_fraction),
    Figure("coil_total", "Coil total", LOAD, "mass flow and the enthalpies around the coil",
           lambda at: at.coil.total),
    Figure("coil_sensible", "Coil sensible", LOAD, "mass flow and the dry bulbs around the coil",
           lambda at: at.coil.sensible),
    Figure("coil_latent", "Coil latent", LOAD, "coil total less sensible",
           lambda at: at.coil.latent),
    Figure("shr", "Sensible heat ratio", RATIO, "coil sensible over total", lambda at: at.shr),
    Figure("tons", "Tons", REFRIGERATION, "coil total", lambda at: at.coil.tons),
    Figure("adp", "Apparatus dew point", TEMPERATURE, "the line through the coil and saturation",
           lambda at: at.adp),
    Figure("bypass_factor", "Bypass factor", RATIO, "apparatus dew point and the coil's dry bulbs",
           lambda at: at.bypass_factor),
    Figure("condensate", "Condensate", MOISTURE_FLOW, "mass flow and humidity ratios at the coil",
           lambda at: at.coil.condensate),
    Figure("fan_heat", "Fan heat", LOAD, "the supply fan's rise, power, or pressure",
           lambda at: at.fan_heat),
    Figure("fan_rise", "Fan rise", TEMPERATURE_DIFFERENCE, "fan heat and mass flow",
           lambda at: at.fan_rise),
    Figure("room_sensible_met", "Room sensible met", LOAD, "supply and room air",
           lambda at: at.room_met.sensible),
    Figure("room_latent_met", "Room latent met", LOAD, "supply and room air",
           lambda at: at.room_met.latent),
    Figure("bypass", "Bypass", PERCENT, "bypass or coil airflow, as stated",
           lambda at: at.bypass_share * 100),
    Figure("reheat_load", "Reheat load", LOAD, "supply mass flow and the reheat's dry bulbs",
           lambda at: at.reheat_load),
)  # fmt: skip

HEATING_FIGURES: tuple[Figure[Heating], ...] = (
    Figure("supply_mass", "Supply mass flow", AIR_MASS_FLOW, "heating airflow and its basis",
           lambda at: at.supply_mass),
    Figure("outdoor_mass", "Outdoor mass flow", AIR_MASS_FLOW, "outdoor airflow and its basis",
           lambda at: at.outdoor_mass),
    Figure("outdoor_fraction", "Outdoor share", RATIO, "outdoor and supply mass flow",
           lambda at: at.outdoor_fraction),
    Figure("preheat_load", "Preheat load", LOAD, "mass flow and the preheat's dry bulbs",
           lambda at: at.preheat_load),
    Figure("heat_load", "Heating load", LOAD, "mass flow and the heating coil's dry bulbs",
           lambda at: at.heat_load),
    Figure("humidifier_load", "Moisture to add", MOISTURE_FLOW,
           "outdoor mass flow and the room's humidity ratio", lambda at: at.humidifier_load),
    Figure("room_heat_met", "Room heat met", LOAD, "supply and room air",
           lambda at: at.room_heat_met),
)  # fmt: skip

UNIT_FIGURES: tuple[Figure[UnitCase], ...] = (
    Figure("cool_water_capacity", "Cooling water carries", LOAD,
           "flow and temperatures of the cooling fluid",
           lambda case: COOLING.carried(case.unit, case.site.system)),
    Figure("heat_water_capacity", "Heating water carries", LOAD,
           "flow and temperatures of the heating fluid",
           lambda case: HEATING.carried(case.unit, case.site.system)),
    Figure("face_velocity", "Face velocity", VELOCITY,
           "the actual volume leaving the coil, and the face area",
           lambda case: case.face_velocity),
)  # fmt: skip

# The states of the air path by their names in the JSON, in the order that the air takes.
COOLING_STATES: tuple[tuple[str, str], ...] = (
    ("outdoor", "outdoor"),
    ("recovered", "recovered"),
    ("return", "return_air"),
    ("mixed", "mixed"),
    ("coil_entering", "coil_entering"),
    ("coil_leaving", "coil_leaving"),
    ("supply", "supply"),
    ("room", "room"),
)
HEATING_STATES: tuple[tuple[str, str], ...] = (
    ("outdoor", "outdoor"),
    ("recovered", "recovered"),
    ("return", "room"),
    ("mixed", "mixed"),
    ("preheat_leaving", "preheat_leaving"),
    ("heat_leaving", "heat_leaving"),
    ("room", "room"),
)


def _total_margin(case: UnitCase) -> float:
    return _margin(case.unit.need(Unit.cool_total), case.governing.required_total)


def _sensible_margin(case: UnitCase) -> float:
    return _margin(case.unit.need(Unit.cool_sensible), case.rated.required_sensible)


def _heat_margin(case: UnitCase) -> float:
    return _margin(case.unit.need(Unit.heat_total), case.heat_governing.heat_load)


def _margin(scheduled: float, required: float) -> float:
    found = margin(scheduled, required)
    if found is None:
        raise Absent(why="nothing is required")
    return found


COLUMNS: tuple[ComputedColumn, ...] = (
    ComputedColumn("mixed_db", "Mixed air dry bulb", "MIXED DB", Group.AIR, "outdoor_airflow",
                   TEMPERATURE, "return and outdoor air at the governing condition",
                   lambda case: case.governing.mixed.db),
    ComputedColumn("mixed_wb", "Mixed air wet bulb", "MIXED WB", Group.AIR, "outdoor_airflow",
                   TEMPERATURE, "return and outdoor air at the governing condition",
                   lambda case: case.governing.mixed.wb),
    ComputedColumn("entering_db", "Computed entering dry bulb", "DB", Group.COOLING, "cool_eat_wb",
                   TEMPERATURE, "mixed air and a blow-through fan, at the rated condition",
                   lambda case: case.rated.coil_entering.db),
    ComputedColumn("entering_wb", "Computed entering wet bulb", "WB", Group.COOLING, "cool_eat_wb",
                   TEMPERATURE, "mixed air and a blow-through fan, at the rated condition",
                   lambda case: case.rated.coil_entering.wb),
    ComputedColumn("total_required", "Cooling total required", "NEEDS", Group.COOLING,
                   "cool_total", LOAD, "air around the coil at the governing condition",
                   lambda case: case.governing.required_total),
    ComputedColumn("total_margin", "Cooling total margin", "MARGIN", Group.COOLING, "cool_total",
                   PERCENT, "scheduled total over the one required", _total_margin),
    ComputedColumn("sensible_required", "Cooling sensible required", "SENS NEEDS", Group.COOLING,
                   "cool_sensible", LOAD, "air around the coil at the rated condition",
                   lambda case: case.rated.required_sensible),
    ComputedColumn("sensible_margin", "Cooling sensible margin", "SENS MARGIN", Group.COOLING,
                   "cool_sensible", PERCENT, "scheduled sensible over the one required",
                   _sensible_margin),
    ComputedColumn("tons_required", "Cooling tons required", "NEEDS", Group.COOLING, "cool_tons",
                   REFRIGERATION, "the coil total at the governing condition",
                   lambda case: case.governing.coil.tons),
    ComputedColumn("face_velocity", "Face velocity", "VELOCITY", Group.COIL, "cool_face_area",
                   VELOCITY, "the actual volume leaving the coil, and the face area",
                   lambda case: case.face_velocity),
    ComputedColumn("cool_water_capacity", "Cooling water carries", "CARRIES",
                   Group.COOLING_FLUID, "cool_flow", LOAD,
                   "flow and temperatures of the cooling fluid",
                   lambda case: COOLING.carried(case.unit, case.site.system)),
    ComputedColumn("heat_required", "Heating required", "NEEDS", Group.HEATING, "heat_total", LOAD,
                   "air around the heating coil at its governing condition",
                   lambda case: case.heat_governing.heat_load),
    ComputedColumn("heat_margin", "Heating margin", "MARGIN", Group.HEATING, "heat_total", PERCENT,
                   "scheduled heating over the one required", _heat_margin),
    ComputedColumn("preheat_required", "Preheat required", "NEEDS", Group.PREHEAT,
                   "preheat_total", LOAD, "air around the preheat at the governing condition",
                   lambda case: case.heat_governing.preheat_load),
    ComputedColumn("shr", "Sensible heat ratio", "SHR", Group.COOLING, "cool_tons", RATIO,
                   "coil sensible over total at the governing condition",
                   lambda case: case.governing.shr),
)  # fmt: skip
