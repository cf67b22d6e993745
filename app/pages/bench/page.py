"""The bench: lays out what its state says and hands on what is typed, pressed and touched."""

from __future__ import annotations

import time
from collections.abc import Callable
from itertools import pairwise
from typing import Any, Protocol

from PySide6.QtCore import QEvent, QObject, QRect, Qt, SignalInstance
from PySide6.QtGui import QKeyEvent, QPaintEvent, QResizeEvent, QShowEvent
from PySide6.QtWidgets import QWidget

from app.drawing.view import SheetView
from app.entry.stray_strokes import StrayStrokes
from app.frame.foot import FootKeys, TitleBlock
from app.frame.key import Key as PressKey
from app.frame.look import Look
from app.frame.messages import Message, MessageStrip
from app.frame.plain import PlainWidget, flat_painter
from app.frame.verdicts import VerdictBand, VerdictPane
from app.pages.bench.beside import Beside
from app.pages.bench.drawings import (
    Magnification,
    along_sheet,
    dial_sheet,
    ranges_height,
    ranges_sheet,
)
from app.pages.bench.figures import Figures, VerdictBadge
from app.pages.bench.form_entry import FormEntry
from app.pages.bench.key_entry import KeyEntry
from app.pages.bench.places import SMALLEST, Frame, Wanted, frame_of, places_of
from app.pages.bench.reading_entry import ReadingEntry
from app.pages.bench.reasons_panel import ReasonsPanel
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
from models.units import Quantity
from reports.palette import Colour
from reports.sheet.medium import LineWidth

__all__ = ["BenchPage", "BenchPresenting"]


class BenchPresenting(Protocol):
    """What the page asks of its presenter."""

    @property
    def changed(self) -> SignalInstance:
        """The state is another."""

    @property
    def refused(self) -> SignalInstance:
        """Something was not taken: a sentence."""

    @property
    def troubled(self) -> SignalInstance:
        """The surroundings failed: what, where, the way out."""

    @property
    def recovered(self) -> SignalInstance:
        """Writing goes on."""

    @property
    def state(self) -> BenchState:
        """Everything the bench shows."""

    def read(self, text: str) -> Quantity:
        """Read a text for the task of now."""

    def other_unit_text(self, text: str) -> str:
        """Write a text's value in the other unit."""

    def typed(self, text: str) -> None:
        """Follow each key."""

    def take(self, text: str) -> None:
        """Take a reading."""

    def correct(self, text: str, reason: str) -> None:
        """Take a reading in place of another."""

    def ask_for_last(self) -> None:
        """Go back to the last reading."""

    def choose_rung(self, index: int) -> None:
        """Go to a mark of the ladder."""

    def answer_proposed(self) -> None:
        """Answer the question with what is proposed."""

    def answer_kept(self, words: str) -> None:
        """Answer the question: it stays."""

    def answer_read_again(self) -> None:
        """Answer the question by reading again."""

    def fill(self, answers: dict[str, str]) -> None:
        """Take a form."""

    def press(self, name: str) -> None:
        """Do what a key says."""

    def open_door(self) -> None:
        """Note that the door is open."""

    def try_again(self) -> None:
        """Write again what could not be written."""


