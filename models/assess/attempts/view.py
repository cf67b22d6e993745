"""One attempt at a stacking step, its entries sorted and worked out."""

from dataclasses import dataclass
from functools import cached_property

from models.assess.balance import BalanceView
from models.assess.bend import Bend, bend_of
from models.assess.decided import answers
from models.assess.draw_up import DrawnUp
from models.assess.heat import Heat
from models.assess.points import PointState
from models.assess.runout import StationChange, SurveyRunout
from models.assess.sizes import LandFit
from models.assess.strength import FitStrength
from models.engineering.bow import KinkFit
from models.job import (
    AnyEntry,
    AttemptOpened,
    AxialMeasured,
    Confirmation,
    Cooling,
    Decision,
    Item,
    Mount,
    Plan,
    Removal,
    Settled,
    Signature,
    Step,
)
from models.rules.rule import Finding, Subject, Verdict

__all__ = [
    "DRAW_UP_RULES",
    "HOME_RULES",
    "STRENGTH_RULES",
    "Attempt",
    "ItemView",
    "attempt_subject",
    "finding_key",
]

STRENGTH_RULES = (
    "hub-not-yielding",
    "seat-not-yielding",
    "fit-stays-closed-at-trip",
    "fit-holds-torque",
    "fit-holds-torque-at-speed",
    "fit-holds-thrust",
    "fit-holds-thrust-at-speed",
)
HOME_RULES = ("part-seated",)
DRAW_UP_RULES = (
    "interference-within",
    "advance-within",
    "taper-contact",
    "dilation-allowed",
    "seating-loss-usual",
    "piston-held",
)


@dataclass(frozen=True, eq=False)
class ItemView:
    """One item of a step in one attempt."""

    item: Item
    serial: str | None
    fits: tuple[LandFit, ...]
    strength: FitStrength | None
    heat: Heat | None
    mount: Mount | None
    axial: tuple[AxialMeasured, ...]
    removal: Removal | None
    confirmations: tuple[Confirmation, ...]
    drawn_up: DrawnUp | None = None

    @property
    def axial_cold(self) -> AxialMeasured | None:
        """The last axial position measured cold."""
        cold = [one for one in self.axial if one.state == "cold"]
        return cold[-1] if cold else None


@dataclass(frozen=True, eq=False)
class Attempt:
    """One attempt, with all that is known of it and every finding."""

    plan: Plan
    step: Step
    number: int
    opened: AttemptOpened
    entries: tuple[AnyEntry, ...]
    items: tuple[ItemView, ...]
    coolings: tuple[Cooling, ...]
    baseline: SurveyRunout | None
    surveys: tuple[SurveyRunout, ...]
    judged: SurveyRunout | None
    changes: tuple[StationChange, ...]
    kink: KinkFit | None
    seat_survey: SurveyRunout | None
    drift: tuple[StationChange, ...]
    settled: Settled | None
    signatures: tuple[Signature, ...]
    # None where the plan asks for no balance at all.
    balance: BalanceView | None
    # Given for an earlier state: something was recorded or corrected since.
    signatures_before: tuple[Signature, ...]
    decisions: tuple[Decision, ...]
    points: tuple[PointState, ...]
    findings: tuple[Finding, ...]

    @cached_property
    def bend(self) -> Bend:
        """What its surveys tell about the bow, worked out when asked for: no rule needs it."""
        return bend_of(
            self.plan,
            self.step.key,
            kink=self.kink,
            changes=self.changes,
            judged=self.judged,
            drift=self.drift,
        )

    @property
    def worst(self) -> Verdict:
        """The worst verdict of all findings of the attempt."""
        return Verdict.worst([finding.verdict for finding in self.findings])

    def of(self, rule_id: str, item: str | None = None) -> tuple[Finding, ...]:
        """Select the findings of one rule, of one item if named."""
        return tuple(
            finding
            for finding in self.findings
            if finding.rule.id == rule_id and item in (None, finding.subject.item)
        )

    def verdict_of(self, *rule_ids: str, item: str | None = None) -> Verdict | None:
        """Find the worst verdict of some rules, counting decisions; None where none was judged."""
        found = [finding for rule_id in rule_ids for finding in self.of(rule_id, item)]
        if not found:
            return None
        return Verdict.worst([self.counted(finding) for finding in found])

    def home(self, item: str | None = None) -> Verdict | None:
        """Say whether a part, or every one, is where it belongs: on a taper by its draw-up."""
        found = []
        for view in self.items:
            if item not in (None, view.item.key):
                continue
            rules = HOME_RULES if view.drawn_up is None else (*HOME_RULES, *DRAW_UP_RULES)
            verdict = self.verdict_of(*rules, item=view.item.key)
            if verdict is not None:
                found.append(verdict)
        return Verdict.worst(found) if found else None

    def counted(self, finding: Finding) -> Verdict:
        """Give the verdict as it counts for going on: a person's decision settles a doubt."""
        about = finding_key(finding)
        decided = [one for one in self.decisions if one.about == about and answers(self.plan, one)]
        if decided and decided[-1].disposition in (
            "accept reading",
            "use as is under concession",
        ):
            return Verdict.WITHIN
        return finding.verdict


def finding_key(finding: Finding) -> str:
    """Name a finding so that a decision can refer to it."""
    words = finding.subject.words
    return f"{finding.rule.id}: {words}" if words else finding.rule.id


def attempt_subject(attempt: Attempt, **more: str | None) -> Subject:
    """Name what a finding of an attempt is about."""
    return Subject(step=attempt.step.key, attempt=attempt.number, **more)
