"""Puts edits of a text together: replacements, cuts and insertions at offsets of the original.

It knows lines and blank lines, but neither tables nor keys.
"""

from __future__ import annotations

import re
from dataclasses import dataclass
from enum import IntEnum
from typing import TYPE_CHECKING

from schedtui.errors import SpliceError

if TYPE_CHECKING:
    from collections.abc import Sequence

_BLANK_LINE_AT_END = re.compile(r"(?:\A\ufeff?|\n)[ \t]*\r?\n\Z")
_BLANK_LINES_AT_END = re.compile(r"(\r?\n)(?:[ \t]*\r?\n)+\Z")
_BLANK_LINE_AT_START = re.compile(r"[ \t]*\r?\n")
_TAIL = 200  # characters looked at to see how a text ends


class Rank(IntEnum):
    """What an edit is about, which is also the order of several at one offset.

    VALUE: the characters of a value, or whole lines that go. KEY: a line that is added.
    From LINES on they are set apart: the first keys of a file, a table inside an element,
    an element that follows another, a new table of the file, an element before the first.
    """

    VALUE = 0
    KEY = 1
    LINES = 2
    TABLE = 3
    BLOCK = 4
    TOP = 5
    FIRST = 6


@dataclass(frozen=True, slots=True)
class Edit:
    """`text[start:end]` of the original becomes `text`.

    Args:
        start: offset of the first character that goes.
        end: offset past the last; that of `start` for an insertion.
        text: what comes.
        rank: tables and blocks get lines, and blank lines around them, of their own.
    """

    start: int
    end: int
    text: str
    rank: Rank


def assemble(text: str, edits: Sequence[Edit], newline: str, *, spaced: bool) -> str:
    """Return the text with the edits carried out.

    Args:
        text: the original.
        edits: in any order; of equal offset and rank, in that of the result.
        newline: the line ending of lines that are added.
        spaced: whether tables are set apart by blank lines.

    Raises:
        SpliceError: two edits are about the same characters.
    """
    out = _Out(newline, spaced=spaced)
    at = 0
    for edit in sorted(edits, key=lambda edit: (edit.start, edit.end > edit.start, edit.rank)):
        if edit.start < at:
            raise SpliceError("two changes are about the same characters of the file")
        out.plain(text[at : edit.start])
        if edit.rank >= Rank.LINES:
            out.table(edit.text, text[edit.start : edit.end])
        else:
            out.plain(edit.text)
        at = edit.end
    out.plain(text[at:])
    result = "".join(out.parts)
    at_end = any(edit.rank >= Rank.LINES and edit.end == len(text) for edit in edits)
    if at_end and not _BLANK_LINE_AT_END.search(text[-_TAIL:]):
        return _BLANK_LINES_AT_END.sub(r"\1", result)
    return result


class _Out:
    """The text as far as it is put together; lives within one `assemble`."""

    def __init__(self, newline: str, *, spaced: bool) -> None:
        self.parts: list[str] = []
        self._newline = newline
        self._spaced = spaced
        self._tail = ""
        self._after_table = False

    def plain(self, text: str) -> None:
        """Add characters as they are, set apart from a table before them."""
        if not text:
            return
        if self._after_table:
            self._set_apart(blank=not _BLANK_LINE_AT_START.match(text))
        self._add(text)

    def table(self, text: str, gone: str) -> None:
        """Add a table on lines of its own, in the place of `gone`; either may be empty."""
        if text:
            self._set_apart(blank=True)
            self._add(text)
            self._after_table = True
        elif _BLANK_LINE_AT_END.search(gone[-_TAIL:]):
            # The blank line that set apart what follows went with the table.
            self._after_table = True

    def _add(self, text: str) -> None:
        self.parts.append(text)
        self._tail = (self._tail + text[-_TAIL:])[-_TAIL:]
        self._after_table = False

    def _set_apart(self, *, blank: bool) -> None:
        if self._tail in ("", "\ufeff"):
            return
        if not self._tail.endswith("\n"):
            self._add(self._newline)
        if blank and self._spaced and not _BLANK_LINE_AT_END.search(self._tail):
            self._add(self._newline)
