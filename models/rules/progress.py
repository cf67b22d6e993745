"""What may happen next, and what may not yet: computed in this one place, from plain facts.

The gate refuses to *start* something; it never refuses to *record* what already happened, and
nothing ever stands before a removal. The stage of the work is derived here and set nowhere.
"""

from dataclasses import dataclass
from enum import Enum
from typing import Protocol

from models.rules.rule import Verdict

__all__ = [
    "Act",
    "AttemptProgress",
    "BuildProgress",
    "ItemProgress",
    "NextAct",
    "Permission",
    "Stage",
    "may",
    "next_act",
]

_ATTEMPTS_BEFORE_ENGINEER = 2


class Stage(Enum):
    """The stages of a stacking step, as the title block names them."""

    SIZES = "Sizes"
    FIT = "Fit"
    HEAT = "Heat"
    MOUNT = "Mount"
    COOL = "Cool"
    RUNOUT = "Runout"
    BALANCE = "Balance"
    SETTLED = "Settled"


class Act(Enum):
    """What a person can do at the bench."""

    SURVEY_BARE_SHAFT = "survey the bare shaft"
    OPEN_ATTEMPT = "open an attempt"
    MEASURE = "measure sizes"
    DECIDE_FIT = "decide about the fit"
    CONFIRM_FURNACE = "confirm before the furnace"
    HEAT = "heat"
    CONFIRM_DOOR = "confirm before the door"
    MOUNT = "mount"
    COMPLETE_MOUNT = "say how it came to rest"
    DRAW_UP = "draw up"
    MEASURE_AXIAL = "measure the axial position"
    COOL = "take temperatures while cooling"
    SURVEY = "survey the runout"
    SURVEY_SEAT = "survey the bare seat"
    REMOVE = "remove"
    BALANCE = "balance"
    SETTLE = "settle"
    SIGN = "sign"
    NOTHING = "nothing"


@dataclass(frozen=True, kw_only=True)
class ItemProgress:
    """How far one item of a step is."""

    key: str
    name: str
    is_hot: bool
    sizes_due: tuple[tuple[str, str], ...] = ()
    fit: Verdict | None = None
    furnace: Verdict | None = None
    target: Verdict | None = None
    opening: Verdict | None = None
    door: Verdict | None = None
    mounted: str | None = None
    seated: Verdict | None = None
    axial_due: bool = False
    removed: bool = False
    is_on_taper: bool = False


@dataclass(frozen=True, kw_only=True)
class AttemptProgress:
    """How far one attempt at a step is."""

    step: str
    number: int
    items: tuple[ItemProgress, ...]
    survey_due: bool = True
    balance: Verdict | None = None
    cooling: Verdict | None = None
    open_survey: str | None = None
    open_purpose: str | None = None
    verdict: Verdict | None = None
    seat_survey_closed: bool = False
    outcome: str | None = None
    performed: bool = False
    points_open: tuple[str, ...] = ()
    name: str = ""

    @property
    def where(self) -> str:
        """The attempt in words."""
        return f"{self.name or f'step {self.step}'}, attempt {self.number}"

    @property
    def is_settled(self) -> bool:
        """Whether the step may be built upon."""
        return self.outcome in ("within limits", "conceded")

    @property
    def removal_due(self) -> bool:
        """Whether what went on must come off."""
        on = [item for item in self.items if item.mounted and not item.removed]
        # What is not far enough up a taper is drawn up again, not taken off.
        if any(item.seated is Verdict.OUTSIDE and item.is_on_taper for item in on):
            return False
        bad = any(item.seated is Verdict.OUTSIDE for item in on)
        return bool(on) and (bad or self.verdict is Verdict.OUTSIDE)

    @property
    def is_coming_off(self) -> bool:
        """Whether a removal has begun and the attempt has not ended."""
        return self.outcome is None and any(item.removed for item in self.items)


