"""The rotor's story for a visitor: each mount before and after, what was remounted and why."""

from __future__ import annotations

from dataclasses import dataclass

from PySide6.QtCore import QObject, Signal

from app.presenters.attempt_picture import (
    AttemptPicture,
    attempt_picture,
    attempt_sentence,
    bare_picture,
    bend_sentence,
)
from app.presenters.shop import ShopPresenter
from app.presenters.wording import day_and_time, in_words
from models.assess import Assessment, Attempt
from models.job import Removal
from models.rules.rule import Verdict
from reports.job_pictures import verdict_kind
from reports.sheet.pictures import VerdictKind

__all__ = ["Asked", "Chapter", "StoryPresenter"]


@dataclass(frozen=True, kw_only=True)
class Asked:
    """Something the plan asks of the witness."""

    what: str
    words: str
    kind: VerdictKind


@dataclass(frozen=True, kw_only=True)
class Chapter:
    """One survey of the story: the bare shaft, or an attempt at a step."""

    title: str
    subtitle: str
    kind: VerdictKind
    outcome: str
    sentences: tuple[str, ...]
    asked: tuple[Asked, ...] = ()
    step: str | None = None
    attempt: int = 0


class StoryPresenter(QObject):
    """Tells the job on the desks in chapters; records nothing."""

    changed = Signal()
    """The story has another chapter, or is another one."""

    def __init__(self, shop: ShopPresenter, parent: QObject | None = None) -> None:
        super().__init__(parent)
        self._shop = shop
        shop.job_changed.connect(self.changed)

    @property
    def empty_words(self) -> str:
        """What to say where there is no story yet."""
        if self._shop.view is not None:
            return "Nothing has been mounted yet; the plan is on its own desk."
        if self._shop.job_number:
            return f"working: job {self._shop.job_number} is being worked out"
        return "No job lies on the desks. Choose one at the Jobs desk."

    @property
    def heading(self) -> str:
        """Whose rotor it is."""
        view = self._shop.view
        if view is None:
            return ""
        rotor = view.job.plan.rotor
        invented = " (invented)" if rotor.invented else ""
        return f"{rotor.name}, {rotor.serial}{invented}"

    @property
    def summary(self) -> str:
        """How far the build is, and how often something came off again."""
        view = self._shop.view
        if view is None:
            return ""
        settled = [one for one in view.attempts if _is_settled(one)]
        off = [one for one in view.attempts if one.settled and one.settled.outcome == "removed"]
        steps = len(view.job.plan.steps)
        words = f"{len(settled)} of {steps} steps are settled."
        if not off:
            return f"{words} Nothing had to come off again."
        came = "One mount came off" if len(off) == 1 else f"{len(off)} mounts came off"
        return f"{words} {came} and went on again."

    @property
    def chapters(self) -> tuple[Chapter, ...]:
        """The bare shaft, then every attempt in the order of the work."""
        view = self._shop.view
        if view is None or (view.bare_shaft is None and not view.attempts):
            return ()
        first = (_bare_chapter(view),) if view.bare_shaft is not None else ()
        return (*first, *(_chapter(view, one) for one in view.attempts))

    def picture(self, chapter: Chapter) -> AttemptPicture | None:
        """Draw a chapter.

        Parameters
        ----------
        chapter : Chapter
            The chapter.

        Returns
        -------
        AttemptPicture or None
            None where the job no longer has it.
        """
        view = self._shop.view
        if view is None:
            return None
        if chapter.step is None:
            return bare_picture(view)
        found = view.attempt(chapter.step, chapter.attempt)
        return attempt_picture(view, found) if found is not None else None


def _is_settled(attempt: Attempt) -> bool:
    return attempt.settled is not None and attempt.settled.outcome != "removed"


def _bare_chapter(view: Assessment) -> Chapter:
    assert view.bare_shaft is not None
    entry = view.bare_shaft.entry
    return Chapter(
        title="The bare shaft",
        subtitle=day_and_time(entry.done_at),
        kind=VerdictKind.WITHIN if entry.is_closed else VerdictKind.NOT_JUDGED,
        outcome="surveyed",
        sentences=("Every later survey is compared with this one.",),
    )


def _chapter(view: Assessment, attempt: Attempt) -> Chapter:
    number = view.job.plan.step_number(attempt.step.key)
    again = f", attempt {attempt.number}" if len(view.attempts_at(attempt.step.key)) > 1 else ""
    outcome = attempt.settled.outcome if attempt.settled is not None else "under way"
    when = attempt.settled.done_at if attempt.settled is not None else attempt.opened.done_at
    words = {"removed": "came off again", "conceded": "settled under a concession"}
    sentences = [in_words(view.job, attempt_sentence(attempt))]
    if outcome == "removed":
        sentences += bend_sentence(attempt)
    sentences += _removal_sentences(attempt)
    known = [one for one in (attempt.verdict_of("runout-changed"), attempt.home()) if one]
    worst = Verdict.worst(known) if known else None
    return Chapter(
        title=f"Step {number}, {attempt.step.title}{again}",
        subtitle=day_and_time(when),
        kind=verdict_kind(worst),
        outcome=words.get(outcome, outcome),
        sentences=tuple(sentences),
        asked=_asked(attempt),
        step=attempt.step.key,
        attempt=attempt.number,
    )


def _removal_sentences(attempt: Attempt) -> list[str]:
    names = {view.item.key: view.item.name for view in attempt.items}
    return [
        f"{names.get(one.item, one.item)} was taken off ({one.method})."
        + (f" Found: {one.found.rstrip('.')}." if one.found else "")
        for one in attempt.entries
        if isinstance(one, Removal)
    ]


def _asked(attempt: Attempt) -> tuple[Asked, ...]:
    signed = [one for one in attempt.signatures if one.meaning == "witnessed"]
    asked = []
    for point in attempt.step.points:
        if point.role != "witness":
            continue
        if signed:
            kind, words = VerdictKind.WITHIN, f"signed {day_and_time(signed[-1].done_at)}"
        elif not _is_settled(attempt):
            kind, words = VerdictKind.NOT_JUDGED, "to be signed once the step is settled"
        else:
            kind, words = VerdictKind.LOOK, f"waits for your name; {_hold_words(point.kind)}"
        asked.append(Asked(what=f"{point.kind} point: {point.what}", words=words, kind=kind))
    return tuple(asked)


def _hold_words(kind: str) -> str:
    if kind == "hold":
        return "work does not go past it before that"
    return "work may go on once you were invited"
