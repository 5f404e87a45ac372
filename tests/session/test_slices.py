from __future__ import annotations

from itertools import count

from schedtui.review.reviewed import review
from schedtui.schedule.load import load
from schedtui.schedule.view import view
from schedtui.session import slices
from schedtui.session.session import Session

HEAD = """\
[project]
title = "Works"
units = "IP"

[[condition]]
name = "summer peak"
season = "cooling"
outdoor_db = 92.0
outdoor_wb = 74.0
"""
UNIT = """
[[unit]]
tag = "AHU-{}"
supply_airflow = 9440
cool_lat_db = 53.0
cool_lat_wb = 55.0
"""
UNITS = 10


def text(units=UNITS):
    return HEAD + "".join(UNIT.format(number % 7) for number in range(units))


def found(reviewed):
    return [[finding.check for finding in unit.findings] for unit in reviewed.units.values()]


def test_in_slices_it_comes_to_the_same():
    schedule = view(load(text()))
    whole = review(schedule)
    assert sum(map(len, found(whole))) >= UNITS
    reviewed, waiting = slices.begun(schedule, 3)
    assert len(waiting) == UNITS - 3
    assert found(reviewed)[3:] == [[]] * (UNITS - 3)
    lengths = [len(waiting)]
    while waiting:
        reviewed, waiting = slices.continued(reviewed, waiting, 2.5, count().__next__)
        lengths.append(len(waiting))
    assert lengths == [7, 4, 1, 0]
    assert found(reviewed) == found(whole)
    assert reviewed.findings == whole.findings


def test_one_unit_is_reviewed_however_short_the_time():
    reviewed, waiting = slices.begun(view(load(text())), 0)
    _, fewer = slices.continued(reviewed, waiting, 0.0)
    assert len(fewer) == len(waiting) - 1


def test_few_units_are_reviewed_at_once():
    schedule = view(load(text(3)))
    reviewed, waiting = slices.begun(schedule, 3)
    assert waiting == ()
    assert found(reviewed) == found(review(schedule))


def open_session(tmp_path):
    file = tmp_path / "works.toml"
    file.write_text(text(), encoding="utf-8")
    return Session.open(file, at_once=2)


def finish(session):
    while session.waiting:
        session.go_on(0.0)
    return found(session.review)


def test_an_edit_before_all_are_reviewed_is_not_lost_and_loses_none(tmp_path):
    session = open_session(tmp_path)
    assert session.waiting == UNITS - 2
    last = list(session.review.units)[-1]
    assert last in session.set_cell("unit", last, "cool_lat_wb", "52.0")
    assert session.waiting == UNITS - 3  # that one has had its turn
    assert finish(session) == found(review(session.schedule))


def test_an_edit_that_touches_all_reviews_all(tmp_path):
    session = open_session(tmp_path)
    condition = session.document.rows("condition")[0].row_id
    session.set_cell("condition", condition, "outdoor_wb", "75.0")
    assert session.waiting == 0
    assert session.go_on(1.0) == frozenset()
    assert found(session.review) == found(review(session.schedule))
