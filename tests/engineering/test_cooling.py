"""A hot part in the room."""

import math

import pytest
from hypothesis import given, settings
from hypothesis import strategies as st
from scipy.integrate import solve_ivp

from models.engineering.cooling import HotPart, cooling_in_air, heat_loss_in_air, time_in_air
from models.engineering.errors import OutOfRangeError
from tests.published.cooling import HANGING_PARTS, HangingPart
from tests.published.printed import printed
from tests.second_paths.hot_ring import time_until_mean

MINUTE = 60.0


def steel_part(bore: float, outer: float, length: float, conductivity: float = 40.0) -> HotPart:
    return HotPart(
        bore_diameter=bore,
        outer_diameter=outer,
        length=length,
        density=7850.0,
        specific_heat=520.0,
        conductivity=conductivity,
    )


COLLAR = steel_part(0.100, 0.250, 0.040)


@pytest.mark.parametrize("row", HANGING_PARTS, ids=lambda row: row.case)
def test_a_part_in_still_air_keeps_its_clearance_for_tens_of_minutes(row: HangingPart) -> None:
    part = steel_part(row.bore / 1e3, row.outer / 1e3, row.length / 1e3)
    assert part.density * part.volume == printed(row.mass), row.source
    lasting = time_in_air(
        part=part,
        start_temperature=row.start,
        end_temperature=row.start - 77.5,
        air_temperature=20.0,
        least_emissivity=0.3,
        greatest_emissivity=0.8,
        greatest_draught=1.0,
    )
    # Common practice: a thousandth of the diameter lasts 20 to 50 minutes in still air.
    assert 15.0 * MINUTE < lasting.least < lasting.greatest < 65.0 * MINUTE


def test_a_part_as_warm_as_the_room_loses_nothing_and_stays_so() -> None:
    assert (
        heat_loss_in_air(part=COLLAR, temperature=20.0, air_temperature=20.0, emissivity=0.5) == 0.0
    )
    assert cooling_in_air(
        part=COLLAR, start_temperature=20.0, air_temperature=20.0, emissivity=0.5, times=[3600.0]
    ) == (20.0,)


def test_a_long_time_brings_a_part_to_the_temperature_of_the_room() -> None:
    (last,) = cooling_in_air(
        part=COLLAR, start_temperature=250.0, air_temperature=22.0, emissivity=0.9, times=[2e5]
    )
    assert last == pytest.approx(22.0, abs=0.01)


def test_the_temperature_followed_in_time_is_that_of_a_library_solver() -> None:
    times = [0.0, 300.0, 1200.0, 3600.0]

    def change(time: float, state: list[float]) -> list[float]:
        loss = heat_loss_in_air(
            part=COLLAR, temperature=state[0], air_temperature=20.0, emissivity=0.5, draught=2.0
        )
        return [-loss / COLLAR.heat_capacity]

    answer = solve_ivp(change, (0.0, 3600.0), [250.0], t_eval=times, rtol=1e-10, atol=1e-10)
    found = cooling_in_air(
        part=COLLAR,
        start_temperature=250.0,
        air_temperature=20.0,
        emissivity=0.5,
        draught=2.0,
        times=times,
    )
    assert found == pytest.approx(list(answer.y[0]), abs=1e-4)


@pytest.mark.parametrize("conductivity", [40.0, 7.0, 2.0])
@pytest.mark.parametrize("sizes", [(0.1, 0.25, 0.04), (0.15, 0.25, 0.15)])
def test_a_ring_followed_along_its_radius_lasts_within_the_cautious_range(
    conductivity: float, sizes: tuple[float, float, float]
) -> None:
    part = steel_part(*sizes, conductivity=conductivity)
    area = part.outer_area + part.face_area

    def flux(temperature: float) -> float:
        return (
            heat_loss_in_air(
                part=part, temperature=temperature, air_temperature=20.0, emissivity=0.5
            )
            / area
        )

    along_the_radius = time_until_mean(
        bore_radius=part.bore_diameter / 2.0,
        rim_radius=part.outer_diameter / 2.0,
        length=part.length,
        density=part.density,
        specific_heat=part.specific_heat,
        conductivity=conductivity,
        start=250.0,
        end_mean=180.0,
        flux_outside=flux,
        cells=30,
    )
    lasting = time_in_air(
        part=part,
        start_temperature=250.0,
        end_temperature=180.0,
        air_temperature=20.0,
        least_emissivity=0.5,
        greatest_emissivity=0.5,
        greatest_draught=1.0,
    )
    assert 0.999 * lasting.least <= along_the_radius <= 1.03 * lasting.greatest


