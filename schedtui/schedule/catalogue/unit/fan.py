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
    )  # fmt: skip
    fan_total_pressure = _fan.number(
        AIR_PRESSURE, "Fan total pressure", "TOTAL",
        "Pressure of the supply fan, of the kind that its efficiency goes with.",
    )  # fmt: skip
    fan_external_pressure = _fan.number(
        AIR_PRESSURE, "External pressure", "EXTERNAL", "Pressure outside the unit."
    )
    filter_drop = _fan.number(
        AIR_PRESSURE, "Filter drop", "FILTERS", "Pressure drop of the filters as dirty.",
        printed=True,
    )  # fmt: skip
    fan_efficiency = _fan.number(
        PERCENT, "Fan efficiency", "EFF", "Efficiency of the supply fan.",
        within=PERCENT_ABOVE_ZERO,
    )  # fmt: skip
    fan_power = _fan.number(
        SHAFT_POWER, "Fan shaft power", "SHAFT", "Shaft power of one supply fan.", printed=True
    )
    fan_count = _fan.count_or(1, "Fan count", "FANS", "Supply fans in the unit.", least=1)
    motor_power = _fan.number(
        MOTOR_POWER, "Motor power", "MOTOR", "Nameplate power of one supply fan's motor."
    )
    motor_efficiency = _fan.number(
        PERCENT, "Motor efficiency", "MOTOR EFF", "Efficiency of the supply fan's motor.",
        within=PERCENT_ABOVE_ZERO,
    )  # fmt: skip
    motor_kind = _fan.choice(
        ("standard", "ec"), "Motor kind", "MOTOR KIND",
        "Standard, or electronically commutated.",
    )  # fmt: skip
    motor_in_airstream = _fan.flag(
        "Motor in the airstream", "MOTOR IN AIR", "Whether the motor's losses warm the air.",
        default=True,
    )  # fmt: skip
    fan_rise = _fan.number(
        TEMPERATURE_DIFFERENCE, "Fan rise", "RISE",
        "Warming of the air by the supply fan; wins over what its power gives.",
    )  # fmt: skip
    return_fan_power = _fan.number(
        SHAFT_POWER, "Return fan shaft power", "RET SHAFT", "Shaft power of the return fan.",
        printed=True,
    )  # fmt: skip
    return_fan_motor_power = _fan.number(
        MOTOR_POWER, "Return fan motor", "RET MOTOR", "Nameplate power of the return fan's motor."
    )
    return_fan_total_pressure = _fan.number(
        AIR_PRESSURE, "Return fan total pressure", "RET TOTAL", "Pressure of the return fan."
    )
    return_fan_efficiency = _fan.number(
        PERCENT, "Return fan efficiency", "RET EFF", "Efficiency of the return fan.",
        within=PERCENT_ABOVE_ZERO,
    )  # fmt: skip
