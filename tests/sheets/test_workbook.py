"""Workbooks that do what none should: each refused in a line, or read without harm."""

from __future__ import annotations

import io
import zipfile

import pytest

from schedtui.errors import FileError
from schedtui.sheets.opening import sheets_of

TYPES = (
    "<Types><Override PartName='/xl/workbook.xml' ContentType='application/"
    "vnd.openxmlformats-officedocument.spreadsheetml.sheet.main+xml'/></Types>"
)
BOOK = "<workbook xmlns:r='r'><sheets><sheet name='S' r:id='rId1'/></sheets></workbook>"
LINKS = (
    "<Relationships><Relationship Id='rId1' Target='worksheets/sheet1.xml'/>"
    "<Relationship Id='rId2' Target='sharedStrings.xml'/></Relationships>"
)
ROWS = (
    "<row><c t='inlineStr'><is><t>TAG</t></is></c><c t='inlineStr'><is><t>CFM</t></is></c></row>"
    "<row><c t='inlineStr'><is><t>AHU-1</t></is></c><c><v>9440</v></c></row>"
)


def sheet(rows, after=""):
    return f"<worksheet><sheetData>{rows}</sheetData>{after}</worksheet>"


def book(content, strings="<sst/>", **parts):
    made = io.BytesIO()
    with zipfile.ZipFile(made, "w", zipfile.ZIP_DEFLATED) as archive:
        archive.writestr("[Content_Types].xml", parts.get("types", TYPES))
        archive.writestr("xl/workbook.xml", parts.get("workbook", BOOK))
        archive.writestr("xl/_rels/workbook.xml.rels", parts.get("links", LINKS))
        archive.writestr("xl/worksheets/sheet1.xml", content)
        archive.writestr("xl/sharedStrings.xml", strings)
        for name, text in parts.get("more", {}).items():
            archive.writestr(name, text)
    return made.getvalue()


def texts(content):
    (grid,) = sheets_of(content)
    return {cell.ref: cell.text for cells in grid.rows.values() for cell in cells.values()}


ENTITIES = "<!DOCTYPE x [<!ENTITY a 'aa'><!ENTITY b '&a;&a;'>]>"
REFUSED = {
    "unpacks to too much": (book(b" " * 101_000_000), "would unpack to"),
    "one part repeats itself": (book(sheet("<a/>" * 2_000_000)), "would unpack to"),
    "entities": (book(ENTITIES + sheet(ROWS)), "document type"),
    "entities in the texts": (book(sheet(ROWS), ENTITIES + "<sst/>"), "document type"),
    "a text from elsewhere": (book("<!DOCTYPE x SYSTEM 'file:///etc/hosts'>" + sheet("")), "type"),
    "no XML": (book(sheet("<row><c>")[:-30]), "damaged"),
    "a cell that is none": (book(sheet("<row><c r='ZZZZ9'><v>1</v></c></row>")), "no cell"),
    "a cell too far": (book(sheet("<row><c r='A9999999'><v>1</v></c></row>")), "bounds"),
    "a row that is none": (book(sheet("<row r='-1'/>")), "no row"),
    "a long text": (
        book(
            sheet("<row><c t='s'><v>0</v></c></row>"), f"<sst><si><t>{'x' * 40_000}</t></si></sst>"
        ),
        "characters",
    ),
    "one long text many times": (
        book(
            sheet("<row>" + "<c t='s'><v>0</v></c>" * 900 + "</row>"),
            f"<sst><si><t>{'x' * 30_000}</t></si></sst>",
        ),
        "characters",
    ),
    "sheets without end": (
        book(sheet(ROWS), workbook=BOOK.replace("</sheets>", "<sheet/>" * 300 + "</sheets>")),
        "sheets",
    ),
    "one part for many sheets": (
        book(
            sheet("".join(f"<row>{'<c><v>1</v></c>' * 500}</row>" for _ in range(200))),
            workbook=BOOK.replace("</sheets>", "<sheet r:id='rId1'/>" * 9 + "</sheets>"),
        ),
        "filled cells",
    ),
    "a part that is missing": (
        book(sheet(ROWS), links=LINKS.replace("sheet1", "sheet9")),
        "has no part",
    ),
    "another archive": (book(sheet(ROWS), types="<Types/>", workbook="<x/>")[:50], "damaged"),
    "an OpenDocument sheet": (
        book(sheet(ROWS), more={"mimetype": "x", "content.xml": "<x/>"}),
        "OpenDocument",
    ),
    "an old workbook": (b"\xd0\xcf\x11\xe0" + b"\0" * 600, "old or encrypted"),
    "a page": (b"<html><table><tr><td>TAG</td></tr></table></html>", "page"),
    "a compressed file": (b"\x1f\x8b\x08" + b"\0" * 60, "no workbook"),
    "broken off": (book(sheet(ROWS))[:300], "damaged"),
}


