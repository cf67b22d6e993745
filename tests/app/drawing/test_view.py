from __future__ import annotations

import pytest
from PySide6.QtCore import QPoint, QPointF, Qt
from PySide6.QtGui import QWheelEvent
from PySide6.QtTest import QTest

from app.drawing.view import GREATEST_ZOOM, SheetView
from reports.palette import DARK
from reports.sheet.along import along_the_rotor
from reports.sheet.elements import Box, Layer, Mark, sheet_of
from reports.sheet.medium import DESK
from tests.reports import invented

FIRST = Mark(name="station S1", tells="S1 changed by 0.0002 in TIR.", box=Box(10, 10, 30, 30))
SECOND = Mark(name="station S2", tells="S2 is not measured yet.", box=Box(60, 10, 80, 30))


def small_sheet(*marks: Mark, width: float = 100.0):
    return sheet_of(
        width=width,
        height=50.0,
        medium=DESK,
        layers=[Layer(marks=marks)],
        title="R-0418",
        description="Two stations.",
    )


@pytest.fixture
def view(qtbot):
    shown = SheetView()
    qtbot.addWidget(shown)
    shown.resize(200, 200)
    shown.show_sheet(small_sheet(FIRST, SECOND))
    shown.show()
    return shown


def touches_of(view: SheetView) -> list[tuple[str, str]]:
    found: list[tuple[str, str]] = []
    view.touched.connect(lambda name, tells: found.append((name, tells)))
    return found


def wheel(view: SheetView, place: QPointF, turns: int) -> None:
    view.wheelEvent(
        QWheelEvent(
            place,
            view.mapToGlobal(place),
            QPoint(0, 0),
            QPoint(0, 120 * turns),
            Qt.MouseButton.NoButton,
            Qt.KeyboardModifier.NoModifier,
            Qt.ScrollPhase.NoScrollPhase,
            False,
        )
    )


def test_the_whole_sheet_is_shown_in_the_middle(view):
    # By hand: 100 by 50 in 200 by 200 is twice as large, 50 from the top.
    assert view.scale() == 2.0
    assert view.corner() == QPointF(0.0, 50.0)


def test_a_touched_mark_says_its_name_and_its_sentence(view):
    touches = touches_of(view)

    QTest.mouseClick(view, Qt.MouseButton.LeftButton, pos=QPoint(140, 90))

    assert touches == [("station S2", "S2 is not measured yet.")]


def test_a_touch_just_beside_a_mark_still_means_it(view):
    touches = touches_of(view)

    QTest.mouseClick(view, Qt.MouseButton.LeftButton, pos=QPoint(64, 90))

    assert touches == [("station S1", "S1 changed by 0.0002 in TIR.")]


def test_a_touch_on_nothing_says_nothing(view):
    touches = touches_of(view)

    QTest.mouseClick(view, Qt.MouseButton.LeftButton, pos=QPoint(100, 140))

    assert touches == []


def test_moving_the_sheet_touches_nothing(view):
    view.zoom_by(4.0)
    touches = touches_of(view)
    before = view.corner()

    QTest.mousePress(view, Qt.MouseButton.LeftButton, pos=QPoint(100, 100))
    QTest.mouseMove(view, QPoint(60, 100))
    QTest.mouseRelease(view, Qt.MouseButton.LeftButton, pos=QPoint(60, 100))

    assert touches == []
    assert view.corner().x() - before.x() == pytest.approx(-40.0)


def test_the_wheel_enlarges_about_the_pointer(view):
    place = QPointF(140.0, 90.0)
    before = view.on_sheet(place)

    wheel(view, place, 3)

    assert view.zoom() == pytest.approx(1.25**3)
    after = view.on_sheet(place)
    assert (after.x(), after.y()) == pytest.approx((before.x(), before.y()))


def test_enlarging_has_an_end_and_reducing_ends_with_the_whole_sheet(view):
    wheel(view, QPointF(10.0, 10.0), 40)
    assert view.zoom() == GREATEST_ZOOM

    wheel(view, QPointF(190.0, 190.0), -60)
    assert view.zoom() == 1.0
    assert view.corner() == QPointF(0.0, 50.0)


def test_a_sheet_shown_whole_cannot_be_moved_away(view):
    view.pan_by(50.0, 50.0)

    assert view.corner() == QPointF(0.0, 50.0)


def test_every_mark_can_be_reached_and_touched_by_key_alone(view):
    touches = touches_of(view)

    QTest.keyClick(view, Qt.Key.Key_Right)
    QTest.keyClick(view, Qt.Key.Key_Return)
    QTest.keyClick(view, Qt.Key.Key_Right)
    QTest.keyClick(view, Qt.Key.Key_Space)
    QTest.keyClick(view, Qt.Key.Key_Right)
    QTest.keyClick(view, Qt.Key.Key_Enter)

    assert [name for name, _ in touches] == ["station S1", "station S2", "station S1"]


def test_enter_before_any_mark_is_chosen_says_nothing(view):
    touches = touches_of(view)

    QTest.keyClick(view, Qt.Key.Key_Return)

    assert touches == []


def test_keys_zoom_move_and_show_the_whole_again(view):
    QTest.keyClick(view, Qt.Key.Key_Plus)
    enlarged = view.corner()
    QTest.keyClick(view, Qt.Key.Key_Right, Qt.KeyboardModifier.ShiftModifier)

    assert view.zoom() == 1.25
    assert view.corner().x() < enlarged.x()

    QTest.keyClick(view, Qt.Key.Key_0)
    assert view.zoom() == 1.0


def test_the_drawing_is_described_to_those_who_do_not_see_it(view):
    assert view.accessibleName() == "R-0418"
    assert view.accessibleDescription() == "Two stations."

    QTest.keyClick(view, Qt.Key.Key_Right)
    assert view.accessibleDescription() == "S1 changed by 0.0002 in TIR."


def test_another_reading_keeps_zoom_and_the_chosen_mark(view):
    view.zoom_by(2.0)
    QTest.keyClick(view, Qt.Key.Key_Left)

    view.show_sheet(small_sheet(FIRST, SECOND))

    assert view.zoom() == 2.0
    assert view.chosen_mark() == SECOND


def test_another_sheet_is_shown_whole(view):
    view.zoom_by(2.0)

    view.show_sheet(small_sheet(FIRST, width=200.0))

    assert view.zoom() == 1.0


def test_an_empty_view_takes_touches_and_keys_calmly(qtbot):
    empty = SheetView()
    qtbot.addWidget(empty)
    empty.show()

    QTest.mouseClick(empty, Qt.MouseButton.LeftButton)
    QTest.keyClick(empty, Qt.Key.Key_Right)

    assert empty.sheet() is None
    assert empty.chosen_mark() is None


def test_other_colours_repaint_the_ground(qtbot):
    dark = SheetView(palette=DARK)
    qtbot.addWidget(dark)
    dark.resize(40, 40)
    dark.show_sheet(small_sheet())

    assert dark.grab().toImage().pixelColor(5, 5).name().upper() == DARK.paper


def test_a_view_asks_for_the_sheets_own_size(qtbot):
    whole = SheetView()
    qtbot.addWidget(whole)

    whole.show_sheet(along_the_rotor(picture=invented.rotor()))

    # By hand from the layout for 1280 pixels.
    assert (whole.sizeHint().width(), whole.sizeHint().height()) == (1280, 347)
