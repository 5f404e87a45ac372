from __future__ import annotations

from dataclasses import replace
from typing import TYPE_CHECKING

import pytest
from hypothesis import given
from hypothesis import strategies as st

from schedtui.screen.cell_editor import CellEdit
from schedtui.screen.painter import (
    Cell,
    Column,
    Look,
    arrange,
    column_width,
    cursor_over,
    edit_over,
    first_showing,
    heading_strips,
    row_strip,
)

if TYPE_CHECKING:
    from textual.strip import Strip

COLUMNS = (
    Column("mark", "", "", "", 2, "left", computed=True, frozen=True),
    Column("tag", "unit", "tag", "", 6, "left", frozen=True),
    Column("flow", "supply air", "airflow", "cfm", 11, "right"),
    Column("db", "supply air", "db", "°F", 5, "right"),
    Column("total", "cooling coil", "total", "MBH", 9, "right"),
    Column("need", "cooling coil", "required", "MBH", 12, "right", computed=True),
    Column("remarks", "", "remarks", "", 30, "left"),
)
CELLS = {
    "mark": Cell("", Look.MARK_SHORT),
    "tag": Cell("AHU-1", Look.TYPED),
    "flow": Cell("9440", Look.TYPED),
    "db": Cell("55.0", Look.INHERITED),
    "total": Cell("310.0", Look.BLAMED),
    "need": Cell("352.4", Look.COMPUTED),
    "remarks": Cell("[b]east[/b]", Look.TYPED),
}


def _row(first: int, width: int, **cells: Cell) -> Strip:
    layout = arrange(COLUMNS, first, width)
    return row_strip(layout, [{**CELLS, **cells}[p.column.key] for p in layout.places])


def test_a_row_tells_what_each_cell_is() -> None:
    assert _row(0, 100).text.rstrip() == (
        " !! AHU-1  │       9440  55.0^    310.0<       352.4· [b]east[/b]"
    )


def test_headings_stand_above_their_cells() -> None:
    upper, lower = heading_strips(arrange(COLUMNS, 0, 100))
    row = _row(0, 100).text
    assert upper.text.rstrip() == "    unit ─ │supply air ────── cooling coil ─────────"
    assert lower.text.rstrip() == "    tag    │airflow cfm db °F total MBH required·MBH  remarks"
    for heading, text in (("cfm", "9440"), ("MBH", "310.0"), ("·MBH", "352.4")):
        assert lower.text.index(heading) + len(heading) == row.index(text) + len(text)


def test_only_whole_columns_with_a_sign_for_the_rest() -> None:
    upper, lower = heading_strips(arrange(COLUMNS, 1, 32))
    assert lower.text == "    tag    ‹db °F total MBH    ›"
    assert upper.text == "    unit ─ ‹supp… cooling …    ›"
    assert _row(1, 32).text == " !! AHU-1  │ 55.0^    310.0<    "


def test_a_group_keeps_its_name_when_its_first_column_is_out_of_sight() -> None:
    upper, _ = heading_strips(arrange(COLUMNS, 3, 60))
    assert "cooling coil" in upper.text


def test_a_column_wider_than_the_screen_is_cut_with_a_sign() -> None:
    text = _row(4, 30, remarks=Cell("serves the east wing", Look.TYPED)).text
    assert text == " !! AHU-1  │serves the east…  "


def test_wide_and_control_characters_keep_the_columns() -> None:
    plain = _row(0, 80)
    for tag in ("冷水機", "e\u0301e\u0301", "A\x1b[2J", "\u202eab", "far too long a tag"):
        strip = _row(0, 80, tag=Cell(tag, Look.TYPED))
        assert strip.cell_length == 80
        assert strip.crop(11, 80).text == plain.crop(11, 80).text
        assert "\x1b" not in strip.text


@pytest.mark.parametrize("width", [1, 5, 12, 13, 20, 80, 200])
@pytest.mark.parametrize("first", [0, 2, 4])
def test_every_segment_has_a_style_and_lines_their_width(first: int, width: int) -> None:
    layout = arrange(COLUMNS, first, width)
    for strip in (_row(first, width), *heading_strips(layout)):
        assert strip.cell_length == width
        assert sum(segment.cell_length for segment in strip) == width
        assert all(segment.style is not None for segment in strip)


