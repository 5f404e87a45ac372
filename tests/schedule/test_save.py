from __future__ import annotations

from dataclasses import replace

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from schedtui.errors import SpliceError
from schedtui.schedule.document import ARRAYS, SINGLE, Row
from schedtui.schedule.edit import DeleteRow, InsertRow, MoveRow, SetAccepted, SetCell
from schedtui.schedule.load import CATALOGUES, load
from schedtui.schedule.save import saved, source_text
from schedtui.schedule.typed import Typed, toml_text

# One blank line between blocks: what is moved away and back leaves no trace.
REGULAR = """\
# An invented schedule.
format = 1

[project]
title = "Mill" # the title
units = "IP"
notes = [
  "as built", # says the owner
  "rev 2",
]

# what holds for all
[defaults]
room_db = 75

[[condition]]
name = "summer"
season = "cooling"
outdoor_db = 95.0
outdoor_wb = 75.0

[vendor]
k = "v"

# ---- hall A
[[unit]]
tag = "AHU-1"
  supply_airflow = 9440   # measured
# about the total
cool_total = 9,440

  [[unit.accepted]]
  check = "shr-range"
  reason = "by the client"

[[unit]]
tag = "AHU-2"
quantity = 2
fan.odd = 1
[unit.extra]
k = 1

# ---- hall B
[[unit]]
tag = "AHU-3"
remarks = ["VFD, by others", "z"]

[[unit]]
tag = "AHU-3"
"""

# Everything that makes a layout untidy: tables between units, blocks that touch, no last newline.
UNTIDY = (
    REGULAR.replace('[vendor]\nk = "v"\n\n', "")
    .replace('"z"]\n\n', '"z"]\n[vendor]\nk = "v"\n')
    .replace("\n\n# ---- hall B\n", "\n# ---- hall B\n\n\n")
    .rstrip("\n")
    + "\n# the end"
)
INLINE = """\
project = {title = "Mill", units = "IP"}
unit = [
  {tag = "AHU-1", supply_airflow = 9440}, # first
  {tag = "AHU-2", supply_airflow = 8000, cool_total = 300},
]
"""
LAYOUTS = {
    "regular": REGULAR,
    "untidy": UNTIDY,
    "windows": "\ufeff" + REGULAR.replace("\n", "\r\n"),
    "untidy windows": UNTIDY.replace("\n", "\r\n"),
    "inline": INLINE,
}


def entered(table, key, text):
    return CATALOGUES[table].catalogue[key].kind.enter(text, "IP")


def set_cell(document, place, key, text):
    """Return the document with a typed text in a unit's cell, or with the cell cleared."""
    row = document.rows("unit")[place]
    cell = None if text is None else entered("unit", key, text)
    return SetCell("unit", row.row_id, key, cell).apply(document)[0]


def content(document):
    """Return what the cells of a document say."""
    return {
        table: [(row.cells, [one.cells for one in row.accepted]) for row in document.rows(table)]
        for table in (*SINGLE, *ARRAYS)
    }


@pytest.mark.parametrize("layout", LAYOUTS)
def test_a_document_without_an_edit_is_its_file_byte_for_byte(layout):
    text = LAYOUTS[layout]
    document = load(text)
    assert source_text(document) == text
    assert source_text(saved(document, text)) == text


@pytest.mark.parametrize("layout", LAYOUTS)
def test_a_changed_value_replaces_its_own_characters_and_nothing_else(layout):
    text = LAYOUTS[layout]
    changed = source_text(set_cell(load(text), 0, "supply_airflow", "9,500.0"))
    assert changed == text.replace("9440", "9500.0", 1)


@pytest.mark.parametrize("newline", ["\n", "\r\n"])
def test_a_new_key_follows_the_last_own_key_with_its_indentation(newline):
    text = REGULAR.replace("\n", newline)
    document = set_cell(load(text), 1, "serves", 'hall "B"')
    last = f"fan.odd = 1{newline}"
    assert source_text(document) == text.replace(last, f'{last}serves = "hall \\"B\\""{newline}')


