"""What units together draw from a plant, against hand arithmetic.

Heating: 45 000 lb/h (10 000 cfm of standard air) with 0.001 lb/lb of moisture take
45 000 · (0.240 + 0.444 · 0.001) = 10.81998 MBH a degree. Mixed air of 10 °F outdoors and 70 °F
return is 58 °F, and up to 95 °F are 37 degrees or 400.34 MBH; with 35 °F outdoors it is 63 °F and
346.24 MBH.
Cooling: 10 000 cfm of return air from 80/67 to 55/54 °F 399.5 MBH (handbook), of outdoor air from
95/70 °F 507 and from 85/78 °F 850 (real-gas model).
"""

import pytest

from schedtui.errors import Absent
from schedtui.review.remedy import plant_remedies

HEATED = 37 * 10.81998
MILD = 32 * 10.81998
COOLED = 399.5
HOT = 488.50  # Btu/h per gpm and °F of water at 170 °F, CoolProp
COLD = 501.66  # at 49 °F

WINTERS = """
[project]
title = "Plants"
units = "IP"
[[condition]]
name = "winter"
season = "heating"
outdoor_db = 10.0
outdoor_w = 0.001
[[condition]]
name = "mild"
season = "heating"
outdoor_db = 35.0
outdoor_w = 0.001
[defaults]
supply_airflow = 10000
outdoor_airflow = 2000
room_heat_db = 70
heat_lat_db = 95
"""
SUMMERS = """
[project]
title = "Plants"
units = "IP"
[[condition]]
name = "dry"
season = "cooling"
outdoor_db = 95
outdoor_wb = 70
[[condition]]
name = "humid"
season = "cooling"
outdoor_db = 85
outdoor_wb = 78
[defaults]
supply_airflow = 10000
return_db = 80
return_wb = 67
cool_lat_db = 55
cool_lat_wb = 54
fan_rise = 0
"""


def plant(serves="heating", name="plant", **values):
    lines = [f"{key} = {value}" for key, value in values.items()]
    return "\n".join(["[[plant]]", f'name = "{name}"', f'serves = "{serves}"', *lines, ""])


def unit(*lines, tag="AHU-1"):
    return "\n".join(["[[unit]]", f'tag = "{tag}"', *lines, ""])


@pytest.fixture
def plants(reviewed):
    return lambda *parts: [one.case for one in reviewed("".join(parts)).plants]


@pytest.fixture
def first(plants):
    return lambda *parts: plants(*parts)[0]


# Sums, condition by condition


def test_every_unit_at_the_same_condition(first):
    found = first(WINTERS, plant(), unit(), unit(tag="AHU-2"))
    assert found.load_at("winter") == pytest.approx(2 * HEATED, rel=1e-6)
    assert found.load_at("mild") == pytest.approx(2 * MILD, rel=1e-6)
    assert found.governing == "winter"
    assert found.load == found.load_at("winter")


def test_a_unit_counts_where_its_conditions_are(first):
    found = first(
        WINTERS, plant(), unit('conditions = ["winter"]'), unit('conditions = ["mild"]', tag="B")
    )
    assert found.load_at("winter") == pytest.approx(HEATED, rel=1e-6)
    assert found.load_at("mild") == pytest.approx(MILD, rel=1e-6)


def test_the_condition_of_the_greatest_sum_governs_not_of_the_greatest_unit(first):
    # Three units in the mild winter alone make more than one in the hard one.
    found = first(
        WINTERS, plant(), unit('conditions = ["winter"]'),
        unit('conditions = ["mild"]', "quantity = 3", tag="B"),
    )  # fmt: skip
    assert found.governing == "mild"
    assert found.load == pytest.approx(3 * MILD, rel=1e-6)


def test_cooling_by_condition(first):
    found = first(
        SUMMERS, plant("cooling"), unit("cool_total = 400"),
        unit("outdoor_airflow = 10000", "cool_total = 900", tag="B"),
    )  # fmt: skip
    assert found.load_at("dry") == pytest.approx(COOLED + 507, rel=5e-3)
    assert found.load_at("humid") == pytest.approx(COOLED + 850, rel=5e-3)
    assert found.governing == "humid"


def test_equal_sums_go_to_the_first_condition(first):
    assert first(SUMMERS, plant("cooling"), unit("cool_total = 400")).governing == "dry"


# Number and diversity


@pytest.mark.parametrize(
    ("lines", "number"),
    [
        ((), 1), (("quantity = 3",), 3), (("quantity = 3", "standby = 1"), 2),
        (("quantity = 2", "standby = 2"), 0),
    ],
)  # fmt: skip
def test_units_that_stand_by_draw_nothing(first, lines, number):
    found = first(WINTERS, plant(), unit("heat_flow = 41.0", *lines), unit(tag="B"))
    assert found.load == pytest.approx((number + 1) * HEATED, rel=1e-6)


