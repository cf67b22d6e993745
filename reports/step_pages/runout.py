"""What the shaft did: the rotor's drawing, the table of stations, the bend."""

from collections.abc import Iterator, Sequence
from dataclasses import replace

from reportlab.lib.units import mm
from reportlab.platypus import Flowable, Table

from models.assess import Assessment, Attempt, StationChange
from models.assess.swept import swept_views
from models.job import Step
from models.rules.rule import Verdict
from models.units import unit_set
from reports.draw import SheetFlowable
from reports.front_pages import shown_total
from reports.job_pictures import (
    change_marks,
    curve,
    dial_picture,
    findings_by_station,
    rotor_picture,
    verdict_kind,
)
from reports.page import CONTENT_WIDTH
from reports.parts import Cell, PlainStyle, bold, gap, head, note, shape, table, text, title, words
from reports.sheet.along import PAPER_LAYOUT, along_the_rotor, axis_for, magnification_along
from reports.sheet.dial import dial
from reports.sheet.elements import Box, sheet_of
from reports.sheet.medium import PAPER_MEDIUM
from reports.sheet.pictures import Curve, PlaneCurve

__all__ = ["what_the_shaft_did"]

_DIAL_WIDTH, _DIAL_HEIGHT = 46.0, 42.0
_LAYOUT = replace(
    PAPER_LAYOUT,
    height=76.0,
    rotor=(0.0, 38.0),
    names=(39.0, 42.5),
    planes=(43.5, 72.0),
    change_top=74.0,
)


def what_the_shaft_did(view: Assessment, step: Step, pair: Sequence[Attempt]) -> Iterator[Flowable]:
    """Give the right-hand page: drawing, dials, table, bend."""
    judged = [one for one in pair if one.judged is not None]
    yield title(
        "What the shaft did", "seen with the " + view.job.plan.rotor.first_end + " at the left"
    )
    if not judged:
        yield text("No survey has been read after this step.")
        return
    yield _along(view, step, judged)
    units = unit_set(view.job.plan.rotor.units)
    unit = "0.0001 in" if units.name == "inch" else "µm"
    limit = step.change_limit
    yield note(
        words(
            f"Circles: the limit, {limit.value.written if limit else 'not set'} TIR of change at "
            f"every station ({limit.origin.words if limit else 'no origin'}); dot: where the high "
            f"spot moved, 0° up. Figures in {unit} TIR."
        )
    )
    yield from _station_table(view, step, judged)
    yield from _bends(view, judged)
    for one in view.index_tests:
        if one.step == step.key and one.second_attempt == judged[-1].number:
            yield text(words(one.sentence))
    last = judged[-1].judged
    for swept in swept_views(view.job, [last] if last is not None else []):
        if swept.outcome != "agrees":
            yield text(words(swept.sentence))


def _along(view: Assessment, step: Step, judged: Sequence[Attempt]) -> Flowable:
    job = view.job
    picture = rotor_picture(view, step=step.key, attempt=judged[-1].number, numbers=True)
    curves = _curves(view, judged)
    rows = [
        change_marks(view, step, attempt.changes, findings_by_station(attempt))
        for attempt in judged
    ]
    captions = [(f"attempt {attempt.number}", "change") for attempt in judged]
    del job
    return SheetFlowable(
        along_the_rotor(
            picture=picture, curves=curves, changes=rows, captions=captions, layout=_LAYOUT
        )
    )


def _curves(view: Assessment, judged: Sequence[Attempt]) -> list[PlaneCurve]:
    curves = []
    last = judged[-1]
    if last.baseline is not None:
        curves.append(curve(view.job, last.baseline, Curve.BEFORE, name="before"))
    for attempt in judged:
        if attempt.judged is None:
            continue
        which = Curve.AFTER if attempt is last else Curve.EARLIER
        curves.append(curve(view.job, attempt.judged, which, name=f"attempt {attempt.number}"))
    return curves


