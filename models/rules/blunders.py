"""Judgements on mistakes that readings reveal: a rule for each, questioned and never decided."""

from dataclasses import dataclass

from models.engineering.slips import taken_hot
from models.rules.rule import Judgement, Rule, Verdict, known
from models.units import UnitSet

__all__ = ["RULES", "SURVEY_BLUNDERS", "BlunderFacts", "WarmSizeFacts"]

_SECOND_PATH = (
    "by hand: what is tested and how often it errs stands in tests/bench/blunder_rates.py"
)
# A part warmer than its gauge by more grows by more than a step of most gauges (common practice).
_WARMER = 3.0


@dataclass(frozen=True, kw_only=True)
class BlunderFacts:
    """Where one kind of mistake is suspected in a survey, and where somebody has answered that."""

    units: UnitSet | None = None
    suspected: tuple[str, ...] | None = known("the readings, mark by mark")
    answered: tuple[str, ...] | None = known("what was answered")


@dataclass(frozen=True, kw_only=True)
class WarmSizeFacts:
    """Temperatures of a part and of its gauge while a size was taken."""

    feature: str | None = known("bore or seat")
    part_temperature: float | None = known("the temperature of the part when measured", "°C")
    gauge_temperature: float | None = known("the temperature of the gauge when read", "°C")


def nothing_is_suspected(*, suspected: tuple[str, ...], answered: tuple[str, ...]) -> Judgement:
    """Question what looks like the mistake; whoever read it answers."""
    if suspected:
        return Judgement(Verdict.CANNOT_TELL, " ".join(dict.fromkeys(suspected)))
    if answered:
        said = "; ".join(dict.fromkeys(answered)).rstrip(".")
        return Judgement(Verdict.WITHIN, f"Questioned, and answered: {said}.")
    return Judgement(Verdict.WITHIN, "Nothing looks like it.")


def size_is_not_taken_hot(
    *, feature: str, part_temperature: float, gauge_temperature: float
) -> Judgement:
    """Question a size whose part was much warmer than its gauge."""
    found = taken_hot(
        part_temperature=part_temperature,
        shaft_temperature=gauge_temperature,
        allowed_difference=_WARMER,
    )
    apart = f"{abs(part_temperature - gauge_temperature):.1f} K"
    if found is None:
        return Judgement(Verdict.WITHIN, f"The {feature} and its gauge lay within {apart}.")
    return Judgement(
        Verdict.CANNOT_TELL,
        f"The {feature} was {apart} from its gauge: measured hot? Let them lie side by side and "
        "measure again.",
    )


def _rule(rule_id: str, statement: str, source: str = _SECOND_PATH) -> Rule:
    return Rule(
        id=rule_id, statement=statement, source=source, facts=BlunderFacts,
        judge=nothing_is_suspected,
    )  # fmt: skip


SURVEY_BLUNDERS = (
    _rule(
        "reading-possible",
        "No reading lies further off than any rotor runs out, as one with its unit or its decimal "
        "slipped does.",
        "common practice: no rotor worth stacking runs out by half a millimetre",
    ),
    _rule(
        "reading-belongs",
        "Every reading belongs to the turn of the others: none is wild or has digits exchanged.",
    ),
    _rule("survey-read-anew", "The survey was read, not copied from the one before."),
    _rule("sign-kept", "The indicator's sign is as before: the high spots lie where they lay."),
    _rule("marks-counted-right", "The marks were counted the planned way, from the planned end."),
    _rule("reference-mark-kept", "The reference mark is the one of the survey before."),
    _rule("no-mark-skipped", "No station was read a mark off the others."),
    _rule("stations-in-place", "No two neighbouring stations were read in each other's place."),
    _rule("decimal-kept", "The decimal point stands where it stood in the survey before."),
    _rule("unit-kept", "The indicator reads in the unit of the survey before."),
    _rule(
        "totals-not-offsets",
        "No total was typed where an offset was asked, and no radius for a diameter.",
    ),
)

RULES = (
    *SURVEY_BLUNDERS,
    Rule(
        id="size-not-taken-hot",
        statement="A size is taken with the part as warm as its gauge.",
        source="ISO 1, reference temperature 20 °C; the difference allowed is common practice",
        facts=WarmSizeFacts,
        judge=size_is_not_taken_hot,
    ),
)
