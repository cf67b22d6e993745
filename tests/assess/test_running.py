"""Fits as they run: warm, at speed, under thrust; and torque added up along the shaft."""

import math

import msgspec
import pytest
from uncertainties import ufloat

import sample_data
from models.assess import assess
from models.assess.strength_findings import strength_findings
from models.assess.strength_work import fit_strength
from models.assess.torque import rotor_torque, seat_shears, torque_to_carry, torques_along
from models.job import ForceCarried, Growth, PressureLimit, RunningWarmth
from models.rules.rule import Subject, Verdict
from models.units import Force, Length, Power, Pressure, Ratio, Temperature
from tests.assess.invented import (
    ORIGIN,
    a_land,
    a_plan,
    an_item,
    fit,
    mm,
    rpm,
    strength,
    with_material,
)
from tests.published.printed import printed

# 150/250 under 300 µm, E = 207 GPa: 132.48 MPa, published row.
PRESSED = 132.48e6


def celsius(value):
    return Temperature.read(f"{value} °C")


def steel(monkeypatch):
    with_material(monkeypatch, modulus=207e9, poisson=0.292)


def warm(part, shaft):
    return RunningWarmth(part=celsius(part), shaft=celsius(shaft), origin=ORIGIN)


def newtons(value):
    return ForceCarried(value=Force.read(f"{value} N"), origin=ORIGIN)


@pytest.mark.parametrize(("part", "shaft", "left"), [
    (20.0, 20.0, "300.0"),
    (100.0, 100.0, "300.0"),  # one steel, warmed through: nothing changes
    (100.0, 60.0, "228.0"),  # 150 mm · 12 µm/(m·K) · 40 K = 72 µm, by hand
    (60.0, 100.0, "372.0"),
    (110.0, 20.0, "138.0"),  # 90 K take 162 µm
])  # fmt: skip
def test_a_part_warmer_than_its_shaft_loses_what_it_grows(part, shaft, left, monkeypatch):
    steel(monkeypatch)
    land = a_land(150.0, 250.0, growth=Growth(value=mm(1e-6), speed=rpm(9000.0), origin=ORIGIN))
    plan = a_plan(rotor={"maximum_continuous_speed": rpm(1.0)})

    found = strength(plan, an_item(land, running=warm(part, shaft)), fit(land, 3e-4, 3e-4))

    assert found.lands[0].at("maximum continuous").by_designer == printed(left, 1e-6)


def test_what_is_not_warmed_by_the_plan_is_left_as_measured(monkeypatch):
    steel(monkeypatch)
    land = a_land(150.0, 250.0)
    plan = a_plan(rotor={"maximum_continuous_speed": rpm(9000.0)})

    found = strength(plan, an_item(land), fit(land, 3e-4, 3e-4)).lands[0]

    assert found.at("maximum continuous").warmth == 0.0


def test_a_warm_part_opens_sooner_and_its_doubt_grows_by_the_spread_of_coefficients(monkeypatch):
    steel(monkeypatch)
    land = a_land(150.0, 250.0, growth=Growth(value=mm(0.060), speed=rpm(6000.0), origin=ORIGIN))
    plan = a_plan(rotor={"trip_speed": rpm(6000.0)})

    found = strength(plan, an_item(land, running=warm(100.0, 60.0)), fit(land, 3e-4, 3e-4, 5e-6))

    # 300 − 72 = 228 µm; open where 60·x² = 228, at 6000·√3.8 = 11 696.
    assert found.release_speed * 30.0 / math.pi == printed("11696")
    # 8 % of 72 µm is 5.76; with 5 µm of the sizes √(5² + 5.76²) = 7.63.
    assert found.lands[0].at("trip").uncertainty == printed("7.63", 1e-6)
    assert "at 100.0 °C on a shaft at 60.0 °C it opens" in found.means


def test_stress_at_speed_is_an_estimate_on_the_greatest_fit(monkeypatch):
    steel(monkeypatch)
    land = a_land(150.0, 250.0)
    still = a_plan(rotor={"maximum_continuous_speed": rpm(1e-6)})

    found = strength(still, an_item(land, widest=500.0), fit(land, 1e-4, 3e-4)).lands[0]

    # At rest: the published row of this hub, 366.2 MPa.
    assert found.at("maximum continuous").hub_stress == printed("366.2", 1e6)
    assert found.at("maximum continuous").shaft.von_mises == printed("132.48", 1e6)


