"""What may happen to an open schedule in a real pseudo-terminal, and what is there afterwards."""

from __future__ import annotations

import contextlib
import json
import os
import signal
import sys
from pathlib import Path

import pytest

from tests.benchmarks.terminal import Terminal
from tests.terminal.test_program import ROOT, SCHEDULE

EDITED = SCHEDULE.replace("= 100 ", "= 900 ")
F1 = "\x1bOP"
GIVEN_BACK, TAKEN = b"\x1b[?1049l", b"\x1b[?1049h"


class Line(Terminal):
    """A terminal that can be hung up."""

    def hang_up(self):
        """Close the line to the program, as a dropped connection does."""
        os.close(self._fd)
        self._fd = os.open(os.devnull, os.O_RDWR)
        self.ended = True

    def cpu(self):
        """Return the processor time that the program has had, in clock ticks."""
        fields = Path(f"/proc/{self.pid}/stat").read_text("ascii").rpartition(")")[2].split()
        return int(fields[11]) + int(fields[12])

    def spent_until_end(self):
        """Wait for the end; return the exit status and the processor time in clock ticks."""
        _, status, used = os.wait4(self.pid, 0)
        self.status = os.waitstatus_to_exitcode(status)
        return self.status, (used.ru_utime + used.ru_stime) * os.sysconf("SC_CLK_TCK")


@pytest.fixture
def file(tmp_path):
    path = tmp_path / "works.toml"
    path.write_text(SCHEDULE, encoding="utf-8")
    return path


def program(file, *, first=(sys.executable, "-m", "schedtui"), **environment):
    state = str(file.parent / "state")
    given = {"PYTHONPATH": str(ROOT), "XDG_STATE_HOME": state, **environment}
    return Line([*first, str(file)], 100, 30, given)


def opened(terminal):
    terminal.wait_for(lambda text: "[Findings]" in text and "AHU-2" in text)


def edit(terminal, text="900"):
    for character in text:
        terminal.press(character)
    terminal.press("enter")
    shows(terminal, "*unsaved*", text)


def shows(terminal, *words):
    terminal.wait_for(lambda text: all(one in " ".join(text.split()) for one in words))


def shows_no_longer(terminal, words):
    terminal.wait_for(lambda text: words not in text)


def journals(file):
    return sorted((file.parent / "state" / "schedtui" / "journals").glob("*.journal"))


def comes_back(file):
    """Open again, take the edits back as they are offered, and save."""
    with program(file) as terminal:
        shows(terminal, "1 edit can be brought back")
        terminal.press("enter")
        shows(terminal, "900", "*unsaved*")
        terminal.press("\x13")
        shows_no_longer(terminal, "*unsaved*")
        assert file.read_text("utf-8") == EDITED
        terminal.press("ctrl+q")
        assert terminal.wait_for_end() == 0
    assert journals(file) == []
    assert sorted(one.name for one in file.parent.iterdir()) == ["state", "works.toml"]


def killed(terminal):
    os.kill(terminal.pid, signal.SIGKILL)


def told_to_end(terminal):
    os.kill(terminal.pid, signal.SIGTERM)


def told_that_the_line_is_gone(terminal):
    os.kill(terminal.pid, signal.SIGHUP)


LOSSES = {
    "kill -9": (killed, -signal.SIGKILL),
    "SIGTERM": (told_to_end, 128 + signal.SIGTERM),
    "SIGHUP": (told_that_the_line_is_gone, 128 + signal.SIGHUP),
    "closed terminal": (Line.hang_up, 128 + signal.SIGHUP),
}


@pytest.mark.parametrize("loss", LOSSES)
def test_after_an_edit_it_ends_without_spinning_and_the_edit_comes_back(file, loss):
    lose, expected = LOSSES[loss]
    with program(file) as terminal:
        opened(terminal)
        edit(terminal)
        before = terminal.cpu()
        lose(terminal)
        if loss == "closed terminal":
            status, after = terminal.spent_until_end()
            assert after - before < before, "no more than it took to start"
        else:
            status = terminal.wait_for_end()
        assert status == expected
        if loss in {"SIGTERM", "SIGHUP"}:
            assert terminal.received.rfind(GIVEN_BACK) > terminal.received.rfind(TAKEN)
    assert file.read_text("utf-8") == SCHEDULE
    assert len(journals(file)) == 1
    if loss != "kill -9":
        assert not file.with_name("works.toml.open").exists()
    comes_back(file)


def test_a_terminal_that_takes_nothing_any_more_hinders_no_end(file):
    with program(file) as terminal:
        opened(terminal)
        edit(terminal)
        # Nobody reads: what the program writes is held up until it can write no more.
        for _ in range(60):
            with contextlib.suppress(BlockingIOError):
                os.set_blocking(terminal._fd, False)
                os.write(terminal._fd, b"\x0c\x1b[B\x1b[A\x0c" * 20)
        told_to_end(terminal)
        assert terminal.spent_until_end()[0] == 128 + signal.SIGTERM
    assert len(journals(file)) == 1


