from __future__ import annotations

import cmath
import itertools
import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy.optimize import isotonic_regression

from reports.palette import Colour
from reports.sheet.change import LONGEST_VECTOR, change_row, limit_circle_radius, spread_places
from reports.sheet.dial import dial, dial_magnification, dial_radius
from reports.sheet.elements import Box, Circle, Dash, Line, Polygon, Polyline, Text
from reports.sheet.lines import (
    CURVE_AFTER,
    CURVE_BEFORE,
    CURVE_EARLIER,
    LIMIT,
    NOT_MEASURED,
    SEEN_EDGE,
)
from reports.sheet.medium import BENCH_1280, PAPER_MEDIUM
from reports.sheet.pictures import (
    ChangeMark,
    Curve,
    DialPicture,
    DialReading,
    PlaneCurve,
    StationMark,
    StationState,
    Turning,
    VerdictKind,
)
from reports.sheet.planes import planes, planes_magnification
from reports.sheet.scale import Axis

AXIS = Axis(origin=0.0, scale=500.0)
PLANES = Box(0.0, 0.0, 600.0, 80.0)
ROW = Box(0.0, 0.0, 600.0, 70.0)


def curve(which, *vectors, active=None):
    positions = tuple(0.1 + 0.2 * index for index in range(len(vectors)))
    return PlaneCurve(which=which, positions=positions, vectors=vectors, active=active)


def plane_items(*curves, magnification=2000):
    stations = [StationMark(key=f"S{index}", position=0.1 + 0.2 * index) for index in range(4)]
    return planes(
        curves=curves,
        stations=stations,
        axis=AXIS,
        length=1.0,
        place=PLANES,
        medium=BENCH_1280,
        magnification=magnification,
    ).items


def lines_of(items, stroke):
    return [item for item in items if isinstance(item, Polyline) and item.stroke == stroke]


def test_the_first_plane_shows_the_part_towards_0_and_the_second_towards_90_degrees():
    after = curve(Curve.AFTER, 10e-6 + 0j, 0 + 5e-6j)

    first, second = lines_of(plane_items(after), CURVE_AFTER)

    # By hand: 10 µm × 500 × 2 000 = 10 upwards from 20; 5 µm = 5 upwards from 60.
    assert [*first.points[0], *first.points[1]] == pytest.approx([50.0, 10.0, 150.0, 20.0])
    assert [*second.points[0], *second.points[1]] == pytest.approx([50.0, 60.0, 150.0, 55.0])


def test_lines_run_only_between_measured_neighbours():
    after = curve(Curve.AFTER, 1e-6 + 0j, 2e-6 + 0j, None, 3e-6 + 0j)
    items = plane_items(after)

    assert [len(line.points) for line in lines_of(items, CURVE_AFTER)] == [2, 2]
    dots = [item for item in items if isinstance(item, Circle) and item.fill is Colour.INK]
    assert len(dots) == 6


def test_the_point_still_being_typed_is_open_and_no_line_reaches_it():
    after = curve(Curve.AFTER, 1e-6 + 0j, 2e-6 + 0j, 3e-6 + 0j, active=2)
    items = plane_items(after)

    opened = [item for item in items if isinstance(item, Circle) and item.stroke is not None]
    assert [circle.x for circle in opened] == pytest.approx([250.0, 250.0])
    ends = [line.points[-1][0] for line in lines_of(items, CURVE_AFTER)]
    assert ends == pytest.approx([150.0, 150.0])


def test_before_is_thin_and_an_earlier_attempt_dashed_without_dots():
    items = plane_items(
        curve(Curve.BEFORE, 1e-6 + 0j, 2e-6 + 0j), curve(Curve.EARLIER, 3e-6 + 0j, 4e-6 + 0j)
    )

    assert len(lines_of(items, CURVE_BEFORE)) == 2
    assert all(line.stroke.dash is Dash.DASHED for line in lines_of(items, CURVE_EARLIER))
    assert {item.fill for item in items if isinstance(item, Circle)} == {Colour.BEFORE}


def test_half_the_limit_counts_for_the_magnification_as_an_eccentricity():
    small = curve(Curve.AFTER, 1e-6 + 0j)

    # By hand: 20 of half height; 1 µm allows 40 000 and takes 20 000, 25 µm allows 1 600.
    free = planes_magnification(curves=[small], limit_tir=0.0, place=PLANES, axis=AXIS)
    bound = planes_magnification(curves=[small], limit_tir=50e-6, place=PLANES, axis=AXIS)

    assert (free, bound) == (20000, 1000)


