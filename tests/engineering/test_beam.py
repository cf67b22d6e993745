"""Sag and first critical speed of a stepped shaft."""

import math

import numpy as np
import pytest
from hypothesis import given, settings
from hypothesis import strategies as st

from models.engineering.beam import first_critical_speed, static_deflection
from models.engineering.errors import OutOfRangeError
from models.engineering.shaft import AddedMass, StepSection
from tests.published import shaft as published
from tests.second_paths.beams import Beam, Disc, Stretch, deflection_at, first_natural_frequency

STEEL = (206e9, 7850.0)
COMPRESSOR = [
    (0.00, 0.25, 0.090, 0.00, *STEEL),
    (0.25, 0.60, 0.130, 0.00, *STEEL),
    (0.60, 1.40, 0.170, 0.06, *STEEL),
    (1.40, 1.75, 0.140, 0.00, *STEEL),
    (1.75, 2.10, 0.085, 0.00, *STEEL),
]
WHEELS = [(0.70, 45.0, 0.6, 1.1), (0.95, 42.0, 0.5, 0.9), (1.25, 40.0, 0.5, 0.9)]
COUPLING = (2.05, 35.0, 0.2, 0.3)


def shaft(rows: list[tuple[float, ...]]) -> list[StepSection]:
    return [StepSection(*row) for row in rows]


def parts(rows: list[tuple[float, ...]]) -> list[AddedMass]:
    return [AddedMass(*row) for row in rows]


def bar(*, length: float = 1.0, outer: float = 0.1, inner: float = 0.0) -> StepSection:
    return StepSection(0.0, length, outer, inner, *STEEL)


def seen_by_matrices(
    sections: list[tuple[float, ...]],
    masses: list[tuple[float, ...]],
    bearings: tuple[float, float],
) -> Beam:
    return Beam(
        stretches=[Stretch(*row) for row in sections],
        supports=bearings,
        discs=[Disc(place, mass, across - along) for place, mass, across, along in masses],
    )


@pytest.mark.parametrize("row", published.DEFLECTION, ids=lambda row: row.case)
def test_deflection_agrees_with_its_source(row: published.BeamRow) -> None:
    sag = static_deflection(
        sections=shaft(row.sections), added_masses=parts(row.masses),
        first_bearing=row.first_bearing, second_bearing=row.second_bearing,
    )  # fmt: skip
    assert sag.greatest == row.number, row.source


@pytest.mark.parametrize("row", published.CRITICAL_SPEED, ids=lambda row: row.case)
def test_first_critical_speed_agrees_with_its_source(row: published.BeamRow) -> None:
    critical = first_critical_speed(
        sections=shaft(row.sections), added_masses=parts(row.masses),
        first_bearing=row.first_bearing, second_bearing=row.second_bearing,
    )  # fmt: skip
    assert critical.speed == row.number, row.source


def test_a_uniform_shaft_sags_by_five_times_its_line_load_over_384() -> None:
    section = bar(outer=0.08, inner=0.03)
    sag = static_deflection(
        sections=[section], added_masses=[], first_bearing=0.0, second_bearing=1.0
    )
    line_load = 7850.0 * 9.80665 * math.pi * (0.04**2 - 0.015**2)
    stiffness = 206e9 * math.pi / 4.0 * (0.04**4 - 0.015**4)
    assert sag.greatest == pytest.approx(5.0 * line_load / (384.0 * stiffness), rel=1e-9)
    assert sag.greatest_position == pytest.approx(0.5)
    place = sag.positions
    quartic = line_load * place * (1.0 - 2.0 * place**2 + place**3) / (24.0 * stiffness)
    assert place.size > 50
    assert sag.deflections == pytest.approx(quartic, rel=1e-8, abs=1e-15)


def test_a_stepped_overhung_rotor_sags_as_the_transfer_matrices_say() -> None:
    masses, bearings = [*WHEELS, COUPLING], (0.12, 1.85)
    sag = static_deflection(
        sections=shaft(COMPRESSOR), added_masses=parts(masses),
        first_bearing=bearings[0], second_bearing=bearings[1],
    )  # fmt: skip
    beam = seen_by_matrices(COMPRESSOR, masses, bearings)
    for sample in range(0, sag.positions.size, 13):
        place = float(sag.positions[sample])
        assert sag.deflections[sample] == pytest.approx(
            deflection_at(beam, place), rel=1e-7, abs=1e-12
        )
    assert sag.greatest == pytest.approx(deflection_at(beam, sag.greatest_position), rel=1e-7)
    assert abs(sag.greatest) == np.abs(sag.deflections).max()