def test_saved_or_dropped_nothing_is_offered(file):
    for keys in ("\x13", ""):
        with program(file) as terminal:
            opened(terminal)
            edit(terminal, "800" if keys else "700")
            terminal.press(keys or "ctrl+q")
            if keys:
                shows_no_longer(terminal, "*unsaved*")
            else:
                shows(terminal, "has unsaved changes")
            terminal.press("ctrl+q" if keys else "d")
            assert terminal.wait_for_end() == 0
        assert journals(file) == []


def test_the_second_on_a_file_is_warned_and_its_journal_is_its_own(file):
    with program(file) as first:
        opened(first)
        edit(first)
        with program(file) as second:
            shows(second, "is also open")
            second.press("enter")
            assert "brought back" not in second.text, "the first lives and holds its journal"
            edit(second, "850")
            assert len(journals(file)) == 2
            first.press("\x13")
            shows_no_longer(first, "*unsaved*")
            assert file.read_text("utf-8") == EDITED
            second.press("\x13")
            shows(second, "has been changed on disk", "1 cell or row changed on both sides")
            second.press("d")
            shows_no_longer(second, "*unsaved*")
            second.press("ctrl+q")
            assert second.wait_for_end() == 0
        first.press("ctrl+q")
        assert first.wait_for_end() == 0
    assert file.read_text("utf-8") == EDITED


@pytest.mark.parametrize(
    ("broken", "line"),
    [
        (SCHEDULE.replace("[[condition]]", "[[condition]"), "line 5:"),
        (SCHEDULE.replace('tag = "AHU-1"', 'tag = "AHU-1'), "line 12"),
        (SCHEDULE.replace('units = "IP"', 'units = "XX"'), "line 3:"),
    ],
    ids=["head", "quote", "units"],
)
def test_a_broken_file_says_so_with_the_line_and_opens_once_it_is_mended(file, broken, line):
    file.write_text(broken, encoding="utf-8")
    with program(file) as terminal:
        terminal.wait_for(lambda text: "works.toml cannot be opened" in text)
        assert line in terminal.text
        file.write_text(broken.replace("74.0", "73.0"), encoding="utf-8")
        terminal.read(0.5)
        assert "works.toml cannot be opened" in terminal.text
        file.write_text(SCHEDULE, encoding="utf-8")
        opened(terminal)
        edit(terminal)
        terminal.press("\x13")
        shows_no_longer(terminal, "*unsaved*")
        terminal.press("ctrl+q")
        assert terminal.wait_for_end() == 0
    assert file.read_text("utf-8") == EDITED


def test_a_broken_file_that_is_left_is_refused_with_its_lines(file):
    file.write_text(SCHEDULE.replace("[[condition]]", "[[condition]"), encoding="utf-8")
    with program(file) as terminal:
        terminal.wait_for(lambda text: "works.toml cannot be opened" in text)
        terminal.press("ctrl+q")
        assert terminal.wait_for_end() == 2
        assert "works.toml:5:" in "".join(terminal.text.split("\n"))


WATCHED = """\
import json, os, sys
seen = set()
def watch(event, given):
    if event == "open" and isinstance(given[0], (str, bytes)):
        flags = given[2] or 0
        if flags & (os.O_WRONLY | os.O_RDWR | os.O_CREAT):
            seen.add(("open", os.fsdecode(given[0])))
    elif event in {"os.mkdir", "os.rename", "os.remove", "os.link", "os.symlink", "os.truncate"}:
        seen.update((event, os.fsdecode(one)) for one in given[:2] if isinstance(one, (str, bytes)))
    elif event.startswith(("socket.connect", "socket.bind", "socket.getaddrinfo", "socket.send")):
        seen.add((event, "network"))
sys.addaudithook(watch)
sys.dont_write_bytecode = True
from schedtui.__main__ import main
try:
    main()
finally:
    with open(os.environ["SEEN"], "w") as file:
        json.dump(sorted(seen), file)
"""


def test_it_writes_nowhere_but_its_places_and_uses_no_network(file, tmp_path):
    seen = tmp_path / "seen.json"
    with program(file, first=(sys.executable, "-c", WATCHED), SEEN=str(seen)) as terminal:
        opened(terminal)
        edit(terminal)
        terminal.press(F1)
        terminal.press(F1)
        terminal.press("\x13")
        shows_no_longer(terminal, "*unsaved*")
        edit(terminal, "950")
        terminal.press("ctrl+q")
        shows(terminal, "has unsaved changes")
        terminal.press("enter")
        assert terminal.wait_for_end() == 0
    found = {tuple(one) for one in json.loads(seen.read_text("ascii"))}
    folder, state = str(tmp_path), str(tmp_path / "state" / "schedtui")
    places = {path for _, path in found}
    assert "network" not in places
    own = {one for one in places if one.startswith((state, f"{folder}/works.toml.open"))}
    temporary = {one for one in places if one.startswith(f"{folder}/.works.toml.")}
    rest = places - own - temporary - {f"{folder}/works.toml", f"{folder}/state", str(seen)}
    assert own
    assert temporary
    assert not rest
