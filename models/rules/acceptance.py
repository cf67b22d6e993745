"""Judgements on the finished rotor: vibration at speed, probe tracks, residual magnetism."""

from dataclasses import dataclass

from models.rules.compare import LENGTH_STEP, at_most
from models.rules.rule import Judgement, Rule, Verdict, known
from models.units import UnitSet, metric_set

__all__ = ["RULES", "HighSpeedFacts", "MagnetismFacts", "TrackFacts"]

# A tenth of a microtesla, finer than any gaussmeter in a shop shows.
_FIELD_STEP = 1e-7


@dataclass(frozen=True, kw_only=True)
class HighSpeedFacts:
    """Vibration at speed, and what the kind of machine allows."""

    units: UnitSet = metric_set
    place: str | None = known("a high-speed run")
    vibration: float | None = known("a high-speed run", "m")
    vibration_limit: float | None = known("the maximum continuous speed", "m")
    run_speed: float | None = known("a high-speed run", "rad/s")
    highest_speed: float | None = known("the maximum continuous speed", "rad/s")
    limit_origin: str | None = known("where the limit comes from")


@dataclass(frozen=True, kw_only=True)
class TrackFacts:
    """Runout of a probe track, and what the kind of machine allows."""

    units: UnitSet = metric_set
    track: str | None = known("a probe track in reach")
    track_runout: float | None = known("the last closed survey", "m")
    track_limit: float | None = known("the maximum continuous speed", "m")
    limit_origin: str | None = known("where the limit comes from")


@dataclass(frozen=True, kw_only=True)
class MagnetismFacts:
    """Residual magnetism, and what may remain."""

    place: str | None = known("a reading of residual magnetism")
    flux_density: float | None = known("a reading of residual magnetism", "T")
    flux_limit: float | None = known("a limit on residual magnetism", "T")
    limit_origin: str | None = known("where the limit comes from")


def vibration_is_within(
    *,
    units: UnitSet,
    place: str,
    vibration: float,
    vibration_limit: float,
    run_speed: float,
    highest_speed: float,
) -> Judgement:
    """Compare vibration at speed with its limit; a run below full speed proves nothing."""
    verdict = at_most(vibration, vibration_limit, resolution=LENGTH_STEP)
    words = (
        f"At {place} {units.both(vibration, 'runout')} peak to peak, limit "
        f"{units.show(vibration_limit, 'runout')}"
    )
    if verdict is Verdict.WITHIN and run_speed < 0.99 * highest_speed:
        return Judgement(
            Verdict.CANNOT_TELL,
            f"{words}, but at {units.show(run_speed, 'speed')} only: the limit holds up to "
            f"{units.show(highest_speed, 'speed')}.",
        )
    return Judgement(verdict, f"{words}.")


def probe_track_is_within(
    *, units: UnitSet, track: str, track_runout: float, track_limit: float
) -> Judgement:
    """Compare what a probe would see of the track alone with what it may see."""
    verdict = at_most(track_runout, track_limit, resolution=LENGTH_STEP)
    words = (
        f"The track {track} runs out {units.both(track_runout, 'runout')}, limit "
        f"{units.show(track_limit, 'runout')}"
    )
    if verdict is Verdict.WITHIN:
        return Judgement(Verdict.WITHIN, f"{words}; the electrical part shows only to a probe.")
    return Judgement(verdict, f"{words}. Burnish or stone it, and read it again.")


def magnetism_is_within(*, place: str, flux_density: float, flux_limit: float) -> Judgement:
    """Compare residual magnetism with what may remain, in either sense."""
    verdict = at_most(abs(flux_density), flux_limit, resolution=_FIELD_STEP)
    words = (
        f"At {place} {1e4 * abs(flux_density):.1f} gauss ({1e3 * abs(flux_density):.2f} mT) "
        f"remain, limit {1e4 * flux_limit:.1f} gauss"
    )
    if verdict is Verdict.WITHIN:
        return Judgement(verdict, f"{words}.")
    return Judgement(verdict, f"{words}. Demagnetise it and read again.")


RULES = (
    Rule(
        id="vibration-within",
        statement="At full speed no probe shows more vibration than the kind of machine allows.",
        source="steam turbines: Bloch and Singh, Steam Turbines, 2nd edition, 4.8, p. 94; "
        "compressors: API 617, from memory; whichever is less",
        facts=HighSpeedFacts,
        judge=vibration_is_within,
    ),
    Rule(
        id="probe-track-within",
        statement="No probe track runs out by more than a quarter of the vibration allowed or "
        "6 µm, whichever is greater.",
        source="API 617 and 612, from memory",
        facts=TrackFacts,
        judge=probe_track_is_within,
    ),
    Rule(
        id="magnetism-within",
        statement="No place keeps more magnetism than may remain.",
        source="the plan's limit; within ± 2 gauss by API RP 687, from memory",
        facts=MagnetismFacts,
        judge=magnetism_is_within,
    ),
)
