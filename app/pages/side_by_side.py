"""Two attempts side by side, each with its rotor, its centreline and its changes."""

from __future__ import annotations

from PySide6.QtCore import Qt, Signal
from PySide6.QtGui import QResizeEvent
from PySide6.QtWidgets import QHBoxLayout, QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.desk import DeskSheet, Rule, Words, desk_key
from app.pages.drawings import attempt_sheet
from app.presenters.attempt_picture import AttemptPicture
from app.presenters.inspection import InspectionPresenter
from reports.sheet.medium import Size
from reports.typeface import Weight

__all__ = ["SideBySide"]

_PLANES = 180.0


class _Half(QWidget):
    """One attempt, with keys to the earlier and the later one."""

    moved = Signal()

    def __init__(
        self, presenter: InspectionPresenter, side: str, *, look: Look, parent: QWidget
    ) -> None:
        super().__init__(parent)
        self._presenter = presenter
        self.place = 0
        self._look = look
        column = QVBoxLayout(self)
        column.setContentsMargins(16, 10, 16, 10)
        column.setSpacing(8)
        row = QHBoxLayout()
        row.setSpacing(8)
        for words, step in (("Earlier", -1), ("Later", 1)):
            key = desk_key(words, look=look, parent=self)
            key.setAccessibleName(f"{words} attempt at the {side}")
            key.clicked.connect(lambda _checked=False, step=step: self.move_by(step))
            row.addWidget(key)
        self.title = Words(look=look, weight=Weight.SEMI_BOLD)
        row.addWidget(self.title, 1)
        column.addLayout(row)
        self.sentence = Words(look=look, size=Size.TEXT)
        self.sentence.setAlignment(Qt.AlignmentFlag.AlignLeft | Qt.AlignmentFlag.AlignTop)
        self.sentence.setMinimumHeight(round(look.size(Size.TEXT) * 4.2))
        column.addWidget(self.sentence)
        self.sheet = DeskSheet(look=look, parent=self)
        column.addWidget(self.sheet)
        column.addStretch(1)

    def dress(self, look: Look) -> None:
        """Take over colours and sizes."""
        self._look = look
        self.sentence.setMinimumHeight(round(look.size(Size.TEXT) * 4.2))

    def move_by(self, step: int) -> None:
        """Show an earlier or a later attempt."""
        rows = self._presenter.attempts
        if rows:
            self.place = min(max(self.place + step, 0), len(rows) - 1)
            self.moved.emit()

    def picture(self) -> AttemptPicture | None:
        """Give what is drawn here, None where there is nothing."""
        rows = self._presenter.attempts
        return self._presenter.picture(rows[self.place]) if self.place < len(rows) else None

    def draw(self, beside: AttemptPicture | None) -> None:
        """Draw the attempt for the present width, magnified like the one beside it."""
        rows = self._presenter.attempts
        if not rows:
            self.title.say("No attempt has been surveyed yet.")
            self.sentence.say("")
            self.sheet.hide()
            return
        self.place = min(self.place, len(rows) - 1)
        row = rows[self.place]
        self.title.say(row.title)
        self.sentence.say(row.sentence)
        picture = self.picture()
        width = float(max(self.width() - 32, 360))
        if picture is not None:
            planes = self._look.between(narrow=_PLANES, wide=1.6 * _PLANES)
            sheet = attempt_sheet(picture, width=width, planes=planes, beside=beside)
            self.sheet.setFixedHeight(round(sheet.height))
            self.sheet.show_sheet(sheet)
            self.sheet.show()


class SideBySide(QWidget):
    """The left and the right attempt."""

    def __init__(
        self, presenter: InspectionPresenter, *, look: Look, parent: QWidget | None = None
    ) -> None:
        super().__init__(parent)
        self._presenter = presenter
        row = QHBoxLayout(self)
        row.setContentsMargins(8, 0, 8, 0)
        row.setSpacing(0)
        self.left = _Half(presenter, "left", look=look, parent=self)
        self.right = _Half(presenter, "right", look=look, parent=self)
        for half in (self.left, self.right):
            half.moved.connect(self.draw)
        row.addWidget(self.left, 1)
        row.addWidget(Rule(look=look, upright=True, parent=self))
        row.addWidget(self.right, 1)
        self._job = ""

    def refresh(self) -> None:
        """Show other attempts where another job lies on the desks."""
        view = self._presenter.view
        number = view.job.number if view is not None else ""
        if number != self._job:
            self._job = number
            self.left.place, self.right.place = self._presenter.first_pair()
        self.draw()

    def draw(self) -> None:
        """Draw both for the present width, if they are looked at."""
        if self.isVisible():
            left, right = self.left.picture(), self.right.picture()
            self.left.draw(right)
            self.right.draw(left)

    def showEvent(self, event: object) -> None:
        """Draw what was left undrawn while another leaf was in front."""
        self.refresh()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Draw for the new width."""
        super().resizeEvent(event)
        self.draw()
