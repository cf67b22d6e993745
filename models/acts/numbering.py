"""Numbers for findings that somebody must decide: each is given once, and never again."""

from collections.abc import Iterable

from models.assess import Assessment, Standing, assess, finding_key
from models.assess.decided import covered_by
from models.job import AnyEntry, Job, NumberedFinding, Place, RunoutSurvey, VisualFinding
from models.record.act import Act
from models.record.finding_rows import add_numbered, next_finding_number
from models.rules.rule import Verdict

__all__ = ["number_findings", "number_of_entry"]


def number_findings(
    act: Act,
    view: Assessment,
    *,
    at: str,
    place: Place | None = None,
    rules: tuple[str, ...] | None = None,
) -> None:
    """Give a number to each finding that stands, is not answered and has none.

    One number stands for one rule in one attempt, however many stations it names: that is what a
    person decides. What is outside gets one always; what is in doubt only for the rules named.

    Parameters
    ----------
    act
        The act at whose gate they are given.
    view
        The job as it stands with this act.
    at
        The instant, as entries write it.
    place
        Only findings of this step and attempt, if named.
    rules
        Only findings of these rules, in doubt or outside.
    """
    if act.already_recorded:
        return
    chosen = [one for one in view.findings if _is_asked_for(one, place, rules)]
    numbered = list(view.job.numbered_findings)
    number = next_finding_number(act.session, act.chain_id)
    for one in chosen:
        if any(covered_by(two, finding_key(one.finding)) for two in numbered):
            continue
        numbered.append(_numbered(one, number, at))
        number += 1
    add_numbered(act, numbered[len(view.job.numbered_findings) :])


def number_of_entry(act: Act, job: Job, entry: AnyEntry, *, at: str) -> None:
    """Give numbers to what an entry brings to light at its own gate."""
    if act.already_recorded or (isinstance(entry, RunoutSurvey) and not entry.is_closed):
        return
    if isinstance(entry, VisualFinding):
        number_findings(act, assess(job), at=at, rules=("seen-conforms",))
    else:
        number_findings(act, assess(job), at=at, place=entry.place)


def _is_asked_for(one: Standing, place: Place | None, rules: Iterable[str] | None) -> bool:
    finding = one.finding
    if one.answered_by is not None:
        return False
    here = (finding.subject.step, finding.subject.attempt)
    if place is not None and here != (place.step, place.attempt):
        return False
    if rules is None:
        return finding.verdict is Verdict.OUTSIDE
    return finding.rule.id in rules and finding.verdict in (Verdict.OUTSIDE, Verdict.CANNOT_TELL)


def _numbered(one: Standing, number: int, at: str) -> NumberedFinding:
    finding = one.finding
    subject = finding.subject
    whole = finding_key(finding)
    about = whole
    # What people saw is told apart by where it was; a rule's many places are one thing to decide.
    of_attempt = subject.step is not None and subject.attempt is not None
    if of_attempt and finding.rule.id != "seen-conforms":
        about = f"{finding.rule.id}: step {subject.step}, attempt {subject.attempt}"
    return NumberedFinding(
        number=number,
        about=about,
        words=finding.message,
        opened_at=at,
        entry=subject.entry,
        step=subject.step,
        attempt=subject.attempt,
    )
