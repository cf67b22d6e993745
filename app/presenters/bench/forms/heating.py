"""The forms of a heating: how it begins, and what is measured on the hot part."""

from app.presenters.bench.cautions import cautions_for
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
from models.acts import Reading
from models.assess import ItemView, land_gauge
from models.assess.chilling import CAUTIONS, chilled
from models.job import GaugeTry, Heating, Hot
from models.rules.progress import NextAct
from models.units import Length, UnreadableNumberError
from reports.job_pictures import fit_picture

__all__ = ["heat_form"]


def heat_form(bench: Bench, act: NextAct, view: ItemView) -> Form:
    """Give the form that begins a heating, or the one of what is measured on the hot part."""
    heat = view.heat
    if heat is None or heat.heating is None:
        return _heating_begins(bench, act, view)
    return _heat_measured(bench, act, view, heat.heating)


def _heat_lines(bench: Bench, view: ItemView) -> tuple[str, ...]:
    heat = view.heat
    if heat is None:
        return ()
    units = bench.units
    lines = []
    if heat.target is not None and heat.plain_target is not None:
        lines.append(
            f"The coldest place of the bore must reach {units.both(heat.target, 'temperature')} "
            f"({units.show(heat.plain_target, 'temperature')} without the margin for its steel"
            + (
                "; the sizes leave ± "
                f"{units.show(heat.target_uncertainty, 'temperature_step')} open"
                if heat.target_uncertainty is not None
                else ""
            )
            + ")."
        )
    if heat.highest is not None:
        origin = "" if view.item.highest_temperature is not None else f", {heat.highest_origin}"
        lines.append(f"No place may pass {units.both(heat.highest, 'temperature')}{origin}.")
    if heat.mean_temperature is not None:
        mean = units.both(heat.mean_temperature, "temperature")
        lines.append(f"On average over its area the part is at {mean}; its bore follows that.")
    lines += _chill_lines(bench, view)
    if heat.gauge_sizes:
        sizes = ", ".join(
            f"land {land} {units.show(size, 'diameter')}" for land, size in heat.gauge_sizes
        )
        lines.append(f"Hot-bore gauge: {sizes}.")
    return tuple(lines)


def _chill_lines(bench: Bench, view: ItemView) -> list[str]:
    """Say what chilling the bare shaft would do, with its cautions; nothing without a procedure."""
    found = None if view.heat is None else chilled(bench.job.plan, view.item, view.heat)
    if found is None:
        return []
    units = bench.units
    cold = units.both(found.temperature, "temperature")
    if found.shrinks is None:
        return [f"Chilling to {cold} ({found.procedure}) is not offered: {found.problem}."]
    words = (
        f"Chilled to {cold} under {found.procedure} the seat loses "
        f"{units.both(found.shrinks, 'fit')}"
    )
    if found.target is not None:
        words += f"; the bore then opens at {units.both(found.target, 'temperature')}"
    return [words + ".", *CAUTIONS]


def _heating_begins(bench: Bench, act: NextAct, view: ItemView) -> Form:
    thermometers = bench.instruments("thermometer")
    methods = (
        ("circulating oven", "Oven"),
        ("induction", "Induction"),
        ("oil bath", "Oil bath"),
        ("gas ring", "Gas ring"),
    )
    task = FormTask(
        heading=f"Heat {view.item.name}",
        lines=_heat_lines(bench, view),
        fields=(
            choice("method", "Heated in", methods, "circulating oven"),
            temperature_field(bench, "set_point", "Set point", needed=False),
            temperature_field(bench, "shaft", "Temperature of the shaft at the seat"),
            choice("instrument", "Thermometer", thermometers, thermometers[0][0]),
        ),
        take="Heating begins",
        cautions=cautions_for(act.act),
        ranges=fit_picture(bench.job, [(f"land {fit.land.key}", fit, None) for fit in view.fits]),
    )

    def make(answers: Answers) -> Made:
        return Made(
            (
                Heating(
                    **entry_head(bench),
                    place=bench.place(act),
                    item=view.item.key,
                    method=answers.word("method"),
                    set_point=answers.temperature("set_point"),
                    shaft_temperature=answers.temperature("shaft"),
                    instrument=answers.word("instrument"),
                ),
            )
        )

    return Form(task, make)


def _heat_measured(bench: Bench, act: NextAct, view: ItemView, heating: Heating) -> Form:
    lands = [land.key for land in view.item.lands]
    tried = (("not tried", "Not tried"), ("entered", "Entered"), ("refused", "Did not enter"))
    fields = [
        temperature_field(bench, f"bore {land}", f"Bore at land {land}", needed=False)
        for land in lands
    ]
    fields += [
        temperature_field(bench, "web", "Web", needed=False),
        temperature_field(bench, "rim", "Rim", needed=False),
    ]
    fields += [
        choice(f"gauge {land}", f"Gauge at land {land}", tried, "not tried") for land in lands
    ]
    task = FormTask(
        heading=f"{view.item.name}, hot",
        lines=_heat_lines(bench, view),
        fields=tuple(fields),
        take="Take these",
        cautions=cautions_for(act.act),
    )

    def make(answers: Answers) -> Made:
        at = bench.now()
        readings: list[tuple[str, Reading]] = []
        for land in lands:
            value = answers.temperature(f"bore {land}")
            if value is not None:
                hot = Hot(where="bore", land=land, temperature=value, at=at)
                readings.append((heating.id, hot))
        web, rim = answers.temperature("web"), answers.temperature("rim")
        if web is not None:
            readings.append((heating.id, Hot(where="web", temperature=web, at=at)))
        if rim is not None:
            readings.append((heating.id, Hot(where="rim", temperature=rim, at=at)))
        readings += [
            (heating.id, one) for land in lands if (one := _gauge_try(answers, view, land, at))
        ]
        if not readings:
            raise UnreadableNumberError("", "nothing has been measured yet")
        return Made(readings=tuple(readings))

    def _gauge_try(answers: Answers, item: ItemView, land: str, at: str) -> GaugeTry | None:
        word = answers.word(f"gauge {land}")
        size = land_gauge(item.heat, land) if item.heat is not None else None
        if word == "not tried" or size is None:
            return None
        unit = bench.units.unit("diameter")
        # One step more than the drawing's digits, rounded up: a gauge must never be too small.
        step = 1e-4 * 0.0254 if unit == "in" else 1e-6
        decimals = 4 if unit == "in" else 3
        careful = Length.from_si(size + step / 2.0, unit, decimals)
        return GaugeTry(land=land, size=careful, passed=word == "entered", at=at)

    return Form(task, make)
