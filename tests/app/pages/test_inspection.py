import msgspec
import pytest
from PySide6.QtCore import Qt
from PySide6.QtWidgets import QAbstractButton, QLineEdit

from app.frame.look import Look
from app.pages.inspection import BESIDE, FINDINGS, POINTS, InspectionPage
from app.presenters.inspection import InspectionPresenter
from models.assess import assess
from models.job import Decision, Signature
from sample_data.load import compressor
from tests.app.open_shop import COMPRESSOR


@pytest.fixture
def page(shop, qtbot):
    made = InspectionPage(InspectionPresenter(shop.presenter), look=Look())
    qtbot.addWidget(made)
    made.resize(1280, 764)
    with qtbot.waitActive(made):
        made.show()
        made.activateWindow()
    shop.open(COMPRESSOR, "BQ")
    return made


def named(page, name):
    kinds = (QAbstractButton, QLineEdit)
    found = [one for kind in kinds for one in page.findChildren(kind)]
    return next(one for one in found if one.accessibleName() == name)


def lay(shop, entries):
    shop.presenter._views[COMPRESSOR] = assess(
        msgspec.structs.replace(compressor(), entries=entries)
    )
    shop.presenter.job_changed.emit()


@pytest.fixture
def doubtful(page, shop):
    """Lay the job on the desks as it stood before anything had been decided."""
    lay(shop, tuple(one for one in compressor().entries if not isinstance(one, Decision)))
    page.findings.selectRow(0)
    return page


@pytest.fixture
def unsigned(page, shop):
    """Lay the job on the desks as it stood before the last inspection."""
    job = compressor()
    last = [one for one in job.entries if isinstance(one, Signature) and one.meaning == "inspected"]
    lay(shop, tuple(one for one in job.entries if one is not last[-1]))
    page.leaves.turn_to(POINTS)
    return page


def test_the_finding_that_is_looked_at_opens_beside_the_list(doubtful):
    told = [row[0] for row in doubtful.reasons.model_of_rows.rows]

    assert told[0] == "rule"
    assert "why it was taken out of order" in told
    assert doubtful.leaves._keys[FINDINGS].accessibleName() == "Findings: 2"


def test_a_disposition_and_a_reason_decide_a_finding(doubtful, shop, qtbot):
    qtbot.mouseClick(named(doubtful, "read again"), Qt.MouseButton.LeftButton)
    qtbot.keyClicks(named(doubtful, "Why it is decided so"), "Read it cold.")
    qtbot.keyClick(named(doubtful, "Why it is decided so"), Qt.Key.Key_Return)
    shop.settle()

    entry = shop.acts.read(COMPRESSOR).entries[-1]
    assert (entry.disposition, entry.words, entry.by) == ("read again", "Read it cold.", "BQ")


def test_only_one_disposition_is_pressed_at_a_time(doubtful, qtbot):
    for word in ("scrap", "rework"):
        qtbot.mouseClick(named(doubtful, word), Qt.MouseButton.LeftButton)

    assert named(doubtful, "rework").isChecked()
    assert not named(doubtful, "scrap").isChecked()


@pytest.mark.parametrize(
    ("person", "conceding", "reading_again"),
    [("BQ", False, True), ("DO", True, True), ("AT", False, False)],
)
def test_the_ways_follow_who_is_signed_in(doubtful, shop, person, conceding, reading_again):
    shop.presenter.sign_in(person)
    doubtful.findings.selectRow(0)

    for word in ("repair", "use as is under concession"):
        assert named(doubtful, word).isVisible() is conceding
    assert named(doubtful, "read again").isVisible() is reading_again
    assert named(doubtful, "Record the decision").isVisible() is reading_again


def test_a_finding_about_the_whole_rotor_offers_no_decision(page):
    assert not named(page, "read again").isVisible()


def test_a_point_is_signed_with_enter_on_its_key(unsigned, shop, qtbot):
    assert not named(unsigned, "Sign").isEnabled()
    unsigned.points.selectRow(0)
    qtbot.keyClick(named(unsigned, "Sign"), Qt.Key.Key_Return)
    shop.settle()

    entry = shop.acts.read(COMPRESSOR).entries[-1]
    assert isinstance(entry, Signature)
    assert (entry.by, entry.meaning) == ("BQ", "inspected")


def test_taking_a_row_alone_signs_nothing(unsigned, shop, qtbot):
    before = len(shop.acts.read(COMPRESSOR).entries)
    unsigned.points.selectRow(0)
    qtbot.keyClick(unsigned.points, Qt.Key.Key_Return)
    shop.settle()

    assert len(shop.acts.read(COMPRESSOR).entries) == before


def test_two_attempts_lie_side_by_side_at_one_magnification(page):
    page.leaves.turn_to(BESIDE)
    left, right = page.beside.left.sheet.sheet(), page.beside.right.sheet.sheet()

    assert "attempt 1" in page.beside.left.title.text()
    assert "attempt 2" in page.beside.right.title.text()
    written = [
        {item.text for item in sheet.items if getattr(item, "text", "").startswith("×")}
        for sheet in (left, right)
    ]
    assert written[0] == written[1] != set()


def test_keys_walk_to_an_earlier_and_a_later_attempt(page, qtbot):
    page.leaves.turn_to(BESIDE)
    before = page.beside.left.title.text()
    qtbot.mouseClick(named(page, "Earlier attempt at the left"), Qt.MouseButton.LeftButton)
    earlier = page.beside.left.title.text()
    qtbot.mouseClick(named(page, "Later attempt at the left"), Qt.MouseButton.LeftButton)

    assert earlier != before
    assert page.beside.left.title.text() == before


def test_every_control_has_a_name(page):
    controls = [*page.findChildren(QAbstractButton), *page.findChildren(QLineEdit)]
    controls = [one for one in controls if one.objectName() != "qt_spinbox_lineedit"]

    assert [one for one in controls if not one.accessibleName() and one.isVisible()] == []
