"""Heads of chains as copies of the record hold them, and restorings from such a copy."""

from sqlalchemy import CheckConstraint, Index
from sqlalchemy.orm import Mapped
from sqlalchemy.schema import SchemaItem

from models.record.tables.base import Base, Recorded

__all__ = ["ChainHeadSeen", "Restoration"]


class ChainHeadSeen(Recorded, Base):
    """A chain stood at this link when a backup was made; from then on the chain must contain it."""

    __tablename__ = "chain_head_seen"

    # Name of the backup, without its folder: a backup may be carried elsewhere.
    backup_name: Mapped[str]
    of_chain: Mapped[str]
    head_sequence: Mapped[int]
    head_digest: Mapped[str]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let the heads of one chain be found."""
        return (
            CheckConstraint("head_sequence >= 1", name="head_sequence_counts_from_one"),
            Index(None, "chain_id", "of_chain", "head_sequence"),
        )


class Restoration(Recorded, Base):
    """The record was put back to what a backup held; what stood there was set aside."""

    __tablename__ = "restoration"

    backup_name: Mapped[str]
    backup_made_at: Mapped[str]
    # Nothing where there was no file, or none that could be read.
    set_aside_name: Mapped[str | None]
    acts_left_behind: Mapped[int]
