from __future__ import annotations

import pytest

from schedtui.schedule.document import ARRAYS, SINGLE, Row
from schedtui.schedule.load import load
from schedtui.schedule.typed import Typed

TEXT = """\
[project]
title = "Mill"
units = "IP"

[[column]]
key = "filter"
heading = "Filter"

[[column]]
heading = "without a key"

[[unit]]
tag = "A"

[[unit]]
tag = "B"
"""


@pytest.fixture
def document():
    return load(TEXT)


def test_every_table_is_either_single_or_an_array():
    assert not set(SINGLE) & set(ARRAYS)


def test_rows_are_found_by_table_and_by_their_lasting_id(document):
    first, second = document.rows("unit")
    assert document.row("unit", second.row_id) is second
    assert document.position("unit", second.row_id) == 1
    assert document.rows("project") == (document.single["project"],)
    assert document.rows("limits") == document.rows("plant") == ()
    for ask in (document.row, document.position):
        with pytest.raises(KeyError):
            ask("unit", document.next_id)
    with pytest.raises(KeyError):
        document.row("condition", first.row_id)


def test_every_row_of_the_document_has_an_id_of_its_own(document):
    ids = [row.row_id for table in (*SINGLE, *ARRAYS) for row in document.rows(table)]
    assert len(set(ids)) == len(ids) == 5
    assert max(ids) < document.next_id


def test_a_row_is_put_in_the_place_of_the_one_with_its_id(document):
    first, second = document.rows("unit")
    changed = Row(second.row_id, {"tag": Typed("C", "C", '"C"')})
    assert document.with_row("unit", changed).rows("unit") == (first, changed)
    assert document.rows("unit") == (first, second)


def test_a_table_that_stands_once_comes_and_goes(document):
    row = Row(document.next_id, {"agreement": Typed("2", 2.0, "2")})
    assert document.with_row("limits", row).rows("limits") == (row,)
    assert document.with_row("limits", row).without_table("limits") == document


def test_a_cell_that_is_not_there_reads_as_empty(document):
    assert document.rows("unit")[0].text("tag") == "A"
    assert document.rows("unit")[0].text("serves") == ""


def test_the_project_s_own_columns_are_named(document):
    assert list(document.own_columns()) == ["filter"]
