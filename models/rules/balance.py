"""Judgements on balance: what is left, who may correct where, and whether a run is due."""

from dataclasses import dataclass

from models.rules.compare import at_most
from models.rules.rule import Judgement, Rule, Verdict, known
from models.units import UnitSet, metric_set

__all__ = ["RULES", "BalanceFacts", "CorrectionFacts", "DueFacts", "TrialFacts"]

# One microgram-metre: a thousandth of a gram-millimetre, finer than any balancing machine shows.
_STEP = 1e-9


@dataclass(frozen=True, kw_only=True)
class BalanceFacts:
    """What was read in one plane, and what may remain there."""

    units: UnitSet = metric_set
    plane: str | None = known("the correction plane")
    residual: float | None = known("a balance run that reads this plane", "kg·m")
    permissible: float | None = known("what may remain: speed, journal loads, limit", "kg·m")
    loads_weighed: bool | None = known("whether the journals were weighed")
    limit_origin: str | None = known("where the limit comes from")


@dataclass(frozen=True, kw_only=True)
class TrialFacts:
    """What a trial weight carried round one plane shows."""

    units: UnitSet = metric_set
    plane: str | None = known("the correction plane")
    smaller: float | None = known("a trial-weight round at four angles or more", "kg·m")
    larger: float | None = known("a trial-weight round at four angles or more", "kg·m")
    permissible: float | None = known("what may remain: speed, journal loads, limit", "kg·m")
    which: str | None = known("a reading without the trial weight")
    limit_origin: str | None = known("where the limit comes from")


@dataclass(frozen=True, kw_only=True)
class CorrectionFacts:
    """Where a correction was made."""

    part: str | None = known("the part that was corrected")
    new_parts: tuple[str, ...] | None = known("the parts of the step")
    allowed_by: str | None = known("who allowed it")


@dataclass(frozen=True, kw_only=True)
class DueFacts:
    """Whether a balance run is due and there."""

    where: str | None = known("where it is due")
    runs: int | None = known("balance runs")


def residual_is_within(
    *, units: UnitSet, plane: str, residual: float, permissible: float, loads_weighed: bool
) -> Judgement:
    """Compare what is left in a plane with what may remain there."""
    verdict = at_most(residual, permissible, resolution=_STEP)
    words = (
        f"In {plane} {units.both(residual, 'unbalance')} is left, "
        f"{units.show(permissible, 'unbalance')} may remain"
    )
    if verdict is Verdict.WITHIN and not loads_weighed:
        return Judgement(
            Verdict.CANNOT_TELL,
            f"{words} by calculated journal loads, which cannot close a balance. Weigh the "
            "journals.",
        )
    if verdict is Verdict.WITHIN:
        return Judgement(verdict, f"{words}.")
    return Judgement(verdict, f"{words}. Correct it, on the part just added.", phrase="Correct it")


def trial_round_agrees(
    *,
    units: UnitSet,
    plane: str,
    smaller: float,
    larger: float,
    permissible: float,
    which: str | None = None,
) -> Judgement:
    """Judge a residual by a trial weight; two answers fit unless something tells them apart."""
    low, high = units.show(smaller, "unbalance"), units.show(larger, "unbalance")
    true = {"smaller": smaller, "larger": larger}.get(which or "")
    if true is not None:
        verdict = at_most(true, permissible, resolution=_STEP)
        words = (
            f"By the trial weight {units.both(true, 'unbalance')} is left in {plane}, "
            f"{units.show(permissible, 'unbalance')} may remain"
        )
        return Judgement(verdict, f"{words}.")
    if smaller <= permissible < larger:
        return Judgement(
            Verdict.CANNOT_TELL,
            f"The readings with the trial weight fit {low} and {high} in {plane} alike: one passes "
            "and one does not. Read once without the trial weight.",
        )
    verdict = at_most(smaller, permissible, resolution=_STEP)
    return Judgement(verdict, f"By the trial weight {low} or {high} is left in {plane}.")


def correction_is_on_the_new_part(
    *, part: str, new_parts: tuple[str, ...], allowed_by: str | None = None
) -> Judgement:
    """Keep corrections on the part just added: the others were balanced before."""
    if part in new_parts:
        return Judgement(Verdict.WITHIN, f"Corrected on {part}, which this step added.")
    if allowed_by:
        return Judgement(
            Verdict.WITHIN, f"Corrected on {part}, which an earlier step added; allowed by "
            f"{allowed_by}."
        )  # fmt: skip
    return Judgement(
        Verdict.OUTSIDE,
        f"Corrected on {part}, which this step did not add. An inspector allows it, or it is "
        "undone and made on the new part.",
    )


def balance_is_done(*, where: str, runs: int) -> Judgement:
    """Ask for the balance run that the plan wants."""
    if runs == 0:
        return Judgement(Verdict.NOT_JUDGED, f"Not judged yet: balance is due {where}.")
    return Judgement(Verdict.WITHIN, f"Balanced {where}, {runs} run{'s' if runs > 1 else ''}.")


_LIMITS = (
    "the plan's limit: 4 W/N per plane (API 617:2002 1B.2.6.2, with W the load of that journal "
    "and N the maximum continuous speed), or a grade of ISO 21940-11"
)

RULES = (
    Rule(
        id="balance-done",
        statement="A balance run is there wherever the plan asks for one.",
        source="the plan",
        facts=DueFacts,
        judge=balance_is_done,
    ),
    Rule(
        id="residual-within",
        statement="No plane keeps more unbalance than may remain there.",
        source=_LIMITS,
        facts=BalanceFacts,
        judge=residual_is_within,
    ),
    Rule(
        id="trial-round-agrees",
        statement="A trial weight carried round the plane shows no more than may remain.",
        source="API 617:2002, chapter 1, annex B, for the round; least squares by hand, so that a "
        "residual above the trial weight is not passed",
        facts=TrialFacts,
        judge=trial_round_agrees,
    ),
    Rule(
        id="correction-on-new-part",
        statement="Balance is corrected on the part just added, unless somebody allows otherwise.",
        source="common practice in progressive balancing",
        facts=CorrectionFacts,
        judge=correction_is_on_the_new_part,
    ),
)
