"""Which condition governs, which one the schedule was rated at, and how units are called."""

import pytest

from schedtui.errors import Absent
from schedtui.schedule.load import load
from schedtui.schedule.view import view

HEAD = """\
[project]
title = "Conditions"
units = "IP"
airflow_basis = "standard"
"""
DRY = 'name = "dry"\nseason = "cooling"\noutdoor_db = 95\noutdoor_wb = 70\n'
HUMID = 'name = "humid"\nseason = "cooling"\noutdoor_db = 85\noutdoor_wb = 78\n'
WINTER = 'name = "winter"\nseason = "heating"\noutdoor_db = 5\noutdoor_wb = 4\n'
ALL_OUTDOOR = """\
[[unit]]
tag = "AHU-1"
supply_airflow = 10000
outdoor_airflow = 10000
cool_lat_db = 55
cool_lat_wb = 54
"""
ALL_RETURN = """\
[[unit]]
tag = "AHU-1"
supply_airflow = 10000
return_db = 80
return_wb = 67
cool_lat_db = 55
cool_lat_wb = 54
"""


def schedule(*conditions, unit=ALL_OUTDOOR):
    return HEAD + "".join(f"[[condition]]\n{one}" for one in conditions) + unit


@pytest.fixture
def case(one_unit):
    return lambda *args, **options: one_unit(schedule(*args, **options)).case


def test_the_greatest_coil_total_governs(case):
    # Enthalpies on the handbook's chart: 85/78 °F 41.4 Btu/lb, 95/70 °F 33.8.
    assert case(DRY, HUMID).governing.name == "humid"
    assert case(HUMID, DRY).governing.name == "humid"


def test_ties_go_to_the_first_in_the_file(case):
    again = HUMID.replace("humid", "again")
    assert case(HUMID, again).governing.name == "humid"
    assert case(again, HUMID).governing.name == "again"


def test_a_heating_condition_never_governs(case):
    found = case(WINTER, DRY)
    assert found.governing.name == "dry"
    assert [at.name for at in found.heating] == ["winter"]


def test_only_the_conditions_that_a_unit_names_apply(case):
    unit = ALL_OUTDOOR + 'conditions = ["dry"]\n'
    found = case(DRY, HUMID, WINTER, unit=unit)
    assert [one.name for one in found.conditions] == ["dry"]
    assert found.governing.name == "dry"


def test_nothing_governs_where_no_coil_is_computed(case):
    unit = ALL_OUTDOOR.replace("cool_lat_db = 55\n", "")
    with pytest.raises(Absent) as absent:
        case(DRY, unit=unit).governing  # noqa: B018  asked for its absence
    assert "cool_lat_db" in absent.value.keys


def test_a_condition_without_a_coil_load_leaves_the_others_to_govern(case):
    """Air that cannot be is an absence at its condition, and nowhere else."""
    no_air = 'name = "slip"\nseason = "cooling"\noutdoor_db = 95\noutdoor_wb = 40\n'
    assert case(no_air, DRY).governing.name == "dry"


def test_rated_is_where_the_entering_air_was_scheduled(case):
    at_dry = ALL_OUTDOOR + "cool_eat_db = 95\ncool_eat_wb = 70\n"
    at_humid = ALL_OUTDOOR + "cool_eat_db = 85\ncool_eat_wb = 78\n"
    assert case(DRY, HUMID, unit=at_dry).rated.name == "dry"
    assert case(DRY, HUMID, unit=at_humid).rated.name == "humid"
    assert case(DRY, HUMID, unit=at_dry).governing.name == "humid"


def test_rated_is_governing_where_no_entering_state_is_scheduled(case):
    found = case(DRY, HUMID)
    assert found.rated is found.governing


