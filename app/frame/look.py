"""How a widget is to look now: palette, window width, text scale and whether it may move."""

from __future__ import annotations

from dataclasses import dataclass, replace

from PySide6.QtCore import Qt
from PySide6.QtGui import QColor, QFont, QPen

from app.style.tokens import colour as style_colour
from app.style.tokens import pixel_font
from reports.palette import LIGHT, Colour, Palette
from reports.sheet.medium import BENCH_1280, BENCH_1920, LineWidth, Medium, Size
from reports.typeface import Weight

__all__ = ["LEAST_TOUCH", "Look"]

LEAST_TOUCH = 44
"""Least height of anything to be touched on the bench, before scaling [px]."""

_FAR_GROWTH = {Size.MARK: 144.0 / 100.0, Size.HERO: 176.0 / 128.0, Size.WORD: 104.0 / 52.0}
_NARROW_WINDOW = 1280.0
_WIDE_WINDOW = 1920.0


@dataclass(frozen=True, slots=True, kw_only=True)
class Look:
    """How widgets are to look: colours, how far they grow, and whether they may move.

    Attributes
    ----------
    palette : Palette
        Light, dark or contrast.
    window_width : float
        Width of the window that holds the widget [px].
    text_scale : float
        What the person chose, 0.8 to 2.0 [-].
    less_motion : bool
        Whether the system asks for a caret that stands still.
    far : bool
        Whether what is read at three metres grows, at the cost of the planes and the dial.
    """

    palette: Palette = LIGHT
    window_width: float = _NARROW_WINDOW
    text_scale: float = 1.0
    less_motion: bool = False
    far: bool = False

    def scaled(self, *, text_scale: float) -> Look:
        """Give the same look at another text scale.

        Parameters
        ----------
        text_scale : float
            Factor on every size of type [-].

        Returns
        -------
        Look
            A look of its own.
        """
        return replace(self, text_scale=text_scale)

    def between(self, *, narrow: float, wide: float) -> float:
        """Interpolate a length between the two windows that were drawn.

        Parameters
        ----------
        narrow : float
            The length where the window is 1280 wide [px].
        wide : float
            The length where the window is 1920 wide [px].

        Returns
        -------
        float
            The length in this window; outside of the two it stays at the nearer [px].

        Examples
        --------
        >>> Look(window_width=1600.0).between(narrow=80.0, wide=96.0)
        88.0
        """
        share = (self.window_width - _NARROW_WINDOW) / (_WIDE_WINDOW - _NARROW_WINDOW)
        return narrow + (wide - narrow) * min(max(share, 0.0), 1.0)

    def size(self, size: Size) -> float:
        """Give a size of type.

        Parameters
        ----------
        size : Size
            Its use.

        Returns
        -------
        float
            The size, text scale included [px].

        Examples
        --------
        >>> Look(text_scale=0.8).size(Size.NOTE)
        16.0
        >>> Look(far=True).size(Size.HERO)
        176.0
        """
        size_here = self.between(narrow=BENCH_1280.size(size), wide=BENCH_1920.size(size))
        if self.far:
            size_here *= _FAR_GROWTH.get(size, 1.0)
        return size_here * self.text_scale

    def font(
        self,
        size: Size | float,
        *,
        weight: Weight = Weight.REGULAR,
        condensed: bool = False,
    ) -> QFont:
        """Give a font of the shipped family.

        Parameters
        ----------
        size : Size or float
            Its use, or a size that is already scaled [px].
        weight : Weight
            Regular for text, medium for figures, semi-bold for heads.
        condensed : bool
            Whether the narrow width is meant.

        Returns
        -------
        QFont
            A font whose pixel size is at least 1.
        """
        pixels = self.size(size) if isinstance(size, Size) else size
        return pixel_font(size=pixels, weight=weight, condensed=condensed)

    def note_font(self, *, weight: Weight = Weight.REGULAR) -> QFont:
        """Give the font of captions, which is the narrow one where the window is.

        Parameters
        ----------
        weight : Weight
            Regular for the word, semi-bold for what it names.

        Returns
        -------
        QFont
            The font of captions, axis figures and the title block.
        """
        return self.font(Size.NOTE, weight=weight, condensed=self.window_width < _WIDE_WINDOW)

    def colour(self, colour: Colour) -> QColor:
        """Give a colour by what it says.

        Parameters
        ----------
        colour : Colour
            What the colour is for.

        Returns
        -------
        QColor
            The colour of this palette.
        """
        return style_colour(palette=self.palette, token=colour)

    def pen(self, colour: Colour, width: LineWidth = LineWidth.NARROW) -> QPen:
        """Give a pen with square ends and sharp corners.

        Parameters
        ----------
        colour : Colour
            What the line says.
        width : LineWidth
            Its use.

        Returns
        -------
        QPen
            A solid pen.
        """
        pen = QPen(self.colour(colour), self.line(width))
        pen.setCapStyle(Qt.PenCapStyle.FlatCap)
        pen.setJoinStyle(Qt.PenJoinStyle.MiterJoin)
        return pen

    def line(self, width: LineWidth) -> float:
        """Give a line width in this window.

        Parameters
        ----------
        width : LineWidth
            Its use.

        Returns
        -------
        float
            The width [px].

        Examples
        --------
        >>> Look().line(LineWidth.HEAVY)
        4.0
        """
        return self.between(narrow=BENCH_1280.width(width), wide=BENCH_1920.width(width))

    @property
    def medium(self) -> Medium:
        """The nearer of the two screens that were drawn."""
        middle = (_NARROW_WINDOW + _WIDE_WINDOW) / 2.0
        return BENCH_1280 if self.window_width < middle else BENCH_1920

    @property
    def touch(self) -> int:
        """Least height of anything to be touched in this window [px]."""
        return round(self.between(narrow=LEAST_TOUCH, wide=LEAST_TOUCH * 1.2))
