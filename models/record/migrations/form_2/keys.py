"""Who may sign: the shop, its authority, certificates, events, and the values of signatures."""

import sqlalchemy as sa
from alembic import op

from models.record.migrations.laying import check, once, recorded, tie, words

__all__ = ["lay"]


def lay() -> None:
    """Make the tables and their indices."""
    recorded(
        "shop",
        words("name"),
        words("place"),
        words("supersedes", absent=True),
        tie("shop", "supersedes", "shop"),
        once("shop", "chain_id", "supersedes"),
    )
    recorded("authority", words("name"), words("origin"), words("certificate_pem"))
    recorded(
        "certificate",
        words("person_key"),
        words("authority_key"),
        words("certificate_pem"),
        words("reason"),
        tie("certificate", "authority_key", "authority"),
    )
    op.create_index("ix_certificate_chain_id_person_key", "certificate", ["chain_id", "person_key"])
    recorded(
        "person_event",
        words("person_key"),
        words("event"),
        words("words"),
        words("signed_text", absent=True),
        words("value_base64", absent=True),
        words("certificate_pem", absent=True),
        check(
            "person_event",
            "signature_is_whole",
            "(signed_text IS NULL) = (value_base64 IS NULL)"
            " AND (signed_text IS NULL) = (certificate_pem IS NULL)",
        ),
    )
    op.create_index(
        "ix_person_event_chain_id_person_key", "person_event", ["chain_id", "person_key"]
    )
    recorded(
        "key_signature",
        words("signed_text"),
        words("value_base64"),
        words("certificate_pem"),
        words("authority_pem"),
        tie("key_signature", "key", "entry"),
    )
    op.create_table(
        "key_wrap",
        words("holder"),
        words("what"),
        words("wrapped_json"),
        sa.PrimaryKeyConstraint("holder", "what", name=op.f("pk_key_wrap")),
        sqlite_strict=True,
        sqlite_with_rowid=False,
    )
