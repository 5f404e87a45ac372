"""Disks and folders that take nothing: the file is whole, the edits stay, the next save works."""

from __future__ import annotations

import contextlib
import os
import resource
import shutil
import stat
import tempfile
import warnings
from pathlib import Path

import pytest

from schedtui.errors import FileChanged, FileError
from tests.session.conftest import EVERYTHING, Machine

NOBODY = 65534
SAVED = EVERYTHING.replace("cool_total = 100 ", "cool_total = 400 ")


@contextlib.contextmanager
def no_file_larger_than(size):
    """Do to every file what a full disk does: a part of a writing goes, the rest is refused."""
    soft, hard = resource.getrlimit(resource.RLIMIT_FSIZE)
    resource.setrlimit(resource.RLIMIT_FSIZE, (size, hard))
    try:
        yield
    finally:
        resource.setrlimit(resource.RLIMIT_FSIZE, (soft, hard))


def first(session):
    return next(iter(session.review.units))


def edited(machine):
    session = machine.open()
    session.set_cell("unit", first(session), "cool_total", "400")
    return session


def names(folder):
    return sorted(one.name for one in folder.iterdir())


def as_nobody(scene, *, own):
    """Play a scene in a read-only folder, under an account that may not write there.

    Args:
        scene: what is done.
        own: whether the schedule and the state folder are that account's.
    """
    folder = Path(tempfile.mkdtemp())  # the test's own folder is not to be seen by others
    machine = Machine(folder)
    if own:
        machine.state.mkdir()
    for one in (machine.file, machine.state) if own else ():
        if os.getuid() == 0:
            os.chown(one, NOBODY, NOBODY)
    folder.chmod(0o555)
    with warnings.catch_warnings():
        warnings.simplefilter("ignore")  # later versions warn of a fork beside threads
        pid = os.fork()
    if pid == 0:
        status = 1
        try:
            if os.getuid() == 0:
                os.setgroups([])
                os.setgid(NOBODY)
                os.setuid(NOBODY)
            scene(machine)
            status = 0
        except BaseException as error:  # noqa: BLE001  it is told to whoever waits
            os.write(2, repr(error).encode())
        finally:
            os._exit(status)
    _, status = os.waitpid(pid, 0)
    folder.chmod(0o755)
    shutil.rmtree(folder)
    return os.waitstatus_to_exitcode(status)


@pytest.mark.parametrize("links", [False, True], ids=["renamed", "in place"])
def test_a_full_disk_leaves_the_file_and_the_edits_and_the_next_save_works(machine, links):
    if links:
        machine.file.with_name("second").hardlink_to(machine.file)
    session = edited(machine)
    with no_file_larger_than(len(EVERYTHING) // 2), pytest.raises(FileError, match="larger"):
        session.save()
    assert machine.text == EVERYTHING
    assert session.unsaved
    there = {"state", "works.toml", "works.toml.open", *(["second"] if links else [])}
    assert set(names(machine.file.parent)) == there
    assert list((machine.state / "copies").glob("*")) == []
    session.save()
    assert machine.text == SAVED
    assert not session.unsaved


def test_a_disk_that_is_full_in_the_middle_of_a_writing_in_place(machine):
    machine.file.with_name("second").hardlink_to(machine.file)
    session = machine.open()
    room = len(EVERYTHING.encode()) * 3
    session.set_cell("unit", first(session), "serves", "x" * room)
    real, begun = os.write, []

    def write(descriptor, content):
        if os.fstat(descriptor).st_nlink > 1 and not begun:
            begun.append(real(descriptor, content[:100]))
            raise OSError(28, "No space left on device")
        return real(descriptor, content)

    with pytest.MonkeyPatch.context() as patch:
        patch.setattr(os, "write", write)
        with pytest.raises(FileError, match="the disk is full"):
            session.save()
    assert begun
    assert machine.text == EVERYTHING
    session.save()
    assert "x" * room in machine.text


def test_a_folder_that_has_vanished(machine, tmp_path):
    session = edited(machine)
    away = tmp_path.with_name(f"{tmp_path.name}-away")
    tmp_path.rename(away)
    with pytest.raises(FileChanged):
        session.save()
    gone = session.compare()
    with pytest.raises(FileError, match="no such file or folder"):
        session.save(over=gone)
    assert session.unsaved
    away.rename(tmp_path)
    session.save()
    assert machine.text == SAVED


def test_a_read_only_folder_has_no_lock_and_its_file_is_written_in_place():
    def scene(machine):
        inode = machine.file.stat().st_ino
        session = edited(machine)
        assert not machine.lock.exists()
        assert session.kept.trouble() == ""
        session.save()
        assert machine.text == SAVED
        assert machine.file.stat().st_ino == inode
        session.close(keep=False)
        assert names(machine.state) == ["copies", "journals"]

    assert as_nobody(scene, own=True) == 0


def test_where_nothing_at_all_can_be_written_it_is_said_and_nothing_is_lost():
    def scene(machine):
        session = edited(machine)
        assert "permission is denied" in session.kept.trouble()
        assert session.kept.trouble() == "", "said once"
        for _ in range(2):
            with pytest.raises(FileError, match=r"read-only|permission is denied"):
                session.save()
            assert session.unsaved
        assert machine.text == EVERYTHING
        session.close(keep=True)

    assert as_nobody(scene, own=False) == 0


@pytest.mark.parametrize("obstacle", ["a file in its place", "a full disk"])
def test_without_a_state_folder_it_is_said_once_and_work_goes_on(machine, obstacle):
    if obstacle == "a file in its place":
        machine.state.write_text("in the way", encoding="utf-8")
        limit = contextlib.nullcontext()
    else:
        limit = no_file_larger_than(200)
    session = machine.open()
    with limit:
        session.set_cell("unit", first(session), "cool_total", "400")
        assert str(machine.state) in session.kept.trouble()
        session.set_cell("unit", first(session), "supply_airflow", "9650")
        assert session.kept.trouble() == ""
    session.save()
    assert machine.text == SAVED.replace("9440", "9650")
    session.close(keep=True)


def test_the_files_mode_owner_and_link_stay(machine, tmp_path):
    machine.file.chmod(0o640)
    if os.getuid() == 0:
        os.chown(machine.file, 1234, 1234)
    before = machine.file.stat()
    link = tmp_path / "link.toml"
    link.symlink_to(machine.file)
    target, machine.file = machine.file, link
    session = edited(machine)
    session.save()
    after = target.stat()
    assert link.is_symlink()
    assert target.read_text("utf-8") == SAVED
    assert stat.S_IMODE(after.st_mode) == 0o640
    assert (after.st_uid, after.st_gid) == (before.st_uid, before.st_gid)
    assert target.with_name("works.toml.open").exists()


def test_under_another_name_it_goes_on_with_that_file(machine):
    session = edited(machine)
    other = machine.file.with_name("issue 2.toml")
    session.save_as(other)
    assert (machine.text, other.read_text("utf-8")) == (EVERYTHING, SAVED)
    assert not session.unsaved
    assert names(machine.file.parent) == [
        "issue 2.toml", "issue 2.toml.open", "state", "works.toml",
    ]  # fmt: skip
    session.set_cell("unit", first(session), "cool_total", "500")
    with pytest.raises(FileError, match="exists already"):
        session.save_as(machine.file)
    assert session.path == other
    machine.kill(session)
    machine.file = other
    again = machine.open()
    again.bring_back(again.offered)
    again.save()
    assert "cool_total = 500 " in machine.text
