"""The verdict as a shape: told apart by outline and by fill before any colour is seen."""

from __future__ import annotations

from PySide6.QtCore import QPointF, QRectF, Qt
from PySide6.QtGui import QPainter, QPainterPath, QPen, QPolygonF

from app.frame.look import Look
from reports.palette import Colour
from reports.sheet.pictures import VerdictKind

__all__ = ["draw_verdict_shape", "shape_words"]

_LEAST_FOR_BAR = 20.0
_WORDS = {
    VerdictKind.WITHIN: "open ring",
    VerdictKind.LOOK: "square on its corner, left half solid",
    VerdictKind.STOP: "solid square with a bar",
    VerdictKind.NOT_JUDGED: "dashed ring",
}


def shape_words(kind: VerdictKind) -> str:
    """Describe the shape of a verdict to somebody who does not see it.

    Parameters
    ----------
    kind : VerdictKind
        The verdict.

    Returns
    -------
    str
        Its outline and fill.

    Examples
    --------
    >>> shape_words(VerdictKind.STOP)
    'solid square with a bar'
    """
    return _WORDS[kind]


def draw_verdict_shape(
    painter: QPainter, centre: QPointF, height: float, kind: VerdictKind, look: Look
) -> None:
    """Draw the shape of a verdict.

    Parameters
    ----------
    painter : QPainter
        Where it is drawn.
    centre : QPointF
        Its middle [px].
    height : float
        Height of the room it has [px].
    kind : VerdictKind
        The verdict.
    look : Look
        Gives its colour.
    """
    painter.save()
    if kind is VerdictKind.WITHIN:
        _draw_ring(painter, centre, height, look)
    elif kind is VerdictKind.LOOK:
        _draw_half_square(painter, centre, height, look)
    elif kind is VerdictKind.STOP:
        _draw_barred_square(painter, centre, height, look)
    else:
        _draw_dashed_ring(painter, centre, height, look)
    painter.restore()


def _draw_ring(painter: QPainter, centre: QPointF, height: float, look: Look) -> None:
    painter.setPen(QPen(look.colour(Colour.WITHIN), 0.12 * height))
    painter.setBrush(Qt.BrushStyle.NoBrush)
    painter.drawEllipse(centre, 0.43 * height, 0.43 * height)


def _draw_half_square(painter: QPainter, centre: QPointF, height: float, look: Look) -> None:
    colour = look.colour(Colour.LOOK)
    stroke = max(0.08 * height, 1.5)
    reach = 0.5 * height
    inner = reach - stroke * 2.0**0.5
    painter.setPen(Qt.PenStyle.NoPen)
    painter.setBrush(colour)
    outline = QPainterPath()
    outline.addPolygon(_on_corner(centre, reach))
    hole = QPainterPath()
    hole.addPolygon(_on_corner(centre, inner))
    right_half = QPainterPath()
    right_half.addRect(QRectF(centre.x(), centre.y() - reach, reach, 2.0 * reach))
    painter.drawPath(outline.subtracted(hole.intersected(right_half)))


def _on_corner(centre: QPointF, reach: float) -> QPolygonF:
    x, y = centre.x(), centre.y()
    corners = [
        QPointF(x, y - reach),
        QPointF(x + reach, y),
        QPointF(x, y + reach),
        QPointF(x - reach, y),
        QPointF(x, y - reach),
    ]
    return QPolygonF(corners)


def _draw_barred_square(painter: QPainter, centre: QPointF, height: float, look: Look) -> None:
    half = 0.4 * height
    frame = QRectF(centre.x() - half, centre.y() - half, 2.0 * half, 2.0 * half)
    painter.fillRect(frame, look.colour(Colour.STOP))
    if height >= _LEAST_FOR_BAR:
        bar = QRectF(0.0, 0.0, 1.3 * half, 0.3 * half)
        bar.moveCenter(centre)
        painter.fillRect(bar, look.colour(Colour.PAPER))


def _draw_dashed_ring(painter: QPainter, centre: QPointF, height: float, look: Look) -> None:
    radius = 0.43 * height
    stroke = max(0.04 * height, 1.5)
    pen = QPen(look.colour(Colour.BEFORE), stroke)
    pen.setCapStyle(Qt.PenCapStyle.FlatCap)
    # A whole number of dashes round the circle, each five parts line to three parts gap.
    count = max(round(2.0 * 3.14159265 * radius / (8.0 * max(stroke, 2.0))), 6)
    unit = 2.0 * 3.14159265 * radius / count / stroke / 8.0
    pen.setDashPattern([5.0 * unit, 3.0 * unit])
    painter.setPen(pen)
    painter.setBrush(Qt.BrushStyle.NoBrush)
    painter.drawEllipse(centre, radius, radius)
