"""The keys of a unit against the schedule file's contract, copied here by hand."""

from __future__ import annotations

import pytest

from schedtui.schedule.catalogue.kinds import (
    ChoiceKind,
    FlagKind,
    NumberKind,
    TextKind,
    TextsKind,
)
from schedtui.schedule.catalogue.unit import Unit

# Ranges of the contract, IP and SI: least and greatest accepted, least and greatest refused.
AIR = ((-100, 300, -100.1, 300.1), (-75, 150, -75.1, 150.1))
WATER = ((-100, 450, -100.1, 450.1), (-75, 230, -75.1, 230.1))
DIFFERENCE = None  # the contract states no range for a difference of temperatures
PERCENT = ((0, 100, -0.1, 100.1),) * 2
POSITIVE = ((0, 1e9, -0.1, None),) * 2
ABOVE_ZERO = ((0.1, 100, 0, 100.1),) * 2
BELOW_HUNDRED = ((0, 99.9, -0.1, 100),) * 2
FROM_ONE = ((1, 1000, 0, None),) * 2
FROM_ZERO = ((0, 1000, -1, None),) * 2

AIRFLOW = ("cfm", "L/s", POSITIVE)
TEMPERATURE = ("°F", "°C", AIR)
FLUID = ("°F", "°C", WATER)
RISE = ("°F", "K", DIFFERENCE)
SHARE = ("%", "%", PERCENT)
EFFICIENCY = ("%", "%", ABOVE_ZERO)
LOAD = ("MBH", "kW", POSITIVE)
FLOW = ("gpm", "L/s", POSITIVE)
STEAM = ("lb/h", "kg/h", POSITIVE)
SHAFT = ("bhp", "kW", POSITIVE)
MOTOR = ("hp", "kW", POSITIVE)
PRESSURE = ("in. wg", "Pa", POSITIVE)
AREA = ("ft²", "m²", POSITIVE)
VELOCITY = ("fpm", "m/s", POSITIVE)

_KEYS = (
    ("quantity fan_count", ("", "", FROM_ONE)),
    ("standby cool_rows", ("", "", FROM_ZERO)),
    ("cool_fins", ("per inch", "per 25.4 mm", POSITIVE)),
    (
        (
            "supply_airflow outdoor_airflow outdoor_required return_airflow exhaust_airflow "
            "heat_airflow supply_airflow_min cool_airflow"
        ),
        AIRFLOW,
    ),
    (
        (
            "room_db room_wb room_heat_db return_db return_wb cool_eat_db cool_eat_wb cool_lat_db "
            "cool_lat_wb preheat_eat_db preheat_lat_db heat_eat_db heat_lat_db cool_ambient_db "
            "precool_lat_db precool_lat_wb reheat_lat_db recovery_exhaust_min"
        ),
        TEMPERATURE,
    ),
    ("cool_ewt cool_lwt heat_ewt heat_lwt preheat_ewt preheat_lwt", FLUID),
    ("return_rise fan_rise duct_rise wrap_drop", RISE),
    (
        (
            "room_rh room_heat_rh room_rh_max return_rh recovery_sensible recovery_latent "
            "recovery_heat_sensible recovery_heat_latent cool_glycol heat_glycol preheat_glycol"
        ),
        SHARE,
    ),
    ("bypass", ("%", "%", BELOW_HUNDRED)),
    ("fan_efficiency motor_efficiency return_fan_efficiency heat_efficiency", EFFICIENCY),
    (
        (
            "cool_total cool_sensible preheat_total heat_total precool_total reheat_total "
            "heat_input room_sensible room_latent room_heat"
        ),
        LOAD,
    ),
    ("cool_tons", ("tons", "tons", POSITIVE)),
    ("cool_flow heat_flow preheat_flow", FLOW),
    ("cool_fluid_drop", ("ft wg", "kPa", POSITIVE)),
    ("fan_power return_fan_power", SHAFT),
    ("motor_power return_fan_motor_power", MOTOR),
    (
        (
            "fan_total_pressure fan_external_pressure return_fan_total_pressure cool_air_drop "
            "filter_drop heat_air_drop recovery_drop"
        ),
        PRESSURE,
    ),
    ("cool_face_area heat_face_area", AREA),
    ("cool_face_velocity", VELOCITY),
    ("heat_steam humidifier", STEAM),
    ("heat_steam_pressure", ("psig", "kPa gauge", POSITIVE)),
    ("heat_electric", ("kW", "kW", POSITIVE)),
)
NUMBERS = {key: what for keys, what in _KEYS for key in keys.split()}

FLUIDS = ("water", "propylene glycol", "ethylene glycol")
HEATS = ("hot water", "steam", "electric", "gas", "heat pump")

# The first is the default.
CHOICES = {
    "fan_position": ("draw-through", "blow-through"),
    "cool_kind": ("chilled water", "dx"),
    "cool_lat_at": ("coil", "unit"),
    "cool_basis": ("gross", "net"),
    "bypass_source": ("mixed", "return"),
    "capacity_control": ("coil", "bypass", "reheat", "airflow"),
    "cool_fluid": FLUIDS,
    "heat_fluid": FLUIDS,
    "preheat_fluid": FLUIDS,
    "heat_kind": HEATS,
    "reheat_kind": HEATS,
    "preheat_kind": HEATS,
    "preheat_at": ("mixed", "outdoor"),
    "heat_position": ("before cooling", "after cooling"),
    "glycol_by": ("mass", "volume"),
    "recovery_basis": ("least flow", "supply"),
    "motor_kind": ("standard", "ec"),
    "airflow_basis": ("standard", "site", "actual"),
}
TEXTS = {"tag", "serves", "location"}
LISTS = {"without", "conditions", "plants", "remarks"}
FLAGS = {"motor_in_airstream"}

