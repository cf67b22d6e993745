"""Tells what happens beside the mounting, and lists it with numbered findings and old verdicts."""

from __future__ import annotations

from collections.abc import Callable
from typing import Any

from PySide6.QtCore import QObject, Signal

from app.presenters.asker import Answers, Asker
from app.presenters.keys import Asking
from app.presenters.shop import Said, ShopPresenter
from app.presenters.telling.forms import FORMS, common_of
from app.presenters.telling.rows import (
    NumberedRow,
    OldVerdictRow,
    ToldRow,
    numbered_rows,
    old_verdict_rows,
    told_rows,
)
from models.assess.record_findings import outside_open
from models.job import Attachment
from models.record.files import AttachedFileError

__all__ = ["TellingPresenter"]


class TellingPresenter(Asker):
    """One plain form at a time, in the name of who is at the window."""

    changed = Signal()
    """Something else is recorded now."""

    def __init__(self, shop: ShopPresenter, parent: QObject | None = None) -> None:
        super().__init__(shop.writer, parent)
        self._shop = shop
        shop.job_changed.connect(self.changed)

    @property
    def told(self) -> tuple[ToldRow, ...]:
        """What was told beside the mounting, the latest first."""
        return tuple(told_rows(self._shop.job)) if self._shop.job is not None else ()

    @property
    def numbered(self) -> tuple[NumberedRow, ...]:
        """The numbered findings, the last one first."""
        return tuple(numbered_rows(self._shop.view)) if self._shop.view is not None else ()

    @property
    def old_verdicts(self) -> tuple[OldVerdictRow, ...]:
        """Stored verdicts that today's rules would give otherwise."""
        return tuple(old_verdict_rows(self._shop.view)) if self._shop.view is not None else ()

    @property
    def offered(self) -> frozenset[str]:
        """Which forms make sense now."""
        job = self._shop.job
        if job is None:
            return frozenset()
        offered = set(FORMS)
        if not outside_open(job.entries):
            offered.discard("back")
        if not any(step.points for step in job.plan.steps):
            offered.discard("point")
        return frozenset(offered)

    def press(self, name: str) -> None:
        """Ask for what a key says.

        Parameters
        ----------
        name : str
            One of those offered.
        """
        job, person = self._shop.job, self._shop.person
        if job is None or name not in self.offered:
            return
        if person is None:
            self._shop.said.emit(
                Said(
                    what="Nobody of this job is signed in.",
                    way_out="Say who is at the window first, at the upper right.",
                )
            )
            return
        form = FORMS[name]

        def make(answers: Answers) -> Callable[[], Any]:
            now = self._shop.acts.now()
            told = form.make(job, common_of(job, person, now, answers), answers)
            entry, content = told.entry, told.content
            if content is not None and isinstance(entry, Attachment):
                return lambda: self._shop.acts.attach(job.number, entry, content)
            return lambda: self._shop.acts.record(job.number, entry)

        self.ask(
            Asking(
                title=form.title,
                who=f"{person.name}, {person.role}",
                lines=form.lines,
                fields=form.fields(job),
                take=form.take,
            ),
            make,
            self._recorded,
        )

    def _recorded(self, _: Any) -> None:  # noqa: ANN401  (whatever the act gives back)
        self._shop.refresh()

    def look_at(self, row: ToldRow) -> bytes | None:
        """Read an attached file; what is wrong with it is said.

        Parameters
        ----------
        row : ToldRow
            The entry.

        Returns
        -------
        bytes or None
            Its content; None where it is no file, missing or changed.
        """
        if not isinstance(row.entry, Attachment):
            return None
        try:
            return self._shop.acts.attached(row.entry)
        except AttachedFileError as trouble:
            self._shop.said.emit(Said(what=str(trouble)))
            return None
