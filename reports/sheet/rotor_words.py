"""The words round a rotor: ends, scale, numbers above the parts, and leaders."""

from __future__ import annotations

from reports.palette import Colour
from reports.sheet.elements import Anchor, Box, Item, Line, Polyline, Text
from reports.sheet.labels import Label, note, thinned
from reports.sheet.lines import ACTIVE_GUIDE, SEEN_EDGE
from reports.sheet.medium import Size
from reports.sheet.pictures import (
    LIFT_MAGNIFICATION,
    Facing,
    PartOutline,
    PartState,
    RotorPicture,
)
from reports.sheet.rotor_place import Shown, upright
from reports.sheet.scale import scale_bar_for
from reports.typeface import Weight

__all__ = ["rotor_words"]


def rotor_words(*, picture: RotorPicture, shown: Shown) -> tuple[Item, ...]:
    """Write what belongs to a rotor, nothing over anything else.

    Parameters
    ----------
    picture : RotorPicture
        The rotor.
    shown : Shown
        Where it lies.

    Returns
    -------
    tuple
        Scale, ends, leaders, and as many numbers as there is room for.
    """
    items: list[Item] = [*_scale_words(picture, shown), *_end_names(picture, shown)]
    taken = [item.box(shown.medium) for item in items if isinstance(item, Text)]
    for part in sorted(picture.parts, key=_urgency):
        if part.label:
            leader = _leader(part, picture, shown, taken)
            items += leader
            taken += [item.box(shown.medium) for item in leader if isinstance(item, Text)]
    numbers = [
        Label(text=_number(part, shown), importance=int(part.state is PartState.CURRENT))
        for part in sorted(picture.parts, key=lambda part: part.start)
        if part.number and not part.label
    ]
    taken += [shown.box_of(part) for part in picture.parts]
    kept = thinned(labels=numbers, medium=shown.medium, taken=taken)
    return (*items, *(label.text for label in kept))


def _urgency(part: PartOutline) -> tuple[bool, float]:
    return (part.state is not PartState.CURRENT, part.start)


def _end_names(picture: RotorPicture, shown: Shown) -> list[Text]:
    medium, axis = shown.medium, shown.axis
    y = shown.base - 2.0 * medium.space
    away = 2.5 * medium.space
    ends = [
        note(
            x=axis.x(0.0) - away,
            y=y,
            text=picture.drive_end_name,
            medium=medium,
            anchor=Anchor.END,
        ),
        note(x=axis.x(picture.length) + away, y=y, text=picture.far_end_name, medium=medium),
    ]
    return [words for words in ends if words.text]


def _number(part: PartOutline, shown: Shown) -> Text:
    current = part.state is PartState.CURRENT
    colour = Colour.INK if part.state is PartState.ON else Colour.INK2
    return note(
        x=shown.axis.x((part.start + part.end) / 2.0),
        y=shown.top_of(part) - 1.5 * shown.medium.space,
        text=part.number,
        medium=shown.medium,
        anchor=Anchor.MIDDLE,
        colour=Colour.ACCENT if current else colour,
        weight=Weight.SEMI_BOLD if current else Weight.REGULAR,
    )


def _leader(part: PartOutline, picture: RotorPicture, shown: Shown, taken: list[Box]) -> list[Item]:
    """Lead from a part's rim to words above every part, to the right or else to the left."""
    medium = shown.medium
    size = medium.size(Size.NOTE)
    current = part.state is PartState.CURRENT
    share = 0.74 if part.facing is Facing.DRIVE_END else 0.26
    x = shown.axis.x(part.start + share * (part.end - part.start))
    highest = min(shown.top_of(other) for other in picture.parts)
    row = max(shown.place.top + 0.5 * size, highest - 0.9 * size)
    words = part.label
    if part.lifted_gap > 0.0:
        words += f", gap ×{LIFT_MAGNIFICATION}"
    for side, anchor in ((1.0, Anchor.START), (-1.0, Anchor.END)):
        text = note(
            x=x + side * 4.5 * medium.space,
            y=row + 0.35 * size,
            text=words,
            medium=medium,
            anchor=anchor,
            colour=Colour.ACCENT if current else Colour.INK,
            weight=Weight.SEMI_BOLD if current else Weight.REGULAR,
        )
        box = text.box(medium)
        inside = shown.place.left <= box.left and box.right <= shown.place.right
        if inside and not any(box.overlaps(other) for other in taken):
            elbow = (
                (x, shown.top_of(part)),
                (x + side * 2.0 * medium.space, row),
                (x + side * 3.75 * medium.space, row),
            )
            return [Polyline(points=elbow, stroke=ACTIVE_GUIDE if current else SEEN_EDGE), text]
    return []


def _scale_words(picture: RotorPicture, shown: Shown) -> list[Item]:
    medium, axis, place = shown.medium, shown.axis, shown.place
    top = place.top + medium.size(Size.NOTE)
    if axis.reduction is not None:
        words = f"scale 1:{axis.reduction}"
        return [note(x=place.right, y=top, text=words, medium=medium, anchor=Anchor.END)]
    room = max(axis.x(0.0) - place.left, 22.0 * medium.space)
    length, text = scale_bar_for(
        scale=axis.scale,
        greatest_width=min(room, 25.0 * medium.space),
        length_unit=picture.length_unit,
    )
    right = place.left + axis.scale * length
    y = top + 2.5 * medium.space
    tick = medium.space
    return [
        note(x=place.left, y=top, text=text, medium=medium),
        Line(x1=place.left, y1=y, x2=right, y2=y, stroke=SEEN_EDGE),
        upright(place.left, y - tick, y + tick, SEEN_EDGE),
        upright(right, y - tick, y + tick, SEEN_EDGE),
    ]
