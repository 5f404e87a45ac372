"""A tag that several units carry.

Whoever orders, balances or controls by tag gets one of them at random. Example: a row copied for a
new unit whose tag was left as it was.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import Check, Faults
from schedtui.review.finding import Fault, Severity

if TYPE_CHECKING:
    from schedtui.review.case import ScheduleCase


def find(case: ScheduleCase) -> Faults:
    """Look for units after the first with a tag."""
    for tag, units in case.units_by_tag().items():
        for unit in units[1:]:
            yield Fault(
                "tag {tag} is used by {count} units",
                ("tag",),
                values={"tag": tag, "count": str(len(units))},
                about=("unit", unit.row_id),
            )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Every unit has a tag of its own.",
    source="common practice",
    schedule=find,
)
