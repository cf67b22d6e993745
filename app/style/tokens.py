"""Fonts and colours as the window uses them, from the same tables as paper."""

from __future__ import annotations

from functools import cache

from PySide6.QtGui import QColor, QFont, QFontDatabase

from reports.palette import Colour, Palette
from reports.sheet.medium import Medium, Size
from reports.typeface import FAMILY, FAMILY_CONDENSED, Weight, font_paths

__all__ = ["colour", "load_fonts", "pixel_font", "sized_font"]

_QT_WEIGHTS = {
    Weight.REGULAR: QFont.Weight.Normal,
    Weight.MEDIUM: QFont.Weight.Medium,
    Weight.SEMI_BOLD: QFont.Weight.DemiBold,
}


@cache
def load_fonts() -> tuple[str, ...]:
    """Make the shipped fonts known to Qt, by path.

    Returns
    -------
    tuple of str
        The families they brought.

    Raises
    ------
    RuntimeError
        If a font file cannot be read.

    Notes
    -----
    A running QGuiApplication is needed, as for every font in Qt.
    """
    families: set[str] = set()
    for path in font_paths():
        number = QFontDatabase.addApplicationFont(str(path))
        if number < 0:
            raise RuntimeError(f"the font file {path.name} cannot be read")
        families.update(QFontDatabase.applicationFontFamilies(number))
    return tuple(sorted(families))


def pixel_font(*, size: float, weight: Weight, condensed: bool = False) -> QFont:
    """Give a font of the one type family.

    Parameters
    ----------
    size : float
        Size of the type in device-independent pixels [-].
    weight : Weight
        Weight of the type.
    condensed : bool, optional
        Whether the narrow width is meant.

    Returns
    -------
    QFont
        Without hinting, so that words are as wide on the screen as the layout counted.
    """
    load_fonts()
    font = QFont(FAMILY_CONDENSED if condensed else FAMILY)
    font.setStyleStrategy(QFont.StyleStrategy.PreferAntialias)
    font.setHintingPreference(QFont.HintingPreference.PreferNoHinting)
    font.setWeight(_QT_WEIGHTS[weight])
    font.setPixelSize(max(1, round(size)))
    return font


def sized_font(
    *, medium: Medium, size: Size, weight: Weight = Weight.REGULAR, scale: float = 1.0
) -> QFont:
    """Give the font for a use on one kind of screen.

    Parameters
    ----------
    medium : Medium
        Which screen.
    size : Size
        What the words are for.
    weight : Weight, optional
        Weight of the type.
    scale : float, optional
        The person's own text scale, 0.8 to 2 [-].

    Returns
    -------
    QFont
        Notes run narrow where the screen asks for it.
    """
    return pixel_font(
        size=medium.size(size) * scale,
        weight=weight,
        condensed=size is Size.NOTE and medium.condensed_notes,
    )


def colour(*, palette: Palette, token: Colour) -> QColor:
    """Give a colour of a palette to Qt.

    Parameters
    ----------
    palette : Palette
        Light, dark or contrast.
    token : Colour
        What the colour is for.

    Returns
    -------
    QColor
        The colour.
    """
    return QColor(palette.code(token))
