"""Wiring: the record, its acts, the threads, the presenters and the window."""

from __future__ import annotations

import gc
import sys
from collections.abc import Callable
from functools import partial
from pathlib import Path

from PySide6.QtWidgets import QApplication, QWidget

from app.benches import Bench
from app.frame.look import Look
from app.last_resort import LastResort, ask_dialog, show_dialog
from app.pages.backups import BackupsPage
from app.pages.bench.page import BenchPage
from app.pages.handbook import HandbookPage
from app.pages.inspection import InspectionPage
from app.pages.jobs import JobsPage
from app.pages.plan import PlanPage
from app.pages.register.instruments import InstrumentsLeaf
from app.pages.register.materials import MaterialsLeaf
from app.pages.register.page import RegisterPage
from app.pages.story import StoryPage
from app.presenters.background import Background
from app.presenters.backups import BackupsPresenter
from app.presenters.bench.bench import BenchPresenter
from app.presenters.handbook import HandbookPresenter
from app.presenters.inspection import InspectionPresenter
from app.presenters.instruments import InstrumentsPresenter
from app.presenters.jobs import JobsPresenter
from app.presenters.keys import KeysPresenter
from app.presenters.materials import MaterialsPresenter
from app.presenters.plan import PlanPresenter
from app.presenters.register import RegisterPresenter
from app.presenters.shop import Said, ShopPresenter
from app.presenters.story import StoryPresenter
from app.presenters.telling.telling import TellingPresenter
from app.presenters.writing import Writer
from app.settings import Settings, shop_folder
from app.style.theme import apply_theme
from app.style.tokens import load_fonts
from app.window import BENCH, HANDBOOK, Window
from models.acts import Acts, Instruments, Keys
from models.record.errors import (
    DiskFaultError,
    DiskFullError,
    LockedRecordError,
    NetworkFolderError,
    ReadOnlyError,
    RecordError,
    RecordMovedError,
)
from models.record.folders import low_space_words, network_kind, network_words
from models.record.store import Store

__all__ = ["SURROUNDINGS", "Opened", "run"]

SURROUNDINGS = (LockedRecordError, DiskFullError, DiskFaultError, ReadOnlyError, RecordMovedError)
"""Trouble that may be over when the same act is tried again."""


class Opened:
    """A shop that is open in a window, and everything that has to be closed with it."""

    def __init__(self, store: Store, settings: Settings, *, secrets: Path | None = None) -> None:
        self._store = store
        self.settings = settings
        self._acts = Acts(store)
        self.writer = Writer(surroundings=SURROUNDINGS)
        self.background = Background()
        self.keys = KeysPresenter(Keys(store, self._acts, secrets=secrets), self.writer)
        self.shop = ShopPresenter(self._acts, self.writer, self.background, keys=self.keys)
        self.window = Window(self.shop, settings, make_bench=self._make_bench)
        self._add_desks()

    def _add_desks(self) -> None:
        window, look = self.window, Look()
        self.jobs = JobsPresenter(self.shop)
        self.jobs.set_filter(self.settings.of_shop("filter", ""))
        self.jobs.rows_changed.connect(
            lambda: self.settings.keep_for_shop("filter", self.jobs.filter)
        )
        self.jobs.opened.connect(lambda _number: window.show_desk(BENCH))
        self.jobs.opened.connect(lambda _number: self._warn_of_space())
        window.add_desk("Jobs", JobsPage(self.jobs, look=look, ask_person=window.ask_person))
        window.add_desk("Plan", PlanPage(PlanPresenter(self.shop), look=look))
        window.add_desk(BENCH, None)
        inspection = InspectionPresenter(self.shop)
        telling = TellingPresenter(self.shop)
        window.listen_to(telling)
        window.add_desk("Inspection", InspectionPage(inspection, telling=telling, look=look))
        window.add_desk("Witness", StoryPage(StoryPresenter(self.shop), look=look))
        register = RegisterPresenter(self.shop, self.keys)
        self.materials = MaterialsPresenter(self.shop)
        instruments = InstrumentsPresenter(self.shop, Instruments(self._store))
        window.listen_to(instruments)
        leaves = (
            ("Instruments", InstrumentsLeaf(instruments, look=look)),
            ("Materials", MaterialsLeaf(self.materials, look=look)),
        )
        window.add_desk("Register", RegisterPage(register, look=look, more=leaves))
        window.add_desk(HANDBOOK, HandbookPage(HandbookPresenter(), look=look))
        self.backups = BackupsPresenter(
            self.shop,
            self._store,
            second_folder=self.settings.of_shop("second backup folder"),
            keep_second_folder=partial(self.settings.keep_for_shop, "second backup folder"),
        )
        window.add_desk("Backups", BackupsPage(self.backups, look=look))

    def _make_bench(self, job: str, person: str, look: Look, parent: QWidget) -> Bench:
        presenter = BenchPresenter(self._acts, self.writer, job, person, keys=self.keys)
        page = BenchPage(presenter, look, parent=parent)
        presenter.setParent(page)
        page.foot.pressed.connect(self._leave)
        return Bench(page=page, person=person, sign_in=presenter.sign_in, reload=presenter.reload)

    def _leave(self, key: str) -> None:
        if key == "leave":
            self.window.leave_bench()

    def show(self, *, sign_in: str | None, job: str | None) -> None:
        """Show the window, with who was signed in and what lay on the desks last.

        Parameters
        ----------
        sign_in, job : str or None
            Key and number that go before what is remembered.
        """
        self.shop.sign_in(sign_in or self.settings.of_shop("person"))
        self.shop.choose_job(job or self.settings.of_shop("job"))
        self.window.open()
        if job is not None:
            # Whoever names a job wants to work on it.
            self.window.show_desk(BENCH)
        self.shop.read_shelf()
        folder = self._store.path.parent
        if self._store.is_alone:
            words = network_words(folder, network_kind(folder))
            self.shop.said.emit(Said(what="This record lies on a network folder.", way_out=words))
        self._warn_of_space()

    def _warn_of_space(self) -> None:
        words = low_space_words(self._store.path.parent)
        if words:
            self.shop.said.emit(Said(what=words))

    def close(self) -> None:
        """End the threads and give the record back."""
        self.backups.close()
        self.background.close()
        self.writer.close()
        self._store.close()


