"""Judgements on runout surveys and on what a mount moved."""

from models.rules.compare import LENGTH_STEP, at_most
from models.rules.facts import ClosureFacts, FinalFacts, StandFacts, StationFacts, SurveyFacts
from models.rules.rule import Judgement, Rule, Verdict
from models.units import UnitSet

__all__ = ["RULES"]


def survey_is_whole(
    *,
    closed: bool,
    stations_due: tuple[str, ...],
    stations_read: tuple[str, ...],
    open_questions: tuple[str, ...],
) -> Judgement:
    """Ask for every station in reach and for an answer to every question."""
    missing = [station for station in stations_due if station not in stations_read]
    if missing:
        return Judgement(
            Verdict.NOT_JUDGED, f"Not judged yet: station {', '.join(missing)} not read."
        )
    if open_questions:
        return Judgement(
            Verdict.NOT_JUDGED,
            f"Not judged yet: {len(open_questions)} readings are questioned "
            f"({', '.join(open_questions)}); correct them or say why they stay.",
        )
    if not closed:
        return Judgement(Verdict.NOT_JUDGED, "Not judged yet: the survey is still open.")
    return Judgement(Verdict.WITHIN, f"All {len(stations_due)} stations in reach were read.")


def set_up_is_the_same(*, set_up_differences: tuple[str, ...]) -> Judgement:
    """Refuse to compare surveys whose set-ups differ."""
    if set_up_differences:
        return Judgement(
            Verdict.CANNOT_TELL,
            f"Read in another set-up than the survey it is compared with "
            f"({', '.join(set_up_differences)}). Read again in the same set-up, or take a fresh "
            "survey first.",
        )
    return Judgement(Verdict.WITHIN, "Read in the set-up of the survey it is compared with.")


def circle_is_closed(
    *, units: UnitSet, station: str, closure: float, closure_allowed: float
) -> Judgement:
    """Compare the first mark, read again, with what it read at first."""
    verdict = at_most(abs(closure), closure_allowed, resolution=LENGTH_STEP)
    moved = units.both(abs(closure), "runout")
    if verdict is Verdict.WITHIN:
        return Judgement(verdict, f"{station} closes within {moved}.")
    return Judgement(
        Verdict.CANNOT_TELL,
        f"{station} does not come back to its first reading: {moved} apart, "
        f"{units.show(closure_allowed, 'runout')} allowed. Read {station} again.",
    )


def runout_is_unchanged(
    *,
    units: UnitSet,
    station: str,
    limit: float,
    proved: bool,
    change_tir: float | None = None,
    clock_angle: float | None = None,
    expanded_uncertainty: float | None = None,
    plain_change: float | None = None,
    least_change: float | None = None,
    greatest_change: float | None = None,
) -> Judgement:
    """Judge the vector change of a station against the limit; bounds where angles are missing."""
    allowed = units.show(limit, "runout")
    if change_tir is None:
        return _bounded_change(units, station, limit, least_change, greatest_change)
    uncertainty = expanded_uncertainty or 0.0
    verdict = at_most(
        change_tir,
        limit,
        resolution=LENGTH_STEP,
        expanded_uncertainty=uncertainty,
        proved=proved,
    )
    where = "" if clock_angle is None else f" at {clock_angle:.0f}°"
    changed = f"{station} changed {units.both(change_tir, 'runout')} TIR{where}, limit {allowed}"
    hidden = ""
    if plain_change is not None and verdict is not Verdict.WITHIN:
        if abs(plain_change) < 0.1 * change_tir:
            hidden = " Its plain total shows nothing of it."
        elif abs(plain_change) < 0.5 * change_tir:
            hidden = f" Its plain total changed by {units.show(abs(plain_change), 'runout')} only."
    computed = {"room": limit - change_tir}
    if verdict is Verdict.WITHIN:
        return Judgement(verdict, changed + ".", computed)
    if verdict is Verdict.CANNOT_TELL:
        return Judgement(
            verdict,
            f"{changed}: ±{units.show(uncertainty, 'runout')} cannot tell. Read {station} again."
            f"{hidden}",
            computed,
        )
    return Judgement(verdict, f"{changed}.{hidden}", computed, phrase="Remount required")


def _bounded_change(
    units: UnitSet,
    station: str,
    limit: float,
    least_change: float | None,
    greatest_change: float | None,
) -> Judgement:
    if least_change is None or greatest_change is None:
        return Judgement(Verdict.NOT_JUDGED, f"Not judged yet: the change of {station} missing.")
    span = (
        f"{station} has totals without angles: its change lies between "
        f"{units.bare(least_change, 'runout')} and {units.both(greatest_change, 'runout')} TIR, "
        f"limit {units.show(limit, 'runout')}"
    )
    if at_most(greatest_change, limit, resolution=LENGTH_STEP) is Verdict.WITHIN:
        return Judgement(Verdict.WITHIN, span + ".")
    if at_most(least_change, limit, resolution=LENGTH_STEP) is Verdict.OUTSIDE:
        return Judgement(Verdict.OUTSIDE, span + ".", phrase="Remount required")
    return Judgement(Verdict.CANNOT_TELL, f"{span}. Read {station} with its angles.")


