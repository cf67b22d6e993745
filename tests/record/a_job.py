"""One small invented job with every kind of entry, made by hand."""

from models.job import (
    Advance,
    AnyEntry,
    AttemptOpened,
    AxialMeasured,
    BalanceCorrection,
    BalancePlan,
    BalanceRun,
    Calibration,
    Check,
    Component,
    Confirmation,
    Cooling,
    CoolingLimits,
    Correction,
    CorrectionPlane,
    Decision,
    DrawUp,
    ExpansionAt,
    FieldReading,
    GaugeTry,
    Handling,
    Heating,
    HighSpeedRun,
    Hot,
    Instrument,
    Item,
    Job,
    JournalsWeighed,
    Land,
    LengthLimit,
    Magnetism,
    ModulusAt,
    Mount,
    Note,
    Origin,
    Outline,
    OwnMaterial,
    Person,
    Place,
    Plan,
    PlaneReading,
    Question,
    Removal,
    Rotor,
    RunoutMethod,
    RunoutSurvey,
    Settled,
    SetUp,
    Shaft,
    ShaftStep,
    Signature,
    SizeSurvey,
    Station,
    StationReadings,
    StationWatched,
    Step,
    StoredVerdict,
    TemperatureLimit,
    TrialReading,
    TrialRound,
    VibrationReading,
    Warmth,
)
from models.units import (
    Angle,
    Conductivity,
    Density,
    Duration,
    Expansion,
    FieldStrength,
    HeatCapacity,
    Length,
    Mass,
    Pressure,
    Ratio,
    Speed,
    Temperature,
    TemperatureStep,
    Torque,
    Unbalance,
)
from tests.record.things import FOUND_OUT, NUMBERED, entries_beside

__all__ = [
    "ANGLES",
    "FORGING",
    "NUMBER",
    "a_job",
    "a_survey",
    "an_attempt",
    "at",
    "attempt_at",
    "settled",
]

NUMBER = "R-17"
ANGLES = tuple(Angle.read(f"{degrees}°") for degrees in (0, 90, 180, 270))
DRAWING = Origin(document="RD-100", revision="B", note="note 4")


def mm(text: str) -> Length:
    return Length.read(text, "mm")


def celsius(text: str) -> Temperature:
    return Temperature.read(text, "°C")


def limit(text: str, unit: str = "µm") -> LengthLimit:
    return LengthLimit(value=Length.read(text, unit), origin=DRAWING)


# As a shop types it from the certificate of an invented forge.
FORGING = OwnMaterial(
    name="own forging",
    source="certificate 17",
    density=Density.read("0.2836 lb/in³"),
    poisson=Ratio.read("0.29"),
    expansions=(
        ExpansionAt(temperature=celsius("100"), coefficient=Expansion.read("12 µm/(m·K)")),
        ExpansionAt(temperature=celsius("300"), coefficient=Expansion.read("13 µm/(m·K)")),
    ),
    moduli=(ModulusAt(temperature=celsius("20"), modulus=Pressure.read("206 GPa")),),
    conductivity=Conductivity.read("42 W/(m·K)"),
    specific_heat=HeatCapacity.read("470 J/(kg·K)"),
    yield_strength=Pressure.read("640 MPa"),
)


def at(minute: int) -> str:
    return f"2031-03-04T{8 + minute // 60:02d}:{minute % 60:02d}:00+01:00"


def attempt_at(step: str, attempt: int = 1) -> Place:
    return Place(kind="attempt", step=step, attempt=attempt)


def an_item(key: str, start: str) -> Item:
    end = str(int(start) + 60)
    return Item(
        key=key,
        name=f"wheel {key}",
        kind="hot",
        outline=Outline(
            kind="impeller", start=mm(start), end=mm(end), bore=mm("120"), outer=mm("380.5")
        ),
        lands=(
            Land(
                key="front",
                start=mm(start),
                end=mm(end),
                nominal_diameter=mm("120"),
                hub_outer_diameter=mm("170"),
                least_interference=limit("90"),
                greatest_interference=limit("120"),
            ),
        ),
        highest_temperature=TemperatureLimit(value=celsius("315"), origin=DRAWING),
        keyed=True,
        friction=Ratio.read("0.15"),
        friction_origin=Origin(document="common practice"),
    )


