from __future__ import annotations

import io

import openpyxl
import pytest


def _value(text):
    """Return what a person's typing of a cell makes a workbook store."""
    if text.startswith("'"):
        return text[1:]
    try:
        return float(text) if "." in text else int(text)
    except ValueError:
        return text or None


def workbook(sheets):
    """Return the bytes of a workbook: rows of cells with "|" between, merges, formats, hidden."""
    book = openpyxl.Workbook()
    book.remove(book.active)
    for sheet in sheets:
        made = book.create_sheet(sheet["name"])
        for row, line in enumerate(sheet["rows"].strip("\n").split("\n"), start=1):
            for column, text in enumerate(line.split("|"), start=1):
                made.cell(row, column).value = _value(text)
        for block, form in sheet.get("formats", {}).items():
            for cells in made[block]:
                for cell in cells:
                    cell.number_format = form
        for block in sheet.get("merged", []):
            made.merge_cells(block)
        for row in sheet.get("hidden_rows", []):
            made.row_dimensions[row].hidden = True
        if sheet.get("hidden"):
            made.sheet_state = "hidden"
    content = io.BytesIO()
    book.save(content)
    return content.getvalue()


@pytest.fixture
def make_workbook():
    """Return the function that makes the bytes of a workbook."""
    return workbook
