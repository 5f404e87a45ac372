"""Makes TOML documents in every form a value, key or table can take, and counts the forms.

Each document comes twice: as it would stand in a file, and with its bad values replaced by
marked strings, so that the standard library's parser can say what its values are.
"""

from __future__ import annotations

import random
import tomllib
from collections import Counter
from dataclasses import dataclass
from typing import Any

import pytest

BAD = "@bad:"

FORMS = (
    "plain key",
    "dotted key",
    "quoted key",
    "inline table",
    "inline table in an inline table",
    "one-line array",
    "multi-line array",
    "multi-line string",
    "multi-line literal string",
    "literal string",
    "string with escapes",
    "hexadecimal",
    "exponent",
    "underscores",
    "decimal",
    "date",
    "time with offset",
    "boolean",
    "infinity",
    "bad value",
    "empty value",
    "comment on a line",
    "comment line",
    "indentation",
    "tabs",
    "table with a head",
    "dotted table",
    "quoted head",
    "implied super-table",
    "sub-tables out of order",
    "sub-table of an element",
    "element interrupted by a table",
    "array of tables",
    "array in an element",
    "inline array of tables on one line",
    "inline array of tables on lines",
    "CRLF",
    "byte order mark",
    "no final newline",
    "no blank lines",
)

SCALARS = {
    "decimal": ("66.0", "-0.0", "13.40", "+1.5"),
    "plain key": ("9440", "0", "-17", '"AHU-1"', '""', '"a # b"', '"[x]"'),
    "literal string": ("'C:\\x'", "'a \"b\"'"),
    "string with escapes": ('"6\\" duct \\u00b0"', '"\\\\"'),
    "hexadecimal": ("0xFF", "0o17", "0b101"),
    "exponent": ("1e3", "6.6E-2"),
    "underscores": ("9_440", "1_0.0_1"),
    "date": ("2026-11-30", "07:32:00"),
    "time with offset": ("2026-11-30T07:32:00+01:00", "1979-05-27 07:32:00Z"),
    "boolean": ("true", "false"),
    "infinity": ("inf", "-inf", "nan"),
}
BAD_VALUES = ("9,440", "80.1 °F", "1/2", "nothing", "1.", "01", '"a" b', "2026-02-30", "[1] 2")
QUOTED = ('"a b"', "'c.d'", '"é"', '"x=y"', '"k#"')


@dataclass(frozen=True)
class Made:
    """A document, its values by the standard library's parser, and the forms in it."""

    text: str
    values: dict[str, Any]
    forms: Counter[str]


