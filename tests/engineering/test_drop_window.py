"""How long a hot part stays open, in the room and over its seat."""

import math
from dataclasses import replace

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from models.engineering.air import air_at
from models.engineering.cooling import HotPart, heat_loss_in_air
from models.engineering.drop_window import DropWindow, drop_window
from models.engineering.errors import OutOfRangeError
from models.engineering.over_seat import Seat, time_over_seat
from tests.second_paths.closing_gap import seconds_until_touch
from tests.second_paths.hot_ring import time_until_mean

HUB_EXPANSION = 12.9e-6
SHAFT_EXPANSION = 12.0e-6
BOLTZMANN = 5.670374e-8

HUB = HotPart(
    bore_diameter=0.100,
    outer_diameter=0.160,
    length=0.120,
    density=7850.0,
    specific_heat=520.0,
    conductivity=40.0,
)


def hub_steel(temperature: float) -> float:
    return HUB_EXPANSION


def shaft_steel(temperature: float) -> float:
    return SHAFT_EXPANSION


SEAT = Seat(
    diameter=0.1001,
    temperature=20.0,
    density=7850.0,
    specific_heat=470.0,
    expansion=shaft_steel,
)


def gap(hot: float, shaft: float) -> float:
    bore = HUB.bore_diameter * (1.0 + HUB_EXPANSION * (hot - 20.0))
    return bore - SEAT.diameter * (1.0 + SHAFT_EXPANSION * (shaft - 20.0))


def radiated(emissivity: float, hot: float, cold: float) -> float:
    return emissivity * BOLTZMANN * ((hot + 273.15) ** 4 - (cold + 273.15) ** 4)


def window(**changed: object) -> DropWindow:
    usual: dict[str, object] = {
        "part": HUB,
        "seat": SEAT,
        "part_expansion": hub_steel,
        "bore_temperature": 250.0,
        "air_temperature": 20.0,
    }
    return drop_window(**(usual | changed))  # type: ignore[arg-type]


@pytest.mark.parametrize(
    ("emissivity", "eccentricity", "shaft_capacity", "wall"),
    [
        (0.9, 0.9, 7850.0 * 470.0 * math.pi / 4.0 * SEAT.diameter**2 * 0.120, 0.0),
        (0.2, 0.0, 1e12, 0.030 / 3.0 / 40.0),
    ],
    ids=["least", "greatest"],
)
def test_the_gap_followed_in_time_closes_when_the_range_says(
    emissivity: float, eccentricity: float, shaft_capacity: float, wall: float
) -> None:
    def across(open_gap: float, hot: float, shaft: float) -> float:
        air = air_at(temperature=(hot + shaft) / 2.0).conductivity
        through = 2.0 * air / open_gap / math.sqrt(1.0 - eccentricity**2)
        through += radiated(emissivity, hot, shaft) / (hot - shaft)
        return HUB.bore_area * (hot - shaft) / (1.0 / through + wall)

    in_time = seconds_until_touch(
        hot=250.0,
        shaft=20.0,
        capacity=HUB.heat_capacity,
        shaft_capacity=shaft_capacity,
        gap=gap,
        heat_across=across,
        heat_outside=lambda hot: heat_loss_in_air(
            part=HUB, temperature=hot, air_temperature=20.0, emissivity=emissivity
        ),
    )
    found = time_over_seat(
        part=HUB,
        seat=SEAT,
        part_expansion=hub_steel,
        part_temperature=250.0,
        air_temperature=20.0,
    )
    assert (found.least if wall == 0.0 else found.greatest) == pytest.approx(in_time, rel=0.005)


def test_a_ring_followed_along_its_radius_closes_within_the_range() -> None:
    area = HUB.outer_area + HUB.face_area

    def through_the_gap(surface: float, mean: float) -> float:
        open_gap = max(gap(mean, 20.0), 1e-7)
        air = air_at(temperature=(surface + 20.0) / 2.0).conductivity
        return HUB.bore_area * 2.0 * air / open_gap * (surface - 20.0)

    shut = 20.0 + 0.0001 / (0.100 * HUB_EXPANSION)
    along_the_radius = time_until_mean(
        bore_radius=0.050,
        rim_radius=0.080,
        length=0.120,
        density=7850.0,
        specific_heat=520.0,
        conductivity=40.0,
        start=250.0,
        end_mean=shut + 0.1,
        flux_outside=lambda hot: (
            heat_loss_in_air(part=HUB, temperature=hot, air_temperature=20.0, emissivity=0.5) / area
        ),
        heat_at_bore=through_the_gap,
        cells=30,
    )
    found = time_over_seat(
        part=HUB,
        seat=SEAT,
        part_expansion=hub_steel,
        part_temperature=250.0,
        air_temperature=20.0,
    )
    assert found.least < along_the_radius < 1.05 * found.greatest


def test_over_the_seat_it_is_minutes_at_best_and_far_less_than_in_the_room() -> None:
    found = window()
    assert 0.0 < found.over_seat_least < 60.0 < found.over_seat_greatest < 600.0
    assert found.over_seat_greatest < found.in_air_least
    assert found.clearance_now == pytest.approx(gap(250.0, 20.0), abs=1e-12)
    assert found.lumped_holds


