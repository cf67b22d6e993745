"""What a line width and a size of type come to on each screen and on paper."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum

__all__ = [
    "BENCH_1280",
    "BENCH_1920",
    "DESK",
    "MILLIMETRES_PER_POINT",
    "PAPER_MEDIUM",
    "LineWidth",
    "Medium",
    "Size",
]

MILLIMETRES_PER_POINT = 25.4 / 72.0
"""Length of the typographic point [mm]."""


class Size(StrEnum):
    """Sizes of type by their use, smallest first."""

    NOTE = "note"
    TEXT = "text"
    LEAD = "lead"
    TITLE = "title"
    WORD = "word"
    MARK = "mark"
    HERO = "hero"


class LineWidth(StrEnum):
    """Line widths by their use, thinnest first."""

    HATCH = "hatch"
    GUIDE = "guide"
    NARROW = "narrow"
    WIDE = "wide"
    CURRENT = "current"
    HEAVY = "heavy"


@dataclass(frozen=True, slots=True, kw_only=True)
class Medium:
    """One kind of screen, or paper; every length is in its sheet unit.

    Attributes
    ----------
    name : str
        Word for it.
    millimetres_per_unit : float
        Length of one sheet unit where it is known, as on paper; 0.2 stands for a pixel [mm].
    sizes : dict
        Size of type by use, in sheet units [-].
    widths : dict
        Line width by use, in sheet units [-].
    condensed_notes : bool
        Whether notes are set in the narrow width.
    hatch_pitch : float
        Distance between hatching lines in sheet units [-].
    limit_circle_radius : float
        Greatest radius of a limit circle in sheet units [-].
    least_circle_radius : float
        Radius below which a circle becomes a stem, in sheet units [-].
    dot_radius : float
        Radius of a measured point in sheet units [-].
    shape_size : float
        Height of a verdict shape beside its figure in sheet units [-].
    shape_bar_from : float
        Height from which the square of a stop carries its bar, in sheet units [-].
    space : float
        The half step of the grid in sheet units [-].
    """

    name: str
    millimetres_per_unit: float
    sizes: dict[Size, float]
    widths: dict[LineWidth, float]
    condensed_notes: bool
    hatch_pitch: float
    limit_circle_radius: float
    least_circle_radius: float
    dot_radius: float
    shape_size: float
    shape_bar_from: float
    space: float

    def size(self, size: Size) -> float:
        """Give a size of type.

        Parameters
        ----------
        size : Size
            Its use.

        Returns
        -------
        float
            The size in sheet units [-].

        Raises
        ------
        KeyError
            If this medium has no such use, as paper has no hero figure.

        Examples
        --------
        >>> BENCH_1280.size(Size.HERO)
        128.0
        """
        return self.sizes[size]

    def width(self, width: LineWidth | float) -> float:
        """Give a line width.

        Parameters
        ----------
        width : LineWidth or float
            Its use, or a width that belongs to a shape and is in sheet units already [-].

        Returns
        -------
        float
            The width in sheet units [-].

        Examples
        --------
        >>> PAPER_MEDIUM.width(LineWidth.WIDE)
        0.5
        """
        return self.widths[width] if isinstance(width, LineWidth) else width


def _screen_widths(narrow: float) -> dict[LineWidth, float]:
    return {
        LineWidth.HATCH: narrow,
        LineWidth.GUIDE: narrow,
        LineWidth.NARROW: narrow,
        LineWidth.WIDE: 2.0 * narrow,
        LineWidth.CURRENT: 2.5 * narrow,
        LineWidth.HEAVY: 4.0 * narrow,
    }


BENCH_1280 = Medium(
    name="Bench, 1280 pixels wide",
    millimetres_per_unit=0.2,
    sizes={
        Size.NOTE: 20.0,
        Size.TEXT: 22.0,
        Size.LEAD: 28.0,
        Size.TITLE: 36.0,
        Size.WORD: 52.0,
        Size.MARK: 100.0,
        Size.HERO: 128.0,
    },
    widths=_screen_widths(1.0),
    condensed_notes=True,
    hatch_pitch=5.5,
    limit_circle_radius=21.0,
    least_circle_radius=12.0,
    dot_radius=3.0,
    shape_size=16.0,
    shape_bar_from=20.0,
    space=4.0,
)

BENCH_1920 = Medium(
    name="Bench, 1920 pixels wide",
    millimetres_per_unit=0.2,
    sizes={
        Size.NOTE: 22.0,
        Size.TEXT: 24.0,
        Size.LEAD: 32.0,
        Size.TITLE: 40.0,
        Size.WORD: 64.0,
        Size.MARK: 116.0,
        Size.HERO: 144.0,
    },
    widths=_screen_widths(1.25),
    condensed_notes=False,
    hatch_pitch=7.0,
    limit_circle_radius=30.0,
    least_circle_radius=12.0,
    dot_radius=4.0,
    shape_size=20.0,
    shape_bar_from=20.0,
    space=5.0,
)

DESK = Medium(
    name="desk",
    millimetres_per_unit=0.2,
    sizes={
        Size.NOTE: 13.0,
        Size.TEXT: 15.0,
        Size.LEAD: 20.0,
        Size.TITLE: 28.0,
        Size.WORD: 40.0,
    },
    widths=_screen_widths(1.0),
    condensed_notes=False,
    hatch_pitch=5.5,
    limit_circle_radius=21.0,
    least_circle_radius=12.0,
    dot_radius=2.5,
    shape_size=13.0,
    shape_bar_from=20.0,
    space=4.0,
)

PAPER_MEDIUM = Medium(
    name="paper",
    millimetres_per_unit=1.0,
    sizes={
        Size.NOTE: 7.0 * MILLIMETRES_PER_POINT,
        Size.TEXT: 8.5 * MILLIMETRES_PER_POINT,
        Size.LEAD: 10.0 * MILLIMETRES_PER_POINT,
        Size.TITLE: 16.0 * MILLIMETRES_PER_POINT,
        Size.WORD: 11.0 * MILLIMETRES_PER_POINT,
    },
    widths={
        LineWidth.HATCH: 0.13,
        LineWidth.GUIDE: 0.13,
        LineWidth.NARROW: 0.25,
        LineWidth.WIDE: 0.5,
        LineWidth.CURRENT: 0.7,
        LineWidth.HEAVY: 0.7,
    },
    condensed_notes=True,
    hatch_pitch=1.1,
    limit_circle_radius=4.2,
    least_circle_radius=2.5,
    dot_radius=0.5,
    shape_size=2.4,
    shape_bar_from=3.0,
    space=0.8,
)
