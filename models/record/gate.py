"""Refuse an attempt whose predecessor is not settled, from stored outcomes alone."""

from sqlalchemy import func, select
from sqlalchemy.orm import Session

from models.job import AttemptOpened
from models.record import tables
from models.record.errors import PredecessorNotSettledError
from models.record.tables import table

__all__ = ["GOOD_OUTCOMES", "refuse_unsettled"]

# Outcomes after which the next step may begin.
GOOD_OUTCOMES = ("within limits", "conceded")


def refuse_unsettled(session: Session, chain_id: str, entry: AttemptOpened) -> None:
    """Let an attempt open only after the step before it, and its own attempt before.

    Raises
    ------
    PredecessorNotSettledError
        If either is not settled and the entry gives no reason for going out of order.
    """
    step = entry.place.step
    if entry.out_of_order is not None or step is None:
        return
    attempt = _last_attempt(session, chain_id, step)
    if attempt is not None and not _outcome(session, chain_id, step, attempt):
        raise PredecessorNotSettledError(step, step, attempt)
    before = _step_before(session, chain_id, step)
    if before is None:
        return
    attempt = _last_attempt(session, chain_id, before)
    outcome = None if attempt is None else _outcome(session, chain_id, before, attempt)
    if outcome not in GOOD_OUTCOMES:
        raise PredecessorNotSettledError(step, before, attempt)


def _step_before(session: Session, chain_id: str, step: str) -> str | None:
    plan, order = table(tables.PlanRevision), table(tables.PlanStep)
    before = order.alias("before")
    last = (
        select(plan.c.key)
        .where(plan.c.chain_id == chain_id)
        .order_by(plan.c.number.desc())
        .limit(1)
        .scalar_subquery()
    )
    return session.execute(
        select(before.c.step)
        .join(
            order,
            (order.c.chain_id == before.c.chain_id)
            & (order.c.plan_key == before.c.plan_key)
            & (order.c.number == before.c.number + 1),
        )
        .where(order.c.chain_id == chain_id, order.c.plan_key == last, order.c.step == step)
    ).scalar_one_or_none()


def _last_attempt(session: Session, chain_id: str, step: str) -> int | None:
    entry = table(tables.Entry)
    last: int | None = session.execute(
        select(func.max(entry.c.place_attempt)).where(
            entry.c.chain_id == chain_id, entry.c.kind == "attempt", entry.c.place_step == step
        )
    ).scalar_one()
    return last


def _outcome(session: Session, chain_id: str, step: str, attempt: int) -> str | None:
    entry, settled = table(tables.Entry), table(tables.Settled)
    later = entry.alias("later")
    return session.execute(
        select(settled.c.outcome)
        .join(entry, (entry.c.chain_id == settled.c.chain_id) & (entry.c.key == settled.c.key))
        .where(
            entry.c.chain_id == chain_id,
            entry.c.kind == "settled",
            entry.c.place_step == step,
            entry.c.place_attempt == attempt,
            ~select(later.c.key)
            .where(later.c.chain_id == chain_id, later.c.supersedes == entry.c.key)
            .exists(),
        )
        .order_by(entry.c.sequence.desc(), entry.c.line.desc())
        .limit(1)
    ).scalar_one_or_none()