def a_plan(revision: str = "A", reason: str = "first issue") -> Plan:
    return Plan(
        revision=revision,
        reason=reason,
        written_by="eva",
        issued_by="ivo",
        issued_at=at(0),
        decision_rule="proved",
        rotor=Rotor(serial="S-4711", name="Invented blower rotor", invented=True),
        shaft=Shaft(
            serial="W-1",
            material="42CrMo4",
            steps=(ShaftStep(start=mm("0"), end=mm("900"), diameter=mm("120")),),
        ),
        first_journal="journal 1",
        second_journal="journal 2",
        stations=(
            Station(key="journal 1", name="journal, drive end", position=mm("40"), kind="journal"),
            Station(key="middle", name="middle", position=mm("450")),
            Station(key="journal 2", name="journal, free end", position=mm("860"), kind="journal"),
        ),
        steps=(
            Step(
                key="one",
                title="first wheel",
                items=(an_item("w1", "300"),),
                change_limit=limit("12.5"),
            ),
            Step(
                key="two",
                title="second wheel",
                items=(an_item("w2", "500"),),
                change_limit=limit("12.5"),
            ),
        ),
        runout=RunoutMethod(marks=ANGLES, attitude="horizontal", supports="V-blocks"),
        cooling=CoolingLimits(
            side_to_side=TemperatureStep.read("1", "K"),
            above_surroundings=TemperatureStep.read("3.6", "°F"),
            agreement=Length.read("2.5", "µm"),
            time_constant_hours=1.75,
            origin=DRAWING,
        ),
        balance=BalancePlan(
            first_plane=CorrectionPlane(
                key="P1", name="plane 1", position=mm("100"), radius=mm("150")
            ),
            second_plane=CorrectionPlane(
                key="P2", name="plane 2", position=mm("800"), radius=mm("150")
            ),
            limit="grade",
            grade=2.5,
            origin=DRAWING,
            after_steps=("one",),
        ),
        smoothing_factor=0.1,
        materials=(FORGING,),
    )


def common(entry_id: str, place: Place, minute: int) -> dict[str, object]:
    return {
        "id": entry_id,
        "place": place,
        "by": "tom",
        "done_at": at(minute),
        "entered_at": at(minute + 1),
        "plan": "A",
    }


def a_survey(
    entry_id: str,
    place: Place,
    minute: int,
    *,
    stations: tuple[StationReadings, ...] = (),
    **more: object,
) -> RunoutSurvey:
    facts: dict[str, object] = {
        "purpose": "after",
        "set_up": SetUp(
            attitude="horizontal",
            supports="V-blocks",
            supported_at=("journal 1", "journal 2"),
            indicators=("DI-3",),
            lever_angle=Angle.read("15°"),
        ),
        "unit": "µm",
        "angles": ANGLES,
        "stations": stations,
        "instrument": "DI-3",
        **common(entry_id, place, minute),
        **more,
    }
    return RunoutSurvey(**facts)


def an_attempt(
    entry_id: str, step: str, attempt: int = 1, minute: int = 30, **more: object
) -> AttemptOpened:
    return AttemptOpened(**common(entry_id, attempt_at(step, attempt), minute), **more)


def settled(
    entry_id: str, step: str, attempt: int = 1, minute: int = 90, outcome: str = "within limits"
) -> Settled:
    return Settled(**common(entry_id, attempt_at(step, attempt), minute), outcome=outcome)


BARE_READINGS = (
    StationReadings(
        station="journal 1", typed=("0", "1.5", "2", "0.5"), again="0", seconds=(0, 9, None, 31)
    ),
    StationReadings(station="middle", typed=("−1", None, "4", "1")),
    StationReadings(station="journal 2", total="3", high_spot=Angle.read("137.5°")),
    StationReadings(station="never read"),
)


