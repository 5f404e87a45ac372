"""What the values must be after changes: worked out on the values alone, to prove a text by.

Nothing here looks at offsets or at the text operations; that is what makes the proof one.
"""

from __future__ import annotations

from typing import TYPE_CHECKING, Any

from schedtui.errors import ScheduleError, SpliceError
from schedtui.schedule.toml_source.changes import (
    Append,
    Arrange,
    Change,
    Drop,
    Path,
    Put,
    Remove,
    key_text,
)
from schedtui.schedule.toml_source.recover import BadValue
from schedtui.schedule.toml_source.source import read_source

if TYPE_CHECKING:
    from collections.abc import Sequence

_GONE = object()


class _EmptiedTable(dict[str, Any]):
    """A table whose last key was cleared: without a head of its own it is no longer there."""


class _EmptiedArray(list[Any]):
    """An array whose last element was taken out: without brackets it is no longer there."""


def expected_values(
    values: dict[str, Any],
    changes: Sequence[Change | Arrange],
) -> dict[str, Any]:
    """Return what the values become: clearings first, then the rest in the order given.

    Raises:
        SpliceError: a change names an element that is not there, or goes through a value.
    """
    tree = _changed(values, [change for change in changes if not isinstance(change, Arrange)])
    for arrange in changes:
        if isinstance(arrange, Arrange):
            tree[arrange.array] = _arranged(values.get(arrange.array, []), arrange)
    return tree


def same(expected: Any, found: Any) -> bool:
    """Return whether values are equal, numbers by type and digits that count, bad ones by text.

    >>> same(66, 66.0), same(float("nan"), float("nan")), same({"a": [True]}, {"a": [1]})
    (False, True, False)
    """
    if isinstance(expected, dict):
        return isinstance(found, dict) and _same_tables(expected, found)
    if isinstance(expected, list):
        return (
            isinstance(found, list)
            and len(expected) == len(found)
            and all(map(same, expected, found))
        )
    if isinstance(expected, BadValue) and isinstance(found, BadValue):
        return expected.raw == found.raw
    return type(expected) is type(found) and repr(expected) == repr(found)


def read_value(raw: str) -> Any:
    """Return the value that the characters are, a `BadValue` where they are no TOML.

    Raises:
        SpliceError: they would not stand as one value after a key: a comment, a second line.
    """
    try:
        source = read_source(f"v = {raw}\n")
        if list(source.values) == ["v"] and source.raw(("v",)) == raw:
            return source.values["v"]
    except ScheduleError:
        pass
    raise SpliceError(f"{raw[:60]!r} cannot stand as the value of a key")


def read_block(array: str, block: str) -> dict[str, Any]:
    """Return the values of an element from its block: with a head, or an inline table.

    Raises:
        SpliceError: the text is not that of one element of the array.
    """
    text = f"{key_text(array)} = [{block}]" if block.lstrip().startswith("{") else block
    try:
        values = read_source(text).values
    except ScheduleError as error:
        raise SpliceError(f"the block for {array} cannot be read: {error}") from error
    elements = values.get(array)
    if list(values) != [array] or not isinstance(elements, list) or len(elements) != 1:
        raise SpliceError(f"the block for {array} does not hold one element of it and nothing else")
    if not isinstance(elements[0], dict):
        raise SpliceError(f"the block for {array} is no table")
    return elements[0]


def _same_tables(expected: dict[str, Any], found: dict[str, Any]) -> bool:
    return all(key in expected for key in found) and all(
        same(value, found[key]) if key in found else _may_be_absent(value)
        for key, value in expected.items()
    )


def _may_be_absent(value: Any) -> bool:
    if isinstance(value, _EmptiedTable):
        return all(map(_may_be_absent, value.values()))
    return isinstance(value, _EmptiedArray) and not value


