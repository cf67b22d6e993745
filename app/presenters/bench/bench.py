"""The bench's presenter: shows the one thing to do now and turns what is done into acts."""

from collections.abc import Callable, Mapping
from functools import partial
from typing import Any

from PySide6.QtCore import QObject, Signal

from app.presenters.bench.cautions import cautions_for
from app.presenters.bench.forms import Bench, Form, Made, form_for, note_form, survey_form
from app.presenters.bench.pictures import drop_of, show_rotor
from app.presenters.bench.reading import Reading, SoFar
from app.presenters.bench.state import (
    BenchState,
    BenchVerdict,
    Key,
    KeyTask,
    ReadingTask,
    Task,
    Title,
    WaitTask,
)
from app.presenters.bench.verdicts import (
    final_verdict,
    verdict_at,
    verdict_of_sizes,
    verdict_so_far,
)
from app.presenters.bench.walk import Spot
from app.presenters.keys import KeysPresenter
from app.presenters.writing import Writer
from models.acts import Acts, NotAllowedError, Recorded, new_id
from models.assess import Assessment, Attempt, assess
from models.job import (
    AnyEntry,
    AttemptOpened,
    Mount,
    Question,
    RunoutSurvey,
    Settled,
    Signature,
    SizeSurvey,
)
from models.rules.progress import Act, NextAct
from models.units import Length, Quantity, UnreadableNumberError, unit_set

__all__ = ["REASONS", "BenchPresenter"]

REASONS = ("misread", "wrong mark", "slipped", "typing slip", "other")

_SURVEYS = (Act.SURVEY_BARE_SHAFT, Act.SURVEY, Act.SURVEY_SEAT)


