"""A step's two pages: at the left what was done, at the right what the shaft did."""

from collections.abc import Iterator, Sequence
from dataclasses import replace

from reportlab.lib.units import mm
from reportlab.platypus import Flowable, PageBreak, Table

from models.assess import Assessment, Attempt, ItemView, LandFit, StationChange
from models.job import Handling, Item, Job, Note, Step
from models.rules.rule import Finding, Verdict
from models.units import unit_set
from reports.draw import SheetFlowable
from reports.front_pages import shown_time, shown_total
from reports.job_pictures import (
    change_marks,
    curve,
    dial_picture,
    findings_by_station,
    fit_picture,
    rotor_picture,
    verdict_kind,
)
from reports.page import CONTENT_WIDTH, EvenPage, NowAt
from reports.parts import (
    Cell,
    PlainStyle,
    Signed,
    bold,
    gap,
    head,
    note,
    ranges,
    shape,
    signatures,
    struck,
    table,
    text,
    title,
    verdict_line,
    words,
)
from reports.sheet.along import PAPER_LAYOUT, along_the_rotor, axis_for, magnification_along
from reports.sheet.dial import dial
from reports.sheet.elements import Box, sheet_of
from reports.sheet.medium import PAPER_MEDIUM
from reports.sheet.pictures import Curve, PlaneCurve

__all__ = ["step_pages"]

_PER_SPREAD = 2
_DIAL_WIDTH, _DIAL_HEIGHT = 46.0, 42.0
_LAYOUT = replace(
    PAPER_LAYOUT,
    height=76.0,
    rotor=(0.0, 38.0),
    names=(39.0, 42.5),
    planes=(43.5, 72.0),
    change_top=74.0,
)


def step_pages(view: Assessment, step: Step) -> Iterator[Flowable]:
    """Give the spreads of a step: two attempts side by side on each."""
    attempts = view.attempts_at(step.key)
    number = view.job.plan.step_number(step.key)
    for start in range(0, len(attempts), _PER_SPREAD):
        pair = attempts[start : start + _PER_SPREAD]
        named = " and ".join(str(one.number) for one in pair)
        plural = "attempts" if len(pair) > 1 else "attempt"
        yield PageBreak()
        yield EvenPage()
        yield NowAt(f"{number} of {len(view.job.plan.steps)}, {step.title}", f"{plural} {named}")
        yield from _what_was_done(view, step, number, pair, is_last=pair[-1] is attempts[-1])
        yield PageBreak()
        yield from _what_the_shaft_did(view, step, pair)


def _heading(number: int, step: Step, pair: Sequence[Attempt]) -> Flowable:
    more = "" if len(pair) == 1 else f"attempts {pair[0].number} and {pair[-1].number}"
    return title(f"Step {number}  {step.title}", more)


def _what_was_done(
    view: Assessment, step: Step, number: int, pair: Sequence[Attempt], *, is_last: bool
) -> Iterator[Flowable]:
    job = view.job
    yield _heading(number, step, pair)
    for attempt in pair:
        yield _ending(job, attempt)
    for index, item in enumerate(step.items):
        views = [attempt.items[index] for attempt in pair]
        if len(step.items) > 1 or views[0].fits:
            yield from _sizes(job, item.name, pair, views)
        yield from _on_the_shaft(job, item, pair, views)
    yield from _cooling(job, pair)
    yield from _removals(job, pair)
    yield from _corrections(job, pair)
    if is_last:
        yield _signatures(job, pair[-1])


