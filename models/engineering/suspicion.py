"""What a pattern in the readings makes one suspect: a question to a person, never a verdict."""

from dataclasses import dataclass
from enum import StrEnum

__all__ = ["Mistake", "Suspicion"]


class Mistake(StrEnum):
    """Mistakes that leave a pattern in the numbers."""

    WRONG_UNIT = "wrong unit"
    SLIPPED_DECIMAL = "slipped decimal"
    TWICE_OR_HALF = "twice or half"
    SWAPPED_BORE_AND_SEAT = "bore and seat swapped"
    TAKEN_HOT = "taken hot"
    WILD_READING = "wild reading"
    CIRCLE_NOT_CLOSED = "circle not closed"
    COPIED = "copied from an earlier survey"
    FLIPPED_SIGN = "sign flipped"
    MIRRORED_ANGLES = "angles counted the other way"
    TURNED_MARK = "reference mark turned"
    SKIPPED_MARK = "mark skipped"
    SWAPPED_STATIONS = "neighbouring stations swapped"


@dataclass(frozen=True)
class Suspicion:
    """One mistake that would explain what was typed.

    Attributes
    ----------
    mistake : Mistake
        Which mistake, [-]
    evidence : float
        How many times better the mistake explains the numbers than taking them as they stand, [-]
    station : int or None
        Station concerned, counted from 0; None for the whole survey, [-]
    mark : int or None
        Mark concerned, counted from 0, [-]
    meant : float or None
        Value that was probably meant, where there is one, in the unit of what was given, [m]
    factor : float or None
        Number by which what was typed exceeds what was meant, [-]
    turn : float or None
        Angle by which the marks were turned, the way the angles count, [rad]
    """

    mistake: Mistake
    evidence: float
    station: int | None = None
    mark: int | None = None
    meant: float | None = None
    factor: float | None = None
    turn: float | None = None
