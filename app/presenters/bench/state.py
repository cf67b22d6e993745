"""What the bench shows, as plain frozen data; the page lays it out and adds nothing."""

from dataclasses import dataclass, field

from models.rules.progress import Stage
from models.rules.rule import Verdict
from reports.sheet.decay import DecayPicture
from reports.sheet.pictures import (
    ChangeMark,
    DialPicture,
    GapPicture,
    PlaneCurve,
    RangePicture,
    RotorPicture,
)

__all__ = [
    "BenchState",
    "BenchVerdict",
    "Drop",
    "Field",
    "FormTask",
    "Key",
    "KeyTask",
    "QuestionShown",
    "ReadingTask",
    "RungShown",
    "Title",
    "WaitTask",
]


@dataclass(frozen=True)
class Title:
    """The title block: which rotor, job, step, attempt and plan, and when last written."""

    rotor: str
    job: str
    step: str
    plan: str
    stage: Stage | None
    written: str = ""


@dataclass(frozen=True)
class RungShown:
    """One mark of the ladder: its place, its value, what was struck, whether it is questioned."""

    place: str
    value: str = ""
    struck: tuple[str, ...] = ()
    active: bool = False
    questioned: bool = False
    writing: bool = False


@dataclass(frozen=True)
class QuestionShown:
    """A question beside a reading; it takes no focus and is answered by F-keys or touch."""

    sentence: str
    proposed: str | None = None


@dataclass(frozen=True)
class ReadingTask:
    """One reading to take: where, and what is around it."""

    mark: str
    where: str
    lines: tuple[str, ...]
    unit: str
    other_unit: str
    rungs: tuple[RungShown, ...]
    caption: str
    dial: DialPicture | None = None
    correcting: str | None = None
    reasons: tuple[str, ...] = ()
    question: QuestionShown | None = None
    is_closing: bool = False
    kind: str = "runout"


@dataclass(frozen=True)
class Field:
    """One field of a form: a quantity, a choice, or words."""

    key: str
    label: str
    unit: str = ""
    use: str = ""
    choices: tuple[tuple[str, str], ...] = ()
    value: str = ""
    needed: bool = True
    hint: str = ""


@dataclass(frozen=True)
class FormTask:
    """A few fields to fill, and one key that takes them."""

    heading: str
    lines: tuple[str, ...]
    fields: tuple[Field, ...]
    take: str
    cautions: tuple[str, ...] = ()
    ranges: RangePicture | DecayPicture | None = None


@dataclass(frozen=True)
class Drop:
    """The drop window: two ranges in seconds, and the gap that closes."""

    in_air: tuple[float, float]
    over_seat: tuple[float, float]
    gap: GapPicture | None
    words: str
    opened_at: float | None = None


@dataclass(frozen=True)
class Key:
    """A key of the bench: what it is called and what it does."""

    name: str
    label: str
    enabled: bool = True
    hint: str = ""


@dataclass(frozen=True)
class KeyTask:
    """One act that a single key does, with a second one at most."""

    heading: str
    lines: tuple[str, ...]
    keys: tuple[Key, ...]
    cautions: tuple[str, ...] = ()
    drop: Drop | None = None
    ranges: RangePicture | None = None


@dataclass(frozen=True)
class WaitTask:
    """Nothing to do here now, and what is waited for."""

    heading: str
    lines: tuple[str, ...] = ()
    cautions: tuple[str, ...] = ()


@dataclass(frozen=True)
class BenchVerdict:
    """The one large verdict: shape, phrase, sentences and facts; what it rests on opens."""

    verdict: Verdict | None
    phrase: str
    sentences: tuple[str, ...] = ()
    so_far: str = ""
    facts: tuple[tuple[str, str], ...] = ()
    reasons: tuple[str, ...] = ()
    rules: tuple[str, ...] = ()
    """The rules it rests on, the one that decides first."""
    is_final: bool = False


Task = ReadingTask | FormTask | KeyTask | WaitTask


@dataclass(frozen=True)
class BenchState:
    """Everything the bench shows."""

    title: Title
    words: str
    task: Task
    verdict: BenchVerdict
    rotor: RotorPicture | None = None
    curves: tuple[PlaneCurve, ...] = ()
    changes: tuple[ChangeMark, ...] = ()
    change_caption: tuple[str, ...] = ()
    counted: str = "counterclockwise"
    keys: tuple[Key, ...] = field(default_factory=tuple)
