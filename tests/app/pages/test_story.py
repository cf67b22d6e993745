import pytest
from PySide6.QtCore import Qt

from app.frame.look import Look
from app.pages.story import StoryPage
from app.presenters.story import StoryPresenter
from tests.app.open_shop import COMPRESSOR


@pytest.fixture
def page(shop, qtbot):
    made = StoryPage(StoryPresenter(shop.presenter), look=Look())
    qtbot.addWidget(made)
    made.resize(1280, 764)
    with qtbot.waitActive(made):
        made.show()
        made.activateWindow()
    shop.open(COMPRESSOR)
    return made


def test_the_latest_chapter_is_open_first(page):
    assert page.chapters.present_row.title == "Step 6, Spacer between stages 3 and 4"


def test_walking_up_tells_the_chapter_before(page, qtbot):
    page.chapters.setFocus()
    qtbot.keyClick(page.chapters, Qt.Key.Key_Up)

    assert page.chapters.present_row.title == "Step 5, Impeller, third stage"
    assert " changed " in page.sheet.accessibleDescription()


def test_each_chapter_is_another_drawing(page, qtbot):
    drawn = set()
    for row in range(page.chapters.model().rowCount()):
        page.chapters.selectRow(row)
        drawn.add(page.sheet.sheet().items)

    assert len(drawn) == page.chapters.model().rowCount()


def test_nothing_on_the_desk_writes(page, shop, qtbot):
    before = len(shop.acts.read(COMPRESSOR).entries)
    for key in (Qt.Key.Key_Return, Qt.Key.Key_Space, Qt.Key.Key_Delete):
        qtbot.keyClick(page.chapters, key)
    shop.settle()

    assert len(shop.acts.read(COMPRESSOR).entries) == before
