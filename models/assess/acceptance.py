"""Findings on the finished rotor: vibration at speed, probe tracks, residual magnetism."""

from collections.abc import Iterable, Sequence

from models.assess.runout import SurveyRunout
from models.engineering.acceptance import (
    compressor_probe_runout_limit,
    compressor_vibration_limit,
    steam_turbine_vibration_limit,
)
from models.job import AnyEntry, HighSpeedRun, Magnetism, Plan
from models.rules import rule
from models.rules.acceptance import HighSpeedFacts, MagnetismFacts, TrackFacts
from models.rules.rule import Finding, Subject
from models.units import unit_set

__all__ = ["acceptance_findings", "vibration_limit"]


def vibration_limit(plan: Plan) -> float | None:
    """Give what the plan's kind of machine may vibrate, peak to peak [m]; None where unknown."""
    asked, speed = plan.acceptance, plan.rotor.maximum_continuous_speed
    if asked is None or speed is None or speed.si <= 0.0:
        return None
    by_kind = {
        "compressor": compressor_vibration_limit,
        "steam turbine": steam_turbine_vibration_limit,
    }
    return by_kind[asked.machine](maximum_continuous_speed=speed.si)


def acceptance_findings(
    plan: Plan, entries: Sequence[AnyEntry], last: SurveyRunout | None
) -> Iterable[Finding]:
    """Judge the finished rotor beyond runout and balance; nothing where the plan asks nothing."""
    asked = plan.acceptance
    if asked is None:
        return
    yield from _tracks(plan, last)
    runs = [one for one in entries if isinstance(one, HighSpeedRun)]
    if asked.high_speed_run or runs:
        yield from _runs(plan, runs)
    fields = [one for one in entries if isinstance(one, Magnetism)]
    if asked.magnetism is not None:
        yield from _fields(plan, fields)


def _runs(plan: Plan, runs: Sequence[HighSpeedRun]) -> Iterable[Finding]:
    asked, speed = plan.acceptance, plan.rotor.maximum_continuous_speed
    origin = asked.origin.words if asked else None
    if not runs or not runs[-1].readings:
        yield rule("vibration-within").apply(HighSpeedFacts(limit_origin=origin), Subject())
        return
    for one in runs[-1].readings:
        yield rule("vibration-within").apply(
            HighSpeedFacts(
                units=unit_set(plan.rotor.units),
                place=one.place,
                vibration=one.amplitude.si,
                vibration_limit=vibration_limit(plan),
                run_speed=runs[-1].speed.si,
                highest_speed=speed.si if speed else None,
                limit_origin=origin,
            ),
            Subject(station=one.place, entry=runs[-1].id),
        )


def _tracks(plan: Plan, last: SurveyRunout | None) -> Iterable[Finding]:
    asked, limit = plan.acceptance, vibration_limit(plan)
    for station in plan.stations_in_reach(plan.steps[-1].key):
        if station.kind != "probe track":
            continue
        read = last.station(station.key) if last is not None else None
        yield rule("probe-track-within").apply(
            TrackFacts(
                units=unit_set(plan.rotor.units),
                track=station.key,
                track_runout=_track_runout(last, station.key) if read is not None else None,
                track_limit=None
                if limit is None
                else compressor_probe_runout_limit(vibration_limit=limit),
                limit_origin=asked.origin.words if asked else None,
            ),
            Subject(station=station.key),
        )


def _track_runout(last: SurveyRunout | None, key: str) -> float | None:
    """Give the runout of a track on its journals: offset and form together, peak to peak [m]."""
    if last is None:
        return None
    read, vector = last.station(key), last.corrected(key)
    if read is None or not read.is_read:
        return None
    if vector is None or read.fit is None:
        return read.total
    return 2.0 * abs(vector) + read.fit.out_of_roundness


def _fields(plan: Plan, found: Sequence[Magnetism]) -> Iterable[Finding]:
    limit = plan.acceptance.magnetism if plan.acceptance else None
    if limit is None:
        return
    common = MagnetismFacts(flux_limit=limit.value.si, limit_origin=limit.origin.words)
    readings = [(one, each) for one in found[-1:] for each in one.readings]
    if not readings:
        yield rule("magnetism-within").apply(common, Subject())
    for entry, each in readings:
        yield rule("magnetism-within").apply(
            MagnetismFacts(
                place=each.place,
                flux_density=each.value.si,
                flux_limit=common.flux_limit,
                limit_origin=common.limit_origin,
            ),
            Subject(station=each.place, entry=entry.id),
        )
