from __future__ import annotations

import csv
import io
import subprocess
import sys

import pytest

from schedtui.cli.main import run
from schedtui.schedule.load import load

SHEET = """\
AIR HANDLING UNIT SCHEDULE,,,,,
TAG,SUPPLY CFM,COOLING TOTAL (kW),LAT,COLOUR,REMARKS
AHU-1,"9,440",115.8,152,red,1
AHU-2,TBD,41.0,42,blue,
NOTES:,,,,,
1. CAPACITIES ARE GROSS.,,,,,
"""

PROJECT = """\
# kept as it is
format = 1

[project]
title = "Example Works"   # the owner's words
units = "IP"
altitude = 2460

[defaults]
room_db = 75

[[column]]
key = "paint"
heading = "COLOUR"

[[condition]]
name = "summer peak"
season = "cooling"
outdoor_db = 96.0
outdoor_wb = 75.0

[[unit]]
tag = "AHU-1"
supply_airflow = 9440  # by hand
cool_total = 395.0     # of the first issue
cool_sensible = 243.0

[[unit.accepted]]
check = "cool-total-short"
reason = "by agreement"

[[unit]]
tag = "AHU-9"
supply_airflow = 1000
"""


@pytest.fixture
def bring(capsys, tmp_path):
    """Return a function that runs `import` on a sheet's text and gives status and outputs."""
    sheet = tmp_path / "sheet.csv"

    def made(*words, text=SHEET):
        sheet.write_text(text, encoding="utf-8")
        words = ["import", str(sheet), *map(str, words)]
        status = run(words, open_screen=lambda _: pytest.fail("no screen"))
        printed = capsys.readouterr()
        return status, printed.out, printed.err

    return made


def units(path):
    document = load(path.read_text("utf-8"))
    assert document.problems == ()
    return {
        row.text("tag"): {k: c.text for k, c in row.cells.items()} for row in document.rows("unit")
    }


def test_a_sheet_becomes_a_file_that_check_reads(bring, tmp_path, capsys):
    file = tmp_path / "works.toml"
    status, out, err = bring("-o", file)
    assert (status, err) == (0, "")
    assert units(file)["AHU-2"] == {
        "tag": "AHU-2",
        "cool_total": "139.9",
        "lat": "42",
        "colour": "blue",
    }
    assert "cool_total = 395.1  # 115.8 kW" in file.read_text("utf-8")
    assert run(["check", str(file), "--fail-on", "never"], lambda _: 2) == 0
    capsys.readouterr()
    assert out.splitlines()[-2:] == [
        "2 units, 4 cells placed, 4 kept as columns, 1 not placed",
        f"{file} written",
    ]


def test_the_account_names_every_column_and_every_cell_without_a_place(bring):
    status, out, _ = bring("--dry-run")
    assert status == 0
    lines = out.splitlines()
    assert "  SUPPLY CFM → supply_airflow in cfm, certain" in lines
    assert "  COOLING TOTAL (kW) → cool_total in kW, certain" in lines
    assert any(line.startswith("  COLOUR: kept as column colour") for line in lines)
    assert any(line.startswith("  LAT: kept as column lat; may be latent") for line in lines)
    assert [line for line in lines if '"TBD"' in line] == [
        '  B4 "TBD": AHU-2 supply_airflow: is not a number'
    ]
    assert lines[-1] == "nothing written"


def test_a_dry_run_writes_nothing(bring, tmp_path):
    before = sorted(tmp_path.iterdir())
    assert bring("--dry-run", "-o", tmp_path / "works.toml")[0] == 0
    assert [path.name for path in tmp_path.iterdir()] == ["sheet.csv"]
    assert before == []


def test_it_overwrites_nothing_unless_told(bring, tmp_path):
    file = tmp_path / "works.toml"
    file.write_text("mine", encoding="utf-8")
    status, out, err = bring("-o", file)
    assert (status, out, err) == (2, "", f"{file} exists already\n")
    assert file.read_text("utf-8") == "mine"
    assert bring("-o", file, "--replace")[0] == 0
    assert "AHU-1" in units(file)


def test_a_person_says_what_a_column_is(bring, tmp_path):
    file = tmp_path / "works.toml"
    told = ("--map", "LAT=room_latent", "--map", "colour=serves", "--map", "supply CFM=column")
    assert bring("-o", file, *told)[0] == 0
    assert units(file)["AHU-1"] == {
        "tag": "AHU-1", "serves": "red", "room_latent": "152", "cool_total": "395.1",
        "remarks": "1", "supply_cfm": "9,440",
    }  # fmt: skip


@pytest.mark.parametrize(
    ("words", "said"),
    [
        (("--map", "LAT=room_latnt"), "did you mean room_latent?"),
        (("--map", "NOWHERE=serves"), 'no column has the heading "NOWHERE"'),
        (("--map", "LAT"), "HEADING=key"),
        (("--into", "b.toml"), "cannot go together"),
    ],
)
def test_words_that_contradict_the_sheet_or_each_other_are_refused(words, said, bring, tmp_path):
    status, out, err = bring("-o", tmp_path / "works.toml", *words)
    assert (status, out, err.count("\n")) == (2, "", 1)
    assert said in err
    assert not (tmp_path / "works.toml").exists()


def test_without_a_file_to_write_it_is_refused(bring):
    assert bring()[0] == 2


