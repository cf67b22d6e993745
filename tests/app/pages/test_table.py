import pytest
from PySide6.QtCore import Qt
from PySide6.QtGui import QFontMetricsF

from app.frame.look import Look
from app.pages.desk import desk_look
from app.pages.table import DeskTable
from app.viewmodels.rows import Column

ROWS = (("K3", "Seat of impeller 2"), ("E1", "Outside of spacer 1"), ("J1", "Journal"))


@pytest.fixture
def table(qtbot):
    made = DeskTable(
        [
            Column(title="station", text=lambda row: row[0], share=0.2),
            Column(title="what it is", text=lambda row: row[1]),
        ],
        name="Stations",
        look=desk_look(Look()),
    )
    qtbot.addWidget(made)
    made.resize(420, 300)
    with qtbot.waitActive(made):
        made.show()
        made.activateWindow()
    made.set_rows(ROWS)
    return made


def test_the_keyboard_finds_the_first_row_and_walks(table, qtbot):
    table.setFocus()
    assert table.present_row == ROWS[0]

    qtbot.keyClick(table, Qt.Key.Key_Down)
    assert table.present_row == ROWS[1]


def test_enter_takes_the_row_once_however_long_it_is_held(table, qtbot):
    taken = []
    table.taken.connect(taken.append)
    table.setFocus()
    qtbot.keyClick(table, Qt.Key.Key_Return)

    assert taken == [ROWS[0]]


def test_tab_leaves_the_table_instead_of_walking_its_cells(table, qtbot):
    table.setFocus()
    qtbot.keyClick(table, Qt.Key.Key_Tab)

    assert table.present_row == ROWS[0]


@pytest.mark.parametrize("scale", [1.0, 2.0])
def test_no_word_is_wider_than_its_column(table, scale):
    table.dress(desk_look(Look(text_scale=scale)))
    metrics = QFontMetricsF(table.cell_font(1))
    longest = max(metrics.horizontalAdvance(word) for row in ROWS for word in row[1].split())

    assert table.columnWidth(1) >= longest


def test_larger_type_gets_higher_rows(table):
    before = table.rowHeight(0)
    table.dress(desk_look(Look(text_scale=2.0)))

    assert table.rowHeight(0) > before


def test_the_present_row_keeps_its_place_when_rows_are_read_again(table):
    table.selectRow(1)
    table.set_rows((*ROWS, ("J2", "Journal")))

    assert table.present_row == ROWS[1]


def test_fewer_rows_leave_the_last_one_present(table):
    table.selectRow(2)
    table.set_rows(ROWS[:1])

    assert table.present_row == ROWS[0]
