"""The writer's rules for keys and tables, each with the exact characters that must come out."""

from __future__ import annotations

import pytest

from schedtui.errors import SpliceError
from schedtui.schedule.toml_source import Append, Drop, Put, Remove, read_source, splice


def edited(text, *changes, order=()):
    return splice(read_source(text), changes, order=order)


CASES = {
    "a value": ("a = 9440  # x\n", [Put(("a",), "66.0")], "a = 66.0  # x\n"),
    "a bad value": ("a = 9,440 # x\n", [Put(("a",), "9440")], "a = 9440 # x\n"),
    "back to a bad value": ("a = 9440\n", [Put(("a",), "9,440")], "a = 9,440\n"),
    "nothing typed yet": (
        "a =\nb = # x\n",
        [Put(("a",), "1"), Put(("b",), "2")],
        "a = 1\nb = 2 # x\n",
    ),
    "a value on many lines": (
        'a = [\n 1, # x\n] # y\nb = """\nc"""\n',
        [Put(("a",), "2"), Put(("b",), "3")],
        "a = 2 # y\nb = 3\n",
    ),
    "a dotted key": ("a . b=1\n", [Put(("a", "b"), "2")], "a . b=2\n"),
    "a quoted key": ("\"a b\".'c' = 1\n", [Put(("a b", "c"), "2")], "\"a b\".'c' = 2\n"),
    "an entry in braces": ("a = {b = 1,c= 2 }\n", [Put(("a", "c"), "3")], "a = {b = 1,c= 3 }\n"),
    "an element of an array": ("a = [1, 2 ]\n", [Put(("a", 1), "3")], "a = [1, 3 ]\n"),
    "a new key follows the last own key": (
        "[[unit]]\n  a = 1 # x\n\n# free\n[unit.sub]\nb = 1\n",
        [Put(("unit", 0, "c"), "2")],
        "[[unit]]\n  a = 1 # x\n  c = 2\n\n# free\n[unit.sub]\nb = 1\n",
    ),
    "after a value on many lines": (
        "[a]\nb = [\n  1,\n] # x\n\n",
        [Put(("a", "c"), "2")],
        "[a]\nb = [\n  1,\n] # x\nc = 2\n\n",
    ),
    "in a table without keys": (
        "\t[a] # x\n[b]\n",
        [Put(("a", "c"), "2")],
        "\t[a] # x\n\tc = 2\n[b]\n",
    ),
    "several in their order": (
        "[a]\nb = 1\n",
        [Put(("a", "z"), "1"), Put(("a", "c"), "2")],
        "[a]\nb = 1\nz = 1\nc = 2\n",
    ),
    "in place of the only key": (
        "[a]\nb = 1\n\n[c]\n",
        [Drop(("a", "b")), Put(("a", "d"), "2")],
        "[a]\nd = 2\n\n[c]\n",
    ),
    "with the line's ending": (
        "[a]\r\nb = 1\r\n",
        [Put(("a", "c"), "2")],
        "[a]\r\nb = 1\r\nc = 2\r\n",
    ),
    "without a final newline": ("[a]\nb = 1", [Put(("a", "c"), "2")], "[a]\nb = 1\nc = 2"),
    "in braces": ("a = { b = 1 }\n", [Put(("a", "c"), "2")], "a = { b = 1, c = 2 }\n"),
    "in empty braces": ("a = {}\n", [Put(("a", "c"), "2")], "a = { c = 2 }\n"),
    "in dotted form": (
        "project . title = 1\nproject.x = 2\nb = 3\n",
        [Put(("project", "c d"), "4")],
        'project . title = 1\nproject.x = 2\nproject."c d" = 4\nb = 3\n',
    ),
    "in a super-table": (
        "x = 1\n\n[a.b]\nc = 1\n",
        [Put(("a", "d"), "2")],
        "x = 1\n\n[a]\nd = 2\n\n[a.b]\nc = 1\n",
    ),
    "before all tables": (
        "# head\n\n[a]\nb = 1\n",
        [Put(("x",), "1"), Put(("y",), "2")],
        "# head\n\nx = 1\ny = 2\n\n[a]\nb = 1\n",
    ),
    "in an empty file": ("", [Put(("x",), "1"), Put(("a", "b"), "2")], "x = 1\n\n[a]\nb = 2\n"),
    "in a byte order mark alone": ("\ufeff", [Put(("x",), "1")], "\ufeffx = 1\n"),
    "a new table": (
        "a = 1\n\n# u\n[[unit]]\nb = 1\n",
        [Put(("limits", "c"), "2")],
        "a = 1\n\n[limits]\nc = 2\n\n# u\n[[unit]]\nb = 1\n",
    ),
    "a new table at the end": (
        "[a]\nb = 1",
        [Put(("limits", "c"), "2")],
        "[a]\nb = 1\n\n[limits]\nc = 2\n",
    ),
    "a new table where there are no blank lines": (
        "[a]\nb = 1\n[[u]]\nc = 1\n",
        [Put(("limits", "c"), "2")],
        "[a]\nb = 1\n[limits]\nc = 2\n[[u]]\nc = 1\n",
    ),
    "a new table inside an element": (
        "[[u]]\n\ta = 1\n\n[[u]]\n",
        [Put(("u", 0, "s", "b"), "2")],
        "[[u]]\n\ta = 1\n\n[u.s]\n\tb = 2\n\n[[u]]\n",
    ),
    "clearing takes the line and its comment": (
        "[a]\n# above\nb = 1 # x\n\nc = 2\n",
        [Drop(("a", "b"))],
        "[a]\n# above\n\nc = 2\n",
    ),
    "clearing takes all lines of a value": (
        "a = [\n 1, # x\n] # y\nb = 2\n",
        [Drop(("a",))],
        "b = 2\n",
    ),
    "clearing a bad value": ("a = 9,440 cfm\nb = 1\n", [Drop(("a",))], "b = 1\n"),
    "clearing a dotted key": ("a.b = 1\na.c = 2\n", [Drop(("a", "b"))], "a.c = 2\n"),
    "clearing a dotted table": ("a.b = 1\nx = 1\na.c.d = 2\n", [Drop(("a",))], "x = 1\n"),
    "clearing the first in braces": (
        "a = { b = 1, c = 2 }\n",
        [Drop(("a", "b"))],
        "a = { c = 2 }\n",
    ),
    "clearing the last in braces": (
        "a = { b = 1, c = 2 }\n",
        [Drop(("a", "c"))],
        "a = { b = 1 }\n",
    ),
    "clearing all in braces": (
        "a = { b = 1, c = 2 }\n",
        [Drop(("a", "c")), Drop(("a", "b"))],
        "a = {}\n",
    ),
    "clearing and adding in braces": (
        "a = {b = 1, c = 2}\n",
        [Drop(("a", "c")), Put(("a", "d"), "3")],
        "a = {b = 1, d = 3}\n",
    ),
    "clearing a table with its sub-tables": (
        "[a]\nb = 1\n\n# x\n[c]\nd = 1\n[c.e]\n\n[f]\n",
        [Drop(("c",))],
        "[a]\nb = 1\n\n[f]\n",
    ),
    "clearing what is not there": (
        "[a]\nb = 1\n",
        [Drop(("a", "c")), Drop(("x", "y"))],
        "[a]\nb = 1\n",
    ),
    "a table written anew": (
        "[a]\nb = 1\n\n[r]\nx = 1\n",
        [Drop(("r",)), Put(("r", "y"), "2")],
        "[a]\nb = 1\n\n[r]\ny = 2\n",
    ),
    "of two values the later": ("a = 1\n", [Put(("a",), "2"), Put(("a",), "3")], "a = 3\n"),
    "a sub-element's key": (
        "[[u]]\n[[u.a]]\nx = 1\n",
        [Put(("u", 0, "a", 0, "x"), "2")],
        "[[u]]\n[[u.a]]\nx = 2\n",
    ),
    "a first sub-element": (
        "[[u]]\nt = 1\n\n# next\n[[u]]\n",
        [Append(("u", 0, "a"), (("x", "1"), ("y", "2")))],
        "[[u]]\nt = 1\n\n[[u.a]]\nx = 1\ny = 2\n\n# next\n[[u]]\n",
    ),
    "a further sub-element, indented like the last": (
        "[[u]]\n  [[u.a]]\n    x = 1\n",
        [Append(("u", 0, "a"), (("x", "2"),))],
        "[[u]]\n  [[u.a]]\n    x = 1\n  [[u.a]]\n    x = 2\n",
    ),
    "sub-elements in brackets": (
        "u = [{a = [{x = 1}]}]\n",
        [Append(("u", 0, "a"), (("x", "2"),))],
        "u = [{a = [{x = 1}, { x = 2 }]}]\n",
    ),
    "first sub-elements in braces": (
        "u = [{t = 1}]\n",
        [Append(("u", 0, "a"), (("x", "1"),)), Append(("u", 0, "a"), (("x", "2"),))],
        "u = [{t = 1, a = [{ x = 1 }, { x = 2 }]}]\n",
    ),
    "an element at the top": (
        "[[a]]\nx = 1\n",
        [Append(("a",), (("x", "2"),))],
        "[[a]]\nx = 1\n\n[[a]]\nx = 2\n",
    ),
    "a sub-element out": (
        "[[u]]\n[[u.a]]\nx = 1\n\n# second\n[[u.a]]\nx = 2\n\n[[u]]\n",
        [Remove(("u", 0, "a", 1))],
        "[[u]]\n[[u.a]]\nx = 1\n\n[[u]]\n",
    ),
    "one sub-element for another": (
        "[[u]]\nt = 1\n\n[[u.a]]\nx = 1\n\n[[u]]\n",
        [Remove(("u", 0, "a", 0)), Append(("u", 0, "a"), (("x", "2"),))],
        "[[u]]\nt = 1\n\n[[u.a]]\nx = 2\n\n[[u]]\n",
    ),
}


