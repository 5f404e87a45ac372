"""Short ways to a review, for the reports."""

from __future__ import annotations

from typing import TYPE_CHECKING

import pytest

from schedtui.review.reviewed import Review, review
from schedtui.schedule.load import load
from schedtui.schedule.view import view

if TYPE_CHECKING:
    from collections.abc import Callable


def _reviewed(text: str) -> Review:
    document = load(text)
    assert document.problems == ()
    return review(view(document))


@pytest.fixture(scope="session")
def reviewed() -> Callable[[str], Review]:
    """Review a file's text; every value in it must be readable."""
    return _reviewed


WORKS = """\
[project]
title = "Example [b]Works[/b]"
units = "IP"
pressure = 13.4
airflow_basis = "standard"

[[condition]]
name = "summer peak"
season = "cooling"
outdoor_db = 96.0
outdoor_wb = 75.0

[[condition]]
name = "humid"
season = "cooling"
outdoor_db = 84.0
outdoor_wb = 77.0

[[condition]]
name = "winter"
season = "heating"
outdoor_db = 5.0
outdoor_wb = 90.0

[[unit]]
tag = "AHU-1"
supply_airflow = 10000
outdoor_airflow = 2000
room_db = 75
room_rh = 50
fan_rise = 2.0
cool_lat_db = 55.0
cool_lat_wb = 54.0
cool_total = 300.0
cool_sensible = 500.0

[[unit]]
tag = "AHU-1"
quantity = 2
supply_airflow = 4000
conditions = ["winter"]

[[unit]]
tag = "=1+1 | *2* 冷水"
supply_airflow = 9000
return_db = 80
return_wb = 67
fan_rise = 0
cool_lat_db = 55.0
cool_lat_wb = 54.0
"""


@pytest.fixture(scope="session")
def works() -> Review:
    """A schedule with a short unit, a duplicate tag, impossible weather and an odd tag."""
    return _reviewed(WORKS)
