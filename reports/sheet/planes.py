"""The centreline in two planes: before, earlier attempts and after, on the rotor's own axis."""

from __future__ import annotations

from collections.abc import Sequence
from itertools import pairwise

from models.units import Length
from reports.palette import Colour
from reports.sheet.elements import (
    Anchor,
    Box,
    Circle,
    Item,
    Layer,
    Line,
    Mark,
    Point,
    Polyline,
    Stroke,
    Text,
)
from reports.sheet.labels import note
from reports.sheet.lines import (
    ACTIVE_GUIDE,
    CURVE_AFTER,
    CURVE_BEFORE,
    CURVE_EARLIER,
    GUIDE,
    SEEN_EDGE,
)
from reports.sheet.medium import Medium, Size
from reports.sheet.pictures import Curve, LengthUnit, PlaneCurve, StationMark, StationState
from reports.sheet.scale import Axis, magnification_for, magnification_text, step_not_above

__all__ = ["PLANE_NAMES", "planes", "planes_magnification"]

PLANE_NAMES = ("0°–180°", "90°–270°")
"""The two planes; upwards is 0° in the first and 90° in the second."""

_STROKES: dict[Curve, Stroke] = {
    Curve.BEFORE: CURVE_BEFORE,
    Curve.EARLIER: CURVE_EARLIER,
    Curve.AFTER: CURVE_AFTER,
}


def planes_magnification(
    *,
    curves: Sequence[PlaneCurve],
    limit_tir: float,
    place: Box,
    axis: Axis,
    held: int | None = None,
) -> int:
    """Choose the magnification of the centreline for its place.

    The largest step at which max(|before|, |after|, limit/2) stays within half a strip, where
    half the limit is the eccentricity that the limit, a total indicator reading, stands for.

    Parameters
    ----------
    curves : sequence of PlaneCurve
        Every curve that will be drawn.
    limit_tir : float
        Limit of the change as total indicator reading, 0 where none is set [m].
    place : Box
        Room for both strips in sheet units [-].
    axis : Axis
        The rotor's own axis.
    held : int or None, optional
        The magnification in use while a survey is read; it steps down only [-].

    Returns
    -------
    int
        The magnification [-].
    """
    sizes = [abs(vector) for curve in curves for vector in curve.vectors if vector is not None]
    return magnification_for(
        greatest=max([*sizes, limit_tir / 2.0]),
        half_height=place.height / 4.0,
        scale=axis.scale,
        held=held,
    )


def planes(
    *,
    curves: Sequence[PlaneCurve],
    stations: Sequence[StationMark],
    axis: Axis,
    length: float,
    place: Box,
    medium: Medium,
    magnification: int,
    length_unit: LengthUnit = LengthUnit.INCH,
) -> Layer:
    """Draw centrelines in two flat planes under their rotor.

    Parameters
    ----------
    curves : sequence of PlaneCurve
        The first one lowest: before, earlier attempts, after.
    stations : sequence of StationMark
        Where guides run; the one being read gets an accent line over the whole height.
    axis : Axis
        The rotor's own axis.
    length : float
        Length of the rotor [m].
    place : Box
        Room for both strips in sheet units [-].
    medium : Medium
        Screen or paper.
    magnification : int
        Against the drawing's own scale [-].
    length_unit : LengthUnit, optional
        The job's own unit, first at the scale bar.

    Returns
    -------
    Layer
        Lines and words, and a mark for every measured point after the mount.

    Notes
    -----
    No limit is drawn here: a change can lie inside a band in both planes and still be outside
    the limit, so the limit belongs to the change row alone.
    """
    items: list[Item] = list(_guides(stations, axis, length, place))
    marks: list[Mark] = []
    factor = axis.scale * magnification
    both = []
    for index in range(2):
        strip = _strip(place, index)
        zero = (strip.top + strip.bottom) / 2.0
        both.append([(curve, _points(curve, index, axis, zero, factor)) for curve in curves])
    taken = [box for drawn in both for _, points in drawn for box in _line_boxes(points, medium)]
    for index, (name, drawn) in enumerate(zip(PLANE_NAMES, both, strict=True)):
        strip = _strip(place, index)
        zero = (strip.top + strip.bottom) / 2.0
        for curve, points in drawn:
            items += _curve_items(curve, points, medium)
        names = _names(drawn, zero, place, taken, medium)
        taken += [text.box(medium).grown(medium.space) for text in names]
        items += names
        items += _caption(
            name, index, magnification, place.left, axis.x(0.0) - medium.space, strip, medium
        )
        marks += _marks(drawn, stations, name, medium)
    items += _scale_bar(axis, length, place, medium, magnification, length_unit)
    return Layer(items=tuple(items), marks=tuple(marks))


