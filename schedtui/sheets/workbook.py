"""Workbooks (xlsx, xlsm) as grids: stored values, as their number formats show them.

What a workbook could do is not done: no macro, formula or link is run or followed; no size it
states is believed. Parts that carry no cells are never unpacked. Knows nothing of what cells mean.
"""

from __future__ import annotations

import io
import posixpath
import zipfile
import zlib
from contextlib import contextmanager
from dataclasses import dataclass, field
from typing import TYPE_CHECKING

from schedtui.errors import FileError
from schedtui.sheets.grid import MOST_CELLS
from schedtui.sheets.number_format import BUILT_IN
from schedtui.sheets.worksheet import Styles, read_worksheet
from schedtui.sheets.xml_part import local, parse

if TYPE_CHECKING:
    from collections.abc import Callable, Iterator, Mapping
    from typing import IO

    from schedtui.sheets.grid import Grid

LARGEST_UNPACKED = 100_000_000  # bytes, of all parts together as the archive states them
LARGEST_PART = 40_000_000
MOST_PARTS = 5_000
MOST_SHEETS = 200
_SQUEEZED = 2_000_000  # bytes a part may state whatever its packed size
_RATIO = 250  # above that a part is no honest one: repetitive sheets reach about 100

# RuntimeError: encrypted, or packed by a method that the library does not know.
_BROKEN = (zipfile.BadZipFile, zlib.error, EOFError, RuntimeError, OSError)


@dataclass(slots=True)
class _Book:
    """What the workbook's own parts say, on the way."""

    archive: zipfile.ZipFile
    sheets: list[tuple[str, str, bool]] = field(default_factory=list)
    targets: dict[str, str] = field(default_factory=dict)
    strings: list[str] = field(default_factory=list)
    since_1904: bool = False


def read_workbook(content: bytes) -> list[Grid]:
    """Return the sheets of a workbook that have cells.

    Args:
        content: the file's bytes.

    Raises:
        FileError: it is no workbook, damaged, encrypted, or larger than a schedule can be.
    """
    try:
        with zipfile.ZipFile(io.BytesIO(content)) as archive:
            _refuse_bombs(archive)
            return _grids(archive)
    except _BROKEN as error:
        raise FileError(f"is damaged: {error}") from error


def _refuse_bombs(archive: zipfile.ZipFile) -> None:
    """Refuse what would unpack to more than any schedule, by what the archive itself states.

    A part that lies about its size is cut off there by the library and fails its checksum.
    """
    parts = archive.infolist()
    if len(parts) > MOST_PARTS:
        raise FileError(f"has more than {MOST_PARTS} parts")
    if sum(part.file_size for part in parts) > LARGEST_UNPACKED:
        raise FileError(f"would unpack to more than {LARGEST_UNPACKED // 1_000_000} MB")
    for part in parts:
        allowed = max(_SQUEEZED, _RATIO * part.compress_size)
        if part.filename.endswith(".xml") and part.file_size > min(allowed, LARGEST_PART):
            raise FileError(f"would unpack to {part.file_size // 1_000_000} MB in one part")
        if part.flag_bits & 1:
            raise FileError("is encrypted")
    names = [part.filename for part in parts]
    if "mimetype" in names and "content.xml" in names:
        raise FileError("is an OpenDocument sheet; save it as xlsx or csv")
    if "[Content_Types].xml" not in names:
        raise FileError("is an archive and no workbook")


def _grids(archive: zipfile.ZipFile) -> list[Grid]:
    book = _Book(archive)
    path = _workbook_part(archive)
    _read_book(book, path)
    folder = posixpath.dirname(path)
    _read_relations(book, folder, posixpath.basename(path))
    styles = Styles(_read_formats(book, _part_of(book, "styles")), book.since_1904)
    _read_strings(book, _part_of(book, "sharedStrings"))
    grids = []
    left = MOST_CELLS  # of all sheets together: several may even name one part
    for name, relation, hidden in book.sheets:
        target = book.targets.get(relation, "")
        if "/worksheets/" not in f"/{target}":
            continue  # a chart or dialogue sheet has no cells
        with _opened(archive, target) as stream:
            grid = read_worksheet(stream, name, book.strings, styles, hidden=hidden)
        left -= sum(map(len, grid.rows.values()))
        if left < 0:
            raise FileError(f"has more than {MOST_CELLS} filled cells")
        if grid.rows:
            grids.append(grid)
    return grids


