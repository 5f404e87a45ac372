"""Remedies: applied as text they clear their finding, and one step of their digit less does not.

Held against a fresh review of a file in which the number stands as the remedy has it, so that
nothing of the search itself is believed. Rows are drawn from a fixed seed: sound ones, in which one
to three numbers are then cut short.
"""

from __future__ import annotations

import random
import statistics
import time
from collections import Counter
from dataclasses import dataclass
from decimal import Decimal
from functools import lru_cache
from typing import TYPE_CHECKING, Any

import pytest

from schedtui.review.finding import Severity
from schedtui.review.moves import GUARDED, MOVES, PAIRS
from schedtui.review.remedy import plant_remedies, remedies_by_check
from schedtui.review.reviewed import review
from schedtui.schedule.load import load
from schedtui.schedule.view import view

if TYPE_CHECKING:
    from collections.abc import Iterator

    from schedtui.review.remedy import Remedy

FLOW, LOAD, WATER, POWER = 0.47194745, 0.29307107, 0.0630902, 0.7457  # an IP unit in SI's
MOISTURE, INCH = 0.45359237, 248.6
FINDINGS = 500  # so many short findings are tried at least
CHECKS = (
    "cool-total-short", "cool-sensible-short", "reheat-short", "room-sensible-short",
    "room-latent-short", "cool-water-short", "heat-total-short", "preheat-short",
    "humidifier-short", "room-heat-short", "heat-water-short", "outdoor-air-short", "motor-short",
)  # fmt: skip

Row = dict[str, str]