@pytest.mark.parametrize(
    ("masses", "bearings"),
    [
        ([], (0.0, 2.1)),
        (WHEELS, (0.12, 1.85)),
        ([*WHEELS, COUPLING], (0.12, 1.85)),
        ([(2.08, 180.0, 6.0, 11.0)], (0.12, 1.2)),
        ([(2.08, 180.0, 6.0, 0.0)], (0.12, 1.2)),
    ],
    ids=["bare", "wheels", "wheels and coupling", "overhung disc", "overhung disc at rest"],
)
def test_critical_speed_of_a_stepped_rotor_is_the_one_of_the_transfer_matrices(
    masses: list[tuple[float, ...]], bearings: tuple[float, float]
) -> None:
    critical = first_critical_speed(
        sections=shaft(COMPRESSOR), added_masses=parts(masses),
        first_bearing=bearings[0], second_bearing=bearings[1],
    )  # fmt: skip
    beam = seen_by_matrices(COMPRESSOR, masses, bearings)
    other = first_natural_frequency(beam, below=1.5 * critical.speed)
    assert critical.speed == pytest.approx(other, rel=2e-6)


@pytest.mark.parametrize("seed", range(4))
def test_many_steps_some_as_short_as_a_chamfer_do_not_cost_digits(seed: int) -> None:
    generator = np.random.default_rng(seed)
    lengths = generator.uniform(0.001, 0.1, 30)
    lengths[[4, 11, 20]] = 2e-6
    ends = np.concatenate([[0.0], np.cumsum(lengths)]).tolist()
    sections = [
        (start, end, float(outer), 0.0, *STEEL)
        for start, end, outer in zip(
            ends, ends[1:], generator.uniform(0.06, 0.25, 30), strict=False
        )
    ]
    bearings = (0.08 * ends[-1], 0.9 * ends[-1])
    masses = [(float(place), 25.0, 0.2, 0.35) for place in generator.uniform(0.0, ends[-1], 6)]
    critical = first_critical_speed(
        sections=shaft(sections), added_masses=parts(masses),
        first_bearing=bearings[0], second_bearing=bearings[1],
    )  # fmt: skip
    beam = seen_by_matrices(sections, masses, bearings)
    other = first_natural_frequency(beam, below=1.5 * critical.speed)
    assert critical.speed == pytest.approx(other, rel=2e-6)


def test_the_mesh_no_longer_matters_when_it_says_so() -> None:
    rough = first_critical_speed(
        sections=shaft(COMPRESSOR), added_masses=parts(WHEELS),
        first_bearing=0.12, second_bearing=1.85, greatest_change=1e-3,
    )  # fmt: skip
    fine = first_critical_speed(
        sections=shaft(COMPRESSOR), added_masses=parts(WHEELS),
        first_bearing=0.12, second_bearing=1.85, greatest_change=1e-7,
    )  # fmt: skip
    assert fine.element_count > rough.element_count
    assert fine.change_on_refinement <= 1e-7
    assert abs(rough.speed - fine.speed) / fine.speed <= rough.change_on_refinement


def test_a_mesh_that_cannot_settle_is_refused_rather_than_believed() -> None:
    with pytest.raises(OutOfRangeError, match="greatest_change"):
        first_critical_speed(
            sections=shaft(COMPRESSOR), added_masses=parts(WHEELS),
            first_bearing=0.12, second_bearing=1.85, greatest_change=1e-300,
        )  # fmt: skip


def test_a_heavy_mass_makes_the_square_of_the_speed_gravity_over_sag() -> None:
    heavy = AddedMass(position=0.4, mass=1e6)
    sag = static_deflection(
        sections=[bar()], added_masses=[heavy], first_bearing=0.0, second_bearing=1.0
    )
    critical = first_critical_speed(
        sections=[bar()], added_masses=[heavy], first_bearing=0.0, second_bearing=1.0
    )
    under_the_mass = np.interp(0.4, sag.positions, sag.deflections)
    assert critical.speed**2 == pytest.approx(9.80665 / under_the_mass, rel=1e-4)


