"""What the reading cell is asked for, and how far it is with it."""

from __future__ import annotations

from dataclasses import dataclass
from enum import StrEnum

__all__ = ["BUSY", "CORRECTION_REASONS", "Asked", "CellState"]

CORRECTION_REASONS = ("misread", "wrong mark", "slipped", "typing slip", "other")
"""Why a reading was replaced, in the order of F1 to F5."""


class CellState(StrEnum):
    """How far the cell is with the reading it is asked for."""

    RESTING = "resting"
    WAITING = "waiting"
    TYPING = "typing"
    UNREADABLE = "unreadable"
    WRITING = "writing"
    CORRECTING = "correcting"
    CLOSING = "closing"
    NOT_YOURS = "not yours"
    TROUBLE = "trouble"


BUSY = frozenset({CellState.RESTING, CellState.WRITING, CellState.NOT_YOURS, CellState.TROUBLE})
"""States in which strokes wait; none of them is lost."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Asked:
    """The reading that is asked for.

    Attributes
    ----------
    mark : str
        Where it is read, as a person says it: "225°".
    old : str or None
        The reading it replaces, where it is a correction.
    reason_needed : bool
        Whether the correction has to say why.
    closing : str or None
        The first reading of the circle, where this one closes it.
    """

    mark: str
    old: str | None = None
    reason_needed: bool = False
    closing: str | None = None
