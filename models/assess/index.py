"""A part mounted twice, half a turn apart: what of the change is its own, and what the seat's."""

import cmath
import math
from collections.abc import Sequence
from dataclasses import dataclass

from models.assess.attempts import Attempt
from models.engineering.same_state import IndexTest, index_test
from models.job import Mount
from models.units import UnitSet, unit_set

__all__ = ["IndexView", "index_views"]

# How far from half a turn two mounts may lie apart and still serve (common practice).
_NEAR_HALF_TURN = 10.0
# One share counts as the cause where it is so many times the other (common practice).
_CLEARLY = 2.0


@dataclass(frozen=True)
class IndexView:
    """An index test at the station that moved most."""

    step: str
    first_attempt: int
    second_attempt: int
    station: str
    shares: IndexTest
    units: UnitSet

    @property
    def best_turn(self) -> float:
        """How far to turn the part on from its first position so that it moves least [°]."""
        part, seat = self.shares.part, self.shares.seat
        if not part or not seat:
            return 0.0
        return math.degrees(cmath.phase(-seat / part)) % 360.0

    @property
    def least_change(self) -> float:
        """TIR of the change that would be left there at that turn [m]."""
        return 2.0 * abs(abs(self.shares.part) - abs(self.shares.seat))

    @property
    def sentence(self) -> str:
        """What was found and what to do, in words."""
        part, seat = 2.0 * abs(self.shares.part), 2.0 * abs(self.shares.seat)
        show = self.units.show
        words = (
            f"Mounted half a turn apart in attempts {self.first_attempt} and "
            f"{self.second_attempt}: of the change at {self.station} "
            f"{self.units.both(part, 'runout')} TIR turned with the part and "
            f"{self.units.both(seat, 'runout')} TIR stayed with the seat"
        )
        if part >= _CLEARLY * seat:
            return f"{words}: look at the part, its bore and its faces."
        if seat >= _CLEARLY * part:
            return f"{words}: look at the seat, its shoulder and the shaft."
        return (
            f"{words}: turned on by {self.best_turn:.0f}° from its first position, "
            f"{show(self.least_change, 'runout')} TIR would be left."
        )


def index_views(attempts: Sequence[Attempt]) -> tuple[IndexView, ...]:
    """Find the steps whose part was mounted and read half a turn apart, and share the change out.

    Parameters
    ----------
    attempts : sequence of Attempt
        All attempts of a job, in their order.

    Returns
    -------
    tuple of IndexView
        One for each step that has such a pair; the latest pair where there are several.
    """
    found: dict[str, IndexView] = {}
    for index, second in enumerate(attempts):
        for first in attempts[:index]:
            if first.step.key == second.step.key:
                view = _pair(first, second)
                if view is not None:
                    found[first.step.key] = view
    return tuple(found.values())


def _pair(first: Attempt, second: Attempt) -> IndexView | None:
    one, other = _clock(first), _clock(second)
    if one is None or other is None or abs(abs(other - one) - 180.0) > _NEAR_HALF_TURN:
        return None
    after = {change.key: change.change for change in second.changes}
    shares = {
        change.key: index_test(change_at_zero=change.change, change_at_half_turn=later)
        for change in first.changes
        if change.change is not None
        and not change.is_journal
        and (later := after.get(change.key)) is not None
    }
    if not shares:
        return None
    station = max(shares, key=lambda key: max(abs(shares[key].part), abs(shares[key].seat)))
    return IndexView(
        first.step.key,
        first.number,
        second.number,
        station,
        shares[station],
        unit_set(first.plan.rotor.units),
    )


def _clock(attempt: Attempt) -> float | None:
    mounts = [one for one in attempt.entries if isinstance(one, Mount)]
    known = [one.clock_position.si for one in mounts if one.clock_position is not None]
    return known[-1] if known else None
