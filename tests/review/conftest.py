"""What the tests of the review share: drawn projects, the oracle, and short ways to a review.

Tests are files and no packages, so the modules beside this one are loaded by their paths.
"""

from __future__ import annotations

import importlib.util
import sys
from dataclasses import dataclass
from pathlib import Path
from typing import TYPE_CHECKING, Any

import pytest
import tomli_w

from schedtui.review.case import UnitCase
from schedtui.review.reviewed import Review, UnitReview, review
from schedtui.review.site import site_of
from schedtui.schedule.load import load
from schedtui.schedule.view import view

if TYPE_CHECKING:
    from collections.abc import Callable, Mapping
    from types import ModuleType

HERE = Path(__file__).parent


def _beside(name: str) -> ModuleType:
    full = f"tests.review.{name}"
    if full not in sys.modules:
        spec = importlib.util.spec_from_file_location(full, HERE / f"{name}.py")
        assert spec is not None
        assert spec.loader is not None
        module = importlib.util.module_from_spec(spec)
        sys.modules[full] = module  # where dataclasses look their module up
        spec.loader.exec_module(module)
    return sys.modules[full]


@pytest.fixture(scope="session")
def oracle() -> ModuleType:
    """The air by the real-gas model, and what its paths have in common."""
    return _beside("oracle")


@pytest.fixture(scope="session")
def oracle_cooling(oracle: ModuleType) -> ModuleType:
    """The cooling air path by the real-gas model."""
    assert oracle.__name__ in sys.modules  # it imports from there
    return _beside("oracle_cooling")


@pytest.fixture(scope="session")
def oracle_heating(oracle: ModuleType) -> ModuleType:
    """The heating air path by the real-gas model."""
    assert oracle.__name__ in sys.modules  # it imports from there
    return _beside("oracle_heating")


@pytest.fixture(scope="session")
def drawn() -> ModuleType:
    """The drawn projects."""
    return _beside("drawn")


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
def cooled(drawn: ModuleType, oracle_cooling: ModuleType) -> list[Drawn]:
    """Every drawn unit at each of its cooling conditions."""
    return _pairs(drawn.projects, oracle_cooling.CoolingPath)


@pytest.fixture(scope="session")
def heated(drawn: ModuleType, oracle_heating: ModuleType) -> list[Drawn]:
    """Every drawn unit at each of its heating conditions."""
    return _pairs(drawn.winters, oracle_heating.HeatingPath)
