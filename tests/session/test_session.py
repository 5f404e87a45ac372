from __future__ import annotations

import pytest

from schedtui.errors import AmountError, FileChanged, FileError
from schedtui.session.session import Session

TEXT = """\
[project]
title = "Works"   # kept as it stands
units = "IP"

[defaults]
room_db = 75.0
room_rh = 50

[[column]]
key = "mcc"
heading = "Fed from"

[[condition]]
name = "summer peak"
season = "cooling"
outdoor_db = 92.0
outdoor_wb = 74.0

[[unit]]
tag = "AHU-1"
supply_airflow = 9440
outdoor_airflow = 1800
cool_eat_db = 78.3
cool_eat_wb = 65.2
cool_lat_db = 53.0
cool_lat_wb = 52.0
cool_total = 100    # far too small
mcc = "MCC-2"

[[unit]]
tag = "AHU-2"
supply_airflow = 5000
cool_total = 1e6
"""
SHORT = "cool-total-short"


@pytest.fixture
def file(tmp_path):
    path = tmp_path / "works.toml"
    path.write_text(TEXT, encoding="utf-8")
    return path


@pytest.fixture
def session(file):
    return Session.open(file)


def ids(session):
    return list(session.review.units)


def checks(session, row_id):
    return {finding.check for finding in session.review.units[row_id].findings}


def typed(session, row_id, key):
    cell = session.review.units[row_id].unit.typed(key)
    return None if cell is None else cell.text


def test_a_value_taken_is_judged_at_once(session):
    first, _ = ids(session)
    assert SHORT in checks(session, first)
    changed = session.set_cell("unit", first, "cool_total", "9,999")
    assert changed == {first}
    assert typed(session, first, "cool_total") == "9999"
    assert SHORT not in checks(session, first)


def test_only_the_changed_unit_is_evaluated_again(session):
    first, second = ids(session)
    before = session.review.units
    session.set_cell("unit", first, "cool_total", "400")
    after = session.review.units
    assert after[second].case is before[second].case
    assert after[first].case is not before[first].case


def test_what_all_units_depend_on_makes_all_of_them_new(session):
    condition = session.document.rows("condition")[0].row_id
    assert session.set_cell("condition", condition, "outdoor_wb", "76") == set(ids(session))


def test_a_tag_used_twice_is_found_in_the_other_unit_too(session):
    first, second = ids(session)
    assert session.set_cell("unit", second, "tag", "AHU-1") >= {second}
    assert "tag-duplicate" in checks(session, first) | checks(session, second)


@pytest.mark.parametrize("text", ["abc", "94,4", "5000", "nan", "1e999", "75 kW"])
def test_what_cannot_be_accepted_changes_nothing(session, text):
    first, _ = ids(session)
    before = session.document
    with pytest.raises(AmountError):
        session.set_cell("unit", first, "cool_lat_db", text)
    assert session.document is before
    assert not session.unsaved


def test_the_same_text_again_is_no_step(session):
    first, _ = ids(session)
    assert session.set_cell("unit", first, "cool_total", "100") == frozenset()
    assert not session.unsaved
    session.set_cell("unit", first, "cool_total", "100.0")  # stated more closely: another value
    assert session.unsaved


def test_clearing_takes_the_cell_away_and_a_required_one_stays(session):
    first, _ = ids(session)
    session.set_cell("unit", first, "cool_total", "  ")
    assert typed(session, first, "cool_total") is None
    with pytest.raises(AmountError, match="blank"):
        session.set_cell("unit", first, "tag", "")
    session.undo()
    assert typed(session, first, "cool_total") == "100"


def test_a_value_typed_over_a_default_is_the_units_own_until_it_is_cleared(session):
    first, second = ids(session)
    session.set_cell("unit", first, "room_db", "74.0")
    assert (typed(session, first, "room_db"), typed(session, second, "room_db")) == ("74.0", "75.0")
    session.set_cell("unit", first, "room_db", "")
    assert typed(session, first, "room_db") == "75.0"


def test_a_unit_does_without_a_default(session, file):
    first, second = ids(session)
    session.without_default(first, "room_rh")
    session.without_default(first, "room_db")
    assert typed(session, first, "room_rh") is None
    assert typed(session, second, "room_rh") == "50"
    session.save()
    assert 'without = ["room_rh", "room_db"]' in file.read_text(encoding="utf-8")
    step, _ = session.undo()
    assert step.name == "AHU-1 room dry bulb without the default"
    assert typed(session, first, "room_db") == "75.0"
    assert typed(session, first, "room_rh") is None


