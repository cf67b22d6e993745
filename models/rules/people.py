"""Judgements on who did what, and in which order."""

from models.rules.facts import OrderFacts, PeopleFacts, ProgressFacts
from models.rules.rule import Judgement, Rule, Verdict

__all__ = ["RULES"]


def performer_is_not_inspector(
    *,
    performers: tuple[str, ...],
    inspectors: tuple[str, ...],
    agreed_waiver: str | None = None,
) -> Judgement:
    """Refuse an inspection by whoever performed the step, unless the plan agreed to it."""
    both = [name for name in inspectors if name in performers]
    if both and agreed_waiver:
        return Judgement(
            Verdict.WITHIN,
            f"{', '.join(both)} performed this step and inspected it, as the plan agrees: "
            f"{agreed_waiver}.",
            phrase="Within limits, by an agreed waiver",
        )
    if both:
        return Judgement(
            Verdict.OUTSIDE,
            f"{', '.join(both)} performed this step and cannot inspect it. Somebody else inspects.",
        )
    return Judgement(
        Verdict.WITHIN, f"Performed by {', '.join(performers)}, inspected by {_or(inspectors)}."
    )


def points_are_signed(
    *,
    points_due: tuple[str, ...],
    points_open: tuple[str, ...],
    points_without: tuple[str, ...] | None = None,
) -> Judgement:
    """Ask for the signatures that the plan calls for before work goes past a step."""
    if points_open:
        return Judgement(Verdict.NOT_JUDGED, f"Waits for {'; '.join(points_open)}.")
    if not points_due:
        return Judgement(Verdict.WITHIN, "No point here.")
    if points_without:
        return Judgement(
            Verdict.WITHIN,
            f"Every point is passed; without a signature: {'; '.join(points_without)}.",
        )
    return Judgement(Verdict.WITHIN, f"Signed: {'; '.join(points_due)}.")


def entry_is_in_order(*, entry: str, out_of_order: str) -> Judgement:
    """Hold every entry that was taken out of order for an inspector to look at."""
    if not out_of_order:
        return Judgement(Verdict.WITHIN, f"{entry} taken in its order.")
    return Judgement(
        Verdict.CANNOT_TELL,
        f"{entry} taken out of order: “{out_of_order.rstrip('.')}”. An inspector looks at it.",
    )


def every_step_is_settled(*, steps_due: int, steps_waiting: tuple[str, ...]) -> Judgement:
    """Say whether the build is done."""
    if steps_waiting:
        return Judgement(
            Verdict.NOT_JUDGED,
            f"Not judged yet: {len(steps_waiting)} of {steps_due} steps are not settled, "
            f"{steps_waiting[0]} is next.",
        )
    return Judgement(Verdict.WITHIN, f"All {steps_due} steps are settled.")


def _or(names: tuple[str, ...]) -> str:
    return ", ".join(names) if names else "nobody yet"


RULES = (
    Rule(
        id="performer-not-inspector",
        statement="Whoever performed a step does not inspect it.",
        source="common practice: separation of doing and checking",
        facts=PeopleFacts,
        judge=performer_is_not_inspector,
        edition=2,
    ),
    Rule(
        id="points-signed",
        statement="Whoever the plan wants present has signed before work goes past the step.",
        source="the plan's points",
        facts=PeopleFacts,
        judge=points_are_signed,
        edition=2,
    ),
    Rule(
        id="in-order",
        statement="Entries are taken in the order of the work.",
        source="common practice",
        facts=OrderFacts,
        judge=entry_is_in_order,
    ),
    Rule(
        id="every-step-settled",
        statement="Every step of the plan is settled.",
        source="the plan",
        facts=ProgressFacts,
        judge=every_step_is_settled,
    ),
)
