"""Words on a widget: fitted to a width, broken into lines, elided only where nothing else helps."""

from __future__ import annotations

from collections.abc import Sequence

from PySide6.QtCore import QPointF, QRectF, Qt
from PySide6.QtGui import QFont, QFontMetricsF, QPainter

__all__ = [
    "SENTENCE_LEADING",
    "capital_height",
    "draw_at",
    "draw_lines",
    "draw_struck",
    "fitted",
    "line_step",
    "wrapped",
]

SENTENCE_LEADING = 1.28
"""Distance of the lines of a sentence as a share of the size [-]."""


def capital_height(font: QFont) -> float:
    """Give the height of capitals and figures.

    Parameters
    ----------
    font : QFont
        The font.

    Returns
    -------
    float
        The height [px].
    """
    return QFontMetricsF(font).capHeight()


def line_step(font: QFont) -> float:
    """Give the distance between the lines of a sentence.

    Parameters
    ----------
    font : QFont
        The font.

    Returns
    -------
    float
        The distance [px].
    """
    return font.pixelSize() * SENTENCE_LEADING


def fitted(font: QFont, texts: Sequence[str], *, width: float, least: float = 8.0) -> QFont:
    """Shrink a font until the widest of some texts fits.

    Parameters
    ----------
    font : QFont
        The font at its full size.
    texts : sequence of str
        What has to fit, each on one line.
    width : float
        The room [px].
    least : float
        Size below which it does not shrink [px].

    Returns
    -------
    QFont
        The same font, or a smaller one.
    """
    widest = max((QFontMetricsF(font).horizontalAdvance(text) for text in texts), default=0.0)
    if widest <= width or widest == 0.0:
        return font
    shrunk = QFont(font)
    shrunk.setPixelSize(max(int(font.pixelSize() * max(width, 1.0) / widest), round(least)))
    return shrunk


def wrapped(text: str, font: QFont, *, width: float, most: int | None = None) -> list[str]:
    """Break a sentence into lines at its spaces.

    Parameters
    ----------
    text : str
        The sentence.
    font : QFont
        Its font.
    width : float
        The room [px].
    most : int or None
        Greatest number of lines; what is left over ends in "…" [-].

    Returns
    -------
    list of str
        The lines; a word wider than the room stands on a line of its own.
    """
    metrics = QFontMetricsF(font)
    lines: list[str] = []
    for word in text.split(" "):
        longer = f"{lines[-1]} {word}" if lines else word
        if lines and metrics.horizontalAdvance(longer) <= width:
            lines[-1] = longer
        else:
            lines.append(word)
    if most is not None and len(lines) > most:
        rest = " ".join(lines[max(most, 1) - 1 :])
        last = metrics.elidedText(f"{rest} …", Qt.TextElideMode.ElideRight, width)
        lines = [*lines[: max(most, 1) - 1], last]
    return lines


def draw_at(
    painter: QPainter,
    point: QPointF,
    text: str,
    *,
    align: Qt.AlignmentFlag = Qt.AlignmentFlag.AlignLeft,
) -> float:
    """Write a text on its base line.

    Parameters
    ----------
    painter : QPainter
        Carries font and pen.
    point : QPointF
        Left end, middle or right end of the base line [px].
    text : str
        What is written.
    align : AlignmentFlag
        Which of the three the point is.

    Returns
    -------
    float
        Where the text ends [px].
    """
    advance = QFontMetricsF(painter.font()).horizontalAdvance(text)
    left = point.x()
    if align == Qt.AlignmentFlag.AlignHCenter:
        left -= advance / 2.0
    elif align == Qt.AlignmentFlag.AlignRight:
        left -= advance
    painter.drawText(QPointF(left, point.y()), text)
    return left + advance


def draw_struck(
    painter: QPainter,
    point: QPointF,
    text: str,
    *,
    align: Qt.AlignmentFlag = Qt.AlignmentFlag.AlignLeft,
    rule: float = 2.0,
) -> float:
    """Write a text with a rule through it, so that it can still be read.

    Parameters
    ----------
    painter : QPainter
        Carries font and pen.
    point : QPointF
        Left end, middle or right end of the base line [px].
    text : str
        What is written.
    align : AlignmentFlag
        Which of the three the point is.
    rule : float
        Thickness of the rule [px].

    Returns
    -------
    float
        Where the text ends [px].
    """
    right = draw_at(painter, point, text, align=align)
    metrics = QFontMetricsF(painter.font())
    left = right - metrics.horizontalAdvance(text)
    middle = point.y() - metrics.capHeight() / 2.0
    overhang = painter.font().pixelSize() * 0.08
    painter.fillRect(
        QRectF(left - overhang, middle - rule / 2.0, right - left + 2.0 * overhang, rule),
        painter.pen().color(),
    )
    return right


def draw_lines(painter: QPainter, left: float, top: float, lines: Sequence[str]) -> float:
    """Write lines of a sentence below each other.

    Parameters
    ----------
    painter : QPainter
        Carries font and pen.
    left : float
        Where each line begins [px].
    top : float
        Top of the first line's room [px].
    lines : sequence of str
        The lines.

    Returns
    -------
    float
        Bottom of the last line's room [px].
    """
    step = line_step(painter.font())
    for line in lines:
        painter.drawText(QPointF(left, top + step * 0.77), line)
        top += step
    return top
