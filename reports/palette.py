"""The colours of screen and paper, by what they say; a colour means a verdict or "here, now"."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum

__all__ = ["CONTRAST", "DARK", "LIGHT", "PAPER", "Colour", "Palette", "colour_components"]


class Colour(StrEnum):
    """What a colour is for; which colour that is depends on the palette."""

    PAPER = "paper"
    SHEET = "sheet"
    INK = "ink"
    INK2 = "ink2"
    BEFORE = "before"
    HAIR = "hair"
    ACCENT = "accent"
    WITHIN = "within"
    LOOK = "look"
    STOP = "stop"


@dataclass(frozen=True, slots=True, kw_only=True)
class Palette:
    """One set of colours, each as ``#RRGGBB``.

    Attributes
    ----------
    name : str
        Word for the settings.
    paper : str
        The ground.
    sheet : str
        Keys, the body of the shaft, the band between limits.
    ink : str
        Text, parts that are on, the state after the mount.
    ink2 : str
        Captions, hatching, parts to come.
    before : str
        Lines of the earlier state; never text.
    hair : str
        Guides on which nothing depends.
    accent : str
        What is meant here and now.
    within, look, stop : str
        The three verdicts.
    """

    name: str
    paper: str
    sheet: str
    ink: str
    ink2: str
    before: str
    hair: str
    accent: str
    within: str
    look: str
    stop: str

    def code(self, colour: Colour) -> str:
        """Give the code of a colour in this palette.

        Parameters
        ----------
        colour : Colour
            What the colour is for.

        Returns
        -------
        str
            ``#RRGGBB``.

        Examples
        --------
        >>> LIGHT.code(Colour.STOP)
        '#7E0A16'
        """
        return str(getattr(self, colour.value))


LIGHT = Palette(
    name="light",
    paper="#FAF8F2",
    sheet="#F1EEE4",
    ink="#17191C",
    ink2="#50545A",
    before="#85807A",
    hair="#CFCABD",
    accent="#4E138C",
    within="#04728A",
    look="#8B6305",
    stop="#7E0A16",
)

DARK = Palette(
    name="dark",
    paper="#1D1C1A",
    sheet="#252421",
    ink="#EDEAE2",
    ink2="#B4B0A6",
    before="#7A766D",
    hair="#45423C",
    accent="#8F80FF",
    within="#8FDCF5",
    look="#F7CF67",
    stop="#F95548",
)

CONTRAST = Palette(
    name="contrast",
    paper="#000000",
    sheet="#000000",
    ink="#FFFFFF",
    ink2="#E4E4E4",
    before="#9C9C9C",
    hair="#8A8A8A",
    accent="#C27BF0",
    within="#7FE3FF",
    look="#FFD23F",
    stop="#FF6A55",
)

PAPER = Palette(
    name="paper",
    paper="#FFFFFF",
    sheet="#F1EEE4",
    ink="#17191C",
    ink2="#50545A",
    before="#85807A",
    hair="#CFCABD",
    accent="#4E138C",
    within="#04728A",
    look="#8B6305",
    stop="#7E0A16",
)


def colour_components(*, code: str) -> tuple[float, float, float]:
    """Take a colour code apart into red, green and blue.

    Parameters
    ----------
    code : str
        ``#RRGGBB``.

    Returns
    -------
    tuple of float
        Red, green and blue, each from 0 to 1 [-].

    Examples
    --------
    >>> colour_components(code="#FF0033")
    (1.0, 0.0, 0.2)
    """
    return (int(code[1:3], 16) / 255.0, int(code[3:5], 16) / 255.0, int(code[5:7], 16) / 255.0)
