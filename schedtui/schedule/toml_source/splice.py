"""Writes changes into a text, and proves that the result holds exactly them.

The only way into the text operations. What the keys mean is not known here.
"""

from __future__ import annotations

import re
from dataclasses import replace
from functools import partial
from typing import TYPE_CHECKING

from schedtui.errors import ScheduleError, SpliceError
from schedtui.schedule.toml_source.blocks import Moves, arranged
from schedtui.schedule.toml_source.changes import Arrange, Change, Drop, Remove
from schedtui.schedule.toml_source.edits import Edit, Rank, assemble
from schedtui.schedule.toml_source.expect import expected_values, same
from schedtui.schedule.toml_source.source import Source, read_source
from schedtui.schedule.toml_source.tables import Tables

if TYPE_CHECKING:
    from collections.abc import Sequence

_BLANK_LINE_BEFORE = re.compile(r"\n[ \t]*\r?\n\Z")
_TAIL = 200  # characters looked at to see how a text ends
_BEFORE_FIRST = 1  # offset of the first character, at most: a byte order mark may precede it
_INSIDE_ELEMENT = 3  # parts of a path to something in an element: array, place, key


def splice(
    source: Source,
    changes: Sequence[Change | Arrange],
    *,
    order: Sequence[str] = (),
) -> str:
    r"""Return the text with the changes in it, and everything else as it was.

    Args:
        source: the text as read.
        changes: what shall change. Paths and places are those of `source`; what is cleared or
            taken out goes first, of two values for one key the later counts.
        order: top-level keys in the order that tables which are not there yet take among them;
            without it a table goes before the first array of tables, an array to the end.

    Raises:
        SpliceError: the changes cannot be carried out, or the result would not have held
            exactly them.

    >>> from schedtui.schedule.toml_source.changes import Put
    >>> source = read_source('[project]\ntitle = "Works" # as built\n\n[[unit]]\ntag = "A"\n')
    >>> changes = [Put(("project", "units"), '"IP"'), Drop(("unit", 0, "tag"))]
    >>> print(splice(source, changes), end="")
    [project]
    title = "Works" # as built
    units = "IP"
    <BLANKLINE>
    [[unit]]
    """
    folded = _folded(changes)
    expected = expected_values(source.values, folded)
    result = _written(source, folded, _newline(source.text), order)
    try:
        found = read_source(result)
    except ScheduleError as error:
        line = error.problems[0].line
        raise SpliceError(f"the changes would break line {line} of the file: {error}") from error
    if not same(expected, found.values):
        raise SpliceError("the changes cannot be written without changing something else")
    return result


def _folded(changes: Sequence[Change | Arrange]) -> list[Change | Arrange]:
    """Move changes inside elements that are arranged into their pieces."""
    arranges = {change.array: change for change in changes if isinstance(change, Arrange)}
    rest: list[Change | Arrange] = []
    for change in changes:
        if isinstance(change, Arrange):
            continue
        arrange = arranges.get(str(change.path[0])) if change.path else None
        if arrange is None:
            rest.append(change)
        else:
            arranges[arrange.array] = _with_change(arrange, change)
    return [*rest, *arranges.values()]


def _with_change(arrange: Arrange, change: Change) -> Arrange:
    if len(change.path) >= _INSIDE_ELEMENT:
        for at, piece in enumerate(arrange.pieces):
            if piece.origin == change.path[1] and piece.origin is not None:
                inner = replace(change, path=change.path[2:])
                changed = replace(piece, changes=(*piece.changes, inner))
                pieces = (*arrange.pieces[:at], changed, *arrange.pieces[at + 1 :])
                return Arrange(arrange.array, pieces)
    path = ".".join(map(str, change.path))
    raise SpliceError(f"{path} cannot change: the arrangement of {arrange.array} leaves it out")


def _newline(text: str) -> str:
    at = text.find("\n")
    return "\r\n" if at > 0 and text[at - 1] == "\r" else "\n"


def _spaced(source: Source) -> bool:
    """Return whether tables are set apart by blank lines, as they are where there is one table."""
    heads = [s.start for s in source.layout.sections[1:] if s.start > _BEFORE_FIRST]
    before = (source.text[max(0, start - _TAIL) : start] for start in heads)
    return not heads or any(_BLANK_LINE_BEFORE.search(text) for text in before)


def _written(
    source: Source,
    changes: Sequence[Change | Arrange],
    newline: str,
    order: Sequence[str],
) -> str:
    def write(block: Source, inner: Sequence[Change]) -> str:
        return _written(block, inner, newline, order)

    plain = [change for change in changes if not isinstance(change, Arrange)]
    arranges = [change for change in changes if isinstance(change, Arrange)]
    moves: list[tuple[Arrange, Moves]] = []
    model = Tables(source, newline, order, frozenset())
    for arrange in arranges:
        bare = partial(model.bare_section, (arrange.array,), array=True)
        moves.append((arrange, arranged(source, arrange, bare, newline, write)))
    gone = {change.path for change in plain if isinstance(change, Drop | Remove)}
    for _, move in moves:
        plain += move.changes
        gone |= move.gone | {c.path for c in move.changes if isinstance(c, Drop | Remove)}
    tables = Tables(source, newline, order, frozenset(gone))
    tables.write(plain)
    for arrange, move in moves:
        tables.edits += move.edits
        _insert(tables, arrange.array, move)
    tables.edits += tables.top_edits(tables.tops)
    return assemble(source.text, tables.edits, newline, spaced=_spaced(source))


def _insert(tables: Tables, array: str, move: Moves) -> None:
    source = tables.source
    crlf_only = tables.newline == "\r\n" and "\n" not in source.text.replace("\r\n", "")
    elements = source.sections((array,))
    for after, text in move.inserted:
        foreign = crlf_only and "\r" not in text  # a block from another file
        block = text.replace("\n", "\r\n") if foreign else text
        if after is not None:
            at = source.sections((array, after))[-1].end
            tables.edits.append(Edit(at, at, block, Rank.BLOCK))
        elif elements:
            stays = move.first_staying
            first = source.sections((array, stays))[0] if stays is not None else elements[0]
            tables.edits.append(Edit(first.start, first.start, block, Rank.FIRST))
        else:
            tables.tops.append((array, tables.top_offset(array, array=True), block))
