"""Keys in the window: what is shown before a secret is asked, and what a signature leaves."""

import pytest
from PySide6.QtCore import Qt
from PySide6.QtWidgets import QAbstractButton, QLabel, QLineEdit

from app.demo_keys import PASSPHRASE, PIN, DemoKeys
from app.pages.ask_form import AskForm
from models.acts import Acts, Keys, new_id
from models.job import Place, Signature
from models.record.store import Store
from models.record.verify import verify
from sample_data.load import compressor, pump
from tests.app.open_shop import COMPRESSOR

JOB = compressor()
STEP = JOB.plan.steps[4].key
NEW = ("willow kettle stamp", "314159")


@pytest.fixture
def keyed_folder(shop_folder):
    with Store.open(shop_folder) as store:
        DemoKeys(store, Acts(store), secrets=None).make((JOB, pump()))
    return shop_folder


def form_of(window):
    return next((one for one in window.findChildren(AskForm) if one.isVisible()), None)


def shown(qtbot, window):
    qtbot.waitUntil(lambda: form_of(window) is not None, timeout=10000)
    return form_of(window)


def field(form, label):
    return next(one for one in form.findChildren(QLineEdit) if one.accessibleName() == label)


def answer(qtbot, form, **typed):
    for row in form.findChildren(QLineEdit):
        text = typed.get(row.accessibleName().split()[0].lower())
        if text is not None:
            qtbot.keyClicks(row, text)
    qtbot.mouseClick(form.take, Qt.MouseButton.LeftButton)


def words(form):
    return [one.text() for one in form.findChildren(QLabel) if one.isVisible()]


def a_signature(by="AT", **more):
    at = "2026-12-01T10:00:00+00:00"
    facts = {
        "id": new_id(), "place": Place(kind="attempt", step=STEP, attempt=1), "by": by,
        "done_at": at, "entered_at": at, "plan": JOB.plan.revision, "role": "technician",
        "meaning": "performed", "covers": "step 5, attempt 1",
    }  # fmt: skip
    return Signature(**(facts | more))


def asked_to_sign(qtbot, opened, entry):
    signed = []
    opened.shop.record(entry, done=signed.append)
    return shown(qtbot, opened.window), signed


def test_the_form_says_whose_name_stands_under_what_before_it_asks(
    keyed_folder, open_window, qtbot
):
    opened = open_window(keyed_folder, sign_in="AT", job=COMPRESSOR)
    form, _ = asked_to_sign(qtbot, opened, a_signature())

    said = " ".join(words(form))
    assert "Ansel Tarrowby" in said
    assert "Signs as technician, “performed”: did the work as it is recorded here." in said
    assert "Covers step 5, attempt 1 of job 26-0417, as recorded up to act 116; digest " in said
    for label in ("Passphrase", "PIN"):
        assert field(form, label).echoMode() is QLineEdit.EchoMode.Password
    form.reject()


def test_passphrase_then_pin_sign_and_the_pin_alone_signs_again(keyed_folder, open_window, qtbot):
    opened = open_window(keyed_folder, sign_in="AT", job=COMPRESSOR)
    form, signed = asked_to_sign(qtbot, opened, a_signature())
    answer(qtbot, form, passphrase=PASSPHRASE, pin=PIN)
    qtbot.waitUntil(lambda: bool(signed), timeout=10000)
    opened.settle()

    again = a_signature(place=Place(kind="attempt", step=JOB.plan.steps[3].key, attempt=1))
    form, signed = asked_to_sign(qtbot, opened, again)
    assert [one.accessibleName() for one in form.findChildren(QLineEdit)] == ["PIN"]
    answer(qtbot, form, pin=PIN)
    qtbot.waitUntil(lambda: bool(signed), timeout=10000)
    opened.settle()

    job = opened.shop.acts.read(COMPRESSOR)
    assert len(job.key_signatures) == 2
    assert job.key_signatures[-1].entry == again.id


