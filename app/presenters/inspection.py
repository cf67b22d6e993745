"""What an inspector has to look at, decide and sign, in the job on the desks."""

from __future__ import annotations

from datetime import date
from typing import TypedDict, get_args

from PySide6.QtCore import QObject, Signal

from app.presenters.attempt_picture import (
    AttemptPicture,
    attempt_picture,
    attempt_sentence,
    bend_sentence,
)
from app.presenters.inspection_rows import (
    AmendmentRow,
    AttemptRow,
    FindingRow,
    InstrumentRow,
    PointRow,
    amendments_of,
    attempt_title,
    finding_row,
    instrument_row,
    many,
    points_of,
)
from app.presenters.shop import Said, ShopPresenter
from app.presenters.worked_rows import WorkedRow, worked_rows
from models.acts import new_id
from models.acts.beside import dispositions_open_to
from models.assess import Assessment
from models.job import Decision, Place, Signature
from models.job.plan import Disposition
from models.rules.rule import Verdict
from reports.job_pictures import verdict_kind

__all__ = ["DISPOSITIONS", "InspectionPresenter"]

DISPOSITIONS: tuple[str, ...] = get_args(Disposition)
"""How a finding may be decided."""

_MEANS: dict[str, str] = {
    "performed": "you did the work as it is recorded",
    "inspected": "you have read the record of it and agree with its verdicts",
    "witnessed": "you were present, or have read its record in place of that",
    "decided": "you have decided that work goes on as recorded",
}


class _Common(TypedDict):
    id: str
    place: Place
    by: str
    done_at: str
    entered_at: str
    plan: str


