"""A plain form of labelled fields, to be filled from top to bottom with Enter alone."""

from __future__ import annotations

from collections.abc import Sequence

from PySide6.QtCore import QSize, Qt, Signal
from PySide6.QtGui import QPalette
from PySide6.QtWidgets import QFrame, QScrollArea, QVBoxLayout, QWidget

from app.entry.choice_row import ChoiceRow
from app.entry.fields import ChoiceField, FormField
from app.entry.form_rows import FormRow
from app.entry.line_row import LineRow
from app.frame.look import Look
from app.frame.plain import PlainWidget
from reports.palette import Colour

__all__ = ["FieldsForm"]


class FieldsForm(PlainWidget):
    """Labelled fields below each other. Enter takes and moves on; each answer is told at once."""

    answered = Signal(str, str)
    finished = Signal()

    def __init__(
        self,
        fields: Sequence[FormField] = (),
        *,
        name: str = "Form",
        look: Look | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name=name, look=look, parent=parent)
        self._rows: list[FormRow] = []
        self._area = QScrollArea(self)
        self._area.setFrameShape(QFrame.Shape.NoFrame)
        self._area.setWidgetResizable(True)
        self._area.setFocusPolicy(Qt.FocusPolicy.NoFocus)
        self._area.setHorizontalScrollBarPolicy(Qt.ScrollBarPolicy.ScrollBarAlwaysOff)
        around = QVBoxLayout(self)
        around.setContentsMargins(0, 0, 0, 0)
        around.addWidget(self._area)
        self.set_fields(fields)

    def set_fields(self, fields: Sequence[FormField]) -> None:
        """Ask other things; what was answered before is put away.

        Parameters
        ----------
        fields : sequence of FormField
            From top to bottom.
        """
        inner = QWidget()
        column = QVBoxLayout(inner)
        column.setContentsMargins(0, 0, 8, 0)
        column.setSpacing(0)
        self._rows = [self._row(field, inner) for field in fields]
        for row in self._rows:
            column.addWidget(row)
        column.addStretch(1)
        self._area.setWidget(inner)
        self._ground()
        if self._rows:
            self.setFocusProxy(self._rows[0])

    def _row(self, field: FormField, parent: QWidget) -> FormRow:
        row: FormRow
        if isinstance(field, ChoiceField):
            row = ChoiceRow(field, look=self._look, parent=parent)
        else:
            row = LineRow(field, look=self._look, parent=parent)
        row.answered.connect(self.answered)
        row.moved_on.connect(self._move_on)
        return row

    def row(self, name: str) -> FormRow:
        """Find a row.

        Parameters
        ----------
        name : str
            How the page knows its field.

        Returns
        -------
        FormRow
            The row.

        Raises
        ------
        KeyError
            If the form has no such field.
        """
        for row in self._rows:
            if row.name == name:
                return row
        raise KeyError(name)

    @property
    def answers(self) -> dict[str, str]:
        """What is answered, by field, without those that are empty."""
        return {row.name: row.answer for row in self._rows if row.answer}

    def set_answer(self, name: str, text: str) -> None:
        """Show what is recorded already.

        Parameters
        ----------
        name : str
            The field.
        text : str
            Its answer.
        """
        self.row(name).set_answer(text)

    def set_message(self, name: str, text: str) -> None:
        """Say something at a field.

        Parameters
        ----------
        name : str
            The field.
        text : str
            A sentence, or nothing.
        """
        self.row(name).set_message(text)

    def go_to(self, name: str) -> None:
        """Give a field the keyboard and show it.

        Parameters
        ----------
        name : str
            The field.
        """
        row = self.row(name)
        row.setFocus(Qt.FocusReason.OtherFocusReason)
        self._area.ensureWidgetVisible(row)

    def _move_on(self, name: str) -> None:
        place = next(index for index, row in enumerate(self._rows) if row.name == name) + 1
        if place < len(self._rows):
            self.go_to(self._rows[place].name)
        else:
            self.finished.emit()

    def sizeHint(self) -> QSize:
        """Give room for every row."""
        height = sum(row.sizeHint().height() for row in self._rows)
        return QSize(round(self._look.between(narrow=608.0, wide=872.0)), max(height, 44))

    def _ground(self) -> None:
        palette = QPalette(self._area.palette())
        palette.setColor(QPalette.ColorRole.Window, self._look.colour(Colour.PAPER))
        self._area.setPalette(palette)
        inner = self._area.widget()
        if inner is not None:
            inner.setPalette(palette)
            inner.setAutoFillBackground(True)

    def look_changed(self) -> None:
        """Hand the look on to every row."""
        self._ground()
        for row in self._rows:
            row.set_look(self._look)
