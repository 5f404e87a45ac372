"""Findings as comma-separated lines, one a finding."""

import csv
import io

import pytest

from schedtui.report.findings_csv import HEADINGS, findings_csv, harmless


@pytest.fixture
def lines(works):
    return list(csv.DictReader(io.StringIO(findings_csv([("works.toml", works)]))))


def test_one_line_a_finding(works, lines):
    assert [line["check"] for line in lines] == [one.check for one in works.all_findings]
    assert {line["file"] for line in lines} == {"works.toml"}


def test_a_line_says_what_the_finding_says(lines):
    short = next(line for line in lines if line["check"] == "cool-total-short")
    assert short["subject"] == "AHU-1"
    assert short["severity"] == "short"
    assert short["condition"] == "humid"
    assert short["fields"] == "cool_total"
    assert float(short["scheduled"]) == 300.0
    required = float(short["required"])
    assert float(short["margin"]) == pytest.approx((300 / required - 1) * 100, abs=1e-9)
    assert (short["unit"], short["rounding"], short["accepted"]) == ("MBH", "no", "no")


def test_a_finding_without_numbers_leaves_them_empty(lines):
    tag = next(line for line in lines if line["check"] == "tag-duplicate")
    assert tag["subject"] == "AHU-1 (2nd)"
    assert [tag[key] for key in ("scheduled", "required", "margin", "condition")] == [""] * 4


def test_several_files_below_one_line_of_headings(works):
    text = findings_csv([("a.toml", works), ("b.toml", works)])
    assert text.count(",".join(HEADINGS)) == 1
    assert len(text.splitlines()) == 1 + 2 * len(works.all_findings)


def test_a_file_whose_name_a_spreadsheet_would_run(works):
    text = findings_csv([("=cmd.toml", works)])
    assert all(line.startswith("'=cmd") for line in text.splitlines()[1:])


@pytest.mark.parametrize("text", ["=1+1", "+1", "-1", "@sum", "\tx"])
def test_what_a_spreadsheet_would_run_is_made_text(text):
    assert harmless(text) == "'" + text


@pytest.mark.parametrize("cell", ["AHU-1", "", "'quoted", -3.2, 0])
def test_other_cells_stay(cell):
    assert harmless(cell) == cell
