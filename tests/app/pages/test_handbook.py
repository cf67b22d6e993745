import pytest
from PySide6.QtCore import Qt

from app.frame.look import Look
from app.pages.handbook import HandbookPage
from app.presenters.handbook import HandbookPresenter
from app.window import HANDBOOK
from models.handbook import every_entry
from models.rules import ALL_RULES
from tests.app.open_shop import COMPRESSOR


@pytest.fixture
def page(qtbot):
    made = HandbookPage(HandbookPresenter(), look=Look())
    qtbot.addWidget(made)
    made.resize(1280, 764)
    with qtbot.waitActive(made):
        made.show()
        made.activateWindow()
    return made


def lines_of(page):
    return {one.what: one.says for one in page.page.model_of_rows.rows}


def test_everything_is_listed_and_the_first_page_is_open(page):
    assert page.entries.model_of_rows.rows == every_entry()
    assert page._standing.text().startswith(f"{len(ALL_RULES)} rules and ")
    assert lines_of(page)["says"] == every_entry()[0].statement


def test_typing_a_number_s_name_opens_the_formula_behind_it(page, qtbot):
    page.line.setFocus()
    qtbot.keyClicks(page.line, "least pressure")

    told = lines_of(page)
    assert told["formula"].startswith("p = Δ/d")
    assert "Shigley" in told["source"]
    assert "12.6: Brown in SI" in told["compared with"]
    assert told["second path"].splitlines()[-1] == "tests/second_paths/ring.py"
    assert "the pressure is the one printed (tests/engineering/test_fits.py)" in told["tests"]


def test_enter_goes_to_what_was_found_and_the_arrow_opens_the_next(page, qtbot):
    page.line.setFocus()
    qtbot.keyClicks(page.line, "least pressure")
    qtbot.keyClick(page.line, Qt.Key.Key_Return)
    qtbot.keyClick(page.entries, Qt.Key.Key_Down)

    assert page.entries.hasFocus()
    assert lines_of(page)["formula"].startswith("Δ_loss = k")


def test_escape_lists_everything_again(page, qtbot):
    qtbot.keyClicks(page.line, "least pressure")
    qtbot.keyClick(page.line, Qt.Key.Key_Escape)

    assert page.line.text() == ""
    assert page.entries.model_of_rows.rows == every_entry()


def test_words_that_stand_nowhere_leave_an_empty_page_and_a_way_out(page, qtbot):
    qtbot.keyClicks(page.line, "zyzzyva")

    assert page._standing.text() == (
        "Nothing is found on “zyzzyva”: try fewer words, or none for all of it."
    )
    assert lines_of(page) == {}


def test_the_handbook_opens_at_the_finding_in_front(shop_folder, open_window, qtbot):
    opened = open_window(shop_folder, sign_in="BQ", job=COMPRESSOR)
    opened.settle()
    opened.window.show_desk("Inspection")
    opened.settle()
    with qtbot.waitActive(opened.window):
        opened.window.activateWindow()
    qtbot.keyClick(opened.window, Qt.Key.Key_H, Qt.KeyboardModifier.ControlModifier)

    assert opened.window.present_desk == HANDBOOK
    page = opened.window.findChild(HandbookPage)
    assert page.line.text() == "every-step-settled"
    assert page.entries.model_of_rows.rows[0].name == "every-step-settled"


def test_the_handbook_opens_at_the_verdict_of_the_bench(shop_folder, open_window, qtbot):
    opened = open_window(shop_folder, sign_in="AT", job=COMPRESSOR)
    opened.settle()
    opened.window.show_desk("Bench")
    opened.settle()
    bench = opened.window._stack.currentWidget()
    verdict = bench._presenter.state.verdict
    opened.window.open_handbook()

    page = opened.window.findChild(HandbookPage)
    assert page.line.text() == (verdict.rules[0] if verdict.rules else "")
    assert opened.window.present_desk == HANDBOOK
