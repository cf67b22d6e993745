"""Materials by name: the copies that the plan carries first, then the built-in table."""

from functools import lru_cache

from models.engineering.errors import OutOfRangeError
from models.engineering.expansion import MeanExpansion
from models.engineering.materials import MATERIALS, Material, mean_expansion, own_material
from models.job import OwnMaterial, Plan

__all__ = ["expansion_of", "made_of", "material_of", "material_problem", "materials_used"]


def material_of(plan: Plan, name: str | None) -> Material | None:
    """Find a material by its name in a plan; None where neither plan nor table knows it."""
    if not name:
        return None
    own = next((one for one in plan.materials if one.name == name), None)
    if own is None:
        return MATERIALS.get(name)
    try:
        return made_of(own)
    except OutOfRangeError:
        return None


def material_problem(own: OwnMaterial) -> str | None:
    """Say what keeps a shop's own material from being worked with, if anything does."""
    try:
        made_of(own)
    except OutOfRangeError as trouble:
        return str(trouble)
    return None


def expansion_of(plan: Plan, name: str | None) -> MeanExpansion | None:
    """Give the mean coefficient of a plan's material as a function of temperature."""
    found = material_of(plan, name)
    if found is None:
        return None
    return lambda temperature: mean_expansion(material=found, temperature=temperature)


def materials_used(plan: Plan) -> tuple[str, ...]:
    """List the materials that a plan names, the shaft's first, each once."""
    items = [item for step in plan.steps for item in step.items]
    names = [plan.shaft.material, *(item.material for item in items)]
    return tuple(dict.fromkeys(name for name in names if name))


@lru_cache(maxsize=256)
def made_of(own: OwnMaterial) -> Material:
    """Make the material that engineering works with from the numbers as typed.

    Raises
    ------
    OutOfRangeError
        If a number cannot be what it is called.
    """
    return own_material(
        name=own.name,
        source=own.source,
        density=own.density.si,
        poisson=own.poisson.si,
        mean_expansions=[(one.temperature.si, one.coefficient.si) for one in own.expansions],
        moduli=[(one.temperature.si, one.modulus.si) for one in own.moduli],
        conductivity=own.conductivity.si if own.conductivity else None,
        specific_heat=own.specific_heat.si if own.specific_heat else None,
        yield_strength=own.yield_strength.si if own.yield_strength else None,
    )
