"""Every check on its cases: `checks/<name>.toml`, rows that it must find and rows it must not.

A case file holds `[[case]]` tables and, before them, what its schedules have in `common`:

- `name`, `finds`: what the case is, and whether the check finds something in it;
- `schedule`: the schedule, below `common`; the offending cell carries a comment;
- `severity`, `condition`, `fields`, `margin`, `subject`, `says`, `rounding`: what the first
  finding must be;
- `count`: how many findings of the check there are, 1 if not said; `conditions`: of which
  conditions, in their order.

Expectations come from the engineering and from published or real-gas values, not from the program.
"""

import tomllib
from pathlib import Path

import pytest

from schedtui.review.registry import registered

FOLDER = Path(__file__).parent / "checks"
HEAD = """\
[project]
title = "Cases"
units = "IP"
airflow_basis = "standard"
"""
KEYS = {
    "name", "finds", "common", "schedule", "severity", "condition", "conditions", "fields",
    "margin", "subject", "says", "count", "rounding",
}  # fmt: skip
# Points of margin that the formulas may part by from the published or real-gas value expected.
MARGIN = 0.6


def files():
    return sorted(FOLDER.glob("*.toml"))


def content(path):
    return tomllib.loads(path.read_text(encoding="utf-8"))


CASES = [
    (path, case, content(path).get("common", HEAD))
    for path in files()
    for case in content(path)["case"]
]


def check_of(path):
    return path.stem.replace("_", "-")


def case_id(value):
    return f"{value[0].stem}: {value[1]['name']}"


def test_every_check_has_its_cases_and_every_case_file_its_check():
    assert registered()
    assert {check_of(path) for path in files()} == set(registered())


@pytest.mark.parametrize("path", files(), ids=lambda path: path.stem)
def test_a_check_has_cases_of_both_kinds_with_the_offending_cell_told(path):
    cases = content(path)["case"]
    assert {case["finds"] for case in cases} == {True, False}
    assert len({case["name"] for case in cases}) == len(cases)
    for case in cases:
        assert set(case) <= KEYS
        if case["finds"] and case.get("severity") != "missing":
            assert " # " in case["schedule"], f"{case['name']}: no cell is commented"


@pytest.mark.parametrize("value", CASES, ids=case_id)
def test_case(value, reviewed):
    path, case, common = value
    review = reviewed(case.get("common", common) + case["schedule"])
    found = [one for one in review.all_findings if one.check == check_of(path)]
    if not case["finds"]:
        assert found == []
        return
    assert len(found) == case.get("count", len(case.get("conditions", [1])))
    if "conditions" in case:
        assert [one.condition for one in found] == case["conditions"]
    expect(found[0], case)


def expect(first, case):
    expected = case.get("severity", registered()[first.check].severity.word)
    assert first.severity.word == expected
    assert first.rounding == case.get("rounding", False)
    assert first.condition == case.get("condition", case.get("conditions", [None])[0])
    if "fields" in case:
        assert list(first.paths) == case["fields"]
    if "margin" in case:
        assert first.margin == pytest.approx(case["margin"], abs=MARGIN)
    if "subject" in case:
        assert first.subject.label == case["subject"]
    if "says" in case:
        assert case["says"] in first.message


@pytest.mark.parametrize("name", registered())
def test_a_check_says_what_it_is(name):
    check = registered()[name]
    assert check.sentence.endswith(".")
    assert check.source
    finders = (
        check.unit, check.cooling, check.rated, check.governing, check.heating, check.condition,
        check.plant, check.schedule,
    )  # fmt: skip
    assert any(finders) or name == "acceptance-lapsed"  # found where acceptances are held
