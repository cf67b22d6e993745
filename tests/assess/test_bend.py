import math

import msgspec
import pytest

import sample_data
from models.assess import assess
from models.assess.bend import bend_of
from models.assess.bow_unbalance import BowOffset, bow_unbalance, offsets_of_change
from models.assess.runout import StationChange, where_the_bend_sits
from sample_data.truth import COMPRESSOR
from tests.assess.invented import mm, on_a_shaft, rpm, with_material
from tests.published.printed import printed
from tests.second_paths.bent_shaft import kink_by_trial

PLACES = (0.25, 0.5, 0.75, 1.0, 1.25, 1.5, 1.75)
STEEL = {"modulus": 200e9, "poisson": 0.3, "density": 8000.0}
# A shaft of 0.1 m and 2 m: 8000·π·0.0025·2 = 125.664 kg, by hand.
SHAFT = [(0.0, 2.0, 0.1)]


def moved(plan, *bends):
    """Change of every station by bends (position, angle, clock), by similar triangles."""
    found = []
    for station in plan.stations:
        place = station.position.si
        change = sum(
            (
                angle * min(place, kink) * (2.0 - max(place, kink)) / 2.0
                * complex(math.cos(math.radians(clock)), math.sin(math.radians(clock)))
                for kink, angle, clock in bends
            ),
            0j,
        )  # fmt: skip
        found.append(
            StationChange(
                key=station.key,
                position=place,
                is_journal=station.kind == "journal",
                before=0j,
                after=change,
                change=change,
                tir=2.0 * abs(change),
                clock_angle_degrees=0.0,
                expanded_uncertainty=0.8e-6,
                plain_change=0.0,
                bounds=None,
                reading_uncertainty=0.2e-6,
            )
        )
    return tuple(found)


def bend(plan, step, *bends):
    changes = moved(plan, *bends)
    job = msgspec.structs.replace(sample_data.pump(), plans=(plan,))
    return bend_of(
        plan,
        f"step-part-{step}",
        kink=where_the_bend_sits(job, changes),
        changes=changes,
        judged=None,
        drift=changes,
    )


@pytest.fixture
def plan(monkeypatch):
    with_material(monkeypatch, **STEEL)
    parts = [(0.6, 10.0), (1.0, 40.0), (1.4, 10.0)]
    return on_a_shaft(steps=SHAFT, parts=parts, second=2.0, between=PLACES)


def test_a_kink_under_the_part_just_mounted_is_named_so(plan):
    found = bend(plan, 2, (1.0, 40e-6, 90.0))

    assert (found.seat.item, found.seat.distance) == ("part-2", 0.0)
    assert found.seat.is_just_mounted
    assert found.seat.proven
    assert "at the seat of Part 2 (just mounted)" in found.sentences[0]
    assert "40 µrad towards 90°" in found.sentences[0]


def test_a_kink_under_an_earlier_part_is_not_laid_on_the_one_just_mounted(plan):
    found = bend(plan, 3, (0.6, 40e-6, 0.0))

    assert found.seat.item == "part-1"
    assert not found.seat.is_just_mounted
    assert not found.seat.reaches_just_mounted
    assert "which is not the part mounted" in found.sentences[0]


def test_a_part_not_yet_on_is_no_seat_to_name(plan):
    found = bend(plan, 1, (1.4, 40e-6, 0.0))

    # The nearer edge of part 1 lies at 0.61 m.
    assert found.seat.item == "part-1"
    assert found.seat.distance == pytest.approx(0.79, abs=0.01)
    assert "from the seat of Part 1" in found.sentences[0]


def test_noise_alone_proves_no_bend(plan):
    found = bend(plan, 2, (1.0, 0.1e-6, 0.0))

    assert not found.seat.proven
    assert found.sentences[0].startswith("No bend is proven")


