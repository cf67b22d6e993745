"""Drawings on a desk: the room each row gets at a width."""

from __future__ import annotations

from app.presenters.attempt_picture import AttemptPicture
from reports.sheet.along import AlongLayout, along_the_rotor, magnification_along
from reports.sheet.elements import Sheet
from reports.sheet.medium import DESK
from reports.sheet.pictures import RotorPicture
from reports.sheet.rotor_place import View

__all__ = ["attempt_sheet", "desk_layout", "rotor_sheet"]

_NAMES = 18.0
_GAP = 4.0
_CHANGE = 60.0
_RIGHT = 70.0
_WIDE = 700.0
# Above the highest part: the scale bar, and a line of words.
_OVER_THE_ROTOR = 44.0


def desk_layout(
    *,
    width: float,
    rotor: float,
    planes: float = 0.0,
    changes: int = 0,
    view: View = View.SECTION,
    gutter: float = 100.0,
    margin: float = 0.0,
) -> AlongLayout:
    """Share a height among the rows that lie along the rotor.

    Parameters
    ----------
    width : float
        Width of the drawing [px].
    rotor, planes : float
        Height of the rotor, and of both planes together [px].
    changes : int
        Number of change rows [-].
    view : View
        Section and outside, or half.
    gutter : float
        Room at the left for words [px].
    margin : float
        Free edge at both sides [px].

    Returns
    -------
    AlongLayout
        Rows below each other, as high as they need.
    """
    names = rotor + _GAP
    first = names + _NAMES + _GAP
    top = first + planes + (2.0 * _GAP if planes else 0.0)
    return AlongLayout(
        medium=DESK,
        view=view,
        width=width,
        height=top + changes * (_CHANGE + _GAP),
        margin=margin,
        gutter_left=gutter,
        gutter_right=_RIGHT,
        rotor=(0.0, rotor),
        names=(names, names + _NAMES),
        planes=(first, first + planes),
        change_top=top,
        change_height=_CHANGE,
    )


def rotor_sheet(picture: RotorPicture, *, width: float, height: float) -> Sheet:
    """Draw a rotor alone, with its station names.

    Parameters
    ----------
    picture : RotorPicture
        The rotor.
    width, height : float
        Room for the drawing [px].

    Returns
    -------
    Sheet
        In section above the axis and from outside below it.
    """
    rotor = height - _NAMES - 2.0 * _GAP
    return along_the_rotor(
        picture=picture, layout=desk_layout(width=width, rotor=rotor, margin=24.0)
    )


def attempt_sheet(
    shown: AttemptPicture, *, width: float, planes: float, beside: AttemptPicture | None = None
) -> Sheet:
    """Draw an attempt: rotor, centreline before and after, change row.

    Parameters
    ----------
    shown : AttemptPicture
        The attempt.
    width : float
        Width of the drawing [px].
    planes : float
        Height of both planes together [px].
    beside : AttemptPicture or None
        Another attempt that lies beside it, so that both are magnified alike.

    Returns
    -------
    Sheet
        As high as its rows: the rotor takes what it needs at this width.
    """
    gutter = 100.0 if width > _WIDE else 84.0
    scale = (width - gutter - _RIGHT) / shown.rotor.length
    layout = desk_layout(
        width=width,
        rotor=scale * shown.rotor.greatest_radius + _OVER_THE_ROTOR,
        planes=planes if shown.curves else 0.0,
        changes=len(shown.changes),
        view=View.HALF,
        gutter=gutter,
    )
    return along_the_rotor(
        picture=shown.rotor,
        curves=shown.curves,
        changes=shown.changes,
        captions=tuple(shown.caption for _ in shown.changes),
        layout=layout,
        counted=shown.counted,
        held=_magnification(beside, layout) if beside is not None else None,
        description=shown.description,
    )


def _magnification(shown: AttemptPicture, layout: AlongLayout) -> int | None:
    if not shown.curves or layout.planes[0] == layout.planes[1]:
        return None
    limits = [mark.limit_tir or 0.0 for row in shown.changes for mark in row]
    return magnification_along(
        picture=shown.rotor,
        curves=shown.curves,
        limit_tir=max(limits, default=0.0),
        layout=layout,
    )
