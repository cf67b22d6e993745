"""A hub pushed up a taper on oil: how far, with what pressure, and what would push it off.

A taper is the change of diameter per length along the axis: 1/24 for half an inch per foot.
"""

import math
from collections.abc import Sequence

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_finite, demand_not_negative, demand_positive

__all__ = [
    "advance_for_interference",
    "axial_release_force",
    "dilation_pressure",
    "interference_from_advance",
    "seating_loss",
    "taper_from_half_angle",
]


def taper_from_half_angle(*, half_angle_degrees: float) -> float:
    r"""Turn an angle to the axis into a taper.

    .. math:: t = 2 \tan\alpha

    Parameters
    ----------
    half_angle_degrees : float
        Angle between the surface and the axis, on one side, :math:`\alpha`, [°]

    Returns
    -------
    taper : float
        Change of diameter per length, :math:`t`, [-]

    Raises
    ------
    OutOfRangeError
        If the angle is not positive or not below 45°.

    Examples
    --------
    >>> round(taper_from_half_angle(half_angle_degrees=1.0), 6)
    0.03491

    References
    ----------
    Trigonometry.
    """
    if not 0.0 < half_angle_degrees < 45.0:
        raise OutOfRangeError("half_angle_degrees", half_angle_degrees, "lie between 0 and 45")
    return 2.0 * math.tan(math.radians(half_angle_degrees))


def advance_for_interference(
    *, interference: float, taper: float, seating_loss: float = 0.0
) -> float:
    r"""Tell how far a hub must be pushed up from its dry zero for an interference.

    .. math:: a = \frac{\Delta + \Delta_0}{t}

    Parameters
    ----------
    interference : float
        Interference on diameter that is wanted, :math:`\Delta`, [m]
    taper : float
        Change of diameter per length, :math:`t`, [-]
    seating_loss : float
        Diameter lost while the surfaces bed in, :math:`\Delta_0`, [m]

    Returns
    -------
    advance : float
        Distance along the axis from the position pushed on by hand, :math:`a`, [m]

    Raises
    ------
    OutOfRangeError
        If interference or loss is negative or the taper not positive.

    Notes
    -----
    The zero is taken dry, without O-rings, pushed on firmly, at three or four clock positions.

    Examples
    --------
    8 thousandths of an inch on half an inch per foot, 0.192 in:

    >>> advance = advance_for_interference(interference=0.008 * 0.0254, taper=0.5 / 12)
    >>> round(advance / 0.0254, 6)
    0.192

    References
    ----------
    Geometry, by hand.
    """
    demand_not_negative("interference", interference)
    demand_not_negative("seating_loss", seating_loss)
    _demand_taper(taper)
    return (interference + seating_loss) / taper


def interference_from_advance(*, advance: float, taper: float, seating_loss: float = 0.0) -> float:
    r"""Tell the interference that an advance from the dry zero has made.

    .. math:: \Delta = t\,a - \Delta_0

    Parameters
    ----------
    advance : float
        Distance along the axis from the dry zero, :math:`a`, [m]
    taper : float
        Change of diameter per length, :math:`t`, [-]
    seating_loss : float
        Diameter lost while the surfaces bed in, :math:`\Delta_0`, [m]

    Returns
    -------
    interference : float
        Interference on diameter; negative while the surfaces still bed in, [m]

    Raises
    ------
    OutOfRangeError
        If advance or loss is negative or the taper not positive.

    Examples
    --------
    4 mm up a taper of 1 in 20:

    >>> interference_from_advance(advance=0.004, taper=0.05)
    0.0002

    References
    ----------
    Geometry, by hand.
    """
    demand_not_negative("advance", advance)
    demand_not_negative("seating_loss", seating_loss)
    _demand_taper(taper)
    return taper * advance - seating_loss


def seating_loss(*, advance: float, interference: float, taper: float) -> float:
    r"""Tell what bedding in has taken, from the advance and the interference that came of it.

    .. math:: \Delta_0 = t\,a - \Delta

    Parameters
    ----------
    advance : float
        Distance along the axis from the dry zero, :math:`a`, [m]
    interference : float
        Interference on diameter known by other means, such as the growth of the hub outside,
        :math:`\Delta`, [m]
    taper : float
        Change of diameter per length, :math:`t`, [-]

    Returns
    -------
    loss : float
        Diameter lost; negative says that zero, taper or interference is wrong, [m]

    Raises
    ------
    OutOfRangeError
        If the advance is negative, the interference not finite or the taper not positive.

    Notes
    -----
    Usually 0 to 0.002 in (50 µm); common practice.

    Examples
    --------
    4.2 mm up a taper of 1 in 20 for 200 µm:

    >>> round(seating_loss(advance=0.0042, interference=200e-6, taper=0.05) * 1e6, 6)
    10.0

    References
    ----------
    Geometry, by hand.
    """
    demand_not_negative("advance", advance)
    demand_finite("interference", interference)
    _demand_taper(taper)
    return taper * advance - interference


