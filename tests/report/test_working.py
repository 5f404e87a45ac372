"""A printed working multiplies out: from its printed numbers come its printed results."""

from __future__ import annotations

import math
import re
from collections import Counter
from pathlib import Path

import pytest
import tomli_w

from schedtui.report.formats import markdown, text
from schedtui.report.page import CAUTION, Calculations, Entries, Heading, Page, Paragraph, Table
from schedtui.report.working import put_in, result, unit_working_page, working_page
from schedtui.text_width import width_of
from schedtui.units import AIRFLOW, ENTHALPY, HUMIDITY_RATIO, LOAD
from tests.report.by_hand import handbook
from tests.review import invented, invented_winter

FUNCTIONS = {"exp": math.exp, "ln": math.log, "min": min, "max": max}
POWERS = str.maketrans({"²": "**2", "³": "**3", "⁴": "**4", "^": "**", "·": "*", "−": "-"})
SYMBOLS = re.compile(r"(?<![\w.])(?!exp|ln|min|max)[A-Za-zΔεηρ]+(?:_[a-z0-9]+)?")
FILES = 24
WINTERS = 12
HERE = Path(__file__).parent
BY_HAND = HERE / "by_hand"


def number(text: str) -> float:
    return float(text.replace("−", "-"))


def printed(page: Page):
    """Yield label, printed result, and the line with the numbers put in, of every step."""
    for block in page.blocks:
        if isinstance(block, Calculations):
            for entry in block.entries:
                yield entry.label, entry.head.split(" ")[0], entry.lines[-1]


def calculated(line: str) -> float:
    """Calculate what stands behind the equals sign, as someone with a calculator does."""
    translated = re.sub(r"(?<=[\d)])([²³⁴])", r"\1", line.partition("= ")[2]).translate(POWERS)
    return eval(translated, {"__builtins__": {}}, FUNCTIONS)  # noqa: S307  our own page


def last_digit(text: str) -> float:
    return float(f"1e-{len(text.partition('.')[2])}")


def test_every_printed_result_comes_out_of_the_printed_numbers(reviewed) -> None:
    steps, worst = 0, 0.0
    for document in invented.documents(FILES):
        for unit in reviewed(tomli_w.dumps(document)).units.values():
            line_at_adp = ""
            for label, shown, line in printed(unit_working_page(unit)):
                steps += 1
                if label == "t_adp":  # an equation; both of its sides are the next steps
                    assert line == "W_sat(t_adp) = W_adp(t_adp)"
                    continue
                off = abs(calculated(line) - number(shown)) / last_digit(shown)
                assert off <= 1, (document["project"], unit.label, label, shown, line)
                worst = max(worst, off)
                if label == "W_adp":
                    line_at_adp = shown
                if label == "W_sat" and line_at_adp:
                    assert number(shown) == pytest.approx(number(line_at_adp), abs=1e-6)
                    line_at_adp = ""
    assert steps > 20_000
    assert 0.4 < worst <= 1  # rounding alone takes half a digit; the numbers put in hardly any


def test_heating_and_equipment_multiply_out_too(reviewed) -> None:
    """Every step of heating, water, steam, power, fuel, fans and faces, in both systems."""
    steps: Counter[tuple[str, str]] = Counter()
    worst = 0.0
    for document in invented_winter.documents(WINTERS):
        system = document["project"]["units"]
        for unit in reviewed(tomli_w.dumps(document)).units.values():
            for label, shown, line in printed(unit_working_page(unit)):
                if label == "t_adp":
                    continue
                steps[system, label] += 1
                off = abs(calculated(line) - number(shown)) / last_digit(shown)
                assert off <= 1, (document["project"], unit.label, label, shown, line)
                worst = max(worst, off)
    assert steps.total() > 12_000
    assert 0.4 < worst <= 1
    for system in ("IP", "SI"):
        assert {label for of, label in steps if of == system} >= {
            "t_ex", "W_ex", "x_fr", "ε_s", "ε_l", "t_rec", "W_rec", "m_x", "m_r", "t_m", "t_a",
            "W_lp", "q_ph", "q_h", "t_v", "q_rh", "m_w", "v_s", "v_m", "q_hv",
            "G_m", "t_cw", "q_cw", "t_hw", "q_hw", "t_pw", "q_pw", "K", "p_abs", "h_fg", "q_st",
            "q_el", "q_fu", "Q_f", "P", "m_ra", "Q_rf", "Q_fc", "Q_fh", "V", "q_tg",
        }  # fmt: skip


def numbers_put_in(formula: str, filled: str) -> dict[str, float]:
    """Return a printed formula's symbols with the numbers printed in their places."""
    found: list[str] = []

    def place(match: re.Match[str]) -> str:
        found.append(match[0])
        return "\0"

    pieces = SYMBOLS.sub(place, formula.removeprefix("= ")).split("\0")
    pattern = r"\(?(−?[\d.]+)\)?".join(map(re.escape, pieces))
    match = re.fullmatch(pattern, filled.removeprefix("= "))
    assert match, (formula, filled)
    return dict(zip(found, map(number, match.groups()), strict=True))


