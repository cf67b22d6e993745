"""Where a rotor comes to lie on its sheet, and in which view."""

from __future__ import annotations

from collections.abc import Callable
from enum import StrEnum

from reports.sheet.elements import Box, Line, Point, Stroke
from reports.sheet.medium import Medium, Size
from reports.sheet.pictures import LIFT_MAGNIFICATION, PartOutline, PartState, RotorPicture
from reports.sheet.scale import Axis

__all__ = ["Shown", "View", "axis_height", "has_head", "upright"]


class View(StrEnum):
    """Half above the axis, or the upper half in section and the lower one from outside."""

    HALF = "half"
    SECTION = "section"


def axis_height(*, place: Box, view: View, medium: Medium, headroom: bool) -> tuple[float, float]:
    """Say where the axis lies in a place and how much height the largest radius may take.

    Parameters
    ----------
    place : Box
        Room for the rotor in sheet units [-].
    view : View
        Half, or both halves.
    medium : Medium
        Decides the height of a row of notes.
    headroom : bool
        Whether a row of notes stands above the parts.

    Returns
    -------
    axis : float
        Height of the axis on the sheet in sheet units [-].
    room : float
        Height for the largest radius in sheet units [-].
    """
    row = 1.25 * medium.size(Size.NOTE) if headroom else 0.0
    edge = 1.0 * medium.space
    if view is View.HALF:
        return place.bottom, place.height - row - edge
    room = (place.height - row - 2.0 * edge) / 2.0
    return place.top + row + edge + room, room


def has_head(*, picture: RotorPicture) -> bool:
    """Say whether a row of notes stands above the parts.

    Parameters
    ----------
    picture : RotorPicture
        The rotor.

    Returns
    -------
    bool
        True where a part has a label or a number.
    """
    return any(part.label or part.number for part in picture.parts)


class Shown:
    """One rotor on one sheet: turns distances and radii into places.

    Attributes
    ----------
    axis : Axis
        One scale for lengths and diameters.
    base : float
        Height of the axis on the sheet in sheet units [-].
    medium : Medium
        Screen or paper.
    view : View
        Half, or both halves.
    place : Box
        Room for the rotor in sheet units [-].
    """

    def __init__(self, *, axis: Axis, base: float, medium: Medium, view: View, place: Box) -> None:
        self.axis = axis
        self.base = base
        self.medium = medium
        self.view = view
        self.place = place

    def upper(self, points: tuple[Point, ...], lift: float = 0.0) -> tuple[Point, ...]:
        """Place points, in distance and radius [m], above the axis."""
        return self._placed(points, lift, -1.0)

    def lower(self, points: tuple[Point, ...], lift: float = 0.0) -> tuple[Point, ...]:
        """Place points, in distance and radius [m], below the axis."""
        return self._placed(points, lift, 1.0)

    def _placed(self, points: tuple[Point, ...], lift: float, side: float) -> tuple[Point, ...]:
        # A silhouette still closes at the axis while its part is lifted.
        return tuple(
            (
                self.axis.x(position),
                self.base + side * self.axis.scale * (radius + lift if radius > 0.0 else 0.0),
            )
            for position, radius in points
        )

    def halves(self) -> tuple[Callable[[tuple[Point, ...]], tuple[Point, ...]], ...]:
        """Give the way of placing points for each half that is drawn."""
        return (self.upper,) if self.view is View.HALF else (self.upper, self.lower)

    def box_of(self, part: PartOutline) -> Box:
        """Give the place that the upper half of a part takes."""
        left, right = self.axis.x(part.start), self.axis.x(part.end)
        seat = self.base - self.axis.scale * part.bore_diameter / 2.0
        return Box(left, self.top_of(part), right, seat)

    def top_of(self, part: PartOutline) -> float:
        """Give the height of a part's rim on the sheet in sheet units [-]."""
        lift = LIFT_MAGNIFICATION * part.lifted_gap if part.state is PartState.CURRENT else 0.0
        return self.base - self.axis.scale * (part.outer_diameter / 2.0 + lift)


def upright(x: float, top: float, bottom: float, stroke: Stroke) -> Line:
    """Give an upright line; all places in sheet units [-]."""
    return Line(x1=x, y1=top, x2=x, y2=bottom, stroke=stroke)