def test_average_roughness_counts_six_times_as_height(monkeypatch):
    steel(monkeypatch)
    land = a_land(150.0, 250.0)
    rough = Length.read("0.8 µm")
    plan = a_plan(shaft={"roughness": rough, "roughness_kind": "Ra"}, smoothing_factor=0.8,
                  smoothing_edition="1988 and 2001")  # fmt: skip
    item = an_item(land, roughness=Length.read("4.8 µm"))

    found = strength(plan, item, fit(land, 3e-4, 3e-4))

    # Ra 0.8 taken as Rz 4.8, DIN 7190 from memory: 0.8 · 9.6 = 7.68 µm.
    assert found.lands[0].smoothing_loss == printed("7.68", 1e-6)
    assert "bore Rz 4.8 µm and seat Ra 0.8 µm, Rz taken as 6 Ra" in found.smoothing_source


def test_thrust_and_torque_are_held_together_by_one_friction(monkeypatch):
    steel(monkeypatch)
    land = a_land(150.0, 250.0)
    plan = a_plan(rotor={"power": Power.read("1000 kW"),
                         "maximum_continuous_speed": rpm(3000.0)})  # fmt: skip
    item = an_item(land, carried_torque_share=Ratio.read("1"), thrust=newtons(30000),
                   friction=Ratio.read("0.12"))  # fmt: skip

    found = strength(plan, item, fit(land, 3e-4, 3e-4)).holding

    # T = 1e6/(100π) = 3183.1 N·m; at 75 mm 42 441 N; with 30 000 N of thrust 51 974 N.
    assert found.torque_to_carry == printed("3183.1")
    assert found.demanded == printed("51974")
    # 0.12 · π · 0.15 · 0.1 · 132.48 MPa.
    assert found.force == pytest.approx(0.12 * math.pi * 0.015 * PRESSED, rel=1e-4)


def test_a_key_takes_the_torque_and_leaves_the_thrust(monkeypatch):
    steel(monkeypatch)
    land = a_land(150.0, 250.0)
    item = an_item(land, carried_torque_share=Ratio.read("1"), thrust=newtons(30000), keyed=True)

    found = fit_strength(a_plan(), item, [fit(land, 3e-4, 3e-4)])
    judged = [one.rule.id for one in strength_findings(a_plan(), item, found, Subject())]

    assert found.holding.demanded == 30000.0
    assert judged == ["fit-holds-thrust"]


@pytest.mark.parametrize(("thrust", "verdict"), [
    (10000, Verdict.WITHIN), (700000, Verdict.OUTSIDE),
])  # fmt: skip
def test_a_thrust_of_the_plan_is_judged(thrust, verdict, monkeypatch):
    steel(monkeypatch)
    land = a_land(150.0, 250.0)
    item = an_item(land, thrust=newtons(thrust))
    # The lowest friction, 0.10, holds 624 kN.
    found = list(strength_findings(a_plan(), item,
                                   fit_strength(a_plan(), item, [fit(land, 3e-4, 3e-4)]),
                                   Subject()))  # fmt: skip

    assert [(one.rule.id, one.verdict) for one in found] == [("fit-holds-thrust", verdict)]
    assert found[0].limit_origin == ORIGIN.words


def test_a_share_without_power_leaves_thrust_unjudged(monkeypatch):
    steel(monkeypatch)
    land = a_land(150.0, 250.0)
    plan = a_plan(rotor={"power": None})
    item = an_item(land, carried_torque_share=Ratio.read("1"), thrust=newtons(100))

    found = {one.rule.id: one.verdict for one in strength_findings(
        plan, item, fit_strength(plan, item, [fit(land, 3e-4, 3e-4)]), Subject())}  # fmt: skip

    assert found["fit-holds-thrust"] is Verdict.NOT_JUDGED


