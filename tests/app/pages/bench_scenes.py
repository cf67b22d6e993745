"""States of the bench, one for every kind of task and verdict, drawn from the invented rotor."""

import math
from dataclasses import replace
from functools import cache

import msgspec

from app.presenters.bench.state import (
    BenchState,
    BenchVerdict,
    Drop,
    Field,
    FormTask,
    Key,
    KeyTask,
    QuestionShown,
    ReadingTask,
    RungShown,
    Title,
    WaitTask,
)
from models.assess import assess
from models.assess.runout import compare_surveys, read_survey
from models.rules.progress import Stage
from models.rules.rule import Verdict
from reports.job_pictures import (
    change_marks,
    curve,
    dial_picture,
    findings_by_station,
    fit_picture,
    rotor_picture,
)
from reports.sheet.pictures import Curve, GapPicture
from sample_data import compressor

STEP = "impeller-2"
ACTIVE = "K7"
READ_AT_ACTIVE = 5
REASONS = ("misread", "wrong mark", "slipped", "typing slip", "other")
FOOT = (
    Key("keypad", "Keypad"),
    Key("no-surface", "No surface", hint="keyway or gap at this mark"),
    Key("note", "Note"),
    Key("leave", "Leave"),
)
HOT = (
    "The part is hot: gloves, face shield, and nobody below the hook.",
    "Lift by the eye bolts of the plan only; the shop's lifting rules go before this screen.",
)


@cache
def view():
    return assess(compressor())


@cache
def attempt(number=1):
    found = view().attempt(STEP, number)
    assert found is not None
    return found


def title(stage, written="14:32:07"):
    job = view().job
    return Title(
        rotor=f"{job.plan.rotor.serial} (invented)",
        job=job.number,
        step="3 of 13, attempt 1",
        plan=job.plan.revision,
        stage=stage,
        written=written,
    )


def walk():
    plan = view().job.plan
    journals = (plan.first_journal, plan.second_journal)
    keys = [one.station for one in attempt().judged.entry.stations]
    return [*journals, *(key for key in keys if key not in journals)]


@cache
def partly_read(live=None):
    """The survey as it stands while its sixth mark at one station is read."""
    survey = attempt().judged.entry
    done = walk()[: walk().index(ACTIVE)]
    stations = []
    for one in survey.stations:
        if one.station in done:
            stations.append(one)
        elif one.station == ACTIVE:
            typed = one.typed[:READ_AT_ACTIVE] + (() if live is None else (live,))
            stations.append(msgspec.structs.replace(one, typed=typed, again=None))
        else:
            stations.append(msgspec.structs.replace(one, typed=(), again=None))
    return read_survey(view().job, msgspec.structs.replace(survey, stations=tuple(stations)))


def signed(text):
    """A reading as a whole number of the indicator's last digit, with its sign."""
    figure = round(float(text) / 0.0001)
    return f"{figure:+d}".replace("-", "−") if figure else "0"


def upper_half(live=None, *, number=1, whole=False):
    """Rotor, centrelines and changes, with or without a survey that is being read."""
    job, one = view().job, attempt(number)
    after = one.judged if whole else partly_read(live)
    active = None if whole else ACTIVE
    done = None if whole else [*walk()[: walk().index(ACTIVE)]]
    changes = one.changes if whole else compare_surveys(job, one.baseline, after)
    findings = findings_by_station(one)
    shown = {key: found for key, found in findings.items() if done is None or key in done}
    known = [change for change in changes if done is None or change.key in (*done, ACTIVE)]
    return {
        "rotor": rotor_picture(
            view(),
            step=STEP,
            attempt=number,
            label=f"Impeller 2, on, attempt {number}",
            active=active,
            read=done,
        ),
        "curves": (
            curve(job, one.baseline, Curve.BEFORE),
            curve(job, after, Curve.AFTER, active=active),
        ),
        "changes": change_marks(view(), one.step, known, shown, active=active, to_come=walk()),
        "change_caption": ("change", "0.0001 in TIR"),
        "counted": "counterclockwise",
    }


def dial(live=None):
    survey = partly_read(live)
    return dial_picture(
        view().job,
        survey.station(ACTIVE),
        before=attempt().baseline.corrected(ACTIVE),
        after_datum=survey.corrected(ACTIVE),
        limit=attempt().step.change_limit.value.si,
        active_angle=math.radians(225.0),
        open_mark=None if live is None else READ_AT_ACTIVE,
    )


def reading_task(live=None, **more):
    survey = attempt().judged.entry
    typed = survey.readings(ACTIVE).typed
    angles = [f"{angle.typed}°" for angle in survey.angles]
    rungs = [
        RungShown(
            place=mark,
            value=signed(typed[index]) if index < READ_AT_ACTIVE else "",
            active=index == READ_AT_ACTIVE,
        )
        for index, mark in enumerate(angles)
    ]
    rungs.append(RungShown(place=f"{angles[0]} again"))
    task = ReadingTask(
        mark=angles[READ_AT_ACTIVE],
        where=f"{ACTIVE}, {view().job.plan.station(ACTIVE).name}",
        lines=("mark 6 of 8, then 270°", "before the mount: −0.0008 in"),
        unit="in",
        other_unit="µm",
        rungs=tuple(rungs),
        caption="readings in 0.0001 in, indicator DI-07, + towards the indicator",
        dial=dial(live),
    )
    return replace(task, **more)


