import pytest
from PySide6.QtCore import Qt
from PySide6.QtTest import QTest
from PySide6.QtWidgets import QAbstractButton

from app.frame.countdown import Countdown, DropWindow
from app.frame.messages import Message, MessageStrip
from reports.sheet.pictures import VerdictKind

WINDOW = DropWindow(in_air=(400.0, 520.0), over_seat=(110.0, 150.0))


class Clock:
    now = 1000.0

    def __call__(self):
        return self.now


@pytest.fixture
def hanging(qtbot):
    clock = Clock()
    countdown = Countdown(WINDOW, clock=clock)
    countdown.time = clock
    countdown.tones = []
    countdown.tone_due.connect(countdown.tones.append)
    qtbot.addWidget(countdown)
    countdown.resize(1232, 337)
    countdown.show()
    return countdown


def pass_(countdown, seconds):
    countdown.time.now += seconds
    countdown.tick()


def test_before_the_door_opens_both_parts_stand_still(hanging):
    pass_(hanging, 60.0)

    assert hanging.words == ("in air", "6:40", "then over the seat 1:50")
    assert hanging.shape is None
    assert not hanging.counting


def test_time_in_air_is_counted_on_its_cautious_end(hanging):
    hanging.open_door()
    pass_(hanging, 10.5)

    # By hand: 400 − 10.5 = 389.5 s, and half a second is not given away: 6 min 29 s.
    assert hanging.words == ("in air", "6:29", "then over the seat 1:50")


@pytest.mark.parametrize(
    ("seconds", "shape"),
    [
        (299.9, None),
        (300.0, VerdictKind.LOOK),
        (399.9, VerdictKind.LOOK),
        (400.0, VerdictKind.STOP),
        (500.0, VerdictKind.STOP),
    ],
)
def test_a_shape_comes_with_the_last_quarter_and_stops_at_nothing(hanging, seconds, shape):
    hanging.open_door()
    pass_(hanging, seconds)

    assert hanging.shape is shape


def test_beyond_the_window_it_counts_on_and_never_hides(hanging):
    hanging.open_door()
    pass_(hanging, 412.0)

    assert hanging.words[1] == "+0:12 over"


def test_one_tone_at_sixty_thirty_and_ten_seconds(hanging):
    hanging.open_door()
    for _ in range(410):
        pass_(hanging, 1.0)

    assert hanging.tones == [60, 30, 10]


def test_over_the_seat_the_second_part_is_counted(hanging):
    hanging.open_door()
    pass_(hanging, 100.0)
    hanging.reach_seat()
    pass_(hanging, 20.0)

    assert hanging.words == ("over the seat", "1:30", "")


def test_halted_it_stands_still(hanging):
    hanging.open_door()
    pass_(hanging, 100.0)
    hanging.halt()
    pass_(hanging, 50.0)

    assert hanging.words[1] == "5:00"


def test_both_keys_answer_before_and_after_and_the_first_is_twice_as_wide(hanging, qtbot):
    keys = {key.text(): key for key in hanging.findChildren(QAbstractButton)}
    assert keys["Seated"].width() == pytest.approx(2 * keys["Stopped short"].width(), rel=0.02)
    assert keys["Seated"].height() >= 80

    with qtbot.waitSignal(hanging.seated, timeout=500):
        QTest.mouseClick(keys["Seated"], Qt.MouseButton.LeftButton)
    hanging.halt()
    with qtbot.waitSignal(hanging.stopped_short, timeout=500):
        QTest.mouseClick(keys["Stopped short"], Qt.MouseButton.LeftButton)


@pytest.fixture
def strip(qtbot):
    strip = MessageStrip()
    qtbot.addWidget(strip)
    strip.resize(1280, 60)
    return strip


def test_trouble_says_what_where_and_the_way_out_and_stays(strip, qtbot):
    strip.set_message(
        Message(
            what="The record could not be written.",
            where="The disk of the job file is full.",
            way_out="Free some room, then try again.",
            key="Try again",
        )
    )
    assert strip.isVisible()
    assert strip.accessibleName() == "Trouble"
    assert strip.accessibleDescription() == (
        "The record could not be written. The disk of the job file is full. "
        "Free some room, then try again."
    )
    visible = [key for key in strip.findChildren(QAbstractButton) if key.isVisible()]
    assert [key.text() for key in visible] == ["Try again"]
    with qtbot.waitSignal(strip.way_out_taken, timeout=500):
        QTest.mouseClick(visible[0], Qt.MouseButton.LeftButton)
    assert strip.isVisible()


def test_what_is_only_said_can_be_put_away(strip, qtbot):
    strip.set_message(Message(what="The indicator was read twice.", trouble=False))
    visible = [key for key in strip.findChildren(QAbstractButton) if key.isVisible()]
    with qtbot.waitSignal(strip.put_away, timeout=500):
        QTest.mouseClick(visible[0], Qt.MouseButton.LeftButton)

    assert strip.message is None
    assert not strip.isVisible()


def test_with_nothing_to_say_there_is_no_strip(strip):
    assert not strip.isVisible()