class Maker:
    """Makes one document from one seed."""

    def __init__(self, seed: int) -> None:
        self.chance = random.Random(seed)  # noqa: S311  documents, not secrets
        self.forms: Counter[str] = Counter()
        self.text: list[str] = []
        self.clean: list[str] = []
        self.number = 0
        self.compact = self.flip("no blank lines", 0.2)
        self.bad = 0.1 if self.chance.random() < 0.5 else 0.0

    def flip(self, form: str, likely: float) -> bool:
        happens = self.chance.random() < likely
        self.forms[form] += happens
        return happens

    def made(self) -> Made:
        self.root()
        parts = [self.limits, self.site, self.conditions, self.units]
        self.chance.shuffle(parts)
        for part in parts:
            part()
        text, clean = "".join(self.text), "".join(self.clean)
        if self.flip("no final newline", 0.3):
            text, clean = text.rstrip("\n"), clean.rstrip("\n")
        if self.flip("CRLF", 0.3):
            text, clean = text.replace("\n", "\r\n"), clean.replace("\n", "\r\n")
        if self.flip("byte order mark", 0.2):
            text = f"\ufeff{text}"
        return Made(text, tomllib.loads(clean), self.forms)

    def line(self, text: str, clean: str | None = None) -> None:
        self.text.append(f"{text}\n")
        self.clean.append(f"{text if clean is None else clean}\n")

    def space(self) -> None:
        if not self.compact:
            self.line("")
            if self.chance.random() < 0.2:
                self.line("# free comment ]")
                self.forms["comment line"] += 1
                self.line("")
        if self.flip("comment line", 0.25):
            self.line("# touches = [the next")

    def key(self) -> str:
        self.number += 1
        if self.flip("quoted key", 0.1):
            quoted = self.chance.choice(QUOTED)
            return f"{quoted[:-1]}{self.number}{quoted[-1]}"
        return f"k{self.number}"

    def scalar(self) -> str:
        form = self.chance.choice(tuple(SCALARS))
        self.forms[form] += 1
        return self.chance.choice(SCALARS[form])

    def value(self) -> str:
        kind = self.chance.random()
        if kind < 0.6:
            return self.scalar()
        if kind < 0.7:
            self.forms["one-line array"] += 1
            return "[" + ", ".join(self.scalar() for _ in range(self.chance.randint(0, 3))) + "]"
        return self.inline() if kind < 0.8 else self.lines()

    def lines(self) -> str:
        kind = self.chance.randrange(3)
        if kind == 0:
            self.forms["multi-line array"] += 1
            return f'[ # first\n  {self.scalar()}, # "]\n\n  # ]\n\t{self.scalar()}\n]'
        if kind == 1:
            self.forms["multi-line string"] += 1
            return '"""\n[x]\nkey = 1 # \\""" ""\\\n   end"""'
        self.forms["multi-line literal string"] += 1
        return "'''a\n[[unit]]\n''''"

    def inline(self) -> str:
        self.forms["inline table"] += 1
        entries = []
        for _ in range(self.chance.randint(0, 3)):
            if self.chance.random() < 0.2:
                self.forms["inline table in an inline table"] += 1
                entries.append(f"{self.key()}.x = {{ {self.key()} = {self.scalar()} }}")
            else:
                entries.append(f"{self.key()} = {self.scalar()}")
        return self.chance.choice(("{{{}}}", "{{ {} }}")).format(", ".join(entries))

    def pair(self, indent: str = "", prefix: str = "") -> None:
        key = f"{indent}{prefix}{self.key()}"
        equals = self.chance.choice((" = ", "=", "   =  "))
        comment = "  # as typed, 1 = [" if self.flip("comment on a line", 0.3) else ""
        if self.chance.random() < self.bad:
            self.forms["bad value"] += 1
            raw = self.chance.choice(BAD_VALUES)
            marked = "'" + BAD + raw + "'"
            self.line(f"{key}{equals}{raw}{comment}", f"{key}{equals}{marked}{comment}")
        elif self.chance.random() < self.bad / 2:
            self.forms["empty value"] += 1
            self.line(f"{key} ={comment}", f"{key} = '{BAD}'{comment}")
        else:
            self.line(f"{key}{equals}{self.value()}{comment}")

    def pairs(self, least: int = 0) -> None:
        indent = ""
        if self.flip("indentation", 0.25):
            indent = "  "
        elif self.flip("tabs", 0.1):
            indent = "\t"
        for _ in range(self.chance.randint(least, 4)):
            self.forms["plain key"] += 1
            if self.flip("comment line", 0.1):
                self.line(f"{indent}# above a key")
            self.pair(indent)
        if self.flip("dotted key", 0.25):
            name = self.key()
            self.pair(indent, f"{name}.")
            self.pair(indent, f"{name} . deep.")

    def root(self) -> None:
        if self.flip("comment line", 0.3):
            self.line("# a schedule")
        if self.chance.random() < 0.6:
            self.line("format = 1")
        if self.flip("dotted table", 0.3):
            for _ in range(self.chance.randint(1, 3)):
                self.pair("", "project.")
        elif self.chance.random() < 0.3:
            self.line(f"project = {self.inline()}")
        else:
            self.space()
            self.head("project")
            self.pairs()

    def head(self, name: str) -> None:
        self.forms["table with a head"] += 1
        self.line(f"[{name}]" + ("  # [head]" if self.chance.random() < 0.2 else ""))

    def limits(self) -> None:
        self.space()
        if self.flip("quoted head", 0.3):
            self.head("\"limits\" . 'a b'")
        else:
            self.head(" limits ")
        self.pairs()

    def site(self) -> None:
        if not self.flip("implied super-table", 0.5):
            return
        self.space()
        self.head("site.roof.north")
        self.pairs()
        if self.flip("sub-tables out of order", 0.5):
            self.space()
            self.head("unrelated")
            self.pairs()
            self.space()
            self.head("site")
            self.pairs()

    def conditions(self) -> None:
        for _ in range(self.chance.randint(0, 2)):
            self.space()
            self.forms["array of tables"] += 1
            self.line("[[condition]]")
            self.pairs(1)

    def units(self) -> None:
        if self.chance.random() < 0.3:
            self.inline_units()
            return
        for place in range(self.chance.randint(0, 4)):
            self.unit(place)

    def unit(self, place: int) -> None:
        self.space()
        self.forms["array of tables"] += 1
        self.line("[[unit]]" + (" # the unit" if self.chance.random() < 0.2 else ""))
        self.line(f'tag = "AHU-{place}"')
        self.pairs()
        if self.flip("element interrupted by a table", 0.1):
            self.space()
            self.head(f"between{place}")
            self.pairs()
        if self.flip("sub-table of an element", 0.25):
            self.space()
            self.head("unit.extra.more")
            self.pairs()
        for _ in range(self.chance.choice((0, 0, 1, 2))):
            self.forms["array in an element"] += 1
            if self.chance.random() < 0.5:
                self.space()
            self.line("  [[unit.accepted]]")
            self.line('  check = "x"')
            self.pairs()

    def inline_units(self) -> None:
        # Such an array is a key of the file, so it must stand before all tables.
        units = [f'{{ tag = "AHU-{n}", accepted = [{self.inline()}] }}' for n in range(3)]
        if self.flip("inline array of tables on one line", 0.5):
            text = f"unit = [{', '.join(units[: self.chance.randint(0, 3)])}]\n"
        else:
            self.forms["inline array of tables on lines"] += 1
            last = self.chance.choice(("", ",", ", # the last"))
            lines = [f"  {unit}, # unit {n}\n" for n, unit in enumerate(units[:2])]
            text = "".join(("unit = [\n", "  # above\n", *lines, f"  {units[2]}{last}\n", "]\n"))
        self.text.insert(0, text)
        self.clean.insert(0, text)


def make(seed: int) -> Made:
    """Return the document of a seed."""
    return Maker(seed).made()


@pytest.fixture(scope="session")
def make_document():
    return make


@pytest.fixture(scope="session")
def documents() -> list[Made]:
    return [make(seed) for seed in range(300)]


@pytest.fixture(scope="session")
def forms() -> tuple[str, ...]:
    return FORMS
