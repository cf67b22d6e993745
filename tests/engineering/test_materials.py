import math
from dataclasses import fields

import pytest
from hypothesis import given
from hypothesis import strategies as st
from scipy import integrate

from models.engineering.errors import OutOfRangeError
from models.engineering.materials import (
    EXPANSION_SPREAD,
    MATERIALS,
    UnknownMaterialError,
    material,
    mean_expansion,
    modulus,
    own_material,
)
from tests.published.materials import (
    CONSTANTS,
    EXPANSIONS,
    MODULI,
    TOTAL_EXPANSIONS,
    PropertyRow,
)
from tests.published.printed import printed


def case(row: PropertyRow) -> str:
    return f"{row.key} at {row.temperature:.0f}"


@pytest.mark.parametrize("row", EXPANSIONS, ids=case)
def test_the_mean_expansion_is_the_one_printed(row):
    found = mean_expansion(material=MATERIALS[row.key], temperature=row.temperature)
    assert found == printed(row.printed, row.si_per_unit), row.source


@pytest.mark.parametrize("row", TOTAL_EXPANSIONS, ids=case)
def test_mean_times_rise_from_70_fahrenheit_is_the_total_printed(row):
    mean = mean_expansion(material=MATERIALS[row.key], temperature=row.temperature)
    rise = row.temperature - (70.0 - 32.0) / 1.8
    assert mean * rise == printed(row.printed, row.si_per_unit), row.source


@pytest.mark.parametrize("row", MODULI, ids=case)
def test_the_modulus_is_the_one_printed(row):
    found = modulus(material=MATERIALS[row.key], temperature=row.temperature)
    assert found == printed(row.printed, row.si_per_unit), row.source


@pytest.mark.parametrize("row", CONSTANTS, ids=lambda row: f"{row.key} {row.property}")
def test_a_property_without_temperature_is_the_one_printed(row):
    found = getattr(MATERIALS[row.key], row.property)
    assert found == printed(row.printed, row.si_per_unit), row.source


@pytest.mark.parametrize("temperature", [100.0, 200.0, 300.0, 400.0, 500.0, 600.0])
def test_the_structural_steel_table_integrates_its_polynomial(temperature):
    # Second path: NIST NCSTAR 1-3E instantaneous coefficient, T in K, integrated numerically.
    def instantaneous(kelvin):
        return 7.3633e-6 + 1.8723e-8 * kelvin - 9.8382e-12 * kelvin**2 + 1.6718e-16 * kelvin**3

    total, _ = integrate.quad(instantaneous, 293.15, temperature + 273.15)
    found = mean_expansion(material=MATERIALS["structural-steel"], temperature=temperature)
    assert found == pytest.approx(total / (temperature - 20.0), abs=0.005e-6)


def test_the_spread_is_that_of_the_published_low_alloy_steels():
    keys = ("low-alloy-steel-1", "low-alloy-steel-2", "4140", "4340", "42crmo4")
    found = [mean_expansion(material=MATERIALS[key], temperature=100.0) for key in keys]
    middle = (max(found) + min(found)) / 2.0
    assert (max(found) - middle) / middle == printed("0.08")
    assert printed("0.08") == EXPANSION_SPREAD


def test_below_the_table_its_first_value_holds_down_to_minus_fifty():
    steel = MATERIALS["4140"]
    assert mean_expansion(material=steel, temperature=-50.0) == printed("12.3", 1e-6)
    assert modulus(material=steel, temperature=-50.0) == printed("29.7", 6.894757293168e9)
    with pytest.raises(OutOfRangeError, match="temperature"):
        mean_expansion(material=steel, temperature=-50.1)


def test_above_the_table_only_a_small_margin_is_granted():
    steel = MATERIALS["410"]
    assert mean_expansion(material=steel, temperature=410.0) == printed("12.0", 1e-6)
    with pytest.raises(OutOfRangeError, match="410 °C"):
        mean_expansion(material=steel, temperature=410.1)
    assert modulus(material=steel, temperature=440.0) == printed("190", 1e9)
    with pytest.raises(OutOfRangeError, match="440 °C"):
        modulus(material=steel, temperature=440.1)


