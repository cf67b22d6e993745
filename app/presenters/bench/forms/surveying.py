"""The form that opens a runout survey."""

import msgspec

from app.presenters.bench.cautions import cautions_for
from app.presenters.bench.forms.form import Answers, Bench, Form, Made, choice, entry_head
from app.presenters.bench.state import Field, FormTask
from app.presenters.bench.walk import stations_due
from models.job import RunoutSurvey, SetUp, StationReadings, SurveyPurpose
from models.rules.progress import Act, NextAct
from models.units import UnreadableNumberError

__all__ = ["survey_form"]


def survey_form(bench: Bench, act: NextAct) -> Form:
    """Give the form that opens a runout survey in the plan's set-up."""
    method = bench.job.plan.runout
    purpose: SurveyPurpose = _purpose(act)
    usual = _usual_set_up(bench, act)
    indicators = bench.instruments("indicator")
    people = tuple((one.key, one.name) for one in bench.job.people if one.role == "technician")
    at = ", ".join(usual.supported_at)
    task = FormTask(
        heading={"bare shaft": "Bare shaft", "bare seat": "Bare seat", "again": "Read again"}.get(
            purpose, "Runout after the mount"
        ),
        lines=(
            f"{method.attitude.capitalize()}, {method.supports}"
            + (f" at {at}" if at else "")
            + ".",
            f"{len(method.marks)} marks, {method.order}; journals first."
            + (f" Rest {method.rest_time}." if method.rest_time else ""),
        ),
        fields=(
            choice("instrument", "Indicator", indicators, indicators[0][0]),
            choice("read_by", "Read by", people, bench.person),
            choice(
                "set_up",
                "Set-up",
                (("the same", "The same"), ("otherwise", "Otherwise")),
                "the same",
            ),
            Field("supports", "If otherwise, how it lies", needed=False),
        ),
        take="Begin the readings",
        cautions=cautions_for(act.act),
    )

    def make(answers: Answers) -> Made:
        other = answers.word("set_up") == "otherwise"
        supports = answers.word("supports")
        if other and not supports:
            raise UnreadableNumberError("", "say how the rotor lies")
        due = stations_due(bench.job.plan, bench.place(act), purpose)
        instrument = answers.word("instrument")
        head = entry_head(bench)
        head["by"] = answers.word("read_by")
        return Made(
            (
                RunoutSurvey(
                    **head,
                    place=bench.place(act),
                    written_by=bench.person,
                    read_by=answers.word("read_by"),
                    purpose=purpose,
                    set_up=msgspec.structs.replace(
                        usual,
                        supports=supports if other else usual.supports,
                        indicators=(instrument,),
                    ),
                    unit=bench.units.unit("runout"),
                    angles=method.marks,
                    stations=tuple(StationReadings(station=one.key) for one in due),
                    instrument=instrument,
                ),
            )
        )

    return Form(task, make)


def _usual_set_up(bench: Bench, act: NextAct) -> SetUp:
    """Take the set-up of the survey this one is compared with, else the plan's."""
    method = bench.job.plan.runout
    attempt = bench.view.attempt(act.step or "", act.attempt or 0)
    earlier = attempt.baseline if attempt is not None else bench.view.last_accepted_survey
    if earlier is not None:
        return earlier.entry.set_up
    return SetUp(
        attitude=method.attitude,
        supports=method.supports,
        supported_at=method.supported_at,
        end_stop=method.end_stop,
        rest_time=method.rest_time,
        turns_before_reading=method.turns_before_reading,
    )


def _purpose(act: NextAct) -> SurveyPurpose:
    if act.act is Act.SURVEY_BARE_SHAFT:
        return "bare shaft"
    if act.act is Act.SURVEY_SEAT:
        return "bare seat"
    return "again" if act.purpose == "again" else "after"