class Draw:
    """Draws one row with its project; ranges are in °F, cfm, MBH and gpm."""

    def __init__(self, number: int) -> None:
        self.random = random.Random(f"remedy {number}")  # noqa: S311  a draw, not a secret
        self.ip = self.random.random() < 0.6
        self.number = number

    def between(self, low: float, high: float) -> float:
        return self.random.uniform(low, high)

    def degrees(self, fahrenheit: float) -> str:
        return f"{fahrenheit if self.ip else (fahrenheit - 32) / 1.8:.1f}"

    def digits(self, value: float, digits: int) -> str:
        """Print a number, now and then with a digit less than usual."""
        fewer = self.random.random() < 0.25 and digits > 0
        return f"{value:.{digits - 1 if fewer else digits}f}"

    def flow(self, cfm: float) -> str:
        return str(round((cfm if self.ip else cfm * FLOW) / 5) * 5)

    def heat(self, mbh: float) -> str:
        return self.digits(mbh if self.ip else mbh * LOAD, 1)

    def water(self, gpm: float) -> str:
        return self.digits(gpm, 1) if self.ip else self.digits(gpm * WATER, 2)

    def head(self) -> str:
        basis = self.random.choice(["standard", "site", "actual"])
        feet = self.random.choice([0, 1_200, 5_280])
        wet = self.between(72, 78)
        dry = self.between(88, 100)
        winter = self.between(-5, 25)
        text = [
            "[project]",
            'title = "Remedied"',
            f'units = "{"IP" if self.ip else "SI"}"',
            f'airflow_basis = "{basis}"',
            f"altitude = {feet if self.ip else round(feet * 0.3048)}",
        ]
        for name, season, db, wb in (
            ("dry peak", "cooling", dry, wet),
            ("humid", "cooling", 82, 77),
            ("winter", "heating", winter, winter - 2),
            ("mild", "heating", winter + 20, winter + 16),
        ):
            text += ["[[condition]]", f'name = "{name}"', f'season = "{season}"']
            text += [f"outdoor_db = {self.degrees(db)}", f"outdoor_wb = {self.degrees(wb)}"]
        return "\n".join(text)

    def row(self) -> Row:
        """Return a row with sound numbers of all sides, some of them then cut short."""
        cfm, share = self.between(2_000, 30_000), self.between(0.1, 0.6)
        leaving, lat = self.between(50, 56), self.between(85, 105)
        fan, back = cfm * 0.0009, cfm * 0.0003
        power = 1 if self.ip else POWER
        total, heat = cfm * (0.034 + 0.075 * share), cfm * 1.1e-3 * (lat - 70 + 85 * share)
        row: Row = {
            "supply_airflow": self.flow(cfm),
            "outdoor_airflow": self.flow(cfm * share),
            "outdoor_required": self.flow(cfm * share * 0.9),
            "supply_airflow_min": self.flow(cfm * max(share * 1.7, 0.4)),
            "room_db": self.degrees(75),
            "room_rh": "50",
            "room_heat_db": self.degrees(70),
            "room_heat_rh": "30",
            "cool_lat_db": self.degrees(leaving),
            "cool_lat_wb": self.degrees(leaving - self.between(0.4, 1)),
            "cool_total": self.heat(total * 0.95),
            "cool_sensible": self.heat(cfm * (0.0255 + 0.017 * share)),
            "cool_ewt": self.degrees(44),
            "cool_lwt": self.degrees(56),
            "cool_flow": self.water(total / 5.8),
            "room_sensible": self.heat(cfm * 1.08e-3 * (75 - leaving) * 0.85),
            "room_latent": self.heat(cfm * 0.002),
            "fan_power": self.digits(fan * power, 1),
            "motor_power": self.digits(fan * power * 1.3, 1),
            "return_fan_power": self.digits(back * power, 1),
            "return_fan_motor_power": self.digits(back * power * 1.4, 1),
            "heat_lat_db": self.degrees(lat),
            "heat_total": self.heat(heat * 1.05),
            "room_heat": self.heat(cfm * 1.08e-3 * (lat - 70) * 0.8),
            "heat_ewt": self.degrees(180),
            "heat_lwt": self.degrees(150),
            "heat_flow": self.water(heat / 14),
            "humidifier": self.digits(cfm * share * 4.5 * 0.0046 * (1 if self.ip else MOISTURE), 1),
        }
        row |= self.more(cfm, share)
        keys = [*CUT, *["cool_total"] * 6, *["cool_sensible"] * 2, "reheat_total", "preheat_total"]
        for key in dict.fromkeys(self.random.sample(keys, self.random.choice([1, 2, 2, 3]))):
            self.cut(row, key)
        return row

    def more(self, cfm: float, share: float) -> Row:
        """Return what only some rows have."""
        made: Row = {}
        if self.random.random() < 0.4:
            made |= {"recovery_sensible": "55", "recovery_latent": "45"}
        if self.random.random() < 0.4:
            low = self.between(45, 55)
            made["preheat_lat_db"] = self.degrees(low)
            made["preheat_at"] = '"outdoor"'
            made["preheat_total"] = self.heat(cfm * share * 1.1e-3 * (low + 8))
        if self.random.random() < 0.3:
            made |= {"reheat_lat_db": self.degrees(60), "reheat_total": self.heat(cfm * 0.012)}
        if self.random.random() < 0.3:
            made["heat_airflow"] = self.flow(cfm * 0.85)
        if self.random.random() < 0.3:
            made["fan_position"] = '"blow-through"'
        if self.random.random() < 0.3:
            made["outdoor_required"] = self.flow(cfm * share * 1.1)
        return made

    def cut(self, row: Row, key: str) -> None:
        """Cut a number short, or raise what is asked of it, at its own digits."""
        if key in row:
            number = Decimal(row[key])
            size = Decimal(str(self.between(*CUT[key])))
            row[key] = str((number * size).quantize(number))


# What makes a row short, and by which factor it is drawn to.
CUT = {
    "cool_total": (0.7, 0.93), "cool_sensible": (0.6, 0.9), "reheat_total": (0.1, 0.6),
    "room_sensible": (1.15, 1.4), "room_latent": (3.0, 5.0), "cool_flow": (0.6, 0.85),
    "heat_total": (0.4, 0.75), "preheat_total": (0.3, 0.7), "humidifier": (0.3, 0.7),
    "room_heat": (1.2, 1.5), "heat_flow": (0.3, 0.6), "outdoor_required": (1.05, 1.5),
    "supply_airflow_min": (0.3, 0.9), "motor_power": (0.5, 0.75),
    "return_fan_motor_power": (0.4, 0.7), "outdoor_airflow": (1.1, 1.6),
}  # fmt: skip


