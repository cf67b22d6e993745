"""Limits of size that a fit's designation stands for, out of stored tables.

The tables are stored, not the formulas behind them: the standard's own rounding moves values by up
to 2 µm. Each row of ``data/limits.csv`` and ``data/force_fits.csv`` has its source.
"""

import csv
import re
from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass
from importlib import resources

from models.engineering.errors import OutOfRangeError
from models.engineering.ranges import demand_positive

__all__ = [
    "FORCE_CLASSES",
    "FitLimits",
    "LimitDeviations",
    "fit_limits",
    "force_fit_limits",
    "limit_deviations",
    "tolerance_grade",
]

FORCE_CLASSES: Mapping[str, str] = {
    "FN1": "light drive: thin sections, cast iron",
    "FN2": "medium drive: ordinary steel parts, the tightest for good cast iron",
    "FN3": "heavy drive: heavier steel parts",
    "FN4": "force: highly stressed parts",
    "FN5": "force: highly stressed parts, shrink fits",
}
"""Force and shrink fits of ANSI B4.1 with what they are for."""

_INCH = 0.0254
_MIL = 2.54e-5
_MICROMETRE = 1e-6


@dataclass(frozen=True)
class LimitDeviations:
    """The two limits of a size, as deviations from the nominal one."""

    least: float
    """Least size less nominal size [m]."""
    greatest: float
    """Greatest size less nominal size [m]."""
    source: str
    """Where the table's values were found."""


@dataclass(frozen=True)
class FitLimits:
    """The limits of hole and shaft, and of the interference they leave."""

    hole: LimitDeviations
    """Limits of the bore."""
    shaft: LimitDeviations
    """Limits of the seat."""
    least: float
    """Least interference on diameter, negative for clearance [m]."""
    greatest: float
    """Greatest interference on diameter [m]."""


@dataclass(frozen=True)
class _Row:
    over: float
    to: float
    symbol: str
    numbers: tuple[float, ...]
    source: str


def tolerance_grade(*, nominal_diameter: float, grade: int) -> float:
    r"""Look up the width of a standard tolerance of ISO 286.

    Formula: the stored value; the formula behind it, before rounding, is a multiple of
    :math:`i = 0.45 \sqrt[3]{D} + 0.001 D` (µm, mm), 10 i for grade 6, 16 i for grade 7.

    Parameters
    ----------
    nominal_diameter : float
        Nominal diameter, over 18 mm up to and including 500 mm, [m]
    grade : int
        Grade 4 to 8, [-]

    Returns
    -------
    tolerance : float
        Width of the tolerance, [m]

    Raises
    ------
    OutOfRangeError
        If diameter or grade is not in the table.

    Examples
    --------
    >>> round(tolerance_grade(nominal_diameter=0.150, grade=7) * 1e6)
    40

    References
    ----------
    .. [1] ISO 286-1, table 1, by way of the sources in ``data/limits.csv``.
    """
    demand_positive("nominal_diameter", nominal_diameter)
    row = _found(_LIMITS, nominal_diameter, 1e-3, f"IT{grade}", "grade", grade)
    return row.numbers[0] * _MICROMETRE


def limit_deviations(*, nominal_diameter: float, designation: str) -> LimitDeviations:
    r"""Look up the limits that a designation of ISO 286 stands for: ``H7``, ``s6``.

    A hole H starts at its nominal size, a shaft h ends at it, and one of the tighter letters starts
    at its tabulated deviation:

    .. math:: \text{H: } 0 \ldots IT \qquad \text{h: } -IT \ldots 0 \qquad
        \text{m to u: } ei \ldots ei + IT

    Parameters
    ----------
    nominal_diameter : float
        Nominal diameter, over 18 mm up to and including 500 mm, [m]
    designation : str
        Letter and grade: H for holes; h, m, n, p, r, s, t, u for shafts; grades 4 to 8, [-]

    Returns
    -------
    limits : LimitDeviations
        Deviations from the nominal diameter, [m]

    Raises
    ------
    OutOfRangeError
        If diameter or designation is not in the table.

    Notes
    -----
    A diameter on the border of two steps belongs to the lower one: over 100 up to and including 120
    mm holds 120 mm.

    Examples
    --------
    >>> seat = limit_deviations(nominal_diameter=0.150, designation="s6")
    >>> round(seat.least * 1e6), round(seat.greatest * 1e6)
    (100, 125)

    References
    ----------
    .. [1] ISO 286-1 and 286-2, by way of the sources in ``data/limits.csv``.
    """
    demand_positive("nominal_diameter", nominal_diameter)
    parts = re.fullmatch(r"([Hhmnprstu])([4-8])", designation.strip())
    if parts is None:
        raise OutOfRangeError(
            "designation", designation, "be H or one of h m n p r s t u with a grade of 4 to 8"
        )
    letter, grade = parts.groups()
    width = _found(_LIMITS, nominal_diameter, 1e-3, f"IT{grade}", "designation", designation)
    span = width.numbers[0] * _MICROMETRE
    if letter == "H":
        return LimitDeviations(least=0.0, greatest=span, source=width.source)
    if letter == "h":
        return LimitDeviations(least=-span, greatest=0.0, source=width.source)
    place = _found(_LIMITS, nominal_diameter, 1e-3, letter, "designation", designation)
    start = place.numbers[0] * _MICROMETRE
    both = dict.fromkeys((place.source, width.source))
    return LimitDeviations(least=start, greatest=start + span, source="; ".join(both))