@given(
    st.lists(st.integers(1, 30), min_size=1, max_size=12),
    st.integers(0, 11),
    st.integers(0, 11),
    st.integers(12, 120),
)
def test_scrolling_brings_the_wanted_column_in(
    widths: list[int], wanted: int, first: int, width: int
) -> None:
    loose = [Column(str(i), "", "h", "", w, "right") for i, w in enumerate(widths)]
    columns = [*COLUMNS[:1], *loose]
    wanted, first = min(wanted, len(loose) - 1), min(first, len(loose) - 1)
    begin = first_showing(columns, str(wanted), first, width)
    assert arrange(columns, begin, width).place_of(str(wanted)) is not None


def test_the_cursor_is_told_by_more_than_colour() -> None:
    layout = arrange(COLUMNS, 0, 80)
    place = layout.place_of("db")
    assert place is not None
    strip = cursor_over(_row(0, 80), place, CELLS["db"])
    assert strip.text.startswith(">!! AHU-1")
    reversed_ = [s.text for s in strip if s.style is not None and s.style.reverse]
    assert reversed_ == [" 55.0^"]
    assert strip.text[1:] == _row(0, 80).text[1:]


def _field(text: str, caret: int | None = None, *, column: str = "db", width: int = 60) -> str:
    layout = arrange(COLUMNS, 0, width)
    place = layout.place_of(column)
    assert place is not None
    edit = CellEdit(text, len(text) if caret is None else caret)
    field = edit_over(layout, place, edit)
    shown = field.over(_row(0, width))
    assert shown.cell_length == width
    reversed_ = [s for s in shown if s.style is not None and s.style.reverse]
    assert len(reversed_) == 1  # the caret, seen without colour
    assert shown.crop(field.caret, field.caret + reversed_[0].cell_length).text == (
        reversed_[0].text
    )
    return shown.text


def test_an_edit_stands_in_its_cell_and_spills_over_its_neighbours() -> None:
    assert _field("61").startswith(" !! AHU-1  │       9440 61        310.0<")
    assert _field("4500 L/s at 20 °C").startswith(" !! AHU-1  │       9440 4500 L/s at 20 °C ")


def test_a_text_longer_than_the_line_scrolls_with_the_caret() -> None:
    text = "abcdefghijklmnopqrstuvwxyz0123456789abcdefghijkl"
    assert _field(text)[24] == "…"
    assert _field(text).rstrip().endswith("jkl")
    assert _field(text, 0)[24:30] == "abcdef"
    assert _field(text, 0).rstrip().endswith("…")


@given(st.text(max_size=60), st.data())
def test_any_text_can_be_edited(text: str, data: st.DataObject) -> None:
    layout = arrange(COLUMNS, 0, 60)
    place = layout.place_of("db")
    assert place is not None
    edit = CellEdit(text, data.draw(st.integers(0, len(text))))
    for each in (edit, replace(edit, refused="no number")):
        strip = edit_over(layout, place, each).over(_row(0, 60))
        assert strip.cell_length == 60
        assert all(segment.style is not None for segment in strip)


def test_a_refusal_is_said_beside_the_cell() -> None:
    layout = arrange(COLUMNS, 0, 60)
    row = _row(0, 60)
    for column in ("flow", "need"):
        place = layout.place_of(column)
        assert place is not None
        field = edit_over(layout, place, CellEdit.of("5k").refuse("type a number, as 9440"))
        assert "type a number, as 9440" in field.over(row).text
        assert field.over(row).crop(place.x, place.x + 2).text == "5k"


def test_two_states_of_an_edit_differ_only_where_something_was_typed() -> None:
    layout = arrange(COLUMNS, 0, 60)
    place = layout.place_of("flow")
    assert place is not None
    one, two = (edit_over(layout, place, CellEdit.of(text)) for text in ("94", "944"))
    assert one.difference(two) == (place.x + 2, place.x + 4)


def test_column_width_has_room_for_heading_and_unit() -> None:
    assert column_width("total", "MBH", 4) == 9
    assert column_width("tag", "", 12) == 12