@pytest.mark.parametrize(
    "name", ["altitude_bypass", "metric_recovery", "actual_blow_through", "winter_frost"]
)
def test_a_working_recomputed_by_hand_from_its_printed_numbers(name, reviewed) -> None:
    """The arithmetic is the handbook's, written down apart from the program's formulas.

    Beside each unit stands a line for each step, in the working's order: its symbol, which
    of the handbook's formulas, and the symbols of the numbers that go in.
    """
    (unit,) = reviewed((BY_HAND / f"{name}.toml").read_text(encoding="utf-8")).units.values()
    condition = unit.case.evaluations[0]
    formulas = {"IP": handbook.IP, "SI": handbook.SI}[condition.site.system]
    page = working_page([unit], condition.name, "By hand")
    steps = [
        entry for block in page.blocks if isinstance(block, Calculations) for entry in block.entries
    ]
    lines = (BY_HAND / f"{name}.txt").read_text(encoding="utf-8").splitlines()
    assert len(lines) > 40
    shown: dict[str, float] = {}
    for line, step in zip(lines, steps, strict=True):
        symbol, *how = re.split(r"\s{2,}", line)
        assert step.label == symbol
        result_text = step.head.split(" ")[0]
        if how:
            formula, arguments = how
            numbers = numbers_put_in(*step.lines)
            # A number put in is the printed result that it was, with more digits.
            for one in numbers.keys() & shown.keys():
                assert numbers[one] == pytest.approx(shown[one], abs=0.06, rel=1e-3)
            by_hand = formulas[formula](*(numbers[one] for one in arguments.split()))
            assert abs(by_hand - number(result_text)) <= last_digit(result_text), (line, step)
        shown[symbol] = number(result_text)
    if "t_adp" in shown:
        on_the_line, saturated = (shown[one] for one in ("W_adp", "W_sat"))
        assert saturated == pytest.approx(on_the_line, abs=1e-6)


def test_results_and_numbers_put_in() -> None:
    assert result(31.44836, ENTHALPY, "IP") == "31.448"
    assert result(-0.00001, LOAD, "IP") == "0.00"
    assert result(-1.5, LOAD, "SI") == "−1.500"
    assert put_in(9440.0, AIRFLOW, "IP") == "9440"
    assert put_in(0.0, LOAD, "IP") == "0"
    assert put_in(0.0111823456789, HUMIDITY_RATIO, "SI") == "0.011182346"
    assert put_in(0.00012345678901, LOAD, "IP") == "0.00012345679"


WORKS = """\
[project]
title = "Example [b]Works[/b]"
units = "IP"
pressure = 13.4
airflow_basis = "standard"

[[condition]]
name = "cool"
season = "cooling"
outdoor_db = 74.0
outdoor_wb = 60.0

[[condition]]
name = "peak"
season = "cooling"
outdoor_db = 96.0
outdoor_wb = 75.0

[[condition]]
name = "winter"
season = "heating"
outdoor_db = 5.0
outdoor_rh = 80

[[unit]]
tag = "AHU-1"
supply_airflow = 10000
outdoor_airflow = 2000
room_db = 75
room_rh = 50
fan_rise = 2.0
cool_lat_db = 55
cool_lat_wb = 54
cool_total = 330
cool_sensible = 240
"""


@pytest.fixture(scope="module")
def works(reviewed):
    return next(iter(reviewed(WORKS).units.values()))


def headings(page: Page, level: int) -> list[str]:
    return [one.text for one in page.blocks if isinstance(one, Heading) and one.level == level]


def test_the_pane_has_the_governing_condition_first(works) -> None:
    parts = headings(unit_working_page(works), 2)
    assert parts == [
        "AHU-1: working",
        "AHU-1 at peak (governing and rated)",
        "AHU-1 at cool",
        "AHU-1 at winter",
    ]


def test_the_command_has_the_file_s_order_or_one_condition(works) -> None:
    assert headings(working_page([works], None, "Works"), 2)[1:] == [
        "AHU-1 at cool",
        "AHU-1 at peak (governing and rated)",
        "AHU-1 at winter",
    ]
    assert headings(working_page([works], "peak", "Works"), 2)[1:] == [
        "AHU-1 at peak (governing and rated)"
    ]


def test_required_stands_beside_scheduled_with_its_margin(works) -> None:
    page = working_page([works], "peak", "Works")
    table = next(b for b in page.blocks if isinstance(b, Table) and "Margin %" in b.headings)
    total = table.rows[0]
    required, scheduled, margin = (number(total[place]) for place in (1, 2, 4))
    assert total[0] == "Cooling total"
    assert scheduled == 330
    assert margin == pytest.approx((scheduled / required - 1) * 100, abs=0.06)


