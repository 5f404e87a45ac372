from __future__ import annotations

import pytest

from schedtui.errors import ScheduleError
from schedtui.schedule.load import load, nearest_key

HEAD = '[project]\ntitle = "Mill"\nunits = "IP"\n'
SUMMER = (
    '[[condition]]\nname = "summer"\nseason = "cooling"\noutdoor_db = 95.0\noutdoor_wb = 75.0\n'
)


def sentences(document):
    return [f"{problem.line}: {problem}" for problem in document.problems]


def test_a_good_file_has_no_problem_and_its_cells_as_typed():
    document = load(HEAD + SUMMER + '[[unit]]\ntag = "A"\nsupply_airflow = 9440.0 # cfm\n')
    assert document.problems == document.unknown == ()
    cell = document.rows("unit")[0].cells["supply_airflow"]
    assert (cell.text, cell.value, cell.toml) == ("9440.0", 9440.0, "9440.0")


def test_a_bad_value_is_a_bad_cell_and_a_problem_with_its_line_and_the_rest_is_read():
    document = load(HEAD + '\n[[unit]]\ntag = "A"\nsupply_airflow = 9,440 # cfm\nquantity = 2\n')
    row = document.rows("unit")[0]
    assert row.cells["supply_airflow"].bad
    assert (row.text("supply_airflow"), row.text("quantity")) == ("9,440", "2")
    assert sentences(document) == [
        '7: A supply_airflow: "9,440" is not a number; accepted: 0 or more cfm'
    ]


def test_problems_are_told_in_the_order_of_their_lines():
    text = "[[unit]]\n" + SUMMER.replace("95.0", "x") + HEAD.replace('"Mill"', "5")
    lines = [problem.line for problem in load(text).problems]
    assert lines == [1, 5, 8]


@pytest.mark.parametrize(
    ("text", "line", "about"),
    [
        ("", 1, "project: is missing"),
        ("format = 2\n" + HEAD, 1, "format: 2 is not a format"),
        (HEAD.replace("IP", "US"), 3, 'project units: "US" is none of the choices'),
        (HEAD.replace('units = "IP"\n', ""), 1, "project units: is missing"),
        (HEAD + "[unit]\n", 4, "unit: is no array of tables"),
        ("limits = 5\n" + HEAD, 1, "limits: is no table"),
        (HEAD + "[[unit\n", 4, "[[unit"),
        (HEAD + 'notes = ["a\n', 4, 'notes = ["a'),
    ],
)
def test_only_what_makes_the_rest_meaningless_stops_the_reading(text, line, about):
    with pytest.raises(ScheduleError) as refused:
        load(text, "works.toml")
    assert refused.value.file == "works.toml"
    assert refused.value.problems[0].line == line
    assert str(refused.value.problems[0]).startswith(about)


def test_a_table_of_the_wrong_shape_does_not_hide_the_other_problems():
    text = 'limits = 5\nplant = "x"\n' + HEAD + '[[unit]]\ntag = "A"\nquantity = 0\n'
    with pytest.raises(ScheduleError) as refused:
        load(text)
    assert [(one.line, one.key) for one in refused.value.problems] == [
        (1, "limits"),
        (2, "plant"),
        (8, "quantity"),
    ]


def test_without_a_unit_system_only_what_is_wrong_in_both_is_told():
    text = HEAD.replace("IP", "US") + (
        '[[unit]]\ntag = "A"\ncool_eat_db = 200\nheat_eat_db = 500\nquantity = 0\n'
    )
    with pytest.raises(ScheduleError) as refused:
        load(text)
    units, temperature, quantity = map(str, refused.value.problems)
    assert units.startswith("project units")
    assert temperature == (
        "A heat_eat_db: 500 is out of range; accepted: -100 to 300 °F in IP, -75 to 150 °C in SI"
    )
    assert quantity == "A quantity: 0 is out of range; accepted: a whole number, 1 or more"


def test_what_nothing_reads_is_kept_and_named():
    text = HEAD + (
        "[vendor]\na = 1\n[[unit]]\ntag = 'A'\nweight = 4.50\n[unit.motor]\nb = 2\n[[rows]]\n"
    )
    document = load("colour = 'red'\n" + text)
    assert document.unknown == ("colour", "vendor", "rows")
    row = document.rows("unit")[0]
    assert (row.text("weight"), row.cells["weight"].value) == ("4.50", None)
    assert row.text("motor") == ""
    assert document.problems == ()


@pytest.mark.parametrize(
    "text",
    [
        "[unit.vendor]\na = 1\n",
        "[[unit.vendor]]\na = 1\n",
        "vendor.a = 1\n",
        "vendor = {a = 1}\n",
        "[unit.vendor.deeper]\na = 1\n",
    ],
)
def test_a_table_in_a_unit_is_kept_in_every_form(text):
    document = load(HEAD + '[[unit]]\ntag = "A"\n' + text)
    assert "vendor" in document.rows("unit")[0].cells
    assert document.problems == ()


def test_what_is_no_toml_is_told_once_wherever_it_stands():
    text = HEAD + (
        '[[unit]]\ntag = "A"\nweight = 1,2\nremarks = ["a", b]\n[unit.motor]\nsize = big\n'
        "[vendor]\nlist = [1, x]\n"
    )
    assert sentences(load(text)) == [
        "6: A weight: 1,2 is no TOML value",
        (
            '7: A remarks: ["a", b] is no list of texts; '
            'accepted: a list of texts such as ["one", "two"]'
        ),
        "9: unit.motor.size: big is no TOML value",
        "11: vendor.list: [1, x] is no TOML value",
    ]


def test_acceptances_are_rows_of_their_unit_and_of_the_file():
    text = HEAD + (
        '[[unit]]\ntag = "A"\n[[unit.accepted]]\ncheck = "a"\nreason = "r"\non = 2026-11-30\n'
        '[[unit.accepted]]\ncheck = "b"\nreason = "r"\n'
        '[[accepted]]\nof = "project"\ncheck = "c"\nreason = "r"\n'
    )
    document = load(text)
    assert document.problems == ()
    row = document.rows("unit")[0]
    assert [one.text("check") for one in row.accepted] == ["a", "b"]
    assert "accepted" not in row.cells
    assert [one.text("of") for one in document.rows("accepted")] == ["project"]


def test_own_columns_are_read_wherever_they_stand_in_the_file():
    unit = '[[unit]]\ntag = "A"\nfilter = "MERV 13"\n'
    column = '[[column]]\nkey = "filter"\nheading = "Filter"\n'
    for text in (HEAD + unit + column, HEAD + column + unit):
        document = load(text)
        assert document.rows("unit")[0].cells["filter"].value == "MERV 13"


@pytest.mark.parametrize(
    ("table", "key", "near"),
    [
        ("unit", "supply_airflw", "supply_airflow"),
        ("unit", "moter_power", "motor_power"),
        ("condition", "outdor_db", "outdoor_db"),
        ("limits", "agrement", "agreement"),
        ("unit", "weight", None),
        ("unit", "x" * 10_000, None),
    ],
)
def test_the_nearest_known_key_is_found_if_one_is_close(table, key, near):
    assert nearest_key(table, key) == near
