"""One cell as a person typed it: its characters, and the value they stand for.

Knows TOML's spelling of a value and nothing of which key the cell belongs to.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from datetime import date

import tomli_w

Value = float | str | bool | tuple[str, ...] | date | None


@dataclass(frozen=True, slots=True)
class Typed:
    """A cell's content; two cells are equal when they read the same.

    Args:
        text: what a person reads and types, digits as they stand (66.0 is not 66).
        value: what the text stands for; None when it cannot be accepted, or when no key says how
            to read it.
        toml: the characters that stand for it in the file; no part of equality, since
            'a' and "a" are one text.
        problem: why it cannot be accepted and what is, None for a good cell.
    """

    text: str
    value: Value
    toml: str = field(compare=False)
    problem: str | None = None

    @property
    def bad(self) -> bool:
        """Tell whether the cell cannot be read."""
        return self.problem is not None


def toml_text(value: str) -> str:
    r"""Return `value` as a TOML string.

    >>> print(toml_text('12" duct'))
    "12\" duct"
    """
    return tomli_w.dumps({"a": value}).removeprefix("a = ").rstrip("\n")


def toml_texts(values: tuple[str, ...]) -> str:
    """Return `values` as a one-line TOML array of strings.

    >>> toml_texts(("summer peak", "winter"))
    '["summer peak", "winter"]'
    """
    return "[" + ", ".join(toml_text(value) for value in values) + "]"
