from __future__ import annotations

import os
import subprocess
import sys
from pathlib import Path

import pytest

from schedtui import __version__
from schedtui.cli.main import all_commands, run
from schedtui.errors import FileError, Problem, ScheduleError

ROOT = Path(__file__).parents[2]


def refuse(_):
    pytest.fail("no screen is asked for")


def test_every_command_is_found_and_tells_what_it_does(capsys):
    assert {"check", "new"} <= set(all_commands())
    for name, command in all_commands().items():
        with pytest.raises(SystemExit) as ended:
            run([name, "--help"], refuse)
        assert ended.value.code == 0
        shown = " ".join(capsys.readouterr().out.split())
        assert shown.startswith(f"usage: schedtui {name}")
        assert command.summary in shown
        assert command.example.split()[:2] == ["schedtui", name]


def test_help_lists_the_commands_and_carries_the_caution(capsys):
    with pytest.raises(SystemExit) as ended:
        run(["--help"], refuse)
    assert ended.value.code == 0
    shown = " ".join(capsys.readouterr().out.split())
    for command in all_commands().values():
        assert command.summary in shown
    assert "licensed engineer" in shown


def test_the_version_is_told(capsys):
    with pytest.raises(SystemExit) as ended:
        run(["--version"], refuse)
    assert ended.value.code == 0
    assert capsys.readouterr().out == f"schedtui {__version__}\n"


def test_a_word_that_is_no_command_is_a_file_to_open():
    opened = []
    assert run(["works.toml"], lambda file: opened.append(file) or 0) == 0
    assert run(["./check"], lambda file: opened.append(file) or 1) == 1
    assert opened == ["works.toml", "./check"]


@pytest.mark.parametrize(
    ("words", "complaint"),
    [
        ([], "schedtui: "),
        (["--nonsense"], "schedtui: "),
        (["chek", "works.toml"], 'schedtui: "chek" is no command and opens alone as a file;'),
        (["a\x1b[31m", "b"], 'schedtui: "a␛[31m" is no command'),
        (["check"], "schedtui check: "),
        (["new"], "schedtui new: "),
        (["new", "works.toml", "--units", "US"], "schedtui new: argument --units: invalid choice"),
    ],
)
def test_a_wrong_command_line_is_told_in_one_line(words, complaint, capsys):
    assert run(words, refuse) == 2
    printed = capsys.readouterr()
    assert printed.out == ""
    assert printed.err.startswith(complaint)
    assert printed.err.count("\n") == 1


def raising(error):
    def screen(_):
        raise error

    return screen


@pytest.mark.parametrize(
    ("error", "lines"),
    [
        (FileError("works.toml is a pipe"), ["works.toml is a pipe"]),
        (
            ScheduleError(
                [
                    Problem(7, "AHU-3", "supply_airflow", '"9,440"', "is not a number"),
                    Problem(0, "", "", "", "is no schedule\n\x1b[31m"),
                ],
                "a\tb.toml",
            ),
            [
                'a␉b.toml:7: AHU-3 supply_airflow: "9,440" is not a number',
                "a␉b.toml: is no schedule␊␛[31m",
            ],
        ),
        (KeyboardInterrupt(), ["interrupted"]),
    ],
)
def test_what_goes_wrong_is_told_in_lines_and_ends_with_2(error, lines, capsys):
    assert run(["works.toml"], raising(error)) == 2
    printed = capsys.readouterr()
    assert printed.out == ""
    assert printed.err.splitlines() == lines


def test_a_long_value_is_cut(capsys):
    problem = Problem(7, "AHU-3", "cool_total", "9" * 10_000, "is not a number")
    run(["works.toml"], raising(ScheduleError([problem], "works.toml")))
    assert len(capsys.readouterr().err) < 150


def shell(words, **settings):
    return subprocess.run(
        [sys.executable, "-m", "schedtui", *words],
        stdin=subprocess.DEVNULL,
        capture_output=True,
        text=True,
        cwd=ROOT,
        check=False,
        **settings,
    )


@pytest.mark.parametrize("term", ["xterm-256color", "dumb", ""])
def test_without_a_terminal_a_file_is_not_opened_and_the_command_to_use_is_named(term, tmp_path):
    file = tmp_path / "check"
    done = shell([str(file)], env={**os.environ, "TERM": term})
    assert (done.returncode, done.stdout) == (2, "")
    assert done.stderr.endswith(f"schedtui check {file}\n")
    assert done.stderr.count("\n") == 1


def test_output_that_is_closed_is_told_and_help_into_a_closed_pipe_is_silent(tmp_path):
    done = shell(["new", str(tmp_path / "works.toml")], preexec_fn=lambda: os.close(1))
    assert (done.returncode, done.stderr) == (2, "standard output is closed\n")
    source, sink = os.pipe()
    os.close(source)
    helped = subprocess.run(
        [sys.executable, "-m", "schedtui", "--help"],
        stdout=sink, stderr=subprocess.PIPE, text=True, cwd=ROOT, check=False,
    )  # fmt: skip
    os.close(sink)
    assert helped.stderr == ""
