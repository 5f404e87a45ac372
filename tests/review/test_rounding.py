"""What the printed digits of a row explain, and what they do not.

Loads of the corners are computed with the real-gas model, apart from the program; the wet-bulb
formulas at freezing are the handbook's (Fundamentals, ch. 1, eqs. 33 and 35).
"""

import pytest

from tests.review import oracle

HEAD = """\
[project]
title = "Digits"
units = "IP"
airflow_basis = "standard"
[limits]
rounding_cap = {cap}
"""
POUNDS = 45_000  # an hour, in 10 000 cfm of standard air
# A family of coils, entering and leaving bulbs [°F]: from shallow return-air coils to outdoor air.
COILS = (
    (74, 62, 56, 54), (75, 63, 55, 54), (78, 65, 56, 55), (80, 67, 55, 54), (80, 67, 52, 51),
    (85, 71, 54, 53), (90, 75, 55, 54), (95, 78, 53, 52),
)  # fmt: skip
# Half a step either side of three wet and dry bulbs may move a row's total so far at worst [%].
WORST = {0.1: 1.4, 0.5: 6.8, 1.0: 13.6}


def row(eat_db, eat_wb, lat_db, lat_wb, total, *, cap=20, limits="", more=""):
    return f"""{HEAD.format(cap=cap)}{limits}
[[unit]]
tag = "AHU-1"
supply_airflow = 10000
return_db = {eat_db}
return_wb = {eat_wb}
cool_eat_db = {eat_db}
cool_eat_wb = {eat_wb}
cool_lat_db = {lat_db}
cool_lat_wb = {lat_wb}
cool_total = {total}
fan_rise = 0
{more}"""


@pytest.fixture
def found(one_unit):
    """Return the findings of one check in a file's only unit."""
    return lambda text, check: [one for one in one_unit(text).own if one.check == check]


@pytest.fixture
def load():
    """Compute the total between two pairs of bulbs by the real-gas model [MBH]."""

    def bulb(db, wb):
        units = oracle.UNITS["IP"]
        return oracle.moist(units.kelvin(db), oracle.SEA_LEVEL, "B", units.kelvin(wb))

    def total(eat_db, eat_wb, lat_db, lat_wb):
        joule = bulb(eat_db, eat_wb).h - bulb(lat_db, lat_wb).h
        return POUNDS * joule / oracle.UNITS["IP"].enthalpy / 1000

    return total


def corner(load, coil, step):
    """Return the least total that bulbs printed to a step may stand for."""
    eat_db, eat_wb, lat_db, lat_wb = coil
    half = step / 2
    return min(load(eat_db + way * half, eat_wb - half, lat_db, lat_wb + half) for way in (-1, 1))


def printed(number, step):
    return f"{number:.0f}" if step == 1 else f"{number:.1f}"


# The worst cases by printed step


@pytest.mark.parametrize(("step", "worst"), WORST.items())
def test_the_widest_band_by_printed_step(load, step, worst):
    bands = [(1 - corner(load, coil, step) / load(*coil)) * 100 for coil in COILS]
    assert max(bands) <= worst
    assert max(bands) > worst * 0.6


@pytest.mark.parametrize("step", WORST)
@pytest.mark.parametrize("coil", COILS)
def test_the_band_of_a_row_s_total(found, load, coil, step):
    """3 % below the least that the digits may stand for is allowed, and no more.

    The band is the real-gas model's, of the total that the program has: what the two formulas of
    moist air part by is none of it.
    """
    if step == 0.5:  # halves are told by their endings
        coil = [number + 0.5 for number in coil]
    bulbs = [printed(number, step) for number in coil]
    (slip,) = found(row(*bulbs, "1.00"), "cool-row-balance")
    least = 0.97 * slip.required * corner(load, coil, step) / load(*coil)
    (within,) = found(row(*bulbs, f"{least * 1.001:.2f}"), "cool-row-balance")
    assert within.severity.word == "caution"
    assert within.rounding
    (beyond,) = found(row(*bulbs, f"{least * 0.999:.2f}"), "cool-row-balance")
    assert beyond.severity.word == "conflict"
    assert not beyond.rounding


@pytest.mark.parametrize(
    ("bulbs", "halves"),
    [
        (("80.5", "67.0", "55.0", "54.5"), True),
        (("80.0", "67.0", "55.0", "54.0"), False),  # tenths that happen to be whole
        (("80.5", "67.0", "55.2", "54.5"), False),
    ],
)
def test_a_row_in_halves_is_known_by_its_endings(found, bulbs, halves):
    """5 % below is within halves (3 % and 2.9 % or so), and beyond tenths."""
    (slip,) = found(row(*bulbs, "1.00"), "cool-row-balance")
    (one,) = found(row(*bulbs, f"{slip.required * 0.95:.2f}"), "cool-row-balance")
    assert one.rounding is halves


