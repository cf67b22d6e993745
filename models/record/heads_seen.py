"""Heads of chains that a copy of the record holds: kept in the shop's chain, and compared."""

from collections.abc import Iterator, Mapping

from sqlalchemy import func, select
from sqlalchemy.orm import Session

from models.job import Head
from models.record import tables
from models.record.act import Act
from models.record.chain_check import Trouble
from models.record.entry_rows import Line, new_key
from models.record.flat import Cell
from models.record.lookups import shop_chain
from models.record.tables import table

__all__ = ["add_heads_seen", "add_restoration", "all_heads", "heads_seen_troubles"]


def all_heads(session: Session) -> dict[str, Head]:
    """Give the last link of every chain, by the chain's id; each is found by the key of `act`."""
    chain, act = table(tables.Chain), table(tables.Act)
    last = (
        select(func.max(act.c.sequence))
        .where(act.c.chain_id == chain.c.chain_id)
        .correlate(chain)
        .scalar_subquery()
    )
    rows = session.execute(
        select(act.c.chain_id, act.c.sequence, act.c.digest).join(
            chain, (act.c.chain_id == chain.c.chain_id) & (act.c.sequence == last)
        )
    )
    return {row.chain_id: Head(sequence=row.sequence, digest=row.digest) for row in rows}


def add_heads_seen(act: Act, *, backup_name: str, heads: Mapping[str, Head]) -> None:
    """Keep which links a backup ends at; a chain that has not moved since the last is left out."""
    if act.already_recorded:
        return
    act.flush()
    seen = table(tables.ChainHeadSeen)
    rows = act.session.execute(
        select(seen.c.of_chain, func.max(seen.c.head_sequence))
        .where(seen.c.chain_id == act.chain_id)
        .group_by(seen.c.of_chain)
    )
    known: dict[str, int] = {of_chain: sequence for of_chain, sequence in rows}
    for of_chain, head in sorted(heads.items()):
        if known.get(of_chain) != head.sequence:
            row: dict[str, Cell] = {
                "key": new_key(),
                "backup_name": backup_name,
                "of_chain": of_chain,
                "head_sequence": head.sequence,
                "head_digest": head.digest,
            }
            act.put(Line(tables.ChainHeadSeen, row))


def add_restoration(
    act: Act, *, backup_name: str, backup_made_at: str, set_aside: str | None, left_behind: int
) -> None:
    """Keep that the record was put back to a backup."""
    row: dict[str, Cell] = {
        "key": new_key(),
        "backup_name": backup_name,
        "backup_made_at": backup_made_at,
        "set_aside_name": set_aside,
        "acts_left_behind": left_behind,
    }
    act.put(Line(tables.Restoration, row))


def heads_seen_troubles(session: Session, names: Mapping[str, str]) -> Iterator[Trouble]:
    """Compare some chains, given with their names, with the heads that the shop's chain kept."""
    shop = shop_chain(session)
    if shop is None:
        return
    seen, act = table(tables.ChainHeadSeen), table(tables.Act)
    rows = session.execute(
        select(seen, act.c.digest.label("found"))
        .outerjoin(
            act, (act.c.chain_id == seen.c.of_chain) & (act.c.sequence == seen.c.head_sequence)
        )
        .where(seen.c.chain_id == shop, seen.c.of_chain.in_(list(names)))
        .order_by(seen.c.sequence, seen.c.line)
    ).mappings()
    for row in rows:
        if row["found"] == row["head_digest"]:
            continue
        yield Trouble(
            job=names[row["of_chain"]],
            sequence=row["head_sequence"],
            table="act",
            what=("was cut off: " if row["found"] is None else "the chain was written anew: ")
            + f"backup {row['backup_name']} holds another link here",
        )
