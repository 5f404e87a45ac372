"""Unit keys: what the unit is, whom it serves, and what applies to it."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Group, In
from schedtui.schedule.catalogue.project import BASES
from schedtui.schedule.catalogue.table import Table

_unit = In(Group.UNIT)


class Identity(Table):
    """Who the unit is."""

    __slots__ = ()
    tag = _unit.text(
        "Tag", "TAG", "Name of the unit on the drawings.", required=True, own_only=True, core=True
    )
    serves = _unit.text("Serves", "SERVES", "What the unit serves.", blank=True)
    location = _unit.text("Location", "LOCATION", "Where the unit stands.", blank=True)
    quantity = _unit.count_or(1, "Quantity", "QTY", "Number of identical units.", least=1)
    standby = _unit.count_or(
        0, "Standby", "STANDBY", "How many of them stand by, left out of plants and totals."
    )
    conditions = _unit.texts(
        "Conditions", "CONDITIONS", "Conditions that apply; all of them when not given."
    )
    plants = _unit.texts(
        "Plants", "PLANTS", "Plants that feed it; all of the matching season when not given."
    )
    without = _unit.texts("Without", "WITHOUT", "Keys whose default does not hold for this unit.")
    airflow_basis = _unit.choice_or_none(
        BASES, "Airflow basis", "BASIS", "What its airflows mean, if not what the project says."
    )
