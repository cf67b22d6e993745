"""Judgements on the record itself: what was found out, seen, sent off, entered late, left open."""

from models.rules.compare import LENGTH_STEP, at_most
from models.rules.record_facts import (
    CompleteFacts,
    ComponentFacts,
    DecisionFacts,
    FoundOutFacts,
    LateFacts,
    OutsideFacts,
    ResolutionFacts,
    SeenFacts,
)
from models.rules.rule import Judgement, Rule, Verdict
from models.units import UnitSet

__all__ = ["MAY_CONCEDE", "RULES"]

_SHARE_RESOLVED = 0.1
# A time is compared in hours; a second is far below what anybody writes down.
_HOURS_STEP = 1.0 / 3600.0
# Who may let a part stay that does not conform: the design authority, not the shop's inspector.
MAY_CONCEDE = ("engineer",)
_CONCEDING = ("repair", "use as is under concession")


def reading_from_a_good_instrument(
    *, tag: str, reading: str, used_on: str, last_good_on: str
) -> Judgement:
    """Hold every reading made after the last day on which the instrument was good."""
    if used_on > last_good_on:
        return Judgement(
            Verdict.CANNOT_TELL,
            f"{reading} of {used_on} was read with {tag}, found out since and last known good on "
            f"{last_good_on}. Read it again, or an inspector decides what it is still worth.",
        )
    return Judgement(
        Verdict.WITHIN, f"{reading} of {used_on}: {tag} was good until {last_good_on}."
    )


def indicator_resolves_the_limit(
    *, units: UnitSet, resolution: float, least_limit: float
) -> Judgement:
    """Ask for an indicator that resolves a tenth of the least limit of change."""
    wanted = _SHARE_RESOLVED * least_limit
    shown = (
        f"The indicator resolves {units.both(resolution, 'runout')}; a tenth of the least limit "
        f"of change is {units.both(wanted, 'runout')}"
    )
    if at_most(resolution, wanted, resolution=LENGTH_STEP) is Verdict.WITHIN:
        return Judgement(Verdict.WITHIN, shown + ".")
    return Judgement(
        Verdict.CANNOT_TELL,
        shown + ". Take a finer indicator, or the plan is issued knowing this.",
    )


def entry_was_made_in_time(
    *, entry: str, hours_between: float, hours_allowed: float, reason: str
) -> Judgement:
    """Mark what was entered long after it was done, and ask for the reason."""
    if hours_between <= hours_allowed + _HOURS_STEP:
        return Judgement(Verdict.WITHIN, f"{entry}: entered in time.")
    late = f"{entry}: entered {hours_between:.1f} h after it was done, {hours_allowed:g} h is usual"
    if reason:
        return Judgement(
            Verdict.WITHIN, f"{late}: “{reason.rstrip('.')}”.", phrase="Entered late, with a reason"
        )
    return Judgement(Verdict.CANNOT_TELL, f"{late}, and no reason is given.", phrase="Entered late")


def outside_work_is_back(
    *, what: str, works: str, back_on: str, certificate: str, result: str
) -> Judgement:
    """Ask that work sent elsewhere is back, accepted, and has its certificate."""
    if result == "not accepted":
        return Judgement(
            Verdict.OUTSIDE, f"{what} by {works}, back on {back_on}, was not accepted."
        )
    if result != "accepted":
        return Judgement(
            Verdict.NOT_JUDGED, f"{what} by {works}, back on {back_on}, waits to be accepted."
        )
    if not certificate:
        return Judgement(
            Verdict.CANNOT_TELL,
            f"{what} by {works}, back on {back_on}, has no certificate. Ask {works} for it.",
        )
    return Judgement(
        Verdict.WITHIN, f"{what} by {works}, back on {back_on} with certificate {certificate}."
    )


def what_was_seen_conforms(*, subject: str, words: str, weight: str) -> Judgement:
    """Take a person's word for what was seen."""
    said = f"{subject}: “{words.rstrip('.')}”"
    if weight == "does not conform":
        return Judgement(Verdict.OUTSIDE, f"{said}. It does not conform; somebody decides.")
    if weight == "look again":
        return Judgement(Verdict.CANNOT_TELL, f"{said}. An inspector looks at it.")
    return Judgement(Verdict.WITHIN, f"{said}.")


