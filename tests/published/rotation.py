"""Published fits at speed, as printed in their sources."""

from typing import NamedTuple

__all__ = ["GROWTHS", "TIP_SPEEDS", "GrowthRow", "TipSpeedRow"]

RPM = 3.141592653589793 / 30.0


class GrowthRow(NamedTuple):
    """One printed quantity of a disc that turns."""

    case: str
    source: str
    quantity: str
    """Name of the function that finds it."""
    inputs: dict[str, float]
    printed: str
    si_per_unit: float


class TipSpeedRow(NamedTuple):
    """Relative interference and the speed of the rim at which it is gone."""

    case: str
    source: str
    ratio: float
    printed: str
    """In m/s."""


_POSTED = {
    "bore_diameter": 0.1,
    "outer_diameter": 0.5,
    "poisson": 0.3,
    "density": 7800.0,
    "speed": 6900.0 * RPM,
}
_DISC = {
    "bore_diameter": 0.150,
    "outer_diameter": 0.500,
    "modulus": 205e9,
    "poisson": 0.3,
    "density": 7850.0,
    "speed": 8000.0 * RPM,
}

GROWTHS = [
    # Density from memory. The same post prints a loss of 5.26e-5 m on radius, where its own formula
    # gives 5.25e-5; the stress, below, agrees.
    GrowthRow(
        "hoop stress at the bore of a disc",
        "posted problem with answers, steel disc 0.5/0.1 m, no pressure at 6900 rpm: 212 MPa",
        "annulus_bore_stress",
        _POSTED,
        "212",
        1e6,
    ),
    GrowthRow(
        "bore of a disc 500/150 at 8000 rpm",
        "by hand: ρ·ω²·d·(3.3·D² + 0.7·d²)/(16·E)",
        "annulus_bore_growth",
        _DISC,
        "211.8",
        1e-6,
    ),
    GrowthRow(
        "its shaft",
        "by hand: ρ·ω²·0.7·d³/(16·E)",
        "shaft_surface_growth",
        {**_DISC, "bore_diameter": 0.0, "outer_diameter": 0.150},
        "4.0",
        1e-6,
    ),
]

_TIP = "by hand: √(4·E·e/((3 + ν)·ρ)), E = 205 GPa, ν = 0.3, ρ = 7850 kg/m³"

TIP_SPEEDS = [
    TipSpeedRow("half in a thousand", _TIP, 0.0005, "126"),
    TipSpeedRow("one in a thousand", _TIP, 0.001, "178"),
    TipSpeedRow("one and a half in a thousand", _TIP, 0.0015, "218"),
    TipSpeedRow("two in a thousand", _TIP, 0.002, "252"),
    # Bloch and Singh, Steam Turbines, 2nd ed., pp. 82-83: shrunk-on wheels are used up to 700 to
    # 800 ft/s at the pitch circle, 213 to 244 m/s, which is what such fits allow.
]
