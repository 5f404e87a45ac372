"""What the tests of the review share: drawn projects, the oracle, and short ways to a review."""

from __future__ import annotations

from dataclasses import dataclass
from typing import TYPE_CHECKING, Any

import pytest
import tomli_w

from schedtui.review.case import UnitCase
from schedtui.review.reviewed import Review, UnitReview, review
from schedtui.review.site import site_of
from schedtui.schedule.load import load
from schedtui.schedule.view import view
from tests.review import drawn, invented_winter
from tests.review.oracle_cooling import CoolingPath
from tests.review.oracle_heating import HeatingPath

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping


def _reviewed(text: str | Mapping[str, Any]) -> Review:
    if not isinstance(text, str):
        text = tomli_w.dumps(text)
    document = load(text)
    assert document.problems == ()
    return review(view(document))


@pytest.fixture(scope="session")
def reviewed() -> Callable[[str | Mapping[str, Any]], Review]:
    """Review a file's text, or its tables as plain values; every value in it must be readable."""
    return _reviewed


@pytest.fixture(scope="session")
def one_unit() -> Callable[[str], UnitReview]:
    """Review a file's text and return its first unit."""
    return lambda text: next(iter(_reviewed(text).units.values()))


# Drawn units, evaluated and not judged


@dataclass(frozen=True)
class Drawn:
    """A drawn unit at a condition: as the program has it, and as the oracle does."""

    system: str
    unit: dict[str, Any]
    condition: dict[str, Any]
    case: UnitCase
    at: Any
    path: Any

    @property
    def blows_through(self) -> bool:
        return self.unit.get("fan_position") == "blow-through"


def _pairs(projects: Callable[[str], Any], path: Any) -> list[Drawn]:
    found = []
    for system in ("IP", "SI"):
        for project in projects(system):
            document = load(tomli_w.dumps(project.document()))
            assert document.problems == ()
            schedule = view(document)
            site = site_of(schedule)
            for row, unit in zip(schedule.units, project.units, strict=True):
                case = UnitCase(row, schedule, site)
                for at, condition in zip(case.evaluations, project.conditions, strict=True):
                    oracle = path(project.values, condition, unit)
                    found.append(Drawn(system, unit, condition, case, at, oracle))
    return found


@pytest.fixture(scope="session")
def cooled() -> list[Drawn]:
    """Every drawn unit at each of its cooling conditions."""
    return _pairs(drawn.projects, CoolingPath)


@pytest.fixture(scope="session")
def heated() -> list[Drawn]:
    """Every drawn unit at each of its heating conditions."""
    return _pairs(drawn.winters, HeatingPath)


@pytest.fixture(scope="session")
def winters() -> list[UnitCase]:
    """The cases of the invented units in winter."""
    return [
        unit.case
        for document in invented_winter.documents(12)
        for unit in _reviewed(document).units.values()
    ]
