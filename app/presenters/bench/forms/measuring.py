"""The form that opens a size survey."""

from typing import Literal

from app.presenters.bench.forms.form import (
    Answers,
    Bench,
    Form,
    Made,
    choice,
    entry_head,
    temperature_field,
)
from app.presenters.bench.state import FormTask
from models.assess import ItemView
from models.job import Land, SizeSurvey
from models.rules.progress import NextAct
from models.units import Angle, Length

__all__ = ["sizes_form"]

# Where sizes are taken over a land, and how far from its ends (common practice).
_FROM_END = 5e-3
_SHORT_LAND = 0.05


def sizes_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    """Give the form that opens a size survey of a bore or a seat."""
    land = next(one for one in view.item.lands if one.key == act.land)
    feature: Literal["bore", "seat"] = "seat" if act.feature == "seat" else "bore"
    words = "outside micrometer" if feature == "seat" else "bore gauge"
    offered = bench.instruments(*(("outside",) if feature == "seat" else ("bore", "inside")))
    part = "shaft" if feature == "seat" else view.item.name
    task = FormTask(
        heading=f"Measure the {feature}",
        lines=(
            f"{view.item.name}, land {land.key}, nominal {land.nominal_diameter.written}",
            f"Let {part} and {words} lie side by side until both are equally warm.",
        ),
        fields=(
            choice("instrument", "Instrument", offered, offered[0][0] if offered else ""),
            temperature_field(bench, "part", f"Temperature of the {part}"),
            temperature_field(bench, "gauge", "Temperature of the instrument"),
        ),
        take="Begin the readings",
    )

    def make(answers: Answers) -> Made:
        positions, angles = _size_places(bench, land)
        return Made(
            (
                SizeSurvey(
                    **entry_head(bench),
                    place=bench.place(act),
                    item=view.item.key,
                    land=land.key,
                    feature=feature,
                    instrument=answers.word("instrument"),
                    unit=bench.units.unit("diameter"),
                    positions=positions,
                    angles=angles,
                    typed=(),
                    part_temperature=answers.temperature("part"),
                    gauge_temperature=answers.temperature("gauge"),
                ),
            )
        )

    return Form(task, make)


def _size_places(bench: Bench, land: Land) -> tuple[tuple[Length, ...], tuple[Angle, ...]]:
    """Three axial positions, two on a short land, each in the directions this job measures in."""
    start, end = land.start.si, land.end.si
    away = min(_FROM_END, (end - start) / 4.0)
    places = [start + away, end - away]
    if end - start >= _SHORT_LAND:
        places.insert(1, (start + end) / 2.0)
    unit = bench.units.unit("position")
    decimals = 3 if unit == "in" else 1
    return (
        tuple(Length.from_si(place, unit, decimals) for place in places),
        _size_angles(bench),
    )


def _size_angles(bench: Bench) -> tuple[Angle, ...]:
    """Measure in the directions of the last size survey, else in two at right angles."""
    earlier = [one for one in bench.job.entries if isinstance(one, SizeSurvey)]
    if earlier:
        return earlier[-1].angles
    # Two directions are the least that shows an oval (common practice).
    return (Angle.read("0", "°"), Angle.read("90", "°"))
