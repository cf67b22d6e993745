"""What a drawing is made of: lines, areas, words, and the marks that explain themselves."""

from __future__ import annotations

import math
from collections.abc import Iterable, Iterator
from dataclasses import dataclass
from enum import StrEnum

from reports.palette import Colour
from reports.sheet.medium import LineWidth, Medium, Size
from reports.typeface import Weight, text_width

__all__ = [
    "Anchor",
    "Arc",
    "Box",
    "Circle",
    "Dash",
    "Hatch",
    "Item",
    "Layer",
    "Line",
    "Mark",
    "Point",
    "Polygon",
    "Polyline",
    "Sheet",
    "Stroke",
    "Text",
    "hatch_segments",
    "sheet_of",
]

Point = tuple[float, float]


class Dash(StrEnum):
    """Kinds of line, numbered as ISO 128-2 numbers them; lengths are in line widths."""

    CONTINUOUS = "01"
    DASHED = "02"
    CHAIN = "04"
    DOUBLE_CHAIN = "05"
    SHORT = "short"

    @property
    def lengths(self) -> tuple[float, ...]:
        """Dash and gap lengths in turn, in line widths [-]; empty for an unbroken line."""
        return _DASH_LENGTHS[self]


_DASH_LENGTHS: dict[Dash, tuple[float, ...]] = {
    Dash.CONTINUOUS: (),
    Dash.DASHED: (12.0, 3.0),
    Dash.CHAIN: (24.0, 3.0, 0.5, 3.0),
    Dash.DOUBLE_CHAIN: (24.0, 3.0, 0.5, 3.0, 0.5, 3.0),
    Dash.SHORT: (5.0, 3.0),
}


class Anchor(StrEnum):
    """Which end of the words sits at their place."""

    START = "start"
    MIDDLE = "middle"
    END = "end"


@dataclass(frozen=True, slots=True)
class Stroke:
    """How a line is drawn: its kind, its width and what its colour says."""

    dash: Dash
    width: LineWidth | float
    colour: Colour


@dataclass(frozen=True, slots=True)
class Box:
    """An upright rectangle in sheet units; y grows downwards."""

    left: float
    top: float
    right: float
    bottom: float

    @property
    def width(self) -> float:
        """Horizontal extent in sheet units [-]."""
        return self.right - self.left

    @property
    def height(self) -> float:
        """Vertical extent in sheet units [-]."""
        return self.bottom - self.top

    def holds(self, x: float, y: float) -> bool:
        """Say whether a point lies inside or on the edge."""
        return self.left <= x <= self.right and self.top <= y <= self.bottom

    def overlaps(self, other: Box) -> bool:
        """Say whether two boxes share more than an edge."""
        return (
            self.left < other.right
            and other.left < self.right
            and self.top < other.bottom
            and other.top < self.bottom
        )

    def grown(self, margin: float) -> Box:
        """Give the box with a margin added on every side, in sheet units [-]."""
        return Box(self.left - margin, self.top - margin, self.right + margin, self.bottom + margin)


@dataclass(frozen=True, slots=True, kw_only=True)
class Line:
    """A straight line between two points."""

    x1: float
    y1: float
    x2: float
    y2: float
    stroke: Stroke


@dataclass(frozen=True, slots=True, kw_only=True)
class Polyline:
    """An open line through several points."""

    points: tuple[Point, ...]
    stroke: Stroke


@dataclass(frozen=True, slots=True, kw_only=True)
class Hatch:
    """Parallel lines that say an area is cut through.

    Attributes
    ----------
    rising : bool
        Whether the lines rise to the right; neighbours alternate.
    pitch : float
        Distance between lines in sheet units [-].
    stroke : Stroke
        How each line is drawn.
    """

    rising: bool
    pitch: float
    stroke: Stroke


@dataclass(frozen=True, slots=True, kw_only=True)
class Polygon:
    """A closed area: filled, hatched, outlined, or several of them in that order."""

    points: tuple[Point, ...]
    stroke: Stroke | None = None
    fill: Colour | None = None
    hatch: Hatch | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Circle:
    """A circle about a point; filled, outlined or both."""

    x: float
    y: float
    radius: float
    stroke: Stroke | None = None
    fill: Colour | None = None


@dataclass(frozen=True, slots=True, kw_only=True)
class Arc:
    """A part of a circle; angles run from the right, positive the way a clock runs.

    Attributes
    ----------
    start_degrees, sweep_degrees : float
        Where it begins and how far it runs, in the sheet's own sense (y down) [°].
    """

    x: float
    y: float
    radius: float
    start_degrees: float
    sweep_degrees: float
    stroke: Stroke


@dataclass(frozen=True, slots=True, kw_only=True)
class Text:
    """Words on one line; y is their base line."""

    x: float
    y: float
    text: str
    size: Size
    weight: Weight = Weight.REGULAR
    condensed: bool = False
    anchor: Anchor = Anchor.START
    colour: Colour = Colour.INK

    def box(self, medium: Medium) -> Box:
        """Give the room the words take, from capital height to a descender's depth."""
        height = medium.size(self.size)
        width = text_width(
            text=self.text, size=height, weight=self.weight, condensed=self.condensed
        )
        share = {Anchor.START: 0.0, Anchor.MIDDLE: 0.5, Anchor.END: 1.0}[self.anchor]
        left = self.x - share * width
        return Box(left, self.y - 0.74 * height, left + width, self.y + 0.22 * height)


