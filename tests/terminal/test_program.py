"""The program in a real pseudo-terminal, its screen read as a terminal would show it."""

from __future__ import annotations

import os
import signal
import subprocess
import sys
from pathlib import Path

import pytest

from tests.benchmarks.terminal import Terminal

ROOT = Path(__file__).parents[2]
SCHEDULE = """\
[project]
title = "Terminal Works"
units = "IP"

[[condition]]
name = "summer peak"
season = "cooling"
outdoor_db = 92.0
outdoor_wb = 74.0

[[unit]]
tag = "AHU-1"

[[unit]]
tag = "AHU-2"
supply_airflow = 9440
outdoor_airflow = 1800
room_db = 75.0
room_rh = 50
cool_lat_db = 53.0
cool_lat_wb = 52.0
cool_total = 100    # far too small
"""
SIZES = [(80, 24), (160, 45)]


@pytest.fixture
def file(tmp_path):
    path = tmp_path / "works.toml"
    path.write_text(SCHEDULE, encoding="utf-8")
    return path


def program(file, size=(80, 24), **environment):
    command = [sys.executable, "-m", "schedtui", str(file)]
    given = {"PYTHONPATH": str(ROOT), "XDG_STATE_HOME": str(file.parent / "state"), **environment}
    return Terminal(command, *size, given)


def line_of(terminal, tag):
    return next(line for line in terminal.text.splitlines() if line[4:].startswith(tag))


@pytest.mark.parametrize("size", SIZES, ids=str)
def test_open_edit_see_the_row_answer_save_and_quit(file, size):
    with program(file, size) as terminal:
        terminal.wait_for(lambda text: "cool-total-short" in text)
        assert line_of(terminal, "AHU-2").startswith(">!!")
        terminal.press("9")
        terminal.press("0")
        terminal.press("0")
        terminal.press("enter")  # one key: the value is taken and the row is another
        assert not line_of(terminal, "AHU-2").startswith(">!!")
        assert "900" in line_of(terminal, "AHU-2")
        assert "*unsaved*" in terminal.text
        terminal.press("\x13")
        assert "*unsaved*" not in terminal.text
        assert file.read_text(encoding="utf-8") == SCHEDULE.replace("= 100 ", "= 900 ")
        terminal.press("ctrl+q")
        assert terminal.wait_for_end() == 0


def test_ctrl_c_and_ctrl_z_neither_quit_nor_suspend(file):
    with program(file) as terminal:
        terminal.wait_for(lambda text: "cool-total-short" in text)
        terminal.press("\x03")
        assert "ctrl+c does not quit" in terminal.text
        terminal.press("\x1a")
        assert "Nothing to take back" in terminal.text


def test_without_colour_nothing_is_lost_but_colour(file):
    def scene(**environment):
        with program(file, **environment) as terminal:
            terminal.wait_for(lambda text: "cool-total-short" in text)
            terminal.press("down")
            colours = {cell.fg for row in terminal.screen.buffer.values() for cell in row.values()}
            return terminal.text, colours

    coloured, colours = scene()
    plain, greys = scene(NO_COLOR="1")
    assert plain == coloured
    assert any(len(set(_channels(colour))) > 1 for colour in colours)
    assert all(len(set(_channels(colour))) == 1 for colour in greys)


def _channels(colour):
    return [colour[i : i + 2] for i in (0, 2, 4)] if len(colour) == 6 else ["same"]


def test_told_to_end_it_gives_the_terminal_back(file):
    with program(file) as terminal:
        terminal.wait_for(lambda text: "cool-total-short" in text)
        os.kill(terminal.pid, signal.SIGTERM)
        assert terminal.wait_for_end() == 128 + signal.SIGTERM
        assert terminal.received.rfind(b"\x1b[?1049l") > terminal.received.rfind(b"\x1b[?1049h")


@pytest.mark.parametrize("name", ["xterm", "screen", "linux", "vt100"])
def test_on_other_terminals_it_shows_the_same(file, name):
    with program(file, TERM=name, COLORTERM="") as terminal:
        terminal.wait_for(lambda text: "cool-total-short" in text)
        assert line_of(terminal, "AHU-2").startswith(">!!")
        terminal.press("ctrl+q")
        assert terminal.wait_for_end() == 0


def test_a_terminal_that_cannot_move_a_cursor_is_refused_in_one_line(file):
    with program(file, TERM="dumb") as terminal:
        assert terminal.wait_for_end() == 2
        said = "".join(terminal.text.split("\n")).rstrip()  # the terminal breaks the line
        assert said.startswith("schedtui needs a terminal that can move a cursor; without one: ")
        assert said.endswith(f"schedtui check {file}")


def test_no_terminal_is_refused_in_one_line(file):
    done = subprocess.run(
        [sys.executable, "-m", "schedtui", str(file)],
        cwd=ROOT, capture_output=True, text=True, check=False, stdin=subprocess.DEVNULL,
    )  # fmt: skip
    assert (done.returncode, done.stdout) == (2, "")
    assert len(done.stderr.splitlines()) == 1
    assert f"schedtui check {file}" in done.stderr
