"""Everything that shares the rotor's axis on one sheet: rotor, names, planes and change row."""

from __future__ import annotations

from collections.abc import Sequence
from dataclasses import dataclass

from reports.sheet.change import change_row
from reports.sheet.elements import Box, Layer, Sheet, sheet_of
from reports.sheet.medium import BENCH_1280, BENCH_1920, DESK, PAPER_MEDIUM, Medium
from reports.sheet.pictures import ChangeMark, PlaneCurve, RotorPicture, Turning
from reports.sheet.planes import planes, planes_magnification
from reports.sheet.rotor import rotor, station_names
from reports.sheet.rotor_place import View, axis_height, has_head
from reports.sheet.scale import Axis, axis_at_scale, axis_fitting, paper_scale_for

__all__ = [
    "BENCH_1280_LAYOUT",
    "BENCH_1920_LAYOUT",
    "DESK_LAYOUT",
    "PAPER_LAYOUT",
    "AlongLayout",
    "along_the_rotor",
    "axis_for",
    "magnification_along",
]


@dataclass(frozen=True, slots=True, kw_only=True)
class AlongLayout:
    """Where the rows lie on a sheet; a row without height is left out.

    Attributes
    ----------
    medium : Medium
        Screen or paper.
    view : View
        Half view, or section and outside.
    width, height : float
        Size of the sheet in sheet units [-].
    margin : float
        Free edge at the left and right in sheet units [-].
    gutter_left, gutter_right : float
        Room beside the rotor for words in sheet units [-].
    rotor, names, planes : tuple of float
        Upper and lower edge of each row in sheet units [-].
    change_height : float
        Height of one change row in sheet units [-].
    change_top : float
        Upper edge of the first change row in sheet units [-].
    """

    medium: Medium
    view: View
    width: float
    height: float
    margin: float
    gutter_left: float
    gutter_right: float
    rotor: tuple[float, float]
    names: tuple[float, float]
    planes: tuple[float, float]
    change_top: float
    change_height: float

    def row(self, edges: tuple[float, float]) -> Box:
        """Give a row as a box over the width between the margins."""
        return Box(self.margin, edges[0], self.width - self.margin, edges[1])


BENCH_1280_LAYOUT = AlongLayout(
    medium=BENCH_1280,
    view=View.HALF,
    width=1280.0,
    height=347.0,
    margin=24.0,
    gutter_left=200.0,
    gutter_right=104.0,
    rotor=(6.0, 158.0),
    names=(161.0, 183.0),
    planes=(185.0, 271.0),
    change_top=276.0,
    change_height=69.0,
)

BENCH_1920_LAYOUT = AlongLayout(
    medium=BENCH_1920,
    view=View.HALF,
    width=1920.0,
    height=513.0,
    margin=32.0,
    gutter_left=270.0,
    gutter_right=130.0,
    rotor=(8.0, 244.0),
    names=(248.0, 276.0),
    planes=(282.0, 414.0),
    change_top=422.0,
    change_height=91.0,
)

DESK_LAYOUT = AlongLayout(
    medium=DESK,
    view=View.SECTION,
    width=1232.0,
    height=470.0,
    margin=16.0,
    gutter_left=130.0,
    gutter_right=90.0,
    rotor=(4.0, 270.0),
    names=(276.0, 294.0),
    planes=(298.0, 390.0),
    change_top=400.0,
    change_height=64.0,
)

PAPER_LAYOUT = AlongLayout(
    medium=PAPER_MEDIUM,
    view=View.SECTION,
    width=172.0,
    height=104.0,
    margin=0.0,
    gutter_left=12.5,
    gutter_right=1.5,
    rotor=(0.0, 50.0),
    names=(51.0, 54.5),
    planes=(55.5, 87.5),
    change_top=90.0,
    change_height=13.0,
)


def axis_for(*, picture: RotorPicture, layout: AlongLayout) -> Axis:
    """Choose the one scale of a sheet: free on a screen, a standard one on paper.

    Parameters
    ----------
    picture : RotorPicture
        The rotor that has to fit.
    layout : AlongLayout
        Where the rows lie.

    Returns
    -------
    Axis
        The same scale along the rotor and for its diameters.
    """
    left = layout.margin + layout.gutter_left
    right = layout.width - layout.margin - layout.gutter_right
    _, room = axis_height(
        place=layout.row(layout.rotor),
        view=layout.view,
        medium=layout.medium,
        headroom=has_head(picture=picture),
    )
    if layout.medium.millimetres_per_unit != 1.0:
        return axis_fitting(
            length=picture.length,
            greatest_radius=picture.greatest_radius,
            left=left,
            right=right,
            height=room,
        )
    reduction = paper_scale_for(
        length=picture.length,
        greatest_radius=picture.greatest_radius,
        width=right - left,
        height=room,
    )
    return axis_at_scale(length=picture.length, reduction=reduction, left=left, right=right)


