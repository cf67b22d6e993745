"""Judgements before a hot part goes on."""

from models.rules.compare import TEMPERATURE_STEP, at_least, at_most
from models.rules.facts import HeatFacts
from models.rules.rule import Judgement, Rule, Verdict
from models.units import UnitSet

__all__ = ["RULES"]

# Common practice for the spread between bore, web and rim of a part heated through.
_SPREAD_ALLOWED = 25.0


def target_is_allowed(
    *, units: UnitSet, target_temperature: float, highest_temperature: float
) -> Judgement:
    """Compare the temperature that opens the bore with the highest allowed."""
    verdict = at_most(target_temperature, highest_temperature, resolution=TEMPERATURE_STEP)
    both = units.both(target_temperature, "temperature")
    cap = units.both(highest_temperature, "temperature")
    if verdict is Verdict.WITHIN:
        return Judgement(verdict, f"The bore opens at {both}; {cap} is allowed.")
    return Judgement(
        verdict,
        f"The bore opens only at {both}, and no more than {cap} is allowed. Do not heat: an "
        "engineer decides how this part goes on.",
    )


def part_is_not_overheated(
    *, units: UnitSet, hottest_part: float, highest_temperature: float
) -> Judgement:
    """Compare the hottest temperature measured on the part with the highest allowed."""
    verdict = at_most(hottest_part, highest_temperature, resolution=TEMPERATURE_STEP)
    hottest = units.both(hottest_part, "temperature")
    cap = units.both(highest_temperature, "temperature")
    if verdict is Verdict.WITHIN:
        return Judgement(verdict, f"Hottest place {hottest}; {cap} is allowed.")
    return Judgement(
        verdict,
        f"The part reached {hottest}, more than the {cap} allowed. Let it cool; an engineer "
        "decides whether its material has suffered.",
    )


def bore_is_open(
    *,
    units: UnitSet,
    target_temperature: float,
    gauged_lands: tuple[str, ...],
    refused_lands: tuple[str, ...],
    ungauged_lands: tuple[str, ...],
    small_gauges: tuple[str, ...],
    coldest_bore: float | None = None,
    mean_temperature: float | None = None,
) -> Judgement:
    """Say from what was measured whether the bore clears the shaft; the gauge goes first."""
    target = units.both(target_temperature, "temperature")
    if refused_lands:
        return Judgement(
            Verdict.OUTSIDE,
            f"The hot-bore gauge does not enter at land {', '.join(refused_lands)}. Heat on; the "
            f"coldest place of the bore must reach {target}.",
            phrase="Not open yet",
        )
    if gauged_lands and not ungauged_lands and not small_gauges:
        return Judgement(
            Verdict.WITHIN,
            f"The hot-bore gauge entered at land {', '.join(gauged_lands)}.",
            phrase="May go on",
        )
    if coldest_bore is None:
        wanting = ", ".join(ungauged_lands + small_gauges)
        return Judgement(
            Verdict.NOT_JUDGED,
            f"Not judged yet: no temperature of the bore, and no gauge of the size wanted at land "
            f"{wanting}.",
        )
    coldest = units.both(coldest_bore, "temperature")
    if (
        at_least(coldest_bore, target_temperature, resolution=TEMPERATURE_STEP)
        is not Verdict.WITHIN
    ):
        return Judgement(
            Verdict.OUTSIDE,
            f"The coldest place of the bore is at {coldest}; {target} is needed. Heat on.",
            {"lacking": target_temperature - coldest_bore},
            phrase="Not open yet",
        )
    if mean_temperature is not None and (
        at_least(mean_temperature, target_temperature, resolution=TEMPERATURE_STEP)
        is not Verdict.WITHIN
    ):
        mean = units.both(mean_temperature, "temperature")
        return Judgement(
            Verdict.OUTSIDE,
            f"The bore is at {coldest}, but the part only at {mean} on average over its area, and "
            f"its bore follows that; {target} is needed. Soak on, or offer the hot-bore gauge.",
            {"lacking": target_temperature - mean_temperature},
            phrase="Not open yet",
        )
    return Judgement(
        Verdict.WITHIN,
        f"The coldest place of the bore is at {coldest}; {target} is needed.",
        {"margin": coldest_bore - target_temperature},
        phrase="May go on",
    )


