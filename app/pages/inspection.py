"""The Inspection desk: what waits for a look, a decision or a name."""

from __future__ import annotations

from PySide6.QtCore import Qt
from PySide6.QtGui import QResizeEvent
from PySide6.QtWidgets import QGridLayout, QHBoxLayout, QStackedWidget, QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.desk import DeskPage, FlatLine, Rule, Words, desk_key
from app.pages.leaves import Leaves
from app.pages.side_by_side import SideBySide
from app.pages.table import DeskTable
from app.pages.told import add_told_leaves
from app.pages.worked_leaf import WorkedLeaf
from app.presenters.inspection import DISPOSITIONS, InspectionPresenter
from app.presenters.inspection_rows import (
    AmendmentRow,
    FindingRow,
    InstrumentRow,
    PointRow,
)
from app.presenters.reasons import Reason
from app.presenters.telling.telling import TellingPresenter
from app.viewmodels.rows import Column
from reports.palette import Colour
from reports.sheet.medium import Size
from reports.typeface import Weight

__all__ = ["InspectionPage"]

FINDINGS, POINTS, AMENDMENTS, INSTRUMENTS, BESIDE, WORKED = (
    "Findings",
    "Signatures",
    "Amendments",
    "Instruments",
    "Side by side",
    "Worked out",
)

_FINDING_COLUMNS = (
    Column[FindingRow](
        title="verdict",
        text=lambda row: row.phrase,
        shape=lambda row: row.kind,
        strong=True,
        share=1.25,
    ),
    Column[FindingRow](title="where", text=lambda row: row.where, share=1.5),
    Column[FindingRow](title="finding", text=lambda row: row.sentence, share=2.6),
)
_REASON_COLUMNS = (
    Column[Reason](title="it rests on", text=lambda row: row[0]),
    Column[Reason](title="which says", text=lambda row: row[1], share=1.5),
)
_POINT_COLUMNS = (
    Column[PointRow](title="point", text=lambda row: row.kind, share=0.6, strong=True),
    Column[PointRow](title="where", text=lambda row: row.where, share=2.0),
    Column[PointRow](title="what", text=lambda row: row.what, share=1.8),
    Column[PointRow](title="from", text=lambda row: row.role, share=0.8),
    Column[PointRow](
        title="until then",
        text=lambda row: "work does not go on" if row.holds else "work may go on",
        share=1.1,
    ),
)
_AMENDMENT_COLUMNS = (
    Column[AmendmentRow](title="where", text=lambda row: row.where, share=2.0),
    Column[AmendmentRow](title="was", text=lambda row: row.was, struck=True, share=0.8),
    Column[AmendmentRow](title="is", text=lambda row: row.now, strong=True, share=0.8),
    Column[AmendmentRow](title="because", text=lambda row: row.reason, share=1.6),
    Column[AmendmentRow](title="by", text=lambda row: row.by),
    Column[AmendmentRow](title="when", text=lambda row: row.at),
)
_INSTRUMENT_COLUMNS = (
    Column[InstrumentRow](
        title="instrument", text=lambda row: row.tag, shape=lambda row: row.verdict, strong=True
    ),
    Column[InstrumentRow](title="kind", text=lambda row: row.kind, share=1.6),
    Column[InstrumentRow](title="calibration due", text=lambda row: row.due),
    Column[InstrumentRow](title="that is", text=lambda row: row.words, share=2.4),
)


