"""What a measured fit grips, holds and is stressed by, at rest and at speed, and what it means.

Grip, holding and release rest on the least measured interference, less what smoothing takes; stress
on the greatest, of which smoothing is not taken. Both at the reference temperature of 20 °C.
"""

import math
from dataclasses import dataclass

from models.engineering.fit_stress import HubStresses, ShaftStresses, SurfaceStress
from models.engineering.stress_at_speed import ShaftAtSpeed
from models.job import Item
from models.units import UnitSet

__all__ = ["FitStrength", "Holding", "LandAtSpeed", "LandStrength", "Release", "Strength"]


@dataclass(frozen=True)
class Strength:
    """A yield strength, and where it comes from."""

    value: float
    origin: str
    by_plan: bool


@dataclass(frozen=True)
class LandAtSpeed:
    """What is left of a land's least interference and pressure at a speed.

    Two uniform discs bound the truth of a wheel: one as wide as the whole part, which opens most,
    and the hub alone, which opens least. `by_designer` is the plan's own figure, if it has one.
    """

    name: str
    speed: float
    as_whole_disc: float
    as_hub_alone: float
    by_designer: float | None
    least_pressure: float
    greatest_pressure: float
    pressure_by_designer: float | None
    # What running temperatures have added to the interference; 0 where the plan gives none.
    warmth: float
    # Expanded, of the interference left.
    uncertainty: float | None
    # Under the greatest interference; estimates like the discs that they rest on.
    hub_as_whole_disc: SurfaceStress
    hub_alone: SurfaceStress
    shaft: ShaftAtSpeed

    @property
    def hub_stress(self) -> float:
        """The greater equivalent stress at the bore of the two discs, in Pa; not judged."""
        return max(self.hub_as_whole_disc.von_mises, self.hub_alone.von_mises)


@dataclass(frozen=True)
class Release:
    """The speeds at which a land opens, in rad/s; None where the designer gave no growth."""

    as_whole_disc: float
    as_hub_alone: float
    by_designer: float | None


@dataclass(frozen=True)
class LandStrength:
    """One land: its pressure, its stress and what speed leaves of it."""

    key: str
    least_interference: float
    greatest_interference: float
    smoothing_loss: float
    least_pressure: float
    greatest_pressure: float
    pressure_uncertainty: float | None
    interference_uncertainty: float | None
    hub: HubStresses
    shaft: ShaftStresses
    hub_margin: float | None
    shaft_margin: float | None
    hub_pressure_at_yield: float | None
    shaft_pressure_at_yield: float | None
    at_speed: tuple[LandAtSpeed, ...]
    release: Release
    pressure_per_interference: float

    @property
    def hub_stress(self) -> float:
        """The equivalent stress (von Mises) at the hub's bore, where it yields first, in Pa."""
        return self.hub.bore.von_mises

    @property
    def shaft_stress(self) -> float:
        """The greatest equivalent stress (von Mises) in the shaft, in Pa."""
        return self.shaft.bore.von_mises if self.shaft.bore else self.shaft.seat.von_mises

    def at(self, name: str) -> LandAtSpeed | None:
        """Find what is left at a speed by its name."""
        return next((one for one in self.at_speed if one.name == name), None)

    def pressure_uncertainty_at(self, name: str) -> float | None:
        """Give the expanded uncertainty of the pressure at a speed, in Pa."""
        found = self.at(name)
        if found is None or found.uncertainty is None:
            return None
        return found.uncertainty * self.pressure_per_interference


@dataclass(frozen=True)
class Holding:
    """Torque and force that friction holds, with expanded uncertainties, and what it must carry."""

    friction: float
    friction_source: str
    torque: float
    force: float
    torque_uncertainty: float | None
    force_uncertainty: float | None
    torque_at_continuous: float | None
    force_at_continuous: float | None
    torque_uncertainty_at_continuous: float | None
    force_uncertainty_at_continuous: float | None
    torque_to_carry: float | None
    thrust: float | None
    # Thrust and torque as one force, in N; None where the plan gives no thrust.
    demanded: float | None
    demanded_at_continuous: float | None


