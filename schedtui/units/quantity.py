"""The two unit systems and the quantities that a schedule is made of.

Everything else names a quantity from here and never a unit by itself. Knows nothing of
schedules, of air, or of how one unit becomes another.
"""

from __future__ import annotations

from dataclasses import dataclass
from typing import Literal

System = Literal["IP", "SI"]


@dataclass(frozen=True, slots=True)
class Quantity:
    """What a number measures, with its unit and customary digits in each system.

    Args:
        name: what it is, in the trade's words.
        ip: unit in the inch-pound system.
        si: unit in the metric system.
        digits_ip: decimals that a computed value is shown with, IP.
        digits_si: decimals that a computed value is shown with, SI.
    """

    name: str
    ip: str
    si: str
    digits_ip: int = 1
    digits_si: int = 1

    def unit(self, system: System) -> str:
        """Return the unit's label in `system`, empty for a pure number."""
        return self.ip if system == "IP" else self.si

    def digits(self, system: System) -> int:
        """Return the decimals a computed value is shown with in `system`."""
        return self.digits_ip if system == "IP" else self.digits_si


TEMPERATURE = Quantity("temperature", "°F", "°C")
TEMPERATURE_DIFFERENCE = Quantity("temperature difference", "°F", "K")
AIRFLOW = Quantity("airflow", "cfm", "L/s", 0, 0)
AIR_MASS_FLOW = Quantity("mass flow of dry air", "lb/h", "kg/s", 0, 3)
PERCENT = Quantity("percentage", "%", "%")
LOAD = Quantity("load", "MBH", "kW")
REFRIGERATION = Quantity("refrigeration", "tons", "tons", 2, 2)
SHAFT_POWER = Quantity("shaft power", "bhp", "kW", 2, 2)
MOTOR_POWER = Quantity("motor power", "hp", "kW", 2, 2)
ELECTRIC_POWER = Quantity("electric power", "kW", "kW")
AREA = Quantity("area", "ft²", "m²", 2, 2)
AIR_PRESSURE = Quantity("air pressure", "in. wg", "Pa", 2, 0)
STATION_PRESSURE = Quantity("station pressure", "psia", "kPa", 3, 2)
ALTITUDE = Quantity("altitude", "ft", "m", 0, 0)
WATER_FLOW = Quantity("water flow", "gpm", "L/s", 1, 2)
WATER_DROP = Quantity("water pressure drop", "ft wg", "kPa")
MOISTURE_FLOW = Quantity("moisture flow", "lb/h", "kg/h")
STEAM_PRESSURE = Quantity("steam pressure", "psig", "kPa gauge")
VELOCITY = Quantity("velocity", "fpm", "m/s", 0, 2)
HUMIDITY_RATIO = Quantity("humidity ratio", "lb/lb", "kg/kg", 5, 5)
ENTHALPY = Quantity("enthalpy", "Btu/lb", "kJ/kg", 2, 2)
SPECIFIC_VOLUME = Quantity("specific volume", "ft³/lb", "m³/kg", 3, 4)
AIRFLOW_PER_LOAD = Quantity("airflow per load", "cfm/ton", "L/s per kW", 0, 1)
FIN_DENSITY = Quantity("fins", "per inch", "per 25.4 mm", 0, 0)
COUNT = Quantity("count", "", "", 0, 0)
RATIO = Quantity("ratio", "", "", 3, 3)
