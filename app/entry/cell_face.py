"""How the reading cell looks in each of its states, and where its figures stand."""

from __future__ import annotations

from dataclasses import dataclass, replace

from PySide6.QtCore import QPointF, QRect, QRectF, QSize, Qt
from PySide6.QtGui import QFont, QFontMetricsF, QPainter, QPen
from PySide6.QtWidgets import QWidget

from app.entry.cell_state import Asked, CellState
from app.frame.key import KEY_WORDS_SHARE
from app.frame.lettering import draw_at, draw_struck, fitted, wrapped
from app.frame.look import Look
from app.frame.plain import flat_painter
from reports.palette import Colour
from reports.sheet.medium import LineWidth, Size
from reports.typeface import Weight

__all__ = ["CellFace", "notice_fits", "paint_cell", "place_cell"]

_PADDING = 10.0
_NOTICE_LINES = 2
_USUAL_OTHER = "−0.0 µm"


@dataclass(frozen=True, slots=True, kw_only=True)
class CellFace:
    """Everything that is seen in the cell, but for the figures.

    Attributes
    ----------
    state : CellState
        How far the cell is.
    asked : Asked or None
        What is asked for.
    symbol : str
        Unit of the figures.
    other : str
        The value in the other unit.
    notice, lock, trouble : str
        Sentences, where there are any.
    slow : bool
        Whether writing takes longer than a blink.
    reason, reasons : str
        The reason chosen, and those to choose from.
    cleared, double : str
        Texts that may be brought back.
    waiting : int
        How many readings wait [-].
    help_words, help_hint : str
        The key in the cell and the function key that does the same.
    """

    state: CellState
    asked: Asked | None
    symbol: str
    other: str
    notice: str
    lock: str
    trouble: str
    slow: bool
    reason: str
    reasons: str
    cleared: str
    double: str
    waiting: int
    help_words: str = ""
    help_hint: str = ""

    def with_words(self) -> CellFace:
        """Work out the sentence and the key that belong to the state.

        Returns
        -------
        CellFace
            The same face with `notice`, `help_words` and `help_hint` set.
        """
        notice, words, hint = self.notice, "", ""
        if self.state is CellState.NOT_YOURS:
            notice, words = self.lock, "Take over"
        elif self.state is CellState.TROUBLE:
            notice, words, hint = self.trouble, "Try again", "F5"
        elif self.state is CellState.WRITING:
            notice = "writing …" if self.slow else ""
        elif self.double:
            notice, words, hint = "sent twice, taken once", "Both were meant", "F2"
        elif self.cleared:
            notice, words, hint = f"cleared {self.cleared.replace('-', '−')}", "Undo", "Ctrl+Z"
        elif self.state is CellState.CORRECTING and not notice:
            needed = self.asked is not None and self.asked.reason_needed and not self.reason
            notice = self.reasons if needed else ""
        if self.waiting:
            more = "1 reading waits" if self.waiting == 1 else f"{self.waiting} readings wait"
            notice = f"{notice} · {more}" if notice else more
        return replace(self, notice=notice, help_words=words, help_hint=hint)

    @property
    def colour(self) -> Colour:
        """What the frame says."""
        return {
            CellState.WRITING: Colour.INK,
            CellState.UNREADABLE: Colour.INK,
            CellState.NOT_YOURS: Colour.BEFORE,
            CellState.RESTING: Colour.BEFORE,
            CellState.TROUBLE: Colour.STOP,
        }.get(self.state, Colour.ACCENT)

    @property
    def above(self) -> str:
        """The line above the figures: what is corrected or closed."""
        if self.asked is None:
            return ""
        if self.asked.closing is not None:
            return f"first reading {self.asked.closing}"
        return self.asked.old or ""


def _note(size: QSize, look: Look) -> QFont:
    """Give the font of sentences; in a low cell it does not grow over the figures."""
    font = look.note_font()
    font.setPixelSize(max(min(font.pixelSize(), round(size.height() * 0.17)), 8))
    return font


