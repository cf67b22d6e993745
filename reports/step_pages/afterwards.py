"""What followed a mount: cooling, removal, corrections, signatures."""

from collections.abc import Iterator, Sequence

from reportlab.platypus import Flowable

from models.assess import Attempt
from models.assess.soak import forecast_of
from models.job import Handling, Job, Note, Signature
from models.rules.rule import Verdict
from reports.front_pages import shown_time
from reports.parts import Cell, Signed, head, signatures, struck, text, words
from reports.signed import behind_words
from reports.step_pages.judged import judged_rows
from reports.step_pages.sizes import columns

__all__ = ["cooling", "corrections", "removals", "signature_boxes", "who"]


def cooling(job: Job, pair: Sequence[Attempt]) -> Iterator[Flowable]:
    """Give the temperatures read while the rotor cooled."""
    if not any(attempt.coolings for attempt in pair):
        return
    yield head("Cooling", "temperatures permit reading; a survey that agrees proves it")
    rows: list[tuple[str, list[Cell]]] = [
        ("may it be read", [judged_rows(attempt.of("may-be-read")) for attempt in pair])
    ]
    if any(attempt.of("second-survey-proves") for attempt in pair):
        judged = [judged_rows(attempt.of("second-survey-proves")) for attempt in pair]
        rows.append(("second survey", list(judged)))
    if any(forecast_of(job.plan, attempt.entries) for attempt in pair):
        rows.append(("watched", [_watched(job, attempt) for attempt in pair]))
    taken = [
        words(", ".join(shown_time(one.done_at)[5:16] for one in attempt.coolings)) or "–"
        for attempt in pair
    ]
    yield columns(pair, [*rows, ("taken", list(taken))], with_names=False)


def _watched(job: Job, attempt: Attempt) -> str:
    found = forecast_of(job.plan, attempt.entries)
    return "<br/>".join(words(one.sentence) for one in found) or "–"


def removals(job: Job, pair: Sequence[Attempt]) -> Iterator[Flowable]:
    """Give each removal with what was found."""
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


def corrections(job: Job, pair: Sequence[Attempt]) -> Iterator[Flowable]:
    """Give every correction and questioned reading, with both values."""
    lines: list[str] = []
    for attempt in pair:
        name = f"Attempt {attempt.number}, "
        for entry in attempt.entries:
            unit = getattr(entry, "unit", "")
            for one in getattr(entry, "corrections", ()):
                lines.append(
                    words(name + _place_words(job, entry.title, one.where))
                    + f": {struck(f'{one.was} {unit}'.strip())} &nbsp; "
                    + words(f"{one.now} {unit}, {one.reason}. {who(job, one.by)}, ")
                    + words(shown_time(one.at))
                )
            for asked in getattr(entry, "kept", ()):
                lines.append(
                    words(
                        f"{name}{' '.join(asked.where)}: {asked.question} Kept: {asked.answer}. "
                        f"{who(job, asked.by)}, {shown_time(asked.at)}"
                    )
                )
        lines += [
            words(f"{name}decided about {one.about}: {one.disposition}. {one.words} "
                  f"{who(job, one.by)}, {shown_time(one.done_at)}")
            for one in attempt.decisions
        ]  # fmt: skip
        lines += [
            words(f"{name}{one.phrase.lower()}: {one.message}")
            for one in attempt.findings
            if one.verdict in (Verdict.OUTSIDE, Verdict.CANNOT_TELL)
            and one.rule.id not in ("runout-changed", "seat-came-back")
        ]
        lines += [
            words(f"{name}{who(job, one.by)}, {shown_time(one.done_at)}: {one.words}")
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


def who(job: Job, key: str) -> str:
    """Name a person of the job."""
    return next((one.name for one in job.people if one.key == key), key)


def signature_boxes(job: Job, attempt: Attempt) -> Flowable:
    """Give the boxes under which people sign."""
    meanings = ["performed", "inspected"]
    if any(point.role == "witness" for point in attempt.step.points) or any(
        one.meaning == "witnessed" for one in (*attempt.signatures, *attempt.signatures_before)
    ):
        meanings.append("witnessed")
    boxes = []
    for meaning in meanings:
        given = [one for one in attempt.signatures if one.meaning == meaning]
        before = [one for one in attempt.signatures_before if one.meaning == meaning]
        if not given and before:
            boxes.append(_signed(job, before[-1], "for an earlier state; to sign again"))
            continue
        if not given:
            boxes.append(Signed(meaning))
            continue
        boxes.append(_signed(job, given[-1]))
    return signatures(boxes)


def _signed(job: Job, signature: Signature, more: str = "") -> Signed:
    person = job.person(signature.by)
    behind = behind_words(job, signature)
    return Signed(
        signature.meaning,
        name=person.name,
        more=f"{person.role}, {person.employer or job.shop}".rstrip(", "),
        at=shown_time(signature.done_at),
        covers="; ".join(part for part in (signature.covers, behind, more) if part),
    )
