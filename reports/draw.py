"""Draws a sheet on a page of a PDF."""

from __future__ import annotations

from typing import Any

from reportlab.platypus import Flowable

from reports.palette import PAPER, Colour, Palette, colour_components
from reports.sheet.elements import (
    Anchor,
    Arc,
    Circle,
    Item,
    Line,
    Point,
    Polygon,
    Polyline,
    Sheet,
    Stroke,
    Text,
    hatch_segments,
)
from reports.sheet.medium import MILLIMETRES_PER_POINT
from reports.typeface import paper_font_name, text_width

__all__ = ["SheetFlowable", "draw_sheet"]


def draw_sheet(
    *,
    canvas: Any,  # noqa: ANN401
    sheet: Sheet,
    left: float,
    top: float,
    palette: Palette = PAPER,
    scale: float = 1.0,
) -> None:
    """Draw a sheet on a canvas.

    Parameters
    ----------
    canvas : reportlab.pdfgen.canvas.Canvas
        The page.
    sheet : Sheet
        What is drawn.
    left, top : float
        Its upper left corner, from the lower left corner of the page, in points [-].
    palette : Palette, optional
        Its colours.
    scale : float, optional
        Enlargement over the sheet's own millimetres [-].
    """
    canvas.saveState()
    canvas.setLineCap(0)
    canvas.setLineJoin(0)
    page = _Page(canvas, sheet, left, top, palette, scale)
    for item in sheet.items:
        page.item(item)
    canvas.restoreState()


class _Page:
    """One sheet while it is being drawn on a page."""

    def __init__(
        self,
        canvas: Any,  # noqa: ANN401
        sheet: Sheet,
        left: float,
        top: float,
        palette: Palette,
        scale: float,
    ) -> None:
        self.canvas = canvas
        self.sheet = sheet
        self.left = left
        self.top = top
        self.palette = palette
        self.factor = points_per_unit(sheet=sheet) * scale

    def item(self, item: Item) -> None:
        """Draw one item."""
        match item:
            case Line():
                self.path(((item.x1, item.y1), (item.x2, item.y2)), item.stroke, closed=False)
            case Polyline():
                self.path(item.points, item.stroke, closed=False)
            case Polygon():
                self.polygon(item)
            case Circle():
                self.circle(item)
            case Arc():
                self.arc(item)
            case Text():
                self.text(item)

    def at(self, point: Point) -> Point:
        """Place a point of the sheet on the page, where y grows upwards."""
        return (self.left + self.factor * point[0], self.top - self.factor * point[1])

    def stroke(self, stroke: Stroke) -> None:
        """Choose how lines are drawn."""
        width = self.sheet.medium.width(stroke.width) * self.factor
        self.canvas.setLineWidth(width)
        self.canvas.setStrokeColorRGB(*self.colour(stroke.colour))
        self.canvas.setDash([length * width for length in stroke.dash.lengths])

    def colour(self, token: Colour) -> tuple[float, float, float]:
        """Give a colour's components."""
        return colour_components(code=self.palette.code(token))

    def path(
        self,
        points: tuple[Point, ...],
        stroke: Stroke | None,
        *,
        closed: bool,
        fill: Colour | None = None,
    ) -> None:
        """Draw a line or an area."""
        path = self.canvas.beginPath()
        path.moveTo(*self.at(points[0]))
        for point in points[1:]:
            path.lineTo(*self.at(point))
        if closed:
            path.close()
        if stroke is not None:
            self.stroke(stroke)
        if fill is not None:
            self.canvas.setFillColorRGB(*self.colour(fill))
        self.canvas.drawPath(path, stroke=int(stroke is not None), fill=int(fill is not None))

    def polygon(self, item: Polygon) -> None:
        """Draw an area: its fill, its hatching and its outline."""
        if item.fill is not None:
            self.path(item.points, None, closed=True, fill=item.fill)
        if item.hatch is not None:
            self.stroke(item.hatch.stroke)
            segments = hatch_segments(
                points=item.points, pitch=item.hatch.pitch, rising=item.hatch.rising
            )
            self.canvas.lines([(*self.at(one), *self.at(two)) for one, two in segments])
        if item.stroke is not None:
            self.path(item.points, item.stroke, closed=True)

    def circle(self, item: Circle) -> None:
        """Draw a circle."""
        if item.stroke is not None:
            self.stroke(item.stroke)
        if item.fill is not None:
            self.canvas.setFillColorRGB(*self.colour(item.fill))
        x, y = self.at((item.x, item.y))
        self.canvas.circle(
            x,
            y,
            item.radius * self.factor,
            stroke=int(item.stroke is not None),
            fill=int(item.fill is not None),
        )

    def arc(self, item: Arc) -> None:
        """Draw a part of a circle."""
        self.stroke(item.stroke)
        x, y = self.at((item.x, item.y))
        radius = item.radius * self.factor
        # A page counts angles against the clock, a sheet with it.
        self.canvas.arc(
            x - radius,
            y - radius,
            x + radius,
            y + radius,
            -item.start_degrees,
            -item.sweep_degrees,
        )

    def text(self, item: Text) -> None:
        """Draw words on their base line."""
        size = self.sheet.medium.size(item.size) * self.factor
        name = paper_font_name(weight=item.weight, condensed=item.condensed)
        width = text_width(text=item.text, size=size, weight=item.weight, condensed=item.condensed)
        share = {Anchor.START: 0.0, Anchor.MIDDLE: 0.5, Anchor.END: 1.0}[item.anchor]
        x, y = self.at((item.x, item.y))
        self.canvas.setFont(name, size)
        self.canvas.setFillColorRGB(*self.colour(item.colour))
        self.canvas.drawString(x - share * width, y, item.text)


def points_per_unit(*, sheet: Sheet) -> float:
    """Give the points to a sheet unit; on a sheet for paper one unit is a millimetre.

    Parameters
    ----------
    sheet : Sheet
        The drawing.

    Returns
    -------
    float
        Points to a sheet unit [-].
    """
    return sheet.medium.millimetres_per_unit / MILLIMETRES_PER_POINT


class SheetFlowable(Flowable):  # type: ignore[misc]
    """A sheet that takes its place in the run of a page.

    Attributes
    ----------
    sheet : Sheet
        What is drawn.
    """

    def __init__(self, sheet: Sheet, *, scale: float = 1.0) -> None:
        super().__init__()
        self.sheet = sheet
        self._scale = scale
        factor = points_per_unit(sheet=sheet) * scale
        self.width = sheet.width * factor
        self.height = sheet.height * factor

    def wrap(self, available_width: float, available_height: float) -> tuple[float, float]:
        """Give the size it takes, which never depends on the room."""
        del available_width, available_height
        return self.width, self.height

    def draw(self) -> None:
        """Draw itself; the page has moved its origin to the lower left corner."""
        draw_sheet(canvas=self.canv, sheet=self.sheet, left=0.0, top=self.height, scale=self._scale)
