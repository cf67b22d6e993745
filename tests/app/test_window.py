import threading

import pytest
from PySide6.QtCore import Qt
from PySide6.QtWidgets import QAbstractButton

from app.pages.bench.page import BenchPage
from app.settings import Settings
from app.style.theme import Appearance
from models.job import Note, Place
from models.record.errors import DiskFullError
from reports.palette import DARK
from tests.app.open_shop import COMPRESSOR


def key_named(window, name):
    return next(one for one in window.findChildren(QAbstractButton) if one.accessibleName() == name)


def press(qtbot, opened, key, modifier=Qt.KeyboardModifier.ControlModifier):
    with qtbot.waitActive(opened.window):
        opened.window.activateWindow()
    qtbot.keyClick(opened.window, key, modifier)


def test_only_desks_that_exist_stand_in_the_line(shop_folder, open_window):
    opened = open_window(shop_folder)
    names = [
        one.accessibleName()
        for one in opened.window.findChildren(QAbstractButton)
        if one.accessibleName().endswith(" desk")
    ]

    assert names == [f"{name} desk" for name in opened.window.desks]
    assert "Register desk" in names
    assert "History desk" not in names


def test_control_and_a_figure_bring_a_desk_to_the_front(shop_folder, open_window, qtbot):
    opened = open_window(shop_folder, job=COMPRESSOR, sign_in="AT")
    for number, name in enumerate(opened.window.desks, start=1):
        press(qtbot, opened, Qt.Key(Qt.Key.Key_0 + number))

        assert opened.window.present_desk == name


def test_the_line_says_who_is_signed_in_with_their_role(shop_folder, open_window):
    opened = open_window(shop_folder, sign_in="BQ", job=COMPRESSOR)

    assert key_named(opened.window, "Signed in: Brona Quillfeather, inspector").isVisible()


def test_a_person_chosen_in_the_line_is_signed_in(shop_folder, open_window, qtbot, monkeypatch):
    opened = open_window(shop_folder, job=COMPRESSOR)
    asked = []
    monkeypatch.setattr(
        opened.window, "_ask", lambda people: asked.append([one.key for one in people]) or "AT"
    )
    qtbot.mouseClick(
        key_named(opened.window, "Signed in: Who is at the window?"), Qt.MouseButton.LeftButton
    )

    assert asked == [["AT", "CV", "BQ", "DO", "ES"]]
    assert opened.shop.person.name == "Ansel Tarrowby"


def test_what_lay_on_the_desks_lies_there_the_next_time(shop_folder, open_window):
    first = open_window(shop_folder, sign_in="AT", job=COMPRESSOR)
    first.jobs.set_filter("All")
    first.window.next_appearance()
    first.window.grow_text(1)
    first.window.close()
    second = open_window(shop_folder)

    assert second.shop.job_number == COMPRESSOR
    assert second.shop.person_key == "AT"
    assert second.jobs.filter == "All"
    assert second.window.look.palette is DARK
    assert second.window.look.text_scale == 1.1


def test_a_job_that_is_remembered_but_gone_is_forgotten(shop_folder, open_window):
    opened = open_window(shop_folder, job="gone")

    assert opened.shop.job_number == ""
    assert opened.window.message is None


def test_the_look_goes_round_and_comes_back_to_light(shop_folder, open_window, qtbot):
    opened = open_window(shop_folder)
    seen = []
    for _ in range(3):
        press(qtbot, opened, Qt.Key.Key_L)
        seen.append(opened.settings.appearance)

    assert seen == [Appearance.DARK, Appearance.CONTRAST, Appearance.LIGHT]


def test_text_grows_to_twice_and_no_further(shop_folder, open_window):
    opened = open_window(shop_folder)
    for _ in range(12):
        opened.window.grow_text(1)
    assert opened.window.look.text_scale == 2.0

    opened.window.grow_text(0)
    assert opened.window.look.text_scale == 1.0


def test_trouble_with_the_disk_is_said_and_tried_again(shop_folder, open_window, qtbot, tmp_path):
    opened = open_window(shop_folder)
    outcomes = [DiskFullError(tmp_path / "shop.thirdjournal"), None]
    done = []

    def act():
        error = outcomes.pop(0)
        if error is not None:
            raise error

    opened.writer.write(act, done=done.append, refused=pytest.fail)
    qtbot.waitUntil(lambda: opened.window.message is not None)
    assert opened.window.message.what.startswith("The disk that holds")
    assert done == []

    qtbot.mouseClick(key_named(opened.window, "Try again"), Qt.MouseButton.LeftButton)
    qtbot.waitUntil(lambda: done == [None])
    assert opened.window.message is None


