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
        ("chilled water", "dx"), "Cooling kind", "KIND", "What the coil is cooled by.",
        headings=(
            "COOLING KIND", "COOLING TYPE", "COOLING COIL TYPE", "COOLING MEDIUM",
            "COOLING SOURCE",
        ),
    )  # fmt: skip
    cool_eat_db = _cool.number(
        TEMPERATURE, "Entering air dry bulb", "EAT DB",
        "Dry bulb of the air entering the cooling coil, as scheduled.", printed=True, core=True,
        headings=("EAT DB", "ENTERING DB", "EDB", "ENTERING AIR", "EAT"),
    )  # fmt: skip
    cool_eat_wb = _cool.number(
        TEMPERATURE, "Entering air wet bulb", "EAT WB",
        "Wet bulb of the air entering the cooling coil, as scheduled.", printed=True, core=True,
        headings=("EAT WB", "ENTERING WB", "EWB"),
    )  # fmt: skip
    cool_lat_db = _cool.number(
        TEMPERATURE, "Leaving air dry bulb", "LAT DB",
        "Dry bulb of the air leaving the cooling coil, as scheduled.", core=True,
        headings=("LAT DB", "LEAVING DB", "LDB", "LEAVING AIR", "LAT"),
    )  # fmt: skip
    cool_lat_wb = _cool.number(
        TEMPERATURE, "Leaving air wet bulb", "LAT WB",
        "Wet bulb of the air leaving the cooling coil, as scheduled.", printed=True, core=True,
        headings=("LAT WB", "LEAVING WB", "LWB"),
    )  # fmt: skip
    cool_lat_at = _cool.choice(
        ("coil", "unit"), "Leaving air taken at", "LAT AT",
        "Where the scheduled leaving state is taken: leaving the coil, or leaving the unit.",
        headings=("LAT AT", "LEAVING AIR TAKEN AT"),
    )  # fmt: skip
    cool_total = _cool.number(
        LOAD, "Cooling total", "TOTAL", "Total cooling capacity, as scheduled.",
        printed=True, core=True,
        headings=(
            "TOTAL", "TOTAL CAPACITY", "CAPACITY", "TOTAL LOAD", "LOAD", "GROSS TOTAL",
            "GROSS CAPACITY", "GROSS TOTAL CAPACITY", "MBH", "kW", "Btu/h",
        ),
    )  # fmt: skip
    cool_sensible = _cool.number(
        LOAD, "Cooling sensible", "SENS", "Sensible cooling capacity, as scheduled.",
        printed=True, core=True,
        headings=(
            "SENSIBLE", "SENSIBLE CAPACITY", "SENSIBLE LOAD", "GROSS SENSIBLE",
            "GROSS SENSIBLE CAPACITY",
        ),
    )  # fmt: skip
    cool_tons = _cool.number(
        REFRIGERATION, "Cooling tons", "TONS",
        "Tons of refrigeration, where the schedule states them separately.", printed=True,
        headings=("TONS", "TOTAL TONS", "CAPACITY TONS", "COOLING TONS", "NOMINAL TONS", "TONNAGE"),
    )  # fmt: skip
    cool_basis = _cool.choice(
        ("gross", "net"), "Capacity basis", "BASIS",
        "Whether the scheduled capacity is before or after the supply fan's heat.",
        headings=("CAPACITY BASIS", "COOLING BASIS"),
    )  # fmt: skip
    cool_ambient_db = _cool.number(
        TEMPERATURE, "Ambient dry bulb", "AMBIENT",
        "Outdoor dry bulb that a dx capacity is stated at.",
        headings=(
            "AMBIENT", "AMBIENT DB", "AMBIENT TEMP", "CONDENSER ENTERING AIR",
            "CONDENSER AMBIENT", "OUTDOOR AMBIENT",
        ),
    )  # fmt: skip
    bypass = _cool.number(
        PERCENT, "Bypass", "BYPASS",
        "Share of the supply airflow that goes around the coil at design.",
        within=PERCENT_BELOW_HUNDRED,
        headings=("BYPASS", "BYPASS AIR", "COIL BYPASS", "PERCENT BYPASS"),
    )  # fmt: skip
    bypass_source = _cool.choice(
        ("mixed", "return"), "Bypass source", "BYPASS OF", "Which air goes around the coil.",
        headings=("BYPASS SOURCE", "BYPASS OF"),
    )  # fmt: skip
    cool_airflow = _cool.number(
        AIRFLOW, "Coil airflow", "COIL AIR",
        "Airflow through the cooling coil: another way to state the bypass.",
        headings=(
            "COOLING COIL AIRFLOW", "COIL AIR", "COIL AIRFLOW", "COOLING CFM", "COIL CFM",
            "COOLING AIRFLOW",
        ),
    )  # fmt: skip
    capacity_control = _cool.choice(
        ("coil", "bypass", "reheat", "airflow"), "Capacity control", "CONTROL",
        "How the unit sheds part load.",
        headings=("CAPACITY CONTROL", "COOLING CONTROL"),
    )  # fmt: skip
    precool_lat_db = _cool.number(
        TEMPERATURE, "First coil leaving dry bulb", "PRE LAT DB",
        "Dry bulb leaving a first cooling coil in series.",
        headings=("LAT DB", "LEAVING DB", "LDB", "LAT"),
    )  # fmt: skip
    precool_lat_wb = _cool.number(
        TEMPERATURE, "First coil leaving wet bulb", "PRE LAT WB",
        "Wet bulb leaving a first cooling coil in series.", printed=True,
        headings=("LAT WB", "LEAVING WB", "LWB"),
    )  # fmt: skip
    precool_total = _cool.number(
        LOAD, "First coil total", "PRE TOTAL", "Total capacity of a first cooling coil in series.",
        printed=True,
        headings=("TOTAL", "TOTAL CAPACITY", "CAPACITY", "MBH", "kW", "LOAD"),
    )  # fmt: skip
    wrap_drop = _cool.number(
        TEMPERATURE_DIFFERENCE, "Wrap-around drop", "WRAP",
        "Wrap-around recovery: cooled by so much before the coil, warmed as much after it.",
        headings=("WRAP DROP", "WRAP", "WRAP AROUND DROP"),
    )  # fmt: skip

    cool_face_area = _coil.number(
        AREA, "Cooling face area", "FACE AREA", "Face area of the cooling coil.",
        headings=("FACE AREA", "COIL FACE AREA", "ft²", "m²"),
    )  # fmt: skip
    cool_face_velocity = _coil.number(
        VELOCITY, "Cooling face velocity", "FACE VEL", "Face velocity of the cooling coil, as "
        "scheduled.", printed=True,
        headings=("FACE VELOCITY", "VELOCITY", "FPM", "MAX FACE VELOCITY", "FV"),
    )  # fmt: skip
    cool_rows = _coil.count(
        "Cooling rows", "ROWS", "Rows of tubes of the cooling coil.",
        headings=("ROWS", "NUMBER OF ROWS", "COIL ROWS"),
    )  # fmt: skip
    cool_fins = _coil.number(
        FIN_DENSITY, "Cooling fins", "FINS", "Fins of the cooling coil.",
        headings=("FPI", "FINS", "FIN SPACING", "FINS PER INCH", "FIN DENSITY"),
    )  # fmt: skip
    cool_air_drop = _coil.number(
        AIR_PRESSURE, "Cooling air drop", "AIR DROP", "Air pressure drop of the cooling coil.",
        printed=True,
        headings=(
            "APD", "PD", "AIR DROP", "AIR PRESSURE DROP", "AIR SIDE DROP", "MAX AIR DROP",
            "in. wg", "Pa",
        ),
    )  # fmt: skip

    reheat_kind = _reheat.choice(
        HEAT_KINDS, "Reheat kind", "KIND", "What the reheat is fed by.",
        headings=("KIND", "TYPE", "COIL TYPE", "MEDIUM", "SOURCE"),
    )  # fmt: skip
    reheat_lat_db = _reheat.number(
        TEMPERATURE, "Reheat leaving dry bulb", "LAT DB",
        "Dry bulb leaving the reheat after the cooling coil.",
        headings=("LAT DB", "LEAVING DB", "LAT", "LDB"),
    )  # fmt: skip
    reheat_total = _reheat.number(
        LOAD, "Reheat total", "TOTAL", "Capacity of the reheat, as scheduled.", printed=True,
        headings=("TOTAL", "CAPACITY", "TOTAL CAPACITY", "MBH", "kW", "LOAD"),
    )  # fmt: skip
