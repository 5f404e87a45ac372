"""The keys of `[project]`."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Group, In
from schedtui.schedule.catalogue.table import Table
from schedtui.units import ALTITUDE, STATION_PRESSURE

_project = In(Group.UNIT)

BASES = ("standard", "site", "actual")


class Project(Table):
    """What holds for the whole schedule."""

    __slots__ = ()
    title = _project.text("Title", "TITLE", "Name of the project.", required=True)
    number = _project.text("Number", "NUMBER", "Number of the project.")
    issue = _project.text(
        "Issue", "ISSUE", "The drawing issue that the schedule was read from.", blank=True
    )
    notes = _project.texts("Notes", "NOTES", "The notes of the drawing, as they stand there.")
    units = _project.choice(
        ("IP", "SI"), "Unit system", "UNITS", "Unit system of every number here.", required=True
    )
    altitude = _project.number(
        ALTITUDE, "Altitude", "ALTITUDE", "Height of the site above sea level; 0 when not given."
    )
    pressure = _project.number(
        STATION_PRESSURE, "Station pressure", "PRESSURE",
        "Barometric pressure at the site; wins over the altitude.",
    )  # fmt: skip
    airflow_basis = _project.choice(
        BASES, "Airflow basis", "BASIS",
        "What a stated airflow means: standard air, standard air times the site's density ratio, "
        "or actual volume.",
    )  # fmt: skip
