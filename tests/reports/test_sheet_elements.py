from __future__ import annotations

import math

import pytest

from reports.palette import Colour
from reports.sheet.elements import (
    Anchor,
    Box,
    Dash,
    Layer,
    Line,
    Mark,
    Stroke,
    Text,
    hatch_segments,
    sheet_of,
)
from reports.sheet.labels import Label, thinned
from reports.sheet.medium import BENCH_1280, BENCH_1920, PAPER_MEDIUM, LineWidth, Size
from reports.typeface import Weight


def sheet_with(*marks: Mark):
    return sheet_of(width=100.0, height=100.0, medium=BENCH_1280, layers=[Layer(marks=marks)])


def test_of_two_marks_one_inside_the_other_the_smaller_is_touched():
    large = Mark(name="part", tells="A part.", box=Box(0.0, 0.0, 50.0, 50.0))
    small = Mark(name="station", tells="A station.", box=Box(10.0, 10.0, 20.0, 20.0))
    sheet = sheet_with(large, small)

    assert sheet.at(15.0, 15.0) is small
    assert sheet.at(30.0, 30.0) is large
    assert sheet.at(60.0, 30.0) is None


def test_layers_keep_their_order_on_the_sheet():
    stroke = Stroke(Dash.CONTINUOUS, LineWidth.NARROW, Colour.INK)
    lines = [Line(x1=x, y1=0.0, x2=x, y2=1.0, stroke=stroke) for x in (1.0, 2.0, 3.0)]
    sheet = sheet_of(
        width=10.0,
        height=10.0,
        medium=BENCH_1280,
        layers=[Layer(items=(lines[0],)), Layer(items=(lines[1], lines[2]))],
    )

    assert sheet.items == tuple(lines)


# ISO 128-2, table of line types, in line widths; from memory.
@pytest.mark.parametrize(
    ("dash", "lengths"),
    [
        (Dash.CONTINUOUS, ()),
        (Dash.DASHED, (12.0, 3.0)),
        (Dash.CHAIN, (24.0, 3.0, 0.5, 3.0)),
        (Dash.DOUBLE_CHAIN, (24.0, 3.0, 0.5, 3.0, 0.5, 3.0)),
    ],
)
def test_broken_lines_have_the_lengths_of_the_drawing_standard(dash, lengths):
    assert dash.lengths == lengths


@pytest.mark.parametrize("medium", [BENCH_1280, BENCH_1920, PAPER_MEDIUM])
def test_wide_lines_are_twice_as_wide_as_narrow_ones(medium):
    assert medium.width(LineWidth.WIDE) == 2.0 * medium.width(LineWidth.NARROW)


def test_a_width_that_belongs_to_a_shape_is_taken_as_it_is():
    assert PAPER_MEDIUM.width(1.75) == 1.75


def test_sizes_on_paper_are_points_turned_into_millimetres():
    # By hand: 7 pt × 25.4 / 72.
    assert PAPER_MEDIUM.size(Size.NOTE) == pytest.approx(2.469, abs=0.0005)


def inside(point, corners) -> bool:
    x, y = point
    odd = False
    for (x1, y1), (x2, y2) in zip(corners, (*corners[1:], corners[0]), strict=True):
        if (y1 > y) != (y2 > y) and x < x1 + (y - y1) / (y2 - y1) * (x2 - x1):
            odd = not odd
    return odd


@pytest.mark.parametrize("rising", [True, False])
def test_hatching_lines_run_at_45_degrees_inside_a_hollow_area(rising):
    hollow = (
        (0.0, 0.0),
        (40.0, 0.0),
        (40.0, 40.0),
        (30.0, 40.0),
        (30.0, 10.0),
        (10.0, 10.0),
        (10.0, 40.0),
        (0.0, 40.0),
    )

    segments = hatch_segments(points=hollow, pitch=3.0, rising=rising)

    assert len(segments) > 10
    for (x1, y1), (x2, y2) in segments:
        assert (y2 - y1) == pytest.approx(-(x2 - x1) if rising else x2 - x1, abs=1e-9)
        assert inside(((x1 + x2) / 2.0, (y1 + y2) / 2.0), hollow)


def test_hatching_lines_lie_one_pitch_apart_and_cover_the_area_evenly():
    # By hand: lines one pitch apart are as long together as the area divided by the pitch.
    square = ((0.0, 0.0), (100.0, 0.0), (100.0, 100.0), (0.0, 100.0))

    together = sum(
        math.dist(one, two) for one, two in hatch_segments(points=square, pitch=1.0, rising=True)
    )

    assert together == pytest.approx(100.0 * 100.0 / 1.0, rel=0.01)


def row_of_labels(count: int, pitch: float, important: int | None = None) -> list[Label]:
    return [
        Label(
            text=Text(
                x=pitch * index, y=50.0, text=f"S{index + 1}0", size=Size.NOTE, anchor=Anchor.MIDDLE
            ),
            importance=int(index == important),
            name=str(index),
        )
        for index in range(count)
    ]


def test_labels_with_room_all_stay():
    labels = row_of_labels(6, 60.0)

    assert thinned(labels=labels, medium=BENCH_1280) == tuple(labels)


def test_labels_a_little_too_close_run_narrow_before_any_is_left_out():
    # "S10" at 20 px is 36.8 px wide, narrow 32.4 px; 4 px stay free between two.
    labels = row_of_labels(6, 39.0)

    kept = thinned(labels=labels, medium=BENCH_1280)

    assert len(kept) == 6
    assert all(label.text.condensed for label in kept)


def test_of_equal_labels_too_close_every_second_stays():
    kept = thinned(labels=row_of_labels(7, 25.0), medium=BENCH_1280)

    assert [label.name for label in kept] == ["0", "2", "4", "6"]


def test_the_important_label_stays_and_its_neighbours_give_way():
    kept = thinned(labels=row_of_labels(7, 25.0, important=3), medium=BENCH_1280)

    names = [label.name for label in kept]
    assert "3" in names
    assert not {"2", "4"} & set(names)


@pytest.mark.parametrize("pitch", [5.0, 12.0, 25.0, 33.0, 41.0])
def test_labels_that_stay_never_overlap(pitch):
    boxes = [
        label.box(BENCH_1280)
        for label in thinned(labels=row_of_labels(12, pitch), medium=BENCH_1280)
    ]

    assert not any(one.overlaps(other) for one in boxes for other in boxes if one is not other)


def test_a_label_keeps_clear_of_places_already_taken():
    labels = row_of_labels(3, 60.0)
    taken = [Box(50.0, 40.0, 70.0, 60.0)]

    kept = thinned(labels=labels, medium=BENCH_1280, taken=taken)

    assert [label.name for label in kept] == ["0", "2"]


def test_words_anchored_at_their_end_reach_to_the_left():
    text = Text(
        x=100.0, y=50.0, text="0000", size=Size.NOTE, weight=Weight.MEDIUM, anchor=Anchor.END
    )

    box = text.box(BENCH_1280)

    # By hand: four figures of 0.600 em at 20 px.
    assert (box.left, box.right) == pytest.approx((52.0, 100.0))
