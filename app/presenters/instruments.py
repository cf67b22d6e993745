"""The register's instruments: what they are, when they are due, and what a bad one touched."""

from __future__ import annotations

from collections.abc import Callable
from dataclasses import dataclass
from datetime import date
from typing import Any

from PySide6.QtCore import QObject, Signal

from app.entry.fields import TextField
from app.presenters.asker import Answers, Asker
from app.presenters.inspection_rows import InstrumentRow, instrument_row
from app.presenters.keys import Asking
from app.presenters.shop import Said, ShopPresenter
from app.presenters.wording import day_and_time
from models.acts import Instruments, Touched, new_id
from models.job import Calibration, Instrument, InstrumentEvent

__all__ = ["HistoryRow", "InstrumentsPresenter", "KnownInstrument"]

_MAY_KEEP = ("engineer", "inspector")


@dataclass(frozen=True, kw_only=True)
class HistoryRow:
    """A calibration, what was found out, or a reading that is in doubt since."""

    what: str
    day: str
    words: str


@dataclass(frozen=True, kw_only=True)
class KnownInstrument:
    """An instrument, and how long its calibration lasts."""

    instrument: Instrument
    row: InstrumentRow


class InstrumentsPresenter(Asker):
    """Reads instruments beside the window; asks for calibrations and for what was found out."""

    changed = Signal()
    """The instruments are read."""
    history_read = Signal(str, object)
    """The story of an instrument is read; carries its tag and a tuple of `HistoryRow`."""

    def __init__(
        self, shop: ShopPresenter, instruments: Instruments, parent: QObject | None = None
    ) -> None:
        super().__init__(shop.writer, parent)
        self._shop = shop
        self._instruments = instruments
        self._rows: tuple[KnownInstrument, ...] = ()
        shop.person_changed.connect(self.changed)

    @property
    def rows(self) -> tuple[KnownInstrument, ...]:
        """The instruments of the shop and of its jobs, the one due first at the top."""
        return self._rows

    @property
    def words(self) -> str:
        """What to know or do first."""
        if not self._rows:
            return "No instrument is known yet; they come with the jobs that use them."
        person = self._shop.person
        if person is None or person.role not in _MAY_KEEP:
            return (
                "An inspector or an engineer records calibrations. An instrument past due stops a "
                "signature, never a reading."
            )
        return "A calibration recorded here counts in every job that uses the instrument."

    def read(self) -> None:
        """Read the instruments beside the window."""
        self._shop.background.run(
            self._read,
            words="reading the instruments",
            done=self._have,
            failed=lambda error: self._shop.said.emit(Said(what=str(error))),
        )

    def _read(self) -> tuple[KnownInstrument, ...]:
        today = date.fromisoformat(self._shop.acts.now()[:10])
        known = sorted(
            self._instruments.known(),
            key=lambda one: one.calibration.due_on if one.calibration is not None else "",
        )
        return tuple(
            KnownInstrument(instrument=one, row=instrument_row(one, today)) for one in known
        )

    def look_at(self, row: KnownInstrument | None) -> None:
        """Read the story of the instrument chosen beside the window.

        Parameters
        ----------
        row : KnownInstrument or None
            The instrument chosen.
        """
        if row is None:
            self.history_read.emit("", ())
            return
        one = row.instrument
        self._shop.background.run(
            lambda: self._history(one),
            words=f"reading the story of {one.tag}",
            done=lambda found: self.history_read.emit(one.tag, found),
            failed=lambda error: self._shop.said.emit(Said(what=str(error))),
        )

    def _history(self, one: Instrument) -> tuple[HistoryRow, ...]:
        rows: list[HistoryRow] = []
        for event in self._instruments.events(one.tag):
            rows.append(_event_row(event))
            touched = self._instruments.touched(one.tag, last_good_on=event.last_good_on)
            rows += [_touched_row(each) for each in touched]
        rows += [_calibration_row(each) for each in self._instruments.history(one.tag)]
        return tuple(rows)

    def _have(self, found: tuple[KnownInstrument, ...]) -> None:
        self._rows = found
        self.changed.emit()

    def may_keep(self, row: KnownInstrument | None) -> bool:
        """Whether who is at the window may record something about the instrument chosen.

        Parameters
        ----------
        row : KnownInstrument or None
            The instrument chosen.

        Returns
        -------
        bool
            True where it may be asked.
        """
        person = self._shop.person
        return row is not None and person is not None and person.role in _MAY_KEEP

    def ask_calibration(self, row: KnownInstrument) -> None:
        """Ask for a calibration.

        Parameters
        ----------
        row : KnownInstrument
            The instrument.
        """
        person = self._shop.person
        if person is None:
            return
        act_id = new_id()

        def make(answers: Answers) -> Callable[[], Any]:
            calibration = Calibration(
                done_on=_day(answers["done on"]),
                due_on=_day(answers["due on"]),
                certificate=answers.get("certificate", "").strip(),
                result=answers.get("result", "").strip() or "within its limits",
            )
            return lambda: self._instruments.calibrate(
                row.instrument, calibration, person=person, act_id=act_id
            )

        self.ask(
            Asking(
                title="New calibration",
                who=f"{row.instrument.tag}, {row.instrument.kind}",
                lines=(f"Recorded by {person.name}, for the shop and every job that uses it.",),
                fields=(
                    TextField(name="done on", label="Calibrated on, as 2026-10-05"),
                    TextField(name="due on", label="Due again on"),
                    TextField(name="certificate", label="Certificate", optional=True),
                    TextField(name="result", label="Result as found", optional=True),
                ),
                take="Record the calibration",
            ),
            make,
            self._kept,
        )

    def ask_found_out(self, row: KnownInstrument) -> None:
        """Ask what was found out about an instrument.

        Parameters
        ----------
        row : KnownInstrument
            The instrument.
        """
        person = self._shop.person
        if person is None:
            return
        act_id = new_id()

        def make(answers: Answers) -> Callable[[], Any]:
            last_good = _day(answers["last good on"])
            words = answers["words"].strip()
            today = self._shop.acts.now()[:10]
            return lambda: self._instruments.found_out(
                row.instrument.tag,
                last_good_on=last_good,
                words=words,
                person=person,
                found_on=today,
                act_id=act_id,
            )

        self.ask(
            Asking(
                title="Found out",
                who=f"{row.instrument.tag}, {row.instrument.kind}",
                lines=(
                    "Every reading made since the day it was last good becomes a finding that "
                    "somebody decides, in every job. No reading is changed.",
                ),
                fields=(
                    TextField(name="last good on", label="Last known good on, as 2026-10-05"),
                    TextField(name="words", label="What was found out"),
                ),
                take="Open the findings",
            ),
            make,
            self._touched,
        )

    def _touched(self, found: tuple[Touched, ...]) -> None:
        jobs = sorted({one.job for one in found})
        words = f"{len(found)} readings in {', '.join(jobs)}" if found else "no reading"
        self._shop.said.emit(Said(what=f"It touched {words}."))
        self._kept(None)

    def _kept(self, _: Any) -> None:  # noqa: ANN401  (whatever the act gives back)
        self.read()
        self._shop.read_shelf()


def _day(written: str) -> str:
    try:
        return date.fromisoformat(written.strip()).isoformat()
    except ValueError:
        raise ValueError(f"“{written}” is no day; write it as 2026-10-05.") from None


def _calibration_row(one: Calibration) -> HistoryRow:
    paper = f", certificate {one.certificate}" if one.certificate else ""
    return HistoryRow(
        what="calibrated", day=one.done_on, words=f"due {one.due_on}{paper}; {one.result}"
    )


def _event_row(one: InstrumentEvent) -> HistoryRow:
    return HistoryRow(
        what="found out", day=one.found_on, words=f"last good {one.last_good_on}: {one.words}"
    )


def _touched_row(one: Touched) -> HistoryRow:
    return HistoryRow(
        what="read since", day=day_and_time(one.done_at), words=f"job {one.job}: {one.words}"
    )
