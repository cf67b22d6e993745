import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.runout import (
    closure_error,
    face_free_of_float,
    face_perpendicularity,
    fit_harmonics,
    indexing_error,
    lever_corrected,
    vee_block_factor,
)
from tests.published.printed import printed
from tests.published.runout import BLOCKS, FACES, SLIPS, WORKSHEET, WORKSHEET_SOURCE
from tests.second_paths.vee_block import shown_size

INCH = 0.0254
MICRON = 1e-6


def test_a_turn_that_does_not_close_says_by_how_much():
    assert closure_error(first=-1.5 * MICRON, last=1.0 * MICRON) == printed("2.5", MICRON)


@given(reading=st.floats(-1e-3, 1e-3))
def test_a_turn_read_alike_at_both_ends_is_closed(reading):
    assert closure_error(first=reading, last=reading) == 0.0


def test_a_lever_at_thirty_degrees_reads_fifteen_percent_high():
    # By hand: 1 / cos 30° = 1.155.
    assert 1.0 / lever_corrected(reading=1.0, lever_angle=math.radians(30)) == printed("1.155")


def test_a_lever_along_the_surface_reads_true():
    assert lever_corrected(reading=7.0, lever_angle=0.0) == 7.0


@given(angle=st.floats(-1.5, 1.5))
def test_a_lever_never_moves_more_than_it_reads_and_either_side_is_alike(angle):
    movement = lever_corrected(reading=1.0, lever_angle=angle)
    assert 0.0 < movement <= 1.0
    assert movement == lever_corrected(reading=1.0, lever_angle=-angle)


def test_a_swinging_lever_moves_as_the_arc_it_sweeps():
    # Second path: a tip on a lever of 20 mm swings through a small angle about its slant.
    arm, slant, swing = 0.020, math.radians(25), 1e-6
    rise = arm * (math.sin(slant + swing) - math.sin(slant - swing))
    read = arm * 2.0 * swing
    assert lever_corrected(reading=read, lever_angle=slant) == pytest.approx(rise, rel=1e-9)


@pytest.mark.parametrize("angle", [math.pi / 2, -2.0])
def test_a_lever_at_a_right_angle_is_refused_by_name(angle):
    with pytest.raises(OutOfRangeError, match="lever_angle"):
        lever_corrected(reading=1.0, lever_angle=angle)


@pytest.mark.parametrize("block", BLOCKS, ids=lambda block: f"{block.included_degrees:.0f} degrees")
def test_lobes_over_a_block_agree_with_their_source(block):
    angle = math.radians(block.included_degrees)
    for lobes, factor in enumerate(block.factors, start=1):
        # A bare 0 stands for nothing at all.
        expected = printed("0.00") if factor == "0" else printed(factor)
        assert vee_block_factor(included_angle=angle, lobes=lobes) == expected, block.source


@pytest.mark.parametrize("degrees", [60.0, 90.0, 108.0])
@pytest.mark.parametrize("lobes", [2, 3, 4, 5, 7])
def test_lobes_over_a_block_agree_with_a_disc_laid_in_it(degrees, lobes):
    angle = math.radians(degrees)
    factor = vee_block_factor(included_angle=angle, lobes=lobes)
    assert factor == pytest.approx(shown_size(included_angle=angle, lobes=lobes), abs=0.02)


@given(angle=st.floats(0.1, 3.0))
def test_no_block_shows_the_offset_of_the_journal_in_it(angle):
    assert vee_block_factor(included_angle=angle, lobes=1) == pytest.approx(0.0, abs=1e-9)


@pytest.mark.parametrize(
    ("name", "given_block"),
    [
        ("included_angle", {"included_angle": 0.0, "lobes": 2}),
        ("included_angle", {"included_angle": math.pi, "lobes": 2}),
        ("lobes", {"included_angle": 1.0, "lobes": 0}),
    ],
)
def test_a_block_that_is_none_is_refused_by_name(name, given_block):
    with pytest.raises(OutOfRangeError, match=name):
        vee_block_factor(**given_block)


@pytest.mark.parametrize("row", FACES, ids=lambda row: row.case)
def test_a_tilted_face_agrees_with_its_source(row):
    found = face_perpendicularity(tir=row.tir, diameter=row.diameter)
    assert found == printed(row.microradians, MICRON), row.source


def test_a_tilted_plane_turned_under_an_indicator_gives_its_tilt_back():
    tilt, diameter, marks = 80 * MICRON, 0.3, np.arange(8) * math.pi / 4
    height = math.tan(tilt) * diameter / 2 * np.cos(marks - 1.0)
    total = 2 * abs(fit_harmonics(angles=marks, readings=height).eccentricity)
    assert face_perpendicularity(tir=total, diameter=diameter) == pytest.approx(tilt, rel=1e-6)


def test_a_face_without_diameter_is_refused_by_name():
    with pytest.raises(OutOfRangeError, match="diameter"):
        face_perpendicularity(tir=1.0, diameter=0.0)


def test_half_differences_of_opposite_readings_agree_with_the_printed_worksheet():
    north_south = face_free_of_float(
        readings_a=[row.north for row in WORKSHEET], readings_b=[row.south for row in WORKSHEET]
    )
    east_west = face_free_of_float(
        readings_a=[row.east for row in WORKSHEET], readings_b=[row.west for row in WORKSHEET]
    )
    for row, first, second in zip(WORKSHEET, north_south, east_west, strict=True):
        assert abs(first) == printed(row.north_south_half), WORKSHEET_SOURCE
        assert abs(second) == printed(row.east_west_half), WORKSHEET_SOURCE


@given(seed=st.integers(0, 10_000))
def test_float_of_any_size_leaves_the_tilt_alone(seed):
    source = np.random.default_rng(seed)
    marks = np.arange(8) * math.pi / 4
    face = 12 * MICRON * np.cos(marks - 0.7)
    float_of_the_rotor = source.normal(size=8) * 50 * MICRON
    free = face_free_of_float(
        readings_a=face + float_of_the_rotor, readings_b=-face + float_of_the_rotor
    )
    assert free == pytest.approx(face, abs=1e-15)


def test_a_face_read_unequally_often_is_refused_by_name():
    with pytest.raises(OutOfRangeError, match="readings_b"):
        face_free_of_float(readings_a=[1.0, 2.0], readings_b=[1.0])


@pytest.mark.parametrize("row", SLIPS, ids=lambda row: f"{row.degrees} degrees")
def test_a_slip_of_the_marks_agrees_with_its_source(row):
    fake = indexing_error(tir=row.total * MICRON, slip=math.radians(row.degrees))
    assert fake == printed(row.change, MICRON), row.source


@given(slip=st.floats(-7.0, 7.0))
def test_a_slip_fakes_what_turning_the_marks_does(slip):
    marks = np.arange(12) * math.pi / 6
    straight = fit_harmonics(angles=marks, readings=np.cos(marks)).eccentricity
    slipped = fit_harmonics(angles=marks, readings=np.cos(marks + slip)).eccentricity
    assert indexing_error(tir=2.0, slip=slip) == pytest.approx(2 * abs(slipped - straight))


def test_no_slip_fakes_nothing_and_a_whole_turn_neither():
    assert indexing_error(tir=40.0, slip=0.0) == 0.0
    assert indexing_error(tir=40.0, slip=2 * math.pi) == pytest.approx(0.0, abs=1e-12)


def test_a_slip_of_a_negative_total_is_refused_by_name():
    with pytest.raises(OutOfRangeError, match="tir"):
        indexing_error(tir=-1.0, slip=0.1)
