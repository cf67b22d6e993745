"""Where everything on the bench lies, worked out from the size of the page alone."""

from __future__ import annotations

from dataclasses import dataclass, replace

from PySide6.QtCore import QRect

from app.frame.look import Look
from reports.sheet.along import AlongLayout
from reports.sheet.medium import Medium
from reports.sheet.rotor_place import View

__all__ = [
    "LEAST_HEIGHT",
    "LEAST_WIDTH",
    "SMALLEST",
    "Frame",
    "Places",
    "Wanted",
    "frame_of",
    "places_of",
]

LEAST_WIDTH = 1280
"""Width of the smallest page that was drawn [px]."""
LEAST_HEIGHT = 764
"""Height of the smallest page that was drawn, without the line of the desks [px]."""

SMALLEST = (1024, 560)
"""Size below which the page does not go [px]."""

_WIDE = (1920.0, 1036.0)
_PLANES_FOLD_ABOVE = 1.1
_PLANES_FOLD_BELOW = 700.0
_DIAL_FOLDS_ABOVE = 1.3
_SHARE_OF_ROTOR = 0.35
_LEAST_ROTOR = 84.0
_LEAST_BAND = (300.0, 380.0)


@dataclass(frozen=True, slots=True, kw_only=True)
class Wanted:
    """What has to find a place.

    Attributes
    ----------
    curves, changes, dial : bool
        Whether there are centrelines, changes, and a dial.
    ranges_height : float
        Height that a figure of values against limits asks for, 0 for none [px].
    wide_entry : bool
        Whether the entry also takes the dial's place.
    question_height : float
        Height of what stands beside the ladder, 0 for nothing [px].
    entry_height : float
        Height below which the entry would have to squeeze or scroll, 0 where it fits itself [px].
    key_height : float
        Height of the key that takes a form, 0 for none [px].
    keypad : bool
        Whether the keypad is shown.
    planes_opened, dial_opened : bool
        Whether they are shown although large type folds them.
    """

    curves: bool = False
    changes: bool = False
    dial: bool = False
    ranges_height: float = 0.0
    wide_entry: bool = False
    question_height: float = 0.0
    entry_height: float = 0.0
    key_height: float = 0.0
    keypad: bool = False
    planes_opened: bool = False
    dial_opened: bool = False


@dataclass(frozen=True, slots=True, kw_only=True)
class Frame:
    """The page in units of the two that were drawn.

    Attributes
    ----------
    width, height : float
        The page [px of the drawing].
    growth : float
        Pixels to a pixel of the drawing; above 1 only beyond the larger one [-].
    share : float
        0 at the smaller drawing, 1 at the larger [-].
    look : Look
        What widgets look like in this page.
    text_scale : float
        What the person chose [-].
    """

    width: float
    height: float
    growth: float
    share: float
    look: Look
    text_scale: float

    def between(self, narrow: float, wide: float) -> float:
        """Interpolate a length between the two drawings [px of the drawing]."""
        return narrow + (wide - narrow) * self.share

    def across(self, narrow: float, wide: float) -> float:
        """Interpolate a place across the page, stretched to its width [px of the drawing]."""
        return self.between(narrow, wide) * self.width / self.between(LEAST_WIDTH, _WIDE[0])

    def rect(self, left: float, top: float, right: float, bottom: float) -> QRect:
        """Give a place in whole pixels of the page."""
        edges = [round(edge * self.growth) for edge in (left, top, right, bottom)]
        return QRect(edges[0], edges[1], edges[2] - edges[0], edges[3] - edges[1])

    @property
    def medium(self) -> Medium:
        """The screen, with its type as large as the person chose."""
        medium = self.look.medium
        sizes = {use: size * self.text_scale for use, size in medium.sizes.items()}
        return replace(medium, sizes=sizes)


