"""What is remembered outside the record: where it lies, and how the window stood."""

import hashlib
from pathlib import Path

import platformdirs
from PySide6.QtCore import QByteArray, QSettings

from app.style.theme import TEXT_SCALES, Appearance

__all__ = ["Settings", "settings_file", "shop_folder"]


def shop_folder() -> Path:
    """Give the user's own data folder for the program."""
    return Path(platformdirs.user_data_dir("thirdjournal", appauthor=False))


def settings_file() -> Path:
    """Give the file in the user's own settings folder."""
    return Path(platformdirs.user_config_dir("thirdjournal", appauthor=False)) / "window.ini"


class Settings:
    """How the window stood when it was closed.

    What belongs to a shop (desk, job, person, filters) is kept apart for each shop's folder; what
    belongs to the person at the screen (look, text scale, place of the window) is kept once.
    """

    def __init__(self, *, folder: Path, file: Path | None = None) -> None:
        path = file if file is not None else settings_file()
        self._kept = QSettings(str(path), QSettings.Format.IniFormat)
        digest = hashlib.sha256(str(folder.absolute()).encode()).hexdigest()
        self._shop = f"shop-{digest[:12]}"

    def _word(self, key: str, otherwise: str = "") -> str:
        found = self._kept.value(key, otherwise)
        return found if isinstance(found, str) else otherwise

    def of_shop(self, key: str, otherwise: str = "") -> str:
        """Read a word kept for this shop.

        Parameters
        ----------
        key : str
            What it is: desk, job, person or filter.
        otherwise : str
            What holds where nothing is kept.

        Returns
        -------
        str
            The word.
        """
        return self._word(f"{self._shop}/{key}", otherwise)

    def keep_for_shop(self, key: str, word: str) -> None:
        """Keep a word for this shop.

        Parameters
        ----------
        key : str
            What it is.
        word : str
            The word.
        """
        self._kept.setValue(f"{self._shop}/{key}", word)

    @property
    def appearance(self) -> Appearance:
        """Light, dark or contrast; light where nothing readable is kept."""
        word = self._word("look/appearance", Appearance.LIGHT.value)
        return Appearance(word) if word in set(Appearance) else Appearance.LIGHT

    def keep_appearance(self, appearance: Appearance) -> None:
        """Keep the look."""
        self._kept.setValue("look/appearance", appearance.value)

    @property
    def text_scale(self) -> float:
        """The text scale, one of those a person may choose [-]."""
        try:
            scale = float(self._word("look/text_scale", "1.0"))
        except ValueError:
            return 1.0
        return scale if scale in TEXT_SCALES else 1.0

    def keep_text_scale(self, scale: float) -> None:
        """Keep the text scale [-]."""
        self._kept.setValue("look/text_scale", str(scale))

    @property
    def geometry(self) -> QByteArray | None:
        """Where the window stood, None where nothing is kept."""
        found = self._kept.value("look/geometry")
        return found if isinstance(found, QByteArray) and not found.isEmpty() else None

    def keep_geometry(self, geometry: QByteArray) -> None:
        """Keep where the window stands."""
        self._kept.setValue("look/geometry", geometry)

    def write(self) -> None:
        """Put everything on the disk now."""
        self._kept.sync()
