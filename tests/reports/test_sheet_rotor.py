from __future__ import annotations

from dataclasses import replace
from itertools import pairwise

import pytest

from reports.palette import Colour
from reports.sheet.elements import Box, Dash, Line, Polygon, Polyline, Text
from reports.sheet.lines import OUTLINE, OUTLINE_CURRENT, TO_COME
from reports.sheet.medium import BENCH_1280
from reports.sheet.pictures import (
    Facing,
    PartKind,
    PartOutline,
    PartState,
    RotorPicture,
    ShaftStep,
    StationMark,
    StationState,
)
from reports.sheet.profiles import shape_of
from reports.sheet.rotor import rotor, station_names
from reports.sheet.rotor_place import View
from reports.sheet.scale import Axis
from tests.reports import invented

PLACE = Box(0.0, 0.0, 1000.0, 300.0)
AXIS = Axis(origin=100.0, scale=500.0)
SHAFT = (
    ShaftStep(start=0.0, end=0.4, diameter=0.10),
    ShaftStep(start=0.4, end=1.0, diameter=0.16),
)


def part(kind=PartKind.SLEEVE, **more) -> PartOutline:
    return PartOutline(
        **{
            "key": "p",
            "name": "Part",
            "kind": kind,
            "start": 0.5,
            "end": 0.6,
            "bore_diameter": 0.16,
            "outer_diameter": 0.40,
            **more,
        }
    )


def drawn(*parts: PartOutline, view=View.HALF, stations=(), steps=SHAFT):
    picture = RotorPicture(name="R", steps=steps, parts=parts, stations=stations, drive_end_name="")
    return rotor(picture=picture, axis=AXIS, place=PLACE, medium=BENCH_1280, view=view)


def outlines(layer, stroke):
    return [
        item
        for item in layer.items
        if isinstance(item, Polygon | Polyline) and item.stroke == stroke
    ]


def flat(points) -> list[float]:
    return [value for point in points for value in point]


def test_lengths_and_diameters_have_the_same_scale():
    (shaft,) = outlines(drawn(), OUTLINE)

    # By hand: 500 to the metre, axis at 300: 0.4 m long, radius 0.05 m, then radius 0.08 m.
    expected = [100, 300, 100, 275, 300, 275, 300, 260, 600, 260, 600, 300]
    assert flat(shaft.points) == pytest.approx(expected)


def test_the_shaft_is_filled_and_never_hatched():
    filled = [
        item for item in drawn().items if isinstance(item, Polygon) and item.fill is Colour.SHEET
    ]

    assert len(filled) == 1
    assert filled[0].hatch is None


def test_the_bore_of_a_hollow_shaft_is_a_hidden_line():
    hollow = (ShaftStep(start=0.0, end=1.0, diameter=0.2, bore=0.04),)

    dashed = [
        item
        for item in drawn(steps=hollow).items
        if isinstance(item, Polyline) and item.stroke.dash is Dash.DASHED
    ]

    assert [line.points for line in dashed] == [((100.0, 290.0), (600.0, 290.0))]


def test_a_part_that_is_on_lies_on_the_shaft_in_a_wide_line():
    area = outlines(drawn(part()), OUTLINE)[-1]

    # By hand: 0.5 m to 0.6 m, radii 0.08 m and 0.20 m.
    expected = [350, 200, 350, 260, 400, 200, 400, 260]
    assert flat(sorted(area.points)) == pytest.approx(expected)
    assert area.hatch is not None


def test_a_part_to_come_is_an_outline_of_double_chain_without_hatching():
    layer = drawn(part(state=PartState.TO_COME))

    (outline,) = outlines(layer, TO_COME)
    assert isinstance(outline, Polyline)
    assert not any(isinstance(item, Polygon) and item.hatch for item in layer.items)


