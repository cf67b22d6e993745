"""How fast a hot part loses its heat to the room."""

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np

from models.engineering.errors import OutOfRangeError
from models.engineering.lumped_body import time_to_cool
from models.engineering.surface_heat import (
    cylinder_coefficient,
    face_coefficient,
    radiation_coefficient,
)

__all__ = ["HotPart", "TimeRange", "cooling_in_air", "heat_loss_in_air", "time_in_air"]


@dataclass(frozen=True, kw_only=True)
class HotPart:
    """A ring-shaped part as far as its heat goes."""

    bore_diameter: float
    """Bore at 20 °C [m]."""
    outer_diameter: float
    """Outer diameter, of an uneven part the one that gives its mass [m]."""
    length: float
    """Axial length [m]."""
    density: float
    """Density [kg/m³]."""
    specific_heat: float
    """Specific heat, mean over the range; a low one is cautious [J/(kg·K)]."""
    conductivity: float
    """Thermal conductivity [W/(m·K)]."""

    def __post_init__(self) -> None:
        names = ("bore_diameter", "length", "density", "specific_heat", "conductivity")
        for name in names:
            if not getattr(self, name) > 0.0:
                raise OutOfRangeError(name, getattr(self, name), "be positive")
        if not self.outer_diameter > self.bore_diameter:
            raise OutOfRangeError("outer_diameter", self.outer_diameter, "exceed the bore")

    @property
    def heat_capacity(self) -> float:
        """Heat that cools the whole part by one kelvin [J/K]."""
        return self.density * self.specific_heat * self.volume

    @property
    def volume(self) -> float:
        """Volume of the ring [m³]."""
        return math.pi / 4.0 * (self.outer_diameter**2 - self.bore_diameter**2) * self.length

    @property
    def outer_area(self) -> float:
        """Outer surface [m²]."""
        return math.pi * self.outer_diameter * self.length

    @property
    def face_area(self) -> float:
        """Both faces with the openings of the bore, out of which it radiates [m²]."""
        return math.pi / 2.0 * self.outer_diameter**2

    @property
    def bore_area(self) -> float:
        """Surface of the bore [m²]."""
        return math.pi * self.bore_diameter * self.length


@dataclass(frozen=True, kw_only=True)
class TimeRange:
    """A duration between a cautious and a hopeful figure; never a promise."""

    least: float
    """Shortest duration to reckon with [s]."""
    greatest: float
    """Longest duration to reckon with [s]."""


def heat_loss_in_air(
    *,
    part: HotPart,
    temperature: float,
    air_temperature: float,
    emissivity: float,
    draught: float = 1.0,
) -> float:
    r"""Heat that leaves a part hanging in the room.

    .. math:: q = [f (h_c A_c + h_f A_f) + h_r (A_c + A_f)] (T - T_a)

    with the convection of a horizontal cylinder on the outside and of vertical faces at the ends,
    the openings of the bore counted with the faces.

    Parameters
    ----------
    part : HotPart
        The part, [-]
    temperature : float
        Temperature of the part, :math:`T`, [°C]
    air_temperature : float
        Temperature of the room, :math:`T_a`, [°C]
    emissivity : float
        Emissivity of the surface, [-]
    draught : float, optional
        Factor on the convection, :math:`f`; 1 in still air, 2 to 4 in a draught, [-]

    Returns
    -------
    float
        Heat flow, [W]

    Raises
    ------
    OutOfRangeError
        If the emissivity lies outside 0 to 1, the draught below 1, or the air outside its table.

    Examples
    --------
    A sleeve of 120 × 150 × 100 mm and 5 kg, 180 K above the room, loses about 170 W and so about
    4 K a minute (170 W · 60 s over 5 kg · 520 J/(kg·K)):

    >>> sleeve = HotPart(bore_diameter=0.120, outer_diameter=0.150, length=0.100,
    ...                  density=7850.0, specific_heat=520.0, conductivity=40.0)
    >>> loss = heat_loss_in_air(
    ...     part=sleeve, temperature=200.0, air_temperature=20.0, emissivity=0.3)
    >>> loss * 60.0 / sleeve.heat_capacity
    4.

    References
    ----------
    The correlations of `air` and `surface_heat`; factor for a draught from memory.
    """
    if not draught >= 1.0:
        raise OutOfRangeError("draught", draught, "be at least 1, which is still air")
    around = cylinder_coefficient(
        diameter=part.outer_diameter,
        surface_temperature=temperature,
        air_temperature=air_temperature,
    )
    ends = face_coefficient(
        height=part.outer_diameter, surface_temperature=temperature, air_temperature=air_temperature
    )
    radiation = radiation_coefficient(
        emissivity=emissivity,
        surface_temperature=temperature,
        surroundings_temperature=air_temperature,
    )
    convection = draught * (around * part.outer_area + ends * part.face_area)
    conductance = convection + radiation * (part.outer_area + part.face_area)
    return conductance * (temperature - air_temperature)


