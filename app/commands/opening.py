"""Commands that open the window, and the invented shop."""

import argparse
import os
import sys
from pathlib import Path

from app.commands.spoken import WITHIN, UnusableError, say, with_record

__all__ = ["demo", "has_screen", "window"]


def demo(given: argparse.Namespace) -> int:
    """Make the invented shop, and open it where there is a screen."""
    from app.demo import make

    made = with_record(lambda: make(given.folder))
    say(made.words)
    if given.no_window or not has_screen():
        return WITHIN
    return _open(made.folder, made.sign_in, made.job)


def window(given: argparse.Namespace) -> int:
    """Open the window on a shop."""
    if not has_screen():
        raise UnusableError(
            "there is no screen to open a window on. Set DISPLAY, or use a command: "
            "thirdjournal --help"
        )
    from app.settings import shop_folder

    return _open(given.shop or shop_folder(), None, None)


def _open(folder: Path, sign_in: str | None, job: str | None) -> int:
    from app.start import run

    return int(with_record(lambda: run(folder, sign_in=sign_in, job=job)))


def has_screen() -> bool:
    """Tell whether a window can be opened: a display, and not the screenless platform of tests."""
    if os.environ.get("QT_QPA_PLATFORM") in ("offscreen", "minimal"):
        return False
    if sys.platform in ("win32", "darwin"):
        return True
    return bool(os.environ.get("DISPLAY") or os.environ.get("WAYLAND_DISPLAY"))
