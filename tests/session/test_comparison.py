"""A foreign change in the same cell, in another cell, in a comment, in a row, in everything."""

from __future__ import annotations

import os

import pytest

from schedtui.errors import FileChanged, FileError
from schedtui.files import read_text
from schedtui.schedule.edit import DeleteRow, InsertRow, MoveRow
from schedtui.schedule.save import source_text
from tests.session.conftest import EVERYTHING


def changed(machine, *pairs):
    text = machine.text
    for before, after in pairs:
        assert before in text
        text = text.replace(before, after, 1)
    machine.file.write_text(text, encoding="utf-8")
    return text


def unit(session, tag):
    return next(row.row_id for row in session.document.rows("unit") if row.text("tag") == tag)


@pytest.fixture
def session(machine):
    session = machine.open()
    session.set_cell("unit", unit(session, "AHU-1"), "cool_total", "400")
    return session


def refused(session):
    with pytest.raises(FileChanged):
        session.save()
    return session.compare()


def test_another_cell(machine, session):
    theirs = changed(machine, ("7000", "7100"), ('tag = "AHU-3"', 'tag = "AHU-3"  # checked'))
    found = refused(session)
    assert machine.text == theirs, "nothing is written over unasked"
    assert {(one.where, one.before, one.disk, one.here, one.both) for one in found.differences} == {
        ("AHU-1 cooling total", "100", "100", "400", False),
        ("AHU-3 supply airflow", "7000", "7100", "7000", False),
    }
    session.merge(found)
    assert session.unsaved
    session.save()
    assert machine.text == theirs.replace("cool_total = 100 ", "cool_total = 400 ")
    assert not session.unsaved
    step, _ = session.undo()  # what was done before can be taken back afterwards
    assert step.name.endswith("100 → 400")
    session.save()
    assert machine.text == theirs


def test_the_same_cell(machine, session):
    theirs = changed(machine, ("cool_total = 100", "cool_total = 250"), ("7000", "7100"))
    found = refused(session)
    assert found.edits is None
    first = found.differences[0]
    assert (first.where, first.before, first.disk, first.here, first.both) == (
        "AHU-1 cooling total", "100", "250", "400", True,
    )  # fmt: skip
    session.save(over=found)
    assert "cool_total = 400" in machine.text
    assert "7000" in machine.text
    assert theirs != machine.text


def test_the_same_value_in_the_same_cell_is_no_quarrel(machine, session):
    theirs = changed(machine, ("cool_total = 100", "cool_total = 400"))
    found = refused(session)
    assert found.edits == ()
    session.take_disk(found)
    assert not session.unsaved
    assert source_text(session.document) == theirs


def test_a_comment(machine, session):
    theirs = changed(machine, ("# kept as it stands", "# as the drawing has it"))
    found = refused(session)
    assert any("comments" in one.where for one in found.differences)
    session.merge(found)
    session.save()
    assert machine.text == theirs.replace("cool_total = 100 ", "cool_total = 400 ")


def test_the_whole_file(machine, session):
    other = '[project]\ntitle = "Another"\nunits = "SI"\n\n[[unit]]\ntag = "X"\n'
    machine.file.write_text(other, encoding="utf-8")
    found = refused(session)
    assert found.edits is None
    session.take_disk(found)
    assert [one.label for one in session.review.units.values()] == ["X"]
    assert session.schedule.system == "SI"
    assert not session.unsaved
    assert session.undo() is None


def test_what_was_done_here_is_kept_when_the_disks_is_taken(machine, session):
    changed(machine, ("7000", "7100"))
    session.take_disk(session.compare())
    assert machine.journals == ["aside"]
    session.set_cell("unit", unit(session, "AHU-3"), "supply_airflow", "7200")
    session.save()
    assert "7200" in machine.text
    assert "cool_total = 100 " in machine.text


def test_with_nothing_unsaved_the_disks_is_read_again_and_undo_goes_on(machine, session):
    session.save()
    changed(machine, ("7000", "7100"))
    assert session.changed_on_disk()
    session.take_disk(session.compare())
    assert not session.unsaved
    assert session.review.units[unit(session, "AHU-3")].unit.typed("supply_airflow").text == "7100"
    session.undo()
    session.save()
    assert "cool_total = 100 " in machine.text
    assert "7100" in machine.text


def test_a_row_put_in_above_makes_no_other_differ(machine, session):
    theirs = changed(machine, ("# North wing.", '[[unit]]\ntag = "AHU-0"\n\n# North wing.'))
    found = refused(session)
    assert [one.where for one in found.differences] == ["AHU-1 cooling total", "AHU-0"]
    session.merge(found)
    session.save()
    assert machine.text == theirs.replace("cool_total = 100 ", "cool_total = 400 ")


def test_a_row_that_went_there_and_was_changed_here_is_a_quarrel(machine, session):
    begin, end = EVERYTHING.index("# North wing."), EVERYTHING.index('[[unit]]\ntag = "AHU-2"')
    machine.file.write_text(EVERYTHING[:begin] + EVERYTHING[end:], encoding="utf-8")
    found = refused(session)
    assert found.edits is None
    assert (found.differences[0].where, found.differences[0].both) == ("AHU-1", True)


