"""Acceptances lapse with every input of their finding, and with nothing else.

A schedule with findings of every way of asking: of a unit, at each condition, at the rated and the
governing one, in heating, of a plant, of a condition, of the whole schedule. Each cell of the file
is changed in turn, and keys that are not there are stated. What must lapse is told by the findings
themselves: whatever changes one of a finding's numbers was an input of it. What must not lapse it
is told by hand, from what each check is about.
"""

from __future__ import annotations

import re
from collections import defaultdict
from functools import lru_cache
from typing import Any

import pytest

from schedtui.review.accept import basis
from schedtui.review.reviewed import review
from schedtui.schedule.load import load
from schedtui.schedule.view import view

TEXT = """\
[project]
title = "Inputs"
units = "IP"
number = "2614"
altitude = 2460
airflow_basis = "standard"

[limits]
total_margin = 2
sensible_margin = 1
oversize = 20

[defaults]
room_db = 75
room_rh = 50
room_heat_db = 70

[[column]]
key = "filter"
heading = "Filter"
group = "Filters"

[[condition]]
name = "peak"
season = "cooling"
outdoor_db = 95.0
outdoor_wb = 75.0

[[condition]]
name = "humid"
season = "cooling"
outdoor_db = 74.0
outdoor_wb = 76.5

[[condition]]
name = "winter"
season = "heating"
outdoor_db = 5.0
outdoor_rh = 80

[[plant]]
name = "chilled water"
serves = "cooling"
capacity = 300
flow = 40
diversity = 95

[[unit]]
tag = "AHU-1"
serves = "hall"
location = "roof"
filter = "F7"
conditions = ["peak", "winter"]
supply_airflow = 10000
outdoor_airflow = 2500
outdoor_required = 2600
return_rise = 2.0
duct_rise = 1.0
fan_total_pressure = 4.0
fan_external_pressure = 5.0
fan_efficiency = 65
fan_power = 9.7
motor_power = 7.5
cool_eat_db = 80.1
cool_eat_wb = 66.5
cool_lat_db = 55.0
cool_lat_wb = 54.0
cool_total = 300.0
cool_sensible = 200.0
cool_tons = 30.0
cool_ewt = 44.0
cool_lwt = 56.0
cool_flow = 40.0
room_sensible = 260.0
room_latent = 90.0
cool_face_area = 14.0
heat_lat_db = 95.0
heat_total = 300.0
heat_ewt = 180.0
heat_lwt = 150.0
heat_flow = 15.0
room_heat = 350.0
room_heat_rh = 35
humidifier = 20.0

[[unit]]
tag = "AHU-2"
supply_airflow = 8000
outdoor_airflow = 1000
fan_rise = 2.0
cool_lat_db = 55.0
cool_lat_wb = 54.0
cool_total = 900.0
cool_ewt = 45.0
cool_lwt = 55.0
cool_flow = 60.0

[[unit]]
tag = "AHU-2"
cool_total = 100
cool_flow = 5.0
"""

# Findings that are followed: check, condition, and the label of what it is about.
FOLLOWED = (
    ("cool-total-short", "peak", "AHU-1"),
    ("cool-water-short", "peak", "AHU-1"),
    ("room-sensible-short", "peak", "AHU-1"),
    ("room-latent-short", "peak", "AHU-1"),
    ("cool-sensible-short", "peak", "AHU-1"),
    ("motor-short", None, "AHU-1"),
    ("outdoor-air-short", None, "AHU-1"),
    ("external-above-total", None, "AHU-1"),
    ("tons-mismatch", None, "AHU-1"),
    ("oversized", "peak", "AHU-2"),
    ("heat-total-short", "winter", "AHU-1"),
    ("heat-water-short", "winter", "AHU-1"),
    ("room-heat-short", "winter", "AHU-1"),
    ("humidifier-short", "winter", "AHU-1"),
    ("plant-capacity-short", "peak", "plant chilled water"),
    ("plant-flow-short", "peak", "plant chilled water"),
    ("wet-above-dry", "humid", "condition humid"),
    ("tag-duplicate", None, "AHU-2"),
    ("plant-water-mismatch", "peak", "plant chilled water"),
)

CELL = re.compile(r"^(\w+) = (.*)$")
TEXTS = ("serves", "location", "filter", "title", "number")
# Keys that are stated where they are not, below the first unit's tag, and what they become.
ADDED = {
    "remarks": '["seen"]', "bypass": "10", "fan_position": '"blow-through"', "cool_rows": "6",
    "recovery_sensible": "50", "motor_efficiency": "93.0", "exhaust_airflow": "2000",
    "heat_airflow": "9000", "quantity": "2", "cool_basis": '"net"', "duct_rise": "1.5",
    "cool_glycol": "30", "room_rh_max": "60", "preheat_lat_db": "45", "fan_count": "2",
    "supply_airflow_min": "2000", "airflow_basis": '"actual"', "standby": "1",
}  # fmt: skip

