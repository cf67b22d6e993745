"""Judgements on a hub that was drawn up its taper on oil."""

from dataclasses import dataclass

from models.rules.compare import LENGTH_STEP, PRESSURE_STEP, at_least, at_most, between
from models.rules.rule import Judgement, Rule, Verdict, known
from models.units import UnitSet, metric_set

__all__ = ["RULES", "DrawUpFacts"]

# Half a per mille of the bore; what a person reads off blue is far coarser.
_SHARE_STEP = 5e-4
_TIME_STEP = 1.0
# What bedding in usually takes at most: 0.002 in, common practice.
_USUAL_SEATING_LOSS = 50.8e-6


@dataclass(frozen=True, kw_only=True)
class DrawUpFacts:
    """A hub on its taper: what its plan allows, and what was measured."""

    units: UnitSet = metric_set
    least_advance: float | None = known("the advance from the dry zero", "m")
    greatest_advance: float | None = known("the advance from the dry zero", "m")
    advance_uncertainty: float | None = known("the uncertainty of the advance", "m")
    least_advance_allowed: float | None = known("the least advance allowed", "m")
    greatest_advance_allowed: float | None = known("the greatest advance allowed", "m")
    contact: float | None = known("the contact that the blue showed", "-")
    contact_wanted: float | None = known("the contact wanted", "-")
    dilation_pressure: float | None = known("the greatest dilation pressure", "Pa")
    dilation_allowed: float | None = known("the greatest dilation pressure allowed", "Pa")
    pressure_at_yield: float | None = known(
        "the pressure at which the bore yields, from the hub's material and yield strength", "Pa"
    )
    seating_loss: float | None = known(
        "the seating loss, from the growth of the hub's outside", "m"
    )
    hold: float | None = known("how long the axial piston was kept", "s")
    hold_wanted: float | None = known("how long the axial piston must be kept", "s")
    proved: bool | None = known("the plan's decision rule")
    limit_origin: str | None = known("the limit's origin")


def advance_is_within(
    *,
    units: UnitSet,
    least_advance: float,
    greatest_advance: float,
    advance_uncertainty: float,
    least_advance_allowed: float,
    greatest_advance_allowed: float,
    proved: bool,
) -> Judgement:
    """Compare the advance at every clock position with what the plan allows."""
    verdict = between(
        least_advance,
        greatest_advance,
        least_allowed=least_advance_allowed,
        greatest_allowed=greatest_advance_allowed,
        resolution=LENGTH_STEP,
        expanded_uncertainty=advance_uncertainty,
        proved=proved,
    )
    words = (
        f"Drawn up by {units.bare(least_advance, 'position')} to "
        f"{units.both(greatest_advance, 'position')} from the dry zero, allowed "
        f"{units.bare(least_advance_allowed, 'position')} to "
        f"{units.both(greatest_advance_allowed, 'position')}"
    )
    short = least_advance < least_advance_allowed
    ends = {
        Verdict.WITHIN: ".",
        Verdict.CANNOT_TELL: f": ±{units.show(advance_uncertainty, 'position')} cannot tell. "
        "Measure the stand-offs again, or let an inspector decide.",
        Verdict.OUTSIDE: ". It is not far enough up: draw it up again, on oil."
        if short
        else ". It is too far up: dilate it again and let it back, the nut left on and nobody on "
        "the axis.",
    }
    room = min(greatest_advance_allowed - greatest_advance, least_advance - least_advance_allowed)
    return Judgement(verdict, words + ends[verdict], {"room": room})


def contact_is_enough(*, contact: float, contact_wanted: float) -> Judgement:
    """Compare the share of the bore that touched with the share wanted."""
    verdict = at_least(contact, contact_wanted, resolution=_SHARE_STEP)
    words = f"Blue touched {100.0 * contact:.0f} % of the bore, {100.0 * contact_wanted:.0f} % "
    end = "are wanted."
    if verdict is Verdict.OUTSIDE:
        end += (
            " Check the shaft with the ring gauge and the hub with the plug; never lap one with "
            "the other."
        )
    return Judgement(verdict, words + end)


