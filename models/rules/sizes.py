"""Judgements on sizes and on the instruments that took them."""

from models.rules.compare import LENGTH_STEP, at_most
from models.rules.facts import InstrumentFacts, SizeFacts
from models.rules.rule import Judgement, Rule, Verdict
from models.units import UnitSet

__all__ = ["RULES"]

# No shrink-fitted part differs from its nominal size by more than this share of it.
_PLAUSIBLE_SHARE = 0.005
_SLIPS = ((25.4, "25.4 times too large: typed in the wrong unit?"),
          (1 / 25.4, "25.4 times too small: typed in the wrong unit?"),
          (10.0, "ten times too large: a slipped decimal?"),
          (0.1, "ten times too small: a slipped decimal?"),
          (0.5, "half of it: a radius instead of a diameter?"),
          (2.0, "twice of it: a diameter where a radius was read?"))  # fmt: skip
_SLIP_TOLERANCE = 0.02


def sizes_are_plausible(
    *,
    units: UnitSet,
    feature: str,
    least_diameter: float,
    greatest_diameter: float,
    nominal_diameter: float,
) -> Judgement:
    """Question sizes that lie far from the nominal diameter."""
    for diameter in (least_diameter, greatest_diameter):
        stray = at_most(
            abs(diameter - nominal_diameter),
            _PLAUSIBLE_SHARE * nominal_diameter,
            resolution=LENGTH_STEP,
        )
        if stray is Verdict.WITHIN:
            continue
        ratio = diameter / nominal_diameter
        slip = next(
            (words for factor, words in _SLIPS if abs(ratio / factor - 1.0) < _SLIP_TOLERANCE),
            "a digit missing or in the wrong place?",
        )
        return Judgement(
            Verdict.OUTSIDE,
            f"The {feature} measures {units.both(diameter, 'diameter')}, its nominal size is "
            f"{units.both(nominal_diameter, 'diameter')}: {slip} Measure it again.",
            phrase="Correct it",
        )
    return Judgement(
        Verdict.WITHIN,
        f"The {feature} measures {units.bare(least_diameter, 'diameter')} to "
        f"{units.show(greatest_diameter, 'diameter')}.",
    )


def part_temperature_is_known(
    *, units: UnitSet, feature: str, part_temperature: float
) -> Judgement:
    """Ask for the temperature at which a size was taken; without it a size means little."""
    cold, hot = -10.0, 60.0
    if not cold <= part_temperature <= hot:
        return Judgement(
            Verdict.OUTSIDE,
            f"The {feature} was measured at {units.both(part_temperature, 'temperature')}: no size "
            "is taken on a part so far from room temperature. Let it soak and measure again.",
            phrase="Correct it",
        )
    return Judgement(
        Verdict.WITHIN,
        f"The {feature} was measured at {units.both(part_temperature, 'temperature')}.",
    )


def instrument_is_in_calibration(*, tag: str, used_on: str, due_on: str) -> Judgement:
    """Compare the day of use with the day the calibration falls due, which still counts."""
    if used_on > due_on:
        return Judgement(
            Verdict.OUTSIDE,
            f"{tag} was used on {used_on}; its calibration fell due on {due_on}. Read again with "
            "an instrument in calibration, or have this one checked as found.",
        )
    return Judgement(Verdict.WITHIN, f"{tag} is in calibration until {due_on}.")


RULES = (
    Rule(
        id="sizes-plausible",
        statement="The sizes of bore and seat lie near the nominal diameter.",
        source="common practice",
        facts=SizeFacts,
        judge=sizes_are_plausible,
    ),
    Rule(
        id="part-temperature-known",
        statement="The temperature of the part is known when its size is taken.",
        source="ISO 1: sizes are stated at 20 °C",
        facts=SizeFacts,
        judge=part_temperature_is_known,
    ),
    Rule(
        id="instrument-in-calibration",
        statement="Every instrument is in calibration on the day it is used.",
        source="ISO 10012; ISO 9001 clause 7.1.5.2 (from memory)",
        facts=InstrumentFacts,
        judge=instrument_is_in_calibration,
    ),
)
