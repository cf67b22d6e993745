"""Facts and cases of the rules on a hub drawn up its taper."""

from typing import Any

from models.rules.draw_up import DrawUpFacts
from models.rules.rule import Verdict

__all__ = ["CASES", "GOOD"]

IN, OUT, DOUBT, UNKNOWN = Verdict.WITHIN, Verdict.OUTSIDE, Verdict.CANNOT_TELL, Verdict.NOT_JUDGED
MM, MPA, UM = 1e-3, 1e6, 1e-6

GOOD: dict[type, Any] = {
    DrawUpFacts: DrawUpFacts(
        least_advance=4.10 * MM,
        greatest_advance=4.20 * MM,
        advance_uncertainty=0.02 * MM,
        least_advance_allowed=4.0 * MM,
        greatest_advance_allowed=4.4 * MM,
        contact=0.88,
        contact_wanted=0.85,
        dilation_pressure=130 * MPA,
        dilation_allowed=160 * MPA,
        pressure_at_yield=190 * MPA,
        seating_loss=12 * UM,
        hold=1800.0,
        hold_wanted=1800.0,
        proved=True,
    )
}

# Rule, what the row is for, what differs from good facts, verdict.
CASES: list[tuple[str, str, dict[str, Any], Verdict]] = [
    ("advance-within", "within", {}, IN),
    ("advance-within", "not far enough", {"least_advance": 3.9 * MM}, OUT),
    ("advance-within", "too far", {"greatest_advance": 4.5 * MM}, OUT),
    ("advance-within", "cannot tell", {"least_advance": 4.01 * MM}, DOUBT),
    ("advance-within", "simple acceptance", {"least_advance": 4.01 * MM, "proved": False}, IN),
    ("advance-within", "on the limit",
     {"least_advance": 4.0 * MM, "greatest_advance": 4.4 * MM, "advance_uncertainty": 0.0}, IN),
    ("advance-within", "unknown", {"least_advance": None}, UNKNOWN),
    ("taper-contact", "within", {}, IN),
    ("taper-contact", "outside", {"contact": 0.7}, OUT),
    ("taper-contact", "on the limit", {"contact": 0.85}, IN),
    ("taper-contact", "unknown", {"contact": None}, UNKNOWN),
    ("dilation-allowed", "within", {}, IN),
    ("dilation-allowed", "above the plan", {"dilation_pressure": 161 * MPA}, OUT),
    ("dilation-allowed", "above yield",
     {"dilation_pressure": 191 * MPA, "dilation_allowed": None}, OUT),
    ("dilation-allowed", "yield below the plan",
     {"dilation_pressure": 155 * MPA, "pressure_at_yield": 150 * MPA}, OUT),
    ("dilation-allowed", "no strength known", {"pressure_at_yield": None}, IN),
    ("dilation-allowed", "on the limit", {"dilation_pressure": 160 * MPA}, IN),
    ("dilation-allowed", "neither limit nor strength",
     {"dilation_allowed": None, "pressure_at_yield": None}, UNKNOWN),
    ("dilation-allowed", "unknown", {"dilation_pressure": None}, UNKNOWN),
    ("seating-loss-usual", "within", {}, IN),
    ("seating-loss-usual", "impossible", {"seating_loss": -5 * UM}, OUT),
    ("seating-loss-usual", "unusual", {"seating_loss": 60 * UM}, DOUBT),
    ("seating-loss-usual", "on the limit", {"seating_loss": 0.0}, IN),
    ("seating-loss-usual", "on the usual limit", {"seating_loss": 50.8 * UM}, IN),
    ("seating-loss-usual", "unknown", {"seating_loss": None}, UNKNOWN),
    ("piston-held", "within", {"hold": 3600.0}, IN),
    ("piston-held", "cannot tell", {"hold": 600.0}, DOUBT),
    ("piston-held", "on the limit", {}, IN),
    ("piston-held", "unknown", {"hold": None}, UNKNOWN),
]  # fmt: skip