@pytest.mark.parametrize("function", [mean_expansion, modulus])
def test_a_temperature_that_is_no_number_is_refused(function):
    with pytest.raises(OutOfRangeError, match="temperature"):
        function(material=MATERIALS["4140"], temperature=math.nan)


@given(st.sampled_from(sorted(MATERIALS)), st.floats(-50.0, 700.0))
def test_a_coefficient_lies_between_its_tabulated_neighbours(key, temperature):
    chosen = MATERIALS[key]
    table = list(zip(chosen.expansion_temperatures, chosen.mean_expansions, strict=True))
    if temperature > table[-1][0]:
        return
    below = [value for at, value in table if at <= temperature][-1:] or [table[0][1]]
    above = next(value for at, value in table if at >= temperature)
    found = mean_expansion(material=chosen, temperature=temperature)
    assert min(below[0], above) <= found * (1 + 1e-12)
    assert found <= max(below[0], above) * (1 + 1e-12)


@given(st.sampled_from(sorted(MATERIALS)), st.floats(-50.0, 200.0), st.floats(0.0, 5.0))
def test_a_hotter_part_is_never_smaller(key, temperature, step):
    chosen = MATERIALS[key]
    end = chosen.expansion_temperatures[-1]
    low, high = min(temperature, end), min(temperature + step, end)
    growth = [mean_expansion(material=chosen, temperature=at) * (at - 20.0) for at in (low, high)]
    assert growth[0] <= growth[1] + 1e-15


@pytest.mark.parametrize("key", sorted(MATERIALS))
def test_every_value_has_a_source_and_a_believable_size(key):
    entry = MATERIALS[key]
    assert entry.key == key
    for source in fields(entry.sources):
        told = getattr(entry.sources, source.name)
        known = source.name in ("mean_expansion", "modulus") or getattr(entry, source.name)
        assert bool(told) == bool(known), source.name
    assert list(entry.expansion_temperatures) == sorted(set(entry.expansion_temperatures))
    assert list(entry.modulus_temperatures) == sorted(set(entry.modulus_temperatures))
    assert all(8e-6 < value < 27e-6 for value in entry.mean_expansions)
    assert all(65e9 < value < 220e9 for value in entry.moduli)
    assert 2600.0 < entry.density < 8300.0
    assert 0.25 < entry.poisson < 0.35


def test_a_key_is_found_whatever_its_capitals():
    assert material(name=" Alloy-718 ") is MATERIALS["alloy-718"]


@pytest.mark.parametrize(("typed", "offered"), [("4104", "4140"), ("718", "alloy-718")])
def test_an_unknown_material_is_answered_with_near_ones(typed, offered):
    with pytest.raises(UnknownMaterialError, match=offered):
        material(name=typed)


GOOD = {
    "name": "forging",
    "source": "certificate",
    "density": 7850.0,
    "poisson": 0.29,
    "mean_expansions": [(300.0, 13e-6), (100.0, 12e-6)],
    "moduli": [(20.0, 206e9)],
}


def test_a_shop_s_own_material_serves_like_a_tabulated_one():
    own = own_material(**GOOD, specific_heat=470.0)
    assert mean_expansion(material=own, temperature=250.0) == printed("12.75", 1e-6)
    assert modulus(material=own, temperature=20.0) == 206e9
    assert own.sources.specific_heat == "certificate"
    assert own.sources.conductivity is None
    assert own == own_material(**GOOD, specific_heat=470.0)
    assert hash(own) == hash(own_material(**GOOD, specific_heat=470.0))


@pytest.mark.parametrize(
    ("field", "value"),
    [
        ("name", " "),
        ("source", ""),
        ("density", 7.85),
        ("poisson", 0.5),
        ("mean_expansions", []),
        ("mean_expansions", [(100.0, 12.0)]),
        ("mean_expansions", [(100.0, 12e-6), (100.0, 13e-6)]),
        ("mean_expansions", [(math.nan, 12e-6)]),
        ("moduli", [(20.0, 206.0)]),
        ("moduli", [(20.0, math.nan)]),
        ("conductivity", -1.0),
        ("specific_heat", 0.0),
        ("yield_strength", math.inf),
    ],
)
def test_a_shop_s_own_number_that_cannot_be_is_refused_by_name(field, value):
    with pytest.raises(OutOfRangeError, match=field):
        own_material(**{**GOOD, field: value})
