"""Shear, slenderness and journal loads of a shaft."""

import math

import numpy as np
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.engineering.errors import OutOfRangeError
from models.engineering.shaft import (
    STANDARD_GRAVITY,
    AddedMass,
    StepSection,
    flexibility_factor,
    journal_loads,
    journal_loads_from_centre_of_gravity,
    shaft_shear_stress,
    span_over_diameter,
)
from tests.published import shaft as published

lengths = st.floats(0.05, 5.0)


def steel(start: float, end: float, outer: float, inner: float = 0.0) -> StepSection:
    return StepSection(
        start=start, end=end, outer_diameter=outer, inner_diameter=inner,
        modulus=206e9, density=7850.0,
    )  # fmt: skip


@pytest.mark.parametrize("row", published.SHEAR, ids=lambda row: row.case)
def test_shear_stress_agrees_with_its_source(row: published.ShearRow) -> None:
    stress = shaft_shear_stress(
        torque=row.torque, outer_diameter=row.outer_diameter, inner_diameter=row.inner_diameter
    )
    assert stress == row.stress, row.source


@pytest.mark.parametrize("row", published.TORQUE, ids=lambda row: row.case)
def test_the_torque_of_a_stress_agrees_with_its_source(row: published.TorqueRow) -> None:
    stress_of_one = shaft_shear_stress(
        torque=1.0, outer_diameter=row.outer_diameter, inner_diameter=0.0
    )
    assert row.stress / stress_of_one == row.torque, row.source


def test_shear_of_a_thin_tube_is_torque_over_twice_its_enclosed_area_and_wall() -> None:
    wall, mean_diameter = 1e-5, 0.1
    stress = shaft_shear_stress(
        torque=50.0, outer_diameter=mean_diameter + wall, inner_diameter=mean_diameter - wall
    )
    assert stress == pytest.approx(50.0 / (2.0 * math.pi * mean_diameter**2 / 4.0 * wall), rel=3e-4)


def test_shear_stress_summed_over_the_section_gives_the_torque_back() -> None:
    outer, inner, rings = 0.09, 0.04, 20_000
    surface = shaft_shear_stress(torque=1234.0, outer_diameter=outer, inner_diameter=inner)
    width = (outer - inner) / 2.0 / rings
    radii = [inner / 2.0 + (ring + 0.5) * width for ring in range(rings)]
    carried = sum(
        surface * radius / (outer / 2.0) * radius * 2.0 * math.pi * radius * width
        for radius in radii
    )
    assert carried == pytest.approx(1234.0, rel=1e-7)


@given(torque=st.floats(1.0, 1e6), factor=st.floats(0.1, 10.0), diameter=st.floats(0.01, 1.0))
def test_shear_is_proportional_to_torque_whatever_its_sense(
    torque: float, factor: float, diameter: float
) -> None:
    one = shaft_shear_stress(torque=torque, outer_diameter=diameter, inner_diameter=0.0)
    other = shaft_shear_stress(torque=-factor * torque, outer_diameter=diameter, inner_diameter=0.0)
    assert other == pytest.approx(factor * one)


@pytest.mark.parametrize("row", published.JOURNAL_LOADS, ids=lambda row: row.case)
def test_journal_loads_agree_with_their_source(row: published.LoadRow) -> None:
    loads = journal_loads_from_centre_of_gravity(
        mass=row.mass,
        centre_of_gravity=row.centre_of_gravity,
        first_journal=row.first_journal,
        second_journal=row.second_journal,
    )
    assert loads.first == row.first, row.source
    assert loads.second == row.second, row.source


@pytest.mark.parametrize("inner", [0.0, 0.04])
def test_bending_stiffness_is_the_sum_over_thin_strips(inner: float) -> None:
    outer, strips = 0.1, 200_000
    heights = (np.arange(strips) + 0.5) / strips * outer - outer / 2.0
    chords = 2.0 * np.sqrt(np.clip((outer / 2.0) ** 2 - heights**2, 0.0, None))
    chords -= 2.0 * np.sqrt(np.clip((inner / 2.0) ** 2 - heights**2, 0.0, None))
    second_moment = float(np.sum(heights**2 * chords)) * outer / strips
    stiffness = steel(0.0, 1.0, outer, inner).bending_stiffness
    assert stiffness == pytest.approx(206e9 * second_moment, rel=1e-6)


def test_an_overhung_rotor_says_that_a_journal_lifts() -> None:
    overhung = journal_loads_from_centre_of_gravity(
        mass=500.0, centre_of_gravity=-0.2, first_journal=0.0, second_journal=1.0
    )
    between = journal_loads_from_centre_of_gravity(
        mass=500.0, centre_of_gravity=0.2, first_journal=0.0, second_journal=1.0
    )
    assert overhung.lifts
    assert not between.lifts


def test_a_centre_over_one_journal_leaves_the_other_free() -> None:
    loads = journal_loads_from_centre_of_gravity(
        mass=10.0, centre_of_gravity=2.0, first_journal=0.0, second_journal=2.0
    )
    assert loads.first == pytest.approx(0.0, abs=1e-12)
    assert not loads.lifts


