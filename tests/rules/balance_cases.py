"""Facts and cases of the rules on balance."""

from typing import Any

from models.rules.balance import BalanceFacts, CorrectionFacts, DueFacts, TrialFacts
from models.rules.rule import Verdict

__all__ = ["CASES", "GOOD"]

IN, OUT, DOUBT, UNKNOWN = Verdict.WITHIN, Verdict.OUTSIDE, Verdict.CANNOT_TELL, Verdict.NOT_JUDGED
GMM = 1e-6

GOOD: dict[type, Any] = {
    BalanceFacts: BalanceFacts(
        plane="drive end", residual=20 * GMM, permissible=50 * GMM, loads_weighed=True
    ),
    TrialFacts: TrialFacts(
        plane="drive end", smaller=20 * GMM, larger=500 * GMM, permissible=50 * GMM,
        which="smaller",
    ),
    CorrectionFacts: CorrectionFacts(part="wheel-2", new_parts=("wheel-2",)),
    DueFacts: DueFacts(where="after wheel 2", runs=1),
}  # fmt: skip

# Rule, what the row is for, what differs from good facts, verdict.
CASES: list[tuple[str, str, dict[str, Any], Verdict]] = [
    ("residual-within", "within", {}, IN),
    ("residual-within", "outside", {"residual": 51 * GMM}, OUT),
    ("residual-within", "on the limit", {"residual": 50 * GMM}, IN),
    ("residual-within", "by calculated loads", {"loads_weighed": False}, DOUBT),
    ("residual-within", "outside by calculated loads",
     {"residual": 80 * GMM, "loads_weighed": False}, OUT),
    ("residual-within", "unknown", {"residual": None}, UNKNOWN),
    ("residual-within", "no limit", {"permissible": None}, UNKNOWN),
    ("trial-round-agrees", "within", {}, IN),
    ("trial-round-agrees", "the larger is true", {"which": "larger"}, OUT),
    ("trial-round-agrees", "on the limit", {"smaller": 50 * GMM}, IN),
    # The classical sum would pass it: nothing tells the two answers apart.
    ("trial-round-agrees", "cannot tell", {"which": None}, DOUBT),
    ("trial-round-agrees", "both pass", {"which": None, "larger": 45 * GMM}, IN),
    ("trial-round-agrees", "neither passes", {"which": None, "smaller": 60 * GMM}, OUT),
    ("trial-round-agrees", "unknown", {"smaller": None}, UNKNOWN),
    ("correction-on-new-part", "within", {}, IN),
    ("correction-on-new-part", "outside", {"part": "wheel-1"}, OUT),
    ("correction-on-new-part", "allowed", {"part": "wheel-1", "allowed_by": "BQ"}, IN),
    ("correction-on-new-part", "unknown", {"part": None}, UNKNOWN),
    ("balance-done", "within", {}, IN),
    ("balance-done", "none yet", {"runs": 0}, UNKNOWN),
    ("balance-done", "unknown", {"runs": None}, UNKNOWN),
]  # fmt: skip
