"""What a job rests on: people, instruments, components, plans, and verdicts as they were given.

People, instruments and components keep their natural key through all versions; a later row
supersedes an earlier one and both stay.
"""

from sqlalchemy import CheckConstraint, Index, UniqueConstraint
from sqlalchemy.orm import Mapped
from sqlalchemy.schema import SchemaItem

from models.record.tables.base import Base, Recorded, points_to

__all__ = [
    "Calibration",
    "Component",
    "Instrument",
    "InstrumentUse",
    "Job",
    "Person",
    "PlanRevision",
    "PlanStep",
    "Verdict",
]


class Job(Recorded, Base):
    """A job is opened; its chain holds everything else about it."""

    __tablename__ = "job"

    number: Mapped[str]
    customer: Mapped[str]
    shop: Mapped[str]
    opened_at: Mapped[str]
    form: Mapped[str]
    edition: Mapped[int]
    # Last link of the record that the job was exported from, if it came from one.
    brought_head_sequence: Mapped[int | None]
    brought_head_digest: Mapped[str | None]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let a number belong to one job, and a chain hold one job."""
        return (UniqueConstraint("number"), UniqueConstraint("chain_id"))


class Person(Recorded, Base):
    """Somebody who acts; never deleted, only superseded."""

    __tablename__ = "person"

    person_key: Mapped[str]
    name: Mapped[str]
    initials: Mapped[str]
    role: Mapped[str]
    employer: Mapped[str]
    supersedes: Mapped[str | None]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let each version be superseded at most once."""
        return (
            points_to("person", "supersedes"),
            UniqueConstraint("chain_id", "supersedes"),
            Index(None, "chain_id", "person_key"),
        )


class Instrument(Recorded, Base):
    """A measuring instrument as known from then on."""

    __tablename__ = "instrument"

    tag: Mapped[str]
    kind: Mapped[str]
    resolution_typed: Mapped[str | None]
    resolution_unit: Mapped[str | None]
    resolution_nm: Mapped[int | None]
    # Expanded, k = 2.
    uncertainty_typed: Mapped[str | None]
    uncertainty_unit: Mapped[str | None]
    uncertainty_nm: Mapped[int | None]
    expansion_typed: Mapped[str | None]
    expansion_unit: Mapped[str | None]
    expansion_per_tera_kelvin: Mapped[int | None]
    range_words: Mapped[str]
    supersedes: Mapped[str | None]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let each version be superseded at most once."""
        return (
            points_to("instrument", "supersedes"),
            UniqueConstraint("chain_id", "supersedes"),
            Index(None, "chain_id", "tag"),
        )


class Calibration(Recorded, Base):
    """A calibration of one version of an instrument."""

    __tablename__ = "calibration"

    instrument_key: Mapped[str]
    done_on: Mapped[str]
    due_on: Mapped[str]
    certificate: Mapped[str]
    result: Mapped[str]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Tie it to its instrument."""
        return (
            points_to("instrument", "instrument_key"),
            UniqueConstraint("chain_id", "instrument_key"),
        )


class InstrumentUse(Recorded, Base):
    """An entry used an instrument; its facts are copied as they stood then."""

    __tablename__ = "instrument_use"

    entry_key: Mapped[str]
    instrument_key: Mapped[str]
    tag: Mapped[str]
    resolution_nm: Mapped[int | None]
    uncertainty_nm: Mapped[int | None]
    expansion_per_tera_kelvin: Mapped[int | None]
    calibration_done_on: Mapped[str | None]
    calibration_due_on: Mapped[str | None]
    calibration_certificate: Mapped[str | None]
    calibration_result: Mapped[str | None]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Tie an entry to a version of an instrument."""
        return (
            points_to("entry", "entry_key"),
            points_to("instrument", "instrument_key"),
            UniqueConstraint("chain_id", "entry_key", "tag"),
        )


class Component(Recorded, Base):
    """A physical part, and the position of the stack that it holds."""

    __tablename__ = "component"

    serial: Mapped[str]
    name: Mapped[str]
    item: Mapped[str]
    drawing: Mapped[str]
    revision: Mapped[str]
    certificate: Mapped[str]
    balance: Mapped[str]
    key_convention: Mapped[str]
    supersedes: Mapped[str | None]
    substitute_for: Mapped[str | None]
    approved_by: Mapped[str | None]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let each version be superseded at most once."""
        return (
            points_to("component", "supersedes"),
            UniqueConstraint("chain_id", "supersedes"),
            Index(None, "chain_id", "serial"),
        )


class PlanRevision(Recorded, Base):
    """A plan as issued: the whole document, and what is asked for often beside it."""

    __tablename__ = "plan_revision"

    number: Mapped[int]
    revision: Mapped[str]
    reason: Mapped[str]
    written_by_person: Mapped[str]
    issued_by_person: Mapped[str]
    issued_at: Mapped[str]
    rotor_name: Mapped[str]
    rotor_serial: Mapped[str]
    step_count: Mapped[int]
    document_json: Mapped[str]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Count the revisions of a job from 1."""
        return (
            UniqueConstraint("chain_id", "number"),
            CheckConstraint("number >= 1", name="number_counts_from_one"),
        )


class PlanStep(Recorded, Base):
    """A step of a plan revision in its order, so that the order can be asked for in SQL."""

    __tablename__ = "plan_step"

    plan_key: Mapped[str]
    number: Mapped[int]
    step: Mapped[str]
    title: Mapped[str]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let a step stand once in a plan, at one number."""
        return (
            points_to("plan_revision", "plan_key"),
            UniqueConstraint("chain_id", "plan_key", "number"),
            UniqueConstraint("chain_id", "plan_key", "step"),
        )


class Verdict(Recorded, Base):
    """A verdict as given at the moment it mattered."""

    __tablename__ = "verdict"

    subject: Mapped[str]
    rule: Mapped[str]
    edition: Mapped[int]
    verdict: Mapped[str]
    message: Mapped[str]
    inputs_json: Mapped[str]
    judged_at: Mapped[str]
    step: Mapped[str | None]
    attempt: Mapped[int | None]
