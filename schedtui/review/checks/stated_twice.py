"""A unit states two keys of which one settles the other.

Room humidity by relative humidity and by wet bulb, for one: which of the two was meant is not for
a program to guess, so the figures that need it are absent.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.check import IMPOSSIBLE, Check, Faults
from schedtui.review.finding import Fault, Severity
from schedtui.schedule.catalogue.unit import Unit
from schedtui.units import PERCENT

if TYPE_CHECKING:
    from schedtui.review.case import UnitCase

_POINTS = 1.0  # of the supply airflow, what two statements of one bypass may part by [%]


def find(case: UnitCase) -> Faults:
    """Look for alternatives of which more than one is stated."""
    stated: dict[str, list[str]] = {}
    for key, field in Unit.catalogue.items():
        if field.instead_of is not None and case.unit.stated(key):
            stated.setdefault(field.instead_of, []).append(key)
    for what, keys in stated.items():
        if len(keys) > 1:
            yield Fault(
                "{what} is stated by {keys}; one of them must go",
                tuple(keys),
                values={"what": what, "keys": " and ".join(keys)},
            )
    yield from _two_bypasses(case)


def _two_bypasses(case: UnitCase) -> Faults:
    """Look whether bypass and coil airflow, which may both be stated, are one."""
    unit = case.unit
    if unit.bypass is None or unit.cool_airflow is None or not unit.supply_airflow:
        return
    by_airflow = (1 - unit.cool_airflow / unit.supply_airflow) * 100
    if abs(unit.bypass - by_airflow) > _POINTS:
        yield Fault(
            "bypass {scheduled}, the coil airflow leaves {required}",
            ("bypass", "cool_airflow"),
            unit.bypass,
            by_airflow,
            PERCENT,
        )


CHECK = Check(
    severity=Severity.CONFLICT,
    sentence="Nothing is stated in two ways at once.",
    rank=IMPOSSIBLE,
    source="by definition",
    unit=find,
)
