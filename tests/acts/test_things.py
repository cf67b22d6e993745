"""Points, instruments, things seen, decisions, late entries and attachments, through the door."""

import hashlib
import shutil
from collections.abc import Iterator
from datetime import datetime, timedelta
from pathlib import Path
from typing import Any

import msgspec
import pytest

from models.acts import Acts, Instruments, NotAllowedError, new_id
from models.assess import Assessment, assess, finding_key
from models.job import (
    AgreedWaiver,
    AnyEntry,
    Attachment,
    AttemptOpened,
    Calibration,
    Decision,
    Job,
    Note,
    OutsideOperation,
    Place,
    Point,
    PointEvent,
    Settled,
    Signature,
    VisualFinding,
)
from models.record.files import AttachedFileError
from models.record.store import Store
from models.record.verify import verify
from models.rules.rule import Verdict
from models.units import Duration, decode
from sample_data.load import compressor
from sample_data.next_steps import next_attempts

NUMBER = "26-0417"
TOLD = next_attempts()
STEP = TOLD[0].step
AHEAD: list[AnyEntry] = [
    msgspec.convert(one, AnyEntry, dec_hook=decode) for told in TOLD for one in told.entries
]
WITNESS = Point(
    kind="witness", role="witness", what="runout of the wheel", notice=Duration.read("48 h")
)


def _with_points(job: Job) -> Job:
    plan = job.plan
    steps = tuple(
        msgspec.structs.replace(one, points=(*one.points, WITNESS)) if one.key == STEP else one
        for one in plan.steps
    )
    # What the invented build tells by itself is left out: each test tells its own.
    entries = tuple(
        one
        for one in job.entries
        if not isinstance(one, VisualFinding | OutsideOperation | Attachment)
    )
    plans = (msgspec.structs.replace(plan, steps=steps),)
    return msgspec.structs.replace(job, plans=plans, entries=entries)


JOB = _with_points(compressor())
PEOPLE = {role: next(one for one in JOB.people if one.role == role)
          for role in ("technician", "inspector", "engineer", "witness")}  # fmt: skip


@pytest.fixture(scope="module")
def shop(tmp_path_factory: pytest.TempPathFactory) -> Path:
    folder = tmp_path_factory.mktemp("shop")
    with Store.open(folder) as store:
        acts = Acts(store)
        acts.bring_in(JOB, by="AT", act_id="demo")
        for entry in AHEAD:
            acts.record(NUMBER, entry)
    return folder


@pytest.fixture
def store(shop: Path, tmp_path: Path) -> Iterator[Store]:
    # Nobody has the file open while it is copied.
    shutil.copytree(shop, tmp_path, dirs_exist_ok=True)
    with Store.open(tmp_path) as opened:
        yield opened


@pytest.fixture
def acts(store: Store) -> Acts:
    return Acts(store)


LAST = AHEAD[-1]
AFTER = datetime.fromisoformat(LAST.entered_at)


def at(hours: float) -> str:
    return (AFTER + timedelta(hours=hours)).isoformat()


def common(role: str, hours: float, **more: Any) -> dict[str, Any]:
    return {
        "id": new_id(),
        "place": LAST.place,
        "by": PEOPLE[role].key,
        "done_at": at(hours),
        "entered_at": at(hours),
        "plan": JOB.plan.revision,
        **more,
    }


def event(role: str, what: str, hours: float, **more: Any) -> PointEvent:
    named = {"point_kind": "witness", "point_role": "witness", "what": WITNESS.what}
    return PointEvent(
        **common(role, hours), **named, event=what, at=at(hours), **{"who": "Customer", **more}
    )


def refused(acts: Acts, entry: AnyEntry) -> str:
    before = acts.read(NUMBER)
    with pytest.raises(NotAllowedError) as caught:
        acts.record(NUMBER, entry)
    assert caught.value.words.endswith(".")
    assert acts.read(NUMBER) == before
    return caught.value.name


def next_attempt(hours: float) -> AttemptOpened:
    place = Place(kind="attempt", step="spacer-4", attempt=1)
    return AttemptOpened(**common("technician", hours, place=place))


def judged(acts: Acts) -> Assessment:
    return assess(acts.read(NUMBER))


def findings(view: Assessment, rule_id: str) -> list[Any]:
    return [one for one in view.findings if one.finding.rule.id == rule_id]


# Points


