"""The unbalance that a bow makes, from the stations' offsets and the masses on the shaft."""

import math
from collections.abc import Sequence
from dataclasses import dataclass
from typing import NamedTuple

import numpy as np
import numpy.typing as npt

from models.assess.runout import StationChange, SurveyRunout
from models.assess.shaft import PartMass, journal_positions, masses_on, sections_of
from models.engineering.balance import TwoPlanes, unbalance_of_bow
from models.engineering.balance_limits import permissible_residual
from models.engineering.shaft import AddedMass, StepSection, journal_loads
from models.job import Plan

__all__ = [
    "BowOffset",
    "BowUnbalance",
    "bow_unbalance",
    "offsets_of_change",
    "offsets_of_survey",
]

# Two journals are 0 by definition; without a third station nothing is known of the bow.
_LEAST_STATIONS = 3
# Into so many pieces each step of the shaft is cut, so that its own bow is counted along it.
_PIECES = 8


@dataclass(frozen=True)
class BowUnbalance:
    """The unbalance that a bow makes in the planes of the journals, in kg·m, and what may remain.

    The expanded uncertainties (k = 2) take the stations' as independent. What may remain follows
    6350 W/N from calculated loads; None without a maximum continuous speed.
    """

    first: complex
    second: complex
    uncertainty_first: float
    uncertainty_second: float
    mass: float
    permissible_first: float | None
    permissible_second: float | None

    @property
    def ratio(self) -> float | None:
        """The unbalance over what may remain, in the plane where that is greatest."""
        pairs = ((self.first, self.permissible_first), (self.second, self.permissible_second))
        ratios = [abs(made) / allowed for made, allowed in pairs if allowed]
        return max(ratios, default=None)


class BowOffset(NamedTuple):
    """How far the shaft's centre lies off at a place, with its standard uncertainty."""

    position: float
    vector: complex
    uncertainty: float


def offsets_of_change(plan: Plan, changes: Sequence[StationChange]) -> list[BowOffset]:
    """List what a mount moved at the shaft's own stations."""
    return [
        # The uncertainty of a change is that of a total with k = 2: four of one offset's.
        BowOffset(one.position, one.change, (one.expanded_uncertainty or 0.0) / 4.0)
        for one in changes
        if one.change is not None and plan.station(one.key).kind != "part"
    ]


def offsets_of_survey(plan: Plan, survey: SurveyRunout | None) -> list[BowOffset]:
    """List how far the shaft's own stations lie off the journal axis."""
    if survey is None:
        return []
    unsure = survey.in_axis_uncertainty
    found = []
    for index, one in enumerate(survey.stations):
        vector = survey.corrected(one.key)
        if vector is not None and plan.station(one.key).kind != "part":
            spread = 0.0 if unsure is None else float(unsure[index])
            found.append(BowOffset(one.position, vector, 0.0 if math.isnan(spread) else spread))
    return found


def bow_unbalance(plan: Plan, step: str, offsets: Sequence[BowOffset]) -> BowUnbalance | None:
    """Resolve the masses on the shaft, each as far off as the stations beside it, to the journals.

    Between stations the offset runs straight; beyond the outermost it stays as it is there.
    """
    sections = sections_of(plan)
    first, second = journal_positions(plan)
    if len(offsets) < _LEAST_STATIONS or not sections or not first < second:
        return None
    parts = masses_on(plan, up_to=step).parts
    positions, masses = _weights(sections, parts)
    places = sorted(offsets, key=lambda one: one.position)
    vectors = np.array([one.vector for one in places])
    spreads = np.array([one.uncertainty for one in places])
    shares = _shares(positions, np.array([one.position for one in places])).astype(np.complex128)

    def made_by(eccentricities: npt.NDArray[np.complex128]) -> TwoPlanes:
        return unbalance_of_bow(
            masses=masses,
            eccentricities=eccentricities,
            positions=positions,
            first_plane=first,
            second_plane=second,
        )

    made = made_by(vectors @ shares)
    by_station = [made_by(row) for row in shares]
    unsure = [
        2.0 * math.sqrt(float(np.sum((np.array(levers) * spreads) ** 2)))
        for levers in (
            [abs(one.first) for one in by_station],
            [abs(one.second) for one in by_station],
        )
    ]
    loads = journal_loads(
        sections=sections,
        added_masses=[AddedMass(position=part.position, mass=part.mass) for part in parts],
        first_journal=first,
        second_journal=second,
    )
    allowed = [_permissible(plan, load) for load in (loads.first, loads.second)]
    unbalances = [made.first, made.second]
    if plan.station(plan.first_journal).position.si > first:
        for pair in (allowed, unbalances, unsure):
            pair.reverse()
    return BowUnbalance(
        first=unbalances[0],
        second=unbalances[1],
        uncertainty_first=unsure[0],
        uncertainty_second=unsure[1],
        mass=loads.mass,
        permissible_first=allowed[0],
        permissible_second=allowed[1],
    )


def _shares(
    positions: npt.NDArray[np.float64], stations: npt.NDArray[np.float64]
) -> npt.NDArray[np.float64]:
    """Tell how much of each station's offset a mass at each position has, stations × positions."""
    return np.array([np.interp(positions, stations, row) for row in np.eye(len(stations))])


def _weights(
    sections: Sequence[StepSection], parts: Sequence[PartMass]
) -> tuple[npt.NDArray[np.float64], npt.NDArray[np.float64]]:
    middles = (np.arange(_PIECES) + 0.5) / _PIECES
    positions = [one.start + one.length * middles for one in sections]
    masses = [np.full(_PIECES, one.mass_per_length * one.length / _PIECES) for one in sections]
    positions.append(np.array([part.position for part in parts]))
    masses.append(np.array([part.mass for part in parts]))
    return np.concatenate(positions), np.concatenate(masses)


def _permissible(plan: Plan, load: float) -> float | None:
    speed = plan.rotor.maximum_continuous_speed
    if speed is None or speed.si <= 0.0:
        return None
    # No source gives a least load, so a journal that carries next to nothing is allowed as much.
    return permissible_residual(
        journal_load=load, least_journal_load=0.0, maximum_continuous_speed=speed.si
    ).unbalance
