"""The rotor on its journals as its plan draws it: loads, sag, critical speed, torque and shear."""

from collections.abc import Iterator

from reportlab.platypus import Flowable

from models.assess import Assessment
from models.assess.torque import SeatShear
from models.units import unit_set
from reports.parts import Cell, gap, head, note, table, text, words

__all__ = ["on_its_journals"]


def on_its_journals(view: Assessment) -> Iterator[Flowable]:
    """Give what was worked out of the finished rotor, with what it rests on."""
    units = unit_set(view.job.plan.rotor.units)
    yield head("The rotor on its journals", "worked out from the plan; nothing here was weighed")
    for sentence in view.shaft.sentences:
        yield text(words(sentence))
    shears = _worst_of_each_stretch(view)
    if shears:
        limit = view.job.plan.shaft.shear_limit
        rows: list[list[Cell]] = [
            [
                words(f"{one.item.name}, land {one.land.key}"),
                units.show(one.land.nominal_diameter.si, "diameter"),
                units.bare(one.torque, "torque"),
                units.bare(one.shear, "pressure"),
            ]
            for one in shears
        ]
        yield gap(1.5)
        yield table(
            [
                "under",
                "diameter",
                f"torque, {units.unit('torque')}",
                f"shear, {units.unit('pressure')}",
            ],
            rows,
            [74.0, 30.0, 34.0, 34.0],
            align="lrrr",
        )
        named = "the plan gives no limit of shear" if limit is None else limit.origin.words
        yield note(
            words(
                "Worst seat of each stretch, from the free end to the coupling; T = P/ω, shear "
                f"16 T d/(π (d⁴ − b⁴)), Shigley, 9th ed., 3-12, from memory; {named}."
            )
        )
    reasons = [one for one in view.reasons_for_speed if one.speaks]
    if reasons:
        listed = "; ".join(f"{one.statement} ({one.source})" for one in reasons)
        yield gap(1)
        yield text(words(f"For a balance at speed speaks: {listed}."))


def _worst_of_each_stretch(view: Assessment) -> list[SeatShear]:
    """Keep the most sheared seat of every stretch over which the shaft carries one torque."""
    worst: dict[float, SeatShear] = {}
    for one in view.shaft.shears:
        stretch = round(one.torque, 3)
        if stretch > 0.0 and (stretch not in worst or one.shear > worst[stretch].shear):
            worst[stretch] = one
    return list(worst.values())
