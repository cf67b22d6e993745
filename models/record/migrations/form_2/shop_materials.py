"""Lay the table of materials that a shop answers for."""

from alembic import op

from models.record.migrations.laying import once, recorded, tie, words

__all__ = ["lay"]


def lay() -> None:
    """Make the table and its index."""
    recorded(
        "shop_material",
        words("name"),
        words("source"),
        words("document_json"),
        words("supersedes", absent=True),
        tie("shop_material", "supersedes", "shop_material"),
        once("shop_material", "chain_id", "supersedes"),
    )
    op.create_index("ix_shop_material_chain_id_name", "shop_material", ["chain_id", "name"])
