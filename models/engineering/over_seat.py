"""How long a hot bore stays open once it is over its seat."""

import math
from collections.abc import Callable
from dataclasses import dataclass

from models.engineering.cooling import HotPart, TimeRange, heat_loss_in_air
from models.engineering.errors import OutOfRangeError
from models.engineering.expansion import MeanExpansion
from models.engineering.heating import opening, target_temperature
from models.engineering.surface_heat import gap_coefficient, radiation_coefficient

__all__ = ["Seat", "time_over_seat"]

_STEPS = 120
# Conduction has nearly stopped when bore and seat are this close [K]; the gap no longer shuts them.
_LEVEL = 0.5
_ROUNDING = 1e-9


@dataclass(frozen=True, kw_only=True)
class Seat:
    """A seat and the stretch of shaft below it, as far as heat and growth go."""

    diameter: float
    """Greatest measured diameter at 20 °C [m]."""
    temperature: float
    """Temperature of the shaft at the seat [°C]."""
    density: float
    """Density of the shaft [kg/m³]."""
    specific_heat: float
    """Specific heat of the shaft [J/(kg·K)]."""
    expansion: MeanExpansion
    """Mean coefficient of the shaft from 20 °C to a temperature [1/K]."""
    inner_diameter: float = 0.0
    """Bore of a hollow shaft, 0 for a solid one [m]."""

    def __post_init__(self) -> None:
        for name in ("diameter", "density", "specific_heat"):
            if not getattr(self, name) > 0.0:
                raise OutOfRangeError(name, getattr(self, name), "be positive")
        if not 0.0 <= self.inner_diameter < self.diameter:
            raise OutOfRangeError("inner_diameter", self.inner_diameter, "lie within the seat")


def time_over_seat(
    *,
    part: HotPart,
    seat: Seat,
    part_expansion: MeanExpansion,
    part_temperature: float,
    air_temperature: float,
    least_emissivity: float = 0.2,
    greatest_emissivity: float = 0.9,
    greatest_eccentricity: float = 0.9,
) -> TimeRange:
    r"""Time until a hot bore over its seat closes on it, as a cautious range.

    Heat crosses the gap that is open at each moment, and leaves for the room from outside:

    .. math::

        C_p \dot T_p = -h_g A_b (T_p - T_s) - q_{air}(T_p), \quad
        C_s \dot T_s = h_g A_b (T_p - T_s), \quad c(T_p, T_s) \to 0

    The least: a shaft that keeps all the heat below the part and grows with it, or none where that
    is sooner, a part that hangs out of centre, dark surfaces. The greatest: a shaft that stays as
    it is, a centred part, bright surfaces, and the way from the middle of the wall to the bore in
    series.

    Parameters
    ----------
    part : HotPart
        The part, [-]
    seat : Seat
        Its seat, [-]
    part_expansion : MeanExpansion
        Mean coefficient of the part from 20 °C to a temperature, [1/K]
    part_temperature : float
        Mean temperature of the part as it comes over the seat, [°C]
    air_temperature : float
        Temperature of the room, [°C]
    least_emissivity : float, optional
        Emissivity that the surfaces have at least, [-]
    greatest_emissivity : float, optional
        Emissivity that the surfaces have at most, [-]
    greatest_eccentricity : float, optional
        Offset of the part over the radial clearance that it has at most; 1 would touch, [-]

    Returns
    -------
    TimeRange
        Least and greatest duration; 0 where the bore is shut, infinite where it never closes, [s]

    Raises
    ------
    OutOfRangeError
        If the emissivities are not in order within 0 to 1, the eccentricity is not between 0 and 1,
        or the air lies outside its table.

    Notes
    -----
    Typically one to six minutes; seconds once metal touches on one side, which no figure here
    covers. Hence one unbroken motion. The part's temperature is the variable of integration,
    because the gap closes ever faster in time but evenly in temperature.

    Examples
    --------
    A coupling hub on 100 mm, 0.1 mm interference, at 250 °C: from under half a minute to some five
    minutes:

    >>> hub = HotPart(bore_diameter=0.100, outer_diameter=0.160, length=0.120,
    ...               density=7850.0, specific_heat=520.0, conductivity=40.0)
    >>> seat = Seat(diameter=0.1001, temperature=20.0, density=7850.0, specific_heat=470.0,
    ...             expansion=lambda temperature: 12e-6)
    >>> closing = time_over_seat(part=hub, seat=seat, part_expansion=lambda temperature: 12.9e-6,
    ...                          part_temperature=250.0, air_temperature=20.0)
    >>> closing.least < 60.0 < closing.greatest < 600.0
    True

    References
    ----------
    Energy balance of two lumped bodies; conduction as `surface_heat.gap_coefficient`.
    """
    if not least_emissivity <= greatest_emissivity:
        raise OutOfRangeError("least_emissivity", least_emissivity, "not exceed the greatest")
    section = math.pi / 4.0 * (seat.diameter**2 - seat.inner_diameter**2)
    slug = seat.density * seat.specific_heat * section * part.length
    wall = (part.outer_diameter - part.bore_diameter) / 2.0

    def closing(emissivity: float, eccentricity: float, warming: float, inner: float) -> float:
        return _Closing(
            part=part,
            seat=seat,
            part_expansion=part_expansion,
            air_temperature=air_temperature,
            emissivity=emissivity,
            eccentricity=eccentricity,
            shaft_warming=warming,
            inner_resistance=inner,
        ).seconds(part_temperature)

    # A shaft that warms grows, but may also come level with a part that grows more than it does;
    # the sooner of warming and staying cold is the cautious one.
    soonest = min(
        closing(greatest_emissivity, greatest_eccentricity, warming, 0.0)
        for warming in (part.heat_capacity / slug, 0.0)
    )
    return TimeRange(
        least=soonest,
        greatest=closing(least_emissivity, 0.0, 0.0, wall / (3.0 * part.conductivity)),
    )


