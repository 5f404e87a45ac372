"""Figures: computed when asked, once, absences included."""

import contextlib
import gc
import weakref

import pytest

from schedtui.errors import Absent, AirError
from schedtui.review.figure import figure, known


class Evaluation:
    def __init__(self):
        self.asked = []

    @figure
    def load(self):
        """The load."""
        self.asked.append("load")
        return 12.0

    @figure
    def tons(self):
        self.asked.append("tons")
        return self.load / 12

    @figure
    def gap(self):
        self.asked.append("gap")
        raise Absent("cool_lat_wb")

    @figure
    def behind_the_gap(self):
        return self.gap + 1

    @figure
    def no_air(self):
        raise AirError("no air has these two")

    @figure
    def nothing(self):
        self.asked.append("nothing")


def test_nothing_is_computed_before_it_is_asked_for():
    assert Evaluation().asked == []


def test_a_figure_is_computed_once():
    evaluation = Evaluation()
    assert (evaluation.tons, evaluation.tons, evaluation.load) == (1.0, 1.0, 12.0)
    assert evaluation.asked == ["tons", "load"]


def test_a_figure_of_nothing_is_remembered_too():
    evaluation = Evaluation()
    assert evaluation.nothing is None
    assert evaluation.nothing is None
    assert evaluation.asked == ["nothing"]


def test_each_evaluation_has_its_own():
    one, other = Evaluation(), Evaluation()
    assert one.load == other.load
    assert one.asked == other.asked == ["load"]


def test_an_absence_is_remembered_and_names_its_keys():
    evaluation = Evaluation()
    for _ in range(2):
        with pytest.raises(Absent) as absent:
            evaluation.gap  # noqa: B018  asked for its absence
        assert absent.value.keys == ("cool_lat_wb",)
    assert evaluation.asked == ["gap"]


def test_what_hangs_on_an_absence_is_absent_for_the_same_keys():
    with pytest.raises(Absent) as absent:
        Evaluation().behind_the_gap  # noqa: B018  asked for its absence
    assert absent.value.keys == ("cool_lat_wb",)


def test_an_absence_does_not_grow_a_traceback_with_each_asking():
    evaluation = Evaluation()
    depths = []
    for _ in range(3):
        with pytest.raises(Absent) as absent:
            evaluation.gap  # noqa: B018  asked for its absence
        depths.append(len(absent.traceback))
    assert depths[1] == depths[2]


def test_air_that_cannot_be_is_an_absence_with_its_reason():
    with pytest.raises(Absent, match="no air has these two") as absent:
        Evaluation().no_air  # noqa: B018  asked for its absence
    assert absent.value.keys == ()


def test_known_answers_with_nothing_for_an_absence():
    evaluation = Evaluation()
    assert known(getattr, evaluation, "load") == 12.0
    assert known(getattr, evaluation, "gap") is None
    assert known(getattr, evaluation, "no_air") is None


def test_known_does_not_hide_other_faults():
    with pytest.raises(AttributeError):
        known(getattr, Evaluation(), "not_there")


def test_on_the_class_a_figure_is_itself_with_its_docstring():
    assert Evaluation.load.__doc__ == "The load."


class Held:
    """Something that whoever asks holds on to."""


def test_an_absence_that_is_remembered_keeps_nothing_of_whoever_asked():
    evaluation = Evaluation()

    def ask():
        held = Held()
        with contextlib.suppress(Absent):
            evaluation.behind_the_gap  # noqa: B018  asked for its absence
        return weakref.ref(held)

    first, again = ask(), ask()
    gc.collect()
    assert first() is None
    assert again() is None
