"""The only place where a written number becomes SI, and back.

A `Quantity` keeps what a person typed, with its unit, beside one whole number in a small fixed
unit of its kind (nanometres, thousandths of a kelvin ...). Whole numbers are what the record
stores and compares; `si` is what the engineering works with. Outside SI there is only text.
"""

import re
from collections.abc import Mapping
from dataclasses import dataclass
from decimal import ROUND_HALF_EVEN, Decimal
from typing import Any, ClassVar, NamedTuple, Self

__all__ = [
    "KINDS",
    "Angle",
    "Conductivity",
    "Density",
    "Duration",
    "Expansion",
    "FieldStrength",
    "Force",
    "HeatCapacity",
    "Length",
    "Mass",
    "Power",
    "Pressure",
    "Quantity",
    "Ratio",
    "Speed",
    "Temperature",
    "TemperatureStep",
    "Torque",
    "Unbalance",
    "Unit",
    "UnitSet",
    "UnreadableNumberError",
    "inch_set",
    "metric_set",
    "number_text",
    "unit_set",
]

# Beyond 2**53 a whole number is no longer exact in every reader of JSON.
_GREATEST_WHOLE = 2**53 - 1
_NUMBER = r"[+\-−]?(?:\d+(?:\.\d*)?|\.\d+)"
_WRITTEN = re.compile(rf"\s*(?P<number>{_NUMBER})\s*(?P<unit>[^\d\s].*?)?\s*\Z", re.ASCII)


class UnreadableNumberError(ValueError):
    """Text that is no number, or carries a unit that this kind of quantity does not have."""

    def __init__(self, text: str, expected: str) -> None:
        self.text = text
        self.expected = expected
        super().__init__(f"“{text}”: {expected}")


class Unit(NamedTuple):
    """One way to write a kind of quantity; `small` is how many small units it holds."""

    symbol: str
    small: Decimal
    zero: Decimal = Decimal(0)
    aliases: tuple[str, ...] = ()


