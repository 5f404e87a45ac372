"""Unit keys: the cooling coil, what stands before and after it, and how it is made."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Group, In
from schedtui.schedule.catalogue.ranges import PERCENT_BELOW_HUNDRED
from schedtui.schedule.catalogue.table import Table
from schedtui.units import (
    AIR_PRESSURE,
    AIRFLOW,
    AREA,
    FIN_DENSITY,
    LOAD,
    PERCENT,
    REFRIGERATION,
    TEMPERATURE,
    TEMPERATURE_DIFFERENCE,
    VELOCITY,
)

_cool = In(Group.COOLING)
_coil = In(Group.COIL)
_reheat = In(Group.REHEAT)

HEAT_KINDS = ("hot water", "steam", "electric", "gas", "heat pump")


class CoolingSide(Table):
    """The cooling coil as scheduled."""

    __slots__ = ()
    cool_kind = _cool.choice(
        ("chilled water", "dx"), "Cooling kind", "KIND", "What the coil is cooled by."
    )
    cool_eat_db = _cool.number(
        TEMPERATURE, "Entering air dry bulb", "EAT DB",
        "Dry bulb of the air entering the cooling coil, as scheduled.", printed=True, core=True,
    )  # fmt: skip
    cool_eat_wb = _cool.number(
        TEMPERATURE, "Entering air wet bulb", "EAT WB",
        "Wet bulb of the air entering the cooling coil, as scheduled.", printed=True, core=True,
    )  # fmt: skip
    cool_lat_db = _cool.number(
        TEMPERATURE, "Leaving air dry bulb", "LAT DB",
        "Dry bulb of the air leaving the cooling coil, as scheduled.", core=True,
    )  # fmt: skip
    cool_lat_wb = _cool.number(
        TEMPERATURE, "Leaving air wet bulb", "LAT WB",
        "Wet bulb of the air leaving the cooling coil, as scheduled.", printed=True, core=True,
    )  # fmt: skip
    cool_lat_at = _cool.choice(
        ("coil", "unit"), "Leaving air taken at", "LAT AT",
        "Where the scheduled leaving state is taken: leaving the coil, or leaving the unit.",
    )  # fmt: skip
    cool_total = _cool.number(
        LOAD, "Cooling total", "TOTAL", "Total cooling capacity, as scheduled.",
        printed=True, core=True,
    )  # fmt: skip
    cool_sensible = _cool.number(
        LOAD, "Cooling sensible", "SENS", "Sensible cooling capacity, as scheduled.",
        printed=True, core=True,
    )  # fmt: skip
    cool_tons = _cool.number(
        REFRIGERATION, "Cooling tons", "TONS",
        "Tons of refrigeration, where the schedule states them separately.", printed=True,
    )  # fmt: skip
    cool_basis = _cool.choice(
        ("gross", "net"), "Capacity basis", "BASIS",
        "Whether the scheduled capacity is before or after the supply fan's heat.",
    )  # fmt: skip
    cool_ambient_db = _cool.number(
        TEMPERATURE, "Ambient dry bulb", "AMBIENT",
        "Outdoor dry bulb that a dx capacity is stated at.",
    )  # fmt: skip
    bypass = _cool.number(
        PERCENT, "Bypass", "BYPASS",
        "Share of the supply airflow that goes around the coil at design.",
        within=PERCENT_BELOW_HUNDRED,
    )  # fmt: skip
    bypass_source = _cool.choice(
        ("mixed", "return"), "Bypass source", "BYPASS OF", "Which air goes around the coil."
    )
    cool_airflow = _cool.number(
        AIRFLOW, "Coil airflow", "COIL AIR",
        "Airflow through the cooling coil: another way to state the bypass.",
    )  # fmt: skip
    capacity_control = _cool.choice(
        ("coil", "bypass", "reheat", "airflow"), "Capacity control", "CONTROL",
        "How the unit sheds part load.",
    )  # fmt: skip
    precool_lat_db = _cool.number(
        TEMPERATURE, "First coil leaving dry bulb", "PRE LAT DB",
        "Dry bulb leaving a first cooling coil in series.",
    )  # fmt: skip
    precool_lat_wb = _cool.number(
        TEMPERATURE, "First coil leaving wet bulb", "PRE LAT WB",
        "Wet bulb leaving a first cooling coil in series.", printed=True,
    )  # fmt: skip
    precool_total = _cool.number(
        LOAD, "First coil total", "PRE TOTAL", "Total capacity of a first cooling coil in series.",
        printed=True,
    )  # fmt: skip
    wrap_drop = _cool.number(
        TEMPERATURE_DIFFERENCE, "Wrap-around drop", "WRAP",
        "Wrap-around recovery: cooled by so much before the coil, warmed as much after it.",
    )  # fmt: skip

    cool_face_area = _coil.number(
        AREA, "Cooling face area", "FACE AREA", "Face area of the cooling coil."
    )
    cool_face_velocity = _coil.number(
        VELOCITY, "Cooling face velocity", "FACE VEL", "Face velocity of the cooling coil, as "
        "scheduled.", printed=True,
    )  # fmt: skip
    cool_rows = _coil.count("Cooling rows", "ROWS", "Rows of tubes of the cooling coil.")
    cool_fins = _coil.number(FIN_DENSITY, "Cooling fins", "FINS", "Fins of the cooling coil.")
    cool_air_drop = _coil.number(
        AIR_PRESSURE, "Cooling air drop", "AIR DROP", "Air pressure drop of the cooling coil.",
        printed=True,
    )  # fmt: skip

    reheat_kind = _reheat.choice(HEAT_KINDS, "Reheat kind", "KIND", "What the reheat is fed by.")
    reheat_lat_db = _reheat.number(
        TEMPERATURE, "Reheat leaving dry bulb", "LAT DB",
        "Dry bulb leaving the reheat after the cooling coil.",
    )  # fmt: skip
    reheat_total = _reheat.number(
        LOAD, "Reheat total", "TOTAL", "Capacity of the reheat, as scheduled.", printed=True
    )
