"""What a draw-up gives, as plain numbers; each name carries its SI unit in brackets."""

import math
from typing import Any

from models.assess import DrawnUp

__all__ = ["drawn_up_out"]


def drawn_up_out(found: DrawnUp) -> dict[str, Any]:
    """Give what a taper asks for and what its draw-up was; lengths in m."""
    return {
        "taper [-]": found.taper.taper.si,
        "advance_by_limits_least [m]": _number(found.wanted[0]),
        "advance_by_limits_greatest [m]": _number(found.wanted[1]),
        "advance_least [m]": _number(found.least_advance),
        "advance_greatest [m]": _number(found.greatest_advance),
        "advance_spread [m]": _number(found.spread),
        "advance_expanded_uncertainty [m]": _number(found.advance_uncertainty),
        "dilation_pressure_expected [Pa]": _number(found.expected_pressure),
        "pressure_at_yield_of_bore [Pa]": _number(found.pressure_at_yield),
        "push_off_force_on_oil [N]": _number(found.push_off),
        "seating_loss [m]": _number(found.seating_loss),
    }


def _number(value: float | None) -> float | None:
    return float(f"{value:.6g}") if value is not None and math.isfinite(value) else None
