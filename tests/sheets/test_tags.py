from __future__ import annotations

import pytest

from schedtui.sheets.tags import read_tags

LISTS = [
    ("AHU-1", ["AHU-1"]),
    ("AHU-1, 2, 3", ["AHU-1", "AHU-2", "AHU-3"]),
    ("AHU-1 & 2", ["AHU-1", "AHU-2"]),
    ("AHU-1 and AHU-2", ["AHU-1", "AHU-2"]),
    ("AHU-1/2", ["AHU-1", "AHU-2"]),
    ("AHU-1 / AHU-2", ["AHU-1", "AHU-2"]),
    ("AHU-7 thru 9", ["AHU-7", "AHU-8", "AHU-9"]),
    ("AHU-07 THROUGH AHU-09", ["AHU-07", "AHU-08", "AHU-09"]),
    ("AHU-1 to 3, 5", ["AHU-1", "AHU-2", "AHU-3", "AHU-5"]),
    ("AHU-1–3", ["AHU-1", "AHU-2", "AHU-3"]),
    ("AHU-1A, B", ["AHU-1A", "AHU-1B"]),
    ("AHU-1A thru 1C", ["AHU-1A", "AHU-1B", "AHU-1C"]),
    ("AHU-B1-01, 02", ["AHU-B1-01", "AHU-B1-02"]),
    ("AHU-1\nAHU-2", ["AHU-1", "AHU-2"]),
    ("AHU-1-3", ["AHU-1-3"]),
    ("AHU/01", ["AHU/01"]),
    ("AHU-X/B (FUTURE)", ["AHU-X/B (FUTURE)"]),
]
UNREADABLE = ["AHU-9 thru 7", "AHU-1 thru 999999", "AHU-1, EAST WING", "AHU-1 thru RTU-3"]


@pytest.mark.parametrize(("text", "tags"), LISTS)
def test_a_list_of_tags_is_one_unit_each(text, tags):
    assert read_tags(text) == (tags, "")


@pytest.mark.parametrize("text", UNREADABLE)
def test_a_list_that_cannot_be_read_is_one_unit_and_said(text):
    tags, said = read_tags(text)
    assert tags == [text]
    assert said
