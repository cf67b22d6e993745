"""The plain forms in which a person tells what happens beside the mounting."""

from __future__ import annotations

import mimetypes
from collections.abc import Callable, Mapping
from dataclasses import dataclass
from datetime import date
from pathlib import Path
from typing import Any

from app.entry.fields import ChoiceField, FormField, TextField
from models.acts import new_id
from models.assess.record_findings import outside_open
from models.job import (
    AnyEntry,
    Attachment,
    Job,
    OutsideOperation,
    Person,
    Place,
    PointEvent,
    Tightening,
    VisualFinding,
)
from models.units import Angle, Length, Pressure, Quantity, Torque

__all__ = ["FORMS", "TellForm", "Told", "common_of", "place_from"]

Answers = Mapping[str, str]
_MOST_BYTES = 64_000_000


@dataclass(frozen=True)
class Told:
    """An entry to record, with the content of a file where it has one."""

    entry: AnyEntry
    content: bytes | None = None


@dataclass(frozen=True, kw_only=True)
class TellForm:
    """One plain form: what it says, asks, and makes of the answers."""

    title: str
    lines: tuple[str, ...]
    fields: Callable[[Job], tuple[FormField, ...]]
    make: Callable[[Job, Mapping[str, Any], Answers], Told]
    take: str


def _words(answers: Answers, name: str) -> str:
    return answers.get(name, "").strip()


def _read(kind: type[Quantity], answers: Answers, name: str) -> Any:  # noqa: ANN401
    text = _words(answers, name)
    return kind.read(text) if text else None


def _steps(job: Job) -> dict[str, str]:
    return {f"{job.plan.step_number(one.key)}": one.key for one in job.plan.steps}


def place_from(job: Job, answers: Answers) -> Place:
    """Say where an entry belongs: at the latest attempt of the step that was typed, or the visit.

    Raises
    ------
    ValueError
        If there is no step of that number.
    """
    typed = _words(answers, "step")
    if not typed:
        return Place(kind="as received")
    key = _steps(job).get(typed)
    if key is None:
        last = len(job.plan.steps)
        raise ValueError(f"There is no step {typed}; the plan has steps 1 to {last}.")
    numbers = [
        one.place.attempt or 1
        for one in job.entries
        if one.place.kind == "attempt" and one.place.step == key
    ]
    return Place(kind="attempt", step=key, attempt=max(numbers, default=1))


def _step_field(*, optional: bool) -> TextField:
    words = "Step, by its number" if not optional else "Step, by its number (empty: the visit)"
    return TextField(name="step", label=words, optional=optional)


# Seen


def _seen_fields(_: Job) -> tuple[FormField, ...]:
    return (
        _step_field(optional=True),
        TextField(name="subject", label="Which part, by its serial or name"),
        TextField(name="seen at", label="Where on it"),
        TextField(name="words", label="What you see"),
        ChoiceField(
            name="weight",
            label="It is",
            answers=("remark", "look again", "does not conform"),
        ),
    )


def _seen(job: Job, common: Mapping[str, Any], answers: Answers) -> Told:
    return Told(
        VisualFinding(
            **common,
            subject=_words(answers, "subject"),
            seen_at=_words(answers, "seen at"),
            words=_words(answers, "words"),
            weight=answers["weight"],  # type: ignore[arg-type]  # one of the field's answers
        )
    )


# Work outside


def _sent_fields(_: Job) -> tuple[FormField, ...]:
    return (
        _step_field(optional=True),
        TextField(name="subject", label="Which part, by its serial or name"),
        TextField(name="what", label="What is to be done"),
        TextField(name="works", label="By whom, where"),
        TextField(name="sent on", label="Sent on, as 2026-10-05"),
        TextField(name="words", label="Remark", optional=True),
    )


def _sent(job: Job, common: Mapping[str, Any], answers: Answers) -> Told:
    return Told(
        OutsideOperation(
            **common,
            what=_words(answers, "what"),
            subject=_words(answers, "subject"),
            works=_words(answers, "works"),
            sent_on=_day(answers, "sent on"),
            words=_words(answers, "words"),
        )
    )


def _back_fields(job: Job) -> tuple[FormField, ...]:
    waiting = tuple(_outside_words(one) for one in outside_open(job.entries))
    return (
        ChoiceField(name="which", label="What is back", answers=waiting),
        TextField(name="back on", label="Back on, as 2026-10-05"),
        TextField(name="certificate", label="Its certificate", optional=True),
        ChoiceField(name="result", label="It is", answers=("accepted", "not accepted", "awaited")),
        TextField(name="words", label="Remark", optional=True),
    )


def _outside_words(one: OutsideOperation) -> str:
    return f"{one.subject}: {one.what}"


def _back(job: Job, common: Mapping[str, Any], answers: Answers) -> Told:
    sent = next(one for one in outside_open(job.entries) if _outside_words(one) == answers["which"])
    return Told(
        OutsideOperation(
            **{**common, "place": sent.place},
            what=sent.what,
            subject=sent.subject,
            works=sent.works,
            sent_on=sent.sent_on,
            back_on=_day(answers, "back on"),
            sent_as=sent.id,
            certificate=_words(answers, "certificate"),
            result=answers["result"],  # type: ignore[arg-type]  # one of the field's answers
            words=_words(answers, "words"),
        )
    )


def _day(answers: Answers, name: str) -> str:
    written = _words(answers, name)
    try:
        return date.fromisoformat(written).isoformat()
    except ValueError:
        raise ValueError(f"“{written}” is no day; write it as 2026-10-05.") from None


# Tightened


