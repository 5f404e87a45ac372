"""The keys of `[limits]`: how far a schedule may stand off before something is said.

All defaults are common practice with no one source; a project sets its own.
"""

from __future__ import annotations

from dataclasses import dataclass

from schedtui.schedule.catalogue.field import Field, Group, In
from schedtui.schedule.catalogue.kinds import NumberKind
from schedtui.schedule.catalogue.ranges import PERCENT_ABOVE_ZERO, ZERO_OR_MORE, Range, usual
from schedtui.schedule.catalogue.table import Table
from schedtui.units import (
    AIRFLOW_PER_LOAD,
    PERCENT,
    RATIO,
    TEMPERATURE,
    TEMPERATURE_DIFFERENCE,
    VELOCITY,
    Quantity,
    System,
)

_limits = In(Group.UNIT)


@dataclass(frozen=True, slots=True)
class Limit(Field[float]):
    """A limit: a number whose default depends on the unit system.

    Args:
        default_si: the default in SI; `default` is the one in IP.
    """

    default_si: float = 0.0

    def usual(self, system: System) -> float:
        """Return the default in `system`."""
        return self.default if system == "IP" else self.default_si


def _limit(
    quantity: Quantity,
    ip: float,
    si: float,
    label: str,
    doc: str,
    within: Range = ZERO_OR_MORE,
) -> Limit:
    # A margin may well be over 100 %, so a limit is bounded below only.
    ranges = usual(quantity) if quantity is TEMPERATURE else (within, within)
    kind = NumberKind(quantity, *ranges)
    return Limit(kind, label, label.upper(), doc, Group.UNIT, ip, default_si=si)


def _percent(default: float, label: str, doc: str) -> Limit:
    return _limit(PERCENT, default, default, label, doc)


class Limits(Table):
    """The limits in force; ranges are written as two keys, `_low` and `_high`."""

    __slots__ = ()
    agreement = _percent(
        1.0, "Agreement",
        "What a capacity may lack before it is short: ideal-gas and real-gas formulas of moist "
        "air differ by less in a coil's load.",
    )  # fmt: skip
    sensible_agreement = _limit(
        PERCENT, 2.0, 2.5, "Sensible agreement",
        "The same for sensible and heating loads, where customary factors part further.",
    )  # fmt: skip
    rounding = _limits.choice(
        ("allow", "strict"), "Rounding", "ROUNDING",
        "Whether the printed digits are given the benefit of the doubt.",
    )  # fmt: skip
    rounding_cap = _percent(5.0, "Rounding cap", "The widest band that rounding may leave.")
    total_margin = _percent(0.0, "Total margin", "Least margin of a scheduled total capacity.")
    sensible_margin = _percent(
        0.0, "Sensible margin", "Least margin of a scheduled sensible capacity."
    )
    oversize = _percent(25.0, "Oversize", "Margin of a capacity above which it is oversized.")
    entering_db = _limit(
        TEMPERATURE_DIFFERENCE, 1.0, 0.6, "Entering dry bulb",
        "Scheduled entering dry bulb against the computed one.",
    )  # fmt: skip
    entering_wb = _limit(
        TEMPERATURE_DIFFERENCE, 1.0, 0.6, "Entering wet bulb",
        "Scheduled entering wet bulb against the computed one.",
    )  # fmt: skip
    row_balance = _percent(
        3.0, "Row balance", "How far a load may lie below the one that the row's numbers give."
    )
    row_excess = _percent(
        10.0, "Row excess", "How far a load may lie above the one that the row's numbers give."
    )
    water_balance = _percent(5.0, "Water balance", "Load against the water's flow and rise.")
    airflow_balance = _percent(
        5.0, "Airflow balance", "Return and outdoor air against supply, in percent of supply."
    )
    tons_balance = _percent(1.0, "Tons balance", "Tons against the total.")
    power_balance = _percent(3.0, "Power balance", "Shaft power against flow and pressure.")
    electric_balance = _percent(3.0, "Electric balance", "Electric power against the load.")
    steam_balance = _percent(5.0, "Steam balance", "Steam against the load.")
    face_velocity_cooling = _limit(
        VELOCITY, 550, 2.8, "Cooling face velocity", "Highest, for moisture carries over above."
    )
    face_velocity_heating = _limit(VELOCITY, 800, 4.1, "Heating face velocity", "Highest.")
    leaving_humidity_low = _percent(
        85, "Leaving humidity, low", "Relative humidity leaving a wet coil."
    )
    leaving_humidity_high = _percent(
        100, "Leaving humidity, high", "Relative humidity leaving a wet coil."
    )
    airflow_per_ton_low = _limit(
        AIRFLOW_PER_LOAD, 200, 27, "Airflow per ton, low", "Least standard airflow for the load."
    )
    airflow_per_ton_high = _limit(
        AIRFLOW_PER_LOAD, 500, 67, "Airflow per ton, high", "Most standard airflow for the load."
    )
    supply_difference = _limit(
        TEMPERATURE_DIFFERENCE, 30, 17, "Supply difference", "Room less supply air in cooling."
    )
    shr_low = _limit(RATIO, 0.5, 0.5, "SHR, low", "Least sensible heat ratio.")
    shr_high = _limit(RATIO, 1.0, 1.0, "SHR, high", "Greatest sensible heat ratio.")
    water_rise_low = _limit(
        TEMPERATURE_DIFFERENCE, 8, 4.5, "Water rise, low", "Least rise of the cooling water."
    )
    water_rise_high = _limit(
        TEMPERATURE_DIFFERENCE, 24, 13, "Water rise, high", "Greatest rise of the cooling water."
    )
    approach = _limit(
        TEMPERATURE_DIFFERENCE, 5, 3, "Approach", "Leaving air over entering water, least."
    )
    motor_headroom = _percent(10, "Motor headroom", "Motor power over shaft power, least.")
    motor_efficiency = _limit(
        PERCENT, 90, 90, "Motor efficiency", "Assumed where none is stated.",
        within=PERCENT_ABOVE_ZERO,
    )  # fmt: skip
    outdoor_share = _percent(
        10, "Outdoor share", "Least outdoor air of supply, unless what is required is stated."
    )
    freeze = _limit(
        TEMPERATURE, 38, 3.3, "Freeze", "Air below this entering a water coil may burst it."
    )