class BenchPage(PlainWidget):
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
        super().__init__(name="Bench", look=look, parent=parent)
        self.setObjectName("bench")
        self.setMinimumSize(*SMALLEST)
        self._presenter = presenter
        self._chosen_look = look
        self._state: BenchState | None = None
        self._drawn: tuple[object, ...] = ()
        self._wanted: Wanted | None = None
        self._frame = self._fit()
        self._places = places_of(self._frame, Wanted())
        self._enlarged = Magnification()
        self._troubled = False
        self._keypad_offered = False
        self._band_put_away: object = None
        self._opened = {"planes": False, "dial": False}
        self._make_drawings()
        self._make_entries(clock)
        self._make_verdicts()
        self._make_foot()
        self._figures = Figures(entry=self.reading, form=self.form, look=look, parent=self)
        self._wire()
        StrayStrokes(cell=self.reading.cell, page=self)
        for drawing in (self.drawing, self.dial):
            StrayStrokes(cell=self.reading.cell, page=drawing)
        (self.reading.cell.focusProxy() or self).installEventFilter(self)
        self._order_tabs()
        self.set_look(look)
        self.show_state()

    # -- parts

    def _make_drawings(self) -> None:
        palette = self._chosen_look.palette
        self.drawing, self.dial, self.ranges = (SheetView(self, palette=palette) for _ in range(3))
        for view, name in (
            (self.drawing, "drawing"),
            (self.dial, "dial"),
            (self.ranges, "ranges"),
        ):
            view.setObjectName(name)
            # A touch explains a mark; it does not take the keyboard from the cell.
            view.setFocusPolicy(Qt.FocusPolicy.TabFocus)
            view.touched.connect(self._explain)
        self._folded = {
            name: self._folding_key(name, words)
            for name, words in (("planes", "Planes"), ("dial", "Dial"))
        }

    def _folding_key(self, name: str, words: str) -> PressKey:
        key = PressKey(words, look=self._look, parent=self)
        key.setObjectName(f"open-{name}")
        key.setCheckable(True)
        key.clicked.connect(lambda: self._open_folded(name))
        key.hide()
        return key

    def _make_entries(self, clock: Callable[[], float]) -> None:
        self.reading = ReadingEntry(self._presenter, look=self._look, parent=self)
        self.form = FormEntry(look=self._look, parent=self, take_parent=self)
        self.act = KeyEntry(clock=clock, look=self._look, parent=self)
        self.beside = Beside(look=self._look, parent=self)

    def _make_verdicts(self) -> None:
        empty = shown_verdict(self._presenter.state.verdict)
        self.verdict = VerdictPane(empty, look=self._look, parent=self)
        self.verdict.setObjectName("verdict")
        self.band = VerdictBand(empty, next_words="Go on", look=self._look, parent=self)
        self.band.setObjectName("band")
        self.band.hide()
        self.badge = VerdictBadge(look=self._look, parent=self)
        self.badge.setObjectName("badge")
        self.reasons = ReasonsPanel(look=self._look, parent=self)
        self.reasons.setObjectName("reasons")

    def _make_foot(self) -> None:
        self.title = TitleBlock(look=self._look, parent=self)
        self.title.setObjectName("title")
        self.foot = FootKeys(look=self._look, parent=self)
        self.foot.setObjectName("foot")
        self.message = MessageStrip(look=self._look, parent=self)
        self.message.setObjectName("message")

    def _wire(self) -> None:
        presenter = self._presenter
        presenter.changed.connect(self.show_state)
        presenter.refused.connect(self._refuse)
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

    def _order_tabs(self) -> None:
        parts: list[QWidget] = [
            self.reading.cell,
            self.act.keys,
            self.form.take,
            self.verdict,
            self.dial,
            self.ranges,
            self.drawing,
            self.title,
        ]
        for before, after in pairwise(parts):
            QWidget.setTabOrder(before, after)

    # -- what is shown

    def show_state(self) -> None:
        """Show the presenter's state, touching only what has changed."""
        state = self._presenter.state
        before, self._state = self._state, state
        self.title.set_title(title_line(state.title))
        self.setAccessibleDescription(state.words)
        self.beside.show_task(state.task)
        self._show_verdict(state)
        self._show_task(state.task)
        keys = foot_keys(state.keys, takes_figures=isinstance(state.task, _TAKES_FIGURES))
        self.foot.set_keys(keys)
        for key in state.keys:
            self.foot.key(key.name).setToolTip(key.hint)
        self._arrange()
        self._draw(state)
        changed_kind = before is None or type(before.task) is not type(state.task)
        if changed_kind or self._lost_keyboard():
            self._back_to_entry()

    def _show_task(self, task: Task) -> None:
        entry = self._entry_of(task)
        closed = self.band.isHidden()
        for other in (self.reading, self.form, self.act):
            other.setVisible(other is entry and closed)
        self.form.take.setVisible(entry is self.form and closed)
        self.verdict.setVisible(closed)
        _SHOW[type(task)](self, task)

    def _entry_of(self, task: Task) -> ReadingEntry | FormEntry | KeyEntry:
        entries: dict[type, ReadingEntry | FormEntry] = {
            ReadingTask: self.reading,
            FormTask: self.form,
        }
        return entries.get(type(task), self.act)

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

    # -- where it lies

    def _fit(self) -> Frame:
        return frame_of(width=self.width(), height=self.height(), look=self._chosen_look)

    def _what_is_wanted(self) -> Wanted:
        state = self._presenter.state
        task = state.task
        ranges = getattr(task, "ranges", None)
        return Wanted(
            curves=bool(state.curves),
            changes=bool(state.changes),
            dial=getattr(task, "dial", None) is not None,
            ranges_height=0.0 if ranges is None else ranges_height(ranges, self._frame),
            wide_entry=not isinstance(task, ReadingTask),
            question_height=self.beside.wanted_height(self.width() * 0.46) / self._frame.growth,
            key_height=self._frame.between(64, 80) if isinstance(task, FormTask) else 0.0,
            keypad=self._figures.keypad_wanted and isinstance(task, _TAKES_FIGURES),
            planes_opened=self._opened["planes"],
            dial_opened=self._opened["dial"],
        )

    def _arrange(self) -> None:
        wanted = self._what_is_wanted()
        if wanted == self._wanted:
            return
        self._wanted = wanted
        self._places = places = places_of(self._frame, wanted)
        for part, place in (
            (self.drawing, places.along),
            (self.dial, places.dial),
            (self.ranges, places.ranges),
            (self.reading, places.entry),
            (self.form, places.entry),
            (self.act, places.entry),
            (self.beside, places.beside),
            (self.form.take, places.take),
            (self.verdict, places.verdict),
            (self.title, places.title),
            (self.foot, places.keys),
            (self.badge, places.badge),
            (self._figures.keypad, places.keypad),
        ):
            part.setGeometry(place)
        self.dial.setVisible(places.has_dial and self.band.isHidden())
        self.ranges.setVisible(not places.ranges.isEmpty())
        self.band.setGeometry(
            places.band.adjusted(places.title.x() + self._margin(), 4, -self._margin(), 0)
        )
        self.reasons.setGeometry(self._reasons_place())
        self._figures.keypad.setVisible(wanted.keypad)
        self._figures.keypad.raise_()
        self.badge.setVisible(wanted.keypad)
        self.band.raise_()
        self.reasons.raise_()
        self.message.raise_()
        self._place_folded()
        self._place_message()
        self._drawn = ()
        self.update()

    def _margin(self) -> int:
        return round(self._frame.between(24, 32) * self._frame.growth)

    def _reasons_place(self) -> QRect:
        band = self._places.band
        left = round(self._frame.across(650, 928) * self._frame.growth) + 1
        return QRect(left, band.top() + 2, self.width() - left, band.height() - 2)

    def _place_folded(self) -> None:
        place = self._places.folded
        shown = {"planes": self._places.folds_planes, "dial": self._places.folds_dial}
        top = place.top()
        for name, key in self._folded.items():
            key.setVisible(shown[name])
            key.setChecked(self._opened[name])
            key.setGeometry(place.left(), top, place.width(), self._look.touch)
            top += (self._look.touch + 4) * shown[name]
            key.raise_()

    def _place_message(self) -> None:
        title = self._places.title
        height = max(self.message.heightForWidth(title.width()), title.height())
        bottom = title.bottom() + 1
        self.message.setGeometry(title.left(), bottom - height, title.width(), height)

    # -- drawings

    def _draw(self, state: BenchState) -> None:
        task = state.task
        picture, ranges = getattr(task, "dial", None), getattr(task, "ranges", None)
        wanted = (
            (state.rotor, state.curves, state.changes, state.change_caption, state.counted),
            picture,
            ranges,
        )
        drawn = self._drawn or (None, None, None)
        if wanted[0] != drawn[0]:
            self._show_sheet(self.drawing, along_sheet(state, self._places, self._enlarged))
        if picture is not None and self._places.has_dial and wanted != drawn:
            sheet = dial_sheet(picture, state, self._frame, self._places, self._enlarged)
            self._show_sheet(self.dial, sheet)
        if ranges is not None and ranges != drawn[2]:
            self._show_sheet(self.ranges, ranges_sheet(ranges, self._frame, self._places))
        self._drawn = wanted

    @staticmethod
    def _show_sheet(view: SheetView, sheet: Any) -> None:  # noqa: ANN401
        if sheet is not None and sheet != view.sheet():
            view.show_sheet(sheet)

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

    def _open_folded(self, name: str) -> None:
        self._opened[name] = not self._opened[name]
        self._arrange()
        self._draw(self._presenter.state)

    def _go_on(self) -> None:
        state = self._presenter.state
        self._band_put_away = state.verdict
        self.show_state()
        self._back_to_entry()
        single: tuple[Key, ...] = getattr(state.task, "keys", ())
        if len(single) == 1:
            self._presenter.press(single[0].name)

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
            self.reading.cell.refuse(what=what, where=where, way_out=way_out)
            return
        self.message.set_message(Message(what=what, where=where, way_out=way_out, key="Try again"))
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

    def focusInEvent(self, event: Any) -> None:  # noqa: ANN401
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

    # -- looks

    def set_look(self, look: Look) -> None:
        """Take another look; the page adds the width that it has itself.

        Parameters
        ----------
        look : Look
            Colours, text scale, and whether it is read from afar.
        """
        self._chosen_look = look
        self._refit(force=True)

    def _refit(self, *, force: bool = False) -> None:
        before, self._frame = self._frame, self._fit()
        if force or before.look != self._frame.look:
            super().set_look(self._frame.look)
            for view in (self.drawing, self.dial, self.ranges):
                view.use_palette(self._chosen_look.palette)
        self._wanted = None
        self._arrange()
        self._draw(self._presenter.state)

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Fit everything to the new size."""
        super().resizeEvent(event)
        self._refit()

    def showEvent(self, event: QShowEvent) -> None:
        """Give the keyboard to what is to be done now."""
        super().showEvent(event)
        self._back_to_entry()

    def paintEvent(self, event: QPaintEvent) -> None:
        """Paint the ground and the lines that part the areas."""
        painter = flat_painter(self)
        look, band = self._look, self._places.band
        painter.fillRect(self.rect(), look.colour(Colour.PAPER))
        wide, thin = round(look.line(LineWidth.WIDE)), round(look.line(LineWidth.NARROW))
        painter.fillRect(QRect(0, band.top(), self.width(), wide), look.colour(Colour.INK2))
        for edge in self._places.dividers if self.band.isHidden() else ():
            line = QRect(edge.left(), edge.top() + wide, max(thin, 1), edge.height() - wide)
            painter.fillRect(line, look.colour(Colour.HAIR))
        painter.end()


def _focused_in(page: QWidget) -> QWidget | None:
    """Find what has the keyboard on the page, also while the window is not in front."""
    found: QWidget | None = page.focusWidget()
    return found


_TAKES_FIGURES = (ReadingTask, FormTask)
_SHOW: dict[type, Callable[[BenchPage, Any], None]] = {
    ReadingTask: BenchPage._show_reading,
    FormTask: BenchPage._show_form,
    KeyTask: BenchPage._show_act,
    WaitTask: BenchPage._show_act,
}