def test_the_part_in_hand_is_the_only_thing_in_the_accent():
    layer = drawn(part(state=PartState.CURRENT), part(key="q", start=0.7, end=0.8))

    assert len(outlines(layer, OUTLINE_CURRENT)) == 1
    accents = [
        item
        for item in layer.items
        if getattr(getattr(item, "stroke", None), "colour", None) is Colour.ACCENT
    ]
    assert len(accents) == 1


def test_a_hot_part_hangs_over_its_seat_by_fifty_times_its_gap():
    seated = outlines(drawn(part(state=PartState.CURRENT)), OUTLINE_CURRENT)[0]
    layer = drawn(part(state=PartState.CURRENT, lifted_gap=0.0002))
    hot = outlines(layer, OUTLINE_CURRENT)[0]

    # By hand: 0.0002 m × 50 × 500 to the metre.
    lifts = {
        round(low[1] - high[1], 6) for low, high in zip(seated.points, hot.points, strict=True)
    }
    assert lifts == {5.0}
    assert len(outlines(layer, TO_COME)) == 1


def test_neighbours_are_hatched_in_turn():
    layer = drawn(
        part(key="a", start=0.5, end=0.6),
        part(key="b", start=0.6, end=0.7),
        part(key="c", start=0.7, end=0.8),
    )

    directions = [
        item.hatch.rising for item in layer.items if isinstance(item, Polygon) and item.hatch
    ]
    assert all(one != other for one, other in pairwise(directions))


def test_the_half_view_ends_its_axis_in_two_short_bars_on_each_side():
    uprights = [item for item in drawn().items if isinstance(item, Line) and item.x1 == item.x2]

    assert sorted(line.x1 for line in uprights if line.y1 < 300.0 < line.y2) == [
        88.0,
        92.0,
        608.0,
        612.0,
    ]


def test_the_section_view_mirrors_the_shaft_and_shows_the_part_below_from_outside():
    layer = drawn(part(), view=View.SECTION)
    above, below = outlines(layer, OUTLINE)[:2]
    axis = above.points[0][1]

    mirrored = [(x, 2.0 * axis - y) for x, y in above.points]
    assert flat(mirrored) == pytest.approx(flat(below.points))
    hatched = [item for item in layer.items if isinstance(item, Polygon) and item.hatch]
    assert all(y <= axis for item in hatched for _, y in item.points)


def test_a_label_leads_to_the_left_where_the_right_edge_is_near():
    near = part(start=0.9, end=1.0, state=PartState.CURRENT, label="Sleeve in hand, attempt 2")
    narrow = Box(0.0, 0.0, 620.0, 300.0)
    picture = RotorPicture(name="R", steps=SHAFT, parts=(near,), drive_end_name="")

    layer = rotor(picture=picture, axis=AXIS, place=narrow, medium=BENCH_1280)

    (label,) = [
        item for item in layer.items if isinstance(item, Text) and item.text.startswith("Sleeve")
    ]
    assert label.box(BENCH_1280).right < 600.0


@pytest.mark.parametrize("kind", list(PartKind))
@pytest.mark.parametrize("facing", list(Facing))
def test_every_kind_of_part_keeps_to_its_ends_bore_and_outer_diameter(kind, facing):
    shape = shape_of(part=part(kind, facing=facing, hub_diameter=0.22))
    positions = [position for area in shape.cut for position, _ in area]
    radii = [radius for area in shape.cut for _, radius in area]

    assert (min(positions), max(positions)) == pytest.approx((0.5, 0.6))
    assert (min(radii), max(radii)) == pytest.approx((0.08, 0.20))
    assert max(radius for _, radius in shape.silhouette) == pytest.approx(0.20)


@pytest.mark.parametrize("kind", list(PartKind))
def test_a_part_turned_round_is_its_own_mirror_image(kind):
    one = shape_of(part=part(kind, facing=Facing.DRIVE_END)).cut
    other = shape_of(part=part(kind, facing=Facing.FAR_END)).cut

    for first, second in zip(one, other, strict=True):
        mirrored = [(1.1 - position, radius) for position, radius in second]
        assert mirrored == [pytest.approx(point) for point in first]