def _tight_fields(job: Job) -> tuple[FormField, ...]:
    return (
        _step_field(optional=False),
        ChoiceField(
            name="method",
            label="How",
            answers=("torque", "torque and angle", "hydraulic tension", "elongation", "by hand"),
        ),
        TextField(name="torque", label="Torque with its unit, as 410 lbf·ft", optional=True),
        TextField(name="angle", label="Angle, as 60 °", optional=True),
        TextField(name="pressure", label="Pressure with its unit, as 120 bar", optional=True),
        TextField(name="elongation", label="Elongation, as 0.12 mm", optional=True),
        TextField(name="instrument", label="With which instrument, by its tag", optional=True),
        TextField(name="order", label="In which order", optional=True),
        TextField(name="locked by", label="Locked by", optional=True),
    )


def _tight(job: Job, common: Mapping[str, Any], answers: Answers) -> Told:
    place: Place = common["place"]
    step = job.plan.step(place.step or "")
    tag = _words(answers, "instrument") or None
    if tag is not None and job.instrument(tag) is None:
        known = ", ".join(one.tag for one in job.instruments)
        raise ValueError(f"No instrument is called “{tag}”; this job has {known}.")
    clamped = [one for one in step.items if one.kind == "clamped"] or list(step.items)
    return Told(
        Tightening(
            **common,
            item=clamped[-1].key,
            method=answers["method"],  # type: ignore[arg-type]  # one of the field's answers
            torque=_read(Torque, answers, "torque"),
            angle=_read(Angle, answers, "angle"),
            pressure=_read(Pressure, answers, "pressure"),
            elongation=_read(Length, answers, "elongation"),
            instrument=tag,
            order=_words(answers, "order"),
            locked_by=_words(answers, "locked by"),
        )
    )


# Points


def _point_fields(_: Job) -> tuple[FormField, ...]:
    return (
        _step_field(optional=False),
        ChoiceField(
            name="kind", label="Which point of the step", answers=("hold", "witness", "review")
        ),
        ChoiceField(
            name="event", label="What", answers=("invited", "came", "did not come", "waived")
        ),
        TextField(name="who", label="Who, by name"),
        TextField(name="how", label="By which letter, call or visit", optional=True),
        TextField(name="words", label="Remark", optional=True),
    )


def _point(job: Job, common: Mapping[str, Any], answers: Answers) -> Told:
    place: Place = common["place"]
    step = job.plan.step(place.step or "")
    mine = [one for one in step.points if one.kind == answers["kind"]]
    if not mine:
        raise ValueError(f"{step.title} has no {answers['kind']} point.")
    point = mine[-1]
    return Told(
        PointEvent(
            **common,
            point_kind=point.kind,
            point_role=point.role,
            what=point.what,
            event=answers["event"],  # type: ignore[arg-type]  # one of the field's answers
            who=_words(answers, "who"),
            at=common["done_at"],
            how=_words(answers, "how"),
            words=_words(answers, "words"),
        )
    )


# Attachments


def _file_fields(_: Job) -> tuple[FormField, ...]:
    return (
        _step_field(optional=True),
        TextField(name="path", label="The file, with its folder"),
        TextField(name="about", label="What it belongs to: a serial or a finding", optional=True),
        TextField(name="words", label="What it shows", optional=True),
    )


def _file(job: Job, common: Mapping[str, Any], answers: Answers) -> Told:
    path = Path(_words(answers, "path")).expanduser()
    if not path.is_file():
        raise ValueError(f"There is no file {path}.")
    size = path.stat().st_size
    if size > _MOST_BYTES:
        raise ValueError(f"{path.name} has {size} bytes; {_MOST_BYTES} is the most.")
    entry = Attachment(
        **common,
        name=path.name,
        media_type=mimetypes.guess_type(path.name)[0] or "application/octet-stream",
        size_bytes=0,
        file_digest="0" * 64,
        about=_words(answers, "about"),
        words=_words(answers, "words"),
    )
    return Told(entry, path.read_bytes())


FORMS: Mapping[str, TellForm] = {
    "seen": TellForm(
        title="Something seen",
        lines=("What does not conform gets a number and waits for a decision.",),
        fields=_seen_fields,
        make=_seen,
        take="Keep it",
    ),
    "point": TellForm(
        title="At a point of the plan",
        lines=(
            "Hold: work does not pass without its signature. Witness: the party is told and may "
            "come; absence after the notice agreed lets work go on. Review: of papers only.",
        ),
        fields=_point_fields,
        make=_point,
        take="Record it",
    ),
    "sent": TellForm(
        title="Work sent off",
        lines=("It stays open until it is back with its certificate.",),
        fields=_sent_fields,
        make=_sent,
        take="It is sent",
    ),
    "back": TellForm(
        title="Work is back",
        lines=("What came back is judged by its certificate.",),
        fields=_back_fields,
        make=_back,
        take="It is back",
    ),
    "tight": TellForm(
        title="Tightened",
        lines=("Type every figure with its unit.",),
        fields=_tight_fields,
        make=_tight,
        take="Keep it",
    ),
    "file": TellForm(
        title="Picture or document",
        lines=("The file is copied beside the record and known by its digest from then on.",),
        fields=_file_fields,
        make=_file,
        take="Attach it",
    ),
}


def common_of(job: Job, person: Person, now: str, answers: Answers) -> dict[str, Any]:
    """Give what every entry says."""
    return {
        "id": new_id(),
        "place": place_from(job, answers),
        "by": person.key,
        "done_at": now,
        "entered_at": now,
        "plan": job.plan.revision,
    }
