"""Values against limits: a bar from least to greatest, alike for fit, heat, time and place."""

from __future__ import annotations

import math
from dataclasses import dataclass

from reports.palette import Colour
from reports.sheet.elements import Anchor, Box, Dash, Item, Layer, Line, Mark, Polygon, Stroke
from reports.sheet.labels import Label, note, thinned
from reports.sheet.lines import SEEN_EDGE, VALUE_LIMIT
from reports.sheet.medium import LineWidth, Medium, Size
from reports.sheet.pictures import RangeBar, RangePicture
from reports.sheet.verdict import verdict_shape

__all__ = ["fit_bar", "fit_bar_height", "round_ticks"]

_GREATEST_TICKS = 7


def fit_bar_height(*, picture: RangePicture, medium: Medium) -> float:
    """Give the height that a figure of values against limits takes.

    Parameters
    ----------
    picture : RangePicture
        What will be drawn.
    medium : Medium
        Decides the height of a row.

    Returns
    -------
    float
        Height in sheet units [-].
    """
    rows = len(picture.bars) + (2 if picture.lower_text or picture.upper_text else 1)
    return (rows + 0.3) * _row(medium)


def _row(medium: Medium) -> float:
    return 1.75 * medium.size(Size.NOTE)


def round_ticks(*, start: float, end: float) -> tuple[float, ...]:
    """Choose round places for the figures of a scale, seven at most.

    Parameters
    ----------
    start, end : float
        Ends of the scale in its own unit [-].

    Returns
    -------
    tuple of float
        Rising, all between the ends [-].

    Raises
    ------
    ValueError
        If the scale has no length.

    Examples
    --------
    >>> round_ticks(start=6.0, end=12.0)
    (6.0, 7.0, 8.0, 9.0, 10.0, 11.0, 12.0)
    >>> round_ticks(start=-0.3, end=0.9)
    (-0.2, 0.0, 0.2, 0.4, 0.6, 0.8)
    """
    if end <= start:
        raise ValueError("the end of a scale must lie above its start")
    exponent = math.floor(math.log10((end - start) / _GREATEST_TICKS))
    for power in (exponent, exponent + 1):
        for factor in (1, 2, 5):
            step = factor * 10.0**power
            first, last = math.ceil(start / step - 1e-9), math.floor(end / step + 1e-9)
            if last - first < _GREATEST_TICKS:
                return tuple(round(count * step, 12) for count in range(first, last + 1))
    raise ValueError("the scale cannot be divided")


def fit_bar(*, picture: RangePicture, place: Box, medium: Medium) -> Layer:
    """Draw measured ranges against their limits.

    Parameters
    ----------
    picture : RangePicture
        Rows, limits and unit.
    place : Box
        Room for it; names take the left quarter and figures the right seventh [-].
    medium : Medium
        Screen or paper.

    Returns
    -------
    Layer
        Band between the limits, bars with their mean and whiskers, scale, words and marks.
    """
    row = _row(medium)
    plot = Box(
        place.left + 0.25 * place.width,
        place.top + (row if picture.lower_text or picture.upper_text else 0.3 * row),
        place.right - 0.15 * place.width,
        place.bottom - row,
    )
    start, end = _ends(picture)
    ruled = _Plot(box=plot, start=start, end=end, medium=medium)
    items: list[Item] = _limits(picture, ruled)
    marks = []
    pitch = plot.height / max(len(picture.bars), 1)
    for index, bar in enumerate(picture.bars):
        middle = plot.top + (index + 0.5) * pitch
        items += _bar(bar, place, middle, ruled)
        marks.append(
            Mark(
                name=f"range {bar.name}",
                tells=bar.tells or f"{bar.name}: {bar.text}, {bar.verdict.value}.",
                box=Box(place.left, middle - pitch / 2.0, place.right, middle + pitch / 2.0),
            )
        )
    items += _scale(picture, ruled)
    return Layer(items=tuple(items), marks=tuple(marks))


def _ends(picture: RangePicture) -> tuple[float, float]:
    values = [value for value in (picture.lower, picture.upper) if value is not None]
    for bar in picture.bars:
        values += [bar.least - bar.uncertainty, bar.greatest + bar.uncertainty]
    least, greatest = min(values, default=0.0), max(values, default=1.0)
    margin = 0.18 * (greatest - least) or 1.0
    start = least - margin if picture.start is None else picture.start
    end = greatest + margin if picture.end is None else picture.end
    return start, end


@dataclass(frozen=True, slots=True, kw_only=True)
class _Plot:
    """The ruled part of the figure, and where a value lies on it."""

    box: Box
    start: float
    end: float
    medium: Medium

    def at(self, value: float) -> float:
        return self.box.left + self.box.width * (value - self.start) / (self.end - self.start)