def runout_has_not_drifted(
    *,
    units: UnitSet,
    station: str,
    limit: float,
    proved: bool,
    change_tir: float,
    clock_angle: float | None = None,
    expanded_uncertainty: float | None = None,
) -> Judgement:
    """Judge the change against the bare shaft, so that small mounts cannot add up unseen."""
    verdict = at_most(
        change_tir,
        limit,
        resolution=LENGTH_STEP,
        expanded_uncertainty=expanded_uncertainty or 0.0,
        proved=proved,
    )
    where = "" if clock_angle is None else f" at {clock_angle:.0f}°"
    words = (
        f"Over all mounts {station} moved {units.both(change_tir, 'runout')} TIR{where} from the "
        f"bare shaft, limit {units.show(limit, 'runout')}"
    )
    if verdict is Verdict.WITHIN:
        return Judgement(verdict, words + ".")
    return Judgement(verdict, words + ": small changes have added up.", phrase="Look again")


def seat_came_back(
    *,
    units: UnitSet,
    station: str,
    limit: float,
    proved: bool,
    change_tir: float,
    expanded_uncertainty: float | None = None,
) -> Judgement:
    """Ask whether the bare seat came back: what stayed is set in the shaft, not in the mount."""
    verdict = at_most(
        change_tir,
        limit,
        resolution=LENGTH_STEP,
        expanded_uncertainty=expanded_uncertainty or 0.0,
        proved=proved,
    )
    words = (
        f"With the part off, {station} lies {units.both(change_tir, 'runout')} TIR from where it "
        f"was, limit {units.show(limit, 'runout')}"
    )
    if verdict is Verdict.WITHIN:
        return Judgement(verdict, f"{words}: what moved belonged to the mount.")
    if verdict is Verdict.CANNOT_TELL:
        return Judgement(verdict, f"{words}. Read {station} again.")
    return Judgement(verdict, f"{words}: the shaft took a set. An engineer decides.")


def stand_sees_the_limit(
    *, units: UnitSet, visible_change: float, finest_limit: float
) -> Judgement:
    """Ask whether the stand repeats itself well enough for the plan's finest limit."""
    verdict = at_most(visible_change, finest_limit, resolution=LENGTH_STEP)
    words = (
        f"This stand sees a change of {units.both(visible_change, 'runout')} TIR, the plan's "
        f"finest limit is {units.show(finest_limit, 'runout')}"
    )
    if verdict is Verdict.WITHIN:
        return Judgement(verdict, f"{words}.")
    return Judgement(
        Verdict.CANNOT_TELL, f"{words}: tell the planner, or find what keeps it from repeating."
    )


def final_runout_is_within(
    *,
    units: UnitSet,
    station: str,
    tir: float,
    limit: float,
    proved: bool,
    expanded_uncertainty: float | None = None,
) -> Judgement:
    """Compare the finished rotor's runout with its final limit."""
    uncertainty = expanded_uncertainty or 0.0
    verdict = at_most(
        tir, limit, resolution=LENGTH_STEP, expanded_uncertainty=uncertainty, proved=proved
    )
    words = (
        f"{station} runs out {units.both(tir, 'runout')} TIR, final limit "
        f"{units.show(limit, 'runout')}"
    )
    if verdict is Verdict.CANNOT_TELL:
        return Judgement(
            verdict,
            f"{words}: ±{units.show(uncertainty, 'runout')} cannot tell. Read {station} again.",
        )
    return Judgement(verdict, words + ".")


RULES = (
    Rule(
        id="survey-whole",
        statement="Every station in reach was read and every question answered.",
        source="common practice",
        facts=SurveyFacts,
        judge=survey_is_whole,
    ),
    Rule(
        id="set-up-same",
        statement="Surveys are compared only in one set-up.",
        source="common practice",
        facts=SurveyFacts,
        judge=set_up_is_the_same,
    ),
    Rule(
        id="circle-closed",
        statement="The first mark, read again, comes back to its first reading.",
        source="US Bureau of Reclamation, FIST 4-1A, alignment readings: the indicator must "
        "return; the allowed gap is the plan's, else common practice",
        facts=ClosureFacts,
        judge=circle_is_closed,
    ),
    Rule(
        id="runout-changed",
        statement="No station changed by more than the limit, as a vector in the journal axis.",
        source="the plan's change limit; no published value exists",
        facts=StationFacts,
        judge=runout_is_unchanged,
    ),
    Rule(
        id="runout-drifted",
        statement="No station moved by more than the drift limit from the bare shaft.",
        source="the plan's drift limit",
        facts=StationFacts,
        judge=runout_has_not_drifted,
    ),
    Rule(
        id="seat-came-back",
        statement="After a removal the bare seat comes back to the baseline within the limit.",
        source="the plan's change limit",
        facts=StationFacts,
        judge=seat_came_back,
    ),
    Rule(
        id="stand-sees-limit",
        statement="The stand repeats itself well enough to judge the plan's finest limit.",
        source="JCGM 106:2012: a limit finer than the uncertainty cannot be judged; repeatability "
        "from the job's own surveys",
        facts=StandFacts,
        judge=stand_sees_the_limit,
    ),
    Rule(
        id="final-runout",
        statement="The finished rotor runs within its final limits.",
        source="the plan's final limits",
        facts=FinalFacts,
        judge=final_runout_is_within,
    ),
)
