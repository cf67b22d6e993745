"""Facts and cases of the rules on strength, for the tables that every rule is held to."""

from typing import Any

from models.rules.rule import Verdict
from models.rules.strength_facts import HoldingFacts, LandFacts

__all__ = ["CASES", "GOOD"]

IN, OUT, DOUBT, UNKNOWN = Verdict.WITHIN, Verdict.OUTSIDE, Verdict.CANNOT_TELL, Verdict.NOT_JUDGED
UM, MPA = 1e-6, 1e6

GOOD: dict[type, Any] = {
    LandFacts: LandFacts(
        hub_stress=366 * MPA,
        hub_stress_uncertainty=12 * MPA,
        hub_yield_strength=500 * MPA,
        shaft_stress=132 * MPA,
        shaft_stress_uncertainty=5 * MPA,
        shaft_yield_strength=600 * MPA,
        interference_at_trip=40 * UM,
        interference_uncertainty=6 * UM,
        release_speed=1100.0,
        proved=True,
    ),
    HoldingFacts: HoldingFacts(
        holding_torque=5000.0,
        holding_torque_at_speed=3000.0,
        holding_uncertainty=200.0,
        torque_to_carry=1000.0,
        friction=0.12,
        friction_source="DIN 7190, from memory",
        proved=True,
    ),
}

# Rule, what the row is for, what differs from good facts, verdict.
CASES: list[tuple[str, str, dict[str, Any], Verdict]] = [
    ("hub-not-yielding", "within", {}, IN),
    ("hub-not-yielding", "outside", {"hub_stress": 520 * MPA}, OUT),
    ("hub-not-yielding", "cannot tell", {"hub_stress": 495 * MPA}, DOUBT),
    ("hub-not-yielding", "cannot tell from above", {"hub_stress": 510 * MPA}, DOUBT),
    ("hub-not-yielding", "simple acceptance", {"hub_stress": 495 * MPA, "proved": False}, IN),
    ("hub-not-yielding", "on the limit",
     {"hub_stress": 500 * MPA, "hub_stress_uncertainty": 0.0}, IN),
    ("hub-not-yielding", "on the guarded limit", {"hub_stress": 488 * MPA}, IN),
    ("hub-not-yielding", "unknown", {"hub_stress": None}, UNKNOWN),
    ("hub-not-yielding", "no uncertainty", {"hub_stress_uncertainty": None}, UNKNOWN),
    ("hub-not-yielding", "no strength", {"hub_yield_strength": None}, UNKNOWN),
    ("seat-not-yielding", "within", {}, IN),
    ("seat-not-yielding", "outside", {"shaft_stress": 620 * MPA}, OUT),
    ("seat-not-yielding", "cannot tell", {"shaft_stress": 598 * MPA}, DOUBT),
    ("seat-not-yielding", "on the limit",
     {"shaft_stress": 600 * MPA, "shaft_stress_uncertainty": 0.0}, IN),
    ("seat-not-yielding", "unknown", {"shaft_stress": None}, UNKNOWN),
    ("seat-not-yielding", "no strength", {"shaft_yield_strength": None}, UNKNOWN),
    ("fit-stays-closed-at-trip", "within", {}, IN),
    ("fit-stays-closed-at-trip", "outside", {"interference_at_trip": -20 * UM}, OUT),
    ("fit-stays-closed-at-trip", "cannot tell", {"interference_at_trip": 3 * UM}, DOUBT),
    ("fit-stays-closed-at-trip", "cannot tell, reckoned open",
     {"interference_at_trip": -3 * UM}, DOUBT),
    ("fit-stays-closed-at-trip", "surfaces that just touch",
     {"interference_at_trip": 0.0, "interference_uncertainty": 0.0}, OUT),
    ("fit-stays-closed-at-trip", "on the limit",
     {"interference_at_trip": 0.01 * UM, "interference_uncertainty": 0.0}, IN),
    ("fit-stays-closed-at-trip", "simple acceptance",
     {"interference_at_trip": 3 * UM, "proved": False}, IN),
    ("fit-stays-closed-at-trip", "release not said", {"release_speed": None}, IN),
    ("fit-stays-closed-at-trip", "unknown", {"interference_at_trip": None}, UNKNOWN),
    ("fit-holds-torque", "within", {}, IN),
    ("fit-holds-torque", "outside", {"holding_torque": 700.0}, OUT),
    ("fit-holds-torque", "cannot tell", {"holding_torque": 1100.0}, DOUBT),
    ("fit-holds-torque", "a part that drives", {"torque_to_carry": -1000.0}, IN),
    ("fit-holds-torque", "a part that drives too hard", {"torque_to_carry": -6000.0}, OUT),
    ("fit-holds-torque", "on the limit",
     {"holding_torque": 1000.0, "holding_uncertainty": 0.0}, IN),
    ("fit-holds-torque", "nothing to hold", {"torque_to_carry": 0.0}, IN),
    ("fit-holds-torque", "simple acceptance", {"holding_torque": 1100.0, "proved": False}, IN),
    ("fit-holds-torque", "unknown", {"holding_torque": None}, UNKNOWN),
    ("fit-holds-torque", "no power", {"torque_to_carry": None}, UNKNOWN),
    ("fit-holds-torque-at-speed", "within", {}, IN),
    ("fit-holds-torque-at-speed", "outside", {"holding_torque_at_speed": 0.0}, OUT),
    ("fit-holds-torque-at-speed", "cannot tell", {"holding_torque_at_speed": 900.0}, DOUBT),
    ("fit-holds-torque-at-speed", "on the limit",
     {"holding_torque_at_speed": 1000.0, "holding_uncertainty": 0.0}, IN),
    ("fit-holds-torque-at-speed", "on the guarded limit", {"holding_torque_at_speed": 1200.0}, IN),
    ("fit-holds-torque-at-speed", "unknown", {"holding_torque_at_speed": None}, UNKNOWN),
]  # fmt: skip