@dataclass(frozen=True, eq=False)
class FitStrength:
    """What a part's fit does, over all of its lands."""

    item: Item
    lands: tuple[LandStrength, ...]
    smoothing_source: str
    holding: Holding
    hub_yield: Strength | None
    shaft_yield: Strength | None
    trip_speed: float | None
    units: UnitSet

    @property
    def holding_factor(self) -> float | None:
        """How many times torque and thrust friction holds at rest; no safety for a keyed part."""
        held = self.holding
        if held.demanded is not None:
            return held.force / held.demanded if held.demanded > 0.0 else math.inf
        if held.torque_to_carry is None:
            return None
        if held.torque_to_carry == 0.0:
            return math.inf
        return held.torque / abs(held.torque_to_carry)

    @property
    def release_speed(self) -> float | None:
        """The speed at which the first land opens, as its designer says; None if one is missing."""
        speeds = [land.release.by_designer for land in self.lands]
        known = [speed for speed in speeds if speed is not None]
        return min(known) if len(known) == len(speeds) else None

    @property
    def release_estimate(self) -> tuple[float, float]:
        """Between which speeds the first land opens if its parts were uniform discs; not judged."""
        return (
            min(land.release.as_whole_disc for land in self.lands),
            min(land.release.as_hub_alone for land in self.lands),
        )

    @property
    def release_over_trip(self) -> float | None:
        """The release speed over the trip speed, by the designer's figure alone."""
        if self.release_speed is None or not self.trip_speed:
            return None
        return self.release_speed / self.trip_speed

    @property
    def means(self) -> str:
        """What all of it means, in one sentence."""
        parts = [self._grip_words(), self._stress_words(), self._speed_words()]
        return "; ".join(part for part in parts if part) + "."

    def _grip_words(self) -> str:
        least = min(self.lands, key=lambda land: land.least_pressure)
        words = (
            f"It grips with at least {self.units.both(least.least_pressure, 'pressure')}"
            f"{self._unsure(least.pressure_uncertainty, 'pressure')} and friction holds "
            f"{self.units.both(self.holding.torque, 'torque')}"
            f"{self._unsure(self.holding.torque_uncertainty, 'torque')}"
        )
        carried, thrust = self.holding.torque_to_carry, self.holding.thrust
        loads = [] if carried is None else [self.units.show(abs(carried), "torque")]
        loads += [] if thrust is None else [f"{self.units.show(abs(thrust), 'force')} of thrust"]
        if loads:
            words += f" where {' and '.join(loads)} are to be carried"
        return words + (", though its key carries first" if self.item.keyed else "")

    def _stress_words(self) -> str:
        margins = [land.hub_margin for land in self.lands if land.hub_margin is not None]
        if not margins or self.hub_yield is None:
            stress = max(land.hub_stress for land in self.lands)
            return f"the bore is stressed to {self.units.both(stress, 'pressure')}"
        share = 100.0 / min(margins)
        whose = "its yield strength in the plan"
        if not self.hub_yield.by_plan:
            whose = "the least yield strength published for its material"
        return f"the bore comes to {share:.0f} % of {whose}"

    def _speed_words(self) -> str:
        trip = f" (trip {self.units.show(self.trip_speed, 'speed')})" if self.trip_speed else ""
        if self.release_speed is not None:
            return (
                f"{self._warm_words()}it opens at {self._speed(self.release_speed)} by its "
                f"designer's growth{trip}"
            )
        low, high = self.release_estimate
        return (
            f"{self._warm_words()}as a uniform disc it would open between {self._speed(low)} and "
            f"{self._speed(high)}{trip}, an estimate that is not judged"
        )

    def _unsure(self, uncertainty: float | None, use: str) -> str:
        return "" if uncertainty is None else f" ± {self.units.show(uncertainty, use)}"

    def _warm_words(self) -> str:
        running = self.item.running
        if running is None:
            return ""
        return f"at {running.part.written} on a shaft at {running.shaft.written} "

    def _speed(self, speed: float) -> str:
        return "no speed" if math.isinf(speed) else self.units.show(speed, "speed")