class Quantity:
    """A written number: as typed, its unit, and its value in whole small units of its kind.

    Two quantities are equal when the same text with the same unit was typed. Compare `whole` to
    ask whether they mean the same.
    """

    # A plain class and not a dataclass: the reader of job files would otherwise take it apart
    # itself and never ask for its written form.
    __slots__ = ("typed", "unit", "whole")

    name: ClassVar[str] = "quantity"
    example: ClassVar[str] = "12.5"
    small_unit: ClassVar[str] = ""
    si_unit: ClassVar[str] = ""
    units: ClassVar[Mapping[str, Unit]] = {}
    small_per_si: ClassVar[Decimal] = Decimal(1)
    si_zero: ClassVar[Decimal] = Decimal(0)

    def __init__(self, *, typed: str, unit: str, whole: int) -> None:
        self.typed = typed
        self.unit = unit
        self.whole = whole

    def __eq__(self, other: object) -> bool:
        return (
            isinstance(other, Quantity)
            and type(self) is type(other)
            and (self.typed, self.unit) == (other.typed, other.unit)
        )

    def __hash__(self) -> int:
        return hash((type(self), self.typed, self.unit))

    def __repr__(self) -> str:
        return f"{type(self).__name__}({self.written!r})"

    @classmethod
    def read(cls, text: str, unit: str | None = None) -> Self:
        """Read a written number; a unit in the text goes before the one given.

        Raises
        ------
        UnreadableNumberError
            If the text is empty, no finite decimal number, or its unit is not one of this kind.
        """
        written = _WRITTEN.match(text)
        if written is None or "," in text:
            raise UnreadableNumberError(text, cls._expected(text))
        symbol = written["unit"] or unit
        if symbol is None:
            raise UnreadableNumberError(
                text, f"a unit is missing, one of {', '.join(cls.symbols())}"
            )
        found = cls.find_unit(symbol)
        if found is None:
            raise UnreadableNumberError(
                text, f"{cls.name} is written in {', '.join(cls.symbols())}, not in “{symbol}”"
            )
        number = Decimal(written["number"].replace("−", "-"))
        whole = int((number * found.small + found.zero).to_integral_value(ROUND_HALF_EVEN))
        if abs(whole) > _GREATEST_WHOLE:
            raise UnreadableNumberError(text, f"too large for {cls.name}")
        return cls(typed=written["number"], unit=found.symbol, whole=whole)

    @classmethod
    def _expected(cls, text: str) -> str:
        if not text.strip():
            return f"nothing typed; {cls.name} is expected"
        if "," in text:
            return "a number with “.” as its decimal point and no thousands mark"
        return f"{cls.name} is a number such as {cls._example()}"

    @classmethod
    def _example(cls) -> str:
        return f"{cls.example} {cls.symbols()[0]}".rstrip()

    @classmethod
    def symbols(cls) -> tuple[str, ...]:
        """Symbols of the units in which this kind is written."""
        return tuple(unit.symbol for unit in _distinct(cls.units))

    @classmethod
    def find_unit(cls, symbol: str) -> Unit | None:
        """Find a unit by its symbol or an alias of it."""
        return cls.units.get(symbol.strip())

    @classmethod
    def from_si(cls, value: float, unit: str, decimals: int) -> Self:
        """Make a quantity as if it had been typed with so many decimals."""
        return cls.read(cls.text(value, unit, decimals), unit)

    @classmethod
    def text(cls, value: float, unit: str, decimals: int) -> str:
        """Write an SI value in a unit, without the symbol."""
        return number_text(cls.in_unit(value, unit), decimals)

    @classmethod
    def in_unit(cls, value: float, unit: str) -> float:
        """Give an SI value as a number of the unit."""
        found = cls.units[unit]
        small = Decimal(repr(float(value))) * cls.small_per_si + cls.si_zero
        return float((small - found.zero) / found.small)

    @property
    def si(self) -> float:
        """The value in SI (temperatures in °C, angles in degrees, speeds in rad/s)."""
        return float((Decimal(self.whole) - self.si_zero) / self.small_per_si)

    @property
    def written(self) -> str:
        """The number as typed, with its unit."""
        return f"{self.typed} {self.unit}".strip()

    def to(self, unit: str, decimals: int) -> str:
        """Write the value in another unit, without the symbol."""
        return self.text(self.si, unit, decimals)


def _distinct(units: Mapping[str, Unit]) -> tuple[Unit, ...]:
    return tuple(dict.fromkeys(units.values()))


def _table(*units: Unit) -> dict[str, Unit]:
    return {name: unit for unit in units for name in (unit.symbol, *unit.aliases)}


def _small(symbol: str, small: str, *aliases: str, zero: str = "0") -> Unit:
    return Unit(symbol, Decimal(small), Decimal(zero), aliases)


class Length(Quantity):
    """A length; SI value in m."""

    __slots__ = ()

    name = "a length"
    example = "−0.0003"
    small_unit = "nm"
    si_unit = "m"
    small_per_si = Decimal(10) ** 9
    # 1 in = 25.4 mm exactly (international inch, 1959).
    units = _table(
        _small("in", "25400000", '"', "inch"),
        _small("mm", "1000000"),
        _small("µm", "1000", "μm", "um"),
        _small("mil", "25400", "thou"),
        _small("m", "1000000000"),
        _small("ft", "304800000"),
    )


class Temperature(Quantity):
    """A temperature; SI value in °C, stored in thousandths of a kelvin from absolute zero."""

    __slots__ = ()

    name = "a temperature"
    example = "215"
    small_unit = "mK"
    si_unit = "°C"
    small_per_si = Decimal(1000)
    si_zero = Decimal(273150)
    units = _table(
        _small("°C", "1000", "C", "degC", "℃", zero="273150"),
        # 0 °F is 459.67 degrees of 5/9 K above absolute zero.
        Unit("°F", Decimal(5000) / 9, Decimal("459.67") * 5000 / 9, ("F", "degF", "℉")),
        _small("K", "1000"),
    )


