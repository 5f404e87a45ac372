"""The cells of one worksheet part, as text.

Follows the part's own order and believes no stated size. Knows nothing of archives.
"""

from __future__ import annotations

import re
from dataclasses import dataclass, field
from decimal import InvalidOperation
from typing import TYPE_CHECKING

from schedtui.errors import FileError
from schedtui.sheets.grid import MOST_MERGES, Cell, Gathering, Grid, Merge, column_letters
from schedtui.sheets.number_format import shown
from schedtui.sheets.xml_part import parse

if TYPE_CHECKING:
    from collections.abc import Mapping, Sequence
    from typing import IO

LAST_ROW, LAST_COLUMN = 1_048_576, 16_384
_REF = re.compile(r"\$?([A-Z]{1,3})\$?([0-9]{1,7})")
_ESCAPE = re.compile(r"_x([0-9A-Fa-f]{4})_")
_STANDS_FOR_NOTHING = "its formula has no stored value"


@dataclass(frozen=True, slots=True)
class Styles:
    """How a workbook shows numbers.

    Args:
        formats: the number format of each cell style.
        since_1904: whether days count from 1904.
    """

    formats: Sequence[str]
    since_1904: bool = False

    def format_of(self, style: str) -> str:
        """Return the number format of a cell's style."""
        number = int(style) if style.isdigit() and len(style) < 9 else 0  # noqa: PLR2004  fits an index
        return self.formats[number] if number < len(self.formats) else "General"


@dataclass(slots=True)
class _Reading:
    """One worksheet on its way into a grid."""

    strings: Sequence[str]
    styles: Styles
    gathering: Gathering = field(default_factory=Gathering)
    merges: list[Merge] = field(default_factory=list)
    hidden_rows: set[int] = field(default_factory=set)
    hidden_columns: set[int] = field(default_factory=set)
    inside: list[str] = field(default_factory=list)
    row: int = 0
    column: int = 0
    attributes: Mapping[str, str] = field(default_factory=dict)
    value: list[str] = field(default_factory=list)
    words: list[str] = field(default_factory=list)
    formula: bool = False

    def start(self, name: str, attributes: Mapping[str, str]) -> None:
        """Take up an element."""
        self.inside.append(name)
        if name == "c":
            self._start_cell(attributes)
        elif name == "row":
            stated = attributes.get("r", "")
            self.row = _bounded(stated, LAST_ROW) if stated else self.row + 1
            self.column = 0
            if attributes.get("hidden") in ("1", "true"):
                self.hidden_rows.add(self.row)
        elif name == "f":
            self.formula = True
        elif name == "mergeCell":
            self._merge(attributes.get("ref", ""))
        elif name == "col" and attributes.get("hidden") in ("1", "true"):
            first = _bounded(attributes.get("min", ""), LAST_COLUMN)
            last = _bounded(attributes.get("max", ""), LAST_COLUMN)
            self.hidden_columns.update(range(first, last + 1))

    def _start_cell(self, attributes: Mapping[str, str]) -> None:
        self.attributes, self.formula = attributes, False
        self.value.clear()
        self.words.clear()
        if "r" in attributes:
            self.row, self.column = _place(attributes["r"])
        else:
            self.column += 1
            self.row = max(self.row, 1)

    def _merge(self, ref: str) -> None:
        first, _, last = ref.partition(":")
        (top, left), (bottom, right) = _place(first), _place(last or first)
        self.merges.append(Merge(top, left, bottom, right))
        if len(self.merges) > MOST_MERGES:
            raise FileError(f"has more than {MOST_MERGES} merged blocks")

    def end(self, name: str) -> None:
        """Finish an element."""
        self.inside.pop()
        if name == "c":
            self._finish_cell()

    def text(self, data: str) -> None:
        """Take up characters of a value or of an inline text."""
        if not self.inside:
            return
        if self.inside[-1] == "v":
            self.value.append(data)
        elif self.inside[-1] == "t" and "rPh" not in self.inside:
            self.words.append(data)

    def _finish_cell(self) -> None:
        ref = f"{column_letters(self.column)}{self.row}"
        stored = "".join(self.value).strip()
        kind = self.attributes.get("t", "n")
        if kind == "inlineStr":
            cell = Cell(_clean("".join(self.words)), ref)
        elif self.formula and not stored and kind != "str":
            cell = Cell("", ref, problem=_STANDS_FOR_NOTHING)
        else:
            cell = self._stored(kind, stored, ref)
        if cell.text or cell.problem:
            self.gathering.add(self.row, self.column, cell)

    def _stored(self, kind: str, stored: str, ref: str) -> Cell:
        if kind == "s":
            index = int(stored) if stored.isdigit() and len(stored) < 9 else -1  # noqa: PLR2004
            if stored and not 0 <= index < len(self.strings):
                return Cell("", ref, problem="its text is not in the workbook")
            return Cell(_clean(self.strings[index]) if stored else "", ref)
        if kind in ("b", "e", "str", "d"):
            text = {"1": "TRUE", "0": "FALSE"}.get(stored, stored) if kind == "b" else stored
            return Cell(_clean(text), ref, problem="it shows an error" if kind == "e" else "")
        return self._number(stored, ref) if stored else Cell("", ref)

    def _number(self, stored: str, ref: str) -> Cell:
        try:
            form = self.styles.format_of(self.attributes.get("s", "0"))
            text, number = shown(stored, form, since_1904=self.styles.since_1904)
        except (InvalidOperation, OverflowError, ValueError):
            return Cell(stored[:100], ref, problem="its number cannot be read")
        return Cell(text, ref, number)


def read_worksheet(
    stream: IO[bytes], name: str, strings: Sequence[str], styles: Styles, *, hidden: bool = False
) -> Grid:
    """Return the grid of a worksheet part.

    Args:
        stream: the part's bytes.
        name: the sheet's name.
        strings: the texts that cells share.
        styles: how numbers are shown.
        hidden: whether the workbook hides the sheet.

    Raises:
        FileError: it is damaged, or larger than a schedule can be.
    """
    reading = _Reading(strings, styles)
    parse(stream, reading.start, reading.end, reading.text)
    return Grid(
        name,
        reading.gathering.sorted(),
        tuple(reading.merges),
        frozenset(reading.hidden_rows),
        frozenset(reading.hidden_columns),
        hidden,
    )


def _place(ref: str) -> tuple[int, int]:
    """Return the row and column that a reference names."""
    found = _REF.fullmatch(ref)
    if found is None:
        raise FileError(f'is damaged: "{ref[:20]}" is no cell')
    column = 0
    for letter in found[1]:
        column = column * 26 + ord(letter) - ord("A") + 1
    row = int(found[2])
    if not (1 <= row <= LAST_ROW and 1 <= column <= LAST_COLUMN):
        raise FileError(f'is damaged: "{ref[:20]}" is beyond a sheet\'s bounds')
    return row, column


def _bounded(text: str, most: int) -> int:
    if not (text.isascii() and text.isdigit() and len(text) < 9 and 1 <= int(text) <= most):  # noqa: PLR2004
        raise FileError(f'is damaged: "{text[:20]}" is no row or column')
    return int(text)


def _clean(text: str) -> str:
    """Return a text with its escapes resolved, harmlessly, and without space around it."""
    return _ESCAPE.sub(lambda found: chr(int(found[1], 16)), text).replace("\r", "").strip()
