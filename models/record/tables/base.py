"""What all tables share: their naming, their column types, and what every recorded row carries.

Every recorded row names the chain it belongs to, the act (by its sequence in the chain) that put
it there, and its line within that act. Column names carry the unit: `_nm`, `_mk` (thousandths of
a kelvin), `_mdeg` (thousandths of a degree). Times are ISO 8601 text with their offset.

Words that a later edition may add to (kinds, outcomes, moments) are not tied down by the
database: to widen such a check, SQLite would have to copy the whole table. What can never be true
is.
"""

from typing import Any, ClassVar

from sqlalchemy import (
    BigInteger,
    CheckConstraint,
    ForeignKeyConstraint,
    Integer,
    MetaData,
    Text,
    UniqueConstraint,
)
from sqlalchemy.orm import DeclarativeBase, Mapped, declared_attr, mapped_column
from sqlalchemy.schema import SchemaItem

__all__ = [
    "SMALL_UNITS",
    "Base",
    "Detail",
    "Part",
    "Reading",
    "Recorded",
    "points_to",
]

# Endings of column names that hold whole numbers of a quantity.
SMALL_UNITS = (
    "nm",
    "mk",
    "mdeg",
    "per_tera_kelvin",
    "pa",
    "ppm",
    "ms",
    "mnm",
    "ugm",
    "mrpm",
    "mg",
    "nt",
)

_WHOLE = BigInteger().with_variant(Integer(), "sqlite")
_OPTIONS = {"sqlite_strict": True, "sqlite_with_rowid": False}


class Base(DeclarativeBase):
    """Root of the mapping."""

    metadata = MetaData(
        naming_convention={
            "pk": "pk_%(table_name)s",
            "fk": "fk_%(table_name)s_%(column_0_N_name)s",
            "uq": "uq_%(table_name)s_%(column_0_N_name)s",
            "ck": "ck_%(table_name)s_%(constraint_name)s",
            "ix": "ix_%(table_name)s_%(column_0_N_name)s",
        }
    )
    type_annotation_map: ClassVar[dict[Any, Any]] = {str: Text(), int: _WHOLE}


def points_to(table: str, column: str) -> ForeignKeyConstraint:
    """Tie a column to the key of another row of the same chain, checked at the end of an act."""
    return ForeignKeyConstraint(
        ["chain_id", column],
        [f"{table}.chain_id", f"{table}.key"],
        deferrable=True,
        initially="DEFERRED",
    )


class Recorded:
    """A row that never changes once its act is closed."""

    chain_id: Mapped[str] = mapped_column(primary_key=True, sort_order=-20)
    key: Mapped[str] = mapped_column(primary_key=True, sort_order=-19)
    sequence: Mapped[int] = mapped_column(sort_order=-18)
    line: Mapped[int] = mapped_column(sort_order=-17)

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """List constraints and indices of this table beyond the common ones."""
        return ()

    @declared_attr.directive
    def __table_args__(cls) -> tuple[Any, ...]:  # noqa: N805  (SQLAlchemy calls it on the class)
        """List the common constraints, then the table's own."""
        return (
            ForeignKeyConstraint(
                ["chain_id", "sequence"],
                ["act.chain_id", "act.sequence"],
                deferrable=True,
                initially="DEFERRED",
            ),
            UniqueConstraint("chain_id", "sequence", "line"),
            CheckConstraint("length(key) > 0", name="key_not_empty"),
            CheckConstraint("line >= 1", name="line_counts_from_one"),
            *cls.demands(),
            _OPTIONS,
        )


class Detail(Recorded):
    """The part of an entry that only its kind has; it shares the entry's key."""

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Tie a detail to its entry."""
        return (points_to("entry", "key"), *cls.more())

    @classmethod
    def more(cls) -> tuple[SchemaItem, ...]:
        """List constraints of this kind of entry."""
        return ()


class Part(Recorded):
    """One of several like things that belong to an entry, in their order."""

    entry_key: Mapped[str] = mapped_column(sort_order=-16)
    number: Mapped[int] = mapped_column(sort_order=-15)

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Tie a part to its entry, where it has a number of its own."""
        return (
            points_to("entry", "entry_key"),
            UniqueConstraint("chain_id", "entry_key", "number"),
        )


class Reading(Recorded):
    """A reading at a place of an entry; a later turn at the place replaces the one before."""

    entry_key: Mapped[str] = mapped_column(sort_order=-16)
    # The place as a JSON list of words, the same words as in corrections.
    place_json: Mapped[str] = mapped_column(sort_order=-15)
    turn: Mapped[int] = mapped_column(sort_order=-14)
    supersedes: Mapped[str | None] = mapped_column(sort_order=-13)
    reason: Mapped[str | None] = mapped_column(sort_order=-12)
    by_person: Mapped[str] = mapped_column(sort_order=-11)
    taken_at: Mapped[str | None] = mapped_column(sort_order=-10)

    @classmethod
    def demands(cls) -> tuple[SchemaItem, ...]:
        """Let a place have one first reading, and each be replaced at most once."""
        return (
            points_to("entry", "entry_key"),
            points_to(cls.__tablename__, "supersedes"),  # type: ignore[attr-defined]
            UniqueConstraint("chain_id", "entry_key", "place_json", "turn"),
            UniqueConstraint("chain_id", "supersedes"),
            CheckConstraint("(turn = 1) = (supersedes IS NULL)", name="later_turns_supersede"),
            *cls.more(),
        )

    @classmethod
    def more(cls) -> tuple[SchemaItem, ...]:
        """List constraints of this kind of reading."""
        return ()
