"""The interference limits of a land as figures, whether the plan gives figures or a fit's name."""

from functools import lru_cache
from typing import NamedTuple

from models.engineering.named_fits import named_fit
from models.job import Land, LengthLimit, Origin
from models.units import Length

__all__ = ["LandLimits", "limits_of"]


class LandLimits(NamedTuple):
    """Least and greatest interference allowed, each with its origin."""

    least: LengthLimit
    greatest: LengthLimit


@lru_cache(maxsize=4096)
def limits_of(land: Land) -> LandLimits:
    """Give a land's limits; figures of the plan go before a fit's name.

    Raises
    ------
    OutOfRangeError
        If the plan has no figures and the name is none that the tables know. A job file or a
        planning form refuses such a land before.
    """
    least, greatest = land.least_interference, land.greatest_interference
    if least is not None and greatest is not None:
        return LandLimits(least, greatest)
    fit = named_fit(nominal_diameter=land.nominal_diameter.si, name=land.fit_by_name)
    origin = Origin(
        document=f"{fit.standard}, {fit.name} at {land.nominal_diameter.written}", note=fit.source
    )
    unit, decimals = ("in", 4) if fit.in_inches else ("µm", 0)
    by_name = [
        LengthLimit(value=Length.from_si(value, unit, decimals), origin=origin)
        for value in (fit.least, fit.greatest)
    ]
    return LandLimits(least or by_name[0], greatest or by_name[1])
