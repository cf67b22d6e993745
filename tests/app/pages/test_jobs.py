import pytest
from PySide6.QtCore import Qt
from PySide6.QtWidgets import QAbstractButton, QLineEdit

from app.frame.look import Look
from app.pages.jobs import JobsPage
from app.presenters.jobs import JobsPresenter
from models import jobfile
from sample_data.load import pump
from tests.app.open_shop import COMPRESSOR, PUMP


def named(page, name):
    kinds = (QAbstractButton, QLineEdit)
    found = [one for kind in kinds for one in page.findChildren(kind)]
    return next(one for one in found if one.accessibleName() == name)


class Asked:
    """Stands for the dialogs: answers what it was given, and keeps what it was asked."""

    def __init__(self):
        self.path = ""
        self.person = ""
        self.asked = []

    def file(self, title, name, kinds):
        self.asked.append((title, name))
        return self.path

    def who(self, people):
        self.asked.append(tuple(one.key for one in people))
        return self.person


@pytest.fixture
def asked():
    return Asked()


@pytest.fixture
def put_up(qtbot, asked):
    def make(shop, number=""):
        presenter = JobsPresenter(shop.presenter)
        presenter.set_filter("All")
        page = JobsPage(
            presenter,
            look=Look(),
            ask_person=asked.who,
            ask_to_read=asked.file,
            ask_to_write=asked.file,
        )
        qtbot.addWidget(page)
        page.resize(1280, 764)
        with qtbot.waitActive(page):
            page.show()
            page.activateWindow()
        shop.open(number)
        return page

    return make


def test_the_shelf_shows_a_row_for_each_job(put_up, shop):
    page = put_up(shop)

    spoken = [
        page.shelf.model().index(row, 0).data(Qt.ItemDataRole.AccessibleTextRole)
        for row in range(page.shelf.model().rowCount())
    ]
    assert [("HR-4471" in words, "EG-318" in words) for words in spoken] == [
        (True, False),
        (False, True),
    ]


def test_a_word_typed_in_the_search_leaves_only_what_holds_it(put_up, shop, qtbot):
    page = put_up(shop)
    qtbot.keyClicks(named(page, "Search the shelf"), "tannenbruch")

    assert [row.number for row in page.shelf.model_of_rows.rows] == [PUMP]


def test_the_filter_that_is_chosen_stays_pressed(put_up, shop, qtbot):
    page = put_up(shop)
    qtbot.mouseClick(named(page, "Show: Settled"), Qt.MouseButton.LeftButton)

    assert named(page, "Show: Settled").isChecked()
    assert not named(page, "Show: All").isChecked()
    assert [row.number for row in page.shelf.model_of_rows.rows] == [PUMP]


def test_arrow_and_enter_ask_for_the_figures_and_the_figures_change_the_rotor(put_up, shop, qtbot):
    page = put_up(shop, COMPRESSOR)
    page.shelf.setFocus()
    qtbot.keyClick(page.shelf, Qt.Key.Key_Down)
    qtbot.keyClick(page.shelf, Qt.Key.Key_Return)

    field = named(page, "Last figures of the serial")
    assert field.hasFocus()
    qtbot.keyClicks(field, "318")
    qtbot.keyClick(field, Qt.Key.Key_Return)

    assert shop.presenter.job_number == PUMP
    assert not field.isVisible()


def test_wrong_figures_leave_the_question_open_with_a_sentence(put_up, shop, qtbot):
    page = put_up(shop, COMPRESSOR)
    page.shelf.setCurrentIndex(page.shelf.model().index(1, 0))
    qtbot.mouseClick(named(page, "Open at the bench"), Qt.MouseButton.LeftButton)
    field = named(page, "Last figures of the serial")
    qtbot.keyClicks(field, "999")
    qtbot.mouseClick(named(page, "Change the rotor"), Qt.MouseButton.LeftButton)

    assert field.isVisible()
    assert shop.presenter.job_number == COMPRESSOR


def test_escape_stays_with_this_rotor(put_up, shop, qtbot):
    page = put_up(shop, COMPRESSOR)
    page.shelf.setCurrentIndex(page.shelf.model().index(1, 0))
    qtbot.mouseClick(named(page, "Open at the bench"), Qt.MouseButton.LeftButton)
    field = named(page, "Last figures of the serial")
    qtbot.keyClick(field, Qt.Key.Key_Escape)

    assert not field.isVisible()
    assert shop.presenter.job_number == COMPRESSOR


def test_bringing_in_asks_who_does_it_where_nobody_of_the_job_is_signed_in(
    put_up, empty_shop, asked, tmp_path, qtbot
):
    page = put_up(empty_shop)
    asked.path, asked.person = str(tmp_path / "pump.job.json"), pump().people[0].key
    jobfile.write(pump(), asked.path)
    qtbot.mouseClick(named(page, "Bring in a job file …"), Qt.MouseButton.LeftButton)
    empty_shop.settle()

    assert asked.asked[1] == tuple(one.key for one in pump().people)
    qtbot.waitUntil(lambda: [one.number for one in page.shelf.model_of_rows.rows] == [PUMP])


def test_changing_ones_mind_at_the_file_brings_nothing_in(put_up, empty_shop, qtbot):
    page = put_up(empty_shop)
    qtbot.mouseClick(named(page, "Bring in a job file …"), Qt.MouseButton.LeftButton)
    empty_shop.settle()

    assert empty_shop.acts.jobs() == ()
    assert not named(page, "Open at the bench").isEnabled()


def test_the_present_row_is_written_to_the_chosen_file(put_up, shop, asked, tmp_path, qtbot):
    page = put_up(shop)
    asked.path = str(tmp_path / "out.job.json")
    qtbot.mouseClick(named(page, "Write job file …"), Qt.MouseButton.LeftButton)
    shop.settle()

    assert asked.asked == [("Write job file", f"{COMPRESSOR}.job.json")]
    assert jobfile.read(asked.path).number == COMPRESSOR


def test_every_control_has_a_name(put_up, shop):
    page = put_up(shop)
    controls = [*page.findChildren(QAbstractButton), *page.findChildren(QLineEdit), page.shelf]

    assert [one for one in controls if not one.accessibleName()] == []