@settings(max_examples=25)
@given(
    start=st.floats(120.0, 350.0),
    minutes=st.floats(1.0, 60.0),
    emissivity=st.floats(0.1, 0.9),
)
def test_time_to_a_temperature_and_temperature_after_a_time_undo_each_other(
    start: float, minutes: float, emissivity: float
) -> None:
    (end,) = cooling_in_air(
        part=COLLAR,
        start_temperature=start,
        air_temperature=20.0,
        emissivity=emissivity,
        times=[minutes * MINUTE],
    )
    lasting = time_in_air(
        part=COLLAR,
        start_temperature=start,
        end_temperature=end,
        air_temperature=20.0,
        least_emissivity=emissivity,
        greatest_emissivity=emissivity,
        greatest_draught=1.0,
    )
    assert lasting.least == pytest.approx(minutes * MINUTE, rel=1e-4)
    assert lasting.greatest >= lasting.least


@given(draught=st.floats(1.0, 4.0), emissivity=st.floats(0.0, 1.0))
def test_a_draught_and_a_dark_surface_take_more_heat(draught: float, emissivity: float) -> None:
    def loss(wind: float, dark: float) -> float:
        return heat_loss_in_air(
            part=COLLAR, temperature=200.0, air_temperature=20.0, emissivity=dark, draught=wind
        )

    assert loss(draught, emissivity) >= loss(1.0, emissivity)
    assert loss(draught, emissivity) >= loss(draught, 0.0)


def test_a_part_that_is_cool_enough_leaves_no_time_and_a_warm_room_leaves_all() -> None:
    def lasting(end: float) -> tuple[float, float]:
        found = time_in_air(
            part=COLLAR, start_temperature=100.0, end_temperature=end, air_temperature=30.0
        )
        return found.least, found.greatest

    assert lasting(110.0) == (0.0, 0.0)
    assert lasting(25.0) == (math.inf, math.inf)


@pytest.mark.parametrize(
    "name", ["bore_diameter", "outer_diameter", "length", "density", "specific_heat"]
)
def test_a_part_without_a_size_is_refused_by_name(name: str) -> None:
    usual = {
        "bore_diameter": 0.1,
        "outer_diameter": 0.2,
        "length": 0.05,
        "density": 7850.0,
        "specific_heat": 520.0,
        "conductivity": 40.0,
    }
    with pytest.raises(OutOfRangeError, match=name):
        HotPart(**(usual | {name: 0.0}))


def test_an_input_out_of_range_is_refused_by_name() -> None:
    with pytest.raises(OutOfRangeError, match="draught"):
        heat_loss_in_air(
            part=COLLAR, temperature=200.0, air_temperature=20.0, emissivity=0.5, draught=0.5
        )
    with pytest.raises(OutOfRangeError, match="least_emissivity"):
        time_in_air(
            part=COLLAR,
            start_temperature=200.0,
            end_temperature=150.0,
            air_temperature=20.0,
            least_emissivity=0.9,
            greatest_emissivity=0.2,
        )
    for times in ([60.0, 0.0], [-1.0]):
        with pytest.raises(OutOfRangeError, match="times"):
            cooling_in_air(
                part=COLLAR,
                start_temperature=200.0,
                air_temperature=20.0,
                emissivity=0.5,
                times=times,
            )
