from __future__ import annotations

from dataclasses import replace

import pytest

from reports.palette import Colour
from reports.sheet.along import (
    BENCH_1280_LAYOUT,
    BENCH_1920_LAYOUT,
    DESK_LAYOUT,
    PAPER_LAYOUT,
    along_the_rotor,
    axis_for,
    magnification_along,
)
from reports.sheet.elements import Box, Circle, Line, Polygon
from reports.sheet.gap import gap_view
from reports.sheet.lines import OUTLINE, OUTLINE_CURRENT, VALUE_LIMIT
from reports.sheet.medium import DESK, PAPER_MEDIUM
from reports.sheet.pictures import (
    GapPicture,
    LengthUnit,
    RangeBar,
    RangePicture,
    VerdictKind,
)
from reports.sheet.ranges import fit_bar, fit_bar_height, round_ticks
from reports.sheet.verdict import verdict_shape
from tests.reports import invented

LAYOUTS = pytest.mark.parametrize(
    "layout",
    [BENCH_1280_LAYOUT, BENCH_1920_LAYOUT, DESK_LAYOUT, PAPER_LAYOUT],
    ids=lambda layout: layout.medium.name,
)


def being_read(layout, **more):
    return along_the_rotor(
        picture=invented.rotor(**more),
        curves=invented.curves_being_read(),
        changes=[invented.changes(after=invented.AFTER, active=7)],
        captions=[("change", "0.0001 in TIR")],
        layout=layout,
    )


def two_attempts(layout):
    return along_the_rotor(
        picture=invented.rotor(active=None, attempt=2),
        curves=invented.curves_of_two_attempts(),
        changes=[
            invented.changes(after=invented.AFTER),
            invented.changes(after=invented.SETTLED),
        ],
        captions=[("attempt 1", "change"), ("attempt 2", "change")],
        layout=layout,
    )


@LAYOUTS
@pytest.mark.parametrize("draw", [being_read, two_attempts])
def test_no_words_overlap_and_none_leaves_the_sheet(layout, draw):
    sheet = draw(layout)
    boxes = [(text.text, text.box(layout.medium)) for text in sheet.texts()]

    assert len(boxes) > 20
    for index, (words, box) in enumerate(boxes):
        assert box.left >= 0.0, words
        assert box.right <= sheet.width, words
        assert box.top >= 0.0, words
        assert box.bottom <= sheet.height, words
        for other_words, other in boxes[index + 1 :]:
            assert not box.overlaps(other), (words, other_words)


@LAYOUTS
def test_a_rotor_fits_its_row_also_while_a_part_hangs_hot(layout):
    picture = invented.rotor(lifted_gap=0.0004)
    axis = axis_for(picture=picture, layout=layout)
    sheet = being_read(layout, lifted_gap=0.0004)

    tops = [
        y
        for item in sheet.items
        if isinstance(item, Polygon) and item.hatch
        for _, y in item.points
    ]
    assert min(tops) >= layout.rotor[0]
    assert axis.x(0.0) >= layout.margin
    assert axis.x(picture.length) <= layout.width - layout.margin


def test_paper_takes_a_standard_scale_and_writes_it():
    sheet = two_attempts(PAPER_LAYOUT)

    # By hand: 62 in = 1 575 mm in 158 mm.
    assert "scale 1:10" in [text.text for text in sheet.texts()]
    assert axis_for(picture=invented.rotor(), layout=PAPER_LAYOUT).scale == 100.0


def test_without_curves_the_planes_are_left_out():
    bare = along_the_rotor(picture=invented.rotor())

    assert not [text.text for text in bare.texts() if "–180°" in text.text]


def test_every_attempt_has_a_row_of_its_own_and_the_sheet_grows_with_them():
    one, two = being_read(DESK_LAYOUT), two_attempts(DESK_LAYOUT)

    assert two.height - one.height == pytest.approx(
        DESK_LAYOUT.change_height + DESK.space, abs=12.0
    )
    marks = [mark.name for mark in two.marks]
    assert marks.count("change S7") == 2


def test_the_magnification_held_while_reading_is_kept_on_the_sheet():
    chosen = magnification_along(
        picture=invented.rotor(),
        curves=invented.curves_being_read(),
        limit_tir=0.0,
        layout=BENCH_1280_LAYOUT,
        held=500,
    )

    assert chosen == 500


def test_a_sheet_says_in_one_sentence_what_it_shows():
    assert being_read(DESK_LAYOUT).description == (
        "R-0418 (invented): 6 of 13 parts on, Impeller 4 in hand."
    )


def test_a_touch_on_a_station_finds_it_and_not_the_part_above():
    sheet = being_read(BENCH_1280_LAYOUT)
    axis = axis_for(picture=invented.rotor(), layout=BENCH_1280_LAYOUT)

    found = sheet.at(axis.x(invented.PLACES[6]), BENCH_1280_LAYOUT.names[0] + 4.0)

    assert found is not None
    assert found.name == "station S7"


def test_a_metric_job_has_its_own_unit_first_at_both_scale_bars():
    sheet = along_the_rotor(
        picture=replace(invented.rotor(), length_unit=LengthUnit.MILLIMETRE),
        curves=invented.curves_being_read(),
    )

    words = [text.text for text in sheet.texts()]
    assert any(text.startswith("100 mm = ") for text in words)
    assert any(text.endswith(" µm") for text in words)


