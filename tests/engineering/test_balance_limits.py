"""How much unbalance may remain."""

import math

import pint
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.balance_limits import (
    allocate_between_bearings,
    permissible_residual,
    permissible_residual_naval,
    permissible_residual_of_grade,
    permissible_residual_very_high_speed,
)
from models.engineering.errors import OutOfRangeError
from models.engineering.shaft import journal_loads_from_centre_of_gravity
from tests.published import balance as published
from tests.published.printed import printed

GRAVITY = 9.80665
revolutions = st.floats(100.0, 90_000.0)
journal_masses = st.floats(0.1, 50_000.0)


def by_journal(rule, mass: float, revolutions: float, least: float = 0.0):
    return rule(
        journal_load=mass * GRAVITY,
        least_journal_load=least,
        maximum_continuous_speed=revolutions * published.REVOLUTIONS_PER_MINUTE,
    )


@pytest.mark.parametrize("row", published.JOURNAL_RULE, ids=lambda row: row.case)
def test_the_journal_rule_agrees_with_its_source(row: published.LimitRow) -> None:
    permissible = by_journal(permissible_residual, row.mass, row.revolutions)
    assert permissible.unbalance == row.unbalance, row.source


@pytest.mark.parametrize("row", published.VERY_HIGH_SPEED, ids=lambda row: row.case)
def test_the_very_high_speed_rule_agrees_with_its_source(row: published.LimitRow) -> None:
    permissible = by_journal(permissible_residual_very_high_speed, row.mass, row.revolutions)
    assert permissible.unbalance == row.unbalance, row.source


@pytest.mark.parametrize("row", published.NAVAL, ids=lambda row: row.case)
def test_the_naval_rule_agrees_with_its_source(row: published.LimitRow) -> None:
    unbalance = permissible_residual_naval(
        rotor_mass=row.mass,
        maximum_continuous_speed=row.revolutions * published.REVOLUTIONS_PER_MINUTE,
    )
    assert unbalance == row.unbalance, row.source


@pytest.mark.parametrize("row", published.GRADES, ids=lambda row: row.case)
def test_a_grade_agrees_with_its_source(row: published.GradeRow) -> None:
    unbalance = permissible_residual_of_grade(
        rotor_mass=row.mass,
        grade=row.grade,
        maximum_continuous_speed=row.revolutions * published.REVOLUTIONS_PER_MINUTE,
    )
    assert unbalance == row.unbalance, row.source


@pytest.mark.parametrize("row", published.ALLOCATIONS, ids=lambda row: row.case)
def test_the_shares_of_two_planes_agree_with_their_source(row: published.AllocationRow) -> None:
    shares = allocate_between_bearings(
        permissible=row.permissible,
        centre_of_gravity=row.centre_of_gravity,
        first_plane=0.0,
        second_plane=row.span,
    )
    assert shares.first == row.first, row.source
    assert shares.second == row.second, row.source


@given(mass=journal_masses, speed=revolutions)
def test_ounces_pounds_and_inches_lead_to_the_same_residual(mass: float, speed: float) -> None:
    units = pint.get_application_registry()
    pounds = units.Quantity(mass, "kilogram").to("pound").magnitude
    imperial = units.Quantity(4.0 * pounds / speed, "ounce * inch").to("kilogram * meter").magnitude
    permissible = by_journal(permissible_residual, mass, speed)
    assert permissible.unbalance == pytest.approx(imperial, rel=1e-9)


def test_four_w_over_n_stands_for_one_velocity_at_every_speed() -> None:
    # By hand: 6350 µm·r/min times 2π/60, the G 0.665 of the trade.
    for speed in (1000.0, 3600.0, 12_000.0):
        unbalance = by_journal(permissible_residual, 1.0, speed).unbalance
        velocity = unbalance * speed * published.REVOLUTIONS_PER_MINUTE
        assert velocity == printed("0.665", published.MILLIMETRE_PER_SECOND)


def test_g_2_5_allows_nearly_four_times_as_much() -> None:
    unbalance = by_journal(permissible_residual, 100.0, 8000.0).unbalance
    graded = permissible_residual_of_grade(
        rotor_mass=100.0, grade=2.5e-3,
        maximum_continuous_speed=8000.0 * published.REVOLUTIONS_PER_MINUTE,
    )  # fmt: skip
    assert graded / unbalance == printed("3.76")


def test_the_two_forms_meet_at_25_000_revolutions() -> None:
    for speed in (24_999.99, 25_000.0, 25_000.01):
        both = [
            by_journal(rule, 7.0, speed).unbalance
            for rule in (permissible_residual, permissible_residual_very_high_speed)
        ]
        assert both[1] == pytest.approx(both[0], rel=1e-6)


def test_the_naval_rule_is_continuous_at_1000_and_nearly_so_at_150() -> None:
    def at(speed: float) -> float:
        return permissible_residual_naval(
            rotor_mass=500.0, maximum_continuous_speed=speed * published.REVOLUTIONS_PER_MINUTE
        )

    assert at(1000.0 * (1 + 1e-9)) == pytest.approx(at(1000.0 * (1 - 1e-9)), rel=1e-8)
    assert at(150.001) / at(149.999) == pytest.approx(4000.0 / 150.0**2 / 0.177, rel=1e-4)


