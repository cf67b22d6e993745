"""A fit by its name, as a drawing writes it: H7/s6 of ISO 286, FN2 of ANSI B4.1."""

from dataclasses import dataclass

from models.engineering.errors import OutOfRangeError
from models.engineering.limits_and_fits import FORCE_CLASSES, fit_limits, force_fit_limits

__all__ = ["NamedFit", "named_fit"]


@dataclass(frozen=True)
class NamedFit:
    """The interference that a name stands for, and where it was found."""

    name: str
    """The name as the standard writes it."""
    least: float
    """Least interference on diameter, negative for clearance [m]."""
    greatest: float
    """Greatest interference on diameter [m]."""
    standard: str
    """The standard that the name belongs to."""
    source: str
    """Where the table's values were found."""

    @property
    def in_inches(self) -> bool:
        """Whether the standard's own table is in inches."""
        return self.name in FORCE_CLASSES


def named_fit(*, nominal_diameter: float, name: str) -> NamedFit:
    r"""Find the interference that a fit's name stands for.

    As for `fit_limits` and `force_fit_limits`:

    .. math::
        \Delta_{min} = d_{shaft,min} - d_{hole,max} \qquad
        \Delta_{max} = d_{shaft,max} - d_{hole,min}

    Parameters
    ----------
    nominal_diameter : float
        Nominal diameter of the joint, [m]
    name : str
        ``H7/s6`` and its like, or ``FN1`` to ``FN5``, [-]

    Returns
    -------
    fit : NamedFit
        Least and greatest interference, [m]

    Raises
    ------
    OutOfRangeError
        If the name is neither, or the tables have none of it at this diameter.

    Examples
    --------
    >>> fit = named_fit(nominal_diameter=0.150, name="H7/s6")
    >>> round(fit.least * 1e6), round(fit.greatest * 1e6), fit.standard
    (60, 125, 'ISO 286-2')

    References
    ----------
    .. [1] As for `fit_limits` and `force_fit_limits`.
    """
    asked = name.strip().replace(" ", "")
    if asked.upper() in FORCE_CLASSES:
        force = force_fit_limits(nominal_diameter=nominal_diameter, force_class=asked)
        return NamedFit(
            asked.upper(), force.least, force.greatest, "ANSI B4.1-1967", force.shaft.source
        )
    hole, slash, shaft = asked.partition("/")
    if not slash:
        raise OutOfRangeError(
            "name", name, "be a fit such as H7/s6, or one of " + ", ".join(FORCE_CLASSES)
        )
    fit = fit_limits(nominal_diameter=nominal_diameter, hole=hole, shaft=shaft)
    sources = dict.fromkeys((fit.hole.source, fit.shaft.source))
    return NamedFit(asked, fit.least, fit.greatest, "ISO 286-2", "; ".join(sources))
