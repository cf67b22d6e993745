"""From the bench's state to what each widget of the frame is told."""

from __future__ import annotations

from collections.abc import Sequence

from app.entry.cell_state import Asked
from app.entry.cell_unit import CellUnit
from app.entry.fields import ChoiceField, FormField, NumberField, TextField
from app.entry.ladder import Rung
from app.entry.question_line import Question
from app.frame.foot import FootKey, TitleLine
from app.frame.prompt import Prompt
from app.frame.verdicts import ShownVerdict
from app.presenters.bench.state import (
    BenchVerdict,
    Field,
    Key,
    ReadingTask,
    Task,
    Title,
)
from models.units import Quantity, inch_set, metric_set
from reports.job_pictures import verdict_kind

__all__ = [
    "KEYPAD",
    "asked_of",
    "banded_verdict",
    "field_of",
    "foot_keys",
    "next_words",
    "prompt_of",
    "question_of",
    "rungs_of",
    "shown_verdict",
    "title_line",
]

KEYPAD = "keypad"
"""Name of the foot key that shows the keypad; it is the page's own."""


def title_line(title: Title) -> TitleLine:
    """Give what the title block says."""
    return TitleLine(
        rotor=title.rotor,
        job=title.job,
        step=title.step,
        plan=title.plan,
        written=title.written,
        stage=title.stage.value if title.stage else "",
    )


def foot_keys(keys: Sequence[Key], *, takes_figures: bool) -> tuple[FootKey, ...]:
    """Give the keys of the foot; the first shows the keypad."""
    own = FootKey(name=KEYPAD, words="Keypad", enabled=takes_figures)
    rest = [FootKey(name=key.name, words=key.label, enabled=key.enabled) for key in keys]
    return (own, *(key for key in rest if key.name != KEYPAD))


def prompt_of(task: ReadingTask) -> Prompt:
    """Give the mark to read now and what is said beside it."""
    return Prompt(mark=task.mark, head=task.where, lines=task.lines)


def asked_of(task: ReadingTask) -> Asked:
    """Give what the cell is asked for."""
    first = next((rung.value for rung in task.rungs if rung.value), "")
    return Asked(
        mark=task.mark,
        old=task.correcting,
        reason_needed=task.correcting is not None and bool(task.reasons),
        closing=first if task.is_closing else None,
    )


def rungs_of(task: ReadingTask) -> tuple[Rung, ...]:
    """Give the ladder its marks."""
    return tuple(
        Rung(
            mark=rung.place,
            value=rung.value,
            struck=rung.struck,
            questioned=rung.questioned,
            active=rung.active,
        )
        for rung in task.rungs
    )


def question_of(task: ReadingTask) -> Question | None:
    """Give the open question, which stays silent while a reading is being replaced."""
    if task.question is None or task.correcting is not None:
        return None
    mark = next((rung.place for rung in task.rungs if rung.questioned), task.mark)
    return Question(
        name=mark,
        mark=mark,
        sentence=task.question.sentence,
        proposal=task.question.proposed or "",
    )


def shown_verdict(verdict: BenchVerdict, *, short: bool = False) -> ShownVerdict:
    """Give the verdict as it stands beside the entry; short, it keeps its first sentence alone."""
    facts = (*(f"{name}: {value}" for name, value in verdict.facts), verdict.so_far)
    return ShownVerdict(
        kind=verdict_kind(verdict.verdict),
        phrase=verdict.phrase,
        sentences=verdict.sentences[:1] if short else verdict.sentences,
        facts=tuple(fact for fact in facts if fact),
    )


def banded_verdict(verdict: BenchVerdict) -> ShownVerdict:
    """Give the verdict as it stands across the whole band."""
    return ShownVerdict(
        kind=verdict_kind(verdict.verdict),
        phrase=verdict.phrase,
        sentences=verdict.sentences,
        facts=tuple(f"{name}: {value}" for name, value in verdict.facts) or (verdict.so_far,),
    )


def next_words(task: Task) -> str:
    """Give the words for what is next; with a choice to make, the band only makes room for it."""
    keys: Sequence[Key] = getattr(task, "keys", ())
    return keys[0].label if len(keys) == 1 else "Go on"


def _unit_of(field: Field) -> CellUnit:
    """Read a field in the unit that stands beside it, whichever set the job writes in."""
    kind = inch_set.ways[field.use].kind
    units = inch_set if inch_set.unit(field.use) == field.unit else metric_set

    def read(text: str) -> Quantity:
        return kind.read(text, field.unit)

    def other(quantity: Quantity) -> str:
        return units.other(quantity.si, field.use)

    return CellUnit(symbol=field.unit, read=read, other=other)


def field_of(field: Field) -> FormField:
    """Give a form what it asks.

    Parameters
    ----------
    field : Field
        A choice, a quantity with its use, or words.

    Returns
    -------
    FormField
        The form's own field.
    """
    optional = not field.needed
    if field.choices:
        answers = tuple(words for _, words in field.choices)
        return ChoiceField(name=field.key, label=field.label, optional=optional, answers=answers)
    if field.use:
        unit = _unit_of(field)
        return NumberField(name=field.key, label=field.label, optional=optional, unit=unit)
    return TextField(name=field.key, label=field.label, optional=optional)
