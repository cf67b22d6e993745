"""The only door: the demo job's next step through it, every wrong order refused by name."""

import shutil
from collections.abc import Iterator
from pathlib import Path
from typing import Any

import msgspec
import pytest

from models import jobfile
from models.acts import Acts, NotAllowedError, new_id
from models.assess import Assessment, assess
from models.job import (
    AnyEntry,
    AttemptOpened,
    AxialMeasured,
    Cooling,
    Decision,
    Mount,
    Note,
    Place,
    Removal,
    RunoutReading,
    RunoutSurvey,
    Settled,
    Signature,
    StationReadings,
)
from models.record.errors import HeadMovedError, RecordError
from models.record.store import Store
from models.record.verify import verify
from models.rules.progress import Act
from models.rules.rule import Verdict
from models.units import decode
from sample_data.load import compressor
from sample_data.next_steps import next_attempts

NUMBER = "26-0417"
FIRST, SECOND = next_attempts()
STEP = FIRST.step


def entries_of(told: Any) -> list[AnyEntry]:
    return [msgspec.convert(one, AnyEntry, dec_hook=decode) for one in told.entries]


AHEAD = [*entries_of(FIRST), *entries_of(SECOND)]


@pytest.fixture(scope="module")
def shop(tmp_path_factory: pytest.TempPathFactory) -> Path:
    folder = tmp_path_factory.mktemp("shop")
    with Store.open(folder) as store:
        Acts(store).bring_in(compressor(), by="AT", act_id="demo")
    return folder


@pytest.fixture
def acts(shop: Path, tmp_path: Path) -> Iterator[Acts]:
    # Nobody has the file open while it is copied.
    shutil.copytree(shop, tmp_path, dirs_exist_ok=True)
    with Store.open(tmp_path) as store:
        yield Acts(store)


def judged(acts: Acts) -> Assessment:
    return assess(acts.read(NUMBER))


def until(acts: Acts, kind: type, **which: object) -> AnyEntry:
    """Record what lies ahead up to an entry, which is given back unrecorded."""
    for entry in AHEAD:
        found = all(getattr(entry, name) == value for name, value in which.items())
        if isinstance(entry, kind) and found:
            return entry
        acts.record(NUMBER, entry)
    raise LookupError(kind)


def again(entry: AnyEntry, **change: Any) -> AnyEntry:
    return msgspec.structs.replace(entry, id=new_id(), **change)


def refusal(acts: Acts, entry: AnyEntry) -> str:
    before = acts.read(NUMBER)
    with pytest.raises(NotAllowedError) as refused:
        acts.record(NUMBER, entry)
    assert refused.value.words.endswith(".")
    assert acts.read(NUMBER) == before
    return refused.value.name


def test_the_next_step_goes_through_a_remount_to_within_limits(acts: Acts) -> None:
    for entry in AHEAD:
        acts.record(NUMBER, entry)

    view = judged(acts)
    failed, held = view.attempts_at(STEP)
    assert (failed.settled.outcome, held.settled.outcome) == ("removed", "within limits")
    assert failed.verdict_of("runout-changed") is Verdict.OUTSIDE
    assert held.verdict_of("runout-changed") is Verdict.WITHIN
    assert view.next.act is Act.OPEN_ATTEMPT
    assert view.next.step == "spacer-4"
    stored = {(one.rule, one.verdict, one.attempt) for one in view.job.verdicts}
    assert ("runout-changed", "outside", 1) in stored
    assert ("runout-changed", "within", 2) in stored


def test_a_verdict_is_stored_with_the_values_it_rests_on(acts: Acts) -> None:
    until(acts, Settled)

    settled = next(one for one in AHEAD if isinstance(one, Settled))
    acts.record(NUMBER, settled)
    stored = [one for one in acts.read(NUMBER).verdicts if one.rule == "runout-changed"]

    assert stored
    # The plan's limit, 0.0010 in, stands in SI beside the change it was compared with.
    assert all(one.inputs["limit"] == pytest.approx(25.4e-6) for one in stored)
    assert all(one.edition == 1 for one in stored)