def dilation_pressure(*, section_pressures: Sequence[float], margin: float) -> float:
    r"""Tell the oil pressure that lifts a hub off its taper at its final position.

    Oil must carry every section, so the one that grips hardest decides:

    .. math:: p_d = (1 + m)\,\max_i p_i

    Parameters
    ----------
    section_pressures : sequence of float
        Contact pressure at each section of the hub, :math:`p_i`, [Pa]
    margin : float
        Share added for the ends, where oil escapes, :math:`m`, [-]

    Returns
    -------
    pressure : float
        Dilation pressure, [Pa]

    Raises
    ------
    OutOfRangeError
        If there is no section, or a pressure or the margin is negative.

    Notes
    -----
    While it floats the hub is stressed as it is at rest in its fit, and no more, as long as the
    pressure is not raised beyond need. Its thinnest section then carries the pressure of the
    thickest: that stress is looked at too. The maker's limit goes before this number; usual pumps
    end at 20 000 to 30 000 psi (common practice).

    Examples
    --------
    >>> dilation_pressure(section_pressures=[100e6, 120e6], margin=0.1)
    132000000.0

    References
    ----------
    Balance of pressure; the pressure of each section as for `contact_pressure`.
    """
    if not section_pressures:
        raise OutOfRangeError("section_pressures", section_pressures, "hold one or more")
    for pressure in section_pressures:
        demand_not_negative("section_pressures", pressure)
    demand_not_negative("margin", margin)
    return (1.0 + margin) * max(section_pressures)


def axial_release_force(
    *,
    pressure: float,
    mean_diameter: float,
    contact_length: float,
    taper: float,
    friction: float,
) -> float:
    r"""Tell the axial force with which a tapered hub under pressure pushes itself off.

    The pressure pushes towards the thin end, friction holds:

    .. math:: F = \pi d L\,p\left(\frac{t}{2} - \mu\right)

    Parameters
    ----------
    pressure : float
        Contact or oil pressure, :math:`p`, [Pa]
    mean_diameter : float
        Diameter at the middle of the seat, :math:`d`, [m]
    contact_length : float
        Length of the seat along the axis, :math:`L`, [m]
    taper : float
        Change of diameter per length, :math:`t`, [-]
    friction : float
        Coefficient of friction; 0 while the hub floats on oil, :math:`\mu`, [-]

    Returns
    -------
    force : float
        Force towards the thin end; negative where the hub stays by itself, [N]

    Raises
    ------
    OutOfRangeError
        If pressure or friction is negative, or diameter, length or taper not positive.

    Notes
    -----
    On oil the force is large and comes at once: nut or piston must be there to take it before the
    hub is dilated for removal, or the hub jumps. With μ for −μ it is the force that pushes the hub
    up.

    Examples
    --------
    100 MPa on 100 mm by 100 mm, 1 in 20, on oil: π · 0.01 m² · 100 MPa · 0.025.

    >>> round(axial_release_force(
    ...     pressure=100e6, mean_diameter=0.1, contact_length=0.1, taper=0.05, friction=0.0))
    78540

    References
    ----------
    Balance of forces on a cone of small angle, by hand.
    """
    demand_not_negative("pressure", pressure)
    demand_positive("mean_diameter", mean_diameter)
    demand_positive("contact_length", contact_length)
    _demand_taper(taper)
    demand_not_negative("friction", friction)
    if not taper * contact_length < 2.0 * mean_diameter:
        raise OutOfRangeError("contact_length", contact_length, "end before the taper's tip")
    return math.pi * mean_diameter * contact_length * pressure * (taper / 2.0 - friction)


def _demand_taper(taper: float) -> None:
    if not 0.0 < taper < 2.0:
        raise OutOfRangeError("taper", taper, "lie between 0 and 2, in diameter per length")
