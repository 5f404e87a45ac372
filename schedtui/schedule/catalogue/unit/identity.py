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
        "Tag", "TAG", "Name of the unit on the drawings.", required=True, own_only=True, core=True,
        headings=(
            "TAG", "UNIT", "UNIT TAG", "UNIT NO", "UNIT ID", "UNIT DESIGNATION", "UNIT MARK",
            "UNIT NAME", "UNIT SYMBOL", "MARK", "PLAN MARK", "PLAN CODE", "SYMBOL", "ID",
            "DESIGNATION", "EQUIPMENT TAG", "EQUIPMENT ID", "EQUIPMENT DESIGNATION",
            "AHU DESIGNATION", "SYSTEM", "SYSTEM TAG", "EQUIPMENT NO", "EQUIPMENT", "ITEM", "NO",
            "REFERENCE", "AHU", "AHU TAG", "AHU NO",
        ),
    )  # fmt: skip
    serves = _unit.text(
        "Serves", "SERVES", "What the unit serves.", blank=True,
        headings=(
            "SERVES", "SERVICE", "AREA SERVED", "SYSTEM SERVED", "SPACE SERVED", "SERVING",
            "ZONE SERVED",
        ),
    )  # fmt: skip
    location = _unit.text(
        "Location", "LOCATION", "Where the unit stands.", blank=True,
        headings=("LOCATION", "UNIT LOCATION", "LOCATED", "PLACE", "FLOOR", "LEVEL"),
    )  # fmt: skip
    quantity = _unit.count_or(
        1, "Quantity", "QTY", "Number of identical units.", least=1,
        headings=("QUANTITY", "QTY", "NUMBER OF UNITS", "UNIT QTY"),
    )  # fmt: skip
    standby = _unit.count_or(
        0, "Standby", "STANDBY", "How many of them stand by, left out of plants and totals.",
        headings=("STANDBY", "STANDBY UNITS"),
    )  # fmt: skip
    conditions = _unit.texts(
        "Conditions", "CONDITIONS", "Conditions that apply; all of them when not given.",
        headings=("CONDITIONS", "DESIGN CONDITIONS"),
    )  # fmt: skip
    plants = _unit.texts(
        "Plants", "PLANTS", "Plants that feed it; all of the matching season when not given.",
        headings=("PLANTS", "PLANT", "FED FROM PLANTS"),
    )  # fmt: skip
    without = _unit.texts(
        "Without", "WITHOUT", "Keys whose default does not hold for this unit.",
        headings=("WITHOUT", "WITHOUT DEFAULTS"),
    )  # fmt: skip
    airflow_basis = _unit.choice_or_none(
        BASES, "Airflow basis", "BASIS", "What its airflows mean, if not what the project says.",
        headings=("AIRFLOW BASIS", "BASIS OF AIRFLOW"),
    )  # fmt: skip
