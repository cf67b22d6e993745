"""An act under way: rows gather in it and are in the record when its link is written."""

from collections.abc import Iterable
from typing import Any

from sqlalchemy import insert
from sqlalchemy.orm import Session

from models.job import (
    AnyEntry,
    AttemptOpened,
    Component,
    Head,
    Instrument,
    Job,
    OwnMaterial,
    Person,
    Plan,
    Question,
    StoredVerdict,
)
from models.record import gate, tables
from models.record.canonical import normal
from models.record.documents import inputs_text, material_text, plan_text
from models.record.entry_rows import Line, entry_lines, new_key, question_line
from models.record.errors import JobKnownError, UnknownJobError, UnknownPersonError
from models.record.flat import Cell, columns_of
from models.record.lookups import (
    instrument_in_force,
    last_version,
    people_known,
    plan_in_force,
    refuse_second_replacement,
)
from models.record.places import AnyReading
from models.record.reading_writer import closing_line, next_reading_line
from models.record.tables import Base, table

__all__ = ["BROUGHT_IN", "PROGRAM", "Act"]

# Acts of this kind repeat what another record or a job file holds; nothing is refused in them.
BROUGHT_IN = "brought in"
# Who acts where nobody does: the program keeps what a backup holds.
PROGRAM = "the program"

# What an entry keeps of its instrument as it stood then.
_COPIED = (
    "resolution_nm",
    "uncertainty_nm",
    "expansion_per_tera_kelvin",
    "calibration_done_on",
    "calibration_due_on",
    "calibration_certificate",
    "calibration_result",
)


