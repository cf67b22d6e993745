"""A material of the shop's own, with the source of its numbers; a plan carries the ones it uses."""

from models.job.base import Frozen
from models.units import (
    Conductivity,
    Density,
    Expansion,
    HeatCapacity,
    Pressure,
    Ratio,
    Temperature,
)

__all__ = ["ExpansionAt", "ModulusAt", "OwnMaterial"]


class ExpansionAt(Frozen, frozen=True, kw_only=True):
    """The mean coefficient of expansion from 20 °C to a temperature."""

    temperature: Temperature
    coefficient: Expansion


class ModulusAt(Frozen, frozen=True, kw_only=True):
    """Young's modulus at a temperature."""

    temperature: Temperature
    modulus: Pressure


class OwnMaterial(Frozen, frozen=True, kw_only=True):
    """A material whose numbers the shop answers for; its name goes before the built-in table's."""

    name: str
    # Certificate, datasheet or own measurement that the numbers were taken from.
    source: str
    density: Density
    poisson: Ratio
    expansions: tuple[ExpansionAt, ...]
    moduli: tuple[ModulusAt, ...]
    conductivity: Conductivity | None = None
    specific_heat: HeatCapacity | None = None
    yield_strength: Pressure | None = None
