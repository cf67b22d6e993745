"""The parts of the bench: what there is on the page, where it lies, and what is drawn on it."""

from __future__ import annotations

from collections.abc import Callable
from itertools import pairwise

from PySide6.QtCore import QRect, Qt
from PySide6.QtGui import QPaintEvent, QResizeEvent
from PySide6.QtWidgets import QWidget

from app.drawing.view import SheetView
from app.frame.foot import FootKeys, TitleBlock
from app.frame.key import Key as PressKey
from app.frame.look import Look
from app.frame.messages import MessageStrip
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
from app.pages.bench.presenting import BenchPresenting
from app.pages.bench.reading_entry import ReadingEntry
from app.pages.bench.reasons_panel import ReasonsPanel
from app.pages.bench.shown import shown_verdict
from app.presenters.bench.state import BenchState, FormTask, ReadingTask, Task
from reports.palette import Colour
from reports.sheet.elements import Sheet
from reports.sheet.medium import LineWidth

__all__ = ["TAKES_FIGURES", "BenchParts"]

TAKES_FIGURES = (ReadingTask, FormTask)
"""Tasks into which the keypad can type."""


class BenchParts(PlainWidget):
    """Everything on the bench in its place; what it does is the page's part.

    Parameters
    ----------
    presenter : BenchPresenting
        Gives the state.
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
        clock: Callable[[], float],
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Bench", look=look, parent=parent)
        self.setObjectName("bench")
        self.setMinimumSize(*SMALLEST)
        self._presenter = presenter
        self._chosen_look = look
        self._drawn: tuple[object, ...] = ()
        self._wanted: Wanted | None = None
        self._frame = self._fit()
        self._places = places_of(self._frame, Wanted())
        self._enlarged = Magnification()
        self._opened = {"planes": False, "dial": False}
        self._make_drawings()
        self._make_entries(clock)
        self._make_verdicts()
        self._make_foot()
        self._figures = Figures(entry=self.reading, form=self.form, look=look, parent=self)
        self._order_tabs()

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

    def _entry_of(self, task: Task) -> ReadingEntry | FormEntry | KeyEntry:
        entries: dict[type, ReadingEntry | FormEntry] = {
            ReadingTask: self.reading,
            FormTask: self.form,
        }
        return entries.get(type(task), self.act)

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
            entry_height=self._entry_of(task).asked_height(self._usual_width())
            / self._frame.growth,
            key_height=self._frame.between(64, 80) if isinstance(task, FormTask) else 0.0,
            keypad=self._figures.keypad_wanted and isinstance(task, TAKES_FIGURES),
            planes_opened=self._opened["planes"],
            dial_opened=self._opened["dial"],
        )

    def _usual_width(self) -> int:
        return round(self._frame.across(924, 1380) * self._frame.growth)

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
    def _show_sheet(view: SheetView, sheet: Sheet | None) -> None:
        if sheet is not None and sheet != view.sheet():
            view.show_sheet(sheet)

    def _open_folded(self, name: str) -> None:
        self._opened[name] = not self._opened[name]
        self._arrange()
        self._draw(self._presenter.state)

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
