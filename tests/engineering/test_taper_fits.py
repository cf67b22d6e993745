import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.fits import contact_pressure
from models.engineering.taper_fits import (
    advance_for_interference,
    axial_release_force,
    dilation_pressure,
    interference_from_advance,
    seating_loss,
    taper_from_half_angle,
)
from tests.published.fits import PRESSURES
from tests.published.printed import printed
from tests.published.taper_fits import ADVANCES

INCH = 0.0254

tapers = st.floats(0.01, 0.2)


@pytest.mark.parametrize("row", ADVANCES, ids=lambda row: row.case)
def test_the_advance_is_the_one_by_hand(row):
    one = advance_for_interference(interference=0.001 * INCH, taper=row.taper)
    eight = advance_for_interference(interference=0.008 * INCH, taper=row.taper)
    assert one == printed(row.per_thousandth, INCH), row.source
    assert eight == printed(row.for_eight, INCH), row.source


def test_an_angle_is_turned_into_its_taper():
    # By hand: twice the tangent of one degree; ½ in/ft is 1.19349° per side.
    assert taper_from_half_angle(half_angle_degrees=1.0) == printed("0.034910")
    assert taper_from_half_angle(half_angle_degrees=1.19349) == printed("0.041667")


@given(tapers, st.floats(0.0, 1e-3), st.floats(0.0, 1e-4))
def test_advance_and_interference_lead_back_to_each_other(taper, interference, loss):
    advance = advance_for_interference(interference=interference, taper=taper, seating_loss=loss)
    back = interference_from_advance(advance=advance, taper=taper, seating_loss=loss)
    assert back == pytest.approx(interference, abs=1e-15)
    found = seating_loss(advance=advance, interference=interference, taper=taper)
    assert found == pytest.approx(loss, abs=1e-15)


@given(tapers, st.floats(0.05, 0.3), st.floats(1e-4, 1e-2))
def test_two_cones_drawn_in_the_plane_overlap_by_the_same_interference(taper, diameter, advance):
    # Second path: the generating lines of bore and seat as polynomials, the bore pushed up.
    seat = np.polynomial.Polynomial([diameter / 2.0, taper / 2.0])
    bore = np.polynomial.Polynomial([diameter / 2.0, taper / 2.0])
    pushed = bore(np.array([0.0, 0.05]))
    met = seat(np.array([0.0, 0.05]) + advance)
    overlap = 2.0 * (met - pushed)
    assert overlap == pytest.approx(interference_from_advance(advance=advance, taper=taper))


@pytest.mark.parametrize(
    "row", [row for row in PRESSURES if "coupling hub 1" in row.case], ids=lambda row: row.case
)
def test_one_section_opens_at_the_pressure_that_it_grips_with(row):
    pressure = contact_pressure(**row.joint)
    found = dilation_pressure(section_pressures=[pressure], margin=0.0)
    assert found == printed(row.printed, row.si_per_unit), row.source


@given(st.lists(st.floats(0.0, 3e8), min_size=1, max_size=5), st.floats(0.0, 0.3))
def test_every_section_opens(pressures, margin):
    found = dilation_pressure(section_pressures=pressures, margin=margin)
    assert all(found >= pressure for pressure in pressures)
    assert found <= max(pressures) * 1.3 * (1 + 1e-12)


@given(st.floats(1e6, 3e8), st.floats(0.05, 0.3), st.floats(0.02, 0.2), tapers, st.floats(0.0, 0.3))
def test_forces_summed_over_slices_of_the_cone_push_alike(pressure, mean, length, taper, friction):
    # Second path: 1000 slices, each with its own circumference, the surface taken as inclined.
    half = math.atan(taper / 2.0)
    edges = np.linspace(-length / 2.0, length / 2.0, 1001)
    middle = (edges[1:] + edges[:-1]) / 2.0
    surface = math.pi * (mean + taper * middle) * (edges[1] - edges[0]) / math.cos(half)
    summed = float(np.sum(pressure * surface) * (math.sin(half) - friction * math.cos(half)))
    found = axial_release_force(
        pressure=pressure,
        mean_diameter=mean,
        contact_length=length,
        taper=taper,
        friction=friction,
    )
    assert found == pytest.approx(summed, rel=1e-9, abs=1e-6 * pressure * mean * length)


def test_a_hub_holds_itself_when_friction_exceeds_half_the_taper():
    inputs = {"pressure": 1e8, "mean_diameter": 0.1, "contact_length": 0.1, "taper": 0.05}
    assert axial_release_force(**inputs, friction=0.12) < 0.0
    assert axial_release_force(**inputs, friction=0.025) == pytest.approx(0.0, abs=1e-6)
    assert axial_release_force(**inputs, friction=0.0) > 0.0


GOOD = {
    advance_for_interference: {"interference": 1e-4, "taper": 0.05, "seating_loss": 0.0},
    interference_from_advance: {"advance": 1e-3, "taper": 0.05, "seating_loss": 0.0},
    seating_loss: {"advance": 1e-3, "interference": 1e-4, "taper": 0.05},
    dilation_pressure: {"section_pressures": [1e8], "margin": 0.1},
    axial_release_force: {
        "pressure": 1e8,
        "mean_diameter": 0.1,
        "contact_length": 0.1,
        "taper": 0.05,
        "friction": 0.1,
    },
    taper_from_half_angle: {"half_angle_degrees": 1.0},
}


@pytest.mark.parametrize(
    ("function", "field", "value"),
    [
        (advance_for_interference, "interference", -1e-6),
        (advance_for_interference, "taper", 0.0),
        (advance_for_interference, "seating_loss", -1e-6),
        (interference_from_advance, "advance", -1e-6),
        (interference_from_advance, "taper", 2.0),
        (interference_from_advance, "seating_loss", -1e-6),
        (seating_loss, "advance", math.nan),
        (seating_loss, "interference", math.nan),
        (seating_loss, "taper", -0.1),
        (dilation_pressure, "section_pressures", []),
        (dilation_pressure, "section_pressures", [1e8, -1.0]),
        (dilation_pressure, "margin", -0.1),
        (axial_release_force, "pressure", -1.0),
        (axial_release_force, "mean_diameter", 0.0),
        (axial_release_force, "contact_length", 0.0),
        (axial_release_force, "contact_length", 4.0),
        (axial_release_force, "taper", math.nan),
        (axial_release_force, "friction", -0.1),
        (taper_from_half_angle, "half_angle_degrees", 0.0),
        (taper_from_half_angle, "half_angle_degrees", 45.0),
    ],
)
def test_what_cannot_be_is_refused_by_name(function, field, value):
    with pytest.raises(OutOfRangeError, match=field):
        function(**{**GOOD[function], field: value})