def test_a_kink_where_no_indicator_reaches_is_marked(plan, monkeypatch):
    with_material(monkeypatch, **STEEL)
    bare = on_a_shaft(
        steps=SHAFT, parts=[(1.1, 5.0)], second=2.0, between=(0.25, 0.5, 1.0, 1.25, 1.75)
    )

    assert bend(bare, 1, (1.1, 40e-6, 0.0)).seat.blind
    assert bend(plan, 1, (1.0, 40e-6, 0.0)).seat.blind is False


def test_two_bends_are_told_apart_each_with_its_seat(plan):
    found = bend(plan, 3, (0.6, 60e-6, 0.0), (1.4, 60e-6, 180.0))

    assert found.two.accepted
    assert [seat.item for seat in found.two_seats] == ["part-1", "part-3"]
    assert "The change asks for two bends" in " ".join(found.sentences)


def test_one_bend_does_not_pose_as_two(plan):
    found = bend(plan, 2, (1.0, 40e-6, 90.0))

    assert not found.two.accepted
    assert found.two_seats == ()


def test_the_unbalance_of_a_bow_is_mass_times_offset(monkeypatch):
    # 40 µrad amid 2 m: 20 µm there. 40 kg · 20 µm = 800 g·mm, and the shaft's 125.664 kg, off by
    # half as much on average, 1256.64 g·mm; half of both in each plane: 1028.32. By hand.
    with_material(monkeypatch, **STEEL)
    rotor = {"maximum_continuous_speed": rpm(3000.0)}
    plan = on_a_shaft(steps=SHAFT, parts=[(1.0, 40.0)], second=2.0, between=PLACES, **rotor)

    made = bend(plan, 1, (1.0, 40e-6, 90.0)).by_mount

    assert abs(made.first) == printed("1028.32", 1e-6)
    assert abs(made.second) == printed("1028.32", 1e-6)
    assert math.degrees(math.atan2(made.first.imag, made.first.real)) == pytest.approx(90.0)
    # 6350·W/N with 82.832 kg on each journal: 175.33 g·mm, by hand.
    assert made.permissible_first == printed("175.33", 1e-6)
    assert made.permissible_second == printed("175.33", 1e-6)
    assert made.ratio == printed("5.865")
    assert made.mass == printed("165.664")


def test_the_uncertainty_of_an_unbalance_is_that_of_its_stations(monkeypatch):
    # A shaft light beside 100 kg at the station amid it: ±2·0.2 µm · 100 kg / 2 = 20 g·mm.
    with_material(monkeypatch, modulus=200e9, poisson=0.3, density=600.0)
    plan = on_a_shaft(steps=[(0.0, 2.0, 0.001)], parts=[(1.0, 100.0)], second=2.0)
    offsets = [BowOffset(0.0, 0j, 0.0), BowOffset(1.0, 1e-5j, 0.2e-6), BowOffset(2.0, 0j, 0.0)]

    made = bow_unbalance(plan, "step-part-1", offsets)

    assert made.uncertainty_first == printed("20.0", 1e-6)
    assert abs(made.first) == printed("500.0", 1e-6)


def test_the_uncertainty_of_a_total_with_k_of_two_is_four_of_an_offsets(plan):
    # TIR = 2·|e| and k = 2: ±0.8 µm TIR is 0.2 µm of either component, by hand.
    offsets = offsets_of_change(plan, moved(plan, (1.0, 40e-6, 0.0)))

    assert [one.uncertainty for one in offsets] == pytest.approx([0.2e-6] * len(offsets))


def test_a_part_not_yet_on_brings_no_unbalance(monkeypatch):
    # 100 kg amid 2 m, 10 µm off: 500 g·mm in each plane; the 300 kg come one step later.
    with_material(monkeypatch, modulus=200e9, poisson=0.3, density=600.0)
    parts = [(1.0, 100.0), (1.2, 300.0)]
    plan = on_a_shaft(steps=[(0.0, 2.0, 0.001)], parts=parts, second=2.0)
    offsets = [BowOffset(0.0, 0j, 0.0), BowOffset(1.0, 1e-5j, 0.0), BowOffset(2.0, 0j, 0.0)]

    assert abs(bow_unbalance(plan, "step-part-1", offsets).first) == printed("500.0", 1e-6)
    # 300 kg · 8 µm · 0.4 more: 960 g·mm.
    assert abs(bow_unbalance(plan, "step-part-2", offsets).first) == printed("1460.0", 1e-6)


