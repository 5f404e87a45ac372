"""Where the units stand: the air there, and what the project says of every unit."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING

from schedtui.air.psychro import station_pressure
from schedtui.air.state import Air

if TYPE_CHECKING:
    from schedtui.schedule.catalogue.limits import Limits
    from schedtui.schedule.view import Schedule
    from schedtui.units import System


@dataclass(frozen=True, slots=True)
class Site:
    """A project's site.

    Args:
        system: unit system of every number.
        air: moist air at the station pressure.
        airflow_basis: what airflows mean unless a unit says otherwise.
        limits: the limits in force.
    """

    system: System
    air: Air
    airflow_basis: str
    limits: Limits


def site_of(schedule: Schedule) -> Site:
    """Return the site of a schedule: its pressure as given, else that of its altitude."""
    project = schedule.project
    pressure = project.pressure
    if pressure is None:
        pressure = station_pressure(project.altitude or 0.0, schedule.system)
    return Site(
        schedule.system, Air(schedule.system, pressure), project.airflow_basis, schedule.limits
    )
