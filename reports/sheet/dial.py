"""One station round the clock: its readings, the fitted circle, and where the centre went."""

from __future__ import annotations

import cmath
import math

from reports.palette import Colour
from reports.sheet.change import on_clock
from reports.sheet.elements import (
    Anchor,
    Box,
    Circle,
    Dash,
    Item,
    Layer,
    Line,
    Mark,
    Polygon,
    Stroke,
    Text,
)
from reports.sheet.labels import note
from reports.sheet.lines import CURVE_AFTER, CURVE_BEFORE, LIMIT, SEEN_EDGE
from reports.sheet.medium import LineWidth, Medium, Size
from reports.sheet.pictures import DialPicture, VerdictKind
from reports.sheet.scale import magnification_text, step_not_above
from reports.sheet.verdict import verdict_colour
from reports.typeface import Weight

__all__ = ["BASE_CIRCLE", "GREATEST_OFFSET", "dial", "dial_magnification", "dial_radius"]

BASE_CIRCLE = 0.62
"""Radius of a station without runout, as a share of the dial's own radius [-]."""

GREATEST_OFFSET = 0.35
"""Largest offset of a circle as a share of the base circle; beyond it a circle looks dented [-]."""

_GREATEST_READING = 0.5
_CAPTION_LINE = 1.15

_LIMIT_DASHED = Stroke(Dash.SHORT, LineWidth.NARROW, Colour.INK2)


def dial_radius(*, place: Box, medium: Medium, captions: int) -> float:
    """Give the radius of a dial that leaves room for its figures and captions.

    Parameters
    ----------
    place : Box
        Room for the whole in sheet units [-].
    medium : Medium
        Decides the size of the words.
    captions : int
        Lines under the dial [-].

    Returns
    -------
    float
        Radius of the outer circle in sheet units [-].
    """
    size = medium.size(Size.NOTE)
    wide = place.width / 2.0 - 3.0 * medium.space - 2.1 * size
    words = (_CAPTION_LINE * captions + 0.3) * size
    high = (place.height - words) / 2.0 - _figure_room(medium)
    return max(min(wide, high), 2.0 * size)


def _figure_room(medium: Medium) -> float:
    """Give the room above and below the ring for its degrees."""
    return 3.0 * medium.space + 0.85 * medium.size(Size.NOTE)


def dial_magnification(*, picture: DialPicture, radius: float, scale: float, wanted: int) -> int:
    """Choose the dial's magnification: the centreline's own, or the next one that fits.

    Parameters
    ----------
    picture : DialPicture
        What will be drawn.
    radius : float
        Radius of the dial in sheet units [-].
    scale : float
        Sheet units to the metre of the rotor's own drawing [1/m].
    wanted : int
        Magnification of the centreline [-].

    Returns
    -------
    int
        At most `wanted`, such that every offset stays within 0.35 of the base circle and every
        reading inside the dial [-].

    Examples
    --------
    At 600 units to the metre, 25 µm of eccentricity × 2 000 would be 30 units; on a dial of
    radius 100 the base circle is 62 and 0.35 of it 21.7, so it steps down:

    >>> station = DialPicture(key="S7", readings=(), eccentricity=25e-6 + 0j)
    >>> dial_magnification(picture=station, radius=100.0, scale=600.0, wanted=2000)
    1000
    """
    base = BASE_CIRCLE * radius
    offsets = [abs(vector) for vector in (picture.eccentricity, picture.before) if vector]
    offset = max(offsets, default=0.0)
    swing = max((abs(reading.value - picture.mean) for reading in picture.readings), default=0.0)
    bounds = []
    if offset > 0.0:
        bounds.append(GREATEST_OFFSET * base / (scale * offset))
    if swing > 0.0:
        bounds.append(_GREATEST_READING * base / (scale * swing))
    return min([wanted, *(step_not_above(value=bound) for bound in bounds)])


