from __future__ import annotations

import pytest

from schedtui.schedule.catalogue.unit import Unit
from schedtui.sheets.delimited import text_grid
from schedtui.sheets.heading import read_parts
from schedtui.sheets.importing import read_grids
from schedtui.sheets.known import known_fields
from schedtui.sheets.settle import family_of

COILS = {
    "cool": "COOLING COIL",
    "heat": "HEATING COIL",
    "preheat": "PREHEAT COIL",
    "reheat": "REHEAT COIL",
    "precool": "PRECOOL COIL",
}
# Headings that two fields share under one group: the unit settles them, or nothing does.
SHARED = {
    ("COOLING COIL", "PD"),
    ("L/s",),
    ("ROOM HEATING",),
    ("ROOM HEAT",),
}


def headings():
    for key, field in Unit.catalogue.items():
        group = COILS.get(family_of(key)) or ("RETURN FAN" if key.startswith("return_fan") else "")
        for heading in (*field.headings, field.label):
            parts = (group, heading) if group else (heading,)
            if parts not in SHARED and heading != "kW":
                yield pytest.param(key, parts, id=f"{key}-{heading}")


@pytest.mark.parametrize(("key", "parts"), headings())
def test_each_heading_of_the_catalogue_under_its_group_is_its_fields_and_no_others(key, parts):
    reading = read_parts(parts)
    fits = {known.field.key: known.fits(reading) for known in known_fields()}
    most = max(fits.values())
    assert [found for found, size in fits.items() if size == most and size] == [key]


def test_every_field_is_known_by_some_heading():
    assert [key for key, field in Unit.catalogue.items() if not field.headings] == []


def keys(text):
    read = read_grids([text_grid(text)])
    return [one.keys for one in read.matched[0].placements[1:]]


@pytest.mark.parametrize(
    ("headings_", "values", "found"),
    [
        ("EWT °F,LWT °F", "44,58", [("cool_ewt",), ("cool_lwt",)]),
        ("EWT °F,LWT °F", "180,160", [("heat_ewt",), ("heat_lwt",)]),
        ("EAT °F,LAT °F", "80,55", [("cool_eat_db",), ("cool_lat_db",)]),
        ("EAT °F,LAT °F", "55,95", [("heat_eat_db",), ("heat_lat_db",)]),
        ("EAT °F,GPM", "80,56", [(), ()]),
        ("EAT,CHW GPM", "80.1/66.9,56", [("cool_eat_db", "cool_eat_wb"), ("cool_flow",)]),
        ("COOLING PD (FT),CFM", "10,900", [("cool_fluid_drop",), ("supply_airflow",)]),
        ("COOLING PD (IN WG),CFM", "1,900", [("cool_air_drop",), ("supply_airflow",)]),
        ("COOLING PD,CFM", "10,900", [(), ("supply_airflow",)]),
        ("HEATING ROWS,CFM", "2,900", [(), ("supply_airflow",)]),
        ("HEATING KW,CFM", "20,900", [("heat_electric",), ("supply_airflow",)]),
        ("HEATING KW,L/S SUPPLY", "20,900", [("heat_total",), ("supply_airflow",)]),
        ("HEATING MBH,HEATING GPM,ROWS", "400,40,2", [("heat_total",), ("heat_flow",), ()]),
        ("COOLING MBH,ROWS/FPI", "400,6/10", [("cool_total",), ("cool_rows", "cool_fins")]),
        ("EAT (°F DB),EAT (°F WB)", "80,67", [("cool_eat_db",), ("cool_eat_wb",)]),
        ("CFM,SUPPLY CFM", "800,900", [(), ()]),
        ("CFM,COOLING LAT (MBH)", "900,55", [("supply_airflow",), ()]),
        ("CFM,cool_total", "900,55", [("supply_airflow",), ("cool_total",)]),
    ],
)
def test_what_a_heading_leaves_open_is_settled_or_left(headings_, values, found):
    assert keys(f"TAG,{headings_}\nAHU-1,{values}\n") == found
