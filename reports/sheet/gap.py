"""The gap between a hot bore and its seat, closing to scale."""

from __future__ import annotations

from reports.palette import Colour
from reports.sheet.elements import Anchor, Box, Item, Layer, Line, Mark, Polygon
from reports.sheet.labels import note
from reports.sheet.lines import OUTLINE, OUTLINE_CURRENT, SEEN_EDGE, TO_COME
from reports.sheet.medium import Medium, Size
from reports.sheet.pictures import GapPicture

__all__ = ["gap_view"]


def gap_view(*, picture: GapPicture, place: Box, medium: Medium) -> Layer:
    """Draw the bore's line above the seat's line, as far apart as the gap.

    The height of the place stands for the gap at the furnace; the gap's cautious end is a
    line of its own, so that what is left is never taken for more than it is.

    Parameters
    ----------
    picture : GapPicture
        Gap now, at the furnace, and its cautious end.
    place : Box
        Room for it in sheet units [-].
    medium : Medium
        Screen or paper.

    Returns
    -------
    Layer
        Lines, words and one mark; no verdict.

    Raises
    ------
    ValueError
        If the gap at the furnace is not above zero.
    """
    if picture.opening_gap <= 0.0:
        raise ValueError("the gap at the furnace must be above zero")
    size = medium.size(Size.NOTE)
    band = 1.5 * size
    seat = place.bottom - band
    factor = (seat - place.top - band) / picture.opening_gap
    words = note(x=0.0, y=0.0, text=picture.gap_text, medium=medium).box(medium)
    right = place.right - words.width - 5.0 * medium.space

    def height(gap: float) -> float:
        # A bore cannot sink into its seat: from contact on the lines stay on each other.
        return seat - factor * min(max(gap, 0.0), picture.opening_gap)

    bore, cautious = height(picture.gap), height(picture.least_gap)
    items: list[Item] = [
        _band(place.left, right, seat, seat + band),
        Line(x1=place.left, y1=seat, x2=right, y2=seat, stroke=OUTLINE),
        Line(x1=place.left, y1=cautious, x2=right, y2=cautious, stroke=TO_COME),
        Line(x1=place.left, y1=bore, x2=right, y2=bore, stroke=OUTLINE_CURRENT),
        note(
            x=place.left + medium.space,
            y=bore - 0.3 * size,
            text=picture.bore_text,
            medium=medium,
            colour=Colour.ACCENT,
        ),
        note(
            x=place.left + medium.space,
            y=seat + size,
            text=picture.seat_text,
            medium=medium,
            colour=Colour.INK,
        ),
    ]
    if picture.least_text and cautious - bore > 1.2 * size:
        items.append(
            note(
                x=right - medium.space,
                y=cautious - 0.3 * size,
                text=picture.least_text,
                medium=medium,
                anchor=Anchor.END,
            )
        )
    if picture.gap_text:
        items += _measure(right + 2.0 * medium.space, bore, seat, picture.gap_text, medium)
    tells = picture.tells or f"Gap between bore and seat: {picture.gap_text}."
    return Layer(items=tuple(items), marks=(Mark(name="gap", tells=tells, box=place),))


def _band(left: float, right: float, top: float, bottom: float) -> Polygon:
    corners = ((left, top), (right, top), (right, bottom), (left, bottom))
    return Polygon(points=corners, fill=Colour.SHEET)


def _measure(x: float, top: float, bottom: float, text: str, medium: Medium) -> list[Item]:
    size = medium.size(Size.NOTE)
    tick = medium.space
    return [
        Line(x1=x, y1=top, x2=x, y2=bottom, stroke=SEEN_EDGE),
        Line(x1=x - tick, y1=top, x2=x + tick, y2=top, stroke=SEEN_EDGE),
        Line(x1=x - tick, y1=bottom, x2=x + tick, y2=bottom, stroke=SEEN_EDGE),
        note(
            x=x + 2.0 * tick,
            y=(top + bottom) / 2.0 + 0.35 * size,
            text=text,
            medium=medium,
            anchor=Anchor.START,
            colour=Colour.INK,
        ),
    ]
