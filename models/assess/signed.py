"""Which signatures stand for what is recorded now, and which were given for an earlier state."""

from collections.abc import Sequence
from datetime import datetime

from models.job import (
    AnyEntry,
    Attachment,
    Cooling,
    Decision,
    Handling,
    Heating,
    Note,
    OutsideOperation,
    PointEvent,
    RunoutSurvey,
    Signature,
    SizeSurvey,
)

__all__ = ["given_for_now"]

# What may follow a signature without touching what was signed.
_TOUCH_NOTHING = (
    Attachment,
    Decision,
    Handling,
    Note,
    OutsideOperation,
    PointEvent,
    Signature,
)


def given_for_now(
    entries: Sequence[AnyEntry],
) -> tuple[tuple[Signature, ...], tuple[Signature, ...]]:
    """Part the signatures of a place: those that stand, and those given for an earlier state.

    A signature stands for what was there when it was given. An entry that came later at the same
    place, or a reading corrected or answered later, leaves the signature as given and opens its
    point again.

    Parameters
    ----------
    entries : sequence of entries
        The entries of one place that nothing replaces, in the order in which they were recorded.

    Returns
    -------
    tuple of two tuples of Signature
        Those that stand; those given for an earlier state.
    """
    stand: list[Signature] = []
    earlier: list[Signature] = []
    for index, one in enumerate(entries):
        if not isinstance(one, Signature):
            continue
        at = _moment(one.entered_at)
        later = [two for two in entries[index + 1 :] if not isinstance(two, _TOUCH_NOTHING)]
        touched = later or any(
            moment > at for two in entries[:index] for moment in _touched_at(two)
        )
        (earlier if touched else stand).append(one)
    return tuple(stand), tuple(earlier)


def _touched_at(entry: AnyEntry) -> list[datetime]:
    moments = []
    if isinstance(entry, Cooling | Heating | RunoutSurvey | SizeSurvey):
        moments += [one.at for one in entry.corrections]
    if isinstance(entry, RunoutSurvey | SizeSurvey):
        moments += [one.at for one in entry.kept]
    return [_moment(one) for one in moments]


def _moment(text: str) -> datetime:
    found = datetime.fromisoformat(text)
    return found if found.tzinfo is not None else found.astimezone()