class InspectionPresenter(QObject):
    """Lists what waits; records decisions and signatures through the one door."""

    changed = Signal()
    """Something else waits now."""
    recorded = Signal(str)
    """A decision or a signature is on the disk; carries a sentence."""

    def __init__(self, shop: ShopPresenter, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._shop = shop
        shop.job_changed.connect(self.changed)
        shop.person_changed.connect(self.changed)

    @property
    def view(self) -> Assessment | None:
        """The job on the desks, worked out."""
        return self._shop.view

    @property
    def worked(self) -> tuple[WorkedRow, ...]:
        """Every number worked out, with what stands behind it."""
        return worked_rows(self.view) if self.view is not None else ()

    @property
    def empty_words(self) -> str:
        """What to say where there is nothing to inspect."""
        if self._shop.job_number:
            return f"working: job {self._shop.job_number} is being worked out"
        return "No job lies on the desks. Choose one at the Jobs desk."

    @property
    def heading(self) -> str:
        """Rotor and how many things wait."""
        if self.view is None:
            return ""
        rotor = self.view.job.plan.rotor
        return f"{rotor.serial}{' (invented)' if rotor.invented else ''}, inspection"

    @property
    def summary(self) -> str:
        """One sentence: what waits here."""
        findings, points = len(self.findings), len(self.points)
        if not findings and not points:
            return "Nothing waits for you."
        parts = [many(findings, "finding")] if findings else []
        parts += [many(points, "signature")] if points else []
        verb = "waits" if findings + points == 1 else "wait"
        return f"{' and '.join(parts)} {verb} for somebody."

    # -- findings

    @property
    def findings(self) -> tuple[FindingRow, ...]:
        """Every finding that is not within and not answered, worst first."""
        view = self.view
        if view is None:
            return ()
        waiting = [
            one
            for one in view.findings
            if one.answered_by is None and one.finding.verdict is not Verdict.WITHIN
        ]
        waiting.sort(key=lambda one: -one.finding.verdict.severity)
        return tuple(finding_row(view.job, one) for one in waiting)

    @property
    def dispositions(self) -> tuple[str, ...]:
        """What who is signed in may decide; nothing where that role, or nobody, decides."""
        person = self._shop.person
        return dispositions_open_to(person.role) if person is not None else ()

    def deciding_words(self, row: FindingRow) -> str:
        """Say above the ways to decide a finding whose they are, or why there is none.

        Parameters
        ----------
        row : FindingRow
            The finding.

        Returns
        -------
        str
            A line.
        """
        person = self._shop.person
        if row.place is None:
            return "Going on with the build answers this finding, not a decision."
        if person is None:
            return "Nobody is signed in. Say who is at the window, at the upper right, to decide."
        if not self.dispositions:
            return f"{person.name} is signed in as {person.role}; an inspector or engineer decides."
        if set(self.dispositions) != set(DISPOSITIONS):
            return "Decide about this finding; the rotor engineer also repairs or concedes"
        return "Decide about this finding"

    def decide(self, row: FindingRow, disposition: str, words: str) -> None:
        """Record a decision about a finding in the name of who is signed in.

        Parameters
        ----------
        row : FindingRow
            The finding.
        disposition : str
            One of `DISPOSITIONS`.
        words : str
            Why.
        """
        if not words.strip():
            self._shop.said.emit(
                Said(what="A decision says why.", way_out="Type the reason first.")
            )
            return
        if row.place is None:
            self._shop.said.emit(
                Said(
                    what="This finding is not decided.",
                    way_out="It is answered by going on with the build, not by a decision.",
                )
            )
            return
        chosen = next((one for one in get_args(Disposition) if one == disposition), None)
        if chosen is None:
            self._shop.said.emit(Said(what="A decision names what is to be done."))
            return
        common = self._common(row.place)
        if common is None:
            return
        entry = Decision(**common, about=row.key, disposition=chosen, words=words.strip())
        self._shop.record(
            entry, done=lambda _: self.recorded.emit(f"Decided: {chosen}, {row.where}.")
        )

    # -- points

    @property
    def points(self) -> tuple[PointRow, ...]:
        """The signatures that settled steps wait for."""
        view = self.view
        return tuple(points_of(view)) if view is not None else ()

    def signing_words(self, row: PointRow) -> str:
        """Say whose name is about to stand under what, and what it means.

        Parameters
        ----------
        row : PointRow
            The signature that is waited for.

        Returns
        -------
        str
            Two sentences.
        """
        person = self._shop.person
        if person is None:
            return "Nobody is signed in. Say who is at the window first, at the upper right."
        if person.role != row.role:
            return (
                f"This waits for the {row.role}. {person.name} is signed in as {person.role}, and "
                "that name will not be taken here."
            )
        return (
            f"“{person.name}, {person.role}” is about to stand under {row.where}: {row.what}. "
            f"It says “{row.meaning}”: {_MEANS[row.meaning]}."
        )

    def sign(self, row: PointRow) -> None:
        """Put the name of who is signed in under an attempt.

        Parameters
        ----------
        row : PointRow
            The signature that is waited for.
        """
        person = self._shop.person
        common = self._common(Place(kind="attempt", step=row.step, attempt=row.attempt))
        if common is None or person is None:
            return
        entry = Signature(**common, role=person.role, meaning=row.meaning, covers=row.what)
        self._shop.record(
            entry,
            done=lambda _: self.recorded.emit(f"{person.name} has signed {row.where}."),
        )

    def _common(self, place: Place) -> _Common | None:
        job, person = self._shop.job, self._shop.person
        if job is None or person is None:
            self._shop.said.emit(
                Said(
                    what="Nobody of this job is signed in.",
                    way_out="Say who is at the window first, at the upper right.",
                )
            )
            return None
        now = self._shop.acts.now()
        return {
            "id": new_id(),
            "place": place,
            "by": person.key,
            "done_at": now,
            "entered_at": now,
            "plan": job.plan.revision,
        }

    # -- amendments and instruments

    @property
    def amendments(self) -> tuple[AmendmentRow, ...]:
        """What was replaced, the latest first."""
        view = self.view
        rows = list(amendments_of(view.job)) if view is not None else []
        return tuple(sorted(rows, key=lambda row: row.at, reverse=True))

    @property
    def instruments(self) -> tuple[InstrumentRow, ...]:
        """The job's instruments, the one due first at the top."""
        view = self.view
        if view is None:
            return ()
        today = date.fromisoformat(self._shop.acts.now()[:10])
        known = sorted(
            view.job.instruments,
            key=lambda one: one.calibration.due_on if one.calibration is not None else "",
        )
        return tuple(instrument_row(one, today) for one in known)

    # -- side by side

    @property
    def attempts(self) -> tuple[AttemptRow, ...]:
        """The attempts that were surveyed, in the order of the work."""
        view = self.view
        if view is None:
            return ()
        return tuple(
            AttemptRow(
                step=one.step.key,
                attempt=one.number,
                title=attempt_title(view, one),
                sentence=" ".join((attempt_sentence(one), *bend_sentence(one))),
                kind=verdict_kind(one.verdict_of("runout-changed")),
            )
            for one in view.attempts
            if one.judged is not None
        )

    def first_pair(self) -> tuple[int, int]:
        """Choose which two attempts lie side by side first.

        Returns
        -------
        tuple of int
            Places in `attempts`: a step's first remount, else the last two.
        """
        rows = self.attempts
        for place in range(1, len(rows)):
            if rows[place].step == rows[place - 1].step:
                return place - 1, place
        return max(len(rows) - 2, 0), max(len(rows) - 1, 0)

    def picture(self, row: AttemptRow) -> AttemptPicture | None:
        """Draw an attempt.

        Parameters
        ----------
        row : AttemptRow
            The attempt.

        Returns
        -------
        AttemptPicture or None
            None where the job no longer has it.
        """
        view = self.view
        found = view.attempt(row.step, row.attempt) if view is not None else None
        return attempt_picture(view, found) if view is not None and found is not None else None
