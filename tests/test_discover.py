"""Finding the entries of a folder."""

from __future__ import annotations

import sys
from types import ModuleType

import pytest

import schedtui.units
from schedtui.discover import modules
from schedtui.errors import SchedtuiError


def test_all_modules_of_a_package_come_in_the_order_of_their_names():
    found = [module.__name__ for module in modules(schedtui.units)]
    assert found == [
        "schedtui.units.amount",
        "schedtui.units.number",
        "schedtui.units.quantity",
        "schedtui.units.word",
    ]


def test_a_new_file_is_found_and_imported(tmp_path, monkeypatch):
    folder = tmp_path / "entries_of_a_test"
    folder.mkdir()
    (folder / "__init__.py").touch()
    (folder / "second.py").write_text("WORTH = 2\n")
    (folder / "first.py").write_text("WORTH = 1\n")
    (folder / "notes.txt").write_text("no module\n")
    monkeypatch.syspath_prepend(tmp_path)
    package = __import__(folder.name)
    assert [module.WORTH for module in modules(package)] == [1, 2]
    for name in [name for name in sys.modules if name.startswith(folder.name)]:
        monkeypatch.delitem(sys.modules, name)


def test_a_folder_without_modules_is_an_error(tmp_path):
    package = ModuleType("entries")
    package.__path__ = [str(tmp_path)]
    with pytest.raises(SchedtuiError, match="no module in entries"):
        modules(package)


def test_a_module_that_is_no_package_is_an_error():
    with pytest.raises(SchedtuiError, match="no module in entries"):
        modules(ModuleType("entries"))
