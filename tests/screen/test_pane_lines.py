from __future__ import annotations

from schedtui.report.page import Entries, Entry, Heading, Page, Paragraph, Table
from schedtui.screen.pane_lines import page_lines


def texts(page, width):
    return [line.text.rstrip() for line in page_lines(page, width)]


FINDING = Entry("short", "cool-total-short at summer peak, -9.8 %", ("the coil needs 364 MBH",))
STATES = Table(
    ("Air", "DB °F", "WB °F"), (("outdoor", "92.0", "66.0"), ("mixed", "80", "63.2")),
    frozenset({1, 2}),
)  # fmt: skip


def test_a_page_reads_in_order_with_a_line_between_blocks_but_not_below_a_heading():
    page = Page((Heading("AHU-1: short"), Entries((FINDING,)), Paragraph("The end.")))
    assert texts(page, 50) == [
        "AHU-1: short",
        "short  cool-total-short at summer peak, -9.8 %",
        "       the coil needs 364 MBH",
        "",
        "The end.",
    ]


def test_running_text_is_wrapped():
    page = Page((Heading("AHU-1: short"), Entries((FINDING,)), Paragraph("some words " * 20)))
    assert all(line.cell_length <= 30 for line in page_lines(page, 30))


def test_a_table_is_set_closer_where_that_makes_it_fit():
    assert texts(Page((STATES,)), 23)[1] == "outdoor   92.0   66.0"
    assert texts(Page((STATES,)), 19)[1] == "outdoor  92.0  66.0"
    assert texts(Page((STATES,)), 10)[1] == "outdoor  92.0  66.0"  # wider than the pane


def test_the_last_column_of_text_is_wrapped():
    table = Table(("Key", "Does"), (("F1", "this help and the way back to where one was"),))
    assert texts(Page((table,)), 30) == [
        "Key  Does",
        "F1   this help and the way",
        "     back to where one was",
    ]


def test_text_acts_on_nothing():
    page = Page((Heading("a\x1b[31m"), Paragraph("[bold]b[/bold]"), Entries((Entry("\t", "c"),))))
    assert texts(page, 40) == ["a␛[31m", "[bold]b[/bold]", "", "␉  c"]


def test_every_segment_has_a_style():
    page = Page((Heading("a"), Paragraph(""), Entries((FINDING,)), STATES))
    assert all(segment.style is not None for line in page_lines(page, 20) for segment in line)