class InspectionPage(DeskPage):
    """The findings first, then what else an inspector looks at."""

    def __init__(
        self,
        presenter: InspectionPresenter,
        *,
        look: Look,
        telling: TellingPresenter | None = None,
        parent: QWidget | None = None,
    ) -> None:
        super().__init__(name="Inspection", look=look, parent=parent)
        self._presenter = presenter
        self._telling = telling
        around = QVBoxLayout(self)
        around.setContentsMargins(0, 0, 0, 0)
        self._stack = QStackedWidget(self)
        around.addWidget(self._stack)
        self._stack.addWidget(self._make_empty())
        self._stack.addWidget(self._make_whole())
        presenter.changed.connect(self.refresh)
        presenter.recorded.connect(self._say_recorded)
        self.refresh()

    def _make_empty(self) -> QWidget:
        empty = QWidget()
        column = QVBoxLayout(empty)
        column.setContentsMargins(24, 40, 24, 24)
        self._empty = Words(look=self.look, size=Size.LEAD, colour=Colour.INK2)
        column.addWidget(self._empty)
        column.addStretch(1)
        return empty

    def _make_whole(self) -> QWidget:
        whole = QWidget()
        column = QVBoxLayout(whole)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        head = QWidget()
        lines = QVBoxLayout(head)
        lines.setContentsMargins(24, 10, 24, 4)
        lines.setSpacing(2)
        self._heading = Words(look=self.look, size=Size.TITLE, weight=Weight.SEMI_BOLD)
        self._summary = Words(look=self.look, colour=Colour.INK2)
        lines.addWidget(self._heading)
        lines.addWidget(self._summary)
        column.addWidget(head)
        self.leaves = Leaves(look=self.look)
        self.amendments = DeskTable(_AMENDMENT_COLUMNS, name="Amendments", look=self.look)
        self.instruments = DeskTable(_INSTRUMENT_COLUMNS, name="Instruments", look=self.look)
        self.beside = SideBySide(self._presenter, look=self.look)
        self.worked = WorkedLeaf(lambda: self._presenter.worked, look=self.look)
        for name, leaf in (
            (FINDINGS, self._make_findings()),
            (POINTS, self._make_points()),
            (AMENDMENTS, self.amendments),
            (INSTRUMENTS, self.instruments),
            (BESIDE, self.beside),
            (WORKED, self.worked),
        ):
            self.leaves.add(name, leaf)
        if self._telling is not None:
            add_told_leaves(self.leaves, self._telling, look=self.look)
        column.addWidget(self.leaves, 1)
        return whole

    # -- findings

    def _make_findings(self) -> QWidget:
        leaf = QWidget()
        row = QHBoxLayout(leaf)
        row.setContentsMargins(0, 0, 0, 0)
        row.setSpacing(0)
        self.findings = DeskTable(_FINDING_COLUMNS, name="Findings", look=self.look)
        self.findings.looked_at.connect(self._show_reasons)
        row.addWidget(self.findings, 3)
        row.addWidget(Rule(look=self.look, upright=True))
        row.addWidget(self._make_reasons(), 2)
        return leaf

    def _make_reasons(self) -> QWidget:
        panel = QWidget()
        column = QVBoxLayout(panel)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        self._head = Words("Reasons", look=self.look, weight=Weight.SEMI_BOLD)
        self._head.setMargin(8)
        column.addWidget(self._head)
        self.reasons = DeskTable(
            _REASON_COLUMNS, name="What the verdict rests on", look=self.look, edge=8
        )
        column.addWidget(self.reasons, 1)
        column.addWidget(Rule(look=self.look))
        self._decision = QWidget()
        lines = QVBoxLayout(self._decision)
        lines.setContentsMargins(8, 8, 24, 12)
        lines.setSpacing(8)
        self._deciding = Words(look=self.look, weight=Weight.SEMI_BOLD)
        lines.addWidget(self._deciding)
        self._ways = QWidget()
        below = QVBoxLayout(self._ways)
        below.setContentsMargins(0, 0, 0, 0)
        below.setSpacing(8)
        self._grid = QGridLayout()
        self._grid.setSpacing(8)
        self._dispositions = {}
        for word in DISPOSITIONS:
            key = desk_key(word, look=self.look, parent=self._ways)
            key.setCheckable(True)
            key.clicked.connect(lambda _checked=False, word=word: self._choose(word))
            self._dispositions[word] = key
        below.addLayout(self._grid)
        self._why = FlatLine(name="Why it is decided so", hint="Why", look=self.look)
        self._why.entered.connect(self._decide)
        last = QHBoxLayout()
        last.setSpacing(8)
        last.addWidget(self._why, 1)
        decide = desk_key("Record the decision", look=self.look)
        decide.clicked.connect(self._decide)
        last.addWidget(decide)
        below.addLayout(last)
        lines.addWidget(self._ways)
        column.addWidget(self._decision)
        return panel

    def _show_reasons(self, row: FindingRow | None) -> None:
        self.reasons.set_rows(row.reasons if row is not None else ())
        words = "Choose a finding to see what it rests on."
        self._head.say(f"{row.phrase}: {row.where}" if row is not None else words)
        self._decision.setVisible(row is not None)
        self._deciding.say(self._presenter.deciding_words(row) if row is not None else "")
        self._offer(self._presenter.dispositions if row is not None and row.place else ())
        self._choose("")
        self._why.clear()

    def _offer(self, words: tuple[str, ...]) -> None:
        """Lay out the ways to decide that are open, and put the others away."""
        self._ways.setVisible(bool(words))
        for word, key in self._dispositions.items():
            self._grid.removeWidget(key)
            if word in words:
                place = words.index(word)
                self._grid.addWidget(key, place // 2, place % 2)
            key.setVisible(word in words)

    def _choose(self, word: str) -> None:
        for disposition, key in self._dispositions.items():
            key.setChecked(disposition == word)

    def _decide(self) -> None:
        row: FindingRow | None = self.findings.present_row
        chosen = [word for word, key in self._dispositions.items() if key.isChecked()]
        if row is not None:
            self._presenter.decide(row, chosen[0] if chosen else "", self._why.text())

    # -- signatures

    def _make_points(self) -> QWidget:
        leaf = QWidget()
        column = QVBoxLayout(leaf)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        self.points = DeskTable(_POINT_COLUMNS, name="Signatures waited for", look=self.look)
        self.points.looked_at.connect(self._show_signing)
        column.addWidget(self.points, 1)
        column.addWidget(Rule(look=self.look))
        foot = QWidget()
        row = QHBoxLayout(foot)
        row.setContentsMargins(24, 10, 24, 12)
        row.setSpacing(16)
        self._signing = Words(look=self.look)
        row.addWidget(self._signing, 1)
        self._sign = desk_key("Sign", look=self.look)
        self._sign.clicked.connect(self._sign_present)
        row.addWidget(self._sign, 0, Qt.AlignmentFlag.AlignVCenter)
        column.addWidget(foot)
        return leaf

    def _show_signing(self, row: PointRow | None) -> None:
        words = "No signature is waited for." if not self._presenter.points else "Choose a point."
        self._signing.say(self._presenter.signing_words(row) if row is not None else words)
        self._sign.setEnabled(row is not None)

    def _sign_present(self) -> None:
        row: PointRow | None = self.points.present_row
        if row is not None:
            self._presenter.sign(row)

    def _say_recorded(self, words: str) -> None:
        self._summary.say(words)

    # -- what is shown

    def refresh(self) -> None:
        """Show what waits now."""
        presenter = self._presenter
        self._empty.say(presenter.empty_words)
        self._stack.setCurrentIndex(0 if presenter.view is None else 1)
        self._heading.say(presenter.heading)
        self._summary.say(presenter.summary)
        self.worked.refresh()
        for table, rows, name in (
            (self.findings, presenter.findings, FINDINGS),
            (self.points, presenter.points, POINTS),
            (self.amendments, presenter.amendments, AMENDMENTS),
            (self.instruments, presenter.instruments, ""),
        ):
            table.set_rows(rows)
            if name:
                self.leaves.count(name, len(rows))
        if rows_left_unchosen(self.findings):
            self.findings.selectRow(0)
        self._show_reasons(self.findings.present_row)
        self._show_signing(self.points.present_row)
        self.beside.refresh()

    def handbook_words(self) -> str:
        """Name the rule of the finding in front."""
        row: FindingRow | None = self.findings.present_row
        return row.rule if row is not None else ""

    def entrance(self) -> QWidget:
        """Give what the leaf in front begins with."""
        return self.leaves.entrance()

    def look_changed(self) -> None:
        """Draw for the new width."""
        self.beside.draw()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Draw for the new width."""
        super().resizeEvent(event)
        self.beside.draw()


def rows_left_unchosen(table: DeskTable) -> bool:
    """Whether a table has rows and none of them is the present one.

    Parameters
    ----------
    table : DeskTable
        The table.

    Returns
    -------
    bool
        True where the first row may be chosen.
    """
    return table.model_of_rows.rowCount() > 0 and table.present_row is None
