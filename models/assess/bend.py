"""Where a mount bent the shaft, at whose seat, and how much unbalance the bow makes.

All of it is shown and none of it judged: the verdict on a mount is the change of each station.
"""

import math
from collections.abc import Sequence
from dataclasses import dataclass

from models.assess.bow_unbalance import (
    BowUnbalance,
    bow_unbalance,
    offsets_of_change,
    offsets_of_survey,
)
from models.assess.runout import StationChange, SurveyRunout
from models.assess.shaft import journal_positions
from models.engineering.balance import clock_angle
from models.engineering.bow import (
    KinkFit,
    TwoKinkFit,
    fit_two_kinks,
    is_blind,
    nearest_seat,
)
from models.engineering.errors import OutOfRangeError
from models.job import Item, Plan
from models.units import unit_set

__all__ = ["Bend", "DriftSeen", "KinkSeat", "bend_of"]

# A fit by weights needs some doubt at every station, also where none was stated.
_LEAST_UNCERTAINTY = 0.1e-6
# Below this a kink lowers the squares of pure noise about as much (see `KinkFit.improvement`).
_PROVEN = 12.0
# More names than this are counted instead.
_NAMED_AT_MOST = 3


@dataclass(frozen=True)
class KinkSeat:
    """The seat a kink sits at or lies nearest to."""

    item: str
    name: str
    distance: float
    is_just_mounted: bool
    reaches_just_mounted: bool
    others: tuple[str, ...]
    blind: bool
    proven: bool


@dataclass(frozen=True)
class DriftSeen:
    """The station that has moved farthest from the bare shaft over all mounts."""

    station: str
    tir: float
    clock_angle_degrees: float
    expanded_uncertainty: float
    limit: float | None


@dataclass(frozen=True, eq=False)
class Bend:
    """All that an attempt's surveys tell about the shaft's bow."""

    plan: Plan
    kink: KinkFit | None
    seat: KinkSeat | None
    two: TwoKinkFit | None
    two_seats: tuple[KinkSeat, ...]
    by_mount: BowUnbalance | None
    of_rotor: BowUnbalance | None
    drift: DriftSeen | None

    @property
    def sentences(self) -> tuple[str, ...]:
        """What was found, in words."""
        found = (
            self._kink_words(),
            self._two_words(),
            self._unbalance_words("The change of this mount", self.by_mount),
            self._unbalance_words("The bow of the rotor as it stands", self.of_rotor),
            self._drift_words(),
        )
        return tuple(one for one in found if one)

    def _kink_words(self) -> str:
        kink, seat = self.kink, self.seat
        if kink is None or seat is None:
            return ""
        if not seat.proven:
            return "No bend is proven: one kink explains the change no better than chance would."
        units = unit_set(self.plan.rotor.units)
        words = (
            f"One bend explains {100.0 * kink.share_explained:.0f} % of the change: at "
            f"{units.both(kink.position, 'position')} "
            f"± {units.show(kink.position_uncertainty, 'position')}, "
            f"{kink.bend_angle * 1e6:.0f} µrad towards {math.degrees(kink.clock_angle):.0f}°, "
            f"{_where(self.plan, seat)}"
        )
        words += _doubt_words(seat)
        return words + ("; no indicator reaches there." if seat.blind else ".")

    def _two_words(self) -> str:
        if self.two is None or not self.two_seats:
            return ""
        units = unit_set(self.plan.rotor.units)
        places = " and ".join(
            f"{units.both(position, 'position')} ({_where(self.plan, seat)})"
            for position, seat in zip(self.two.positions, self.two_seats, strict=True)
        )
        return f"The change asks for two bends: at {places}."

    def _unbalance_words(self, what: str, made: BowUnbalance | None) -> str:
        if made is None:
            return ""
        units = unit_set(self.plan.rotor.units)
        planes = (
            (
                self.plan.first_journal,
                made.first,
                made.uncertainty_first,
                made.permissible_first,
            ),
            (
                self.plan.second_journal,
                made.second,
                made.uncertainty_second,
                made.permissible_second,
            ),
        )
        words = " and ".join(
            f"{units.bare(abs(unbalance), 'unbalance')} ± {units.show(unsure, 'unbalance')} "
            f"towards {math.degrees(clock_angle(vector=unbalance)):.0f}° at {journal}"
            + ("" if allowed is None else f" ({units.show(allowed, 'unbalance')} may remain)")
            for journal, unbalance, unsure, allowed in planes
        )
        return f"{what} makes {words}, calculated with the loads of the masses on the shaft."

    def _drift_words(self) -> str:
        if self.drift is None:
            return ""
        units = unit_set(self.plan.rotor.units)
        limit = self.drift.limit
        against = "no drift limit" if limit is None else f"limit {units.show(limit, 'runout')}"
        return (
            f"Over all mounts {self.drift.station} has moved farthest from the bare shaft: "
            f"{units.both(self.drift.tir, 'runout')} TIR at "
            f"{self.drift.clock_angle_degrees:.0f}°, {against}."
        )


