"""What the bench says of waiting: how long, when a second survey proves, where it will end."""

import math
from datetime import datetime, timedelta

from models.assess import Attempt
from models.assess.soak import Forecast, Soak, forecast_of, soak_of
from models.job import Plan
from models.units import unit_set
from reports.sheet.decay import DecayPicture

__all__ = ["decay_picture", "second_survey_words", "soak_lines"]

_POINTS = 48


def soak_lines(plan: Plan, attempt: Attempt) -> tuple[str, ...]:
    """Say how long the rotor takes, when a second survey may be taken and why, and what is seen."""
    soak = soak_of(plan, attempt.coolings)
    lines: list[str] = []
    if soak.readable_in is not None and soak.readable_in > 0.0:
        lines.append(
            f"About {soak.readable_in / 3600.0:.1f} h from the last temperatures until it may be "
            "read: advice, the thermometer says when."
        )
    if soak.least_interval is not None:
        lines.append(_interval_words(plan, soak))
    else:
        lines.append("Temperatures permit reading; a second survey that agrees is what proves it.")
    lines += [one.sentence for one in forecast_of(plan, attempt.entries)]
    return tuple(lines)


def _interval_words(plan: Plan, soak: Soak) -> str:
    assert soak.least_interval is not None
    assert soak.time_constant is not None
    # What the plan gives stands in the plan; an estimate says so here.
    is_planned = plan.cooling.time_constant_hours is not None
    source = "" if is_planned else f" ({soak.time_constant_source})"
    agreed = unit_set(plan.rotor.units).show(soak.agreement, "runout")
    return (
        "Temperatures permit reading; a second survey proves it, "
        f"{soak.least_interval / 3600.0:.1f} h or more after the first: at a time constant of "
        f"{soak.time_constant / 3600.0:.1f} h{source} two that agree within "
        f"{agreed} sooner can hide more."
    )


def second_survey_words(plan: Plan, attempt: Attempt) -> str | None:
    """Say from when on a second survey proves a hot mount cold; None where nothing is to prove."""
    closing = [
        one.entry
        for one in attempt.surveys
        if one.entry.purpose in ("after", "again") and one.entry.closed_at is not None
    ]
    soak = soak_of(plan, attempt.coolings)
    hot = any(view.item.kind == "hot" for view in attempt.items)
    if not hot or len(closing) != 1 or soak.least_interval is None:
        return None
    closed = closing[0].closed_at
    assert closed is not None
    moment = datetime.fromisoformat(closed) + timedelta(seconds=soak.least_interval)
    return (
        f"from {moment:%H:%M} on {moment:%Y-%m-%d}, {soak.least_interval / 3600.0:.1f} h after "
        "this one; sooner it proves nothing"
    )


def decay_picture(plan: Plan, attempt: Attempt) -> DecayPicture | None:
    """Draw the station that was watched most; None where too little was read to see a decay."""
    found = [one for one in forecast_of(plan, attempt.entries) if len(one.times) > 1]
    if not found:
        return None
    return _drawn(plan, max(found, key=lambda one: len(one.times)))


def _drawn(plan: Plan, one: Forecast) -> DecayPicture:
    units = unit_set(plan.rotor.units)
    inch = units.name == "inch"
    scale, unit = (1.0 / 2.54e-6, "0.0001 in") if inch else (1e6, "µm")
    fit = one.found
    curve: tuple[tuple[float, float], ...] = ()
    if fit is not None:
        end = max(one.times[-1], fit.settled_at, one.times[-1] + fit.time_constant)
        curve = tuple(
            (
                moment / 3600.0,
                scale
                * (fit.final.real + fit.amplitude.real * math.exp(-moment / fit.time_constant)),
            )
            for moment in (end * index / (_POINTS - 1) for index in range(_POINTS))
        )
    return DecayPicture(
        hours=tuple(moment / 3600.0 for moment in one.times),
        values=tuple(scale * value for value in one.values),
        curve=curve,
        final=None if fit is None else scale * fit.final.real,
        uncertainty=0.0 if fit is None else 2.0 * scale * fit.final_uncertainty,
        unit=unit,
        name=f"{one.station}{one.mark}, while it cools",
        tells=one.sentence,
    )
