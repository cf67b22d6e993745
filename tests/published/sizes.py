"""Published lengths and temperatures, as printed in their sources."""

from typing import NamedTuple

__all__ = ["READINGS_AWAY_FROM_20", "ReadingRow"]


class ReadingRow(NamedTuple):
    """A diameter as read away from 20 °C and the size it has at 20 °C."""

    case: str
    source: str
    inputs: dict[str, float]
    printed_mm: str
    """Diameter at 20 °C, in mm."""


READINGS_AWAY_FROM_20 = [
    ReadingRow(
        "aluminium part and steel gauge at 30",
        # The page prints the change as 2.782e-6 m, cut off rather than rounded (2.7829 by its own
        # formula), and goes on with 0.003 mm: a part of 20.021 mm reads 20.024 mm.
        "Machinery's Handbook, 31st ed., p. 375",
        {
            "diameter": 0.020024,
            "part_temperature": 30.0,
            "part_expansion": 24.7e-6,
            "gauge_temperature": 30.0,
            "gauge_expansion": 10.8e-6,
        },
        "20.021",
    ),
    ReadingRow(
        "hub at 25 against a gauge at 20",
        "by hand: 150 mm, 11.5e-6 1/K, 5 K are 8.625 µm",
        {
            "diameter": 0.150,
            "part_temperature": 25.0,
            "part_expansion": 11.5e-6,
            "gauge_temperature": 20.0,
            "gauge_expansion": 11.5e-6,
        },
        "149.9914",
    ),
    ReadingRow(
        "cold shaft",
        "by hand: 100 mm, 11.5e-6 1/K, -10 K are -11.5 µm",
        {
            "diameter": 0.100,
            "part_temperature": 10.0,
            "part_expansion": 11.5e-6,
            "gauge_temperature": 20.0,
            "gauge_expansion": 11.5e-6,
        },
        "100.0115",
    ),
    ReadingRow(
        "part and gauge of one steel at one temperature",
        "definition",
        {
            "diameter": 0.150,
            "part_temperature": 31.0,
            "part_expansion": 11.5e-6,
            "gauge_temperature": 31.0,
            "gauge_expansion": 11.5e-6,
        },
        "150.000000",
    ),
]
