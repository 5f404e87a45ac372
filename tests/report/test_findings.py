"""The page of a check: worst first, each unit in one line, the caution at its end."""

import pytest

from schedtui.report.findings import (
    counts_line,
    finding_entries,
    findings_page,
    short_counts,
    short_site,
    site_line,
)
from schedtui.report.page import CAUTION, Entries, Entry, Heading, Paragraph, Table
from schedtui.review.finding import Finding, Severity, Subject


@pytest.fixture
def page(works):
    return findings_page(works, "works.toml")


def test_the_title_names_project_and_file(page):
    assert page.blocks[0] == Heading("Example [b]Works[/b] (works.toml)", 1)


def test_the_caution_is_the_last_word(page):
    assert page.blocks[-1] == Paragraph(CAUTION)


def test_findings_come_worst_first_then_the_units(page):
    parts = [block.text for block in page.blocks if isinstance(block, Heading)][1:]
    words = [part.split(" ")[0] for part in parts[:-1]]
    order = [one for one in ("Short", "Conflict", "Caution", "Missing") if one in words]
    assert words == order
    assert parts[-1].startswith("Units")


def test_every_finding_is_said(works, page):
    entries = [one for block in page.blocks if isinstance(block, Entries) for one in block.entries]
    heads = " ".join(entry.head for entry in entries)
    said = {line for entry in entries for line in entry.lines}
    for finding in works.all_findings:
        assert finding.check in heads
        assert finding.message in said


def test_each_unit_has_one_line(page):
    (table,) = [block for block in page.blocks if isinstance(block, Table)]
    assert [row[0] for row in table.rows] == ["AHU-1", "AHU-1 (2nd)", "=1+1 | *2* 冷水"]
    assert table.rows[0][1:4] == ("short", "humid", "300.0")  # the scheduled total as typed
    assert table.rows[1][2:4] == ("-", "-")
    assert all(len(row) == len(table.headings) for row in table.rows)


def test_the_site_is_told_by_pressure_where_it_is_given(works):
    assert site_line(works) == "IP units, station pressure 13.400 psia, airflows standard"
    assert "13.400 psia" in short_site(works)


def test_the_site_is_told_by_altitude_with_its_pressure(reviewed):
    found = reviewed('[project]\ntitle = "x"\nunits = "SI"\naltitude = 1524\n')
    line = site_line(found)
    assert "1524 m above sea level (84.31 kPa)" in line  # ICAO standard atmosphere: 84.307 kPa
    assert "standard, by default" in line


def test_counts_in_words(works):
    counts, line = works.counts(), counts_line(works)
    for word in ("short", "conflict", "caution", "missing"):
        assert f"{counts[word]} {word}" in line
    assert f"{counts['short']} short" in short_counts(works)


def a_finding(**stated):
    return Finding(
        **{
            "check": "cool-total-short",
            "severity": Severity.SHORT,
            "subject": Subject("unit", 1, "AHU-1"),
            "fields": ("cool_total",),
            "message": "too small",
            **stated,
        }
    )


def entries_of(*findings):
    return finding_entries(findings, lambda one: one.subject.label).entries


@pytest.mark.parametrize(
    ("stated", "head"),
    [
        ({}, "cool-total-short"),
        ({"condition": "humid"}, "cool-total-short at humid"),
        ({"condition": "humid", "margin": -4.66}, "cool-total-short at humid, -4.7 %"),
        ({"margin": 5.0, "accepted": True}, "cool-total-short, +5.0 % (accepted)"),
        (
            {"condition": "humid", "subject": Subject("condition", 2, "condition humid")},
            "cool-total-short",
        ),
    ],
)
def test_an_entry_s_head(stated, head):
    finding = a_finding(**stated)
    assert entries_of(finding) == (Entry(finding.subject.label, head, ("too small",)),)


def test_what_is_missing_for_one_reason_is_one_entry():
    missing = [
        a_finding(check=check, severity=Severity.MISSING, message="not judged: needs a wet bulb")
        for check in ("cool-total-short", "leaving-humidity")
    ]
    (entry,) = entries_of(*missing)
    assert entry.head == "cool-total-short, leaving-humidity"


def test_what_is_missing_in_two_units_is_two_entries():
    other = Subject("unit", 2, "AHU-2")
    missing = [
        a_finding(severity=Severity.MISSING, message="not judged"),
        a_finding(severity=Severity.MISSING, message="not judged", subject=other),
    ]
    assert [entry.label for entry in entries_of(*missing)] == ["AHU-1", "AHU-2"]


def test_faults_are_never_joined():
    assert len(entries_of(a_finding(), a_finding())) == 2
