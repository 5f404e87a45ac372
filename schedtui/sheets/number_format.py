"""A stored number as a spreadsheet shows it, by the number format of its cell.

Only what bears on a number's digits: decimals, thousands, percent, the words beside it. Colours,
fill characters and widths are skipped.
"""

from __future__ import annotations

import re
from datetime import datetime, timedelta
from decimal import ROUND_HALF_UP, Decimal, localcontext

# The formats that a workbook names by number alone (ECMA-376 part 1, 18.8.30).
BUILT_IN = {
    0: "General", 1: "0", 2: "0.00", 3: "#,##0", 4: "#,##0.00", 9: "0%", 10: "0.00%",
    11: "0.00E+00", 12: "# ?/?", 13: "# ??/??", 14: "mm-dd-yy", 15: "d-mmm-yy", 16: "d-mmm",
    17: "mmm-yy", 18: "h:mm AM/PM", 19: "h:mm:ss AM/PM", 20: "h:mm", 21: "h:mm:ss",
    22: "m/d/yy h:mm", 37: "#,##0_);(#,##0)", 38: "#,##0_);(#,##0)", 39: "#,##0.00_);(#,##0.00)",
    40: "#,##0.00_);(#,##0.00)", 45: "mm:ss", 46: "[h]:mm:ss", 47: "mm:ss.0", 48: "##0.0E+0",
    49: "@",
}  # fmt: skip

_LONGEST_FORMAT = 255
_DIGITS = 15  # that a spreadsheet keeps
_PART = re.compile(
    r'"(?P<quoted>[^"]*)"|\\(?P<escaped>.)|[_*].|\[(?P<bracket>[^\]]*)\]'
    r"|(?P<digits>[0#?][0#?,]*(?:\.[0#?]*)?(?:[Ee][+-][0#?]+)?|\.[0#?]+)(?P<scale>,*)"
    r"|(?P<percent>%)|(?P<general>General)|(?P<other>.)",
    re.IGNORECASE | re.DOTALL,
)
_DATE = re.compile(r"[dmyhs]", re.IGNORECASE)
_EPOCH, _EPOCH_1904 = datetime(1899, 12, 30), datetime(1904, 1, 1)  # noqa: DTZ001  no zone is stored
_LAST_DAY = 2_958_465  # 9999-12-31


def shown(stored: str, form: str, *, since_1904: bool = False) -> tuple[str, str | None]:
    """Return what a cell shows, and the number in it as a plain decimal.

    Args:
        stored: the number as the workbook stores it.
        form: the cell's number format.
        since_1904: whether the workbook counts days from 1904.

    >>> shown("66", "0.0"), shown("0.35", "0%"), shown("9440", "#,##0")
    (('66.0', '66.0'), ('35%', '35'), ('9,440', '9440'))
    """
    value = Decimal(stored)
    if not value.is_finite() or abs(value.adjusted()) > 40:  # noqa: PLR2004  no schedule's number
        return stored, None
    sections = _sections(form[:_LONGEST_FORMAT])
    section = sections[0]
    if value < 0 and len(sections) > 1 and not _is_date(sections[1]):
        return _negative(-value, sections[1])
    if value == 0 and len(sections) > 2:  # noqa: PLR2004  positive; negative; zero; text
        section = sections[2]
    if _is_date(section):
        return _day(float(value), since_1904=since_1904), None
    return _formatted(value, section)


def _negative(size: Decimal, section: str) -> tuple[str, str | None]:
    """Return a negative number as its own section shows it, with a minus sign for brackets."""
    text, number = _formatted(size, section)
    if number is None:
        return text, None
    return f"-{text.strip('()- ')}", f"-{number}"


def _sections(form: str) -> list[str]:
    """Part a format at its semicolons, those in quotation marks apart."""
    return re.findall(r'(?:"[^"]*"|\\.|[^;"\\])+', form) or ["General"]


def _is_date(section: str) -> bool:
    bare = re.sub(r'"[^"]*"|\\.|\[[^\]hms]*\]|General', "", section, flags=re.IGNORECASE)
    return bool(_DATE.search(re.sub(r"E[+-]", "", bare)))


def _day(value: float, *, since_1904: bool) -> str:
    if not 0 <= value <= _LAST_DAY:
        return str(value)
    moment = (_EPOCH_1904 if since_1904 else _EPOCH) + timedelta(days=value)
    return f"{moment:%Y-%m-%d}" if value == int(value) else f"{moment:%Y-%m-%d %H:%M}"


def _formatted(value: Decimal, section: str) -> tuple[str, str | None]:
    parts = list(_PART.finditer(section))
    percent = any(part["percent"] for part in parts)
    digits = next((part for part in parts if part["digits"]), None)
    words = [_word(part) for part in parts]
    if "?/" in section or "#/" in section:  # a fraction shows no decimals: its value counts
        number = _plain(value)
        return number, number
    if digits is None and not any(part["general"] or part["other"] == "@" for part in parts):
        return "".join(words).strip(), None  # words alone: the dash that stands for zero
    if digits is not None and not value and not re.search("[0#]", digits["digits"]):
        return "".join(words).strip(), None  # places that a zero leaves blank
    scaled = value * 100 if percent else value
    if digits is None:
        number = text = _plain(scaled)
    else:
        scaled /= 1000 ** len(digits["scale"])
        text, number = _with_digits(scaled, digits["digits"])
    at = parts.index(digits) if digits else 0
    before, after = "".join(words[:at]), "".join(words[at + (digits is not None) :])
    return f"{before}{text}{'%' if percent else ''}{after}".strip(), number


def _word(part: re.Match[str]) -> str:
    """Return what a part of a format shows beside the digits."""
    if part["other"] and part["other"] != "@":
        return part["other"]
    if part["bracket"] and part["bracket"].startswith("$"):
        return part["bracket"][1:].partition("-")[0]
    return part["quoted"] or part["escaped"] or ""


def _with_digits(value: Decimal, digits: str) -> tuple[str, str]:
    mantissa, exponent, _ = digits.partition("E") if "E" in digits else (digits, "", "")
    decimals = mantissa.partition(".")[2]
    with localcontext() as context:
        context.prec = 60
        if exponent:
            text = f"{value:.{len(decimals)}E}"
            return text, _plain(value)
        number = str(value.quantize(Decimal(1).scaleb(-len(decimals)), ROUND_HALF_UP))
    while number[-1] == "0" and "." in number and decimals.endswith("#"):
        number, decimals = number[:-1], decimals[:-1]
    number = number.rstrip(".")
    if "," not in mantissa:
        return number, number
    whole, point, rest = number.partition(".")
    return f"{int(whole):,}{point}{rest}" if whole not in ("-0", "") else number, number


def _plain(value: Decimal) -> str:
    """Return a number with the digits that a spreadsheet keeps and no exponent."""
    text = f"{float(value):.{_DIGITS}g}"
    return f"{Decimal(text):f}" if "e" in text else text
