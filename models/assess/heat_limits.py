"""How hot a part may be: the plan's figure, else its temper less a margin where that may be."""

from models.assess.materials import material_of
from models.engineering.heat_limits import highest_temperature
from models.job import Item, Plan

__all__ = ["TEMPER_MARGIN", "highest_of"]

TEMPER_MARGIN = 50.0
"""What a part stays below its last temper: datasheets of 42CrMo4 put stress relief there, [K]."""

# Nothing lighter is steel, iron, nickel or titanium: aluminium over-ages long before it is hot.
_LIGHT_METAL = 4000.0


def highest_of(plan: Plan, item: Item) -> tuple[float | None, str | None]:
    """Give the highest temperature allowed in °C and where it comes from; None where none may be.

    None is derived for a part that is coated, hard-faced, brazed or plated, that holds elastomers,
    or that is of a light metal: the plan must give it.
    """
    cap = item.highest_temperature
    if cap is not None:
        return cap.value.si, cap.origin.words
    temper = item.tempered_at
    if temper is None or item.surface != "bare" or item.holds_elastomers:
        return None, None
    material = material_of(plan, item.material)
    if material is None or material.density < _LIGHT_METAL:
        return None, None
    derived = highest_temperature(
        plan_limit=None, tempering_temperature=temper.value.si, tempering_margin=TEMPER_MARGIN
    )
    return derived, f"{TEMPER_MARGIN:.0f} K below the temper; {temper.origin.words}"
