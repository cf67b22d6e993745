"""The traveler's pages on the record: points, waivers, numbered findings, parts, work outside."""

from collections.abc import Iterator

from reportlab.platypus import Flowable

from models.assess import Assessment, finding_key, live_entries
from models.assess.components import component_stories
from models.assess.decided import covered_by
from models.job import Attachment, PointEvent
from models.rules.rule import Verdict
from reports.front_pages import shown_time
from reports.parts import Cell, bold, head, note, table, words
from reports.told_words import TOLD, told_words

__all__ = ["record_pages"]

_POINTS = (
    "Hold: work does not pass without the signature. Witness: the party is told and may come; when "
    "nobody comes after the notice agreed, work goes on. Review: of papers only. Documents that "
    "say “witnessed” for what must wait mean a hold here."
)


def record_pages(view: Assessment) -> Iterator[Flowable]:
    """Print what stands in the record beside sizes, heat, mounts and runout."""
    yield from _points(view)
    yield from _waivers(view)
    yield from _numbered(view)
    yield from _components(view)
    yield from _told(view)
    yield from _instruments(view)


def _points(view: Assessment) -> Iterator[Flowable]:
    rows: list[list[Cell]] = []
    for step in view.job.plan.steps:
        attempts = view.attempts_at(step.key)
        states = attempts[-1].points if attempts else ()
        for state in states:
            told = "; ".join(
                f"{one.event} {shown_time(one.at)}" for one in state.events if one.event != "waived"
            )
            stands = state.how or (f"open: {state.lacks}" if state.lacks else "open")
            rows.append(
                [
                    words(f"{view.job.plan.step_number(step.key)}"),
                    bold(state.point.kind),
                    words(f"{state.point.what} ({state.point.role})"),
                    words(stands),
                    words(told),
                ]
            )
    if not rows:
        return
    yield head("Points", "who had to be there, and how each was passed")
    yield table(["step", "point", "what", "passed", "told"], rows, [10, 16, 56, 48, 42])
    yield note(words(_POINTS))


def _waivers(view: Assessment) -> Iterator[Flowable]:
    waivers = view.job.plan.waivers
    if not waivers:
        return
    yield head("Waivers that the plan agrees to")
    rows: list[list[Cell]] = [
        [bold(one.what), words(one.agreed_by), words(one.agreed_on), words(one.reason)]
        for one in waivers
    ]
    yield table(["what", "agreed by", "on", "because"], rows, [52, 40, 22, 58])


def _numbered(view: Assessment) -> Iterator[Flowable]:
    numbered = view.job.numbered_findings
    if not numbered:
        return
    yield head("Numbered findings", "a number is given once and never again")
    rows: list[list[Cell]] = []
    for one in numbered:
        mine = [two for two in view.findings if covered_by(one, finding_key(two.finding))]
        open_ = any(
            two.answered_by is None
            and two.finding.verdict in (Verdict.OUTSIDE, Verdict.CANNOT_TELL)
            for two in mine
        )
        answers = [two.answered_by for two in mine if two.answered_by is not None]
        stands = "open" if open_ else (answers[-1] if answers else "no longer found")
        rows.append(
            [bold(f"{one.number}"), words(one.words), words(shown_time(one.opened_at)),
             words(stands)]
        )  # fmt: skip
    yield table(["", "finding", "opened", "how it stands"], rows, [10, 84, 30, 48])


def _components(view: Assessment) -> Iterator[Flowable]:
    stories = component_stories(view.job, live_entries(view.job), view.attempts)
    if not stories:
        return
    yield head("Components", "each physical part, and each heat it has seen")
    rows: list[list[Cell]] = []
    for one in stories:
        part = one.component
        heats = "; ".join(
            f"{shown_time(heat.done_at)[:10]}, attempt {heat.attempt}, {heat.hottest}".rstrip(", ")
            for heat in one.heats
        )
        papers = ", ".join(
            each for each in (part.certificate, *(doc.name for doc in one.documents)) if each
        )
        name = part.name
        if part.substitute_for is not None:
            approved = f", approved by {part.approved_by}" if part.approved_by else ", not approved"
            name += f", in place of {part.substitute_for}{approved}"
        rows.append(
            [
                bold(part.serial),
                words(name),
                words(f"{part.drawing} {part.revision}".strip()),
                words(papers),
                words(", ".join(each for each in (part.balance, part.key_convention) if each)),
                words(heats),
            ]
        )
    yield table(["serial", "part", "drawing", "papers", "balance, key", "heats"], rows,
                [22, 40, 30, 24, 24, 32])  # fmt: skip


def _told(view: Assessment) -> Iterator[Flowable]:
    job = view.job
    found = [
        one for one in job.entries if isinstance(one, TOLD) and not isinstance(one, PointEvent)
    ]
    if not found:
        return
    names = {one.key: one.name for one in job.people}
    yield head("Seen, sent off, tightened, attached")
    rows: list[list[Cell]] = [
        [
            words(shown_time(one.done_at)),
            words(names.get(one.by, one.by)),
            bold(one.title),
            words(told_words(one)),
        ]
        for one in found
    ]
    yield table(["when", "who", "", "what"], rows, [32, 30, 22, 88])
    if any(isinstance(one, Attachment) for one in found):
        yield note(
            words(
                "Attached files lie beside the record under their digest; thirdjournal verify "
                "tells by name which is missing or changed."
            )
        )


def _instruments(view: Assessment) -> Iterator[Flowable]:
    events = view.job.instrument_events
    if not events:
        return
    yield head("Instruments found out", "readings made since are in doubt until somebody decides")
    rows: list[list[Cell]] = [
        [bold(one.tag), words(one.last_good_on), words(one.found_on), words(one.words)]
        for one in events
    ]
    yield table(["instrument", "last good", "found out", "what"], rows, [28, 26, 26, 92])