@dataclass(frozen=True, kw_only=True)
class BuildProgress:
    """How far the whole build is."""

    steps: tuple[tuple[str, str], ...]
    attempts: tuple[AttemptProgress, ...] = ()
    bare_shaft_surveyed: bool = False
    bare_shaft_survey_open: str | None = None
    engineer_decided: frozenset[tuple[str, int]] = frozenset()

    def latest(self, step: str) -> AttemptProgress | None:
        """Find the latest attempt at a step."""
        mine = [one for one in self.attempts if one.step == step]
        return mine[-1] if mine else None

    def named(self, step: str) -> str:
        """Name a step as people do: its number and title."""
        number = next(n for n, (key, _) in enumerate(self.steps, start=1) if key == step)
        return f"step {number}, {dict(self.steps)[step]}"

    def step_before(self, step: str) -> str | None:
        """Name the step before a step."""
        keys = [key for key, _ in self.steps]
        index = keys.index(step)
        return keys[index - 1] if index else None

    @property
    def current(self) -> str | None:
        """Name the first step that is not settled, signed and clear of its points."""
        for key, _ in self.steps:
            attempt = self.latest(key)
            if attempt is None or not attempt.is_settled:
                return key
            if not attempt.performed or attempt.points_open:
                return key
        return None


@dataclass(frozen=True)
class Permission:
    """Whether an act may start; if not, the reason by name and in words."""

    allowed: bool
    name: str = ""
    words: str = ""


@dataclass(frozen=True, kw_only=True)
class NextAct:
    """The one thing to do now."""

    stage: Stage
    act: Act
    words: str
    step: str | None = None
    attempt: int | None = None
    item: str | None = None
    land: str | None = None
    feature: str | None = None
    purpose: str | None = None


class _To(Protocol):
    """Makes the next act of one attempt."""

    def __call__(self, stage: Stage, act: Act, words: str, **more: str | None) -> NextAct: ...


_YES = Permission(True)


def _no(name: str, words: str) -> Permission:
    return Permission(False, name, words)


def may(build: BuildProgress, act: Act, *, step: str, item: str | None = None) -> Permission:
    """Say whether an act may start at a step, and if not, why, by name."""
    if act is Act.REMOVE:
        return _YES
    if act is Act.SURVEY_BARE_SHAFT:
        if build.attempts:
            return _no("shaft-not-bare", "Parts are on the shaft; it can no longer be read bare.")
        return _YES
    if act is Act.OPEN_ATTEMPT:
        return _may_open(build, step)
    attempt = build.latest(step)
    if attempt is None or (attempt.outcome is not None and act is not Act.SIGN):
        return _no("no-attempt-open", f"No attempt at {build.named(step)} is open.")
    if act in (Act.SURVEY, Act.SURVEY_SEAT, Act.SETTLE, Act.COOL, Act.SIGN):
        return _may_on_attempt(attempt, act)
    one = next((one for one in attempt.items if one.key == item), None)
    if one is None:
        return _no("no-such-item", f"S{build.named(step)[1:]} has no item {item}.")
    return _may_on_item(one, act)


def _may_open(build: BuildProgress, step: str) -> Permission:
    if not build.bare_shaft_surveyed:
        return _no("bare-shaft-not-surveyed", "The bare shaft has not been surveyed.")
    before = build.step_before(step)
    if before is not None:
        last = build.latest(before)
        if last is None or not last.is_settled:
            return _no("step-before-not-settled", f"S{build.named(before)[1:]} is not settled.")
        if not last.performed:
            return _no(
                "step-before-not-signed", f"S{build.named(before)[1:]} is not signed by who did it."
            )
        if last.points_open:
            return _no(
                "point-open", f"S{build.named(before)[1:]} waits for {'; '.join(last.points_open)}."
            )
    mine = build.latest(step)
    if mine is None:
        return _YES
    if mine.outcome is None:
        return _no("attempt-open", f"Attempt {mine.number} at {build.named(step)} is still open.")
    if mine.is_settled:
        return _no("step-settled", f"S{build.named(step)[1:]} is settled.")
    failed = sum(1 for one in build.attempts if one.step == step and one.outcome == "removed")
    if failed >= _ATTEMPTS_BEFORE_ENGINEER and (step, failed) not in build.engineer_decided:
        return _no(
            "engineer-decides",
            f"{failed} attempts at {build.named(step)} came off; the rotor engineer decides how to "
            "go on.",
        )
    return _YES