@pytest.mark.parametrize(
    ("db", "wb", "rated"),
    [
        (97.9, 70, True),  # 2.9 limits of 1 °F away
        (98.1, 70, False),
        (95, 72.9, True),
        (95, 73.1, False),
        (93, 72, True),  # the greater of the two counts, not their sum
    ],
)
def test_rated_lies_within_three_limits_of_the_scheduled_state(case, db, wb, rated):
    found = case(DRY, unit=ALL_OUTDOOR + f"cool_eat_db = {db}\ncool_eat_wb = {wb}\n")
    assert found.nearest.name == "dry"
    if rated:
        assert found.rated.name == "dry"
    else:
        with pytest.raises(Absent):
            found.rated  # noqa: B018  asked for its absence


def test_the_distance_counts_in_the_project_s_own_limits(case):
    unit = "[limits]\nentering_db = 5\n" + ALL_OUTDOOR + "cool_eat_db = 105\ncool_eat_wb = 70\n"
    assert case(DRY, unit=unit).rated.name == "dry"


def test_one_scheduled_bulb_is_enough_to_be_near(case):
    unit = ALL_OUTDOOR + "cool_eat_wb = 78\n"
    assert case(DRY, HUMID, unit=unit).rated.name == "humid"


def test_a_part_load_condition_is_not_what_a_schedule_is_rated_at(case):
    part = HUMID + "sensible_load = 70\n"
    near = ALL_OUTDOOR + "cool_eat_db = 85\ncool_eat_wb = 78\n"
    with pytest.raises(Absent):
        case(part, DRY, unit=near).rated  # noqa: B018  asked for its absence
    full = HUMID.replace("humid", "full").replace("85", "86")
    assert case(part, full, unit=near).rated.name == "full"


@pytest.mark.parametrize("outdoor", ["", "outdoor_airflow = 0\n"])
def test_a_unit_without_outdoor_air_needs_no_condition(case, outdoor):
    found = case(unit=ALL_RETURN + outdoor)
    assert [at.name for at in found.cooling] == ["room"]
    # 45 000 lb/h from 80/67 to 55/54 °F (Fundamentals 2017, ch. 1)
    assert found.governing.coil.total == pytest.approx(399.5, rel=1e-3)


def test_a_unit_with_outdoor_air_and_no_condition_is_not_computed(case):
    found = case()
    assert found.cooling == ()
    with pytest.raises(Absent, match="no cooling condition"):
        found.governing  # noqa: B018  asked for its absence


def test_the_face_velocity_is_of_the_air_that_leaves_the_coil(case):
    # 45 000 lb/h at 13.154 ft³/lb, the real-gas volume at 55/54 °F, over 20 ft².
    found = case(unit=ALL_RETURN + "cool_face_area = 20\n")
    assert found.face_velocity == pytest.approx(45_000 / 60 * 13.154 / 20, rel=1.5e-3)


def called(reviewed, *tags):
    text = HEAD + "".join(f"[[unit]]\n{tag}\n" for tag in tags)
    return [unit.label for unit in reviewed(text).units.values()]


def test_units_are_called_by_their_tags(reviewed):
    assert called(reviewed, 'tag = "AHU-1"', 'tag = "AHU-2"') == ["AHU-1", "AHU-2"]


def test_a_tag_used_again_is_counted(reviewed):
    tags = ['tag = "A"', 'tag = "B"', *['tag = "A"'] * 3]
    assert called(reviewed, *tags) == ["A", "B", "A (2nd)", "A (3rd)", "A (4th)"]


def test_ordinals_of_the_teens_and_the_twenties(reviewed):
    found = called(reviewed, *['tag = "A"'] * 23)
    assert found[10:13] == ["A (11th)", "A (12th)", "A (13th)"]
    assert found[20:] == ["A (21st)", "A (22nd)", "A (23rd)"]


def test_a_unit_whose_tag_cannot_be_read_is_called_by_its_place():
    document = load(HEAD + '[[unit]]\ntag = "A"\n[[unit]]\ntag = 7\n[[unit]]\nserves = "x"\n')
    assert document.problems
    assert list(view(document).labels().values()) == ["A", "unit 2", "unit 3"]
