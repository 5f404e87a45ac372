"""Random edits of documents in every TOML form; the values are checked by the standard library."""

from __future__ import annotations

import random
import tomllib

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from schedtui.schedule.toml_source import (
    Append,
    Arrange,
    BadValue,
    Drop,
    Kind,
    Piece,
    Put,
    Remove,
    read_source,
    splice,
)

RAWS = ("66.0", '"new # ]"', "[1, 2]", "{ a = 1 }", "true", "0x1F", "2026-12-01", '"""a\nb"""')


def clone(value):
    """Return values with bad ones as marked strings, so that they compare by their text."""
    if isinstance(value, dict):
        return {key: clone(inner) for key, inner in value.items()}
    if isinstance(value, list):
        return [clone(inner) for inner in value]
    return ("bad", value.raw) if isinstance(value, BadValue) else value


def pruned(value):
    """Return values without empty tables and arrays in tables: clearing may leave either."""
    if isinstance(value, dict):
        inner = {key: pruned(entry) for key, entry in value.items()}
        return {key: entry for key, entry in inner.items() if entry not in ({}, [])}
    return [pruned(entry) for entry in value] if isinstance(value, list) else value


def equal(one, other):
    """Compare by type too (1, 1.0 and true differ), whatever the order of keys."""
    if isinstance(one, dict) and isinstance(other, dict):
        return one.keys() == other.keys() and all(equal(one[key], other[key]) for key in one)
    if isinstance(one, list) and isinstance(other, list):
        return len(one) == len(other) and all(map(equal, one, other))
    return repr(one) == repr(other)


def values_of(text):
    """Return the values of a result, by the standard library wherever it can read them."""
    try:
        return tomllib.loads(text.removeprefix("\ufeff"))
    except tomllib.TOMLDecodeError:
        return clone(read_source(text).values)


def at(values, path):
    for key in path:
        values = values[key]
    return values


def middle(old, new):
    """Return the lines in which two texts differ, line endings aside."""
    before = old.removeprefix("\ufeff").replace("\r\n", "\n").split("\n")
    after = new.removeprefix("\ufeff").replace("\r\n", "\n").split("\n")
    while before and after and before[0] == after[0]:
        del before[0], after[0]
    while before and after and before[-1] == after[-1]:
        del before[-1], after[-1]
    return before, after


def assert_line_endings(old, new):
    if "\r\n" in old and "\n" not in old.replace("\r\n", ""):
        added = new.replace("\r\n", "")
        assert "\n" not in added.replace('"""a\nb"""', ""), "a line ending of another kind"
    assert new.startswith("\ufeff") == old.startswith("\ufeff")


def keys_in(source):
    return [path for path, place in source.paths().items() if place.kind is Kind.VALUE]


def inside_brackets(source, path):
    """Tell whether a path lies in an inline table or an inline array."""
    places = source.paths()
    return any(path[:n] in places and places[path[:n]].value for n in range(1, len(path)))


def tables_in(values, path=()):
    if isinstance(values, dict):
        yield path
        for key, inner in values.items():
            yield from tables_in(inner, (*path, key))
    elif isinstance(values, list) and all(isinstance(inner, dict) for inner in values):
        for place, inner in enumerate(values):
            yield from tables_in(inner, (*path, place))


def chances(seed):
    return random.Random(seed)  # noqa: S311  edits, not secrets


def check_change(source, chance):
    path = chance.choice(keys_in(source))
    raw = chance.choice(RAWS)
    old = source.raw(path)
    result = splice(source, [Put(path, raw)])
    value = source.paths()[path].value
    middle_text = raw if old else f" {raw}"
    assert result.replace(" #", "#") == (
        source.text[: value.start] + middle_text + source.text[value.end :]
    ).replace(" #", "#")
    expected = clone(source.values)
    at(expected, path[:-1])[path[-1]] = tomllib.loads(f"v = {raw}")["v"]
    assert equal(values_of(result), expected)
    again = splice(read_source(result), [Put(path, old)])
    assert equal(values_of(again), clone(source.values))
    if old:
        assert again == source.text


def check_new_key(source, chance):
    table = chance.choice(list(tables_in(source.values)))
    path = (*table, "new key")
    result = splice(source, [Put(path, "66.0")])
    expected = clone(source.values)
    at(expected, table)["new key"] = 66.0
    assert equal(values_of(result), expected)
    assert_line_endings(source.text, result)
    gone, come = middle(source.text, result)
    come = [line for line in come if line.strip()]
    if inside_brackets(source, path):
        assert len(gone) == len(come) == 1
    elif table and source.paths()[table].kind is Kind.IMPLIED:
        assert (len(gone), len(come)) == (0, 2), "a head and the key"
    else:
        assert (gone, len(come)) == ([], 1)
    assert any('"new key" = 66.0' in line for line in come)
    back = splice(read_source(result), [Drop(path)])
    assert equal(pruned(values_of(back)), pruned(clone(source.values)))
    if (gone, len(middle(source.text, result)[1])) == ([], 1):
        endings = {source.text, source.text + "\n", source.text + "\r\n"}
        assert back in endings


def check_clearing(source, chance):
    path = chance.choice(keys_in(source))
    pair = source.paths()[path].pair
    result = splice(source, [Drop(path)])
    expected = clone(source.values)
    del at(expected, path[:-1])[path[-1]]
    assert equal(pruned(values_of(result)), pruned(expected))
    gone, come = middle(source.text, result)
    if inside_brackets(source, path):
        assert len(come) <= 1
    else:
        assert [line for line in come if line.strip()] == []
        lines = 1 + source.text.count("\n", pair.start, pair.end)
        assert len(gone) - len(come) == lines or not source.text.endswith("\n")
    back = splice(read_source(result), [Put(path, source.raw(path))])
    assert equal(pruned(values_of(back)), pruned(clone(source.values)))