def test_a_shut_bore_leaves_no_time() -> None:
    found = window(bore_temperature=90.0)
    assert found.clearance_now < 0.0
    assert (found.in_air_least, found.in_air_greatest) == (0.0, 0.0)
    assert (found.over_seat_least, found.over_seat_greatest) == (0.0, 0.0)


def test_a_bore_open_by_less_than_wanted_leaves_no_time_in_the_room() -> None:
    found = window(bore_temperature=120.0, least_clearance=50e-6)
    assert 0.0 < found.clearance_now < 50e-6
    assert found.in_air_greatest == 0.0
    assert found.over_seat_least > 0.0


@pytest.mark.parametrize(("air", "shaft"), [(5.0, 5.0), (5.0, 20.0), (20.0, 20.0), (30.0, 15.0)])
def test_a_slip_part_never_closes(air: float, shaft: float) -> None:
    found = window(
        seat=replace(SEAT, diameter=0.09990, temperature=shaft),
        bore_temperature=60.0,
        air_temperature=air,
    )
    assert found.in_air_least == math.inf
    assert found.over_seat_least == math.inf
    assert found.over_seat_greatest == math.inf


def test_a_part_that_never_gets_near_a_cold_shaft_in_a_hot_room_stays_open() -> None:
    # 2 K above where it would shut, on a shaft of 20 °C, with so little through the gap that a room
    # of 300 °C warms it instead.
    found = time_over_seat(
        part=replace(HUB, bore_diameter=0.010),
        seat=replace(SEAT, diameter=0.010005),
        part_expansion=hub_steel,
        part_temperature=80.0,
        air_temperature=300.0,
    )
    assert found.greatest == math.inf


def test_a_part_that_grows_more_than_its_shaft_keeps_its_range_in_order() -> None:
    # Once level with its shaft it still stands open, by hand 0.1 · 5e-6 · (T − 20) less 20 µm.
    found = time_over_seat(
        part=HUB,
        seat=replace(SEAT, diameter=0.10002),
        part_expansion=lambda temperature: 17e-6,
        part_temperature=250.0,
        air_temperature=20.0,
    )
    assert 0.0 < found.least < found.greatest < math.inf


def test_a_cold_shaft_in_a_warm_room_is_still_closed_upon() -> None:
    # By hand: at 15 °C the seat is 4 µm larger than the bore at 20 °C, which 3.1 K of 1.29 µm/K
    # make up for; the bore shuts at 23.1 °C, below the room's 30.
    seat = replace(SEAT, diameter=0.10001, temperature=15.0)
    found = time_over_seat(
        part=HUB,
        seat=seat,
        part_expansion=hub_steel,
        part_temperature=120.0,
        air_temperature=30.0,
    )
    assert 0.0 < found.least < found.greatest


def test_a_poor_conductor_in_a_thick_part_is_said_not_to_cool_as_one() -> None:
    drum = replace(HUB, outer_diameter=0.400, length=0.200, conductivity=6.7)
    found = window(part=drum)
    assert found.biot > 0.1
    assert not found.lumped_holds


def test_a_hollow_shaft_grows_sooner_than_a_solid_one() -> None:
    def least(inner: float) -> float:
        return window(seat=replace(SEAT, inner_diameter=inner)).over_seat_least

    assert least(0.06) < least(0.0)


@settings(max_examples=25)
@given(hotter=st.floats(1.0, 60.0), temperature=st.floats(130.0, 280.0))
def test_a_hotter_bore_leaves_more_time(hotter: float, temperature: float) -> None:
    cool, hot = window(bore_temperature=temperature), window(bore_temperature=temperature + hotter)
    assert hot.in_air_least > cool.in_air_least
    assert hot.over_seat_least > cool.over_seat_least
    assert hot.over_seat_greatest > cool.over_seat_greatest
    assert cool.in_air_least <= cool.in_air_greatest
    assert cool.over_seat_least <= cool.over_seat_greatest


@settings(max_examples=25)
@given(wanted=st.floats(0.0, 150e-6))
def test_more_clearance_wanted_leaves_less_time_in_the_room(wanted: float) -> None:
    assert window(least_clearance=wanted).in_air_greatest <= window().in_air_greatest


@pytest.mark.parametrize(
    ("changed", "name"),
    [
        ({"least_clearance": -1e-6}, "least_clearance"),
        ({"least_emissivity": 0.95}, "least_emissivity"),
        ({"greatest_eccentricity": 1.0}, "eccentricity"),
        ({"greatest_draught": 0.5}, "draught"),
    ],
    ids=str,
)
def test_an_input_out_of_range_is_refused_by_name(changed: dict[str, float], name: str) -> None:
    with pytest.raises(OutOfRangeError, match=name):
        window(**changed)


@pytest.mark.parametrize(
    ("name", "value"),
    [("diameter", 0.0), ("density", 0.0), ("specific_heat", -1.0), ("inner_diameter", 0.2)],
)
def test_a_seat_out_of_range_is_refused_by_name(name: str, value: float) -> None:
    with pytest.raises(OutOfRangeError, match=name):
        replace(SEAT, **{name: value})
