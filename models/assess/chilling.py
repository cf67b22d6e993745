"""What chilling a bare shaft under a released procedure does to the heat of a part."""

from dataclasses import dataclass

from models.assess.heat import Heat, target_with
from models.assess.materials import expansion_of
from models.engineering.errors import OutOfRangeError
from models.engineering.heat_limits import chilled_diameter
from models.job import Item, Plan

__all__ = ["CAUTIONS", "Chilled", "chilled"]

CAUTIONS = (
    "Frost on the seat keeps the part from going home: dry air, wipe it at the last moment.",
    "Nothing that is on the shaft may lose its fit, and its steel may turn brittle: the procedure "
    "says how cold.",
    "Cooling media drive the oxygen out of a pit or a small room: air it and watch the oxygen.",
)


@dataclass(frozen=True)
class Chilled:
    """A seat at its lowest temperature, or why chilling is not offered."""

    temperature: float
    """[°C]"""
    procedure: str
    shrinks: float | None
    """Diameter that the seat loses from 20 °C [m]."""
    target: float | None
    """Temperature at which the bore then opens, with the margin for its steel [°C]."""
    problem: str


def chilled(plan: Plan, item: Item, heat: Heat) -> Chilled | None:
    """Work chilling out; None where the plan names no procedure."""
    wanted = item.chilling
    if wanted is None:
        return None
    lowest, words = wanted.lowest.si, wanted.procedure.words
    # Only the first part of the stack meets a shaft that carries nothing.
    bare = plan.steps[0].items[0].key == item.key
    expansion = expansion_of(plan, plan.shaft.material)
    if expansion is None:
        return Chilled(lowest, words, None, None, "the shaft's material is not known")
    seats = [fit.seat for fit in heat.fits if fit.seat is not None]
    known = [one.at_reference.greatest for one in seats if one.at_reference is not None]
    if not known:
        return Chilled(lowest, words, None, None, "its seat is not measured yet")
    try:
        cold = chilled_diameter(
            diameter=max(known),
            temperature=lowest,
            expansion=expansion,
            lowest_temperature=lowest,
            bare_shaft=bare,
            procedure_released=bool(wanted.procedure.document.strip()),
        )
    except OutOfRangeError as trouble:
        return Chilled(lowest, words, None, None, str(trouble))
    return Chilled(lowest, words, max(known) - cold, target_with(plan, item, heat.fits, lowest), "")
