from __future__ import annotations

from pathlib import Path

import pytest

from schedtui.cli.main import run
from schedtui.report.page import CAUTION

HERE = Path(__file__).parent
WORKS = """\
[project]
title = "Works"
units = "IP"
altitude = 2460
airflow_basis = "standard"

[[condition]]
name = "peak"
season = "cooling"
outdoor_db = 96.0
outdoor_wb = 75.0

[[condition]]
name = "winter"
season = "heating"
outdoor_db = 5.0
outdoor_rh = 80

[[unit]]
tag = "AHU-1"
supply_airflow = 10000
outdoor_airflow = 2000
room_db = 75
room_rh = 50
cool_lat_db = 55
cool_lat_wb = 54

[[unit]]
tag = "AHU-2 [b]alt[/b]"
supply_airflow = 5000
conditions = ["winter"]

[[unit]]
tag = "AHU-1"
supply_airflow = 4000
"""


@pytest.fixture
def working(capsys, tmp_path):
    """Return a function that runs the command on a file and gives status and both outputs."""

    def worked(*words, text=WORKS):
        file = tmp_path / "works.toml"
        file.write_text(text, encoding="utf-8")
        status = run(["working", str(file), *words], open_screen=lambda _: pytest.fail("no screen"))
        printed = capsys.readouterr()
        return status, printed.out, printed.err

    return worked


def test_every_unit_of_a_tag_is_worked_through(working):
    status, out, err = working("AHU-1")
    assert (status, err) == (0, "")
    assert "\nAHU-1: working\n" in out
    assert "\nAHU-1 (2nd): working\n" in out
    assert "AHU-2" not in out
    assert "\nAHU-1 at peak" in out
    assert "\nAHU-1 at winter" in out
    assert "h_o" in out
    assert " ".join(out.split()).endswith(CAUTION)
    assert max(map(len, out.splitlines())) <= 80


def test_one_condition_alone(working):
    status, out, _ = working("AHU-1", "--condition", "peak")
    assert status == 0
    assert "at peak" in out
    assert "at winter" not in out


def test_markdown(working):
    status, out, _ = working("AHU-1", "--format", "markdown")
    assert status == 0
    assert out.startswith("# Works")
    assert "  `= 60 · 2000 · 0.075`" in out


def test_an_unknown_tag_names_those_there_are(working):
    status, out, err = working("AHU-9")
    assert (status, out) == (2, "")
    assert err.endswith('no unit is tagged "AHU-9"; there are "AHU-1", "AHU-2 [b]alt[/b]"\n')
    assert err.count("\n") == 1


def test_a_file_without_units_says_so(working):
    status, _, err = working("AHU-1", text=WORKS.partition("[[unit]]")[0])
    assert status == 2
    assert "it has no tagged unit" in err


def test_an_unknown_condition_names_those_there_are(working):
    status, out, err = working("AHU-1", "--condition", "summer")
    assert (status, out) == (2, "")
    assert err == 'AHU-1 has no condition "summer"; there are "peak", "winter"\n'


def test_a_condition_that_does_not_apply_is_unknown_to_the_unit(working):
    status, _, err = working("AHU-2 [b]alt[/b]", "--condition", "peak")
    assert status == 2
    assert err == 'AHU-2 [b]alt[/b] has no condition "peak"; there are "winter"\n'


def test_a_unit_without_outdoor_air_needs_no_condition(working):
    text = WORKS.partition("[[condition]]")[0] + "[[unit]]\n" + WORKS.partition("[[unit]]\n")[2]
    status, out, _ = working("AHU-1", text=text.replace("outdoor_airflow = 2000\n", ""))
    assert status == 0
    assert "AHU-1 at room (governing and rated)" in out


def test_a_file_that_cannot_be_read_is_refused_like_by_check(working):
    status, out, err = working("AHU-1", text=WORKS.replace("= 10000", "= 10,000"))
    assert (status, out) == (2, "")
    assert "supply_airflow" in err
