from __future__ import annotations

from schedtui.cli.exit_status import ExitStatus


def test_the_statuses_are_those_that_scripts_know():
    assert {status.name: int(status) for status in ExitStatus} == {
        "CLEAR": 0,
        "FOUND": 1,
        "FAILED": 2,
    }
