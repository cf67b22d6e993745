"""Chains that were laid here from a file."""

from alembic import op

from models.record.migrations.laying import check, recorded, whole, words

__all__ = ["lay"]


def lay() -> None:
    """Make the table and its index."""
    recorded(
        "taken_in",
        words("job_chain_id"),
        words("job_number"),
        whole("head_sequence"),
        words("head_digest"),
        words("file_digest"),
        check("taken_in", "head_digest_is_sha256", "length(head_digest) = 64"),
        check("taken_in", "file_digest_is_sha256", "length(file_digest) = 64"),
    )
    op.create_index("ix_taken_in_job_chain_id", "taken_in", ["job_chain_id"])
