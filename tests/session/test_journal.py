from __future__ import annotations

import errno
import json
import os
import stat

import pytest

from schedtui.session import journal as module
from schedtui.session.journal import SYNC_WITHIN, Journal, find
from schedtui.session.lock import Holder

HOLDER = Holder("ann", "desk7.invalid", 7, 1.8e9)
STEPS = [
    {"do": {"set": number}, "n": number, "name": f"step {number}\u2028\n"} for number in (1, 2)
]


class Clock:
    now = 100.0

    def __call__(self):
        return self.now


@pytest.fixture
def file(tmp_path):
    return tmp_path / "works.toml"


@pytest.fixture
def folder(tmp_path):
    return tmp_path / "state"


def begun(folder, file, clock=None):
    journal = Journal(folder, clock or Clock(), HOLDER)
    journal.begin(file, "d0")
    return journal


def kill(journal):
    os.close(journal._descriptor)


def written(folder):
    return sorted((folder / "journals").iterdir())


def test_nothing_is_written_before_there_is_something_to_write(folder, file):
    journal = begun(folder, file)
    assert not folder.exists()
    journal.end(keep=True)
    assert not folder.exists()


def test_each_step_is_written_at_once_and_for_nobody_else(folder, file):
    journal = begun(folder, file)
    for place, step in enumerate(STEPS, start=1):
        journal.add(step)
        (one,) = written(folder)
        lines = one.read_text(encoding="ascii").splitlines()
        assert [json.loads(line) for line in lines[1:]] == STEPS[:place]
    assert stat.S_IMODE(one.stat().st_mode) == 0o600
    assert stat.S_IMODE(one.parent.stat().st_mode) == 0o700
    head = json.loads(lines[0])
    assert (head["file"], head["digest"]) == (str(file), "d0")


def test_it_is_on_the_disk_within_a_second(folder, file, monkeypatch):
    assert SYNC_WITHIN < 1
    clock, synced = Clock(), []
    journal = begun(folder, file, clock)
    assert journal.due() is None
    journal.add(STEPS[0])
    clock.now += 0.2
    journal.add(STEPS[1])
    assert journal.due() == pytest.approx(SYNC_WITHIN - 0.2)
    clock.now += 5
    assert journal.due() == 0
    monkeypatch.setattr(os, "fsync", synced.append)
    journal.settle()
    assert synced == [journal._descriptor]
    assert journal.due() is None
    journal.settle()
    assert len(synced) == 1


def test_a_live_sessions_is_not_found_an_ended_ones_is(folder, file):
    journal = begun(folder, file)
    journal.add(STEPS[0])
    assert find(folder, file) == []
    kill(journal)
    (found,) = find(folder, file)
    assert found.edits() == (STEPS[0],)
    assert found.fits("d0")
    assert not found.fits("d1")
    assert find(folder, file) == [], "whoever looks at it holds it"
    found.leave()
    assert find(folder, file.with_name("other.toml")) == []
    assert len(find(folder, file)) == 1


def test_ended_in_good_order_it_goes_or_stays(folder, file):
    journal = begun(folder, file)
    journal.add(STEPS[0])
    journal.end(keep=False)
    assert written(folder) == []
    journal = begun(folder, file)
    journal.add(STEPS[0])
    journal.end(keep=True)
    assert len(find(folder, file)) == 1


def test_a_save_broken_off_after_the_rename_is_no_lost_edit(folder, file):
    journal = begun(folder, file)
    journal.add(STEPS[0])
    journal.saving("d1")
    kill(journal)
    (found,) = find(folder, file)
    assert found.is_saved("d1")
    assert not found.is_saved("d0")
    assert found.fits("d0"), "killed before the rename: the edits are to be had"
    assert found.edits() == (STEPS[0],)


def test_an_edit_after_a_save_that_failed_is_not_taken_for_saved(folder, file):
    journal = begun(folder, file)
    journal.add(STEPS[0])
    journal.saving("d1")
    journal.add(STEPS[1])
    kill(journal)
    (found,) = find(folder, file)
    assert not found.is_saved("d1")
    assert found.edits() == tuple(STEPS)


def test_after_a_save_it_begins_anew(folder, file):
    journal = begun(folder, file)
    journal.add(STEPS[0])
    journal.restart(file, "d1", [])
    assert written(folder) == []
    journal.add(STEPS[1])
    kill(journal)
    (found,) = find(folder, file)
    assert found.fits("d1")
    assert found.edits() == (STEPS[1],)


def test_one_gone_on_with_holds_what_was_and_what_comes(folder, file):
    journal = begun(folder, file)
    journal.add(STEPS[0])
    kill(journal)
    with written(folder)[0].open("ab") as stream:
        stream.write(b'{"do": {"set": 9')  # what breaks off halfway was not accepted
    (found,) = find(folder, file)
    assert found.edits() == (STEPS[0],)
    again = begun(folder, file)
    again.adopt(found)
    again.add(STEPS[1])
    kill(again)
    (found,) = find(folder, file)
    assert found.edits() == tuple(STEPS)


def test_set_aside_it_is_kept_and_not_found(folder, file):
    journal = begun(folder, file)
    journal.add(STEPS[0])
    kill(journal)
    (found,) = find(folder, file)
    found.set_aside()
    assert written(folder) == [found.aside]
    assert find(folder, file) == []


def test_what_is_no_journal_is_let_be(folder, file):
    journal = begun(folder, file)
    journal.add(STEPS[0])
    kill(journal)
    (one,) = written(folder)
    for content in (b"notes\n", b"[]\n", b'{"journal": 2}\n{"do": 1}\n', b"\xff\xfe\n"):
        one.write_bytes(content)
        assert find(folder, file) == []
        assert one.read_bytes() == content


@pytest.mark.parametrize("failing", ["mkdir", "open", "write", "replace"])
def test_where_none_can_be_written_it_is_said_and_made_up_for_later(
    folder, file, monkeypatch, failing
):
    def fail(*_, **__):
        raise OSError(errno.ENOSPC, "No space left on device")

    journal = begun(folder, file)
    monkeypatch.setattr(os, failing, fail)
    journal.add(STEPS[0])
    assert "the disk is full" in journal.trouble
    monkeypatch.undo()
    journal.add(STEPS[1])
    assert not journal.trouble
    kill(journal)
    (found,) = find(folder, file)
    assert found.edits() == tuple(STEPS)


def test_half_a_line_on_a_full_disk_spoils_no_other(folder, file, monkeypatch):
    journal = begun(folder, file)
    journal.add(STEPS[0])
    real = module.write_all

    def half(descriptor, content):
        real(descriptor, content[: len(content) // 2])
        raise OSError(errno.ENOSPC, "No space left on device")

    monkeypatch.setattr(module, "write_all", half)
    journal.add(STEPS[1])
    assert journal.trouble
    monkeypatch.undo()
    journal.add({"do": 3, "n": 3, "name": "third"})
    kill(journal)
    (found,) = find(folder, file)
    assert [step["n"] for step in found.edits()] == [1, 2, 3]