def test_f6_carries_the_keyboard_from_area_to_area_and_back(shop_folder, open_window, qtbot):
    opened = open_window(shop_folder)
    with qtbot.waitActive(opened.window):
        opened.window.activateWindow()
    visited = []
    for _ in range(3):
        qtbot.keyClick(opened.window, Qt.Key.Key_F6)
        visited.append(opened.window.focusWidget().accessibleName())

    assert "Jobs desk" in visited
    assert visited[0] == visited[2]
    assert visited[0] != visited[1]


def test_f9_is_far_and_close_again(shop_folder, open_window, qtbot):
    opened = open_window(shop_folder)
    press(qtbot, opened, Qt.Key.Key_F9, Qt.KeyboardModifier.NoModifier)
    assert opened.window.look.far

    press(qtbot, opened, Qt.Key.Key_F9, Qt.KeyboardModifier.NoModifier)
    assert not opened.window.look.far


def test_settings_of_two_shops_do_not_mix(tmp_path):
    file = tmp_path / "window.ini"
    for name in ("one", "two"):
        Settings(folder=tmp_path / name, file=file).keep_for_shop("job", name)

    assert Settings(folder=tmp_path / "one", file=file).of_shop("job") == "one"


def test_settings_that_cannot_be_read_count_as_none(tmp_path):
    file = tmp_path / "window.ini"
    file.write_text("[look]\nappearance=purple\ntext_scale=huge\n", encoding="utf-8")
    settings = Settings(folder=tmp_path, file=file)

    assert settings.appearance is Appearance.LIGHT
    assert settings.text_scale == 1.0
    assert settings.geometry is None


def stage(opened):
    """Give what stands below the line of desks."""
    return opened.window._stack.currentWidget()


def test_the_bench_of_the_job_opens_for_whoever_is_signed_in(shop_folder, open_window):
    opened = open_window(shop_folder, sign_in="AT", job=COMPRESSOR)
    opened.window.show_desk("Bench")
    opened.settle()

    assert isinstance(stage(opened), BenchPage)
    assert stage(opened)._presenter.view.job.number == COMPRESSOR


def test_the_bench_stays_closed_until_somebody_is_signed_in(shop_folder, open_window):
    opened = open_window(shop_folder, job=COMPRESSOR)
    opened.window.show_desk("Bench")
    assert stage(opened).words.text().startswith("Say who is at the window first")

    opened.shop.sign_in("AT")
    opened.settle()
    assert isinstance(stage(opened), BenchPage)


def test_the_bench_stays_closed_until_a_job_is_chosen(shop_folder, open_window):
    opened = open_window(shop_folder)
    opened.window.show_desk("Bench")

    assert stage(opened).words.text() == "Choose a job first, at the Jobs desk."


def test_a_bench_that_was_open_last_opens_again_once_its_job_is_read(shop_folder, open_window):
    first = open_window(shop_folder, sign_in="AT", job=COMPRESSOR)
    first.window.show_desk("Bench")
    first.settle()
    first.window.close()
    second = open_window(shop_folder, settle=False)
    assert stage(second).words.text() == "working: reading the shelf"

    second.settle()
    assert second.window.present_desk == "Bench"
    assert isinstance(stage(second), BenchPage)


def test_leaving_the_bench_signs_out_and_goes_to_the_shelf(shop_folder, open_window):
    opened = open_window(shop_folder, sign_in="AT", job=COMPRESSOR)
    opened.window.show_desk("Bench")
    opened.settle()
    stage(opened).foot.pressed.emit("leave")

    assert opened.window.present_desk == "Jobs"
    assert opened.shop.person is None


def test_another_person_takes_the_same_bench_over(shop_folder, open_window):
    opened = open_window(shop_folder, sign_in="AT", job=COMPRESSOR)
    opened.window.show_desk("Bench")
    opened.settle()
    before = stage(opened)
    opened.shop.sign_in("CV")

    assert stage(opened) is before
    assert before._presenter._person == "CV"