def test_a_witness_point_stops_what_comes_after_until_somebody_was_invited(acts: Acts) -> None:
    assert refused(acts, next_attempt(1)) == "point-open"


@pytest.mark.parametrize(("hours", "passes"), [(47.9, False), (48.0, True), (72.0, True)])
def test_absence_passes_a_witness_point_after_the_notice_agreed(
    acts: Acts, hours: float, passes: bool
) -> None:
    acts.record(NUMBER, event("inspector", "invited", 0, how="letter 7"))
    assert refused(acts, next_attempt(1)) == "point-open"
    acts.record(NUMBER, event("inspector", "did not come", hours))

    if passes:
        acts.record(NUMBER, next_attempt(hours + 1))
        (points,) = [
            one.finding
            for one in findings(judged(acts), "points-signed")
            if one.finding.subject.step == STEP
        ]
        assert "letter 7 and did not come" in points.message
    else:
        assert refused(acts, next_attempt(hours + 1)) == "point-open"


def test_who_came_must_sign_or_waive(acts: Acts) -> None:
    acts.record(NUMBER, event("inspector", "invited", 0))
    acts.record(NUMBER, event("inspector", "came", 50))

    assert refused(acts, next_attempt(51)) == "point-open"

    acts.record(
        NUMBER,
        Signature(**common("witness", 51), role="witness", meaning="witnessed", covers="runout"),
    )
    acts.record(NUMBER, next_attempt(52))


@pytest.mark.parametrize(
    ("role", "how", "allowed"),
    [
        ("technician", "letter 9", False),
        ("engineer", "letter 9", False),
        ("inspector", "", False),
        ("inspector", "letter 9", True),
        ("witness", "", True),
    ],
)
def test_a_waiver_is_given_by_who_may(acts: Acts, role: str, how: str, allowed: bool) -> None:
    waiver = event(role, "waived", 1, how=how)
    if not allowed:
        assert refused(acts, waiver) == "may-not-waive"
        return
    acts.record(NUMBER, waiver)
    acts.record(NUMBER, next_attempt(2))


def test_a_point_that_the_plan_does_not_have_is_refused(acts: Acts) -> None:
    stray = msgspec.structs.replace(event("inspector", "invited", 0), what="something else")
    assert refused(acts, stray) == "no-such-point"


def test_an_invitation_leaves_the_signatures_standing(acts: Acts) -> None:
    before = judged(acts).attempts_at(STEP)[-1].signatures
    acts.record(NUMBER, event("inspector", "invited", 0))
    assert judged(acts).attempts_at(STEP)[-1].signatures == before != ()


# Separation


def test_whoever_invites_and_looks_may_still_inspect(acts: Acts) -> None:
    acts.record(NUMBER, event("inspector", "invited", 0))
    acts.record(NUMBER, msgspec.structs.replace(seen(), by=PEOPLE["inspector"].key))
    inspected = Signature(
        **common("inspector", 2), role="inspector", meaning="inspected", covers="all"
    )
    acts.record(NUMBER, inspected)
    assert inspected.id in {one.id for one in acts.read(NUMBER).entries}


def test_an_agreed_waiver_in_the_plan_lets_a_performer_inspect_and_is_told(
    tmp_path: Path,
) -> None:
    waiver = AgreedWaiver(
        what="whoever performed may inspect",
        agreed_by="Customer",
        agreed_on="2026-10-01",
        reason="two people only",
    )
    people = tuple(
        msgspec.structs.replace(one, role="inspector") if one.role == "technician" else one
        for one in JOB.people
    )
    for waivers, allowed in (((), False), ((waiver,), True)):
        plan = msgspec.structs.replace(JOB.plan, waivers=waivers)
        # The same hands, once taken for inspectors: only the waiver makes the difference.
        job = msgspec.structs.replace(JOB, people=people, plans=(plan,))
        folder = tmp_path / str(allowed)
        folder.mkdir()
        with Store.open(folder) as opened:
            mine = Acts(opened)
            mine.bring_in(job, by=PEOPLE["inspector"].key, act_id="in")
            done = next(
                one
                for one in reversed(job.entries)
                if isinstance(one, Settled) and one.outcome != "removed"
            )
            entry = Signature(
                **{**common("technician", 1, place=done.place), "by": done.by},
                role="inspector",
                meaning="inspected",
                covers="it",
            )
            if not allowed:
                assert refused(mine, entry) == "performer-cannot-inspect"
                continue
            mine.record(NUMBER, entry)
            told = [
                one.finding
                for one in findings(judged(mine), "performer-not-inspector")
                if "as the plan agrees" in one.finding.message
            ]
            assert told
            assert all(one.verdict is Verdict.WITHIN for one in told)


