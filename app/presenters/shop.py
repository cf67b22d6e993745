"""What every desk shares: the shop's jobs, which one lies on the desks, and who is signed in."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from typing import Any

from PySide6.QtCore import QObject, Signal

from app.presenters.background import Background
from app.presenters.keys import KeysPresenter
from app.presenters.writing import Writer
from models.acts import Acts, NotAllowedError, Recorded
from models.assess import Assessment, assess
from models.job import AnyEntry, Job, Person, Signature
from models.record.errors import RecordError
from models.record.queries import JobRow

__all__ = ["Said", "ShopPresenter"]


@dataclass(frozen=True, kw_only=True)
class Said:
    """Something to be said to whoever sits at the window."""

    what: str
    way_out: str = ""


class ShopPresenter(QObject):
    """Holds each job as worked out last; reads again, beside the window, when something changed."""

    shelf_changed = Signal()
    """The jobs, or what is worked out of one of them, changed."""
    job_changed = Signal()
    """Another job lies on the desks, or the one that does has changed."""
    person_changed = Signal()
    """Somebody else is signed in."""
    said = Signal(object)
    """Something to say that is no trouble with writing; carries a `Said`."""

    def __init__(
        self,
        acts: Acts,
        writer: Writer,
        background: Background,
        parent: QObject | None = None,
        *,
        keys: KeysPresenter | None = None,
    ) -> None:
        super().__init__(parent)
        self.acts = acts
        self.keys = keys
        self.writer = writer
        self.background = background
        self._rows: tuple[JobRow, ...] = ()
        self._is_read = False
        self._views: dict[str, Assessment] = {}
        self._number = ""
        self._person = ""
        self._stale = False
        self._desk_acts = 0
        writer.written.connect(self._mark_stale)

    # -- the shelf

    @property
    def rows(self) -> tuple[JobRow, ...]:
        """The jobs of the shop, the last opened first."""
        return self._rows

    @property
    def is_read(self) -> bool:
        """Whether the shelf has been read at all."""
        return self._is_read

    def view_of(self, number: str) -> Assessment | None:
        """Give a job as worked out last, None while it has not been.

        Parameters
        ----------
        number : str
            The job's number.

        Returns
        -------
        Assessment or None
            The job, worked out.
        """
        return self._views.get(number)

    def read_shelf(self) -> None:
        """Read the jobs of the shop, and work each of them out in turn."""
        self.background.run(
            self.acts.jobs,
            words="reading the shelf",
            done=self._have_shelf,
            failed=self._not_read,
        )

    def _have_shelf(self, rows: tuple[JobRow, ...]) -> None:
        self._rows = rows
        self._is_read = True
        numbers = [row.number for row in rows]
        self._views = {key: view for key, view in self._views.items() if key in numbers}
        if self._number not in numbers:
            self.choose_job("")
        self.shelf_changed.emit()
        # The one on the desks first: somebody is looking at it.
        for number in sorted(numbers, key=lambda one: one != self._number):
            self._work_out(number)

    def _work_out(self, number: str) -> None:
        self.background.run(
            lambda: assess(self.acts.read(number)),
            words=f"working out job {number}",
            done=self._have_view,
            failed=self._not_read,
        )

    def _have_view(self, view: Assessment) -> None:
        number = view.job.number
        self._views[number] = view
        self.shelf_changed.emit()
        if number == self._number:
            self.job_changed.emit()

    def _not_read(self, error: Exception) -> None:
        if not isinstance(error, RecordError):
            raise error
        self.said.emit(Said(what=str(error)))

    # -- the job on the desks

    @property
    def job_number(self) -> str:
        """Number of the job on the desks, or nothing."""
        return self._number

    @property
    def view(self) -> Assessment | None:
        """The job on the desks as worked out last."""
        return self._views.get(self._number)

    @property
    def job(self) -> Job | None:
        """The job on the desks as read last."""
        return self.view.job if self.view is not None else None

    def choose_job(self, number: str) -> None:
        """Lay another job on the desks.

        Parameters
        ----------
        number : str
            Its number.
        """
        if number == self._number:
            return
        self._number = number
        # Before the shelf is read nobody knows whether there is such a job; it is read with it.
        if self._is_read and number and number not in self._views:
            self._work_out(number)
        self.job_changed.emit()
        self.shelf_changed.emit()

    def _mark_stale(self) -> None:
        self._stale = True

    def read_all_anew(self) -> None:
        """Forget every job as it was read, and read the shelf: the record is another."""
        self._desk_acts += 1
        self._views.clear()
        self.read_shelf()
        self.job_changed.emit()

    def refresh(self) -> None:
        """Read the job on the desks again if anything has been written since."""
        if self._stale and self._number:
            self._stale = False
            self._work_out(self._number)

    # -- people

    @property
    def people(self) -> tuple[Person, ...]:
        """Who may be signed in: the people of the job on the desks, else of every job read."""
        if self.job is not None:
            return self.job.people
        known = {one.key: one for view in self._views.values() for one in view.job.people}
        return tuple(known.values())

    @property
    def person_key(self) -> str:
        """Key of who is signed in, or nothing."""
        return self._person

    @property
    def person(self) -> Person | None:
        """Who is signed in; None where nobody is, or nobody of this job."""
        return next((one for one in self.people if one.key == self._person), None)

    def sign_in(self, key: str) -> None:
        """Let somebody sit at the window; a sitting of somebody else ends.

        Whoever only looks and records is taken at their word; a signature asks for secrets.

        Parameters
        ----------
        key : str
            The person's key.
        """
        if key != self._person:
            self._person = key
            if self.keys is not None:
                self.keys.leave()
            self.person_changed.emit()

    # -- acts

    @property
    def desk_acts(self) -> int:
        """How many acts have been recorded away from the bench in this window [-]."""
        return self._desk_acts

    def record(self, entry: AnyEntry, *, done: Callable[[Recorded], None]) -> None:
        """Record an entry of the job on the desks; what is not allowed is said in its own words.

        Parameters
        ----------
        entry : AnyEntry
            The entry.
        done : callable
            Gets what the record says once it is on the disk.
        """
        number = self._number

        def written(recorded: Any) -> None:  # noqa: ANN401  (the Writer hands back anything)
            self._desk_acts += 1
            done(recorded)
            self.refresh()

        if isinstance(entry, Signature) and self.keys is not None and self.keys.needs_key:
            self.keys.ask_to_sign(number, entry, done=written)
            return
        self.writer.write(
            lambda: self.acts.record(number, entry), done=written, refused=self._refused
        )

    def _refused(self, error: Exception) -> None:
        if isinstance(error, NotAllowedError):
            self.said.emit(Said(what="This may not be recorded now.", way_out=error.words))
        elif isinstance(error, RecordError):
            self.said.emit(Said(what=str(error)))
        else:
            raise error

    def bring_in(self, job: Job, *, by: str, act_id: str, with_chain: bytes | None = None) -> None:
        """Take a job that was read from a job file into the record.

        Parameters
        ----------
        job : Job
            The job.
        by : str
            Key of who brings it in, one of the job's people.
        act_id : str
            Made before the first try, so that a retry brings nothing in twice.
        with_chain : bytes or None
            The file, where it carries its chain: the job is laid down as it is elsewhere.
        """

        def written(_: Any) -> None:  # noqa: ANN401  (the Writer hands back anything)
            self.said.emit(Said(what=f"Job {job.number} is in the record."))
            self.read_shelf()

        def act() -> None:
            if with_chain is None:
                self.acts.bring_in(job, by=by, act_id=act_id)
            else:
                self.acts.take_in(with_chain, by=by, act_id=act_id)

        self.writer.write(
            act,
            done=written,
            refused=self._refused,
        )
