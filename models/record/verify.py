"""Recompute every link of every chain from the rows themselves, and say in words what differs.

Whoever holds the file can rewrite a chain whole, or cut its tail: such a chain is consistent in
itself. Only a head that somebody else kept (on a traveler, in a backup) shows it; give that head
as `expected`.
"""

from collections.abc import Callable, Iterator
from dataclasses import dataclass

from sqlalchemy import select
from sqlalchemy.exc import DBAPIError
from sqlalchemy.orm import Session

from models.job import Head
from models.record import tables
from models.record.chain_check import ChainCheck, Trouble
from models.record.errors import UnknownJobError
from models.record.files import file_troubles
from models.record.heads_seen import heads_seen_troubles
from models.record.lookups import chain_of_job, shop_chain
from models.record.schema import differences
from models.record.signature_check import signature_troubles
from models.record.tables import recorded_tables, table

__all__ = ["SHOP_NAME", "Trouble", "Verification", "verify"]

SHOP_NAME = "the shop"


@dataclass(frozen=True, kw_only=True)
class Verification:
    """What was found; `heads` by job number, the shop's own under `SHOP_NAME`."""

    troubles: tuple[Trouble, ...]
    # Files beside the record; the links say nothing about them but their digest.
    file_troubles: tuple[Trouble, ...] = ()
    # Files that never came with a job from elsewhere: told, and no fault of this record.
    files_not_here: tuple[Trouble, ...] = ()
    heads: dict[str, Head]
    acts: int

    @property
    def is_whole(self) -> bool:
        """Whether every row is as it was recorded."""
        return not self.troubles


def verify(
    session: Session,
    *,
    number: str | None = None,
    expected: Head | None = None,
    progress: Callable[[int, int], None] = lambda _done, _of: None,
) -> Verification:
    """Recompute the links of one job, or of the whole record.

    Parameters
    ----------
    session
        A session of `Store.reading`.
    number
        The job to look at, or `SHOP_NAME`; all jobs and the shop if absent.
    expected
        A head of that job which was kept elsewhere; the chain must contain it.
    progress
        Told before each chain how many are done, and of how many; what it raises ends the work.

    Raises
    ------
    UnknownJobError
        If there is no job of this number.
    """
    troubles = [*_of_the_file(session), *_second_shop(session)]
    heads: dict[str, Head] = {}
    beside: list[Trouble] = []
    not_here: list[Trouble] = []
    acts = 0
    chains = _chains(session, number)
    troubles += heads_seen_troubles(session, chains)
    for done, (chain_id, name) in enumerate(chains.items()):
        progress(done, len(chains))
        chain = ChainCheck(session, chain_id, name)
        troubles += chain.troubles()
        troubles += signature_troubles(session, chain_id, name)
        acts += len(chain.acts)
        for never_came, trouble in _of_files(session, chain_id, name):
            (not_here if never_came else beside).append(trouble)
        if chain.head is not None:
            heads[name] = chain.head
        if expected is not None and number is not None:
            troubles += chain.compared_with(expected)
    return Verification(
        troubles=tuple(troubles),
        file_troubles=tuple(beside),
        files_not_here=tuple(not_here),
        heads=heads,
        acts=acts,
    )


def _of_files(session: Session, chain_id: str, name: str) -> Iterator[tuple[bool, Trouble]]:
    store = session.info.get("store")
    # While a file is brought to its next form no store is there yet, and no attachment either.
    if store is None:
        return
    for one in file_troubles(session, store.path.parent, chain_id):
        trouble = Trouble(what=one.words, job=name, table="attachment", key=one.entry)
        yield one.never_came, trouble


def _of_the_file(session: Session) -> Iterator[Trouble]:
    connection = session.connection()
    for said in differences(connection):
        yield Trouble(what=said)
    for (said,) in connection.exec_driver_sql("PRAGMA integrity_check"):
        if said != "ok":
            yield Trouble(what=f"the file is damaged: {said}")
    for row in connection.exec_driver_sql("PRAGMA foreign_key_check"):
        yield Trouble(what=f"a row names one of {row[2]} that is not there", table=row[0])


def _second_shop(session: Session) -> Iterator[Trouble]:
    """Find chains that call themselves the shop's beside the first one."""
    chain, act = table(tables.Chain), table(tables.Act)
    begun = select(act.c.entered_at_utc).where(
        act.c.chain_id == chain.c.chain_id, act.c.sequence == 1
    )
    rows = session.execute(
        select(chain.c.chain_id, chain.c.key)
        .where(chain.c.kind == "shop")
        .order_by(begun.scalar_subquery().nulls_last(), chain.c.chain_id)
    ).all()
    for row in rows[1:]:
        what = "is a second chain that calls itself the shop's"
        yield Trouble(job=row.chain_id, table="chain", key=row.key, what=what)


def _chains(session: Session, number: str | None) -> dict[str, str]:
    if number is not None:
        shop = number == SHOP_NAME
        chain_id = shop_chain(session) if shop else chain_of_job(session, number)
        if chain_id is None:
            raise UnknownJobError(number)
        return {chain_id: number}
    job, chain = table(tables.Job), table(tables.Chain)
    names: dict[str, str] = {}
    # Also chains that only a stray row speaks of.
    for each in (chain, table(tables.Act), *recorded_tables()):
        for found in session.execute(select(each.c.chain_id).distinct()).scalars():
            names.setdefault(found, found)
    try:
        shops = session.execute(select(chain.c.chain_id).where(chain.c.kind == "shop")).scalars()
        names.update(dict.fromkeys(shops, SHOP_NAME))
        for row in session.execute(select(job.c.chain_id, job.c.number)):
            names[row.chain_id] = row.number
    except DBAPIError:
        # Undecodable text: the chain goes by its id, and its check names the table.
        pass
    return names
