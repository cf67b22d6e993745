"""The one type family of screen and paper: where its files are and how wide its words run."""

from __future__ import annotations

from enum import StrEnum
from functools import cache
from pathlib import Path

from reportlab.pdfbase import pdfmetrics
from reportlab.pdfbase.ttfonts import TTFont

__all__ = [
    "CAPITAL_HEIGHT",
    "FAMILY",
    "FAMILY_CONDENSED",
    "LICENCE_PATH",
    "Weight",
    "font_path",
    "font_paths",
    "paper_font_name",
    "text_width",
]

FAMILY = "IBM Plex Sans"
FAMILY_CONDENSED = "IBM Plex Sans Condensed"

CAPITAL_HEIGHT = 0.698
"""Height of capitals and figures as a share of the size [-]."""

_FOLDER = Path(__file__).parent / "fonts"
LICENCE_PATH = _FOLDER / "LICENSE.txt"


class Weight(StrEnum):
    """Regular for text, medium for figures, semi-bold for heads and verdict words."""

    REGULAR = "Regular"
    MEDIUM = "Medium"
    SEMI_BOLD = "SemiBold"


def font_path(*, weight: Weight, condensed: bool) -> Path:
    """Give the file of one weight and width.

    Parameters
    ----------
    weight : Weight
        One of the three weights that are shipped.
    condensed : bool
        Whether the narrow width is meant.

    Returns
    -------
    Path
        An existing TrueType file.

    Examples
    --------
    >>> font_path(weight=Weight.MEDIUM, condensed=True).name
    'IBMPlexSansCondensed-Medium.ttf'
    """
    stem = "IBMPlexSansCondensed" if condensed else "IBMPlexSans"
    return _FOLDER / f"{stem}-{weight.value}.ttf"


def font_paths() -> tuple[Path, ...]:
    """List every font file that is shipped, narrow width last.

    Returns
    -------
    tuple of Path
        Three files of each width.

    Examples
    --------
    >>> len(font_paths())
    6
    """
    return tuple(
        font_path(weight=weight, condensed=condensed)
        for condensed in (False, True)
        for weight in Weight
    )


@cache
def paper_font_name(*, weight: Weight, condensed: bool) -> str:
    """Register one font for paper, by its path, and give the name to ask for it.

    Parameters
    ----------
    weight : Weight
        One of the three weights that are shipped.
    condensed : bool
        Whether the narrow width is meant.

    Returns
    -------
    str
        The name under which reportlab knows the font from now on.

    Notes
    -----
    By path, never by a system name: a system's own copy may be another edition, and equal input
    has to give equal pages.

    Examples
    --------
    >>> paper_font_name(weight=Weight.REGULAR, condensed=False)
    'IBMPlexSans-Regular'
    """
    path = font_path(weight=weight, condensed=condensed)
    pdfmetrics.registerFont(TTFont(path.stem, str(path)))
    return path.stem


@cache
def _width_per_size(text: str, weight: Weight, condensed: bool) -> float:
    name = paper_font_name(weight=weight, condensed=condensed)
    return float(pdfmetrics.stringWidth(text, name, 1.0))


def text_width(*, text: str, size: float, weight: Weight, condensed: bool) -> float:
    """Give the width a word takes, in the unit of its size.

    Parameters
    ----------
    text : str
        What is written.
    size : float
        Size of the type in any length unit [-].
    weight : Weight
        Weight of the type.
    condensed : bool
        Whether the narrow width is meant.

    Returns
    -------
    float
        Advance width of the whole text in the unit of `size` [-].

    Notes
    -----
    Kerning is left out, so the answer is seldom too small and labels spaced by it never touch.

    Examples
    --------
    Figures, plus and minus are all 0.600 em wide, 0.540 em in the narrow width:

    >>> round(text_width(text="−0.3", size=10.0, weight=Weight.MEDIUM, condensed=False)
    ...     - text_width(text=".", size=10.0, weight=Weight.MEDIUM, condensed=False), 2)
    18.0
    """
    return size * _width_per_size(text, weight, condensed)
