"""How a hub was drawn up its taper, attempt beside attempt."""

from collections.abc import Sequence

from models.assess import Attempt, ItemView
from models.job import Job
from models.units import unit_set
from reports.parts import Cell, words
from reports.step_pages.judged import judged_rows

__all__ = ["draw_up_rows"]


def draw_up_rows(
    job: Job, pair: Sequence[Attempt], views: Sequence[ItemView]
) -> list[tuple[str, list[Cell]]]:
    """Give contact, advance, pressures and hold of a draw-up, each with its verdict."""
    both = list(zip(pair, views, strict=True))

    def judged(rule_id: str) -> list[Cell]:
        return [judged_rows(one.of(rule_id, view.item.key)) for one, view in both]

    return [
        ("stand-offs", [_stand_offs(one) for one in views]),
        ("advance", judged("advance-within")),
        ("fit by advance", judged("interference-within")),
        ("contact", judged("taper-contact")),
        ("dilation", judged("dilation-allowed")),
        ("piston", [_piston(one) for one in views]),
        ("hold", judged("piston-held")),
        ("seating loss", [_seating(job, one) for one in views]),
    ]


def _stand_offs(view: ItemView) -> str:
    entry = view.drawn_up.entry if view.drawn_up else None
    if entry is None:
        return "not yet"
    return "<br/>".join(
        words(f"{one.angle.written}: {one.zero.written} dry, {one.drawn_up.written} up")
        for one in entry.advances
    )


def _piston(view: ItemView) -> str:
    entry = view.drawn_up.entry if view.drawn_up else None
    if entry is None or entry.axial_pressure is None:
        return "–"
    torque = f"; nut {entry.nut_torque.written}" if entry.nut_torque else ""
    return words(f"{entry.axial_pressure.written}{torque}")


def _seating(job: Job, view: ItemView) -> str:
    found = view.drawn_up
    if found is None or found.seating_loss is None:
        return "growth of the hub not measured"
    return words(unit_set(job.plan.rotor.units).both(found.seating_loss, "fit"))
