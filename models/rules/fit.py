"""Judgements on how bore and seat fit."""

from models.rules.compare import LENGTH_STEP, between
from models.rules.facts import FitFacts
from models.rules.rule import Judgement, Rule, Verdict
from models.units import UnitSet

__all__ = ["RULES"]


def bore_and_seat_are_not_swapped(
    *, units: UnitSet, mean_interference: float, least_allowed: float
) -> Judgement:
    """Question a clearance where the plan calls for interference."""
    if mean_interference > 0.0 or least_allowed <= 0.0:
        return Judgement(Verdict.WITHIN, "The seat is larger than the bore.")
    return Judgement(
        Verdict.OUTSIDE,
        f"The bore measures {units.both(-mean_interference, 'fit')} larger than the seat, where "
        f"at least {units.both(least_allowed, 'fit')} of interference is wanted: bore and seat "
        "swapped, or the wrong part? Measure both again.",
        phrase="Correct it",
    )


def interference_is_within(
    *,
    units: UnitSet,
    least_interference: float,
    greatest_interference: float,
    expanded_uncertainty: float,
    least_allowed: float,
    greatest_allowed: float,
    proved: bool,
) -> Judgement:
    """Compare least and greatest measured interference with what the drawing allows."""
    verdict = between(
        least_interference,
        greatest_interference,
        least_allowed=least_allowed,
        greatest_allowed=greatest_allowed,
        resolution=LENGTH_STEP,
        expanded_uncertainty=expanded_uncertainty,
        proved=proved,
    )
    measured = (
        f"Interference {units.bare(least_interference, 'fit')} to "
        f"{units.both(greatest_interference, 'fit')}, allowed "
        f"{units.bare(least_allowed, 'fit')} to {units.both(greatest_allowed, 'fit')}"
    )
    ends = {
        Verdict.WITHIN: ".",
        Verdict.CANNOT_TELL: f": ±{units.show(expanded_uncertainty, 'fit')} cannot tell. Measure "
        "again with a finer instrument or more readings, or let an inspector decide.",
        Verdict.OUTSIDE: ". This part may not go on this seat.",
    }
    room = min(greatest_allowed - greatest_interference, least_interference - least_allowed)
    return Judgement(verdict, measured + ends[verdict], {"room": room})


RULES = (
    Rule(
        id="seat-larger-than-bore",
        statement="The seat is larger than the bore where the plan calls for interference.",
        source="definition of an interference fit (ISO 286-1, from memory)",
        facts=FitFacts,
        judge=bore_and_seat_are_not_swapped,
    ),
    Rule(
        id="interference-within",
        statement="Least and greatest measured interference lie within the drawing's limits.",
        source="the plan's limits; decision rule of ISO 14253-1 (from memory)",
        facts=FitFacts,
        judge=interference_is_within,
    ),
)
