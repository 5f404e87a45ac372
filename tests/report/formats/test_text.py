"""A page as text for a terminal."""

import pytest

from schedtui.report.findings import findings_page
from schedtui.report.formats.text import WIDTH, block_lines, render
from schedtui.report.page import Entries, Entry, Heading, Page, Paragraph, Table
from schedtui.text_width import width_of


def test_headings_paragraphs_and_entries():
    page = Page(
        (
            Heading("Works", 1),
            Paragraph("A line."),
            Heading("Short (1)"),
            Entries((Entry("AHU-1", "cool-total-short", ("too small",)),)),
        )
    )
    assert render(page) == (
        "Works\n=====\n\nA line.\n\nShort (1)\n\n"
        "AHU-1           cool-total-short\n"
        "                too small\n"
    )


def test_numbers_stand_flush_right():
    table = Table(("Tag", "Total"), (("AHU-1", "350.0"), ("A", "1350.0")), frozenset({1}))
    assert render(Page((table,))) == "Tag     Total\nAHU-1   350.0\nA      1350.0\n"


def test_running_text_stays_within_the_width():
    words = "every word of a long message " * 12
    page = Page((Paragraph(words), Entries((Entry("AHU-1", words, (words,)),))))
    assert all(len(line) <= WIDTH for line in render(page).splitlines())


def test_a_long_label_has_its_line_to_itself():
    entry = Entry("condition a very long summer", "wet-above-dry")
    assert list(block_lines(Entries((entry,)), 80)) == [
        "condition a very long summer",
        " " * 16 + "wet-above-dry",
    ]


def test_wide_characters_are_measured_as_the_terminal_does():
    table = Table(("Tag", "x"), (("冷水機", "1"), ("AHU-11", "2")))
    lines = render(Page((table,))).splitlines()
    assert width_of(lines[1]) == width_of(lines[2])


@pytest.mark.parametrize("hostile", ["\x1b[31mred", "a\nb\rc", "\x9b2J", "\u202eback", "\x00"])
def test_text_from_a_file_cannot_act_on_the_terminal(hostile):
    page = Page(
        (
            Heading(hostile, 1),
            Paragraph(hostile),
            Entries((Entry(hostile, hostile, (hostile,)),)),
            Table((hostile,), ((hostile,),)),
        )
    )
    for line in render(page).split("\n"):
        assert line.isprintable()


def test_markup_is_data():
    assert render(Page((Paragraph("AHU-1 [alt] [/x] [b]"),))) == "AHU-1 [alt] [/x] [b]\n"


def test_a_whole_report_stands_in_80_columns_where_tags_and_names_are_short(works):
    """Only the table of units may be longer, with a tag of 17 cells as here."""
    text = render(findings_page(works, "works.toml"))
    head, _, table = text.partition("\nUnits")
    assert [line for line in head.splitlines() if width_of(line) > WIDTH] == []
    assert "=1+1 | *2* 冷水" in table
    assert text.endswith("\n")
    assert "\n\n\n" not in text
