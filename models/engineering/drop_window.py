"""How long a hot part stays open: carried through the room, and over its seat."""

import math
from dataclasses import dataclass

from models.engineering.cooling import HotPart, TimeRange, heat_loss_in_air, time_in_air
from models.engineering.errors import OutOfRangeError
from models.engineering.expansion import MeanExpansion
from models.engineering.heating import opening, target_temperature
from models.engineering.lumped_body import biot_number
from models.engineering.over_seat import Seat, time_over_seat

__all__ = ["DropWindow", "drop_window"]


@dataclass(frozen=True, kw_only=True)
class DropWindow:
    """Time a hot part leaves for its mount, as cautious ranges; the hot-bore gauge decides."""

    clearance_now: float
    """Clearance on diameter at the measured temperatures; negative where shut [m]."""
    in_air_least: float
    """Shortest time in the room until the clearance is down to the least wanted [s]."""
    in_air_greatest: float
    """Longest time in the room until the clearance is down to the least wanted [s]."""
    over_seat_least: float
    """Shortest time over the seat until metal touches, from the clearance now [s]."""
    over_seat_greatest: float
    """Longest time over the seat until metal touches, from the clearance now [s]."""
    biot: float
    """Biot number of the part in the room, at its fastest loss [-]."""
    lumped_holds: bool
    """Whether the part cools as one body, Biot number below 0.1 [-]."""


def drop_window(
    *,
    part: HotPart,
    seat: Seat,
    part_expansion: MeanExpansion,
    bore_temperature: float,
    air_temperature: float,
    least_clearance: float = 0.0,
    least_emissivity: float = 0.2,
    greatest_emissivity: float = 0.9,
    greatest_draught: float = 4.0,
    greatest_eccentricity: float = 0.9,
) -> DropWindow:
    """Time a hot part leaves, in the room and over its seat, from the coldest measured bore.

    In the room the part cools until the clearance is down to the least wanted; over the seat it
    closes from the clearance it has now until metal touches.

    Formula: those of `time_in_air` and `time_over_seat`, one after the other.

    Parameters
    ----------
    part : HotPart
        The part, [-]
    seat : Seat
        Its seat, [-]
    part_expansion : MeanExpansion
        Mean coefficient of the part from 20 °C to a temperature, [1/K]
    bore_temperature : float
        Coldest temperature measured at the bore, or the mean over the part where that is lower,
        [°C]
    air_temperature : float
        Temperature of the room, [°C]
    least_clearance : float, optional
        Clearance on diameter that must still be there when the part comes over the seat, [m]
    least_emissivity : float, optional
        Emissivity that the surfaces have at least, [-]
    greatest_emissivity : float, optional
        Emissivity that the surfaces have at most, [-]
    greatest_draught : float, optional
        Factor on the convection that a draught makes at most, [-]
    greatest_eccentricity : float, optional
        Offset of the part over the radial clearance that it has at most, [-]

    Returns
    -------
    DropWindow
        Clearance now [m], both ranges [s], Biot number and whether one temperature holds [-]

    Raises
    ------
    OutOfRangeError
        If the least clearance is negative, or the two functions refuse their inputs.

    Notes
    -----
    A part that is shut leaves no time, which is a value and no error. Where one temperature does
    not hold, the bore's reading may stand for a cooler part: take the mean over its area.

    Examples
    --------
    Still shut at 100 °C:

    >>> hub = HotPart(bore_diameter=0.100, outer_diameter=0.160, length=0.120,
    ...               density=7850.0, specific_heat=520.0, conductivity=40.0)
    >>> seat = Seat(diameter=0.1002, temperature=20.0, density=7850.0, specific_heat=470.0,
    ...             expansion=lambda temperature: 12e-6)
    >>> window = drop_window(part=hub, seat=seat, part_expansion=lambda temperature: 12e-6,
    ...                      bore_temperature=100.0, air_temperature=20.0)
    >>> window.clearance_now, window.in_air_least, window.over_seat_greatest
    (-0.000104, 0.0, 0.0)

    References
    ----------
    Y. A. Çengel, Heat and Mass Transfer, lumped body below a Biot number of 0.1.
    """
    if not least_clearance >= 0.0:
        raise OutOfRangeError("least_clearance", least_clearance, "not be negative")

    def clearance(temperature: float) -> float:
        return opening(
            bore_diameter=part.bore_diameter,
            seat_diameter=seat.diameter,
            mean_bore_temperature=temperature,
            shaft_temperature=seat.temperature,
            part_expansion=part_expansion,
            shaft_expansion=seat.expansion,
        )

    clearance_now = clearance(bore_temperature)
    in_air = over_seat = TimeRange(least=0.0, greatest=0.0)
    if clearance_now > least_clearance and clearance(air_temperature) >= least_clearance:
        in_air = TimeRange(least=math.inf, greatest=math.inf)
    elif clearance_now > least_clearance:
        in_air = time_in_air(
            part=part,
            start_temperature=bore_temperature,
            end_temperature=target_temperature(
                greatest_interference=seat.diameter - part.bore_diameter,
                clearance=least_clearance,
                diameter=part.bore_diameter,
                shaft_temperature=seat.temperature,
                part_expansion=part_expansion,
                shaft_expansion=seat.expansion,
                search_limit=bore_temperature,
            ),
            air_temperature=air_temperature,
            least_emissivity=least_emissivity,
            greatest_emissivity=greatest_emissivity,
            greatest_draught=greatest_draught,
        )
    if clearance_now > 0.0:
        over_seat = time_over_seat(
            part=part,
            seat=seat,
            part_expansion=part_expansion,
            part_temperature=bore_temperature,
            air_temperature=air_temperature,
            least_emissivity=least_emissivity,
            greatest_emissivity=greatest_emissivity,
            greatest_eccentricity=greatest_eccentricity,
        )
    biot = _biot_in_air(
        part, bore_temperature, air_temperature, greatest_emissivity, greatest_draught
    )
    return DropWindow(
        clearance_now=clearance_now,
        in_air_least=in_air.least,
        in_air_greatest=in_air.greatest,
        over_seat_least=over_seat.least,
        over_seat_greatest=over_seat.greatest,
        biot=biot,
        lumped_holds=biot < 0.1,
    )


def _biot_in_air(
    part: HotPart, temperature: float, air_temperature: float, emissivity: float, draught: float
) -> float:
    area = part.outer_area + part.face_area
    # The coefficient is wanted at the start; a part as cold as the room has one too.
    excess = max(temperature - air_temperature, 1.0)
    loss = heat_loss_in_air(
        part=part,
        temperature=air_temperature + excess,
        air_temperature=air_temperature,
        emissivity=emissivity,
        draught=draught,
    )
    return biot_number(
        heat_transfer_coefficient=loss / excess / area,
        volume=part.volume,
        area=area,
        conductivity=part.conductivity,
    )
