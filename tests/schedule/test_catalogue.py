"""The keys of every table but the units and the limits against the contract, copied by hand."""

from __future__ import annotations

import pytest

from schedtui.schedule.load import CATALOGUES

# By table: each key with its units (IP, SI), None for what is no number; ! where it is required.
EXPECTED = {
    "project": {
        "title!": None,
        "notes": None,
        "number": None,
        "issue": None,
        "units!": None,
        "altitude": ("ft", "m"),
        "pressure": ("psia", "kPa"),
        "airflow_basis": None,
    },
    "column": {"key!": None, "heading!": None, "group": None},
    "condition": {
        "name!": None,
        "season!": None,
        "outdoor_db!": ("°F", "°C"),
        "outdoor_wb": ("°F", "°C"),
        "outdoor_dp": ("°F", "°C"),
        "outdoor_rh": ("%", "%"),
        "outdoor_w": ("lb/lb", "kg/kg"),
        "sensible_load": ("%", "%"),
        "latent_load": ("%", "%"),
        "source": None,
    },
    "plant": {
        "name!": None,
        "serves!": None,
        "capacity": ("MBH", "kW"),
        "flow": ("gpm", "L/s"),
        "diversity": ("%", "%"),
    },
    "accepted": {
        "of": None,
        "check!": None,
        "condition": None,
        "by": None,
        "on": None,
        "reason!": None,
        "fields": None,
        "basis": None,
    },
    # `counts` and `limits` of the record are tables of their own, kept as they stand.
    "record": {
        "by": None,
        "on": None,
        "version": None,
        "digest": None,
        "open_findings": None,
    },
}
DEFAULTS = {
    ("project", "airflow_basis"): "standard",
    ("condition", "sensible_load"): 100,
    ("condition", "latent_load"): 100,
    ("plant", "diversity"): 100,
}


@pytest.mark.parametrize("table", EXPECTED)
def test_the_keys_of_a_table_are_those_of_the_contract(table):
    catalogue = CATALOGUES[table].catalogue
    assert {key + "!" * field.required for key, field in catalogue.items()} == set(EXPECTED[table])


@pytest.mark.parametrize("table", EXPECTED)
def test_the_numbers_of_a_table_have_the_units_of_the_contract(table):
    for key, field in CATALOGUES[table].catalogue.items():
        quantity = field.quantity
        units = None if quantity is None else (quantity.unit("IP"), quantity.unit("SI"))
        assert units == EXPECTED[table].get(key, EXPECTED[table].get(f"{key}!")), key


@pytest.mark.parametrize("place", DEFAULTS)
def test_a_key_has_the_default_of_the_contract(place):
    table, key = place
    assert getattr(CATALOGUES[table](0, "IP", {}), key) == DEFAULTS[place]


def test_every_table_of_the_file_has_a_catalogue():
    assert set(CATALOGUES) == {*EXPECTED, "limits", "defaults", "unit"}