def test_every_entry_that_comes_too_early_is_refused_by_name(acts: Acts) -> None:
    names: set[str] = set()
    attempt = entries_of(FIRST)
    mount = next(one for one in attempt if isinstance(one, Mount))
    survey = next(one for one in attempt if isinstance(one, RunoutSurvey))
    settled = next(one for one in attempt if isinstance(one, Settled))
    within = msgspec.structs.replace(settled, outcome="within limits")
    later: dict[type, tuple[AnyEntry, ...]] = {
        Mount: (survey, within),
        Cooling: (survey, within),
        RunoutSurvey: (within,),
    }
    for entry in attempt:
        if isinstance(entry, Removal):
            break
        for early in later.get(type(entry), (mount, survey, within)):
            # Temperatures once taken permit reading; where the part rests is asked for besides.
            if isinstance(entry, AxialMeasured):
                continue
            names.add(refusal(acts, again(early)))
        acts.record(NUMBER, entry)

    assert {
        "no-attempt-open",
        "sizes-missing",
        "not-confirmed-before-furnace",
        "bore-not-open",
        "not-confirmed-before-door",
        "part-not-on",
        "still-warm",
        "not-judged-within",
    } <= names


REFUSED_AT = [
    ("the next step while this one is open", Mount, "step-before-not-settled",
     lambda entry: AttemptOpened(**head(entry), place=place("spacer-4", 1))),
    ("a second attempt while the first is open", Mount, "attempt-open",
     lambda entry: AttemptOpened(**head(entry), place=place(STEP, 2))),
    ("a settled step again", AttemptOpened, "step-settled",
     lambda entry: AttemptOpened(**head(entry), place=place("spacer-3", 2))),
    ("settling what must come off", Removal, "remount-required",
     lambda entry: Settled(**head(entry), place=place(STEP, 1), outcome="within limits")),
    ("a bare shaft with parts on it", Mount, "shaft-not-bare",
     lambda entry: msgspec.structs.replace(next(one for one in AHEAD if isinstance(one,
         RunoutSurvey)), id=new_id(), place=Place(kind="bare shaft"), purpose="bare shaft")),
    ("a seat survey before anything came off", Removal, "nothing-removed",
     lambda entry: msgspec.structs.replace(next(one for one in AHEAD if isinstance(one,
         RunoutSurvey)), id=new_id(), purpose="bare seat")),
    ("a signature before anything is settled", Mount, "not-settled",
     lambda entry: Signature(**head(entry), place=place(STEP, 1), role="technician",
                             meaning="performed", covers="step 7")),
    ("an item that is not in the step", Mount, "no-such-item",
     lambda entry: msgspec.structs.replace(entry, id=new_id(), item="drum")),
    ("an unknown person", Mount, "person-unknown",
     lambda entry: msgspec.structs.replace(entry, id=new_id(), by="nobody")),
    ("an entry without a step", Mount, "no-step-named",
     lambda entry: msgspec.structs.replace(entry, id=new_id(), place=Place(kind="attempt"))),
    ("an old attempt", Mount, "not-the-latest-attempt",
     lambda entry: msgspec.structs.replace(entry, id=new_id(), place=place(STEP, 4))),
    ("a technician's decision", Mount, "role-may-not-decide",
     lambda entry: Decision(**head(entry), place=place(STEP, 1), about="x",
                            disposition="accept reading", words="it looks fine")),
    ("a correction of nothing", Mount, "nothing-to-correct",
     lambda entry: msgspec.structs.replace(entry, id=new_id(), supersedes="none", reason="x")),
    ("an outcome that is not true", Removal, "outcome-not-true",
     lambda entry: Settled(**head(entry), place=place(STEP, 1), outcome="removed")),
]  # fmt: skip


def head(entry: AnyEntry) -> dict[str, Any]:
    return {
        "id": new_id(),
        "by": "AT",
        "done_at": entry.done_at,
        "entered_at": entry.entered_at,
        "plan": entry.plan,
    }


