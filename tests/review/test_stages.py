"""What a stage says where a figure cannot be had, and when two figures are compared."""

import pytest

from schedtui.errors import Absent
from schedtui.review.stages import Stage, lack, outcome
from schedtui.units import LOAD


def test_a_lack_names_its_keys_or_its_reason() -> None:
    assert lack(Absent("a", "b")) == "Not computed, for want of a and b."
    assert lack(Absent("a", why="the area is 0")) == "Not computed: the area is 0."


@pytest.mark.parametrize(
    ("required", "provided", "margin"), [(50.0, 60.0, 20.0), (50.0, None, None), (None, 60.0, None)]
)
def test_an_outcome_has_a_margin_where_both_are_there(required, provided, margin) -> None:
    (found,) = outcome("Load", LOAD, required, provided)
    assert (found.required, found.provided) == (required, provided)
    assert found.margin == (margin if margin is None else pytest.approx(margin))


def test_nothing_beside_nothing_is_no_outcome() -> None:
    assert list(outcome("Load", LOAD, None, None)) == []


def test_a_stage_says_the_same_by_what_it_says() -> None:
    given = (("q", 5.0, LOAD),)
    one = Stage("Load", given=given)
    assert one.says_the_same(Stage("Load", given=given))
    assert not one.says_the_same(Stage("Load", given=(("q", 6.0, LOAD),)))
    assert not one.says_the_same(Stage("Load", ("Other words.",), given=given))
