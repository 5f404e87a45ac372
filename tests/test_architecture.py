"""What holds for the tree as a whole: what loads what, what lies where, how large it is."""

from __future__ import annotations

import ast
import json
import subprocess
import sys
from pathlib import Path

import pytest

ROOT = Path(__file__).parents[1]
PACKAGE = ROOT / "schedtui"
TESTS = ROOT / "tests"
PROJECTS = sorted((ROOT / "projects").glob("*.toml"))

SHIPPED = {
    "DEVELOPERS.md",
    "LICENSE",
    "README.md",
    "projects",
    "pyproject.toml",
    "schedtui",
    "tests",
}
LEFT_BEHIND = {"build", "dist", "schedtui.egg-info", "snapshot_report.html", "__pycache__"}
LONGEST = 400

# Loaded when first used: together they take longer to start than a check takes to run.
HEAVY = ("textual", "pint", "openpyxl", "numpy")

# Tests of more than one module, which have none to mirror: of the tree, and of a package as a
# whole against an outside source.
OF_THE_WHOLE = {
    "test_architecture.py",
    "test_readme.py",
    "air/test_published.py",
    "air/test_real_gas.py",
    "review/test_accept_inputs.py",
    "review/test_balance.py",
    "review/test_rows.py",
}
OF_THE_WHOLE_FOLDERS = {"benchmarks", "projects", "slow", "terminal"}


def module_name(path: Path) -> str:
    parts = path.relative_to(ROOT).with_suffix("").parts
    return ".".join(parts[:-1] if parts[-1] == "__init__" else parts)


MODULES = sorted(path for path in PACKAGE.rglob("*.py") if path.is_file())
TEST_MODULES = sorted(path for path in TESTS.rglob("test_*.py") if path.is_file())
WITHOUT_SCREEN = [
    name
    for name in map(module_name, MODULES)
    if not f"{name}.".startswith(("schedtui.screen.", "schedtui.__main__."))
]


def heavy_after(statements: str) -> dict[str, list[str]]:
    """Run statements in a new interpreter; tell which heavy libraries it has loaded by then.

    The statements may call `note(name)` in between.
    """
    program = f"""
import json, sys
seen = {{}}
def note(name):
    fresh = [heavy for heavy in {HEAVY!r} if heavy in sys.modules and heavy not in
             [one for those in seen.values() for one in those]]
    if fresh:
        seen[name] = fresh
{statements}
note("the end")
print(json.dumps(seen))
"""
    done = subprocess.run(
        [sys.executable, "-c", program], cwd=ROOT, capture_output=True, text=True, check=False
    )
    assert done.returncode == 0, done.stderr
    return json.loads(done.stdout.splitlines()[-1])


def test_no_module_outside_the_screen_loads_a_heavy_library():
    statements = "import importlib\n" + "\n".join(
        f"importlib.import_module({name!r}); note({name!r})" for name in WITHOUT_SCREEN
    )
    assert heavy_after(statements) == {}


def test_a_number_without_a_unit_does_not_load_pint_and_one_with_a_unit_does():
    reading = "from schedtui.units import LOAD, read_amount\nread_amount({!r}, LOAD, 'IP')"
    assert heavy_after(reading.format("9,440")) == {}
    assert "pint" in heavy_after(reading.format("3.2 kW"))["the end"]


@pytest.mark.parametrize("form", ["text", "json", "csv", "markdown"])
@pytest.mark.parametrize("file", PROJECTS, ids=lambda path: path.name)
def test_a_check_loads_no_heavy_library(file, form):
    checking = f"""
from schedtui.cli.main import run
status = run(["check", {str(file)!r}, "--format", {form!r}, "--fail-on", "never"], None)
assert status == 0, status
"""
    assert heavy_after(checking) == {}


def top_level() -> set[str]:
    """Return the names at the top of the project, without hidden ones."""
    git = ["git", "-C", str(ROOT)]
    found: set[str] = set()
    try:
        top = subprocess.run(
            [*git, "rev-parse", "--show-toplevel"], capture_output=True, text=True, check=False
        )
        if top.returncode == 0 and Path(top.stdout.strip()).samefile(ROOT):
            listed = subprocess.run(
                [*git, "ls-files", "-z", "--cached", "--others", "--exclude-standard"],
                capture_output=True,
                text=True,
                check=True,
            )
            found = {name.partition("/")[0] for name in listed.stdout.split("\0") if name}
    except FileNotFoundError:
        found = set()  # no git on this machine: the folder itself must do
    found = found or {path.name for path in ROOT.iterdir()} - LEFT_BEHIND
    return {name for name in found if not name.startswith(".")}


def test_the_top_of_the_project_holds_what_it_should_and_nothing_else():
    assert top_level() == SHIPPED


def test_the_project_has_modules_and_schedules():
    assert len(MODULES) > 10
    assert len(PROJECTS) > 0
    assert len(TEST_MODULES) > 5


@pytest.mark.parametrize("path", MODULES, ids=module_name)
def test_every_module_tells_what_it_is_for(path):
    assert ast.get_docstring(ast.parse(path.read_text(encoding="utf-8")))


@pytest.mark.parametrize("path", MODULES, ids=module_name)
def test_no_module_is_too_long(path):
    assert len(path.read_text(encoding="utf-8").splitlines()) <= LONGEST


@pytest.mark.parametrize("path", TEST_MODULES, ids=lambda path: str(path.relative_to(TESTS)))
def test_every_test_module_mirrors_a_module(path):
    inside = path.relative_to(TESTS)
    if inside.as_posix() in OF_THE_WHOLE or inside.parts[0] in OF_THE_WHOLE_FOLDERS:
        return
    mirrored = PACKAGE / inside.parent / inside.name.removeprefix("test_")
    # A package is tested by the name of its folder: tests/test_units.py for units/.
    assert mirrored.is_file() or mirrored.with_suffix("").is_dir(), f"no {mirrored}"
