"""Where a line meets saturation, on both sides of the bend at the triple point."""

import pytest

from schedtui.air.saturation import first_crossing
from schedtui.air.state import Air


@pytest.mark.parametrize(("system", "bend"), [("IP", 32.018), ("SI", 0.01)])
def test_a_line_that_dips_under_ice_alone_is_caught(system, bend) -> None:
    air = Air.at_altitude(system, 0)
    # Parallel to the curve over water at the bend and 1e-5 beneath it: above the bend the curve
    # only draws away. The curve over ice is steeper there, so below the bend they meet.
    just_above = bend + 1e-6
    step = 1e-3
    w = air.saturation_humidity_ratio(just_above)
    slope = (air.saturation_humidity_ratio(just_above + step) - w) / step

    def on_the_line(t: float) -> float:
        return w - 1e-5 + slope * (t - bend)

    def gap(t: float) -> float:
        return air.saturation_humidity_ratio(t) - on_the_line(t)

    cool, warm = (air.by_humidity_ratio(t, on_the_line(t)) for t in (bend + 8, bend + 25))
    found = first_crossing(warm, cool)
    assert found is not None
    assert bend - 3 < found < bend
    assert gap(found) == pytest.approx(0, abs=1e-12)
    nearer = [found + (cool.db - found) * i / 1000 for i in range(1, 1000)]
    assert all(gap(t) > 0 for t in nearer)


def test_a_line_that_runs_out_of_moisture_crosses_nowhere() -> None:
    air = Air("IP", 14.696)
    cool, warm = air.by_humidity_ratio(60, 0.002), air.by_humidity_ratio(80, 0.012)
    assert first_crossing(warm, cool) is None
