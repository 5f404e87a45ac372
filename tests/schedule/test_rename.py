from __future__ import annotations

import pytest

from schedtui.schedule.load import load
from schedtui.schedule.rename import rename
from schedtui.schedule.save import saved, source_text
from schedtui.schedule.typed import Typed, toml_text

TEXT = """\
[project]
title = "summer"
units = "IP"

[defaults]
conditions = ["summer", "winter"]
plants = ["chilled water"]

[[column]]
key = "filter"
heading = "summer"

[[condition]]
name = "summer" # the peak
season = "cooling"
outdoor_db = 95.0
outdoor_wb = 75.0

[[condition]]
name = "winter"
season = "heating"
outdoor_db = 5.0
outdoor_rh = 80

[[plant]]
name = "chilled water"
serves = "cooling"

[[plant]]
name = "winter" # as the condition is called
serves = "heating"

[[unit]]
tag = "summer"
conditions = [
  'winter',
  "summer", # at the peak
]
plants = ["chilled water", "summer"]
filter = "MERV 13"

[[unit.accepted]]
check = "shr-range"
condition = "summer" # only then
reason = "summer"

[[unit.accepted]]
check = "approach"
condition = "winter"
reason = "r"

[[unit]]
tag = "AHU-2"

[[accepted]]
of = "condition summer"
check = "wet-above-dry"
fields = ["condition[summer].outdoor_wb", "condition[summer peak].outdoor_wb"]
reason = "r"

[[accepted]]
of = "plant chilled water"
check = "plant-flow-short"
condition = "summer"
fields = ["plant[chilled water].flow"]
reason = "r"
"""


def renamed(table, old, new):
    document = load(TEXT)
    row = next(row for row in document.rows(table) if old in (row.text("name"), row.text("key")))
    edit = rename(document, table, row.row_id, Typed(new, new, toml_text(new)))
    return document, *edit.apply(document)


@pytest.mark.parametrize(
    ("table", "old", "new", "changes"),
    [
        (
            "condition",
            "summer",
            'July "peak"',
            {
                '["summer", "winter"]': '["July \\"peak\\"", "winter"]',
                'name = "summer" #': 'name = "July \\"peak\\"" #',
                '  "summer", #': '  "July \\"peak\\"", #',
                'condition = "summer" #': 'condition = "July \\"peak\\"" #',
                'of = "condition summer"': 'of = "condition July \\"peak\\""',
                '"condition[summer].outdoor_wb"': '"condition[July \\"peak\\"].outdoor_wb"',
                'short"\ncondition = "summer"': 'short"\ncondition = "July \\"peak\\""',
            },
        ),
        (
            "plant",
            "chilled water",
            "CHW",
            {
                'plants = ["chilled water"]': 'plants = ["CHW"]',
                'name = "chilled water"': 'name = "CHW"',
                'plants = ["chilled water", "summer"]': 'plants = ["CHW", "summer"]',
                'of = "plant chilled water"': 'of = "plant CHW"',
                "plant[chilled water].flow": "plant[CHW].flow",
            },
        ),
        ("plant", "winter", "HW", {'name = "winter" #': 'name = "HW" #'}),
        (
            "column",
            "filter",
            "final_filter",
            {'key = "filter"': 'key = "final_filter"', 'filter = "MERV': 'final_filter = "MERV'},
        ),
    ],
)
def test_every_reference_is_rewritten_in_one_step_and_nothing_else(table, old, new, changes):
    document, after, undo = renamed(table, old, new)
    expected = TEXT
    for before, now in changes.items():
        assert expected.count(before) == 1
        expected = expected.replace(before, now)
    assert source_text(after) == expected
    assert undo.apply(after)[0] == document


def test_a_renaming_is_undone_after_a_save_too():
    _, after, undo = renamed("condition", "summer", "July")
    kept = saved(after, source_text(after))
    assert source_text(undo.apply(kept)[0]) == TEXT


def test_a_column_s_cell_keeps_its_place_in_the_row():
    _, after, _ = renamed("column", "filter", "final_filter")
    assert list(after.rows("unit")[0].cells) == ["tag", "conditions", "plants", "final_filter"]


def test_a_row_without_a_name_gets_one():
    document = load(TEXT + '\n[[plant]]\nserves = "heating"\n')
    row = document.rows("plant")[2]
    after, _ = rename(document, "plant", row.row_id, Typed("HW", "HW", '"HW"')).apply(document)
    assert source_text(after) == TEXT + '\n[[plant]]\nserves = "heating"\nname = "HW"\n'
