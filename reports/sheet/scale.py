"""How long a metre is on the sheet, and how much a bend is magnified on it."""

from __future__ import annotations

import math
from dataclasses import dataclass

from models.units import Length
from reports.sheet.pictures import LengthUnit

__all__ = [
    "PAPER_SCALES",
    "Axis",
    "axis_at_scale",
    "axis_fitting",
    "magnification_for",
    "magnification_text",
    "paper_scale_for",
    "scale_bar_for",
    "step_not_above",
]

PAPER_SCALES = (1, 2, 5, 10, 20, 50, 100)
"""The standard reductions, as the number after 1: [-]."""


@dataclass(frozen=True, slots=True, kw_only=True)
class Axis:
    """One scale for everything along the rotor and across it.

    Attributes
    ----------
    origin : float
        Where the drive-end face is, in sheet units [-].
    scale : float
        Sheet units to the metre, the same along the axis and for diameters [1/m].
    reduction : int or None
        The number after 1: where the scale is a standard one on paper.
    """

    origin: float
    scale: float
    reduction: int | None = None

    def x(self, position: float) -> float:
        """Give the place on the sheet of a distance from the drive-end face.

        Parameters
        ----------
        position : float
            Distance from the drive-end face [m].

        Returns
        -------
        float
            Horizontal place in sheet units [-].

        Examples
        --------
        >>> Axis(origin=236.0, scale=600.0).x(0.5)
        536.0
        """
        return self.origin + self.scale * position


def axis_fitting(
    *, length: float, greatest_radius: float, left: float, right: float, height: float
) -> Axis:
    """Choose the largest scale at which a rotor fits a strip, and centre it.

    Parameters
    ----------
    length : float
        Length of the rotor [m].
    greatest_radius : float
        Largest radius that has to fit the height [m].
    left, right : float
        Ends of the strip in sheet units [-].
    height : float
        Height for that radius in sheet units [-].

    Returns
    -------
    Axis
        One scale for lengths and diameters.

    Raises
    ------
    ValueError
        If the rotor or the strip has no extent.

    Examples
    --------
    A rotor of 2 m in 800 units could take 400 to the metre; a radius of 0.5 m in a height of 100
    allows 200, so it is 400 units long and stands in the middle:

    >>> axis_fitting(length=2.0, greatest_radius=0.5, left=100.0, right=900.0, height=100.0)
    Axis(origin=300.0, scale=200.0, reduction=None)
    """
    if length <= 0.0 or greatest_radius <= 0.0 or right <= left or height <= 0.0:
        raise ValueError("rotor and strip must both have a length and a height above zero")
    scale = min((right - left) / length, height / greatest_radius)
    return Axis(origin=(left + right - scale * length) / 2.0, scale=scale)


def paper_scale_for(*, length: float, greatest_radius: float, width: float, height: float) -> int:
    """Choose the standard reduction at which a rotor fits a place on paper.

    Parameters
    ----------
    length : float
        Length of the rotor [m].
    greatest_radius : float
        Largest radius that has to fit the height [m].
    width, height : float
        Room along the axis, and for that radius [mm].

    Returns
    -------
    int
        The number after 1: [-].

    Notes
    -----
    A rotor too long even for 1:100 takes the next full hundred.

    Examples
    --------
    1.6 m in 150 mm needs 1:10.7, the next standard scale is 1:20:

    >>> paper_scale_for(length=1.6, greatest_radius=0.2, width=150.0, height=40.0)
    20
    """
    needed = max(length * 1000.0 / width, greatest_radius * 1000.0 / height)
    for reduction in PAPER_SCALES:
        if reduction >= needed * (1.0 - 1e-9):
            return reduction
    return 100 * math.ceil(needed / 100.0)


