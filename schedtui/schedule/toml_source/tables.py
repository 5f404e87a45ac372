"""Where edits of keys and tables go in a text: the rules of a schedule file's writer.

A new key follows its table's last own key; a cleared one takes its line; a new table has its
place among the others. Whole elements of arrays are `blocks`' affair.
"""

from __future__ import annotations

from dataclasses import dataclass, field
from typing import TYPE_CHECKING

from schedtui.errors import SpliceError
from schedtui.schedule.toml_source.changes import Append, Drop, Path, Put, Remove, key_text
from schedtui.schedule.toml_source.edits import Edit, Rank
from schedtui.schedule.toml_source.lists import list_edits
from schedtui.schedule.toml_source.locate import Kind, Place, Section
from schedtui.schedule.toml_source.scan import Head, Pair, line_start, next_line

if TYPE_CHECKING:
    from collections.abc import Iterable, Sequence

    from schedtui.schedule.toml_source.source import Source

Keys = tuple[str, ...]


@dataclass(slots=True)
class Tables:
    """The edits of one text as they gather; lives within one `splice`.

    Args:
        source: the text.
        newline: line ending of lines that are added.
        order: top-level keys in the order that new tables take among them.
        gone: paths that are cleared or taken out.
        edits: the edits so far.
    """

    source: Source
    newline: str
    order: Sequence[str]
    gone: frozenset[Path]
    edits: list[Edit] = field(default_factory=list)
    _added: dict[Path, list[str]] = field(default_factory=dict)
    _removed: dict[Path, set[int]] = field(default_factory=dict)
    _new_tables: dict[Path, list[tuple[str, str]]] = field(default_factory=dict)
    _first_lines: list[str] = field(default_factory=list)
    tops: list[tuple[str, int, str]] = field(default_factory=list)

    def write(self, changes: Iterable[Put | Drop | Append | Remove]) -> None:
        """Gather the edits for changes.

        Raises:
            SpliceError: one names something that it cannot be carried out on.
        """
        appended: dict[Path, list[Append]] = {}
        puts: dict[Path, str] = {}
        for change in changes:
            if isinstance(change, Put):
                puts[change.path] = change.raw
            elif isinstance(change, Append):
                appended.setdefault(change.path, []).append(change)
        for path in self.gone:
            if not self._is_gone(path[:-1]):
                self._take_out(path)
        for path, raw in puts.items():
            self._put(path, raw)
        for path, changes_of_array in appended.items():
            self._append(path, [change.entries for change in changes_of_array])
        self._write_gathered()

    def top_edits(self, tops: Sequence[tuple[str, int, str]]) -> list[Edit]:
        """Return the edits that put in top-level tables, in their order.

        Args:
            tops: for each its key, its offset and its text.
        """
        places = {key: place for place, key in enumerate(self.order)}
        ordered = sorted(tops, key=lambda top: places.get(top[0], len(places)))
        return [Edit(at, at, text, Rank.TOP) for _, at, text in ordered]

    def top_offset(self, key: str, *, array: bool) -> int:
        """Return where a top-level table that is not there yet goes."""
        sections = [section for section in self.source.layout.sections if section.head]
        if key in self.order:
            later = self.order[self.order.index(key) + 1 :]
            found = [section.start for section in sections if section.path[0] in later]
        else:
            found = [s.start for s in sections if s.head and s.head.array and not array]
        return min(found, default=len(self.source.text))

    def bare_section(self, path: Path, entries: Iterable[tuple[str, str]], *, array: bool) -> str:
        """Return the text of a table, indented like its likes."""
        like, around = self._models(path, array=array)
        head_indent = (
            self._indent(like.head) if like else self._indent(around.head if around else None)
        )
        key_indent = head_indent
        for model in (like, around):
            if model and model.pairs and model.head:
                key_indent = self._indent(model.pairs[-1])
                break
        name = key_text(*(key for key in path if isinstance(key, str)))
        lines = [f"{head_indent}[[{name}]]" if array else f"{head_indent}[{name}]"]
        lines += [f"{key_indent}{key_text(key)} = {raw}" for key, raw in entries]
        return "".join(line + self.newline for line in lines)

    def _models(self, path: Path, *, array: bool) -> tuple[Section | None, Section | None]:
        size = len(path)
        inside = self.source.sections(path) if array else []
        like = [s for s in inside if len(s.path) == size + 1]
        around = self.source.sections(path[:-1]) if size > 1 else []
        return (like[-1] if like else None), (around[0] if around else None)

    def _indent(self, of: Head | Pair | None) -> str:
        if of is None:
            return ""
        return self.source.text[line_start(self.source.text, of.start) : of.start]

    def _is_gone(self, path: Path) -> bool:
        return any(path[:size] in self.gone for size in range(1, len(path) + 1))

    def _place(self, path: Path) -> Place | None:
        return None if self._is_gone(path) else self.source.layout.places.get(path)

    def _pair_gone(self, pair: Pair, holder: Path) -> bool:
        return bool(self.gone) and self._is_gone((*holder, *pair.keys))

    # Clearing

    def _take_out(self, path: Path) -> None:
        place = self.source.layout.places.get(path)
        if place is None:
            return
        if place.kind is Kind.ITEM:
            self._removed.setdefault(path[:-1], set()).add(int(path[-1]))
        elif place.kind is Kind.VALUE and place.pair:
            self._take_out_pair(place.pair, place.holder)
        else:
            self._take_out_table(path, place)

    def _take_out_pair(self, pair: Pair, holder: Path) -> None:
        inline = self.source.layout.places.get(holder)
        if inline and inline.value:
            index = inline.value.pairs.index(pair)
            self._removed.setdefault(holder, set()).add(index)
            return
        text = self.source.text
        start, end = line_start(text, pair.start), next_line(text, pair.end)
        self.edits.append(Edit(start, end, "", Rank.VALUE))

    def _take_out_table(self, path: Path, place: Place) -> None:
        for section in self.source.sections(path):
            self.edits.append(Edit(section.start, section.end, "", Rank.TABLE))
        for pair in self._dotted_pairs(path, place):
            self._take_out_pair(pair, place.holder)

    def _dotted_pairs(self, path: Path, place: Place) -> list[Pair]:
        """Return the pairs that name a dotted table, in the table that holds them."""
        if place.kind is not Kind.DOTTED:
            return []
        holder = self.source.layout.places.get(place.holder)
        inline = holder.value if holder else None
        pairs = inline.pairs if inline else self._section(place.holder).pairs
        prefix = path[len(place.holder) :]
        return [pair for pair in pairs if pair.keys[: len(prefix)] == prefix]

    def _section(self, path: Path) -> Section:
        if not path:
            return self.source.layout.sections[0]
        return next(s for s in self.source.layout.sections if s.head and s.path == path)

    # Setting

    def _put(self, path: Path, raw: str) -> None:
        place = self._place(path)
        if place is None:
            if isinstance(path[-1], int):
                raise SpliceError(f"{_name(path)} is not there to be changed")
            self._add(path[:-1], (path[-1],), raw)
        elif place.value is None:
            raise SpliceError(f"{_name(path)} is a table, and cannot be given a value")
        else:
            start, end = place.value.start, place.value.end
            if start == end:  # nothing was typed after the =
                raw = f" {raw}" + " " * self.source.text.startswith("#", end)
            self.edits.append(Edit(start, end, raw, Rank.VALUE))

    def _add(self, table: Path, keys: Keys, raw: str) -> None:
        """Add a key to a table; `keys` has more than one part where tables between are missing."""
        place = self._place(table)
        if not table:
            self._add_under_head((), keys, raw)
        elif place is None:
            if isinstance(table[-1], int):
                raise SpliceError(f"{_name(table)} is not there to be changed")
            self._add(table[:-1], (table[-1], *keys), raw)
        elif place.kind is Kind.DOTTED:
            self._add_dotted(table, place, keys, raw)
        elif place.value and place.value.kind == "table":
            self._added.setdefault(table, []).append(f"{key_text(*keys)} = {raw}")
        elif place.value or place.kind is Kind.HEADS:
            raise SpliceError(f"{_name(table)} is no table that a key can be added to")
        elif place.kind is Kind.HEAD:
            self._add_under_head(table, keys, raw)
        else:
            self._new_table((*table, *keys[:-1]), keys[-1], raw)

    def _new_table(self, table: Path, key: str, raw: str) -> None:
        self._new_tables.setdefault(table, []).append((key, raw))

    def _add_under_head(self, table: Path, keys: Keys, raw: str) -> None:
        if len(keys) > 1:
            self._new_table((*table, *keys[:-1]), keys[-1], raw)
            return
        section = self._section(table)
        own = [pair for pair in section.pairs if not self._pair_gone(pair, table)]
        after = own[-1] if own else section.head
        line = f"{key_text(*keys)} = {raw}"
        if after:
            self._add_line(after, line)
        else:
            self._first_lines.append(line + self.newline)

    def _add_line(self, after: Head | Pair, line: str) -> None:
        text = self.source.text
        end = next_line(text, after.end)
        ending = self.newline
        if text[end - 1] == "\n":
            ending = "\r\n" if text[end - 2] == "\r" else "\n"
            end -= len(ending)
        self.edits.append(Edit(end, end, f"{ending}{self._indent(after)}{line}", Rank.KEY))

    def _add_dotted(self, table: Path, place: Place, keys: Keys, raw: str) -> None:
        pairs = self._dotted_pairs(table, place)
        own = [pair for pair in pairs if not self._pair_gone(pair, place.holder)]
        depth = len(table) - len(place.holder)
        model = (own or pairs)[-1]
        named = self.source.text[model.start : model.ends[depth - 1]]
        line = f"{named}.{key_text(*keys)} = {raw}"
        holder = self.source.layout.places.get(place.holder)
        if holder and holder.value:
            self._added.setdefault(place.holder, []).append(line)
            return
        section = self._section(place.holder)
        kept = [pair for pair in section.pairs if not self._pair_gone(pair, place.holder)]
        after = own[-1] if own else kept[-1] if kept else section.head
        if after:
            self._add_line(after, line)
        else:
            self._first_lines.append(line + self.newline)

    # Elements of arrays of tables below a table

    def _append(self, path: Path, elements: Sequence[tuple[tuple[str, str], ...]]) -> None:
        place = self._place(path)
        inline = [_inline(entries) for entries in elements]
        if place and place.value and place.value.kind == "array" and not place.value.bad:
            self._added.setdefault(path, []).extend(inline)
            return
        if place and place.kind is not Kind.HEADS:
            raise SpliceError(f"{_name(path)} is no array of tables")
        around = self._place(path[:-1])
        if around and (around.value or around.kind is Kind.DOTTED):
            self._put(path, f"[{', '.join(inline)}]")
            return
        for entries in elements:
            self._add_section(path, self.bare_section(path, entries, array=True), array=True)

    def _add_section(self, path: Path, text: str, *, array: bool) -> None:
        at = self._end_of(path)
        if at is None:
            key = str(path[0])
            self.tops.append((key, self.top_offset(key, array=array), text))
        else:
            self.edits.append(Edit(at, at, text, Rank.TABLE))

    def _end_of(self, path: Path) -> int | None:
        """Return the offset past the last line of a table, else of the one around it."""
        for size in range(len(path), 0, -1):
            alive = [s for s in self.source.sections(path[:size]) if not self._is_gone(s.path)]
            if alive:
                pairs = alive[-1].pairs
                return next_line(self.source.text, self._last_end(alive[-1], pairs))
        return None

    def _last_end(self, section: Section, pairs: Sequence[Pair]) -> int:
        if pairs:
            return pairs[-1].end
        return section.head.end if section.head else section.start

    def _write_gathered(self) -> None:
        for path in {**self._removed, **self._added}:
            value = self.source.layout.places[path].value
            if value and not self._is_gone(path):
                gone, new = self._removed.get(path, set()), self._added.get(path, [])
                self.edits += list_edits(self.source.text, value, gone, new, self.newline)
        for path, entries in self._new_tables.items():
            inside = [s for s in self.source.sections(path) if not self._is_gone(s.path)]
            section = self.bare_section(path, entries, array=False)
            if inside:
                self.edits.append(Edit(inside[0].start, inside[0].start, section, Rank.TABLE))
            else:
                self._add_section(path, section, array=False)
        if self._first_lines:
            at = self.source.layout.sections[0].end
            self.edits.append(Edit(at, at, "".join(self._first_lines), Rank.LINES))


def _inline(entries: Sequence[tuple[str, str]]) -> str:
    inner = ", ".join(f"{key_text(key)} = {raw}" for key, raw in entries)
    return f"{{ {inner} }}" if inner else "{}"


def _name(path: Path) -> str:
    return ".".join(map(str, path))
