"""What the only writer takes, what it refuses, and in which words."""

from datetime import UTC, datetime, timedelta
from pathlib import Path

import msgspec
import pytest

from models.job import (
    Correction,
    GaugeTry,
    Hot,
    Job,
    Place,
    RunoutReading,
    RunoutSurvey,
    SizeReading,
    StationReadings,
    Warmth,
)
from models.record import journal, queries
from models.record.errors import (
    ActDiffersError,
    AlreadyReplacedError,
    HeadMovedError,
    JobKnownError,
    PredecessorNotSettledError,
    ReasonMissingError,
    SurveyClosedError,
    UnfitEntryError,
    UnknownEntryError,
    UnknownJobError,
    UnknownPersonError,
)
from models.record.store import Store
from models.record.verify import verify
from models.units import Angle
from tests.record.a_job import NUMBER, a_job, a_survey, an_attempt, at, settled
from tests.record.whole_record import one_act


@pytest.fixture
def opened(store: Store) -> Store:
    with one_act(store, "open") as act:
        act.add_job(msgspec.structs.replace(a_job(), entries=(), verdicts=()))
    return store


@pytest.fixture
def surveyed(opened: Store) -> Store:
    with one_act(opened, "survey") as act:
        act.add_entry(a_survey("s", Place(kind="bare shaft"), 200))
    return opened


def job_of(store: Store) -> Job:
    with store.reading() as session:
        return queries.read_job(session, NUMBER)


def survey_of(store: Store) -> RunoutSurvey:
    (survey,) = job_of(store).entries
    assert isinstance(survey, RunoutSurvey)
    return survey


def read(store: Store, act_id: str, mark: int, typed: str, **more: str) -> None:
    with one_act(store, act_id) as act:
        act.add_reading("s", RunoutReading(station="middle", mark=mark, typed=typed), **more)


def test_readings_stand_where_they_were_taken(surveyed: Store) -> None:
    read(surveyed, "1", 0, "0", taken_at=at(201))
    read(surveyed, "2", 2, "3.5", taken_at=at(203))
    # By hand: the survey began at minute 200, so the readings are 60 s and 180 s into it.
    assert survey_of(surveyed).stations == (
        StationReadings(station="middle", typed=("0", None, "3.5"), seconds=(60, None, 180)),
    )


def test_a_total_with_the_angle_of_its_high_spot_needs_no_marks(surveyed: Store) -> None:
    for number, (what, typed) in enumerate(
        [("total", "12.5"), ("high spot", "137.5"), ("swept total", "13"), ("again", None)]
    ):
        with one_act(surveyed, str(number)) as act:
            act.add_reading("s", RunoutReading(station="middle", mark=what, typed=typed))
    assert survey_of(surveyed).stations == (
        StationReadings(
            station="middle",
            total="12.5",
            high_spot=Angle.read("137.5°"),
            swept_total="13",
        ),
    )


def test_a_place_without_a_surface_strikes_what_was_typed_there(surveyed: Store) -> None:
    read(surveyed, "1", 1, "4")
    with one_act(surveyed, "2") as act:
        act.add_reading("s", RunoutReading(station="middle", mark=1, typed=None))
    survey = survey_of(surveyed)
    assert survey.stations[0].typed == (None,) * 2
    assert [(one.was, one.now) for one in survey.corrections] == [("4", "")]


def test_a_reading_is_kept_as_typed_with_its_unit_and_as_a_whole_number(surveyed: Store) -> None:
    read(surveyed, "1", 0, "−0.0005 in")
    read(surveyed, "2", 1, "2.5")
    with surveyed.reading() as session:
        rows = session.connection().exec_driver_sql(
            "SELECT typed, unit, value_nm FROM runout_reading ORDER BY mark_index"
        )
        # By hand: 0.0005 in × 25.4 mm/in = 12 700 nm; the survey is in µm.
        assert [tuple(row) for row in rows] == [
            ("−0.0005 in", "in", -12_700),
            ("2.5", "µm", 2_500),
        ]


def test_the_last_reading_may_be_typed_again_without_a_reason(surveyed: Store) -> None:
    read(surveyed, "1", 0, "1")
    read(surveyed, "2", 0, "2")
    survey = survey_of(surveyed)
    assert survey.stations[0].typed[0] == "2"
    assert survey.corrections == (
        Correction(
            where=("middle", "0"), was="1", now="2", reason="typed again", by="tom", at=at(200)
        ),
    )


def test_an_earlier_reading_needs_a_reason_to_be_replaced(surveyed: Store) -> None:
    read(surveyed, "1", 0, "1")
    read(surveyed, "2", 1, "2")
    with pytest.raises(ReasonMissingError, match="middle, 0"):
        read(surveyed, "3", 0, "3")
    read(surveyed, "4", 0, "3", reason="misread")
    assert [one.reason for one in survey_of(surveyed).corrections] == ["misread"]