class TemperatureStep(Quantity):
    """A difference of temperature; SI value in K."""

    __slots__ = ()

    name = "a difference of temperature"
    small_unit = "mK"
    si_unit = "K"
    small_per_si = Decimal(1000)
    units = _table(_small("K", "1000", "°C"), Unit("°F", Decimal(5000) / 9, Decimal(0), ("F",)))


class Angle(Quantity):
    """A clock angle; value in degrees."""

    __slots__ = ()

    name = "an angle"
    small_unit = "mdeg"
    si_unit = "°"
    small_per_si = Decimal(1000)
    units = _table(_small("°", "1000", "deg"))


class Speed(Quantity):
    """A speed of rotation; SI value in rad/s, stored in thousandths of a turn per minute."""

    __slots__ = ()

    name = "a speed"
    small_unit = "mr/min"
    si_unit = "rad/s"
    small_per_si = Decimal("9549.296585513720146133025802")  # 60 000 / 2π
    units = _table(_small("r/min", "1000", "rpm", "1/min"))


class Mass(Quantity):
    """A mass; SI value in kg."""

    __slots__ = ()

    name = "a mass"
    small_unit = "mg"
    si_unit = "kg"
    small_per_si = Decimal(10) ** 6
    # 1 lb = 0.45359237 kg exactly (international pound, 1959).
    units = _table(
        _small("kg", "1000000"),
        _small("g", "1000"),
        _small("lb", "453592.37"),
        _small("oz", "28349.523125"),
    )


class Power(Quantity):
    """A power; SI value in W."""

    __slots__ = ()

    name = "a power"
    small_unit = "mW"
    si_unit = "W"
    small_per_si = Decimal(1000)
    # 1 hp = 550 ft·lbf/s.
    units = _table(
        _small("kW", "1000000"),
        _small("W", "1000"),
        _small("MW", "1000000000"),
        _small("hp", "745699.87158227022"),
    )


class Torque(Quantity):
    """A torque; SI value in N·m."""

    __slots__ = ()

    name = "a torque"
    small_unit = "mN·m"
    si_unit = "N·m"
    small_per_si = Decimal(1000)
    units = _table(
        _small("N·m", "1000", "Nm"),
        _small("kN·m", "1000000", "kNm"),
        _small("lbf·in", "112.9848290276167", "lb·in", "lb-in"),
        _small("lbf·ft", "1355.8179483314004", "lb·ft", "lb-ft"),
    )


class Force(Quantity):
    """A force; SI value in N."""

    __slots__ = ()

    name = "a force"
    small_unit = "mN"
    si_unit = "N"
    small_per_si = Decimal(1000)
    units = _table(_small("N", "1000"), _small("kN", "1000000"), _small("lbf", "4448.2216152605"))


class Pressure(Quantity):
    """A pressure or a stress; SI value in Pa."""

    __slots__ = ()

    name = "a pressure"
    small_unit = "Pa"
    si_unit = "Pa"
    units = _table(
        _small("MPa", "1000000", "N/mm²"),
        _small("GPa", "1000000000"),
        _small("bar", "100000"),
        _small("psi", "6894.757293168361"),
        _small("ksi", "6894757.293168361"),
        _small("Pa", "1"),
    )


class Unbalance(Quantity):
    """An unbalance; SI value in kg·m."""

    __slots__ = ()

    name = "an unbalance"
    small_unit = "mg·mm"
    si_unit = "kg·m"
    small_per_si = Decimal(10) ** 9
    units = _table(
        _small("g·mm", "1000", "gmm"),
        _small("oz·in", "720077.887375", "oz-in"),
        _small("g·in", "25400"),
        _small("kg·m", "1000000000"),
    )


class Duration(Quantity):
    """A length of time; SI value in s."""

    __slots__ = ()

    name = "a time"
    small_unit = "ms"
    si_unit = "s"
    small_per_si = Decimal(1000)
    units = _table(
        _small("min", "60000"), _small("s", "1000"), _small("h", "3600000"), _small("d", "86400000")
    )