# What holds where nothing is stated; of every other key, nothing does.
DEFAULTS = {
    "quantity": 1,
    "standby": 0,
    "fan_count": 1,
    "motor_in_airstream": True,
    "return_rise": 0,  # no warming stated is none
    "duct_rise": 0,
    **{key: choices[0] for key, choices in CHOICES.items() if key != "airflow_basis"},
}


def test_the_keys_are_those_of_the_contract():
    assert set(Unit.catalogue) == {*NUMBERS, *CHOICES, *TEXTS, *LISTS, *FLAGS}


@pytest.mark.parametrize("key", Unit.catalogue)
def test_a_key_has_the_default_of_the_contract(key):
    empty = Unit(1, "IP", {})
    assert getattr(empty, key) == DEFAULTS.get(key)


@pytest.mark.parametrize("key", NUMBERS)
def test_a_number_has_the_units_of_the_contract(key):
    quantity = Unit.catalogue[key].quantity
    assert quantity is not None
    assert (quantity.unit("IP"), quantity.unit("SI")) == NUMBERS[key][:2]


@pytest.mark.parametrize("system", ["IP", "SI"])
@pytest.mark.parametrize("key", [key for key, (*_, within) in NUMBERS.items() if within])
def test_a_number_is_accepted_within_the_range_of_the_contract(key, system):
    kind = Unit.catalogue[key].kind
    least, greatest, below, above = NUMBERS[key][2][["IP", "SI"].index(system)]
    for good in (least, greatest):
        assert kind.read(good, str(good), system).value == good
    for bad in (below, above):
        if bad is not None:
            cell = kind.read(bad, str(bad), system)
            assert (cell.value, cell.text) == (None, str(bad))
            assert kind.accepted(system) in cell.problem


@pytest.mark.parametrize("key", CHOICES)
def test_a_choice_is_one_of_the_contract(key):
    assert Unit.catalogue[key].kind == ChoiceKind(CHOICES[key])


def test_the_rest_are_texts_lists_of_texts_and_a_flag():
    kinds = {key: type(field.kind) for key, field in Unit.catalogue.items()}
    assert {key for key, kind in kinds.items() if kind is TextKind} == TEXTS
    assert {key for key, kind in kinds.items() if kind is TextsKind} == LISTS
    assert {key for key, kind in kinds.items() if kind is FlagKind} == FLAGS
    assert {key for key, kind in kinds.items() if kind is NumberKind} == set(NUMBERS)


def test_whole_numbers_are_those_of_the_contract():
    whole = {
        key
        for key, field in Unit.catalogue.items()
        if isinstance(field.kind, NumberKind) and field.kind.whole
    }
    assert whole == {"quantity", "standby", "fan_count", "cool_rows"}


def test_a_unit_needs_a_tag_and_nothing_else():
    assert [key for key, field in Unit.catalogue.items() if field.required] == ["tag"]


def test_defaults_may_state_any_key_but_these():
    assert {key for key, field in Unit.catalogue.items() if field.own_only} == {"tag", "remarks"}


def test_the_alternatives_are_those_of_the_contract():
    alternatives = {}
    for key, field in Unit.catalogue.items():
        if field.instead_of is not None:
            alternatives.setdefault(field.instead_of, set()).add(key)
    assert sorted(map(sorted, alternatives.values())) == [
        ["return_rh", "return_wb"],
        ["room_rh", "room_wb"],
    ]


def test_what_someone_derived_and_printed_stands_for_half_a_step_and_a_given_does_not():
    printed = {key for key, field in Unit.catalogue.items() if field.printed}
    # engineering, rounding: entering states, leaving wet bulbs, loads, tons, water flow, shaft
    # power, pressure drops ...
    assert {"cool_eat_db", "cool_eat_wb", "cool_lat_wb", "heat_eat_db", "preheat_eat_db"} < printed
    assert {"cool_total", "cool_sensible", "heat_total", "cool_tons", "cool_flow"} < printed
    assert {"fan_power", "cool_air_drop", "cool_fluid_drop"} < printed
    # ... and not room states, airflows, leaving dry bulbs, water temperatures, percentages,
    # ratings of motors.
    assert not printed & {
        key for key, (ip, *_) in NUMBERS.items() if ip in ("cfm", "%", "hp") or key.endswith("wt")
    }
    assert not printed & {"room_db", "room_wb", "cool_lat_db", "heat_lat_db", "preheat_lat_db"}


def test_every_key_has_a_label_a_heading_and_a_sentence_of_its_own():
    for key, field in Unit.catalogue.items():
        assert field.key == key
        assert field.label.strip()
        assert field.short == field.short.upper()
        assert field.doc[0].isupper()
        assert field.doc.endswith(".")
    headings = [(field.group, field.short) for field in Unit.catalogue.values()]
    assert len(set(headings)) == len(headings)
