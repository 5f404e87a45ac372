from __future__ import annotations

import pytest

from schedtui.screen.bars import hint_line, title_line
from schedtui.text_width import width_of

FILE = "works.toml *unsaved*"
SITE = "IP 4850 ft standard air"
COUNTS = ("7 short  7 conflict  1 caution  5 missing", "!!7 !=7 ~1 __5")


def test_the_title_has_room_for_all():
    line = title_line(160, FILE, "Highland Works", SITE, COUNTS)
    assert line.startswith(f"{FILE}  {SITE}  Highland Works")
    assert line.endswith(COUNTS[0])
    assert width_of(line) == 160


def test_at_80_columns_only_the_projects_name_gives_way():
    line = title_line(80, FILE, "A very long name of a project in many words", SITE, COUNTS)
    assert line.startswith(f"{FILE}  {SITE}  A very long name")
    assert "…" in line
    assert line.endswith("  !!7 !=7 ~1 __5")
    assert width_of(line) == 80


def test_a_long_name_of_a_file_is_cut_with_a_sign():
    line = title_line(80, "x" * 70, "Works", SITE, COUNTS)
    assert "x…" in line
    assert SITE in line
    assert line.endswith(COUNTS[1])
    assert width_of(line) == 80


@pytest.mark.parametrize("width", range(1, 200, 7))
def test_whatever_the_width_the_lines_fill_it(width):
    long = "冷水 chilled water plant " * 4
    assert width_of(title_line(width, FILE, long, SITE, COUNTS)) == max(width, len(COUNTS[1]))
    assert width_of(hint_line(width, long, ("F1 help", "ctrl+q quit"))) == width


def test_the_hint_keeps_a_share_for_the_keys():
    about = "Cooling total: total cooling capacity, as scheduled by whoever wrote the schedule."
    line = hint_line(80, about, ("F1 help", "Enter edit", "ctrl+g finding", "ctrl+q quit"))
    assert line.startswith("Cooling total: ")
    assert "…" in line
    assert line.endswith("  F1 help  Enter edit  ctrl+g finding")


def test_what_must_be_read_whole_takes_the_keys_room():
    about = "Not taken: has a comma that does not group thousands; type 94.4 or 944"
    line = hint_line(80, about, ("F1 help", "Enter edit"), whole=True)
    assert line.startswith(about)
    assert hint_line(100, about, ("F1 help", "Enter edit"), whole=True).endswith(
        "F1 help  Enter edit"
    )


def test_no_key_is_cut():
    for width in range(10, 100):
        line = hint_line(width, "Tag", ("F1 help", "ctrl+q quit"))
        assert line.rstrip().endswith(("Tag", "F1 help", "ctrl+q quit"))