@dataclass(frozen=True, kw_only=True)
class _Closing:
    """One end of the range: bodies, surfaces, and what stands in the heat's way."""

    part: HotPart
    seat: Seat
    part_expansion: MeanExpansion
    air_temperature: float
    emissivity: float
    eccentricity: float
    shaft_warming: float
    inner_resistance: float

    def clearance(self, hot: float, shaft: float) -> float:
        return opening(
            bore_diameter=self.part.bore_diameter,
            seat_diameter=self.seat.diameter,
            mean_bore_temperature=hot,
            shaft_temperature=shaft,
            part_expansion=self.part_expansion,
            shaft_expansion=self.seat.expansion,
        )

    def slopes(self, hot: float, shaft: float) -> tuple[float, float]:
        """Seconds, and kelvin of the shaft, for each kelvin that the part cools."""
        # Both sides of the balance are multiplied by the gap, which goes to zero where metal meets.
        film = radiation_coefficient(
            emissivity=self.emissivity, surface_temperature=hot, surroundings_temperature=shaft
        )
        gap = max(self.clearance(hot, shaft), 0.0)
        through = film * gap + gap_coefficient(
            clearance=1.0, gap_temperature=(hot + shaft) / 2.0, eccentricity=self.eccentricity
        )
        resistance = gap + through * self.inner_resistance
        across = through * self.part.bore_area * (hot - shaft)
        outside = heat_loss_in_air(
            part=self.part,
            temperature=hot,
            air_temperature=self.air_temperature,
            emissivity=self.emissivity,
        )
        all_heat = across + outside * resistance
        return (
            self.part.heat_capacity * resistance / all_heat,
            self.shaft_warming * across / all_heat,
        )

    def seconds(self, part_temperature: float) -> float:
        """Duration from a temperature of the part until its bore is shut."""
        hot, shaft, time = part_temperature, self.seat.temperature, 0.0
        gap = self.clearance(hot, shaft)
        if gap <= 0.0:
            return 0.0
        step = (part_temperature - self.coldest(part_temperature)) / _STEPS
        for _ in range(_STEPS):
            if hot - step - shaft < _LEVEL:
                return math.inf
            passed, warmer = _runge_kutta(self.slopes, hot, shaft, step)
            if not passed >= 0.0:
                return math.inf
            left = self.clearance(hot - step, shaft + warmer)
            if left <= 0.0:
                # The step in which they meet is not counted: it is short, and this is cautious.
                return time
            hot, shaft, time, gap = hot - step, shaft + warmer, time + passed, left
        # A slip part is still open when as cold as sizes are stated; rounding is not open.
        return math.inf if gap > _ROUNDING else time

    def coldest(self, part_temperature: float) -> float:
        """Temperature at which the bore shuts on a shaft that has not warmed."""
        return target_temperature(
            greatest_interference=self.seat.diameter - self.part.bore_diameter,
            clearance=0.0,
            diameter=self.part.bore_diameter,
            shaft_temperature=self.seat.temperature,
            part_expansion=self.part_expansion,
            shaft_expansion=self.seat.expansion,
            search_limit=part_temperature,
        )


def _runge_kutta(
    slopes: Callable[[float, float], tuple[float, float]], hot: float, shaft: float, step: float
) -> tuple[float, float]:
    one = slopes(hot, shaft)
    two = slopes(hot - step / 2.0, shaft + step / 2.0 * one[1])
    three = slopes(hot - step / 2.0, shaft + step / 2.0 * two[1])
    four = slopes(hot - step, shaft + step * three[1])
    seconds, warmer = (
        step / 6.0 * (a + 2.0 * b + 2.0 * c + d)
        for a, b, c, d in zip(one, two, three, four, strict=True)
    )
    return seconds, warmer