def _strip(place: Box, index: int) -> Box:
    half = place.height / 2.0
    return Box(place.left, place.top + index * half, place.right, place.top + (index + 1) * half)


def _guides(stations: Sequence[StationMark], axis: Axis, length: float, place: Box) -> list[Item]:
    items: list[Item] = []
    for station in stations:
        x = axis.x(station.position)
        active = station.state is StationState.ACTIVE
        stroke = ACTIVE_GUIDE if active else GUIDE
        items.append(Line(x1=x, y1=place.top, x2=x, y2=place.bottom, stroke=stroke))
    for index in range(2):
        zero = place.top + place.height * (0.25 + 0.5 * index)
        items.append(Line(x1=axis.x(0.0), y1=zero, x2=axis.x(length), y2=zero, stroke=GUIDE))
    # The accent line belongs over the grey ones.
    return sorted(items, key=lambda item: isinstance(item, Line) and item.stroke is ACTIVE_GUIDE)


def _points(
    curve: PlaneCurve, index: int, axis: Axis, zero: float, factor: float
) -> list[Point | None]:
    return [
        None
        if vector is None
        else (axis.x(position), zero - factor * (vector.imag if index else vector.real))
        for position, vector in zip(curve.positions, curve.vectors, strict=True)
    ]


def _curve_items(curve: PlaneCurve, points: list[Point | None], medium: Medium) -> list[Item]:
    stroke = _STROKES[curve.which]
    items: list[Item] = [
        Polyline(points=tuple(run), stroke=stroke)
        for run in _runs(points, without=curve.active)
        if len(run) > 1
    ]
    if curve.which is Curve.EARLIER:
        return items
    radius = medium.dot_radius * (1.0 if curve.which is Curve.AFTER else 0.65)
    for number, point in enumerate(points):
        if point is None:
            continue
        if number == curve.active:
            items.append(
                Circle(
                    x=point[0],
                    y=point[1],
                    radius=1.35 * medium.dot_radius,
                    stroke=OPEN_DOT,
                    fill=Colour.PAPER,
                )
            )
        else:
            items.append(Circle(x=point[0], y=point[1], radius=radius, fill=stroke.colour))
    return items


OPEN_DOT = Stroke(CURVE_AFTER.dash, CURVE_AFTER.width, Colour.ACCENT)


def _runs(points: list[Point | None], *, without: int | None) -> list[list[Point]]:
    """Part the points where one is missing: lines run only between measured neighbours."""
    runs: list[list[Point]] = [[]]
    for number, point in enumerate(points):
        if point is None or number == without:
            runs.append([])
        else:
            runs[-1].append(point)
    return runs


def _names(
    drawn: list[tuple[PlaneCurve, list[Point | None]]],
    zero: float,
    place: Box,
    taken: list[Box],
    medium: Medium,
) -> list[Text]:
    """Write each curve's name where it is farthest from the others and nothing is crossed."""
    texts: list[Text] = []
    for curve, points in reversed(drawn):
        if not curve.name:
            continue
        rivals = [other for rival, other in drawn if rival is not curve]
        blocked = [*taken, *(text.box(medium).grown(medium.space) for text in texts)]
        found = next(
            (
                text
                for text in _name_places(curve, points, rivals, zero, medium)
                if _is_free(text.box(medium), place, blocked)
            ),
            None,
        )
        if found is not None:
            texts.append(found)
    return texts


def _is_free(box: Box, place: Box, blocked: list[Box]) -> bool:
    inside = place.top <= box.top and box.bottom <= place.bottom
    return inside and not any(box.overlaps(other) for other in blocked)


def _name_places(
    curve: PlaneCurve,
    points: list[Point | None],
    rivals: list[list[Point | None]],
    zero: float,
    medium: Medium,
) -> list[Text]:
    size = medium.size(Size.NOTE)
    clear = [
        (_clearance(number, point, rivals, zero), point)
        for number, point in enumerate(points)
        if point is not None
    ]
    clear.sort(key=lambda found: -abs(found[0]))
    places = []
    for distance, point in clear:
        above, below = point[1] - 0.5 * size, point[1] + 1.1 * size
        for y in (above, below) if distance <= 0.0 else (below, above):
            places.append(
                note(
                    x=point[0],
                    y=y,
                    text=curve.name,
                    medium=medium,
                    anchor=Anchor.MIDDLE,
                    colour=Colour.INK if curve.which is Curve.AFTER else Colour.INK2,
                )
            )
    return places


