"""Sentences about a job that several desks share: what it waits for, where a finding lies."""

import re

from models.assess import Assessment
from models.job import Job, Person
from models.rules.progress import Act, NextAct
from models.rules.rule import Subject

__all__ = ["day_and_time", "in_words", "person_words", "place_words", "waits_for"]

_TECHNICIAN = "the technician"
_WAITED_FOR = {
    Act.SURVEY_BARE_SHAFT: ("a survey of the bare shaft", _TECHNICIAN),
    Act.MEASURE: ("its sizes", _TECHNICIAN),
    Act.DECIDE_FIT: ("a decision about its fit", "an inspector or the engineer"),
    Act.CONFIRM_FURNACE: ("the look before the furnace", _TECHNICIAN),
    Act.HEAT: ("its heat and its opening", _TECHNICIAN),
    Act.CONFIRM_DOOR: ("the look before the door", _TECHNICIAN),
    Act.MOUNT: ("its mount", _TECHNICIAN),
    Act.DRAW_UP: ("its draw-up on oil", _TECHNICIAN),
    Act.COMPLETE_MOUNT: ("how it came to rest", _TECHNICIAN),
    Act.MEASURE_AXIAL: ("its axial position, cold", _TECHNICIAN),
    Act.COOL: ("temperatures while it cools", _TECHNICIAN),
    Act.SURVEY: ("the runout survey", _TECHNICIAN),
    Act.SURVEY_SEAT: ("the survey of the bare seat", _TECHNICIAN),
    Act.REMOVE: ("its removal", _TECHNICIAN),
    Act.SETTLE: ("the word that settles it", _TECHNICIAN),
}


def waits_for(view: Assessment) -> str:
    """Say in one sentence what a job waits for, and from whom.

    Parameters
    ----------
    view : Assessment
        The job, worked out.

    Returns
    -------
    str
        A sentence.
    """
    nearest = view.next
    if nearest.step is None:
        if nearest.act is Act.SURVEY_BARE_SHAFT:
            return "Waits for a survey of the bare shaft, from the technician."
        return in_words(view.job, nearest.words)
    number = view.job.plan.step_number(nearest.step)
    title = view.job.plan.step(nearest.step).title
    if nearest.act is Act.OPEN_ATTEMPT:
        return f"Waits for attempt {nearest.attempt} at step {number}, {title}, from a technician."
    if nearest.act is Act.SIGN:
        return f"Step {number}, {title}, waits for {_who_signs(view, nearest)}."
    found = _WAITED_FOR.get(nearest.act)
    if found is None:
        return in_words(view.job, nearest.words)
    what, who = found
    return f"Step {number}, {title}, attempt {nearest.attempt}, waits for {what}, from {who}."


def _who_signs(view: Assessment, nearest: NextAct) -> str:
    latest = view.progress.latest(nearest.step or "")
    if latest is None or not latest.performed:
        return "the name of who did it"
    return "; ".join(latest.points_open)


def in_words(job: Job, sentence: str) -> str:
    """Name steps in a sentence by number and title instead of by key.

    Parameters
    ----------
    job : Job
        Knows the steps of its plan.
    sentence : str
        May say "step" and the key of one.

    Returns
    -------
    str
        The sentence as a person reads it.
    """
    for number, step in enumerate(job.plan.steps, start=1):
        pattern = rf"\b([Ss])tep {re.escape(step.key)}(?![\w-])"
        sentence = re.sub(pattern, rf"\1tep {number}, {step.title}", sentence)
    return sentence


def place_words(job: Job, subject: Subject) -> str:
    """Say where a finding lies.

    Parameters
    ----------
    job : Job
        Knows the steps of its plan.
    subject : Subject
        What the finding is about.

    Returns
    -------
    str
        Widest first: step, attempt, item where the step has several, land, station.
    """
    if subject.step is None:
        return f"station {subject.station}" if subject.station else "the whole rotor"
    step = job.plan.step(subject.step)
    parts = [f"step {job.plan.step_number(step.key)}, {step.title}"]
    if subject.attempt:
        parts.append(f"attempt {subject.attempt}")
    if subject.item and len(step.items) > 1:
        parts += [item.name for item in step.items if item.key == subject.item]
    if subject.feature:
        parts.append(subject.feature)
    if subject.land:
        parts.append(f"land {subject.land}")
    if subject.station:
        parts.append(f"station {subject.station}")
    return ", ".join(parts)


def person_words(person: Person) -> str:
    """Say a person's name and role, and for whom they act where it is somebody else.

    Parameters
    ----------
    person : Person
        Somebody of the job.

    Returns
    -------
    str
        "Name, role".
    """
    return f"{person.name}, {person.role}"


def day_and_time(instant: str) -> str:
    """Write an instant shortly, in the time of the place where it was entered.

    Parameters
    ----------
    instant : str
        ISO 8601 with the local offset.

    Returns
    -------
    str
        Day and time without seconds and offset.

    Examples
    --------
    >>> day_and_time("2026-10-22T07:00:00-05:00")
    '2026-10-22 07:00'
    """
    return instant[:16].replace("T", " ")
