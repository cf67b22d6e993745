"""Lay the tables of entries beside the mounting, of numbered findings, of instruments found out."""

import sqlalchemy as sa
from alembic import op

from models.record.migrations.laying import check, once, quantity, recorded, tie, whole, words

__all__ = ["lay"]

_QUANTITIES = (("torque", "mnm"), ("angle", "mdeg"), ("pressure", "pa"), ("elongation", "nm"))


def lay() -> None:
    """Make the tables and their indices, and add what decisions and components say besides."""
    _entry(
        "point_event",
        *_all("point_kind", "point_role", "what", "event", "who", "at", "how", "words"),
    )
    _entry(
        "outside_operation",
        *_all("what", "subject", "works", "sent_on"),
        words("back_on", absent=True),
        words("sent_as", absent=True),
        *_all("certificate", "result", "words"),
    )
    _entry(
        "tightening",
        *_all("item", "method"),
        *(column for stem, ending in _QUANTITIES for column in _three(stem, ending)),
        words("instrument", absent=True),
        *_all("order_words", "locked_by", "words"),
        *(quantity("tightening", stem, ending) for stem, ending in _QUANTITIES),
    )
    _entry("visual_finding", *_all("subject", "seen_at", "words", "weight"))
    _entry(
        "attachment",
        *_all("name", "media_type"),
        whole("size_bytes"),
        *_all("file_digest", "about", "words"),
        check("attachment", "digest_is_sha256", "length(file_digest) = 64"),
        check("attachment", "size_not_negative", "size_bytes >= 0"),
    )
    op.create_index("ix_attachment_file_digest", "attachment", ["file_digest"])
    recorded(
        "numbered_finding",
        whole("number"),
        *_all("about", "words", "opened_at"),
        words("entry", absent=True),
        words("step", absent=True),
        whole("attempt", absent=True),
        once("numbered_finding", "chain_id", "number"),
        check("numbered_finding", "number_counts_from_one", "number >= 1"),
    )
    recorded(
        "instrument_event",
        *_all("tag", "event", "last_good_on", "found_on", "words", "by_person"),
    )
    op.create_index("ix_instrument_event_chain_id_tag", "instrument_event", ["chain_id", "tag"])
    op.add_column("decision", words("authority", absent=True))
    op.add_column("decision", whole("finding", absent=True))
    op.add_column("decision", words("agreed_by", absent=True))
    op.add_column("decision", words("agreed_how", absent=True))
    op.add_column("component", words("substitute_for", absent=True))
    op.add_column("component", words("approved_by", absent=True))


def _all(*names: str) -> tuple[sa.Column[str], ...]:
    return tuple(words(name) for name in names)


def _three(stem: str, ending: str) -> tuple[sa.Column[str] | sa.Column[int], ...]:
    return (
        words(f"{stem}_typed", absent=True),
        words(f"{stem}_unit", absent=True),
        whole(f"{stem}_{ending}", absent=True),
    )


def _entry(table: str, *own: sa.schema.SchemaItem) -> None:
    recorded(table, *own, tie(table, "key", "entry"))
