"""What every form starts from, and how its answers are read."""

from collections.abc import Callable, Mapping, Sequence
from dataclasses import dataclass, replace
from typing import Any

from app.presenters.bench.state import Field, FormTask
from models.acts import Reading, new_id
from models.assess import Assessment
from models.job import AnyEntry, Job, Place
from models.rules.progress import Act, NextAct
from models.units import Length, Temperature, UnitSet, UnreadableNumberError, unit_set

__all__ = ["Answers", "Bench", "Form", "Made", "choice", "entry_head", "temperature_field"]


@dataclass(frozen=True)
class Bench:
    """What every form starts from: the job as judged, who acts, and when."""

    view: Assessment
    person: str
    now: Callable[[], str]

    @property
    def job(self) -> Job:
        """The job at the bench."""
        return self.view.job

    @property
    def units(self) -> UnitSet:
        """The job's own unit set."""
        return unit_set(self.job.plan.rotor.units)

    def place(self, act: NextAct) -> Place:
        """Say where an entry of this act belongs."""
        if act.act is Act.SURVEY_BARE_SHAFT:
            return Place(kind="bare shaft")
        return Place(kind="attempt", step=act.step, attempt=act.attempt)

    def instruments(self, *words: str) -> tuple[tuple[str, str], ...]:
        """Offer the instruments of the first kind that the shop has; all if it has none of them."""
        for word in words:
            found = [one for one in self.job.instruments if word in one.kind]
            if found:
                return tuple((one.tag, f"{one.tag}, {one.kind}") for one in found)
        return tuple((one.tag, f"{one.tag}, {one.kind}") for one in self.job.instruments)


@dataclass(frozen=True)
class Made:
    """What a form's answers make: whole entries, and readings of an entry that is open."""

    entries: tuple[AnyEntry, ...] = ()
    readings: tuple[tuple[str, Reading], ...] = ()


@dataclass(frozen=True)
class Answers:
    """A form's answers as text, read by kind; what cannot be read names its field."""

    fields: Mapping[str, Field]
    texts: Mapping[str, str]
    units: UnitSet

    def word(self, key: str) -> str:
        """Give a choice or words; refuse an empty one that is needed."""
        text = self.texts.get(key, "").strip()
        if not text and self.fields[key].needed:
            raise UnreadableNumberError("", f"{self.fields[key].label} is still empty")
        return text

    def temperature(self, key: str) -> Temperature | None:
        """Give a temperature; None where the field may stay empty and does."""
        text = self.word(key)
        if not text:
            return None
        return Temperature.read(text, self.units.unit("temperature"))

    def length(self, key: str, use: str) -> Length:
        """Give a length."""
        return Length.read(self.word(key), self.units.unit(use))


@dataclass(frozen=True)
class Form:
    """A form and what its answers make."""

    task: FormTask
    make: Callable[[Answers], Made]

    def answers(self, texts: Mapping[str, str], units: UnitSet) -> Answers:
        """Hold answers against the form's fields."""
        return Answers({one.key: one for one in self.task.fields}, texts, units)


def entry_head(bench: Bench) -> dict[str, Any]:
    """Give what every entry made at the bench says."""
    at = bench.now()
    return {
        "id": new_id(),
        "by": bench.person,
        "done_at": at,
        "entered_at": at,
        "plan": bench.job.plan.revision,
    }


def temperature_field(bench: Bench, key: str, label: str, **more: object) -> Field:
    """Make a field for a temperature in the job's unit."""
    one = Field(key, label, unit=bench.units.unit("temperature"), use="temperature")
    return replace(one, **more)  # type: ignore[arg-type]  # keywords of Field, by name


def choice(key: str, label: str, choices: Sequence[tuple[str, str]], value: str = "") -> Field:
    """Make a field with a few answers to choose from."""
    return Field(key, label, choices=tuple(choices), value=value)
