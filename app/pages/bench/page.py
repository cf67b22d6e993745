"""The bench: shows what its state says and hands on what is typed, pressed and touched."""

from __future__ import annotations

import time
from collections.abc import Callable
from typing import Any

from PySide6.QtCore import QEvent, QObject, Qt
from PySide6.QtGui import QFocusEvent, QKeyEvent, QShowEvent
from PySide6.QtWidgets import QWidget

from app.entry.stray_strokes import StrayStrokes
from app.frame.look import Look
from app.frame.messages import Message
from app.pages.bench.parts import TAKES_FIGURES, BenchParts
from app.pages.bench.presenting import BenchPresenting
from app.pages.bench.shown import (
    KEYPAD,
    banded_verdict,
    foot_keys,
    next_words,
    shown_verdict,
    title_line,
)
from app.presenters.bench.state import (
    BenchState,
    FormTask,
    Key,
    KeyTask,
    ReadingTask,
    Task,
    WaitTask,
)

__all__ = ["BenchPage"]


class BenchPage(BenchParts):
    """The technician's desk below the line of desks.

    Parameters
    ----------
    presenter : BenchPresenting
        Gives the state and takes every act.
    look : Look
        Colours, text scale and whether it is read from afar; the page adds its own width.
    clock : callable
        Seconds on the clock by which the state says when a door was opened.
    """

    def __init__(
        self,
        presenter: BenchPresenting,
        look: Look,
        *,
        clock: Callable[[], float] = time.time,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(presenter, look, clock=clock, parent=parent)
        self._task_before: type | None = None
        self._troubled = False
        self._keypad_offered = False
        self._band_put_away: object = None
        self._wire()
        StrayStrokes(cell=self.reading.cell, page=self)
        for drawing in (self.drawing, self.dial, self.ranges):
            StrayStrokes(cell=self.reading.cell, page=drawing)
            drawing.touched.connect(self._explain)
        (self.reading.cell.focusProxy() or self).installEventFilter(self)
        self.set_look(look)
        self.show_state()

    def _wire(self) -> None:
        presenter = self._presenter
        presenter.changed.connect(self.show_state)
        presenter.refused.connect(self._refuse)
        presenter.in_hand.connect(self.reading.hold)
        presenter.troubled.connect(self._trouble)
        presenter.recovered.connect(self._recover)
        cell, beside = self.reading.cell, self.beside
        self.reading.typed.connect(presenter.typed)
        self.reading.taken.connect(self._take)
        self.reading.corrected.connect(self._correct)
        self.reading.ladder.chosen.connect(presenter.choose_rung)
        cell.asked_for_last.connect(presenter.ask_for_last)
        cell.touched.connect(self._offer_keypad)
        cell.reason_chosen.connect(beside.reasons.show_reason)
        beside.reasons.chosen.connect(cell.choose_reason)
        beside.proposed_taken.connect(presenter.answer_proposed)
        beside.kept.connect(presenter.answer_kept)
        beside.read_again.connect(presenter.answer_read_again)
        beside.done.connect(self._back_to_entry)
        self.form.filled.connect(presenter.fill)
        self.act.pressed.connect(presenter.press)
        self.act.door_opened.connect(presenter.open_door)
        self.verdict.opened.connect(self._open_reasons)
        self.band.opened.connect(self._open_reasons)
        self.band.went_on.connect(self._go_on)
        self.reasons.closed.connect(self._back_to_entry)
        self.foot.pressed.connect(self._press_foot)
        self.message.way_out_taken.connect(presenter.try_again)

    # -- what is shown

    def show_state(self) -> None:
        """Show the presenter's state, touching only what has changed."""
        state = self._presenter.state
        before, self._task_before = self._task_before, type(state.task)
        self.title.set_title(title_line(state.title))
        self.setAccessibleDescription(state.words)
        self.beside.show_task(state.task)
        self._show_verdict(state)
        self._show_task(state.task)
        keys = foot_keys(state.keys, takes_figures=isinstance(state.task, TAKES_FIGURES))
        self.foot.set_keys(keys)
        for key in state.keys:
            self.foot.key(key.name).setToolTip(key.hint)
        self._arrange()
        self._draw(state)
        if before is not type(state.task) or self._lost_keyboard():
            self._back_to_entry()

    def _show_task(self, task: Task) -> None:
        entry = self._entry_of(task)
        closed = self.band.isHidden()
        for other in (self.reading, self.form, self.act):
            other.setVisible(other is entry and closed)
        self.form.take.setVisible(entry is self.form and closed)
        self.verdict.setVisible(closed)
        _SHOW[type(task)](self, task)

    def _show_reading(self, task: ReadingTask) -> None:
        state = self._presenter.state
        self._enlarged.hold((state.title.job, state.title.step, task.kind))
        self.form.put_away()
        self.act.put_away()
        self.reading.show_task(task)

    def _show_form(self, task: FormTask) -> None:
        self._enlarged.hold(None)
        self.reading.rest()
        self.act.put_away()
        self.form.show_task(task)

    def _show_act(self, task: KeyTask | WaitTask) -> None:
        self._enlarged.hold(None)
        self.reading.rest()
        self.form.put_away()
        self.act.show_task(task)

    def _show_verdict(self, state: BenchState) -> None:
        shown = shown_verdict(state.verdict, short=not self.beside.isHidden())
        if shown != self.verdict.verdict:
            self.verdict.set_verdict(shown)
            self.badge.set_kind(shown)
        if self.reasons.isVisible():
            self.reasons.show_reasons(state.verdict.phrase, state.verdict.reasons)
        closing = state.verdict.is_final and state.verdict != self._band_put_away
        if closing:
            words = next_words(state.task)
            self.band.set_verdict(banded_verdict(state.verdict), next_words=words)
        else:
            self._band_put_away = state.verdict if state.verdict.is_final else None
        if closing is self.band.isHidden():
            self.band.setVisible(closing)
            self._wanted = None

    # -- what is done

    def _take(self, text: str) -> None:
        if self._troubled:
            # The presenter still holds the reading; handing it in again would double it.
            self._presenter.try_again()
        else:
            self._presenter.take(text)

    def _correct(self, text: str, reason: str) -> None:
        if self._troubled:
            self._presenter.try_again()
        else:
            self._presenter.correct(text, reason)

    def _press_foot(self, name: str) -> None:
        if name == KEYPAD:
            self._figures.keypad_wanted = not self._figures.keypad_wanted
            self._keypad_offered = True
            self._arrange()
            self._draw(self._presenter.state)
        else:
            self._presenter.press(name)

    def _offer_keypad(self) -> None:
        """Show the keypad at the first touch of the cell; later only its key shows it."""
        if not self._keypad_offered:
            self._press_foot(KEYPAD)

    def _go_on(self) -> None:
        state = self._presenter.state
        self._band_put_away = state.verdict
        self.show_state()
        self._back_to_entry()
        single: tuple[Key, ...] = getattr(state.task, "keys", ())
        if len(single) == 1:
            self._presenter.press(single[0].name)

    def handbook_words(self) -> str:
        """Name the rule of the verdict in front."""
        return next(iter(self._presenter.state.verdict.rules), "")

    def _open_reasons(self) -> None:
        verdict = self._presenter.state.verdict
        focused = _focused_in(self)
        by_keyboard = focused is not None and focused is not self.reading.cell.focusProxy()
        self.reasons.open(verdict.phrase, verdict.reasons)
        if by_keyboard:
            self.reasons.setFocus()

    def _explain(self, _name: str, tells: str) -> None:
        self.message.set_message(Message(what=tells, trouble=False))
        self._place_message()

    def _refuse(self, sentence: str) -> None:
        self.reading.give_back()
        self.message.set_message(Message(what=sentence, trouble=False))
        self._place_message()

    def _trouble(self, what: str, where: str, way_out: str) -> None:
        self._troubled = True
        if isinstance(self._presenter.state.task, ReadingTask):
            self.reading.trouble(what=what, where=where, way_out=way_out)
        if self.reading.isHidden() or not self.reading.cell.has_room_for_notice:
            key = "Try again" if self.reading.isHidden() else ""
            said = Message(what=what, where=f"{where}.", way_out=way_out, key=key)
            self.message.set_message(said)
        self._place_message()

    def _recover(self) -> None:
        self._troubled = False
        self.reading.go_on()
        if self.message.message is not None and self.message.message.trouble:
            self.message.set_message(None)

    # -- the keyboard

    def _lost_keyboard(self) -> bool:
        focused = _focused_in(self)
        return focused is None or not focused.isVisible()

    def _back_to_entry(self) -> None:
        target: QWidget = (
            self.band if self.band.isVisible() else self._entry_of(self._presenter.state.task)
        )
        target.setFocus(Qt.FocusReason.OtherFocusReason)

    def focusInEvent(self, event: QFocusEvent) -> None:
        """Hand the keyboard on to what is to be done now."""
        super().focusInEvent(event)
        self._back_to_entry()

    def eventFilter(self, watched: QObject, event: QEvent) -> bool:
        """Let Esc close what lies over the bench before it clears the cell."""
        if (
            isinstance(event, QKeyEvent)
            and event.type() == QEvent.Type.KeyPress
            and event.key() == Qt.Key.Key_Escape
        ):
            return self._close_uppermost()
        return super().eventFilter(watched, event)

    def keyPressEvent(self, event: QKeyEvent) -> None:
        """Let Esc close what lies over the bench."""
        if event.key() == Qt.Key.Key_Escape and self._close_uppermost():
            return
        super().keyPressEvent(event)

    def _close_uppermost(self) -> bool:
        if self.reasons.isVisible():
            self.reasons.close_panel()
            return True
        return self.beside.close_words()

    def showEvent(self, event: QShowEvent) -> None:
        """Give the keyboard to what is to be done now."""
        super().showEvent(event)
        self._back_to_entry()


def _focused_in(page: QWidget) -> QWidget | None:
    """Find what has the keyboard on the page, also while the window is not in front."""
    found: QWidget | None = page.focusWidget()
    return found


_SHOW: dict[type, Callable[[BenchPage, Any], None]] = {
    ReadingTask: BenchPage._show_reading,
    FormTask: BenchPage._show_form,
    KeyTask: BenchPage._show_act,
    WaitTask: BenchPage._show_act,
}
