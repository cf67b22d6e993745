"""What happens beside the mounting is told in plain forms; instruments are kept at the Register."""

import pytest
from PySide6.QtCore import Qt
from PySide6.QtWidgets import QLineEdit

from app.frame.key import Key
from app.pages.ask_form import AskForm
from models.acts import Acts
from models.job import Attachment, OutsideOperation, VisualFinding
from models.record.store import Store
from tests.app.open_shop import COMPRESSOR


def form_of(window):
    return next((one for one in window.findChildren(AskForm) if one.isVisible()), None)


def shown(qtbot, window):
    qtbot.waitUntil(lambda: form_of(window) is not None, timeout=10000)
    return form_of(window)


def gone(qtbot, window):
    qtbot.waitUntil(lambda: form_of(window) is None, timeout=20000)


def fill(qtbot, form, **answers):
    for name, text in answers.items():
        row = form.form.row(name.replace("_", " "))
        line = row.findChild(QLineEdit)
        if line is not None:
            line.setFocus()
            qtbot.keyClicks(line, text)
        else:
            key = next(one for one in row.findChildren(Key) if one.text() == text)
            qtbot.mouseClick(key, Qt.MouseButton.LeftButton)
    qtbot.mouseClick(form.take, Qt.MouseButton.LeftButton)


@pytest.fixture
def opened(shop_folder, open_window):
    return open_window(shop_folder, sign_in="AT", job=COMPRESSOR)


def told_leaf(opened):
    opened.window.show_desk("Inspection")
    page = opened.window.findChild(type(opened.window._pages["Inspection"]))
    page.leaves.turn_to("Also told")
    return next(leaf for leaf in page.leaves._leaves.values() if hasattr(leaf, "keys"))


def recorded(opened, kind):
    return [one for one in opened._acts.read(COMPRESSOR).entries if isinstance(one, kind)]


def press(qtbot, leaf, name):
    qtbot.mouseClick(leaf.keys[name], Qt.MouseButton.LeftButton)


def test_something_seen_that_does_not_conform_gets_a_number(opened, qtbot):
    leaf = told_leaf(opened)
    before = len(recorded(opened, VisualFinding))
    press(qtbot, leaf, "seen")
    form = shown(qtbot, opened.window)
    fill(
        qtbot, form, step="2", subject="HR-4471-02", seen_at="bore", words="Scratch across",
        weight="does not conform",
    )  # fmt: skip
    gone(qtbot, opened.window)
    opened.settle()

    found = recorded(opened, VisualFinding)[before:]
    assert [one.words for one in found] == ["Scratch across"]
    assert opened._acts.read(COMPRESSOR).numbered_findings[-1].entry == found[0].id
    assert any("Scratch across" in row.words for row in leaf._presenter.told)
    assert leaf._presenter.numbered[0].stands == "open"


def test_a_step_that_is_not_there_is_said_in_the_form_and_nothing_is_lost(opened, qtbot):
    leaf = told_leaf(opened)
    before = opened._acts.read(COMPRESSOR)
    press(qtbot, leaf, "seen")
    form = shown(qtbot, opened.window)
    fill(qtbot, form, step="99", subject="x", seen_at="bore", words="Scratch", weight="remark")
    assert "There is no step 99" in form.said.text()
    assert form.form.answers["words"] == "Scratch"
    assert opened._acts.read(COMPRESSOR) == before
    form.reject()


def test_work_is_sent_off_and_comes_back(opened, qtbot):
    leaf = told_leaf(opened)
    press(qtbot, leaf, "sent")
    fill(
        qtbot, shown(qtbot, opened.window), subject="HR-4471-09", what="plating",
        works="Platers, invented", sent_on="2026-11-05",
    )  # fmt: skip
    gone(qtbot, opened.window)
    opened.settle()
    sent = recorded(opened, OutsideOperation)[-1]
    assert leaf.keys["back"].isVisibleTo(leaf)

    press(qtbot, leaf, "back")
    fill(
        qtbot, shown(qtbot, opened.window), which="HR-4471-09: plating", back_on="2026-11-09",
        certificate="P-12", result="accepted",
    )  # fmt: skip
    gone(qtbot, opened.window)
    opened.settle()
    back = recorded(opened, OutsideOperation)[-1]
    assert (back.sent_as, back.back_on, back.certificate) == (sent.id, "2026-11-09", "P-12")


def test_a_picture_is_copied_beside_the_record(opened, qtbot, tmp_path, shop_folder):
    picture = tmp_path / "seat.png"
    picture.write_bytes(b"abc")
    leaf = told_leaf(opened)
    press(qtbot, leaf, "file")
    fill(qtbot, shown(qtbot, opened.window), path=str(picture), words="the seat")
    gone(qtbot, opened.window)
    kept = recorded(opened, Attachment)[-1]
    assert (shop_folder / "files" / kept.file_digest).read_bytes() == b"abc"


def test_an_instrument_found_out_opens_findings_from_the_register(shop_folder, open_window, qtbot):
    with Store.open(shop_folder) as store:
        job = Acts(store).read(COMPRESSOR)
    inspector = next(one for one in job.people if one.role == "inspector")
    opened = open_window(shop_folder, sign_in=inspector.key, job=COMPRESSOR)
    opened.window.show_desk("Register")
    page = opened.window._pages["Register"]
    page.leaves.turn_to("Instruments")
    opened.settle()
    leaf = page.leaves._leaves["Instruments"]
    tags = [one.instrument.tag for one in leaf._presenter.rows]
    used = next(one.instrument for one in job.entries if getattr(one, "instrument", None))
    leaf.table.selectRow(tags.index(used))
    qtbot.mouseClick(leaf.found_out, Qt.MouseButton.LeftButton)
    fill(qtbot, shown(qtbot, opened.window), last_good_on="2026-01-01", words="Sticks")
    gone(qtbot, opened.window)
    opened.settle()

    expected = sum(1 for one in job.entries if getattr(one, "instrument", None) == used)
    opened.settle()
    chosen = leaf._presenter.rows[tags.index(used)].instrument
    told = leaf._presenter._history(chosen)
    since = [row for row in told if row.what == "read since" and COMPRESSOR in row.words]
    assert len(since) == expected
    after = opened._acts.read(COMPRESSOR)
    assert any(one.about.startswith("instrument-still-good") for one in after.numbered_findings)


def test_a_technician_is_not_asked_for_calibrations(opened, qtbot):
    opened.window.show_desk("Register")
    page = opened.window._pages["Register"]
    page.leaves.turn_to("Instruments")
    opened.settle()
    leaf = page.leaves._leaves["Instruments"]
    assert leaf._presenter.rows
    assert not leaf.calibrate.isVisibleTo(leaf)
    assert not leaf.found_out.isVisibleTo(leaf)
