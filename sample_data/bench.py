"""What the invented people at the stand measure: the truth, through instruments, as typed."""

import math
from collections.abc import Sequence
from typing import NamedTuple

from models.engineering.heating import gauge_diameter
from models.engineering.material_table import MATERIALS
from models.engineering.materials import mean_expansion
from models.job import Item, Land, Plan, Station, StationReadings, Warmth
from models.units import Angle, Length
from sample_data.geometry import (
    Chance,
    Lie,
    dial_readings,
    diameter_at,
    eccentricity,
    warm_kink,
)
from sample_data.shop import Shop
from sample_data.truth import Diameter, Kink, Truth, Warm

__all__ = ["Bench", "Gauged", "Measured", "OvenReading"]

_SIZE_ANGLES = (0.0, 45.0, 90.0, 135.0)
_ALONG = (-0.35, 0.0, 0.35)
# What the certificates of the micrometers state.
_GAUGE_EXPANSION = 11.5e-6


class Measured(NamedTuple):
    """One size survey: where, what was typed, and how warm part and gauge were."""

    positions: tuple[float, ...]
    angles_degrees: tuple[float, ...]
    typed: tuple[tuple[str, ...], ...]
    part_temperature: float
    gauge_temperature: float


class OvenReading(NamedTuple):
    """Temperatures read on the hot part."""

    bore: tuple[float, float, float]
    web: float
    rim: float


class Gauged(NamedTuple):
    """A gauge offered to one land of the hot bore."""

    land: str
    size: float
    passed: bool


class Bench:
    """A stand at which one rotor is measured."""

    def __init__(self, *, truth: Truth, plan: Plan, shop: Shop) -> None:
        self.truth = truth
        self.plan = plan
        self.shop = shop
        self.marks_degrees = tuple(angle.si for angle in plan.runout.marks)

    def survey(
        self, *, name: str, stations: Sequence[Station], kinks: Sequence[Kink]
    ) -> tuple[StationReadings, ...]:
        """Read every station, mark by mark; the name seeds the chance of this survey."""
        chance = Chance(self.truth.seed, "survey", name)
        lie = Lie(
            at_first_journal=chance.vector(self.truth.instruments.lie),
            at_second_journal=chance.vector(self.truth.instruments.lie),
        )
        return tuple(self._station(station, kinks, lie, chance) for station in stations)

    def _station(
        self, station: Station, kinks: Sequence[Kink], lie: Lie, chance: Chance
    ) -> StationReadings:
        middle = eccentricity(self.truth, station.key, station.position.si, kinks, lie)
        shown, again = dial_readings(
            self.truth,
            station.key,
            middle,
            self.marks_degrees,
            chance,
            zeroed=self.shop.zeroes_at_first_mark,
        )
        return StationReadings(
            station=station.key,
            typed=tuple(self.shop.dial_text(reading) for reading in shown),
            again=self.shop.dial_text(again),
        )

    def warm_kink(self, warm: Warm, item: Item) -> Kink:
        """Give the bend of the shaft while one side near an item is still warm."""
        outline = item.outline
        middle = (outline.start.si + outline.end.si) / 2
        return warm_kink(self.truth, warm, middle, outline.bore.si)

    def sizes(self, *, name: str, item: Item, land: Land, feature: str) -> Measured:
        """Measure a seat or a bore over one land, each part at its own temperature."""
        chance = Chance(self.truth.seed, "sizes", name)
        size = self.diameter(item, land)
        part = self.shop.hall + chance.normal(0.6)
        gauge = self.shop.hall + chance.normal(0.3)
        material = self.plan.shaft.material if feature == "seat" else str(item.material)
        grown = 1 + self._expansion(material, part) * (part - 20)
        grown /= 1 + _GAUGE_EXPANSION * (gauge - 20)
        middle, length = (land.start.si + land.end.si) / 2, land.end.si - land.start.si
        typed = tuple(
            tuple(
                self.shop.size_text(
                    diameter_at(size, feature, along, degrees) * grown
                    + chance.normal(self.truth.instruments.size)
                )
                for degrees in _SIZE_ANGLES
            )
            for along in _ALONG
        )
        positions = tuple(middle + along * length for along in _ALONG)
        return Measured(positions, _SIZE_ANGLES, typed, part, gauge)

    def diameter(self, item: Item, land: Land) -> Diameter:
        """Find the true fit of a land."""
        return next(one for one in self.truth.diameters_of(item.key) if one.land == land.key)

    def _expansion(self, material: str, temperature: float) -> float:
        table = mean_expansion(material=MATERIALS[material], temperature=temperature)
        return table * self.truth.expansion_factor

    def gauge_size(self, item: Item, seat: Measured, shaft_temperature: float) -> float:
        """Choose the hot-bore gauge from the measured seat, the next size up that exists."""
        assert item.mounting_clearance is not None
        material = MATERIALS[self.plan.shaft.material]
        unit = Length.read("1", self.shop.size_unit).si
        greatest = max(float(text) for row in seat.typed for text in row) * unit
        shaft = mean_expansion(material=material, temperature=seat.part_temperature)
        at_reference = (
            greatest
            * (1 + _GAUGE_EXPANSION * (seat.gauge_temperature - 20))
            / (1 + shaft * (seat.part_temperature - 20))
        )
        wanted = gauge_diameter(
            seat_diameter=at_reference,
            shaft_temperature=shaft_temperature,
            shaft_expansion=lambda temperature: mean_expansion(
                material=material, temperature=temperature
            ),
            clearance=item.mounting_clearance.value.si,
        )
        step = self.truth.instruments.size_resolution
        return math.ceil(wanted / step - 1e-9) * step

    def oven(self, *, name: str, set_point: float, lag: float) -> OvenReading:
        """Read the hot part's temperatures."""
        chance = Chance(self.truth.seed, "oven", name)
        mean = set_point - lag
        first, second, third = (mean + chance.normal(0.4) for _ in range(3))
        return OvenReading((first, second, third), mean + chance.normal(0.4), mean + 0.5)

    def offer_gauge(self, item: Item, land: Land, size: float, mean: float) -> Gauged:
        """Offer a gauge to the hot bore: it passes where the narrowest place lets it through."""
        true = self.diameter(item, land)
        narrowest = min(
            diameter_at(true, "bore", along, degrees)
            for along in (-0.5, 0.5)
            for degrees in range(0, 180, 5)
        )
        hot = narrowest * (1 + self._expansion(str(item.material), mean) * (mean - 20))
        return Gauged(land.key, size, hot >= size)

    def warmth(
        self, *, name: str, positions: Sequence[float], warm: Warm | None
    ) -> tuple[Warmth, ...]:
        """Read temperatures around the rotor at each position, at four clock angles."""
        chance = Chance(self.truth.seed, "warmth", name)
        above = warm.above_surroundings if warm else 0.3
        return tuple(
            Warmth(
                position=self.shop.position(position),
                angle=Angle.read(f"{degrees} °"),
                temperature=self.shop.temperature(
                    self.shop.hall
                    + above
                    + _side(warm, degrees)
                    + chance.normal(self.truth.instruments.temperature)
                ),
            )
            for position in positions
            for degrees in (0, 90, 180, 270)
        )


def _side(warm: Warm | None, degrees: float) -> float:
    if warm is None:
        return 0.0
    return warm.side_to_side / 2 * math.cos(math.radians(degrees - warm.clock_degrees))