def dial(
    *, picture: DialPicture, place: Box, medium: Medium, scale: float, magnification: int
) -> Layer:
    """Draw the dial of one station, seen from the drive end.

    Parameters
    ----------
    picture : DialPicture
        Readings, fitted circle, the state before, the limit and the mark to read now.
    place : Box
        Room for it in sheet units [-].
    medium : Medium
        Screen or paper.
    scale : float
        Sheet units to the metre of the rotor's own drawing [1/m].
    magnification : int
        The centreline's magnification; the dial takes it or the next that fits [-].

    Returns
    -------
    Layer
        The dial with its captions and one mark.
    """
    radius = dial_radius(place=place, medium=medium, captions=len(picture.caption))
    fitting = dial_magnification(picture=picture, radius=radius, scale=scale, wanted=magnification)
    x = (place.left + place.right) / 2.0
    y = place.top + _figure_room(medium) + radius
    shown = _Dial(picture, x, y, radius, scale * fitting, medium)
    items = [
        *shown.ring(),
        *shown.circles(),
        *shown.centre(),
        *shown.readings(),
        *_captions(picture, place, y + radius + _figure_room(medium), medium, fitting),
    ]
    mark = Mark(
        name=f"dial {picture.key}",
        tells=picture.tells or f"Readings of {picture.key} round the clock.",
        box=Box(x - radius, y - radius, x + radius, y + radius),
    )
    return Layer(items=tuple(items), marks=(mark,))


def _captions(
    picture: DialPicture, place: Box, top: float, medium: Medium, magnification: int
) -> list[Text]:
    size = medium.size(Size.NOTE)
    written = magnification_text(magnification=magnification)
    lines = [f"{text}, {written}" if row == 0 else text for row, text in enumerate(picture.caption)]
    return [
        note(x=place.left, y=top + (1.2 + _CAPTION_LINE * row) * size, text=text, medium=medium)
        for row, text in enumerate(lines)
    ]


