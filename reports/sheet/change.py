"""The change row: at each station a circle of the limit, with the change as a vector in it."""

from __future__ import annotations

import itertools
import math
from collections.abc import Sequence

from reports.palette import Colour
from reports.sheet.elements import (
    Anchor,
    Box,
    Circle,
    Dash,
    Item,
    Layer,
    Line,
    Mark,
    Point,
    Polygon,
    Stroke,
)
from reports.sheet.labels import Label, note, thinned
from reports.sheet.lines import (
    ACTIVE_GUIDE,
    LIMIT,
    LIMIT_ACTIVE,
    NOT_MEASURED,
    SEEN_EDGE,
    VALUE_LIMIT,
)
from reports.sheet.medium import LineWidth, Medium, Size
from reports.sheet.pictures import ChangeMark, StationState, Turning, VerdictKind
from reports.sheet.scale import Axis
from reports.sheet.verdict import verdict_colour, verdict_shape
from reports.typeface import Weight

__all__ = ["LONGEST_VECTOR", "change_row", "limit_circle_radius", "on_clock", "spread_places"]

LONGEST_VECTOR = 1.3
"""Longest vector drawn, in limits; a longer one ends there with a bar across [-]."""


def on_clock(*, vector: complex, radius: float, counted: Turning) -> tuple[float, float]:
    """Turn a vector in the plane of rotation into a step on the sheet, seen from the drive end.

    0° points up; clock angles grow the way the marks are counted.

    Parameters
    ----------
    vector : complex
        Its real part points to 0°, its imaginary part to 90°, in units of `radius` [-].
    radius : float
        Length of a vector of 1 in sheet units [-].
    counted : Turning
        Which way the marks are counted.

    Returns
    -------
    tuple of float
        Steps to the right and downwards in sheet units [-].

    Examples
    --------
    Counted against the clock, 90° lies to the left:

    >>> on_clock(vector=1j, radius=10.0, counted=Turning.COUNTERCLOCKWISE)
    (-10.0, -0.0)
    """
    side = -1.0 if counted is Turning.COUNTERCLOCKWISE else 1.0
    return (side * radius * vector.imag, -radius * vector.real)


def limit_circle_radius(*, positions: Sequence[float], axis: Axis, medium: Medium) -> float | None:
    """Choose the radius of the limit circles.

    The smaller of the medium's greatest radius and 0.46 of the smallest pitch.

    Parameters
    ----------
    positions : sequence of float
        Distances of the stations from the drive-end face [m].
    axis : Axis
        The rotor's own axis.
    medium : Medium
        Gives the greatest radius, and the least at which a vector can still be read.

    Returns
    -------
    float or None
        Radius in sheet units [-]; None where circles would be too small at their own places.

    Examples
    --------
    Stations 40 mm apart at 1:1 000 of a metre to 600 units are 24 apart; 0.46 of it is 11.04,
    and below 12 a circle cannot be read:

    >>> from reports.sheet.medium import BENCH_1280
    >>> axis = Axis(origin=0.0, scale=600.0)
    >>> limit_circle_radius(positions=(0.10, 0.14), axis=axis, medium=BENCH_1280) is None
    True
    >>> limit_circle_radius(positions=(0.10, 0.30), axis=axis, medium=BENCH_1280)
    21.0
    """
    places = sorted(axis.x(position) for position in positions)
    pitches = [after - before for before, after in itertools.pairwise(places)]
    radius = min([medium.limit_circle_radius] + [0.46 * pitch for pitch in pitches])
    return radius if radius >= medium.least_circle_radius else None


def spread_places(
    *, places: Sequence[float], gap: float, left: float, right: float
) -> tuple[float, ...] | None:
    """Move places apart along a line, each as little as the others allow, keeping their order.

    With `p` the places and `i` their number, the least squares of the moves under
    `q[i + 1] - q[i] >= gap` are the means of pooled neighbours of `p[i] - i gap`.

    Parameters
    ----------
    places : sequence of float
        Where they would stand, growing, in sheet units [-].
    gap : float
        Least distance between neighbours in sheet units [-].
    left, right : float
        Where the first may stand at the least and the last at the most in sheet units [-].

    Returns
    -------
    tuple of float or None
        Where they stand in sheet units [-]; None where they do not all fit.

    Examples
    --------
    Two that stand too close part evenly; a third far away stays:

    >>> spread_places(places=(10.0, 12.0, 40.0), gap=8.0, left=0.0, right=50.0)
    (7.0, 15.0, 40.0)

    References
    ----------
    Pooling of adjacent violators for isotonic regression, from memory.
    """
    if not places or (len(places) - 1) * gap > right - left:
        return tuple(places) if not places else None
    pools: list[tuple[float, int]] = []
    for number, place in enumerate(places):
        mean, count = place - number * gap, 1
        while pools and pools[-1][0] > mean:
            other, others = pools.pop()
            mean = (mean * count + other * others) / (count + others)
            count += others
        pools.append((mean, count))
    means = [mean for mean, count in pools for _ in range(count)]
    last = right - (len(places) - 1) * gap
    return tuple(min(max(mean, left), last) + i * gap for i, mean in enumerate(means))