def text_of(head: str, row: Row) -> str:
    lines = (f"{key} = {value}" for key, value in row.items())
    return "\n".join((head, "[[unit]]", 'tag = "AHU-1"', *lines, ""))


def reviewed(head: str, row: Row) -> Any:
    document = load(text_of(head, row))
    assert document.problems == ()
    (unit,) = review(view(document)).units.values()
    return unit


@lru_cache(maxsize=50_000)
def _findings(text: str) -> tuple[Any, ...]:
    document = load(text)
    assert document.problems == ()
    (unit,) = review(view(document)).units.values()
    return tuple(unit.findings)


def found_in(head: str, row: Row) -> tuple[Any, ...]:
    """Return the findings of a fresh review."""
    return _findings(text_of(head, row))


def applied(row: Row, remedy: Remedy) -> Row:
    return row | {change.field: change.text for change in remedy.changes}


def one_step_less(before: str, after: str) -> str:
    """Return a remedied number one step of its last digit nearer to what stood there."""
    was, now = Decimal(before), Decimal(after)
    step = Decimal(1).scaleb(int(now.as_tuple().exponent))
    return str(now - step if now > was else now + step)


@dataclass(frozen=True)
class Short:
    """A short finding with its remedies."""

    head: str
    row: Row
    check: str
    remedies: tuple[Remedy, ...]
    seconds: float
    findings: tuple[Any, ...]

    def __str__(self) -> str:
        changes = [tuple((one.field, one.text) for one in each.changes) for each in self.remedies]
        return f"{self.check}: {changes} of\n{text_of(self.head, self.row)}"


def _shorts() -> Iterator[Short]:
    for number in range(10_000):
        draw = Draw(number)
        head, row = draw.head(), draw.row()
        unit = reviewed(head, row)
        begun = time.perf_counter()
        by_check = remedies_by_check(unit)
        seconds = time.perf_counter() - begun
        each = seconds / max(len(by_check), 1)
        for check, remedies in by_check.items():
            yield Short(head, row, check, remedies, each, unit.findings)


@pytest.fixture(scope="module")
def shorts() -> list[Short]:
    found: list[Short] = []
    kinds: Counter[str] = Counter()
    for short in _shorts():
        found.append(short)
        kinds[short.check] += 1
        if len(found) >= FINDINGS and all(kinds[check] >= 10 for check in CHECKS):
            break
    return found


def of_check(findings: tuple[Any, ...], check: str) -> list[Any]:
    return [one for one in findings if one.check == check]


def each_remedy(shorts: list[Short]) -> Iterator[tuple[Short, Remedy]]:
    return ((short, remedy) for short in shorts for remedy in short.remedies)


def test_what_is_tried(shorts, capsys):
    kinds, single = Counter[str](), Counter[str]()
    for short in shorts:
        kinds[short.check] += 1
        single[short.check] += any(len(one.changes) == 1 for one in short.remedies)
    times = sorted(short.seconds * 1e3 for short in shorts)
    each = sum(len(short.remedies) for short in shorts)
    with capsys.disabled():
        print(f"\n{len(shorts)} short findings, {each} remedies,", end=" ")  # noqa: T201
        print(f"a single field for {sum(single.values()) / len(shorts):.1%};", end=" ")  # noqa: T201
        print(f"median {statistics.median(times):.1f} ms, worst {times[-1]:.1f} ms")  # noqa: T201
        for check in sorted(kinds):
            print(f"  {check:22} {single[check]:3} of {kinds[check]:3}")  # noqa: T201
    assert len(shorts) >= FINDINGS
    assert set(CHECKS) <= set(kinds)
    assert sum(single.values()) > 0.8 * len(shorts)


def test_a_remedy_clears_its_finding(shorts):
    for short, remedy in each_remedy(shorts):
        after = found_in(short.head, applied(short.row, remedy))
        assert of_check(after, short.check) == [], (str(short), remedy)


def test_one_step_less_does_not(shorts):
    for short, remedy in each_remedy(shorts):
        change = remedy.changes[-1]
        less = one_step_less(short.row[change.field], change.text)
        after = found_in(short.head, applied(short.row, remedy) | {change.field: less})
        if len(remedy.changes) == 1:
            assert of_check(after, short.check), (str(short), remedy)


