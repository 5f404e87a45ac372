from __future__ import annotations

from schedtui.screen.differences import difference_lines, merge_words
from schedtui.session.comparison import Comparison, Difference
from schedtui.text_width import width_of

ROWS = (
    Difference("AHU-1 cool_total", "100", "250", "400", both=True),
    Difference("AHU-2 serves", "blank", "冷水機房 \x1b[31m", "blank"),
)


def test_each_difference_has_its_line_and_the_columns_stand():
    lines = difference_lines(Comparison(None, None, "", ROWS), 80)
    assert lines[1].split() == ["!=", "AHU-1", "cool_total", "250", "400", "100"]
    assert "\x1b" not in "".join(lines)
    starts = [
        width_of(line[: line.index(text)])
        for line, text in zip(lines, ("on the", "250", "冷"), strict=True)
    ]
    assert len(set(starts)) == 1


def test_they_are_cut_with_a_sign_to_what_there_is():
    for width in (40, 60):
        lines = difference_lines(Comparison(None, None, "", ROWS), width)
        assert max(map(width_of, lines)) <= width
    assert "…" in "".join(lines + difference_lines(Comparison(None, None, "", ROWS), 40))


def test_whether_both_can_be_had_is_said():
    assert merge_words(Comparison(None, None, "", ROWS)).startswith("1 cell or row changed on both")
    assert "different cells" in merge_words(Comparison(None, None, "", ROWS[1:], (object(),)))
    assert "disk has not" in merge_words(Comparison(None, None, "", ROWS[1:], ()))
    assert "cannot" in merge_words(Comparison(None, None, "", ROWS[1:], None))