def test_the_units_asked_for_are_those_of_the_file(bring, tmp_path):
    file = tmp_path / "works.toml"
    assert bring("-o", file, "--units", "SI")[0] == 0
    found = units(file)["AHU-1"]
    # 9440 cfm by 0.471947 L/s a cfm; the load is in kW already.
    assert (found["supply_airflow"], found["cool_total"]) == ("4455", "115.8")


def test_the_project_is_taken_from_another_file(bring, tmp_path):
    other, file = tmp_path / "other.toml", tmp_path / "works.toml"
    other.write_text(PROJECT, encoding="utf-8")
    assert bring("-o", file, "--project", other)[0] == 0
    text = file.read_text("utf-8")
    assert list(units(file)) == ["AHU-1", "AHU-2"]
    assert text.startswith(PROJECT.partition("[[column]]")[0].rstrip().partition("altitude")[0])
    assert 'name = "summer peak"' in text
    assert "accepted" not in text
    assert "1. CAPACITIES ARE GROSS." in text
    assert other.read_text("utf-8") == PROJECT


def test_into_a_file_what_the_sheet_has_changes_and_the_rest_stays(bring, tmp_path):
    file = tmp_path / "works.toml"
    file.write_text(PROJECT, encoding="utf-8")
    status, out, err = bring("--into", file)
    assert (status, err) == (0, "")
    text = file.read_text("utf-8")
    found = units(file)
    assert list(found) == ["AHU-1", "AHU-9", "AHU-2"]
    assert "supply_airflow = 9440  # by hand\n" in text
    assert "cool_sensible = 243.0\n" in text
    assert found["AHU-1"]["cool_total"] == "395.1"
    assert found["AHU-1"]["paint"] == "red"
    assert found["AHU-2"]["paint"] == "blue"
    assert '[[unit.accepted]]\ncheck = "cool-total-short"\nreason = "by agreement"\n' in text
    changes = out.partition("changes:\n")[2].partition("\n\n")[0].splitlines()
    assert changes == [
        "  column lat: new",
        "  AHU-1 cool_total: 395.0 → 395.1",
        "  AHU-1 remarks: not stated → 1",
        "  AHU-1 lat: not stated → 152",
        "  AHU-1 paint: not stated → red",
        "  AHU-2: new",
        "  not on the sheet, as they were: AHU-9",
        "  project notes: 1 more",
    ]


def test_importing_again_changes_nothing(bring, tmp_path):
    file = tmp_path / "works.toml"
    assert bring("-o", file)[0] == 0
    before = file.read_bytes()
    status, out, _ = bring("--into", file)
    assert status == 0
    assert file.read_bytes() == before
    assert "changes:" not in out


def test_a_file_of_other_units_is_named(bring, tmp_path):
    file = tmp_path / "works.toml"
    file.write_text(PROJECT, encoding="utf-8")
    status, _, err = bring("--into", file, "--units", "SI")
    assert (status, err) == (2, "schedtui import: the file is in IP units\n")


def test_a_file_with_a_fault_is_not_imported_into(bring, tmp_path):
    file = tmp_path / "works.toml"
    broken = PROJECT.replace("supply_airflow = 1000", "supply_airflow = 9,440")
    file.write_text(broken, encoding="utf-8")
    status, _, err = bring("--into", file)
    assert status == 2
    assert "AHU-9 supply_airflow" in err
    assert file.read_text("utf-8") == broken


def test_a_sheet_without_a_schedule_is_refused(bring, tmp_path):
    status, out, err = bring("-o", tmp_path / "works.toml", text="a,b\n1,2\n")
    assert (status, out, err.count("\n")) == (2, "", 1)
    assert "has no schedule in it" in err


def test_what_acts_on_a_terminal_is_harmless_in_both_the_account_and_the_file(bring, tmp_path):
    file = tmp_path / "works.toml"
    text = "TAG,SUPPLY CFM,OA CFM,PAINT\x1b[31m\nAHU-1\x1b[2J,94\x0740,220,re\x1bd\n"
    status, out, _ = bring("-o", file, text=text)
    assert status == 0
    assert "\x1b" not in out
    assert "\x1b" not in file.read_text("utf-8")
    assert units(file)["AHU-1\x1b[2J"]["outdoor_airflow"] == "220"


def test_a_check_does_not_load_the_matching_library():
    program = (
        "import sys\nfrom schedtui.cli.main import run\n"
        "run(['check', 'nowhere.toml'], None)\nassert 'rapidfuzz' not in sys.modules"
    )
    done = subprocess.run([sys.executable, "-c", program], capture_output=True, check=False)
    assert done.returncode == 0, done.stderr


def test_a_long_schedule_comes_through_whole(bring, tmp_path):
    rows = [["TAG", "SUPPLY CFM", "TOTAL MBH", "SENS MBH"]]
    rows += [[f"AHU-{n}", str(9000 + n), f"{300 + n}.0", f"{200 + n}.0"] for n in range(1, 301)]
    text = io.StringIO()
    csv.writer(text).writerows(rows)
    file = tmp_path / "works.toml"
    assert bring("-o", file, text=text.getvalue())[0] == 0
    found = units(file)
    assert len(found) == 300
    assert found["AHU-300"]["supply_airflow"] == "9300"
