"""A step's two pages: at the left what was done, at the right what the shaft did."""

from collections.abc import Iterator, Sequence

from reportlab.platypus import Flowable, PageBreak

from models.assess import Assessment, Attempt
from models.job import Step
from reports.page import EvenPage, NowAt
from reports.step_pages.afterwards import cooling, corrections, removals, signature_boxes
from reports.step_pages.balance import balance
from reports.step_pages.ending import ending, heading
from reports.step_pages.mounting import on_the_shaft
from reports.step_pages.runout import what_the_shaft_did
from reports.step_pages.sizes import sizes

__all__ = ["step_pages"]

_PER_SPREAD = 2


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
        yield from what_the_shaft_did(view, step, pair)


def _what_was_done(
    view: Assessment, step: Step, number: int, pair: Sequence[Attempt], *, is_last: bool
) -> Iterator[Flowable]:
    job = view.job
    yield heading(number, step, pair)
    for attempt in pair:
        yield ending(job, attempt)
    for index, item in enumerate(step.items):
        views = [attempt.items[index] for attempt in pair]
        if len(step.items) > 1 or views[0].fits:
            yield from sizes(job, item.name, pair, views)
        yield from on_the_shaft(job, item, pair, views)
    yield from cooling(job, pair)
    yield from balance(job, pair)
    yield from removals(job, pair)
    yield from corrections(job, pair)
    if is_last:
        yield signature_boxes(job, pair[-1])
