"""The plan in force, as tables and a drawing, with what its calculations still lack in words."""

from __future__ import annotations

from dataclasses import replace

from PySide6.QtCore import QObject, Signal

from app.presenters.plan_lacks import LackRow, lacks_of
from app.presenters.plan_rows import (
    MethodRow,
    StationRow,
    StepRow,
    method_rows,
    station_row,
    step_rows,
)
from app.presenters.shop import ShopPresenter
from app.presenters.wording import day_and_time
from models.job import Plan
from reports import job_pictures
from reports.sheet.pictures import RotorPicture

__all__ = ["PlanPresenter"]


class PlanPresenter(QObject):
    """Reads the plan of the job on the desks; changes nothing."""

    changed = Signal()
    """Another plan is to be shown."""

    def __init__(self, shop: ShopPresenter, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._shop = shop
        shop.job_changed.connect(self.changed)

    @property
    def plan(self) -> Plan | None:
        """The plan in force, None while no job lies on the desks."""
        return self._shop.job.plan if self._shop.job is not None else None

    @property
    def empty_words(self) -> str:
        """What to say where there is no plan to show."""
        if self._shop.job_number:
            return f"working: job {self._shop.job_number} is being read"
        return "No job lies on the desks. Choose one at the Jobs desk."

    @property
    def heading(self) -> str:
        """Rotor and revision."""
        plan = self.plan
        if plan is None:
            return ""
        invented = " (invented)" if plan.rotor.invented else ""
        return f"{plan.rotor.serial}{invented}, plan {plan.revision}"

    @property
    def standing(self) -> str:
        """Who wrote and issued it, when and why."""
        job, plan = self._shop.job, self.plan
        if job is None or plan is None:
            return ""
        names = {one.key: one.name for one in job.people}
        words = (
            f"Written by {names.get(plan.written_by, plan.written_by)}, issued by "
            f"{names.get(plan.issued_by, plan.issued_by)} {day_and_time(plan.issued_at)}: "
            f"{plan.reason.rstrip('.')}."
        )
        if plan.approved_by:
            words += f" Approved by {names.get(plan.approved_by, plan.approved_by)}."
        return words

    def picture(self, step: str | None) -> RotorPicture | None:
        """Draw the whole rotor with the parts numbered by step and every station.

        Parameters
        ----------
        step : str or None
            The step whose parts stand out; none stands out for None.

        Returns
        -------
        RotorPicture or None
            None while there is no plan.
        """
        view = self._shop.view
        if view is None:
            return None
        drawn = job_pictures.rotor_picture(view, step=step, numbers=True, every_station=True)
        # Every part is drawn as it will be; the row that is looked at says which one is meant.
        whole = job_pictures.rotor_picture(view, step=None, numbers=True, every_station=True)
        meant = {part.key for part in drawn.parts if part.state.value == "current"}
        parts = tuple(
            next(one for one in drawn.parts if one.key == part.key) if part.key in meant else part
            for part in whole.parts
        )
        return replace(whole, parts=parts)

    @property
    def steps(self) -> tuple[StepRow, ...]:
        """The stacking steps with lands, limits and where each limit comes from."""
        plan = self.plan
        if plan is None:
            return ()
        return tuple(
            row
            for number, step in enumerate(plan.steps, start=1)
            for row in step_rows(plan, number, step)
        )

    @property
    def stations(self) -> tuple[StationRow, ...]:
        """The stations in order along the rotor, with reach and final limit."""
        plan = self.plan
        if plan is None:
            return ()
        ordered = sorted(plan.stations, key=lambda one: one.position.whole)
        return tuple(station_row(plan, one) for one in ordered)

    @property
    def method(self) -> tuple[MethodRow, ...]:
        """How the shaft is surveyed, when it counts as cold, and who takes part."""
        job, plan = self._shop.job, self.plan
        if job is None or plan is None:
            return ()
        people = tuple(
            MethodRow(
                what=one.role, words=", ".join(part for part in (one.name, one.employer) if part)
            )
            for one in job.people
        )
        return (*method_rows(plan), *people)

    @property
    def lacks(self) -> tuple[LackRow, ...]:
        """What the plan leaves out."""
        return lacks_of(self.plan) if self.plan is not None else ()
