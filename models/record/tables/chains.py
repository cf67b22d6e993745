"""Chains of acts: one for the shop, one for each job."""

from sqlalchemy import CheckConstraint, Index, UniqueConstraint
from sqlalchemy.orm import Mapped, mapped_column
from sqlalchemy.schema import SchemaItem

from models.record.tables.base import Base, Recorded

__all__ = ["Act", "Chain", "TakenIn"]


class Act(Base):
    """A link: what somebody did at one moment, with the digest of all its rows."""

    __tablename__ = "act"
    __table_args__ = (
        UniqueConstraint("chain_id", "previous_digest"),
        UniqueConstraint("act_id"),
        CheckConstraint("sequence >= 1", name="sequence_counts_from_one"),
        CheckConstraint("length(digest) = 64", name="digest_is_sha256"),
        CheckConstraint("length(previous_digest) = 64", name="previous_digest_is_sha256"),
        CheckConstraint("clock_stepped_back IN (0, 1)", name="clock_stepped_back_yes_no"),
        {"sqlite_strict": True, "sqlite_with_rowid": False},
    )

    chain_id: Mapped[str] = mapped_column(primary_key=True)
    sequence: Mapped[int] = mapped_column(primary_key=True)
    act_id: Mapped[str]
    kind: Mapped[str]
    by_person: Mapped[str]
    # Which computer it was entered on.
    station_name: Mapped[str]
    done_at: Mapped[str]
    entered_at_utc: Mapped[str]
    entered_offset_minutes: Mapped[int]
    # 1 where the computer's clock stood before the act preceding this one.
    clock_stepped_back: Mapped[int]
    program_edition: Mapped[str]
    body_edition: Mapped[int]
    # Canonical JSON: table, key and short digest of each row of the act, in order.
    rows_json: Mapped[str]
    previous_digest: Mapped[str]
    digest: Mapped[str]


class Chain(Recorded, Base):
    """A chain begins; the shop's own, or a job's."""

    __tablename__ = "chain"

    kind: Mapped[str]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let a chain be the shop's or a job's, and begin once."""
        return (
            CheckConstraint("kind IN ('shop', 'job')", name="kind_known"),
            CheckConstraint("key = chain_id", name="names_itself"),
            Index(None, "kind"),
        )


class TakenIn(Recorded, Base):
    """A job's chain was laid here from a file: which, up to which act, out of which file."""

    __tablename__ = "taken_in"

    job_chain_id: Mapped[str]
    job_number: Mapped[str]
    head_sequence: Mapped[int]
    head_digest: Mapped[str]
    file_digest: Mapped[str]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let it be found by the chain that came in."""
        return (
            CheckConstraint("length(head_digest) = 64", name="head_digest_is_sha256"),
            CheckConstraint("length(file_digest) = 64", name="file_digest_is_sha256"),
            Index(None, "job_chain_id"),
        )
