"""One line of text being edited in a cell: a value, and what each key makes of it.

No widget in it and no painting; it does not know what the text means or whether it is accepted.
"""

from __future__ import annotations

import unicodedata
from dataclasses import dataclass, replace
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Callable


@dataclass(frozen=True, slots=True)
class CellEdit:
    """A text under way.

    Args:
        text: what stands in the cell now.
        caret: before which character the next one goes, from 0 to the text's length.
        refused: why what was offered last cannot be accepted; empty once anything is changed.
    """

    text: str
    caret: int
    refused: str = ""

    @classmethod
    def of(cls, text: str) -> CellEdit:
        """Return an edit of this text with the caret at its end."""
        return cls(text, len(text))

    def insert(self, typed: str) -> CellEdit:
        """Return the edit with a text put in at the caret.

        >>> CellEdit("940", 1).insert("4")
        CellEdit(text='9440', caret=2, refused='')
        """
        text = self.text[: self.caret] + typed + self.text[self.caret :]
        return CellEdit(text, self.caret + len(typed))

    def backspace(self) -> CellEdit:
        """Return the edit without the character before the caret, its combining marks included."""
        start = self.left().caret
        return CellEdit(self.text[:start] + self.text[self.caret :], start)

    def delete(self) -> CellEdit:
        """Return the edit without the character behind the caret, its combining marks included."""
        return CellEdit(self.text[: self.caret] + self.text[self.right().caret :], self.caret)

    def left(self) -> CellEdit:
        """Return the edit with the caret one character to the left."""
        caret = max(0, self.caret - 1)
        while caret > 0 and unicodedata.combining(self.text[caret]):
            caret -= 1
        return replace(self, caret=caret)

    def right(self) -> CellEdit:
        """Return the edit with the caret one character to the right."""
        caret = min(len(self.text), self.caret + 1)
        while caret < len(self.text) and unicodedata.combining(self.text[caret]):
            caret += 1
        return replace(self, caret=caret)

    def home(self) -> CellEdit:
        """Return the edit with the caret at the beginning."""
        return replace(self, caret=0)

    def end(self) -> CellEdit:
        """Return the edit with the caret at the end."""
        return replace(self, caret=len(self.text))

    def refuse(self, why: str) -> CellEdit:
        """Return the edit with the reason why it cannot be accepted as it is."""
        return replace(self, refused=why)


#: The keys an edit understands, apart from printable characters.
EDIT_KEYS: dict[str, Callable[[CellEdit], CellEdit]] = {
    "left": CellEdit.left,
    "right": CellEdit.right,
    "home": CellEdit.home,
    "end": CellEdit.end,
    "backspace": CellEdit.backspace,
    "delete": CellEdit.delete,
}