def axis_at_scale(*, length: float, reduction: int, left: float, right: float) -> Axis:
    """Centre a rotor on paper at a standard scale.

    Parameters
    ----------
    length : float
        Length of the rotor [m].
    reduction : int
        The number after 1: [-].
    left, right : float
        Ends of the strip [mm].

    Returns
    -------
    Axis
        Sheet units are millimetres.

    Examples
    --------
    1 m at 1:10 is 100 mm, in the middle of 172 mm:

    >>> axis_at_scale(length=1.0, reduction=10, left=0.0, right=172.0)
    Axis(origin=36.0, scale=100.0, reduction=10)
    """
    scale = 1000.0 / reduction
    return Axis(origin=(left + right - scale * length) / 2.0, scale=scale, reduction=reduction)


def step_not_above(*, value: float) -> int:
    """Round down to 1, 2 or 5 times a power of ten.

    Parameters
    ----------
    value : float
        A number of at least 1 [-].

    Returns
    -------
    int
        The largest such step not above it, 1 at least [-].

    Examples
    --------
    >>> [step_not_above(value=value) for value in (1.0, 3.9, 5.0, 4999.0)]
    [1, 2, 5, 2000]
    """
    if value < 1.0:
        return 1
    decade = int(10 ** math.floor(math.log10(value) + 1e-12))
    return max(step * decade for step in (1, 2, 5) if step * decade <= value * (1.0 + 1e-9))


def magnification_for(
    *, greatest: float, half_height: float, scale: float, held: int | None = None
) -> int:
    """Choose how much a centreline is magnified against its own drawing.

    The largest of 1, 2, 5 times a power of ten that keeps `greatest` inside the strip. One that
    is already in use is held as long as it fits, and only ever steps down.

    Parameters
    ----------
    greatest : float
        Largest of the eccentricities shown and of half the limit [m].
    half_height : float
        Room on either side of the zero line in sheet units [-].
    scale : float
        Sheet units to the metre of the drawing itself [1/m].
    held : int or None, optional
        The magnification in use while a survey is read [-].

    Returns
    -------
    int
        The magnification [-].

    Examples
    --------
    15 µm at 600 units to the metre are 0.009 units; 21.5 units of room allow 2 389 times:

    >>> magnification_for(greatest=15e-6, half_height=21.5, scale=600.0)
    2000
    >>> magnification_for(greatest=5e-6, half_height=21.5, scale=600.0, held=2000)
    2000
    """
    if greatest <= 0.0:
        return held or 1
    fitting = step_not_above(value=half_height / (scale * greatest))
    return fitting if held is None else min(held, fitting)


def magnification_text(*, magnification: int) -> str:
    """Write a magnification.

    Parameters
    ----------
    magnification : int
        The number [-].

    Returns
    -------
    str
        With a thin space in the thousands.

    Examples
    --------
    >>> magnification_text(magnification=2000) == "×2\N{THIN SPACE}000"
    True
    """
    return "×" + f"{magnification:,}".replace(",", "\N{THIN SPACE}")


def scale_bar_for(
    *, scale: float, greatest_width: float, length_unit: LengthUnit
) -> tuple[float, str]:
    """Choose a round length for a scale bar and write it in both units.

    Parameters
    ----------
    scale : float
        Sheet units to the metre [1/m].
    greatest_width : float
        Room for the bar in sheet units [-].
    length_unit : LengthUnit
        The job's own unit, in which the length is round.

    Returns
    -------
    length : float
        Length that the bar stands for [m].
    text : str
        The length in both units.

    Examples
    --------
    >>> scale_bar_for(scale=600.0, greatest_width=90.0, length_unit=LengthUnit.INCH)
    (0.127, '5 in = 127 mm')
    >>> scale_bar_for(scale=600.0, greatest_width=90.0, length_unit=LengthUnit.MILLIMETRE)
    (0.1, '100 mm = 3.94 in')
    """
    other = LengthUnit.MILLIMETRE if length_unit is LengthUnit.INCH else LengthUnit.INCH
    unit = Length.read("1", length_unit.value).si
    count = step_not_above(value=greatest_width / scale / unit)
    length = Length.read(str(count), length_unit.value).si
    digits = 4 if other is LengthUnit.MILLIMETRE else 3
    beside = f"{Length.in_unit(length, other.value):.{digits}g} {other.value}"
    return length, f"{count} {length_unit.value} = {beside}"