def test_the_written_scale_bar_is_as_long_as_it_says():
    items = plane_items(curve(Curve.AFTER, 1e-6 + 0j, 2e-6 + 0j))

    words = [item.text for item in items if isinstance(item, Text)]
    bar = max(
        (item for item in items if isinstance(item, Line) and item.x1 == item.x2 > 500.0),
        key=lambda line: line.y2 - line.y1,
    )
    # By hand: 0.002 in = 50.8 µm, × 500 × 2 000 = 50.8.
    assert "0.002 in" in words
    assert "50.8 µm" in words
    assert bar.y2 - bar.y1 == pytest.approx(50.8)


def change(**more) -> ChangeMark:
    return ChangeMark(
        **{
            "key": "S1",
            "position": 0.5,
            "change_tir": 10e-6 + 0j,
            "limit_tir": 20e-6,
            "text": "4",
            "verdict": VerdictKind.WITHIN,
            **more,
        }
    )


def row(*changes, counted=Turning.COUNTERCLOCKWISE, medium=BENCH_1280, axis=AXIS):
    return change_row(changes=changes, axis=axis, place=ROW, medium=medium, counted=counted).items


def test_the_circle_is_the_limit_and_the_vector_its_share():
    items = row(change())

    (circle,) = [item for item in items if isinstance(item, Circle) and item.stroke == LIMIT]
    (vector,) = [item for item in items if isinstance(item, Line)]
    assert circle.radius == 21.0
    # By hand: half the limit, towards 0°, which is up.
    assert (vector.x2 - vector.x1, vector.y2 - vector.y1) == pytest.approx((0.0, -10.5))


@pytest.mark.parametrize(
    ("counted", "expected"), [(Turning.COUNTERCLOCKWISE, -21.0), (Turning.CLOCKWISE, 21.0)]
)
def test_90_degrees_lie_where_the_marks_are_counted_to(counted, expected):
    (vector,) = [
        item for item in row(change(change_tir=20e-6j), counted=counted) if isinstance(item, Line)
    ]

    assert (vector.x2 - vector.x1, vector.y2 - vector.y1) == pytest.approx((expected, 0.0))


@pytest.mark.parametrize(
    ("pitch", "medium", "expected"),
    [
        # By hand: 0.46 × 500 × pitch, at most 21 and at least 12; on paper at most 4.2 mm.
        (0.20, BENCH_1280, 21.0),
        (0.08, BENCH_1280, 18.4),
        (0.05, BENCH_1280, None),
        (0.20, PAPER_MEDIUM, 4.2),
    ],
)
def test_the_circles_shrink_with_the_smallest_pitch_until_they_cannot_be_read(
    pitch, medium, expected
):
    radius = limit_circle_radius(positions=(0.1, 0.1 + pitch, 0.9), axis=AXIS, medium=medium)

    assert radius == (None if expected is None else pytest.approx(expected))


def test_crowded_circles_move_aside_and_keep_their_vectors_and_leaders():
    near = change(key="S2", position=0.52, change_tir=20e-6 + 0j)
    items = row(change(), near)

    rings = [item for item in items if isinstance(item, Circle) and item.stroke == LIMIT]
    first, second = sorted(ring.x for ring in rings)
    assert second - first == pytest.approx(rings[0].radius / 0.46)
    # Both move by the same amount, since both are as free to move.
    places = [AXIS.x(one.position) for one in (change(), near)]
    assert first + second == pytest.approx(sum(places))
    leaders = [item for item in items if isinstance(item, Line) and item.stroke == SEEN_EDGE]
    assert sorted(line.x1 for line in leaders) == pytest.approx(places)
    assert sorted(line.x2 for line in leaders) == pytest.approx([first, second])
    vectors = [item for item in items if isinstance(item, Line) and item.stroke != SEEN_EDGE]
    # By hand: half the limit and the whole of it, towards 0°, which is up.
    lengths = sorted(line.y1 - line.y2 for line in vectors)
    assert lengths == pytest.approx([0.5 * rings[0].radius, rings[0].radius])


