"""Instruments of the shop: calibrations, and what is done when one is found out."""

import uuid
from collections.abc import Iterable
from dataclasses import dataclass

from models.acts.numbering import number_findings
from models.acts.permissions import NotAllowedError
from models.assess import assess, live_entries
from models.assess.record_findings import read_with
from models.job import Calibration, Instrument, InstrumentEvent, Job, Person
from models.record import journal, queries
from models.record.finding_rows import add_instrument_event
from models.record.lookups import every_instrument
from models.record.store import Session, Store
from models.rules.progress import Permission

__all__ = ["Instruments", "Touched"]

_MAY_KEEP = ("engineer", "inspector")


@dataclass(frozen=True)
class Touched:
    """A reading that an instrument made after it was last known good."""

    job: str
    entry: str
    words: str
    done_at: str


class Instruments:
    """Everything a person can do about the shop's instruments."""

    def __init__(self, store: Store) -> None:
        self._store = store

    def known(self) -> tuple[Instrument, ...]:
        """List every instrument that the shop or a job knows, as calibrated last."""
        with self._store.reading() as session:
            return tuple(every_instrument(session))

    def history(self, tag: str) -> tuple[Calibration, ...]:
        """List an instrument's calibrations, the last one first."""
        with self._store.reading() as session:
            return queries.calibrations(session, tag)

    def events(self, tag: str) -> tuple[InstrumentEvent, ...]:
        """List what was found out about an instrument."""
        with self._store.reading() as session:
            return queries.shop_instrument_events(session, tag)

    def touched(self, tag: str, *, last_good_on: str) -> tuple[Touched, ...]:
        """List every reading made with an instrument after a day, over all jobs."""
        with self._store.reading() as session:
            jobs = [queries.read_job(session, row.number) for row in queries.job_rows(session)]
        return tuple(one for job in jobs for one in _touched(job, tag, last_good_on))

    def calibrate(
        self, instrument: Instrument, calibration: Calibration, *, person: Person, act_id: str
    ) -> None:
        """Record a calibration, for the shop and in every job that uses the instrument.

        Raises
        ------
        NotAllowedError
            If the person keeps no instruments, or the calibration's days cannot be.
        """
        _may_keep(person, f"the calibration of {instrument.tag}")
        if calibration.due_on < calibration.done_on:
            words = (
                f"{instrument.tag}: the calibration of {calibration.done_on} cannot fall due on "
                f"{calibration.due_on}, before it was made."
            )
            raise NotAllowedError(Permission(False, "due-before-done", words))
        with self._store.writing() as session:
            whole = _with_calibration(instrument, calibration)
            with journal.act(
                session, chain=journal.SHOP, kind="calibration", by=person.key, act_id=act_id
            ) as act:
                act.flush()
                if all(one.key != person.key for one in queries.people(session)):
                    act.add_people([person])
                act.add_instruments([whole])
            for number in _jobs_that_know(session, instrument.tag):
                with journal.act(
                    session,
                    chain=number,
                    kind="calibration",
                    by=person.key,
                    act_id=f"{act_id}/{number}",
                ) as act:
                    act.add_instruments([whole])

    def found_out(
        self, tag: str, *, last_good_on: str, words: str, person: Person, found_on: str, act_id: str
    ) -> tuple[Touched, ...]:
        """Record that an instrument was found out, and open a finding in every job it touched.

        Readings stay as they are; each one made since becomes a doubt that somebody decides.

        Raises
        ------
        NotAllowedError
            If the person keeps no instruments, or nothing says what was found.
        """
        _may_keep(person, f"what was found out about {tag}")
        if not words.strip():
            raise NotAllowedError(
                Permission(False, "words-missing", f"Say what was found out about {tag}.")
            )
        found: list[Touched] = []
        with self._store.writing() as session:
            event = InstrumentEvent(
                id=str(uuid.uuid4()),
                tag=tag,
                last_good_on=last_good_on,
                found_on=found_on,
                words=words,
                by=person.key,
            )
            with journal.act(
                session, chain=journal.SHOP, kind="found out", by=person.key, act_id=act_id
            ) as act:
                act.flush()
                if all(one.key != person.key for one in queries.people(session)):
                    act.add_people([person])
                add_instrument_event(act, event)
            for row in queries.job_rows(session):
                job = queries.read_job(session, row.number)
                mine = list(_touched(job, tag, last_good_on))
                if not mine:
                    continue
                found += mine
                with journal.act(
                    session,
                    chain=row.number,
                    kind="found out",
                    by=person.key,
                    act_id=f"{act_id}/{row.number}",
                ) as act:
                    add_instrument_event(act, event)
                    act.flush()
                    if not act.already_recorded:
                        view = assess(queries.read_job(session, row.number))
                        number_findings(act, view, at=act.done_at, rules=("instrument-still-good",))
        return tuple(found)


def _may_keep(person: Person, what: str) -> None:
    if person.role not in _MAY_KEEP:
        words = f"{person.name} is {person.role}; an inspector or an engineer records {what}."
        raise NotAllowedError(Permission(False, "role-may-not-keep", words))


def _with_calibration(instrument: Instrument, calibration: Calibration) -> Instrument:
    return Instrument(
        tag=instrument.tag,
        kind=instrument.kind,
        resolution=instrument.resolution,
        uncertainty=instrument.uncertainty,
        expansion=instrument.expansion,
        range=instrument.range,
        calibration=calibration,
    )


def _jobs_that_know(session: Session, tag: str) -> list[str]:
    return [
        row.number
        for row in queries.job_rows(session)
        if any(one.tag == tag for one in queries.instruments_of(session, row.number))
    ]


def _touched(job: Job, tag: str, last_good_on: str) -> Iterable[Touched]:
    for one in read_with(live_entries(job), tag, after=last_good_on):
        place = one.place
        where = f"step {place.step}, attempt {place.attempt}" if place.step else place.kind
        yield Touched(job.number, one.id, f"{one.title}, {where}", one.done_at)