def test_a_required_total_carries_the_leaving_state_s_band_alone(found):
    # Of 399.5 MBH half a degree of the leaving wet bulb is about 12, of the entering about 14.
    whole_entering = found(row(80, 67, "55.0", "54.0", "388.00"), "cool-total-short")
    assert [one.severity.word for one in whole_entering] == ["short"]
    whole_leaving = found(row("80.0", "67.0", 55, 54, "388.00"), "cool-total-short")
    assert [one.severity.word for one in whole_leaving] == ["caution"]


# Severity, and what is said


def test_strictly_it_keeps_its_severity_and_says_that_digits_may_explain_it(found):
    text = row(80, 67, 55, 54, "380.00", limits='rounding = "strict"')
    (one,) = found(text, "cool-row-balance")
    assert one.severity.word == "conflict"
    assert one.rounding


def test_a_caution_that_digits_explain_vanishes(found):
    low = "leaving_humidity_low = 89"
    # 55/53 °F is 88.0 % (real-gas model), 55/53.5 91.0.
    assert found(row("80.0", "67.0", "55.0", "53", "400.0", limits=low), "leaving-humidity") == []
    (one,) = found(row("80.0", "67.0", "55.0", "53.0", "400.0", limits=low), "leaving-humidity")
    assert one.severity.word == "caution"
    assert not one.rounding


def test_the_band_and_the_field_that_would_settle_it_are_told(found):
    (one,) = found(row("80.0", "67.0", 55, 54, "388.00"), "cool-total-short")
    assert "further digit" in one.message
    assert "(cool_lat_wb)" in one.message
    # Half a degree at 54 °F is 0.30 Btu/lb (22.63 at 54, 23.22 at 55; handbook's table): 3.3 %.
    told = float(one.message.split("±")[1].split(" %")[0])
    assert told == pytest.approx(3.3, abs=0.15)


def test_the_field_whose_digit_does_most_is_named(found):
    (one,) = found(row("80.0", "67", "55.0", "54.0", "380.00"), "cool-row-balance")
    assert "(cool_eat_wb)" in one.message
    (one,) = found(row("80.0", "67.0", "55.0", "54", "380.00"), "cool-row-balance")
    assert "(cool_lat_wb)" in one.message


def test_the_finding_keeps_numbers_fields_and_name(found):
    (one,) = found(row(80, 67, 55, 54, "380.00"), "cool-row-balance")
    assert one.scheduled == 380
    assert one.required == pytest.approx(399.5, rel=2e-3)
    assert one.fields[0] == "cool_total"


# The cap


def test_a_capacity_s_band_is_at_most_the_cap(found):
    # 393.2 MBH are enough of 399.5 (agreement, condensate); 388 takes 1.3 % of the digits.
    text = row("80.0", "67.0", 55, 54, "388.00", cap=1)
    (one,) = found(text, "cool-total-short")
    assert one.severity.word == "short"
    assert not one.rounding
    (one,) = found(text.replace("rounding_cap = 1", "rounding_cap = 2"), "cool-total-short")
    assert one.rounding


def test_a_row_s_own_balance_is_no_capacity(found):
    """Whole degrees may stand for a tenth of it; the cap is for what air and rooms require."""
    (one,) = found(row(80, 67, 55, 54, "370.00", cap=1), "cool-row-balance")
    assert one.rounding


# Which numbers have digits. 400.3 MBH heat 45 000 lb/h from 58 to 95 °F (test_heating.py); 2 % of
# it are agreement, so that 392.3 is the least.

WINTER = """\
[project]
title = "Winter"
units = "IP"
[[condition]]
name = "winter"
season = "heating"
outdoor_db = {outdoor}
outdoor_w = 0.001
[[unit]]
tag = "AHU-1"
supply_airflow = {airflow}
outdoor_airflow = {outdoor_airflow}
room_heat_db = {room}
heat_lat_db = {leaving}
heat_total = {total}
"""
GIVENS = {
    "outdoor": "10.0", "airflow": "10000.0", "outdoor_airflow": "2000.0", "room": "70.0",
    "leaving": "95.0", "total": "392.00",
}  # fmt: skip


def winter(**values):
    return WINTER.format(**{**GIVENS, **values})


@pytest.mark.parametrize("total", ["392", "+392"])
def test_a_whole_number_stands_for_half_a_unit_either_side(found, total):
    (one,) = found(winter(total=total), "heat-total-short")
    assert one.severity.word == "caution"
    assert one.rounding