@pytest.mark.parametrize(("text", "changes", "expected"), CASES.values(), ids=CASES)
def test_exactly_these_characters(text, changes, expected):
    assert edited(text, *changes) == expected


def test_new_tables_take_their_place_in_the_order_given():
    text = "[project]\na = 1\n\n[[condition]]\nb = 1\n\n[[unit]]\nc = 1\n"
    order = ("format", "project", "limits", "defaults", "condition", "plant", "unit", "record")
    puts = [Put((name, "x"), "1") for name in ("record", "defaults", "limits")]
    puts.append(Append(("plant",), (("x", "1"),)))
    assert edited(text, *puts, order=order) == (
        "[project]\na = 1\n\n[limits]\nx = 1\n\n[defaults]\nx = 1\n\n[[condition]]\nb = 1\n\n"
        "[[plant]]\nx = 1\n\n[[unit]]\nc = 1\n\n[record]\nx = 1\n"
    )


@pytest.mark.parametrize(
    "changes",
    [
        [Put(("a", "b", "c"), "1")],  # through a value
        [Put(("a",), "1 # and more")],
        [Put(("a",), "1\nb = 2")],
        [Put(("a",), '"open')],
        [Put(("a",), " 1")],
        [Put(("t",), "1")],  # a table with a head
        [Put(("u", 5, "x"), "1")],
        [Put(("u", "x"), "1")],
        [Put(("l", 7), "1")],
        [Put(("i", "new"), "9,440")],  # a comma would end it
        [Put(("i",), "1"), Put(("i", "x"), "2")],
        [Remove(("u", 1))],
        [Remove(("t", "x"))],
        [Append(("a",), (("x", "1"),))],
        [Append(("u", 4, "s"), (("x", "1"),))],
        [Append(("u",), (("x", "1 # y"),))],
    ],
)
def test_what_cannot_be_written_is_refused(changes):
    text = "a = 1\nl = [1]\ni = { x = 1 }\n[t]\nx = 1\n[[u]]\nx = 1\n"
    with pytest.raises(SpliceError):
        edited(text, *changes)
