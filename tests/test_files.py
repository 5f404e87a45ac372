"""Reading and writing files; what the operating system must see is asked of it."""

from __future__ import annotations

import hashlib
import os
import socket
import stat
from pathlib import Path

import pytest

from schedtui.errors import FileChanged, FileError
from schedtui.files import read_text, reading, sweep, write_text, writing
from schedtui.files.reading import LARGEST

TEXT = "\ufefftitle = 'é'\r\n\nlast = 1\n"


def test_text_comes_and_goes_byte_for_byte(tmp_path):
    path = tmp_path / "a.toml"
    path.write_bytes(TEXT.encode())
    read = read_text(path)
    assert read.text == TEXT
    assert read.stamp.digest == hashlib.sha256(TEXT.encode()).hexdigest()
    found = path.stat()
    assert (read.stamp.size, read.stamp.mtime_ns) == (found.st_size, found.st_mtime_ns)
    assert (read.stamp.device, read.stamp.inode) == (found.st_dev, found.st_ino)
    write_text(path, TEXT + "\r", read.stamp)
    assert path.read_bytes() == (TEXT + "\r").encode()


def test_the_stamp_of_a_writing_is_that_of_the_next_reading(tmp_path):
    path = tmp_path / "a.toml"
    stamp = write_text(path, TEXT, None)
    assert read_text(path).stamp == stamp
    assert write_text(path, "b = 1\n", stamp) == read_text(path).stamp


def test_what_is_no_regular_file_is_refused_and_not_opened(tmp_path, monkeypatch):
    pipe, folder = tmp_path / "pipe", tmp_path / "folder"
    os.mkfifo(pipe)
    folder.mkdir()
    with socket.socket(socket.AF_UNIX) as listening:
        monkeypatch.chdir(tmp_path)
        listening.bind("socket")
        (tmp_path / "link").symlink_to(pipe)
        monkeypatch.setattr(os, "open", None)  # calling it would be a TypeError
        for path, kind in (
            (pipe, "pipe"),
            (tmp_path / "link", "pipe"),
            (folder, "folder"),
            (tmp_path / "socket", "socket"),
            (Path("/dev/zero"), "device"),
        ):
            with pytest.raises(FileError, match=f"{path.name} is a {kind}, not a file"):
                read_text(path)


def test_a_pipe_that_takes_a_files_place_is_not_waited_for(tmp_path, monkeypatch):
    path, pipe = tmp_path / "a.toml", tmp_path / "pipe"
    path.write_text("a = 1\n")
    os.mkfifo(pipe)
    regular = path.stat()
    monkeypatch.setattr(os, "stat", lambda _: regular)
    with pytest.raises(FileError, match="is a pipe"):
        read_text(pipe)


def test_links_are_followed_and_stay_links(tmp_path):
    folder = tmp_path / "elsewhere"
    folder.mkdir()
    path, link = folder / "a.toml", tmp_path / "link.toml"
    path.write_text("a = 1\n")
    link.symlink_to(path)
    write_text(link, "a = 2\n", read_text(link).stamp)
    assert link.is_symlink()
    assert path.read_text() == "a = 2\n"
    assert [entry.name for entry in folder.iterdir()] == ["a.toml"]


def test_files_beyond_the_limit_are_refused(tmp_path):
    path = tmp_path / "a.toml"
    with path.open("wb") as file:
        file.truncate(LARGEST)
    assert len(read_text(path).text) == LARGEST
    with path.open("wb") as file:
        file.truncate(LARGEST + 1)
    with pytest.raises(FileError, match="larger than 20 MB"):
        read_text(path)


def test_a_file_that_grows_while_it_is_read_is_refused(tmp_path, monkeypatch):
    path = tmp_path / "a.toml"
    path.write_bytes(b"#" * 11)
    small = path.stat()
    monkeypatch.setattr(reading, "LARGEST", 10)
    monkeypatch.setattr(reading, "refuse_irregular", lambda *_: small)
    with pytest.raises(FileError, match="larger than"):
        read_text(path)


@pytest.mark.parametrize(
    ("name", "words"),
    [
        ("absent.toml", "no such file"),
        ("a.toml/b", "no folder"),
        ("x" * 300, "too long"),
        ("a\x00b", "no name of a file"),
    ],
)
def test_what_cannot_be_read_is_named(tmp_path, name, words):
    (tmp_path / "a.toml").write_text("a = 1\n")
    with pytest.raises(FileError, match=words) as caught:
        read_text(tmp_path / name)
    assert name.replace("\x00", "\ufffd") in str(caught.value)


def test_bytes_that_are_no_utf8_are_refused_with_their_line(tmp_path):
    path = tmp_path / "a.toml"
    path.write_bytes("a = 1\nb = 'é'\n".encode("latin-1"))
    with pytest.raises(FileError, match=r"a\.toml is no UTF-8 text: line 2"):
        read_text(path)


def test_a_name_cannot_act_on_the_terminal(tmp_path):
    with pytest.raises(FileError) as caught:
        read_text(tmp_path / "a\x1b[2J\n.toml")
    assert str(caught.value).isprintable()