def _workbook_part(archive: zipfile.ZipFile) -> str:
    """Return the name of the part that lists the sheets."""
    found: list[str] = []

    def start(name: str, attributes: Mapping[str, str]) -> None:
        if name == "Override" and attributes.get("ContentType", "").endswith("sheet.main+xml"):
            found.append(attributes.get("PartName", "").lstrip("/"))
        if name == "Override" and "macroEnabled.main+xml" in attributes.get("ContentType", ""):
            found.append(attributes.get("PartName", "").lstrip("/"))

    _scan(archive, "[Content_Types].xml", start)
    if not found and "xl/workbook.xml" in archive.namelist():
        found.append("xl/workbook.xml")
    if not found:
        what = "a binary workbook" if "xl/workbook.bin" in archive.namelist() else "no workbook"
        raise FileError(f"is {what}; save it as xlsx or csv")
    return found[0]


def _read_book(book: _Book, path: str) -> None:
    def start(name: str, attributes: Mapping[str, str]) -> None:
        if name == "workbookPr":
            book.since_1904 = attributes.get("date1904", "0") in ("1", "true")
        elif name == "sheet":
            relation = next((v for k, v in attributes.items() if local(k) == "id"), "")
            hidden = attributes.get("state", "visible") != "visible"
            book.sheets.append((attributes.get("name", ""), relation, hidden))
            if len(book.sheets) > MOST_SHEETS:
                raise FileError(f"has more than {MOST_SHEETS} sheets")

    _scan(book.archive, path, start)


def _read_relations(book: _Book, folder: str, name: str) -> None:
    def start(element: str, attributes: Mapping[str, str]) -> None:
        if element == "Relationship" and attributes.get("TargetMode") != "External":
            target = attributes.get("Target", "")
            inside = target.lstrip("/") if target.startswith("/") else f"{folder}/{target}"
            book.targets[attributes.get("Id", "")] = posixpath.normpath(inside).lstrip("/")

    _scan(book.archive, posixpath.join(folder, "_rels", f"{name}.rels"), start)


def _part_of(book: _Book, stem: str) -> str:
    names = set(book.archive.namelist())
    return next(
        (
            target
            for target in book.targets.values()
            if posixpath.basename(target).lower() == f"{stem.lower()}.xml" and target in names
        ),
        "",
    )


def _read_formats(book: _Book, part: str) -> list[str]:
    """Return the number format of each cell style."""
    own: dict[int, str] = {}
    styles: list[int] = []
    inside: list[str] = []

    def start(name: str, attributes: Mapping[str, str]) -> None:
        inside.append(name)
        if name == "numFmt":
            own[_whole(attributes.get("numFmtId"))] = attributes.get("formatCode", "General")
        elif name == "xf" and inside[-2:-1] == ["cellXfs"]:
            styles.append(_whole(attributes.get("numFmtId")))

    if part:
        _scan(book.archive, part, start, lambda _: inside.pop())
    return [own.get(one) or BUILT_IN.get(one, "General") for one in styles]


def _whole(text: str | None) -> int:
    return int(text) if text and text.isascii() and text.isdigit() and len(text) < 9 else 0  # noqa: PLR2004


def _read_strings(book: _Book, part: str) -> None:
    """Read the texts that cells share; readings beside East Asian text are no part of them."""
    pieces: list[str] = []
    inside: list[str] = []

    def start(name: str, _: Mapping[str, str]) -> None:
        inside.append(name)
        if name == "si":
            pieces.clear()

    def end(name: str) -> None:
        inside.pop()
        if name == "si":
            book.strings.append("".join(pieces))

    def text(data: str) -> None:
        if inside[-1:] == ["t"] and "rPh" not in inside:
            pieces.append(data)

    if part:
        with _opened(book.archive, part) as stream:
            parse(stream, start, end, text)


def _scan(
    archive: zipfile.ZipFile,
    part: str,
    start: Callable[[str, Mapping[str, str]], None],
    end: Callable[[str], object] = lambda _: None,
) -> None:
    with _opened(archive, part) as stream:
        parse(stream, start, lambda name: _void(end(name)), lambda _: None)


def _void(_: object) -> None:
    """Drop a result that nobody asked for."""


@contextmanager
def _opened(archive: zipfile.ZipFile, part: str) -> Iterator[IO[bytes]]:
    try:
        info = archive.getinfo(part)
    except KeyError as error:
        raise FileError(f'is damaged: it has no part "{part}"') from error
    with archive.open(info) as stream:
        yield stream