def place(step: str, attempt: int) -> Place:
    return Place(kind="attempt", step=step, attempt=attempt)


@pytest.mark.parametrize(
    ("when", "name", "make"),
    [(when, name, make) for _, when, name, make in REFUSED_AT],
    ids=[what for what, *_ in REFUSED_AT],
)
def test_an_act_in_the_wrong_order_is_refused_by_name(
    acts: Acts, when: type, name: str, make: Any
) -> None:
    entry = until(acts, when)

    found = refusal(acts, make(entry))

    if name == "outcome-not-true":
        assert found in ("outcome-not-true", "remount-required")
    else:
        assert found == name


def test_what_already_happened_is_taken_with_its_reason_and_becomes_a_finding(acts: Acts) -> None:
    mount = until(acts, Mount)
    early = next(one for one in AHEAD if isinstance(one, RunoutSurvey))

    acts.record(NUMBER, again(early, out_of_order="read while the part still hung"))

    finding = next(
        one.finding
        for one in judged(acts).findings
        if one.finding.rule.id == "in-order" and one.finding.subject.step == STEP
    )
    assert finding.verdict is Verdict.CANNOT_TELL
    assert "read while the part still hung" in finding.message
    assert isinstance(mount, Mount)


@pytest.mark.parametrize("when", [Mount, Settled, RunoutSurvey])
def test_nothing_stands_before_a_removal(acts: Acts, when: type) -> None:
    until(acts, when)
    removal = next(one for one in AHEAD if isinstance(one, Removal))

    acts.record(NUMBER, again(removal))

    assert acts.read(NUMBER).entries[-1].title == "Removed"


ROLES = {"AT": "technician", "BQ": "inspector", "DO": "engineer", "ES": "witness"}
MEANINGS = {"performed": "AT", "inspected": "BQ", "witnessed": "ES"}


@pytest.mark.parametrize("person", ROLES)
@pytest.mark.parametrize("meaning", MEANINGS)
def test_a_signature_stands_only_under_the_role_that_gives_it(
    acts: Acts, person: str, meaning: str
) -> None:
    settled = until(acts, Settled)
    acts.record(NUMBER, settled)
    signature = Signature(
        **{**head(settled), "by": person},
        place=settled.place,
        role=ROLES[person],
        meaning=meaning,
        covers="step 7, attempt 1",
    )

    if MEANINGS[meaning] == person:
        acts.record(NUMBER, signature)
        assert acts.read(NUMBER).entries[-1].title == "Signed"
    else:
        assert refusal(acts, signature) == "role-not-held"


def test_nobody_signs_in_a_role_that_is_not_held(acts: Acts) -> None:
    settled = until(acts, Settled)
    acts.record(NUMBER, settled)
    signature = Signature(
        **head(settled), place=settled.place, role="inspector", meaning="inspected", covers="7"
    )

    assert refusal(acts, signature) == "role-not-held"


def test_a_retry_of_an_act_does_nothing_twice_even_when_the_order_has_moved_on(
    acts: Acts,
) -> None:
    mount = until(acts, Mount)

    first = acts.record(NUMBER, mount, act_id="m")
    second = acts.record(NUMBER, mount, act_id="m")

    assert first.sequence == second.sequence
    titles = [one.title for one in acts.read(NUMBER).entries]
    here = [one for one in acts.read(NUMBER).entries if one.place == mount.place]
    assert sum(one.title == "Mounted" for one in here) == 1
    assert titles


def test_an_act_judged_on_an_older_head_is_refused(acts: Acts) -> None:
    seen = acts.read(NUMBER).head
    assert seen is not None
    opening, *_ = AHEAD
    other = Note(**head(opening), place=opening.place, words="somebody else was here")
    acts.record(NUMBER, other)

    with pytest.raises(HeadMovedError):
        acts.record(NUMBER, opening, head=seen.sequence)


