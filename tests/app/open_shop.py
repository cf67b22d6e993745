"""A shop with the two invented jobs, open in a window, with settings of its own."""

import shutil
import uuid

import pytest

from app.presenters.background import Background
from app.presenters.shop import ShopPresenter
from app.presenters.writing import Writer
from app.settings import Settings
from app.start import SURROUNDINGS, Opened
from models.acts import Acts
from models.record.store import Store
from sample_data.load import compressor, pump

COMPRESSOR, PUMP = "26-0417", "EG-2026-61"


@pytest.fixture(scope="session")
def made_shop(tmp_path_factory):
    folder = tmp_path_factory.mktemp("made shop")
    with Store.open(folder, station_name="stand 1") as store:
        for job in (compressor(), pump()):
            by = next(one.key for one in job.people if one.role == "technician")
            Acts(store).bring_in(job, by=by, act_id=str(uuid.uuid4()))
    return folder


@pytest.fixture
def shop_folder(made_shop, tmp_path):
    folder = tmp_path / "shop"
    shutil.copytree(made_shop, folder)
    return folder


class Shop:
    """The shared presenter over a record, without any window."""

    def __init__(self, folder, qtbot):
        self.store = Store.open(folder)
        self.acts = Acts(self.store)
        self.writer = Writer(surroundings=SURROUNDINGS)
        self.background = Background()
        self.presenter = ShopPresenter(self.acts, self.writer, self.background)
        self.said = []
        self.presenter.said.connect(self.said.append)
        self._qtbot = qtbot

    def settle(self):
        """Wait until nothing is being read, worked out or written."""
        self._qtbot.waitUntil(
            lambda: self.background.is_idle and self.writer.is_idle, timeout=20000
        )

    def open(self, number="", person=""):
        self.presenter.sign_in(person)
        self.presenter.choose_job(number)
        self.presenter.read_shelf()
        self.settle()

    def close(self):
        self.background.close()
        self.writer.close()
        self.store.close()


@pytest.fixture
def shop(shop_folder, qtbot):
    made = Shop(shop_folder, qtbot)
    yield made
    made.close()


@pytest.fixture
def empty_shop(tmp_path, qtbot):
    folder = tmp_path / "empty shop"
    folder.mkdir()
    made = Shop(folder, qtbot)
    yield made
    made.close()


@pytest.fixture
def open_window(qtbot, tmp_path):
    """Open a folder in a window, with settings that belong to this test alone."""
    made = []

    def open_it(folder, *, sign_in="", job="", settle=True):
        settings = Settings(folder=folder, file=tmp_path / "window.ini")
        opened = Opened(Store.open(folder), settings)
        made.append(opened)
        qtbot.addWidget(opened.window)
        opened.show(sign_in=sign_in or None, job=job or None)

        def wait():
            qtbot.waitUntil(
                lambda: all(
                    part.is_idle for part in (opened.backups, opened.background, opened.writer)
                ),
                timeout=20000,
            )

        opened.settle = wait
        if settle:
            wait()
        return opened

    yield open_it
    for opened in made:
        opened.window.close()
        opened.close()