def test_journals_named_from_the_far_end_keep_their_own_unbalance(monkeypatch):
    # 100 kg at a quarter of the span, 10 µm off: 750 and 250 g·mm, by hand.
    with_material(monkeypatch, modulus=200e9, poisson=0.3, density=600.0)
    offsets = [BowOffset(0.0, 0j, 0.0), BowOffset(0.5, 1e-5j, 0.0), BowOffset(2.0, 0j, 0.0)]

    def made(first, second):
        plan = on_a_shaft(
            steps=[(0.0, 2.0, 0.001)], parts=[(0.5, 100.0)], first=first, second=second
        )
        return bow_unbalance(plan, "step-part-1", offsets)

    assert abs(made(0.0, 2.0).first) == printed("750.0", 1e-6)
    assert abs(made(2.0, 0.0).first) == printed("250.0", 1e-6)
    assert made(2.0, 0.0).permissible_first < made(2.0, 0.0).permissible_second


def test_without_a_speed_nothing_is_permitted_and_without_a_station_nothing_known(monkeypatch):
    with_material(monkeypatch, **STEEL)
    plan = on_a_shaft(
        steps=SHAFT, parts=[(1.0, 40.0)], second=2.0, between=PLACES, maximum_continuous_speed=None
    )

    made = bend(plan, 1, (1.0, 40e-6, 90.0))

    assert made.by_mount.permissible_first is None
    assert made.by_mount.ratio is None
    assert "may remain" not in " ".join(made.sentences)
    assert made.of_rotor is None


def test_the_station_that_drifted_farthest_is_named_with_the_limit(plan):
    limit = msgspec.structs.replace(plan.drift_limit, value=mm(0.05))
    plan = msgspec.structs.replace(plan, drift_limit=limit)

    found = bend(plan, 2, (1.0, 40e-6, 90.0))

    # 20 µm off amid the span is 40 µm TIR, by hand.
    assert (found.drift.station, found.drift.tir) == ("S4", pytest.approx(40e-6))
    assert "S4 has moved farthest" in found.sentences[-1]
    assert "limit 50.0 µm" in found.sentences[-1]


def test_the_bad_mount_of_the_invented_compressor_is_found_at_its_seat():
    job = sample_data.compressor()
    attempt = assess(job).attempt("impeller-2", 1)
    true = COMPRESSOR.mount("impeller-2", 1).kink
    shaft = [one for one in attempt.changes if job.plan.station(one.key).kind != "part"]
    _, place, _ = kink_by_trial(
        positions=[one.position for one in shaft],
        changes=[one.change for one in shaft],
        spreads=[one.reading_uncertainty for one in shaft],
    )

    found = attempt.bend

    low, high = found.kink.position_interval
    assert low <= true.position <= high
    assert found.kink.position == pytest.approx(place, abs=0.001)
    assert (found.seat.item, found.seat.is_just_mounted) == ("impeller-2", True)
    assert found.of_rotor.ratio > 1.0


def test_what_speaks_for_a_balance_at_speed_counts_the_bow_that_stands():
    view = assess(sample_data.compressor())
    standing = view.attempts[-1].bend.of_rotor

    critical, slender, bow = view.reasons_for_speed

    assert bow.value == standing.ratio
    # 64 in between the journals over 6.250 in, by hand from the drawn shaft.
    assert slender.value == printed("10.240")
    assert critical.value == pytest.approx(
        view.job.plan.rotor.maximum_continuous_speed.si / view.shaft.critical.speed
    )