def _clearance(number: int, point: Point, rivals: list[list[Point | None]], zero: float) -> float:
    heights = [zero]
    for rival in rivals:
        other = rival[number] if number < len(rival) else None
        if other is not None:
            heights.append(other[1])
    return min((point[1] - height for height in heights), key=abs)


def _line_boxes(points: list[Point | None], medium: Medium) -> list[Box]:
    """Cover a curve with boxes short enough to follow its slope."""
    boxes = []
    for first, second in pairwise(points):
        if first is None or second is None:
            continue
        for part in range(4):
            ends = [
                (
                    first[0] + share * (second[0] - first[0]),
                    first[1] + share * (second[1] - first[1]),
                )
                for share in (part / 4.0, (part + 1) / 4.0)
            ]
            heights = sorted(end[1] for end in ends)
            boxes.append(Box(ends[0][0], heights[0], ends[1][0], heights[1]))
    return [box.grown(medium.width(CURVE_AFTER.width)) for box in boxes]


def _caption(
    name: str,
    index: int,
    magnification: int,
    left: float,
    right: float,
    strip: Box,
    medium: Medium,
) -> list[Text]:
    size = medium.size(Size.NOTE)
    base = (strip.top + strip.bottom) / 2.0 + 0.35 * size
    first = note(x=left, y=base, text=name, medium=medium, colour=Colour.INK)
    if index:
        return [first]
    written = magnification_text(magnification=magnification)
    after = first.box(medium).right + 2.0 * medium.space
    beside = note(x=after, y=base, text=written, medium=medium)
    if beside.box(medium).right <= right:
        return [first, beside]
    return [first, note(x=left, y=base + 1.15 * size, text=written, medium=medium)]


def _marks(
    drawn: list[tuple[PlaneCurve, list[Point | None]]],
    stations: Sequence[StationMark],
    name: str,
    medium: Medium,
) -> list[Mark]:
    marks = []
    reach = 2.5 * medium.space
    names = {station.position: station for station in stations}
    for curve, points in drawn:
        if curve.which is not Curve.AFTER:
            continue
        for position, point in zip(curve.positions, points, strict=True):
            station = names.get(position)
            if point is not None and station is not None:
                marks.append(
                    Mark(
                        name=f"centreline {station.key} {name}",
                        tells=station.tells or f"Centreline at {station.key} in {name}.",
                        box=Box(point[0], point[1], point[0], point[1]).grown(reach),
                    )
                )
    return marks


def _scale_bar(
    axis: Axis,
    length: float,
    place: Box,
    medium: Medium,
    magnification: int,
    length_unit: LengthUnit,
) -> list[Item]:
    """Say with one upright bar, in both units, what a distance in the planes stands for."""
    tick = medium.space
    metre = axis.scale * magnification
    places = (
        (axis.x(length) + 4.0 * tick, place.right, 0.8),
        (place.left + 0.75 * tick, axis.x(0.0) - 0.5 * tick, 0.22),
    )
    for x, end, share in places:
        amount, words = _bar_length(share * place.height / metre, length_unit)
        half = metre * amount / 2.0
        middle = (place.top + place.bottom) / 2.0
        size = medium.size(Size.NOTE)
        texts = [
            note(x=x + 1.75 * tick, y=middle + row * size, text=text, medium=medium)
            for row, text in zip((-0.2, 0.9), words, strict=True)
        ]
        if max(text.box(medium).right for text in texts) <= end:
            ends = (middle - half, middle + half)
            return [
                Line(x1=x, y1=ends[0], x2=x, y2=ends[1], stroke=SEEN_EDGE),
                *(Line(x1=x - tick, y1=y, x2=x + tick, y2=y, stroke=SEEN_EDGE) for y in ends),
                *texts,
            ]
    return []


def _bar_length(greatest: float, length_unit: LengthUnit) -> tuple[float, tuple[str, str]]:
    inches = length_unit is LengthUnit.INCH
    # A hundredth of the finest step, so that a strong magnification still finds a round length.
    unit = Length.read("0.00001", "in").si if inches else Length.read("0.01", "µm").si
    amount = step_not_above(value=greatest / unit) * unit
    in_micrometres = f"{Length.in_unit(amount, 'µm'):.3g} µm"
    in_inches = Length.in_unit(amount, "in")
    if inches:
        return amount, (f"{in_inches:.6f}".rstrip("0") + " in", in_micrometres)
    return amount, (in_micrometres, f"{in_inches:.2g} in")