def part_is_heated_through(
    *,
    units: UnitSet,
    spread: float,
    gauged_lands: tuple[str, ...],
    ungauged_lands: tuple[str, ...],
) -> Judgement:
    """Doubt a bore that is hot in a disc that is not, unless the gauge has entered everywhere."""
    shown = units.both(spread, "temperature_step")
    if at_most(spread, _SPREAD_ALLOWED, resolution=TEMPERATURE_STEP) is Verdict.WITHIN:
        return Judgement(Verdict.WITHIN, f"The part is heated through: {shown} between places.")
    if gauged_lands and not ungauged_lands:
        return Judgement(
            Verdict.WITHIN,
            f"{shown} between places, but the hot-bore gauge entered at every land.",
        )
    return Judgement(
        Verdict.CANNOT_TELL,
        f"{shown} between the hottest and the coldest place: a hot bore in a cool disc opens far "
        "less than its own temperature says. Soak on, or offer the hot-bore gauge.",
    )


def confirmed_before_furnace(
    *, serial: str, confirmed_serial: str, furnace_open_points: tuple[str, ...]
) -> Judgement:
    """Ask for the right part, its facing and its fittings before it is heated."""
    return _confirmed(serial, confirmed_serial, furnace_open_points, "before the furnace")


def confirmed_before_door(
    *, serial: str, door_serial: str, door_open_points: tuple[str, ...]
) -> Judgement:
    """Ask for the same again before the furnace door opens."""
    return _confirmed(serial, door_serial, door_open_points, "before the door")


def _confirmed(
    serial: str, confirmed_serial: str, open_points: tuple[str, ...], moment: str
) -> Judgement:
    if confirmed_serial.strip() != serial.strip():
        return Judgement(
            Verdict.OUTSIDE,
            f"{moment.capitalize()} the serial {confirmed_serial} was read; this position holds "
            f"{serial}. Find the right part.",
        )
    if open_points:
        return Judgement(
            Verdict.OUTSIDE, f"{moment.capitalize()}, not in order: {', '.join(open_points)}."
        )
    return Judgement(Verdict.WITHIN, f"Serial {serial} and its fittings confirmed {moment}.")


RULES = (
    Rule(
        id="confirmed-before-furnace",
        statement="Serial, facing, match mark, key, stop and neighbours are confirmed before the "
        "part is heated.",
        source="common practice",
        facts=HeatFacts,
        judge=confirmed_before_furnace,
    ),
    Rule(
        id="target-below-highest",
        statement="The temperature that opens the bore is allowed for the part.",
        source="the plan's highest temperature, else 50 K below the temper of a bare steel part",
        facts=HeatFacts,
        judge=target_is_allowed,
    ),
    Rule(
        id="not-overheated",
        statement="No place of the part was hotter than allowed.",
        source="the plan's highest temperature, else 50 K below the temper of a bare steel part",
        facts=HeatFacts,
        judge=part_is_not_overheated,
    ),
    Rule(
        id="bore-open",
        statement="What was measured on the hot part says that its bore clears the shaft.",
        source="common practice: the hot-bore gauge decides, else the coldest place of the bore "
        "and the mean over the part's area (Timoshenko and Goodier, from memory)",
        facts=HeatFacts,
        judge=bore_is_open,
        edition=2,
    ),
    Rule(
        id="heated-through",
        statement="The part is heated through, or its bore was gauged.",
        source="common practice (25 K); the bore of a free disc follows its area-weighted mean "
        "temperature (Timoshenko and Goodier, from memory)",
        facts=HeatFacts,
        judge=part_is_heated_through,
    ),
    Rule(
        id="confirmed-before-door",
        statement="Serial and fittings are confirmed again before the furnace door opens.",
        source="common practice",
        facts=HeatFacts,
        judge=confirmed_before_door,
    ),
)
