"""Triggers that keep what is recorded: one function makes them all, for any set of tables.

They stop mistakes and other people's SQL. Whoever removes them first is found out by the chain
and by the comparison of triggers when the record is opened.
"""

from collections.abc import Iterator

from sqlalchemy import MetaData, PrimaryKeyConstraint, Table, UniqueConstraint

from models.record.canonical import FIRST_PREVIOUS

__all__ = ["FINAL", "trigger_texts"]

# Begins what the database says when a trigger refuses, so that the store knows it again.
FINAL = "the record is final"


def trigger_texts(metadata: MetaData, *, changeable: tuple[str, ...]) -> dict[str, str]:
    """Write the triggers of every table that is not changeable, by their names."""
    texts: dict[str, str] = {}
    for name in sorted(metadata.tables):
        if name not in changeable:
            texts.update(_of_table(metadata.tables[name]))
    return texts


def _of_table(table: Table) -> Iterator[tuple[str, str]]:
    name = table.name
    yield _trigger(table, "never_changes", "UPDATE", f"rows of {name} never change")
    yield _trigger(table, "never_vanishes", "DELETE", f"rows of {name} never vanish")
    yield _trigger(
        table,
        "never_replaced",
        "INSERT",
        f"rows of {name} are never replaced",
        " OR ".join(sorted(_takes_the_place(table))),
    )
    if name == "act":
        yield _trigger(table, "follows_the_last", "INSERT", "an act follows the last one", _GAP)
    else:
        yield _trigger(
            table,
            "only_in_an_open_act",
            "INSERT",
            f"rows of {name} belong to an act that is not closed",
            "EXISTS (SELECT 1 FROM act WHERE chain_id = NEW.chain_id AND sequence >= NEW.sequence)",
        )


_LAST = "SELECT {what} FROM act WHERE chain_id = NEW.chain_id ORDER BY sequence DESC LIMIT 1"
_GAP = (
    f"NEW.sequence <> COALESCE(({_LAST.format(what='sequence')}), 0) + 1"
    f" OR NEW.previous_digest <> COALESCE(({_LAST.format(what='digest')}), '{FIRST_PREVIOUS}')"
)


def _trigger(table: Table, ending: str, event: str, words: str, when: str = "") -> tuple[str, str]:
    name = f"{table.name}_{ending}"
    condition = f" WHEN {when}" if when else ""
    return name, (
        f"CREATE TRIGGER {name} BEFORE {event} ON {table.name}{condition}"
        f" BEGIN SELECT RAISE(ABORT, '{FINAL}: {words}'); END"
    )


def _takes_the_place(table: Table) -> Iterator[str]:
    # REPLACE deletes the row in its way without a delete trigger unless a setting of the
    # connection says otherwise, and other programs do not set it.
    for constraint in table.constraints:
        if isinstance(constraint, PrimaryKeyConstraint | UniqueConstraint):
            columns = [column.name for column in constraint.columns]
            same = " AND ".join(f'"{column}" = NEW."{column}"' for column in columns)
            yield f"EXISTS (SELECT 1 FROM {table.name} WHERE {same})"