def _lead(size: QSize, look: Look) -> QFont:
    font = look.font(Size.LEAD)
    font.setPixelSize(max(min(font.pixelSize(), round(size.height() * 0.24)), 8))
    return font


def _title(size: QSize, look: Look) -> QFont:
    font = look.font(Size.TITLE)
    font.setPixelSize(max(min(font.pixelSize(), round(size.height() * 0.32)), 8))
    return font


def _unit_width(face: CellFace, size: QSize, look: Look) -> float:
    note = QFontMetricsF(_note(size, look))
    title = QFontMetricsF(_title(size, look))
    widest = max(note.horizontalAdvance(text) for text in (_USUAL_OTHER, face.other))
    return max(widest, title.horizontalAdvance(face.symbol)) + _PADDING


def notice_fits(face: CellFace, size: QSize, look: Look) -> bool:
    """Tell whether a cell has room for the whole of its sentence.

    Parameters
    ----------
    face : CellFace
        What is seen.
    size : QSize
        Size of the cell [px].
    look : Look
        Its look.

    Returns
    -------
    bool
        False where the end of the sentence is left out.
    """
    width = _notice_width(face, size, look)
    return len(wrapped(face.notice, _note(size, look), width=width)) <= _NOTICE_LINES


def _notice_width(face: CellFace, size: QSize, look: Look) -> float:
    room = size.width() - 2.0 * _PADDING
    return room - _help_width(face, look) - _PADDING if face.help_words else room


def _notice_lines(face: CellFace, size: QSize, look: Look) -> tuple[list[str], float]:
    if not face.notice:
        return [], 0.0
    font = _note(size, look)
    width = _notice_width(face, size, look)
    lines = wrapped(face.notice, font, width=width, most=_NOTICE_LINES)
    return lines, font.pixelSize() * 1.15 * len(lines)


def _help_width(face: CellFace, look: Look) -> float:
    # As wide as the words at the size that a key of the least height gives them.
    size = min(look.size(Size.TEXT), look.touch * KEY_WORDS_SHARE)
    words = look.font(size, weight=Weight.MEDIUM, condensed=look.window_width < 1920.0)
    wide = QFontMetricsF(words).horizontalAdvance(face.help_words) + 24.0
    if face.help_hint:
        wide += QFontMetricsF(words).horizontalAdvance(face.help_hint) + 10.0
    return wide


def _bands(face: CellFace, size: QSize, look: Look) -> tuple[float, float]:
    """Give the top and the bottom of the figures' room."""
    edge = look.line(LineWidth.HEAVY) + 2.0
    above = (
        float(_lead(size, look).pixelSize())
        if face.above and face.state is not CellState.TROUBLE
        else 0.0
    )
    _, below = _notice_lines(face, size, look)
    if face.help_words:
        below = max(below, look.touch)
    bottom = size.height() - edge - (below + 2.0 if below else 0.0)
    return edge + above, bottom


def place_cell(face: CellFace, size: QSize, look: Look, edit: QWidget, key: QWidget) -> None:
    """Put the figures and the key where the state leaves room for them.

    Parameters
    ----------
    face : CellFace
        What is seen.
    size : QSize
        Size of the cell [px].
    look : Look
        Its look.
    edit, key : QWidget
        The figures and the key.
    """
    top, bottom = _bands(face, size, look)
    left = _PADDING + look.line(LineWidth.HEAVY)
    width = size.width() - left - _unit_width(face, size, look) - 4.0
    edit.setGeometry(QRect(round(left), round(top), round(width), max(round(bottom - top), 1)))
    edge = round(look.line(LineWidth.HEAVY))
    wide = round(_help_width(face, look))
    key.setGeometry(
        QRect(
            size.width() - edge - 2 - wide, size.height() - edge - 2 - look.touch, wide, look.touch
        )
    )