class BenchPresenter(QObject):
    """State of the bench for one job and one person; no widgets, no SQL."""

    changed = Signal()
    """The state is another; read it again."""
    refused = Signal(str)
    """Something was not taken; the sentence says what, and what to do."""
    in_hand = Signal(str)
    """A reading that could not be written, just before the trouble is told; it is still held."""
    troubled = Signal(str, str, str)
    """The surroundings failed: what, where, the way out. Nothing typed is lost."""
    recovered = Signal()
    """Writing goes on after trouble."""

    def __init__(
        self,
        acts: Acts,
        writer: Writer,
        job_number: str,
        person: str,
        parent: QObject | None = None,
        *,
        keys: KeysPresenter | None = None,
    ) -> None:
        super().__init__(parent)
        self._acts = acts
        self._signing = keys
        self._writer = writer
        self._number = job_number
        self._person = person
        self._view: Assessment | None = None
        self._reading: Reading | None = None
        self._form: Form | None = None
        self._removing = False
        self._noting = False
        self._measuring_again: NextAct | None = None
        self._door_opened_at: str | None = None
        self._written_at = ""
        # The last link this window knows: an act judged on anything older is refused.
        self._seen: int | None = None
        self._state = _empty(job_number)
        writer.failed.connect(self._on_trouble)
        self.reload()

    # What is shown -------------------------------------------------------------------------

    @property
    def state(self) -> BenchState:
        """Everything the bench shows now."""
        return self._state

    @property
    def view(self) -> Assessment | None:
        """The job as last judged; None until it has been read."""
        return self._view

    def reload(self) -> None:
        """Read the job again from the record, and judge it."""
        self._writer.write(self._load, done=self._on_loaded, refused=self._on_unreadable)

    def sign_in(self, person: str) -> None:
        """Let another person act at this bench."""
        self._person = person
        self._rebuild_forms()

    def _load(self) -> Assessment:
        return assess(self._acts.read(self._number))

    def _on_loaded(self, view: Assessment) -> None:
        self._view = view
        self._seen = view.job.head.sequence if view.job.head else None
        self._reading = self._open_reading(view)
        self._removing = False
        self._rebuild_forms()

    def _rebuild_forms(self) -> None:
        if self._view is None:
            return
        self._form = self._form_now(self._view)
        self._show()

    def _attempt(self, view: Assessment) -> Attempt | None:
        act = view.next
        if act.step is None or act.attempt is None:
            return None
        return view.attempt(act.step, act.attempt)

    def _open_reading(self, view: Assessment) -> Reading | None:
        """Find the survey that is open, where the record itself left it."""
        attempt = self._attempt(view)
        for entry in reversed(view.job.entries):
            if not isinstance(entry, RunoutSurvey | SizeSurvey) or entry.closed_at is not None:
                continue
            here = attempt is not None and entry.place == attempt.opened.place
            bare = isinstance(entry, RunoutSurvey) and entry.purpose == "bare shaft"
            if here or (bare and attempt is None):
                return Reading(view.job, entry, attempt)
        return None

    def _bench(self, view: Assessment) -> Bench:
        return Bench(view, self._person, self._acts.now)

    def _form_now(self, view: Assessment) -> Form | None:
        act = self._act(view)
        if self._noting:
            return note_form(self._bench(view), act)
        if self._reading is not None:
            return None
        if act.act in _SURVEYS:
            return survey_form(self._bench(view), act)
        if act.act is Act.REMOVE and not self._removing:
            return None
        return form_for(self._bench(view), act, self._attempt(view))

    def _act(self, view: Assessment) -> NextAct:
        return self._measuring_again or view.next

    def _show(self) -> None:
        view = self._view
        if view is None:
            return
        act = self._act(view)
        attempt = self._attempt(view)
        so_far = self._reading.so_far() if self._reading is not None else SoFar()
        shown = show_rotor(view, act, attempt, self._reading, so_far)
        task = self._task(view, act, attempt, so_far)
        self._state = BenchState(
            title=self._title(view, act),
            words=act.words,
            task=task,
            verdict=self._verdict(view, act, attempt, so_far),
            rotor=shown.rotor,
            curves=shown.curves,
            changes=shown.changes,
            change_caption=shown.caption,
            counted=shown.counted,
            keys=self._keys(task),
        )
        self.changed.emit()

    def _title(self, view: Assessment, act: NextAct) -> Title:
        job = view.job
        rotor = job.plan.rotor
        invented = " (invented)" if rotor.invented else ""
        step = ""
        if act.step is not None:
            number = job.plan.step_number(act.step)
            step = f"{number} of {len(job.plan.steps)}, attempt {act.attempt}"
        return Title(
            rotor=f"{rotor.serial}{invented}",
            job=job.number,
            step=step,
            plan=job.plan.revision,
            stage=act.stage,
            written=self._written_at,
        )

    def _keys(self, task: Task) -> tuple[Key, ...]:
        reading = isinstance(task, ReadingTask)
        return (
            Key("keypad", "Keypad", enabled=reading),
            Key("no-surface", "No surface", enabled=reading, hint="keyway or gap at this mark"),
            Key("note", "Back" if self._noting else "Note"),
            Key("leave", "Leave"),
        )

    def _task(self, view: Assessment, act: NextAct, attempt: Attempt | None, so_far: SoFar) -> Task:
        if self._form is not None and (self._noting or self._reading is None):
            return self._form.task
        if self._reading is not None:
            return self._reading.task(so_far, REASONS) or self._closing_task(self._reading)
        return _key_task(view, act, attempt, self._person) or WaitTask(
            act.stage.value, (act.words,), cautions_for(act.act)
        )

    def _closing_task(self, reading: Reading) -> Task:
        asked = reading.questions
        if asked:
            about = asked[0]
            keys = [Key("keep", "It stays, because it was read so")]
            if reading.spot_of(about) is not None:
                keys.insert(0, Key("again", "Read that mark again"))
                if about.proposed is not None:
                    keys.insert(0, Key("proposed", f"Take {about.proposed} {reading.unit}"))
            return KeyTask(
                "A question before it closes",
                (f"{about.place}: {about.sentence}",),
                tuple(keys),
            )
        return KeyTask(
            "Everything is read",
            ("Close the survey: it is judged as a whole, and takes no new readings after that.",),
            (Key("close", "Close the survey"), Key("last", "Change the last reading")),
        )

    def _verdict(
        self, view: Assessment, act: NextAct, attempt: Attempt | None, so_far: SoFar
    ) -> BenchVerdict:
        units = unit_set(view.job.plan.rotor.units)
        if self._reading is not None and isinstance(self._reading.survey, RunoutSurvey):
            return verdict_so_far(so_far, len(self._reading.survey.stations), units)
        fit = self._reading.fit_so_far() if self._reading is not None else None
        if self._reading is not None and fit is not None:
            feature = getattr(self._reading.survey, "feature", "bore")
            return verdict_of_sizes(view.job, fit, feature)
        judged = attempt is not None and (attempt.judged is not None or not attempt.step.survey_due)
        ends = act.act in (Act.SETTLE, Act.REMOVE) and not self._removing and not self._noting
        if attempt is not None and ends and (judged or act.act is Act.REMOVE):
            return final_verdict(attempt, units)
        return verdict_at(act, attempt)

    # Readings ------------------------------------------------------------------------------

    def read(self, text: str) -> Quantity:
        """Read a value as the active task's unit wants it; raises what keeps it from being read."""
        if self._reading is None:
            raise UnreadableNumberError(text, "nothing is being read now")
        return self._reading.read(text)

    def other_unit_text(self, text: str) -> str:
        """Write what is being typed in the other unit; empty while it cannot be read."""
        task = self._state.task
        if not isinstance(task, ReadingTask):
            return ""
        try:
            quantity = self.read(text)
        except UnreadableNumberError:
            return ""
        decimals = {"µm": 1, "mm": 3, "in": 5}.get(task.other_unit, 3)
        return f"{Length.text(quantity.si, task.other_unit, decimals)} {task.other_unit}"

    def typed(self, text: str) -> None:
        """Follow each key: dial, change and verdict show what the value would say."""
        if self._reading is None:
            return
        self._reading.live = text or None
        self._show()

    def take(self, text: str) -> None:
        """Take a value for the mark in hand."""
        self._take(text, None)

    def correct(self, text: str, reason: str) -> None:
        """Take a value in place of one that was read; the old one stays, struck."""
        self._take(text, reason)

    def no_surface(self) -> None:
        """Note that there is nothing to read at this mark."""
        reading = self._reading
        if reading is None or reading.active is None:
            return
        if not reading.active.station:
            self.refused.emit("A diameter cannot be skipped; measure beside the keyway.")
            return
        self._write_reading(reading, reading.active, None, None)

    def _take(self, text: str, reason: str | None) -> None:
        reading = self._reading
        spot = reading.active if reading is not None else None
        if reading is None or spot is None:
            self.refused.emit("Nothing is being read now.")
            return
        try:
            quantity = reading.read(text)
        except UnreadableNumberError as trouble:
            self.refused.emit(str(trouble))
            return
        if reading.correcting is not None and reason is None:
            reason = "typing slip"
        self._write_reading(reading, spot, reading.text_in_unit(quantity), reason)

    def _write_reading(
        self, reading: Reading, spot: Spot, typed: str | None, reason: str | None
    ) -> None:
        reading.take(spot, typed)
        act_id = new_id()
        entry_id, person = reading.survey.id, reading.survey.by

        def act() -> Recorded:
            return self._acts.add_reading(
                self._number,
                entry_id,
                spot.reading(typed),
                by=person,
                act_id=act_id,
                reason=reason,
            )

        def done(recorded: Recorded) -> None:
            reading.written(spot)
            self._note_written(recorded)
            self._show()

        self._writer.write(act, done=done, refused=self._on_refused)
        self._show()

    def ask_for_last(self) -> None:
        """Go back to the last reading; its value is struck once another is taken."""
        if self._reading is not None and self._reading.last_spot is not None:
            self._reading.correcting = self._reading.last_spot
            self._show()

    def choose_rung(self, index: int) -> None:
        """Go to a mark of the ladder that has been read, to correct it."""
        reading = self._reading
        if reading is None:
            return
        spots = reading.rung_spots()
        if not 0 <= index < len(spots):
            return
        reading.correcting = None if spots[index] == reading.next_spot else spots[index]
        self._show()

    def answer_proposed(self) -> None:
        """Answer the question with the figure that was proposed."""
        reading = self._reading
        asked = reading.questions if reading is not None else ()
        if reading is None or not asked or asked[0].proposed is None:
            return
        spot = reading.spot_of(asked[0])
        if spot is not None:
            self._write_reading(reading, spot, asked[0].proposed, "typing slip, as proposed")

    def answer_kept(self, words: str) -> None:
        """Answer the question: the reading stays, because of these words."""
        reading = self._reading
        asked = reading.questions if reading is not None else ()
        if reading is None or not asked:
            return
        question = Question(
            where=asked[0].where,
            question=asked[0].sentence,
            answer=words or "read so",
            by=self._person,
            at=self._acts.now(),
        )
        act_id = new_id()
        entry_id = reading.survey.id
        reading.keep(question)
        self._writer.write(
            lambda: self._acts.answer(self._number, entry_id, question, act_id=act_id),
            done=self._note_written,
            refused=self._on_refused,
        )
        self._show()

    def answer_read_again(self) -> None:
        """Answer the question by reading that mark again; both values are kept."""
        reading = self._reading
        asked = reading.questions if reading is not None else ()
        if reading is not None and asked:
            reading.correcting = reading.spot_of(asked[0])
            self._show()

    # Forms and keys ------------------------------------------------------------------------

    def fill(self, answers: Mapping[str, str]) -> None:
        """Take a form's answers; the first that cannot be read is named, and nothing is taken."""
        view, form = self._view, self._form
        if view is None or form is None:
            return
        try:
            made = form.make(form.answers(answers, self._bench(view).units))
        except UnreadableNumberError as trouble:
            words = trouble.expected if not trouble.text else str(trouble)
            self.refused.emit(words[:1].upper() + words[1:] + ".")
            return
        self._noting = False
        self._measuring_again = None
        self._write_made(made)

    def _write_made(self, made: Made) -> None:
        person = self._person
        for entry in made.entries:
            self._write(partial(self._record, entry, new_id()))
        for entry_id, reading in made.readings:
            self._write(
                partial(
                    self._acts.add_reading,
                    self._number,
                    entry_id,
                    reading,
                    by=person,
                    act_id=new_id(),
                )
            )
        self.reload()

    def _record(self, entry: AnyEntry, act_id: str) -> Recorded:
        # Runs when its turn comes, so that it names the head as it is after the acts before it.
        return self._acts.record(self._number, entry, act_id=act_id, head=self._seen)

    def _write(self, act: Callable[[], Recorded]) -> None:
        self._writer.write(act, done=self._note_written, refused=self._on_refused)

    def open_door(self) -> None:
        """Note the moment the furnace door opens; the countdown runs from here."""
        self._door_opened_at = self._acts.now()

    def press(self, name: str) -> None:
        """Do what a key says."""
        act: Callable[[], None] | None = {
            "no-surface": self.no_surface,
            "note": self._toggle_note,
            "close": self._close_survey,
            "last": self.ask_for_last,
            "again": self.answer_read_again,
            "proposed": self.answer_proposed,
            "keep": lambda: self.answer_kept("read so, looked at again"),
            "begin": self._begin_attempt,
            "seated": lambda: self._mounted("seated"),
            "stopped-short": lambda: self._mounted("stopped short"),
            "removal": self._begin_removal,
            "settle": self._settle,
            "sign": self._sign,
            "measure-bore": lambda: self._measure_again("bore"),
            "measure-seat": lambda: self._measure_again("seat"),
            "read-again": self._read_again,
        }.get(name)
        if act is not None:
            act()

    def _toggle_note(self) -> None:
        self._noting = not self._noting
        self._rebuild_forms()

    def _begin_removal(self) -> None:
        self._removing = True
        self._rebuild_forms()

    def _measure_again(self, feature: str) -> None:
        view = self._view
        attempt = self._attempt(view) if view is not None else None
        if view is None or attempt is None or view.next.item is None:
            return
        item = next(one for one in attempt.items if one.item.key == view.next.item)
        bad = attempt.of("interference-within", item.item.key)
        land = next(
            (one.subject.land for one in bad if one.verdict.severity), item.item.lands[0].key
        )
        self._measuring_again = NextAct(
            stage=view.next.stage,
            act=Act.MEASURE,
            words=f"Measure the {feature} again.",
            step=view.next.step,
            attempt=view.next.attempt,
            item=item.item.key,
            land=land,
            feature=feature,
        )
        self._rebuild_forms()

    def _read_again(self) -> None:
        self._rebuild_forms()

    def _close_survey(self) -> None:
        reading = self._reading
        if reading is None:
            return
        if reading.questions:
            self.refused.emit("A reading is still questioned; answer it first.")
            return
        act_id = new_id()
        entry_id = reading.survey.id
        self._write(
            lambda: self._acts.close_survey(self._number, entry_id, by=self._person, act_id=act_id)
        )
        self.reload()

    def _head(self, view: Assessment) -> dict[str, Any]:
        at = self._acts.now()
        return {
            "id": new_id(),
            "by": self._person,
            "done_at": at,
            "entered_at": at,
            "plan": view.job.plan.revision,
            "place": self._bench(view).place(view.next),
        }

    def _begin_attempt(self) -> None:
        view = self._view
        if view is None or view.next.step is None:
            return
        survey = view.last_accepted_survey
        step = view.job.plan.step(view.next.step)
        held = {one.item: one.serial for one in view.job.components}
        entry = AttemptOpened(
            **self._head(view),
            baseline=survey.entry.id if survey else None,
            components=tuple((item.key, held[item.key]) for item in step.items if item.key in held),
        )
        self._write_made(Made((entry,)))

    def _mounted(self, outcome: str) -> None:
        view = self._view
        if view is None or view.next.item is None:
            return
        entry = Mount(
            **self._head(view),
            item=view.next.item,
            outcome="seated" if outcome == "seated" else "stopped short",
            door_opened_at=self._door_opened_at,
            seated_at=self._acts.now() if outcome == "seated" else None,
        )
        self._door_opened_at = None
        self._write_made(Made((entry,)))

    def _settle(self) -> None:
        view = self._view
        attempt = self._attempt(view) if view is not None else None
        if view is None or attempt is None:
            return
        came_off = any(one.removal is not None for one in attempt.items)
        entry = Settled(
            **self._head(view),
            outcome="removed" if came_off else "within limits",
            survey=attempt.judged.entry.id if attempt.judged else None,
        )
        self._write_made(Made((entry,)))

    def _sign(self) -> None:
        view = self._view
        if view is None or view.next.step is None:
            return
        number = view.job.plan.step_number(view.next.step)
        role = view.job.person(self._person).role
        meanings = {"technician": "performed", "inspector": "inspected", "witness": "witnessed"}
        entry = Signature(
            **self._head(view),
            role=role,
            meaning=meanings.get(role, "decided"),  # type: ignore[arg-type]  # one of its words
            covers=f"step {number}, attempt {view.next.attempt}",
        )
        if self._signing is not None and self._signing.needs_key:
            self._signing.ask_to_sign(self._number, entry, done=self._signed)
            return
        self._write_made(Made((entry,)))

    def _signed(self, recorded: Recorded) -> None:
        self._note_written(recorded)
        self.reload()

    # The writer's answers ------------------------------------------------------------------

    def _note_written(self, recorded: Recorded) -> None:
        self._written_at = recorded.at[11:19]
        self._seen = recorded.sequence

    def _on_refused(self, error: Exception) -> None:
        if isinstance(error, NotAllowedError):
            self.refused.emit(error.words)
        else:
            self.refused.emit(str(error))
        # What is on the disk is the truth; whatever was shown beyond it is read again.
        self.reload()

    def _on_unreadable(self, error: Exception) -> None:
        # Reading again would fail the same way, and so on for ever.
        self.refused.emit(str(error))

    def _on_trouble(self, error: Exception) -> None:
        what = "This is not on the disk yet"
        held = self._reading.in_hand if self._reading is not None else None
        if held is not None:
            typed, mark = held
            what = f"{typed or 'No surface'} at {mark} is not on the disk yet"
            self.in_hand.emit(typed or "")
        self.troubled.emit(what, str(error).rstrip("."), "Mend it, then press “try again”.")

    def try_again(self) -> None:
        """Write again what is not on the disk yet."""
        self._writer.try_again()
        self.recovered.emit()


