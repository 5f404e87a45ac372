"""Tags as sheets list them: "AHU-1, 2 & 3", "AHU-7 thru 9".

Knows nothing of what a tag names.
"""

from __future__ import annotations

import re

MOST = 200

_TAG = re.compile(r"(?=.*[A-Za-z])(.*?[^0-9])([0-9]+)([A-Za-z]?)")
_AND = re.compile(r"\s*(?:,|;|&|\n|\band\b|\+)\s*", re.IGNORECASE)
_RANGE = re.compile(
    r"(.+?)(?:\s+(?:thru|through|to|-)\s+|\s*[–—]\s*|\s*\.\.+\s*)(.+)", re.IGNORECASE
)


def read_tags(text: str) -> tuple[list[str], str]:
    """Return the tags that a cell lists, and what is to be said where it cannot be read.

    Args:
        text: the cell's text.

    >>> read_tags("AHU-7 thru 9")
    (['AHU-7', 'AHU-8', 'AHU-9'], '')
    >>> read_tags("AHU-1, 2 & 4")[0]
    ['AHU-1', 'AHU-2', 'AHU-4']
    """
    text = " ".join(text.split(" "))
    text = _listed_by_slash(text)
    parts = [part for part in _AND.split(text) if part]
    listed = len(parts) > 1 or _RANGE.fullmatch(text) is not None
    if not listed:
        return [" ".join(text.split())], ""
    tags: list[str] = []
    for part in parts:
        more = _tags_of(part.strip(), tags[-1] if tags else "")
        if more is None or len(tags) + len(more) > MOST:
            return [" ".join(text.split())], "a list of tags that cannot be read: kept as one unit"
        tags += more
    return tags, ""


def _listed_by_slash(text: str) -> str:
    """Return "AHU-1/2" and "AHU-1 / AHU-2" as lists; a slash within a tag stays."""
    first, slash, second = (part.strip() for part in text.partition("/"))
    one, other = _TAG.fullmatch(first), _TAG.fullmatch(second)
    alike = one and (re.fullmatch("[0-9]{1,3}", second) or (other and other[1] == one[1]))
    return f"{first}, {second}" if slash and alike else text


def _tags_of(part: str, before: str) -> list[str] | None:
    """Return the tags of one part of a list; a bare number goes on from the tag before."""
    bounds = _RANGE.fullmatch(part)
    if bounds is None:
        tag = _whole(part, before)
        return [tag] if tag else None
    first = _whole(bounds[1].strip(), before)
    last = _whole(bounds[2].strip(), first or "")
    return _between(first, last) if first and last else None


def _whole(part: str, before: str) -> str | None:
    """Return a part as a whole tag, None where it is none."""
    if _TAG.fullmatch(part):
        return part
    found = _TAG.fullmatch(before)
    if found is None:
        return None
    prefix, number, letter = found.groups()
    if re.fullmatch(r"[0-9]{1,4}[A-Za-z]?", part):
        return prefix + part
    if letter and re.fullmatch(r"[A-Za-z]", part):
        return prefix + number + part
    return None


def _between(first: str, last: str) -> list[str] | None:
    one, other = _TAG.fullmatch(first), _TAG.fullmatch(last)
    if one is None or other is None or one[1] != other[1]:
        return None
    prefix, number, letter = one.groups()
    if letter or other[3]:
        if number != other[2] or not letter or not other[3] or letter > other[3]:
            return None
        return [f"{prefix}{number}{chr(code)}" for code in range(ord(letter), ord(other[3]) + 1)]
    low, high = int(number), int(other[2])
    if not low < high <= low + MOST:
        return None
    return [f"{prefix}{value:0{len(number)}d}" for value in range(low, high + 1)]