def test_a_closed_survey_takes_corrections_and_no_new_places(surveyed: Store) -> None:
    read(surveyed, "1", 0, "1")
    with one_act(surveyed, "close") as act:
        act.close_survey("s", at(210))
    with pytest.raises(SurveyClosedError):
        read(surveyed, "2", 1, "1")
    with pytest.raises(ReasonMissingError):
        read(surveyed, "3", 0, "2")
    with pytest.raises(SurveyClosedError), one_act(surveyed, "close again") as act:
        act.close_survey("s", at(211))
    read(surveyed, "4", 0, "2", reason="misread")
    assert survey_of(surveyed).closed_at == at(210)


@pytest.mark.parametrize(
    ("entry_id", "reading"),
    [
        ("nowhere", RunoutReading(station="middle", mark=0, typed="1")),
        ("s", RunoutReading(station="middle", mark=4, typed="1")),
        ("s", SizeReading(position=0, angle=0, typed="1")),
    ],
)
def test_a_reading_that_fits_nowhere_is_refused(
    surveyed: Store, entry_id: str, reading: RunoutReading | SizeReading
) -> None:
    with pytest.raises(UnknownEntryError), one_act(surveyed, "x") as act:
        act.add_reading(entry_id, reading)


def test_open_heating_and_cooling_take_readings(opened: Store) -> None:
    entries = {entry.id: entry for entry in a_job().entries}
    heat, cool = entries["heat"], entries["cool"]
    with one_act(opened, "empty") as act:
        act.add_entry(msgspec.structs.replace(heat, temperatures=(), gauge=()))
        act.add_entry(msgspec.structs.replace(cool, temperatures=()))
    # The two bore temperatures of the whole job share a moment; here each has its own.
    hot = [
        msgspec.structs.replace(one, at=at(50 + minute))
        for minute, one in enumerate(heat.temperatures)
    ]
    readings: list[tuple[str, Hot | GaugeTry | Warmth]] = [
        *(("heat", one) for one in (*hot, *heat.gauge)),
        *(("cool", one) for one in cool.temperatures),
    ]
    for number, (entry_id, reading) in enumerate(readings):
        with one_act(opened, f"reading {number}") as act:
            act.add_reading(entry_id, reading)
    assert job_of(opened).entries == (
        msgspec.structs.replace(heat, temperatures=tuple(hot)),
        cool,
    )


def test_the_same_act_again_records_nothing_and_tells_the_known_outcome(surveyed: Store) -> None:
    read(surveyed, "1", 0, "1")
    before = job_of(surveyed)
    with one_act(surveyed, "1") as act:
        act.add_reading("s", RunoutReading(station="middle", mark=0, typed="1"))
        assert act.already_recorded
    assert act.head == before.head
    assert job_of(surveyed) == before


def test_an_act_of_the_same_id_with_another_meaning_is_refused(surveyed: Store) -> None:
    read(surveyed, "1", 0, "1")
    with pytest.raises(ActDiffersError), one_act(surveyed, "1", by="eva"):
        pass


def test_a_head_that_moved_on_is_refused_with_both_numbers(surveyed: Store) -> None:
    with (
        pytest.raises(HeadMovedError, match="from act 1 to act 2"),
        one_act(surveyed, "x", expected_head=1),
    ):
        pass
    with one_act(surveyed, "y", expected_head=2) as act:
        act.add_entry(an_attempt("a", "one"))
    assert act.head is not None
    assert act.head.sequence == 3


def test_the_second_step_waits_for_the_first(opened: Store) -> None:
    with (
        pytest.raises(PredecessorNotSettledError, match="step one has no attempt"),
        one_act(opened, "early") as act,
    ):
        act.add_entry(an_attempt("a", "two"))
    with one_act(opened, "one") as act:
        act.add_entry(an_attempt("a1", "one"))
    with (
        pytest.raises(PredecessorNotSettledError, match="attempt 1, not settled"),
        one_act(opened, "two") as act,
    ):
        act.add_entry(an_attempt("a2", "two"))
    with one_act(opened, "settle") as act:
        act.add_entry(settled("e1", "one"))
    with one_act(opened, "two") as act:
        act.add_entry(an_attempt("a2", "two"))
    assert [entry.id for entry in job_of(opened).entries] == ["a1", "e1", "a2"]


