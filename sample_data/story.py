"""How a build is told: each attempt from its opening to its signatures, entry by entry.

What is measured comes from the bench; what follows from it (heat further, take off again) is
decided by what was measured or by what is really so, never written down beforehand.
"""

from collections.abc import Iterator, Sequence

from models.job import (
    AnyEntry,
    AttemptOpened,
    AxialMeasured,
    Check,
    Component,
    Confirmation,
    Cooling,
    Correction,
    Decision,
    GaugeTry,
    Handling,
    Heating,
    Hot,
    Item,
    Mount,
    Note,
    Place,
    Plan,
    Removal,
    RunoutSurvey,
    Settled,
    SetUp,
    Signature,
    SizeSurvey,
    StationReadings,
    Step,
    SurveyPurpose,
)
from models.units import Angle
from sample_data.bench import Bench, Measured
from sample_data.calendar import ShopClock
from sample_data.geometry import Chance, change_in_journal_axis
from sample_data.shop import Shop
from sample_data.truth import Kink, Mounted, Truth

__all__ = ["Story"]

_BEFORE_FURNACE = (
    "facing as drawn",
    "match mark to the reference mark",
    "bore clean, no burr",
    "seat clean and oiled thinly",
    "stop and neighbour in place",
)
_BEFORE_DOOR = ("lifting gear and hook ready", "way to the shaft free", "gloves and two people")
_ON_BLOCKS = Place(kind="bare shaft")
_MOST_TIMES_HOTTER = 4