def test_a_correction_in_a_closed_survey_turns_the_verdicts_that_rested_on_it(acts: Acts) -> None:
    for entry in AHEAD:
        acts.record(NUMBER, entry)
    held = judged(acts).attempt(STEP, 2)
    assert held is not None
    assert held.judged is not None
    station = held.judged.entry.readings("E2")
    assert station is not None

    acts.add_reading(
        NUMBER,
        held.judged.entry.id,
        RunoutReading(station="E2", mark=4, typed="0.0060"),
        by="AT",
        act_id="late",
        reason="misread",
    )

    job = acts.read(NUMBER)
    turned = [one for one in job.verdicts if one.rule == "runout-changed" and one.attempt == 2]
    told = [one.verdict for one in turned if "E2" in one.message]
    assert told[0] == "within"
    assert told[-1] == "outside"
    survey = next(one for one in job.entries if one.id == held.judged.entry.id)
    assert survey.corrections[-1].was == station.typed[4]
    assert survey.corrections[-1].reason == "misread"


def test_a_correction_without_a_reason_is_refused(acts: Acts) -> None:
    for entry in AHEAD:
        acts.record(NUMBER, entry)
    survey = next(one for one in reversed(AHEAD) if isinstance(one, RunoutSurvey))

    with pytest.raises(RecordError, match="Say why"):
        acts.add_reading(
            NUMBER,
            survey.id,
            RunoutReading(station="E2", mark=4, typed="0.0060"),
            by="AT",
            act_id="late",
        )


def test_a_mount_completed_after_the_act_names_what_it_replaces(acts: Acts) -> None:
    mount = until(acts, Mount)
    assert isinstance(mount, Mount)
    hurried = msgspec.structs.replace(mount, shoulder="not judged")
    acts.record(NUMBER, hurried)

    assert refusal(acts, again(mount, supersedes=hurried.id)) == "reason-missing"
    acts.record(NUMBER, again(mount, supersedes=hurried.id, reason="felt after the act"))
    assert (
        refusal(acts, again(mount, supersedes=hurried.id, reason="once more"))
        == "corrected-already"
    )


def test_the_exported_file_of_the_record_gives_the_same_findings(acts: Acts) -> None:
    for entry in AHEAD:
        acts.record(NUMBER, entry)
    job = acts.read(NUMBER)

    from_file = assess(jobfile.loads(jobfile.dumps(job)))

    def said(view: Assessment) -> list[tuple[str, str, str]]:
        return [
            (one.finding.rule.id, one.finding.verdict.value, one.finding.message)
            for one in view.findings
        ]

    assert said(from_file) == said(assess(job))


def test_the_chain_is_whole_after_all_of_it(acts: Acts, tmp_path: Path) -> None:
    for entry in AHEAD:
        acts.record(NUMBER, entry)

    with Store.open(tmp_path) as store, store.reading() as session:
        assert verify(session).is_whole


def test_a_survey_of_a_station_that_the_plan_does_not_know_is_refused_by_name(acts: Acts) -> None:
    survey = next(one for one in AHEAD if isinstance(one, RunoutSurvey))
    strange = msgspec.structs.replace(
        survey, id=new_id(), stations=(StationReadings(station="Z9", typed=("0",)),)
    )
    with pytest.raises(NotAllowedError, match="knows no station Z9") as refused:
        acts.record(NUMBER, strange)
    assert refused.value.name == "station-unknown"


def test_a_station_that_the_plan_no_longer_names_is_left_unjudged(acts: Acts) -> None:
    """Such a survey can come in with a reason, or stand there from an earlier revision."""
    survey = next(one for one in AHEAD if isinstance(one, RunoutSurvey))
    strange = msgspec.structs.replace(
        survey,
        id=new_id(),
        stations=(*survey.stations, StationReadings(station="Z9", typed=("0",))),
        out_of_order="read before the plan was revised",
    )
    acts.record(NUMBER, strange)
    assert judged(acts).surveys[strange.id].station("Z9") is None