def _empty(number: str) -> BenchState:
    return BenchState(
        title=Title(rotor="", job=number, step="", plan="", stage=None),
        words="Reading the record …",
        task=WaitTask("Reading the record …"),
        verdict=BenchVerdict(None, ""),
    )


def _key_task(
    view: Assessment, act: NextAct, attempt: Attempt | None, person: str
) -> KeyTask | None:
    """Give the task of an act that a key does."""
    number = view.job.plan.step_number(act.step) if act.step else 0
    title = view.job.plan.step(act.step).title if act.step else ""
    if act.act is Act.OPEN_ATTEMPT:
        return KeyTask(
            f"Step {number}, {title}",
            (act.words, "Have the part, its drawing and its gauges at hand."),
            (Key("begin", f"Begin attempt {act.attempt}"),),
        )
    if act.act is Act.DECIDE_FIT:
        return KeyTask(
            "It may not go on like this",
            (act.words, "Measure again what may be wrong; else an engineer decides."),
            (
                Key("measure-bore", "Measure the bore again"),
                Key("measure-seat", "Measure the seat again"),
            ),
        )
    if act.act is Act.MOUNT:
        return _mount_task(act, attempt)
    if act.act is Act.REMOVE:
        return KeyTask(
            "Remount required",
            (act.words,),
            (Key("removal", "Record the removal"),),
            cautions_for(act.act),
        )
    if act.act is Act.SETTLE:
        came_off = attempt is not None and any(one.removal for one in attempt.items)
        label = f"Close attempt {act.attempt}" if came_off else f"Settle step {number}"
        return KeyTask(title, (act.words,), (Key("settle", label),))
    if act.act is Act.SIGN:
        return _sign_task(view, act, attempt, person)
    return None


