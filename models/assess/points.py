"""Which points of a step are passed, and how: signed, waived, or invited and nobody came."""

from collections.abc import Iterable, Sequence
from dataclasses import dataclass
from datetime import datetime

from models.job import AnyEntry, Point, PointEvent, Signature, Step

__all__ = ["PointState", "point_events", "point_states", "waits_for"]

_MEANINGS = {"inspector": "inspected", "witness": "witnessed", "engineer": "decided"}


@dataclass(frozen=True)
class PointState:
    """A point of the plan and how it stands; `how` says by what it is passed, empty where not."""

    point: Point
    signed: bool
    how: str
    events: tuple[PointEvent, ...]
    # Why an invitation does not pass it yet.
    lacks: str = ""

    @property
    def passed(self) -> bool:
        """Whether work may go past it."""
        return bool(self.how)

    @property
    def holds_work(self) -> bool:
        """Whether work stops here: a review is of papers and may follow."""
        return not self.passed and self.point.kind != "review"

    @property
    def due_words(self) -> str:
        """What the point asks for."""
        return f"{self.point.role} to sign: {self.point.what}"


def point_events(entries: Iterable[AnyEntry], step: str) -> tuple[PointEvent, ...]:
    """Select what happened at the points of a step, over all its attempts."""
    return tuple(one for one in entries if isinstance(one, PointEvent) and one.place.step == step)


def point_states(
    step: Step, signatures: Sequence[Signature], events: Sequence[PointEvent]
) -> tuple[PointState, ...]:
    """Work out how each point of a step stands.

    Parameters
    ----------
    step : Step
        The step as planned.
    signatures : sequence of Signature
        Signatures that stand for what is recorded now.
    events : sequence of PointEvent
        What happened at the step's points, in the order in which it was recorded.
    """
    given: set[tuple[str, str]] = {(one.role, one.meaning) for one in signatures}
    return tuple(_state(point, given, events) for point in step.points)


def waits_for(states: Iterable[PointState]) -> tuple[str, ...]:
    """Name what work waits for before it goes past the step."""
    return tuple(
        f"{one.due_words}{f' ({one.lacks})' if one.lacks else ''}"
        for one in states
        if one.holds_work
    )


def _state(point: Point, given: set[tuple[str, str]], events: Sequence[PointEvent]) -> PointState:
    mine = tuple(
        one
        for one in events
        if (one.point_kind, one.point_role, one.what) == (point.kind, point.role, point.what)
    )
    signed = (point.role, _MEANINGS.get(point.role, "performed")) in given
    how, lacks = "", ""
    waived = next((one for one in reversed(mine) if one.event == "waived"), None)
    if signed:
        how = "signed"
    elif waived is not None:
        how = f"waived by {waived.who}{_by(waived.how)}"
    elif point.kind == "witness":
        how, lacks = _absent(point, mine)
    return PointState(point, signed, how, mine, lacks)


def _absent(point: Point, events: Sequence[PointEvent]) -> tuple[str, str]:
    """Say how absence passes a witness point, or what the invitation lacks."""
    invited = [one for one in events if one.event == "invited"]
    if not invited:
        return "", "nobody has been invited"
    missed = next((one for one in reversed(events) if one.event == "did not come"), None)
    if missed is None:
        return "", f"{invited[-1].who} was invited"
    notice = 0.0 if point.notice is None else point.notice.si
    longest = max(
        (datetime.fromisoformat(missed.at) - datetime.fromisoformat(one.at)).total_seconds()
        for one in invited
    )
    if longest < notice:
        asked = point.notice.written if point.notice is not None else ""
        return "", f"invited {longest / 3600:.0f} h before, {asked} notice is agreed"
    first = invited[0]
    return f"{missed.who} was invited{_by(first.how)} and did not come", ""


def _by(how: str) -> str:
    return f" by {how}" if how else ""