Item = Line | Polyline | Polygon | Circle | Arc | Text


@dataclass(frozen=True, slots=True, kw_only=True)
class Mark:
    """A place that explains itself when touched.

    Attributes
    ----------
    name : str
        What it is, as the program knows it, such as ``station S7``.
    tells : str
        One sentence for a person.
    box : Box
        Where a touch belongs to it.
    """

    name: str
    tells: str
    box: Box


@dataclass(frozen=True, slots=True, kw_only=True)
class Layer:
    """Some items, drawn in their order, with the marks that belong to them."""

    items: tuple[Item, ...] = ()
    marks: tuple[Mark, ...] = ()

    def __add__(self, other: Layer) -> Layer:
        return Layer(items=self.items + other.items, marks=self.marks + other.marks)


@dataclass(frozen=True, slots=True, kw_only=True)
class Sheet:
    """A whole drawing; the origin is its upper left corner, y grows downwards.

    Attributes
    ----------
    width, height : float
        Its size in sheet units: pixels on a screen, millimetres on paper [-].
    medium : Medium
        What the sizes and line widths are here.
    items : tuple
        What is drawn, the first one lowest.
    marks : tuple of Mark
        What explains itself, in reading order.
    title : str
        A few words.
    description : str
        One sentence that says what the drawing shows.
    """

    width: float
    height: float
    medium: Medium
    items: tuple[Item, ...]
    marks: tuple[Mark, ...] = ()
    title: str = ""
    description: str = ""

    def at(self, x: float, y: float) -> Mark | None:
        """Find what is touched: of the marks that hold the point, the smallest.

        Parameters
        ----------
        x, y : float
            The point in sheet units [-].

        Returns
        -------
        Mark or None
            None where nothing explains itself.
        """
        touched = [mark for mark in self.marks if mark.box.holds(x, y)]
        return min(touched, key=lambda mark: mark.box.width * mark.box.height, default=None)

    def texts(self) -> Iterator[Text]:
        """Run through the words in drawing order."""
        return (item for item in self.items if isinstance(item, Text))


def sheet_of(
    *,
    width: float,
    height: float,
    medium: Medium,
    layers: Iterable[Layer],
    title: str = "",
    description: str = "",
) -> Sheet:
    """Lay layers on one sheet, the first one lowest.

    Parameters
    ----------
    width, height : float
        Size of the sheet in sheet units [-].
    medium : Medium
        What the sizes and line widths are here.
    layers : iterable of Layer
        What is drawn.
    title : str, optional
        A few words.
    description : str, optional
        One sentence that says what the drawing shows.

    Returns
    -------
    Sheet
        The drawing.
    """
    whole = sum(layers, Layer())
    return Sheet(
        width=width,
        height=height,
        medium=medium,
        items=whole.items,
        marks=whole.marks,
        title=title,
        description=description,
    )


def hatch_segments(
    *, points: tuple[Point, ...], pitch: float, rising: bool
) -> tuple[tuple[Point, Point], ...]:
    """Cut 45° lines at the edge of an area.

    The lines are x + s·y = n·pitch·√2, with s = 1 for rising lines and −1 for falling ones, so
    the hatching of one part stays in step over all its areas.

    Parameters
    ----------
    points : tuple of Point
        Corners of the area in sheet units [-].
    pitch : float
        Distance between lines in sheet units [-].
    rising : bool
        Whether the lines rise to the right on a sheet whose y grows downwards.

    Returns
    -------
    tuple
        Pairs of end points inside the area.

    Examples
    --------
    A square of 2 by 2 whose lines lie √2 apart is crossed once, from corner to corner:

    >>> square = ((0.0, 0.0), (2.0, 0.0), (2.0, 2.0), (0.0, 2.0))
    >>> hatch_segments(points=square, pitch=2**0.5, rising=True)
    (((0.0, 2.0), (2.0, 0.0)),)
    """
    slope = 1.0 if rising else -1.0
    levels = [x + slope * y for x, y in points]
    step = pitch * math.sqrt(2.0)
    segments: list[tuple[Point, Point]] = []
    for count in range(math.ceil(min(levels) / step), math.floor(max(levels) / step) + 1):
        level = count * step
        crossings = sorted(_crossings(points, levels, level))
        for first, second in zip(crossings[::2], crossings[1::2], strict=False):
            if second[0] - first[0] > 1e-6 * pitch:
                segments.append((first, second))
    return tuple(segments)


def _crossings(points: tuple[Point, ...], levels: list[float], level: float) -> Iterator[Point]:
    for index in range(len(points)):
        here, there = levels[index - 1], levels[index]
        if (here < level) != (there < level):
            share = (level - here) / (there - here)
            (x1, y1), (x2, y2) = points[index - 1], points[index]
            yield (x1 + share * (x2 - x1), y1 + share * (y2 - y1))
