"""Delimited text, csv, tsv and paste, as a grid.

Finds out encoding and delimiter from the text itself. Knows nothing of what the cells mean.
"""

from __future__ import annotations

import csv
import io
import re
from typing import TYPE_CHECKING

from schedtui.errors import FileError
from schedtui.sheets.grid import LONGEST_CELL, Cell, Gathering, Grid, column_letters

if TYPE_CHECKING:
    from collections.abc import Iterable

DELIMITERS = (",", ";", "\t", "|")
_LOOKED_AT = 60  # lines by which a delimiter is told
_MOST_PARTS = 20_000  # cells of a line, empty ones too
_SPARSE = 0.2  # share of zero bytes from which text is UTF-16

# A number with a comma that can only be a decimal sign, and one with a point that can.
_COMMA = re.compile(
    r"[+-]?(?:[0-9]+,(?:[0-9]{1,2}|[0-9]{4,})|0,[0-9]+|[0-9]{1,3}(?:\.[0-9]{3})+,[0-9]+)%?"
)
_POINT = re.compile(
    r"[+-]?(?:[0-9]+\.(?:[0-9]{1,2}|[0-9]{4,})|0?\.[0-9]+|[0-9]{1,3}(?:,[0-9]{3})+\.[0-9]+)%?"
)


def decoded(content: bytes) -> str:
    """Return the text of a file: UTF-8, UTF-16 with or without a mark, else Windows-1252.

    Raises:
        FileError: it is no text.
    """
    for mark, encoding in (
        (b"\xef\xbb\xbf", "utf-8-sig"),
        (b"\xff\xfe", "utf-16"),
        (b"\xfe\xff", "utf-16"),
    ):
        if content.startswith(mark):
            return _text(content, encoding)
    sample = content[:4096]
    if b"\0" in sample:
        even, odd = sample[::2].count(0), sample[1::2].count(0)
        if max(even, odd) < _SPARSE * len(sample):
            raise FileError("is no text and no workbook that can be read")
        return _text(content, "utf-16-be" if even > odd else "utf-16-le")
    try:
        return content.decode("utf-8")
    except UnicodeDecodeError:
        return _text(content, "cp1252", errors="replace")


def _text(content: bytes, encoding: str, errors: str = "strict") -> str:
    try:
        return content.decode(encoding, errors)
    except UnicodeDecodeError as error:
        raise FileError(f"is marked as {encoding.upper()} text and is none") from error


def text_grid(text: str, name: str = "", delimiter: str | None = None) -> Grid:
    """Return delimited text as a grid.

    Args:
        text: the text.
        name: name of the grid, for reports.
        delimiter: what parts the cells; found out where None.

    Raises:
        FileError: it has too many cells or characters, or cannot be taken apart.
    """
    if "\0" in text:
        raise FileError("is no text: it has zero bytes in it")
    text = re.sub(r"\A\ufeff?(?:sep=(.)\r?\n)?", "", text, flags=re.IGNORECASE)
    delimiter = delimiter or _delimiter(text)
    if any(line.count(delimiter) > _MOST_PARTS for line in text.split("\n")):
        raise FileError(f"has a line of more than {_MOST_PARTS} cells")
    gathering = Gathering()
    csv.field_size_limit(LONGEST_CELL * 2)
    reader = csv.reader(io.StringIO(text, newline=""), delimiter=delimiter, strict=False)
    try:
        for row, texts in enumerate(reader, start=1):
            for column, raw in enumerate(texts, start=1):
                if inside := _without_apostrophe(raw.strip()):
                    gathering.add(row, column, Cell(inside, f"{column_letters(column)}{row}"))
    except csv.Error as error:
        raise FileError(f"cannot be taken apart at line {reader.line_num}: {error}") from error
    rows = gathering.sorted()
    shown = (cell.text for cells in rows.values() for cell in cells.values())
    return Grid(name, rows, decimal_comma=decimal_comma(shown))


def _without_apostrophe(text: str) -> str:
    """Take off the apostrophe that keeps a spreadsheet from running a text."""
    return text[1:] if text[:1] == "'" and text[1:2] in ("=", "+", "-", "@", "\t") else text


def _delimiter(text: str) -> str:
    """Return the delimiter that parts most lines into as many cells as each other."""
    lines = [line for line in text[:200_000].splitlines() if line.strip()][:_LOOKED_AT]
    best, most = ",", 0.0
    for delimiter in DELIMITERS:
        counts = [len(one) for one in _rows(lines, delimiter)]
        wide = [count for count in counts if count > 1]
        if not wide:
            continue
        usual = max(set(wide), key=wide.count)
        score = wide.count(usual) * min(usual, 40) / len(counts) + len(wide) / len(counts)
        if delimiter == "," and all(_COMMA.fullmatch(part) for part in _commas(lines)):
            continue  # every comma is a decimal sign
        if score > most:
            best, most = delimiter, score
    return best


def _commas(lines: Iterable[str]) -> list[str]:
    """Return the words with a comma in them; one that is no number where there is none."""
    found = [
        word for line in lines for word in re.split(r"[;\t|\s\"]+", line) if "," in word.strip(",")
    ]
    return found or [""]


def _rows(lines: list[str], delimiter: str) -> list[list[str]]:
    try:
        return list(csv.reader(lines, delimiter=delimiter))
    except csv.Error:
        return []


def decimal_comma(texts: Iterable[str]) -> bool:
    """Tell whether texts were written where the comma is the decimal sign.

    >>> decimal_comma(["26,7", "4.455"]), decimal_comma(["26.7", "4,455"])
    (True, False)
    """
    comma = point = 0
    for text in texts:
        for part in text.split("/"):
            comma += bool(_COMMA.fullmatch(part.strip()))
            point += bool(_POINT.fullmatch(part.strip()))
    return comma > point
