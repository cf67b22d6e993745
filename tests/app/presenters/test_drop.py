"""The drop window as the bench shows it: its hopeful end is held to what is known."""

from dataclasses import replace
from types import SimpleNamespace

import pytest

import sample_data
from app.presenters.bench.pictures import drop_of
from models.assess import assess

VIEW = assess(sample_data.compressor()).attempts[0].items[0]


@pytest.mark.parametrize(("least", "greatest", "shown"), [
    (50.0, 200.0, 200.0),  # a hub: as reckoned
    (90.0, 2400.0, 360.0),  # a thick disc: six minutes, common practice
    (90.0, float("inf"), 360.0),
    (500.0, 900.0, 500.0),  # never below the cautious end
])  # fmt: skip
def test_nobody_is_promised_more_than_six_minutes_over_the_seat(least, greatest, shown):
    window = replace(VIEW.heat.window, over_seat_least=least, over_seat_greatest=greatest)

    drop = drop_of(SimpleNamespace(heat=SimpleNamespace(window=window)))

    assert drop.over_seat == (least, shown)
