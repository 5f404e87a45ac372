"""README.md says what the code has: its tables are the code's, its example is a schedule."""

import re
import runpy
from pathlib import Path

import pytest

from schedtui.schedule.load import load

ROOT = Path(__file__).parent.parent
README = (ROOT / "README.md").read_text(encoding="utf-8")
written = runpy.run_path(str(ROOT / "tests" / "write_reference.py"))["written"]


def test_the_tables_are_those_of_the_code() -> None:
    assert written(README) == README, "run: python tests/write_reference.py"


def test_a_table_without_a_place_is_an_error() -> None:
    with pytest.raises(ValueError, match="limits"):
        written(README.replace("<!-- limits begins -->", ""))


def test_the_example_is_a_schedule() -> None:
    (example,) = re.findall(r"```toml\n(.*?)```", README, re.DOTALL)
    document = load(example)
    assert document.problems == ()
    assert [row.text("tag") for row in document.rows("unit")] == ["AHU-1"]


def test_the_caution_stands_at_the_head() -> None:
    head = README.split("## Start")[0]
    for word in ("no design", "Local codes", "certified", "licensed engineer"):
        assert word in head


def test_the_demo_of_the_start_command_is_there() -> None:
    command = re.search(r"## Start.*?```sh\n(.*?)\n```", README, re.DOTALL)
    assert command
    assert (ROOT / command[1].split()[-1]).is_file()
