"""The velocity of air at a coil's face."""

from __future__ import annotations

from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from schedtui.units import System

_LITRES = 1000.0


def velocity(airflow: float, area: float, system: System) -> float:
    """Return an airflow over a face area [fpm | m/s].

    Args:
        airflow: through the coil [cfm | L/s].
        area: of its face [ft² | m²].
        system: the unit system.

    >>> velocity(10_000, 20, "IP")
    500.0
    """
    return airflow / area if system == "IP" else airflow / _LITRES / area
