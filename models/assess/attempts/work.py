"""Sort, work out and judge the entries of an attempt."""

from collections.abc import Sequence
from dataclasses import replace
from functools import lru_cache

from models.assess.attempts.findings import attempt_findings
from models.assess.attempts.view import Attempt, ItemView
from models.assess.balance import balance_view
from models.assess.draw_up import drawn_up, taper_fits
from models.assess.ground import Ground, ground_of
from models.assess.heat import item_heat
from models.assess.points import point_states
from models.assess.runout import compare_surveys, read_survey, where_the_bend_sits
from models.assess.signed import given_for_now
from models.assess.sizes import land_fit
from models.assess.strength_work import fit_strength
from models.job import (
    AnyEntry,
    AttemptOpened,
    AxialMeasured,
    Confirmation,
    Cooling,
    Decision,
    Heating,
    Item,
    Job,
    Mount,
    PointEvent,
    Removal,
    RunoutSurvey,
    Settled,
    SizeSurvey,
)

__all__ = ["assess_attempt"]


def assess_attempt(
    job: Job,
    opened: AttemptOpened,
    entries: Sequence[AnyEntry],
    earlier_sizes: Sequence[SizeSurvey],
    baseline: RunoutSurvey | None,
    bare_shaft: RunoutSurvey | None,
    earlier_balance: Sequence[AnyEntry] = (),
    point_events: Sequence[PointEvent] = (),
) -> Attempt:
    """Sort, work out and judge one attempt.

    An attempt that was worked out before from the same facts is not worked out again: all of it is
    frozen, so that a new entry costs its own attempt only.
    """
    ground = ground_of(job)
    return _assess_attempt(
        ground,
        opened,
        tuple(entries),
        tuple(earlier_sizes),
        baseline,
        bare_shaft,
        tuple(earlier_balance),
        tuple(point_events),
    )


@lru_cache(maxsize=1024)
def _assess_attempt(
    ground: Ground,
    opened: AttemptOpened,
    entries: tuple[AnyEntry, ...],
    earlier_sizes: tuple[SizeSurvey, ...],
    named_baseline: RunoutSurvey | None,
    bare_shaft: RunoutSurvey | None,
    earlier_balance: tuple[AnyEntry, ...],
    point_events: tuple[PointEvent, ...],
) -> Attempt:
    job = ground.job
    step = job.plan.step(opened.place.step or "")
    mine = tuple(read_survey(job, one) for one in entries if isinstance(one, RunoutSurvey))
    fresh = [one for one in mine if one.entry.purpose == "before" and one.entry.is_closed]
    baseline = read_survey(job, named_baseline) if named_baseline else None
    baseline = fresh[-1] if fresh else baseline
    closing = [
        one for one in mine if one.entry.purpose in ("after", "again") and one.entry.is_closed
    ]
    judged = closing[-1] if closing else None
    seat = [one for one in mine if one.entry.purpose == "bare seat" and one.entry.is_closed]
    changes = compare_surveys(job, baseline, judged) if baseline and judged else ()
    bare = read_survey(job, bare_shaft) if bare_shaft else None
    settled = [one for one in entries if isinstance(one, Settled)]
    signed_now, signed_before = given_for_now(entries)
    attempt = Attempt(
        plan=job.plan,
        step=step,
        number=opened.place.attempt or 1,
        opened=opened,
        entries=entries,
        items=tuple(_item_view(job, item, opened, entries, earlier_sizes) for item in step.items),
        coolings=tuple(one for one in entries if isinstance(one, Cooling)),
        baseline=baseline,
        surveys=mine,
        judged=judged,
        changes=changes,
        kink=where_the_bend_sits(job, changes),
        seat_survey=seat[-1] if seat else None,
        drift=compare_surveys(job, bare, judged) if bare and judged else (),
        settled=settled[-1] if settled else None,
        signatures=signed_now,
        balance=balance_view(job, entries, earlier_balance),
        signatures_before=signed_before,
        decisions=tuple(one for one in entries if isinstance(one, Decision)),
        points=point_states(step, signed_now, point_events),
        findings=(),
    )
    return replace(attempt, findings=tuple(attempt_findings(job, attempt)))


def _item_view(
    job: Job,
    item: Item,
    opened: AttemptOpened,
    entries: Sequence[AnyEntry],
    earlier_sizes: Sequence[SizeSurvey],
) -> ItemView:
    own = [one for one in entries if isinstance(one, SizeSurvey)]
    # Sizes taken before the first attempt serve it; once the part has been on, new ones are due.
    sizes = [*earlier_sizes, *own] if opened.place.attempt == 1 else own
    drawn = drawn_up(job, item, entries)
    if drawn is not None:
        fits = taper_fits(item, drawn)
    else:
        fits = tuple(land_fit(job, item, land, sizes) for land in item.lands)
    heatings = [one for one in entries if isinstance(one, Heating)]
    mounts = [one for one in entries if isinstance(one, Mount) and one.item == item.key]
    removals = [one for one in entries if isinstance(one, Removal) and one.item == item.key]
    serials = dict(opened.components)
    held = [one.serial for one in job.components if one.item == item.key]
    return ItemView(
        item=item,
        serial=serials.get(item.key, held[-1] if held else None),
        fits=fits,
        strength=fit_strength(job.plan, item, fits),
        heat=item_heat(job, item, fits, heatings) if item.kind == "hot" else None,
        mount=mounts[-1] if mounts else None,
        axial=tuple(
            one for one in entries if isinstance(one, AxialMeasured) and one.item == item.key
        ),
        removal=removals[-1] if removals else None,
        confirmations=tuple(
            one for one in entries if isinstance(one, Confirmation) and one.item == item.key
        ),
        drawn_up=drawn,
    )
