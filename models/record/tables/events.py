"""Entries beside the mounting, numbered findings, and instruments that were found out."""

from sqlalchemy import CheckConstraint, Index, UniqueConstraint
from sqlalchemy.orm import Mapped
from sqlalchemy.schema import SchemaItem

from models.record.tables.base import Base, Detail, Recorded

__all__ = [
    "Attachment",
    "InstrumentEvent",
    "NumberedFinding",
    "OutsideOperation",
    "PointEvent",
    "Tightening",
    "VisualFinding",
]


class PointEvent(Detail, Base):
    """Somebody was invited to a point, came, did not come, or waived it."""

    __tablename__ = "point_event"

    point_kind: Mapped[str]
    point_role: Mapped[str]
    what: Mapped[str]
    event: Mapped[str]
    who: Mapped[str]
    at: Mapped[str]
    how: Mapped[str]
    words: Mapped[str]


class OutsideOperation(Detail, Base):
    """Work done elsewhere: sent off, or back."""

    __tablename__ = "outside_operation"

    what: Mapped[str]
    subject: Mapped[str]
    works: Mapped[str]
    sent_on: Mapped[str]
    back_on: Mapped[str | None]
    sent_as: Mapped[str | None]
    certificate: Mapped[str]
    result: Mapped[str]
    words: Mapped[str]


class Tightening(Detail, Base):
    """A nut or screws made tight and locked."""

    __tablename__ = "tightening"

    item: Mapped[str]
    method: Mapped[str]
    torque_typed: Mapped[str | None]
    torque_unit: Mapped[str | None]
    torque_mnm: Mapped[int | None]
    angle_typed: Mapped[str | None]
    angle_unit: Mapped[str | None]
    angle_mdeg: Mapped[int | None]
    pressure_typed: Mapped[str | None]
    pressure_unit: Mapped[str | None]
    pressure_pa: Mapped[int | None]
    elongation_typed: Mapped[str | None]
    elongation_unit: Mapped[str | None]
    elongation_nm: Mapped[int | None]
    instrument: Mapped[str | None]
    order_words: Mapped[str]
    locked_by: Mapped[str]
    words: Mapped[str]


class VisualFinding(Detail, Base):
    """Something seen on a part."""

    __tablename__ = "visual_finding"

    subject: Mapped[str]
    seen_at: Mapped[str]
    words: Mapped[str]
    weight: Mapped[str]


class Attachment(Detail, Base):
    """A file that lies beside the record, named by its digest."""

    __tablename__ = "attachment"

    name: Mapped[str]
    media_type: Mapped[str]
    size_bytes: Mapped[int]
    file_digest: Mapped[str]
    about: Mapped[str]
    words: Mapped[str]

    @classmethod
    def more(cls) -> tuple[SchemaItem, ...]:
        """Demand a whole digest."""
        return (
            CheckConstraint("length(file_digest) = 64", name="digest_is_sha256"),
            CheckConstraint("size_bytes >= 0", name="size_not_negative"),
            Index(None, "file_digest"),
        )


class NumberedFinding(Recorded, Base):
    """A finding that somebody must decide; its number is given once."""

    __tablename__ = "numbered_finding"

    number: Mapped[int]
    about: Mapped[str]
    words: Mapped[str]
    opened_at: Mapped[str]
    entry: Mapped[str | None]
    step: Mapped[str | None]
    attempt: Mapped[int | None]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Give a number once, counted from 1."""
        return (
            UniqueConstraint("chain_id", "number"),
            CheckConstraint("number >= 1", name="number_counts_from_one"),
        )


class InstrumentEvent(Recorded, Base):
    """An instrument was found out; stands in the shop's chain and in each job that used it."""

    __tablename__ = "instrument_event"

    tag: Mapped[str]
    event: Mapped[str]
    last_good_on: Mapped[str]
    found_on: Mapped[str]
    words: Mapped[str]
    by_person: Mapped[str]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let it be found by its instrument."""
        return (Index(None, "chain_id", "tag"),)
