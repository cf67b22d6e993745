"""The verdict as a shape: told apart by outline and by fill before any colour is seen."""

from __future__ import annotations

from PySide6.QtCore import QPointF
from PySide6.QtGui import QPainter

from app.drawing.painter import paint_sheet
from app.frame.look import Look
from reports.sheet.elements import Sheet
from reports.sheet.pictures import VerdictKind
from reports.sheet.verdict import verdict_shape

__all__ = ["draw_verdict_shape", "shape_words"]

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
    half = height / 2.0
    items = verdict_shape(kind=kind, x=half, y=half, size=height, medium=look.medium)
    sheet = Sheet(width=height, height=height, medium=look.medium, items=items)
    offset = (centre.x() - half, centre.y() - half)
    paint_sheet(painter=painter, sheet=sheet, palette=look.palette, offset=offset)
