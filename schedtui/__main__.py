"""The one place that knows both the commands and the screen."""

from __future__ import annotations

import sys

from schedtui.cli.main import run


def main() -> None:
    """Run the program and end the process with its status."""
    sys.exit(run(sys.argv[1:], _open_screen))


def _open_screen(file: str) -> int:
    # Loaded only now: the commands do without the screen's libraries.
    from schedtui.screen.opening import open_schedule  # noqa: PLC0415

    return open_schedule(file)


if __name__ == "__main__":
    main()