def test_trouble_is_said_once_by_the_bench_or_by_the_strip(
    shop_folder, open_window, qtbot, tmp_path
):
    opened = open_window(shop_folder, sign_in="AT", job=COMPRESSOR)
    opened.window.show_desk("Bench")
    opened.settle()
    healed = []

    def act():
        if not healed:
            raise DiskFullError(tmp_path / "shop.thirdjournal")

    opened.writer.write(act, done=lambda _: None, refused=pytest.fail)
    qtbot.waitUntil(lambda: opened.writer.is_halted)
    assert opened.window.message is None
    assert stage(opened).message.message is not None

    opened.window.show_desk("Jobs")
    assert opened.window.message.what.startswith("The disk that holds")

    healed.append(True)
    qtbot.mouseClick(key_named(opened.window._strip, "Try again"), Qt.MouseButton.LeftButton)
    qtbot.waitUntil(lambda: opened.writer.is_idle)
    assert opened.window.message is None


def test_what_an_inspector_records_is_read_by_the_bench_before_it_goes_on(
    shop_folder, open_window, qtbot
):
    opened = open_window(shop_folder, sign_in="AT", job=COMPRESSOR)
    opened.window.show_desk("Bench")
    opened.settle()
    presenter = stage(opened)._presenter
    before = presenter.view.job.head.sequence
    opened.window.show_desk("Inspection")
    note = Note(
        id="seen-1",
        place=Place(kind="bare shaft"),
        by="BQ",
        done_at=opened.shop.acts.now(),
        entered_at=opened.shop.acts.now(),
        plan="B",
        words="Looked at the shaft.",
    )
    opened.shop.record(note, done=lambda _: None)
    opened.settle()
    opened.window.show_desk("Bench")
    opened.settle()

    assert presenter.view.job.head.sequence == before + 1


def test_closing_waits_until_everything_is_on_the_disk(shop_folder, open_window, qtbot):
    opened = open_window(shop_folder)
    go_on, written = threading.Event(), []
    for number in range(3):
        opened.writer.write(
            lambda: go_on.wait(10),
            done=lambda _, number=number: written.append(number),
            refused=pytest.fail,
        )
    opened.window.close()
    assert opened.window.isVisible()

    go_on.set()
    qtbot.waitUntil(lambda: not opened.window.isVisible())
    assert written == [0, 1, 2]


def test_what_cannot_be_written_is_lost_only_by_closing_twice(
    shop_folder, open_window, qtbot, tmp_path
):
    opened = open_window(shop_folder)

    def act():
        raise DiskFullError(tmp_path / "shop.thirdjournal")

    opened.writer.write(act, done=lambda _: None, refused=pytest.fail)
    qtbot.waitUntil(lambda: opened.writer.is_halted)
    opened.window.close()
    assert opened.window.isVisible()
    assert opened.window.message.way_out == "Try again; or close once more, and it is lost."

    opened.window.close()
    assert not opened.window.isVisible()


@pytest.mark.parametrize(
    ("desk", "reached"),
    [
        ("Jobs", {"Jobs", "Search the shelf", "Show: Settled", "Bring in a job file …"}),
        ("Plan", {"Steps of the plan", "Stations", "Method and people", "What is lacking: 5"}),
        ("Inspection", {"Findings", "What the verdict rests on", "Findings: 1", "Side by side"}),
        ("Witness", {"Chapters of the story"}),
    ],
)
def test_tab_alone_reaches_what_can_be_done_at_a_desk(
    shop_folder, open_window, qtbot, desk, reached
):
    opened = open_window(shop_folder, sign_in="BQ", job=COMPRESSOR)
    opened.window.show_desk(desk)
    with qtbot.waitActive(opened.window):
        opened.window.activateWindow()
    found = set()
    for _ in range(40):
        found.add(opened.window.focusWidget().accessibleName())
        qtbot.keyClick(opened.window.focusWidget(), Qt.Key.Key_Tab)

    assert reached <= found
    assert "Signed in: Brona Quillfeather, inspector" in found


def test_the_keyboard_is_on_the_shelf_once_it_has_been_read(shop_folder, open_window, qtbot):
    opened = open_window(shop_folder, sign_in="AT", job=COMPRESSOR)
    opened.window.show_desk("Jobs")
    with qtbot.waitActive(opened.window):
        opened.window.activateWindow()
    opened.settle()
    assert opened.window.focusWidget().accessibleName() == "Jobs"

    qtbot.keyClick(opened.window.focusWidget(), Qt.Key.Key_Return)
    opened.settle()
    assert opened.window.present_desk == "Bench"


def test_the_keyboard_is_on_the_key_that_brings_a_first_job(tmp_path, open_window, qtbot):
    (tmp_path / "new shop").mkdir()
    opened = open_window(tmp_path / "new shop")
    with qtbot.waitActive(opened.window):
        opened.window.activateWindow()

    assert opened.window.focusWidget().accessibleName() == "Bring in a job file …"
