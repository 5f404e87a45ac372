"""A page as Markdown."""

import pytest

from schedtui.report.findings import findings_page
from schedtui.report.formats.markdown import plain, render
from schedtui.report.page import CAUTION, Entries, Entry, Heading, Page, Paragraph, Table


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
        "# Works\n\nA line.\n\n## Short (1)\n\n- **AHU-1** cool-total-short\n  too small\n"
    )


def test_a_table_says_which_columns_hold_numbers():
    table = Table(("Tag", "Total"), (("AHU-1", "350.0"),), frozenset({1}))
    assert render(Page((table,))) == "| Tag | Total |\n| --- | ---: |\n| AHU-1 | 350.0 |\n"


@pytest.mark.parametrize(
    "acting",
    ["*bold*", "_it_", "[a](b)", "<script>", "`code`", "a|b", "# h", "~~x~~", "![i](j)", "&lt;"],
)
def test_markup_in_a_text_is_shown_and_does_not_act(acting):
    shown = plain(acting)
    assert shown.replace("\\", "") == acting
    for place, character in enumerate(shown):
        if character in "*_[]<>`|#~!&":
            assert shown[place - 1] == "\\"


@pytest.mark.parametrize("start", ["- item", "+ item", "1. item", "1) item", "---", "==="])
def test_a_paragraph_that_begins_like_a_list_or_a_rule_is_none(start):
    """A remark may begin so; at the start of a line Markdown would make a list or a rule of it."""
    assert not render(Page((Paragraph(start),))).startswith(start)


def test_line_breaks_cannot_break_out_of_a_cell():
    table = Table(("Tag",), (("a\n| b",),))
    assert len(render(Page((table,))).splitlines()) == 3


def test_a_whole_report_carries_title_table_and_caution(works):
    text = render(findings_page(works, "works.toml"))
    assert text.startswith("# Example \\[b\\]Works\\[/b\\] (works.toml)\n")
    assert "\n| =1+1 \\| \\*2\\* 冷水 |" in text
    assert text.rstrip().endswith(CAUTION)
