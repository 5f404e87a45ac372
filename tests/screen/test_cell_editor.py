from __future__ import annotations

import pytest

from schedtui.screen.cell_editor import EDIT_KEYS, CellEdit


def _after(text: str, *keys: str) -> tuple[str, int]:
    edit = CellEdit.of(text)
    for key in keys:
        edit = EDIT_KEYS[key](edit) if key in EDIT_KEYS else edit.insert(key)
    return edit.text, edit.caret


@pytest.mark.parametrize(
    ("text", "keys", "expected"),
    [
        ("94", ("4", "0"), ("9440", 4)),
        ("9440", ("backspace",), ("944", 3)),
        ("9440", ("home", "delete"), ("440", 0)),
        ("9440", ("left", "left", "5"), ("94540", 3)),
        ("9440", ("home", "backspace", "left"), ("9440", 0)),
        ("9440", ("delete", "right"), ("9440", 4)),
        ("9440", ("home", "right", "end"), ("9440", 4)),
        ("", ("backspace", "delete"), ("", 0)),
        ("ne\u0301", ("backspace",), ("n", 1)),  # an accent goes with its letter
        ("ne\u0301", ("left", "delete"), ("n", 1)),
    ],
)
def test_keys(text: str, keys: tuple[str, ...], expected: tuple[str, int]) -> None:
    assert _after(text, *keys) == expected


def test_a_change_drops_the_refusal_and_moving_keeps_it() -> None:
    refused = CellEdit.of("5000").refuse("at most 150 °F")
    assert refused.left().refused == "at most 150 °F"
    assert refused.backspace() == CellEdit("500", 3)