def paint_cell(widget: QWidget, face: CellFace, look: Look, *, focused: bool) -> None:
    """Paint the frame, the units and the sentences.

    Parameters
    ----------
    widget : QWidget
        The cell.
    face : CellFace
        What is seen.
    look : Look
        Its look.
    focused : bool
        Whether the cell has the keyboard; without it the frame is thin.
    """
    painter = flat_painter(widget)
    frame = QRectF(widget.rect())
    heavy = focused or face.state in (CellState.TROUBLE, CellState.UNREADABLE)
    width = look.line(LineWidth.HEAVY if heavy else LineWidth.WIDE)
    pen = QPen(look.colour(face.colour), width)
    pen.setJoinStyle(Qt.PenJoinStyle.MiterJoin)
    painter.setPen(pen)
    painter.drawRect(frame.adjusted(width / 2, width / 2, -width / 2, -width / 2))
    if face.state is CellState.TROUBLE:
        bar = look.line(LineWidth.HEAVY) * 2.5
        painter.fillRect(QRectF(0.0, 0.0, bar, frame.height()), look.colour(Colour.STOP))
    _paint_units(painter, face, widget.size(), look)
    _paint_above(painter, face, widget.size(), look)
    _paint_notice(painter, face, widget.size(), look)
    painter.end()


def _paint_units(painter: QPainter, face: CellFace, size: QSize, look: Look) -> None:
    top, bottom = _bands(face, size, look)
    left = size.width() - _unit_width(face, size, look)
    painter.setPen(look.colour(Colour.INK2))
    painter.setFont(_note(size, look))
    base = look.line(LineWidth.HEAVY) + 8.0 + QFontMetricsF(painter.font()).ascent() * 0.85
    right = size.width() - _PADDING
    draw_at(painter, QPointF(right, base), face.other, align=Qt.AlignmentFlag.AlignRight)
    title = _title(size, look)
    room = max(bottom - base - 4.0, 8.0)
    title.setPixelSize(max(min(title.pixelSize(), int(room)), 8))
    painter.setFont(title)
    figures = min(look.size(Size.HERO) * 0.698, (bottom - top) / 1.1)
    unit_base = (top + bottom + figures) / 2.0
    draw_at(painter, QPointF(left, max(unit_base, base + title.pixelSize())), face.symbol)


def _paint_above(painter: QPainter, face: CellFace, size: QSize, look: Look) -> None:
    if not face.above or face.state is CellState.TROUBLE:
        return
    left = _PADDING + look.line(LineWidth.HEAVY)
    painter.setPen(look.colour(Colour.INK2))
    base = look.line(LineWidth.HEAVY) + 2.0 + _lead(size, look).pixelSize() * 0.86
    if face.asked is not None and face.asked.closing is not None:
        painter.setFont(_note(size, look))
        draw_at(painter, QPointF(left, base), face.above)
        return
    painter.setFont(_lead(size, look))
    rule = look.line(LineWidth.WIDE)
    right = draw_struck(painter, QPointF(left + 4.0, base), face.above, rule=rule)
    if face.reason:
        painter.setFont(_note(size, look))
        draw_at(painter, QPointF(right + 16.0, base), f"because: {face.reason}")


def _paint_notice(painter: QPainter, face: CellFace, size: QSize, look: Look) -> None:
    lines, height = _notice_lines(face, size, look)
    if not lines:
        return
    painter.setPen(look.colour(Colour.INK))
    font = _note(size, look)
    painter.setFont(fitted(font, lines, width=size.width() - 2.0 * _PADDING))
    left = _PADDING + look.line(LineWidth.HEAVY)
    step = font.pixelSize() * 1.15
    base = size.height() - look.line(LineWidth.HEAVY) - 4.0 - height + step * 0.82
    for line in lines:
        draw_at(painter, QPointF(left, base), line)
        base += step