def test_stations_too_many_for_circles_become_stems_against_one_band():
    many = [change(key=f"S{n}", position=0.1 + 0.01 * n) for n in range(90)]
    items = row(*many, change(key="last", position=1.02, change_tir=20e-6 + 0j))

    band = next(item for item in items if isinstance(item, Polygon))
    height = max(y for _, y in band.points) - min(y for _, y in band.points)
    stems = [line.y1 - line.y2 for line in items if isinstance(line, Line) and line.x1 == line.x2]
    assert band.fill is Colour.SHEET
    assert stems == pytest.approx([*[0.5 * height] * 90, height])


@given(
    st.lists(st.floats(0.0, 100.0), min_size=1, max_size=12).map(sorted),
    st.floats(0.0, 8.0),
)
def test_places_moved_apart_are_the_nearest_ones_that_keep_their_distance(places, gap):
    moved = spread_places(places=places, gap=gap, left=-1000.0, right=1000.0)

    assert moved is not None
    assert all(after - before >= gap - 1e-9 for before, after in itertools.pairwise(moved))
    # The same least squares by a solver that knows nothing of pooling.
    shifted = np.asarray(places) - gap * np.arange(len(places))
    expected = isotonic_regression(shifted).x + gap * np.arange(len(places))
    assert moved == pytest.approx(tuple(expected), abs=1e-9)


def test_places_that_do_not_fit_are_not_moved():
    assert spread_places(places=(1.0, 2.0, 3.0), gap=5.0, left=0.0, right=9.0) is None


def test_a_change_far_beyond_its_limit_ends_in_a_bar_before_it_meets_its_neighbour():
    items = row(change(change_tir=200e-6 + 0j, verdict=VerdictKind.STOP))

    vector, bar = [item for item in items if isinstance(item, Line)]
    assert vector.y1 - vector.y2 == pytest.approx(LONGEST_VECTOR * 21.0)
    assert bar.y1 == pytest.approx(bar.y2)


def test_a_station_not_measured_yet_is_a_dashed_ring():
    items = row(change(change_tir=None, text="", state=StationState.TO_COME))

    assert [item.stroke for item in items if isinstance(item, Circle)] == [NOT_MEASURED]


def test_a_journal_shows_that_it_is_the_datum_instead_of_a_change():
    items = row(change(is_datum=True, text="datum", verdict=VerdictKind.NOT_JUDGED))

    assert not [item for item in items if isinstance(item, Line)]
    assert "datum" in [item.text for item in items if isinstance(item, Text)]


@pytest.mark.parametrize(
    ("kind", "shapes"),
    [
        (VerdictKind.WITHIN, 0),
        (VerdictKind.NOT_JUDGED, 0),
        (VerdictKind.LOOK, 2),
        (VerdictKind.STOP, 1),
    ],
)
def test_a_shape_stands_beside_the_figure_unless_it_is_within(kind, shapes):
    items = row(change(verdict=kind))

    assert len([item for item in items if isinstance(item, Polygon)]) == shapes


def test_words_are_in_ink_and_never_in_the_colour_of_a_verdict():
    verdicts = {Colour.WITHIN, Colour.LOOK, Colour.STOP}
    items = row(
        *(
            change(key=kind, position=0.2 * (1 + index), verdict=kind)
            for index, kind in enumerate(VerdictKind)
        )
    )

    assert not {item.colour for item in items if isinstance(item, Text)} & verdicts


DIAL_PLACE = Box(0.0, 0.0, 400.0, 400.0)


def dial_items(picture, *, scale=500.0, magnification=2000):
    return dial(
        picture=picture,
        place=DIAL_PLACE,
        medium=BENCH_1280,
        scale=scale,
        magnification=magnification,
    ).items


def centre_and_radius(picture):
    ring = next(item for item in dial_items(picture) if isinstance(item, Circle))
    return ring.x, ring.y, ring.radius


def reading_dots(picture, **more):
    return [
        item
        for item in dial_items(picture, **more)
        if isinstance(item, Circle) and item.fill is Colour.INK
    ]


def test_a_reading_stands_on_its_ray_outside_the_base_circle_by_its_magnified_value():
    picture = DialPicture(key="S1", readings=(DialReading(angle=math.pi / 2, value=10e-6),))
    x, y, radius = centre_and_radius(picture)

    (dot,) = reading_dots(picture)

    # By hand: 90° counted against the clock is left; 10 µm × 500 × 2 000 = 10.
    assert (dot.x, dot.y) == pytest.approx((x - 0.62 * radius - 10.0, y))


