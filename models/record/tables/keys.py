"""Who may sign: the shop, its authority, certificates, and what befell people's secrets.

Wrapped private keys stand in `key_wrap`, which is no record but a place to keep them: changing a
passphrase must leave no wrap under the old one.
"""

from sqlalchemy import CheckConstraint, Index, UniqueConstraint
from sqlalchemy.orm import Mapped, mapped_column
from sqlalchemy.schema import SchemaItem

from models.record.tables.base import Base, Detail, Recorded, points_to

__all__ = ["Authority", "Certificate", "KeySignature", "KeyWrap", "PersonEvent", "Shop"]


class Shop(Recorded, Base):
    """The shop as it calls itself; stands in its own chain only."""

    __tablename__ = "shop"

    name: Mapped[str]
    place: Mapped[str]
    supersedes: Mapped[str | None]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let each version be superseded at most once."""
        return (points_to("shop", "supersedes"), UniqueConstraint("chain_id", "supersedes"))


class Authority(Recorded, Base):
    """Who vouches for certificates: the shop itself, or an authority whose papers it uses."""

    __tablename__ = "authority"

    name: Mapped[str]
    origin: Mapped[str]
    certificate_pem: Mapped[str]


class Certificate(Recorded, Base):
    """A certificate given to a person; a later one of the same person takes its place."""

    __tablename__ = "certificate"

    person_key: Mapped[str]
    authority_key: Mapped[str]
    certificate_pem: Mapped[str]
    reason: Mapped[str]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Tie it to its authority."""
        return (points_to("authority", "authority_key"), Index(None, "chain_id", "person_key"))


class PersonEvent(Recorded, Base):
    """What befell a person's secrets: a try, a proof, a lock, a retirement; signed where asked."""

    __tablename__ = "person_event"

    person_key: Mapped[str]
    event: Mapped[str]
    words: Mapped[str]
    signed_text: Mapped[str | None]
    value_base64: Mapped[str | None]
    certificate_pem: Mapped[str | None]

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let it be found by its person."""
        return (
            CheckConstraint(
                "(signed_text IS NULL) = (value_base64 IS NULL)"
                " AND (signed_text IS NULL) = (certificate_pem IS NULL)",
                name="signature_is_whole",
            ),
            Index(None, "chain_id", "person_key"),
        )


class KeySignature(Detail, Base):
    """The value behind a signature entry, with the papers that let anybody check it."""

    __tablename__ = "key_signature"

    signed_text: Mapped[str]
    value_base64: Mapped[str]
    certificate_pem: Mapped[str]
    authority_pem: Mapped[str]


class KeyWrap(Base):
    """A private key, wrapped under its holder's passphrase; may change and is in no chain."""

    __tablename__ = "key_wrap"
    __table_args__ = ({"sqlite_strict": True, "sqlite_with_rowid": False},)

    holder: Mapped[str] = mapped_column(primary_key=True)
    # The holder's own key, or that of the shop's authority.
    what: Mapped[str] = mapped_column(primary_key=True)
    wrapped_json: Mapped[str]
