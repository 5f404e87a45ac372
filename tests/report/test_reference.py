"""The reference tables: everything that the program knows, each with its words."""

from schedtui.report.page import Table
from schedtui.report.reference import checks_table, columns_table, keys_table, limits_table
from schedtui.review.quantities import COLUMNS
from schedtui.review.registry import registered
from schedtui.schedule.catalogue.condition import Condition
from schedtui.schedule.catalogue.limits import Limits
from schedtui.schedule.catalogue.plant import Plant
from schedtui.schedule.catalogue.unit import Unit

# Of the contract's list of unit keys, from every group of them; none may get lost.
KEYS = {
    "tag", "without", "quantity", "conditions", "plants", "airflow_basis", "heat_airflow",
    "supply_airflow", "room_rh", "room_heat_db", "return_rise", "recovery_latent", "fan_position",
    "fan_power", "motor_in_airstream", "cool_lat_at", "cool_tons", "bypass_source", "cool_rows",
    "cool_glycol", "preheat_at", "heat_steam_pressure", "humidifier", "wrap_drop", "fan_count",
    "recovery_exhaust_min", "return_fan_power", "standby", "room_latent", "remarks",
}  # fmt: skip
SEVERITIES = {"short", "conflict", "caution", "missing"}


def rows(table: Table) -> dict[str, tuple[str, ...]]:
    return {row[0]: row[1:] for row in table.rows}


def test_every_row_is_as_wide_as_its_head():
    tables = [keys_table(Unit), keys_table(Condition), limits_table(), checks_table()]
    for table in (*tables, columns_table()):
        assert table.rows
        assert {len(row) for row in table.rows} == {len(table.headings)}


def test_the_keys_of_a_unit():
    found = rows(keys_table(Unit))
    assert set(found) >= KEYS
    assert all(words.endswith(".") and accepted for words, accepted, _ in found.values())
    assert found["tag"][2] == "required"
    assert found["quantity"][2] == "1"
    assert "draw-through" in found["fan_position"][1] + found["fan_position"][2]


def test_ranges_are_told_in_both_systems_where_they_differ():
    _, accepted, _ = rows(keys_table(Unit))["cool_lat_db"]
    assert "°F" in accepted
    assert "°C" in accepted
    assert accepted.count("; ") == 1
    _, share, _ = rows(keys_table(Unit))["bypass"]
    assert share.count("%") == 1


def test_other_tables_have_theirs():
    assert rows(keys_table(Plant))["diversity"][2] == "100"
    assert rows(keys_table(Condition))["outdoor_db"][2] == "required"


def test_limits_have_their_defaults():
    found = rows(limits_table())
    assert set(found) == set(Limits.catalogue)
    assert found["agreement"][1] == "1 %"
    assert found["sensible_agreement"][1] == "2 %; 2.5 %"
    assert found["face_velocity_cooling"][1] == "550 fpm; 2.8 m/s"
    assert found["rounding"][1] == "allow"


def test_checks_have_severity_sentence_and_source():
    found = rows(checks_table())
    assert list(found) == list(registered())
    for severity, sentence, source in found.values():
        assert severity in SEVERITIES
        assert sentence.endswith(".")
        assert source


def test_columns_have_their_units():
    found = rows(columns_table())
    assert set(found) == {column.key for column in COLUMNS}
    assert found["total_required"][2:] == ("MBH", "kW")