@pytest.mark.parametrize("diversity", [100, 85, 50])
def test_diversity_is_of_load_and_flow(first, diversity):
    found = first(WINTERS, plant(diversity=diversity), unit("heat_flow = 41.0", "quantity = 2"))
    assert found.load == pytest.approx(2 * HEATED * diversity / 100, rel=1e-6)
    assert found.flow == pytest.approx(82.0 * diversity / 100, rel=1e-9)


# Which plant feeds which unit


def test_two_plants_of_a_kind_share_by_their_capacities(plants):
    both = plant(name="one", capacity=300) + plant(name="two", capacity=900)
    one, two = plants(WINTERS, both, unit("heat_flow = 40"))
    assert one.load == pytest.approx(HEATED / 4, rel=1e-6)
    assert two.load == pytest.approx(HEATED * 3 / 4, rel=1e-6)
    assert (one.flow, two.flow) == (10, 30)


def test_two_plants_share_alike_where_one_capacity_is_not_known(plants):
    both = plant(name="one", capacity=300) + plant(name="two")
    for found in plants(WINTERS, both, unit()):
        assert found.load == pytest.approx(HEATED / 2, rel=1e-6)


GLYCOL = ('preheat_fluid = "propylene glycol"', "preheat_glycol = 30")


def test_coils_of_different_supply_go_to_the_plants_that_supply_them(plants):
    # 58 °F to 65 by the glycol's preheat, on to 95 °F by the water's coil; what either plant
    # supplies is told by the units that are on it alone.
    both = plant(name="water", capacity=300) + plant(name="glycol", capacity=900)
    water, glycol = plants(
        WINTERS, both,
        unit('plants = ["water", "glycol"]', "preheat_lat_db = 65", *GLYCOL),
        unit('plants = ["water"]', tag="B"),
        unit('plants = ["glycol"]', 'heat_fluid = "propylene glycol"', "heat_glycol = 30", tag="C"),
    )  # fmt: skip
    assert water.load == pytest.approx(HEATED + 30 * 10.81998, rel=1e-6)
    assert glycol.load == pytest.approx(HEATED + 7 * 10.81998, rel=1e-6)


@pytest.mark.parametrize(
    "other",
    [
        unit('plants = ["water"]', tag="B"),
        unit('plants = ["steam"]', 'heat_kind = "steam"', tag="B"),
    ],
    ids=["the water is known", "the steam is known"],
)
def test_a_steam_preheat_is_on_the_plant_that_is_not_the_water_s(plants, other):
    both = plant(name="water", capacity=300) + plant(name="steam", capacity=900)
    mixed = unit('plants = ["water", "steam"]', "preheat_lat_db = 65", 'preheat_kind = "steam"')
    water, steam = plants(WINTERS, both, mixed, other)
    alone = {"water": 0.0, "steam": 0.0}
    alone["steam" if 'heat_kind = "steam"' in other else "water"] = HEATED
    assert water.load == pytest.approx(alone["water"] + 30 * 10.81998, rel=1e-6)
    assert steam.load == pytest.approx(alone["steam"] + 7 * 10.81998, rel=1e-6)


def test_coils_of_different_supply_are_shared_where_no_unit_tells_the_plants_apart(plants):
    both = plant(name="one", capacity=300) + plant(name="two", capacity=900)
    one, two = plants(WINTERS, both, unit("preheat_lat_db = 65", *GLYCOL))
    assert one.load == pytest.approx(HEATED / 4, rel=1e-6)
    assert two.load == pytest.approx(HEATED * 3 / 4, rel=1e-6)


def test_a_unit_that_names_its_plant_is_on_no_other(plants):
    both = plant(name="one", capacity=300) + plant(name="two", capacity=900)
    named = unit('plants = ["one"]')
    one, two = plants(WINTERS, both, named, unit('plants = ["two"]', "quantity = 2", tag="B"))
    assert one.load == pytest.approx(HEATED, rel=1e-6)
    assert two.load == pytest.approx(2 * HEATED, rel=1e-6)


def test_a_cooling_plant_feeds_no_heating_coil(plants):
    both = plant("cooling", "cold") + plant("heating", "hot")
    cold, hot = plants(WINTERS, both, unit())
    assert cold.feeds == ()
    assert len(hot.feeds) == 1


@pytest.mark.parametrize("kind", ["steam", "electric", "gas", "heat pump"])
def test_only_hot_water_is_fed_unless_a_unit_says_otherwise(first, kind):
    found = first(WINTERS, plant(), unit(), unit(f'heat_kind = "{kind}"', tag="B"))
    assert found.load == pytest.approx(HEATED, rel=1e-6)


@pytest.mark.parametrize("kind", ["steam", "heat pump"])
def test_a_unit_that_names_a_plant_is_fed_whatever_its_kind(first, kind):
    found = first(WINTERS, plant(), unit(f'heat_kind = "{kind}"', 'plants = ["plant"]'))
    assert found.load == pytest.approx(HEATED, rel=1e-6)


