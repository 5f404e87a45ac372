"""The keys of `[[unit]]`, gathered from the parts of an air-handling unit."""

from __future__ import annotations

from schedtui.schedule.catalogue.field import Group, In
from schedtui.schedule.catalogue.table import Table
from schedtui.schedule.catalogue.unit.air import AirSide
from schedtui.schedule.catalogue.unit.cooling import CoolingSide
from schedtui.schedule.catalogue.unit.fan import FanSide
from schedtui.schedule.catalogue.unit.fluids import CoolingFluid
from schedtui.schedule.catalogue.unit.heating import HeatingSide
from schedtui.schedule.catalogue.unit.identity import Identity

__all__ = ["Unit"]


class Remarks(Table):
    """What the sheet remarks on the unit."""

    __slots__ = ()
    remarks = In(Group.REMARKS).texts(
        "Remarks", "REMARKS", "Remarks of the sheet.", own_only=True,
        headings=(
            "REMARKS", "REMARK", "NOTES", "NOTE", "COMMENTS", "REMARKS NOTES", "REMARK NO",
            "NOTE NO",
        ),
    )  # fmt: skip


class Unit(Identity, AirSide, CoolingSide, CoolingFluid, FanSide, HeatingSide, Remarks):
    """An air-handling unit: a row of the schedule."""

    __slots__ = ()
