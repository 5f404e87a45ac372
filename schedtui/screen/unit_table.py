"""The units as a table: which columns there are, and what stands in each cell.

Scheduled fields and computed figures side by side, from the catalogue and the quantities.
Must not know of widgets.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.review.figure import known
from schedtui.review.finding import Severity
from schedtui.review.quantities import COLUMNS, ComputedColumn
from schedtui.review.reviewed import CLEAR, UNREADABLE, Review, UnitReview
from schedtui.schedule.catalogue.column import own_field
from schedtui.schedule.catalogue.field import Field, Group
from schedtui.schedule.catalogue.unit import Unit
from schedtui.screen.layout import Column, column_width
from schedtui.screen.looks import MARK_WIDTH, Look, mark_of
from schedtui.screen.painter import Cell
from schedtui.text_width import visible, width_of
from schedtui.units import format_number

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator, Sequence

MARK = "mark"
_WIDEST = 24
_NUMBER_WIDTH = 6

_MARKS = {
    UNREADABLE: Look.MARK_UNREADABLE,
    "short": Look.MARK_SHORT,
    "conflict": Look.MARK_CONFLICT,
    "caution": Look.MARK_CAUTION,
    "missing": Look.MARK_MISSING,
    CLEAR: Look.MARK_CLEAR,
}
# How a cell looks that a finding of this severity blames.
_BLAME = {
    Severity.SHORT: Look.BLAMED,
    Severity.CONFLICT: Look.BLAMED,
    Severity.CAUTION: Look.CAUTION,
    Severity.MISSING: Look.WANTED,
}
_COMPUTED = {column.key: column for column in COLUMNS}
_BLANK = Cell("", Look.BLANK)


class UnitTable:
    """The units of a review as a table.

    Args:
        review: what the table shows.
    """

    def __init__(self, review: Review) -> None:
        self._review = review
        self._versions: dict[int, int] = {}
        self._widths: dict[str, int] = {}
        self.row_keys: Sequence[int] = tuple(review.units)
        self._measure(review.units)
        self.columns: Sequence[Column] = tuple(self._made_columns())

    def start_over(self, review: Review) -> None:
        """Show a review of which anything may be another: rows, columns, unit system."""
        self._review = review
        self._widths.clear()
        self.row_keys = tuple(review.units)
        for row_id in review.units:
            self._versions[row_id] = self.version(row_id) + 1
        self._measure(review.units)
        self.columns = tuple(self._made_columns())

    def show(self, review: Review, changed: frozenset[int]) -> bool:
        """Show another review of the same schedule, and tell whether the columns are others.

        Args:
            review: the review.
            changed: the units that have to be painted anew.
        """
        own_before = self._review.schedule.document.rows("column")
        self._review = review
        self.row_keys = tuple(review.units)
        for row_id in changed:
            self._versions[row_id] = self.version(row_id) + 1
        widened = self._measure(changed)
        if not widened and review.schedule.document.rows("column") == own_before:
            return False
        columns = tuple(self._made_columns())
        same = columns == self.columns
        self.columns = columns
        return not same

    def version(self, row_key: int) -> int:
        """Return how often the row has changed."""
        return self._versions.get(row_key, 0)

    def cell(self, row_key: int, column_key: str) -> Cell:
        """Return what stands in a cell and how it looks."""
        reviewed = self._review.units[row_key]
        if column_key == MARK:
            return Cell("", _MARKS[reviewed.status])
        if column_key in _COMPUTED:
            return _computed_cell(reviewed, _COMPUTED[column_key])
        return _scheduled_cell(reviewed, column_key)

    def computed(self, column_key: str) -> ComputedColumn | None:
        """Return the entry of a computed column, None for a column of what is scheduled."""
        return _COMPUTED.get(column_key)

    def _measure(self, row_ids: Iterable[int]) -> bool:
        """Take in how wide the rows' texts are, and tell whether a column has become wider.

        A column never becomes narrower or goes while the schedule is open: the table would jump.
        """
        before = dict(self._widths)
        for row_id in row_ids:
            unit = self._review.units[row_id].unit
            for cells in (unit.inherited, unit.own):
                for key, cell in cells.items():
                    width = width_of(visible(cell.text))
                    if width > self._widths.get(key, -1):
                        self._widths[key] = width
        return self._widths != before

    def _made_columns(self) -> Iterator[Column]:
        system = self._review.schedule.system
        yield Column(MARK, "", "", "", MARK_WIDTH, "left", computed=True, frozen=True)
        for field in self._fields():
            unit = field.quantity.unit(system) if field.quantity else ""
            number = field.quantity is not None
            yield Column(
                key=field.key,
                group="" if field is Unit.tag else field.group.value,
                heading=field.short,
                unit=unit,
                width=column_width(field.short, unit, self._text_width(field)),
                align="right" if number else "left",
                frozen=field is Unit.tag,
            )
            for computed in COLUMNS:
                if computed.after == field.key:
                    yield self._computed_column(computed)

    def _computed_column(self, computed: ComputedColumn) -> Column:
        unit = computed.quantity.unit(self._review.schedule.system)
        return Column(
            key=computed.key,
            group=computed.group.value,
            heading=computed.short,
            unit=unit,
            width=column_width(computed.short, unit, _NUMBER_WIDTH),
            align="right",
            computed=True,
        )

    def _fields(self) -> list[Field[object]]:
        """Return the fields to show: always the core ones, others where some unit states them."""
        anchors = {column.after for column in COLUMNS}
        fields: list[Field[object]] = [
            field
            for key, field in Unit.catalogue.items()
            if field.core or key in self._widths or key in anchors
        ]
        fields += [own_field(column) for column in self._review.schedule.columns]  # type: ignore[misc]
        places = {group: place for place, group in enumerate(Group)}
        return sorted(fields, key=lambda field: places[field.group])

    def _text_width(self, field: Field[object]) -> int:
        """Return the cells that the widest text of a field takes, within reason."""
        least = _NUMBER_WIDTH if field.quantity else 0
        widest = self._widths.get(field.key, 0)
        return min(max(widest, least), _WIDEST)


def _scheduled_cell(reviewed: UnitReview, key: str) -> Cell:
    unit = reviewed.unit
    typed = unit.typed(key)
    if typed is not None and typed.bad:
        return Cell(typed.text, Look.BAD)
    blamed = _blamed(reviewed, key)
    if typed is None:
        return Cell("", Look.WANTED) if blamed is Look.WANTED else _BLANK
    if blamed is not None and blamed is not Look.WANTED:
        return Cell(typed.text, blamed)
    return Cell(typed.text, Look.TYPED if key in unit.own else Look.INHERITED)


def _blamed(reviewed: UnitReview, key: str) -> Look | None:
    """Return how a cell looks that is the first to be blamed by a finding, None for another."""
    for finding in reviewed.findings:
        if not finding.accepted and finding.fields and finding.fields[0] == key:
            return _BLAME[finding.severity]
    return None


def _computed_cell(reviewed: UnitReview, column: ComputedColumn) -> Cell:
    value = known(column.get, reviewed.case)
    if value is None:
        return Cell("", Look.COMPUTED)
    text = format_number(value, column.quantity.digits(reviewed.case.site.system))
    short = any(
        finding.severity is Severity.SHORT and column.after in finding.fields
        for finding in reviewed.findings
    )
    falls = short and column.key.endswith("_margin")
    return Cell(text, Look.FALLS_SHORT if falls else Look.COMPUTED)


def mark_of_status(status: str) -> str:
    """Return the mark that a row in this state carries."""
    return mark_of(_MARKS[status])
