"""Rules on mistakes, on made facts."""

from typing import Any

from models.rules.blunders import SURVEY_BLUNDERS, BlunderFacts, WarmSizeFacts
from models.rules.rule import Verdict

__all__ = ["CASES", "GOOD"]

IN, DOUBT, UNKNOWN = Verdict.WITHIN, Verdict.CANNOT_TELL, Verdict.NOT_JUDGED

GOOD: dict[type, Any] = {
    BlunderFacts: BlunderFacts(suspected=(), answered=()),
    WarmSizeFacts: WarmSizeFacts(feature="bore", part_temperature=21.0, gauge_temperature=20.5),
}

CASES: list[tuple[str, str, dict[str, Any], Verdict]] = [
    *(
        (one.id, name, change, verdict)
        for one in SURVEY_BLUNDERS
        for name, change, verdict in (
            ("within", {}, IN),
            ("cannot tell", {"suspected": ("Was a mark skipped?",)}, DOUBT),
            ("answered", {"answered": ("a scratch, seen",)}, IN),
            ("unknown", {"suspected": None}, UNKNOWN),
        )
    ),
    ("size-not-taken-hot", "within", {}, IN),
    ("size-not-taken-hot", "cannot tell", {"part_temperature": 27.0}, DOUBT),
    ("size-not-taken-hot", "on the limit", {"part_temperature": 23.5}, IN),
    ("size-not-taken-hot", "unknown", {"gauge_temperature": None}, UNKNOWN),
]
