"""The Backups desk and its schedule, in a window over a real record."""

import dataclasses
import uuid
from datetime import UTC, datetime, timedelta

import msgspec
import pytest
from PySide6.QtCore import Qt
from PySide6.QtWidgets import QAbstractButton

from app.pages.backups import BackupsPage
from app.presenters import backups as presenting
from models.acts.backups import back_up
from models.job import Place, Signature
from models.record import journal
from models.record.backups import FOLDER_NAME, backups_in, contents_of
from models.record.store import Store
from models.record.verify import verify
from tests.app.open_shop import COMPRESSOR, PUMP


def pressed(page, words, qtbot):
    key = next(one for one in page.findChildren(QAbstractButton) if one.accessibleName() == words)
    assert key.isVisible(), words
    qtbot.mouseClick(key, Qt.MouseButton.LeftButton)


@pytest.fixture
def opened(shop_folder, open_window):
    made = open_window(shop_folder, sign_in="AT", job=COMPRESSOR)
    made.window.show_desk("Backups")
    made.settle()
    return made


@pytest.fixture
def page(opened):
    return opened.window.findChild(BackupsPage)


def there(folder):
    return backups_in(folder / FOLDER_NAME)


def test_a_backup_by_hand_is_listed_and_the_desk_says_when_and_where(
    opened, page, shop_folder, qtbot
):
    assert "no backup yet" in page._last.text()
    pressed(page, "Back up now", qtbot)
    opened.settle()

    (backup,) = there(shop_folder)
    assert contents_of(backup, whole=True).jobs == (COMPRESSOR, PUMP)
    (row,) = page.backups.model_of_rows.rows
    assert row.path == backup
    assert row.made in page._last.text()
    assert str(shop_folder / FOLDER_NAME) in page._last.text()


def test_a_look_changes_nothing_and_going_back_is_asked_once_more(opened, page, shop_folder, qtbot):
    pressed(page, "Back up now", qtbot)
    opened.settle()
    entry = opened._acts.read(PUMP).entries[-1]
    note = Signature(
        id=str(uuid.uuid4()),
        place=entry.place,
        by=entry.by,
        done_at=opened._acts.now(),
        entered_at=opened._acts.now(),
        plan=entry.plan,
        role="technician",
        meaning="performed",
        covers="all",
        out_of_order="told afterwards",
    )
    with (
        opened._store.writing() as session,
        journal.act(session, chain=PUMP, kind="x", by=entry.by, act_id="late") as act,
    ):
        act.add_entry(note)
    before = opened._acts.read(PUMP)
    page.backups.selectRow(0)
    pressed(page, "Look into it", qtbot)
    opened.settle()
    assert f"job {PUMP}: 1 act" in page._held.text()
    assert opened._acts.read(PUMP) == before

    pressed(page, "Put the record back to it", qtbot)
    opened.settle()
    assert opened._acts.read(PUMP) == before
    assert "set aside, not deleted" in page._asks.text()

    pressed(page, "Yes, put it back now", qtbot)
    opened.settle()
    assert opened._acts.read(PUMP).entries == before.entries[:-1]
    assert len(list(shop_folder.glob("shop set aside *"))) == 1
    assert "kept as" in opened.window.message.way_out
    assert len(opened.shop.view_of(PUMP).job.entries) == len(before.entries) - 1
    with opened._store.reading() as session:
        assert verify(session).is_whole


def test_a_second_folder_gets_a_copy_and_one_that_is_gone_is_told_once(
    opened, page, tmp_path, qtbot
):
    stick = tmp_path / "stick"
    stick.mkdir()
    page._ask_folder = lambda _present: str(stick)
    pressed(page, "Second folder …", qtbot)
    pressed(page, "Back up now", qtbot)
    opened.settle()
    (copy,) = backups_in(stick)
    assert contents_of(copy, whole=True).jobs == (COMPRESSOR, PUMP)
    assert opened.settings.of_shop("second backup folder") == str(stick)
    assert str(stick) in page._second.text()

    copy.unlink()
    stick.rmdir()
    said = []
    opened.shop.said.connect(lambda one: said.append(one.what))
    for _ in range(2):
        opened.backups.back_up()
        opened.settle()
    (sentence,) = said
    assert f"No backup was written into {stick}" in sentence
    assert "could not be written" in page._second.text()


def test_it_is_made_at_the_start_only_where_the_last_is_older_than_a_day(
    opened, shop_folder, qtbot
):
    opened.backups.begin()
    opened.settle()
    (first,) = there(shop_folder)
    opened.backups.begin()
    opened.settle()
    assert there(shop_folder) == [first]

    old = datetime.now(UTC) - timedelta(days=1, minutes=1)
    first.rename(first.with_name(f"shop {old:%Y-%m-%d %H%M%S}Z.thirdjournal"))
    opened.backups.begin()
    opened.settle()
    assert len(there(shop_folder)) == 2


def test_it_is_made_after_so_many_acts(opened, shop_folder, monkeypatch):
    monkeypatch.setattr(presenting, "BACKED_UP_AFTER_ACTS", 3)
    with Store.open(shop_folder) as store:
        back_up(store, act_id="just now")
    opened.backups.begin()
    opened.settle()
    for _ in range(3):
        assert len(there(shop_folder)) == 1
        opened.writer.write(lambda: None, done=lambda _: None, refused=pytest.fail)
        opened.settle()
    assert len(there(shop_folder)) == 2


def test_it_is_made_once_a_jobs_final_is_signed(opened, shop_folder):
    with Store.open(shop_folder) as store:
        back_up(store, act_id="just now")
    opened.backups.begin()
    opened.settle()
    view = opened.shop.view
    last = view.job.entries[-1]
    signed = Signature(
        id="signed",
        place=Place(kind="final"),
        by="AT",
        done_at=last.done_at,
        entered_at=last.entered_at,
        plan=last.plan,
        role="technician",
        meaning="performed",
        covers="all",
    )
    job = msgspec.structs.replace(view.job, entries=(*view.job.entries, signed))
    opened.shop._views[COMPRESSOR] = dataclasses.replace(view, job=job)
    opened.shop.job_changed.emit()
    opened.settle()
    assert len(there(shop_folder)) == 2


def test_backups_are_their_owners_alone(opened, shop_folder):
    opened.backups.back_up()
    opened.settle()
    assert (shop_folder / FOLDER_NAME).stat().st_mode & 0o777 == 0o700
    (backup,) = there(shop_folder)
    assert backup.stat().st_mode & 0o777 == 0o600
