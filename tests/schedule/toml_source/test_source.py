"""Values and places, held against the standard library's parser and TOML's own examples."""

from __future__ import annotations

import re
import tomllib
from collections import Counter

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from schedtui.errors import Problem, ScheduleError
from schedtui.schedule.toml_source import BadValue, Kind, read_source

PIECES = (
    '"', "'", '"""', "'''", "[", "]", "[[", "]]", "{", "}", "=", ",", "#", ".", "\n", "\r\n",
    "\r", "\\", "\x00", "\t", " ", "a", "[unit]\n", "[[unit]]\n", "k1 = 2\n", "\ufeff", "é", "[\n",
)  # fmt: skip


def marked(values):
    """Return values with each bad one as the marked string of the document's maker."""
    if isinstance(values, dict):
        return {key: marked(inner) for key, inner in values.items()}
    if isinstance(values, list):
        return [marked(inner) for inner in values]
    return f"@bad:{values.raw}" if isinstance(values, BadValue) else values


CONTROL = re.compile(r"[\x00-\x08\x0b\x0c\x0e-\x1f\x7f]|\r(?!\n)")


def at(values, path):
    for key in path:
        values = values[key]
    return values


def problems(text):
    with pytest.raises(ScheduleError) as caught:
        read_source(text)
    return [(problem.line, str(problem)) for problem in caught.value.problems]


def assert_places_hold(text):
    """Each value's characters, read alone by the standard library, are that value."""
    source = read_source(text)
    for path, place in source.paths().items():
        value = at(source.values, path)
        if place.value is None:
            assert isinstance(value, dict | list)
        elif isinstance(value, BadValue):
            assert (source.raw(path), source.line(path)) == (value.raw, value.line)
        elif "bad" not in repr(marked(value)):
            # A control character in a comment inside a value is borne; the library refuses it.
            raw = CONTROL.sub(" ", source.raw(path))
            alone = tomllib.loads(f"v = {raw}")["v"]
            assert repr(alone) == repr(value)
    return source


def paths_of(values, path=()):
    if path:
        yield path
    if isinstance(values, dict | list):
        entries = values.items() if isinstance(values, dict) else enumerate(values)
        for key, inner in entries:
            yield from paths_of(inner, (*path, key))


def test_every_form_is_made(documents, forms):
    counted = sum((made.forms for made in documents), Counter())
    assert len(forms) >= 14
    assert {form for form in forms if not counted[form]} == set()


def test_values_are_those_of_the_standard_library(documents):
    for made in documents:
        assert repr(marked(read_source(made.text).values)) == repr(made.values)


def test_every_value_has_its_place(documents):
    for made in documents:
        source = assert_places_hold(made.text)
        assert set(source.paths()) == set(paths_of(source.values))


@given(st.integers(10_000, 10_000_000), st.randoms(use_true_random=False))
@settings(max_examples=150, deadline=None)
def test_damaged_documents_are_read_rightly_or_refused_with_lines(make_document, seed, chance):
    text = make_document(seed).text
    for _ in range(chance.randint(1, 3)):
        cut = chance.randint(0, len(text))
        text = text[:cut] + chance.choice(PIECES) + text[cut + chance.choice((0, 0, 1, 4)) :]
    try:
        expected = tomllib.loads(text.removeprefix("\ufeff"))
    except tomllib.TOMLDecodeError:
        expected = None
    refused: tuple[Problem, ...] = ()
    try:
        source = assert_places_hold(text)
        assert expected is None or repr(expected) == repr(source.values)
    except ScheduleError as error:
        refused = error.problems
    assert not refused or expected is None, "what the standard library reads must not be refused"
    assert all(1 <= problem.line <= text.count("\n") + 1 for problem in refused)


@pytest.mark.parametrize(
    "raw",
    [
        "9,440", "80.1 °F", "1/2", "nothing", "", "abc def", "01", "1.", ".5", "1__0", "True",
        '"a" "b"', "2026-02-30", "[1] 2", "[1 2]", "[1, abc]", "[,]", "{ a = 9,440 }", "{ a = 1, }",
        '"\\q"', '"a\tb\x01"', "9" * 5000, "0x" + "f" * 5000, "1" * 2000 + ".5", "1\r2", "]", "= 2",
    ],
)  # fmt: skip
def test_a_value_that_is_no_toml_is_kept_as_typed(raw):
    source = read_source(f"before = 1\nkey = {raw}  # 9,441\nafter = 2\n")
    assert source.values == {"before": 1, "key": BadValue(raw, 2), "after": 2}
    assert source.raw(("key",)) == raw


def test_a_bad_value_in_an_inline_table_is_that_entry_only():
    source = read_source("limits = { a = 9.440.1, b = , c = 3 }\n")
    bad = {"a": BadValue("9.440.1", 1), "b": BadValue("", 1), "c": 3}
    assert source.values == {"limits": bad}


def test_a_bad_value_on_many_lines_is_kept():
    source = read_source('remarks = [\n  "1",\n  two,\n] # x\nlong = """\n\\q"""\nafter = 1\n')
    assert source.values == {
        "remarks": BadValue('[\n  "1",\n  two,\n]', 1),
        "long": BadValue('"""\n\\q"""', 5),
        "after": 1,
    }
    assert source.line(("after",)) == 7


def test_control_characters_in_a_comment_do_no_harm():
    source = read_source("a = 1 # \x1b[31m\n# \x00\nb = [ # \x07\n 1]\n")
    assert source.values == {"a": 1, "b": [1]}


