"""Readings, one after the other: the mark, the cell and the ladder, and what stands beside it."""

from __future__ import annotations

from collections.abc import Callable
from typing import Protocol, TypeVar

from PySide6.QtCore import QRect, Signal
from PySide6.QtGui import QResizeEvent
from PySide6.QtWidgets import QWidget

from app.entry.cell_state import CellState
from app.entry.cell_unit import CellUnit
from app.entry.ladder import Ladder
from app.entry.reading_cell import ReadingCell
from app.frame.look import Look
from app.frame.plain import PlainWidget
from app.frame.prompt import Prompt, PromptBlock
from app.pages.bench.shown import asked_of, prompt_of, rungs_of
from app.presenters.bench.state import ReadingTask
from models.units import Quantity

__all__ = ["Reader", "ReadingEntry"]

_PROMPT = (100.0, 116.0)
_CELL = (130.0, 160.0)
_LADDER = 99.0
_GREATEST_GROWTH = 1.3
_MOST_OF_LADDER = 0.34

_Told = TypeVar("_Told")


class Reader(Protocol):
    """Who reads what is typed, for the task of now."""

    def read(self, text: str) -> Quantity:
        """Read a text, or raise `ValueError` with a sentence."""

    def other_unit_text(self, text: str) -> str:
        """Write a text's value in the other unit."""


class ReadingEntry(PlainWidget):
    """The left column while readings are taken."""

    typed = Signal(str)
    taken = Signal(str)
    corrected = Signal(str, str)

    def __init__(
        self, reader: Reader, *, look: Look | None = None, parent: QWidget | None = None
    ) -> None:
        super().__init__(name="Readings", look=look, parent=parent)
        self._reader = reader
        self._place: object = None
        self._half = ""
        self._held = ""
        self._shown: ReadingTask | None = None
        self.prompt = PromptBlock(Prompt(mark=""), look=self._look, parent=self)
        self.prompt.setObjectName("prompt")
        self.cell = ReadingCell(unit=self._unit(""), look=self._look, parent=self)
        self.cell.setObjectName("cell")
        self.ladder = Ladder(look=self._look, parent=self)
        self.ladder.setObjectName("ladder")
        self.setFocusProxy(self.cell)
        self.cell.typed.connect(self.typed)
        self.cell.taken.connect(self.taken)
        self.cell.corrected.connect(self.corrected)

    def _unit(self, symbol: str) -> CellUnit:
        def other(quantity: Quantity) -> str:
            return self._reader.other_unit_text(quantity.written)

        return CellUnit(symbol=symbol, read=self._reader.read, other=other)

    def show_task(self, task: ReadingTask) -> None:
        """Ask for a reading; the cell is asked anew only where the place is another.

        Parameters
        ----------
        task : ReadingTask
            The mark, what surrounds it, and the ladder.
        """
        before, self._shown = self._shown, task
        if before is None or before.unit != task.unit:
            self.cell.set_unit(self._unit(task.unit))
        _tell(self.prompt.prompt, prompt_of(task), self.prompt.set_prompt)
        _tell(self.ladder.rungs, rungs_of(task), self.ladder.set_rungs)
        _tell(self.ladder.caption, task.caption, self.ladder.set_caption)
        written = tuple((rung.value, rung.struck) for rung in task.rungs)
        place = (task.where, task.mark, task.correcting, task.is_closing, written)
        if place != self._place:
            self._ask(task, another=before is not None and before.where != task.where)
        self._place = place

    def _ask(self, task: ReadingTask, *, another: bool) -> None:
        if another and self.cell.state is CellState.TYPING:
            # Half a reading of one station must not become the reading of another.
            self.cell.clear_entry()
        self.cell.ask(asked_of(task))

    def rest(self) -> None:
        """Ask for nothing."""
        if self._place is not None:
            self._place = self._shown = None
            self.cell.rest()

    def give_back(self) -> None:
        """Put a reading that was not taken back into the cell, to be edited."""
        text = self.cell.text
        if self._shown is not None and self.cell.state is CellState.WRITING:
            self.cell.ask(asked_of(self._shown))
            self.cell.write(text)

    def hold(self, text: str) -> None:
        """Keep a reading that could not be written, to be seen in the cell with its trouble.

        Parameters
        ----------
        text : str
            The reading as typed.
        """
        self._held = text

    def trouble(self, *, what: str, where: str, way_out: str) -> None:
        """Say in the cell that a reading could not be written.

        Parameters
        ----------
        what, where, way_out : str
            What went wrong, with what, and what to do.
        """
        # What is being typed by now belongs to the next mark, not to the reading that failed.
        self._half = "" if self.cell.state is CellState.WRITING else self.cell.text
        self.cell.refuse(what=what, where=where, way_out=way_out, text=self._held)
        self._held = ""

    def go_on(self) -> None:
        """Wait for a reading again after trouble; the presenter has what was in hand."""
        if self._shown is not None and self.cell.state in (CellState.TROUBLE, CellState.WRITING):
            self.cell.ask(asked_of(self._shown))
            half, self._half = self._half, ""
            if half:
                self.cell.write(half)

    def asked_height(self, width: int) -> int:
        """Ask for nothing: mark, cell and ladder fit themselves to whatever room there is."""
        return 0

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Share the height between mark, cell and ladder."""
        super().resizeEvent(event)
        self._lay_out()

    def look_changed(self) -> None:
        """Share the height for the new scale."""
        self._lay_out()

    def _lay_out(self) -> None:
        prompt = self._look.between(narrow=_PROMPT[0], wide=_PROMPT[1])
        cell = self._look.between(narrow=_CELL[0], wide=_CELL[1])
        ladder = max(self.ladder.sizeHint().height(), _LADDER)
        ladder = min(ladder, self.height() * _MOST_OF_LADDER)
        growth = min((self.height() - ladder - 8.0) / (prompt + cell), _GREATEST_GROWTH)
        widths = [round(share) for share in (prompt * growth, cell * growth, ladder)]
        top = 2
        self.prompt.setGeometry(QRect(0, top, self.width(), widths[0]))
        top += widths[0]
        self.cell.setGeometry(QRect(0, top, self.width(), widths[1]))
        top += widths[1] + 4
        self.ladder.setGeometry(QRect(0, top, self.width(), min(widths[2], self.height() - top)))


def _tell(shown: _Told, wanted: _Told, show: Callable[[_Told], None]) -> None:
    """Show what is wanted, unless it is what is shown."""
    if shown != wanted:
        show(wanted)
