"""Facts and cases of the rule on a second survey."""

import math
from typing import Any

from models.rules.cold import ColdFacts
from models.rules.rule import Verdict

__all__ = ["CASES", "GOOD"]

IN, DOUBT, UNKNOWN = Verdict.WITHIN, Verdict.CANNOT_TELL, Verdict.NOT_JUDGED
UM, HOUR = 1e-6, 3600.0

GOOD: dict[type, Any] = {
    ColdFacts: ColdFacts(
        difference=1 * UM, interval=5 * HOUR, time_constant=5 * HOUR, agreement=2 * UM
    )
}

# Rule, what the row is for, what differs from good facts, verdict.
CASES: list[tuple[str, str, dict[str, Any], Verdict]] = [
    ("second-survey-proves", "within", {}, IN),
    # At 5 h half an hour can hide 19 µm behind 2: checked by hand, 2/(e^0.1 − 1).
    ("second-survey-proves", "half an hour later", {"interval": 0.5 * HOUR}, DOUBT),
    ("second-survey-proves", "at the same moment", {"interval": 0.0}, DOUBT),
    ("second-survey-proves", "clock set back", {"interval": -HOUR}, DOUBT),
    ("second-survey-proves", "still moving", {"difference": 10 * UM}, DOUBT),
    ("second-survey-proves", "moved much, but long ago",
     {"difference": 60 * UM, "interval": 20 * HOUR}, IN),
    # The agreement itself after τ·ln 2.
    ("second-survey-proves", "on the limit",
     {"difference": 2 * UM, "interval": 5 * HOUR * math.log(2.0)}, IN),
    ("second-survey-proves", "unknown", {"difference": None}, UNKNOWN),
    ("second-survey-proves", "no time constant", {"time_constant": None}, UNKNOWN),
]  # fmt: skip