def frame_of(*, width: int, height: int, look: Look) -> Frame:
    """Fit the two drawings to a page.

    Parameters
    ----------
    width, height : int
        Size of the page [px].
    look : Look
        What the person chose.

    Returns
    -------
    Frame
        The page, and the look its widgets take.

    Examples
    --------
    >>> frame_of(width=1280, height=764, look=Look()).share
    0.0
    >>> frame_of(width=3840, height=2072, look=Look()).growth
    2.0
    """
    # A page that is not laid out yet may be of any size; nothing is drawn below this one.
    width, height = max(width, SMALLEST[0]), max(height, SMALLEST[1])
    growth = max(1.0, min(width / _WIDE[0], height / _WIDE[1]))
    wide, high = width / growth, height / growth
    share = min(
        (wide - LEAST_WIDTH) / (_WIDE[0] - LEAST_WIDTH),
        (high - LEAST_HEIGHT) / (_WIDE[1] - LEAST_HEIGHT),
    )
    share = min(max(share, 0.0), 1.0)
    return Frame(
        width=wide,
        height=high,
        growth=growth,
        share=share,
        look=replace(
            look,
            window_width=LEAST_WIDTH + share * (_WIDE[0] - LEAST_WIDTH),
            text_scale=look.text_scale * growth,
        ),
        text_scale=look.text_scale,
    )


@dataclass(frozen=True, slots=True, kw_only=True)
class Places:
    """Where everything lies; what has no place is empty.

    Attributes
    ----------
    layout : AlongLayout
        The rows of the drawing along the rotor.
    along, ranges, entry, dial, verdict, beside, take, keypad, badge, title, keys, folded : QRect
        Each area on the page; `beside` lies right of the ladder, `take` below the verdict, and
        `folded` holds the keys that open what large type has folded.
    band : QRect
        The whole middle.
    dividers : tuple of QRect
        The columns' edges: upright lines without width.
    has_planes, has_dial, folds_planes, folds_dial : bool
        What is shown, and what only opens by key.
    """

    layout: AlongLayout
    along: QRect
    ranges: QRect
    band: QRect
    entry: QRect
    dial: QRect
    verdict: QRect
    beside: QRect
    take: QRect
    keypad: QRect
    badge: QRect
    title: QRect
    keys: QRect
    folded: QRect
    dividers: tuple[QRect, ...]
    has_planes: bool
    has_dial: bool
    folds_planes: bool
    folds_dial: bool


def places_of(frame: Frame, wanted: Wanted) -> Places:
    """Give everything its place.

    Parameters
    ----------
    frame : Frame
        The page.
    wanted : Wanted
        What has to find a place.

    Returns
    -------
    Places
        Nothing overlaps but the keypad, which covers dial and verdict.
    """
    far = frame.look.far
    large = frame.text_scale > _PLANES_FOLD_ABOVE or frame.height < _PLANES_FOLD_BELOW
    folds_planes = wanted.curves and not far and large
    folds_dial = wanted.dial and not far and frame.text_scale > _DIAL_FOLDS_ABOVE
    # A figure of values against limits takes the middle row from planes and changes.
    middle_row = not wanted.ranges_height
    planes = wanted.curves and not far and middle_row
    planes = planes and (wanted.planes_opened or not folds_planes)
    changes = wanted.changes and middle_row
    dial = wanted.dial and not far and (wanted.dial_opened or not folds_dial)
    margin, foot = frame.between(24, 32), frame.between(80, 96)
    foot_top = frame.height - foot
    layout = _layout(frame, planes=planes, changes=changes, room=foot_top)
    if layout.height + wanted.ranges_height + wanted.entry_height > foot_top:
        planes = changes = False
        layout = _layout(frame, planes=planes, changes=changes, room=foot_top)
    top = layout.height + wanted.ranges_height
    split = frame.across(768, 1160)
    columns = _columns(frame, wanted, dial=dial)
    below = max(wanted.question_height, wanted.key_height)
    lower = foot_top - (below + 12 if below else 0)
    first, second = columns.dividers[0], columns.dividers[-1]
    empty = QRect()
    return Places(
        layout=layout,
        along=frame.rect(0, 0, frame.width, layout.height),
        ranges=frame.rect(margin, layout.height, frame.width - margin, top - 4)
        if wanted.ranges_height
        else empty,
        band=frame.rect(0, top, frame.width, foot_top),
        entry=frame.rect(margin, top + 2, columns.entry_right, foot_top),
        dial=frame.rect(first + 2, top + 2, second - 1, lower) if dial else empty,
        verdict=frame.rect(second + 1, top + 2, frame.width - margin + 10, lower),
        beside=frame.rect(first + 16, lower + 4, frame.width - margin, foot_top - 8)
        if wanted.question_height
        else empty,
        take=frame.rect(second + 16, lower + 4, frame.width - margin, foot_top - 8)
        if wanted.key_height
        else empty,
        keypad=frame.rect(first + 1, top + 1, frame.width, lower) if wanted.keypad else empty,
        badge=_badge(frame, layout, margin),
        title=frame.rect(0, foot_top, split, frame.height),
        keys=frame.rect(split, foot_top, frame.width, frame.height),
        folded=frame.rect(
            frame.width - margin - layout.gutter_right + 8, 8, frame.width - margin, 104
        ),
        dividers=tuple(
            frame.rect(edge, top, edge, foot_top if wanted.wide_entry or edge == first else lower)
            for edge in columns.dividers
        ),
        has_planes=planes,
        has_dial=dial,
        folds_planes=folds_planes and middle_row,
        folds_dial=folds_dial,
    )


