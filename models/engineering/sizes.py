"""Measured diameters: brought to 20 °C, summed up, and set against each other."""

import math
from collections.abc import Sequence
from dataclasses import dataclass

import numpy as np
from numpy.typing import ArrayLike, NDArray

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_positive

__all__ = [
    "REFERENCE_TEMPERATURE",
    "Interference",
    "SizeSummary",
    "diameter_at_reference",
    "interference",
    "summarise_sizes",
]

FloatArray = NDArray[np.float64]

REFERENCE_TEMPERATURE = 20.0
"""Temperature at which a size is stated, in °C (ISO 1)."""


@dataclass(frozen=True)
class SizeSummary:
    """What a size survey says of one seat, bore or land."""

    axial_positions: tuple[float, ...]
    """Where it was measured, rising [m]."""
    position_means: tuple[float, ...]
    """Mean diameter at each axial position, NaN where nothing was read [m]."""
    out_of_roundness: tuple[float, ...]
    """Greatest less least diameter at each position, NaN with fewer than two readings [m]."""
    greatest_out_of_roundness: float
    """Greatest of them, NaN where none is known [m]."""
    taper_slope: float
    """Change of diameter per length, of the least-squares line; NaN from one position [m/m]."""
    taper_end_to_end: float
    """Mean at the last position less mean at the first, NaN from one position [m]."""
    bulge: float
    """Mean between the ends less mean of the ends, NaN from fewer than three positions [m]."""
    mean: float
    """Mean of the position means [m]."""
    least: float
    """Least diameter read [m]."""
    greatest: float
    """Greatest diameter read [m]."""
    count: int
    """How many diameters were read [-]."""


@dataclass(frozen=True)
class Interference:
    """Seat less bore, on diameter; positive where they interfere."""

    mean: float
    """Mean seat less mean bore [m]."""
    least: float
    """Least seat less greatest bore: the grip that is certain [m]."""
    greatest: float
    """Greatest seat less least bore: what heating must overcome [m]."""
    ratio: float
    """Mean interference over the nominal diameter [-]."""


def diameter_at_reference(
    *,
    diameter: float,
    part_temperature: float,
    part_expansion: float,
    gauge_temperature: float,
    gauge_expansion: float,
) -> float:
    r"""Bring a diameter as read to 20 °C, for the part and for the gauge.

    A warm gauge has grown and reads small; a warm part has grown and reads large:

    .. math::

        D_{20} = D\,\frac{1 + \alpha_g (T_g - 20)}{1 + \alpha_p (T_p - 20)}

    Parameters
    ----------
    diameter : float
        Diameter as read, :math:`D`, [m]
    part_temperature : float
        Temperature of the part, :math:`T_p`, [°C]
    part_expansion : float
        Mean expansion coefficient of the part from 20 °C, :math:`\alpha_p`, [1/K]
    gauge_temperature : float
        Temperature of the instrument, :math:`T_g`, [°C]
    gauge_expansion : float
        Mean expansion coefficient of the instrument, :math:`\alpha_g`, [1/K]

    Returns
    -------
    diameter : float
        Diameter at 20 °C, :math:`D_{20}`, [m]

    Raises
    ------
    OutOfRangeError
        If the diameter is not positive, or a coefficient with its temperature makes a length vanish
        or doubles it.

    Notes
    -----
    The gauge reads true at 20 °C. One set against a master at the part's own place and temperature
    is given the master's temperature and coefficient.

    Examples
    --------
    150 mm read with a gauge at 20 °C on a steel hub at 30 °C: 150 · 11.5e-6 · 10 = 0.01725 mm too
    much:

    >>> round(1e3 * diameter_at_reference(
    ...     diameter=0.150, part_temperature=30.0, part_expansion=11.5e-6,
    ...     gauge_temperature=20.0, gauge_expansion=11.5e-6), 5)
    149.98275

    References
    ----------
    .. [1] ISO 1, reference temperature 20 °C, from memory.
    .. [2] Machinery's Handbook, 31st ed., p. 375, length and change of temperature.
    """
    demand_positive("diameter", diameter)
    gauge_growth = _growth("gauge", gauge_temperature, gauge_expansion)
    part_growth = _growth("part", part_temperature, part_expansion)
    return diameter * (1.0 + gauge_growth) / (1.0 + part_growth)


