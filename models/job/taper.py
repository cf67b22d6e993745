"""A hub pushed up a taper on oil: what the plan says of it."""

from models.job.base import Frozen
from models.job.limits import LengthLimit
from models.job.loads import PressureLimit
from models.job.origin import Origin
from models.units import Duration, Ratio

__all__ = ["DurationLimit", "RatioLimit", "TaperFit"]


class RatioLimit(Frozen, frozen=True, kw_only=True):
    """A limit on a share, with its origin."""

    value: Ratio
    origin: Origin


class DurationLimit(Frozen, frozen=True, kw_only=True):
    """A limit on a time, with its origin."""

    value: Duration
    origin: Origin


class TaperFit(Frozen, frozen=True, kw_only=True):
    """How a hydraulic part sits: its taper and what its draw-up must keep to.

    The taper is the change of diameter per length along the axis: 1 in 24 is 0.0416667. The land's
    nominal diameter is the mean one of the seat.
    """

    taper: Ratio
    least_advance: LengthLimit
    greatest_advance: LengthLimit
    greatest_dilation: PressureLimit | None = None
    least_contact: RatioLimit | None = None
    least_hold: DurationLimit | None = None
