"""The register's materials: what plans may name, and what the shop adds."""

from __future__ import annotations

from PySide6.QtGui import QShowEvent
from PySide6.QtWidgets import QHBoxLayout, QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.ask_form import AskForm
from app.pages.desk import Rule, Words, desk_key
from app.pages.table import DeskTable
from app.presenters.materials import MaterialRow, MaterialsPresenter
from app.presenters.reasons import Reason
from app.viewmodels.rows import Column
from reports.palette import Colour
from reports.sheet.medium import Size

__all__ = ["MaterialsLeaf"]

_COLUMNS = (
    Column[MaterialRow](title="material", text=lambda row: row.name, share=1.2, strong=True),
    Column[MaterialRow](title="kept by", text=lambda row: row.kept_by, share=0.6),
    Column[MaterialRow](
        title="mean expansion from 20 °C, µm/(m·K)", text=lambda row: row.expansion, share=2.0
    ),
    Column[MaterialRow](title="modulus, GPa", text=lambda row: row.modulus, share=1.5),
    Column[MaterialRow](title="density", text=lambda row: row.density, share=0.8),
    Column[MaterialRow](title="yield", text=lambda row: row.strength, share=0.7),
)
_REASON_COLUMNS = (
    Column[Reason](title="number", text=lambda row: row[0], share=0.5),
    Column[Reason](title="comes from", text=lambda row: row[1], share=2.0),
)


class MaterialsLeaf(QWidget):
    """A table of materials, the sources of the one looked at, and the key that adds one."""

    def __init__(
        self, presenter: MaterialsPresenter, *, look: Look, parent: QWidget | None = None
    ) -> None:
        super().__init__(parent)
        self._presenter = presenter
        self._look = look
        self._form: AskForm | None = None
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        row = QHBoxLayout()
        row.setSpacing(0)
        self.table = DeskTable(_COLUMNS, name="Materials", look=look)
        self.sources = DeskTable(_REASON_COLUMNS, name="Sources of a material", look=look)
        row.addWidget(self.table, 3)
        row.addWidget(self.sources, 2)
        column.addLayout(row, 1)
        self._words = Words(look=look, size=Size.NOTE, colour=Colour.INK2)
        self._words.setContentsMargins(24, 6, 24, 6)
        column.addWidget(self._words)
        column.addWidget(Rule(look=look, parent=self))
        foot = QHBoxLayout()
        foot.setContentsMargins(24, 10, 24, 10)
        self.add = desk_key("Add a material …", look=look)
        self.add.clicked.connect(self._ask)
        foot.addWidget(self.add)
        foot.addStretch(1)
        column.addLayout(foot)
        self.setFocusProxy(self.table)
        self.table.looked_at.connect(self._open)
        presenter.changed.connect(self.refresh)
        presenter.kept.connect(self._done)
        presenter.refused.connect(self._refused)
        self.refresh()

    def showEvent(self, event: QShowEvent) -> None:
        """Read what the shop has added."""
        super().showEvent(event)
        self._presenter.read()

    @property
    def form(self) -> AskForm | None:
        """The form that is open, if one is."""
        return self._form

    def refresh(self) -> None:
        """Show the materials as they are known now."""
        self.table.set_rows(self._presenter.rows)
        self._open(self.table.present_row)
        self._words.say(self._presenter.words)
        self.add.setVisible(self._presenter.person is not None)

    def _open(self, row: MaterialRow | None) -> None:
        self.sources.set_rows(row.reasons if row is not None else ())

    def _ask(self) -> None:
        asking = self._presenter.asking()
        if asking is None or self._form is not None:
            return
        form = AskForm(asking, look=self._look, parent=self)
        self._form = form
        form.answered.connect(self._presenter.keep)
        form.given_up.connect(self._forget)
        form.open()

    def _refused(self, words: str) -> None:
        if self._form is not None:
            self._form.refuse(words)

    def _done(self) -> None:
        if self._form is not None:
            form = self._form
            self._forget()
            form.accept()
            form.deleteLater()

    def _forget(self) -> None:
        self._form = None
