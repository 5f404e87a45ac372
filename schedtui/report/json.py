"""A review as the JSON that scripts read: full precision, project units, absent keys absent."""

from __future__ import annotations

from typing import TYPE_CHECKING, Any, TypeVar

from schedtui.report.page import CAUTION
from schedtui.review.cooling import Cooling
from schedtui.review.figure import known
from schedtui.review.finding import Severity, margin
from schedtui.review.part_load import PartLoad
from schedtui.review.quantities import (
    COOLING_FIGURES,
    COOLING_STATES,
    HEATING_FIGURES,
    HEATING_STATES,
    UNIT_FIGURES,
)
from schedtui.review.remedy import plant_remedies, remedies_by_check
from schedtui.schedule.load import FORMAT

if TYPE_CHECKING:
    from schedtui.air.state import State
    from schedtui.review.finding import Finding
    from schedtui.review.heating import Heating
    from schedtui.review.quantities import Figure
    from schedtui.review.remedy import Remedy
    from schedtui.review.reviewed import PlantReview, Review, UnitReview

T = TypeVar("T")

_PROPERTIES = ("db", "wb", "dp", "rh", "w", "h", "v")


def review_object(review: Review, file: str) -> dict[str, Any]:
    """Return a review as an object of JSON.

    Args:
        review: the review.
        file: the file's name as the person gave it.
    """
    project, totals = review.schedule.project, review.totals()
    return {
        "file": file,
        "format": FORMAT,
        "project": {
            "title": project.title,
            "units": review.schedule.system,
            "pressure": review.site.air.pressure,
        },
        "counts": review.counts(),
        "units": [_unit(unit) for unit in review.units.values()],
        "plants": [_plant(plant) for plant in review.plants],
        "findings": [_finding(one) for one in review.findings],
        "totals": {
            "tons": totals.tons,
            "supply_airflow": totals.supply_airflow,
            "outdoor_airflow": totals.outdoor_airflow,
        },
        "caution": CAUTION,
    }


def _unit(reviewed: UnitReview) -> dict[str, Any]:
    case = reviewed.case
    made: dict[str, Any] = {"tag": reviewed.unit.tag, "status": reviewed.status}
    for key, at in (
        ("governing", known(lambda: case.governing)),
        ("rated", known(lambda: case.rated)),
        ("heat_governing", known(lambda: case.heat_governing)),
    ):
        if at is not None:
            made[key] = at.name
    made["conditions"] = {
        at.name: _cooling(at) if isinstance(at, Cooling) else _heating(at)
        for at in case.evaluations
    }
    made |= _figures(case, UNIT_FIGURES)
    cures = remedies_by_check(reviewed)
    made["findings"] = [_finding(one, cures.get(one.check)) for one in reviewed.findings]
    return made


def _plant(reviewed: PlantReview) -> dict[str, Any]:
    case = reviewed.case
    made: dict[str, Any] = {"name": case.name}
    load, flow = known(lambda: case.load), known(lambda: case.flow)
    between = {
        "condition": known(lambda: case.governing),
        "load": load,
        "flow": flow,
        "load_margin": _margin(case.plant.capacity, load),
        "flow_margin": _margin(case.plant.flow, flow),
    }
    made |= {key: value for key, value in between.items() if value is not None}
    made["findings"] = [
        _finding(one, plant_remedies(reviewed, one) if one.severity is Severity.SHORT else None)
        for one in reviewed.findings
    ]
    return made


def _margin(scheduled: float | None, required: float | None) -> float | None:
    return None if scheduled is None or not required else margin(scheduled, required)


def _cooling(at: Cooling) -> dict[str, Any]:
    guessed = {"estimate": True} if isinstance(at, PartLoad) and at.estimated else {}
    states, figures = _states(at, COOLING_STATES), _figures(at, COOLING_FIGURES)
    return {"season": "cooling", **guessed, **states, **figures}


def _heating(at: Heating) -> dict[str, Any]:
    return {"season": "heating", **_states(at, HEATING_STATES), **_figures(at, HEATING_FIGURES)}


def _figures(of: T, figures: tuple[Figure[T], ...]) -> dict[str, float]:
    return {figure.key: value for figure in figures if (value := known(figure.get, of)) is not None}


def _states(at: object, names: tuple[tuple[str, str], ...]) -> dict[str, Any]:
    return {
        name: state_object(state)
        for name, attribute in names
        if (state := known(getattr, at, attribute)) is not None
    }


def state_object(state: State) -> dict[str, float]:
    """Return a state of air as an object of JSON; properties it does not have are left out."""
    return {
        name: value for name in _PROPERTIES if (value := known(getattr, state, name)) is not None
    }


def _finding(finding: Finding, cures: tuple[Remedy, ...] | None = None) -> dict[str, Any]:
    made: dict[str, Any] = {"check": finding.check, "severity": finding.severity.word}
    if finding.condition is not None:
        made["condition"] = finding.condition
    made["fields"] = list(finding.paths)
    for key in ("scheduled", "required", "margin"):
        value = getattr(finding, key)
        if value is not None:
            made[key] = value
    if finding.unit and finding.scheduled is not None:
        made["unit"] = finding.unit
    made["message"] = finding.message
    made["accepted"] = finding.accepted
    if finding.rounding:
        made["rounding"] = True
    if cures is not None and finding.severity is Severity.SHORT:
        made["remedies"] = [_remedy(finding, one) for one in cures]
    return made


def _remedy(finding: Finding, remedy: Remedy) -> dict[str, Any]:
    """Return a remedy: its last change, with the others that go along, if any."""
    *others, change = [
        {"field": finding.subject.path(one.field), "value": one.value, "unit": one.unit}
        for one in remedy.changes
    ]
    along = {"with": others} if others else {}
    return {**change, **along, "worsens": list(remedy.worsens)}
