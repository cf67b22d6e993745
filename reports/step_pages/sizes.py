"""Sizes and fit of a step, attempt beside attempt."""

from collections.abc import Iterator, Sequence

from reportlab.platypus import Flowable, Table

from models.assess import Attempt, ItemView, LandFit
from models.assess.land_limits import limits_of
from models.job import Job
from models.rules.rule import Finding, Verdict
from models.units import unit_set
from reports.job_pictures import fit_picture, verdict_kind
from reports.parts import Cell, gap, head, note, ranges, shape, table, text, words

__all__ = ["columns", "sizes"]


def sizes(
    job: Job, name: str, pair: Sequence[Attempt], views: Sequence[ItemView]
) -> Iterator[Flowable]:
    """Give sizes and interference of one item over the attempts."""
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
        limit = limits_of(views[0].fits[0].land).least
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


def columns(
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
