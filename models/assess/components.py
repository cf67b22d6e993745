"""What each physical component has been through: positions held, heats seen, papers."""

from collections.abc import Sequence
from dataclasses import dataclass

from models.assess.attempts import Attempt
from models.job import AnyEntry, Attachment, Component, Heating, Job

__all__ = ["ComponentStory", "HeatSeen", "component_stories"]


@dataclass(frozen=True)
class HeatSeen:
    """One heat of a component: when, in which attempt, how, and the hottest that was measured."""

    step: str
    attempt: int
    done_at: str
    method: str
    hottest: str


@dataclass(frozen=True)
class ComponentStory:
    """A component with each heat it has seen and the documents that belong to it."""

    component: Component
    attempts: tuple[tuple[str, int], ...]
    heats: tuple[HeatSeen, ...]
    documents: tuple[Attachment, ...]


def component_stories(
    job: Job, entries: Sequence[AnyEntry], attempts: Sequence[Attempt]
) -> tuple[ComponentStory, ...]:
    """Tell of every component, in the order of the job.

    Parameters
    ----------
    job : Job
        The job.
    entries : sequence of entries
        Entries that nothing replaces.
    attempts : sequence of Attempt
        The attempts as worked out.
    """
    return tuple(_story(one, entries, attempts) for one in job.components)


def _story(
    component: Component, entries: Sequence[AnyEntry], attempts: Sequence[Attempt]
) -> ComponentStory:
    held: list[tuple[str, int]] = []
    heats: list[HeatSeen] = []
    for attempt in attempts:
        # A position holds one component; the attempt says which where that was told.
        mine = [one for one in attempt.items if one.serial == component.serial]
        if not mine:
            continue
        held.append((attempt.step.key, attempt.number))
        keys = {one.item.key for one in mine}
        heats += [
            HeatSeen(attempt.step.key, attempt.number, one.done_at, one.method, _hottest(one))
            for one in attempt.entries
            if isinstance(one, Heating) and one.item in keys
        ]
    papers = tuple(
        one for one in entries if isinstance(one, Attachment) and one.about == component.serial
    )
    return ComponentStory(component, tuple(held), tuple(heats), papers)


def _hottest(heating: Heating) -> str:
    hottest = max(heating.temperatures, key=lambda one: one.temperature.si, default=None)
    return hottest.temperature.written if hottest is not None else ""