def test_a_row_that_went_here_and_was_changed_there_is_a_quarrel(machine, session):
    session.do(DeleteRow("unit", unit(session, "AHU-3")), "delete")
    changed(machine, ("7000", "7100"))
    assert refused(session).edits is None


def test_rows_that_came_went_and_moved_here_come_together_with_theirs(machine, session):
    third = session.document.row("unit", unit(session, "AHU-3"))
    session.do(DeleteRow("unit", third.row_id), "delete")
    new = session.document.next_id
    session.do(InsertRow("unit", third.__class__(new, third.cells, third.origin), 0), "copy")
    session.set_cell("unit", new, "tag", "AHU-4")
    theirs = changed(machine, ("5,000", "5000"))
    found = refused(session)
    session.merge(found)
    wanted = source_text(session.document)
    assert "5000" in wanted
    assert wanted.index("AHU-4") < wanted.index("AHU-1")
    assert "AHU-3" not in wanted
    session.save()
    assert machine.text == wanted != theirs


def test_an_order_changed_here_stays(machine, session):
    session.do(MoveRow("unit", unit(session, "AHU-3"), 0), "move")
    changed(machine, ("5,000", "5000"))
    session.merge(refused(session))
    session.save()
    assert machine.text.index("AHU-3") < machine.text.index("AHU-1")
    assert "5000" in machine.text


def test_orders_changed_on_both_sides_are_a_quarrel(machine, session):
    session.do(MoveRow("unit", unit(session, "AHU-3"), 0), "move")
    south = EVERYTHING[EVERYTHING.index("# South wing.") :]
    rest = EVERYTHING.removesuffix(south)
    machine.file.write_text(
        rest.replace("# North wing.", south + "\n# North wing."), encoding="utf-8"
    )
    assert refused(session).edits == session.compare().edits is not None  # both moved it to the top
    machine.file.write_text(
        rest.replace('[[unit]]\ntag = "AHU-2"', south + '\n[[unit]]\ntag = "AHU-2"'),
        encoding="utf-8",
    )
    assert refused(session).edits is None


def test_a_merge_is_in_the_journal_too(machine, session):
    theirs = changed(machine, ("7000", "7100"))
    session.merge(session.compare())
    session.set_cell("unit", unit(session, "AHU-2"), "cool_total", "500")
    wanted = source_text(session.document)
    machine.kill(session)
    again = machine.open()
    assert machine.text == theirs
    again.bring_back(again.offered)
    assert source_text(again.document) == wanted
    assert machine.journals == ["journal"]


def test_a_change_with_the_time_and_the_size_as_they_were_is_found(machine, session):
    before = machine.file.stat()
    with machine.file.open("r+b") as stream:
        stream.seek(EVERYTHING.encode().index(b"7000"))
        stream.write(b"7777")
    os.utime(machine.file, ns=(before.st_atime_ns, before.st_mtime_ns))
    after = machine.file.stat()
    assert (before.st_size, before.st_mtime_ns, before.st_ino) == (
        after.st_size, after.st_mtime_ns, after.st_ino,
    )  # fmt: skip
    found = refused(session)
    assert "AHU-3 supply airflow" in {one.where for one in found.differences}


def test_one_that_has_gone_is_written_again_only_when_told(machine, session):
    machine.file.unlink()
    assert session.changed_on_disk()
    found = refused(session)
    assert found.theirs is None
    assert "no such file" in found.why
    with pytest.raises(FileError):
        session.take_disk(found)
    session.save(over=found)
    assert "cool_total = 400" in machine.text


def test_one_that_is_broken_on_disk_is_said_to_be(machine, session):
    machine.file.write_text(EVERYTHING.replace("[[plant]]", "[[plant"), encoding="utf-8")
    found = refused(session)
    assert found.theirs is None
    assert "cannot be opened: line " in found.why


def test_what_was_seen_is_what_is_written_over(machine, session):
    changed(machine, ("7000", "7100"))
    found = refused(session)
    newer = changed(machine, ("7100", "7200"))
    with pytest.raises(FileChanged):
        session.save(over=found)
    assert machine.text == newer


def test_touched_is_not_changed(machine, session):
    os.utime(machine.file)
    assert not session.changed_on_disk(at_once=True)
    stamp = read_text(machine.file).stamp
    session.save()
    assert read_text(machine.file).stamp != stamp


@pytest.mark.parametrize("user", ["ann", "bob"], ids=["of one user", "of two"])
def test_two_sessions_on_one_file(machine, session, user):
    other = machine.open(user=user)
    assert other.kept.others.user == "ann"
    other.set_cell("unit", unit(other, "AHU-3"), "supply_airflow", "7100")
    assert machine.journals == ["journal", "journal"]
    session.save()
    found = refused(other)
    other.merge(found)
    other.save()
    assert "cool_total = 400 " in machine.text
    assert "7100" in machine.text
    assert session.changed_on_disk()
    session.close(keep=False)
    other.close(keep=False)
    assert machine.journals == []
    assert not machine.lock.exists()