# Things seen, numbers and decisions


def seen(hours: float = 1, **more: Any) -> VisualFinding:
    facts = {
        "subject": "HR-4471-07",
        "seen_at": "bore, rear land",
        "words": "Scratch",
        "weight": "does not conform",
        **more,
    }
    return VisualFinding(**common("technician", hours), **facts)


def test_what_does_not_conform_gets_a_number_that_is_never_given_again(acts: Acts) -> None:
    first = len(acts.read(NUMBER).numbered_findings)
    for words in ("Scratch", "Dent", "Pitting"):
        acts.record(NUMBER, seen(words=words))

    numbers = [one.number for one in acts.read(NUMBER).numbered_findings]
    assert numbers == list(range(1, first + 4))
    assert numbers == sorted(set(numbers))


def test_a_remark_gets_no_number(acts: Acts) -> None:
    before = acts.read(NUMBER).numbered_findings
    acts.record(NUMBER, seen(weight="remark"))
    assert acts.read(NUMBER).numbered_findings == before


def test_a_remount_got_one_number_for_all_its_stations_and_the_removal_answered_it(
    acts: Acts,
) -> None:
    numbered = [
        one for one in acts.read(NUMBER).numbered_findings if one.about.startswith("runout-changed")
    ]
    assert [(one.step, one.attempt) for one in numbered] == [(STEP, 1)]


def decision(role: str, about: str, disposition: str, **more: Any) -> Decision:
    return Decision(
        **common(role, 3), about=about, disposition=disposition, words="because", **more
    )


def test_a_finding_is_decided_by_its_number_and_by_its_name(acts: Acts) -> None:
    acts.record(NUMBER, seen())
    acts.record(NUMBER, seen(words="Dent"))
    by_name, by_number = acts.read(NUMBER).numbered_findings[-2:]

    acts.record(NUMBER, decision("inspector", by_name.about, "rework"))
    acts.record(NUMBER, decision("inspector", "finding", "scrap", finding=by_number.number))

    answered = [one.answered_by for one in findings(judged(acts), "seen-conforms")]
    assert answered == ["rework: because", "scrap: because"]


@pytest.mark.parametrize("disposition", ["repair", "use as is under concession"])
def test_only_the_engineer_concedes(acts: Acts, disposition: str) -> None:
    acts.record(NUMBER, seen())
    about = acts.read(NUMBER).numbered_findings[-1].about

    assert refused(acts, decision("inspector", about, disposition)) == "role-may-not-concede"
    acts.record(NUMBER, decision("engineer", about, disposition, authority="design authority"))
    assert findings(judged(acts), "seen-conforms")[0].answered_by is not None


def test_a_concession_waits_for_the_customer_where_the_plan_asks(acts: Acts) -> None:
    acts.record(NUMBER, seen())
    about = acts.read(NUMBER).numbered_findings[-1].about
    concede = "use as is under concession"
    for agreed, answered in ((None, False), ("C. Customer", True)):
        job = acts.read(NUMBER)
        plan = msgspec.structs.replace(job.plan, customer_agrees_to=(concede,))
        entry = decision("engineer", about, concede, agreed_by=agreed)
        view = assess(msgspec.structs.replace(job, plans=(plan,), entries=(*job.entries, entry)))
        (found,) = findings(view, "seen-conforms")
        assert (found.answered_by is not None) is answered


# Late entries


@pytest.mark.parametrize(("hours", "late"), [(11.9, False), (12.0, False), (12.1, True)])
def test_an_entry_long_after_the_deed_says_why(acts: Acts, hours: float, late: bool) -> None:
    told = common("technician", 1) | {"entered_at": at(1 + hours)}
    if not late:
        acts.record(NUMBER, Note(**told, words="seen"))
        return
    assert refused(acts, Note(**told, words="seen")) == "late-without-reason"
    acts.record(NUMBER, Note(**told, words="seen", reason="no power at the stand"))
    (found,) = findings(judged(acts), "entered-in-time")
    assert "no power at the stand" in found.finding.message


def test_an_offset_of_the_clock_is_no_delay(acts: Acts) -> None:
    told = common("technician", 1)
    elsewhere = datetime.fromisoformat(told["done_at"]).astimezone(
        datetime.strptime("+1400", "%z").tzinfo
    )
    acts.record(NUMBER, Note(**(told | {"entered_at": elsewhere.isoformat()}), words="far away"))
    assert findings(judged(acts), "entered-in-time") == []