class Story:
    """The record of one build as it grows."""

    def __init__(
        self,
        *,
        truth: Truth,
        plan: Plan,
        shop: Shop,
        components: Sequence[Component],
        clock: ShopClock,
    ) -> None:
        self.truth = truth
        self.plan = plan
        self.shop = shop
        self.components = tuple(components)
        self.clock = clock
        self.bench = Bench(truth=truth, plan=plan, shop=shop)
        self.entries: list[AnyEntry] = []
        self.kinks: list[Kink] = []
        self.accepted = ""
        self._before: str | None = None
        self._place = _ON_BLOCKS

    def bare_shaft(self) -> None:
        """Survey the bare shaft, against which everything later is held."""
        self._place = _ON_BLOCKS
        self.accepted = self._survey("bare shaft", on=None, kinks=(), name="bare shaft")
        self._sign("bare shaft", inspected=True)

    def step(self, key: str, *, after_a_weekend: bool = False) -> None:
        """Take one step from the first attempt to the one that stays on."""
        if after_a_weekend:
            self.clock.next_working_day(6, 30)
        step = self.plan.step(key)
        last = max(one.attempt for one in self.truth.mounted if one.step == key)
        for number in range(1, last + 1):
            mounted = self.truth.mount(key, number)
            self._place = Place(kind="attempt", step=key, attempt=number)
            self._open(step)
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
        self._before = key

    def final(self) -> None:
        """Survey the whole rotor once more and sign for it."""
        self._place = Place(kind="final")
        self.clock.next_working_day(7, 15)
        last = self.plan.steps[-1].key
        self._survey("final", on=last, kinks=self.kinks, name="final")
        self._sign("final runout", inspected=True)
        self._add(Signature, by=self.shop.witness, role="witness", meaning="witnessed",
                  covers="final runout")  # fmt: skip

    def _add(self, kind: type[AnyEntry], *, by: str | None = None, **rest: object) -> str:
        key = f"e{len(self.entries) + 1:03d}"
        told = self.clock.wait(1)
        made = kind(
            id=key,
            place=self._place,
            by=by or self.shop.reader,
            done_at=told,
            entered_at=told,
            plan=self.plan.revision,
            **rest,  # type: ignore[arg-type]
        )
        self.entries.append(made)
        return key

    def _open(self, step: Step) -> None:
        self.clock.wait(20)
        held = {one.item: one.serial for one in self.components}
        serials = tuple((item.key, held[item.key]) for item in step.items if item.key in held)
        self._add(AttemptOpened, baseline=self.accepted, components=serials)

    def _look_again_after_the_weekend(self, step: Step) -> None:
        self._add(Handling, what="overnight", words="On the blocks over the weekend, untouched.")
        self._cooling(step.items[0], mounted=None, name="weekend")
        self._survey("before", on=self._before, kinks=self.kinks, name=f"{step.key} before")

    def _put_on(self, item: Item, attempt: int) -> None:
        if item.kind == "hot":
            seats = self._sizes(item, attempt)
            self._confirm(item, "before the furnace", _BEFORE_FURNACE)
            self._heat(item, attempt, seats)
            self._confirm(item, "before the door", _BEFORE_DOOR)
        opened = self.clock.wait(4)
        seated = self.clock.wait(1)
        hot = item.kind == "hot"
        self._add(
            Mount,
            item=item.key,
            outcome="seated",
            door_opened_at=opened if hot else None,
            seated_at=seated,
            shoulder="felt all round",
            clock_position=Angle.read("0 °"),
        )
        if item.axial is not None:
            self._axial(item, "hot", attempt)

    def _sizes(self, item: Item, attempt: int) -> dict[str, Measured]:
        seats: dict[str, Measured] = {}
        for land in item.lands:
            for feature in ("seat", "bore"):
                name = f"{item.key} {land.key} {feature} {attempt}"
                measured = self.bench.sizes(name=name, item=item, land=land, feature=feature)
                if feature == "seat":
                    seats[land.key] = measured
                nominal = land.nominal_diameter.si
                tag = self.shop.outside_for if feature == "seat" else self.shop.inside_for
                self.clock.wait(9)
                self._add(
                    SizeSurvey,
                    written_by=self.shop.mate,
                    item=item.key,
                    land=land.key,
                    feature=feature,
                    instrument=tag(nominal),
                    unit=self.shop.size_unit,
                    positions=tuple(self.shop.position(one) for one in measured.positions),
                    angles=tuple(Angle.read(f"{one:.0f} °") for one in measured.angles_degrees),
                    typed=measured.typed,
                    part_temperature=self.shop.temperature(measured.part_temperature),
                    gauge_temperature=self.shop.temperature(measured.gauge_temperature),
                    closed_at=self.clock.told,
                )
        return seats

    def _confirm(self, item: Item, moment: str, points: Sequence[str]) -> None:
        serial = next(one.serial for one in self.components if one.item == item.key)
        keyed = ("key fitted, clearance above it felt",) if item.keyed else ()
        self.clock.wait(5)
        self._add(
            Confirmation,
            item=item.key,
            moment=moment,
            serial=serial,
            checks=tuple(Check(what=what, answer="yes") for what in (*points, *keyed)),
        )

    def _heat(self, item: Item, attempt: int, seats: dict[str, Measured]) -> None:
        oven = self.truth.oven(item.key)
        shaft = self.shop.hall
        set_point = oven.usual_set_point
        temperatures: list[Hot] = []
        tries: list[GaugeTry] = []
        self.clock.wait(150)
        for turn in range(1, _MOST_TIMES_HOTTER + 1):
            name = f"{item.key} {attempt} {turn}"
            temperatures += self._hot(item, name, set_point, oven.lag)
            offered = [
                self.bench.offer_gauge(
                    item,
                    land,
                    self.bench.gauge_size(item, seats[land.key], shaft),
                    set_point - oven.lag,
                )
                for land in item.lands
            ]
            at = self.clock.wait(2)
            tries += [
                GaugeTry(land=one.land, size=self.shop.size(one.size), passed=one.passed, at=at)
                for one in offered
            ]
            if all(one.passed for one in offered):
                break
            set_point += self.shop.further
            self.clock.wait(75)
        again = "; turned up when the gauge did not pass" if len(tries) > len(item.lands) else ""
        self._add(
            Heating,
            item=item.key,
            method=f"electric oven, bore upright{again}",
            set_point=self.shop.temperature(set_point, 0),
            shaft_temperature=self.shop.temperature(shaft),
            instrument=self.shop.hot_thermometer,
            temperatures=tuple(temperatures),
            gauge=tuple(tries),
        )

    def _hot(self, item: Item, name: str, set_point: float, lag: float) -> Iterator[Hot]:
        read = self.bench.oven(name=name, set_point=set_point, lag=lag)
        at = self.clock.wait(3)
        for degrees, bore in zip((0, 120, 240), read.bore, strict=True):
            yield Hot(
                where="bore",
                temperature=self.shop.temperature(bore, 0),
                at=at,
                angle=Angle.read(f"{degrees} °"),
            )
        yield Hot(where="web", temperature=self.shop.temperature(read.web, 0), at=at)
        yield Hot(where="rim", temperature=self.shop.temperature(read.rim, 0), at=at)

    def _axial(self, item: Item, state: str, attempt: int) -> None:
        assert item.axial is not None
        chance = Chance(self.truth.seed, "axial", item.key, state, attempt)
        target = item.axial.target.si
        # A hot part stands off its shoulder by the draw of its cooling; cold it has closed up.
        away = 60e-6 if state == "hot" else 10e-6
        self._add(
            AxialMeasured,
            item=item.key,
            state=state,
            value=self.shop.position(target + away + chance.normal(15e-6)),
            instrument=self.shop.depth,
        )

    def _cooling(self, item: Item, *, mounted: Mounted | None, name: str) -> None:
        start, end = item.outline.start.si, item.outline.end.si
        places = ((start + end) / 2, end + 0.05)
        warm = mounted.read_warm if mounted else None
        self._add(
            Cooling,
            surroundings=self.shop.temperature(self.shop.hall),
            instrument=self.shop.thermometer,
            temperatures=self.bench.warmth(
                name=f"{self._place.step} {self._place.attempt} {name}",
                positions=places,
                warm=warm,
            ),
        )

    def _read_too_early(self, step: Step, mounted: Mounted) -> None:
        assert mounted.read_warm is not None
        self.clock.wait(200)
        item = step.items[0]
        self._cooling(item, mounted=mounted, name="early")
        bends = [*self.kinks, mounted.kink, self.bench.warm_kink(mounted.read_warm, item)]
        self._survey(
            "after",
            on=step.key,
            kinks=bends,
            name=f"{step.key} {mounted.attempt} early",
            out_of_order="Read before the end of the shift to see where it stands.",
        )
        self.clock.wait(10)
        self._add(
            Decision,
            by=self.shop.inspector,
            about=f"in-order: step {step.key}, attempt {mounted.attempt}",
            disposition="read again",
            words="Still warm on one side. Read again cold before anything is decided.",
        )

    def _read_cold(self, step: Step, mounted: Mounted) -> None:
        self.clock.next_working_day(6, 40)
        if any(item.kind == "hot" for item in step.items):
            self._cooling(step.items[-1], mounted=None, name="cold")
        self._survey(
            "again" if mounted.read_warm else "after",
            on=step.key,
            kinks=[*self.kinks, mounted.kink],
            name=f"{step.key} {mounted.attempt} after",
        )
        for item in step.items:
            if item.axial is not None:
                self._axial(item, "cold", mounted.attempt)

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
        self._add(
            Removal,
            item=item.key,
            method="warmed evenly from the rim inwards with two gas rings, drawn straight off",
            found="bright patch on the seat on one side over the outer third; bore unmarked",
            temperature=self.shop.temperature(self.truth.oven(item.key).usual_set_point + 25, 0),
        )
        self.clock.next_working_day(6, 40)
        self._cooling(item, mounted=None, name="bare seat")
        bare = self._survey(
            "bare seat",
            on=self._before,
            kinks=self.kinks,
            name=f"{step.key} {attempt} bare seat",
        )
        self._add(Note, words="High spot on the seat dressed with a fine stone and blued.")
        self._add(Settled, outcome="removed", survey=bare)
        self._sign(f"step {step.key}, attempt {attempt}", inspected=True)

    def _settle(self, step: Step) -> None:
        # The survey just closed is the one that the attempt ends with.
        judged = next(one.id for one in reversed(self.entries) if isinstance(one, RunoutSurvey))
        self.accepted = judged
        self._add(Settled, outcome="within limits", survey=judged)
        held = bool(step.points)
        self._sign(f"step {step.key}, attempt {self._place.attempt}", inspected=held)

    def _sign(self, covers: str, *, inspected: bool) -> None:
        self._add(Signature, role="technician", meaning="performed", covers=covers)
        if inspected:
            self.clock.wait(15)
            self._add(Signature, by=self.shop.inspector, role="inspector", meaning="inspected",
                      covers=covers)  # fmt: skip

    def _survey(
        self,
        purpose: SurveyPurpose,
        *,
        on: str | None,
        kinks: Sequence[Kink],
        name: str,
        out_of_order: str | None = None,
    ) -> str:
        method = self.plan.runout
        stations = self.bench.survey(
            name=name, stations=self.plan.stations_in_reach(on), kinks=kinks
        )
        begun = self.clock.wait(18)
        closed = self.clock.wait(24)
        return self._add(
            RunoutSurvey,
            written_by=self.shop.mate,
            out_of_order=out_of_order,
            purpose=purpose,
            set_up=SetUp(
                attitude=method.attitude,
                supports=method.supports,
                supported_at=method.supported_at,
                end_stop=method.end_stop,
                indicators=(self.shop.dial,),
                rest_time=method.rest_time,
                turns_before_reading=method.turns_before_reading,
                tip="ball 2 mm",
                base="stand on the floor plate",
            ),
            unit=self.shop.dial_unit,
            angles=method.marks,
            stations=stations,
            instrument=self.shop.dial,
            read_by=self.shop.reader,
            closed_at=closed,
            corrections=self._corrections(stations, purpose, begun),
        )

    def _corrections(
        self, stations: Sequence[StationReadings], purpose: str, at: str
    ) -> tuple[Correction, ...]:
        return tuple(
            Correction(
                where=(slip.station, str(slip.mark)),
                was=_ten_times(one.typed[slip.mark] or ""),
                now=one.typed[slip.mark] or "",
                reason="slipped decimal",
                by=self.shop.reader,
                at=at,
            )
            for slip in self.truth.slips
            for one in stations
            if (slip.step, slip.station) == (self._place.step, one.station) and purpose == "after"
        )


def _ten_times(typed: str) -> str:
    """Slip the decimal point of a reading by one place."""
    whole, point, decimals = typed.partition(".")
    if not point:
        return f"{typed}0"
    return f"{whole}.{decimals[1:]}0"