def change_row(
    *,
    changes: Sequence[ChangeMark],
    axis: Axis,
    place: Box,
    medium: Medium,
    caption: Sequence[str] = ("change",),
    counted: Turning = Turning.COUNTERCLOCKWISE,
) -> Layer:
    """Draw every station's change against its limit, on the rotor's own axis.

    Parameters
    ----------
    changes : sequence of ChangeMark
        From the drive end on.
    axis : Axis
        The rotor's own axis.
    place : Box
        Room for the row in sheet units [-].
    medium : Medium
        Screen or paper.
    caption : sequence of str, optional
        One or two lines at the left; the second carries the unit.
    counted : Turning, optional
        Which way the marks are counted, seen from the drive end.

    Returns
    -------
    Layer
        Circles with vectors, figures, shapes, and a mark for every station. Where stations stand
        too close, the circles move aside and a leader comes down from each station; where they
        are too many for that, stems stand in a band.
    """
    size = medium.size(Size.NOTE)
    figures_row = place.bottom - 0.22 * size
    room = figures_row - 0.9 * size - place.top
    true_places = [axis.x(change.position) for change in changes]
    radius = limit_circle_radius(
        positions=[change.position for change in changes], axis=axis, medium=medium
    )
    places: Sequence[float] | None = true_places
    if radius is None:
        words = [note(x=place.left, y=0.0, text=text, medium=medium) for text in caption]
        left = max((text.box(medium).right for text in words), default=place.left) + size
        radius, places = _moved_aside(
            true_places, medium, left=left, right=place.right, height=room
        )
    items: list[Item] = []
    if radius is None or places is None:
        places = true_places
        items += _stems(changes, axis, place, medium, height=room)
    else:
        moved = list(places) != true_places
        if moved:
            middle = place.top + room - LONGEST_VECTOR * radius
        elif room < 2.4 * radius:
            middle = place.top + max(radius, room / 2.0)
        else:
            middle = place.top + room - radius
        for change, true, x in zip(changes, true_places, places, strict=True):
            if x != true:
                items.append(
                    Line(x1=true, y1=place.top, x2=x, y2=middle - radius, stroke=SEEN_EDGE)
                )
            items += _circle(change, x, middle, radius, medium, counted)
    items += _figures(changes, places, figures_row, medium)
    items += [
        note(
            x=place.left,
            y=place.top + room / 2.0 + (0.35 + 1.1 * (row - (len(caption) - 1) / 2.0)) * size,
            text=text,
            medium=medium,
            colour=Colour.INK2 if row else Colour.INK,
        )
        for row, text in enumerate(caption)
    ]
    reach = radius or 2.5 * medium.space
    marks = tuple(
        Mark(
            name=f"change {change.key}",
            tells=change.tells or _sentence(change),
            box=Box(x - reach, place.top, x + reach, place.bottom),
        )
        for change, x in zip(changes, places, strict=True)
    )
    return Layer(items=tuple(items), marks=marks)


def _moved_aside(
    places: Sequence[float], medium: Medium, *, left: float, right: float, height: float
) -> tuple[float | None, tuple[float, ...] | None]:
    """Choose the radius at which all circles fit side by side, and where they then stand."""
    # Somewhat more than a diameter from one to the next, as where they stand at their own places,
    # a fifth of the height for the leaders, and room for a vector that is longer than its limit.
    radius = min(
        medium.limit_circle_radius,
        0.46 * (right - left) / max(len(places), 1),
        0.35 * height,
    )
    if radius < medium.least_circle_radius:
        return None, None
    return radius, spread_places(
        places=places, gap=radius / 0.46, left=left + radius, right=right - radius
    )


def _sentence(change: ChangeMark) -> str:
    if change.is_datum:
        return f"{change.key} is a journal and carries the datum."
    if change.change_tir is None:
        return f"{change.key} is not measured yet."
    return f"{change.key} changed {change.text}, {change.verdict.value}."


def _colour(change: ChangeMark) -> Colour:
    if change.state is StationState.ACTIVE:
        return Colour.ACCENT
    if change.verdict is VerdictKind.NOT_JUDGED:
        return Colour.INK2
    return verdict_colour(kind=change.verdict)