def test_steps_are_named(session):
    first, _ = ids(session)
    session.set_cell("unit", first, "supply_airflow", "9650")
    session.set_cell("unit", first, "mcc", "")
    condition = session.document.rows("condition")[0].row_id
    session.set_cell("condition", condition, "source", "brief")
    assert [step.name for step in session.history.done] == [
        "AHU-1 supply airflow 9440 → 9650",
        "AHU-1 fed from MCC-2 → blank",
        "condition summer peak source blank → brief",
    ]


def test_undo_goes_back_beyond_a_save(session, file):
    first, _ = ids(session)
    session.set_cell("unit", first, "cool_total", "400")
    session.save()
    saved = file.read_text(encoding="utf-8")
    assert not session.unsaved
    step, changed = session.undo()
    assert step.name.endswith("100 → 400")
    assert changed == {first}
    assert session.unsaved
    assert SHORT in checks(session, first)
    session.save()
    assert file.read_text(encoding="utf-8") == TEXT
    session.redo()
    session.save()
    assert file.read_text(encoding="utf-8") == saved


def test_taking_a_step_back_and_again_is_as_saved(session):
    first, _ = ids(session)
    session.set_cell("unit", first, "cool_total", "400")
    session.save()
    session.undo()
    assert session.unsaved
    session.redo()
    assert not session.unsaved
    assert session.redo() is None


def test_a_save_changes_only_what_was_edited(session, file):
    first, _ = ids(session)
    session.set_cell("unit", first, "cool_total", "400")
    session.save()
    expected = TEXT.replace("cool_total = 100 ", "cool_total = 400 ")
    assert file.read_text(encoding="utf-8") == expected


def test_a_file_changed_by_somebody_else_is_not_written_over_unasked(session, file):
    first, _ = ids(session)
    session.set_cell("unit", first, "cool_total", "400")
    theirs = TEXT.replace("9440", "9000")
    file.write_text(theirs, encoding="utf-8")
    with pytest.raises(FileChanged):
        session.save()
    assert file.read_text(encoding="utf-8") == theirs
    assert session.unsaved
    session.save(over=session.compare())
    assert "cool_total = 400" in file.read_text(encoding="utf-8")
    assert not session.unsaved
    session.save()  # it is what was written now


def test_a_save_that_fails_leaves_the_edits(session, file):
    first, _ = ids(session)
    session.set_cell("unit", first, "cool_total", "400")
    file.unlink()
    file.mkdir()
    with pytest.raises(FileError):
        session.save()
    assert session.unsaved
    assert typed(session, first, "cool_total") == "400"


@pytest.mark.parametrize(
    ("key", "text", "note"),
    [
        ("cool_total", "100 kW", "100 kW = 341.2 MBH"),  # 3.412 14 MBH a kilowatt
        ("supply_airflow", "1000 L/s", "1000 L/s = 2119 cfm"),  # 2.118 88 cfm a litre a second
        ("cool_total", "400", ""),
        ("cool_total", "abc", ""),
        ("mcc", "3 kW", ""),
    ],
)
def test_a_conversion_is_said_before_it_is_taken(session, key, text, note):
    assert session.conversion("unit", key, text) == note


def test_the_converted_number_is_what_is_stored(session):
    first, _ = ids(session)
    session.set_cell("unit", first, "cool_total", "100 kW")
    assert typed(session, first, "cool_total") == "341.2"


def test_a_file_with_bad_cells_opens_and_keeps_them(tmp_path):
    path = tmp_path / "bad.toml"
    text = TEXT.replace("supply_airflow = 9440", "supply_airflow = 9,440")
    path.write_text(text, encoding="utf-8")
    session = Session.open(path)
    first, second = ids(session)
    assert session.review.units[first].status == "unreadable"
    session.set_cell("unit", second, "supply_airflow", "5100")
    session.save()
    assert path.read_text(encoding="utf-8") == text.replace("5000", "5100")
    session.set_cell("unit", first, "supply_airflow", "9,440")
    assert session.review.units[first].status != "unreadable"
    session.save()
    assert "supply_airflow = 9440\n" in path.read_text(encoding="utf-8")


def test_the_cells_of_a_step(session):
    first, _ = ids(session)
    session.set_cell("unit", first, "cool_total", "400")
    assert session.cells_of(session.history.done[-1]) == ((first, "cool_total"),)
    condition = session.document.rows("condition")[0].row_id
    session.set_cell("condition", condition, "source", "brief")
    assert session.cells_of(session.history.done[-1]) == ()


def test_an_unknown_key_has_no_field(session):
    with pytest.raises(KeyError):
        session.field("unit", "no_such_key")