def summarise_sizes(*, diameters: ArrayLike, axial_positions: Sequence[float]) -> SizeSummary:
    r"""Sum up the diameters of a seat, a bore or a land read at m positions by n angles.

    With :math:`\bar d_i` the mean at position :math:`z_i`:

    .. math::

        \text{out-of-roundness}_i = \max_j d_{ij} - \min_j d_{ij} \qquad
        \text{slope} = \frac{\sum_i (z_i - \bar z)(\bar d_i - \bar d)}{\sum_i (z_i - \bar z)^2}

    Parameters
    ----------
    diameters : array_like
        Diameters at 20 °C, one row for each position, NaN where none was read, [m]
    axial_positions : sequence of float
        Position of each row, :math:`z_i`, in any order, [m]

    Returns
    -------
    summary : SizeSummary
        Means, form and extremes, in rising order of position, [m]

    Raises
    ------
    OutOfRangeError
        If the shapes do not agree, a position comes twice, no diameter was read, or one read is not
        positive and finite.

    Notes
    -----
    A two-point instrument is blind to shapes of three and five lobes; its out-of-roundness is about
    twice the deviation from a circle for an oval. The mean weighs every position alike, however
    many readings it has.

    Examples
    --------
    Two positions 100 mm apart, two angles each, out of round by 4 µm and 2 µm, means 10 µm apart:

    >>> summary = summarise_sizes(
    ...     diameters=[[0.150000, 0.150004], [0.150011, 0.150013]], axial_positions=[0.0, 0.1])
    >>> round(summary.taper_end_to_end * 1e6, 3), round(summary.greatest_out_of_roundness * 1e6, 3)
    (10.0, 4.0)
    >>> round(summary.taper_slope * 1e6, 3)
    100.0

    References
    ----------
    Definitions; common practice.
    """
    read, places = _ordered(diameters, axial_positions)
    means = tuple(_mean(row[~np.isnan(row)]) for row in read)
    spans = tuple(
        float(np.nanmax(row) - np.nanmin(row)) if np.count_nonzero(~np.isnan(row)) > 1 else math.nan
        for row in read
    )
    known = ~np.isnan(means)
    along, over = places[known], np.asarray(means)[known]
    return SizeSummary(
        axial_positions=tuple(float(place) for place in places),
        position_means=means,
        out_of_roundness=spans,
        greatest_out_of_roundness=max((s for s in spans if not math.isnan(s)), default=math.nan),
        taper_slope=_slope(along, over),
        taper_end_to_end=float(over[-1] - over[0]) if over.size > 1 else math.nan,
        bulge=float(over[1:-1].mean() - (over[0] + over[-1]) / 2) if over.size > 2 else math.nan,
        mean=float(over.mean()),
        least=float(np.nanmin(read)),
        greatest=float(np.nanmax(read)),
        count=int(np.count_nonzero(~np.isnan(read))),
    )


def interference(*, seat: SizeSummary, bore: SizeSummary, nominal_diameter: float) -> Interference:
    r"""Interference of a seat and a bore on diameter: mean, least, greatest, and ratio.

    .. math::

        \Delta = \bar d_s - \bar d_b \qquad
        \Delta_{min} = \min d_s - \max d_b \qquad
        \Delta_{max} = \max d_s - \min d_b

    Parameters
    ----------
    seat : SizeSummary
        Diameters of the seat at 20 °C, [m]
    bore : SizeSummary
        Diameters of the bore at 20 °C, [m]
    nominal_diameter : float
        Diameter that the ratio refers to, [m]

    Returns
    -------
    interference : Interference
        Positive where seat and bore interfere, negative where there is clearance, [m]

    Raises
    ------
    OutOfRangeError
        If the nominal diameter is not positive.

    Notes
    -----
    Least and greatest take the extremes of both parts as if they met, wherever they were read.

    Examples
    --------
    A seat of 150.225 mm in a bore of 150.000 mm, both perfect: 1.5 in a thousand.

    >>> seat = summarise_sizes(diameters=[[0.150225]], axial_positions=[0.0])
    >>> bore = summarise_sizes(diameters=[[0.150000]], axial_positions=[0.0])
    >>> round(interference(seat=seat, bore=bore, nominal_diameter=0.150).ratio, 9)
    0.0015

    References
    ----------
    Definitions; common practice.
    """
    demand_positive("nominal_diameter", nominal_diameter)
    mean = seat.mean - bore.mean
    return Interference(
        mean=mean,
        least=seat.least - bore.greatest,
        greatest=seat.greatest - bore.least,
        ratio=mean / nominal_diameter,
    )


def _growth(whose: str, temperature: float, expansion: float) -> float:
    growth = expansion * (temperature - REFERENCE_TEMPERATURE)
    if not abs(growth) < 0.5:
        raise OutOfRangeError(
            f"{whose}_expansion",
            expansion,
            f"be in 1/K and fit {whose}_temperature {temperature!r}",
        )
    return growth


def _ordered(
    diameters: ArrayLike, axial_positions: Sequence[float]
) -> tuple[FloatArray, FloatArray]:
    read = np.asarray(diameters, dtype=np.float64)
    places = np.asarray(axial_positions, dtype=np.float64)
    if read.ndim != 2 or places.shape != (read.shape[0],):
        raise OutOfRangeError("diameters", read.shape, "have one row for each axial position")
    if np.unique(places).size < places.size or not np.isfinite(places).all():
        raise OutOfRangeError("axial_positions", axial_positions, "be finite and all different")
    taken = read[~np.isnan(read)]
    if not taken.size or not (np.isfinite(taken).all() and (taken > 0.0).all()):
        raise OutOfRangeError("diameters", diameters, "hold a reading, and only positive ones")
    order = np.argsort(places)
    return read[order], places[order]


def _mean(taken: FloatArray) -> float:
    return float(taken.mean()) if taken.size else math.nan


def _slope(
    along: FloatArray,
    over: FloatArray,
) -> float:
    if along.size < 2:
        return math.nan
    lever = along - along.mean()
    return float(lever @ (over - over.mean()) / (lever @ lever))
