"""A clever insider at the file: every row changed, taken out, put in or swapped, links made good.

What may be forged comes from the live schema of the record, not from a list here. The forger has
every tool: after the change, each later link of the chain is computed anew with the program's own
functions, triggers are put back, and the file is consistent in itself.
"""

import sqlite3
from collections.abc import Callable, Iterator
from dataclasses import dataclass
from typing import Any

from sqlalchemy.orm import Session

from models.job import Head
from models.record.canonical import FIRST_PREVIOUS
from models.record.links import digest_of, rows_text
from models.record.store import Store
from models.record.tables import CHANGEABLE
from models.record.verify import Trouble, verify
from tests.record.whole_record import behind_the_back, tables_of

__all__ = ["Forgery", "Found", "forged", "forgeries", "kept_heads"]

Work = Callable[[sqlite3.Connection], None]


@dataclass(frozen=True)
class Forgery:
    """One change of one table, and the row that it is about."""

    table: str
    what: str
    row: str
    work: Work

    @property
    def is_undone_by_links(self) -> bool:
        """Whether making the links good puts back what was changed: nothing is forged then."""
        return self.table == "act" and self.what.split()[0] in (
            "rows_json",
            "previous_digest",
            "digest",
        )


@dataclass(frozen=True)
class Found:
    """What `verify` said of a forged file: by itself, and beside heads kept elsewhere."""

    troubles: tuple[Trouble, ...]
    by_heads: tuple[Trouble, ...]

    def named(self, forgery: Forgery) -> bool:
        """Whether table, row and job are named."""
        return any(
            one.table == forgery.table
            and one.job
            and (one.key.startswith(forgery.row) or forgery.row in one.words.split())
            for one in self.troubles
        )


def key_of(table: str) -> str:
    return "act_id" if table == "act" else "key"


def forgeries(store: Store) -> Iterator[Forgery]:
    """List every forgery of every recorded table of the live schema."""
    with behind_the_back(store) as (raw, _):
        tables = [name for name in tables_of(raw) if name not in CHANGEABLE]
        columns = {name: raw.execute(f"PRAGMA table_info({name})").fetchall() for name in tables}
        rows = {
            (name, column): raw.execute(
                f'SELECT {key_of(name)} FROM {name} ORDER BY "{column}" IS NULL, sequence LIMIT 1'
            ).fetchone()[0]
            for name in tables
            for _, column, *_ in columns[name]
        }
        pairs = {
            name: raw.execute(
                f"SELECT {key_of(name)}, chain_id FROM {name} ORDER BY chain_id, sequence"
            ).fetchall()
            for name in tables
        }
    for name in tables:
        for _, column, kind, *_ in columns[name]:
            yield Forgery(
                name, f"{column} changed", rows[name, column], _changed(name, column, kind, rows)
            )
        first = pairs[name][0][0]
        yield Forgery(name, "a row taken out", first, _taken_out(name, first))
        yield Forgery(name, "a row put in", "forged", _put_in(name, first))
        of_chain = [key for key, chain in pairs[name] if chain == pairs[name][0][1]]
        if len(of_chain) > 1:
            yield Forgery(
                name, "two rows swapped", of_chain[0], _swapped(name, of_chain[0], of_chain[1])
            )


def _changed(table: str, column: str, kind: str, rows: dict[tuple[str, str], str]) -> Work:
    new = (
        f'COALESCE("{column}", 0) + 1000'
        if kind == "INTEGER"
        else f"COALESCE(\"{column}\", '') || 'x'"
    )
    where = rows[table, column]

    def work(raw: sqlite3.Connection) -> None:
        raw.execute(f'UPDATE {table} SET "{column}" = {new} WHERE {key_of(table)} = ?', (where,))

    return work


def _taken_out(table: str, key: str) -> Work:
    def work(raw: sqlite3.Connection) -> None:
        raw.execute(f"DELETE FROM {table} WHERE {key_of(table)} = ?", (key,))

    return work


