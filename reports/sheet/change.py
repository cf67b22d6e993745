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
from reports.sheet.lines import ACTIVE_GUIDE, LIMIT, LIMIT_ACTIVE, NOT_MEASURED, VALUE_LIMIT
from reports.sheet.medium import LineWidth, Medium, Size
from reports.sheet.pictures import ChangeMark, StationState, Turning, VerdictKind
from reports.sheet.scale import Axis
from reports.sheet.verdict import verdict_colour, verdict_shape
from reports.typeface import Weight

__all__ = ["LONGEST_VECTOR", "change_row", "limit_circle_radius", "on_clock"]

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
        Radius in sheet units [-]; None where circles would be too small and stems are drawn.

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
        Circles with vectors or stems in a band, figures, shapes, and a mark for every station.
    """
    size = medium.size(Size.NOTE)
    radius = limit_circle_radius(
        positions=[change.position for change in changes], axis=axis, medium=medium
    )
    figures_row = place.bottom - 0.22 * size
    room = figures_row - 0.9 * size - place.top
    items: list[Item] = []
    if radius is None:
        items += _stems(changes, axis, place, medium, height=room)
    else:
        middle = (
            place.top + max(radius, room / 2.0)
            if room < 2.4 * radius
            else (place.top + room - radius)
        )
        for change in changes:
            items += _circle(change, axis.x(change.position), middle, radius, medium, counted)
    items += _figures(changes, axis, figures_row, medium)
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
            box=Box(
                axis.x(change.position) - reach,
                place.top,
                axis.x(change.position) + reach,
                place.bottom,
            ),
        )
        for change in changes
    )
    return Layer(items=tuple(items), marks=marks)


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


def _figures(changes: Sequence[ChangeMark], axis: Axis, base: float, medium: Medium) -> list[Item]:
    labels = []
    by_key = {change.key: change for change in changes}
    for change in changes:
        if not change.text:
            continue
        active = change.state is StationState.ACTIVE
        shaped = change.verdict in (VerdictKind.LOOK, VerdictKind.STOP) and not active
        colour = Colour.INK2 if change.is_datum else Colour.INK
        text = note(
            x=axis.x(change.position),
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