def _circle(
    change: ChangeMark, x: float, y: float, radius: float, medium: Medium, counted: Turning
) -> list[Item]:
    if change.is_datum:
        return [
            Circle(x=x, y=y, radius=radius, stroke=LIMIT),
            Circle(x=x, y=y, radius=0.7 * medium.dot_radius, fill=Colour.INK2),
        ]
    active = change.state is StationState.ACTIVE
    if change.change_tir is None or not change.limit_tir:
        ring = LIMIT_ACTIVE if active else NOT_MEASURED
        return [Circle(x=x, y=y, radius=radius, stroke=ring)]
    ring = LIMIT_ACTIVE if active else LIMIT
    return [
        Circle(x=x, y=y, radius=radius, stroke=ring),
        *_vector(change, change.change_tir / change.limit_tir, (x, y), radius, medium, counted),
    ]


def _vector(
    change: ChangeMark,
    share: complex,
    centre: Point,
    radius: float,
    medium: Medium,
    counted: Turning,
) -> list[Item]:
    x, y = centre
    longer = abs(share) > LONGEST_VECTOR
    if longer:
        share *= LONGEST_VECTOR / abs(share)
    step = on_clock(vector=share, radius=radius, counted=counted)
    colour = _colour(change)
    stroke = Stroke(Dash.CONTINUOUS, LineWidth.WIDE, colour)
    tip = (x + step[0], y + step[1])
    items: list[Item] = [Line(x1=x, y1=y, x2=tip[0], y2=tip[1], stroke=stroke)]
    if longer:
        length = math.hypot(*step)
        across = (-step[1] / length * 1.6 * medium.space, step[0] / length * 1.6 * medium.space)
        items.append(
            Line(
                x1=tip[0] - across[0],
                y1=tip[1] - across[1],
                x2=tip[0] + across[0],
                y2=tip[1] + across[1],
                stroke=stroke,
            )
        )
        return items
    if change.state is StationState.ACTIVE:
        return [
            *items,
            Circle(
                x=tip[0], y=tip[1], radius=1.2 * medium.dot_radius, stroke=stroke, fill=Colour.PAPER
            ),
        ]
    return [*items, Circle(x=tip[0], y=tip[1], radius=1.05 * medium.dot_radius, fill=colour)]


def _stems(
    changes: Sequence[ChangeMark], axis: Axis, place: Box, medium: Medium, *, height: float
) -> list[Item]:
    """Stand the amounts side by side against one band, each in its own limit."""
    base = place.top + height
    limit = height / LONGEST_VECTOR
    left = min(axis.x(change.position) for change in changes) - 2.0 * medium.space
    right = max(axis.x(change.position) for change in changes) + 2.0 * medium.space
    corners = ((left, base - limit), (right, base - limit), (right, base), (left, base))
    items: list[Item] = [
        Polygon(points=corners, fill=Colour.SHEET),
        Line(x1=left, y1=base - limit, x2=right, y2=base - limit, stroke=VALUE_LIMIT),
        Line(x1=left, y1=base, x2=right, y2=base, stroke=LIMIT),
    ]
    for change in changes:
        x = axis.x(change.position)
        if change.state is StationState.ACTIVE:
            items.append(Line(x1=x, y1=base - limit, x2=x, y2=base, stroke=ACTIVE_GUIDE))
        if change.change_tir is None or not change.limit_tir or change.is_datum:
            continue
        share = min(abs(change.change_tir) / change.limit_tir, LONGEST_VECTOR)
        colour = _colour(change)
        top = base - share * limit
        stroke = Stroke(Dash.CONTINUOUS, LineWidth.WIDE, colour)
        items += [
            Line(x1=x, y1=base, x2=x, y2=top, stroke=stroke),
            Circle(x=x, y=top, radius=1.05 * medium.dot_radius, fill=colour),
        ]
    return items


def _figures(
    changes: Sequence[ChangeMark], places: Sequence[float], base: float, medium: Medium
) -> list[Item]:
    labels = []
    by_key = {change.key: change for change in changes}
    for change, x in zip(changes, places, strict=True):
        if not change.text:
            continue
        active = change.state is StationState.ACTIVE
        shaped = change.verdict in (VerdictKind.LOOK, VerdictKind.STOP) and not active
        colour = Colour.INK2 if change.is_datum else Colour.INK
        text = note(
            x=x,
            y=base,
            text=change.text,
            medium=medium,
            anchor=Anchor.MIDDLE,
            colour=Colour.ACCENT if active else colour,
            weight=Weight.SEMI_BOLD if active or shaped else Weight.REGULAR,
        )
        label = Label(
            text=text,
            importance=3 * shaped + 2 * active + (0 if change.is_datum else 1),
            extra_right=1.3 * medium.shape_size if shaped else 0.0,
            name=change.key,
        )
        labels.append(label)
    items: list[Item] = []
    for label in thinned(labels=labels, medium=medium):
        items.append(label.text)
        if label.extra_right:
            items += verdict_shape(
                kind=by_key[label.name].verdict,
                x=label.text.box(medium).right + 0.75 * medium.shape_size,
                y=base - 0.35 * medium.size(Size.NOTE),
                size=medium.shape_size,
                medium=medium,
            )
    return items
