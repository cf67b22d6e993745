"""Scroll bars as flat as everything else on the bench, and wide enough for a glove."""

from __future__ import annotations

from PySide6.QtWidgets import QScrollBar, QWidget

from app.frame.look import Look
from reports.palette import Colour

__all__ = ["flatten_scroll_bars"]

_STYLE = """
QScrollBar:vertical {{ width: {width}px; background: {ground}; border: none; margin: 0; }}
QScrollBar::handle:vertical {{ background: {handle}; min-height: 44px; margin-left: {inset}px; }}
QScrollBar::add-line, QScrollBar::sub-line {{ height: 0; border: none; }}
QScrollBar::add-page, QScrollBar::sub-page {{ background: {ground}; }}
"""


def flatten_scroll_bars(widget: QWidget, look: Look) -> None:
    """Give the scroll bars inside a widget the look of the bench.

    Parameters
    ----------
    widget : QWidget
        What scrolls.
    look : Look
        Gives the colours.
    """
    width = round(look.between(narrow=20.0, wide=24.0))
    style = _STYLE.format(
        width=width,
        inset=width // 2,
        ground=look.colour(Colour.PAPER).name(),
        handle=look.colour(Colour.INK2).name(),
    )
    for bar in widget.findChildren(QScrollBar):
        if bar.styleSheet() != style:
            bar.setStyleSheet(style)
