"""Made facts about the record: within, outside, in doubt, unknown, on the limit."""

from typing import Any

from models.rules.record_facts import (
    CompleteFacts,
    ComponentFacts,
    DecisionFacts,
    FoundOutFacts,
    LateFacts,
    OutsideFacts,
    ResolutionFacts,
    SeenFacts,
)
from models.rules.rule import Verdict

__all__ = ["CASES", "GOOD"]

IN, OUT, DOUBT, UNKNOWN = Verdict.WITHIN, Verdict.OUTSIDE, Verdict.CANNOT_TELL, Verdict.NOT_JUDGED
UM = 1e-6

GOOD: dict[type, Any] = {
    FoundOutFacts: FoundOutFacts(
        tag="OM-1", reading="Sizes", used_on="2026-11-02", last_good_on="2026-11-20"
    ),
    ResolutionFacts: ResolutionFacts(resolution=1 * UM, least_limit=25 * UM),
    LateFacts: LateFacts(entry="Mounted", hours_between=0.5, hours_allowed=12.0, reason=""),
    OutsideFacts: OutsideFacts(
        what="Plating of the seat",
        works="the platers",
        back_on="2026-11-02",
        certificate="P-7",
        result="accepted",
    ),
    SeenFacts: SeenFacts(subject="W-4", words="slight discolouring", weight="remark"),
    ComponentFacts: ComponentFacts(serial="W-5", substitute_for="W-4", approved_by="E. Engineer"),
    DecisionFacts: DecisionFacts(
        disposition="rework", role="inspector", needs_customer=False, agreed_by=""
    ),
    CompleteFacts: CompleteFacts(
        findings_open=(), signatures_missing=(), outside_open=(), waived=()
    ),
}

# Rule, what the row is for, what differs from the good facts, the verdict by hand.
CASES: tuple[tuple[str, str, dict[str, Any], Verdict], ...] = (
    ("instrument-still-good", "within", {}, IN),
    ("instrument-still-good", "in doubt", {"used_on": "2026-11-21"}, DOUBT),
    ("instrument-still-good", "on the limit", {"used_on": "2026-11-20"}, IN),
    ("instrument-still-good", "unknown", {"last_good_on": None}, UNKNOWN),
    ("indicator-resolves-limit", "within", {}, IN),
    ("indicator-resolves-limit", "in doubt", {"resolution": 2.54 * UM}, DOUBT),
    ("indicator-resolves-limit", "on the limit", {"resolution": 2.5 * UM}, IN),
    ("indicator-resolves-limit", "unknown", {"resolution": None}, UNKNOWN),
    ("entered-in-time", "within", {}, IN),
    ("entered-in-time", "in doubt", {"hours_between": 13.0}, DOUBT),
    ("entered-in-time", "late with a reason", {"hours_between": 13.0, "reason": "no power"}, IN),
    ("entered-in-time", "on the limit", {"hours_between": 12.0}, IN),
    ("entered-in-time", "unknown", {"hours_between": None}, UNKNOWN),
    ("outside-work-back", "within", {}, IN),
    ("outside-work-back", "outside", {"result": "not accepted"}, OUT),
    ("outside-work-back", "in doubt", {"certificate": ""}, DOUBT),
    ("outside-work-back", "unknown", {"back_on": None}, UNKNOWN),
    ("outside-work-back", "not accepted yet", {"result": "awaited"}, UNKNOWN),
    ("seen-conforms", "within", {}, IN),
    ("seen-conforms", "outside", {"weight": "does not conform"}, OUT),
    ("seen-conforms", "in doubt", {"weight": "look again"}, DOUBT),
    ("seen-conforms", "unknown", {"weight": None}, UNKNOWN),
    ("substitute-approved", "within", {}, IN),
    ("substitute-approved", "outside", {"approved_by": ""}, OUT),
    ("substitute-approved", "unknown", {"approved_by": None}, UNKNOWN),
    ("decided-with-authority", "within", {}, IN),
    ("decided-with-authority", "outside", {"disposition": "use as is under concession"}, OUT),
    ("decided-with-authority", "repair by an inspector", {"disposition": "repair"}, OUT),
    (
        "decided-with-authority",
        "conceded by the engineer",
        {"disposition": "use as is under concession", "role": "engineer"},
        IN,
    ),
    ("decided-with-authority", "customer not asked", {"needs_customer": True}, UNKNOWN),
    (
        "decided-with-authority",
        "customer agreed",
        {"needs_customer": True, "agreed_by": "C. Customer"},
        IN,
    ),
    ("decided-with-authority", "unknown", {"role": None}, UNKNOWN),
    ("record-complete", "within", {}, IN),
    ("record-complete", "in doubt", {"findings_open": ("finding 2",)}, DOUBT),
    ("record-complete", "unsigned", {"signatures_missing": ("step 2",)}, DOUBT),
    ("record-complete", "still outside", {"outside_open": ("the hub",)}, DOUBT),
    ("record-complete", "waived is told and stands", {"waived": ("runout witnessed",)}, IN),
    ("record-complete", "unknown", {"findings_open": None}, UNKNOWN),
    # Points and separation, on the facts of `PeopleFacts`.
    ("points-signed", "waived", {"points_without": ("runout, waived by C.",)}, IN),
    (
        "performer-not-inspector",
        "agreed waiver",
        {"inspectors": ("A",), "agreed_waiver": "agreed by C. on 2026-01-02, two people"},
        IN,
    ),
)
