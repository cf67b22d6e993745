"""Written numbers and SI: against an independent unit library, and there and back."""

import math
from decimal import Decimal

import pint
import pytest
from hypothesis import given
from hypothesis import strategies as st

from models.units import (
    KINDS,
    Angle,
    Conductivity,
    Density,
    Duration,
    Expansion,
    FieldStrength,
    Force,
    HeatCapacity,
    Length,
    Mass,
    Power,
    Pressure,
    Quantity,
    Ratio,
    Speed,
    Temperature,
    TemperatureStep,
    Torque,
    Unbalance,
    UnreadableNumberError,
    inch_set,
    metric_set,
    number_text,
    unit_set,
)

UREG = pint.UnitRegistry(autoconvert_offset_to_baseunit=True)
# The library keeps the gauss of another system of units; 1 G answers to 100 µT by definition.
UREG.define("shop_gauss = 1e-4 tesla")

# Our symbol, the independent library's name, and the SI unit of the kind there.
SAME = [
    (Length, "in", "inch", "m"), (Length, "mm", "mm", "m"), (Length, "µm", "um", "m"),
    (Length, "mil", "thou", "m"), (Length, "m", "m", "m"), (Length, "ft", "ft", "m"),
    (Temperature, "°C", "degC", "degC"), (Temperature, "°F", "degF", "degC"),
    (Temperature, "K", "kelvin", "degC"),
    (TemperatureStep, "K", "kelvin", "kelvin"), (TemperatureStep, "°F", "delta_degF", "kelvin"),
    (Angle, "°", "degree", "degree"),
    (Speed, "r/min", "revolution/minute", "radian/second"),
    (Mass, "kg", "kg", "kg"), (Mass, "g", "g", "kg"), (Mass, "lb", "lb", "kg"),
    (Mass, "oz", "oz", "kg"),
    (Power, "kW", "kW", "W"), (Power, "hp", "horsepower", "W"), (Power, "MW", "MW", "W"),
    (Power, "W", "W", "W"),
    (Torque, "N·m", "N*m", "N*m"), (Torque, "kN·m", "kN*m", "N*m"),
    (Torque, "lbf·in", "lbf*inch", "N*m"), (Torque, "lbf·ft", "lbf*foot", "N*m"),
    (Force, "N", "N", "N"), (Force, "kN", "kN", "N"), (Force, "lbf", "lbf", "N"),
    (Pressure, "MPa", "MPa", "Pa"), (Pressure, "GPa", "GPa", "Pa"), (Pressure, "bar", "bar", "Pa"),
    (Pressure, "psi", "psi", "Pa"), (Pressure, "ksi", "ksi", "Pa"), (Pressure, "Pa", "Pa", "Pa"),
    (Unbalance, "g·mm", "g*mm", "kg*m"), (Unbalance, "oz·in", "oz*inch", "kg*m"),
    (Unbalance, "g·in", "g*inch", "kg*m"), (Unbalance, "kg·m", "kg*m", "kg*m"),
    (Duration, "min", "minute", "s"), (Duration, "s", "s", "s"), (Duration, "h", "hour", "s"),
    (Duration, "d", "day", "s"),
    (Expansion, "µm/(m·K)", "micrometer/meter/kelvin", "1/kelvin"),
    (Expansion, "µin/(in·°F)", "microinch/inch/delta_degF", "1/kelvin"),
    (FieldStrength, "gauss", "shop_gauss", "T"), (FieldStrength, "mT", "mT", "T"),
    (FieldStrength, "µT", "uT", "T"),
    (Density, "kg/m³", "kg/m**3", "kg/m**3"), (Density, "g/cm³", "g/cm**3", "kg/m**3"),
    (Density, "lb/in³", "lb/inch**3", "kg/m**3"),
    (Conductivity, "W/(m·K)", "W/m/kelvin", "W/m/kelvin"),
    (Conductivity, "Btu/(h·ft·°F)", "Btu_it/hour/foot/delta_degF", "W/m/kelvin"),
    (HeatCapacity, "J/(kg·K)", "J/kg/kelvin", "J/kg/kelvin"),
    (HeatCapacity, "Btu/(lb·°F)", "Btu_it/lb/delta_degF", "J/kg/kelvin"),
]  # fmt: skip


def test_every_unit_has_its_row() -> None:
    ours = {(kind, symbol) for kind in KINDS if kind is not Ratio for symbol in kind.symbols()}

    assert ours == {(kind, symbol) for kind, symbol, _, _ in SAME}