LOOK = BenchVerdict(
    Verdict.CANNOT_TELL,
    "Look again",
    (
        "E1 changed 0.0010 in TIR, limit 0.0010 in: ±0.0001 in cannot tell. Read E1 again.",
        "Its total is as before, but the high spot turned 64°.",
    ),
    so_far="so far 6 of 11 stations",
    reasons=(
        "The change of runout at a station stays within the limit of the plan.",
        "change of total indicator reading = 0.0010 in",
        "limit = 0.0010 in",
        "expanded uncertainty, k = 2 = 0.0001 in",
        "change = 2 · |after − before|, both in the axis through the journals",
        "Source: common practice",
        "The limit comes from plan B, sheet 3",
        "",
        "The indicator is in calibration.",
        "due = 2027-01-15",
        "Source: the shop's own rule",
    ),
)
WITHIN = BenchVerdict(
    Verdict.WITHIN,
    "Within limits",
    ("E1 changed 0.0004 ± 0.0001 in TIR towards 146°, limit 0.0010 in.",),
    so_far="so far 6 of 11 stations",
    reasons=LOOK.reasons,
)
NOT_JUDGED = BenchVerdict(
    None,
    "Not judged yet",
    ("Both journals first: they carry the datum.",),
    so_far="so far 0 of 11 stations",
)
STOP = BenchVerdict(
    Verdict.OUTSIDE,
    "Stop",
    ("E1 changed 0.0013 ± 0.0002 in TIR towards 210°, limit 0.0010 in.",),
    so_far="so far 6 of 11 stations",
    reasons=LOOK.reasons,
)
REMOUNT = BenchVerdict(
    Verdict.OUTSIDE,
    "Remount required",
    ("E1 changed 0.0013 ± 0.0002 in TIR towards 210°, limit 0.0010 in (plan B).",),
    facts=(
        ("greatest change", "E1, 0.0013 in (34.1 µm) TIR at 210°, ± 0.0002 in"),
        ("the bend sits", "under impeller 2, 31.2 in from the drive end"),
        ("look for", "uneven heating, a burr or dirt in the seat, a cocked wheel"),
    ),
    reasons=LOOK.reasons,
    is_final=True,
)
ACCEPTED = BenchVerdict(
    Verdict.WITHIN,
    "Within limits",
    ("K5 changed 0.0003 ± 0.0001 in TIR towards 32°, limit 0.0010 in (plan B).",),
    facts=(("greatest change", "K5, 0.0003 in (7.7 µm) TIR at 32°, ± 0.0001 in"),),
    reasons=LOOK.reasons,
    is_final=True,
)


def runout(live=None, verdict=LOOK, **more):
    return BenchState(
        title=title(Stage.RUNOUT),
        words="Read K7 at 225°.",
        task=reading_task(live, **more),
        verdict=verdict,
        keys=FOOT,
        **upper_half(live),
    )


def questioned():
    task = reading_task()
    rungs = list(task.rungs)
    rungs[4] = replace(rungs[4], value="+76", questioned=True)
    question = QuestionShown("25.4 times its neighbours: 0.0003 in?", "0.0003")
    return runout(rungs=tuple(rungs), question=question)


def correcting():
    task = reading_task()
    rungs = [replace(one, active=False) for one in task.rungs]
    rungs[3] = replace(rungs[3], active=True, struck=("+50",))
    return runout(
        mark="135°",
        rungs=tuple(rungs),
        correcting="0.0004",
        reasons=REASONS,
        lines=("mark 4 of 8, then 180°",),
    )


def closing():
    task = reading_task()
    rungs = [replace(one, active=False, value=one.value or "+2") for one in task.rungs]
    rungs[-1] = replace(rungs[-1], active=True, value="")
    return runout(
        mark="0°",
        rungs=tuple(rungs),
        is_closing=True,
        lines=("the first mark again, to close the circle",),
        verdict=WITHIN,
    )


def other_stage(stage, task, verdict=NOT_JUDGED, lifted=0.0, words="", **more):
    return BenchState(
        title=title(stage),
        words=words or task.__class__.__name__,
        task=task,
        verdict=replace(verdict, so_far=""),
        rotor=rotor_picture(
            view(), step=STEP, label="Impeller 2, attempt 1", lifted_gap=lifted, read=()
        ),
        keys=(replace(FOOT[0], enabled=False), *FOOT[1:]),
        **more,
    )


