from __future__ import annotations

import pytest

from schedtui.errors import FileError
from schedtui.sheets.delimited import decimal_comma, decoded, text_grid

TEXT = "TAG,EAT °F\nAHU-1,80.1\n"


def texts(grid):
    return [[cell.text for cell in cells.values()] for cells in grid.rows.values()]


@pytest.mark.parametrize(
    "encoding", ["utf-8", "utf-8-sig", "utf-16", "utf-16-le", "utf-16-be", "cp1252"]
)
def test_every_usual_encoding_is_read(encoding):
    assert texts(text_grid(decoded(TEXT.encode(encoding)))) == [
        ["TAG", "EAT °F"],
        ["AHU-1", "80.1"],
    ]


@pytest.mark.parametrize("delimiter", [",", ";", "\t", "|"])
def test_the_delimiter_is_found(delimiter):
    text = "TAG,EAT,LAT\nAHU-1,80.1,54.0\nAHU-2,79,54.5\n".replace(",", delimiter)
    assert texts(text_grid(text))[1] == ["AHU-1", "80.1", "54.0"]


def test_decimal_commas_do_not_part_cells():
    grid = text_grid("TAG;EAT;LAT\nAHU-1;26,7;12,2\n")
    assert texts(grid)[1] == ["AHU-1", "26,7", "12,2"]
    assert grid.decimal_comma
    assert texts(text_grid("TAG\tEAT\nAHU-1\t26,7\n"))[1] == ["AHU-1", "26,7"]


def test_a_line_that_names_the_delimiter_is_obeyed_or_harmless():
    assert texts(text_grid("sep=;\r\nTAG;EAT\r\nAHU-1;80.1\r\n"))[0] == ["TAG", "EAT"]


def test_quotation_marks_hold_commas_and_lines_together():
    assert texts(text_grid('TAG,NOTE\nAHU-1,"a, ""b""\nc"\n'))[1] == ["AHU-1", 'a, "b"\nc']


def test_the_apostrophe_that_stops_a_formula_is_taken_off():
    assert texts(text_grid("a,b,c\n'=1+2,'-5,'tis\n"))[1] == ["=1+2", "-5", "'tis"]


def test_cells_know_where_they_stand():
    assert [cell.ref for cell in text_grid("a,,b\n\n,c\n").rows[3].values()] == ["B3"]


@pytest.mark.parametrize(
    ("content", "said"),
    [
        (b"\x00\x01\x02\x03" * 300 + b"\xff" * 900, "no text"),
        (b"\xff\xfe\x00", "UTF-16"),
        (b"\xef\xbb\xbf\xff\xff", "UTF-8"),
    ],
)
def test_what_is_no_text_is_refused(content, said):
    with pytest.raises(FileError, match=said):
        text_grid(decoded(content))


@pytest.mark.parametrize(
    "text", ["a," * 30_000, "a,b\n" * 11_000, "x" * 40_000 + ",b\n", '"' + "a\n" * 40_000]
)
def test_what_no_schedule_is_as_large_as_is_refused(text):
    with pytest.raises(FileError):
        text_grid(text)


def test_the_decimal_sign_is_told_by_what_only_it_can_be():
    assert decimal_comma(["26,7", "4.455", "x"])
    assert not decimal_comma(["9,440", "80.1"])
    assert not decimal_comma(["9,440", "x"])
    assert decimal_comma(["80,1/66,9"])