def _limits(picture: RangePicture, ruled: _Plot) -> list[Item]:
    plot, at, medium = ruled.box, ruled.at, ruled.medium
    low = plot.left if picture.lower is None else at(picture.lower)
    high = plot.right if picture.upper is None else at(picture.upper)
    corners = ((low, plot.top), (high, plot.top), (high, plot.bottom), (low, plot.bottom))
    items: list[Item] = [Polygon(points=corners, fill=Colour.SHEET)]
    labels = []
    base = plot.top - 0.45 * medium.size(Size.NOTE)
    for value, text, anchor in (
        (picture.lower, picture.lower_text, Anchor.END),
        (picture.upper, picture.upper_text, Anchor.START),
    ):
        if value is None:
            continue
        x = at(value)
        rise = 0.25 * medium.size(Size.NOTE)
        items.append(Line(x1=x, y1=plot.top - rise, x2=x, y2=plot.bottom, stroke=VALUE_LIMIT))
        if text:
            shift = -medium.space if anchor is Anchor.END else medium.space
            labels.append(
                Label(
                    text=note(
                        x=x + shift,
                        y=base,
                        text=text,
                        medium=medium,
                        anchor=anchor,
                        colour=Colour.INK,
                    )
                )
            )
    return items + [label.text for label in thinned(labels=labels, medium=medium)]


def _bar(bar: RangeBar, place: Box, middle: float, ruled: _Plot) -> list[Item]:
    plot, at, medium = ruled.box, ruled.at, ruled.medium
    size = medium.size(Size.NOTE)
    half = 0.16 * size
    left, right = at(bar.least), at(bar.greatest)
    if right - left < half:
        left, right = (left + right - half) / 2.0, (left + right + half) / 2.0
    corners = (
        (left, middle - half),
        (right, middle - half),
        (right, middle + half),
        (left, middle + half),
    )
    tick = Stroke(Dash.CONTINUOUS, LineWidth.WIDE, Colour.INK)
    mean = at(bar.mean)
    items: list[Item] = []
    if bar.uncertainty > 0.0:
        ends = (at(bar.least - bar.uncertainty), at(bar.greatest + bar.uncertainty))
        items.append(Line(x1=ends[0], y1=middle, x2=ends[1], y2=middle, stroke=SEEN_EDGE))
        items += [
            Line(x1=x, y1=middle - half, x2=x, y2=middle + half, stroke=SEEN_EDGE) for x in ends
        ]
    items += [
        Polygon(points=corners, fill=Colour.INK),
        Line(x1=mean, y1=middle - 2.4 * half, x2=mean, y2=middle + 2.4 * half, stroke=tick),
        note(x=place.left, y=middle + 0.35 * size, text=bar.name, medium=medium, colour=Colour.INK),
    ]
    shape_x = plot.right + 0.03 * place.width + medium.shape_size / 2.0
    items += verdict_shape(
        kind=bar.verdict, x=shape_x, y=middle, size=medium.shape_size, medium=medium
    )
    items.append(
        note(
            x=shape_x + 0.9 * medium.shape_size,
            y=middle + 0.35 * size,
            text=bar.text,
            medium=medium,
            colour=Colour.INK,
        )
    )
    return items


def _scale(picture: RangePicture, ruled: _Plot) -> list[Item]:
    plot, at, medium = ruled.box, ruled.at, ruled.medium
    size = medium.size(Size.NOTE)
    y = plot.bottom
    items: list[Item] = [Line(x1=plot.left, y1=y, x2=plot.right, y2=y, stroke=SEEN_EDGE)]
    labels = []
    ticks = round_ticks(start=ruled.start, end=ruled.end)
    step = ticks[1] - ticks[0] if len(ticks) > 1 else 1.0
    decimals = max(0, -math.floor(math.log10(step) + 1e-9))
    for value in ticks:
        x = at(value)
        items.append(Line(x1=x, y1=y, x2=x, y2=y + medium.space, stroke=SEEN_EDGE))
        text = f"{value:.{decimals}f}".replace("-", "−")
        labels.append(
            Label(
                text=note(
                    x=x,
                    y=y + 1.15 * size + 0.5 * medium.space,
                    text=text,
                    medium=medium,
                    anchor=Anchor.MIDDLE,
                )
            )
        )
    unit = note(
        x=plot.right + 0.03 * (plot.right - plot.left),
        y=y + 1.15 * size + 0.5 * medium.space,
        text=picture.unit,
        medium=medium,
    )
    taken = [unit.box(medium)] if unit.text else []
    items += [label.text for label in thinned(labels=labels, medium=medium, taken=taken)]
    return [*items, unit] if unit.text else items
