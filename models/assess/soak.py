"""How long a rotor takes to grow cold, when a second survey proves it, and where it will end."""

import math
from collections.abc import Sequence
from dataclasses import dataclass
from datetime import datetime, timedelta
from functools import lru_cache

from models.assess.materials import material_of
from models.engineering.cold_forecast import ColdForecast, cold_forecast
from models.engineering.errors import OutOfRangeError
from models.engineering.lumped_body import time_constant
from models.engineering.soak import repeat_interval, time_to_readable
from models.job import AnyEntry, Cooling, Plan, StationWatched
from models.units import unit_set

__all__ = ["Forecast", "Soak", "forecast_of", "soak_of", "time_constant_of"]

# Still air on a rotor that stands in a workshop: common practice for the soak alone, [W/(m²·K)].
_STILL_AIR = 10.0
# What an indicator's reading is good for where neither plan nor card says, [m]: common practice.
_READING_UNCERTAINTY = 1.3e-6


@dataclass(frozen=True)
class Soak:
    """The waiting after a mount."""

    time_constant: float | None
    """[s]"""
    time_constant_source: str
    least_interval: float | None
    """Least time between two surveys whose agreement proves the rotor cold [s]."""
    agreement: float
    """Difference within which two surveys agree, and what may still come [m]."""
    readable_in: float | None
    """Time from the last temperatures until the rotor may be read [s]; 0 once it may."""


@dataclass(frozen=True, eq=False)
class Forecast:
    """Readings of one station while it cools, and where their decay ends; advice only."""

    station: str
    mark: str
    times: tuple[float, ...]
    """Since the first reading [s]."""
    values: tuple[float, ...]
    """Readings [m]."""
    began: str
    found: ColdForecast | None
    problem: str
    units_name: str

    @property
    def settles_at(self) -> str | None:
        """The moment from which it stays within the agreement of its end; None without a fit."""
        if self.found is None:
            return None
        moment = datetime.fromisoformat(self.began) + timedelta(seconds=self.found.settled_at)
        return moment.isoformat(timespec="minutes")

    @property
    def sentence(self) -> str:
        """What the readings say, as advice."""
        units = unit_set(self.units_name)
        where = f"{self.station}{self.mark}"
        if self.found is None or self.settles_at is None:
            return f"Watched at {where}: {len(self.values)} readings. {self.problem}"
        final = units.show(self.found.final.real, "runout")
        unsure = units.show(2.0 * self.found.final_uncertainty, "runout")
        return (
            f"Watched at {where}: {len(self.values)} readings end at {final} ± {unsure}, settled "
            f"from {self.settles_at[11:16]} on {self.settles_at[:10]}. A forecast, which accepts "
            "nothing: the survey does."
        )


def time_constant_of(plan: Plan) -> tuple[float | None, str]:
    """Give the rotor's time constant in s and where it comes from: the plan, else an estimate."""
    hours = plan.cooling.time_constant_hours
    if hours is not None and hours > 0.0:
        return hours * 3600.0, plan.cooling.origin.words
    material = material_of(plan, plan.shaft.material)
    if material is None or material.specific_heat is None:
        return None, "no time constant in the plan, and the shaft's material is not known"
    thickest = max(step.diameter.si for step in plan.shaft.steps)
    found = time_constant(
        density=material.density,
        specific_heat=material.specific_heat,
        diameter=thickest,
        heat_transfer_coefficient=_STILL_AIR,
    )
    return found, (
        f"estimated, ρ·c·D/4h of the shaft's thickest step in still air at {_STILL_AIR:g} "
        "W/(m²·K), common practice"
    )


def soak_of(plan: Plan, coolings: Sequence[Cooling]) -> Soak:
    """Work out the waiting from the plan's limits and the last temperatures."""
    constant, source = time_constant_of(plan)
    agreement = plan.cooling.agreement.si
    interval = readable = None
    if constant is not None:
        try:
            interval = repeat_interval(
                tolerance=agreement, remainder=agreement, time_constant=constant
            )
            above = _above(coolings)
            if above is not None:
                readable = time_to_readable(
                    temperature_difference=above,
                    remainder=plan.cooling.above_surroundings.si,
                    time_constant=constant,
                )
        except OutOfRangeError:
            pass
    return Soak(constant, source, interval, agreement, readable)


def _above(coolings: Sequence[Cooling]) -> float | None:
    for one in reversed(coolings):
        if one.surroundings is not None and one.temperatures:
            return max(part.temperature.si for part in one.temperatures) - one.surroundings.si
    return None


def forecast_of(plan: Plan, entries: Sequence[AnyEntry]) -> tuple[Forecast, ...]:
    """Fit the readings of each station and mark that was watched in one attempt."""
    series: dict[tuple[str, str], list[StationWatched]] = {}
    for one in entries:
        if isinstance(one, StationWatched):
            mark = f" at {one.angle.written}" if one.angle is not None else ""
            series.setdefault((one.station, mark), []).append(one)
    return tuple(
        _forecast(plan, station, mark, tuple(found)) for (station, mark), found in series.items()
    )


@lru_cache(maxsize=64)
def _forecast(
    plan: Plan, station: str, mark: str, readings: tuple[StationWatched, ...]
) -> Forecast:
    moments = [datetime.fromisoformat(one.done_at) for one in readings]
    order = sorted(range(len(readings)), key=lambda index: moments[index])
    first = moments[order[0]]
    times = tuple((moments[index] - first).total_seconds() for index in order)
    values = tuple(readings[index].value.si for index in order)
    uncertainty = plan.runout.reading_uncertainty
    facts = {
        "times": times,
        "values": values,
        "tolerance": plan.cooling.agreement.si,
        "reading_uncertainty": uncertainty.si if uncertainty else _READING_UNCERTAINTY,
    }
    found, problem = None, ""
    constant, _ = time_constant_of(plan)
    # Fitted by itself where the readings bear it; else with the rotor's own time constant.
    for given in (None, constant):
        if given is None and len(times) < 4:
            problem = "Four readings or more tell where it ends by themselves."
            continue
        try:
            found = cold_forecast(**facts, time_constant=given)  # type: ignore[arg-type]
        except OutOfRangeError as trouble:
            problem = f"No forecast yet: {trouble}."
            continue
        if math.isfinite(found.final_uncertainty):
            break
        found = None
    return Forecast(
        station=station,
        mark=mark,
        times=times,
        values=values,
        began=readings[order[0]].done_at,
        found=found,
        problem=problem,
        units_name=plan.rotor.units,
    )
