"""Cuts the text of a TOML file into statements, and says where each key and value stands.

It accepts more than TOML: a value that is none is kept with its characters and marked as bad.
It must not know what a schedule is, nor what a value means; tables are put together in `locate`.
"""

from __future__ import annotations

import re
import tomllib
from dataclasses import dataclass, field

DEEPEST = 64  # brackets within brackets, and parts of a key; tomllib recurses for each
LONGEST_NUMBER = 1000  # characters; Python refuses to print integers past 4 300 digits

_BLANK = re.compile(r"(?:[ \t]*(?:#[^\n]*)?\r?\n)*[ \t]*(?:#[^\n]*\Z)?")
_REST = re.compile(r"[ \t]*(?:#[^\n]*)?(?:\n|\r\n|\Z)")
_SPACE = re.compile(r"[ \t]*")
_GAP = re.compile(r"(?:[ \t]|\r?\n|#[^\n]*)*")
_BARE_KEY = re.compile(r"([A-Za-z0-9_-]+)[ \t]*")
_ONE_LINE = {
    '"': re.compile(r'"(?:[^"\\\n]|\\[^\n])*"'),
    "'": re.compile(r"'[^'\n]*'"),
}
_PLAIN = (  # what most values are: TOML without a further look
    r'"[^"\\\x00-\x08\x0a-\x1f\x7f]*"|'
    r"'[^'\x00-\x08\x0a-\x1f\x7f]*'|"
    r"[+-]?(?:0|[1-9][0-9]{0,99})(?:\.[0-9]{1,99})?|true|false"
)
_PLAIN_SCALAR = re.compile(_PLAIN)
_ESCAPE_OR_CLOSE = re.compile(r'\\.|"""', re.DOTALL)


def _up_to(ends: str) -> re.Pattern[str]:
    """Match a plain value that stands before one of `ends`, else whatever stands there."""
    before_end = rf"(?=[ \t]*(?:[#\n{ends}]|\r\n|\Z))"
    return re.compile(rf"[ \t]*(?:(?P<plain>{_PLAIN}){before_end}|[^#\n{ends}]*)")


_IN_LINE, _IN_ARRAY, _IN_TABLE = map(_up_to, ("", r",\]", ",}"))
_BRACKET_OR_QUOTE = re.compile(r"""[\[\]{}"'#\n]""")
# A line inside an array that can only be the next statement: the array was never closed.
_STATEMENT = re.compile(
    r"[ \t]*(?:[A-Za-z0-9_.-]+[ \t]*=|"
    r"\[{1,2}[ \t]*(?!(?:true|false|inf|nan)\b)[A-Za-z_][A-Za-z0-9_. \t-]*\]{1,2}"
    r"[ \t]*(?:#[^\n]*)?(?:\r?\n|\Z))",
)


@dataclass(frozen=True, slots=True)
class Value:
    """The characters of one value: `text[start:end]`.

    Args:
        start: offset of its first character.
        end: offset past its last.
        kind: "scalar", "array" or "table" (an inline one).
        bad: whether it is no TOML; what it holds is then not looked into.
        items: the elements of an array.
        pairs: the entries of an inline table.
    """

    start: int
    end: int
    kind: str = "scalar"
    bad: bool = False
    items: tuple[Value, ...] = ()
    pairs: tuple[Pair, ...] = ()


@dataclass(frozen=True, slots=True)
class Pair:
    """A key with its value.

    Args:
        start: offset of the key's first character.
        keys: the key's parts, unquoted.
        ends: offset past each part.
        value: the value.
    """

    start: int
    keys: tuple[str, ...]
    ends: tuple[int, ...]
    value: Value

    @property
    def end(self) -> int:
        """Return the offset past the value."""
        return self.value.end


@dataclass(frozen=True, slots=True)
class Head:
    """The head of a table, `[a.b]` or `[[a.b]]`.

    Args:
        start: offset of its first bracket.
        end: offset past its last.
        keys: the parts of its name, unquoted; empty where the head is at fault.
        array: whether it has double brackets.
    """

    start: int
    end: int
    keys: tuple[str, ...]
    array: bool


@dataclass(frozen=True, slots=True)
class Fault:
    """Characters that keep the file from being read: `text[start:end]`, and why."""

    start: int
    end: int
    at: int
    why: str


@dataclass(frozen=True, slots=True)
class Scan:
    """The statements of a text in order, and what stood between them and could not be read."""

    statements: tuple[Head | Pair, ...]
    faults: tuple[Fault, ...] = field(default=())


