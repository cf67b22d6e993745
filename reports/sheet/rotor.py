"""The rotor from the side: shaft, parts, stations, and the words that belong to them."""

from __future__ import annotations

import itertools

from reports.palette import Colour
from reports.sheet.elements import (
    Anchor,
    Box,
    Hatch,
    Item,
    Layer,
    Line,
    Mark,
    Point,
    Polygon,
    Polyline,
)
from reports.sheet.labels import Label, note, thinned
from reports.sheet.lines import (
    ACTIVE_GUIDE,
    AXIS,
    HATCHING,
    HATCHING_CURRENT,
    HIDDEN,
    OUTLINE,
    OUTLINE_CURRENT,
    SEEN_EDGE,
    TO_COME,
)
from reports.sheet.medium import Medium, Size
from reports.sheet.pictures import (
    LIFT_MAGNIFICATION,
    PartOutline,
    PartState,
    RotorPicture,
    ShaftStep,
    StationMark,
    StationState,
)
from reports.sheet.profiles import PartShape, shape_of
from reports.sheet.rotor_place import Shown, View, axis_height, has_head, upright
from reports.sheet.rotor_words import rotor_words
from reports.sheet.scale import Axis
from reports.typeface import Weight

__all__ = ["rotor", "station_names"]


def rotor(
    *, picture: RotorPicture, axis: Axis, place: Box, medium: Medium, view: View = View.HALF
) -> Layer:
    """Draw a rotor to scale, drive end left.

    Parameters
    ----------
    picture : RotorPicture
        What it consists of.
    axis : Axis
        One scale for lengths and diameters.
    place : Box
        Room for it in sheet units [-].
    medium : Medium
        Screen or paper.
    view : View, optional
        Half view above the axis, or upper half in section and lower half from outside.

    Returns
    -------
    Layer
        Lines, areas, words, and a mark for every part.
    """
    base, _ = axis_height(place=place, view=view, medium=medium, headroom=has_head(picture=picture))
    shown = Shown(axis=axis, base=base, medium=medium, view=view, place=place)
    layer = Layer(items=_shaft(picture.steps, shown))
    ordered = sorted(picture.parts, key=lambda part: (part.start, part.end))
    rising = {part.key: index % 2 == 0 for index, part in enumerate(ordered)}
    for state in (PartState.TO_COME, PartState.ON, PartState.CURRENT):
        for part in ordered:
            if part.state is state:
                layer += _part(part, rising=rising[part.key], shown=shown)
    layer += Layer(items=_axis_line(picture, shown))
    layer += Layer(items=_station_ticks(picture, shown))
    return layer + Layer(items=rotor_words(picture=picture, shown=shown))


def station_names(
    *, stations: tuple[StationMark, ...], axis: Axis, place: Box, medium: Medium
) -> Layer:
    """Write the stations' names in one row; the one being read in the accent.

    Parameters
    ----------
    stations : tuple of StationMark
        From the drive end on.
    axis : Axis
        The rotor's own axis.
    place : Box
        Room for the row in sheet units [-].
    medium : Medium
        Screen or paper.

    Returns
    -------
    Layer
        Names that do not overlap, and a mark for every station.
    """
    base = place.bottom - 0.22 * medium.size(Size.NOTE)
    labels = [
        Label(
            text=note(
                x=axis.x(station.position),
                y=base,
                text=station.key,
                medium=medium,
                anchor=Anchor.MIDDLE,
                colour=_STATION_COLOURS[station.state],
                weight=Weight.SEMI_BOLD if station.state is StationState.ACTIVE else Weight.REGULAR,
            ),
            importance=2 * (station.state is StationState.ACTIVE) + station.is_journal,
        )
        for station in stations
    ]
    half = 2.5 * medium.space
    marks = tuple(
        Mark(
            name=f"station {station.key}",
            tells=station.tells or _station_sentence(station),
            box=Box(
                axis.x(station.position) - half,
                place.top - half,
                axis.x(station.position) + half,
                place.bottom,
            ),
        )
        for station in stations
    )
    kept = thinned(labels=labels, medium=medium)
    return Layer(items=tuple(label.text for label in kept), marks=marks)


_STATION_COLOURS = {
    StationState.TO_COME: Colour.INK2,
    StationState.ACTIVE: Colour.ACCENT,
    StationState.READ: Colour.INK,
}


def _station_sentence(station: StationMark) -> str:
    kind = "journal" if station.is_journal else "station"
    return f"{station.key}, {kind}, {station.state.value}."


def _shaft(steps: tuple[ShaftStep, ...], shown: Shown) -> tuple[Item, ...]:
    ordered = sorted(steps, key=lambda step: step.start)
    profile: list[Point] = []
    for step in ordered:
        profile += [(step.start, step.diameter / 2.0), (step.end, step.diameter / 2.0)]
    outline = ((ordered[0].start, 0.0), *profile, (ordered[-1].end, 0.0))
    seen = tuple(
        (after.start, min(before.diameter, after.diameter) / 2.0)
        for before, after in itertools.pairwise(ordered)
        if before.diameter != after.diameter
    )
    items: list[Item] = []
    for mapped in shown.halves():
        items.append(Polygon(points=mapped(outline), fill=Colour.SHEET))
        for position, radius in seen:
            items.append(
                Polyline(points=mapped(((position, 0.0), (position, radius))), stroke=SEEN_EDGE)
            )
        for step in ordered:
            if step.bore > 0.0:
                bore = ((step.start, step.bore / 2.0), (step.end, step.bore / 2.0))
                items.append(Polyline(points=mapped(bore), stroke=HIDDEN))
        items.append(Polyline(points=mapped(outline), stroke=OUTLINE))
    return tuple(items)


