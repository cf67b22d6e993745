"""The window's look: one palette and one base font for the whole application."""

from __future__ import annotations

from enum import StrEnum

from PySide6.QtGui import QColor, QGuiApplication, QPalette

from app.style.tokens import colour, sized_font
from reports.palette import CONTRAST, DARK, LIGHT, Colour, Palette
from reports.sheet.medium import DESK, Size

__all__ = ["TEXT_SCALES", "Appearance", "apply_theme", "palette_for", "qt_palette"]

TEXT_SCALES = (0.8, 0.9, 1.0, 1.1, 1.3, 1.5, 1.75, 2.0)
"""Text scales a person may choose [-]."""


class Appearance(StrEnum):
    """The looks a person may choose."""

    LIGHT = "light"
    DARK = "dark"
    CONTRAST = "contrast"


_PALETTES = {
    Appearance.LIGHT: LIGHT,
    Appearance.DARK: DARK,
    Appearance.CONTRAST: CONTRAST,
}


def palette_for(*, appearance: Appearance) -> Palette:
    """Give the colours of a look.

    Parameters
    ----------
    appearance : Appearance
        Light, dark or contrast.

    Returns
    -------
    Palette
        Its colours.

    Examples
    --------
    >>> palette_for(appearance=Appearance.DARK).name
    'dark'
    """
    return _PALETTES[appearance]


_ROLES: tuple[tuple[QPalette.ColorRole, Colour], ...] = (
    (QPalette.ColorRole.Window, Colour.PAPER),
    (QPalette.ColorRole.Base, Colour.PAPER),
    (QPalette.ColorRole.AlternateBase, Colour.SHEET),
    (QPalette.ColorRole.Button, Colour.SHEET),
    (QPalette.ColorRole.ToolTipBase, Colour.SHEET),
    (QPalette.ColorRole.WindowText, Colour.INK),
    (QPalette.ColorRole.Text, Colour.INK),
    (QPalette.ColorRole.ButtonText, Colour.INK),
    (QPalette.ColorRole.ToolTipText, Colour.INK),
    (QPalette.ColorRole.BrightText, Colour.PAPER),
    (QPalette.ColorRole.PlaceholderText, Colour.INK2),
    (QPalette.ColorRole.Light, Colour.PAPER),
    (QPalette.ColorRole.Midlight, Colour.SHEET),
    (QPalette.ColorRole.Mid, Colour.HAIR),
    (QPalette.ColorRole.Dark, Colour.BEFORE),
    (QPalette.ColorRole.Shadow, Colour.INK),
    (QPalette.ColorRole.Highlight, Colour.ACCENT),
    (QPalette.ColorRole.HighlightedText, Colour.PAPER),
    (QPalette.ColorRole.Accent, Colour.ACCENT),
    (QPalette.ColorRole.Link, Colour.ACCENT),
    (QPalette.ColorRole.LinkVisited, Colour.ACCENT),
)

_FADED = (
    QPalette.ColorRole.WindowText,
    QPalette.ColorRole.Text,
    QPalette.ColorRole.ButtonText,
)


def qt_palette(*, palette: Palette) -> QPalette:
    """Give Qt's palette in our colours, every role set.

    Parameters
    ----------
    palette : Palette
        Light, dark or contrast.

    Returns
    -------
    QPalette
        Disabled words take the colour of captions, which still can be read.
    """
    chosen = QPalette()
    for role, token in _ROLES:
        chosen.setColor(role, colour(palette=palette, token=token))
    faded: QColor = colour(palette=palette, token=Colour.INK2)
    for role in _FADED:
        chosen.setColor(QPalette.ColorGroup.Disabled, role, faded)
    return chosen


def apply_theme(
    *, application: QGuiApplication, appearance: Appearance, text_scale: float = 1.0
) -> Palette:
    """Give an application its colours and its base font.

    Parameters
    ----------
    application : QGuiApplication
        The running application.
    appearance : Appearance
        Light, dark or contrast.
    text_scale : float, optional
        The person's own text scale [-].

    Returns
    -------
    Palette
        The colours now in use, for whatever paints itself.
    """
    palette = palette_for(appearance=appearance)
    application.setPalette(qt_palette(palette=palette))
    application.setFont(sized_font(medium=DESK, size=Size.TEXT, scale=text_scale))
    return palette