def _put_in(table: str, key: str) -> Work:
    def work(raw: sqlite3.Connection) -> None:
        names = [row[1] for row in raw.execute(f"PRAGMA table_info({table})")]
        own = {
            key_of(table): "'forged'", "line": "line + 500", "number": "number || '7'",
            "turn": "turn + 70", "supersedes": "NULL",
        }  # fmt: skip
        if table == "act":
            own |= {"sequence": "sequence + 5000", "previous_digest": f"'{'e' * 64}'"}
        if table in ("job", "chain"):
            own |= {"chain_id": "'forged'"}
        text = [row[1] for row in raw.execute(f"PRAGMA table_info({table})") if row[2] == "TEXT"]
        # Where something else must be unique too, all words become others.
        for more in ({}, {name: f"\"{name}\" || '~'" for name in text if name != "chain_id"}):
            picked = ", ".join((more | own).get(name, f'"{name}"') for name in names)
            try:
                raw.execute(
                    f"INSERT INTO {table} SELECT {picked} FROM {table}"
                    f" WHERE {key_of(table)} = ? LIMIT 1",
                    (key,),
                )
            except sqlite3.IntegrityError:
                continue
            return
        raise AssertionError(f"nothing could be put into {table}")

    return work


def _swapped(table: str, one: str, other: str) -> Work:
    def work(raw: sqlite3.Connection) -> None:
        key = key_of(table)
        for old, new in ((one, "between"), (other, one), ("between", other)):
            raw.execute(f"UPDATE {table} SET {key} = ? WHERE {key} = ?", (new, old))

    return work


def forged(store: Store, forgery: Forgery, *, relinked: bool, heads: dict[str, Head]) -> Found:
    """Forge, verify, and undo it all; `heads` by job are those kept elsewhere."""
    with behind_the_back(store) as (raw, session):
        for setting in ("foreign_keys = OFF", "ignore_check_constraints = ON"):
            raw.execute(f"PRAGMA {setting}")
        raw.execute("BEGIN")
        triggers = raw.execute(
            "SELECT name, sql FROM sqlite_schema WHERE type = 'trigger'"
        ).fetchall()
        for name, _ in triggers:
            raw.execute(f'DROP TRIGGER "{name}"')
        forgery.work(raw)
        if relinked:
            _link_anew(raw)
        for _, text in triggers:
            raw.execute(text)
        found = Found(verify(session).troubles, tuple(_by_heads(session, heads)))
        raw.execute("ROLLBACK")
    return found


def kept_heads(store: Store) -> dict[str, Head]:
    """Give the heads of all chains, as travelers and backups hold them."""
    with store.reading() as session:
        return verify(session).heads


def _by_heads(session: Session, heads: dict[str, Head]) -> Iterator[Trouble]:
    for name, head in heads.items():
        try:
            found = verify(session, number=name, expected=head).troubles
        except Exception as error:
            yield Trouble(job=name, table="act", what=f"cannot be compared: {error}")
            continue
        yield from (one for one in found if "that was kept" in one.what or "cut off" in one.what)


def _link_anew(raw: sqlite3.Connection) -> None:
    """Compute every list of rows and every digest anew, in each chain, as the program would."""
    raw.row_factory = sqlite3.Row
    tables = [name for name in tables_of(raw) if name not in ("act", *CHANGEABLE)]
    rows: dict[tuple[str, int], list[tuple[str, dict[str, Any]]]] = {}
    for name in tables:
        for row in raw.execute(f"SELECT * FROM {name}"):
            rows.setdefault((row["chain_id"], row["sequence"]), []).append((name, dict(row)))
    raw.execute("UPDATE act SET previous_digest = act_id")
    chains = [row[0] for row in raw.execute("SELECT DISTINCT chain_id FROM act")]
    for chain in chains:
        previous = FIRST_PREVIOUS
        acts = raw.execute("SELECT * FROM act WHERE chain_id = ? ORDER BY sequence", (chain,))
        for act in acts.fetchall():
            mine = sorted(rows.get((chain, act["sequence"]), []), key=lambda one: one[1]["line"])
            made = dict(act) | {"rows_json": rows_text(mine), "previous_digest": previous}
            made["digest"] = digest_of(made, mine)
            raw.execute(
                "UPDATE act SET rows_json = ?, previous_digest = ?, digest = ?"
                " WHERE chain_id = ? AND sequence = ?",
                (made["rows_json"], previous, made["digest"], chain, act["sequence"]),
            )
            previous = made["digest"]
    raw.row_factory = None