def dilation_is_allowed(
    *,
    units: UnitSet,
    dilation_pressure: float,
    dilation_allowed: float | None = None,
    pressure_at_yield: float | None = None,
) -> Judgement:
    """Compare the dilation pressure with the plan's limit and with what the bore stands."""
    limits = [one for one in (dilation_allowed, pressure_at_yield) if one is not None]
    shown = units.both(dilation_pressure, "pressure")
    if not limits:
        return Judgement(
            Verdict.NOT_JUDGED,
            f"Not judged yet: {shown} of dilation, with no limit and no yield strength of the hub.",
        )
    limit = min(limits)
    verdict = at_most(dilation_pressure, limit, resolution=PRESSURE_STEP)
    by_yield = limit == pressure_at_yield
    named = "at which the bore yields" if by_yield else "allowed"
    words = f"Dilated with {shown}, {units.show(limit, 'pressure')} {named}."
    if verdict is Verdict.OUTSIDE:
        words += (
            " Measure the hub's bore again before it is trusted; an engineer decides."
            if by_yield
            else " An engineer decides."
        )
    return Judgement(verdict, words, {"room": limit - dilation_pressure})


def seating_loss_is_usual(*, units: UnitSet, seating_loss: float) -> Judgement:
    """Doubt a zero, a taper or a growth that together leave a seating loss that cannot be."""
    shown = units.both(seating_loss, "fit")
    if at_least(seating_loss, 0.0, resolution=LENGTH_STEP) is not Verdict.WITHIN:
        return Judgement(
            Verdict.OUTSIDE,
            f"The hub has grown by more than its advance can make ({shown} of diameter): dry zero, "
            "taper or growth is wrong. Check the zero without O-rings, and both temperatures.",
        )
    if at_most(seating_loss, _USUAL_SEATING_LOSS, resolution=LENGTH_STEP) is not Verdict.WITHIN:
        return Judgement(
            Verdict.CANNOT_TELL,
            f"{shown} of diameter went into bedding in, more than the usual "
            f"{units.show(_USUAL_SEATING_LOSS, 'fit')}: was the dry zero taken pushed on firmly? "
            "Check it, or let an inspector decide.",
        )
    return Judgement(Verdict.WITHIN, f"{shown} of diameter went into bedding in, as is usual.")


def piston_was_held(*, units: UnitSet, hold: float, hold_wanted: float) -> Judgement:
    """Compare how long the axial piston was kept with what the plan wants."""
    verdict = at_least(hold, hold_wanted, resolution=_TIME_STEP)
    words = (
        f"The axial piston was kept for {units.show(hold, 'duration')} after the dilation was let "
        f"off; {units.show(hold_wanted, 'duration')} are wanted"
    )
    if verdict is Verdict.WITHIN:
        return Judgement(verdict, words + ".")
    return Judgement(
        Verdict.CANNOT_TELL,
        words + ": oil may still lie in the fit. Measure the stand-offs again before it carries "
        "torque.",
    )


RULES = (
    Rule(
        id="advance-within",
        statement="At every clock position the hub has advanced from its dry zero as the plan "
        "allows.",
        source="the plan's advance; decision rule of ISO 14253-1 (from memory)",
        facts=DrawUpFacts,
        judge=advance_is_within,
    ),
    Rule(
        id="taper-contact",
        statement="Blue showed the contact that the plan wants.",
        source="the plan's contact; blue with plug and ring gauges as API 671, 4th ed., 8.6.2.6, "
        "quoted in the trade press",
        facts=DrawUpFacts,
        judge=contact_is_enough,
    ),
    Rule(
        id="dilation-allowed",
        statement="The dilation pressure stayed below the plan's limit and below what the bore "
        "stands.",
        source="the plan's limit; thick cylinders after Lamé, R. G. Budynas, J. K. Nisbett, "
        "Shigley's Mechanical Engineering Design, 9th ed., 7-8",
        facts=DrawUpFacts,
        judge=dilation_is_allowed,
    ),
    Rule(
        id="seating-loss-usual",
        statement="Advance and growth of the hub agree but for a usual seating loss.",
        source="geometry of the taper; 0 to 0.002 in is common practice",
        facts=DrawUpFacts,
        judge=seating_loss_is_usual,
    ),
    Rule(
        id="piston-held",
        statement="The axial piston was kept long enough after the dilation was let off.",
        source="the plan's hold; common practice (15 to 60 min)",
        facts=DrawUpFacts,
        judge=piston_was_held,
    ),
)