def test_a_cleared_key_takes_its_line_and_the_comment_on_it():
    changed = source_text(set_cell(load(REGULAR), 0, "supply_airflow", None))
    assert changed == REGULAR.replace("  supply_airflow = 9440   # measured\n", "")
    changed = source_text(set_cell(load(REGULAR), 0, "cool_total", None))
    assert changed == REGULAR.replace("cool_total = 9,440\n", "")


def test_a_new_table_that_stands_once_goes_among_the_others():
    document = load(REGULAR)
    cell = entered("limits", "agreement", "2.0")
    document, undo = SetCell("limits", document.next_id, "agreement", cell).apply(document)
    text = source_text(document)
    assert "[limits]\nagreement = 2.0\n" in text
    assert text.index("[project]") < text.index("[limits]") < text.index("[defaults]")
    document, _ = undo.apply(document)
    assert source_text(document) == REGULAR


@pytest.mark.parametrize("table", ["condition", "plant", "column"])
def test_a_first_row_of_an_array_goes_before_the_units(table):
    text = REGULAR.partition("[[condition]]")[0] + '[[unit]]\ntag = "A"\n'
    document = load(text)
    name = {"column": "key"}.get(table, "name")
    row = Row(document.next_id, {name: Typed("x", "x", toml_text("x"))})
    written = source_text(InsertRow(table, row, 0).apply(document)[0])
    assert written.index(f"[[{table}]]") < written.index("[[unit]]")


def test_a_bad_cell_is_saved_back_unharmed_and_comes_back_when_its_cure_is_undone():
    document = load(REGULAR)
    row = document.rows("unit")[0]
    assert "cool_total = 9,440\n" in source_text(set_cell(document, 0, "supply_airflow", "1"))
    cure = SetCell("unit", row.row_id, "cool_total", entered("unit", "cool_total", "9,440"))
    cured, undo = cure.apply(document)
    text = source_text(cured)
    assert text == REGULAR.replace("9,440", "9440")
    cured = saved(cured, text)
    assert cured.problems == ()
    back, _ = undo.apply(cured)
    assert source_text(back) == REGULAR
    assert len(saved(back, REGULAR).problems) == 1


@pytest.mark.parametrize("layout", LAYOUTS)
def test_a_unit_moves_and_is_copied_with_its_acceptances_and_sub_tables(layout):
    document = load(LAYOUTS[layout])
    rows = document.rows("unit")
    before = content(document)["unit"]
    moved, _ = MoveRow("unit", rows[0].row_id, len(rows) - 1).apply(document)
    again = load(source_text(moved))
    assert content(again)["unit"] == [*before[1:], before[0]]
    copy = replace(rows[1], row_id=document.next_id)
    copied, _ = InsertRow("unit", copy, 0).apply(document)
    again = load(source_text(copied))
    assert content(again)["unit"] == [before[1], *before]


def test_the_comments_that_touch_a_unit_s_head_move_with_it():
    document = load(REGULAR)
    moved, _ = MoveRow("unit", document.rows("unit")[2].row_id, 0).apply(document)
    block = '# ---- hall B\n[[unit]]\ntag = "AHU-3"\nremarks = ["VFD, by others", "z"]\n\n'
    assert source_text(moved) == REGULAR.replace(block, "").replace(
        "# ---- hall A\n", f"{block}# ---- hall A\n"
    )


@pytest.mark.parametrize("place", range(4))
def test_a_deleted_unit_comes_back_byte_for_byte_even_after_a_save(place):
    document = load(REGULAR)
    deleted, undo = DeleteRow("unit", document.rows("unit")[place].row_id).apply(document)
    assert source_text(undo.apply(deleted)[0]) == REGULAR
    text = source_text(deleted)
    assert len(load(text).rows("unit")) == 3
    deleted = saved(deleted, text)
    assert source_text(undo.apply(deleted)[0]) == REGULAR


def test_acceptances_come_and_go_and_change_in_their_places():
    document = load(REGULAR)
    unit, last = document.rows("unit")[0], document.rows("unit")[3]
    texts = {"check": "approach", "reason": "by design"}
    cells = {key: Typed(text, text, toml_text(text)) for key, text in texts.items()}
    fresh = Row(document.next_id, cells)
    added, undo = SetAccepted(last.row_id, (fresh,)).apply(document)
    text = source_text(added)
    assert text.startswith(REGULAR)
    assert '[[unit.accepted]]\ncheck = "approach"\nreason = "by design"\n' in text
    kept = saved(added, text)
    assert len(kept.rows("unit")[3].accepted) == 1
    assert content(load(source_text(undo.apply(kept)[0]))) == content(document)

    removed, undo = SetAccepted(unit.row_id, ()).apply(document)
    text = source_text(removed)
    assert "shr-range" not in text
    kept = saved(removed, text)
    assert content(load(source_text(undo.apply(kept)[0]))) == content(document)


