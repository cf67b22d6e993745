"""What speaks for balancing a rotor at its speed."""

import math

import pint
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.high_speed import (
    USUAL_FORCE_SHARE_AT_SPEED,
    USUAL_SHAFT_VIBRATION_AT_SPEED,
    reasons_for_high_speed_balance,
)

UNKNOWN = {
    "maximum_continuous_speed": 900.0,
    "first_critical_speed": None,
    "span_over_diameter": None,
    "bow_over_permissible": None,
}


@pytest.mark.parametrize(
    ("known", "speaks"),
    [
        ({"first_critical_speed": 400.0}, [True, None, None]),
        ({"first_critical_speed": 2000.0}, [False, None, None]),
        ({"span_over_diameter": 14.0}, [None, True, None]),
        ({"span_over_diameter": 12.0}, [None, False, None]),
        ({"span_over_diameter": 12.001}, [None, True, None]),
        ({"bow_over_permissible": 1.0}, [None, None, False]),
        ({"bow_over_permissible": 1.001}, [None, None, True]),
        ({"bow_over_permissible": 60.0}, [None, None, True]),
        ({"bow_over_permissible": 0.0}, [None, None, False]),
        ({}, [None, None, None]),
    ],
)
def test_each_reason_speaks_by_itself_and_an_unknown_one_stays_unknown(known, speaks) -> None:
    reasons = reasons_for_high_speed_balance(**{**UNKNOWN, **known})
    assert [reason.speaks for reason in reasons] == speaks


def test_a_rotor_at_seven_tenths_of_its_critical_speed_is_on_the_limit() -> None:
    def speaks(critical: float) -> bool | None:
        known = {**UNKNOWN, "first_critical_speed": critical}
        return reasons_for_high_speed_balance(**known)[0].speaks

    assert speaks(900.0 / 0.6999) is False
    assert speaks(900.0 / 0.7001) is True


@given(slow=st.floats(10.0, 3000.0), factor=st.floats(1.0, 10.0))
def test_more_speed_never_takes_a_reason_away(slow: float, factor: float) -> None:
    def reasons(speed: float) -> list[bool | None]:
        listed = reasons_for_high_speed_balance(
            maximum_continuous_speed=speed, first_critical_speed=600.0,
            span_over_diameter=13.0, bow_over_permissible=0.5,
        )  # fmt: skip
        return [reason.speaks for reason in listed]

    for before, after in zip(reasons(slow), reasons(slow * factor), strict=True):
        assert after or not before


def test_every_reason_says_what_it_is_and_where_it_comes_from() -> None:
    reasons = reasons_for_high_speed_balance(**UNKNOWN)
    assert len({reason.statement for reason in reasons}) == 3
    assert all(reason.source for reason in reasons)


def test_the_usual_result_is_half_a_thousandth_of_an_inch_and_a_tenth_of_the_load() -> None:
    # H. P. Bloch, M. P. Singh, Steam Turbines, 2nd edition, 4.7.1, p. 93.
    half_a_thousandth = pint.get_application_registry().Quantity(0.5, "thou")
    assert USUAL_SHAFT_VIBRATION_AT_SPEED.value == pytest.approx(
        half_a_thousandth.to(USUAL_SHAFT_VIBRATION_AT_SPEED.unit).magnitude
    )
    assert USUAL_FORCE_SHARE_AT_SPEED.value == pytest.approx(10.0 / 100.0)


@pytest.mark.parametrize(
    ("name", "wrong"),
    [
        ("maximum_continuous_speed", 0.0),
        ("first_critical_speed", -1.0),
        ("span_over_diameter", math.nan),
        ("bow_over_permissible", -0.1),
    ],
)
def test_a_reason_of_nothing_is_refused_by_name(name: str, wrong: float) -> None:
    with pytest.raises(OutOfRangeError) as refusal:
        reasons_for_high_speed_balance(**{**UNKNOWN, name: wrong})
    assert refusal.value.name == name
