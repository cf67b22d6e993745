"""What a plan says of loads, running temperatures and surfaces, beyond sizes and limits."""

from typing import Literal

from models.job.base import Frozen
from models.job.origin import Origin
from models.units import Force, Pressure, Temperature

__all__ = [
    "BalanceReason",
    "ForceCarried",
    "PressureLimit",
    "RoughnessKind",
    "RunningWarmth",
]

RoughnessKind = Literal["Rz", "Ra"]
BalanceReason = Literal["sensitive", "spare", "will not run in its casing first"]


class PressureLimit(Frozen, frozen=True, kw_only=True):
    """A limit on a pressure or a stress, with its origin."""

    value: Pressure
    origin: Origin


class ForceCarried(Frozen, frozen=True, kw_only=True):
    """An axial force that no shoulder and no nut takes, so that friction must hold it."""

    value: Force
    origin: Origin


class RunningWarmth(Frozen, frozen=True, kw_only=True):
    """Temperatures of a part and of the shaft under it while the machine runs."""

    # The area-weighted mean of the part: its bore follows that, not the bore's own temperature.
    part: Temperature
    shaft: Temperature
    origin: Origin
