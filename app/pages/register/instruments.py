"""The register's instruments: when each is due, its calibrations, and what a bad one touched."""

from __future__ import annotations

from PySide6.QtGui import QShowEvent
from PySide6.QtWidgets import QHBoxLayout, QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.desk import Rule, Words, desk_key
from app.pages.table import DeskTable
from app.presenters.instruments import HistoryRow, InstrumentsPresenter, KnownInstrument
from app.viewmodels.rows import Column
from reports.palette import Colour
from reports.sheet.medium import Size

__all__ = ["InstrumentsLeaf"]


def _resolution(one: KnownInstrument) -> str:
    found = one.instrument.resolution
    return found.written if found is not None else ""


_COLUMNS = (
    Column[KnownInstrument](
        title="instrument",
        text=lambda one: one.instrument.tag,
        shape=lambda one: one.row.verdict,
        strong=True,
        share=0.9,
    ),
    Column[KnownInstrument](title="kind", text=lambda one: one.instrument.kind, share=1.5),
    Column[KnownInstrument](title="range", text=lambda one: one.instrument.range),
    Column[KnownInstrument](title="resolves", text=_resolution, share=0.8),
    Column[KnownInstrument](title="due", text=lambda one: one.row.due, share=0.8),
    Column[KnownInstrument](title="that is", text=lambda one: one.row.words, share=1.8),
)
_HISTORY_COLUMNS = (
    Column[HistoryRow](title="what", text=lambda row: row.what, strong=True, share=0.7),
    Column[HistoryRow](title="when", text=lambda row: row.day, share=0.9),
    Column[HistoryRow](title="in words", text=lambda row: row.words, share=3.0),
)


class InstrumentsLeaf(QWidget):
    """A table of instruments, the story of the one chosen beside it, and what may be recorded."""

    def __init__(
        self, presenter: InstrumentsPresenter, *, look: Look, parent: QWidget | None = None
    ) -> None:
        super().__init__(parent)
        self._presenter = presenter
        column = QVBoxLayout(self)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        row = QHBoxLayout()
        row.setContentsMargins(0, 0, 0, 0)
        row.setSpacing(0)
        self.table = DeskTable(_COLUMNS, name="Instruments of the shop", look=look)
        self.table.looked_at.connect(self._show)
        row.addWidget(self.table, 3)
        row.addWidget(Rule(look=look, upright=True))
        self.history = DeskTable(_HISTORY_COLUMNS, name="Its calibrations", look=look, edge=8)
        row.addWidget(self.history, 2)
        column.addLayout(row, 1)
        self._words = Words(look=look, size=Size.NOTE, colour=Colour.INK2)
        self._words.setContentsMargins(24, 6, 24, 6)
        column.addWidget(self._words)
        column.addWidget(Rule(look=look, parent=self))
        foot = QHBoxLayout()
        foot.setContentsMargins(24, 10, 24, 10)
        foot.setSpacing(12)
        self.calibrate = desk_key("New calibration …", look=look)
        self.calibrate.clicked.connect(self._ask_calibration)
        self.found_out = desk_key("Found out …", look=look)
        self.found_out.clicked.connect(self._ask_found_out)
        foot.addWidget(self.calibrate)
        foot.addWidget(self.found_out)
        foot.addStretch(1)
        column.addLayout(foot)
        presenter.changed.connect(self.refresh)
        presenter.history_read.connect(self._show_history)
        self.refresh()

    def refresh(self) -> None:
        """Show the instruments as the record has them."""
        chosen = self.table.present_row
        self.table.set_rows(self._presenter.rows)
        tags = [one.instrument.tag for one in self._presenter.rows]
        if chosen is not None and chosen.instrument.tag in tags:
            self.table.selectRow(tags.index(chosen.instrument.tag))
        elif tags:
            self.table.selectRow(0)
        self._words.say(self._presenter.words)
        self._show(self.table.present_row)

    def _show(self, row: KnownInstrument | None) -> None:
        self.history.set_rows(())
        self._presenter.look_at(row)
        may = self._presenter.may_keep(row)
        self.calibrate.setVisible(may)
        self.found_out.setVisible(may)

    def _show_history(self, tag: str, rows: tuple[HistoryRow, ...]) -> None:
        chosen = self.table.present_row
        if chosen is not None and chosen.instrument.tag == tag:
            self.history.set_rows(rows)

    def showEvent(self, event: QShowEvent) -> None:
        """Read the instruments anew whenever the leaf is turned to."""
        super().showEvent(event)
        self._presenter.read()

    def _ask_calibration(self) -> None:
        row: KnownInstrument | None = self.table.present_row
        if row is not None:
            self._presenter.ask_calibration(row)

    def _ask_found_out(self) -> None:
        row: KnownInstrument | None = self.table.present_row
        if row is not None:
            self._presenter.ask_found_out(row)
