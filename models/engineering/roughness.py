"""Roughness of a surface, told as one mean or as another."""

from models.engineering.ranges import demand_not_negative

__all__ = ["PEAKS_PER_AVERAGE", "peak_to_valley"]

PEAKS_PER_AVERAGE = 6.0
"""Mean peak-to-valley height Rz over mean deviation Ra: DIN 7190, from memory, [-]."""


def peak_to_valley(*, average_roughness: float) -> float:
    r"""Estimate the mean peak-to-valley height from the mean deviation.

    .. math:: R_z \approx 6\,R_a

    Parameters
    ----------
    average_roughness : float
        Mean deviation from the mean line, :math:`R_a`, [m]

    Returns
    -------
    peak_to_valley : float
        Mean peak-to-valley height, :math:`R_z`, [m]

    Raises
    ------
    OutOfRangeError
        If it is negative.

    Notes
    -----
    Surfaces differ: ground ones lie between 4 and 8 (common practice). A measured Rz goes before
    it.

    Examples
    --------
    >>> round(peak_to_valley(average_roughness=0.8e-6) * 1e6, 3)
    4.8

    References
    ----------
    .. [1] DIN 7190, Interference fits, from memory.
    """
    demand_not_negative("average_roughness", average_roughness)
    return PEAKS_PER_AVERAGE * average_roughness