# Work outside


def outside(hours: float, **more: Any) -> OutsideOperation:
    facts = {"what": "Plating", "subject": "HR-4471-07", "works": "Platers",
             "sent_on": "2026-11-03", **more}  # fmt: skip
    return OutsideOperation(**common("technician", hours), **facts)


def test_work_outside_is_open_until_it_is_back(acts: Acts) -> None:
    sent = outside(1)
    acts.record(NUMBER, sent)
    assert findings(judged(acts), "outside-work-back")[0].finding.verdict is Verdict.NOT_JUDGED

    early = outside(2, sent_as=sent.id, back_on="2026-11-02", result="accepted")
    assert refused(acts, early) == "back-before-sent"
    assert refused(acts, outside(2, sent_as="nothing", back_on="2026-11-09")) == "nothing-sent"

    acts.record(
        NUMBER,
        outside(2, sent_as=sent.id, back_on="2026-11-09", result="accepted", certificate="P-1"),
    )
    (found,) = findings(judged(acts), "outside-work-back")
    assert found.finding.verdict is Verdict.WITHIN


# Instruments


def _used(job: Job) -> tuple[str, str]:
    """Give an instrument of the last attempt and the day on which it was last used."""
    mine = [one for one in job.entries if one.place == LAST.place and getattr(one, "instrument", 0)]
    return mine[-1].instrument, mine[-1].done_at[:10]


def recalibrated(store: Store, due: str) -> str:
    job = Acts(store).read(NUMBER)
    tag, day = _used(job)
    instrument = next(one for one in job.instruments if one.tag == tag)
    shift = {"day": day, "before": _day_before(day)}[due]
    Instruments(store).calibrate(
        instrument,
        Calibration(done_on="2025-01-01", due_on=shift, certificate="K-1"),
        person=PEOPLE["inspector"],
        act_id=new_id(),
    )
    return tag


def _day_before(day: str) -> str:
    return (datetime.fromisoformat(day) - timedelta(days=1)).date().isoformat()


def signed() -> Signature:
    return Signature(
        **common("technician", 1), role="technician", meaning="performed", covers="again"
    )


def test_an_instrument_due_today_may_be_signed_for(store: Store) -> None:
    recalibrated(store, "day")
    Acts(store).record(NUMBER, signed())


def test_an_instrument_past_due_stops_the_signature_and_not_the_reading(store: Store) -> None:
    acts = Acts(store)
    tag = recalibrated(store, "before")
    with pytest.raises(NotAllowedError) as caught:
        acts.record(NUMBER, signed())
    assert caught.value.name == "instrument-past-due"
    assert tag in caught.value.words
    assert "Register" in caught.value.words

    last = next(one for one in reversed(AHEAD) if getattr(one, "instrument", None) == tag)
    read = msgspec.structs.replace(
        last, id=new_id(), done_at=at(2), entered_at=at(2), out_of_order="once more"
    )
    acts.record(NUMBER, read)
    assert read.id in {one.id for one in acts.read(NUMBER).entries}


def test_a_new_calibration_lets_the_signature_through(store: Store) -> None:
    acts = Acts(store)
    tag = recalibrated(store, "before")
    instrument = next(one for one in acts.read(NUMBER).instruments if one.tag == tag)
    Instruments(store).calibrate(
        instrument,
        Calibration(done_on="2026-11-20", due_on="2027-11-20", certificate="K-2"),
        person=PEOPLE["inspector"],
        act_id=new_id(),
    )
    acts.record(NUMBER, signed())
    certificates = [one.certificate for one in Instruments(store).history(tag)]
    assert {"K-1", "K-2"} <= set(certificates)


def test_an_instrument_found_out_lists_every_reading_since_and_opens_a_finding(
    store: Store,
) -> None:
    acts, instruments = Acts(store), Instruments(store)
    tag, day = _used(acts.read(NUMBER))
    expected = {
        one.id
        for one in acts.read(NUMBER).entries
        if getattr(one, "instrument", None) == tag and one.done_at[:10] >= day
    }
    before = acts.read(NUMBER)

    found = instruments.found_out(
        tag,
        last_good_on=_day_before(day),
        words="Sticks at half its travel",
        person=PEOPLE["inspector"],
        found_on="2026-12-01",
        act_id="found",
    )

    after = acts.read(NUMBER)
    assert {one.entry for one in found} == expected != set()
    assert instruments.touched(tag, last_good_on=_day_before(day)) == found
    assert after.entries == before.entries
    opened = after.numbered_findings[len(before.numbered_findings) :]
    assert opened
    assert all(one.about.startswith("instrument-still-good") for one in opened)
    assert all(
        one.finding.verdict is Verdict.CANNOT_TELL
        for one in findings(judged(acts), "instrument-still-good")
    )
    with store.reading() as session:
        assert verify(session).is_whole


