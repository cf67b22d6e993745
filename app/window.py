"""The window: a line of desks, a strip for trouble, and the desk in front."""

from __future__ import annotations

from collections.abc import Callable
from functools import partial

from PySide6.QtCore import Qt
from PySide6.QtGui import QCloseEvent, QGuiApplication, QKeySequence, QResizeEvent, QShortcut
from PySide6.QtWidgets import QStackedWidget, QVBoxLayout, QWidget

from app.benches import Benches, MakeBench
from app.frame.desks import DesksLine
from app.frame.look import Look
from app.frame.messages import Message, MessageStrip
from app.pages.ask_form import AskForm
from app.pages.desk import DeskPage, Judged
from app.pages.handbook import HandbookPage
from app.pages.people import PeopleDialog
from app.presenters.asker import Asker
from app.presenters.keys import Asking, KeysPresenter
from app.presenters.shop import Said, ShopPresenter
from app.presenters.wording import person_words
from app.settings import Settings
from app.style.theme import TEXT_SCALES, Appearance, apply_theme, palette_for
from models.job import Person

__all__ = ["BENCH", "HANDBOOK", "Window"]

BENCH = "Bench"
"""The desk that is made for every job anew, once somebody opens it there."""

HANDBOOK = "Handbook"
"""The desk that says where every verdict and number comes from."""


_LEAST_SIZE = (1280, 800)
_NOBODY = "Who is at the window?"


