"""Pieces that the steps lay tables with; steps rest on them, so none may change its result."""

from typing import Any

import sqlalchemy as sa
from alembic import op

__all__ = ["check", "once", "quantity", "recorded", "tie", "whole", "words"]


def words(name: str, *, absent: bool = False) -> sa.Column[Any]:
    """Give a column of text."""
    return sa.Column(name, sa.Text(), nullable=absent)


def whole(name: str, *, absent: bool = False) -> sa.Column[Any]:
    """Give a column of whole numbers."""
    kind = sa.BigInteger().with_variant(sa.Integer(), "sqlite")
    return sa.Column(name, kind, nullable=absent)


def check(table: str, name: str, sql: str) -> sa.CheckConstraint:
    """Make a named demand on each row of a table."""
    return sa.CheckConstraint(sql, name=op.f(f"ck_{table}_{name}"))


def quantity(table: str, stem: str, ending: str) -> sa.CheckConstraint:
    """Demand a quantity with text, unit and value, or none of them."""
    typed = f"({stem}_typed IS NULL)"
    both = f"{typed} = ({stem}_unit IS NULL) AND {typed} = ({stem}_{ending} IS NULL)"
    return check(table, f"{stem}_is_whole", both)


def once(table: str, *columns: str) -> sa.UniqueConstraint:
    """Let these columns together occur once."""
    return sa.UniqueConstraint(*columns, name=op.f(f"uq_{table}_{'_'.join(columns)}"))


def tie(table: str, column: str, other: str) -> sa.ForeignKeyConstraint:
    """Tie a column to the key of another row of the same chain, checked at the end of an act."""
    return sa.ForeignKeyConstraint(
        ["chain_id", column],
        [f"{other}.chain_id", f"{other}.key"],
        name=op.f(f"fk_{table}_chain_id_{column}"),
        deferrable=True,
        initially="DEFERRED",
    )


def recorded(table: str, *own: sa.schema.SchemaItem) -> None:
    """Make a table of recorded rows with the columns and demands that all of them carry."""
    columns = [item for item in own if isinstance(item, sa.Column)]
    op.create_table(
        table,
        words("chain_id"),
        words("key"),
        whole("sequence"),
        whole("line"),
        *columns,
        sa.PrimaryKeyConstraint("chain_id", "key", name=op.f(f"pk_{table}")),
        sa.ForeignKeyConstraint(
            ["chain_id", "sequence"],
            ["act.chain_id", "act.sequence"],
            name=op.f(f"fk_{table}_chain_id_sequence"),
            deferrable=True,
            initially="DEFERRED",
        ),
        once(table, "chain_id", "sequence", "line"),
        check(table, "key_not_empty", "length(key) > 0"),
        check(table, "line_counts_from_one", "line >= 1"),
        *(item for item in own if not isinstance(item, sa.Column)),
        sqlite_strict=True,
        sqlite_with_rowid=False,
    )
