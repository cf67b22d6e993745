import pytest
from PySide6.QtCore import Qt

from app.frame.look import Look
from app.pages.plan import LACKS, STATIONS, STEPS, PlanPage
from app.presenters.plan import PlanPresenter
from reports.palette import DARK
from tests.app.open_shop import COMPRESSOR, PUMP


@pytest.fixture
def page(shop, qtbot):
    made = PlanPage(PlanPresenter(shop.presenter), look=Look())
    qtbot.addWidget(made)
    made.resize(1280, 764)
    with qtbot.waitActive(made):
        made.show()
        made.activateWindow()
    shop.open(COMPRESSOR)
    return made


def test_the_drawing_names_rotor_and_stations(page):
    marks = {mark.name for mark in page.sheet.sheet().marks}

    assert "HR-4471" in page.sheet.accessibleName()
    assert {"station J1", "station J2", "station K3"} <= marks


def test_walking_down_the_steps_makes_the_parts_stand_out_in_turn(page, qtbot):
    table = page.tables[STEPS]
    table.setFocus()
    drawn = []
    for _ in range(3):
        drawn.append(page.sheet.sheet())
        qtbot.keyClick(table, Qt.Key.Key_Down)

    assert table.present_row.number == "4"
    assert len({sheet.items for sheet in drawn}) == 3


def test_a_key_turns_to_what_is_lacking_and_says_how_much(page, qtbot):
    key = page.leaves._keys[LACKS]
    qtbot.mouseClick(key, Qt.MouseButton.LeftButton)

    assert page.leaves.present == LACKS
    assert key.accessibleName() == f"{LACKS}: {page.tables[LACKS].model().rowCount()}"
    assert page.tables[LACKS].isVisible()
    assert not page.tables[STEPS].isVisible()


def test_another_job_brings_its_own_plan(page, shop):
    shop.presenter.choose_job(PUMP)
    shop.settle()

    assert "EG-318" in page.sheet.accessibleName()
    assert page.tables[STATIONS].model().rowCount() == len(shop.presenter.job.plan.stations)


def test_the_drawing_takes_over_the_look(page):
    page.set_look(Look(palette=DARK))

    assert page.sheet._palette is DARK


def test_the_longest_cell_of_a_row_gives_its_height(page):
    table = page.tables[STEPS]
    narrow = table.rowHeight(0)
    page.resize(1900, 764)

    assert table.rowHeight(0) < narrow
