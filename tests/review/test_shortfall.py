"""When a capacity is short: scheduled below required × (1 + margin − agreement)."""

import pytest

from schedtui.review.shortfall import is_short


@pytest.mark.parametrize(
    ("scheduled", "least_margin", "agreement", "short"),
    [
        (100, 0, 0, False),
        (99.9, 0, 0, True),
        (99.01, 0, 1, False),
        (98.99, 0, 1, True),
        (98.01, 0, 2, False),
        (97.99, 0, 2, True),
        (109.1, 10, 1, False),
        (108.9, 10, 1, True),
    ],
)
def test_of_a_hundred_required(scheduled, least_margin, agreement, short):
    assert is_short(scheduled, 100, least_margin, agreement) is short


def test_nothing_required_is_never_short():
    assert not is_short(0, 0, 10, 1)