def _may_on_item(item: ItemProgress, act: Act) -> Permission:
    if act is Act.MEASURE:
        if item.mounted and not item.removed:
            return _no("part-is-on", f"{item.name} is on the shaft; its sizes cannot be taken.")
        return _YES
    if act in (Act.CONFIRM_FURNACE, Act.HEAT, Act.CONFIRM_DOOR, Act.MOUNT):
        if item.mounted:
            return _no("part-is-on", f"{item.name} has gone on already in this attempt.")
        if item.sizes_due:
            land, feature = item.sizes_due[0]
            return _no(
                "sizes-missing", f"{item.name}: the {feature} at land {land} is not measured."
            )
        if item.fit is not None and item.fit is not Verdict.WITHIN:
            return _no("fit-not-within", f"{item.name}: its fit is not within limits.")
    if act in (Act.HEAT, Act.CONFIRM_DOOR, Act.MOUNT) and item.is_hot:
        if item.furnace is not Verdict.WITHIN:
            return _no(
                "not-confirmed-before-furnace",
                f"{item.name} has not been confirmed before the furnace.",
            )
        if item.target is Verdict.OUTSIDE:
            return _no("too-hot", f"{item.name} would have to be hotter than allowed.")
    closed = item.is_hot and item.opening is not Verdict.WITHIN
    if act in (Act.CONFIRM_DOOR, Act.MOUNT) and closed:
        return _no("bore-not-open", f"{item.name}: nothing measured says that its bore is open.")
    if act is Act.MOUNT and item.is_hot and item.door is not Verdict.WITHIN:
        return _no(
            "not-confirmed-before-door", f"{item.name} has not been confirmed before the door."
        )
    if act in (Act.MEASURE_AXIAL, Act.COMPLETE_MOUNT) and not item.mounted:
        return _no("part-not-on", f"{item.name} is not on the shaft.")
    return _YES


def _may_on_attempt(attempt: AttemptProgress, act: Act) -> Permission:
    where = attempt.where
    if act is Act.SIGN:
        if attempt.outcome is None:
            return _no("not-settled", f"There is nothing settled to sign yet at {where}.")
        return _YES
    if act is Act.SURVEY_SEAT:
        if not attempt.is_coming_off:
            return _no("nothing-removed", f"Nothing has been removed at {where}.")
        return _YES
    if act is Act.SETTLE:
        if attempt.is_coming_off:
            return (
                _YES
                if attempt.seat_survey_closed
                else _no("seat-not-surveyed", f"The bare seat of {where} has not been surveyed.")
            )
        if attempt.verdict is Verdict.OUTSIDE or attempt.removal_due:
            return _no("remount-required", f"S{where[1:]} is outside its limits.")
        if attempt.verdict is not Verdict.WITHIN:
            return _no("not-judged-within", f"Nothing says that {where} is within its limits.")
        if attempt.balance not in (None, Verdict.WITHIN):
            return _no("not-balanced", f"The plan asks for balance after {where}.")
        return _YES
    waiting = [item for item in attempt.items if not item.mounted]
    if waiting:
        return _no("part-not-on", f"{waiting[0].name} is not on the shaft.")
    if act is Act.SURVEY and attempt.cooling not in (None, Verdict.WITHIN):
        return _no("still-warm", "No temperatures say that the rotor may be read.")
    return _YES


def next_act(build: BuildProgress) -> NextAct:
    """Find the one thing to do now."""
    if not build.bare_shaft_surveyed and not build.attempts:
        return NextAct(
            stage=Stage.RUNOUT,
            act=Act.SURVEY_BARE_SHAFT,
            purpose="bare shaft",
            words="Survey the bare shaft: every later survey is compared with it.",
        )
    step = build.current
    if step is None:
        return NextAct(
            stage=Stage.SETTLED, act=Act.NOTHING, words="Every step is settled and signed."
        )
    attempt = build.latest(step)
    if attempt is None or attempt.outcome == "removed":
        number = 1 if attempt is None else attempt.number + 1
        allowed = may(build, Act.OPEN_ATTEMPT, step=step)
        return NextAct(
            stage=Stage.SIZES,
            act=Act.OPEN_ATTEMPT if allowed.allowed else Act.NOTHING,
            step=step,
            attempt=number,
            words=allowed.words or f"Begin attempt {number} at {build.named(step)}.",
        )
    if attempt.outcome is not None:
        who = "who did the step" if not attempt.performed else "; ".join(attempt.points_open)
        return NextAct(
            stage=Stage.SETTLED,
            act=Act.SIGN,
            step=step,
            attempt=attempt.number,
            words=f"S{build.named(step)[1:]} is settled and waits for {who}.",
        )
    return _next_in(attempt)


