from __future__ import annotations

import pytest

from schedtui.schedule.catalogue.ranges import Range


@pytest.mark.parametrize(
    ("within", "held", "refused", "words"),
    [
        (Range(), [-1e9, 0, 1e9], [], "any number"),
        (Range(0), [0, -0.0, 1e9], [-1e-9], "0 or more"),
        (Range(0, above=True), [1e-9], [0, -0.0, -1], "above 0"),
        (Range(high=5), [-1e9, 5], [5.1], "up to 5"),
        (Range(0, 100), [0, 100], [-0.1, 100.1], "0 to 100"),
        (Range(0, 100, above=True), [0.1, 100], [0, 100.1], "above 0 to 100"),
        (Range(0, 100, below=True), [0, 99.9], [100], "0 to below 100"),
        (Range(-1500, 36000), [-1500, 36000], [-1501, 36001], "-1500 to 36000"),
    ],
)
def test_a_range_holds_what_its_words_say(within, held, refused, words):
    assert all(map(within.holds, held))
    assert not any(map(within.holds, refused))
    assert within.words() == words
