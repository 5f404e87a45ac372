from __future__ import annotations

import io
import sys

import pytest

from schedtui.cli import output
from schedtui.errors import FileError, Problem


def test_a_result_keeps_its_lines_and_nothing_that_acts(capsys):
    output.result("a\tb\x1b[2J\x7f\x9b\r\nc\n")
    assert capsys.readouterr().out == "a␉b␛[2J␡¤␍\nc\n"


def test_a_character_that_the_encoding_lacks_becomes_a_question_mark(monkeypatch):
    written = io.BytesIO()
    monkeypatch.setattr(sys, "stdout", io.TextIOWrapper(written, encoding="ascii"))
    output.result("55 °F \udcff\n")
    assert written.getvalue() == b"55 ?F ?\n"


def test_output_that_is_closed_is_a_failure_to_write(monkeypatch):
    monkeypatch.setattr(sys, "stdout", None)
    with pytest.raises(FileError, match="standard output is closed"):
        output.result("a")


def test_without_standard_error_a_failure_is_silent(monkeypatch):
    monkeypatch.setattr(sys, "stderr", None)
    output.failure("a")


def test_a_problem_has_the_file_its_line_and_its_sentence(capsys):
    output.problems(
        "works.toml",
        [
            Problem(7, "AHU-3", "supply_airflow", '"9,440"', "is not a number; accepted: cfm"),
            Problem(0, "project", "", "", "is missing"),
        ],
    )
    assert capsys.readouterr().err.splitlines() == [
        'works.toml:7: AHU-3 supply_airflow: "9,440" is not a number; accepted: cfm',
        "works.toml: project: is missing",
    ]