@pytest.mark.parametrize("name", REFUSED)
def test_a_hostile_or_broken_file_is_refused_in_a_line(name):
    content, said = REFUSED[name]
    with pytest.raises(FileError, match=said) as refused:
        sheets_of(content)
    assert "\n" not in str(refused.value)


def test_a_changed_byte_is_noticed_or_harmless():
    content = book(sheet(ROWS))
    for place in range(0, len(content), 37):
        broken = bytearray(content)
        broken[place] ^= 0x55
        try:
            sheets_of(bytes(broken))
        except FileError:
            continue


@pytest.mark.parametrize(
    "after",
    [
        "<mergeCells><mergeCell ref='A1:XFD1048576'/></mergeCells>",
        "<hyperlinks><hyperlink ref='A1:XFD1048576'/></hyperlinks>",
    ],
)
def test_no_stated_size_is_walked_to(after):
    far = "<row r='1048576'><c r='XFD1048576'><v>1</v></c></row><dimension ref='A1:XFD1048576'/>"
    content = book(sheet(ROWS + far, after))
    (grid,) = sheets_of(content)
    assert texts(content)["XFD1048576"] == "1"
    assert len(grid.rows) == 3


def test_macros_and_links_are_neither_run_nor_unpacked():
    more = {"xl/vbaProject.bin": b"\xd0\xcf" * 100, "xl/externalLinks/externalLink1.xml": "<x"}
    types = TYPES.replace("vnd.openxmlformats-officedocument.spreadsheetml.sheet.main+xml",
                          "vnd.ms-excel.sheet.macroEnabled.main+xml")  # fmt: skip
    assert texts(book(sheet(ROWS), more=more, types=types))["B2"] == "9440"


def test_cells_of_every_type_are_read():
    strings = "<sst><si><r><t>EA</t></r><r><t>ST</t></r><rPh><t>x</t></rPh></si></sst>"
    cells = (
        "<c t='s'><v>0</v></c><c t='b'><v>1</v></c><c t='str'><f>A1</f><v>WEST</v></c>"
        "<c><f>1+2</f><v>3</v></c><c t='inlineStr'><is><t>a_x0041_</t></is></c><c/>"
        "<c t='n'><v>1.5E+3</v></c>"
    )
    found = texts(book(sheet(f"<row>{cells}</row>"), strings))
    assert found == {
        "A1": "EAST", "B1": "TRUE", "C1": "WEST", "D1": "3", "E1": "aA", "G1": "1500",
    }  # fmt: skip


def test_what_a_formula_does_not_store_and_errors_are_told_of():
    cells = "<c><f>1+2</f></c><c t='e'><v>#REF!</v></c><c t='s'><v>7</v></c>"
    (grid,) = sheets_of(book(sheet(f"<row>{cells}</row>")))
    assert [bool(cell.problem) for cell in grid.rows[1].values()] == [True, True, True]


def test_an_ending_does_not_matter():
    assert texts(b"TAG,CFM\nAHU-1,9440\n") == texts(book(sheet(ROWS)))
