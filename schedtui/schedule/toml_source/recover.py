"""Gives the values of a TOML text, with those that are no TOML kept as they were typed.

The values come from the standard library's parser: each bad one is covered by an empty string
before it reads the text, and put back afterwards. What the parser still refuses, and what
could not be scanned, is listed with its line. What a value should be is not known here.
"""

from __future__ import annotations

import re
import tomllib
from bisect import bisect_right
from dataclasses import dataclass
from typing import TYPE_CHECKING, Any

from schedtui.errors import Problem
from schedtui.schedule.toml_source.scan import Fault, Head, Pair, Scan, Value

if TYPE_CHECKING:
    from collections.abc import Iterator, Sequence

MOST_PROBLEMS = 20  # refused statements listed; each costs another parse of the text

_CONTROL = re.compile(r"[\x00-\x08\x0b\x0c\x0e-\x1f\x7f]|\r(?!\n)")
_LINE = re.compile(r"\(at line (\d+), column \d+\)")


@dataclass(frozen=True, slots=True)
class BadValue:
    """A value that is no TOML.

    Args:
        raw: its characters as they stand in the file; empty where nothing was typed.
        line: its line, from 1.
    """

    raw: str
    line: int


@dataclass(frozen=True, slots=True)
class _Cover:
    start: int
    end: int
    text: str


def recover(
    text: str,
    scan: Scan,
    lines: Sequence[int],
) -> tuple[dict[str, Any], list[Problem]]:
    """Return the values, each bad one as an empty string, and what keeps the text from being read.

    Args:
        text: the text.
        scan: its statements.
        lines: offsets of its line feeds.
    """
    problems = [_unscanned(text, fault, lines) for fault in scan.faults]
    covers = [*_bad_values(text, scan.statements), *_unreadable(text, scan)]
    covers += _control_characters(text, scan.statements)
    values: dict[str, Any] = {}
    while len(problems) <= MOST_PROBLEMS:
        try:
            values = tomllib.loads(_covered(text, covers))
            break
        except tomllib.TOMLDecodeError as error:
            index = _statement_at(str(error), scan.statements, lines)
            if index is None:
                problems.append(Problem(0, "", "", "", f"no TOML: {error}"))
                break
            problems.append(_refused(scan.statements[index], lines))
            covers.append(_statement_cover(text, scan.statements, index))
    return values, sorted(problems, key=lambda problem: problem.line)


def _unscanned(text: str, fault: Fault, lines: Sequence[int]) -> Problem:
    typed = text[fault.start : fault.end].split("\n", 1)[0].strip()
    return Problem(_line(fault.at, lines), "", "", typed[:60], fault.why)


def _refused(statement: Head | Pair, lines: Sequence[int]) -> Problem:
    name = ".".join(statement.keys)
    line = _line(statement.start, lines)
    if isinstance(statement, Head):
        return Problem(line, "", f"[{name}]", "", "this table, or a key of its name, stands above")
    why = "this key, or one inside its value, is stated twice in its table"
    return Problem(line, "", name, "", why)


def _line(offset: int, lines: Sequence[int]) -> int:
    return 1 + bisect_right(lines, offset - 1)


def _statement_at(
    error: str,
    statements: Sequence[Head | Pair],
    lines: Sequence[int],
) -> int | None:
    """Return the last statement that begins at or before the line an error names."""
    found = _LINE.search(error)
    line = int(found.group(1)) if found else len(lines) + 1
    end = lines[line - 1] if line <= len(lines) else float("inf")
    index = bisect_right(statements, end, key=lambda statement: statement.start) - 1
    return index if index >= 0 else None


def _bad_values(text: str, statements: Sequence[Head | Pair]) -> list[_Cover]:
    bad = (leaf for leaf in leaves(statements) if leaf.bad)
    # Line feeds stay, so that the lines the parser names are the file's.
    return [
        _Cover(leaf.start, leaf.end, '"""' + "\n" * count + '"""' if count else '""')
        for leaf in bad
        for count in (text.count("\n", leaf.start, leaf.end),)
    ]


def leaves(statements: Sequence[Head | Pair]) -> Iterator[Value]:
    """Yield every value that holds no other, and every bad one, in the order of the text."""
    for statement in statements:
        if isinstance(statement, Pair):
            yield from _leaves(statement.value)


def _leaves(value: Value) -> Iterator[Value]:
    if value.bad or not (value.items or value.pairs):
        yield value
        return
    for item in value.items:
        yield from _leaves(item)
    for pair in value.pairs:
        yield from _leaves(pair.value)


def _blank(text: str, start: int, end: int) -> _Cover:
    return _Cover(start, end, "\n" * text.count("\n", start, end))


def _unreadable(text: str, scan: Scan) -> list[_Cover]:
    covers = [_blank(text, fault.start, fault.end) for fault in scan.faults]
    for index, statement in enumerate(scan.statements):
        if isinstance(statement, Head) and not statement.keys:
            covers.append(_statement_cover(text, scan.statements, index))
    return covers


def _statement_cover(text: str, statements: Sequence[Head | Pair], index: int) -> _Cover:
    """Blank a statement; with a head its keys go, which must not fall to the table above."""
    first = last = statements[index]
    if isinstance(first, Head):
        for statement in statements[index + 1 :]:
            if isinstance(statement, Head):
                break
            last = statement
    return _blank(text, first.start, last.end)


def _control_characters(text: str, statements: Sequence[Head | Pair]) -> list[_Cover]:
    """Cover the control characters of comments; inside a value they make it bad by themselves."""
    found = [match.start() for match in _CONTROL.finditer(text)]
    if not found:
        return []
    spans = [(leaf.start, leaf.end) for leaf in leaves(statements)]
    starts = [start for start, _ in spans]
    covers = []
    for offset in found:
        index = bisect_right(starts, offset) - 1
        if index < 0 or offset >= spans[index][1]:
            covers.append(_Cover(offset, offset + 1, " "))
    return covers


def _covered(text: str, covers: Sequence[_Cover]) -> str:
    parts: list[str] = []
    at = 1 if text.startswith("\ufeff") else 0
    for cover in sorted(covers, key=lambda cover: (cover.start, -cover.end)):
        if cover.start < at or cover.start == cover.end == at:
            continue  # inside one already covered, or the empty value at its end
        parts += text[at : cover.start], cover.text
        at = cover.end
    return "".join((*parts, text[at:]))