def run(folder: Path, *, sign_in: str | None, job: str | None) -> int:
    """Open a shop's record in a window, until it is closed.

    Parameters
    ----------
    folder : Path
        Folder of the record.
    sign_in, job : str or None
        Who is signed in and which job is on the desks; None takes what is remembered.

    Returns
    -------
    int
        Exit status of the window.

    Raises
    ------
    RecordError
        If the record cannot be opened; it has been said in a dialog by then.
    """
    application = QApplication.instance()
    if not isinstance(application, QApplication):
        application = QApplication(sys.argv[:1])
    application.setApplicationName("Third Journal")
    application.setStyle("Fusion")
    settings = Settings(folder=folder)
    load_fonts()
    apply_theme(
        application=application,
        appearance=settings.appearance,
        text_scale=settings.text_scale,
    )
    store = open_store(folder, tell=show_dialog, ask_alone=partial(_go_on_alone, settings))
    last_resort = LastResort()
    last_resort.install()
    opened = Opened(store, settings)
    # What stays as long as the window is left out of every later collection: one over all of it
    # holds the window up for a tenth of a second while a traveler is written.
    gc.freeze()
    opened.background.working.connect(_freeze_when_idle)
    try:
        opened.show(sign_in=sign_in, job=job)
        opened.backups.begin()
        return application.exec()
    finally:
        opened.close()
        last_resort.remove()
        gc.unfreeze()


def _go_on_alone(settings: Settings, words: str) -> bool:
    """Ask once whether to go on with a record on a network folder; yes is remembered."""
    if settings.of_shop("network folder") == "alone":
        return True
    if not ask_dialog(words, yes="Go on alone", no="Leave"):
        return False
    settings.keep_for_shop("network folder", "alone")
    return True


def _freeze_when_idle(words: str) -> None:
    if not words:
        gc.freeze()


def open_store(
    folder: Path,
    *,
    tell: Callable[[str], None],
    ask_alone: Callable[[str], bool] = lambda _: False,
) -> Store:
    """Open the record of a folder; the user's own folder is made where it is missing.

    Parameters
    ----------
    folder : Path
        Folder of the record.
    tell : callable
        Says a sentence to whoever sits at the screen.
    ask_alone : callable
        Says what follows from a network folder, and gives whether to go on all the same.

    Returns
    -------
    Store
        The open record.

    Raises
    ------
    RecordError
        If it cannot be opened; it has been told by then.
    """
    if folder == shop_folder():
        folder.mkdir(parents=True, exist_ok=True)
    try:
        return Store.open(folder)
    except NetworkFolderError as trouble:
        if not ask_alone(str(trouble)):
            raise
    except RecordError as trouble:
        tell(str(trouble))
        raise
    try:
        return Store.open(folder, on_network=True)
    except RecordError as trouble:
        tell(str(trouble))
        raise
