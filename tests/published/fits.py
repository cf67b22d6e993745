"""Published interference fits at rest, as printed in their sources."""

from typing import NamedTuple

__all__ = [
    "EQUIVALENT_STRESSES",
    "HOOP_STRESSES",
    "PRESSURES",
    "YIELD_RATIOS",
    "FitRow",
    "StressRow",
    "YieldRow",
    "joint",
]

INCH = 0.0254
PSI = 6894.757293168
MPA = 1e6


class FitRow(NamedTuple):
    """A joint and the pressure that its source prints."""

    case: str
    source: str
    joint: dict[str, float]
    printed: str
    si_per_unit: float


class StressRow(NamedTuple):
    """A hub or a shaft under pressure and the stress that its source prints."""

    case: str
    source: str
    pressure: float
    inner: float
    outer: float
    printed: str
    si_per_unit: float


class YieldRow(NamedTuple):
    """Relative interference at which the bore of a hub on a solid shaft yields."""

    case: str
    source: str
    diameter_ratio: float
    von_mises: str
    tresca: str


def joint(
    interference: float,
    interface: float,
    outer: float,
    *,
    bore: float = 0.0,
    unit: float = 1e-3,
    hub: tuple[float, float] = (207e9, 0.292),
    shaft: tuple[float, float] | None = None,
) -> dict[str, float]:
    """Make the inputs of a joint; lengths in the given unit, hub and shaft as (E, ν)."""
    shaft = shaft or hub
    return {
        "interference": interference * unit,
        "interface_diameter": interface * unit,
        "hub_outer_diameter": outer * unit,
        "shaft_bore_diameter": bore * unit,
        "hub_modulus": hub[0],
        "shaft_modulus": shaft[0],
        "hub_poisson": hub[1],
        "shaft_poisson": shaft[1],
    }


_BROWN = "T. H. Brown, Marks' Calculations for Machine Design, 2005, p. 136, example 6"
_SHIGLEY = "Shigley's Mechanical Engineering Design, solutions to chapter 3, problem "
_SI = "; collar of twice the diameter, E from memory"
_STEEL_US = (30e6 * PSI, 0.292)
_BLOCH = "H. P. Bloch, Improving Machinery Reliability, pp. 217-219"

PRESSURES = [
    # The page prints 2 100 psi, because it rounds 1 - 0.444 to 0.56; two digits are meant.
    FitRow(
        "Brown in US units",
        _BROWN,
        joint(0.001, 4.0, 6.0, unit=INCH, hub=(30e6 * PSI, 0.3)),
        "2.1e3",
        PSI,
    ),
    # The page prints 12.627 on its way and 12.6 at its end; the way is rounded, 12.614 is exact.
    FitRow("Brown in SI", _BROWN, joint(0.02, 100.0, 160.0), "12.6", MPA),
    FitRow("40H7/s6 tightest", _SHIGLEY + "3-64" + _SI, joint(0.059, 40.0, 80.0), "114.5", MPA),
    FitRow("40H7/s6 loosest", _SHIGLEY + "3-64" + _SI, joint(0.018, 40.0, 80.0), "34.9", MPA),
    FitRow(
        "1.5 in H7/s6 tightest",
        _SHIGLEY + "3-65" + _SI,
        joint(0.0023, 1.5, 3.0, unit=INCH, hub=_STEEL_US),
        "17250",
        PSI,
    ),
    FitRow(
        "1.5 in H7/s6 loosest",
        _SHIGLEY + "3-65" + _SI,
        joint(0.0007, 1.5, 3.0, unit=INCH, hub=_STEEL_US),
        "5250",
        PSI,
    ),
    FitRow(
        "1.5 in H7/u6 tightest",
        _SHIGLEY + "3-67" + _SI,
        joint(0.0030, 1.5, 3.0, unit=INCH, hub=_STEEL_US),
        "22500",
        PSI,
    ),
    FitRow(
        "1.5 in H7/u6 loosest",
        _SHIGLEY + "3-67" + _SI,
        joint(0.0014, 1.5, 3.0, unit=INCH, hub=_STEEL_US),
        "10500",
        PSI,
    ),
    FitRow(
        "1 in shaft in a 2 in collar",
        _SHIGLEY + "3-68",
        joint(0.002, 1.0, 2.0, unit=INCH, hub=_STEEL_US),
        "22500",
        PSI,
    ),
    # Read from a graph there, to two digits.
    FitRow(
        "coupling hub",
        _BLOCH + ", E from memory",
        joint(0.006, 4.0, 4.0 / 0.68, unit=INCH, hub=_STEEL_US),
        "1.2e4",
        PSI,
    ),
    FitRow(
        "aluminium gear, 0.10 mm taken on diameter",
        "by hand: E·Δ/(2d)·(1 - d²/D²)",
        joint(0.10, 30.0, 55.0, hub=(69e9, 0.33)),
        "80.785",
        MPA,
    ),
    FitRow(
        "aluminium gear, 0.10 mm taken on radius",
        "by hand: twice the pressure",
        joint(0.20, 30.0, 55.0, hub=(69e9, 0.33)),
        "161.570",
        MPA,
    ),
    FitRow(
        "coupling hub 100/160, 1.5 in a thousand",
        "by hand: E·e/2·(1 - d²/D²)",
        joint(0.150, 100.0, 160.0),
        "94.61",
        MPA,
    ),
    FitRow(
        "coupling hub 100/160, 2 in a thousand",
        "by hand: E·e/2·(1 - d²/D²)",
        joint(0.200, 100.0, 160.0),
        "126.14",
        MPA,
    ),
    FitRow(
        "coupling hub 150/250, 2 in a thousand",
        "by hand: E·e/2·(1 - d²/D²)",
        joint(0.300, 150.0, 250.0),
        "132.48",
        MPA,
    ),
    FitRow("hub without end", "by hand: limit E·e/2", joint(0.1, 100.0, 1e7), "103.5", MPA),
    FitRow(
        "hub without end on a rigid shaft",
        "by hand: limit E·e/(1 + ν)",
        joint(0.1, 100.0, 1e7, hub=(207e9, 0.3), shaft=(207e18, 0.3)),
        "159.23",
        MPA,
    ),
    *[
        FitRow(
            f"150 mm shaft with a bore of {bore:.0f} mm",
            "computed independently from Lamé's form for one material, no publication",
            joint(0.225, 150.0, 250.0, bore=bore),
            text,
            MPA,
        )
        for bore, text in (
            (0.0, "99.36"),
            (30.0, "96.78"),
            (50.0, "92.00"),
            (75.0, "81.89"),
            (100.0, "65.71"),
        )
    ],
    FitRow(
        "cast-iron disc on a hollow shaft",
        "inputs of published slides that print no answer; computed independently",
        joint(0.064754, 100.0, 250.0, bore=50.0, hub=(70e9, 0.25), shaft=(210e9, 0.3)),
        "21.724",
        MPA,
    ),
    FitRow(
        "aluminium disc, overlap of 0.1 mm taken on radius",
        "inputs of a posted examination problem that prints no answer; computed independently",
        joint(0.2, 500.0, 800.0, hub=(70e9, 0.34), shaft=(208e9, 0.33)),
        "9.833",
        MPA,
    ),
    FitRow(
        "aluminium disc, overlap of 0.1 mm taken on diameter",
        "inputs of a posted examination problem that prints no answer; computed independently",
        joint(0.1, 500.0, 800.0, hub=(70e9, 0.34), shaft=(208e9, 0.33)),
        "4.917",
        MPA,
    ),
    FitRow(
        "ring of 1 mm on a rigid shaft",
        "computed independently; a thin hoop E·e·t/R is 4.059 at its rim",
        joint(0.1, 100.0, 102.0, hub=(207e9, 0.3), shaft=(207e18, 0.3)),
        "4.074",
        MPA,
    ),
    FitRow("parts that just touch", "definition", joint(0.0, 100.0, 160.0), "0.000", MPA),
    FitRow("parts with clearance", "definition", joint(-0.05, 100.0, 160.0), "0.000", MPA),
]