def test_a_file_changed_on_disk_is_not_written_over(tmp_path):
    path = tmp_path / "a.toml"
    path.write_text("a = 1\n")
    stamp = read_text(path).stamp
    path.write_text("a = 2\n")
    with pytest.raises(FileChanged, match="changed by something else"):
        write_text(path, "a = 3\n", stamp)
    assert path.read_text() == "a = 2\n"
    path.unlink()
    with pytest.raises(FileChanged, match="no longer what was read"):
        write_text(path, "a = 3\n", stamp)
    assert not path.exists()
    write_text(path, "a = 3\n", stamp, replace=True)
    assert path.read_text() == "a = 3\n"


def test_a_file_touched_but_with_the_same_content_is_written(tmp_path):
    path = tmp_path / "a.toml"
    path.write_text("a = 1\n")
    stamp = read_text(path).stamp
    os.utime(path, ns=(1, 1))
    write_text(path, "a = 2\n", stamp)
    assert path.read_text() == "a = 2\n"


def test_a_new_file_does_not_take_an_old_ones_place_unless_told_to(tmp_path):
    path = tmp_path / "a.toml"
    write_text(path, "a = 1\n", None)
    with pytest.raises(FileError, match="exists already"):
        write_text(path, "a = 2\n", None)
    assert path.read_text() == "a = 1\n"
    write_text(path, "a = 3\n", None, replace=True)
    assert path.read_text() == "a = 3\n"


def test_a_file_that_comes_to_be_at_the_last_moment_is_kept(tmp_path, monkeypatch):
    path = tmp_path / "a.toml"
    path.write_text("a = 1\n")
    monkeypatch.setattr(writing, "_present", lambda _: None)
    with pytest.raises(FileError, match="exists already"):
        write_text(path, "a = 2\n", None)
    assert path.read_text() == "a = 1\n"
    assert [entry.name for entry in tmp_path.iterdir()] == ["a.toml"]


def test_the_mode_is_kept_and_a_new_file_has_that_of_any_new_file(tmp_path):
    path, other = tmp_path / "a.toml", tmp_path / "b.toml"
    write_text(path, "a = 1\n", None)
    other.touch()
    assert path.stat().st_mode == other.stat().st_mode
    path.chmod(0o640)
    write_text(path, "a = 2\n", read_text(path).stamp)
    assert stat.S_IMODE(path.stat().st_mode) == 0o640


def test_a_file_marked_read_only_is_refused(tmp_path, monkeypatch):
    path = tmp_path / "a.toml"
    stamp = write_text(path, "a = 1\n", None)
    monkeypatch.setattr(os, "access", lambda *_: False)  # the superuser may write anything
    with pytest.raises(FileError, match="read-only"):
        write_text(path, "a = 2\n", stamp)


@pytest.mark.parametrize("failing", ["fsync", "replace", "fchmod"])
def test_a_writing_that_fails_leaves_the_old_file_and_nothing_else(tmp_path, monkeypatch, failing):
    def fail(*_):
        raise OSError(28, "No space left on device")

    path = tmp_path / "a.toml"
    stamp = write_text(path, "a = 1\n", None)
    monkeypatch.setattr(os, failing, fail)
    with pytest.raises(FileError, match=r"a\.toml cannot be written: the disk is full"):
        write_text(path, "a = 2\n", stamp)
    monkeypatch.undo()
    assert path.read_text() == "a = 1\n"
    assert [entry.name for entry in tmp_path.iterdir()] == ["a.toml"]


def test_the_content_is_on_the_disk_before_the_name_is(tmp_path, monkeypatch):
    calls = []
    for name in ("fsync", "replace"):
        real = getattr(os, name)
        monkeypatch.setattr(
            os, name, lambda *a, name=name, real=real: calls.append(name) or real(*a)
        )
    path = tmp_path / "a.toml"
    path.write_text("a = 1\n")
    write_text(path, "a = 2\n", read_text(path).stamp)
    assert calls == ["fsync", "replace", "fsync"], "the file, its name, the folder"


def test_what_cannot_be_written_is_named(tmp_path):
    (tmp_path / "folder").mkdir()
    with pytest.raises(FileError, match="no such file or folder"):
        write_text(tmp_path / "absent" / "a.toml", "", None)
    with pytest.raises(FileError, match="is a folder, not a file"):
        write_text(tmp_path / "folder", "", None, replace=True)
    with pytest.raises(FileError, match="cannot hold this text"):
        write_text(tmp_path / "a.toml", "\ud800", None)
    with pytest.raises(FileError, match="no name of a file"):
        write_text(tmp_path / "a\x00", "", None)


def test_what_a_killed_writing_left_is_swept_and_nothing_else(tmp_path):
    path = tmp_path / "works.toml"
    stays = ["works.toml", ".works.toml.0123456789abcdeX", ".other.toml.0123456789abcdef"]
    for name in (*stays, ".works.toml.0123456789abcdef"):
        (tmp_path / name).touch()
        os.utime(tmp_path / name, (100, 100))
    young = tmp_path / ".works.toml.fedcba9876543210"
    young.touch()
    sweep(path, 200)
    assert {one.name for one in tmp_path.iterdir()} == {*stays, young.name}
    sweep(tmp_path / "absent" / "works.toml", 200)