@pytest.mark.parametrize(("kind", "symbol", "theirs", "si"), SAME)
def test_a_unit_is_as_large_as_an_independent_library_says(
    kind: type[Quantity], symbol: str, theirs: str, si: str
) -> None:
    number = Decimal("12.5")

    found = kind.read(str(number), symbol)

    expected = float(UREG.Quantity(float(number), theirs).to(si).magnitude)
    step = float(1 / kind.small_per_si)
    assert found.si == pytest.approx(expected, rel=1e-12, abs=0.51 * step)


def test_mean_coefficients_have_no_unit_of_their_own_beside_the_metre() -> None:
    assert Expansion.read("11.5 µm/(m·K)").si == pytest.approx(11.5e-6)


@pytest.mark.parametrize("text", ["50 %", "0.5", "500 ‰"])
def test_a_ratio_reads_as_a_share(text: str) -> None:
    assert Ratio.read(text).si == 0.5


@pytest.mark.parametrize(
    "text",
    ["", "  ", "twelve", "nan", "inf", "-inf", "1e400", "1,234.5", "3,995", "--1", "1.2.3", "0x10",
     "١٢ in", "4 in 3", "4 furlongs", "5 kg", "²", "1/2 in", "NaN in", "+ 4 in"],
)  # fmt: skip
def test_what_is_no_length_is_refused_with_the_text_in_the_sentence(text: str) -> None:
    with pytest.raises(UnreadableNumberError) as refused:
        Length.read(text, "in")

    assert refused.value.text == text
    assert f"“{text}”" in str(refused.value)
    assert refused.value.expected


def test_a_number_too_large_to_be_kept_exactly_is_refused() -> None:
    with pytest.raises(UnreadableNumberError, match="too large"):
        Length.read("99999999999 m")


def test_a_missing_unit_is_named() -> None:
    with pytest.raises(UnreadableNumberError, match="a unit is missing, one of in, mm"):
        Length.read("4.5")


@pytest.mark.parametrize(
    ("text", "whole"),
    [("4.002 in", 101_650_800), ("-0.3 mil", -7_620), ("−0.3 thou", -7_620), ("101.65 mm",
     101_650_000), ("+0.0001 in", 2_540), (".5 in", 12_700_000), ("5. mm", 5_000_000)],
)  # fmt: skip
def test_a_length_is_kept_to_the_nanometre(text: str, whole: int) -> None:
    assert Length.read(text).whole == whole


def test_a_unit_in_the_text_goes_before_the_one_given() -> None:
    assert Length.read("25.4 mm", "in") == Length.read("25.4", "mm")


def test_fixed_points_of_temperature() -> None:
    assert Temperature.read("32 °F").si == 0.0
    assert Temperature.read("212 °F").si == 100.0
    assert Temperature.read("-40 °F").whole == Temperature.read("-40 °C").whole


@given(
    st.sampled_from([one for one in SAME]),
    st.decimals(-100_000, 100_000, allow_nan=False, places=4),
)
def test_what_was_typed_comes_back_as_typed(row: tuple, number: Decimal) -> None:
    kind, symbol = row[0], row[1]

    found = kind.read(str(number), symbol)

    assert kind.read(found.written) == found
    assert Decimal(found.typed.replace("−", "-")) == number


@given(st.decimals(-99, 99, allow_nan=False, places=4))
def test_inches_with_four_decimals_show_the_same_number_again(number: Decimal) -> None:
    quantity = Length.read(str(number), "in")

    assert Decimal(quantity.to("in", 4).replace("−", "-")) == number


@given(st.floats(-1e6, 1e6, allow_nan=False), st.integers(0, 6))
def test_a_number_is_never_written_as_minus_nothing(value: float, decimals: int) -> None:
    text = number_text(value, decimals)

    assert "-" not in text
    if not text.strip("−0."):
        assert not text.startswith("−")
    assert math.isclose(float(text.replace("−", "-")), value, abs_tol=0.51 * 10.0**-decimals)


def test_a_job_shows_its_own_unit_first_and_the_other_beside_it() -> None:
    assert inch_set.both(30.48e-6, "runout") == "0.0012 in (30.5 µm)"
    assert metric_set.both(30.48e-6, "runout") == "30.5 µm (0.0012 in)"
    assert inch_set.both(math.pi, "angle") == "3°"
    assert unit_set("inch") is inch_set


@pytest.mark.parametrize("use", sorted(inch_set.ways))
def test_both_sets_write_every_use_in_units_of_one_kind(use: str) -> None:
    assert inch_set.ways[use].kind is metric_set.ways[use].kind
    shown = inch_set.read(inch_set.bare(1.0, use), use)
    assert shown.unit == inch_set.unit(use)
