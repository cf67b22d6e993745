"""Materials that a shop answers for, each version with the source of its numbers."""

from sqlalchemy import Index, UniqueConstraint
from sqlalchemy.orm import Mapped
from sqlalchemy.schema import SchemaItem

from models.record.tables.base import Base, Recorded, points_to

__all__ = ["ShopMaterial"]


class ShopMaterial(Recorded, Base):
    """A material as the shop knows it from then on: the whole document, and its name beside it."""

    __tablename__ = "shop_material"

    name: Mapped[str]
    source: Mapped[str]
    document_json: Mapped[str]
    supersedes: Mapped[str | None]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let each version be superseded at most once."""
        return (
            points_to("shop_material", "supersedes"),
            UniqueConstraint("chain_id", "supersedes"),
            Index(None, "chain_id", "name"),
        )
