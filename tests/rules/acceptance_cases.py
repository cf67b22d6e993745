"""Facts and cases of the rules on the finished rotor."""

from typing import Any

from models.rules.acceptance import HighSpeedFacts, MagnetismFacts, TrackFacts
from models.rules.rule import Verdict

__all__ = ["CASES", "GOOD"]

IN, OUT, DOUBT, UNKNOWN = Verdict.WITHIN, Verdict.OUTSIDE, Verdict.CANNOT_TELL, Verdict.NOT_JUDGED
UM, GAUSS = 1e-6, 1e-4

GOOD: dict[type, Any] = {
    HighSpeedFacts: HighSpeedFacts(
        place="P1", vibration=12 * UM, vibration_limit=25 * UM, run_speed=1000.0,
        highest_speed=1000.0,
    ),
    TrackFacts: TrackFacts(track="P1", track_runout=5 * UM, track_limit=6.3 * UM),
    MagnetismFacts: MagnetismFacts(place="J1", flux_density=-1.0 * GAUSS, flux_limit=2.0 * GAUSS),
}  # fmt: skip

# Rule, what the row is for, what differs from good facts, verdict.
CASES: list[tuple[str, str, dict[str, Any], Verdict]] = [
    ("vibration-within", "within", {}, IN),
    ("vibration-within", "outside", {"vibration": 26 * UM}, OUT),
    ("vibration-within", "on the limit", {"vibration": 25 * UM}, IN),
    ("vibration-within", "below full speed", {"run_speed": 900.0}, DOUBT),
    ("vibration-within", "outside below full speed",
     {"vibration": 26 * UM, "run_speed": 900.0}, OUT),
    ("vibration-within", "unknown", {"vibration": None}, UNKNOWN),
    ("probe-track-within", "within", {}, IN),
    ("probe-track-within", "outside", {"track_runout": 7 * UM}, OUT),
    ("probe-track-within", "on the limit", {"track_runout": 6.3 * UM}, IN),
    ("probe-track-within", "unknown", {"track_limit": None}, UNKNOWN),
    ("magnetism-within", "within", {}, IN),
    ("magnetism-within", "outside", {"flux_density": -2.1 * GAUSS}, OUT),
    ("magnetism-within", "on the limit", {"flux_density": -2.0 * GAUSS}, IN),
    ("magnetism-within", "unknown", {"flux_density": None}, UNKNOWN),
]  # fmt: skip