def test_the_other_way_of_counting_mirrors_the_dial():
    picture = DialPicture(
        key="S1",
        readings=(DialReading(angle=math.pi / 2, value=10e-6),),
        counted=Turning.CLOCKWISE,
    )
    x, y, radius = centre_and_radius(picture)

    (dot,) = reading_dots(picture)

    assert (dot.x, dot.y) == pytest.approx((x + 0.62 * radius + 10.0, y))


def test_readings_of_a_pure_offset_lie_on_the_fitted_circle():
    offset = cmath.rect(8e-6, math.radians(30.0))
    readings = tuple(
        DialReading(
            angle=math.radians(step),
            value=3e-6 + (offset * cmath.exp(-1j * math.radians(step))).real,
        )
        for step in range(0, 360, 45)
    )
    picture = DialPicture(key="S1", readings=readings, mean=3e-6, eccentricity=offset)

    (fitted,) = [
        item
        for item in dial_items(picture)
        if isinstance(item, Circle) and item.stroke == CURVE_AFTER
    ]

    # A circle off its centre by e reads r + e·cos up to e²/2r, here 8²/(2·0.62·R) = 0.4.
    dots = [dot for dot in reading_dots(picture)]
    assert len(dots) == 8
    for dot in dots:
        distance = math.hypot(dot.x - fitted.x, dot.y - fitted.y)
        assert distance == pytest.approx(fitted.radius, abs=0.5)


def test_the_limit_is_a_circle_of_half_its_total_about_the_point_before():
    picture = DialPicture(
        key="S1", readings=(), before=6e-6 + 0j, eccentricity=9e-6 + 0j, limit_tir=20e-6
    )
    x, y, _ = centre_and_radius(picture)

    (limit,) = [
        item
        for item in dial_items(picture)
        if isinstance(item, Circle) and item.stroke and item.stroke.dash is Dash.SHORT
    ]

    # By hand: 6 µm up is 6; half of 20 µm is 10.
    assert (limit.x, limit.y, limit.radius) == pytest.approx((x, y - 6.0, 10.0))


@pytest.mark.parametrize(
    ("offset", "expected"),
    [
        # By hand: base circle 62, 0.35 of it 21.7; offset × 500 × magnification.
        (20e-6, 2000),
        (22e-6, 1000),
        (50e-6, 500),
    ],
)
def test_the_dial_steps_down_so_that_no_circle_looks_dented(offset, expected):
    picture = DialPicture(key="S1", readings=(), before=offset + 0j)

    assert dial_magnification(picture=picture, radius=100.0, scale=500.0, wanted=2000) == expected


def test_no_reading_leaves_the_dial():
    wild = DialPicture(key="S1", readings=(DialReading(angle=1.0, value=2.54e-3),))
    x, y, radius = centre_and_radius(wild)

    (dot,) = reading_dots(wild)

    assert math.hypot(dot.x - x, dot.y - y) < radius


def test_the_mark_to_read_now_is_the_only_accented_figure():
    picture = DialPicture(key="S1", readings=(), active_angle=math.radians(225.0))

    accented = [
        item.text
        for item in dial_items(picture)
        if isinstance(item, Text) and item.colour is Colour.ACCENT
    ]
    assert accented == ["225°"]


def test_the_dials_own_magnification_is_written_under_it():
    picture = DialPicture(key="S1", readings=(), before=200e-6 + 0j)
    radius = dial_radius(place=DIAL_PLACE, medium=BENCH_1280, captions=1)

    words = [item.text for item in dial_items(picture) if isinstance(item, Text)]

    # By hand: 0.35 · 0.62 · R / (200 µm · 500), R near 150: 325, so 200.
    assert 140.0 < radius < 180.0
    assert "from the drive end, ×200" in words


def test_words_of_a_dial_never_overlap():
    picture = DialPicture(key="S1", readings=(), caption=("from the drive end", "second line"))

    boxes = [item.box(BENCH_1280) for item in dial_items(picture) if isinstance(item, Text)]
    assert len(boxes) == 10
    assert not any(one.overlaps(other) for one in boxes for other in boxes if one is not other)
    assert all(box.left >= 0.0 and box.right <= 400.0 for box in boxes)
    assert all(box.top >= 0.0 and box.bottom <= 400.0 for box in boxes)
