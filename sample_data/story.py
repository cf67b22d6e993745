"""How a build is told: each attempt from its opening to its signatures, entry by entry.

What is measured comes from the bench; what follows from it (heat further, take off again) is
decided by what was measured or by what is really so, never written down beforehand.
"""

from models.job import (
    AttemptOpened,
    Decision,
    Handling,
    Item,
    Mount,
    Note,
    Place,
    Removal,
    RunoutSurvey,
    Settled,
    Signature,
    Step,
)
from models.units import Angle
from sample_data import beside
from sample_data.geometry import change_in_journal_axis
from sample_data.scribe import Scribe
from sample_data.truth import Mounted

__all__ = ["Story"]


_BEFORE_FURNACE = (
    "facing as drawn",
    "match mark to the reference mark",
    "bore clean, no burr",
    "seat clean and oiled thinly",
    "stop and neighbour in place",
)
_BEFORE_DOOR = ("lifting gear and hook ready", "way to the shaft free", "gloves and two people")


class Story(Scribe):
    """The record of one build as it grows."""

    def bare_shaft(self) -> None:
        """Survey the bare shaft, against which everything later is held."""
        self.place = Place(kind="bare shaft")
        self.accepted = self.survey("bare shaft", on=None, kinks=(), name="bare shaft")
        self.sign("bare shaft", inspected=True)

    def step(self, key: str, *, after_a_weekend: bool = False) -> None:
        """Take one step from the first attempt to the one that stays on."""
        if after_a_weekend:
            self.clock.next_working_day(6, 30)
        step = self.plan.step(key)
        last = max(one.attempt for one in self.truth.mounted if one.step == key)
        for number in range(1, last + 1):
            mounted = self.truth.mount(key, number)
            self.place = Place(kind="attempt", step=key, attempt=number)
            self._open(step)
            if number == 1:
                beside.tell_of_points(self, step, before=True)
            if after_a_weekend and number == 1:
                self._look_again_after_the_weekend(step)
            for item in step.items:
                self._put_on(item, number)
            if mounted.read_warm is not None:
                self._read_too_early(step, mounted)
            self._read_cold(step, mounted)
            if self._is_over(step, mounted):
                self._take_off(step, number)
            else:
                self.kinks.append(mounted.kink)
                self._settle(step)
        self.step_before = key

    def final(self) -> None:
        """Survey the whole rotor once more and sign for it."""
        self.place = Place(kind="final")
        self.clock.next_working_day(7, 15)
        last = self.plan.steps[-1].key
        self.survey("final", on=last, kinks=self.kinks, name="final")
        self.sign("final runout", inspected=True)
        self.add(Signature, by=self.shop.witness, role="witness", meaning="witnessed",
                  covers="final runout")  # fmt: skip

    def _open(self, step: Step) -> None:
        self.clock.wait(20)
        held = {one.item: one.serial for one in self.components}
        serials = tuple((item.key, held[item.key]) for item in step.items if item.key in held)
        self.add(AttemptOpened, baseline=self.accepted, components=serials)

    def _look_again_after_the_weekend(self, step: Step) -> None:
        self.add(Handling, what="overnight", words="On the blocks over the weekend, untouched.")
        self.cooling(step.items[0], mounted=None, name="weekend")
        self.survey("before", on=self.step_before, kinks=self.kinks, name=f"{step.key} before")

    def _put_on(self, item: Item, attempt: int) -> None:
        if item.kind == "hot":
            seats = self.sizes(item, attempt)
            self.confirm(item, "before the furnace", _BEFORE_FURNACE)
            self.heat(item, attempt, seats)
            self.confirm(item, "before the door", _BEFORE_DOOR)
        opened = self.clock.wait(4)
        seated = self.clock.wait(1)
        hot = item.kind == "hot"
        self.add(
            Mount,
            item=item.key,
            outcome="seated",
            door_opened_at=opened if hot else None,
            seated_at=seated,
            shoulder="felt all round",
            clock_position=Angle.read("0 °"),
        )
        if item.kind == "clamped":
            beside.tighten(self, item)
        if item.axial is not None:
            self.axial(item, "hot", attempt)

    def _read_too_early(self, step: Step, mounted: Mounted) -> None:
        assert mounted.read_warm is not None
        self.clock.wait(200)
        item = step.items[0]
        self.cooling(item, mounted=mounted, name="early")
        bends = [*self.kinks, mounted.kink, self.bench.warm_kink(mounted.read_warm, item)]
        self.survey(
            "after",
            on=step.key,
            kinks=bends,
            name=f"{step.key} {mounted.attempt} early",
            out_of_order="Read before the end of the shift to see where it stands.",
        )
        self.clock.wait(10)
        self.add(
            Decision,
            by=self.shop.inspector,
            about=f"in-order: step {step.key}, attempt {mounted.attempt}",
            disposition="read again",
            words="Still warm on one side. Read again cold before anything is decided.",
        )

    def _read_cold(self, step: Step, mounted: Mounted) -> None:
        self.clock.next_working_day(6, 40)
        if any(item.kind == "hot" for item in step.items):
            self.cooling(step.items[-1], mounted=None, name="cold")
        for item in step.items:
            if item.axial is not None:
                self.axial(item, "cold", mounted.attempt)
        self.survey(
            "again" if mounted.read_warm else "after",
            on=step.key,
            kinks=[*self.kinks, mounted.kink],
            name=f"{step.key} {mounted.attempt} after",
        )

    def _is_over(self, step: Step, mounted: Mounted) -> bool:
        assert step.change_limit is not None
        changes = (
            2 * abs(change_in_journal_axis(self.truth, [mounted.kink], one.position.si))
            for one in self.plan.stations_in_reach(step.key)
        )
        return max(changes) > step.change_limit.value.si

    def _take_off(self, step: Step, attempt: int) -> None:
        (item,) = step.items
        self.clock.wait(90)
        self.add(
            Removal,
            item=item.key,
            method="warmed evenly from the rim inwards with two gas rings, drawn straight off",
            found="bright patch on the seat on one side over the outer third; bore unmarked",
            temperature=self.shop.temperature(self.truth.oven(item.key).usual_set_point + 25, 0),
        )
        self.clock.next_working_day(6, 40)
        self.cooling(item, mounted=None, name="bare seat")
        bare = self.survey(
            "bare seat",
            on=self.step_before,
            kinks=self.kinks,
            name=f"{step.key} {attempt} bare seat",
        )
        if item.key in beside.PICTURED:
            beside.seen_on_seat(self, item)
        self.add(Note, words="High spot on the seat dressed with a fine stone and blued.")
        self.add(Settled, outcome="removed", survey=bare)
        self.sign(f"step {step.key}, attempt {attempt}", inspected=True)

    def _settle(self, step: Step) -> None:
        # The survey just closed is the one that the attempt ends with.
        judged = next(one.id for one in reversed(self.entries) if isinstance(one, RunoutSurvey))
        self.accepted = judged
        self.add(Settled, outcome="within limits", survey=judged)
        held = bool(step.points)
        self.sign(f"step {step.key}, attempt {self.place.attempt}", inspected=held)
        beside.tell_of_points(self, step, before=False)
