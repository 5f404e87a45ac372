"""The proof itself: it must notice what a text operation could get wrong."""

from __future__ import annotations

import datetime as dt

import pytest

from schedtui.errors import SpliceError
from schedtui.schedule.toml_source import (
    Append,
    BadValue,
    Drop,
    Put,
    Remove,
    read_source,
    splice,
)
from schedtui.schedule.toml_source.edits import assemble
from schedtui.schedule.toml_source.expect import expected_values, read_value, same


@pytest.mark.parametrize(
    ("one", "other"),
    [
        (1, 1.0), (1, True), (0.0, -0.0), ("1", 1), ([], {}), ([1], [1, 1]), ({"a": 1}, {}),
        ({}, {"a": 1}), ({"a": {}}, {}), ({"a": []}, {}), (BadValue("1/2", 1), "1/2"),
        (BadValue("1/2", 1), BadValue("1/3", 1)), (dt.date(2026, 1, 1), "2026-01-01"),
        ({"a": [{"b": 1}]}, {"a": [{"b": 1.0}]}),
    ],
)  # fmt: skip
def test_what_differs_is_noticed(one, other):
    assert not same(one, other)
    assert same(one, one)


def test_bad_values_compare_by_their_text_wherever_they_stand():
    assert same(BadValue("1/2", 1), BadValue("1/2", 9))


def test_values_are_not_changed_in_their_place():
    values = {"a": [{"b": 1}], "c": {"d": 1}}
    changes = [Put(("a", 0, "b"), "2"), Drop(("c", "d")), Append(("e",), ()), Remove(("a", 0))]
    assert expected_values(values, changes[:3]) == {"a": [{"b": 2}], "c": {}, "e": [{}]}
    assert values == {"a": [{"b": 1}], "c": {"d": 1}}


def test_a_table_emptied_may_go_but_one_with_a_key_may_not():
    dropped = expected_values({"a": {"b": {"c": 1}}}, [Drop(("a", "b", "c"))])
    assert same(dropped, {})
    assert same(dropped, {"a": {}})
    assert not same(expected_values({"a": {"b": 1, "c": 1}}, [Drop(("a", "b"))]), {})


@pytest.mark.parametrize("raw", ["1 # x", "1\n", "1\nb = 2", '"open', "[1", " 1", "1 "])
def test_text_that_is_not_one_value_is_refused(raw):
    with pytest.raises(SpliceError):
        read_value(raw)


def test_a_text_operation_gone_wrong_is_found_out(monkeypatch):
    source = read_source("a = 1\nb = 22\n")
    module = splice.__globals__
    damages = (
        lambda text: text.replace("22", "23"),
        lambda text: text.replace("22", "22.0"),
        lambda text: text + "c = 1\n",
        lambda text: text.replace("b = 22\n", ""),
        lambda text: text + "[open\n",
    )
    for damage in damages:
        monkeypatch.setitem(
            module, "assemble", lambda *a, damage=damage, **k: damage(assemble(*a, **k))
        )
        with pytest.raises(SpliceError):
            splice(source, [Put(("a",), "2")])