class Act:
    """What one person does at one moment; made by `journal.act`, never directly.

    If an act of its id is in the record already, `already_recorded` is True and nothing that is
    added is recorded a second time.
    """

    def __init__(
        self,
        session: Session,
        *,
        chain_id: str,
        number: str | None,
        begun: bool,
        kind: str,
        by: str,
        done_at: str,
        sequence: int,
        recorded: Head | None,
    ) -> None:
        self._session = session
        self._number = number
        self._begun = begun
        self._waiting: list[Line] = []
        self._people: set[str] = {by}
        self.chain_id = chain_id
        self.kind = kind
        self.by = by
        self.done_at = done_at
        self.sequence = sequence
        self.already_recorded = recorded is not None
        # The link of this act; there once the act has ended.
        self.head = recorded
        self.rows: list[tuple[str, dict[str, Cell]]] = []

    def add_job(self, job: Job) -> None:
        """Open a job: its chain, its own facts, people, instruments, components and plans.

        Raises
        ------
        JobKnownError
            If the record holds a job of this number.
        """
        if self.already_recorded:
            return
        if self._begun or job.number != self._number:
            raise JobKnownError(self._number or job.number)
        self.begin_chain("job")
        facts = ("number", "customer", "shop", "opened_at", "form", "edition")
        others = tuple(name for name in job.__struct_fields__ if name not in facts)
        brought: dict[str, Cell] = {
            "brought_head_sequence": None if job.head is None else job.head.sequence,
            "brought_head_digest": None if job.head is None else job.head.digest,
        }
        row = {"key": new_key(), **columns_of(job, leave=others), **brought}
        self._put(Line(tables.Job, row))
        self.add_people(job.people)
        self.add_instruments(job.instruments)
        self.add_components(job.components)
        for plan in job.plans:
            self.add_plan(plan)

    def begin_chain(self, kind: str) -> None:
        """Put the first row of a chain."""
        self._begun = True
        self._put(Line(tables.Chain, {"key": self.chain_id, "kind": kind}))

    def add_people(self, people: Iterable[Person]) -> None:
        """Add people, or what changed about them; whoever is there unchanged stays as is."""
        for person in people:
            row = columns_of(person)
            row["person_key"] = row.pop("key")
            self._add_version(tables.Person, ("person_key",), row)

    def add_instruments(self, instruments: Iterable[Instrument]) -> None:
        """Add instruments with their calibration, or what changed about them."""
        for instrument in instruments:
            if self.already_recorded:
                return
            self.flush()
            known = instrument_in_force(self._session, self.chain_id, instrument.tag)
            if known is not None and known.facts == instrument:
                continue
            row = columns_of(instrument, leave=("calibration",))
            key = new_key()
            supersedes = None if known is None else known.key
            self._put(Line(tables.Instrument, {"key": key, **row, "supersedes": supersedes}))
            if instrument.calibration is not None:
                facts = columns_of(instrument.calibration)
                self._put(
                    Line(tables.Calibration, {"key": new_key(), "instrument_key": key, **facts})
                )

    def add_components(self, components: Iterable[Component]) -> None:
        """Add components, or what changed about them."""
        for component in components:
            self._add_version(tables.Component, ("serial", "item"), columns_of(component))

    def add_materials(self, materials: Iterable[OwnMaterial]) -> None:
        """Add materials of the shop's own, or what changed about them; the old version stays."""
        for one in materials:
            row: dict[str, Cell] = {
                "name": one.name,
                "source": one.source,
                "document_json": material_text(one),
            }
            self._add_version(tables.ShopMaterial, ("name",), row)

    def add_plan(self, plan: Plan) -> None:
        """Add a plan revision as issued; the last one again is not added twice."""
        if self.already_recorded:
            return
        self.flush()
        document = plan_text(plan)
        number, last = plan_in_force(self._session, self.chain_id)
        if document == last:
            return
        key = new_key()
        row: dict[str, Cell] = {
            "key": key,
            "number": number + 1,
            "revision": plan.revision,
            "reason": plan.reason,
            "written_by_person": plan.written_by,
            "issued_by_person": plan.issued_by,
            "issued_at": plan.issued_at,
            "rotor_name": plan.rotor.name,
            "rotor_serial": plan.rotor.serial,
            "step_count": len(plan.steps),
            "document_json": document,
        }
        self._put(Line(tables.PlanRevision, row))
        for count, step in enumerate(plan.steps, start=1):
            order: dict[str, Cell] = {"key": new_key(), "plan_key": key, "number": count}
            self._put(Line(tables.PlanStep, {**order, "step": step.key, "title": step.title}))

    def add_entry(self, entry: AnyEntry) -> None:
        """Add an entry with all it holds; a survey, heating or cooling may still be empty.

        Raises
        ------
        PredecessorNotSettledError
            If an attempt opens before the one in its way is settled, and no reason is given.
        UnfitEntryError
            If what it holds does not fit its own layout.
        AlreadyReplacedError
            If another entry has replaced the one that this one names.
        UnknownEntryError
            If the entry that this one replaces is not there.
        """
        if self.already_recorded:
            return
        if entry.supersedes is not None:
            self.flush()
            refuse_second_replacement(self._session, self.chain_id, entry.supersedes)
        if isinstance(entry, AttemptOpened) and self.kind != BROUGHT_IN:
            self.flush()
            gate.refuse_unsettled(self._session, self.chain_id, entry)
        for line in entry_lines(entry):
            self._put(line)
        self._note_use(entry)
        closed_at = getattr(entry, "closed_at", None)
        if closed_at is not None:
            self.close_survey(entry.id, closed_at)

    def add_reading(
        self,
        entry_id: str,
        reading: AnyReading,
        *,
        reason: str | None = None,
        by: str | None = None,
        taken_at: str | None = None,
    ) -> None:
        """Add a reading to an entry; one at a place that has a reading replaces it.

        Raises
        ------
        ReasonMissingError
            If it replaces a reading that is not the last of the entry, and no reason is given.
        SurveyClosedError
            If the survey is closed and has no reading at this place.
        UnknownEntryError
            If there is no such entry, or it takes no such reading.
        """
        if self.already_recorded:
            return
        self.flush()
        line = next_reading_line(
            self._session,
            self.chain_id,
            entry_id,
            reading,
            reason=reason,
            by=by,
            taken_at=taken_at or self.done_at,
        )
        self._put(line)

    def close_survey(self, entry_id: str, at: str) -> None:
        """Close a survey: from now on it can be judged, and takes no new places."""
        if self.already_recorded:
            return
        self.flush()
        self._put(closing_line(self._session, self.chain_id, entry_id, at))

    def add_question(self, entry_id: str, question: Question) -> None:
        """Keep a question about a reading, with its answer."""
        self._put(question_line(entry_id, question))

    def add_verdicts(self, verdicts: Iterable[StoredVerdict]) -> None:
        """Keep verdicts as given; no later rule rewrites them."""
        for verdict in verdicts:
            row = columns_of(verdict, leave=("id", "inputs"))
            inputs = {"inputs_json": inputs_text(verdict.inputs)}
            self._put(Line(tables.Verdict, {"key": verdict.id, **row, **inputs}))

    @property
    def session(self) -> Session:
        """The transaction that this act is part of."""
        return self._session

    def put(self, line: Line) -> None:
        """Add a row that a writer of its own subject has laid out."""
        self._put(line)

    def flush(self) -> None:
        """Send the waiting rows to the database, still within the transaction."""
        grouped: dict[type[Base], list[dict[str, Any]]] = {}
        for line in self._waiting:
            grouped.setdefault(line.table, []).append(line.row)
        self._waiting.clear()
        for kind, rows in grouped.items():
            self._session.execute(insert(table(kind)), rows)

    def refuse_strangers(self) -> None:
        """Refuse to end an act that names people whom the record does not know.

        Raises
        ------
        UnknownPersonError
            If it does.
        """
        if not self._begun:
            raise UnknownJobError(self._number or "")
        named = self._people - {PROGRAM}
        strangers = named - people_known(self._session, self.chain_id, named)
        if strangers:
            raise UnknownPersonError(tuple(sorted(strangers)))

    def _put(self, line: Line) -> None:
        if self.already_recorded:
            return
        if not self._begun:
            raise UnknownJobError(self._number or "")
        row: dict[str, Cell] = {
            "chain_id": self.chain_id,
            "key": "",
            "sequence": self.sequence,
            "line": len(self.rows) + 1,
        }
        for name, cell in line.row.items():
            row[name] = normal(cell) if isinstance(cell, str) else cell
            if name.endswith("by_person") and isinstance(cell, str):
                self._people.add(cell)
        self.rows.append((line.table.__tablename__, row))
        self._waiting.append(Line(line.table, row))

    def _add_version(
        self, kind: type[Base], natural: tuple[str, ...], row: dict[str, Cell]
    ) -> None:
        if self.already_recorded:
            return
        self.flush()
        named = {name: row[name] for name in natural}
        known = last_version(self._session, kind, self.chain_id, named)
        if known is not None and all(known[name] == cell for name, cell in row.items()):
            return
        supersedes = None if known is None else known["key"]
        self._put(Line(kind, {"key": new_key(), **row, "supersedes": supersedes}))

    def _note_use(self, entry: AnyEntry) -> None:
        tag = getattr(entry, "instrument", None)
        if tag is None:
            return
        self.flush()
        known = instrument_in_force(self._session, self.chain_id, tag)
        if known is None:
            return
        copied = {name: known.row[name] for name in _COPIED}
        of: dict[str, Cell] = {
            "key": new_key(),
            "entry_key": entry.id,
            "instrument_key": known.key,
            "tag": tag,
        }
        self._put(Line(tables.InstrumentUse, {**of, **copied}))
