"""A station watched while it cools: its points, its curve, and the band it ends in."""

import pytest

from reports.sheet.decay import DecayPicture, decay, decay_height
from reports.sheet.elements import Box, Circle, Polygon, Polyline, Text, sheet_of
from reports.sheet.medium import PAPER_MEDIUM

PLACE = Box(0.0, 0.0, 160.0, 50.0)
FITTED = DecayPicture(
    hours=(0.0, 1.0, 2.0, 3.0),
    values=(13.0, 9.0, 7.0, 6.0),
    curve=tuple((0.25 * index, 5.0 + 8.0 * 0.5 ** (0.25 * index)) for index in range(25)),
    final=5.0,
    uncertainty=0.5,
    unit="µm",
    name="S3, while it cools",
    tells="Watched at S3.",
)


def drawn(picture):
    return decay(picture=picture, place=PLACE, medium=PAPER_MEDIUM)


def of(layer, kind):
    return [one for one in layer.items if isinstance(one, kind)]


def test_every_reading_is_a_point_and_later_is_further_right():
    points = of(drawn(FITTED), Circle)

    assert len(points) == 4
    assert [one.x for one in points] == sorted(one.x for one in points)
    # Less is lower on the page: the sheet counts downwards.
    assert [one.y for one in points] == sorted(one.y for one in points)


def test_the_curve_passes_the_readings_and_runs_into_the_band():
    layer = drawn(FITTED)
    (curve,), (band,) = of(layer, Polyline), of(layer, Polygon)
    points = of(layer, Circle)

    assert curve.points[0] == pytest.approx((points[0].x, points[0].y))
    assert min(y for _, y in band.points) <= curve.points[-1][1] <= max(y for _, y in band.points)


def test_without_a_forecast_only_readings_are_drawn():
    layer = drawn(DecayPicture(hours=(0.0, 0.5), values=(4.0, 3.0), unit="µm", name="S3"))

    assert not of(layer, Polyline)
    assert not of(layer, Polygon)
    assert "ends here" not in [one.text for one in of(layer, Text)]


def test_all_of_it_lies_in_its_place_and_tells_its_sentence():
    layer = drawn(FITTED)
    sheet = sheet_of(width=160.0, height=50.0, medium=PAPER_MEDIUM, layers=[layer])

    for one in (item for item in sheet.items if isinstance(item, Text)):
        box = one.box(PAPER_MEDIUM)
        assert box.left >= -0.5
        assert box.right <= 160.5
    assert layer.marks[0].tells == "Watched at S3."
    assert decay_height(medium=PAPER_MEDIUM) > 0.0