def test_digits_stay_as_they_were_typed(shorts):
    for short, remedy in each_remedy(shorts):
        for change in remedy.changes:
            was = Decimal(short.row[change.field])
            assert Decimal(change.text).as_tuple().exponent == was.as_tuple().exponent


def test_outdoor_air_is_never_below_what_is_required(shorts):
    tried = 0
    for short, remedy in each_remedy(shorts):
        for change in remedy.changes:
            if change.field == "outdoor_airflow" and short.check != "outdoor-air-short":
                assert float(change.text) >= float(short.row["outdoor_required"])
                tried += 1
    assert tried >= 10


def test_rooms_stay_met_where_the_leaving_wet_bulb_rises(shorts):
    tried = 0
    for short, remedy in each_remedy(shorts):
        fields = [change.field for change in remedy.changes]
        if "cool_lat_wb" in fields and short.check == "cool-total-short":
            after = found_in(short.head, applied(short.row, remedy))
            found = [one.check for one in after if one.severity is Severity.SHORT]
            assert "room-latent-short" not in found, (str(short), remedy)
            tried += 1
    assert tried >= 5


def worst(findings: tuple[Any, ...]) -> dict[str, int]:
    made: dict[str, int] = {}
    for one in findings:
        made[one.check] = max(made.get(one.check, 0), int(one.severity))
    return made


def test_what_worsens_is_what_a_fresh_review_says(shorts):
    for short, remedy in each_remedy(shorts):
        before, after = (
            worst(short.findings),
            worst(found_in(short.head, applied(short.row, remedy))),
        )
        worse = {
            check
            for check, severity in after.items()
            if severity > max(before.get(check, 0), Severity.MISSING)
        }
        assert set(remedy.worsens) == worse, (str(short), remedy)


def test_pairs_only_where_no_single_number_does(shorts):
    for short in shorts:
        sizes = {len(remedy.changes) for remedy in short.remedies}
        assert sizes in ({1}, {2}, set()), str(short)
        if sizes == {2}:
            fields = {tuple(one.field for one in each.changes) for each in short.remedies}
            assert fields <= set(PAIRS[short.check])


def test_a_number_that_is_not_offered_does_not_clear(shorts):
    """Its next steps one by one, and further ones: what clears alone, at no price, is offered."""
    moved = [
        (short, key, way)
        for short in shorts
        for key, way in MOVES[short.check]
        if key in short.row and key not in {one.changes[0].field for one in short.remedies}
    ]
    picked = random.Random("offered").sample(moved, min(60, len(moved)))  # noqa: S311  a draw
    for short, key, way in picked:
        was = Decimal(short.row[key])
        step = Decimal(1).scaleb(int(was.as_tuple().exponent))
        stride = 1 if abs(was) < 500 * step else int(abs(was) / step / 60)
        for steps in (*range(1, 8), *range(8, 40, 2)):
            value = was + way * steps * stride * step
            if value < 0 or (key.startswith("recovery") and value > 100):
                break
            after = found_in(short.head, short.row | {key: str(value)})
            if not of_check(after, short.check):
                assert has_a_price(short, key, value, after), (key, value, str(short))
                break


def has_a_price(short: Short, key: str, value: Decimal, after: tuple[Any, ...]) -> bool:
    """Tell whether clearing by a number costs what no remedy may."""
    least = {"outdoor_airflow": "outdoor_required", "supply_airflow": "outdoor_airflow"}.get(key)
    if least and value < Decimal(short.row[least]):
        return True
    found = {one.check for one in after if one.severity > Severity.MISSING}
    before = {one.check for one in short.findings}
    rooms = {"room-sensible-short", "room-latent-short", "room-heat-short"}
    return bool(found & set(GUARDED.get(key, ())) - before or found & rooms)


# A row whose sensible capacity cannot rise by itself: it would be above the total, the rooms take
# what the supply air brings, and the outdoor air is what is required. By the handbook's formulas
# 10 000 cfm of standard air, a fifth from 95/70 °F, down to 55/54 °F are 300 MBH, 263 sensible.
PAIRED_HEAD = """[project]
title = "Paired"
units = "IP"
airflow_basis = "standard"
[[condition]]
name = "summer"
season = "cooling"
outdoor_db = 95
outdoor_wb = 70
"""
PAIRED = {
    "supply_airflow": "10000", "outdoor_airflow": "2000", "outdoor_required": "2000",
    "room_db": "75", "room_rh": "50", "cool_lat_db": "55.0", "cool_lat_wb": "54.0", "fan_rise": "0",
    "room_sensible": "215", "room_latent": "30",
}  # fmt: skip


