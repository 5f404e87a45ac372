"""What a check finds, and the finding that the judge makes of it."""

from __future__ import annotations

from dataclasses import dataclass, field
from enum import IntEnum
from typing import TYPE_CHECKING

from schedtui.units import Quantity, System, format_number

if TYPE_CHECKING:
    from collections.abc import Iterable, Mapping


class Severity(IntEnum):
    """How bad a finding is; the greater the worse."""

    MISSING = 1
    CAUTION = 2
    CONFLICT = 3
    SHORT = 4

    @property
    def word(self) -> str:
        """The word it goes by in files and on screen."""
        return self.name.lower()


_LAST = 99  # rank of what is not sure enough to explain anything

WORST_FIRST = tuple(sorted(Severity, reverse=True))


@dataclass(frozen=True, slots=True)
class Measure:
    """A number with what it measures, to be put into a sentence.

    Args:
        value: the number.
        quantity: what it measures.
    """

    value: float
    quantity: Quantity

    def text(self, system: System) -> str:
        """Return the number at its quantity's digits with its unit."""
        number = format_number(self.value, self.quantity.digits(system))
        return f"{number} {self.quantity.unit(system)}".rstrip()


@dataclass(frozen=True, slots=True)
class Fault:
    """What a check says of one thing; the judge makes findings of it.

    Args:
        says: a sentence with {names} for the values below; {scheduled} and {required} are there
            of themselves.
        fields: keys to look at, the one to blame first.
        scheduled: what is scheduled, in the unit of `quantity`.
        required: what it was held against, in the same unit.
        quantity: what both measure.
        values: further numbers and words of the sentence.
        severity: if milder than the check's own.
        about: table and row id of what it is about, for checks that look at many.
    """

    says: str
    fields: tuple[str, ...]
    scheduled: float | None = None
    required: float | None = None
    quantity: Quantity | None = None
    values: Mapping[str, Measure | str] = field(default_factory=dict)
    severity: Severity | None = None
    about: tuple[str, int] | None = None


@dataclass(frozen=True, slots=True)
class Subject:
    """What a finding is about.

    Args:
        table: "unit", "condition", "plant", "project", "limits", "defaults", "column" or "file".
        row_id: the row's id there; 0 for the file.
        label: how messages name it: "AHU-1", "AHU-1 (2nd)", "condition summer peak".
    """

    table: str
    row_id: int
    label: str

    def path(self, key: str) -> str:
        """Return where a key of the subject stands, as scripts read it.

        >>> Subject("condition", 3, "condition summer peak").path("outdoor_wb")
        'condition[summer peak].outdoor_wb'
        """
        if self.table in ("unit", "file"):
            return key
        name = self.label.removeprefix(f"{self.table} ")
        return f"{self.table}.{key}" if self.label == self.table else f"{self.table}[{name}].{key}"


@dataclass(frozen=True, slots=True)
class Finding:
    """A judged finding.

    Args:
        check: the check's name.
        severity: how bad it is.
        subject: what it is about.
        fields: keys to look at, the one to blame first.
        message: the finding in a sentence.
        condition: name of the condition it belongs to, if any.
        scheduled: what is scheduled.
        required: what it was held against.
        margin: (scheduled − required) / required [%].
        unit: unit of both.
        accepted: whether a reviewer has accepted it.
        rounding: whether the printed digits alone can explain it.
        rank: place in which it is read among a unit's, the lower the earlier.
    """

    check: str
    severity: Severity
    subject: Subject
    fields: tuple[str, ...]
    message: str
    condition: str | None = None
    scheduled: float | None = None
    required: float | None = None
    margin: float | None = None
    unit: str = ""
    accepted: bool = False
    rounding: bool = False
    rank: int = 0

    @property
    def paths(self) -> tuple[str, ...]:
        """Where its fields stand, as scripts read it."""
        return tuple(map(self.subject.path, self.fields))


def in_order(findings: Iterable[Finding]) -> tuple[Finding, ...]:
    """Return findings in the order they are read: what explains others first, then worst first."""
    return tuple(sorted(findings, key=_place))


def _place(finding: Finding) -> tuple[int, int]:
    sure = finding.severity > Severity.MISSING and not finding.rounding
    return finding.rank if sure else _LAST, -finding.severity


def margin(scheduled: float, required: float) -> float | None:
    """Return how far `scheduled` stands above `required` [% of required].

    >>> margin(380.0, 400.0)
    -5.0
    """
    return (scheduled - required) / required * 100 if required else None
