"""The traveler: its story from top to bottom, and nothing else."""

import os
from collections.abc import Iterator
from pathlib import Path

from reportlab.platypus import Flowable, PageBreak

from models.assess import Assessment
from reports.back_pages import closing, raw_readings
from reports.front_pages import bare_shaft, conventions, cover, instruments_and_people, limits
from reports.page import Foot, build
from reports.rotor_page import on_its_journals
from reports.step_pages import step_pages

__all__ = ["render", "write"]


def _story(view: Assessment) -> list[Flowable]:
    return list(_pages(view))


def _pages(view: Assessment) -> Iterator[Flowable]:
    yield from cover(view)
    yield from conventions(view)
    yield PageBreak()
    yield from limits(view)
    yield from instruments_and_people(view)
    yield PageBreak()
    yield from bare_shaft(view)
    yield from on_its_journals(view)
    for step in view.job.plan.steps:
        yield from step_pages(view, step)
    yield from closing(view)
    yield from raw_readings(view)


def _foot(view: Assessment) -> Foot:
    job = view.job
    rotor = job.plan.rotor
    head = job.head
    return Foot(
        rotor=rotor.serial + (" (invented)" if rotor.invented else ""),
        rotor_more=rotor.name,
        job=f"{job.number}, plan {job.plan.revision}",
        job_more=f"issued {job.plan.issued_at[:10]}",
        head=" ".join(head.digest[at : at + 4] for at in (0, 4, 8, 12)) if head else "none",
        head_more=f"entries 1 to {head.sequence}" if head else "made from a job file",
        title=f"Traveler {rotor.serial}, job {job.number}",
        author=job.shop or "Third Journal",
    )


def render(view: Assessment, *, size: str = "A4") -> bytes:
    """Set the traveler of a job; equal jobs give equal bytes.

    `size` is `A4` or `Letter`; both carry the same block.
    """
    return build(lambda: _story(view), _foot(view), size=size)


def write(view: Assessment, path: Path, *, size: str = "A4") -> None:
    """Write the traveler beside its place and move it there whole, so that no half one is left."""
    beside = path.with_name(path.name + ".part")
    try:
        with beside.open("wb") as file:
            file.write(render(view, size=size))
            file.flush()
            os.fsync(file.fileno())
        beside.replace(path)
    finally:
        beside.unlink(missing_ok=True)
