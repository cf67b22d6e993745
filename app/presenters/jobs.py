"""The shelf: each job as one row of a drawing register."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass, replace
from pathlib import Path

from PySide6.QtCore import QObject, Signal

from app.presenters.shop import Said, ShopPresenter
from app.presenters.wording import waits_for
from models import jobfile
from models.acts import new_id
from models.assess import Assessment, assess
from models.job import Job, Person
from models.record.queries import JobRow
from reports import job_pictures
from reports.sheet.pictures import RotorPicture, VerdictKind

__all__ = ["FILTERS", "JobsPresenter", "ShelfRow"]

FILTERS = ("Open", "Settled", "All")
"""Which jobs are shown."""

_FIGURES_ASKED = 3


@dataclass(frozen=True, kw_only=True)
class ShelfRow:
    """One job on the shelf."""

    number: str
    serial: str
    tag: str
    name: str
    customer: str
    built: str
    waits: str
    is_open: bool
    is_on_desks: bool
    picture: RotorPicture | None = None
    verdict: VerdictKind | None = None
    searched: str = ""

    @property
    def spoken(self) -> str:
        """The row as one text."""
        here = "on the desks" if self.is_on_desks else ""
        said = (f"{self.tag} {self.serial}", self.name, f"job {self.number}", self.built, here)
        return ". ".join(part for part in (*said, self.waits.rstrip(".")) if part)


class JobsPresenter(QObject):
    """Chooses which jobs are shown, and which of them is opened."""

    rows_changed = Signal()
    """Other rows are to be shown."""
    figures_wanted = Signal(str)
    """The serial's last figures are asked for, in a sentence."""
    figures_refused = Signal(str)
    """What was typed does not belong to that rotor; carries a sentence."""
    file_read = Signal(object)
    """A job file has been read whole; carries its job, which is not yet in the record."""
    opened = Signal(str)
    """A job has been laid on the desks; carries its number."""

    def __init__(self, shop: ShopPresenter, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._shop = shop
        # The bytes of the file read last, where it carries its chain.
        self._with_chain: bytes | None = None
        self._search = ""
        self._filter = FILTERS[0]
        self._wanted = ""
        shop.shelf_changed.connect(self.rows_changed)

    # -- what is shown

    @property
    def filter(self) -> str:
        """Which jobs are shown."""
        return self._filter

    def set_filter(self, word: str) -> None:
        """Show open jobs, settled ones, or all.

        Parameters
        ----------
        word : str
            One of `FILTERS`; another word shows open ones.
        """
        self._filter = word if word in FILTERS else FILTERS[0]
        self.rows_changed.emit()

    def search(self, words: str) -> None:
        """Show only jobs in which every word is found.

        Parameters
        ----------
        words : str
            Words of a serial, a tag, a customer, a part; an empty text shows all.
        """
        self._search = words
        self.rows_changed.emit()

    @property
    def rows(self) -> tuple[ShelfRow, ...]:
        """The rows to show, open jobs first."""
        every = [self._row(row) for row in self._shop.rows]
        words = self._search.casefold().split()
        shown = [
            row
            for row in every
            if (self._filter == "All" or row.is_open == (self._filter == "Open"))
            and all(word in row.searched for word in words)
        ]
        return tuple(sorted(shown, key=lambda row: not row.is_open))

    @property
    def is_read(self) -> bool:
        """Whether the shelf is known."""
        return self._shop.is_read

    @property
    def empty_words(self) -> str:
        """What to say where no row is shown."""
        if not self._shop.is_read:
            return "working: reading the shelf"
        if not self._shop.rows:
            return "No job yet. Open a job file."
        if self._search.strip():
            return f"No {self._filter_words()} holds “{self._search.strip()}”. Search for less."
        return f"There is no {self._filter_words()} here. Choose another filter."

    def _filter_words(self) -> str:
        return "job" if self._filter == "All" else f"{self._filter.lower()} job"

    def _row(self, row: JobRow) -> ShelfRow:
        view = self._shop.view_of(row.number)
        plain = ShelfRow(
            number=row.number,
            serial=row.rotor_serial,
            tag="",
            name=row.rotor_name,
            customer=row.customer,
            built=f"{row.steps_settled} of {row.steps} steps settled",
            waits="working: this job is being worked out",
            is_open=row.steps_settled < row.steps,
            is_on_desks=row.number == self._shop.job_number,
            searched=f"{row.number} {row.rotor_serial} {row.rotor_name} {row.customer}".casefold(),
        )
        return plain if view is None else _worked_out(plain, view)

    # -- opening one

    def ask_to_open(self, number: str) -> None:
        """Open a job at the bench; another rotor than the present one is asked about first.

        Parameters
        ----------
        number : str
            The job's number.
        """
        if number == self._shop.job_number or not self._shop.job_number:
            self._open(number)
            return
        self._wanted = number
        self.figures_wanted.emit(
            f"This changes the rotor. Read the serial on the rotor itself, and type its last "
            f"{_FIGURES_ASKED} figures or letters."
        )

    def give_figures(self, typed: str) -> None:
        """Compare the last figures of the serial with what was read off the rotor.

        Parameters
        ----------
        typed : str
            What was typed; spaces and dashes do not count.
        """
        row = next((one for one in self._shop.rows if one.number == self._wanted), None)
        if row is None:
            return
        wanted = _bare(row.rotor_serial)[-_FIGURES_ASKED:]
        if _bare(typed) != wanted:
            self.figures_refused.emit(
                f"“{typed.strip()}” is not how the serial of job {row.number} ends. Look at the "
                "rotor again: it may be another one."
            )
            return
        self._open(row.number)

    def _open(self, number: str) -> None:
        self._wanted = ""
        self._shop.choose_job(number)
        self.opened.emit(number)

    # -- files

    def read_file(self, path: Path) -> None:
        """Read a job file beside the window; one that cannot be taken is said, and not kept.

        Parameters
        ----------
        path : Path
            The file.
        """
        self._shop.background.run(
            lambda: self._read(path),
            words=f"reading {path.name}",
            done=self.file_read.emit,
            failed=lambda error: self._file_refused(path, error),
        )

    def _read(self, path: Path) -> Job:
        data = path.read_bytes()
        job = jobfile.loads(data)
        self._with_chain = data if jobfile.chain_of(data) else None
        return job

    def _file_refused(self, path: Path, error: Exception) -> None:
        if isinstance(error, jobfile.JobFileError):
            why = f"{error} Nothing of it was kept; correct the file and bring it in again."
            self._shop.said.emit(Said(what=f"{path.name} is not taken.", way_out=why))
        elif isinstance(error, OSError):
            why = f"{error.strerror or error}. Check the file and the right to read it."
            self._shop.said.emit(Said(what=f"{path.name} cannot be read.", way_out=why))
        else:
            raise error

    def bringer(self, job: Job) -> Person | None:
        """Give who brings a job in: whoever is signed in, if they are one of its people.

        Parameters
        ----------
        job : Job
            The job from the file.

        Returns
        -------
        Person or None
            None where one of the job's people has to be chosen.
        """
        return next((one for one in job.people if one.key == self._shop.person_key), None)

    def bring_in(self, job: Job, *, by: str) -> None:
        """Take a job into the record, with its chain where the file carries one.

        Parameters
        ----------
        job : Job
            The job from the file.
        by : str
            Key of who brings it in.
        """
        self._shop.bring_in(job, by=by, act_id=new_id(), with_chain=self._with_chain)

    def write_job_file(self, number: str, path: Path) -> None:
        """Write a job's portable form beside the window.

        Parameters
        ----------
        number : str
            The job's number.
        path : Path
            Where it is written.
        """
        self._in_background(
            f"writing the job file of {number}",
            lambda: self._shop.acts.write_file(number, path),
            f"The job file of {number} is written to {path}.",
        )

    def write_traveler(self, number: str, path: Path) -> None:
        """Write a job's traveler beside the window.

        Parameters
        ----------
        number : str
            The job's number.
        path : Path
            Where it is written.
        """

        def work() -> None:
            from reports import traveler

            traveler.write(assess(self._shop.acts.read(number)), path)

        self._in_background(
            f"writing the traveler of {number}",
            work,
            f"The traveler of {number} is written to {path}.",
        )

    def _in_background(self, words: str, work: Callable[[], object], said: str) -> None:
        def failed(error: Exception) -> None:
            if not isinstance(error, OSError):
                raise error
            why = f"{error.strerror or error}. Check the folder, its free space and its permission."
            self._shop.said.emit(Said(what=f"Stopped while {words}.", way_out=why))

        self._shop.background.run(
            work,
            words=words,
            done=lambda _: self._shop.said.emit(Said(what=said)),
            failed=failed,
        )


def _worked_out(plain: ShelfRow, view: Assessment) -> ShelfRow:
    rotor = view.job.plan.rotor
    nearest = view.next
    picture = job_pictures.rotor_picture(
        view, step=view.progress.current, attempt=nearest.attempt or 1, every_station=True
    )
    parts = [item.name for step in view.job.plan.steps for item in step.items]
    held = [one.serial for one in view.job.components]
    words = (plain.searched, rotor.machine_tag, rotor.plant, rotor.service, *parts, *held)
    return replace(
        plain,
        tag=rotor.machine_tag,
        name=f"{rotor.name} (invented)" if rotor.invented else rotor.name,
        waits=waits_for(view),
        is_open=view.progress.current is not None,
        picture=replace(picture, stations=(), drive_end_name=""),
        verdict=job_pictures.verdict_kind(view.verdict),
        searched=" ".join(words).casefold(),
    )


def _bare(text: str) -> str:
    return "".join(one for one in text.casefold() if one.isalnum())
