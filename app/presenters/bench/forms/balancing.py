"""The form of a balance run, with what was corrected before it and what the journals weigh."""

from collections.abc import Iterator
from typing import Literal

from app.presenters.bench.cautions import cautions_for
from app.presenters.bench.forms.form import Answers, Bench, Form, Made, choice, entry_head
from app.presenters.bench.state import Field, FormTask
from models.assess import Attempt, BalanceView
from models.job import (
    AnyEntry,
    BalanceCorrection,
    BalancePlan,
    BalanceRun,
    CorrectionPlane,
    JournalsWeighed,
    PlaneReading,
)
from models.rules.progress import Act, NextAct
from models.units import Angle, Mass, Speed, Unbalance, UnreadableNumberError

__all__ = ["balance_form"]

_HOW = (("none", "Nothing"), ("ground", "Ground"), ("drilled", "Drilled"),
        ("weight added", "Weight added"))  # fmt: skip


def balance_form(bench: Bench, act: NextAct, attempt: Attempt) -> Form | None:
    """Give the form of a balance run; None where the plan asks for no balance."""
    asked, view = bench.job.plan.balance, attempt.balance
    if asked is None or view is None:
        return None
    planes = (asked.first_plane, asked.second_plane)
    instruments = bench.instruments("balancing machine")
    scales_due = view.weighed is None
    fields = [
        choice("instrument", "Machine", instruments, instruments[0][0] if instruments else ""),
        Field("speed", "Speed", unit="r/min", use="speed"),
    ]
    if scales_due:
        unit = bench.units.unit("mass")
        fields += [
            Field("first", "First journal weighs", unit=unit, use="mass", needed=False),
            Field("second", "Second journal weighs", unit=unit, use="mass", needed=False),
        ]
    for plane in planes:
        fields += _plane_fields(bench, plane, corrects=bool(view.runs))
    task = FormTask(
        heading="Balance",
        lines=tuple(_lines(bench, asked, view)),
        fields=tuple(fields),
        take="Take this run",
        cautions=cautions_for(Act.BALANCE),
    )

    def make(answers: Answers) -> Made:
        entries: list[AnyEntry] = []
        if scales_due and answers.texts.get("first", "").strip():
            entries.append(
                JournalsWeighed(
                    **entry_head(bench),
                    place=bench.place(act),
                    first=Mass.read(answers.word("first"), bench.units.unit("mass")),
                    second=_needed_mass(bench, answers),
                    instrument=answers.word("instrument"),
                )
            )
        for plane in planes:
            made = _correction(bench, act, answers, plane, attempt)
            if made is not None:
                entries.append(made)
        entries.append(
            BalanceRun(
                **entry_head(bench),
                place=bench.place(act),
                purpose="after correction" if view.runs else "as found",
                speed=Speed.read(answers.word("speed"), "r/min"),
                instrument=answers.word("instrument"),
                readings=tuple(
                    PlaneReading(
                        plane=plane.key,
                        amount=_amount(bench, answers.word(f"amount {plane.key}")),
                        angle=Angle.read(answers.word(f"angle {plane.key}"), "°"),
                    )
                    for plane in planes
                ),
            )
        )
        return Made(tuple(entries))

    return Form(task, make)


def _lines(bench: Bench, asked: BalancePlan, view: BalanceView) -> Iterator[str]:
    units = bench.units
    limit = "4 W/N" if asked.limit == "4 W/N" else f"grade G {asked.grade or 0.0:g}"
    for one in view.planes:
        may = "not worked out yet"
        if one.permissible is not None:
            may = units.both(one.permissible, "unbalance")
        left = ""
        if one.residual is not None:
            left = f"; {units.show(abs(one.residual), 'unbalance')} left by the last run"
            if one.mass_at_radius is not None:
                left += f", {units.show(one.mass_at_radius, 'mass')} at its radius"
        yield f"{one.plane.name}: {may} may remain ({limit}, {asked.origin.words}){left}."
    if view.weighed is None:
        yield "Journal loads are calculated so far; weighed ones close a balance."
    yield "Correct on the part just added; elsewhere only as an inspector allows."


def _plane_fields(bench: Bench, plane: CorrectionPlane, *, corrects: bool) -> list[Field]:
    unit = bench.units.unit("unbalance")
    fields = []
    if corrects:
        fields += [
            choice(f"how {plane.key}", f"Corrected in {plane.name}", _HOW, "none"),
            Field(f"made {plane.key}", "How much", unit=unit, use="unbalance", needed=False),
            Field(f"at {plane.key}", "At clock angle", unit="°", use="angle", needed=False),
        ]
    return [
        *fields,
        Field(f"amount {plane.key}", f"{plane.name} reads", unit=unit, use="unbalance"),
        Field(f"angle {plane.key}", f"{plane.name}, heavy side at", unit="°", use="angle"),
    ]


def _amount(bench: Bench, text: str) -> Unbalance:
    return Unbalance.read(text, bench.units.unit("unbalance"))


def _needed_mass(bench: Bench, answers: Answers) -> Mass:
    text = answers.texts.get("second", "").strip()
    if not text:
        raise UnreadableNumberError("", "both journals are weighed, or neither")
    return Mass.read(text, bench.units.unit("mass"))


def _correction(
    bench: Bench, act: NextAct, answers: Answers, plane: CorrectionPlane, attempt: Attempt
) -> BalanceCorrection | None:
    how = answers.texts.get(f"how {plane.key}", "none")
    if how in ("", "none"):
        return None
    made = answers.texts.get(f"made {plane.key}", "").strip()
    at = answers.texts.get(f"at {plane.key}", "").strip()
    if not made or not at:
        raise UnreadableNumberError("", f"say how much was corrected in {plane.name}, and where")
    return BalanceCorrection(
        **entry_head(bench),
        place=bench.place(act),
        plane=plane.key,
        angle=Angle.read(at, "°"),
        amount=_amount(bench, made),
        how=_how(how),
        item=attempt.items[0].item.key,
    )


def _how(word: str) -> Literal["ground", "drilled", "weight added"]:
    if word == "ground":
        return "ground"
    return "drilled" if word == "drilled" else "weight added"
