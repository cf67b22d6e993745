"""Readings of one station while it cools: points, the decay fitted to them, and where it ends."""

from __future__ import annotations

import math
from dataclasses import dataclass

from reports.palette import Colour
from reports.sheet.elements import (
    Anchor,
    Box,
    Circle,
    Item,
    Layer,
    Line,
    Mark,
    Polygon,
    Polyline,
)
from reports.sheet.labels import note
from reports.sheet.lines import CURVE_AFTER, CURVE_EARLIER, GUIDE, SEEN_EDGE
from reports.sheet.medium import Medium, Size
from reports.sheet.ranges import round_ticks

__all__ = ["DecayPicture", "decay", "decay_height"]

_POINTS = 60


@dataclass(frozen=True, slots=True, kw_only=True)
class DecayPicture:
    """A decay in its own units, as it is drawn.

    Attributes
    ----------
    hours : tuple of float
        When each reading was taken [h].
    values : tuple of float
        Readings in the figure's own unit [-].
    curve : tuple of pairs
        Places of the fitted decay, hours and values; empty without one [-].
    final, uncertainty : float or None
        Where it ends and how far that may be off [-].
    unit : str
        Unit of the values.
    name : str
        Which station, at which mark.
    tells : str
        The figure in one sentence.
    """

    hours: tuple[float, ...]
    values: tuple[float, ...]
    curve: tuple[tuple[float, float], ...] = ()
    final: float | None = None
    uncertainty: float = 0.0
    unit: str = ""
    name: str = ""
    tells: str = ""


def decay_height(*, medium: Medium) -> float:
    """Give the height that the figure takes, in sheet units [-]."""
    return 9.0 * medium.size(Size.NOTE)


def decay(*, picture: DecayPicture, place: Box, medium: Medium) -> Layer:
    """Draw readings over hours, the decay fitted to them and the band in which it ends.

    Parameters
    ----------
    picture : DecayPicture
        What is drawn.
    place : Box
        Room for it [-].
    medium : Medium
        Screen or paper.

    Returns
    -------
    Layer
        Frame, scales, band, curve and points.
    """
    size = medium.size(Size.NOTE)
    plot = Box(
        place.left + 5.5 * size, place.top + 1.6 * size, place.right - 7.0 * size,
        place.bottom - 1.8 * size,
    )  # fmt: skip
    late = max([*picture.hours, *(hour for hour, _ in picture.curve)]) or 1.0
    shown = [*picture.values, *(value for _, value in picture.curve)]
    if picture.final is not None:
        shown += [picture.final - picture.uncertainty, picture.final + picture.uncertainty]
    least, greatest = min(shown), max(shown)
    margin = 0.12 * (greatest - least) or 1.0
    least, greatest = least - margin, greatest + margin

    def at(hour: float, value: float) -> tuple[float, float]:
        across = plot.left + plot.width * hour / late
        return across, plot.bottom - plot.height * (value - least) / (greatest - least)

    items: list[Item] = []
    if picture.final is not None:
        low = at(0.0, picture.final - picture.uncertainty)[1]
        high = at(0.0, picture.final + picture.uncertainty)[1]
        corners = ((plot.left, high), (plot.right, high), (plot.right, low), (plot.left, low))
        items.append(Polygon(points=corners, fill=Colour.SHEET))
        middle = at(0.0, picture.final)[1]
        items += [
            Line(x1=plot.left, y1=middle, x2=plot.right, y2=middle, stroke=CURVE_EARLIER),
            note(
                x=plot.right + 0.5 * size,
                y=middle + 0.35 * size,
                text="ends here",
                medium=medium,
                colour=Colour.INK,
            ),
        ]
    items += _scales(plot, late, least, greatest, picture, medium)
    if picture.curve:
        items.append(
            Polyline(points=tuple(at(*point) for point in picture.curve), stroke=CURVE_AFTER)
        )
    for hour, value in zip(picture.hours, picture.values, strict=True):
        x, y = at(hour, value)
        items.append(Circle(x=x, y=y, radius=0.28 * size, fill=Colour.INK))
    items.append(
        note(
            x=plot.left + size,
            y=place.top + size,
            text=picture.name,
            medium=medium,
            colour=Colour.INK,
        )
    )
    mark = Mark(name=f"decay {picture.name}", tells=picture.tells or picture.name, box=place)
    return Layer(items=tuple(items), marks=(mark,))


def _scales(
    plot: Box, late: float, least: float, greatest: float, picture: DecayPicture, medium: Medium
) -> list[Item]:
    size = medium.size(Size.NOTE)
    items: list[Item] = [
        Line(x1=plot.left, y1=plot.bottom, x2=plot.right, y2=plot.bottom, stroke=SEEN_EDGE),
        Line(x1=plot.left, y1=plot.top, x2=plot.left, y2=plot.bottom, stroke=SEEN_EDGE),
    ]
    hours = round_ticks(start=0.0, end=late)
    for hour in hours:
        x = plot.left + plot.width * hour / late
        items += [
            Line(x1=x, y1=plot.bottom, x2=x, y2=plot.bottom + medium.space, stroke=SEEN_EDGE),
            note(x=x, y=plot.bottom + 1.4 * size, text=_figure(hour, hours), medium=medium,
                 anchor=Anchor.MIDDLE),
        ]  # fmt: skip
    items.append(note(x=plot.right + size, y=plot.bottom + 1.4 * size, text="h", medium=medium))
    ticks = round_ticks(start=least, end=greatest)[:: 2 if plot.height < 8.0 * size else 1]
    for value in ticks:
        y = plot.bottom - plot.height * (value - least) / (greatest - least)
        items += [
            Line(x1=plot.left, y1=y, x2=plot.right, y2=y, stroke=GUIDE),
            note(x=plot.left - 0.5 * size, y=y + 0.35 * size, text=_figure(value, ticks),
                 medium=medium, anchor=Anchor.END),
        ]  # fmt: skip
    items.append(
        note(x=plot.left - 0.5 * size, y=plot.top - 0.6 * size, text=picture.unit, medium=medium,
             anchor=Anchor.END)
    )  # fmt: skip
    return items


def _figure(value: float, ticks: tuple[float, ...]) -> str:
    step = ticks[1] - ticks[0] if len(ticks) > 1 else 1.0
    decimals = max(0, -math.floor(math.log10(step) + 1e-9))
    return f"{value:.{decimals}f}".replace("-", "−")
