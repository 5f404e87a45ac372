from __future__ import annotations

import os

import pytest

from schedtui.errors import FileError
from schedtui.files import finish_broken_writing, read_text, write_text
from schedtui.files import in_place as module

OLD, NEW = "a = 1\n" * 40, "b = 22\n" * 30


@pytest.fixture
def file(tmp_path):
    path = tmp_path / "works.toml"
    path.write_text(OLD, encoding="utf-8")
    path.with_name("second").hardlink_to(path)
    return path


@pytest.fixture
def copies(tmp_path):
    return tmp_path / "copies"


def test_other_names_show_the_new_text_too(file, copies):
    write_text(file, NEW, read_text(file).stamp, copies=copies)
    assert file.with_name("second").read_text("utf-8") == NEW
    assert file.samefile(file.with_name("second"))
    assert list(copies.iterdir()) == []


def test_without_a_place_for_a_copy_it_is_refused(file):
    with pytest.raises(FileError, match="hard links, and there is no place for the copy"):
        write_text(file, NEW, read_text(file).stamp)
    assert file.read_text("utf-8") == OLD


def test_where_the_copy_cannot_be_made_nothing_is_touched(file, copies):
    copies.write_text("in the way")
    with pytest.raises(FileError, match="the copy that writing it in place needs cannot be made"):
        write_text(file, NEW, read_text(file).stamp, copies=copies)
    assert file.read_text("utf-8") == OLD


def test_an_owner_that_cannot_be_given_is_kept(tmp_path, copies, monkeypatch):
    path = tmp_path / "works.toml"
    path.write_text(OLD, encoding="utf-8")
    before = path.stat()
    real = os.fstat

    class Another:
        def __init__(self, found):
            self.found = found

        def __getattr__(self, name):
            return -2 if name == "st_uid" else getattr(self.found, name)

    def refuse(*_):
        raise PermissionError(1, "Operation not permitted")

    stamp = read_text(path).stamp
    monkeypatch.setattr(os, "fchown", refuse)
    monkeypatch.setattr("schedtui.files.writing.os.fstat", lambda number: Another(real(number)))
    write_text(path, NEW, stamp, copies=copies)
    assert path.read_text("utf-8") == NEW
    assert (path.stat().st_ino, path.stat().st_uid) == (before.st_ino, before.st_uid)
    assert sorted(one.name for one in tmp_path.iterdir()) == ["copies", "works.toml"]


@pytest.mark.parametrize("size", [0, 1, 100, 209, 210])
@pytest.mark.parametrize("shorter", [True, False])
def test_one_broken_off_is_finished(file, copies, monkeypatch, size, shorter):
    old, new = (OLD, NEW) if shorter else (NEW, OLD)
    file.write_text(old, encoding="utf-8")

    def broken_off(target, content):
        with target.open("r+b") as stream:
            stream.write(content[:size])
        raise KeyboardInterrupt

    monkeypatch.setattr(module, "_overwrite", broken_off)
    with pytest.raises(KeyboardInterrupt):
        write_text(file, new, read_text(file).stamp, copies=copies)
    monkeypatch.undo()
    whole = file.read_text("utf-8") in {old, new}
    assert finish_broken_writing(file, copies) is not whole
    assert file.read_text("utf-8") == (old if size == 0 else new)
    assert list(copies.iterdir()) == []
    assert not finish_broken_writing(file, copies)


def test_one_that_somebody_has_mended_since_is_left(file, copies, monkeypatch):
    def broken_off(target, content):
        target.write_bytes(content[:100])
        raise KeyboardInterrupt

    monkeypatch.setattr(module, "_overwrite", broken_off)
    with pytest.raises(KeyboardInterrupt):
        write_text(file, NEW, read_text(file).stamp, copies=copies)
    monkeypatch.undo()
    file.write_text("mended = true\n", encoding="utf-8")
    assert not finish_broken_writing(file, copies)
    assert file.read_text("utf-8") == "mended = true\n"
    assert len(list(copies.iterdir())) == 1


@pytest.mark.parametrize("content", [b"", b"{}\n", b'{"old": 3, "new": 5}\nabc', b"\xff"])
def test_a_copy_that_is_not_whole_is_not_used(file, copies, content):
    copies.mkdir()
    copy = module._copy_of(file, copies)
    with open(copy, "wb") as stream:  # noqa: PTH123  a name as the system gave it
        stream.write(content)
    assert not finish_broken_writing(file, copies)
    assert file.read_text("utf-8") == OLD