def sizes():
    rungs = [
        RungShown(place=f"{place} {angle}°", value=value, active=not value and place == "middle")
        for place, angle, value in (
            ("left", 0, "6.2518"),
            ("left", 90, "6.2517"),
            ("middle", 0, ""),
            ("middle", 90, ""),
            ("right", 0, ""),
            ("right", 90, ""),
        )
    ]
    rungs[3] = replace(rungs[3], active=False)
    task = ReadingTask(
        mark="0°",
        where="Seat of impeller 2, middle",
        lines=("diameter 3 of 6, then 90°", "drawing: 6.2515 to 6.2520 in"),
        unit="in",
        other_unit="mm",
        rungs=tuple(rungs),
        caption="diameters in inches, micrometer MI-03, shaft at 68 °F",
        kind="sizes",
    )
    return other_stage(
        Stage.SIZES,
        task,
        replace(NOT_JUDGED, sentences=("Two of three places are still to be read.",)),
        words="Measure the seat.",
    )


def fit():
    item = attempt().items[0]
    findings = {one.subject.land: one for one in attempt().of("interference-within")}
    rows = [(f"land {one.land.key}", one, findings.get(one.land.key)) for one in item.fits]
    task = KeyTask(
        "Is this fit as planned?",
        (
            "The least interference still holds the wheel at overspeed; the greatest stays below "
            "the yield of the hub.",
        ),
        (
            Key("keep-fit", "Go on to the furnace"),
            Key("measure-bore", "Measure the bore again"),
            Key("measure-seat", "Measure the seat again"),
        ),
        ranges=fit_picture(view().job, rows),
    )
    verdict = BenchVerdict(
        Verdict.WITHIN,
        "Within limits",
        ("Interference 0.0070 to 0.0073 in, allowed 0.0060 to 0.0090 in.",),
        reasons=LOOK.reasons,
    )
    return other_stage(Stage.FIT, task, verdict, words="Decide about the fit.")


def heat():
    answers = (("yes", "yes"), ("no", "no"), ("na", "does not apply"))
    task = FormTask(
        "Before the furnace",
        ("Impeller 2, serial IM2-0077, faces the drive end.",),
        (
            Field("serial", "Serial read from the part"),
            Field("facing", "Eye towards the drive end", choices=answers),
            Field("marks", "Match marks agree", choices=answers),
            Field("bore", "Bore temperature", unit="°F", use="temperature"),
            Field("rim", "Rim temperature", unit="°F", use="temperature", needed=False),
            Field("remark", "Remark", needed=False),
        ),
        "Take all",
        cautions=HOT,
    )
    return other_stage(Stage.HEAT, task, words="Confirm before the furnace.")


def mount(opened_at=None):
    task = KeyTask(
        "Over the seat",
        ("Lower it to the shoulder in one go.",),
        (Key("seated", "Seated"), Key("stopped-short", "Stopped short")),
        cautions=HOT,
        drop=Drop(
            in_air=(400.0, 520.0),
            over_seat=(110.0, 150.0),
            gap=GapPicture(gap=300e-6, opening_gap=300e-6, least_gap=250e-6, gap_text="gap ×50"),
            words="Ranges, never promises: the hot-bore gauge decides.",
            opened_at=opened_at,
        ),
    )
    verdict = BenchVerdict(
        Verdict.WITHIN,
        "May go on",
        ("The bore measured 0.0118 in over the seat; 0.0100 in is needed.",),
        reasons=LOOK.reasons,
    )
    return other_stage(Stage.MOUNT, task, verdict, lifted=0.0003, words="Seat the impeller.")


def signature():
    task = KeyTask(
        "Sign this step",
        ("R. Quill, inspector: the fit and the survey have been looked at.",),
        (Key("sign", "Sign as R. Quill"),),
    )
    return other_stage(Stage.SETTLED, task, words="Sign.")


def wait():
    task = WaitTask(
        "No step may start",
        ("Step 6 waits for R. Quill to sign.", "Until then the rotor stays as it is."),
        cautions=("The rotor turns when the stand is released: keep clear of the drive.",),
    )
    return other_stage(Stage.SIZES, task, words="Step 6 waits for R. Quill to sign.")


def final(verdict, label, number):
    task = KeyTask("What is next", (label,), (Key("next", label),))
    return BenchState(
        title=title(Stage.RUNOUT),
        words=label,
        task=task,
        verdict=verdict,
        keys=(replace(FOOT[0], enabled=False), *FOOT[1:]),
        **upper_half(number=number, whole=True),
    )


SCENES = {
    "waiting": runout,
    "typing": lambda: runout("-0.0003"),
    "within": lambda: runout(verdict=WITHIN),
    "stop": lambda: runout(verdict=STOP),
    "not-judged": lambda: runout(verdict=NOT_JUDGED),
    "questioned": questioned,
    "correcting": correcting,
    "closing": closing,
    "sizes": sizes,
    "fit": fit,
    "heat": heat,
    "mount": mount,
    "sign": signature,
    "wait": wait,
    "remount": lambda: final(REMOUNT, "Record the removal", 1),
    "accepted": lambda: final(ACCEPTED, "Settle the step", 2),
}
