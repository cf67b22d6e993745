"""Whether a second survey proves that a rotor is cold; the time between both counts."""

from dataclasses import dataclass

from models.engineering.soak import remainder_to_cold, repeat_interval
from models.rules.compare import LENGTH_STEP, at_most
from models.rules.rule import Judgement, Rule, Verdict, known
from models.units import UnitSet, metric_set

__all__ = ["RULES", "ColdFacts"]


@dataclass(frozen=True, kw_only=True)
class ColdFacts:
    """Two surveys of one state, some time apart."""

    units: UnitSet = metric_set
    difference: float | None = known("the greatest change from the first survey to the second", "m")
    interval: float | None = known("the time between the two surveys", "s")
    time_constant: float | None = known("the time constant of the rotor", "s")
    agreement: float | None = known("the agreement that the plan wants", "m")
    limit_origin: str | None = known("the limit's origin")


def second_survey_proves_cold(
    *,
    units: UnitSet,
    difference: float,
    interval: float,
    time_constant: float,
    agreement: float,
) -> Judgement:
    """Ask what may still be to come after two surveys, and not only whether they agree."""
    if not interval > 0.0:
        return Judgement(
            Verdict.CANNOT_TELL,
            "Both surveys were closed at one moment: nothing is proved. Read again later.",
        )
    # Two surveys that agree within so much may hide so much.
    seen = max(difference, agreement)
    to_come = remainder_to_cold(difference=seen, interval=interval, time_constant=time_constant)
    verdict = at_most(to_come, agreement, resolution=LENGTH_STEP)
    hours, constant = interval / 3600.0, time_constant / 3600.0
    words = (
        f"The second survey came {hours:.1f} h after the first and differs by "
        f"{units.both(difference, 'runout')} TIR at most; at a time constant of {constant:.1f} h "
        f"up to {units.both(to_come, 'runout')} may still be to come"
    )
    computed = {"still_to_come": to_come}
    if verdict is Verdict.WITHIN:
        return Judgement(verdict, f"{words}: the rotor is cold.", computed, phrase="Cold")
    wait = repeat_interval(tolerance=seen, remainder=agreement, time_constant=time_constant)
    return Judgement(
        Verdict.CANNOT_TELL,
        f"{words}, {units.show(agreement, 'runout')} would do no harm. Read again "
        f"{wait / 3600.0:.1f} h or more after the last one, or let an inspector decide.",
        computed,
    )


RULES = (
    Rule(
        id="second-survey-proves",
        statement="What may still come after a second survey is no more than the agreement wanted: "
        "two surveys too soon after each other prove nothing.",
        source="the plan's agreement and time constant; decay of a lumped body, by hand",
        facts=ColdFacts,
        judge=second_survey_proves_cold,
    ),
)
