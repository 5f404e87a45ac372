"""The row's loads all miss its own numbers by the ratio of a wrong air density.

Standard air taken for site air at altitude, a correction made twice or not at all, the density
along the standard atmosphere's lapse instead of p/p₀: each leaves every load of the row off by one
and the same ratio. Where a load is short or does not balance, this is why.
"""

from __future__ import annotations

from itertools import combinations
from typing import TYPE_CHECKING

from schedtui.air.flow import dry_air_mass
from schedtui.review.check import DENSITY, Check, Faults
from schedtui.review.figure import known
from schedtui.review.finding import Fault, Severity
from schedtui.units import RATIO

if TYPE_CHECKING:
    from collections.abc import Iterator

    from schedtui.review.case import UnitCase

_ONE_RATIO = 0.01  # what the ratios of two loads may part by and still be one
_LIKE = 0.02  # what the ratio may part by from that of a wrong density
_MARGIN = 0.06  # selection margin that may stand on top, where the density is plainly another:
_PLAIN = 0.1  # by more than this
_APART = 0.04  # a wrong density nearer than this to the right one is nobody's mistake
# T/T₀ = (p/p₀)^(1/5.2559) along the standard atmosphere (ICAO; ASHRAE Fundamentals, ch. 1, eq. 3).
_LAPSE = 1 / 5.2559


def find(case: UnitCase) -> Faults:
    """Hold the one ratio of the row's loads to its own numbers against those of wrong densities."""
    ratios = list(_ratios(case))
    for (first, ratio), (second, other) in combinations(ratios, 2):
        if abs(ratio / other - 1) > _ONE_RATIO or _is_margin(case, ratio):
            continue
        fitting = [what for what, wrong in _wrong_densities(case) if _fits(ratio, wrong)]
        if fitting:
            yield Fault(
                "{loads} are both {scheduled} times what the row's own air and airflow give: {why}",
                ("supply_airflow", "airflow_basis"),
                ratio,
                1.0,
                RATIO,
                {"loads": f"{first} and {second}", "why": " or ".join(fitting)},
            )
            return


def _ratios(case: UnitCase) -> Iterator[tuple[str, float]]:
    """Return each scheduled load over the one that the row's own numbers give."""
    unit = case.unit
    for what, scheduled, own in (
        ("total", unit.cool_total, known(lambda: case.row.required_total)),
        ("sensible", unit.cool_sensible, known(lambda: case.row.required_sensible)),
        ("heating", unit.heat_total, known(lambda: case.row_heat.heat_load)),
    ):
        if scheduled and own and own > 0:
            yield what, scheduled / own


def _fits(ratio: float, wrong: float) -> bool:
    """Tell whether a ratio is that of a wrong density, an ordinary margin on top."""
    if abs(wrong - 1) <= _APART:
        return False
    margin = _MARGIN if abs(wrong - 1) > _PLAIN else _LIKE
    return -_LIKE <= ratio / wrong - 1 <= margin


def _is_margin(case: UnitCase, ratio: float) -> bool:
    """Tell whether loads so far above the row's own may simply be a margin, which is no fault."""
    return 1 < ratio <= 1 + case.site.limits.row_excess / 100


def _wrong_densities(case: UnitCase) -> Iterator[tuple[str, float]]:
    """Name wrong densities with the ratio of the mass they make to the row's own."""
    density = case.site.air.density_ratio
    along_lapse = density / density**_LAPSE
    basis = case.row.basis
    if basis == "standard":
        yield "as if the standard airflow were taken for site air", density
        yield "as if it were corrected by the density along the standard atmosphere", along_lapse
    elif basis == "site":
        yield "as if it were not corrected for the site", 1 / density
        yield "as if it were corrected for the site twice", density
        yield (
            "as if it were corrected by the density along the standard atmosphere",
            along_lapse / density,
        )
    else:
        standard = dry_air_mass(case.row.supply_airflow, "standard", case.site.air)
        yield (
            "as if the actual airflow were taken for standard air",
            standard / case.row.supply_mass,
        )


CHECK = Check(
    severity=Severity.CAUTION,
    sentence="The row's loads do not all miss its own numbers by a density ratio.",
    source="common practice",
    rank=DENSITY,
    reads_digits=False,
    unit=find,
)