def substitute_is_approved(*, serial: str, substitute_for: str, approved_by: str) -> Judgement:
    """Ask for the approval of a component that stands in for another."""
    if not approved_by:
        return Judgement(
            Verdict.OUTSIDE,
            f"{serial} stands in for {substitute_for}, and nobody has approved that.",
        )
    return Judgement(
        Verdict.WITHIN, f"{serial} stands in for {substitute_for}, approved by {approved_by}."
    )


def decision_has_authority(
    *, disposition: str, role: str, needs_customer: bool, agreed_by: str
) -> Judgement:
    """Ask that who decided may decide so, and that the customer agreed where the plan says so."""
    if disposition in _CONCEDING and role not in MAY_CONCEDE:
        return Judgement(
            Verdict.OUTSIDE,
            f"Disposition “{disposition}” was decided by {_a(role)}; the rotor engineer decides "
            "that, for the design authority.",
        )
    if needs_customer and not agreed_by:
        return Judgement(
            Verdict.NOT_JUDGED,
            f"Disposition “{disposition}” waits for the customer's agreement, as the plan asks.",
        )
    return Judgement(
        Verdict.WITHIN, f"Disposition “{disposition}”, by {_a(role)}{_with(agreed_by)}."
    )


def record_is_complete(
    *,
    findings_open: tuple[str, ...],
    signatures_missing: tuple[str, ...],
    outside_open: tuple[str, ...],
    waived: tuple[str, ...],
) -> Judgement:
    """Say at the end what nobody decided, signed or brought back, and what was waived."""
    lacks = (
        *(f"{one} is not decided" for one in findings_open),
        *(f"{one} is missing" for one in signatures_missing),
        *(f"{one} is still outside" for one in outside_open),
    )
    let_go = f" Waived: {'; '.join(waived)}." if waived else ""
    if lacks:
        return Judgement(Verdict.CANNOT_TELL, f"Still open: {'; '.join(lacks)}.{let_go}")
    return Judgement(Verdict.WITHIN, f"Nothing is open, nothing unsigned.{let_go}")


def _a(role: str) -> str:
    return f"an {role}" if role[:1] in "aeiou" else f"a {role}"


def _with(agreed_by: str) -> str:
    return f", agreed by {agreed_by} for the customer" if agreed_by else ""


RULES = (
    Rule(
        id="instrument-still-good",
        statement="No reading rests on an instrument after the last day it was known to be good.",
        source="ISO 9001 clause 7.1.5.2: validity of earlier results (from memory)",
        facts=FoundOutFacts,
        judge=reading_from_a_good_instrument,
    ),
    Rule(
        id="indicator-resolves-limit",
        statement="The indicator resolves a tenth of the least limit of change.",
        source="common practice: one in ten",
        facts=ResolutionFacts,
        judge=indicator_resolves_the_limit,
    ),
    Rule(
        id="entered-in-time",
        statement="What is done is entered soon after, or says why not.",
        source="contemporaneous records, ALCOA+ (from memory); the usual time is common practice",
        facts=LateFacts,
        judge=entry_was_made_in_time,
    ),
    Rule(
        id="outside-work-back",
        statement="Work sent elsewhere is back, accepted, and has its certificate.",
        source="ISO 9001 clause 8.4 (from memory)",
        facts=OutsideFacts,
        judge=outside_work_is_back,
    ),
    Rule(
        id="seen-conforms",
        statement="What a person saw on a part conforms.",
        source="ISO 9001 clause 8.7 (from memory)",
        facts=SeenFacts,
        judge=what_was_seen_conforms,
    ),
    Rule(
        id="substitute-approved",
        statement="A component that stands in for another is approved.",
        source="common practice",
        facts=ComponentFacts,
        judge=substitute_is_approved,
    ),
    Rule(
        id="decided-with-authority",
        statement="Whoever decides has the authority, and the customer agrees where the plan asks.",
        source="ISO 9001 clause 8.7.2 (from memory); concessions by the design authority",
        facts=DecisionFacts,
        judge=decision_has_authority,
    ),
    Rule(
        id="record-complete",
        statement="At the end nothing is undecided, unsigned or still outside.",
        source="the plan's points; ISO 9001 clause 8.6 (from memory)",
        facts=CompleteFacts,
        judge=record_is_complete,
    ),
)
