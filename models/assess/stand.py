"""How well a job's stand repeats itself, from surveys between which nothing was touched."""

import math
from collections.abc import Mapping, Sequence
from dataclasses import dataclass

from models.assess.runout import SurveyRunout
from models.engineering.errors import OutOfRangeError
from models.engineering.same_state import Repeatability, repeatability
from models.job import AnyEntry, Handling, Mount, Plan, Removal, RunoutSurvey
from models.units import unit_set

__all__ = ["StandRepeatability", "stand_repeatability", "untouched_pairs"]


@dataclass(frozen=True, eq=False)
class StandRepeatability:
    """What a stand can see, beside the finest limit that the plan sets."""

    plan: Plan
    found: Repeatability
    pairs: tuple[tuple[str, str], ...]
    finest_limit: float | None

    @property
    def is_too_coarse(self) -> bool:
        """Whether the plan sets a limit finer than the stand can see."""
        return self.finest_limit is not None and self.finest_limit < self.found.visible_change_tir

    @property
    def sentence(self) -> str:
        """What was found, in words."""
        units = unit_set(self.plan.rotor.units)
        count = len(self.pairs)
        words = (
            f"From {count} {'pair' if count == 1 else 'pairs'} of surveys with nothing touched "
            f"between, {self.found.pairs} offsets: this stand sees a change of "
            f"{units.both(self.found.visible_change_tir, 'runout')} TIR "
            f"(± {100.0 * self.found.relative_uncertainty:.0f} %)"
        )
        if self.finest_limit is None:
            return words + "."
        limit = units.show(self.finest_limit, "runout")
        if self.is_too_coarse:
            return f"{words}, coarser than the plan's finest limit of {limit}: tell the planner."
        return f"{words}, finer than the plan's finest limit of {limit}."


def untouched_pairs(
    entries: Sequence[AnyEntry],
) -> tuple[tuple[RunoutSurvey, RunoutSurvey], ...]:
    """Pair the survey that opens an attempt with the one before it, where nothing was touched.

    A mount, a removal and any handling but a night on the supports touch the rotor; two surveys in
    different set-ups do not compare.
    """
    pairs = []
    earlier: RunoutSurvey | None = None
    for entry in entries:
        if _touches(entry):
            earlier = None
        elif isinstance(entry, RunoutSurvey) and entry.is_closed:
            alike = earlier is not None and not entry.set_up.differences(earlier.set_up)
            if earlier is not None and alike and entry.purpose == "before":
                pairs.append((earlier, entry))
            earlier = entry
    return tuple(pairs)


def _touches(entry: AnyEntry) -> bool:
    if isinstance(entry, Handling):
        return entry.what != "overnight"
    return isinstance(entry, Mount | Removal)


def stand_repeatability(
    plan: Plan, entries: Sequence[AnyEntry], surveys: Mapping[str, SurveyRunout]
) -> StandRepeatability | None:
    """Work out what the stand repeats, in the journal axis; None without a pair."""
    pairs = untouched_pairs(entries)
    first: list[complex] = []
    second: list[complex] = []
    used = []
    journals = (plan.first_journal, plan.second_journal)
    for earlier, later in pairs:
        before, after = surveys[earlier.id], surveys[later.id]
        both = [
            (before.corrected(one.key), after.corrected(one.key))
            for one in after.stations
            if one.key not in journals
        ]
        known = [(one, other) for one, other in both if one is not None and other is not None]
        if known:
            used.append((earlier.id, later.id))
        first += [one for one, _ in known]
        second += [other for _, other in known]
    try:
        found = repeatability(first_vectors=first, second_vectors=second)
    except OutOfRangeError:
        return None
    limits = [step.change_limit.value.si for step in plan.steps if step.change_limit is not None]
    if plan.drift_limit is not None:
        limits.append(plan.drift_limit.value.si)
    finest = min(limits, default=math.inf)
    return StandRepeatability(plan, found, tuple(used), finest if limits else None)