def test_loads_of_a_stepped_shaft_agree_with_many_thin_slices() -> None:
    sections = [steel(0.0, 0.4, 0.1), steel(0.4, 1.5, 0.16, 0.05), steel(1.5, 2.2, 0.08)]
    parts = [AddedMass(position=0.9, mass=80.0), AddedMass(position=2.15, mass=30.0)]
    loads = journal_loads(
        sections=sections, added_masses=parts, first_journal=0.2, second_journal=1.8
    )
    slices = [(80.0, 0.9), (30.0, 2.15)]
    for section in sections:
        outer, inner = section.outer_diameter / 2.0, section.inner_diameter / 2.0
        step = (section.end - section.start) / 1000
        weight = math.pi * (outer * outer - inner * inner) * step * 7850.0
        slices += [(weight, section.start + (number + 0.5) * step) for number in range(1000)]
    weight_in_all = sum(weight for weight, _ in slices)
    about_first = sum(weight * (place - 0.2) for weight, place in slices)
    second = about_first / 1.6 * STANDARD_GRAVITY
    assert loads.mass == pytest.approx(weight_in_all, rel=1e-9)
    assert loads.second == pytest.approx(second, rel=1e-9)
    assert loads.first == pytest.approx(weight_in_all * STANDARD_GRAVITY - second, rel=1e-9)


@given(mass=st.floats(1.0, 1e5), centre=st.floats(-3.0, 6.0), span=lengths)
def test_the_two_loads_add_up_to_the_weight(mass: float, centre: float, span: float) -> None:
    loads = journal_loads_from_centre_of_gravity(
        mass=mass, centre_of_gravity=centre, first_journal=0.0, second_journal=span
    )
    assert loads.first + loads.second == pytest.approx(mass * 9.80665, rel=1e-9)


@given(shift=st.floats(-5.0, 5.0))
def test_the_loads_do_not_depend_on_the_datum_face(shift: float) -> None:
    def loads(by: float) -> tuple[float, float]:
        answer = journal_loads(
            sections=[steel(by, by + 1.0, 0.1)],
            added_masses=[AddedMass(position=by + 0.3, mass=20.0)],
            first_journal=by + 0.1,
            second_journal=by + 0.9,
        )
        return answer.first, answer.second

    assert loads(shift) == pytest.approx(loads(0.0), rel=1e-9)


@pytest.mark.parametrize("row", published.FLEXIBILITY, ids=lambda row: row.case)
def test_flexibility_factor_agrees_with_its_source(row: published.FlexibilityRow) -> None:
    factor = flexibility_factor(bearing_span=row.bearing_span, shaft_diameter=row.shaft_diameter)
    assert factor == row.factor, row.source


def test_span_over_diameter_is_larger_for_the_longer_shaft() -> None:
    assert span_over_diameter(bearing_span=2.0, largest_body_diameter=0.2) == pytest.approx(10.0)
    assert span_over_diameter(bearing_span=3.0, largest_body_diameter=0.2) == pytest.approx(15.0)


@given(span=lengths, diameter=st.floats(0.01, 0.5))
def test_flexibility_is_the_square_of_span_times_span_over_diameter(
    span: float, diameter: float
) -> None:
    ratio = span_over_diameter(bearing_span=span, largest_body_diameter=diameter)
    factor = flexibility_factor(bearing_span=span, shaft_diameter=diameter)
    assert math.sqrt(factor) == pytest.approx(ratio * span)


@pytest.mark.parametrize(
    ("name", "call"),
    [
        ("inner_diameter", lambda: shaft_shear_stress(
            torque=1.0, outer_diameter=0.1, inner_diameter=0.1)),
        ("torque", lambda: shaft_shear_stress(
            torque=math.nan, outer_diameter=0.1, inner_diameter=0.0)),
        ("mass", lambda: journal_loads_from_centre_of_gravity(
            mass=0.0, centre_of_gravity=0.0, first_journal=0.0, second_journal=1.0)),
        ("second_journal", lambda: journal_loads_from_centre_of_gravity(
            mass=1.0, centre_of_gravity=0.0, first_journal=1.0, second_journal=1.0)),
        ("sections", lambda: journal_loads(
            sections=[], added_masses=[], first_journal=0.0, second_journal=1.0)),
        ("bearing_span", lambda: span_over_diameter(
            bearing_span=-1.0, largest_body_diameter=0.1)),
        ("shaft_diameter", lambda: flexibility_factor(bearing_span=1.0, shaft_diameter=0.0)),
        ("end", lambda: steel(1.0, 1.0, 0.1)),
        ("inner_diameter", lambda: steel(0.0, 1.0, 0.1, 0.2)),
        ("mass", lambda: AddedMass(position=0.0, mass=-1.0)),
        ("polar_inertia", lambda: AddedMass(position=0.0, mass=1.0, polar_inertia=math.inf)),
    ],
    ids=lambda value: value if isinstance(value, str) else "",
)  # fmt: skip
def test_what_cannot_be_a_shaft_is_refused_by_name(name: str, call) -> None:
    with pytest.raises(OutOfRangeError) as refusal:
        call()
    assert refusal.value.name == name