def cooling_in_air(
    *,
    part: HotPart,
    start_temperature: float,
    air_temperature: float,
    emissivity: float,
    times: Sequence[float],
    draught: float = 1.0,
) -> tuple[float, ...]:
    r"""Temperature of a part hanging in the room, at given times.

    .. math:: C \, \mathrm{d}T / \mathrm{d}t = -q(T)

    Parameters
    ----------
    part : HotPart
        The part, [-]
    start_temperature : float
        Temperature at time zero, [°C]
    air_temperature : float
        Temperature of the room, [°C]
    emissivity : float
        Emissivity of the surface, [-]
    times : Sequence[float]
        Times since the start, rising, none negative, [s]
    draught : float, optional
        Factor on the convection, [-]

    Returns
    -------
    tuple[float, ...]
        Temperature at each time, [°C]

    Raises
    ------
    OutOfRangeError
        If the times fall or are negative, or `heat_loss_in_air` refuses its inputs.

    Notes
    -----
    Runge-Kutta of the fourth order, in steps no longer than a fortieth of the first time constant.

    Examples
    --------
    >>> sleeve = HotPart(bore_diameter=0.120, outer_diameter=0.150, length=0.100,
    ...                  density=7850.0, specific_heat=520.0, conductivity=40.0)
    >>> start, minute = cooling_in_air(
    ...     part=sleeve, start_temperature=200.0, air_temperature=20.0, emissivity=0.3,
    ...     times=[0.0, 60.0])
    >>> start - minute
    4.

    References
    ----------
    Energy balance of a lumped body; any text on numerical integration for the steps.
    """
    if any(value < 0.0 for value in times) or any(np.diff(times) < 0.0):
        raise OutOfRangeError("times", times, "rise, none of them negative")

    def rate(temperature: float) -> float:
        loss = heat_loss_in_air(
            part=part,
            temperature=temperature,
            air_temperature=air_temperature,
            emissivity=emissivity,
            draught=draught,
        )
        return -loss / part.heat_capacity

    first = abs(rate(start_temperature))
    excess = abs(start_temperature - air_temperature)
    longest = excess / first / 40.0 if first > 0.0 else math.inf
    temperature, now, found = start_temperature, 0.0, []
    for time in times:
        steps = max(1, math.ceil((time - now) / longest)) if time > now else 0
        step = (time - now) / max(steps, 1)
        for _ in range(steps):
            one = rate(temperature)
            two = rate(temperature + step / 2.0 * one)
            three = rate(temperature + step / 2.0 * two)
            four = rate(temperature + step * three)
            temperature += step / 6.0 * (one + 2.0 * two + 2.0 * three + four)
        now = time
        found.append(temperature)
    return tuple(found)


def time_in_air(
    *,
    part: HotPart,
    start_temperature: float,
    end_temperature: float,
    air_temperature: float,
    least_emissivity: float = 0.2,
    greatest_emissivity: float = 0.9,
    greatest_draught: float = 4.0,
) -> TimeRange:
    r"""Time a part takes in the room to cool from one temperature to another, as a cautious range.

    The least: greatest emissivity, greatest draught, nothing but the surface in the heat's way.
    The greatest: least emissivity, still air, and the way from the middle of the wall to the
    surface in series, which for a plate is a third of its half thickness:

    .. math:: \frac{1}{h'} = \frac{1}{h} + \frac{V/A}{3 k}

    Parameters
    ----------
    part : HotPart
        The part, [-]
    start_temperature : float
        Temperature at the start, :math:`T_s`, [°C]
    end_temperature : float
        Temperature at the end, :math:`T_e`, [°C]
    air_temperature : float
        Temperature of the room, [°C]
    least_emissivity : float, optional
        Emissivity that the surface has at least, [-]
    greatest_emissivity : float, optional
        Emissivity that the surface has at most, [-]
    greatest_draught : float, optional
        Factor on the convection that a draught makes at most, [-]

    Returns
    -------
    TimeRange
        Least and greatest duration, infinite where the room never cools the part that far, [s]

    Raises
    ------
    OutOfRangeError
        If the emissivities are not in order within 0 to 1, or the draught is below 1.

    Notes
    -----
    Defaults from memory: bright machined steel 0.2 to rusty 0.9, a draught or fan 2 to 4 times
    still air. The temperature is the mean over the part's area.

    Examples
    --------
    A sleeve of 5 kg loses 77 K in eight minutes at the worst and half an hour at best:

    >>> sleeve = HotPart(bore_diameter=0.120, outer_diameter=0.150, length=0.100,
    ...                  density=7850.0, specific_heat=520.0, conductivity=40.0)
    >>> lasting = time_in_air(part=sleeve, start_temperature=200.0, end_temperature=123.0,
    ...                       air_temperature=20.0)
    >>> lasting.least / 60.0, lasting.greatest / 60.0
    (8., 31.)

    References
    ----------
    The correlations of `air` and `surface_heat`.
    """
    if not least_emissivity <= greatest_emissivity:
        raise OutOfRangeError("least_emissivity", least_emissivity, "not exceed the greatest")
    inner = part.volume / (part.outer_area + part.face_area) / (3.0 * part.conductivity)
    inner /= part.outer_area + part.face_area

    def loss(temperature: float, emissivity: float, draught: float, resistance: float) -> float:
        outside = heat_loss_in_air(
            part=part,
            temperature=temperature,
            air_temperature=air_temperature,
            emissivity=emissivity,
            draught=draught,
        )
        excess = temperature - air_temperature
        return outside if excess <= 0.0 else excess / (excess / outside + resistance)

    def lasting(emissivity: float, draught: float, resistance: float) -> float:
        return time_to_cool(
            start_temperature=start_temperature,
            end_temperature=end_temperature,
            heat_capacity=lambda temperature: part.heat_capacity,
            heat_loss=lambda temperature: loss(temperature, emissivity, draught, resistance),
        )

    return TimeRange(
        least=lasting(greatest_emissivity, greatest_draught, 0.0),
        greatest=lasting(least_emissivity, 1.0, inner),
    )