def entries() -> tuple[AnyEntry, ...]:
    one = attempt_at("one")
    return (
        a_survey(
            "bare",
            Place(kind="bare shaft"),
            5,
            stations=BARE_READINGS,
            purpose="bare shaft",
            read_by="eva",
            closed_at=at(9),
            corrections=(
                Correction(
                    where=("middle", "2"),
                    was="40",
                    now="4",
                    reason="a digit too many",
                    by="tom",
                    at=at(8),
                ),
            ),
            kept=(
                Question(
                    where=("middle", "1"),
                    question="no surface?",
                    answer="keyway",
                    by="tom",
                    at=at(8),
                ),
            ),
        ),
        SizeSurvey(
            **common("bore", one, 12),
            item="w1",
            land="front",
            feature="bore",
            instrument="BG-2",
            unit="mm",
            positions=(mm("310"), mm("350")),
            angles=ANGLES[:2],
            typed=(("119.892", "119.891"), ("119.893", None)),
            part_temperature=celsius("20.4"),
            closed_at=at(14),
        ),
        an_attempt("try one", "one", minute=15, baseline="bare", components=(("w1", "C-1"),)),
        Confirmation(
            **common("looked", one, 20),
            item="w1",
            moment="before the furnace",
            serial="C-1",
            checks=(
                Check(what="faces the right way", answer="yes"),
                Check(what="key fitted", answer="no", note="fitted at 08:21"),
            ),
        ),
        Heating(
            **common("heat", one, 25),
            item="w1",
            method="oven",
            set_point=celsius("280"),
            temperatures=(
                Hot(where="bore", temperature=celsius("262"), at=at(50), land="front"),
                Hot(where="bore", temperature=celsius("263"), at=at(50), land="front"),
                Hot(
                    where="rim",
                    temperature=Temperature.read("510 °F"),
                    at=at(51),
                    angle=Angle.read("90°"),
                ),
            ),
            gauge=(
                GaugeTry(land="front", size=mm("120.30"), passed=False, at=at(50)),
                GaugeTry(land="front", size=mm("120.30"), passed=True, at=at(52)),
            ),
        ),
        Mount(
            **common("mount", one, 53),
            item="w1",
            outcome="seated",
            door_opened_at=at(52),
            seated_at=at(53),
            shoulder="felt all round",
            clock_position=Angle.read("0°"),
        ),
        AxialMeasured(**common("axial", one, 55), item="w1", state="hot", value=mm("300.12")),
        Cooling(
            **common("cool", one, 80),
            surroundings=celsius("19"),
            temperatures=(
                Warmth(position=mm("450"), angle=ANGLES[0], temperature=celsius("21")),
                Warmth(position=mm("450"), angle=ANGLES[2], temperature=celsius("21.5")),
            ),
        ),
        BalanceRun(
            **common("balanced", one, 84),
            purpose="as found",
            speed=Speed.read("600 r/min"),
            instrument="DI-3",
            readings=(
                PlaneReading(plane="P1", amount=Unbalance.read("31 g·mm"), angle=ANGLES[1]),
                PlaneReading(plane="P2", amount=Unbalance.read("0.05 oz·in"), angle=ANGLES[2]),
            ),
        ),
        BalanceCorrection(
            **common("corrected", one, 84),
            plane="P1",
            angle=ANGLES[3],
            amount=Unbalance.read("30 g·mm"),
            how="ground",
            item="w1",
            allowed_by="ivo",
        ),
        TrialRound(
            **common("round", one, 84),
            plane="P2",
            trial=Unbalance.read("40 g·mm"),
            instrument="DI-3",
            readings=tuple(
                TrialReading(angle=angle, reading=shown)
                for angle, shown in zip(ANGLES, ("7", "5", "1", "5"), strict=True)
            ),
            plain="3",
        ),
        HighSpeedRun(
            **common("at speed", one, 84),
            where_run="vacuum chamber",
            speed=Speed.read("11000 r/min"),
            instrument="DI-3",
            readings=(VibrationReading(place="probe 1", amplitude=Length.read("12 µm")),),
        ),
        Magnetism(
            **common("magnetism", one, 84),
            instrument="DI-3",
            readings=(FieldReading(place="journal 1", value=FieldStrength.read("-1.4 gauss")),),
        ),
        JournalsWeighed(
            **common("weighed", one, 84),
            first=Mass.read("41.2 kg"),
            second=Mass.read("88 lb"),
            instrument="DI-3",
        ),
        StationWatched(
            **common("watched", one, 82),
            station="middle",
            value=Length.read("14.5 µm"),
            angle=ANGLES[1],
            instrument="DI-3",
        ),
        DrawUp(
            **common("drawn", one, 83),
            item="w1",
            advances=(
                Advance(angle=ANGLES[0], zero=mm("12.41"), drawn_up=mm("8.40")),
                Advance(angle=ANGLES[2], zero=mm("12.43"), drawn_up=Length.read("0.331 in")),
            ),
            contact=Ratio.read("88 %"),
            contact_note="heavier at the large end",
            dilation_pressure=Pressure.read("1350 bar"),
            axial_pressure=Pressure.read("120 bar"),
            hold=Duration.read("30 min"),
            hub_growth=Length.read("0.11 mm"),
            nut_torque=Torque.read("300 N·m"),
        ),
        a_survey("after one", one, 85, stations=BARE_READINGS[:2], closed_at=at(89)),
        Removal(
            **common("off", one, 91), item="w1", method="gas flame", temperature=celsius("240")
        ),
        settled("end one", "one", outcome="removed", minute=95),
        an_attempt("try two", "one", 2, minute=97, baseline="after one"),
        Note(**common("note", attempt_at("one", 2), 98), words="Blue mark at the rear land"),
        Handling(**common("lift", attempt_at("one", 2), 99), what="lift"),
        *entries_beside(common),
        settled("end two", "one", 2, minute=110),
        Decision(
            **common("decided", attempt_at("one", 2), 111),
            about="runout after attempt 1",
            disposition="rework",
            words="heat hotter",
            supersedes="note",
            reason="said better",
        ),
        Signature(
            **common("signed", attempt_at("one", 2), 112),
            role="technician",
            meaning="performed",
            covers="one",
        ),
    )


