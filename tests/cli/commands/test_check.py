from __future__ import annotations

import csv
import json
import os
import re
import signal
import socket
import subprocess
import sys
from collections import Counter
from pathlib import Path

import pytest

from schedtui.cli.main import run
from schedtui.files import LARGEST

HERE = Path(__file__).parent
REFUSED = sorted((HERE / "refused").glob("*.toml"))
ACCEPTED = sorted((HERE / "accepted").glob("*.toml"))
WORKS = HERE / "works.toml"
GOLDENS = {"text": ".txt", "json": ".json", "csv": ".csv", "markdown": ".md"}


@pytest.fixture
def check(capsys):
    """Return a function that checks paths and gives the exit status and both outputs."""

    def checked(*words):
        status = run(["check", *map(str, words)], open_screen=lambda _: pytest.fail("no screen"))
        printed = capsys.readouterr()
        return status, printed.out, printed.err

    return checked


def started(*words, **settings):
    """Start the program as a shell does."""
    return subprocess.Popen(
        [sys.executable, "-m", "schedtui", *map(str, words)],
        stdout=subprocess.PIPE,
        stderr=subprocess.PIPE,
        text=True,
        cwd=HERE.parents[2],
        **settings,
    )


def expected_problems(file):
    """Return the problems that a file's own comments announce, as `line: sentence`.

    `#: sentence` is about the line it stands on; `#@ 7: sentence` names another.
    """
    found = []
    for number, line in enumerate(file.read_bytes().decode("utf-8-sig").split("\n"), start=1):
        found += [(int(at), sentence) for at, sentence in re.findall(r"^#@ (\d+): (.*?)\r?$", line)]
        found += [(number, one.strip()) for one in line.split("#: ")[1:]]
    return [f"{number}: {sentence}" for number, sentence in sorted(found, key=lambda one: one[0])]


def test_there_are_bad_files_and_good_ones():
    assert len(REFUSED) > 50
    assert len(ACCEPTED) > 10


@pytest.mark.parametrize("file", REFUSED, ids=lambda file: file.stem)
def test_a_bad_file_is_refused_with_one_line_for_each_problem(file, check):
    expected = expected_problems(file)
    assert expected, "the file announces no problem"
    status, out, err = check(file)
    assert err.splitlines() == [f"{file}:{problem}" for problem in expected]
    assert out == ""
    assert status == 2


def said(severity, check, fields):
    return f"{severity} {check} {' '.join(sorted(fields))}"


@pytest.mark.parametrize("file", ACCEPTED, ids=lambda file: file.stem)
def test_an_odd_file_is_accepted_with_the_findings_it_announces(file, check):
    """`#= severity check fields` announces a finding, `#= nothing` that there is none.

    What could not be judged besides is no matter here.
    """
    lines = re.findall(r"#= (.+?)\r?$", file.read_text(encoding="utf-8-sig"), re.MULTILINE)
    assert lines, "the file announces nothing"
    announced = Counter(
        said(severity, name, fields)
        for severity, name, *fields in (line.split() for line in lines if line != "nothing")
    )
    _, out, err = check(file, "--format", "json")
    assert err == ""
    checked = json.loads(out)
    findings = [*checked["findings"], *(one for u in checked["units"] for one in u["findings"])]
    found = Counter(said(one["severity"], one["check"], one["fields"]) for one in findings)
    assert announced <= found
    assert not [one for one in found - announced if not one.startswith("missing ")]


def checked_object(check, file):
    return json.loads(check(file, "--format", "json")[1])


SMALL = """\
[project]
title = "Mill"
units = "IP"
{project}

[[condition]]
name = "summer"
season = "cooling"
outdoor_db = 95.0
outdoor_wb = 75.0

[[unit]]
tag = "AHU-3"
{unit}
"""


@pytest.fixture
def small(tmp_path):
    """Return a function that writes a small schedule with more lines in it."""

    def written(project="", unit="", name="small.toml"):
        file = tmp_path / name
        file.write_text(SMALL.format(project=project, unit=unit), encoding="utf-8")
        return file

    return written


def test_the_pressure_wins_over_the_altitude_and_without_either_the_site_is_at_the_sea(
    small, check
):
    def pressure(project):
        return checked_object(check, small(project))["project"]["pressure"]

    assert pressure("altitude = 5000\npressure = 13.4") == 13.4
    # ICAO standard atmosphere: 12.2279 psia at 5 000 ft, 14.6959 psia at the sea.
    assert pressure("altitude = 5000") == pytest.approx(12.228, abs=0.001)
    assert pressure("") == pytest.approx(14.696, abs=0.001)


