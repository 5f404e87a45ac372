from __future__ import annotations

from schedtui.schedule.label import unit_labels


def test_a_tag_used_again_is_numbered_and_one_that_is_missing_is_told_by_its_place():
    assert list(unit_labels(["A", None, "A", " ", "B", "A"])) == [
        "A",
        "unit 2",
        "A (2nd)",
        "unit 4",
        "B",
        "A (3rd)",
    ]


def test_the_ordinals_are_english():
    labels = list(unit_labels(["A"] * 113))
    for number in (4, 10, 11, 12, 13, 14, 20, 111, 112, 113):
        assert labels[number - 1] == f"A ({number}th)"
    for number, ending in ((21, "st"), (22, "nd"), (23, "rd"), (101, "st"), (102, "nd")):
        assert labels[number - 1] == f"A ({number}{ending})"