def test_two_numbers_where_one_alone_cannot():
    row = PAIRED | {"cool_total": "240.0", "cool_sensible": "239.0"}
    unit = reviewed(PAIRED_HEAD, row)
    (remedy,) = remedies_by_check(unit)["cool-sensible-short"]
    assert [one.field for one in remedy.changes] == ["cool_total", "cool_sensible"]
    after = found_in(PAIRED_HEAD, applied(row, remedy))
    assert not of_check(after, "cool-sensible-short")
    assert not of_check(after, "sensible-above-total")
    for change in remedy.changes:  # neither goes a step further than it must
        less = {change.field: one_step_less(row[change.field], change.text)}
        found = {one.check for one in found_in(PAIRED_HEAD, applied(row, remedy) | less)}
        assert found & {"cool-sensible-short", "sensible-above-total"}


def test_no_room_pays_that_is_short_already():
    """The supply air takes 30 MBH of latent heat at 54 °F wet bulb, the less the moister it is."""
    row = PAIRED | {"cool_total": "285.0", "room_latent": "80.0"}
    by_check = remedies_by_check(reviewed(PAIRED_HEAD, row))
    assert "room-latent-short" in by_check
    fields = [one.field for each in by_check["cool-total-short"] for one in each.changes]
    assert "cool_total" in fields
    assert not {"cool_lat_wb", "supply_airflow"} & set(fields)


def test_the_wet_bulb_rises_where_the_room_has_some_to_spare():
    row = PAIRED | {"cool_total": "285.0", "room_latent": "5.0"}
    by_check = remedies_by_check(reviewed(PAIRED_HEAD, row))
    fields = [one.field for each in by_check["cool-total-short"] for one in each.changes]
    assert "cool_lat_wb" in fields


PLANTS = """
[project]
title = "Plants"
units = "IP"
[[condition]]
name = "summer"
season = "cooling"
outdoor_db = 95
outdoor_wb = 75
{plants}
[defaults]
supply_airflow = 10000
outdoor_airflow = 2000
room_db = 75
room_rh = 50
cool_lat_db = 55.0
cool_lat_wb = 54.0
fan_rise = 0
cool_flow = 70.0
[[unit]]
tag = "AHU-1"
[[unit]]
tag = "AHU-2"
quantity = 2
"""
CASES = {
    "one": [("chilled water", {"capacity": "900.0"})],
    "flow": [("chilled water", {"flow": "150", "diversity": "95"})],
    "whole": [("chilled water", {"capacity": "1000", "flow": "99.5"})],
    "two share their units": [("a", {"capacity": "300"}), ("b", {"capacity": "400"})],
}


def plants_text(plants: list[tuple[str, dict[str, str]]]) -> str:
    lines = []
    for name, values in plants:
        lines += ["[[plant]]", f'name = "{name}"', 'serves = "cooling"']
        lines += [f"{key} = {value}" for key, value in values.items()]
    return PLANTS.format(plants="\n".join(lines))


@pytest.mark.parametrize("name", CASES)
def test_the_remedy_of_a_plant(name):
    plants = CASES[name]
    found = review(view(load(plants_text(plants)))).plants
    tried = 0
    for place, plant in enumerate(found):
        for finding in plant.findings:
            if finding.severity is not Severity.SHORT:
                continue
            (remedy,) = plant_remedies(plant, finding)
            (change,) = remedy.changes
            was = plants[place][1][change.field]
            for text, left in ((change.text, False), (one_step_less(was, change.text), True)):
                changed = [(one, dict(values)) for one, values in plants]
                changed[place][1][change.field] = text
                again = review(view(load(plants_text(changed)))).plants[place]
                checks = [one.check for one in again.findings]
                assert (finding.check in checks) is left, text
            tried += 1
    assert tried