@pytest.mark.parametrize("total", ["392.0", "3.92e2", "392e0", "3_92", "0x188"])
def test_a_form_that_states_no_digits_has_no_band(found, total):
    (one,) = found(winter(total=total), "heat-total-short")
    assert one.severity.word == "short"
    assert not one.rounding


@pytest.mark.parametrize(
    ("given", "whole"),
    [("outdoor", "10"), ("airflow", "10000"), ("outdoor_airflow", "2000"), ("room", "70"),
     ("leaving", "95")],
)  # fmt: skip
def test_givens_do_not_move(found, given, whole):
    """Half a degree of room, weather or leaving air would do, but nobody derived them."""
    (one,) = found(winter(**{given: whole}), "heat-total-short")
    assert one.severity.word == "short"
    assert not one.rounding


def test_a_leaving_dry_bulb_is_a_given_in_cooling(found):
    """But where it follows from the room's load, its digits count: what the room gets."""
    (one,) = found(row("80.0", "67.0", 55, "54.0", "388.00"), "cool-total-short")
    assert not one.rounding
    # 25 degrees of 45 000 lb/h are 274 MBH (cool_sensible_short), half of one is 5.5.
    more = "room_db = 80.0\nroom_rh = 50\nroom_sensible = 283.0"
    (one,) = found(row("80.0", "67.0", 55, "54.0", "400.0", more=more), "room-sensible-short")
    assert one.rounding
    tenths = row("80.0", "67.0", "55.0", "54.0", "400.0", more=more)
    (one,) = found(tenths, "room-sensible-short")
    assert not one.rounding


# Corners of other figures


def test_the_apparatus_dew_point_has_its_corner(found):
    # 52.5 °F from 80/67 to 55/54 °F (real-gas model), and more than a degree by half one of 54.
    (one,) = found(row(80, 67, 55, 54, "400.0", more="cool_ewt = 53"), "adp-below-water")
    assert (one.severity.word, one.rounding) == ("caution", True)
    tenths = row("80.0", "67.0", "55.0", "54.0", "400.0", more="cool_ewt = 53")
    (one,) = found(tenths, "adp-below-water")
    assert (one.severity.word, one.rounding) == ("conflict", False)


def test_the_bypass_factor_has_its_corner(found):
    # (55 − 52.5)/(80 − 52.5) = 0.09; three rows bypass e^(−2.25) = 0.105 at least.
    rows = "cool_rows = 3"
    assert found(row(80, 67, 55, 54, "400.0", more=rows), "bypass-factor-rows") == []
    tenths = row("80.0", "67.0", "55.0", "54.0", "400.0", more=rows)
    assert len(found(tenths, "bypass-factor-rows")) == 1


# Freezing: the wet bulb's formula changes from water to ice on the wick


def by_wet_bulb(db, wb, saturated, *, ice):
    """Return the humidity ratio; Fundamentals 2017, ch. 1, eqs. 33 and 35."""
    if ice:
        return ((1220 - 0.04 * wb) * saturated - 0.240 * (db - wb)) / (
            1220 + 0.444 * db - 0.48 * wb
        )
    return ((1093 - 0.556 * wb) * saturated - 0.240 * (db - wb)) / (1093 + 0.444 * db - wb)


@pytest.mark.parametrize(("share", "rounding"), [(0.85, True), (1.2, False)])
def test_the_best_corner_may_lie_beside_freezing(found, share, rounding):
    """A leaving wet bulb of 32 °F may be a little less, with ice: more moisture than at 32.5 °F.

    At 44 °F dry bulb: 0.00110 with water at 32, 0.00142 with ice, 0.00130 with water at 32.5.
    """
    at_32, at_32_5 = 0.0037895, 0.0038670  # saturated (Fundamentals 2017, ch. 1, table 2)
    water, ice = (by_wet_bulb(44, 32, at_32, ice=wick) for wick in (False, True))
    end = by_wet_bulb(44, 32.5, at_32_5, ice=False)
    assert water < end < water + 0.8 * (ice - water)  # the end alone explains less than 0.85
    moved = POUNDS * (1061 + 0.444 * 44) * (ice - water) / 1000
    nominal = row("60.00", "50.00", "44.00", 32, "1.00")
    (slip,) = found(nominal, "cool-row-balance")
    scheduled = 0.97 * (slip.required - share * moved)
    (one,) = found(row("60.000", "50.000", "44.0", 32, f"{scheduled:.3f}"), "cool-row-balance")
    assert one.rounding is rounding
