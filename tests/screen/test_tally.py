from __future__ import annotations

from dataclasses import replace

from schedtui.schedule.edit import DeleteRow
from schedtui.screen.tally import Tally
from schedtui.session.session import Session

TEXT = """\
[project]
title = "Works"
units = "IP"

[[unit]]
tag = "AHU-1"

[[unit]]
tag = "AHU-2"
cool_lat_db = 53.0
cool_lat_wb = 55.0

[[unit]]
tag = "AHU-3"
supply_airflow = 9,440
"""


def test_what_is_kept_is_what_counting_anew_gives(tmp_path):
    file = tmp_path / "works.toml"
    file.write_text(TEXT, encoding="utf-8")
    session = Session.open(file)
    tally = Tally(session.review)
    assert "1 unreadable" in tally.texts[0]
    assert "1 conflict" in tally.texts[0]
    assert tally.texts[1].startswith("??1 !=1")
    first, second, third = session.review.units
    steps = [
        lambda: session.set_cell("unit", second, "cool_lat_wb", "52.0"),
        lambda: session.set_cell("unit", third, "supply_airflow", "9440"),
        lambda: session.set_cell("unit", first, "tag", "AHU-2"),
        lambda: session.undo()[1],
        lambda: session.do(DeleteRow("unit", third), "delete"),
        lambda: session.undo()[1],
    ]
    for step in steps:
        changed = step()
        tally.show(session.review, changed)
        assert tally.texts == Tally(session.review).texts
    assert "unreadable" not in tally.texts[0]
    assert "conflict" not in tally.texts[0]


def test_nothing_found(tmp_path):
    file = tmp_path / "works.toml"
    file.write_text(TEXT, encoding="utf-8")
    review = replace(Session.open(file).review, units={}, findings=())
    assert Tally(review).texts == ("all clear", "all clear")
