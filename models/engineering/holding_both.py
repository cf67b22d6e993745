"""Torque and thrust together, against what friction holds over all lands of a part."""

import math

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_finite, demand_not_negative

__all__ = ["force_demanded"]


def force_demanded(
    *, torque: float, thrust: float, holding_torque: float, holding_force: float
) -> float:
    r"""Turn torque and thrust into the one force that friction has to hold.

    Friction has one strength and turns against the resultant of both; the torque counts by the
    radius at which friction holds it, :math:`r = T_\mu / F_\mu`:

    .. math:: F_d = \sqrt{F^2 + (T / r)^2}

    Parameters
    ----------
    torque : float
        Torque that the part must carry, :math:`T`, [N·m]
    thrust : float
        Axial force that the part must carry, :math:`F`, [N]
    holding_torque : float
        Torque that friction holds by itself over all lands, :math:`T_\mu`, [N·m]
    holding_force : float
        Axial force that friction holds by itself over all lands, :math:`F_\mu`, [N]

    Returns
    -------
    demanded : float
        Force to compare with the holding force, [N]

    Raises
    ------
    OutOfRangeError
        If one is not finite, or friction holds nothing while a torque is to be carried.

    Notes
    -----
    One land: exact. Lands of different diameter: on the safe side, for they hold no less than this
    together (the sum of their ellipses contains the ellipse of their sums).

    Examples
    --------
    3 N of thrust and 2 N·m at half a metre, 4 N at the circumference:

    >>> force_demanded(torque=2.0, thrust=3.0, holding_torque=5.0, holding_force=10.0)
    5.0

    References
    ----------
    .. [1] R. G. Budynas, J. K. Nisbett, Shigley's Mechanical Engineering Design, 9th ed., section
       7-8, for force and torque alone; vector sum of forces at the surface, by hand.
    """
    demand_finite("torque", torque)
    demand_finite("thrust", thrust)
    demand_not_negative("holding_torque", holding_torque)
    demand_not_negative("holding_force", holding_force)
    if torque == 0.0:
        return abs(thrust)
    if not holding_torque > 0.0 or not holding_force > 0.0:
        raise OutOfRangeError("holding_torque", holding_torque, "be more than 0 to carry a torque")
    return math.hypot(thrust, torque * holding_force / holding_torque)
