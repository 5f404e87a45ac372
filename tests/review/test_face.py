"""The velocity at a coil's face: airflow over area."""

import pytest

from schedtui.review.face import velocity


def test_cubic_feet_a_minute_over_square_feet():
    assert velocity(12_000, 24, "IP") == 500.0


def test_litres_a_second_over_square_metres():
    assert velocity(5_000, 2, "SI") == 2.5


def test_the_same_coil_in_both_systems():
    # 10 000 cfm are 4 719.474 L/s, 20 ft² 1.858 061 m²; 500 fpm are 2.54 m/s.
    assert velocity(4719.474, 1.858061, "SI") == pytest.approx(500 * 0.3048 / 60, rel=1e-5)
    assert velocity(10_000, 20, "IP") == 500.0