def _part(part: PartOutline, *, rising: bool, shown: Shown) -> Layer:
    shape = shape_of(part=part)
    lift = LIFT_MAGNIFICATION * part.lifted_gap if part.state is PartState.CURRENT else 0.0
    items: list[Item] = []
    if lift:
        items += [_free_outline(area, shown) for area in shape.cut]
    if part.state is PartState.TO_COME:
        items += _outlines(shape, shown)
    else:
        items += _solid(
            shape, current=part.state is PartState.CURRENT, rising=rising, lift=lift, shown=shown
        )
    reach = shown.axis.scale * (part.outer_diameter / 2.0 + lift)
    bore = shown.axis.scale * (part.bore_diameter / 2.0)
    box = Box(
        shown.axis.x(part.start),
        shown.base - reach,
        shown.axis.x(part.end),
        shown.base - bore if shown.view is View.HALF else shown.base + reach,
    )
    return Layer(
        items=tuple(items),
        marks=(Mark(name=f"part {part.key}", tells=part.tells or _part_sentence(part), box=box),),
    )


def _part_sentence(part: PartOutline) -> str:
    if part.state is PartState.TO_COME:
        return f"{part.name} is still to come."
    if part.lifted_gap > 0.0:
        return f"{part.name} hangs hot over its seat, attempt {part.attempt}."
    return f"{part.name} is on, attempt {part.attempt}."


def _outlines(shape: PartShape, shown: Shown) -> list[Item]:
    items = [_free_outline(area, shown) for area in shape.cut]
    if shown.view is View.SECTION:
        items.append(Polyline(points=shown.lower(shape.silhouette), stroke=TO_COME))
    return items


def _free_outline(area: tuple[Point, ...], shown: Shown) -> Item:
    """Leave out the line along the bore, where the shaft's own outline already is."""
    points = shown.upper(area)
    if area[0][1] == area[-1][1] == min(radius for _, radius in area):
        return Polyline(points=points, stroke=TO_COME)
    return Polygon(points=points, stroke=TO_COME)


def _solid(
    shape: PartShape, *, current: bool, rising: bool, lift: float, shown: Shown
) -> list[Item]:
    outline = OUTLINE_CURRENT if current else OUTLINE
    edge = ACTIVE_GUIDE if current else SEEN_EDGE
    hatch = Hatch(
        rising=rising,
        pitch=shown.medium.hatch_pitch,
        stroke=HATCHING_CURRENT if current else HATCHING,
    )
    items: list[Item] = [
        Polyline(points=shown.upper(line, lift), stroke=edge) for line in shape.seen
    ]
    items += [
        Polygon(points=shown.upper(area, lift), stroke=outline, fill=Colour.PAPER, hatch=hatch)
        for area in shape.cut
    ]
    if shown.view is View.SECTION:
        below = shown.lower(shape.silhouette, lift)
        items.append(Polygon(points=below, fill=Colour.PAPER))
        items += [Polyline(points=shown.lower(line, lift), stroke=edge) for line in shape.edges]
        items.append(Polyline(points=below, stroke=outline))
    return items


def _axis_line(picture: RotorPicture, shown: Shown) -> tuple[Item, ...]:
    over = 3.0 * shown.medium.space
    left = shown.axis.x(0.0) - over
    right = shown.axis.x(picture.length) + over
    items: list[Item] = [Line(x1=left, y1=shown.base, x2=right, y2=shown.base, stroke=AXIS)]
    if shown.view is View.HALF:
        # Two short bars at each end say that only half of it is drawn.
        reach, apart = 1.5 * shown.medium.space, shown.medium.space
        for x in (left, left + apart, right - apart, right):
            items.append(upright(x, shown.base - reach, shown.base + reach, SEEN_EDGE))
    return tuple(items)


def _station_ticks(picture: RotorPicture, shown: Shown) -> tuple[Item, ...]:
    items: list[Item] = []
    reach = shown.medium.space
    foot = shown.base if shown.view is View.HALF else shown.place.bottom
    for station in picture.stations:
        x = shown.axis.x(station.position)
        active = station.state is StationState.ACTIVE
        stroke = ACTIVE_GUIDE if active else SEEN_EDGE
        items.append(upright(x, foot - reach, foot + reach, stroke))
        if active:
            surface = shown.base - shown.axis.scale * _radius_at(picture, station.position)
            half = 1.75 * shown.medium.space
            points = (
                (x - half, surface - 1.8 * half),
                (x + half, surface - 1.8 * half),
                (x, surface),
            )
            items.append(Polygon(points=points, fill=Colour.ACCENT))
    return tuple(items)


def _radius_at(picture: RotorPicture, position: float) -> float:
    covering = [
        part
        for part in picture.parts
        if part.state is not PartState.TO_COME and part.start < position < part.end
    ]
    here = [part.outer_diameter for part in covering]
    here += [step.diameter for step in picture.steps if step.start <= position <= step.end]
    return max(here, default=0.0) / 2.0
