"""The words of a finding: a fault's sentence with its numbers, with the digits that were typed."""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.finding import Fault, Measure
from schedtui.schedule.catalogue.condition import Condition
from schedtui.schedule.catalogue.project import Project
from schedtui.units import AIRFLOW_PER_LOAD, LOAD, PERCENT, RATIO, VELOCITY

if TYPE_CHECKING:
    from schedtui.errors import Absent
    from schedtui.review.rounding import Explained
    from schedtui.schedule.catalogue.table import Table

# What is spoken of in percent of the required; other bands are told in their own unit.
_IN_PERCENT = (LOAD, AIRFLOW_PER_LOAD, VELOCITY, RATIO)


def sentence(fault: Fault, row: Table) -> str:
    """Return what a fault says, its numbers put in.

    Args:
        fault: the fault.
        row: the row it is about, for the digits of what is typed there.
    """
    system = row.system
    words = {
        key: value.text(system) if isinstance(value, Measure) else value
        for key, value in fault.values.items()
    }
    if fault.quantity is not None and fault.scheduled is not None:
        words["scheduled"] = _as_typed(fault, row)
    if fault.quantity is not None and fault.required is not None:
        words["required"] = Measure(fault.required, fault.quantity).text(system)
    return fault.says.format_map(words)


def _as_typed(fault: Fault, row: Table) -> str:
    """Return the scheduled number with the digits that stand in the schedule, if they do."""
    assert fault.quantity is not None  # noqa: S101  the caller has looked
    assert fault.scheduled is not None  # noqa: S101
    cell = row.typed(fault.fields[0])
    if cell is not None and cell.value == fault.scheduled:
        return f"{cell.text} {fault.quantity.unit(row.system)}".rstrip()
    return Measure(fault.scheduled, fault.quantity).text(row.system)


def band(explained: Explained, fault: Fault, row: Table) -> str:
    """Say how wide the printed digits are, and which field's next digit would settle it."""
    assert fault.quantity is not None  # noqa: S101  rounding looks at numbers with units only
    if fault.quantity in _IN_PERCENT and fault.required:
        width = Measure(abs(explained.band / fault.required) * 100, PERCENT).text(row.system)
    else:
        width = Measure(explained.band, fault.quantity).text(row.system)
    which = label(row, explained.key)
    return f"the printed digits leave ±{width}; a further digit of {which} settles it"


def lack(absences: list[Absent], row: Table) -> tuple[str, tuple[str, ...]]:
    """Say what a check went without.

    Returns:
        The sentence, and the keys that would cure it.
    """
    keys = tuple(dict.fromkeys(key for absent in absences for key in absent.keys))
    reasons = dict.fromkeys(absent.why for absent in absences if absent.why)
    plain = dict.fromkeys(key for absent in absences if not absent.why for key in absent.keys)
    if plain:
        reasons[f"needs {', '.join(label(row, key) for key in plain)}"] = None
    return f"not judged: {'; '.join(reasons)}", keys


def label(row: Table, key: str) -> str:
    """Return a key's label with the key behind it."""
    for catalogue in (row.catalogue, Condition.catalogue, Project.catalogue):
        if key in catalogue:
            return f"{catalogue[key].label.lower()} ({key})"
    return key
