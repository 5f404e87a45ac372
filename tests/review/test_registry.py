"""The checks that are found, and their names."""

from types import ModuleType

import pytest

from schedtui.errors import SchedtuiError
from schedtui.review import registry
from schedtui.review.check import Check
from schedtui.schedule.catalogue.plant import Plant
from schedtui.schedule.catalogue.unit import Unit

# The first checks of the program; a later one may join, none of these may get lost.
FIRST = {
    "cool-total-short", "cool-sensible-short", "sensible-above-total", "wet-above-dry",
    "outdoor-above-supply", "cool-row-balance", "tag-duplicate", "condition-unknown",
    "unknown-key",
}  # fmt: skip


@pytest.fixture
def found_anew():
    registry.registered.cache_clear()
    yield
    registry.registered.cache_clear()


def test_checks_are_named_after_their_modules():
    names = list(registry.registered())
    assert set(names) >= FIRST
    assert names == sorted(names)
    assert not any("_" in name for name in names)
    assert all(isinstance(check, Check) for check in registry.registered().values())


@pytest.mark.usefixtures("found_anew")
def test_a_registry_that_finds_nothing_is_an_error(monkeypatch, tmp_path):
    empty = ModuleType("empty")
    empty.__path__ = [str(tmp_path)]
    monkeypatch.setattr(registry, "checks", empty)
    with pytest.raises(SchedtuiError, match="no module in empty"):
        registry.registered()


@pytest.mark.parametrize("name", registry.registered())
def test_a_check_judges_keys_that_its_rows_have(name):
    check = registry.registered()[name]
    row = Unit if check.plant is None else Plant
    assert set(check.judges) <= set(row.catalogue)