class _Unreadable(Exception):
    """What stands at `at` cannot be read; `resume` is where the next statement may begin."""

    def __init__(self, at: int, why: str, resume: int) -> None:
        self.at = at
        self.why = why
        self.resume = resume
        super().__init__(why)


def scan(text: str) -> Scan:
    r"""Return the statements of a TOML text.

    >>> found = scan("[a]\nb = 9,440 # as typed\n")
    >>> found.statements[1].value
    Value(start=8, end=13, kind='scalar', bad=True, items=(), pairs=())
    """
    statements: list[Head | Pair] = []
    faults: list[Fault] = []
    at = 1 if text.startswith("\ufeff") else 0
    while (at := _past(_BLANK, text, at)) < len(text):
        read = _head if text[at] == "[" else _pair
        try:
            statement = read(text, at)
        except _Unreadable as fault:
            end = max(fault.resume, at + 1)
            faults.append(Fault(at, end, fault.at, fault.why))
            if read is _head:
                statements.append(Head(at, end, (), array=False))
            at = end
            continue
        statements.append(statement)
        at = statement.end
    return Scan(tuple(statements), tuple(faults))


def next_line(text: str, at: int) -> int:
    """Return the offset of the line after the one that holds offset `at`."""
    end = text.find("\n", at)
    return len(text) if end < 0 else end + 1


def line_start(text: str, at: int) -> int:
    """Return the offset of the first character of a line, past a byte order mark."""
    start = text.rfind("\n", 0, at) + 1
    return start + 1 if start == 0 and text.startswith("\ufeff") else start


def _past(pattern: re.Pattern[str], text: str, at: int) -> int:
    found = pattern.match(text, at)
    return found.end() if found else at


def _head(text: str, start: int) -> Head:
    array = text.startswith("[[", start)
    brackets = "]]" if array else "]"
    keys, _, at = _keys(text, _past(_SPACE, text, start + len(brackets)))
    if not text.startswith(brackets, at):
        raise _Unreadable(
            start,
            f"the head of this table does not end in {brackets}",
            next_line(text, at),
        )
    end = at + len(brackets)
    if not _REST.match(text, end):
        why = "more than a comment follows the head of this table"
        raise _Unreadable(start, why, next_line(text, at))
    return Head(start, end, keys, array)


def _pair(text: str, start: int) -> Pair:
    keys, ends, at = _keys(text, start)
    if not text.startswith("=", at):
        why = "a line must be a key, =, and a value; here the = is not found after the key"
        raise _Unreadable(start, why, next_line(text, at))
    value = _value(text, at + 1, _IN_LINE, 0)
    if not _REST.match(text, value.end):
        # Something follows the value: the two together are what was typed.
        value = Value(value.start, _bare_end(text, value.end, _IN_LINE), bad=True)
    return Pair(start, keys, ends, value)


def _keys(text: str, at: int) -> tuple[tuple[str, ...], tuple[int, ...], int]:
    """Return the parts of a key, the offset past each, and that of what follows the key."""
    keys: list[str] = []
    ends: list[int] = []
    while True:
        key, end, at = _key(text, at)
        keys.append(key)
        ends.append(end)
        if not text.startswith(".", at):
            return tuple(keys), tuple(ends), at
        if len(keys) == DEEPEST:
            raise _Unreadable(end, f"a key of more than {DEEPEST} parts", next_line(text, end))
        at = _past(_SPACE, text, at + 1)


def _key(text: str, at: int) -> tuple[str, int, int]:
    """Return one part of a key, the offset past it, and that of what follows it."""
    found = _BARE_KEY.match(text, at)
    if found:
        return found[1], found.end(1), found.end()
    quote = text[at : at + 1]
    if quote not in _ONE_LINE:
        why = "a key is letters, digits, _ and -, or stands in quotes; here none is found"
        raise _Unreadable(at, why, next_line(text, at))
    found = _ONE_LINE[quote].match(text, at)
    if not found or not is_toml(found.group()):
        raise _Unreadable(at, "this quoted key is no TOML", next_line(text, at))
    key = str(tomllib.loads(f"v = {found.group()}")["v"])
    return key, found.end(), _past(_SPACE, text, found.end())


def _value(text: str, after_equals: int, within: re.Pattern[str], depth: int) -> Value:
    found = within.match(text, after_equals)
    if found and found["plain"]:
        return Value(*found.span("plain"))
    start = _past(_SPACE, text, after_equals)
    first = text[start : start + 1]
    if first in _ONE_LINE:
        end = _string_end(text, start, first)
        return Value(start, end, bad=not is_toml(text[start:end]))
    if first in ("[", "{"):
        if depth == DEEPEST:
            why = f"brackets nested more than {DEEPEST} deep"
            raise _Unreadable(start, why, next_line(text, start))
        return (_array if first == "[" else _table)(text, start, depth + 1)
    end = _bare_end(text, start, within)
    if end <= start:
        return Value(after_equals, after_equals, bad=True)
    return Value(start, end, bad=not is_toml(text[start:end]))