def _changed(values: dict[str, Any], changes: Sequence[Change]) -> dict[str, Any]:
    root: list[dict[str, Any]] = [_clone(values)]
    for change in changes:
        if isinstance(change, Drop):
            _drop(root, (0, *change.path))
        elif isinstance(change, Remove):
            _remove(root, (0, *change.path))
    for change in changes:
        if isinstance(change, Put):
            _put(root, (0, *change.path), read_value(change.raw))
    appended = [change for change in changes if isinstance(change, Append)]
    for change in appended:
        element = {key: read_value(raw) for key, raw in change.entries}
        _array_at(root, (0, *change.path)).append(element)
    _sweep(root, [change.path for change in changes if isinstance(change, Remove)])
    return root[0]


def _arranged(elements: Any, arrange: Arrange) -> list[Any]:
    result: list[Any] = []
    for piece in arrange.pieces:
        if piece.origin is not None:
            element = _find(elements, (piece.origin,))
            if not isinstance(element, dict):
                raise SpliceError(f"{arrange.array} has no table {piece.origin} to be arranged")
        elif piece.block is not None:
            element = read_block(arrange.array, piece.block)
        else:
            element = {}
        result.append(_changed(element, piece.changes))
    return result or _EmptiedArray()


def _clone(value: Any) -> Any:
    if isinstance(value, dict):
        return {key: _clone(inner) for key, inner in value.items()}
    if isinstance(value, list):
        return [_clone(inner) for inner in value]
    return value


def _find(root: Any, path: Path) -> Any:
    """Return what stands at a path; `_GONE` where nothing does."""
    for key in path:
        if isinstance(root, list):
            if not isinstance(key, int) or not 0 <= key < len(root):
                return _GONE
        elif not isinstance(root, dict) or key not in root:
            return _GONE
        root = root[key]
    return root


def _put(root: Any, path: Path, value: Any) -> None:
    key = path[-1]
    if isinstance(key, str):
        _table_at(root, path[:-1])[key] = value
        return
    if _find(root, path) is _GONE:
        raise SpliceError(f"{_dotted(path[1:])} is not there to be changed")
    _find(root, path[:-1])[key] = value


def _drop(root: Any, path: Path) -> None:
    holder = _find(root, path[:-1])
    if not isinstance(holder, dict) or path[-1] not in holder:
        return
    del holder[str(path[-1])]
    for size in range(len(path) - 1, 1, -1):
        table = _find(root, path[:size])
        outer = _find(root, path[: size - 1])
        if not isinstance(table, dict) or not all(map(_may_be_absent, table.values())):
            return
        outer[path[size - 1]] = _EmptiedTable(table)


def _remove(root: Any, path: Path) -> None:
    holder = _find(root, path[:-1])
    index = path[-1]
    if not isinstance(holder, list) or not isinstance(index, int) or not -1 < index < len(holder):
        raise SpliceError(f"{_dotted(path[1:])} is not there to be taken out")
    holder[index] = _GONE


def _sweep(root: Any, removed: Sequence[Path]) -> None:
    """Close the gaps of the elements taken out, the inner arrays before the outer."""
    for path in sorted({path[:-1] for path in removed}, key=len, reverse=True):
        holder = _find(root, (0, *path[:-1]))
        array = _find(holder, path[-1:])
        if isinstance(array, list):
            kept = [element for element in array if element is not _GONE]
            holder[path[-1]] = kept or _EmptiedArray()


def _table_at(root: Any, path: Path) -> dict[str, Any]:
    table: Any = root
    for index, key in enumerate(path):
        is_table = isinstance(table, dict)
        table = table.setdefault(str(key), {}) if is_table else _find(table, (key,))
        if table is _GONE or not isinstance(table, dict | list):
            raise SpliceError(f"{_dotted(path[1 : index + 1])} is no table that a key can stand in")
    if not isinstance(table, dict):
        raise SpliceError(f"{_dotted(path[1:])} is no table that a key can stand in")
    return table


def _array_at(root: Any, path: Path) -> list[Any]:
    array = _table_at(root, path[:-1]).setdefault(str(path[-1]), [])
    if not isinstance(array, list):
        raise SpliceError(f"{_dotted(path[1:])} is no array of tables")
    return array


def _dotted(path: Path) -> str:
    return ".".join(map(str, path))
