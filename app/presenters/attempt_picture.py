"""What one attempt did to the shaft, as plain facts for a drawing."""

from dataclasses import dataclass

from models.assess import Assessment, Attempt
from reports import job_pictures
from reports.sheet.pictures import ChangeMark, Curve, PlaneCurve, RotorPicture, Turning

__all__ = [
    "AttemptPicture",
    "attempt_picture",
    "attempt_sentence",
    "bare_picture",
    "bend_sentence",
    "counted",
]


@dataclass(frozen=True, kw_only=True)
class AttemptPicture:
    """A rotor with its centreline before and after, and what changed at each station."""

    rotor: RotorPicture
    curves: tuple[PlaneCurve, ...] = ()
    changes: tuple[tuple[ChangeMark, ...], ...] = ()
    caption: tuple[str, ...] = ()
    counted: Turning = Turning.COUNTERCLOCKWISE
    description: str = ""


def counted(view: Assessment) -> Turning:
    """Say which way marks are counted: against the rotation.

    Parameters
    ----------
    view : Assessment
        The job, worked out.

    Returns
    -------
    Turning
        Seen from the end that the plan names.
    """
    clockwise = view.job.plan.rotor.rotation == "clockwise"
    return Turning.COUNTERCLOCKWISE if clockwise else Turning.CLOCKWISE


def attempt_picture(view: Assessment, attempt: Attempt) -> AttemptPicture:
    """Draw an attempt: the rotor as it stood then, before in grey, after in ink.

    Parameters
    ----------
    view : Assessment
        The job, worked out.
    attempt : Attempt
        One of its attempts.

    Returns
    -------
    AttemptPicture
        Without curves where the attempt has no survey.
    """
    job = view.job
    rotor = job_pictures.rotor_picture(view, step=attempt.step.key, attempt=attempt.number)
    surveys = ((attempt.baseline, Curve.BEFORE), (attempt.judged, Curve.AFTER))
    curves = tuple(
        job_pictures.curve(job, survey, which, name=which.value)
        for survey, which in surveys
        if survey is not None and attempt.judged is not None
    )
    unit = "0.0001 in TIR" if job.plan.rotor.units == "inch" else "µm TIR"
    marks = job_pictures.change_marks(
        view, attempt.step, attempt.changes, job_pictures.findings_by_station(attempt)
    )
    return AttemptPicture(
        rotor=rotor,
        curves=curves,
        changes=(marks,) if marks else (),
        caption=("change", unit),
        counted=counted(view),
        description=attempt_sentence(attempt),
    )


def bare_picture(view: Assessment) -> AttemptPicture:
    """Draw the bare shaft with the survey that everything later is compared with.

    Parameters
    ----------
    view : Assessment
        The job, worked out.

    Returns
    -------
    AttemptPicture
        Every part is still to come.
    """
    first = view.job.plan.steps[0].key
    rotor = job_pictures.rotor_picture(view, step=first)
    curves: tuple[PlaneCurve, ...] = ()
    if view.bare_shaft is not None:
        after = job_pictures.curve(view.job, view.bare_shaft, Curve.AFTER, name="bare shaft")
        curves = (after,)
    return AttemptPicture(
        rotor=rotor,
        curves=curves,
        counted=counted(view),
        description="The bare shaft, before anything was mounted.",
    )


def attempt_sentence(attempt: Attempt) -> str:
    """Say what an attempt did to the shaft, by the station that changed most for its limit.

    Parameters
    ----------
    attempt : Attempt
        One attempt.

    Returns
    -------
    str
        A sentence.
    """
    moved = [one for one in attempt.of("runout-changed") if one.subject.station is not None]
    if attempt.judged is None or not moved:
        return "Not surveyed yet." if attempt.step.survey_due else "No survey is due at this step."
    tirs = {one.key: one.tir or 0.0 for one in attempt.changes}
    worst = max(
        moved, key=lambda one: (one.verdict.severity, tirs.get(one.subject.station or "", 0.0))
    )
    return worst.message


def bend_sentence(attempt: Attempt) -> tuple[str, ...]:
    """Say where the bend of an attempt sits.

    Parameters
    ----------
    attempt : Attempt
        One attempt.

    Returns
    -------
    tuple of str
        One sentence; none where no kink was looked for.
    """
    return attempt.bend.sentences[:1] if attempt.kink is not None else ()