def test_an_impeller_looks_with_its_eye_towards_the_end_it_faces():
    _, cover = shape_of(part=part(PartKind.IMPELLER, facing=Facing.FAR_END)).cut

    eye = min(cover, key=lambda point: point[1])
    rim = max(cover, key=lambda point: point[1])
    assert eye[0] > rim[0]


def test_disc_and_cover_of_an_impeller_leave_the_passage_open():
    disc, cover = shape_of(part=part(PartKind.IMPELLER)).cut

    for position, radius in cover:
        for other, level in disc:
            if abs(level - radius) < 0.002:
                assert other > position


@pytest.mark.parametrize(
    ("change", "words"),
    [({"end": 0.5}, "beyond its start"), ({"outer_diameter": 0.16}, "above its bore")],
)
def test_an_impossible_part_is_refused_by_name(change, words):
    with pytest.raises(ValueError, match=f"Part: its .*{words}"):
        shape_of(part=replace(part(), **change))


def test_every_part_explains_itself_where_it_is_drawn():
    layer = drawn(part(key="impeller-1", name="Impeller 1", attempt=2))

    (mark,) = layer.marks
    assert mark.name == "part impeller-1"
    assert mark.tells == "Impeller 1 is on, attempt 2."
    assert mark.box == Box(350.0, 200.0, 400.0, 260.0)


def test_the_station_being_read_has_its_name_in_the_accent_and_a_pointer_on_the_surface():
    active = StationMark(key="S1", position=0.2, state=StationState.ACTIVE)
    layer = drawn(stations=(active,))
    names = station_names(
        stations=(active,), axis=AXIS, place=Box(0.0, 0.0, 1000.0, 20.0), medium=BENCH_1280
    )

    (pointer,) = [
        item for item in layer.items if isinstance(item, Polygon) and item.fill is Colour.ACCENT
    ]
    assert max(pointer.points, key=lambda point: point[1]) == (200.0, 275.0)
    assert [(text.text, text.colour) for text in names.items] == [("S1", Colour.ACCENT)]


def test_the_name_being_read_and_the_journals_stay_where_stations_crowd():
    crowd = tuple(
        StationMark(
            key=f"S{index}",
            position=0.02 * index,
            is_journal=index == 5,
            state=StationState.ACTIVE if index == 9 else StationState.READ,
        )
        for index in range(14)
    )

    layer = station_names(
        stations=crowd, axis=AXIS, place=Box(0.0, 0.0, 1000.0, 20.0), medium=BENCH_1280
    )

    written = {text.text for text in layer.items}
    assert {"S5", "S9"} <= written
    assert len(written) < 14
    assert len(layer.marks) == 14


def test_the_invented_rotor_is_as_long_as_its_last_step():
    # By hand: 62 in.
    assert invented.rotor().length == pytest.approx(1.5748)


def test_a_number_that_would_lie_on_a_taller_neighbour_is_left_out():
    tall = part(key="a", start=0.5, end=0.6, outer_diameter=0.5, number="1")
    low = part(key="b", start=0.6, end=0.61, outer_diameter=0.2, number="2")

    words = [item.text for item in drawn(tall, low).items if isinstance(item, Text)]

    assert "1" in words
    assert "2" not in words


def test_the_outside_of_a_lifted_part_still_closes_at_the_axis():
    hot = part(state=PartState.CURRENT, lifted_gap=0.0002)
    layer = drawn(hot, view=View.SECTION)
    seated = drawn(part(state=PartState.CURRENT), view=View.SECTION)

    below, before = (outlines(one, OUTLINE_CURRENT)[-1] for one in (layer, seated))

    assert below.points[0] == before.points[0]
    # By hand: 0.0002 m × 50 × 500 to the metre.
    assert below.points[1][1] - before.points[1][1] == pytest.approx(5.0)