def _mount_task(act: NextAct, attempt: Attempt | None) -> KeyTask:
    item = None
    if attempt is not None:
        item = next((one for one in attempt.items if one.item.key == act.item), None)
    drop = drop_of(item) if item is not None else None
    return KeyTask(
        act.words,
        ("One unbroken motion from the door to the shoulder. Press when it is home.",),
        (Key("seated", "Seated"), Key("stopped-short", "Stopped short")),
        cautions_for(act.act),
        drop=drop,
    )


def _sign_task(
    view: Assessment, act: NextAct, attempt: Attempt | None, person: str
) -> KeyTask | None:
    who = view.job.person(person)
    done = {(one.role, one.meaning) for one in attempt.signatures} if attempt else set()
    words = {
        "technician": ("performed", "did the work as it is recorded here"),
        "inspector": ("inspected", "read the record and agrees with it"),
        "witness": ("witnessed", "was present at what is recorded here"),
    }.get(who.role)
    if words is None or (who.role, words[0]) in done:
        return None
    if who.role != "technician" and attempt is not None:
        wanted = {point.role for point in attempt.step.points}
        if who.role not in wanted:
            return None
    return KeyTask(
        "Sign the step",
        (
            f"{who.name}, {who.role}, {words[1]}.",
            "What it covers is shown before the secret is asked.",
        ),
        (Key("sign", f"Sign as {who.name}"),),
    )
