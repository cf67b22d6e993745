"""Part and shaft of a fit as materials, at rest and at the temperatures at which they run."""

from dataclasses import dataclass

from models.assess.materials import material_of
from models.engineering.errors import OutOfRangeError
from models.engineering.fits import contact_pressure, fit_at_temperature
from models.engineering.materials import Material, mean_expansion, modulus
from models.job import Item, Land, Plan

__all__ = ["Pair", "pair_of", "pressure_of", "running_pair", "warmth"]

_REFERENCE_TEMPERATURE = 20.0
# How far coefficients published for one steel stray, as an expanded share (k = 2).
_EXPANSION_SHARE = 0.08


@dataclass(frozen=True)
class Pair:
    """Hub and shaft as materials, at one temperature each."""

    hub: Material
    shaft: Material
    hub_modulus: float
    shaft_modulus: float
    shaft_bore: float


def pair_of(plan: Plan, item: Item) -> Pair | None:
    """Find both materials at the reference temperature; None where one is unknown."""
    hub, shaft = material_of(plan, item.material), material_of(plan, plan.shaft.material)
    if hub is None or shaft is None:
        return None
    return Pair(
        hub=hub,
        shaft=shaft,
        hub_modulus=modulus(material=hub, temperature=_REFERENCE_TEMPERATURE),
        shaft_modulus=modulus(material=shaft, temperature=_REFERENCE_TEMPERATURE),
        shaft_bore=plan.shaft.bore.si if plan.shaft.bore else 0.0,
    )


def running_pair(item: Item, pair: Pair) -> Pair:
    """Give the pair at the temperatures the plan says it runs at, where its tables reach them."""
    if item.running is None:
        return pair
    return Pair(
        hub=pair.hub,
        shaft=pair.shaft,
        hub_modulus=_modulus_at(pair.hub, item.running.part.si, pair.hub_modulus),
        shaft_modulus=_modulus_at(pair.shaft, item.running.shaft.si, pair.shaft_modulus),
        shaft_bore=pair.shaft_bore,
    )


def _modulus_at(material: Material, temperature: float, otherwise: float) -> float:
    try:
        return modulus(material=material, temperature=temperature)
    except OutOfRangeError:
        return otherwise


def warmth(item: Item, pair: Pair, land: Land) -> tuple[float, float]:
    """Tell what running temperatures add to the interference, and how unsure that is, in m.

    The doubt is expanded (k = 2): both coefficients stray by the spread of published values; those
    of one material stray together.
    """
    if item.running is None:
        return 0.0, 0.0
    part, shaft = item.running.part.si, item.running.shaft.si
    of_part = mean_expansion(material=pair.hub, temperature=part)
    of_shaft = mean_expansion(material=pair.shaft, temperature=shaft)
    diameter = land.nominal_diameter.si
    added = fit_at_temperature(
        interference=0.0,
        interface_diameter=diameter,
        shaft_temperature=shaft,
        shaft_expansion=of_shaft,
        hub_temperature=part,
        hub_expansion=of_part,
    )
    if pair.hub is pair.shaft:
        return added, _EXPANSION_SHARE * abs(added)
    grown = (
        diameter * of_part * (part - _REFERENCE_TEMPERATURE),
        diameter * of_shaft * (shaft - _REFERENCE_TEMPERATURE),
    )
    return added, _EXPANSION_SHARE * (grown[0] ** 2 + grown[1] ** 2) ** 0.5


def pressure_of(pair: Pair, land: Land, interference: float) -> float:
    """Give the contact pressure of a land under an interference, in Pa."""
    return contact_pressure(
        interference=interference,
        interface_diameter=land.nominal_diameter.si,
        hub_outer_diameter=land.hub_outer_diameter.si,
        shaft_bore_diameter=pair.shaft_bore,
        hub_modulus=pair.hub_modulus,
        shaft_modulus=pair.shaft_modulus,
        hub_poisson=pair.hub.poisson,
        shaft_poisson=pair.shaft.poisson,
    )
