"""A rotor described in its own journal axis, however it was set up."""

import numpy as np
import numpy.typing as npt

from models.engineering.errors import OutOfRangeError

__all__ = ["datum_uncertainty", "journal_datum", "line_through_journals"]

FloatArray = npt.NDArray[np.float64]
ComplexArray = npt.NDArray[np.complex128]


def line_through_journals(
    *,
    first_position: float,
    first_vector: complex,
    second_position: float,
    second_vector: complex,
    positions: npt.ArrayLike,
) -> ComplexArray:
    r"""Offset that the line through the two journals has at each position.

    .. math:: \ell(z) = v_A + (v_B - v_A)\,\frac{z - z_A}{z_B - z_A}

    Parameters
    ----------
    first_position : float
        Axial position of one journal, [m]
    first_vector : complex
        Offset read there, [m]
    second_position : float
        Axial position of the other journal, [m]
    second_vector : complex
        Offset read there, [m]
    positions : array_like
        Axial positions wanted, also beyond the journals, [m]

    Returns
    -------
    line : numpy.ndarray
        Complex offsets of the line, [m]

    Raises
    ------
    OutOfRangeError
        If both journals are at one position.

    Examples
    --------
    Half-way between 2 µm and 4 µm, and as far again beyond the second journal:

    >>> line = line_through_journals(
    ...     first_position=0.0, first_vector=2e-6, second_position=1.0, second_vector=4e-6,
    ...     positions=[0.5, 2.0])
    >>> [round(float(value.real) * 1e6, 6) for value in line]
    [3.0, 6.0]

    References
    ----------
    .. [1] By hand: a straight line through two points; no publication.
    """
    if not first_position != second_position:
        raise OutOfRangeError("second_position", second_position, "differ from first_position")
    share = _share(np.asarray(positions, dtype=np.float64), first_position, second_position)
    return np.asarray(first_vector + (second_vector - first_vector) * share, dtype=np.complex128)


def journal_datum(
    *,
    positions: npt.ArrayLike,
    vectors: npt.ArrayLike,
    first_journal: int,
    second_journal: int,
) -> ComplexArray:
    r"""Offsets of all stations measured from the rotor's own journal axis.

    .. math:: c_k = v_k - \ell(z_k)

    Parameters
    ----------
    positions : array_like
        Axial positions of the stations, [m]
    vectors : array_like
        Complex offsets as read there, NaN where not read, [m]
    first_journal : int
        Which station is one journal, counted from 0, [-]
    second_journal : int
        Which station is the other, counted from 0, [-]

    Returns
    -------
    corrected : numpy.ndarray
        Complex offsets from the journal axis; 0 at both journals, [m]

    Raises
    ------
    OutOfRangeError
        If a journal is no station, or both are at one position.

    Notes
    -----
    A journal that was not read leaves every station NaN: without a datum nothing is known.

    Examples
    --------
    A straight shaft lying 5 µm off centre has no offset from its own axis:

    >>> corrected = journal_datum(
    ...     positions=[0.0, 0.5, 1.0], vectors=[5e-6, 5e-6, 5e-6],
    ...     first_journal=0, second_journal=2)
    >>> float(abs(corrected).max())
    0.0

    References
    ----------
    .. [1] By hand: a line through two points, taken away; no publication.
    """
    offsets = np.asarray(vectors, dtype=np.complex128)
    places = _checked_positions(positions, offsets.size)
    _check_journals(places, first_journal, second_journal)
    line = line_through_journals(
        first_position=float(places[first_journal]),
        first_vector=complex(offsets[first_journal]),
        second_position=float(places[second_journal]),
        second_vector=complex(offsets[second_journal]),
        positions=places,
    )
    corrected = offsets - line
    # Rounding would leave the last bit of a journal's own offset as if it were runout.
    if np.isfinite(offsets[[first_journal, second_journal]]).all():
        corrected[[first_journal, second_journal]] = 0.0
    return np.asarray(corrected, dtype=np.complex128)


def datum_uncertainty(
    *,
    positions: npt.ArrayLike,
    uncertainties: npt.ArrayLike,
    first_journal: int,
    second_journal: int,
) -> FloatArray:
    r"""Uncertainty of offsets from the journal axis, the journals' own included.

    .. math:: u^2(c_k) = u_k^2 + (1 - s_k)^2 u_A^2 + s_k^2 u_B^2, \qquad
        s_k = \frac{z_k - z_A}{z_B - z_A}

    Parameters
    ----------
    positions : array_like
        Axial positions of the stations, [m]
    uncertainties : array_like
        Standard uncertainty of either component of each offset as read, [m]
    first_journal : int
        Which station is one journal, counted from 0, [-]
    second_journal : int
        Which station is the other, counted from 0, [-]

    Returns
    -------
    corrected : numpy.ndarray
        Standard uncertainty of either component; 0 at the journals, where the axis is fixed, [m]

    Raises
    ------
    OutOfRangeError
        If a journal is no station, or both are at one position.

    Notes
    -----
    The results share the journals' errors and so are not independent of each other.

    Examples
    --------
    In the middle, three equal uncertainties of 2 µm give 2·√(1 + ¼ + ¼) µm:

    >>> corrected = datum_uncertainty(
    ...     positions=[0.0, 0.5, 1.0], uncertainties=[2e-6, 2e-6, 2e-6],
    ...     first_journal=0, second_journal=2)
    >>> round(float(corrected[1]) * 1e6, 3)
    2.449

    References
    ----------
    .. [1] JCGM 100:2008, Guide to the expression of uncertainty in measurement, from memory.
    """
    spreads = np.asarray(uncertainties, dtype=np.float64)
    places = _checked_positions(positions, spreads.size)
    _check_journals(places, first_journal, second_journal)
    share = _share(places, float(places[first_journal]), float(places[second_journal]))
    corrected = np.sqrt(
        spreads**2
        + ((1.0 - share) * spreads[first_journal]) ** 2
        + (share * spreads[second_journal]) ** 2
    )
    corrected[[first_journal, second_journal]] = 0.0
    return np.asarray(corrected, dtype=np.float64)


def _share(positions: FloatArray, first: float, second: float) -> FloatArray:
    return np.asarray((positions - first) / (second - first), dtype=np.float64)


def _checked_positions(positions: npt.ArrayLike, count: int) -> FloatArray:
    places = np.asarray(positions, dtype=np.float64)
    if places.ndim != 1 or places.size != count:
        raise OutOfRangeError("positions", places.shape, "have one entry for each station's value")
    return places


def _check_journals(places: FloatArray, first: int, second: int) -> None:
    for name, index in (("first_journal", first), ("second_journal", second)):
        if not 0 <= index < places.size:
            raise OutOfRangeError(name, index, "be one of the stations")
    if not places[first] != places[second]:
        raise OutOfRangeError("second_journal", second, "lie elsewhere than first_journal")