def test_an_unknown_key_is_named_with_the_nearest_known_one(small, check):
    _, out, _ = check(small(unit="supply_airflw = 9440"))
    assert "supply_airflow" in out
    _, out, _ = check(small(unit="weight = 9440"))
    assert "if that was meant" not in out


def test_digits_stand_in_the_report_as_typed(small, check):
    _, out, _ = check(small(unit="cool_total = 380.50"))
    assert re.search(r"AHU-3 .* 380\.50 ", out)


def nearly(text):
    """Return a text with its long fractions cut, whose last digits are the machine's own."""
    return re.sub(rb"\d+\.\d{8,}", lambda found: b"%.9g" % float(found[0]), text)


@pytest.mark.parametrize(("form", "suffix"), GOLDENS.items())
def test_the_printed_bytes_are_the_golden_ones(form, suffix, capfdbinary, monkeypatch):
    """Made anew, and read through, by `schedtui check works.toml --format json > works.json`."""
    monkeypatch.chdir(HERE)
    run(["check", WORKS.name, "--format", form], open_screen=lambda _: 2)
    printed = capfdbinary.readouterr().out
    assert nearly(printed) == nearly(WORKS.with_suffix(suffix).read_bytes())


def test_the_goldens_are_what_their_suffix_says():
    checked = json.loads(WORKS.with_suffix(".json").read_bytes())
    rows = list(csv.DictReader(WORKS.with_suffix(".csv").read_text("utf-8").splitlines()))
    counts = checked["counts"]
    assert len(rows) == sum(counts[one] for one in ("short", "conflict", "caution", "missing"))
    assert rows[-1]["subject"] == "'=AHU-2"


def test_what_a_file_says_does_not_act_on_the_terminal_in_any_format(small, check):
    file = small(unit=r'conditions = ["\u001b[2J\u0007"]')
    for form in GOLDENS:
        status, out, _ = check(file, "--format", form)
        assert status == 1
        assert not re.search(r"[\x00-\x09\x0b-\x1f\x7f]", out), form


# One file for each worst severity, all told by name in their comments.
WORST = {
    "short": "works.toml",
    "conflict": "accepted/tag-twice.toml",
    "caution": "accepted/unknown-key.toml",
    "missing": "accepted/no-unit.toml",
    "clear": "accepted/no-format.toml",
}
ORDER = ("short", "conflict", "caution", "missing")


@pytest.mark.parametrize("worst", WORST)
@pytest.mark.parametrize("fail_on", [*ORDER, "never"])
def test_the_status_is_1_from_the_severity_asked_for_upwards(worst, fail_on, check):
    fails = worst in ORDER[: (*ORDER, "never").index(fail_on) + 1] and fail_on != "never"
    status, out, err = check(HERE / WORST[worst], "--fail-on", fail_on)
    assert (status, err) == (int(fails), "")
    assert out


def test_by_default_a_conflict_fails_and_a_caution_does_not(check):
    assert [check(HERE / WORST[worst])[0] for worst in WORST] == [1, 1, 0, 0, 0]


def test_several_files_go_on_after_a_bad_one_and_end_with_2(check):
    bad = HERE / "refused" / "quantity-zero.toml"
    status, out, err = check(WORKS, bad, "nowhere.toml", WORKS, "--format", "json")
    assert status == 2
    assert [one["file"] for one in json.loads(out)] == [str(WORKS), str(WORKS)]
    first, second = err.splitlines()
    assert re.match(rf"{re.escape(str(bad))}:\d+: AHU-3 quantity: 0 ", first)
    assert second == "nowhere.toml cannot be read: there is no such file or folder"


def test_several_bad_files_still_print_an_array(check):
    status, out, _ = check("nowhere.toml", "nor-here.toml", "--format", "json")
    assert (status, json.loads(out)) == (2, [])


def test_a_folder_stands_for_its_files_in_the_order_of_their_names(small, check, tmp_path):
    for name in ("b.toml", "a.toml", "notes.txt"):
        small(name=name)
    (tmp_path / "c.toml").mkdir()
    status, out, err = check(tmp_path, "--format", "json")
    assert [one["file"] for one in json.loads(out)] == [
        str(tmp_path / "a.toml"),
        str(tmp_path / "b.toml"),
    ]
    assert (status, err) == (0, "")


