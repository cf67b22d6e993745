"""What an indicator, its lever, its supports and a face do to a reading."""

import math

import numpy as np
import numpy.typing as npt

from models.engineering.errors import OutOfRangeError

__all__ = [
    "closure_error",
    "face_free_of_float",
    "face_perpendicularity",
    "indexing_error",
    "lever_corrected",
    "vee_block_factor",
]

FloatArray = npt.NDArray[np.float64]


def closure_error(*, first: float, last: float) -> float:
    r"""By how much a turn did not close: the first mark read again after a full turn.

    .. math:: c = r_{last} - r_{first}

    Parameters
    ----------
    first : float
        Reading at the first mark, [m]
    last : float
        Reading at the same mark after a full turn, [m]

    Returns
    -------
    error : float
        Difference, positive if the reading grew, [m]

    Examples
    --------
    >>> round(closure_error(first=2e-6, last=5e-6) * 1e6, 6)
    3.0

    References
    ----------
    .. [1] US Bureau of Reclamation, FIST 4-1A: the indicator returns to its start, or is set and
       read again.
    """
    return last - first


def lever_corrected(*, reading: float, lever_angle: float) -> float:
    r"""Movement of the surface behind the reading of a lever indicator that stands at an angle.

    .. math:: m = r \cos\gamma

    Parameters
    ----------
    reading : float
        Reading of the indicator, [m]
    lever_angle : float
        Angle between the lever and the surface's tangent plane, [rad]

    Returns
    -------
    movement : float
        Movement of the surface, [m]

    Raises
    ------
    OutOfRangeError
        If the lever stands at a right angle or beyond.

    Notes
    -----
    For a spherical tip; a pear-shaped tip corrects itself within its own range.

    Examples
    --------
    At 60° half of the reading is true:

    >>> from math import pi
    >>> round(lever_corrected(reading=10e-6, lever_angle=pi / 3) * 1e6, 6)
    5.0

    References
    ----------
    .. [1] By hand from the triangle of the lever; no publication.
    """
    if not abs(lever_angle) < math.pi / 2:
        raise OutOfRangeError("lever_angle", lever_angle, "be less than a right angle")
    return reading * math.cos(lever_angle)


def vee_block_factor(*, included_angle: float, lobes: int) -> float:
    r"""How many times a form of so many lobes is shown by an indicator over a V-block.

    .. math:: F = 1 + (-1)^n \frac{\cos n\beta}{\sin(\alpha/2)}, \qquad
        \beta = \tfrac{\pi}{2} - \tfrac{\alpha}{2}

    Parameters
    ----------
    included_angle : float
        Included angle of the V, symmetrical about the indicator's line, :math:`\alpha`, [rad]
    lobes : int
        Number of lobes, :math:`n`, [-]

    Returns
    -------
    factor : float
        1 shows the form in its true size, 0 hides it, below 0 turns it over, [-]

    Raises
    ------
    OutOfRangeError
        If the V is shut or flat, or there is no lobe.

    Notes
    -----
    A journal in its own V shows no offset at all, and its lobes appear as form at every station.

    Examples
    --------
    A V of 90° shows an oval in its true size and three lobes twice:

    >>> from math import pi
    >>> [round(vee_block_factor(included_angle=pi / 2, lobes=lobes), 6) + 0.0 for lobes in (2, 3)]
    [1.0, 2.0]

    References
    ----------
    .. [1] BS 3730-3, departures from roundness by two- and three-point methods, from memory.
    """
    if not 0.0 < included_angle < math.pi:
        raise OutOfRangeError("included_angle", included_angle, "lie between 0 and half a turn")
    if lobes < 1:
        raise OutOfRangeError("lobes", lobes, "be 1 or more")
    half = included_angle / 2.0
    sign = -1.0 if lobes % 2 else 1.0
    return 1.0 + sign * math.cos(lobes * (math.pi / 2.0 - half)) / math.sin(half)


def face_perpendicularity(*, tir: float, diameter: float) -> float:
    r"""Tilt of a face from its first-harmonic total at a diameter.

    .. math:: \psi = T / D

    Parameters
    ----------
    tir : float
        Total of the face's first harmonic, 2·|vector|, [m]
    diameter : float
        Diameter of the circle on which it was read, [m]

    Returns
    -------
    tilt : float
        Angle between the face and the plane of rotation, [rad]

    Raises
    ------
    OutOfRangeError
        If the diameter is not positive.

    Examples
    --------
    10 µm on 200 mm:

    >>> round(face_perpendicularity(tir=10e-6, diameter=0.200) * 1e6, 6)
    50.0

    References
    ----------
    .. [1] By hand: rise over run of a tilted plane; no publication.
    """
    if not diameter > 0.0:
        raise OutOfRangeError("diameter", diameter, "be more than 0")
    return tir / diameter


def face_free_of_float(*, readings_a: npt.ArrayLike, readings_b: npt.ArrayLike) -> FloatArray:
    r"""Face readings with the rotor's movement along its axis taken out.

    Two indicators stand half a turn apart and are read together; the rotor's float moves both
    alike, the tilt of the face moves them oppositely:

    .. math:: r(\theta) = \tfrac12\,[a(\theta) - b(\theta)]

    Parameters
    ----------
    readings_a : array_like
        Readings of the indicator under which the marks were counted, [m]
    readings_b : array_like
        Readings of the other at the same moments, [m]

    Returns
    -------
    readings : numpy.ndarray
        Readings at the marks of the first indicator, for `fit_harmonics`, [m]

    Raises
    ------
    OutOfRangeError
        If the two were not read equally often.

    Notes
    -----
    Keeps the tilt in full; forms of an even number of waves are lost with the float.

    Examples
    --------
    A tilt of ± 10 µm while the rotor floats by 7 µm after the first reading:

    >>> free = face_free_of_float(readings_a=[10e-6, -3e-6], readings_b=[-10e-6, 17e-6])
    >>> [round(float(value) * 1e6, 6) for value in free]
    [10.0, -10.0]

    References
    ----------
    .. [1] By hand: half the difference of two readings; no publication.
    """
    first = np.asarray(readings_a, dtype=np.float64)
    second = np.asarray(readings_b, dtype=np.float64)
    if first.shape != second.shape:
        raise OutOfRangeError("readings_b", second.size, "be as many as readings_a")
    return (first - second) / 2.0


def indexing_error(*, tir: float, slip: float) -> float:
    r"""Change, as a total, that a slip of the marks fakes on a rotor that did not change.

    .. math:: T_{false} = 2\,T\,|\sin(\varepsilon/2)|

    Parameters
    ----------
    tir : float
        Total of the station's offset, 2·|vector|, [m]
    slip : float
        Angle by which the marks stand wrong, :math:`\varepsilon`, [rad]

    Returns
    -------
    change : float
        Change as a total that is none, [m]

    Raises
    ------
    OutOfRangeError
        If the total is negative.

    Examples
    --------
    One skipped mark of six fakes as much as the total itself, for 60° make an even triangle:

    >>> from math import pi
    >>> round(indexing_error(tir=40e-6, slip=pi / 3) * 1e6, 6)
    40.0

    References
    ----------
    .. [1] By hand: chord of a turned vector; no publication.
    """
    if tir < 0.0:
        raise OutOfRangeError("tir", tir, "be 0 or more")
    return 2.0 * tir * abs(math.sin(slip / 2.0))