def magnification_along(
    *,
    picture: RotorPicture,
    curves: Sequence[PlaneCurve],
    limit_tir: float,
    layout: AlongLayout,
    held: int | None = None,
) -> int:
    """Choose the magnification of the centreline on a sheet.

    Parameters
    ----------
    picture : RotorPicture
        The rotor that sets the scale.
    curves : sequence of PlaneCurve
        Every curve that will be drawn.
    limit_tir : float
        Limit of the change as total indicator reading, 0 where none is set [m].
    layout : AlongLayout
        Where the rows lie.
    held : int or None, optional
        The magnification in use while a survey is read; it steps down only [-].

    Returns
    -------
    int
        The magnification [-].
    """
    return planes_magnification(
        curves=curves,
        limit_tir=limit_tir,
        place=layout.row(layout.planes),
        axis=axis_for(picture=picture, layout=layout),
        held=held,
    )


def along_the_rotor(
    *,
    picture: RotorPicture,
    curves: Sequence[PlaneCurve] = (),
    changes: Sequence[Sequence[ChangeMark]] = (),
    captions: Sequence[Sequence[str]] = (),
    layout: AlongLayout = BENCH_1280_LAYOUT,
    counted: Turning = Turning.COUNTERCLOCKWISE,
    held: int | None = None,
    description: str = "",
) -> Sheet:
    """Draw a rotor with its stations, its centreline and its change rows on one axis.

    Parameters
    ----------
    picture : RotorPicture
        Shaft, parts and stations.
    curves : sequence of PlaneCurve, optional
        Centrelines; none leaves the planes out.
    changes : sequence of sequence of ChangeMark, optional
        One row for each attempt; none leaves the row out.
    captions : sequence of sequence of str, optional
        Words at the left of each change row.
    layout : AlongLayout, optional
        Where the rows lie, and for which screen or paper.
    counted : Turning, optional
        Which way the marks are counted, seen from the drive end.
    held : int or None, optional
        The magnification in use while a survey is read; it steps down only [-].
    description : str, optional
        One sentence; empty names the rotor and what is on it.

    Returns
    -------
    Sheet
        As high as its rows need, at least the layout's own height.
    """
    medium = layout.medium
    axis = axis_for(picture=picture, layout=layout)
    layers: list[Layer] = []
    if curves:
        limits = [mark.limit_tir or 0.0 for row in changes for mark in row]
        place = layout.row(layout.planes)
        chosen = planes_magnification(
            curves=curves, limit_tir=max(limits, default=0.0), place=place, axis=axis, held=held
        )
        layers.append(
            planes(
                curves=curves,
                stations=picture.stations,
                axis=axis,
                length=picture.length,
                place=place,
                medium=medium,
                magnification=chosen,
                length_unit=picture.length_unit,
            )
        )
    layers.append(
        rotor(
            picture=picture,
            axis=axis,
            place=layout.row(layout.rotor),
            medium=medium,
            view=layout.view,
        )
    )
    layers.append(
        station_names(
            stations=picture.stations, axis=axis, place=layout.row(layout.names), medium=medium
        )
    )
    top = layout.change_top
    for index, row in enumerate(changes):
        bottom = top + layout.change_height
        caption = captions[index] if index < len(captions) else ("change",)
        layers.append(
            change_row(
                changes=row,
                axis=axis,
                place=layout.row((top, bottom)),
                medium=medium,
                caption=caption,
                counted=counted,
            )
        )
        top = bottom + medium.space
    return sheet_of(
        width=layout.width,
        height=max(layout.height, top),
        medium=medium,
        layers=layers,
        title=picture.name,
        description=description or _description(picture),
    )


def _description(picture: RotorPicture) -> str:
    on = sum(part.state.value == "on" for part in picture.parts)
    words = f"{picture.name}: {on} of {len(picture.parts)} parts on"
    current = picture.current_part
    return f"{words}, {current.name} in hand." if current else f"{words}."