def _station_table(view: Assessment, step: Step, judged: Sequence[Attempt]) -> Iterator[Flowable]:
    job = view.job
    units = unit_set(job.plan.rotor.units)
    unit = units.unit("runout")
    yield head("Runout", f"TIR ({unit}) at its clock angle, in the journals' own axis")
    header = ["station", f"at, {units.unit('position')}", "before", ""]
    groups = [(2, 3, "before")]
    for index, attempt in enumerate(judged):
        header += ["after", "", "change", "±", "plain", ""]
        groups.append((4 + 6 * index, 9 + 6 * index, f"attempt {attempt.number}"))
    rows: list[list[Cell]] = []
    for station in job.plan.stations_in_reach(step.key):
        row: list[Cell] = [
            bold(station.key),
            units.bare(station.position.si, "position"),
        ]
        before = judged[-1].baseline
        journal = station.key in (job.plan.first_journal, job.plan.second_journal)
        if journal:
            row += ["datum", ""]
        else:
            row += list(shown_total(before.corrected(station.key) if before else None, units.name))
        for attempt in judged:
            row += _change_cells(attempt, station.key, journal=journal, units_name=units.name)
        rows.append(row)
    wide: list[float] = [13, 15, 14.5, 9.5] + [14.5, 9.5, 14.5, 14.5, 14.5, 5] * len(judged)
    align = "lrrr" + "rrrrrc" * len(judged)
    if len(judged) == 1:
        wide.append(47)
        header.append("")
        align += "l"
        rows = [[*row, ""] for row in rows]
    yield table(header, rows, wide, align=align, groups=groups)
    yield note(
        "change: the vector difference as TIR; plain: what the totals alone would show; ±: k = 2."
    )


def _change_cells(attempt: Attempt, key: str, *, journal: bool, units_name: str) -> list[Cell]:
    units = unit_set(units_name)
    change: StationChange | None = next((one for one in attempt.changes if one.key == key), None)
    if journal:
        return ["datum", "", "", "", "", ""]
    after = attempt.judged.corrected(key) if attempt.judged else None
    total, angle = shown_total(after, units_name)
    if change is None or change.tir is None:
        return [total, angle, "–", "", "", ""]
    finding = findings_by_station(attempt).get(key)
    outside = finding is not None and finding.verdict is not Verdict.WITHIN
    figure = units.bare(change.tir, "runout")
    return [
        total,
        angle,
        bold(figure) if outside else figure,
        units.bare(change.expanded_uncertainty or 0.0, "runout"),
        "–" if change.plain_change is None else units.bare(abs(change.plain_change), "runout"),
        shape(verdict_kind(finding.verdict if finding else None), 2.2),
    ]


def _bends(view: Assessment, judged: Sequence[Attempt]) -> Iterator[Flowable]:
    """Set the dial of each attempt's worst station, and beside it where the bend sat."""
    cells: list[Cell] = []
    widths: list[float] = []
    alone = len(judged) == 1
    for attempt in judged:
        cells.append(_dial(view, attempt, judged) or "")
        name = bold(f"Attempt {attempt.number}: where the bend sat")
        setter = text if alone else note
        # Beside another attempt there is room for the bend itself; what it means stands in full
        # where an attempt has the page to itself.
        sentences = attempt.bend.sentences if alone else attempt.bend.sentences[:1]
        cells.append([setter(name), *(setter(words(one)) for one in sentences)])
        widths += [_DIAL_WIDTH * mm, (CONTENT_WIDTH / len(judged)) - _DIAL_WIDTH * mm]
    yield gap(1.5)
    made = Table([cells], colWidths=widths)
    made.setStyle(
        PlainStyle(
            [
                ("LEFTPADDING", (0, 0), (-1, -1), 0),
                ("RIGHTPADDING", (0, 0), (-1, -1), 1.5 * mm),
                ("VALIGN", (0, 0), (-1, -1), "TOP"),
            ]
        )
    )
    yield made


def _dial(view: Assessment, attempt: Attempt, judged: Sequence[Attempt]) -> Flowable | None:
    changes = [one for one in attempt.changes if one.tir is not None and not one.is_journal]
    worst = max(changes, key=lambda one: one.tir or 0.0, default=None)
    station = attempt.judged.station(worst.key) if attempt.judged and worst else None
    if worst is None or station is None:
        return None
    limit = attempt.step.change_limit
    picture = dial_picture(
        view.job,
        station,
        before=worst.before,
        after_datum=worst.after,
        limit=limit.value.si if limit else None,
        verdict=attempt.verdict_of("runout-changed"),
        caption=(f"{worst.key}, attempt {attempt.number}",),
    )
    rotor = rotor_picture(view, step=attempt.step.key)
    magnification = magnification_along(
        picture=rotor,
        curves=_curves(view, judged),
        limit_tir=limit.value.si if limit else 0.0,
        layout=_LAYOUT,
    )
    layer = dial(
        picture=picture,
        place=Box(0.0, 0.0, _DIAL_WIDTH - 2.0, _DIAL_HEIGHT),
        medium=PAPER_MEDIUM,
        scale=axis_for(picture=rotor, layout=_LAYOUT).scale,
        magnification=magnification,
    )
    return SheetFlowable(
        sheet_of(
            width=_DIAL_WIDTH - 2.0,
            height=_DIAL_HEIGHT,
            medium=PAPER_MEDIUM,
            layers=[layer],
            title=f"dial {worst.key}",
        )
    )
