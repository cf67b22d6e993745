import math

import msgspec
import pytest

import sample_data
from models.assess import assess
from models.assess.shaft import masses_on, shaft_view
from models.units import Power
from tests.assess.invented import a_land, an_item, on_a_shaft, rpm, with_material
from tests.published.printed import printed
from tests.published.shaft import CRITICAL_SPEED, SHEAR

JOBS = {"pump": sample_data.pump(), "compressor": sample_data.compressor()}


def of_row(monkeypatch, row):
    _, _, _, _, modulus, density = row.sections[0]
    with_material(monkeypatch, modulus=modulus, poisson=0.3, density=density)
    steps = [(start, end, outer) for start, end, outer, *_ in row.sections]
    return on_a_shaft(
        steps=steps, parts=row.masses, first=row.first_bearing, second=row.second_bearing
    )


# No material is without mass, as the shafts of the other rows are.
UNIFORM = [row for row in CRITICAL_SPEED if row.sections[0][5] > 1000.0]


@pytest.mark.parametrize("row", UNIFORM, ids=lambda row: row.case)
def test_a_uniform_shaft_has_its_printed_first_critical_speed(row, monkeypatch):
    assert shaft_view(of_row(monkeypatch, row)).critical.speed == row.number


def test_a_uniform_shaft_sags_and_weighs_what_a_hand_finds(monkeypatch):
    # d = 0.1, L = 2 m, E = 200 GPa, ρ = 8000: m = 125.664 kg; sag 5·w·L⁴/(384·E·I) = 130.76 µm;
    # critical (π/L)²·(d/4)·√(E/ρ) = 2.46740·125 = 308.43 rad/s; all by hand.
    with_material(monkeypatch, modulus=200e9, poisson=0.3, density=8000.0)

    view = shaft_view(on_a_shaft(steps=[(0.0, 2.0, 0.1)], second=2.0))

    assert view.loads.mass == printed("125.664")
    assert view.load_at_first_journal == printed("616.17")
    assert view.deflection.greatest == printed("130.76", 1e-6)
    assert view.critical.speed == printed("308.43")
    assert view.span_over_diameter == printed("20.000")


def test_a_part_loads_the_journals_by_its_lever(monkeypatch):
    # The shaft's 125.664 kg halve; 40 kg at a quarter of the span: 30 kg and 10 kg, by hand.
    with_material(monkeypatch, modulus=200e9, poisson=0.3, density=8000.0)
    plan = on_a_shaft(steps=[(0.0, 2.0, 0.1)], parts=[(0.5, 40.0)], second=2.0)

    view = shaft_view(plan)

    assert view.load_at_first_journal == printed("92.832", 9.80665)
    assert view.load_at_second_journal == printed("72.832", 9.80665)
    assert view.calculated == ()


def test_journals_named_from_the_far_end_keep_their_own_loads(monkeypatch):
    with_material(monkeypatch, modulus=200e9, poisson=0.3, density=8000.0)
    plan = on_a_shaft(steps=[(0.0, 2.0, 0.1)], parts=[(0.5, 40.0)], first=2.0, second=0.0)

    view = shaft_view(plan)

    assert view.load_at_first_journal == printed("72.832", 9.80665)
    assert view.bearing_span == 2.0


def test_a_mass_that_the_plan_lacks_is_estimated_and_said(monkeypatch):
    # π/4·(0.08² − 0.05²)·0.02·8000 = 0.4901 kg, by hand.
    with_material(monkeypatch, modulus=200e9, poisson=0.3, density=8000.0)
    plan = on_a_shaft(steps=[(0.0, 2.0, 0.1)], parts=[(0.5, None)], second=2.0)

    view = shaft_view(plan)

    (part,) = view.parts
    assert part.mass == printed("0.4901")
    assert part.calculated
    assert "masses estimated from the outline: part-1" in view.sentences[0]


def test_a_part_of_no_known_mass_or_material_is_named(monkeypatch):
    with_material(monkeypatch, modulus=200e9, poisson=0.3, density=8000.0)
    plan = on_a_shaft(steps=[(0.0, 2.0, 0.1)], parts=[(0.5, None)], second=2.0)
    (step,) = plan.steps
    (item,) = step.items
    unknown = msgspec.structs.replace(item, material=None)
    plan = msgspec.structs.replace(plan, steps=(msgspec.structs.replace(step, items=(unknown,)),))

    assert masses_on(plan).without == ("part-1",)
    assert "no mass known: part-1" in shaft_view(plan).sentences[0]


@pytest.mark.parametrize(("diameter", "again"), [(0.2, False), (0.1999, True)])
def test_a_span_of_ten_diameters_is_not_yet_looked_at_again(diameter, again, monkeypatch):
    with_material(monkeypatch, modulus=200e9, poisson=0.3)

    view = shaft_view(on_a_shaft(steps=[(0.0, 2.0, diameter)], second=2.0))

    assert view.look_again is again
    assert any("look again" in one for one in view.sentences) is again


def test_a_shaft_of_unknown_material_still_tells_its_span(monkeypatch):
    with_material(monkeypatch, modulus=200e9, poisson=0.3)
    plan = on_a_shaft(steps=[(0.0, 2.0, 0.1)], second=2.0)
    shaft = msgspec.structs.replace(plan.shaft, material="no such steel")

    view = shaft_view(msgspec.structs.replace(plan, shaft=shaft))

    assert view.loads is None
    assert view.critical is None
    assert view.span_over_diameter == printed("20.00")
    assert "no such steel" in view.sentences[-1]


@pytest.mark.parametrize("row", [SHEAR[1], SHEAR[3]], ids=lambda row: row.case)
def test_the_whole_torque_shears_the_shaft_under_the_coupling_hub(row, monkeypatch):
    with_material(monkeypatch, modulus=200e9, poisson=0.3)
    speed = 100.0
    plan = on_a_shaft(
        steps=[(0.0, 2.0, 0.3)],
        second=2.0,
        power=Power.from_si(row.torque * speed, "W", 3),
        maximum_continuous_speed=rpm(speed * 30.0 / math.pi),
    )
    land = a_land(row.outer_diameter * 1e3, 400.0)
    item = an_item(land)
    hub = msgspec.structs.replace(item, outline=msgspec.structs.replace(item.outline, kind="hub"))
    (step,) = plan.steps
    plan = msgspec.structs.replace(plan, steps=(msgspec.structs.replace(step, items=(hub,)),))

    assert shaft_view(plan).shear_at_coupling == row.stress


@pytest.mark.parametrize("name", JOBS)
def test_an_invented_rotor_weighs_its_shaft_and_its_parts(name):
    plan = JOBS[name].plan
    view = assess(JOBS[name]).shaft

    parts = sum(item.mass.si for step in plan.steps for item in step.items)
    # Its shaft as rings of 7850 kg/m³, by hand over the drawn steps.
    shaft = sum(
        7850.0 * math.pi / 4.0 * one.diameter.si**2 * (one.end.si - one.start.si)
        for one in plan.shaft.steps
    )
    assert view.loads.mass == pytest.approx(parts + shaft, rel=2e-3)
    assert view.load_at_first_journal + view.load_at_second_journal == pytest.approx(
        9.80665 * view.loads.mass
    )
    assert len(view.sentences) == 5
    assert view.critical.change_on_refinement < 1e-6
