from __future__ import annotations

import json
import os
import socket
import subprocess
import sys
import time

import pytest

from schedtui.session.lock import OLD, Holder, Lock

NOW = 1.8e9


@pytest.fixture
def file(tmp_path):
    path = tmp_path / "works.toml"
    path.touch()
    return path


def holder(**given):
    return Holder(**{"user": "ann", "host": "desk7.invalid", "pid": 7, "since": NOW, **given})


def lock(file, **given):
    return Lock(file, holder(**given), lambda: NOW)


def test_it_says_who_where_and_since_when_and_goes(file):
    mine = lock(file)
    assert mine.take() is None
    assert mine.file == file.with_name("works.toml.open")
    said = json.loads(mine.file.read_text())
    assert (said["user"], said["host"], said["since"]) == ("ann", "desk7.invalid", NOW)
    mine.release()
    assert [one.name for one in file.parent.iterdir()] == ["works.toml"]


def test_the_second_is_warned_and_leaves_the_first_ones_alone(file):
    first, second = lock(file), lock(file, user="bob", pid=8)
    first.take()
    assert second.take() == holder()
    second.release()
    assert first.file.exists()
    first.release()
    assert second.take() is None
    assert second.file.exists()


def test_a_link_and_its_file_have_one_lock(file, tmp_path):
    folder = tmp_path / "elsewhere"
    folder.mkdir()
    (folder / "link.toml").symlink_to(file)
    assert lock(folder / "link.toml").file == lock(file).file


def ended():
    with subprocess.Popen([sys.executable, "-c", ""]) as child:
        child.wait()
    return child.pid


def test_that_of_a_process_which_has_ended_is_taken_over(file):
    lock(file, host=socket.gethostname(), pid=ended()).take()
    mine = lock(file, user="bob")
    assert mine.take() is None
    assert json.loads(mine.file.read_text())["user"] == "bob"


def test_that_of_a_live_process_is_not(file):
    since = time.time()
    lock(file, host=socket.gethostname(), pid=os.getpid(), since=since).take()
    assert lock(file).take() is not None


def test_a_later_process_of_the_same_number_is_another(file):
    # This one began after the lock was made.
    lock(file, host=socket.gethostname(), pid=os.getpid(), since=1e9).take()
    assert lock(file).take() is None


def test_an_old_one_of_another_machine_is_taken_over(file):
    lock(file, since=NOW - OLD + 60).take()
    assert lock(file, user="bob").take() is not None
    lock(file).file.unlink()
    lock(file, since=NOW - OLD - 60).take()
    assert lock(file, user="bob").take() is None


def test_an_empty_one_is_of_a_process_killed_at_it(file):
    mine = lock(file)
    mine.file.touch()
    assert mine.take() is None
    assert mine.file.read_text()


@pytest.mark.parametrize(
    "content", ["my own notes\n", "[1, 2]", '{"user": 3, "since": "x"', "\x00"]
)
def test_a_file_of_that_name_that_is_no_lock_stays(file, content):
    mine = lock(file)
    mine.file.write_text(content)
    assert mine.take() is None
    mine.release()
    assert mine.file.read_text() == content


def test_a_link_of_that_name_is_not_followed(file, tmp_path):
    target = tmp_path / "target"
    target.write_text("kept\n")
    mine = lock(file)
    mine.file.symlink_to(target)
    assert mine.take() is None
    mine.release()
    assert target.read_text() == "kept\n"


def test_a_folder_that_takes_none_has_none(tmp_path):
    mine = lock(tmp_path / "absent" / "works.toml")
    assert mine.take() is None
    mine.release()


def test_what_it_says_is_read_as_data(file):
    mine = lock(file)
    mine.file.write_text(json.dumps({"user": "a" * 500, "host": "h", "pid": "x", "since": 1e30}))
    other = Holder.of(json.loads(mine.file.read_text()))
    assert (len(other.user), other.pid, other.since) == (64, 0, 0.0)
    assert str(other).startswith("aaa")