_MAKER = "by hand: p·(D² + d²)/(D² - d²)"

HOOP_STRESSES = [
    StressRow(
        "1 in shaft in a 2 in collar", _SHIGLEY + "3-68", 22500 * PSI, 1.0, 2.0, "37500", PSI
    ),
    # The slides limit the disc's hoop stress to 30 MPa; 21.724 MPa is what allows it, by hand.
    StressRow(
        "cast-iron disc 100/250",
        "press fit in a cast-iron disc, published slides: hoop stress of 30 MPa",
        21.724 * MPA,
        100.0,
        250.0,
        "30.00",
        MPA,
    ),
    StressRow(
        "disc 100/500 at rest",
        "posted problem with answers, rotating disc of 0.5 m: 109.2 MPa; its pressure by hand",
        100.79 * MPA,
        100.0,
        500.0,
        "109.2",
        MPA,
    ),
    StressRow("coupling hub 100/160", _MAKER, 94.61 * MPA, 100.0, 160.0, "215.9", MPA),
    StressRow("coupling hub 150/250", _MAKER, 132.48 * MPA, 150.0, 250.0, "281.5", MPA),
]

EQUIVALENT_STRESSES = [
    StressRow(
        "1 in shaft in a 2 in collar",
        "by hand: p·√(3 + q⁴)/(1 - q²)",
        22500 * PSI,
        1.0,
        2.0,
        "52500",
        PSI,
    ),
    StressRow(
        "coupling hub 100/160",
        "by hand: p·√(3 + q⁴)/(1 - q²)",
        94.61 * MPA,
        100.0,
        160.0,
        "275.7",
        MPA,
    ),
    StressRow(
        "coupling hub 150/250",
        "by hand: p·√(3 + q⁴)/(1 - q²)",
        132.48 * MPA,
        150.0,
        250.0,
        "366.2",
        MPA,
    ),
]

_YIELD = "by hand: 2·Re/(E·√(3 + q⁴)) and Re/E, Re = 690 MPa, E = 207 GPa"

YIELD_RATIOS = [
    YieldRow("thick hub", _YIELD, 0.4, "0.00383", "0.00333"),
    YieldRow("usual hub", _YIELD, 0.6, "0.00377", "0.00333"),
    YieldRow("coupling hub", _YIELD, 0.68, "0.00372", "0.00333"),
    YieldRow("thin hub", _YIELD, 0.8, "0.00361", "0.00333"),
]