def test_a_folder_with_one_file_gives_an_array_too(small, check):
    assert len(json.loads(check(small().parent, "--format", "json")[1])) == 1


def test_a_folder_without_a_schedule_is_a_failure(check, tmp_path):
    status, out, err = check(tmp_path)
    assert (status, out) == (2, "")
    assert err == f"{tmp_path}: there is no .toml file in this folder\n"


@pytest.mark.parametrize(
    ("words", "complaint"),
    [
        ([], "the following arguments are required: PATH"),
        (["x.toml", "--format", "xml"], "argument --format: invalid choice: 'xml'"),
        (["x.toml", "--fail-on", "clear"], "argument --fail-on: invalid choice: 'clear'"),
        (["x.toml", "--colour"], "unrecognized arguments: --colour"),
    ],
)
def test_a_wrong_command_line_is_told_in_one_line(words, complaint, check):
    status, out, err = check(*words)
    assert (status, out) == (2, "")
    assert re.fullmatch(rf"schedtui.*: {re.escape(complaint)}.*; see schedtui.* --help\n", err)


@pytest.fixture
def pipe(tmp_path):
    os.mkfifo(tmp_path / "pipe.toml")
    return tmp_path / "pipe.toml"


def test_only_a_regular_file_is_read_and_no_other_opened(pipe, check, tmp_path):
    with socket.socket(socket.AF_UNIX) as door:
        door.bind(str(tmp_path / "s.toml"))
        for file, kind in (
            (pipe, "a pipe"),
            (tmp_path / "s.toml", "a socket"),
            (Path(os.devnull), "a device"),
        ):
            assert check(file) == (2, "", f"{file} is {kind}, not a file\n")


def test_a_file_of_20_mb_is_read_and_a_larger_one_is_not(small, check, tmp_path):
    text = small().read_text("utf-8")
    file = tmp_path / "large.toml"
    for size, status in ((LARGEST, 0), (LARGEST + 1, 2)):
        file.write_text(text + "#" * (size - len(text)), encoding="utf-8")
        assert check(file)[0] == status


def test_text_that_is_no_utf_8_is_refused_with_its_line(check, tmp_path):
    file = tmp_path / "latin.toml"
    file.write_bytes(b'[project]\ntitle = "Caf\xe9"\n')
    status, out, err = check(file)
    assert (status, out) == (2, "")
    assert "no UTF-8 text" in err
    assert "line 2" in err


def test_a_name_too_long_for_the_system_is_a_failure_like_any_other(check):
    status, _, err = check("x" * 300)
    assert status == 2
    assert "the name is too long" in err


def test_a_name_that_is_empty_does_not_stand_for_the_folder(check):
    assert check("") == (2, "", '"" is no name of a file\n')


def test_without_a_locale_no_output_is_an_error():
    plain = {"LC_ALL": "C", "PYTHONUTF8": "0", "PYTHONCOERCECLOCALE": "0"}
    env = {**os.environ, **plain}
    for form in GOLDENS:
        with started("check", WORKS, "--format", form, env=env) as done:
            out, err = done.communicate()
        assert (done.returncode, err) == (1, "")
        assert out.isascii()
    refused = HERE / "refused" / "temperature-unit.toml"
    with started("check", refused, env=env) as done:
        assert done.communicate()[1].startswith(f"{refused}:")
    assert done.returncode == 2


def test_a_reader_that_goes_away_is_no_error():
    with started("check", *[WORKS] * 20, "--format", "json") as done:
        done.stdout.close()
        assert done.stderr.read() == ""
    assert done.returncode == 2


def test_a_full_disk_is_told():
    with Path("/dev/full").open("w") as full:
        done = subprocess.run(
            [sys.executable, "-m", "schedtui", "check", str(WORKS)],
            stdout=full, stderr=subprocess.PIPE, text=True, cwd=HERE.parents[2], check=False,
        )  # fmt: skip
    assert done.returncode == 2
    assert done.stderr.startswith("standard output cannot be written:")
    assert done.stderr.count("\n") == 1


def test_an_interruption_ends_it_with_a_line_and_no_traceback():
    bad = HERE / "refused" / "quantity-zero.toml"
    with started("check", bad, *[WORKS] * 5000) as done:
        try:
            assert "quantity" in done.stderr.readline()  # by now it is at work
            done.send_signal(signal.SIGINT)
            assert done.communicate() == ("", "interrupted\n")
        finally:
            done.kill()
    assert done.returncode == 2