class Expansion(Quantity):
    """A mean coefficient of expansion; SI value in 1/K."""

    __slots__ = ()

    name = "a coefficient of expansion"
    small_unit = "1e-12/K"
    si_unit = "1/K"
    small_per_si = Decimal(10) ** 12
    units = _table(
        _small("µm/(m·K)", "1000000", "μm/(m·K)"),
        Unit("µin/(in·°F)", Decimal(1800000), Decimal(0), ("μin/(in·°F)",)),
    )


class Ratio(Quantity):
    """A plain number or a share; SI value dimensionless."""

    __slots__ = ()

    name = "a plain number"
    small_unit = "1e-6"
    small_per_si = Decimal(10) ** 6
    units = _table(_small("", "1000000", "1"), _small("%", "10000"), _small("‰", "1000"))

    @classmethod
    def read(cls, text: str, unit: str | None = None) -> Self:
        """Read a plain number; without a unit it is a pure ratio."""
        return super().read(text, "" if unit is None else unit)


class FieldStrength(Quantity):
    """Residual magnetism; SI value in T."""

    __slots__ = ()

    name = "a magnetic flux density"
    small_unit = "nT"
    si_unit = "T"
    small_per_si = Decimal(10) ** 9
    units = _table(
        _small("gauss", "100000", "G"), _small("mT", "1000000"), _small("µT", "1000", "μT")
    )


class Density(Quantity):
    """A density; SI value in kg/m³."""

    __slots__ = ()

    name = "a density"
    small_unit = "mg/m³"
    si_unit = "kg/m³"
    small_per_si = Decimal(10) ** 6
    # 1 lb = 0.45359237 kg, 1 in = 0.0254 m.
    units = _table(
        _small("kg/m³", "1000000", "kg/m3"),
        _small("g/cm³", "1000000000", "g/cm3"),
        _small("lb/in³", "27679904710.2", "lb/in3"),
    )


class Conductivity(Quantity):
    """A thermal conductivity; SI value in W/(m·K)."""

    __slots__ = ()

    name = "a thermal conductivity"
    small_unit = "µW/(m·K)"
    si_unit = "W/(m·K)"
    small_per_si = Decimal(10) ** 6
    # 1 Btu = 1055.05585262 J (international table).
    units = _table(
        _small("W/(m·K)", "1000000", "W/(m K)", "W/mK"),
        _small("Btu/(h·ft·°F)", "1730734.6663713911"),
    )


class HeatCapacity(Quantity):
    """A specific heat capacity; SI value in J/(kg·K)."""

    __slots__ = ()

    name = "a specific heat capacity"
    small_unit = "mJ/(kg·K)"
    si_unit = "J/(kg·K)"
    small_per_si = Decimal(1000)
    units = _table(
        _small("J/(kg·K)", "1000", "J/(kg K)", "J/kgK"),
        _small("Btu/(lb·°F)", "4186800"),
    )


KINDS: tuple[type[Quantity], ...] = (
    Length,
    Temperature,
    TemperatureStep,
    Angle,
    Speed,
    Mass,
    Power,
    Torque,
    Force,
    Pressure,
    Unbalance,
    Duration,
    Expansion,
    Ratio,
    FieldStrength,
    Density,
    Conductivity,
    HeatCapacity,
)


def number_text(value: float, decimals: int) -> str:
    """Write a number with so many decimals, a true minus sign and never a negative zero."""
    text = f"{value:.{decimals}f}"
    if text.startswith("-"):
        text = text[1:]
        if text.strip("0."):
            text = "−" + text
    return text


class _Way(NamedTuple):
    """How one use of a quantity is written: its kind, unit and decimals."""

    kind: type[Quantity]
    unit: str
    decimals: int


