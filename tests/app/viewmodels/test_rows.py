from dataclasses import dataclass

import pytest
from PySide6.QtCore import QModelIndex, Qt

from app.viewmodels.rows import ROW_ROLE, SHAPE_ROLE, STRUCK_ROLE, Column, RowsModel
from reports.sheet.pictures import VerdictKind


@dataclass(frozen=True)
class Reading:
    station: str
    total: str
    kind: VerdictKind = VerdictKind.WITHIN


COLUMNS = (
    Column(title="station", text=lambda row: row.station, shape=lambda row: row.kind),
    Column(title="total", text=lambda row: row.total, right=True, struck=True),
)
READINGS = (Reading("S1", "0.0003 in"), Reading("S2", "0.0012 in", VerdictKind.STOP))


@pytest.fixture
def model():
    made = RowsModel(COLUMNS)
    made.set_rows(READINGS)
    return made


@pytest.mark.parametrize("rows", [(), READINGS[:1], READINGS])
def test_it_keeps_every_promise_of_a_qt_model(qtmodeltester, rows):
    model = RowsModel(COLUMNS)
    model.set_rows(rows)

    qtmodeltester.check(model, force_py=True)


def test_it_keeps_them_while_its_rows_are_exchanged(qtmodeltester, model):
    qtmodeltester.check(model, force_py=True)
    model.set_rows(READINGS[1:])

    assert model.rowCount() == 1
    assert model.index(0, 0).data() == "S2"


def test_a_cell_says_its_words_its_shape_and_its_row(model):
    cell = model.index(1, 0)

    assert cell.data() == "S2"
    assert VerdictKind(cell.data(SHAPE_ROLE)) is VerdictKind.STOP
    assert cell.data(ROW_ROLE) is READINGS[1]


def test_a_cell_without_a_shape_has_none(model):
    assert model.index(0, 1).data(SHAPE_ROLE) is None


def test_words_are_said_with_their_head_and_their_verdict(model):
    assert model.index(1, 0).data(Qt.ItemDataRole.AccessibleTextRole) == "station, stop, S2"
    assert model.index(1, 1).data(Qt.ItemDataRole.AccessibleTextRole) == "total, struck, 0.0012 in"


def test_figures_end_at_the_right(model):
    assert model.index(0, 1).data(Qt.ItemDataRole.TextAlignmentRole) & Qt.AlignmentFlag.AlignRight
    assert model.index(0, 1).data(STRUCK_ROLE) is True


def test_heads_are_the_titles(model):
    heads = [model.headerData(place, Qt.Orientation.Horizontal) for place in range(2)]

    assert heads == ["station", "total"]
    assert model.headerData(0, Qt.Orientation.Vertical) is None


def test_equal_rows_change_nothing(model, qtbot):
    with qtbot.assertNotEmitted(model.modelReset):
        model.set_rows(list(READINGS))


def test_nowhere_has_no_row(model):
    assert model.row_at(QModelIndex()) is None
