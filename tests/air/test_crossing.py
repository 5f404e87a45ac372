"""Where a function crosses zero: as near as asked for, and in how few evaluations."""

import math

import pytest

from schedtui.air.crossing import crossing

WITHIN = 1e-9
# Each with the zero that algebra gives it.
FUNCTIONS = {
    "straight": (lambda x: 3 * x - 7, 0.0, 10.0, 7 / 3),
    "bent": (lambda x: x**3 - 8, 0.0, 50.0, 2.0),
    "flat at one end": (lambda x: math.exp(x) - 1e-3, -40.0, 5.0, math.log(1e-3)),
    "flat at the zero": (lambda x: (x - 1) ** 9, 0.0, 3.0, 1.0),
    "a step": (lambda x: -1.0 if x < 0.3 else 1.0, 0.0, 1.0, 0.3),
    "infinite past a place": (lambda x: x - 1 if x < 2 else math.inf, 0.0, 64.0, 1.0),
}


def counted(function):
    def counting(x):
        counting.times += 1
        return function(x)

    counting.times = 0
    return counting


@pytest.mark.parametrize("name", FUNCTIONS)
def test_a_zero_is_found_from_either_side(name) -> None:
    function, low, high, zero = FUNCTIONS[name]
    assert crossing(function, low, high, WITHIN) == pytest.approx(zero, abs=WITHIN)
    # The end above zero may be the lower number.
    turned = crossing(lambda x: function(-x), -low, -high, WITHIN)
    assert turned == pytest.approx(-zero, abs=WITHIN)


@pytest.mark.parametrize("name", FUNCTIONS)
def test_it_takes_hardly_longer_than_halving_ever_would(name) -> None:
    function, low, high, _ = FUNCTIONS[name]
    counting = counted(function)
    crossing(counting, low, high, WITHIN)
    ends, halving = 2, math.ceil(math.log2((high - low) / WITHIN))
    assert counting.times <= ends + halving + 4


def test_a_smooth_function_takes_a_few_evaluations_only() -> None:
    function, low, high, _ = FUNCTIONS["bent"]
    counting = counted(function)
    crossing(counting, low, high, WITHIN)
    assert counting.times <= 20


def test_ends_that_are_near_enough_are_not_looked_into() -> None:
    assert crossing(lambda _: 1.0, 5.0, 5.0, WITHIN) == 5.0