class _Dial:
    """One dial while it is being drawn."""

    def __init__(
        self,
        picture: DialPicture,
        x: float,
        y: float,
        radius: float,
        factor: float,
        medium: Medium,
    ) -> None:
        self.picture = picture
        self.x = x
        self.y = y
        self.radius = radius
        self.base = BASE_CIRCLE * radius
        self.factor = factor
        self.medium = medium

    def at(self, vector: complex) -> tuple[float, float]:
        """Place a vector in sheet units."""
        right, down = on_clock(vector=vector, radius=1.0, counted=self.picture.counted)
        return (self.x + right, self.y + down)

    def ring(self) -> list[Item]:
        """Draw the outer circle, its degrees, and the reference mark as a solid triangle."""
        items: list[Item] = [Circle(x=self.x, y=self.y, radius=self.radius, stroke=SEEN_EDGE)]
        space = self.medium.space
        for degrees in range(0, 360, 15):
            length = 2.0 * space if degrees % 45 == 0 else space
            items.append(
                self._spoke(math.radians(degrees), self.radius, self.radius + length, SEEN_EDGE)
            )
        items += [self._degrees(degrees) for degrees in range(0, 360, 45)]
        half = 2.0 * space
        items.append(
            Polygon(
                points=(
                    (self.x - half, self.y - self.radius),
                    (self.x + half, self.y - self.radius),
                    (self.x, self.y - self.radius + 1.6 * half),
                ),
                fill=Colour.INK,
            )
        )
        active = self.picture.active_angle
        if active is not None:
            stroke = Stroke(Dash.CONTINUOUS, LineWidth.WIDE, Colour.ACCENT)
            items.append(self._spoke(active, 0.84 * self.radius, self.radius, stroke))
        return items

    def _spoke(self, angle: float, inner: float, outer: float, stroke: Stroke) -> Line:
        direction = cmath.exp(1j * angle)
        x1, y1 = self.at(inner * direction)
        x2, y2 = self.at(outer * direction)
        return Line(x1=x1, y1=y1, x2=x2, y2=y2, stroke=stroke)

    def _degrees(self, degrees: int) -> Text:
        active = self.picture.active_angle
        now = active is not None and abs(math.degrees(active) % 360 - degrees) < 1e-6
        size = self.medium.size(Size.NOTE)
        direction = cmath.exp(1j * math.radians(degrees))
        x, y = self.at((self.radius + 3.0 * self.medium.space) * direction)
        side = (x - self.x) / self.radius
        anchor = Anchor.MIDDLE
        if abs(side) > 0.2:
            anchor = Anchor.START if side > 0 else Anchor.END
        drop = 0.35 + 0.35 * (y - self.y) / self.radius
        return note(
            x=x,
            y=y + drop * size,
            text=f"{degrees}°",
            medium=self.medium,
            anchor=anchor,
            colour=Colour.ACCENT if now else Colour.INK2,
            weight=Weight.SEMI_BOLD if now else Weight.REGULAR,
        )

    def circles(self) -> list[Item]:
        """Draw the circle before the mount in grey and the fitted one in ink."""
        items: list[Item] = []
        before, after = self.picture.before, self.picture.eccentricity
        if before is not None:
            x, y = self.at(self.factor * before)
            items.append(Circle(x=x, y=y, radius=self.base, stroke=CURVE_BEFORE))
        if after is not None:
            x, y = self.at(self.factor * after)
            items.append(Circle(x=x, y=y, radius=self.base, stroke=CURVE_AFTER))
        return items

    def centre(self) -> list[Item]:
        """Draw where the centre was, the limit round it, and where it went."""
        picture, dot = self.picture, self.medium.dot_radius
        cross = 0.7 * self.medium.space
        items: list[Item] = [
            Line(x1=self.x - cross, y1=self.y, x2=self.x + cross, y2=self.y, stroke=SEEN_EDGE),
            Line(x1=self.x, y1=self.y - cross, x2=self.x, y2=self.y + cross, stroke=SEEN_EDGE),
        ]
        if picture.before is None:
            return items
        x, y = self.at(self.factor * picture.before)
        items.append(Circle(x=x, y=y, radius=0.65 * dot, fill=Colour.BEFORE))
        if picture.limit_tir:
            reach = self.factor * picture.limit_tir / 2.0
            items.append(Circle(x=x, y=y, radius=reach, stroke=_LIMIT_DASHED))
        if picture.eccentricity is not None:
            colour = Colour.ACCENT
            if picture.verdict is not VerdictKind.NOT_JUDGED:
                colour = verdict_colour(kind=picture.verdict)
            tip = self.at(self.factor * picture.eccentricity)
            stroke = Stroke(Dash.CONTINUOUS, LineWidth.WIDE, colour)
            items += [
                Line(x1=x, y1=y, x2=tip[0], y2=tip[1], stroke=stroke),
                Circle(x=tip[0], y=tip[1], radius=1.05 * dot, fill=colour),
            ]
        return items

    def readings(self) -> list[Item]:
        """Draw every reading on its ray, the one being typed open."""
        items: list[Item] = []
        dot = self.medium.dot_radius
        for reading in self.picture.readings:
            reach = self.base + self.factor * (reading.value - self.picture.mean)
            x, y = self.at(reach * cmath.exp(1j * reading.angle))
            if reading.is_open:
                stroke = Stroke(Dash.CONTINUOUS, LineWidth.WIDE, Colour.ACCENT)
                items.append(Circle(x=x, y=y, radius=1.35 * dot, stroke=stroke, fill=Colour.PAPER))
            else:
                items += [
                    Circle(x=x, y=y, radius=1.3 * dot, fill=Colour.PAPER),
                    Circle(x=x, y=y, radius=1.1 * dot, fill=LIMIT.colour),
                ]
        return items