@pytest.mark.parametrize(
    ("text", "line", "words"),
    [
        ("a = 1\n[unit\nb = 2\n", 2, "does not end in ]"),
        ("[[unit]\n", 1, "does not end in ]]"),
        ("\n[unit] x\n", 2, "more than a comment"),
        ("[]\n", 1, "a key is letters"),
        ("ok = 1\nsupply airflow = 2\n", 2, "a line must be a key"),
        ("supply_airflow 9440\n", 1, "a line must be a key"),
        ("= 3\n", 1, "a key is letters"),
        ('"a\\q" = 3\n', 1, "quoted key"),
        ('a = "open\nb = 1\n', 1, "string"),
        ("a = 'open\n", 1, "string"),
        ('a = """open\nb = 1\n', 1, '"""'),
        ("a = '''open\nb = 1\n", 1, "'''"),
        ("a = [1,\nb = 2\n", 1, "not closed before the next statement"),
        ("a = [1,\n\n[[unit]]\nb = 2\n", 1, "not closed before the next statement"),
        ("a = [1, 2", 1, "] is missing"),
        ("a = { b = 1\nc = 2\n", 1, "} is missing"),
        ("a = 1\nb = 2\na = 3\n", 3, "stated twice"),
        ("a = 1\na = 3", 2, "stated twice"),
        ("a = {b = 1, b = 2}\n", 1, "stated twice"),
        ("[a]\nb = 1\n[c]\n[a]\nb = 2\n", 4, "stands above"),
        ("a = 1\n[a]\n", 2, "stands above"),
        ("[[a]]\n[a]\n", 2, "stands above"),
        ("a = " + "[" * 1000 + "]" * 1000 + "\n", 1, "nested"),
        ("a = " + "{a=" * 1000 + "1" + "}" * 1000 + "\n", 1, "nested"),
        (".".join("a" * 2000) + " = 1\n", 1, "parts"),
        ("[" + ".".join("a" * 2000) + "]\n", 1, "parts"),
        ("a = 1\r[b]\rc = 2", 1, ""),
    ],
)  # fmt: skip
def test_what_keeps_a_file_from_being_read_is_named_with_its_line(text, line, words):
    if not words:
        # A carriage return alone ends no line in TOML: all of it is one value.
        assert read_source(text).values == {"a": BadValue("1\r[b]\rc = 2", 1)}
        return
    found = problems(text)
    assert [at for at, _ in found] == [line]
    assert words in found[0][1]


def test_all_problems_are_listed_in_the_order_of_their_lines():
    text = '[a]\nx = 1\nx = 2\ny = "open\n[b\nx = 1\nx = 2\n[a]\nx = 1\n[c]\nx 1\n'
    assert [line for line, _ in problems(text)] == [3, 4, 5, 8, 11]


def test_many_problems_do_not_take_a_parse_each():
    assert 1 <= len(problems("a = 1\n" * 500)) <= 25


def test_tables_are_placed_by_how_they_are_written():
    text = '[a.b]\nx.y = 1\n[[u]]\n[u.s]\n[[u]]\n[[u.t]]\nk = [{v = 1}]\n["q r"]\n'
    source = read_source(text)
    kinds = {path: place.kind for path, place in source.paths().items()}
    assert kinds == {
        ("a",): Kind.IMPLIED,
        ("a", "b"): Kind.HEAD,
        ("a", "b", "x"): Kind.DOTTED,
        ("a", "b", "x", "y"): Kind.VALUE,
        ("u",): Kind.HEADS,
        ("u", 0): Kind.HEAD,
        ("u", 0, "s"): Kind.HEAD,
        ("u", 1): Kind.HEAD,
        ("u", 1, "t"): Kind.HEADS,
        ("u", 1, "t", 0): Kind.HEAD,
        ("u", 1, "t", 0, "k"): Kind.VALUE,
        ("u", 1, "t", 0, "k", 0): Kind.ITEM,
        ("u", 1, "t", 0, "k", 0, "v"): Kind.VALUE,
        ("q r",): Kind.HEAD,
    }


def test_lines_are_those_of_values_and_of_heads_and_what_is_absent_has_its_tables():
    source = read_source('\ufeffformat = 1\r\n\r\n# u\r\n[[unit]]\r\ntag = "A"\r\n')
    assert source.line(("format",)) == 1
    assert source.line(("unit", 0)) == source.line(("unit",)) == 4
    assert source.line(("unit", 0, "tag")) == 5
    assert source.line(("unit", 0, "supply_airflow")) == 4
    assert source.line(("project", "title")) == 1


def test_the_characters_of_a_table_with_a_head_are_nobodys():
    source = read_source("[a]\nb = 1\n")
    with pytest.raises(KeyError):
        source.raw(("a",))
    with pytest.raises(KeyError):
        source.block("a", 0)


def test_a_block_runs_between_the_comments_that_touch_heads():
    text = (
        "format = 1\n# not this: a blank line follows\n\n# A\n  # also A\n[[unit]]\nn = 1\n\n"
        "# free\n\n[[unit.accepted]]\nc = 1\n# B\n[[unit]]\nn = 2\n[limits]\n[unit.sub]\nm = 1\n"
    )
    source = read_source(text)
    a, b = text.index("# A"), text.index("# B")
    assert source.block("unit", 0) == text[a:b]
    assert source.block("unit", 1) == "# B\n[[unit]]\nn = 2\n[unit.sub]\nm = 1\n"
    inline = read_source("unit = [ {n = 1}, { n = 2 } ]")
    assert inline.block("unit", 1) == "{ n = 2 }"