def test_torque_adds_up_from_the_free_end_to_the_coupling():
    plan = sample_data.compressor().plan
    whole = rotor_torque(plan)

    along = torques_along(plan)
    carried = {one.item.key: one.in_shaft / whole for one in along}

    # 6400 hp at 9200 r/min: 63 025 · 6400/9200 = 43 844 lbf·in, handbook constant from memory.
    assert whole / (4.4482216152605 * 0.0254) == printed("43844")
    assert along[-1].item.key == "hub"
    assert [carried[f"impeller-{number}"] for number in (5, 4, 3, 2, 1)] in (
        [pytest.approx(share) for share in (0.2, 0.4, 0.6, 0.8, 1.0)],
        [pytest.approx(share) for share in (1.0, 0.8, 0.6, 0.4, 0.2)],
    )
    assert carried["hub"] == 1.0
    positions = [one.item.outline.start.si for one in along]
    assert positions in (sorted(positions), sorted(positions, reverse=True))


def test_the_hub_carries_all_without_a_share_and_others_nothing():
    plan = sample_data.compressor().plan
    items = {item.key: item for step in plan.steps for item in step.items}

    assert torque_to_carry(plan, items["hub"]) == rotor_torque(plan)
    assert torque_to_carry(plan, items["drum"]) is None


def test_shear_under_a_seat_is_that_of_a_round_bar():
    plan = sample_data.compressor().plan

    of_hub = next(one for one in seat_shears(plan) if one.item.key == "hub")

    # 16·T/(π·d³), by hand from the plan's own diameter.
    diameter = of_hub.land.nominal_diameter.si
    assert of_hub.shear == pytest.approx(16.0 * rotor_torque(plan) / (math.pi * diameter**3))


@pytest.mark.parametrize(("limit", "verdict"), [
    ("30 MPa", Verdict.WITHIN), ("10 MPa", Verdict.OUTSIDE),
])  # fmt: skip
def test_a_shear_limit_is_judged_at_every_seat(limit, verdict):
    job = sample_data.compressor()
    allowed = PressureLimit(value=Pressure.read(limit), origin=ORIGIN)
    plan = msgspec.structs.replace(
        job.plan, shaft=msgspec.structs.replace(job.plan.shaft, shear_limit=allowed)
    )

    found = [
        one.finding
        for one in assess(msgspec.structs.replace(job, plans=(plan,))).findings
        if one.finding.rule.id == "shaft-shear-allowed"
    ]

    assert len(found) == sum(len(item.lands) for step in plan.steps for item in step.items)
    assert Verdict.worst([one.verdict for one in found]) is verdict
    assert {one.limit_origin for one in found} == {ORIGIN.words}


def test_a_shear_limit_without_power_is_not_judged():
    job = sample_data.compressor()
    allowed = PressureLimit(value=Pressure.read("30 MPa"), origin=ORIGIN)
    plan = msgspec.structs.replace(
        job.plan,
        rotor=msgspec.structs.replace(job.plan.rotor, power=None),
        shaft=msgspec.structs.replace(job.plan.shaft, shear_limit=allowed),
    )

    found = [
        one.finding.verdict
        for one in assess(msgspec.structs.replace(job, plans=(plan,))).findings
        if one.finding.rule.id == "shaft-shear-allowed"
    ]

    assert found == [Verdict.NOT_JUDGED]


def test_uncertainty_reaches_pressure_torque_and_force_as_a_library_propagates_it(monkeypatch):
    steel(monkeypatch)
    land = a_land(150.0, 250.0)
    found = strength(a_plan(), an_item(land), fit(land, 3e-4, 3e-4, 12e-6))
    # Second path: linear propagation by the library, p = E·Δ/(2·d)·(1 − d²/D²) for one material on
    # a solid shaft, friction 0.10 over 100 mm; k = 2 on both sides.
    interference = ufloat(3e-4, 12e-6)
    pressure = 207e9 * interference / (2.0 * 0.15) * (1.0 - (0.15 / 0.25) ** 2)
    force = 0.10 * math.pi * 0.15 * 0.1 * pressure

    assert found.lands[0].least_pressure == pytest.approx(pressure.n)
    assert found.lands[0].pressure_uncertainty == pytest.approx(pressure.s)
    assert found.holding.force_uncertainty == pytest.approx(force.s)
    assert found.holding.torque_uncertainty == pytest.approx((force * 0.075).s)
    assert "± 5.3 MPa" in found.means
