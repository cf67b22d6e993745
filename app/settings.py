"""Where the shop's record lies when nobody says otherwise."""

from pathlib import Path

import platformdirs

__all__ = ["shop_folder"]


def shop_folder() -> Path:
    """Give the user's own data folder for the program."""
    return Path(platformdirs.user_data_dir("thirdjournal", appauthor=False))
