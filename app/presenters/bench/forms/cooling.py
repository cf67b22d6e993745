"""The form of temperatures while the rotor cools."""

from app.presenters.bench.cautions import cautions_for
from app.presenters.bench.cold import decay_picture, soak_lines
from app.presenters.bench.forms.form import (
    Answers,
    Bench,
    Form,
    Made,
    choice,
    entry_head,
    temperature_field,
)
from app.presenters.bench.forms.watching import station_watched, watch_fields
from app.presenters.bench.state import FormTask
from models.assess import Attempt
from models.job import Cooling, Item, Warmth
from models.rules.progress import NextAct
from models.units import Angle, Length

__all__ = ["cooling_form"]


def cooling_form(bench: Bench, act: NextAct, attempt: Attempt) -> Form:
    """Give the form of temperatures around and along the cooling rotor."""
    places = _warm_places(bench, attempt)
    thermometers = bench.instruments("thermometer")
    limits = bench.job.plan.cooling
    task = FormTask(
        heading="Is it cold?",
        lines=(
            f"Side to side within {limits.side_to_side.written}, no more than "
            f"{limits.above_surroundings.written} above the room.",
            *soak_lines(bench.job.plan, attempt),
        ),
        fields=(
            temperature_field(bench, "room", "Room"),
            *(temperature_field(bench, key, label) for key, label, _, _ in places),
            choice("instrument", "Thermometer", thermometers, thermometers[0][0]),
            *watch_fields(bench, act),
        ),
        take="Take these",
        cautions=cautions_for(act.act),
        ranges=decay_picture(bench.job.plan, attempt),
    )

    def make(answers: Answers) -> Made:
        watched = station_watched(bench, act, answers)
        if watched is not None and not any(answers.texts.get(key) for key, *_ in places):
            # A reading of the station alone; temperatures follow when they are due.
            return Made((watched,))
        taken = []
        for key, _, position, angle in places:
            value = answers.temperature(key)
            if value is not None:
                taken.append(Warmth(position=position, angle=angle, temperature=value))
        more = () if watched is None else (watched,)
        return Made(
            (
                *more,
                Cooling(
                    **entry_head(bench),
                    place=bench.place(act),
                    surroundings=answers.temperature("room"),
                    instrument=answers.word("instrument"),
                    temperatures=tuple(taken),
                ),
            )
        )

    return Form(task, make)


def _warm_places(bench: Bench, attempt: Attempt) -> list[tuple[str, str, Length, Angle]]:
    """Both sides of both journals, and all round the shaft beside the part just mounted."""
    plan = bench.job.plan
    item: Item = attempt.items[0].item
    around = ("0", "90", "180", "270")
    places = [
        (f"part {angle}", f"Beside {item.name}, {angle}°", item.outline.end, Angle.read(angle, "°"))
        for angle in around
    ]
    places += [
        (
            f"{key} {angle}",
            f"Journal {key}, {angle}°",
            plan.station(key).position,
            Angle.read(angle, "°"),
        )
        for key in (plan.first_journal, plan.second_journal)
        for angle in ("0", "180")
    ]
    return places
