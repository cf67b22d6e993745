"""What a plan asks of the finished rotor at speed and of its magnetism."""

from typing import Literal

from models.job.base import Frozen
from models.job.origin import Origin
from models.units import FieldStrength

__all__ = ["AcceptancePlan", "MachineKind", "MagnetismLimit"]

MachineKind = Literal["compressor", "steam turbine"]


class MagnetismLimit(Frozen, frozen=True, kw_only=True):
    """A limit on residual magnetism, with its origin."""

    value: FieldStrength
    origin: Origin


class AcceptancePlan(Frozen, frozen=True, kw_only=True):
    """The kind of machine, whose vibration and probe-track limits follow from its speed."""

    machine: MachineKind
    origin: Origin
    high_speed_run: bool = False
    magnetism: MagnetismLimit | None = None
