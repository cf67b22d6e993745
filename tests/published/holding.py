"""Published holding forces and torques, as printed in their sources."""

from typing import NamedTuple

__all__ = ["FORCES", "TORQUES", "TORQUES_FROM_POWER", "HoldingRow", "PowerRow"]

INCH = 0.0254
PSI = 6894.757293168
POUND = 4.4482216152605


class HoldingRow(NamedTuple):
    """A joint under pressure and what its source says it holds."""

    case: str
    source: str
    inputs: dict[str, float]
    printed: str
    si_per_unit: float


class PowerRow(NamedTuple):
    """A power at a speed and its torque."""

    case: str
    source: str
    power: float
    """In W."""
    speed: float
    """In rad/s."""
    printed: str
    si_per_unit: float


# The slides give a = 25, b = 50, c = 125, L = 100 mm, friction 0.15 and 30 MPa of hoop stress, made
# by 21.724 MPa; force and torque by hand from these, for the slides' answers were not seen.
_DISC = {
    "pressure": 21.724e6,
    "interface_diameter": 0.100,
    "contact_length": 0.100,
    "friction": 0.15,
}
_SLIDES = "by hand, from published slides: press fit of a shaft in a cast-iron disc"

FORCES = [HoldingRow("cast-iron disc", _SLIDES, _DISC, "102.37", 1e3)]

TORQUES = [
    HoldingRow("cast-iron disc", _SLIDES, _DISC, "5.119", 1e3),
    # L·d² = 56 in³ and 12 000 psi, both read from graphs there; friction of 0.12 follows from them.
    HoldingRow(
        "coupling hub for the shaft's torque",
        "H. P. Bloch, Improving Machinery Reliability, pp. 217-219: 125 664 lb·in, to two digits",
        {
            "pressure": 12000 * PSI,
            "interface_diameter": 4 * INCH,
            "contact_length": 3.5 * INCH,
            "friction": 0.12,
        },
        "1.3e5",
        POUND * INCH,
    ),
    HoldingRow(
        "aluminium disc, overlap taken on radius",
        "by hand: 0.3·π·0.5²·0.04·9.833/2, posted problem",
        {
            "pressure": 9.833e6,
            "interface_diameter": 0.5,
            "contact_length": 0.04,
            "friction": 0.3,
        },
        "46.34",
        1e3,
    ),
]

TORQUES_FROM_POWER = [
    PowerRow("one kilowatt at 9549 rpm", "by hand: 9549/n, handbooks", 1e3, 1000.0, "1.000", 1.0),
    PowerRow(
        "one horsepower at 63025 rpm",
        "common handbook constant 63 025 lb·in·rpm/hp, from memory",
        550.0 * POUND * 0.3048,
        63025.0 * 3.141592653589793 / 30.0,
        "1.0000",
        POUND * INCH,
    ),
    PowerRow(
        "5 MW at 9000 rpm",
        "by hand: 5e6/(300·π)",
        5e6,
        9000.0 * 3.141592653589793 / 30.0,
        "5.305",
        1e3,
    ),
]
