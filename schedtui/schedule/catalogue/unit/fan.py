"""Unit keys: fans and motors."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Group, In
from schedtui.schedule.catalogue.ranges import PERCENT_ABOVE_ZERO
from schedtui.schedule.catalogue.table import Table
from schedtui.units import (
    AIR_PRESSURE,
    MOTOR_POWER,
    PERCENT,
    SHAFT_POWER,
    TEMPERATURE_DIFFERENCE,
)

_fan = In(Group.FAN)


class FanSide(Table):
    """The supply fan and the return fan."""

    __slots__ = ()
    fan_position = _fan.choice(
        ("draw-through", "blow-through"), "Fan position", "POSITION",
        "Whether the supply fan draws through the coil or blows through it.",
        headings=("FAN POSITION", "FAN ARRANGEMENT", "FAN CONFIGURATION"),
    )  # fmt: skip
    fan_total_pressure = _fan.number(
        AIR_PRESSURE, "Fan total pressure", "TOTAL",
        "Pressure of the supply fan, of the kind that its efficiency goes with.",
        headings=(
            "TSP", "TOTAL PRESSURE", "FAN TOTAL PRESSURE", "TOTAL STATIC PRESSURE",
            "TOTAL STATIC", "FAN TSP", "TP",
        ),
    )  # fmt: skip
    fan_external_pressure = _fan.number(
        AIR_PRESSURE, "External pressure", "EXTERNAL", "Pressure outside the unit.",
        headings=(
            "ESP", "EXTERNAL PRESSURE", "EXTERNAL STATIC PRESSURE", "EXTERNAL STATIC", "EXTERNAL",
        ),
    )  # fmt: skip
    filter_drop = _fan.number(
        AIR_PRESSURE, "Filter drop", "FILTERS", "Pressure drop of the filters as dirty.",
        printed=True,
        headings=(
            "FILTER DROP", "FILTER AIR DROP", "FILTER APD", "FILTER PRESSURE DROP",
            "DIRTY FILTER DROP", "FILTER DIRTY DROP",
        ),
    )  # fmt: skip
    fan_efficiency = _fan.number(
        PERCENT, "Fan efficiency", "EFF", "Efficiency of the supply fan.",
        within=PERCENT_ABOVE_ZERO,
        headings=(
            "FAN EFFICIENCY", "EFFICIENCY", "FAN EFF", "FAN TOTAL EFFICIENCY",
            "FAN STATIC EFFICIENCY",
        ),
    )  # fmt: skip
    fan_power = _fan.number(
        SHAFT_POWER, "Fan shaft power", "SHAFT", "Shaft power of one supply fan.", printed=True,
        headings=(
            "BHP", "FAN BHP", "BRAKE POWER", "SHAFT POWER", "FAN POWER", "FAN SHAFT POWER",
            "BRAKE HORSEPOWER", "FAN BRAKE POWER", "BRAKE HP",
        ),
    )  # fmt: skip
    fan_count = _fan.count_or(
        1, "Fan count", "FANS", "Supply fans in the unit.", least=1,
        headings=("FANS", "FAN COUNT", "FAN QTY", "NUMBER OF FANS", "QTY OF FANS"),
    )  # fmt: skip
    motor_power = _fan.number(
        MOTOR_POWER, "Motor power", "MOTOR", "Nameplate power of one supply fan's motor.",
        headings=(
            "HP", "MOTOR HP", "MOTOR", "MOTOR POWER", "MOTOR SIZE", "MHP", "NAMEPLATE POWER",
            "MOTOR NAMEPLATE", "MOTOR KW", "HORSEPOWER", "MOTOR HORSEPOWER",
        ),
    )  # fmt: skip
    motor_efficiency = _fan.number(
        PERCENT, "Motor efficiency", "MOTOR EFF", "Efficiency of the supply fan's motor.",
        within=PERCENT_ABOVE_ZERO,
        headings=("MOTOR EFFICIENCY", "MOTOR EFF"),
    )  # fmt: skip
    motor_kind = _fan.choice(
        ("standard", "ec"), "Motor kind", "MOTOR KIND",
        "Standard, or electronically commutated.",
        headings=("MOTOR KIND", "MOTOR TYPE"),
    )  # fmt: skip
    motor_in_airstream = _fan.flag(
        "Motor in the airstream", "MOTOR IN AIR", "Whether the motor's losses warm the air.",
        default=True,
        headings=("MOTOR IN AIRSTREAM", "MOTOR IN AIR", "MOTOR IN AIR STREAM"),
    )  # fmt: skip
    fan_rise = _fan.number(
        TEMPERATURE_DIFFERENCE, "Fan rise", "RISE",
        "Warming of the air by the supply fan; wins over what its power gives.",
        headings=("FAN RISE", "FAN HEAT RISE", "FAN TEMP RISE", "FAN HEAT GAIN", "RISE"),
    )  # fmt: skip
    return_fan_power = _fan.number(
        SHAFT_POWER, "Return fan shaft power", "RET SHAFT", "Shaft power of the return fan.",
        printed=True,
        headings=("BHP", "BRAKE POWER", "SHAFT POWER", "POWER", "BRAKE HP", "BRAKE HORSEPOWER"),
    )  # fmt: skip
    return_fan_motor_power = _fan.number(
        MOTOR_POWER, "Return fan motor", "RET MOTOR", "Nameplate power of the return fan's motor.",
        headings=("HP", "MOTOR HP", "MOTOR", "MOTOR POWER", "MHP", "MOTOR SIZE", "HORSEPOWER"),
    )  # fmt: skip
    return_fan_total_pressure = _fan.number(
        AIR_PRESSURE, "Return fan total pressure", "RET TOTAL", "Pressure of the return fan.",
        headings=("TSP", "TOTAL PRESSURE", "TOTAL STATIC PRESSURE", "TOTAL STATIC", "TP"),
    )  # fmt: skip
    return_fan_efficiency = _fan.number(
        PERCENT, "Return fan efficiency", "RET EFF", "Efficiency of the return fan.",
        within=PERCENT_ABOVE_ZERO,
        headings=("EFFICIENCY", "EFF", "FAN EFFICIENCY"),
    )  # fmt: skip