def a_job(number: str = NUMBER) -> Job:
    return Job(
        number=number,
        customer="Invented customer",
        shop="Invented shop",
        opened_at=at(0),
        people=(
            Person(key="tom", name="Tom Tester", initials="TT", role="technician"),
            Person(key="ivo", name="Ivo Inspektor", initials="II", role="inspector"),
            Person(key="eva", name="Eva Évora", initials="EÉ", role="engineer", employer="Shop"),
        ),
        instruments=(
            Instrument(
                tag="DI-3",
                kind="dial indicator",
                resolution=Length.read("0.5 µm"),
                uncertainty=Length.read("1.2 µm"),
                range="0 to 1 mm",
                calibration=Calibration(done_on="2031-01-10", due_on="2032-01-10"),
            ),
            Instrument(tag="BG-2", kind="bore gauge", expansion=Expansion.read("11.5", "µm/(m·K)")),
        ),
        components=(Component(serial="C-1", name="wheel", item="w1", drawing="RD-101"),),
        plans=(a_plan(), a_plan("B", "new limit")),
        entries=entries(),
        verdicts=(
            StoredVerdict(
                id="v1",
                subject="after one",
                rule="runout-changed",
                edition=1,
                verdict="outside",
                message="The middle moved by 14 µm; 12.5 µm are allowed.",
                inputs={
                    "change [µm]": 14.0,
                    "größe": 1e-07,
                    "why": "set-up",
                    "closed": True,
                    "angle": None,
                },
                judged_at=at(90),
                step="one",
                attempt=1,
            ),
        ),
        numbered_findings=(NUMBERED,),
        instrument_events=(FOUND_OUT,),
    )
