"""The keys that reach a program everywhere were measured through xterm, tmux and screen."""

from __future__ import annotations

from schedtui.screen.actions import ACTIONS
from schedtui.screen.app import ScheduleApp

NEVER = {"ctrl+h", "ctrl+i", "ctrl+m", "ctrl+b", "ctrl+left_square_bracket"}


def test_no_key_does_two_things_and_none_is_one_that_gets_lost():
    keys = [action.key for action in ACTIONS]
    assert len(set(keys)) == len(keys)
    assert not NEVER & set(keys)
    assert not [key for key in keys if "alt" in key]


def test_every_action_has_its_method():
    assert all(callable(getattr(ScheduleApp, f"action_{action.name}")) for action in ACTIONS)


def test_the_keys_that_the_design_fixes():
    bound = {action.key: action.name for action in ACTIONS}
    assert bound["ctrl+s"] == "save"
    assert bound["ctrl+q"] == "leave"
    assert (bound["ctrl+z"], bound["ctrl+y"], bound["f1"]) == ("undo", "redo", "help")
    assert bound["ctrl+c"] not in {"leave", "quit"}