def _next_in(attempt: AttemptProgress) -> NextAct:
    def to(stage: Stage, act: Act, words: str, **more: str | None) -> NextAct:
        return NextAct(
            stage=stage,
            act=act,
            words=words,
            step=attempt.step,
            attempt=attempt.number,
            **more,
        )

    if attempt.is_coming_off or attempt.removal_due:
        return _next_of_removal(attempt, to)
    for item in attempt.items:
        step_in = _next_of_item(item, to)
        if step_in is not None:
            return step_in
    if attempt.open_survey is None and attempt.cooling not in (None, Verdict.WITHIN):
        return to(Stage.COOL, Act.COOL, "Take temperatures around and along the rotor.")
    for item in attempt.items:
        # Where a part rests counts once it is cold.
        if item.axial_due:
            return to(
                Stage.COOL,
                Act.MEASURE_AXIAL,
                f"Measure where {item.name} came to rest, cold.",
                item=item.key,
            )
    if attempt.survey_due and attempt.verdict is not Verdict.WITHIN:
        purpose = attempt.open_purpose or ("after" if attempt.verdict is None else "again")
        words = (
            "Read the runout of every station in reach."
            if purpose == "after"
            else "Read again: the last survey does not settle it."
        )
        return to(Stage.RUNOUT, Act.SURVEY, words, purpose=purpose)
    if attempt.balance not in (None, Verdict.WITHIN):
        return to(Stage.BALANCE, Act.BALANCE, _words_of_balance(attempt.balance))
    return to(Stage.SETTLED, Act.SETTLE, "Within limits: settle the step.")


def _words_of_balance(verdict: Verdict | None) -> str:
    return {
        Verdict.OUTSIDE: "More unbalance is left than may remain: correct it and run again.",
        Verdict.CANNOT_TELL: "The balance cannot be closed yet: weigh the journals or read again.",
    }.get(verdict or Verdict.NOT_JUDGED, "Balance the rotor as it is now.")


def _next_of_item(item: ItemProgress, to: _To) -> NextAct | None:
    if item.is_on_taper and (not item.mounted or item.seated is not Verdict.WITHIN):
        words = f"Draw {item.name} up its taper: dry zero, oil, advance."
        if item.mounted:
            words = f"Draw {item.name} up again or measure it again: its fit is not proved."
        return to(Stage.MOUNT, Act.DRAW_UP, words, item=item.key)
    if item.mounted:
        if item.seated is Verdict.NOT_JUDGED:
            return to(
                Stage.MOUNT,
                Act.COMPLETE_MOUNT,
                f"Say how {item.name} came to rest: feel its shoulder all round.",
                item=item.key,
            )
        return None
    if item.sizes_due:
        land, feature = item.sizes_due[0]
        return to(
            Stage.SIZES,
            Act.MEASURE,
            f"Measure the {feature} of {item.name} at land {land}.",
            item=item.key,
            land=land,
            feature=feature,
        )
    if item.fit is not None and item.fit is not Verdict.WITHIN:
        return to(
            Stage.FIT,
            Act.DECIDE_FIT,
            f"The fit of {item.name} does not allow it to go on.",
            item=item.key,
        )
    if item.is_hot:
        if item.furnace is not Verdict.WITHIN:
            return to(
                Stage.HEAT,
                Act.CONFIRM_FURNACE,
                f"Confirm {item.name} before it goes into the furnace.",
                item=item.key,
            )
        if item.opening is not Verdict.WITHIN or item.target is Verdict.OUTSIDE:
            return to(
                Stage.HEAT,
                Act.HEAT,
                f"Heat {item.name}; then gauge its bore, or take its temperatures.",
                item=item.key,
            )
        if item.door is not Verdict.WITHIN:
            return to(
                Stage.HEAT,
                Act.CONFIRM_DOOR,
                f"Confirm {item.name} again before the door opens.",
                item=item.key,
            )
    return to(Stage.MOUNT, Act.MOUNT, f"{item.name} may go on.", item=item.key)


def _next_of_removal(attempt: AttemptProgress, to: _To) -> NextAct:
    on = [item for item in reversed(attempt.items) if item.mounted and not item.removed]
    if on:
        return to(
            Stage.RUNOUT, Act.REMOVE, f"Remount required: take {on[0].name} off.", item=on[0].key
        )
    if not attempt.seat_survey_closed:
        return to(
            Stage.RUNOUT,
            Act.SURVEY_SEAT,
            "Survey the bare seat: what came back belonged to the mount.",
            purpose="bare seat",
        )
    return to(
        Stage.SETTLED, Act.SETTLE, f"Attempt {attempt.number} came off; close it and begin again."
    )
