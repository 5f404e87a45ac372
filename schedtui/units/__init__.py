"""Units: the quantities of a schedule, and numbers typed with their digits and their unit.

The one place that knows a unit's name. Below everything but the errors: knows nothing of
schedules or air. Use it through the names here; pint is loaded with the first conversion.
"""

from __future__ import annotations

from schedtui.units.amount import Amount, read_amount
from schedtui.units.number import decimals, format_number, step
from schedtui.units.quantity import (
    AIR_MASS_FLOW,
    AIR_PRESSURE,
    AIRFLOW,
    AIRFLOW_PER_LOAD,
    ALTITUDE,
    AREA,
    COUNT,
    ELECTRIC_POWER,
    ENTHALPY,
    FIN_DENSITY,
    HUMIDITY_RATIO,
    LOAD,
    MOISTURE_FLOW,
    MOTOR_POWER,
    PERCENT,
    RATIO,
    REFRIGERATION,
    SHAFT_POWER,
    SPECIFIC_VOLUME,
    STATION_PRESSURE,
    STEAM_PRESSURE,
    TEMPERATURE,
    TEMPERATURE_DIFFERENCE,
    VELOCITY,
    WATER_DROP,
    WATER_FLOW,
    Quantity,
    System,
)
from schedtui.units.word import accepted_units

__all__ = [
    "AIRFLOW",
    "AIRFLOW_PER_LOAD",
    "AIR_MASS_FLOW",
    "AIR_PRESSURE",
    "ALTITUDE",
    "AREA",
    "COUNT",
    "ELECTRIC_POWER",
    "ENTHALPY",
    "FIN_DENSITY",
    "HUMIDITY_RATIO",
    "LOAD",
    "MOISTURE_FLOW",
    "MOTOR_POWER",
    "PERCENT",
    "RATIO",
    "REFRIGERATION",
    "SHAFT_POWER",
    "SPECIFIC_VOLUME",
    "STATION_PRESSURE",
    "STEAM_PRESSURE",
    "TEMPERATURE",
    "TEMPERATURE_DIFFERENCE",
    "VELOCITY",
    "WATER_DROP",
    "WATER_FLOW",
    "Amount",
    "Quantity",
    "System",
    "accepted_units",
    "decimals",
    "format_number",
    "read_amount",
    "step",
]