def fit_limits(*, nominal_diameter: float, hole: str, shaft: str) -> FitLimits:
    r"""Tell the interference that a fit of ISO 286 leaves between its limits: H7 and s6.

    .. math::

        \Delta_{min} = d_{shaft,min} - d_{hole,max} \qquad
        \Delta_{max} = d_{shaft,max} - d_{hole,min}

    Parameters
    ----------
    nominal_diameter : float
        Nominal diameter, over 18 mm up to and including 500 mm, [m]
    hole : str
        Designation of the bore, as for `limit_deviations`, [-]
    shaft : str
        Designation of the seat, [-]

    Returns
    -------
    limits : FitLimits
        Limits of both parts and of the interference, [m]

    Raises
    ------
    OutOfRangeError
        If a designation is not of its kind or not in the table.

    Examples
    --------
    >>> fit = fit_limits(nominal_diameter=0.150, hole="H7", shaft="s6")
    >>> round(fit.least * 1e6), round(fit.greatest * 1e6)
    (60, 125)

    References
    ----------
    .. [1] As for `limit_deviations`.
    """
    if not hole.strip().startswith("H"):
        raise OutOfRangeError("hole", hole, "begin with H")
    if shaft.strip().startswith("H"):
        raise OutOfRangeError("shaft", shaft, "begin with a small letter")
    bore = limit_deviations(nominal_diameter=nominal_diameter, designation=hole)
    seat = limit_deviations(nominal_diameter=nominal_diameter, designation=shaft)
    return FitLimits(
        hole=bore,
        shaft=seat,
        least=seat.least - bore.greatest,
        greatest=seat.greatest - bore.least,
    )


def force_fit_limits(*, nominal_diameter: float, force_class: str) -> FitLimits:
    r"""Look up a force or shrink fit of ANSI B4.1: FN1 to FN5.

    The table gives the interference and the hole; the shaft follows:

    .. math::

        d_{shaft,min} = d_{hole,max} + \Delta_{min} \qquad
        d_{shaft,max} = d_{hole,min} + \Delta_{max}

    Parameters
    ----------
    nominal_diameter : float
        Nominal diameter, over 1.19 in up to and including 11.03 in, [m]
    force_class : str
        One of `FORCE_CLASSES`, [-]

    Returns
    -------
    limits : FitLimits
        Limits of both parts and of the interference, [m]

    Raises
    ------
    OutOfRangeError
        If diameter or class is not in the table.

    Examples
    --------
    A medium drive fit of 3.5 in, in thousandths of an inch:

    >>> fit = force_fit_limits(nominal_diameter=3.5 * 0.0254, force_class="FN2")
    >>> round(fit.least / 2.54e-5, 1), round(fit.greatest / 2.54e-5, 1)
    (1.4, 3.7)

    References
    ----------
    .. [1] ANSI B4.1-1967, table of force and shrink fits, by way of the sources in
       ``data/force_fits.csv``.
    """
    demand_positive("nominal_diameter", nominal_diameter)
    wanted = force_class.strip().upper()
    row = _found(_FORCE_FITS, nominal_diameter, _INCH, wanted, "force_class", force_class)
    least, greatest, hole = (number * _MIL for number in row.numbers)
    return FitLimits(
        hole=LimitDeviations(least=0.0, greatest=hole, source=row.source),
        shaft=LimitDeviations(least=least + hole, greatest=greatest, source=row.source),
        least=least,
        greatest=greatest,
    )


def _found(
    rows: Sequence[_Row], diameter: float, unit: float, symbol: str, name: str, asked: object
) -> _Row:
    # Rounded, because 0.12 m over 0.001 m need not come out as 120 exactly.
    size = round(diameter / unit, 6)
    step = [row for row in rows if row.over < size <= row.to]
    if not step:
        spans = f"lie over {rows[0].over * unit:g} m and up to {rows[-1].to * unit:g} m"
        raise OutOfRangeError("nominal_diameter", diameter, spans)
    for row in step:
        if row.symbol == symbol:
            return row
    listed = ", ".join(row.symbol for row in step)
    raise OutOfRangeError(name, asked, f"be tabulated for this diameter: {listed}")


def _loaded(file: str, made: Callable[[Mapping[str, str]], _Row]) -> tuple[_Row, ...]:
    table = resources.files("models.engineering").joinpath("data", file)
    lines = table.read_text(encoding="utf-8").splitlines()
    return tuple(made(row) for row in csv.DictReader(lines))


_LIMITS = _loaded(
    "limits.csv",
    lambda row: _Row(
        float(row["over_mm"]),
        float(row["to_mm"]),
        row["symbol"],
        (float(row["value_um"]),),
        row["source"],
    ),
)

_FORCE_FITS = _loaded(
    "force_fits.csv",
    lambda row: _Row(
        float(row["over_in"]),
        float(row["to_in"]),
        row["class"],
        tuple(float(row[name]) for name in ("least_mil", "greatest_mil", "hole_greatest_mil")),
        row["source"],
    ),
)