def test_a_lifted_journal_counts_by_the_size_of_its_load_and_says_so() -> None:
    lifted = by_journal(permissible_residual, -100.0, 8000.0)
    pressed = by_journal(permissible_residual, 100.0, 8000.0)
    assert lifted.unbalance == pressed.unbalance
    assert lifted.journal_lifts
    assert not pressed.journal_lifts


def test_a_journal_that_carries_next_to_nothing_takes_the_least_load_and_says_so() -> None:
    least = 50.0 * GRAVITY
    light = by_journal(permissible_residual, 1.0, 8000.0, least)
    heavy = by_journal(permissible_residual, 60.0, 8000.0, least)
    assert light.floor_applied
    assert light.load_used == least
    # By hand: 6350·50/8000 g·mm.
    assert light.unbalance == printed("39.69", published.GRAM_MILLIMETRE)
    assert not heavy.floor_applied
    assert heavy.load_used == pytest.approx(60.0 * GRAVITY)


def test_a_journal_that_carries_nothing_is_allowed_nothing_without_a_floor() -> None:
    assert by_journal(permissible_residual, 0.0, 8000.0).unbalance == 0.0


@given(mass=journal_masses, slow=revolutions, factor=st.floats(1.0, 20.0))
def test_more_speed_never_permits_more_unbalance(mass: float, slow: float, factor: float) -> None:
    fast = slow * factor
    unit = published.REVOLUTIONS_PER_MINUTE
    for rule in (permissible_residual, permissible_residual_very_high_speed):
        by_fast, by_slow = (by_journal(rule, mass, speed).unbalance for speed in (fast, slow))
        assert by_fast <= by_slow * (1.0 + 1e-12)
    naval = [
        permissible_residual_naval(rotor_mass=mass, maximum_continuous_speed=speed * unit)
        for speed in (slow, fast)
    ]
    # The source rounds the slow range down by 0.4 %, so that speed gains that much at 150 r/min.
    assert naval[1] <= naval[0] * 1.005
    graded = [
        permissible_residual_of_grade(
            rotor_mass=mass, grade=2.5e-3, maximum_continuous_speed=speed * unit
        )
        for speed in (slow, fast)
    ]
    assert graded[1] <= graded[0] * (1.0 + 1e-12)


@given(whole=st.floats(1e-7, 1.0), centre=st.floats(0.0, 3.0))
def test_the_shares_of_two_planes_add_up_to_the_whole(whole: float, centre: float) -> None:
    shares = allocate_between_bearings(
        permissible=whole, centre_of_gravity=centre, first_plane=0.0, second_plane=3.0
    )
    assert shares.first + shares.second == pytest.approx(whole)
    assert max(shares.first, shares.second) <= 0.7 * whole * (1.0 + 1e-12)
    assert min(shares.first, shares.second) >= 0.3 * whole * (1.0 - 1e-9)


@given(centre=st.floats(0.91, 2.09))
def test_unlimited_shares_stand_as_the_loads_on_the_bearings(centre: float) -> None:
    shares = allocate_between_bearings(
        permissible=1.0, centre_of_gravity=centre, first_plane=0.0, second_plane=3.0
    )
    loads = journal_loads_from_centre_of_gravity(
        mass=100.0, centre_of_gravity=centre, first_journal=0.0, second_journal=3.0
    )
    assert not shares.limited
    assert shares.first / shares.second == pytest.approx(loads.first / loads.second)


def test_a_limited_share_says_so() -> None:
    shares = allocate_between_bearings(
        permissible=1.0, centre_of_gravity=2.5, first_plane=0.0, second_plane=3.0
    )
    assert shares.limited


@pytest.mark.parametrize(
    ("name", "call"),
    [
        ("maximum_continuous_speed", lambda: permissible_residual(
            journal_load=1.0, least_journal_load=0.0, maximum_continuous_speed=0.0)),
        ("journal_load", lambda: permissible_residual(
            journal_load=math.nan, least_journal_load=0.0, maximum_continuous_speed=1.0)),
        ("least_journal_load", lambda: permissible_residual_very_high_speed(
            journal_load=1.0, least_journal_load=-1.0, maximum_continuous_speed=1.0)),
        ("rotor_mass", lambda: permissible_residual_naval(
            rotor_mass=0.0, maximum_continuous_speed=1.0)),
        ("grade", lambda: permissible_residual_of_grade(
            rotor_mass=1.0, grade=0.0, maximum_continuous_speed=1.0)),
        ("permissible", lambda: allocate_between_bearings(
            permissible=0.0, centre_of_gravity=0.5, first_plane=0.0, second_plane=1.0)),
        ("second_plane", lambda: allocate_between_bearings(
            permissible=1.0, centre_of_gravity=0.5, first_plane=1.0, second_plane=0.0)),
        ("centre_of_gravity", lambda: allocate_between_bearings(
            permissible=1.0, centre_of_gravity=-0.2, first_plane=0.0, second_plane=1.0)),
    ],
    ids=lambda value: value if isinstance(value, str) else "",
)  # fmt: skip
def test_what_no_limit_can_be_taken_from_is_refused_by_name(name: str, call) -> None:
    with pytest.raises(OutOfRangeError) as refusal:
        call()
    assert refusal.value.name == name
