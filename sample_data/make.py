"""Make the job files of the two invented rotors anew: ``python -m sample_data.make``."""

import datetime
from collections.abc import Mapping
from pathlib import Path

from models import jobfile
from models.job import Component, Job, Plan
from sample_data import beside, compressor_plan, pump_plan
from sample_data.calendar import ShopClock
from sample_data.shop import AMERICAN, EUROPEAN, Shop
from sample_data.story import Story
from sample_data.truth import COMPRESSOR, PUMP

__all__ = ["FILES", "compressor_job", "compressor_story", "made", "pump_job", "pump_story"]

FILES: Mapping[str, str] = {"compressor": "compressor.job.json", "pump": "pump.job.json"}
"""The job files by the name of their rotor."""


def compressor_story() -> Story:
    """Tell the compressor's build up to the step that is taken at the bench."""
    clock = ShopClock(
        datetime.datetime(2026, 10, 14, 7, 5),
        offset_hours=-5,
        clocks_back_on=datetime.date(2026, 11, 1),
    )
    plan = compressor_plan.PLAN
    story = Story(
        truth=COMPRESSOR,
        plan=plan,
        shop=AMERICAN,
        components=_components(plan, "HR-4471"),
        clock=clock,
    )
    story.bare_shaft()
    hub = next(one.serial for one in story.components if one.item == "hub")
    sent = beside.send_off(story, subject=hub, what="dye penetrant test of the hub's bore")
    for key in compressor_plan.BUILT:
        story.step(key, after_a_weekend=key == compressor_plan.AFTER_A_WEEKEND)
        if key == "impeller-2":
            beside.take_back(story, sent)
    return story


def pump_story() -> Story:
    """Tell the pump's build from the bare shaft to the last signature."""
    clock = ShopClock(
        datetime.datetime(2026, 10, 19, 6, 45),
        offset_hours=2,
        clocks_back_on=datetime.date(2026, 10, 25),
    )
    plan = pump_plan.PLAN
    story = Story(
        truth=PUMP, plan=plan, shop=EUROPEAN, components=_components(plan, "EG-318"), clock=clock
    )
    story.bare_shaft()
    for step in plan.steps:
        story.step(step.key)
    story.final()
    return story


def _components(plan: Plan, prefix: str) -> tuple[Component, ...]:
    items = [item for step in plan.steps for item in step.items]
    return tuple(
        Component(
            serial=f"{prefix}-{number:02d}",
            name=item.name,
            item=item.key,
            drawing=f"{prefix}-{100 + number}, invented",
            revision="A",
            certificate="3.1, invented" if item.kind == "hot" else "",
            balance="balanced alone, half key" if item.keyed else "",
        )
        for number, item in enumerate(items, start=1)
    )


def _job(number: str, customer: str, shop: Shop, story: Story) -> Job:
    return Job(
        number=number,
        customer=customer,
        shop=shop.name,
        opened_at=story.plan.issued_at,
        people=shop.people,
        instruments=shop.instruments,
        components=story.components,
        plans=(story.plan,),
        entries=tuple(story.entries),
    )


def compressor_job(story: Story) -> Job:
    """Put the compressor's story, as far as it is told, into a job."""
    return _job("26-0417", "Saltmarsh Gas Transmission (invented)", AMERICAN, story)


def pump_job(story: Story) -> Job:
    """Put the pump's story, as far as it is told, into a job."""
    return _job("EG-2026-61", "Quellverband Obertal (invented)", EUROPEAN, story)


def made() -> dict[str, bytes]:
    """Make both job files, as bytes by the name of their rotor."""
    jobs = {"compressor": compressor_job(compressor_story()), "pump": pump_job(pump_story())}
    return {name: jobfile.dumps(job) for name, job in jobs.items()}


def _rewrite() -> None:
    for name, data in made().items():
        Path(__file__).with_name(FILES[name]).write_bytes(data)


if __name__ == "__main__":
    _rewrite()