def test_after_a_save_rows_keep_their_ids_and_only_later_edits_are_written():
    document = set_cell(load(REGULAR), 0, "supply_airflow", "9500")
    text = source_text(document)
    after = saved(document, text)
    assert content(after) == content(document)
    assert [row.row_id for row in after.rows("unit")] == [
        row.row_id for row in document.rows("unit")
    ]
    assert after.next_id == document.next_id
    assert source_text(after) == text
    assert source_text(set_cell(after, 0, "supply_airflow", "9440")) == REGULAR


@pytest.mark.parametrize(
    "other",
    [
        REGULAR.replace("95.0", "95"),
        REGULAR.replace('tag = "AHU-2"', 'tag = "AHU-4"'),
        REGULAR.replace("shr-range", "approach"),
        REGULAR.replace('\n[[unit]]\ntag = "AHU-3"\n', ""),
        REGULAR + "[limits]\nagreement = 2\n",
    ],
)
def test_a_text_that_does_not_hold_the_cells_is_not_taken_for_theirs(other):
    with pytest.raises(SpliceError):
        saved(load(REGULAR), other)


PLACES = st.integers(0, 9)
DRAWN = st.tuples(
    st.sampled_from(["set", "clear", "limit", "title", "new", "copy", "move", "delete"]),
    PLACES,
    PLACES,
    st.sampled_from(["supply_airflow", "outdoor_airflow", "cool_total", "cool_sensible"]),
    st.sampled_from(["1", "2.50", "9440"]),
)
ARRANGING = ("copy", "move", "delete")


def edit_of(document, drawn):  # noqa: PLR0911  one line for each kind of edit
    """Return an edit that the document can bear, by what was drawn."""
    what, one, other, key, text = drawn
    rows = document.rows("unit")
    if what == "title":
        return SetCell("project", document.single["project"].row_id, "title",
                       entered("project", "title", text))  # fmt: skip
    if what == "limit":
        there = document.rows("limits")
        row_id = there[0].row_id if there else document.next_id
        return SetCell("limits", row_id, "agreement", entered("limits", "agreement", text))
    if what == "new" or not rows:
        row = Row(document.next_id, {"tag": entered("unit", "tag", text)})
        return InsertRow("unit", row, one % (len(rows) + 1))
    row = rows[one % len(rows)]
    if what == "copy":
        copy = replace(row, row_id=document.next_id)
        return InsertRow("unit", copy, other % (len(rows) + 1))
    if what == "move":
        return MoveRow("unit", row.row_id, other % len(rows))
    if what == "delete":
        return DeleteRow("unit", row.row_id)
    cell = None if what == "clear" else entered("unit", key, text)
    return SetCell("unit", row.row_id, key, cell)


@pytest.mark.parametrize("layout", [one for one in LAYOUTS if one != "inline"])
@settings(max_examples=60, deadline=None)
@given(sequence=st.lists(DRAWN, min_size=1, max_size=6))
def test_any_edits_are_written_and_undone_to_the_same_bytes(layout, sequence):
    text = LAYOUTS[layout]
    document, inverses = load(text), []
    for drawn in sequence:
        document, inverse = edit_of(document, drawn).apply(document)
        inverses.append(inverse)
    written = source_text(document)
    kept = saved(document, written)  # raises unless the text holds exactly the cells
    assert content(load(written)) == content(kept)

    def undone(document):
        for inverse in reversed(inverses):
            document, _ = inverse.apply(document)
        return document

    assert source_text(undone(document)) == text
    again = source_text(undone(kept))
    # A key that comes back stands last, and a table stays as an empty one; else no trace is left.
    assert {**content(load(again)), "limits": []} == {**content(load(text)), "limits": []}
    if "untidy" not in layout and all(what in ARRANGING for what, *_ in sequence):
        assert again == text
