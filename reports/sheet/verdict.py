"""The shapes of the verdicts: three silhouettes and three fills, safe in grey print."""

from __future__ import annotations

from reports.palette import Colour
from reports.sheet.elements import Circle, Dash, Item, Polygon, Stroke
from reports.sheet.lines import NOT_MEASURED
from reports.sheet.medium import Medium
from reports.sheet.pictures import VerdictKind

__all__ = ["verdict_colour", "verdict_shape"]

_COLOURS = {
    VerdictKind.WITHIN: Colour.WITHIN,
    VerdictKind.LOOK: Colour.LOOK,
    VerdictKind.STOP: Colour.STOP,
    VerdictKind.NOT_JUDGED: Colour.BEFORE,
}


def verdict_colour(*, kind: VerdictKind) -> Colour:
    """Give the colour of a verdict's shape and vector.

    Parameters
    ----------
    kind : VerdictKind
        The verdict.

    Returns
    -------
    Colour
        Never used for words, which stay in ink.

    Examples
    --------
    >>> verdict_colour(kind=VerdictKind.LOOK).value
    'look'
    """
    return _COLOURS[kind]


def verdict_shape(
    *, kind: VerdictKind, x: float, y: float, size: float, medium: Medium
) -> tuple[Item, ...]:
    """Draw the shape of a verdict about its centre.

    Parameters
    ----------
    kind : VerdictKind
        The verdict.
    x, y : float
        Centre of the shape in sheet units [-].
    size : float
        Height of the shape in sheet units [-].
    medium : Medium
        Decides from which height a stop carries its bar.

    Returns
    -------
    tuple
        An open ring; a square on its corner with its left half solid; a solid square, barred
        when large; a dashed ring.

    Examples
    --------
    >>> from reports.sheet.medium import PAPER_MEDIUM
    >>> ring, = verdict_shape(
    ...     kind=VerdictKind.WITHIN, x=0.0, y=0.0, size=10.0, medium=PAPER_MEDIUM)
    >>> ring.radius
    4.3
    """
    colour = verdict_colour(kind=kind)
    if kind is VerdictKind.WITHIN:
        ring = Stroke(Dash.CONTINUOUS, 0.12 * size, colour)
        return (Circle(x=x, y=y, radius=0.43 * size, stroke=ring),)
    if kind is VerdictKind.NOT_JUDGED:
        return (Circle(x=x, y=y, radius=0.43 * size, stroke=NOT_MEASURED),)
    if kind is VerdictKind.LOOK:
        return _half_filled_square_on_its_corner(x=x, y=y, size=size, colour=colour)
    return _square(x=x, y=y, size=size, colour=colour, barred=size >= medium.shape_bar_from)


def _half_filled_square_on_its_corner(
    *, x: float, y: float, size: float, colour: Colour
) -> tuple[Item, ...]:
    reach = 0.5 * size
    inner = reach - 0.15 * size
    # The open half reaches a little under the solid one, or a seam shows between the two.
    tuck = 0.04 * size
    solid = Polygon(points=((x - reach, y), (x, y - reach), (x, y + reach)), fill=colour)
    rim = Polygon(
        points=(
            (x - tuck, y - reach + tuck),
            (x, y - reach),
            (x + reach, y),
            (x, y + reach),
            (x - tuck, y + reach - tuck),
            (x - tuck, y + inner),
            (x, y + inner),
            (x + inner, y),
            (x, y - inner),
            (x - tuck, y - inner),
        ),
        fill=colour,
    )
    return (solid, rim)


def _square(*, x: float, y: float, size: float, colour: Colour, barred: bool) -> tuple[Item, ...]:
    solid = Polygon(points=_corners(x, y, 0.4 * size, 0.4 * size), fill=colour)
    if not barred:
        return (solid,)
    bar = Polygon(points=_corners(x, y, 0.26 * size, 0.06 * size), fill=Colour.PAPER)
    return (solid, bar)


def _corners(
    x: float, y: float, half_width: float, half_height: float
) -> tuple[tuple[float, float], ...]:
    return (
        (x - half_width, y - half_height),
        (x + half_width, y - half_height),
        (x + half_width, y + half_height),
        (x - half_width, y + half_height),
    )