def _badge(frame: Frame, layout: AlongLayout, margin: float) -> QRect:
    right = margin + layout.gutter_left - 24
    bottom = layout.height - 6
    size = frame.between(56, 76)
    return frame.rect(right - size, bottom - size, right, bottom)


@dataclass(frozen=True, slots=True, kw_only=True)
class _Columns:
    """Where the middle is parted."""

    entry_right: float
    dividers: tuple[float, ...]


def _columns(frame: Frame, wanted: Wanted, *, dial: bool) -> _Columns:
    entry = frame.across(632, 904)
    dividers = (frame.across(650, 928), frame.across(966, 1430))
    large = frame.look.far or frame.text_scale > _DIAL_FOLDS_ABOVE
    if wanted.keypad or (dial and not wanted.wide_entry):
        return _Columns(entry_right=entry, dividers=dividers)
    if large:
        parted = frame.across(800, 1180)
        return _Columns(entry_right=parted - 18, dividers=(parted,))
    if wanted.wide_entry:
        return _Columns(entry_right=dividers[1] - 18, dividers=dividers[1:])
    return _Columns(entry_right=entry, dividers=dividers[:1])


def _layout(frame: Frame, *, planes: bool, changes: bool, room: float) -> AlongLayout:
    far, scale = frame.look.far, frame.text_scale
    between = frame.between
    rotor_height = between(92, 170) if far else between(152, 236)
    names_height = between(22, 28) * scale
    planes_height = between(86, 132) if planes else 0.0
    circle = between(42, 60)
    changes_height = circle + between(27, 31) * scale if changes else between(4, 6)
    gaps = (between(3, 4), between(2, 6) if planes else 0.0, between(5, 8))
    top = 4.0 if far else between(6, 8)
    bottom = frame.medium.space
    height = top + rotor_height + names_height + planes_height + changes_height
    height += sum(gaps) + bottom
    if planes and changes:
        free = max(room - height - between(337, 427), 0.0)
        rotor_height += _SHARE_OF_ROTOR * free
        height += _SHARE_OF_ROTOR * free
    squeezed = max(height - (room - between(*_LEAST_BAND)), 0.0)
    squeezed = min(squeezed, rotor_height - _LEAST_ROTOR)
    rotor_height -= squeezed
    height -= squeezed
    rotor = (top, top + rotor_height)
    names = (rotor[1] + gaps[0], rotor[1] + gaps[0] + names_height)
    middle = (names[1] + gaps[1], names[1] + gaps[1] + planes_height)
    return AlongLayout(
        medium=frame.medium,
        view=View.HALF,
        width=frame.width,
        height=height,
        margin=between(24, 32),
        gutter_left=between(200, 270) * (0.5 + 0.5 * max(scale, 1.0)),
        gutter_right=between(104, 130),
        rotor=rotor,
        names=names,
        planes=middle,
        change_top=middle[1] + gaps[2],
        change_height=changes_height,
    )
