"""Sends fewer bytes for the same picture: the library's updates, written out more tersely.

The library resends a line from its widget's left edge whatever changed in it, and gives every
segment its full colours and a reset. Here only the cells that changed are sent, only what differs
from the style before, and a colour that the 256-colour cube has by its short number.

This is the one module that reads the insides of an update (`textual._compositor`). Where another
version of the library has other insides, updates go out as the library writes them.
Must not know what is on the screen.
"""

from __future__ import annotations

from functools import lru_cache
from itertools import product
from typing import TYPE_CHECKING, Any

from rich.color import Color, ColorSystem
from rich.console import COLOR_SYSTEMS, Console
from rich.control import Control
from rich.style import Style
from textual.strip import Strip

if TYPE_CHECKING:
    from collections.abc import Iterable, Iterator

    from rich.segment import Segment

_RESET = "\x1b[0m"
_PLAIN = Style.null()

#: What switches a style's trait on, and off again.
_TRAITS = {
    "bold": ("1", "22"),
    "dim": ("2", "22"),
    "italic": ("3", "23"),
    "underline": ("4", "24"),
    "blink": ("5", "25"),
    "blink2": ("6", "25"),
    "reverse": ("7", "27"),
    "conceal": ("8", "28"),
    "strike": ("9", "29"),
    "underline2": ("21", "24"),
    "frame": ("51", "54"),
    "encircle": ("52", "54"),
    "overline": ("53", "55"),
}

_STEPS = (0, 95, 135, 175, 215, 255)
_GREYS = range(8, 248, 10)
#: Numbers 16 to 255 as xterm defines them; the first 16 are the person's own.
_NUMBERED: dict[tuple[int, int, int], int] = {
    **{(grey, grey, grey): 232 + i for i, grey in enumerate(_GREYS)},
    **{rgb: 16 + i for i, rgb in enumerate(product(_STEPS, _STEPS, _STEPS))},
}
_Piece = tuple[int, int, Strip]


def terse(update: Any) -> Any:
    """Return the update, so changed that it writes itself tersely where that can be done.

    Args:
        update: whatever the library is about to display.
    """
    try:
        pieces = list(_pieces(update))
    except (AttributeError, TypeError, ValueError, IndexError, KeyError):
        return update
    if pieces:
        update.render_segments = lambda console: _written(pieces, console)
    return update


def _pieces(update: Any) -> Iterator[_Piece]:
    """Yield the strips of an update with the cell each begins at."""
    if hasattr(update, "chops"):
        yield from _changed(update)
    elif hasattr(update, "strips") and hasattr(update, "region"):
        for y, line in enumerate(update.strips, update.region.y):
            x = update.region.x
            for strip in line:
                yield x, y, strip
                x += strip.cell_length


def _changed(update: Any) -> Iterator[_Piece]:
    for y, start, end in update.spans:
        for chop_end, (x, strip) in zip(update.chop_ends[y], update.chops[y].items(), strict=True):
            if strip is None or x >= end or chop_end <= start:
                continue
            begin = max(x, start)
            yield begin, y, strip.crop(begin - x, min(chop_end, end) - x)


def _written(pieces: Iterable[_Piece], console: Console) -> str:
    system = COLOR_SYSTEMS.get(console.color_system or "truecolor", ColorSystem.TRUECOLOR)
    out = [_RESET]
    pen = _PLAIN
    for x, y, strip in pieces:
        out.append(str(Control.move_to(x, y)))
        for segment in strip:
            style = segment.style or _PLAIN
            out.append(_turn(pen, style, system))
            out.append(_linked(segment, style))
            pen = style
    out.append(_RESET)
    return "".join(out)


def _linked(segment: Segment, style: Style) -> str:
    if not style.link:
        return segment.text
    return f"\x1b]8;;{style.link}\x1b\\{segment.text}\x1b]8;;\x1b\\"


@lru_cache(maxsize=4096)
def _turn(before: Style, after: Style, system: ColorSystem) -> str:
    """Return what makes a terminal that writes in one style write in another."""
    had = {trait for trait in _TRAITS if getattr(before, trait)}
    has = {trait for trait in _TRAITS if getattr(after, trait)}
    codes = sorted({_TRAITS[trait][1] for trait in had - has})
    # What ends bold ends dim too: whatever shares the code has to be switched on again.
    codes += [_TRAITS[trait][0] for trait in _TRAITS if trait in has and _is_off(trait, had, codes)]
    for foreground in (True, False):
        was, becomes = (_codes(style, system, foreground=foreground) for style in (before, after))
        if was != becomes:
            codes += becomes
    return f"\x1b[{';'.join(codes)}m" if codes else ""


def _is_off(trait: str, had: set[str], ended: list[str]) -> bool:
    return trait not in had or _TRAITS[trait][1] in ended


def _codes(style: Style, system: ColorSystem, *, foreground: bool) -> tuple[str, ...]:
    colour = style.color if foreground else style.bgcolor
    if colour is None:
        return ("39",) if foreground else ("49",)
    if system in {ColorSystem.TRUECOLOR, ColorSystem.EIGHT_BIT}:
        colour = _short(colour)
    return colour.downgrade(system).get_ansi_codes(foreground)


def _short(colour: Color) -> Color:
    """Return the same colour by its number in the 256-colour cube, if it has one."""
    number = None if colour.triplet is None else _NUMBERED.get(colour.triplet)
    return colour if number is None else Color.from_ansi(number)
