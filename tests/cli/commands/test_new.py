from __future__ import annotations

import json

import pytest

from schedtui.cli.main import run
from schedtui.schedule.load import load
from schedtui.schedule.view import view


@pytest.fixture
def new(capsys):
    """Return a function that runs `new` and gives the exit status and both outputs."""

    def made(*words):
        status = run(["new", *map(str, words)], open_screen=lambda _: pytest.fail("no screen"))
        printed = capsys.readouterr()
        return status, printed.out, printed.err

    return made


@pytest.mark.parametrize("system", ["IP", "SI"])
def test_the_new_file_is_a_schedule_without_a_fault(system, new, tmp_path, capsys):
    file = tmp_path / "works.toml"
    status, out, err = new(file, "--units", system)
    assert (status, err) == (0, "")
    assert out == f"{file} written; open it with: schedtui {file}\n"
    schedule = view(load(file.read_text("utf-8")))
    assert (schedule.system, schedule.project.title, len(schedule.units)) == (system, "works", 1)
    status = run(["check", str(file), "--format", "json", "--fail-on", "missing"], lambda _: 2)
    assert status == 0
    assert json.loads(capsys.readouterr().out)["counts"]["clear"] == 1


def test_it_overwrites_nothing_unless_told(new, tmp_path):
    file = tmp_path / "works.toml"
    file.write_text("mine", encoding="utf-8")
    assert new(file) == (2, "", f"{file} exists already\n")
    assert file.read_text("utf-8") == "mine"
    assert new(file, "--replace")[0] == 0
    assert load(file.read_text("utf-8")).problems == ()


@pytest.mark.parametrize("title", ['12" duct \\ new', "a\nb\x1b[31m", "冷水", "'''\"\"\""])
def test_a_title_of_any_characters_comes_back(title, new, tmp_path):
    file = tmp_path / "works.toml"
    assert new(file, "--title", title)[0] == 0
    assert view(load(file.read_text("utf-8"))).project.title == title


@pytest.mark.parametrize("title", ["", "  "])
def test_a_blank_title_is_refused_and_nothing_written(title, new, tmp_path):
    status, out, err = new(tmp_path / "works.toml", "--title", title)
    assert (status, out) == (2, "")
    assert err == "schedtui new: --title must not be blank\n"
    assert list(tmp_path.iterdir()) == []


def test_where_there_is_no_folder_nothing_is_written(new, tmp_path):
    status, out, err = new(tmp_path / "nowhere" / "works.toml")
    assert (status, out) == (2, "")
    assert err.count("\n") == 1


def test_a_name_with_control_characters_does_not_act_on_the_terminal(new, tmp_path):
    _, out, _ = new(tmp_path / "a\x1b[31m.toml")
    assert "\x1b" not in out
    assert "␛[31m" in out
