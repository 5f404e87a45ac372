"""Numbers as text: the digits they state, and the forms in which a person may type them.

The text is what a schedule keeps, so it is mended here as little as TOML needs and never
written anew. Knows nothing of units.
"""

from __future__ import annotations

import math
import re

from schedtui.errors import AmountError

# Without exponent and underscores: the only form whose digits say how closely it is stated.
_STATED = re.compile(r"[+-]?[0-9]+(?:\.([0-9]+))?")

# What the start of typed text may be, up to whatever is no part of a number any more.
NUMBER_START = r"[+-]?(?:0[xob][0-9A-Fa-f_]+|(?=\.?[0-9])[0-9_,]*\.?[0-9_,]*(?:[eE][+-]?[0-9]+)?)"

_DECIMAL = re.compile(r"([+-]?)([0-9](?:_?[0-9])*)?(?:\.([0-9](?:_?[0-9])*)?)?([eE][+-]?[0-9]+)?")
_OTHER_BASE = re.compile(r"0x[0-9A-Fa-f](?:_?[0-9A-Fa-f])*|0o[0-7](?:_?[0-7])*|0b[01](?:_?[01])*")
_GROUPED = re.compile(r"[+-]?[1-9][0-9]{0,2}(?:,[0-9]{3})+(?:\.[0-9]*)?")


def decimals(text: str) -> int | None:
    """Return the decimals of a number as typed; None for a form that states no digits.

    Args:
        text: the number's text as it stands in the file.

    >>> decimals("66.0"), decimals("66"), decimals("6.6e1"), decimals("0x42")
    (1, 0, None, None)
    """
    stated = _STATED.fullmatch(text)
    return None if stated is None else len(stated[1] or "")


def step(text: str) -> float | None:
    """Return the worth of the last digit of a number as typed; None where none is stated.

    Args:
        text: the number's text as it stands in the file.

    >>> step("66.0"), step("9440"), step("9_440")
    (0.1, 1.0, None)
    """
    places = decimals(text)
    return None if places is None else float(f"1e-{places}")


def resolution(number: str) -> float:
    """Return the worth of a number's last digit whatever its form, the exponent included.

    Unlike `step` this is no statement of precision: it tells how many digits a converted
    number needs.

    Args:
        number: a number as TOML writes it.

    >>> resolution("3.20"), resolution("4_500"), resolution("1.5e3")
    (0.01, 1.0, 100.0)
    """
    if _OTHER_BASE.fullmatch(number):
        return 1.0
    mantissa, _, exponent = number.replace("_", "").lower().partition("e")
    power = int(exponent or 0) - (decimals(mantissa) or 0)
    return float(f"1e{max(-300, min(power, 300))}")


def format_number(value: float, digits: int) -> str:
    """Return `value` with `digits` decimals: no thousands separators and never a minus zero.

    >>> format_number(9534.99, 0), format_number(-0.04, 1)
    ('9535', '0.0')
    """
    text = f"{value:.{digits}f}"
    return text.lstrip("-") if float(text) == 0 else text


def number_value(number: str) -> float:
    """Return the value of a number that TOML takes.

    Raises:
        AmountError: a float cannot hold it.
    """
    try:
        value = float(int(number, 0)) if _OTHER_BASE.fullmatch(number) else float(number)
    except OverflowError:
        value = math.inf
    if not math.isfinite(value):
        raise AmountError("is too large a number")
    return value


def number_text(typed: str) -> str:
    """Return a typed number in a form that TOML takes, its digits kept.

    Args:
        typed: digits as a person types them: `9,440`, `.5`, `007`, `+5`, `-0`.

    Raises:
        AmountError: it is no number, or its commas group no thousands.

    >>> number_text("9,440"), number_text(".50"), number_text("-0.0"), number_text("66.0")
    ('9440', '0.50', '0.0', '66.0')
    """
    if _OTHER_BASE.fullmatch(typed):
        return typed
    parts = _DECIMAL.fullmatch(_without_commas(typed) if "," in typed else typed)
    if parts is None or not (parts[2] or parts[3]):
        raise AmountError("is not a number; type digits with at most one decimal point")
    sign, whole, fraction, exponent = (part or "" for part in parts.groups())
    digits = (whole.lstrip("0_") or "0") + (f".{fraction}" if fraction else "") + exponent
    return digits if sign == "-" and float(digits) == 0 else sign + digits


def _without_commas(typed: str) -> str:
    """Return a number without the commas that group its thousands; refuse any other comma."""
    joined = typed.replace(",", "")
    if _GROUPED.fullmatch(typed):
        return joined
    whole, _, fraction = typed.partition(",")
    if "." in whole:
        raise AmountError("is not a number; type digits with at most one decimal point")
    # A single comma may as well be the decimal sign of another country: name both readings.
    readings = [f"{whole or 0}.{fraction}"] if fraction.isdigit() else []
    if whole.strip("+-0"):
        readings.append(joined)
    choices = " or ".join(readings) or "one number"
    raise AmountError(f"has a comma that does not group thousands; type {choices}")