def _ending(job: Job, attempt: Attempt) -> Flowable:
    worst = _worst_change(attempt)
    outcome = attempt.settled.outcome if attempt.settled else "open"
    which = f"Attempt {attempt.number}: {outcome}"
    units = unit_set(job.plan.rotor.units)
    if worst is None:
        sentence = "Its runout has not been judged."
        if not attempt.step.survey_due:
            sentence = "No survey is due after this step."
    else:
        sentence = worst.message
    changes = [one for one in attempt.changes if one.tir is not None and not one.is_journal]
    if worst is not None and worst.verdict is Verdict.WITHIN and changes:
        most = max(changes, key=lambda one: one.tir or 0.0)
        sentence = (
            f"The greatest change is {units.both(most.tir or 0.0, 'runout')} TIR at {most.key}, "
            f"limit {_limit_words(attempt.step)}."
        )
    verdict = worst.verdict if worst else attempt.verdict_of("part-seated")
    return verdict_line(verdict_kind(verdict), which, sentence)


def _limit_words(step: Step) -> str:
    return step.change_limit.value.written if step.change_limit else "not set"


def _worst_change(attempt: Attempt) -> Finding | None:
    found = attempt.of("runout-changed")
    return max(
        found,
        key=lambda one: (one.verdict.severity, float(one.inputs.get("change_tir") or 0.0)),
        default=None,
    )


def _sizes(
    job: Job, name: str, pair: Sequence[Attempt], views: Sequence[ItemView]
) -> Iterator[Flowable]:
    units = unit_set(job.plan.rotor.units)
    serials = ", ".join(sorted({one.serial for one in views if one.serial}))
    if not any(one.fits for one in views):
        yield head(f"{name}", f"serial {serials}" if serials else "")
        return
    yield head(
        f"Sizes, {name}" + (f", serial {serials}" if serials else ""),
        f"mean diameters at 20 °C, {units.unit('diameter')}; fit least to greatest, "
        f"{units.unit('fit')}",
    )
    header = ["land"]
    groups = []
    for index, attempt in enumerate(pair):
        header += ["seat", "bore", "fit", ""]
        groups.append((1 + 4 * index, 4 + 4 * index, f"attempt {attempt.number}"))
    rows: list[list[Cell]] = []
    for land in range(len(views[0].fits)):
        row: list[Cell] = [words(views[0].fits[land].land.key)]
        for attempt, view in zip(pair, views, strict=True):
            fit = view.fits[land]
            row += [
                units.bare(fit.seat.at_reference.mean, "diameter")
                if fit.seat and fit.seat.at_reference
                else "–",
                units.bare(fit.bore.at_reference.mean, "diameter")
                if fit.bore and fit.bore.at_reference
                else "–",
                f"{units.bare(fit.interference.least, 'fit')} to "
                f"{units.bare(fit.interference.greatest, 'fit')}"
                if fit.interference
                else "–",
                shape(verdict_kind(_fit_verdict(attempt, view, fit.land.key))),
            ]
        rows.append(row)
    for words_of, reader in (("out of round, greatest", _roundness), ("measured at", _measured_at)):
        row = [words_of]
        for view in views:
            row += [*reader(job, view), "", ""]
        rows.append(row)
    row = ["instrument"]
    for view in views:
        first = view.fits[0]
        row += [
            words(first.seat.entry.instrument if first.seat else "–"),
            words(first.bore.entry.instrument if first.bore else "–"),
            "",
            "",
        ]
    rows.append(row)
    # One attempt alone does not stretch over the width that two would take.
    spare = 61.0 if len(pair) == 1 else 0.0
    widths = [34.0, *([17.0, 17.0, 25.0, 6.0] * len(pair))] + ([spare] if spare else [])
    if spare:
        header.append("")
        rows = [[*row, ""] for row in rows]
    align = "l" + "rrrc" * len(pair) + ("l" if spare else "")
    yield table(header, rows, widths, align=align, groups=groups)
    picture = fit_picture(
        job,
        [
            (
                f"attempt {attempt.number}"
                + (f", land {fit.land.key}" if len(view.fits) > 1 else ""),
                fit,
                next(iter(_fit_finding(attempt, view, fit.land.key)), None),
            )
            for attempt, view in zip(pair, views, strict=True)
            for fit in view.fits
        ],
    )
    if picture is not None:
        yield gap(1.5)
        yield ranges(picture)
        limit = views[0].fits[0].land.least_interference
        yield note(words(f"The limits come from {limit.origin.words}; whisker ± k = 2."))
        yield gap(1)
    strength = views[-1].strength
    if strength is not None:
        yield text(words(strength.means))


