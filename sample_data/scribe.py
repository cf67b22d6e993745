"""How each entry of a build is written: what was done, measured and signed at the stand."""

from collections.abc import Iterator, Sequence

from models.job import (
    AnyEntry,
    AxialMeasured,
    Check,
    Component,
    Confirmation,
    Cooling,
    Correction,
    GaugeTry,
    Heating,
    Hot,
    Item,
    Place,
    Plan,
    RunoutSurvey,
    SetUp,
    Signature,
    SizeSurvey,
    StationReadings,
    SurveyPurpose,
)
from models.units import Angle
from sample_data.bench import Bench, Measured
from sample_data.calendar import ShopClock
from sample_data.geometry import Chance
from sample_data.shop import Shop
from sample_data.truth import Kink, Mounted, Truth

__all__ = ["Scribe"]

_MOST_TIMES_HOTTER = 4


class Scribe:
    """Writes the entries of one build, in the order of the clock."""

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
        self.step_before: str | None = None
        self.place = Place(kind="bare shaft")

    def add(self, kind: type[AnyEntry], *, by: str | None = None, **rest: object) -> str:
        """Write an entry and give its id."""
        key = f"e{len(self.entries) + 1:03d}"
        told = self.clock.wait(1)
        made = kind(
            id=key,
            place=self.place,
            by=by or self.shop.reader,
            done_at=told,
            entered_at=told,
            plan=self.plan.revision,
            **rest,  # type: ignore[arg-type]
        )
        self.entries.append(made)
        return key

    def sizes(self, item: Item, attempt: int) -> dict[str, Measured]:
        """Measure seat and bore of every land, and give the seats for the gauge's sake."""
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
                self.add(
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

    def confirm(self, item: Item, moment: str, points: Sequence[str]) -> None:
        """Look at every point before the furnace, or again before the door."""
        serial = next(one.serial for one in self.components if one.item == item.key)
        keyed = ("key fitted, clearance above it felt",) if item.keyed else ()
        self.clock.wait(5)
        self.add(
            Confirmation,
            item=item.key,
            moment=moment,
            serial=serial,
            checks=tuple(Check(what=what, answer="yes") for what in (*points, *keyed)),
        )

    def heat(self, item: Item, attempt: int, seats: dict[str, Measured]) -> None:
        """Heat an item, and further each time that a gauge does not pass."""
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
        self.add(
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

    def axial(self, item: Item, state: str, attempt: int) -> None:
        """Measure where an item came to rest."""
        assert item.axial is not None
        chance = Chance(self.truth.seed, "axial", item.key, state, attempt)
        target = item.axial.target.si
        # A hot part stands off its shoulder by the draw of its cooling; cold it has closed up.
        away = 60e-6 if state == "hot" else 10e-6
        self.add(
            AxialMeasured,
            item=item.key,
            state=state,
            value=self.shop.position(target + away + chance.normal(15e-6)),
            instrument=self.shop.depth,
        )

    def cooling(self, item: Item, *, mounted: Mounted | None, name: str) -> None:
        """Take temperatures around the shaft at an item and beside it."""
        start, end = item.outline.start.si, item.outline.end.si
        places = ((start + end) / 2, end + 0.05)
        warm = mounted.read_warm if mounted else None
        self.add(
            Cooling,
            surroundings=self.shop.temperature(self.shop.hall),
            instrument=self.shop.thermometer,
            temperatures=self.bench.warmth(
                name=f"{self.place.step} {self.place.attempt} {name}",
                positions=places,
                warm=warm,
            ),
        )

    def sign(self, covers: str, *, inspected: bool) -> None:
        """Sign for what was done, and for having inspected it where that is due."""
        self.add(Signature, role="technician", meaning="performed", covers=covers)
        if inspected:
            self.clock.wait(15)
            self.add(Signature, by=self.shop.inspector, role="inspector", meaning="inspected",
                      covers=covers)  # fmt: skip

    def survey(
        self,
        purpose: SurveyPurpose,
        *,
        on: str | None,
        kinks: Sequence[Kink],
        name: str,
        out_of_order: str | None = None,
    ) -> str:
        """Read every station in reach once the step is on, close the survey and give its id."""
        method = self.plan.runout
        stations = self.bench.survey(
            name=name, stations=self.plan.stations_in_reach(on), kinks=kinks
        )
        begun = self.clock.wait(18)
        closed = self.clock.wait(24)
        return self.add(
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
            if (slip.step, slip.station) == (self.place.step, one.station) and purpose == "after"
        )


def _ten_times(typed: str) -> str:
    """Slip the decimal point of a reading by one place."""
    whole, point, decimals = typed.partition(".")
    if not point:
        return f"{typed}0"
    return f"{whole}.{decimals[1:]}0"