def test_dx_is_fed_where_it_names_a_plant_only(first):
    dx = ('cool_kind = "dx"', "cool_total = 400")
    assert first(SUMMERS, plant("cooling"), unit(*dx)).feeds == ()
    named = first(SUMMERS, plant("cooling"), unit(*dx, 'plants = ["plant"]'))
    assert named.load == pytest.approx(COOLED, rel=1e-3)


def test_the_preheat_is_on_the_heating_plant_with_its_heating_coil(first):
    # Mixed air of 58 °F to 65 by the preheat, on to 95 °F by the coil: 400.34 MBH together.
    found = first(WINTERS, plant(), unit("preheat_lat_db = 65"))
    assert found.load == pytest.approx(HEATED, rel=1e-6)
    electric = unit("preheat_lat_db = 65", 'preheat_kind = "electric"')
    assert first(WINTERS, plant(), electric).load == pytest.approx(30 * 10.81998, rel=1e-6)


def test_both_of_two_coils_in_series_are_on_the_plant(first):
    # Whatever the state between them, the two together bring 80/67 to 55/54 °F.
    found = first(
        SUMMERS, plant("cooling"),
        unit("precool_lat_db = 65", "precool_lat_wb = 60", "cool_total = 190"),
    )  # fmt: skip
    assert found.load == pytest.approx(COOLED, rel=1e-3)


# Flow


def test_a_scheduled_flow_is_taken_as_it_stands(first):
    found = first(WINTERS, plant(), unit("heat_flow = 50.0", "heat_ewt = 180", "heat_lwt = 160"))
    assert found.flow == 50.0


@pytest.mark.parametrize(
    ("season", "serves", "line", "expected"),
    [
        (WINTERS, "heating", "heat_ewt = 180\nheat_lwt = 160", HEATED * 1000 / (20 * HOT)),
        (SUMMERS, "cooling", "cool_ewt = 44\ncool_lwt = 54\ncool_total = 400",
         COOLED * 1000 / (10 * COLD)),
    ],
)  # fmt: skip
def test_without_one_the_load_over_its_water_s_difference(first, season, serves, line, expected):
    assert first(season, plant(serves), unit(line)).flow == pytest.approx(expected, rel=1e-3)


def test_flows_of_heating_and_preheat_together(first):
    lines = ("heat_flow = 33", "preheat_lat_db = 65", "preheat_flow = 8", "quantity = 2")
    assert first(WINTERS, plant(), unit(*lines)).flow == 82


# Margins and totals


def test_margins_are_of_what_the_units_need(reviewed):
    text = WINTERS + plant(capacity=360, flow=90) + unit("heat_flow = 100")
    (found,) = reviewed(text).plants
    by_check = {one.check: one for one in found.findings}
    assert by_check["plant-capacity-short"].margin == pytest.approx(
        (360 / HEATED - 1) * 100, abs=1e-3
    )
    assert by_check["plant-flow-short"].margin == pytest.approx(-10.0)
    assert by_check["plant-capacity-short"].condition == "winter"


def test_the_project_s_totals_count_units_and_not_those_standing_by(reviewed):
    text = SUMMERS + unit("quantity = 3", "standby = 1") + unit("outdoor_airflow = 10000", tag="B")
    totals = reviewed(text).totals()
    assert totals.supply_airflow == 30_000
    assert totals.outdoor_airflow == 10_000
    assert totals.tons == pytest.approx((2 * COOLED + 850) / 12, rel=5e-3)


# What is not known


def test_a_plant_with_no_unit_has_no_load(first):
    with pytest.raises(Absent, match="feeds no unit"):
        first(WINTERS, plant()).load  # noqa: B018  asked for its absence


def test_units_whose_load_is_not_known_are_named(first):
    gap = unit('without = ["heat_lat_db"]', "heat_total = 400", tag="B")
    assert first(WINTERS, plant(), unit(), gap).unknown("winter") == ("B",)


def test_a_short_plant_with_an_unknown_unit_has_its_remedies(reviewed):
    """What the plant would need is told for what is known; the gap is no reason to fail."""
    gap = unit('without = ["heat_lat_db"]', "heat_total = 400", tag="B")
    (found,) = reviewed(WINTERS + plant(capacity=100) + unit() + gap).plants
    (short,) = [one for one in found.findings if one.check == "plant-capacity-short"]
    assert plant_remedies(found, short)[0].changes[0].value >= HEATED * 0.98


def test_the_project_s_tons_are_of_both_coils_in_series(reviewed):
    lines = ("precool_lat_db = 65", "precool_lat_wb = 60", "cool_total = 190")
    assert reviewed(SUMMERS + unit(*lines)).totals().tons == pytest.approx(COOLED / 12, rel=1e-3)
