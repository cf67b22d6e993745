from __future__ import annotations

import pytest
from hypothesis import given
from hypothesis import strategies as st

from reports.sheet.pictures import LengthUnit
from reports.sheet.scale import (
    Axis,
    axis_at_scale,
    axis_fitting,
    magnification_for,
    magnification_text,
    paper_scale_for,
    scale_bar_for,
    step_not_above,
)


def test_the_longer_demand_of_length_and_radius_sets_the_one_scale():
    # By hand: 2 m in 800 allows 400 to the metre, 0.25 m in 50 allows 200.
    axis = axis_fitting(length=2.0, greatest_radius=0.25, left=0.0, right=800.0, height=50.0)

    assert axis.scale == 200.0
    assert (axis.x(0.0), axis.x(2.0)) == (200.0, 600.0)


@pytest.mark.parametrize(
    ("length", "radius", "left", "right", "height"),
    [
        (0.0, 1.0, 0.0, 1.0, 1.0),
        (1.0, 0.0, 0.0, 1.0, 1.0),
        (1.0, 1.0, 1.0, 1.0, 1.0),
        (1.0, 1.0, 0.0, 1.0, 0.0),
    ],
)
def test_a_rotor_or_strip_without_extent_is_refused_in_words(length, radius, left, right, height):
    with pytest.raises(ValueError, match="length and a height above zero"):
        axis_fitting(length=length, greatest_radius=radius, left=left, right=right, height=height)


@pytest.mark.parametrize(
    ("greatest", "half_height", "scale", "expected"),
    [
        # By hand: half height / (scale × greatest), rounded down to 1, 2 or 5 times ten.
        (1.0e-5, 20.0, 1000.0, 2000),
        (1.01e-5, 20.0, 1000.0, 1000),
        (4.0e-6, 20.0, 1000.0, 5000),
        (2.0e-6, 20.0, 1000.0, 10000),
        (1.0, 20.0, 1000.0, 1),
    ],
)
def test_the_magnification_is_the_largest_step_that_fits(greatest, half_height, scale, expected):
    assert magnification_for(greatest=greatest, half_height=half_height, scale=scale) == expected


@given(
    greatest=st.floats(1e-7, 1e-3),
    half_height=st.floats(10.0, 100.0),
    scale=st.floats(50.0, 2000.0),
)
def test_no_curve_leaves_its_strip_and_no_larger_step_would_fit(greatest, half_height, scale):
    chosen = magnification_for(greatest=greatest, half_height=half_height, scale=scale)
    largest = chosen * scale * greatest

    if chosen > 1:
        assert largest <= half_height * (1.0 + 1e-8)
    assert 2.5 * largest > half_height


def test_a_magnification_in_use_steps_down_but_never_up():
    held = {"half_height": 20.0, "scale": 1000.0, "held": 2000}

    assert magnification_for(greatest=1e-6, **held) == 2000
    assert magnification_for(greatest=3e-5, **held) == 500
    assert magnification_for(greatest=0.0, **held) == 2000


@given(value=st.floats(1.0, 1e9))
def test_a_step_is_one_two_or_five_times_a_power_of_ten(value):
    step = step_not_above(value=value)

    assert str(step).rstrip("0") in {"1", "2", "5"}
    assert step <= value * (1.0 + 1e-9) < 2.5 * step * (1.0 + 1e-8)


def test_a_magnification_is_written_with_a_thin_space_in_the_thousands():
    assert magnification_text(magnification=500) == "×500"
    assert magnification_text(magnification=10000) == "×10\N{THIN SPACE}000"


@pytest.mark.parametrize(
    ("length", "radius", "expected"),
    [
        # By hand, in a place 150 mm wide and 25 mm high for the radius.
        (1.5, 0.1, 10),
        (1.501, 0.1, 20),
        (0.5, 0.3, 20),
        (0.15, 0.02, 1),
        (16.0, 0.5, 200),
    ],
)
def test_paper_takes_the_next_standard_scale(length, radius, expected):
    assert (
        paper_scale_for(length=length, greatest_radius=radius, width=150.0, height=25.0) == expected
    )


def test_at_one_to_ten_a_metre_is_a_hundred_millimetres():
    axis = axis_at_scale(length=1.2, reduction=10, left=0.0, right=172.0)

    assert axis.x(1.2) - axis.x(0.0) == pytest.approx(120.0)
    assert axis.x(0.6) == pytest.approx(86.0)


def test_the_scale_bar_is_round_in_the_jobs_own_unit_and_names_the_other():
    inch = scale_bar_for(scale=600.0, greatest_width=40.0, length_unit=LengthUnit.INCH)
    metric = scale_bar_for(scale=600.0, greatest_width=40.0, length_unit=LengthUnit.MILLIMETRE)

    # By hand: 40 units are 66.7 mm or 2.62 in.
    assert inch == (0.0508, "2 in = 50.8 mm")
    assert metric == (0.05, "50 mm = 1.97 in")


def test_an_axis_runs_from_the_drive_end_to_the_right():
    axis = Axis(origin=100.0, scale=600.0)

    assert axis.x(0.25) == 250.0