# What a check must not read, as the section and key of a cell, by what it is about.
NOTHING = {("project", key) for key in ("title", "number")}
NOTHING |= {("unit 1", key) for key in ("serves", "location", "filter", "remarks", "cool_rows")}
OTHERS = {("unit 2", "cool_total"), ("unit 2", "supply_airflow"), ("unit 3", "cool_total")}
COOLING_KEYS = {
    ("unit 1", key)
    for key in ("cool_total", "cool_sensible", "cool_lat_wb", "cool_flow", "cool_ewt", "cool_tons")
}
HEATING_KEYS = {
    ("unit 1", key)
    for key in ("heat_total", "heat_lat_db", "heat_flow", "room_heat", "humidifier", "heat_airflow")
}
WINTER = {("condition 3", "outdoor_db"), ("condition 3", "outdoor_rh")}
SUMMER = {("condition 1", "outdoor_db"), ("condition 1", "outdoor_wb")}
HUMID = {("condition 2", "outdoor_db"), ("condition 2", "outdoor_wb")}
PLANT = {("plant 1", key) for key in ("capacity", "flow", "diversity")}
MOTOR = {("unit 1", "motor_power")}
AIR = {("project", "altitude")}
COOLED = NOTHING | OTHERS | HEATING_KEYS | WINTER | HUMID | PLANT | MOTOR
HEATED = NOTHING | OTHERS | COOLING_KEYS | SUMMER | HUMID | PLANT | MOTOR
OF_ROW = NOTHING | OTHERS | HEATING_KEYS | COOLING_KEYS | WINTER | SUMMER | HUMID | PLANT
NOT_READ: dict[str, set[tuple[str, str]]] = {
    "cool-total-short": COOLED | {("unit 1", "cool_flow"), ("unit 1", "cool_sensible")},
    "cool-water-short": COOLED | {("unit 1", "cool_sensible")},
    "room-sensible-short": COOLED | {("unit 1", "cool_flow"), ("unit 1", "room_latent")},
    "room-latent-short": COOLED | {("unit 1", "cool_flow"), ("unit 1", "room_sensible")},
    "cool-sensible-short": COOLED | {("unit 1", "cool_total"), ("unit 1", "cool_flow")},
    "motor-short": OF_ROW - MOTOR | AIR,
    "outdoor-air-short": OF_ROW | MOTOR | AIR,
    "external-above-total": OF_ROW | MOTOR | AIR,
    "tons-mismatch": (OF_ROW | AIR) - {("unit 1", "cool_total"), ("unit 1", "cool_tons")},
    "heat-total-short": HEATED | {("unit 1", "heat_flow"), ("unit 1", "humidifier")},
    "heat-water-short": HEATED | {("unit 1", "heat_total"), ("unit 1", "humidifier")},
    "room-heat-short": HEATED | {("unit 1", "heat_total"), ("unit 1", "heat_flow")},
    "humidifier-short": HEATED | {("unit 1", "heat_total"), ("unit 1", "heat_lat_db")},
    "plant-capacity-short": NOTHING | HEATING_KEYS | WINTER | MOTOR,
    "plant-flow-short": NOTHING | HEATING_KEYS | WINTER | MOTOR,
    "wet-above-dry": OF_ROW - HUMID | MOTOR | {("unit 1", "supply_airflow")},
    "tag-duplicate": OF_ROW | MOTOR | {("unit 1", "supply_airflow")},
    "plant-water-mismatch": NOTHING | HEATING_KEYS | MOTOR | WINTER,
}


def changes() -> list[tuple[tuple[str, str], str]]:
    """Return every single change: where, and the file's text with it."""
    made: list[tuple[tuple[str, str], str]] = []
    section, counted = "", defaultdict[str, int](int)
    lines = TEXT.splitlines()
    for place, line in enumerate(lines):
        if line.startswith("["):
            name = line.strip("[]")
            counted[name] += 1
            section = name if line[1] != "[" else f"{name} {counted[name]}"
        elif (cell := CELL.match(line)) is not None and cell[1] not in ("units", "name", "key"):
            for value in _others(cell[1], cell[2]):
                changed = [*lines[:place], f"{cell[1]} = {value}", *lines[place + 1 :]]
                made.append(((section, cell[1]), "\n".join(changed) + "\n"))
    for key, value in ADDED.items():
        if f"\n{key} = " not in TEXT.split("[[unit]]")[1]:
            text = TEXT.replace('tag = "AHU-1"\n', f'tag = "AHU-1"\n{key} = {value}\n')
            made.append((("unit 1", key), text))
    return made