def test_a_disc_that_turns_stiffens_the_shaft_and_one_that_does_not_softens_it() -> None:
    def speed(across: float, along: float) -> float:
        return first_critical_speed(
            sections=[bar()],
            added_masses=[AddedMass(0.9, 60.0, across, along)],
            first_bearing=0.0,
            second_bearing=0.7,
        ).speed

    assert speed(0.5, 0.0) < speed(0.0, 0.0) < speed(0.5, 1.0)


@settings(max_examples=15, deadline=None)
@given(extra=st.floats(0.1, 200.0), place=st.floats(0.05, 0.95))
def test_more_mass_never_raises_the_critical_speed(extra: float, place: float) -> None:
    def speed(mass: float) -> float:
        return first_critical_speed(
            sections=[bar()], added_masses=[AddedMass(place, mass)],
            first_bearing=0.0, second_bearing=1.0,
        ).speed  # fmt: skip

    assert speed(extra) < speed(0.0) * (1.0 + 1e-6)


@settings(max_examples=10, deadline=None)
@given(cut=st.floats(0.1, 0.9))
def test_cutting_a_section_in_two_on_paper_changes_nothing(cut: float) -> None:
    halves = [
        StepSection(0.0, cut, 0.1, 0.0, *STEEL),
        StepSection(cut, 1.0, 0.1, 0.0, *STEEL),
    ]
    whole, split = (
        first_critical_speed(
            sections=sections, added_masses=[], first_bearing=0.0, second_bearing=1.0
        ).speed
        for sections in ([bar()], halves)
    )
    assert split == pytest.approx(whole, rel=1e-6)


@settings(max_examples=10, deadline=None)
@given(stretch=st.floats(0.5, 3.0))
def test_the_critical_speed_falls_with_the_square_of_the_length(stretch: float) -> None:
    speeds = [
        first_critical_speed(
            sections=[bar(length=length)], added_masses=[], first_bearing=0.0, second_bearing=length
        ).speed
        for length in (1.0, stretch)
    ]
    assert speeds[1] * stretch**2 == pytest.approx(speeds[0], rel=1e-6)


def test_turning_the_rotor_end_for_end_changes_nothing() -> None:
    mirrored = [(2.1 - end, 2.1 - start, *rest) for start, end, *rest in reversed(COMPRESSOR)]
    wheels = [(2.1 - place, *rest) for place, *rest in WHEELS]
    one = static_deflection(
        sections=shaft(COMPRESSOR), added_masses=parts(WHEELS),
        first_bearing=0.12, second_bearing=1.85,
    )  # fmt: skip
    other = static_deflection(
        sections=shaft(mirrored), added_masses=parts(wheels),
        first_bearing=2.1 - 1.85, second_bearing=2.1 - 0.12,
    )  # fmt: skip
    assert other.deflections[::-1] == pytest.approx(one.deflections, rel=1e-6, abs=1e-12)


@pytest.mark.parametrize(
    ("name", "change"),
    [
        ("sections", {"sections": []}),
        ("sections", {"sections": [bar(), StepSection(1.1, 1.2, 0.1, 0.0, *STEEL)]}),
        ("first_bearing", {"first_bearing": -0.1}),
        ("second_bearing", {"second_bearing": 1.2}),
        ("second_bearing", {"first_bearing": 0.8, "second_bearing": 0.2}),
        ("added_masses", {"added_masses": [AddedMass(position=1.5, mass=1.0)]}),
    ],
)
@pytest.mark.parametrize("quantity", [static_deflection, first_critical_speed])
def test_what_does_not_lie_on_the_shaft_is_refused_by_name(quantity, name: str, change) -> None:
    sound = {
        "sections": [bar()], "added_masses": [], "first_bearing": 0.0, "second_bearing": 1.0
    }  # fmt: skip
    with pytest.raises(OutOfRangeError) as refusal:
        quantity(**{**sound, **change})
    assert refusal.value.name == name