SIZES = pytest.mark.parametrize("size", [2.4, 10.0, 100.0])


@SIZES
@pytest.mark.parametrize("kind", list(VerdictKind))
def test_every_shape_stays_within_its_height(kind, size):
    items = verdict_shape(kind=kind, x=0.0, y=0.0, size=size, medium=PAPER_MEDIUM)

    for item in items:
        if isinstance(item, Circle):
            reach = item.radius + PAPER_MEDIUM.width(item.stroke.width) / 2.0
        else:
            reach = max(max(abs(x), abs(y)) for x, y in item.points)
        assert reach <= 0.5 * size + 0.13


def area(points) -> float:
    return 0.5 * abs(
        sum(
            x1 * y2 - x2 * y1
            for (x1, y1), (x2, y2) in zip(points, (*points[1:], points[0]), strict=True)
        )
    )


def test_the_three_shapes_carry_more_ink_the_worse_the_verdict():
    within, look, stop = (
        verdict_shape(kind=kind, x=0.0, y=0.0, size=10.0, medium=DESK)
        for kind in (VerdictKind.WITHIN, VerdictKind.LOOK, VerdictKind.STOP)
    )
    # By hand: a ring of radius 4.3 and width 1.2.
    ring = 2.0 * 3.14159 * within[0].radius * DESK.width(within[0].stroke.width)

    assert ring == pytest.approx(32.4, abs=0.05)
    assert ring < sum(area(item.points) for item in look) < area(stop[0].points)


def test_only_a_large_stop_carries_its_bar():
    small = verdict_shape(kind=VerdictKind.STOP, x=0.0, y=0.0, size=2.9, medium=PAPER_MEDIUM)
    large = verdict_shape(kind=VerdictKind.STOP, x=0.0, y=0.0, size=3.0, medium=PAPER_MEDIUM)

    assert [item.fill for item in small] == [Colour.STOP]
    assert [item.fill for item in large] == [Colour.STOP, Colour.PAPER]


BAR = RangeBar(
    name="attempt 1",
    least=8.0,
    mean=8.5,
    greatest=9.0,
    uncertainty=0.5,
    text="0.0085 in",
    verdict=VerdictKind.WITHIN,
)
FIT = RangePicture(
    bars=(BAR,),
    lower=7.0,
    upper=10.0,
    lower_text="least 0.0070 in, drawing",
    upper_text="greatest 0.0100 in, drawing",
    unit="0.001 in",
    start=6.0,
    end=12.0,
)


def fit_items():
    height = fit_bar_height(picture=FIT, medium=DESK)
    return fit_bar(picture=FIT, place=Box(0.0, 0.0, 1000.0, height), medium=DESK).items


def test_a_range_lies_between_its_limits_to_scale():
    items = fit_items()
    band, bar = [item for item in items if isinstance(item, Polygon)]
    limits = [item.x1 for item in items if isinstance(item, Line) and item.stroke == VALUE_LIMIT]

    # By hand: 600 units for 6 to 12, from 250 on.
    assert sorted({x for x, _ in band.points}) == pytest.approx([350.0, 650.0])
    assert sorted({x for x, _ in bar.points}) == pytest.approx([450.0, 550.0])
    assert {350.0, 650.0} <= set(limits)


def test_the_whisker_reaches_beyond_the_range_by_the_uncertainty():
    levels = [
        (item.x1, item.x2) for item in fit_items() if isinstance(item, Line) and item.y1 == item.y2
    ]

    assert (400.0, 600.0) in [pytest.approx(level) for level in levels]


@pytest.mark.parametrize(
    ("start", "end"), [(0.0, 1.0), (-3.0, 4.0), (0.0, 7.01), (447.0, 600.0), (1e-6, 9e-6)]
)
def test_a_scale_has_two_to_seven_figures_inside_its_ends(start, end):
    ticks = round_ticks(start=start, end=end)

    assert 2 <= len(ticks) <= 7
    assert start - 1e-12 <= ticks[0]
    assert ticks[-1] <= end + 1e-12


def test_a_scale_without_length_is_refused():
    with pytest.raises(ValueError, match="above its start"):
        round_ticks(start=1.0, end=1.0)


def gap_lines(gap: float):
    picture = GapPicture(gap=gap, opening_gap=0.0002, least_gap=gap - 0.00005)
    items = gap_view(picture=picture, place=Box(0.0, 0.0, 300.0, 139.0), medium=DESK).items
    seat = next(item.y1 for item in items if isinstance(item, Line) and item.stroke == OUTLINE)
    bore = next(
        item.y1 for item in items if isinstance(item, Line) and item.stroke == OUTLINE_CURRENT
    )
    return bore, seat


def test_the_gap_closes_to_scale_and_never_below_its_seat():
    # By hand: 139 less two bands of 19.5 leaves 100 for 0.2 mm.
    opened, half, closed, past = (
        seat - bore for bore, seat in map(gap_lines, (0.0002, 0.0001, 0.0, -0.0001))
    )

    assert (opened, half, closed, past) == pytest.approx((100.0, 50.0, 0.0, 0.0))


def test_a_gap_that_was_never_open_is_refused():
    with pytest.raises(ValueError, match="above zero"):
        gap_view(
            picture=GapPicture(gap=0.0, opening_gap=0.0, least_gap=0.0),
            place=Box(0.0, 0.0, 10.0, 10.0),
            medium=DESK,
        )