def _others(key: str, value: str) -> list[str]:
    """Return other values of a cell: its digits changed, and its number."""
    if (key in TEXTS and value != '"cooling"') or key in ("heading", "group"):
        return [f'{value[:-1]} 2"']
    if not value[0].isdigit():
        return []
    digits = len(value.partition(".")[2])
    step = 10**-digits
    return [f"{float(value) + step:.{digits}f}", f"{float(value):.{digits + 1}f}"]


@lru_cache(maxsize=1000)
def reviewed(text: str) -> Any:
    document = load(text)
    assert document.problems == ()
    return review(view(document))


def found(text: str, followed: tuple[str, str | None, str]) -> Any:
    check, condition, label = followed
    return next(
        (
            one
            for one in reviewed(text).all_findings
            if (one.check, one.condition) == (check, condition)
            and one.subject.label.startswith(label)
        ),
        None,
    )


def digest(text: str, finding: Any) -> str:
    return basis(finding, reviewed(text).schedule)


@pytest.mark.parametrize("followed", FOLLOWED, ids=lambda one: one[0])
def test_it_lapses_with_every_input(followed):
    before = found(TEXT, followed)
    assert before is not None
    was, inputs = digest(TEXT, before), 0
    for where, text in changes():
        after = found(text, followed)
        if after is None:
            inputs += 1  # gone, and its acceptance with it
        elif (after.scheduled, after.required) != (before.scheduled, before.required):
            assert digest(text, after) != was, where
            inputs += 1
    assert inputs or before.scheduled is None


@pytest.mark.parametrize("followed", FOLLOWED, ids=lambda one: one[0])
def test_it_stands_whatever_else_changes(followed):
    before = found(TEXT, followed)
    was, stood = digest(TEXT, before), 0
    lapsed = set()
    for where, text in changes():
        if where in NOT_READ.get(followed[0], NOTHING):
            after = found(text, followed)
            assert after is not None, where
            stood += 1
            if digest(text, after) != was:
                lapsed.add(where)
    assert lapsed == set()
    assert stood >= 5


DRY = """
[[condition]]
name = "dry"
season = "cooling"
outdoor_db = 99.0
outdoor_wb = 62.0

"""


@pytest.mark.parametrize("before", ['[[condition]]\nname = "peak"', "[[plant]]"])
@pytest.mark.parametrize("check", ["cool-total-short", "room-heat-short", "motor-short"])
def test_it_stands_where_a_condition_joins_that_it_does_not_read(check, before):
    followed = next(one for one in FOLLOWED if one[0] == check)
    text = TEXT.replace(before, DRY + before, 1)
    after = found(text, followed)
    assert digest(text, after) == digest(TEXT, found(TEXT, followed))


ROOM = """
[project]
title = "Room air"
units = "IP"
airflow_basis = "standard"
[[unit]]
tag = "FCU-1"
supply_airflow = 1000
room_db = 75
room_rh = 50
fan_rise = 0
cool_lat_db = 55.0
cool_lat_wb = 54.0
cool_total = 20.0
"""


@pytest.mark.parametrize("line", ["supply_airflow = 1010", "room_db = 76", "cool_total = 20.1"])
def test_it_lapses_where_the_file_has_no_condition(line):
    """A unit that takes in room air alone is computed at a condition named "room"."""
    key = line.split(" = ", maxsplit=1)[0]
    text = re.sub(rf"^{key} = .*$", line, ROOM, flags=re.MULTILINE)
    assert text != ROOM
    followed = ("cool-total-short", "room", "FCU-1")
    assert digest(text, found(text, followed)) != digest(ROOM, found(ROOM, followed))


ROUNDED = """
[project]
title = "Rounded"
units = "IP"
[limits]
rounding = "allow"
rounding_cap = 5
[[condition]]
name = "peak"
season = "cooling"
outdoor_db = 95
outdoor_wb = 75
[[unit]]
tag = "AHU-1"
supply_airflow = 10000
return_db = 80
return_wb = 67
fan_rise = 0
cool_lat_db = 55
cool_lat_wb = 54
cool_total = 390
"""


@pytest.mark.parametrize("line", ['rounding = "strict"', "rounding_cap = 6"])
def test_it_lapses_with_what_is_said_of_digits(line):
    """A caution within the printed digits was accepted; what it becomes by another rule was not."""
    followed = ("cool-total-short", "peak", "AHU-1")
    before = found(ROUNDED, followed)
    assert before.rounding
    key = line.split(" = ", maxsplit=1)[0]
    text = re.sub(rf"^{key} = .*$", line, ROUNDED, flags=re.MULTILINE)
    assert digest(text, found(text, followed)) != digest(ROUNDED, before)
