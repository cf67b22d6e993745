"""Paints a sheet with QPainter, crisp at every device ratio."""

from __future__ import annotations

import math

from PySide6.QtCore import QLineF, QPointF, QRectF, Qt
from PySide6.QtGui import QFontMetricsF, QPainter, QPen, QPolygonF

from app.style.tokens import colour, pixel_font
from reports.palette import Colour, Palette
from reports.sheet.elements import (
    Anchor,
    Arc,
    Circle,
    Dash,
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

__all__ = ["paint_sheet"]

_WIDE_ENOUGH_TO_BLUR = 2.25
"""Device pixels from which a grey edge no longer makes a line look out of focus [-]."""


def paint_sheet(
    *,
    painter: QPainter,
    sheet: Sheet,
    palette: Palette,
    scale: float = 1.0,
    offset: tuple[float, float] = (0.0, 0.0),
) -> None:
    """Paint a whole sheet; the ground is left as it is.

    Parameters
    ----------
    painter : QPainter
        An active painter.
    sheet : Sheet
        What is drawn.
    palette : Palette
        Its colours.
    scale : float, optional
        Device-independent pixels to a sheet unit [-].
    offset : tuple of float, optional
        Where the sheet's upper left corner comes to lie, in device-independent pixels [-].
    """
    painter.save()
    painter.setRenderHints(QPainter.RenderHint.Antialiasing | QPainter.RenderHint.TextAntialiasing)
    brush = _Painted(painter, sheet, palette, scale, offset)
    for item in sheet.items:
        brush.item(item)
    painter.restore()


class _Painted:
    """One sheet while it is being painted."""

    def __init__(
        self,
        painter: QPainter,
        sheet: Sheet,
        palette: Palette,
        scale: float,
        offset: tuple[float, float],
    ) -> None:
        self.painter = painter
        self.sheet = sheet
        self.palette = palette
        self.scale = scale
        self.offset = offset
        self.ratio = painter.device().devicePixelRatioF()

    def item(self, item: Item) -> None:
        """Paint one item."""
        match item:
            case Line():
                self.polyline(((item.x1, item.y1), (item.x2, item.y2)), item.stroke)
            case Polyline():
                self.polyline(item.points, item.stroke)
            case Polygon():
                self.polygon(item)
            case Circle():
                self.circle(item)
            case Arc():
                self.arc(item)
            case Text():
                self.text(item)

    def pen(self, stroke: Stroke | None) -> QPen:
        """Give the pen for a stroke; none paints no outline."""
        if stroke is None:
            return QPen(Qt.PenStyle.NoPen)
        width = self.pen_width(stroke)
        pen = QPen(colour(palette=self.palette, token=stroke.colour), width)
        pen.setCapStyle(Qt.PenCapStyle.FlatCap)
        pen.setJoinStyle(Qt.PenJoinStyle.MiterJoin)
        if stroke.dash is not Dash.CONTINUOUS:
            pen.setDashPattern(list(stroke.dash.lengths))
        return pen

    def pen_width(self, stroke: Stroke) -> float:
        """Give a stroke's width in device-independent pixels, a thin one in whole device pixels."""
        width = self.sheet.medium.width(stroke.width) * self.scale
        device_width = width * self.ratio
        if device_width < _WIDE_ENOUGH_TO_BLUR:
            return max(1.0, math.floor(device_width + 0.5)) / self.ratio
        return width

    def fill(self, token: Colour | None) -> None:
        """Choose what areas are filled with."""
        if token is None:
            self.painter.setBrush(Qt.BrushStyle.NoBrush)
        else:
            self.painter.setBrush(colour(palette=self.palette, token=token))

    def at(self, point: Point) -> QPointF:
        """Place a point of the sheet on the device."""
        return QPointF(
            self.offset[0] + point[0] * self.scale, self.offset[1] + point[1] * self.scale
        )

    def snapped(self, points: tuple[Point, ...], width: float, *, closed: bool) -> QPolygonF:
        """Move upright and level edges onto whole device pixels, so that they are crisp."""
        placed = [self.at(point) for point in points]
        count = len(placed)
        columns, rows = [False] * count, [False] * count
        for here in range(count if closed else count - 1):
            there = (here + 1) % count
            if abs(placed[here].x() - placed[there].x()) < 1e-6:
                columns[here] = columns[there] = True
            if abs(placed[here].y() - placed[there].y()) < 1e-6:
                rows[here] = rows[there] = True
        polygon = QPolygonF()
        for point, column, row in zip(placed, columns, rows, strict=True):
            x = self.whole(point.x(), width) if column else point.x()
            y = self.whole(point.y(), width) if row else point.y()
            polygon.append(QPointF(x, y))
        return polygon

    def whole(self, value: float, width: float) -> float:
        """Put the middle of a line where its edges fall between device pixels."""
        shift = 0.5 if round(width * self.ratio) % 2 else 0.0
        return (round(value * self.ratio - shift) + shift) / self.ratio

    def polyline(self, points: tuple[Point, ...], stroke: Stroke) -> None:
        """Paint an open line."""
        self.painter.setPen(self.pen(stroke))
        self.painter.setBrush(Qt.BrushStyle.NoBrush)
        self.painter.drawPolyline(self.snapped(points, self.pen_width(stroke), closed=False))

    def polygon(self, item: Polygon) -> None:
        """Paint an area: its fill, its hatching and its outline."""
        width = self.pen_width(item.stroke) if item.stroke else 0.0
        outline = self.snapped(item.points, width, closed=True)
        if item.fill is not None:
            self.painter.setPen(Qt.PenStyle.NoPen)
            self.fill(item.fill)
            self.painter.drawPolygon(outline)
        if item.hatch is not None:
            self.painter.setPen(self.pen(item.hatch.stroke))
            segments = hatch_segments(
                points=item.points, pitch=item.hatch.pitch, rising=item.hatch.rising
            )
            self.painter.drawLines([QLineF(self.at(one), self.at(two)) for one, two in segments])
        if item.stroke is not None:
            self.painter.setPen(self.pen(item.stroke))
            self.painter.setBrush(Qt.BrushStyle.NoBrush)
            self.painter.drawPolygon(outline)

    def circle(self, item: Circle) -> None:
        """Paint a circle."""
        self.painter.setPen(self.pen(item.stroke))
        self.fill(item.fill)
        radius = item.radius * self.scale
        self.painter.drawEllipse(self.at((item.x, item.y)), radius, radius)

    def arc(self, item: Arc) -> None:
        """Paint a part of a circle."""
        self.painter.setPen(self.pen(item.stroke))
        self.painter.setBrush(Qt.BrushStyle.NoBrush)
        centre, radius = self.at((item.x, item.y)), item.radius * self.scale
        box = QRectF(centre.x() - radius, centre.y() - radius, 2 * radius, 2 * radius)
        # Qt counts sixteenths of a degree against the clock.
        self.painter.drawArc(box, round(-16 * item.start_degrees), round(-16 * item.sweep_degrees))

    def text(self, item: Text) -> None:
        """Paint words on their base line."""
        size = self.sheet.medium.size(item.size)
        font = pixel_font(size=size * self.scale, weight=item.weight, condensed=item.condensed)
        self.painter.setFont(font)
        self.painter.setPen(colour(palette=self.palette, token=item.colour))
        width = QFontMetricsF(font).horizontalAdvance(item.text)
        share = {Anchor.START: 0.0, Anchor.MIDDLE: 0.5, Anchor.END: 1.0}[item.anchor]
        place = self.at((item.x, item.y))
        self.painter.drawText(QPointF(place.x() - share * width, place.y()), item.text)
