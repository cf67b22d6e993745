from dataclasses import replace

import msgspec
import pytest

from app.presenters.inspection import DISPOSITIONS, InspectionPresenter
from app.presenters.reasons import reasons_of
from models.acts import new_id
from models.assess import assess
from models.job import Decision, Place, Signature, VisualFinding
from models.units import unit_set
from reports.sheet.pictures import VerdictKind
from sample_data.load import compressor
from tests.app.open_shop import COMPRESSOR


@pytest.fixture
def inspection(shop):
    presenter = InspectionPresenter(shop.presenter)
    shop.open(COMPRESSOR, "BQ")
    return presenter


def shown(shop, job):
    """Lay a job on the desks that the record does not hold, to see how it is listed."""
    shop.presenter._views[COMPRESSOR] = assess(job)
    shop.presenter.job_changed.emit()


def without_decisions_and_removals(job):
    kept = tuple(one for one in job.entries if one.title not in ("Decided",))
    return msgspec.structs.replace(job, entries=kept)


def without_signature(job, step, attempt, meaning):
    def is_it(entry):
        place = entry.place
        return isinstance(entry, Signature) and (place.step, place.attempt, entry.meaning) == (
            step,
            attempt,
            meaning,
        )

    return msgspec.structs.replace(job, entries=tuple(x for x in job.entries if not is_it(x)))


def test_only_what_is_not_within_and_not_answered_is_listed(inspection):
    assert [row.sentence for row in inspection.findings] == [
        "Not judged yet: 9 of 15 steps are not settled, Impeller, fourth stage is next."
    ]


def test_the_worst_comes_first(inspection, shop):
    shown(shop, without_decisions_and_removals(compressor()))
    kinds = [row.kind for row in inspection.findings]

    assert kinds == [VerdictKind.LOOK, VerdictKind.NOT_JUDGED]
    assert inspection.findings[0].where == "step 1, Impeller, first stage, attempt 1"
    assert inspection.summary == "2 findings wait for somebody."


def test_a_finding_opens_to_its_inputs_its_limit_and_its_source(inspection):
    job = compressor()
    finding = next(
        one.finding
        for one in assess(job).findings
        if one.finding.rule.id == "runout-changed" and one.finding.verdict.value == "outside"
    )
    told = dict(reasons_of(finding, unit_set("inch")))

    assert told["rule"] == finding.rule.statement
    assert told["source of the rule"] == finding.rule.source
    assert told["limit from"] == job.plan.step("impeller-2").change_limit.origin.words
    # By hand: 0.0010 in is 25.4 µm.
    assert told["the limit of change"] == "0.0010 in (25.4 µm)"
    assert told["the station"] == "E1"


def test_a_decision_is_recorded_in_the_name_of_who_is_signed_in(inspection, shop):
    shown(shop, without_decisions_and_removals(compressor()))
    row = inspection.findings[0]
    inspection.decide(row, "read again", "Read cold once more.")
    shop.settle()

    entry = shop.acts.read(COMPRESSOR).entries[-1]
    assert isinstance(entry, Decision)
    assert (entry.by, entry.about, entry.disposition, entry.words) == (
        "BQ",
        row.key,
        "read again",
        "Read cold once more.",
    )


def test_a_technician_may_not_decide_and_is_told_in_the_acts_own_words(inspection, shop):
    shop.presenter.sign_in("AT")
    shown(shop, without_decisions_and_removals(compressor()))
    before = len(shop.acts.read(COMPRESSOR).entries)
    inspection.decide(inspection.findings[0], "read again", "Because.")
    shop.settle()

    assert shop.said[-1].way_out == "Ansel Tarrowby is a technician; an inspector decides."
    assert len(shop.acts.read(COMPRESSOR).entries) == before


@pytest.mark.parametrize(
    ("disposition", "words", "said"),
    [
        ("read again", "  ", "A decision says why."),
        ("", "Because.", "A decision names what is to be done."),
    ],
)
def test_half_a_decision_is_not_recorded(inspection, shop, disposition, words, said):
    shown(shop, without_decisions_and_removals(compressor()))
    inspection.decide(inspection.findings[0], disposition, words)

    assert shop.said[-1].what == said
    assert shop.writer.is_idle


def test_a_finding_about_the_whole_rotor_is_not_decided(inspection, shop):
    inspection.decide(inspection.findings[0], "accept reading", "Because.")

    assert shop.said[-1].what == "This finding is not decided."
    assert inspection.deciding_words(inspection.findings[0]).startswith("Going on with the build")


def test_a_finding_of_no_step_is_decided_where_it_belongs(inspection, shop):
    seen = VisualFinding(
        id=new_id(),
        place=Place(kind="as received"),
        by="BQ",
        done_at=shop.acts.now(),
        entered_at=shop.acts.now(),
        plan=compressor().plan.revision,
        subject="crate",
        seen_at="lid",
        words="stove in",
        weight="does not conform",
    )
    shop.presenter.record(seen, done=lambda _: None)
    shop.settle()
    row = next(one for one in inspection.findings if one.rule == "seen-conforms")
    assert row.step is None
    inspection.decide(row, "accept reading", "The rotor was not touched.")
    shop.settle()

    entry = shop.acts.read(COMPRESSOR).entries[-1]
    assert isinstance(entry, Decision)
    assert (entry.about, entry.place) == (row.key, Place(kind="as received"))
    assert "seen-conforms" not in [one.rule for one in inspection.findings]


