"""Materials by name: the plan's own copies first, then the table."""

import msgspec
import pytest

import sample_data
from models.assess.lacks import lacks
from models.assess.materials import expansion_of, material_of, materials_used
from models.units import Expansion, Ratio
from tests.record.a_job import FORGING


def with_own(*own, **shaft):
    plan = sample_data.pump().plan
    return msgspec.structs.replace(
        plan, materials=own, shaft=msgspec.structs.replace(plan.shaft, **shaft)
    )


def test_a_plans_own_material_goes_before_the_table_of_the_same_name():
    own = msgspec.structs.replace(FORGING, name="4140")
    plan = with_own(own)

    found = material_of(plan, "4140")

    assert found.sources.mean_expansion == "certificate 17"
    assert material_of(with_own(), "4140").sources.mean_expansion != "certificate 17"


def test_numbers_come_out_in_si_as_the_certificate_says_them():
    found = material_of(with_own(FORGING), "own forging")

    # 0.2836 lb/in³ · 27 679.9 kg/m³ per lb/in³, by hand.
    assert found.density == pytest.approx(7850.0, abs=0.5)
    assert found.yield_strength == 640e6
    # Half-way between 12 and 13 at 100 and 300 °C.
    assert expansion_of(with_own(FORGING), "own forging")(200.0) == pytest.approx(12.5e-6)


def test_an_unknown_name_is_no_material():
    assert material_of(with_own(FORGING), "no such steel") is None
    assert material_of(with_own(FORGING), None) is None
    assert expansion_of(with_own(FORGING), "") is None


@pytest.mark.parametrize("change", [
    {"poisson": Ratio.read("0.6")},
    {"expansions": ()},
    {"expansions": (msgspec.structs.replace(
        FORGING.expansions[0], coefficient=Expansion.read("1200 µm/(m·K)")),)},
])  # fmt: skip
def test_a_material_that_cannot_be_is_not_worked_with_and_said_so(change):
    own = msgspec.structs.replace(FORGING, **change)
    plan = with_own(own, material="own forging")
    job = msgspec.structs.replace(sample_data.pump(), plans=(plan,))

    assert material_of(plan, "own forging") is None
    assert any("own forging” : " in one or "“own forging”: it cannot" in one for one in lacks(job))


def test_the_materials_of_a_plan_are_listed_once_with_the_shafts_first():
    plan = with_own(FORGING, material="own forging")

    used = materials_used(plan)

    assert used[0] == "own forging"
    assert len(set(used)) == len(used) > 1
