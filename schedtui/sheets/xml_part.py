"""One XML part of a workbook, read in a single pass with everything hostile refused.

No document type definition is accepted, hence no entity of anyone's making; elements are counted;
nothing is kept but what the reader asks for. Knows nothing of sheets.
"""

from __future__ import annotations

from typing import TYPE_CHECKING
from xml.parsers import expat

from schedtui.errors import FileError

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping
    from typing import IO

MOST_ELEMENTS = 4_000_000
_PIECE = 1 << 16


def local(name: str) -> str:
    """Return a name without its namespace or prefix."""
    return name.rpartition(":")[2]


def parse(
    stream: IO[bytes],
    start: Callable[[str, Mapping[str, str]], None],
    end: Callable[[str], None],
    text: Callable[[str], None],
) -> None:
    """Read a part and call back for what is in it, names without their prefixes.

    Args:
        stream: the part's bytes, unpacked as they are read.
        start: told an element's name and attributes.
        end: told an element's name.
        text: told characters.

    Raises:
        FileError: it is no XML, defines a document type, or has too many elements.
    """
    parser = expat.ParserCreate()
    parser.buffer_text = True
    left = MOST_ELEMENTS

    def started(name: str, attributes: dict[str, str]) -> None:
        nonlocal left
        left -= 1
        if left < 0:
            raise FileError(f"has more than {MOST_ELEMENTS} elements in one part")
        start(local(name), attributes)

    def refuse(*_: object) -> None:
        raise FileError("defines a document type, which no workbook needs")

    parser.StartElementHandler = started
    parser.EndElementHandler = lambda name: end(local(name))
    parser.CharacterDataHandler = text
    parser.StartDoctypeDeclHandler = refuse
    parser.EntityDeclHandler = refuse
    try:
        while piece := stream.read(_PIECE):
            parser.Parse(piece, False)
        parser.Parse(b"", True)
    except expat.ExpatError as error:
        raise FileError(f"is damaged: a part is no XML ({error})") from error