def _bar_name(attempt: Attempt, view: ItemView, fit: LandFit) -> str:
    land = f", land {fit.land.key}" if len(view.fits) > 1 else ""
    return f"attempt {attempt.number}{land}"


def _fit_finding(attempt: Attempt, view: ItemView, land: str) -> list[Finding]:
    return [
        one for one in attempt.of("interference-within", view.item.key) if one.subject.land == land
    ]


def _fit_verdict(attempt: Attempt, view: ItemView, land: str) -> Verdict | None:
    found = _fit_finding(attempt, view, land)
    return found[0].verdict if found else None


def _roundness(job: Job, view: ItemView) -> list[str]:
    units = unit_set(job.plan.rotor.units)
    found = []
    for feature in ("seat", "bore"):
        values = [
            sizes.as_read.greatest_out_of_roundness
            for fit in view.fits
            if (sizes := getattr(fit, feature)) is not None
        ]
        known = [value for value in values if value == value]
        found.append(units.bare(max(known), "diameter") if known else "–")
    return found


def _measured_at(job: Job, view: ItemView) -> list[str]:
    del job
    first = view.fits[0]
    return [
        words(sizes.entry.part_temperature.written)
        if sizes is not None and sizes.entry.part_temperature
        else "–"
        for sizes in (first.seat, first.bore)
    ]


def _columns(
    pair: Sequence[Attempt],
    rows: Sequence[tuple[str, Sequence[Cell]]],
    *,
    with_names: bool = True,
) -> Table:
    """Set names at the left and a column for each attempt."""
    return table(
        ["", *(f"attempt {one.number}" for one in pair)] if with_names else [],
        [[words(name), *cells] for name, cells in rows],
        [34.0, *([138.0 / len(pair)] * len(pair))],
    )


def _on_the_shaft(
    job: Job, item: Item, pair: Sequence[Attempt], views: Sequence[ItemView]
) -> Iterator[Flowable]:
    """Give an item's heat, opening and mount in one table, a column for each attempt."""
    rows: list[tuple[str, list[Cell]]] = []
    if any(one.heat is not None for one in views):
        rows += _heat_rows(job, pair, views)
    rows += _mount_rows(pair, views)
    hot = item.kind == "hot"
    yield head(
        "Heat, opening and mount" if hot else f"Mount, {item.name}",
        "what was measured at the part, not the furnace's set point" if hot else "",
    )
    yield _columns(pair, rows)


def _heat_rows(
    job: Job, pair: Sequence[Attempt], views: Sequence[ItemView]
) -> list[tuple[str, list[Cell]]]:
    both = list(zip(pair, views, strict=True))
    return [
        ("bore must reach", [_target(job, one) for one in views]),
        ("measured", [_measured(job, one) for one in views]),
        ("heated in", [_method(one) for one in views]),
        ("hot-bore gauge", [_gauge(one) for one in views]),
        ("opening", [_judged(one.of("bore-open", view.item.key)) for one, view in both]),
        (
            "confirmed",
            [
                _judged(
                    one.of("confirmed-before-furnace", view.item.key)
                    + one.of("confirmed-before-door", view.item.key)
                )
                for one, view in both
            ],
        ),
        ("drop window", [_window(one) for one in views]),
    ]


def _target(job: Job, view: ItemView) -> str:
    units = unit_set(job.plan.rotor.units)
    heat = view.heat
    if heat is None or heat.target is None or heat.plain_target is None:
        return "–"
    return (
        f"{units.both(heat.target, 'temperature')}; "
        f"{units.show(heat.plain_target, 'temperature')} without the steel's margin"
    )