def test_a_wrong_secret_is_said_in_the_form_and_typed_anew(keyed_folder, open_window, qtbot):
    opened = open_window(keyed_folder, sign_in="AT", job=COMPRESSOR)
    form, signed = asked_to_sign(qtbot, opened, a_signature())
    answer(qtbot, form, passphrase="three other words", pin=PIN)
    qtbot.waitUntil(lambda: form.said.isVisible(), timeout=10000)

    assert form.said.text().startswith("That is not the passphrase of Ansel Tarrowby. 7 more")
    assert field(form, "Passphrase").text() == ""
    assert field(form, "PIN").text() == ""
    assert form.take.isEnabled()
    answer(qtbot, form, passphrase=PASSPHRASE, pin=PIN)
    qtbot.waitUntil(lambda: bool(signed), timeout=10000)
    opened.settle()


def test_somebody_elses_sitting_ends_when_another_sits_down(keyed_folder, open_window, qtbot):
    opened = open_window(keyed_folder, sign_in="AT", job=COMPRESSOR)
    form, signed = asked_to_sign(qtbot, opened, a_signature())
    answer(qtbot, form, passphrase=PASSPHRASE, pin=PIN)
    qtbot.waitUntil(lambda: bool(signed), timeout=10000)
    opened.settle()
    assert opened.keys.sitting is not None

    opened.shop.sign_in("BQ")
    assert opened.keys.sitting is None


def key(window, label):
    return next(
        one
        for one in window.findChildren(QAbstractButton)
        if one.isVisible() and one.accessibleName() == label
    )


def test_a_new_shop_is_made_in_the_register_and_gives_its_next_person_a_key(
    tmp_path, open_window, qtbot
):
    folder = tmp_path / "new shop"
    folder.mkdir()
    opened = open_window(folder)
    opened.window.show_desk("Register")
    opened.settle()
    qtbot.mouseClick(key(opened.window, "Set up keys …"), Qt.MouseButton.LeftButton)
    form = shown(qtbot, opened.window)
    first = {
        "Name of the shop": "Own shop", "Printed name of the inspector": "Ida Quay",
        "Initials": "IQ", "New passphrase": NEW[0], "The same again": NEW[0],
        "New PIN, six digits or more": NEW[1], "The PIN again": NEW[1],
    }  # fmt: skip
    for label, text in first.items():
        qtbot.keyClicks(field(form, label), text)
    qtbot.mouseClick(form.take, Qt.MouseButton.LeftButton)
    qtbot.waitUntil(lambda: form_of(opened.window) is None, timeout=20000)
    opened.settle()
    opened.shop.sign_in("IQ")
    opened.settle()

    qtbot.mouseClick(key(opened.window, "New person …"), Qt.MouseButton.LeftButton)
    form = shown(qtbot, opened.window)
    more = {
        "Printed name": "Tom Fell", "Initials": "TF", "New passphrase": PASSPHRASE,
        "The same again": PASSPHRASE, "New PIN, six digits or more": PIN, "The PIN again": PIN,
        "Passphrase of Ida Quay": NEW[0], "PIN of Ida Quay": NEW[1],
    }  # fmt: skip
    for label, text in more.items():
        qtbot.keyClicks(field(form, label), text)
    form.form.set_answer("role", "technician")
    qtbot.mouseClick(form.take, Qt.MouseButton.LeftButton)
    qtbot.waitUntil(lambda: form_of(opened.window) is None, timeout=20000)
    opened.settle()

    with Store.open(folder) as store, store.reading() as session:
        assert verify(session).is_whole
        keys = Keys(store, Acts(store))
        assert [one.name for one in keys.people()] == ["Ida Quay", "Tom Fell"]
        assert keys.standing("TF").has_key


def test_secrets_typed_differently_twice_make_nothing(tmp_path, open_window, qtbot):
    folder = tmp_path / "new shop"
    folder.mkdir()
    opened = open_window(folder)
    opened.keys.ask_first_start()
    form = shown(qtbot, opened.window)
    typed = {
        "Name of the shop": "Own shop", "Printed name of the inspector": "Ida Quay",
        "Initials": "IQ", "New passphrase": NEW[0], "The same again": NEW[0] + "x",
        "New PIN, six digits or more": NEW[1], "The PIN again": NEW[1],
    }  # fmt: skip
    for label, text in typed.items():
        qtbot.keyClicks(field(form, label), text)
    qtbot.mouseClick(form.take, Qt.MouseButton.LeftButton)
    qtbot.waitUntil(lambda: form.said.isVisible(), timeout=10000)

    assert "two passphrases typed are not the same" in form.said.text()
    assert not opened.keys.needs_key
    form.reject()