# The trade's way: whoever answers for the design lets a part stay that does not conform.
@pytest.mark.parametrize(
    ("person", "open_ways"),
    [
        ("BQ", {"rework", "scrap", "read again", "accept reading"}),
        ("DO", set(DISPOSITIONS)),
        ("AT", set()),
        ("", set()),
    ],
)
def test_only_what_a_role_may_decide_is_offered_and_the_acts_agree(
    inspection, shop, person, open_ways
):
    shown(shop, without_decisions_and_removals(compressor()))
    shop.presenter.sign_in(person)
    assert set(inspection.dispositions) == open_ways

    for way in DISPOSITIONS:
        before = len(shop.acts.read(COMPRESSOR).entries)
        shown(shop, without_decisions_and_removals(compressor()))
        row = inspection.findings[0]
        inspection.decide(row, way, "Because.")
        shop.settle()
        taken = len(shop.acts.read(COMPRESSOR).entries) - before
        assert taken == (way in open_ways), way


def test_nobody_signed_in_decides_nothing(inspection, shop):
    shop.presenter.sign_in("")
    shown(shop, without_decisions_and_removals(compressor()))
    inspection.decide(inspection.findings[0], "read again", "Because.")

    assert shop.said[-1].what == "Nobody of this job is signed in."


def test_a_settled_step_that_is_signed_waits_for_nobody(inspection):
    assert inspection.points == ()


def test_a_missing_inspection_is_waited_for_and_says_what_the_name_will_mean(inspection, shop):
    shown(shop, without_signature(compressor(), "impeller-3", 1, "inspected"))
    (row,) = inspection.points

    assert (row.role, row.meaning, row.holds) == ("inspector", "inspected", True)
    assert inspection.signing_words(row) == (
        "“Brona Quillfeather, inspector” is about to stand under step 5, Impeller, third stage, "
        "attempt 1: fit and runout before the next part. It says “inspected”: you have read the "
        "record of it and agree with its verdicts."
    )


def test_signing_puts_the_name_in_the_record(inspection, shop, qtbot):
    shown(shop, without_signature(compressor(), "impeller-3", 1, "inspected"))
    with qtbot.waitSignal(inspection.recorded):
        inspection.sign(inspection.points[0])
    shop.settle()

    entry = shop.acts.read(COMPRESSOR).entries[-1]
    assert isinstance(entry, Signature)
    assert (entry.by, entry.role, entry.meaning, entry.place.step) == (
        "BQ",
        "inspector",
        "inspected",
        "impeller-3",
    )


def test_whoever_may_not_sign_is_told_why_before_and_after(inspection, shop):
    shop.presenter.sign_in("CV")
    shown(shop, without_signature(compressor(), "impeller-3", 1, "inspected"))
    assert inspection.signing_words(inspection.points[0]) == (
        "This waits for the inspector. Cathal Vintergaard is signed in as technician, and that "
        "name will not be taken here."
    )
    before = len(shop.acts.read(COMPRESSOR).entries)
    inspection.sign(inspection.points[0])
    shop.settle()

    assert shop.said[-1].way_out.startswith("Cathal Vintergaard is a technician")
    assert len(shop.acts.read(COMPRESSOR).entries) == before


def test_a_struck_reading_stays_with_its_reason(inspection):
    (row,) = inspection.amendments

    assert (row.was, row.now, row.reason) == ("-0.0020", "-0.0002", "slipped decimal")
    assert row.where.startswith("Runout survey, step 4, attempt 1: K7 at 225")
    assert (row.by, row.at) == ("Ansel Tarrowby", "2026-10-22 07:00")


@pytest.mark.parametrize(
    ("today", "verdict", "words"),
    [
        ("2027-05-14", VerdictKind.LOOK, "today; send it soon"),
        ("2027-04-14", VerdictKind.LOOK, "in 30 days; send it soon"),
        ("2027-04-13", VerdictKind.WITHIN, "in 31 days"),
        ("2027-05-15", VerdictKind.STOP, "1 day ago; do not use it until it is calibrated"),
    ],
)
def test_an_instrument_is_looked_at_before_its_calibration_falls_due(
    inspection, shop, monkeypatch, today, verdict, words
):
    monkeypatch.setattr(shop.acts, "now", lambda: f"{today}T08:00:00-05:00")
    row = next(one for one in inspection.instruments if one.tag == "OM-05")

    assert (row.verdict, row.words) == (verdict, words)
    # The depth gauge of the invented shop is the one due first.
    assert inspection.instruments[0].due == "2026-12-18"


def test_a_remount_lies_beside_the_attempt_before_it_first(inspection):
    left, right = inspection.first_pair()
    rows = inspection.attempts

    assert rows[left].title == "step 3, Impeller, second stage, attempt 1"
    assert rows[right].title == "step 3, Impeller, second stage, attempt 2"
    assert (rows[left].kind, rows[right].kind) == (VerdictKind.STOP, VerdictKind.WITHIN)


def test_an_attempt_is_drawn_before_and_after(inspection):
    picture = inspection.picture(inspection.attempts[0])

    assert [one.which.value for one in picture.curves] == ["before", "after"]
    assert len(picture.changes) == 1


def test_an_attempt_that_is_gone_is_not_drawn(inspection):
    assert inspection.picture(replace(inspection.attempts[0], attempt=9)) is None