def check_new_table(source, chance):
    order = chance.choice(((), ("format", "project", "fresh", "limits", "condition", "unit")))
    result = splice(source, [Put(("fresh", "a"), "1"), Put(("fresh", "b"), "2")], order=order)
    expected = clone(source.values) | {"fresh": {"a": 1, "b": 2}}
    assert equal(values_of(result), expected)
    assert_line_endings(source.text, result)
    gone, come = middle(source.text, result)
    assert gone in ([], [""])
    assert [line for line in come if line.strip()] == ["[fresh]", "a = 1", "b = 2"]
    back = splice(read_source(result), [Drop(("fresh",))])
    assert equal(values_of(back), clone(source.values))


def pieces_of(source, array, count, chance):
    """Return random pieces, with the values that each stands for."""
    own = clone(source.values).get(array, [])
    places = [place for place in range(count) if chance.random() < 0.8]
    if chance.random() < 0.5:
        chance.shuffle(places)
    made = [(Piece(place), own[place]) for place in places]
    for _ in range(chance.choice((0, 0, 1, 2))):
        where = chance.randint(0, len(made))
        kind = chance.random()
        put = Put(("added",), "1.50")
        if kind < 0.4 or not count:
            made.insert(where, (Piece(None, None, (put,)), {"added": 1.5}))
            continue
        place = chance.randrange(count)
        if kind < 0.7:
            made.insert(where, (Piece(None, source.block(array, place)), own[place]))
        elif place in places:
            made.append((Piece(place, None, (put,)), own[place] | {"added": 1.5}))
    return [piece for piece, _ in made], [values for _, values in made]


def check_arrangement(source, chance):
    array = chance.choice(("unit", "condition", "plant"))
    count = len(source.values.get(array, []))
    pieces, wanted = pieces_of(source, array, count, chance)
    result = splice(source, [Arrange(array, tuple(pieces))])
    expected = clone(source.values) | {array: wanted}
    assert equal(pruned(values_of(result)), pruned(expected))
    assert_line_endings(source.text, result)
    for piece in pieces:
        if piece.origin is not None and not piece.changes and count:
            for line in source.block(array, piece.origin).strip().splitlines():
                assert line in result
    back = [Piece(None, source.block(array, place)) for place in range(count)]
    again = splice(read_source(result), [Arrange(array, tuple(back))])
    assert equal(pruned(values_of(again)), pruned(clone(source.values)))


def check_acceptances(source, chance):
    units = source.values.get("unit", [])
    if not units:
        return
    place = chance.randrange(len(units))
    path = ("unit", place, "accepted")
    changes = [Append(path, (("check", '"y"'), ("by", "'ab'")))]
    wanted = clone(units[place].get("accepted", []))
    if wanted and chance.random() < 0.5:
        first = chance.randrange(len(wanted))
        changes.append(Remove((*path, first)))
        del wanted[first]
    result = splice(source, changes)
    expected = clone(source.values)
    expected["unit"][place]["accepted"] = [*wanted, {"check": "y", "by": "ab"}]
    assert equal(values_of(result), expected)
    assert_line_endings(source.text, result)
    back = splice(read_source(result), [Remove((*path, len(wanted)))])
    expected["unit"][place]["accepted"] = wanted
    assert equal(pruned(values_of(back)), pruned(expected))


def check_many(source, chance):
    paths = keys_in(source)
    chosen = chance.sample(paths, min(len(paths), 5))
    apart = [p for p in chosen if not any(p[: len(q)] == q for q in chosen if q != p)]
    expected = clone(source.values)
    changes = []
    for path in apart:
        holder = at(expected, path[:-1])
        if chance.random() < 0.5:
            changes.append(Drop(path))
            del holder[path[-1]]
        else:
            changes.append(Put(path, "1_000.5"))
            holder[path[-1]] = 1000.5
    for table in chance.sample(list(tables_in(source.values)), 1):
        if not any(table[: len(path)] == path for path in apart):
            changes.append(Put((*table, "one"), "1"))
            changes.append(Put((*table, "two"), "'2'"))
            at(expected, table).update(one=1, two="2")
    result = splice(source, changes)
    assert equal(pruned(values_of(result)), pruned(expected))
    assert_line_endings(source.text, result)


CHECKS = {
    "change": check_change,
    "new key": check_new_key,
    "clearing": check_clearing,
    "new table": check_new_table,
    "arrangement": check_arrangement,
    "acceptances": check_acceptances,
    "many at once": check_many,
}


@pytest.mark.parametrize("kind", CHECKS)
def test_an_edit_changes_what_it_should_and_nothing_else(documents, kind):
    for seed, made in enumerate(documents):
        source = read_source(made.text)
        if keys_in(source):
            CHECKS[kind](source, chances(seed))


@given(st.integers(10_000, 10_000_000), st.sampled_from(sorted(CHECKS)))
@settings(max_examples=60, deadline=None)
def test_edits_of_documents_nobody_has_looked_at(make_document, seed, kind):
    source = read_source(make_document(seed).text)
    if keys_in(source):
        CHECKS[kind](source, chances(seed))


def test_no_change_gives_the_same_characters(documents):
    for made in documents:
        assert splice(read_source(made.text), []) == made.text