def test_a_unit_without_heating_says_so_in_one_line(works) -> None:
    page = working_page([works], "winter", "Works")
    start = page.blocks.index(Heading("AHU-1 at winter", 2))
    said = page.blocks[start + 1 : start + 3]
    assert said == (Heading("Heating", 3), Paragraph("The unit has no heating scheduled."))


HEATED = (
    WORKS
    + """\
room_heat_db = 70
room_heat_rh = 30
heat_lat_db = 95
heat_total = 500
heat_ewt = 180
heat_lwt = 160
heat_flow = 40
humidifier = 20
"""
)


@pytest.fixture(scope="module")
def heated(reviewed):
    return next(iter(reviewed(HEATED).units.values()))


def tables(page: Page) -> dict[tuple[str, ...], dict[str, tuple[str, ...]]]:
    found = (one for one in page.blocks if isinstance(one, Table))
    return {one.headings: {row[0]: row for row in one.rows} for one in found}


def test_heating_stands_behind_cooling_with_what_it_requires(heated) -> None:
    page = working_page([heated], None, "Works")
    assert headings(page, 2)[1:] == [
        "AHU-1 at cool",
        "AHU-1 at peak (governing and rated)",
        "AHU-1 at winter (governing)",
        "AHU-1: water, power and fans, as the row states them",
    ]
    rows = tables(working_page([heated], "winter", "Works"))[
        "Figure", "Required", "Provided", "Unit", "Margin %"
    ]
    at = heated.case.heating[0]
    assert number(rows["Heating total"][1]) == pytest.approx(at.heat_load, abs=0.06)
    assert rows["Heating total"][2] == "500.0"
    assert number(rows["Moisture to add"][1]) == pytest.approx(at.humidifier_load, abs=0.06)
    # 40 gpm · 20 °F at 170 °F: 488.5 Btu/h per gpm and °F (CoolProp).
    assert number(rows["Heating water carries"][2]) == pytest.approx(390.8, abs=0.4)


def test_water_says_its_factor_beside_the_customary_one(heated) -> None:
    page = working_page([heated], "winter", "Works")
    said = [one.text for one in page.blocks if isinstance(one, Paragraph)]
    assert any("500" in text for text in said)
    (factor,) = [shown for label, shown, _ in printed(page) if label == "K"]
    assert number(factor) == pytest.approx(488.5, abs=0.3)  # CoolProp
    rows = tables(page)["Figure", "Computed", "Scheduled", "Unit", "Off by %"]
    carried = rows["Heating, by its water"]
    assert carried[2] == "500.0"
    assert number(carried[4]) == pytest.approx((500 / 390.8 - 1) * 100, abs=0.2)


def test_a_letter_of_two_quantities_stands_twice_in_the_legend(heated) -> None:
    rows = tables(working_page([heated], "winter", "Works"))["Symbol", "What it is", "Unit"]
    assert rows["Q"][2] == "cfm"
    assert rows["Q_hw"][1:] == ("water flow", "gpm")


def test_what_another_condition_has_said_is_not_said_again(works) -> None:
    page = working_page([works], None, "Works")
    said = [one.text for one in page.blocks if isinstance(one, Paragraph)]
    assert said.count("As at cool.") >= 3  # the room, the return air, the air that leaves the coil


def test_text_fits_eighty_columns(reviewed) -> None:
    for document in invented.documents(4):
        for unit in reviewed(tomli_w.dumps(document)).units.values():
            shown = text.render(unit_working_page(unit))
            assert max(map(width_of, shown.splitlines())) <= 80
            assert "\N{NO-BREAK SPACE}" not in shown


def test_a_product_is_not_broken_over_two_lines(works) -> None:
    shown = text.render(unit_working_page(works))
    assert not [line for line in shown.splitlines() if line.rstrip().endswith("·")]


def test_markdown_keeps_formulas_as_they_stand(works) -> None:
    shown = markdown.render(working_page([works], "peak", "Works"))
    assert r"- **m\_o** = 9000.0 lb/h" in shown
    assert "  `= 60 · Q_o · 0.075`\\\n  `= 60 · 2000 · 0.075`\n" in shown


def test_sources_are_notes_and_the_caution_ends_the_page(works) -> None:
    page = working_page([works], "peak", "Works")
    said = [one.text for one in page.blocks if isinstance(one, Paragraph)]
    listed = next(one for one in page.blocks if type(one) is Entries)
    notes = {int(entry.label.strip("[]")) for entry in listed.entries}
    used = {
        int(entry.head.rpartition("[")[2].rstrip("]"))
        for block in page.blocks
        if isinstance(block, Calculations)
        for entry in block.entries
    }
    assert used == notes
    assert said[-1] == CAUTION


def test_a_unit_that_lacks_something_says_so_once(reviewed) -> None:
    lacking = WORKS.replace("supply_airflow = 10000\n", "")
    unit = next(iter(reviewed(lacking).units.values()))
    said = [
        one.text
        for one in working_page([unit], "peak", "Works").blocks
        if isinstance(one, Paragraph) and one.text.startswith("Not computed")
    ]
    assert said == ["Not computed, for want of supply_airflow."]