class Window(QWidget):
    """Shows one desk at a time; knows who is signed in and how it is to look."""

    def __init__(
        self,
        shop: ShopPresenter,
        settings: Settings,
        *,
        make_bench: MakeBench,
        ask_person: Callable[[tuple[Person, ...]], str] | None = None,
    ) -> None:
        super().__init__()
        self._shop = shop
        self._settings = settings
        self._ask = ask_person or self.ask_person
        self._far = False
        self._trouble: Exception | None = None
        self._closing = False
        self._close_anyway = False
        self._last_in: dict[QWidget, QWidget] = {}
        self._pages: dict[str, QWidget] = {}
        self._form: AskForm | None = None
        self._look = self._wanted_look()
        self.setWindowTitle("Third Journal")
        self.setMinimumSize(1024, 640)
        self._column = QVBoxLayout(self)
        self._column.setContentsMargins(0, 0, 0, 0)
        self._column.setSpacing(0)
        self._line: DesksLine | None = None
        self._strip = MessageStrip(look=self._look, parent=self)
        self._strip.way_out_taken.connect(self._way_out)
        self._stack = QStackedWidget(self)
        self._benches = Benches(shop, self._stack, make_bench=make_bench, window=self)
        self._column.addWidget(self._strip)
        self._column.addWidget(self._stack, 1)
        shop.said.connect(self._say)
        shop.background.working.connect(self._say_working)
        shop.writer.failed.connect(self._say_trouble)
        shop.writer.written.connect(self._trouble_is_over)
        shop.writer.idle.connect(self._written_out)
        shop.person_changed.connect(self._person_changed)
        shop.job_changed.connect(self._job_changed)
        shop.shelf_changed.connect(self._shelf_changed)
        if shop.keys is not None:
            self.listen_to(shop.keys)

    # -- desks

    def add_desk(self, name: str, page: QWidget | None) -> None:
        """Put up a desk; None stands for the bench, which is made when it is needed.

        Parameters
        ----------
        name : str
            Its word in the line of desks.
        page : QWidget or None
            The desk.
        """
        if page is None:
            page = self._benches.closed
        self._pages[name] = page
        self._stack.addWidget(page)

    def open(self) -> None:
        """Put up the line of desks and the keys, and show the window as it stood last."""
        self._line = DesksLine(tuple(self._pages), look=self._look, parent=self)
        self._line.desk_chosen.connect(self.show_desk)
        self._line.person_pressed.connect(self._choose_person)
        self._column.insertWidget(0, self._line)
        self._make_shortcuts()
        self._person_changed()
        self._apply_look()
        self.resize(*_LEAST_SIZE)
        if self._settings.geometry is not None:
            self.restoreGeometry(self._settings.geometry)
        first = next(iter(self._pages))
        kept = self._settings.of_shop("desk", first)
        self.show_desk(kept if kept in self._pages else first)
        self.show()

    @property
    def desks(self) -> tuple[str, ...]:
        """The desks that are put up, in the order of their line."""
        return tuple(self._pages)

    @property
    def look(self) -> Look:
        """How the window looks now."""
        return self._look

    @property
    def message(self) -> Message | None:
        """What the strip says, None where it says nothing."""
        return self._strip.message

    @property
    def present_desk(self) -> str:
        """The desk in front."""
        return self._line.present if self._line is not None else ""

    def show_desk(self, name: str) -> None:
        """Bring a desk to the front.

        Parameters
        ----------
        name : str
            Its word in the line of desks.
        """
        if self._line is None or name not in self._pages:
            return
        self._line.set_present(name)
        if name == BENCH:
            self._benches.show(self._look)
        else:
            page = self._pages[name]
            self._stack.setCurrentWidget(page)
            self._shop.refresh()
            if isinstance(page, DeskPage):
                page.refresh()
                page.entrance().setFocus()
        self._show_trouble()
        self._settings.keep_for_shop("desk", name)

    def open_handbook(self) -> None:
        """Open the handbook at what the desk in front has a verdict on, if it has one."""
        before: object = self._stack.currentWidget()
        page = self._pages.get(HANDBOOK)
        if before is page:
            return
        words = before.handbook_words() if isinstance(before, Judged) else ""
        self.show_desk(HANDBOOK)
        if words and isinstance(page, HandbookPage):
            page.search(words)

    def leave_bench(self) -> None:
        """Sign out: the desk is locked, the record is not."""
        self._shop.sign_in("")
        self.show_desk(next(iter(self._pages)))

    def _shelf_changed(self) -> None:
        if self.present_desk == BENCH and self._benches.is_closed:
            self._benches.show(self._look)

    def _job_changed(self) -> None:
        rotor = self._shop.job.plan.rotor.serial if self._shop.job is not None else ""
        self.setWindowTitle(f"{rotor} – Third Journal" if rotor else "Third Journal")
        self._settings.keep_for_shop("job", self._shop.job_number)
        self._person_changed()

    # -- people

    def _person_changed(self) -> None:
        if self._line is None:
            return
        person = self._shop.person
        self._line.set_person(person_words(person) if person is not None else _NOBODY)
        self._settings.keep_for_shop("person", self._shop.person_key)
        if self.present_desk == BENCH:
            self._benches.show(self._look)

    def _choose_person(self) -> None:
        if not self._shop.people:
            self._say(Said(what="Nobody is known here yet.", way_out="Bring in a job file first."))
            return
        key = self._ask(self._shop.people)
        if key:
            self._shop.sign_in(key)

    def ask_person(self, people: tuple[Person, ...]) -> str:
        """Ask who is at the window.

        Parameters
        ----------
        people : tuple of Person
            Whom to choose from.

        Returns
        -------
        str
            The person's key, or nothing.
        """
        dialog = PeopleDialog(
            people,
            asks="Who is at the window?",
            look=self._look,
            present=self._shop.person_key,
            keyed=self._shop.keys is not None and self._shop.keys.needs_key,
            parent=self,
        )
        dialog.exec()
        chosen = dialog.chosen
        dialog.deleteLater()
        return chosen

    def listen_to(self, asker: Asker | KeysPresenter) -> None:
        """Show the forms of whoever asks.

        Parameters
        ----------
        asker : Asker or KeysPresenter
            Who asks, and does something with the answers.
        """
        asker.asked.connect(lambda asking: self.ask_form(asking, asker))
        asker.refused.connect(self._say_refused)

    def ask_form(self, asking: Asking, asker: Asker | KeysPresenter) -> None:
        """Show a form; it stays until it is done or given up.

        Parameters
        ----------
        asking : Asking
            What it says and asks.
        asker : Asker or KeysPresenter
            Who gets the answers.
        """
        dialog = AskForm(asking, look=self._look, parent=self)
        dialog.answered.connect(asker.answer)
        dialog.given_up.connect(asker.give_up)
        self._form = dialog
        asker.refused.connect(dialog.refuse)
        asker.finished.connect(dialog.accept)
        dialog.finished.connect(self._form_is_gone)
        dialog.open()

    def _form_is_gone(self) -> None:
        if self._form is not None:
            self._form.deleteLater()
            self._form = None

    def _say_refused(self, words: str) -> None:
        """Say what was refused before there was a form to say it in."""
        if self._form is None:
            self._say(Said(what=words))

    # -- what is said

    def _say(self, said: Said) -> None:
        if self._shop.writer.is_halted:
            return
        self._strip.set_message(Message(what=said.what, way_out=said.way_out, trouble=False))

    def _say_working(self, words: str) -> None:
        self.setProperty("working", words)
        message = self._strip.message
        if message is not None and (message.trouble or not message.what.startswith("Working: ")):
            return
        # What is read in a blink is said on its desk; what is written to a file may take long.
        slow = words.startswith("writing")
        shown = Message(what=f"Working: {words} …", trouble=False) if slow else None
        self._strip.set_message(shown)

    def _say_trouble(self, error: Exception) -> None:
        self._trouble = error
        self._show_trouble()

    def _show_trouble(self) -> None:
        """Say what keeps the record from being written; the bench says it in its own place."""
        at_bench = self.present_desk == BENCH and not self._benches.why_closed()
        said = self._strip.message is not None and self._strip.message.trouble
        if self._trouble is not None and not at_bench:
            self._strip.set_message(
                Message(
                    what=str(self._trouble),
                    way_out="What waits to be written is kept here.",
                    key="Try again",
                )
            )
        elif said:
            self._strip.set_message(None)

    def _way_out(self) -> None:
        self._trouble = None
        self._close_anyway = False
        self._show_trouble()
        self._shop.writer.try_again()

    def _trouble_is_over(self) -> None:
        self._trouble = None
        self._show_trouble()

    # -- look

    def _wanted_look(self) -> Look:
        motion = QGuiApplication.styleHints()
        return Look(
            palette=palette_for(appearance=self._settings.appearance),
            window_width=float(max(self.width(), 1)),
            text_scale=self._settings.text_scale,
            less_motion=motion.cursorFlashTime() <= 0,
            far=self._far,
        )

    def _apply_look(self) -> None:
        self._look = self._wanted_look()
        application = QGuiApplication.instance()
        if isinstance(application, QGuiApplication):
            apply_theme(
                application=application,
                appearance=self._settings.appearance,
                text_scale=self._settings.text_scale,
            )
        for part in (self._line, self._strip, *self._pages.values(), *self._benches.pages):
            set_look = getattr(part, "set_look", None)
            if set_look is not None:
                set_look(self._look)
        if self._line is not None:
            # A crowded desk below must not press the line of desks together.
            self._line.setFixedHeight(self._line.sizeHint().height())

    def next_appearance(self) -> None:
        """Change from light to dark, to contrast, and back."""
        order = list(Appearance)
        place = order.index(self._settings.appearance)
        self._settings.keep_appearance(order[(place + 1) % len(order)])
        self._apply_look()

    def grow_text(self, steps: int) -> None:
        """Choose a larger or smaller text scale; none goes back to the middle one.

        Parameters
        ----------
        steps : int
            How many larger; 0 is the scale as drawn [-].
        """
        place = TEXT_SCALES.index(self._settings.text_scale) + steps
        scale = TEXT_SCALES[min(max(place, 0), len(TEXT_SCALES) - 1)] if steps else 1.0
        self._settings.keep_text_scale(scale)
        self._apply_look()

    def toggle_far(self) -> None:
        """Show the bench for reading from three metres, or from close by."""
        self._far = not self._far
        self._apply_look()

    def toggle_full_screen(self) -> None:
        """Fill the screen, or stand in a frame again."""
        self.setWindowState(self.windowState() ^ Qt.WindowState.WindowFullScreen)

    # -- keys

    def _make_shortcuts(self) -> None:
        for number, name in enumerate(self._pages, start=1):
            self._on(f"Ctrl+{number}", partial(self.show_desk, name))
        self._on("F6", self.next_area)
        self._on("F9", self.toggle_far)
        self._on("F11", self.toggle_full_screen)
        self._on("Ctrl+L", self.next_appearance)
        self._on("Ctrl+H", self.open_handbook)
        for keys in ("Ctrl++", "Ctrl+="):
            self._on(keys, lambda: self.grow_text(1))
        self._on("Ctrl+-", lambda: self.grow_text(-1))
        self._on("Ctrl+0", lambda: self.grow_text(0))

    def _on(self, keys: str, act: Callable[[], None]) -> None:
        shortcut = QShortcut(QKeySequence(keys), self)
        shortcut.activated.connect(act)

    def next_area(self) -> None:
        """Give the keyboard to the next area: the desk, the line of desks, the strip."""
        areas = [part for part in (self._stack.currentWidget(), self._line, self._strip) if part]
        areas = [part for part in areas if part.isVisible()]
        here: QWidget | None = self.focusWidget()
        inside = -1
        for place, part in enumerate(areas):
            if here is not None and part.isAncestorOf(here):
                inside = place
                self._last_in[part] = here
        for step in range(1, len(areas) + 1):
            target = self._entrance(areas[(inside + step) % len(areas)])
            if target is not None:
                target.setFocus(Qt.FocusReason.ShortcutFocusReason)
                return

    def _entrance(self, area: QWidget) -> QWidget | None:
        """Find where the keyboard goes in an area: where it was last, or its first control."""
        last = self._last_in.get(area)
        if last is not None and last.isVisible() and last.isEnabled():
            return last
        return _first_control(area)

    # -- the window itself

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Look as the new width asks for."""
        super().resizeEvent(event)
        if self._line is not None and event.oldSize().width() != event.size().width():
            self._apply_look()

    def closeEvent(self, event: QCloseEvent) -> None:
        """Keep how the window stood; what waits to be written is written first."""
        writer = self._shop.writer
        if not writer.is_idle and not self._close_anyway:
            event.ignore()
            self._closing = True
            if writer.is_halted:
                self._close_anyway = True
                self._strip.set_message(
                    Message(
                        what="Something is not on the disk yet.",
                        way_out="Try again; or close once more, and it is lost.",
                        key="Try again",
                    )
                )
            return
        self._settings.keep_geometry(self.saveGeometry())
        self._settings.write()
        super().closeEvent(event)

    def _written_out(self) -> None:
        if self._closing:
            self._closing = False
            self.close()


def _first_control(area: QWidget) -> QWidget | None:
    tab = Qt.FocusPolicy.TabFocus.value
    for child in area.findChildren(QWidget):
        if child.isVisibleTo(area) and child.isEnabled() and child.focusPolicy().value & tab:
            return child
    return None