def _measured(job: Job, view: ItemView) -> str:
    units = unit_set(job.plan.rotor.units)
    heat = view.heat
    if heat is None or heat.coldest_bore is None or heat.hottest is None:
        return "–"
    allowed = "" if heat.highest is None else f"; {units.show(heat.highest, 'temperature')} allowed"
    return (
        f"bore {units.both(heat.coldest_bore, 'temperature')} at least, hottest place "
        f"{units.show(heat.hottest, 'temperature')}{allowed}"
    )


def _method(view: ItemView) -> str:
    heating = view.heat.heating if view.heat else None
    if heating is None:
        return "–"
    set_point = f", set point {heating.set_point.written}" if heating.set_point else ""
    return words(f"{heating.method}{set_point}, {heating.instrument or 'no thermometer named'}")


def _gauge(view: ItemView) -> str:
    heating = view.heat.heating if view.heat else None
    if heating is None or not heating.gauge:
        return "not offered"
    return "<br/>".join(
        words(
            f"land {one.land}, {one.size.written}: "
            f"{'entered' if one.passed else 'did not enter'}, {one.at[11:16]}"
        )
        for one in heating.gauge
    )


def _window(view: ItemView) -> str:
    window = view.heat.window if view.heat else None
    if window is None:
        return "–"
    return (
        f"at least {_minutes(window.in_air_least)} in air, {_minutes(window.over_seat_least)} over "
        "the seat"
    )


def _minutes(seconds: float) -> str:
    if seconds >= 3600.0:
        return "an hour"
    return f"{int(seconds // 60)}:{int(seconds % 60):02d}"


def _judged(findings: Sequence[Finding]) -> Flowable | str:
    """Set the worst of some findings: shape and sentence."""
    if not findings:
        return "–"
    worst = max(findings, key=lambda one: one.verdict.severity)
    return Table(
        [[shape(verdict_kind(worst.verdict)), note(words(worst.message))]],
        colWidths=[10, None],
        style=PlainStyle(
            [
                ("LEFTPADDING", (0, 0), (-1, -1), 0),
                ("RIGHTPADDING", (0, 0), (-1, -1), 0),
                ("TOPPADDING", (0, 0), (-1, -1), 0),
                ("BOTTOMPADDING", (0, 0), (-1, -1), 0),
                ("VALIGN", (0, 0), (-1, -1), "TOP"),
            ]
        ),
    )


def _mount_rows(pair: Sequence[Attempt], views: Sequence[ItemView]) -> list[tuple[str, list[Cell]]]:
    both = list(zip(pair, views, strict=True))
    rows: list[tuple[str, list[Cell]]] = [
        ("seated", [_seated(one) for one in views]),
        ("shoulder", [_judged(one.of("part-seated", view.item.key)) for one, view in both]),
    ]
    if any(view.item.axial for view in views):
        rows.append(
            (
                "axial position",
                [_judged(one.of("axial-position-right", view.item.key)) for one, view in both],
            )
        )
    return rows


def _seated(view: ItemView) -> str:
    mount = view.mount
    if mount is None:
        return "not yet"
    opened = f", door {mount.door_opened_at[11:16]}" if mount.door_opened_at else ""
    seated = mount.seated_at or mount.done_at
    return words(f"{mount.outcome} {shown_time(seated)}{opened}")


def _cooling(job: Job, pair: Sequence[Attempt]) -> Iterator[Flowable]:
    if not any(attempt.coolings for attempt in pair):
        return
    del job
    yield head("Cooling", "temperatures permit reading; a survey that agrees proves it")
    yield _columns(
        pair,
        [
            ("may it be read", [_judged(attempt.of("may-be-read")) for attempt in pair]),
            (
                "taken",
                [
                    words(", ".join(shown_time(one.done_at)[5:16] for one in attempt.coolings))
                    or "–"
                    for attempt in pair
                ],
            ),
        ],
        with_names=False,
    )