@dataclass(frozen=True)
class UnitSet:
    """How a job writes its numbers; the other set stands beside it where both are shown.

    The uses are `diameter`, `fit` (interference, clearance), `position` (along the axis),
    `runout`, `temperature`, `temperature_step`, `pressure`, `torque`, `force`, `mass`, `speed`,
    `power`, `unbalance`, `angle`, `duration`.
    """

    name: str
    ways: Mapping[str, _Way]
    other_ways: Mapping[str, _Way]

    def unit(self, use: str) -> str:
        """Name the unit in which this use is written."""
        return self.ways[use].unit

    def bare(self, value: float, use: str) -> str:
        """Write an SI value without its unit."""
        way = self.ways[use]
        return way.kind.text(value, way.unit, way.decimals)

    def show(self, value: float, use: str) -> str:
        """Write an SI value with its unit."""
        return self._with_unit(value, self.ways[use])

    def other(self, value: float, use: str) -> str:
        """Write an SI value with the unit of the other set."""
        return self._with_unit(value, self.other_ways[use])

    def both(self, value: float, use: str) -> str:
        """Write an SI value in this set's unit, with the other in brackets where it differs."""
        here, there = self.show(value, use), self.other(value, use)
        return here if here == there else f"{here} ({there})"

    def read(self, text: str, use: str) -> Quantity:
        """Read what was typed for this use; a unit in the text goes before the set's own."""
        way = self.ways[use]
        return way.kind.read(text, way.unit)

    @staticmethod
    def _with_unit(value: float, way: _Way) -> str:
        gap = "" if way.unit == "°" else " "
        return f"{way.kind.text(value, way.unit, way.decimals)}{gap}{way.unit}".strip()


_INCH: dict[str, _Way] = {
    "diameter": _Way(Length, "in", 4),
    "fit": _Way(Length, "in", 4),
    "position": _Way(Length, "in", 3),
    "runout": _Way(Length, "in", 4),
    "temperature": _Way(Temperature, "°F", 0),
    "temperature_step": _Way(TemperatureStep, "°F", 1),
    "pressure": _Way(Pressure, "ksi", 1),
    "torque": _Way(Torque, "lbf·in", 0),
    "force": _Way(Force, "lbf", 0),
    "mass": _Way(Mass, "lb", 1),
    "speed": _Way(Speed, "r/min", 0),
    "power": _Way(Power, "hp", 0),
    "unbalance": _Way(Unbalance, "oz·in", 3),
    "angle": _Way(Angle, "°", 0),
    "duration": _Way(Duration, "min", 1),
}
_METRIC: dict[str, _Way] = {
    "diameter": _Way(Length, "mm", 3),
    "fit": _Way(Length, "µm", 1),
    "position": _Way(Length, "mm", 2),
    "runout": _Way(Length, "µm", 1),
    "temperature": _Way(Temperature, "°C", 0),
    "temperature_step": _Way(TemperatureStep, "K", 1),
    "pressure": _Way(Pressure, "MPa", 1),
    "torque": _Way(Torque, "N·m", 0),
    "force": _Way(Force, "N", 0),
    "mass": _Way(Mass, "kg", 1),
    "speed": _Way(Speed, "r/min", 0),
    "power": _Way(Power, "kW", 0),
    "unbalance": _Way(Unbalance, "g·mm", 1),
    "angle": _Way(Angle, "°", 0),
    "duration": _Way(Duration, "min", 1),
}
inch_set = UnitSet("inch", _INCH, _METRIC)
metric_set = UnitSet("metric", _METRIC, _INCH)


def unit_set(name: str) -> UnitSet:
    """Find a unit set by its name, `inch` or `metric`."""
    found: dict[str, UnitSet] = {"inch": inch_set, "metric": metric_set}
    return found[name]


def decode(kind: type[Any], written: Any) -> Any:  # noqa: ANN401  (msgspec's own hook)
    """Turn the written form of a quantity in a file into the quantity."""
    if issubclass(kind, Quantity) and isinstance(written, str):
        return kind.read(written)
    raise NotImplementedError(f"{kind!r} is no quantity")
