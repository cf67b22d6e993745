"""The Plan desk: the rotor on a drawing sheet, and its plan in tables, to be read."""

from __future__ import annotations

from PySide6.QtGui import QResizeEvent
from PySide6.QtWidgets import QStackedWidget, QVBoxLayout, QWidget

from app.frame.look import Look
from app.pages.desk import DeskPage, DeskSheet, Rule, Words
from app.pages.drawings import rotor_sheet
from app.pages.leaves import Leaves
from app.pages.table import DeskTable
from app.presenters.plan import PlanPresenter
from app.presenters.plan_lacks import LackRow
from app.presenters.plan_rows import MethodRow, StationRow, StepRow
from app.viewmodels.rows import Column
from reports.palette import Colour
from reports.sheet.medium import Size
from reports.typeface import Weight

__all__ = ["PlanPage"]

STEPS, STATIONS, METHOD, LACKS = "Steps", "Stations", "Method and people", "What is lacking"

_STEP_COLUMNS = (
    Column[StepRow](title="step", text=lambda row: row.number, share=0.55, strong=True),
    Column[StepRow](title="part", text=lambda row: row.part, share=2.0),
    Column[StepRow](title="land", text=lambda row: row.land, share=1.9),
    Column[StepRow](title="interference", text=lambda row: row.interference, share=1.05),
    Column[StepRow](title="heat", text=lambda row: row.heat, share=0.9),
    Column[StepRow](title="axial position", text=lambda row: row.axial, share=1.05),
    Column[StepRow](title="change", text=lambda row: row.change, share=1.0),
    Column[StepRow](title="who signs", text=lambda row: row.signs, share=1.9),
    Column[StepRow](title="limits come from", text=lambda row: row.origins, share=2.9),
)
_STATION_COLUMNS = (
    Column[StationRow](title="station", text=lambda row: row.key, share=0.6, strong=True),
    Column[StationRow](title="what it is", text=lambda row: row.name, share=2.2),
    Column[StationRow](title="kind", text=lambda row: row.kind),
    Column[StationRow](title="at", text=lambda row: row.position, share=0.8, right=True),
    Column[StationRow](title="can be read", text=lambda row: row.reach, share=2.2),
    Column[StationRow](title="final limit", text=lambda row: row.limit, share=1.8),
)
_METHOD_COLUMNS = (
    Column[MethodRow](title="what", text=lambda row: row.what, share=0.8, strong=True),
    Column[MethodRow](title="as agreed", text=lambda row: row.words, share=4.0),
)
_LACK_COLUMNS = (
    Column[LackRow](title="missing", text=lambda row: row.missing, share=1.4, strong=True),
    Column[LackRow](title="so", text=lambda row: row.so, share=1.4),
    Column[LackRow](title="where", text=lambda row: row.where, share=3.0),
)


class PlanPage(DeskPage):
    """The drawing above, one table below."""

    def __init__(
        self, presenter: PlanPresenter, *, look: Look, parent: QWidget | None = None
    ) -> None:
        super().__init__(name="Plan", look=look, parent=parent)
        self._presenter = presenter
        self._step: str | None = None
        around = QVBoxLayout(self)
        around.setContentsMargins(0, 0, 0, 0)
        self._stack = QStackedWidget(self)
        around.addWidget(self._stack)
        self._stack.addWidget(self._make_empty())
        self._stack.addWidget(self._make_plan())
        presenter.changed.connect(self.refresh)
        self.refresh()

    def _make_empty(self) -> QWidget:
        empty = QWidget()
        column = QVBoxLayout(empty)
        column.setContentsMargins(24, 40, 24, 24)
        self._empty = Words(look=self.look, size=Size.LEAD, colour=Colour.INK2)
        column.addWidget(self._empty)
        column.addStretch(1)
        return empty

    def _make_plan(self) -> QWidget:
        whole = QWidget()
        column = QVBoxLayout(whole)
        column.setContentsMargins(0, 0, 0, 0)
        column.setSpacing(0)
        head = QWidget()
        lines = QVBoxLayout(head)
        lines.setContentsMargins(24, 10, 24, 6)
        lines.setSpacing(2)
        self._heading = Words(look=self.look, size=Size.TITLE, weight=Weight.SEMI_BOLD)
        self._standing = Words(look=self.look, size=Size.NOTE, colour=Colour.INK2)
        lines.addWidget(self._heading)
        lines.addWidget(self._standing)
        column.addWidget(head)
        self.sheet = DeskSheet(look=self.look)
        column.addWidget(self.sheet)
        column.addWidget(Rule(look=self.look))
        self.leaves = Leaves(look=self.look)
        self.tables = {
            STEPS: DeskTable(_STEP_COLUMNS, name="Steps of the plan", look=self.look),
            STATIONS: DeskTable(_STATION_COLUMNS, name="Stations", look=self.look),
            METHOD: DeskTable(_METHOD_COLUMNS, name="Method and people", look=self.look),
            LACKS: DeskTable(_LACK_COLUMNS, name="What the plan leaves out", look=self.look),
        }
        for name, table in self.tables.items():
            self.leaves.add(name, table)
        self.tables[STEPS].looked_at.connect(self._point_at)
        self.leaves.turned.connect(lambda _name: self._point_at(None))
        column.addWidget(self.leaves, 1)
        return whole

    def refresh(self) -> None:
        """Show the plan as it is known now."""
        presenter = self._presenter
        self._empty.say(presenter.empty_words)
        self._stack.setCurrentIndex(0 if presenter.plan is None else 1)
        self._heading.say(presenter.heading)
        self._standing.say(presenter.standing)
        self.tables[STEPS].set_rows(presenter.steps)
        self.tables[STATIONS].set_rows(presenter.stations)
        self.tables[METHOD].set_rows(presenter.method)
        self.tables[LACKS].set_rows(presenter.lacks)
        self.leaves.count(LACKS, len(presenter.lacks))
        self._draw()

    def entrance(self) -> QWidget:
        """Give what the leaf in front begins with."""
        return self.leaves.entrance()

    def _point_at(self, row: StepRow | None) -> None:
        step = row.step if row is not None else None
        if step != self._step:
            self._step = step
            self._draw()

    def _draw(self) -> None:
        plan = self._presenter.plan
        known = plan is not None and self._step in [one.key for one in plan.steps]
        picture = self._presenter.picture(self._step if known else None)
        if picture is None:
            return
        height = round(self.look.between(narrow=250.0, wide=360.0))
        self.sheet.setFixedHeight(height)
        self.sheet.show_sheet(
            rotor_sheet(picture, width=float(max(self.width(), 640)), height=float(height))
        )

    def look_changed(self) -> None:
        """Draw for the new width."""
        self._draw()

    def resizeEvent(self, event: QResizeEvent) -> None:
        """Draw for the new width."""
        super().resizeEvent(event)
        self._draw()