def _removals(job: Job, pair: Sequence[Attempt]) -> Iterator[Flowable]:
    for attempt in pair:
        for view in attempt.items:
            removal = view.removal
            if removal is None:
                continue
            yield head(f"Removal of attempt {attempt.number}", shown_time(removal.done_at))
            hottest = f", {removal.temperature.written}" if removal.temperature else ""
            yield text(words(f"{view.item.name}: {removal.method}{hottest}. {removal.found}"))
            back = attempt.of("seat-came-back")
            if back:
                worst = max(
                    back,
                    key=lambda one: (
                        one.verdict.severity,
                        float(one.inputs.get("change_tir") or 0.0),
                    ),
                )
                yield text(words(worst.message))
    del job


def _corrections(job: Job, pair: Sequence[Attempt]) -> Iterator[Flowable]:
    lines: list[str] = []
    for attempt in pair:
        name = f"Attempt {attempt.number}, "
        for entry in attempt.entries:
            unit = getattr(entry, "unit", "")
            for one in getattr(entry, "corrections", ()):
                lines.append(
                    words(name + _place_words(job, entry.title, one.where))
                    + f": {struck(f'{one.was} {unit}'.strip())} &nbsp; "
                    + words(f"{one.now} {unit}, {one.reason}. {_who(job, one.by)}, ")
                    + words(shown_time(one.at))
                )
            for asked in getattr(entry, "kept", ()):
                lines.append(
                    words(
                        f"{name}{' '.join(asked.where)}: {asked.question} Kept: {asked.answer}. "
                        f"{_who(job, asked.by)}, {shown_time(asked.at)}"
                    )
                )
        lines += [
            words(f"{name}decided about {one.about}: {one.disposition}. {one.words} "
                  f"{_who(job, one.by)}, {shown_time(one.done_at)}")
            for one in attempt.decisions
        ]  # fmt: skip
        lines += [
            words(f"{name}{one.phrase.lower()}: {one.message}")
            for one in attempt.findings
            if one.verdict in (Verdict.OUTSIDE, Verdict.CANNOT_TELL)
            and one.rule.id not in ("runout-changed", "seat-came-back")
        ]
        lines += [
            words(f"{name}{_who(job, one.by)}, {shown_time(one.done_at)}: {one.words}")
            for one in attempt.entries
            if isinstance(one, Note | Handling) and one.words
        ]
    if not lines:
        return
    yield head(
        "Corrections, findings, notes",
        "nothing is erased: the first entry stands beside the one that replaced it",
    )
    for line in lines:
        yield text(line)


def _place_words(job: Job, title_: str, where: Sequence[str]) -> str:
    if title_ == "Runout survey" and len(where) == 2:
        mark = where[1]
        if mark.isdigit():
            mark = f"{job.plan.runout.marks[int(mark)].typed}°"
        return f"{where[0]} at {mark}"
    return f"{title_.lower()}, {' '.join(where)}"


def _who(job: Job, key: str) -> str:
    return next((one.name for one in job.people if one.key == key), key)


def _signatures(job: Job, attempt: Attempt) -> Flowable:
    meanings = ["performed", "inspected"]
    if any(point.role == "witness" for point in attempt.step.points) or any(
        one.meaning == "witnessed" for one in attempt.signatures
    ):
        meanings.append("witnessed")
    boxes = []
    for meaning in meanings:
        given = [one for one in attempt.signatures if one.meaning == meaning]
        if not given:
            boxes.append(Signed(meaning))
            continue
        person = job.person(given[-1].by)
        boxes.append(
            Signed(
                meaning,
                name=person.name,
                more=f"{person.role}, {person.employer or job.shop}".rstrip(", "),
                at=shown_time(given[-1].done_at),
                covers=given[-1].covers,
            )
        )
    return signatures(boxes)


# What the shaft did ---------------------------------------------------------------------------


def _what_the_shaft_did(
    view: Assessment, step: Step, pair: Sequence[Attempt]
) -> Iterator[Flowable]:
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