def _bare_end(text: str, start: int, within: re.Pattern[str]) -> int:
    end = _past(within, text, start)
    if text[end : end + 1] == "\n" and text[end - 1] == "\r":
        end -= 1
    return start + len(text[start:end].rstrip(" \t"))


def is_toml(raw: str) -> bool:
    """Return whether the characters are one scalar of TOML that Python can hold and print.

    >>> [is_toml(raw) for raw in ("9440", "9,440", '"AHU-1"', "2026-02-30", "")]
    [True, False, True, False, False]
    """
    if _PLAIN_SCALAR.fullmatch(raw):
        return True
    if raw[:1] not in _ONE_LINE and len(raw) > LONGEST_NUMBER:
        return False
    try:
        return list(tomllib.loads(f"v = {raw}")) == ["v"]
    except ValueError:
        return False


def _string_end(text: str, start: int, quote: str) -> int:
    if text.startswith(quote * 3, start):
        return _long_string_end(text, start, quote)
    found = _ONE_LINE[quote].match(text, start)
    if not found:
        why = f"the string that begins here is not closed: {quote} is missing"
        raise _Unreadable(start, why, next_line(text, start))
    return found.end()


def _long_string_end(text: str, start: int, quote: str) -> int:
    at = start + 3
    if quote == "'":
        at = text.find("'''", at)
        end = at + 3 if at >= 0 else -1
    else:
        end = -1
        for found in _ESCAPE_OR_CLOSE.finditer(text, at):
            if found.group() == '"""':
                end = found.end()
                break
    if end < 0:
        why = f"the string that begins here is not closed: {quote * 3} is missing"
        raise _Unreadable(start, why, len(text))
    # One or two quotes may stand directly before the closing three.
    return end + next((n for n in (2, 1) if text.startswith(quote * n, end)), 0)


def _array(text: str, start: int, depth: int) -> Value:
    items: list[Value] = []
    bad = False
    at = start + 1
    separated = True
    while True:
        at = _in_array(text, start, at)
        char = text[at]
        if char == "]":
            return Value(start, at + 1, "array", bad, () if bad else tuple(items))
        if char == ",":
            bad = bad or separated
            separated = True
            at += 1
            continue
        item = _value(text, at, _IN_ARRAY, depth)
        bad = bad or item.bad or not separated
        separated = False
        items.append(item)
        at = item.end


def _in_array(text: str, start: int, at: int) -> int:
    """Return where the next thing of an array stands, unless the array was never closed."""
    to = _past(_GAP, text, at)
    if to >= len(text):
        raise _Unreadable(start, "the array that begins here is not closed: ] is missing", to)
    newline = text.rfind("\n", at, to)
    if newline >= 0 and _STATEMENT.match(text, newline + 1):
        why = "the array that begins here is not closed before the next statement"
        raise _Unreadable(start, why, newline + 1)
    return to


def _table(text: str, start: int, depth: int) -> Value:
    pairs: list[Pair] = []
    at = _past(_SPACE, text, start + 1)
    if text.startswith("}", at):
        return Value(start, at + 1, "table")
    while True:
        try:
            keys, ends, equals = _keys(text, at)
        except _Unreadable:
            return _bad_table(text, start)
        if not text.startswith("=", equals):
            return _bad_table(text, start)
        value = _value(text, equals + 1, _IN_TABLE, depth)
        pairs.append(Pair(at, keys, ends, value))
        at = _past(_SPACE, text, value.end)
        if text.startswith("}", at):
            return Value(start, at + 1, "table", pairs=tuple(pairs))
        if not text.startswith(",", at):
            return _bad_table(text, start)
        at = _past(_SPACE, text, at + 1)


def _bad_table(text: str, start: int) -> Value:
    """Return an inline table that is no TOML, which must at least be closed on its line."""
    depth = 0
    at = start
    while found := _BRACKET_OR_QUOTE.search(text, at):
        char = found.group()
        at = found.end()
        if char in "#\n":
            break
        if char in _ONE_LINE:
            quoted = _ONE_LINE[char].match(text, found.start())
            at = quoted.end() if quoted else at
            continue
        depth += 1 if char in "[{" else -1
        if depth == 0:
            return Value(start, at, bad=True)
    why = "the table that begins here is not closed on its line: } is missing"
    raise _Unreadable(start, why, next_line(text, start))
