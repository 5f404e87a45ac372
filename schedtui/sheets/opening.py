"""A file of any ending as grids: what it holds decides how it is read.

The one way from a path to grids. Knows nothing of what cells mean.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.errors import FileError
from schedtui.files.reading import read_bytes
from schedtui.sheets.delimited import decoded, text_grid
from schedtui.sheets.workbook import read_workbook

if TYPE_CHECKING:
    from pathlib import Path

    from schedtui.sheets.grid import Grid

_ARCHIVE = b"PK\x03\x04"
_EMPTY_ARCHIVE = b"PK\x05\x06"
_OLD = b"\xd0\xcf\x11\xe0"
_MARKED_UP = ("<html", "<!doctype", "<?xml", "<table")


def read_sheets(path: Path) -> list[Grid]:
    """Return the sheets of a workbook, or the one grid of a delimited text.

    Args:
        path: a regular file.

    Raises:
        FileError: it cannot be read; the text names it and says why.
    """
    content, _ = read_bytes(path)
    try:
        return sheets_of(content)
    except FileError as error:
        raise FileError(f"{path}: {error}") from error


def sheets_of(content: bytes) -> list[Grid]:
    """Return the grids in a file's bytes.

    Raises:
        FileError: they are no workbook and no delimited text that can be read.
    """
    if content.startswith((_ARCHIVE, _EMPTY_ARCHIVE)):
        return read_workbook(content)
    if content.startswith(_OLD):
        raise FileError("is an old or encrypted workbook; save it as xlsx or csv")
    if content.startswith((b"%PDF", b"\x1f\x8b", b"\x89PNG")):
        raise FileError("is no workbook and no delimited text")
    text = decoded(content)
    if text.lstrip("\ufeff \t\r\n")[:20].casefold().startswith(_MARKED_UP):
        raise FileError("is a page or XML and no delimited text; save it as xlsx or csv")
    grid = text_grid(text)
    return [grid] if grid.rows else []
