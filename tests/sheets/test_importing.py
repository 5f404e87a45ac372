"""Sheets of every form, each with what it says, written down before it was read."""

from __future__ import annotations

import csv
import io
import random
import tomllib
from itertools import zip_longest
from pathlib import Path

import pytest

from schedtui.errors import FileError
from schedtui.schedule.load import load
from schedtui.sheets.account import account
from schedtui.sheets.delimited import text_grid
from schedtui.sheets.importing import read_grids
from schedtui.sheets.opening import sheets_of
from schedtui.sheets.writing import schedule_text

CASES = sorted((Path(__file__).parent / "sheets").glob("*.toml"))


@pytest.fixture(params=CASES, ids=lambda path: path.stem)
def case(request):
    return tomllib.loads(request.param.read_text("utf-8"))


@pytest.fixture
def read(case, make_workbook):
    content = (
        make_workbook(case["sheet"]) if "sheet" in case else case["text"].lstrip("\n").encode()
    )
    return read_grids(sheets_of(content), case.get("system"))


@pytest.fixture
def document(read):
    return load(schedule_text(read, "title", "sheet"))


def test_there_are_cases():
    assert len(CASES) > 10


def test_every_cell_is_in_its_key_with_its_digits(case, document):
    units = {}
    for row in document.rows("unit"):
        units.setdefault(row.text("tag"), {k: c.text for k, c in row.cells.items() if k != "tag"})
    assert {tag: units.get(tag) for tag in case["units"]} == case["units"]


def test_the_units_are_those_of_the_sheet(case, document):
    assert [row.text("tag") for row in document.rows("unit")] == case.get("tags", [*case["units"]])


def test_what_has_no_place_is_named_and_nothing_else(case, read):
    assert {one.ref: one.text for one in read.lost} == case.get("lost", {})


def test_what_is_no_key_is_a_column_as_printed(case, document):
    columns = {r.text("key"): [r.text("heading"), r.text("group")] for r in document.rows("column")}
    assert columns == case.get("columns", {})


def test_title_and_notes_are_those_of_the_sheet(case, read):
    assert list(read.notes) == case.get("notes", [])
    assert read.title == case.get("title", read.title)
    assert read.placed.system == case.get("system", read.placed.system)
    assert any(one.table.turned for one in read.matched) == case.get("turned", False)


HEADINGS = """
    TAG UNIT CFM EAT LAT MBH GPM EWT LWT SENS ROWS WEIGHT REMARKS °F (MBH) STEAM HP BHP QTY SERVES
    NOTES: TOTAL FILTERS blorg 1 2.5
"""
PHRASES = ("OA CFM", "EAT DB/WB", "COOLING COIL", "HEATING COIL", "SUPPLY AIR", "TOTAL MBH", "")


def disorder(seed):
    """Return a sheet that nobody would draw, and its cells below headings, each text unique."""
    draw = random.Random(seed)  # noqa: S311  a sheet is no secret
    width, row, lines, data = draw.randint(2, 12), 1, [], []
    for block in range(draw.randint(1, 3)):
        lines += [[f"title {block}"]] * draw.randint(0, 1)
        for _ in range(draw.randint(1, 3)):
            lines.append(["TAG", *draw.choices([*HEADINGS.split(), *PHRASES], k=width)])
        for _ in range(draw.randint(0, 6)):
            row += 1
            forms = ["", f"{row}00{{0}}.25", f"{row}00{{0}}.5/{row}11{{0}}.75", f"q{row}z{{0}}"]
            line = [form.format(place) for place, form in enumerate(draw.choices(forms, k=width))]
            data += [text for text in line if text]
            lines.append([f"AHU-{row}" if draw.random() < 0.85 else "", *line])
        lines += [[""]] * draw.randint(0, 2)
    return lines, data


@pytest.mark.parametrize("turned", [False, True])
@pytest.mark.parametrize("seed", range(40))
def test_in_any_disorder_every_cell_is_in_the_file_or_named(seed, turned):
    lines, data = disorder(seed)
    text = io.StringIO()
    csv.writer(text).writerows(zip_longest(*lines, fillvalue="") if turned else lines)
    try:
        found = read_grids([text_grid(text.getvalue())], "IP")
    except FileError:
        return  # refused as a whole, which is said
    known = schedule_text(found, "title", "sheet") + "\n".join(account(found))
    assert [one for one in data if not all(part in known for part in one.split("/"))] == []
