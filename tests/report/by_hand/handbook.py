"""The handbook's formulas as one writes them down beside a calculator, for recomputing workings.

Each is of a step's symbol and takes the numbers that the working prints for it. Written from the
handbook (ASHRAE Handbook—Fundamentals 2017, ch. 1 and 18), not from the program's formulas;
imports nothing of the program.
"""

from __future__ import annotations

from math import exp, log
from typing import TYPE_CHECKING

if TYPE_CHECKING:
    from collections.abc import Callable


def _p_sat_ip(T):  # noqa: N803  the handbook's symbol; eq. 6
    return exp(
        -10440.397 / T - 11.29465 - 0.027022355 * T + 0.000012890360 * T * T
        - 0.0000000024780681 * T * T * T + 6.5459673 * log(T)
    )  # fmt: skip


def _p_sat_ice_ip(T):  # noqa: N803  the handbook's symbol; eq. 5
    return exp(
        -10214.165 / T - 4.8932428 - 0.0053765794 * T + 0.00000019202377 * T * T
        + 0.00000000035575832 * T * T * T - 0.000000000000090344688 * T * T * T * T
        + 4.1635019 * log(T)
    )  # fmt: skip


def _p_sat_si(T):  # noqa: N803  the handbook's symbol; eq. 6, Pa into kPa
    pascal = exp(
        -5800.2206 / T + 1.3914993 - 0.048640239 * T + 0.000041764768 * T * T
        - 0.000000014452093 * T * T * T + 6.5459673 * log(T)
    )  # fmt: skip
    return pascal / 1000


def _mixture(a, b, x, y):
    return (a * x + b * y) / (a + b)


def _line(low, high, t, t_low, t_high):
    return low + (high - low) / (t_high - t_low) * (t - t_low)


BOTH: dict[str, Callable[..., float]] = {
    "p_w RH": lambda rh, p: p * rh / 100,
    "p_w": lambda p: p,
    "W vapour": lambda pw, p: 0.621945 * pw / (p - pw),
    "same": lambda x: x,
    "plus": lambda a, b: a + b,
    "less": lambda a, b: a - b,
    "ratio": lambda a, b: a / b,
    "percent": lambda a: a / 100,
    "times": lambda a, b: a * b,
    "mixture": _mixture,
    "line": _line,
    "BF": lambda leaving, adp, entering: (leaving - adp) / (entering - adp),
    "exhausted": lambda x3, e, m_o, m_x, x1: x3 - e / 100 * (min(m_o, m_x) / m_x) * (x3 - x1),
    "ratio less": lambda a, b, c: (a - b) / (a - c),
    "mean": lambda a, b: (a + b) / 2,
    "recovered": lambda x1, e, m_o, m_x, x3: x1 - e / 100 * (min(m_o, m_x) / m_o) * (x1 - x3),
}
IP: dict[str, Callable[..., float]] = {
    **BOTH,
    "T": lambda t: t + 459.67,
    "p_sat": _p_sat_ip,
    "p_sat ice": _p_sat_ice_ip,
    "station": lambda z: 14.696 * (1 - z * 0.0000068754) ** 5.2559,
    "W wet": lambda wb, ws, t: (
        ((1093 - 0.556 * wb) * ws - 0.240 * (t - wb)) / (1093 + 0.444 * t - wb)
    ),
    "h": lambda t, w: 0.240 * t + w * (1061 + 0.444 * t),
    "t": lambda h, w: (h - 1061 * w) / (0.240 + 0.444 * w),
    "v": lambda t, w, p: 0.37048611 * (t + 459.67) * (1 + 1.607858 * w) / p,
    "m site": lambda q, p, p0: 4.5 * q * (p / p0),
    "m actual": lambda q, v: q * 60 / v,
    "load": lambda m, a, b: m * (a - b) / 1000,
    "water": lambda m, a, b: m * (a - b),
    "water heat": lambda m, t: m * (t - 32) / 1000,
    "tons": lambda q: q * 1000 / 12000,
    "fan flow": lambda m, v: m * v / 60,
    "shaft": lambda q, p, e: q * p / 6356 / (e / 100),
    "fan heat": lambda p, e: p * 2.545 / (e / 100),
    "fan rise": lambda q, m, w: q * 1000 / m / (0.240 + 0.444 * w),
    "by mass": lambda share: share * 1.04 / (share * 1.04 + 100 - share) * 100,
    "water factor": lambda density, heat: density * heat * 60,
    "carried": lambda k, q, t1, t2: k * q * (t1 - t2) / 1000,
}
SI: dict[str, Callable[..., float]] = {
    **BOTH,
    "T": lambda t: t + 273.15,
    "p_sat": _p_sat_si,
    "station": lambda z: 101.325 * (1 - z * 0.0000225577) ** 5.2559,
    "W wet": lambda wb, ws, t: (
        ((2501 - 2.326 * wb) * ws - 1.006 * (t - wb)) / (2501 + 1.86 * t - 4.186 * wb)
    ),
    "h": lambda t, w: 1.006 * t + w * (2501 + 1.86 * t),
    "t": lambda h, w: (h - 2501 * w) / (1.006 + 1.86 * w),
    "v": lambda t, w, p: 0.287042 * (t + 273.15) * (1 + 1.607858 * w) / p,
    "m standard": lambda q: 1.2 * q / 1000,
    "load": lambda m, a, b: m * (a - b),
    "water": lambda m, a, b: m * (a - b) * 3600,
    "water heat": lambda m, t: m * 4.186 * t / 3600,
    "tons": lambda q: q / 3.5168528,
    "fan flow": lambda m, v: m * v * 1000,
    "shaft": lambda q, p, e: q / 1000 * p / 1000 / (e / 100),
    "fan heat": lambda p, e: p / (e / 100),
    "fan rise": lambda q, m, w: q / m / (1.006 + 1.86 * w),
}