def test_an_instrument_found_out_on_its_last_good_day_touches_nothing(store: Store) -> None:
    tag, day = _used(Acts(store).read(NUMBER))
    assert Instruments(store).touched(tag, last_good_on="2999-01-01") == ()
    on_the_day = {one.done_at[:10] for one in Instruments(store).touched(tag, last_good_on=day)}
    assert day not in on_the_day


def test_a_technician_keeps_no_instruments(store: Store) -> None:
    with pytest.raises(NotAllowedError) as caught:
        Instruments(store).found_out(
            "MU-07",
            last_good_on="2026-11-01",
            words="sticks",
            person=PEOPLE["technician"],
            found_on="2026-12-01",
            act_id="no",
        )
    assert caught.value.name == "role-may-not-keep"


# Attachments

CONTENT = b"abc"
# FIPS 180-2, appendix B.1.
DIGEST = "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad"


def picture() -> Attachment:
    return Attachment(
        **common("technician", 1),
        name="scratch.png",
        media_type="image/png",
        size_bytes=0,
        file_digest="0" * 64,
    )


def test_an_attachment_lies_beside_the_record_for_its_owner_only(
    store: Store, tmp_path: Path
) -> None:
    acts = Acts(store)
    acts.attach(NUMBER, picture(), CONTENT)

    kept = next(one for one in acts.read(NUMBER).entries if isinstance(one, Attachment))
    path = tmp_path / "files" / DIGEST
    assert (kept.file_digest, kept.size_bytes) == (DIGEST, 3)
    assert acts.attached(kept) == CONTENT
    assert path.stat().st_mode & 0o777 == 0o600
    assert hashlib.sha256(path.read_bytes()).hexdigest() == DIGEST
    assert [one.name for one in path.parent.iterdir()] == [DIGEST]


@pytest.mark.parametrize("harm", ["missing", "changed"])
def test_a_file_that_is_missing_or_changed_is_told_by_name(
    store: Store, tmp_path: Path, harm: str
) -> None:
    acts = Acts(store)
    acts.attach(NUMBER, picture(), CONTENT)
    path = tmp_path / "files" / DIGEST
    if harm == "missing":
        path.unlink()
    else:
        path.write_bytes(b"abd")

    kept = next(one for one in acts.read(NUMBER).entries if isinstance(one, Attachment))
    with pytest.raises(AttachedFileError, match=r"scratch\.png"):
        acts.attached(kept)
    with store.reading() as session:
        told = verify(session)
    assert told.is_whole
    assert [one.what for one in told.file_troubles] == [
        f"the attached file “scratch.png” is {harm}"
    ]


def test_nothing_is_recorded_when_the_file_cannot_be_kept(store: Store, tmp_path: Path) -> None:
    (tmp_path / "files").write_bytes(b"in the way")
    before = Acts(store).read(NUMBER)
    with pytest.raises(AttachedFileError, match="attach it again"):
        Acts(store).attach(NUMBER, picture(), CONTENT)
    assert Acts(store).read(NUMBER) == before


def test_every_key_of_a_finding_in_an_attempt_is_its_own(acts: Acts) -> None:
    acts.record(NUMBER, seen())
    acts.record(NUMBER, seen(words="Dent"))
    keys = [finding_key(one.finding) for one in findings(judged(acts), "seen-conforms")]
    assert len(keys) == len(set(keys)) == 2


def test_a_file_that_never_came_with_its_job_is_told_and_is_no_fault(tmp_path: Path) -> None:
    job = compressor()
    brought = [one.id for one in job.entries if isinstance(one, Attachment)]
    with Store.open(tmp_path) as opened:
        Acts(opened).bring_in(job, by="AT", act_id="in")
        with opened.reading() as session:
            told = verify(session)
    assert [one.key for one in told.files_not_here] == brought != []
    assert told.file_troubles == ()