@pytest.mark.parametrize(("outcome", "may_go_on"), [("conceded", True), ("removed", False)])
def test_only_a_good_outcome_lets_the_next_step_begin(
    opened: Store, outcome: str, may_go_on: bool
) -> None:
    with one_act(opened, "one") as act:
        act.add_entry(an_attempt("a1", "one"))
        act.add_entry(settled("e1", "one", outcome=outcome))
    if may_go_on:
        with one_act(opened, "two") as act:
            act.add_entry(an_attempt("a2", "two"))
    else:
        with pytest.raises(PredecessorNotSettledError), one_act(opened, "two") as act:
            act.add_entry(an_attempt("a2", "two"))


def test_a_new_attempt_waits_for_the_end_of_the_one_before(opened: Store) -> None:
    with one_act(opened, "one") as act:
        act.add_entry(an_attempt("a1", "one"))
    with pytest.raises(PredecessorNotSettledError), one_act(opened, "again") as act:
        act.add_entry(an_attempt("a2", "one", 2))
    with one_act(opened, "removed") as act:
        act.add_entry(settled("e1", "one", outcome="removed"))
        act.add_entry(an_attempt("a2", "one", 2))


def test_a_step_attempted_anew_is_no_longer_settled(opened: Store) -> None:
    with one_act(opened, "one") as act:
        act.add_entry(an_attempt("a1", "one"))
        act.add_entry(settled("e1", "one"))
        act.add_entry(an_attempt("a2", "one", 2))
    with opened.reading() as session:
        assert queries.job_rows(session)[0].steps_settled == 0
    with pytest.raises(PredecessorNotSettledError), one_act(opened, "two") as act:
        act.add_entry(an_attempt("b1", "two"))


def test_what_already_happened_out_of_order_is_taken_with_its_reason(opened: Store) -> None:
    with one_act(opened, "early") as act:
        act.add_entry(an_attempt("a", "two", out_of_order="the night shift went on"))
    assert job_of(opened).entries[0].out_of_order == "the night shift went on"


def test_a_correction_is_corrected_and_not_the_first_entry_twice(opened: Store) -> None:
    with one_act(opened, "1") as act:
        act.add_entry(settled("e1", "one"))
    with one_act(opened, "2") as act:
        act.add_entry(msgspec.structs.replace(settled("e2", "one"), supersedes="e1", reason="x"))
    third = msgspec.structs.replace(settled("e3", "one"), supersedes="e1", reason="y")
    with (
        pytest.raises(AlreadyReplacedError, match="Correct the correction"),
        one_act(opened, "3") as act,
    ):
        act.add_entry(third)


def test_strangers_and_unknown_jobs_are_refused(opened: Store) -> None:
    with pytest.raises(UnknownPersonError, match="zoe"), one_act(opened, "x", by="zoe"):
        pass
    with pytest.raises(UnknownJobError), one_act(opened, "y", chain="none"):
        pass
    with pytest.raises(JobKnownError), one_act(opened, "z") as act:
        act.add_job(a_job())


def test_somebody_the_shop_knows_may_act_in_a_job(opened: Store) -> None:
    (_, _, eva) = a_job().people
    zoe = msgspec.structs.replace(eva, key="zoe")
    with one_act(opened, "shop", chain=journal.SHOP, by="zoe") as act:
        act.add_people([zoe])
    with one_act(opened, "x", by="zoe") as act:
        act.add_entry(settled("e1", "one"))
    with opened.reading() as session:
        assert queries.people(session) == (zoe,)
        assert queries.instruments(session) == ()


def test_sizes_that_are_no_grid_are_refused(opened: Store) -> None:
    sizes = next(entry for entry in a_job().entries if entry.id == "bore")
    ragged = msgspec.structs.replace(sizes, typed=(("1",), ("1", "2")))
    with pytest.raises(UnfitEntryError, match="not a grid"), one_act(opened, "x") as act:
        act.add_entry(ragged)


def test_a_clock_set_back_never_orders_acts_backwards_and_is_flagged(tmp_path: Path) -> None:
    noon = datetime(2031, 3, 4, 12, tzinfo=UTC)
    times = iter([noon, noon - timedelta(hours=1), noon + timedelta(hours=1)])
    with Store.open(tmp_path, clock=lambda: next(times)) as store:
        with one_act(store, "1") as act:
            act.add_job(a_job())
        for act_id in ("2", "3"):
            with one_act(store, act_id) as act:
                act.add_entry(settled(act_id, "one"))
        with store.reading() as session:
            rows = session.connection().exec_driver_sql(
                "SELECT entered_at_utc, clock_stepped_back FROM act ORDER BY sequence"
            )
            assert [tuple(row) for row in rows] == [
                ("2031-03-04T12:00:00.000000Z", 0),
                ("2031-03-04T12:00:00.000000Z", 1),
                ("2031-03-04T13:00:00.000000Z", 0),
            ]
            assert verify(session).is_whole
