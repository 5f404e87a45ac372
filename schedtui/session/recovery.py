"""Bringing back what an ended session has left in its journal.

Knows nothing of where journals lie.
"""

from __future__ import annotations

from typing import TYPE_CHECKING

from schedtui.errors import FileError
from schedtui.session.history import History
from schedtui.session.record import Reader

if TYPE_CHECKING:
    from collections.abc import Iterable, Sequence

    from schedtui.schedule.document import Document
    from schedtui.session.journal import Step


def replayed(document: Document, steps: Sequence[Step]) -> tuple[Document, History]:
    """Take every step again that a journal holds.

    Args:
        document: the document as loaded from the content that the journal's edits are made to.
        steps: the journal's steps, in their order.

    Returns:
        The document and the history that the ended session had.

    Raises:
        FileError: a step is none that can be taken here.
    """
    history, reader = History(), Reader(document)
    for place, step in enumerate(steps, start=1):
        try:
            document = _taken(document, history, reader, step)
        except (LookupError, TypeError, ValueError, AttributeError) as error:
            raise FileError(f"its edit {place} of {len(steps)} cannot be read") from error
    return document, history


def _taken(document: Document, history: History, reader: Reader, step: Step) -> Document:
    number, name = int(step["n"]), str(step["name"])
    match step:
        case {"undo": _} if history.last is not None and history.last.number == number:
            turned = history.undo(document)
        case {"redo": _} if history.undone and history.undone[-1].number == number:
            turned = history.redo(document)
        case {"do": plain} | {"redo": plain}:
            return history.do(document, reader.edit(document, plain), name, number)
        case {"undo": plain}:  # of a step from before the last save
            return history.do(document, reader.edit(document, plain), f"{name}, taken back")
        case _:
            raise ValueError("of no step")
    assert turned is not None  # noqa: S101  each case has looked
    return turned[0]


def told(steps: Iterable[Step]) -> list[str]:
    """Return what each step was, in words, those taken back said to be so."""
    said = {"do": "", "undo": ", taken back", "redo": ", done again"}
    lines = []
    for step in steps:
        kind = next((words for key, words in said.items() if key in step), "")
        lines.append(f"{step.get('name', 'unnamed')}{kind}")
    return lines