def _where(plan: Plan, seat: KinkSeat) -> str:
    if seat.distance == 0.0:
        return f"at the seat of {seat.name}"
    units = unit_set(plan.rotor.units)
    return f"{units.show(seat.distance, 'position')} from the seat of {seat.name}"


def _doubt_words(seat: KinkSeat) -> str:
    """Say whether it is the part just mounted, and at which others the bend may sit as well."""
    words = " (just mounted)" if seat.is_just_mounted else ", which is not the part mounted"
    if len(seat.others) > _NAMED_AT_MOST:
        words += f"; it may also sit at any of {len(seat.others)} other seats"
    elif seat.others:
        words += f"; it may also sit at {', '.join(seat.others)}"
    if seat.reaches_just_mounted and not seat.is_just_mounted:
        words += ", the part just mounted among them"
    return words


def bend_of(
    plan: Plan,
    step: str,
    *,
    kink: KinkFit | None,
    changes: Sequence[StationChange],
    judged: SurveyRunout | None,
    drift: Sequence[StationChange],
) -> Bend:
    """Name the kink by its seat, look for a second one, and weigh what the bow does to balance."""
    shaft = [one for one in changes if plan.station(one.key).kind != "part"]
    two = _two_kinks(plan, shaft)
    places = two.positions if two is not None and two.accepted else ()
    seats = [_seat_at(plan, step, place, (place, place), proven=True) for place in places]
    return Bend(
        plan=plan,
        kink=kink,
        seat=(
            _seat_at(
                plan,
                step,
                kink.position,
                kink.position_interval,
                proven=kink.improvement >= _PROVEN,
            )
            if kink is not None
            else None
        ),
        two=two,
        two_seats=tuple(seat for seat in seats if seat is not None),
        by_mount=bow_unbalance(plan, step, offsets_of_change(plan, changes)),
        of_rotor=bow_unbalance(plan, step, offsets_of_survey(plan, judged)),
        drift=_drift(plan, drift),
    )


def _two_kinks(plan: Plan, shaft: Sequence[StationChange]) -> TwoKinkFit | None:
    known = [one for one in shaft if one.change is not None]
    first, second = journal_positions(plan)
    try:
        return fit_two_kinks(
            positions=[one.position for one in known],
            changes=[one.change for one in known if one.change is not None],
            uncertainties=[max(one.reading_uncertainty, _LEAST_UNCERTAINTY) for one in known],
            first_journal_position=first,
            second_journal_position=second,
        )
    except OutOfRangeError:
        return None


def _items_on(plan: Plan, step: str) -> list[Item]:
    return [item for one in plan.steps[: plan.step_number(step)] for item in one.items]


def _seat_at(
    plan: Plan,
    step: str,
    position: float,
    interval: tuple[float, float],
    *,
    proven: bool,
) -> KinkSeat | None:
    on = _items_on(plan, step)
    # A part that grips bends at its lands; one that slips on is known by its outline alone.
    seats = [
        (item, stretch.start.si, stretch.end.si)
        for item in on
        for stretch in (item.lands or (item.outline,))
    ]
    if not seats:
        return None
    found = nearest_seat(
        position=position,
        position_interval=interval,
        seats=[(start, end) for _, start, end in seats],
    )
    item = seats[found.seat][0]
    others = [seats[index][0] for index in found.in_reach]
    mounted = {one.key for one in plan.step(step).items}
    return KinkSeat(
        item=item.key,
        name=item.name,
        distance=found.distance,
        is_just_mounted=item.key in mounted,
        reaches_just_mounted=any(one.key in mounted for one in others),
        others=tuple(dict.fromkeys(one.name for one in others if one.key != item.key)),
        blind=is_blind(position=position, stretches=_blind_stretches(plan, step, on)),
        proven=proven,
    )


def _blind_stretches(plan: Plan, step: str, on: Sequence[Item]) -> list[tuple[float, float]]:
    """List the stretches under parts that hold no station of the shaft which can be read."""
    covered: list[tuple[float, float]] = []
    for start, end in sorted((item.outline.start.si, item.outline.end.si) for item in on):
        if covered and start <= covered[-1][1]:
            covered[-1] = (covered[-1][0], max(covered[-1][1], end))
        else:
            covered.append((start, end))
    read = [one.position.si for one in plan.stations_in_reach(step) if one.kind != "part"]
    return [
        (start, end) for start, end in covered if not any(start < place < end for place in read)
    ]


def _drift(plan: Plan, drift: Sequence[StationChange]) -> DriftSeen | None:
    moved = [one for one in drift if one.tir is not None and not one.is_journal]
    if not moved:
        return None
    worst = max(moved, key=lambda one: one.tir or 0.0)
    return DriftSeen(
        station=worst.key,
        tir=worst.tir or 0.0,
        clock_angle_degrees=worst.clock_angle_degrees or 0.0,
        expanded_uncertainty=worst.expanded_uncertainty or 0.0,
        limit=plan.drift_limit.value.si if plan.drift_limit else None,
    )
