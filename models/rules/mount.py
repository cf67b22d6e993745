"""Judgements on how a part went on, and on when the rotor may be read."""

from models.rules.compare import LENGTH_STEP, TEMPERATURE_STEP, at_most, between
from models.rules.facts import CoolFacts, MountFacts
from models.rules.rule import Judgement, Rule, Verdict
from models.units import UnitSet

__all__ = ["RULES"]


def part_is_seated(*, outcome: str, shoulder: str) -> Judgement:
    """Say whether the part reached its place."""
    if outcome == "stopped short":
        return Judgement(
            Verdict.OUTSIDE,
            "The part stopped short of its place. It must come off: if it still slides freely, "
            "draw it straight off; if it grips, use no force and stand clear.",
            phrase="Stopped short",
        )
    if shoulder == "gap":
        return Judgement(
            Verdict.OUTSIDE,
            "The part does not touch its shoulder all round.",
            phrase="Stopped short",
        )
    if shoulder == "not judged":
        return Judgement(
            Verdict.NOT_JUDGED, "Not judged yet: whether the shoulder is touched all round."
        )
    return Judgement(Verdict.WITHIN, "Seated, shoulder felt all round.", phrase="Seated")


def axial_position_is_right(
    *, units: UnitSet, axial_position: float, axial_target: float, axial_tolerance: float
) -> Judgement:
    """Compare where the cold part rests with where it belongs."""
    verdict = between(
        axial_position,
        axial_position,
        least_allowed=axial_target - axial_tolerance,
        greatest_allowed=axial_target + axial_tolerance,
        resolution=LENGTH_STEP,
    )
    words = (
        f"Axial position {units.both(axial_position, 'position')}, wanted "
        f"{units.show(axial_target, 'position')} ± {units.show(axial_tolerance, 'position')}"
    )
    if verdict is Verdict.WITHIN:
        return Judgement(verdict, words + ".")
    return Judgement(verdict, words + ": the part is not in its place.")


def rotor_may_be_read(
    *,
    units: UnitSet,
    side_to_side: float,
    above_surroundings: float,
    side_to_side_allowed: float,
    above_surroundings_allowed: float,
    bow_per_kelvin: float | None = None,
) -> Judgement:
    """Say whether temperatures permit reading; only a survey that agrees proves the rotor cold."""
    across = at_most(side_to_side, side_to_side_allowed, resolution=TEMPERATURE_STEP)
    above = at_most(above_surroundings, above_surroundings_allowed, resolution=TEMPERATURE_STEP)
    verdict = Verdict.worst([across, above])
    shown = units.both(side_to_side, "temperature_step")
    computed = {}
    bow = ""
    if bow_per_kelvin is not None:
        computed["thermal_bow_tir"] = 2.0 * bow_per_kelvin * side_to_side
        bow = f", which can show as {units.both(computed['thermal_bow_tir'], 'runout')} TIR"
    if verdict is Verdict.WITHIN:
        return Judgement(
            verdict,
            f"Side to side {shown}{bow}. Temperatures permit reading; a second survey that agrees "
            "is what proves it.",
            computed,
            phrase="May be read",
        )
    if across is not Verdict.WITHIN:
        words = f"Side to side {shown}, {units.show(side_to_side_allowed, 'temperature_step')} is "
        return Judgement(
            Verdict.OUTSIDE,
            f"{words}allowed{bow}. Turn the rotor and wait.",
            computed,
            phrase="Still warm",
        )
    return Judgement(
        Verdict.OUTSIDE,
        f"The rotor is {units.both(above_surroundings, 'temperature_step')} above its "
        f"surroundings, {units.show(above_surroundings_allowed, 'temperature_step')} is allowed. "
        "Wait.",
        computed,
        phrase="Still warm",
    )


RULES = (
    Rule(
        id="part-seated",
        statement="The part reached its place and touches its shoulder all round.",
        source="common practice",
        facts=MountFacts,
        judge=part_is_seated,
    ),
    Rule(
        id="axial-position-right",
        statement="The cold part rests at the axial position the drawing wants.",
        source="the plan's axial position",
        facts=MountFacts,
        judge=axial_position_is_right,
    ),
    Rule(
        id="may-be-read",
        statement="Temperatures around and along the rotor permit reading its runout.",
        source="the plan's cooling limits; thermal bow αΔTL²/8D by hand",
        facts=CoolFacts,
        judge=rotor_may_be_read,
    ),
)
