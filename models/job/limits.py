"""Limits with where they come from."""

from models.job.base import Frozen
from models.job.origin import Origin
from models.units import Length, Temperature

__all__ = ["LengthLimit", "TemperatureLimit"]


class LengthLimit(Frozen, frozen=True, kw_only=True):
    """A limit on a length, with its origin."""

    value: Length
    origin: Origin


class TemperatureLimit(Frozen, frozen=True, kw_only=True):
    """A limit on a temperature, with its origin."""

    value: Temperature
    origin: Origin
