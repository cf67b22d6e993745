"""Lay the tables of heads that backups hold, and of restorings."""

from alembic import op

from models.record.migrations.laying import check, recorded, whole, words

__all__ = ["lay"]


def lay() -> None:
    """Make the tables and their index."""
    recorded(
        "chain_head_seen",
        words("backup_name"),
        words("of_chain"),
        whole("head_sequence"),
        words("head_digest"),
        check("chain_head_seen", "head_sequence_counts_from_one", "head_sequence >= 1"),
    )
    op.create_index(
        "ix_chain_head_seen_chain_id_of_chain_head_sequence",
        "chain_head_seen",
        ["chain_id", "of_chain", "head_sequence"],
    )
    recorded(
        "restoration",
        words("backup_name"),
        words("backup_made_at"),
        words("set_aside_name", absent=True),
        whole("acts_left_behind"),
    )
