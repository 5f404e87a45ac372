"""Edits of what stands in brackets: inline tables, and arrays of inline tables.

It knows commas, lines and comments inside brackets; not what the elements are.
"""

from __future__ import annotations

import re
from typing import TYPE_CHECKING

from schedtui.errors import SpliceError
from schedtui.schedule.toml_source.edits import Edit, Rank
from schedtui.schedule.toml_source.scan import Value, line_start, next_line

if TYPE_CHECKING:
    from collections.abc import Collection, Sequence

_COMMA = re.compile(r"[ \t]*,")
_TRAILING_COMMA = re.compile(r"\A\s*,")
_END_OF_ITEM = re.compile(r"[ \t]*,?[ \t]*(?:#[^\n]*)?\r?\n")


def list_edits(
    text: str,
    brackets: Value,
    gone: Collection[int],
    new: Sequence[str],
    newline: str,
) -> list[Edit]:
    """Return the edits that take elements out of brackets and add others at their end.

    Args:
        text: the text.
        brackets: an inline table or an array.
        gone: places of the elements to take out.
        new: texts of the elements to add.
        newline: line ending of the text.
    """
    spans = _spans(brackets)
    kept = [index for index in range(len(spans)) if index not in gone]
    if not kept:
        inner = ", ".join(new)
        if inner and brackets.kind == "table":
            inner = f" {inner} "
        return [Edit(brackets.start + 1, brackets.end - 1, inner, Rank.VALUE)]
    edits = [_removal(text, brackets, spans, index, kept[0]) for index in sorted(gone)]
    return edits + _additions(text, brackets, spans[kept[-1]], new, newline)


def rearranged(
    text: str,
    array: Value,
    elements: Sequence[tuple[int | None, str]],
    newline: str,
) -> str:
    """Return an array's text with its elements in another order.

    Args:
        text: the text that the array stands in.
        array: the array.
        elements: for each in its new order the place it had, None for a new one, and its text.
        newline: line ending of the text.

    Raises:
        SpliceError: comments stand among elements that are not on lines of their own.
    """
    spans = _spans(array)
    if spans and all(_on_own_lines(text, span) for span in spans):
        return _rearranged_lines(text, array, elements, newline)
    if any("#" in gap for gap in _gaps(text, array)):
        raise SpliceError(
            "an array in brackets with comments among its elements cannot be put in another "
            "order unless each element stands on a line of its own",
        )
    lead = text[array.start + 1 : spans[0][0]] if spans else ""
    tail = text[spans[-1][1] : array.end - 1] if spans else ""
    inner = ", ".join(element for _, element in elements)
    return f"[{lead}{inner}{_TRAILING_COMMA.sub('', tail)}]"


def _spans(brackets: Value) -> list[tuple[int, int]]:
    held = brackets.pairs if brackets.kind == "table" else brackets.items
    return [(element.start, element.end) for element in held]


def _gaps(text: str, array: Value) -> list[str]:
    starts = [array.start + 1, *(end for _, end in _spans(array))]
    ends = [*(start for start, _ in _spans(array)), array.end - 1]
    return [text[start:end] for start, end in zip(starts, ends, strict=True)]


def _on_own_lines(text: str, span: tuple[int, int]) -> bool:
    start, end = span
    before = text[line_start(text, start) : start]
    return not before.strip(" \t") and bool(_END_OF_ITEM.match(text, end))


def _removal(
    text: str,
    brackets: Value,
    spans: Sequence[tuple[int, int]],
    index: int,
    first_kept: int,
) -> Edit:
    start, end = spans[index]
    if brackets.kind == "array" and _on_own_lines(text, spans[index]):
        return Edit(line_start(text, start), next_line(text, end), "", Rank.VALUE)
    if index > first_kept:
        return Edit(spans[index - 1][1], end, "", Rank.VALUE)
    return Edit(start, spans[index + 1][0], "", Rank.VALUE)


def _additions(
    text: str,
    brackets: Value,
    last: tuple[int, int],
    new: Sequence[str],
    newline: str,
) -> list[Edit]:
    if not new:
        return []
    start, end = last
    if brackets.kind == "table" or not _on_own_lines(text, last):
        return [Edit(end, end, "".join(f", {element}" for element in new), Rank.KEY)]
    indent = text[line_start(text, start) : start]
    at = next_line(text, end)
    has_comma = bool(_COMMA.match(text, end))
    lines = [f"{indent}{element},{newline}" for element in new]
    if not has_comma:
        lines[-1] = f"{indent}{new[-1]}{newline}"
    comma = [] if has_comma else [Edit(end, end, ",", Rank.KEY)]
    return [*comma, Edit(at, at, "".join(lines), Rank.KEY)]


def _rearranged_lines(
    text: str,
    array: Value,
    elements: Sequence[tuple[int | None, str]],
    newline: str,
) -> str:
    spans = _spans(array)
    ends = [next_line(text, end) for _, end in spans]
    first = line_start(text, spans[0][0])
    head_end = min(next_line(text, array.start), first)
    starts = [head_end, *ends[:-1]]
    indent = text[first : spans[0][0]]
    parts = [text[array.start : head_end]]
    for place, (origin, element) in enumerate(elements):
        before, after = indent, newline
        if origin is not None:
            before = text[starts[origin] : spans[origin][0]]
            after = text[spans[origin][1] : ends[origin]]
        if place < len(elements) - 1 and not _COMMA.match(after):
            after = f",{after}"
        parts += before, element, after
    return "".join((*parts, text[ends[-1] : array.end]))
